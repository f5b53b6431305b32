//! Writes formulas as MathML.

use super::Node;
use super::symbol::{Symbol, take_apart};
use crate::report::escape::{Markup, push_text};

/// The whole formula; symbols among `numbers` have been replaced and need signs between them.
pub(super) fn math(node: &Node, numbers: &[(&str, &str)]) -> Markup {
    let mut out = String::from("<math>");
    write(&mut out, node, !numbers.is_empty());
    out.push_str("</math>");
    Markup::trusted(out)
}

/// Puts numbers in place of symbols; returns how many. A side before the first `=` stays as it is
/// where it is a single symbol.
pub(super) fn put(node: &mut Node, numbers: &[(&str, &str)]) -> usize {
    match node {
        Node::Symbol(name) => match numbers
            .iter()
            .find(|(symbol, n)| symbol == name && !n.is_empty())
        {
            Some((_, number)) => {
                *node = Node::Number((*number).to_owned());
                1
            }
            None => 0,
        },
        Node::Row(parts) => {
            let named = matches!(parts.as_slice(), [Node::Symbol(_), Node::Sign("="), ..]);
            parts
                .iter_mut()
                .skip(usize::from(named))
                .map(|part| put(part, numbers))
                .sum()
        }
        Node::Product(parts) => parts.iter_mut().map(|part| put(part, numbers)).sum(),
        Node::Fraction(a, b) | Node::Power(a, b) => put(a, numbers) + put(b, numbers),
        Node::Root(a) | Node::Function(_, a) | Node::Group(_, a, _) => put(a, numbers),
        Node::Number(_) | Node::Words(_) | Node::Sign(_) => 0,
    }
}

fn tagged(out: &mut String, tag: &str, text: &str) {
    out.push('<');
    out.push_str(tag);
    out.push('>');
    push_text(out, text);
    out.push_str("</");
    out.push_str(tag);
    out.push('>');
}

fn wrapped(out: &mut String, tag: &str, inside: impl FnOnce(&mut String)) {
    out.push('<');
    out.push_str(tag);
    out.push('>');
    inside(out);
    out.push_str("</");
    out.push_str(tag);
    out.push('>');
}

fn write(out: &mut String, node: &Node, figures: bool) {
    match node {
        Node::Number(n) => number(out, n),
        Node::Symbol(name) => symbol(out, name),
        Node::Words(words) => tagged(
            out,
            "mtext",
            &format!("\u{a0}{}\u{a0}", words.replace("mm2/s", "mm²/s")),
        ),
        Node::Sign(sign) => tagged(out, "mo", sign),
        Node::Row(parts) => wrapped(out, "mrow", |out| {
            for part in parts {
                write(out, part, figures);
            }
        }),
        Node::Product(parts) => wrapped(out, "mrow", |out| product(out, parts, figures)),
        Node::Fraction(a, b) => pair(out, "mfrac", a, b, figures),
        Node::Power(a, b) => pair(out, "msup", a, b, figures),
        Node::Root(a) => wrapped(out, "msqrt", |out| write(out, a, figures)),
        Node::Function(name, a) => wrapped(out, "mrow", |out| {
            tagged(out, "mi", if name == "sum" { "∑" } else { name });
            tagged(out, "mo", "\u{2061}");
            if !matches!(a.as_ref(), Node::Group(..)) {
                out.push_str("<mspace width=\"0.17em\"/>");
            }
            write(out, a, figures);
        }),
        Node::Group(open, a, close) => wrapped(out, "mrow", |out| {
            tagged(out, "mo", open);
            write(out, a, figures);
            tagged(out, "mo", close);
        }),
    }
}

fn pair(out: &mut String, tag: &str, a: &Node, b: &Node, figures: bool) {
    wrapped(out, tag, |out| {
        write(out, a, figures);
        write(out, b, figures);
    });
}

/// Factors side by side; a sign of multiplication stands where two figures would meet.
fn product(out: &mut String, parts: &[Node], figures: bool) {
    for (index, part) in parts.iter().enumerate() {
        if index > 0 {
            let meets = starts_with_figure(part)
                || (figures
                    && ends_with_figure(&parts[index - 1])
                    && !matches!(part, Node::Symbol(_)));
            tagged(out, "mo", if meets { "×" } else { "\u{2062}" });
            if !meets && matches!(part, Node::Function(..)) {
                out.push_str("<mspace width=\"0.17em\"/>");
            }
        }
        write(out, part, figures);
    }
}

fn starts_with_figure(node: &Node) -> bool {
    match node {
        Node::Number(_) => true,
        Node::Power(base, _) => starts_with_figure(base),
        Node::Fraction(above, _) => starts_with_figure(above),
        Node::Row(parts) | Node::Product(parts) => parts.first().is_some_and(starts_with_figure),
        _ => false,
    }
}

fn ends_with_figure(node: &Node) -> bool {
    match node {
        Node::Number(_) => true,
        Node::Power(base, _) => ends_with_figure(base),
        _ => false,
    }
}

/// A number with its thousands parted; an exponent becomes a power of ten.
fn number(out: &mut String, text: &str) {
    let Some((mantissa, power)) = text.split_once(['e', 'E']) else {
        return tagged(out, "mn", &parted(text));
    };
    let power = power.trim_start_matches('+').replace('-', "\u{2212}");
    wrapped(out, "mrow", |out| {
        tagged(out, "mn", &parted(mantissa));
        tagged(out, "mo", "×");
        wrapped(out, "msup", |out| {
            tagged(out, "mn", "10");
            tagged(out, "mn", &power);
        });
    });
}

fn parted(text: &str) -> String {
    let text = text.replace('-', "\u{2212}");
    let whole = text.split('.').next().unwrap_or_default();
    if whole.len() < 5 || !whole.chars().all(|c| c.is_ascii_digit()) {
        return text;
    }
    let mut out = String::new();
    for (i, c) in whole.chars().enumerate() {
        if i > 0 && (whole.len() - i).is_multiple_of(3) {
            out.push('\u{202f}');
        }
        out.push(c);
    }
    out + &text[whole.len()..]
}

fn symbol(out: &mut String, name: &str) {
    if name.contains('.') {
        return tagged(out, "mi", &name.replace('.', "·"));
    }
    let symbol = take_apart(name);
    if symbol.sub.is_empty() {
        return base(out, &symbol);
    }
    wrapped(out, "msub", |out| {
        base(out, &symbol);
        let digits = symbol.sub.chars().all(|c| c.is_ascii_digit());
        tagged(out, if digits { "mn" } else { "mi" }, &symbol.sub);
    });
}

fn base(out: &mut String, symbol: &Symbol) {
    if symbol.primes.is_empty() {
        return letter(out, &symbol.base);
    }
    // side by side: as a superscript the prime would be raised twice
    wrapped(out, "mrow", |out| {
        letter(out, &symbol.base);
        out.push_str("<mo form=\"postfix\" lspace=\"0em\" rspace=\"0em\">");
        push_text(out, &symbol.primes);
        out.push_str("</mo>");
    });
}

/// A letter. A slanted v cannot be told from ν in many fonts: it stands upright.
fn letter(out: &mut String, base: &str) {
    if base == "v" {
        out.push_str("<mi mathvariant=\"normal\">v</mi>");
    } else {
        tagged(out, "mi", base);
    }
}
