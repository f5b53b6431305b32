//! How wide a text will be, estimated: the reader's fonts are not known when the page is made.
//!
//! The widths are those of the sans-serif metric family most systems map to (Helvetica, Arial,
//! Liberation Sans), from memory, checked against the drawn pages; labels are kept apart by them.

use super::{Pt, Rect};

/// Which side of the anchor the text lies on.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Anchor {
    /// To the right of it.
    Start,
    /// Around it.
    Middle,
    /// To the left of it.
    End,
}

impl Anchor {
    /// The class that anchors it; none where SVG does so by itself.
    pub fn class(self) -> Option<&'static str> {
        match self {
            Anchor::Start => None,
            Anchor::Middle => Some("am"),
            Anchor::End => Some("ae"),
        }
    }
}

/// How a label is set.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Style {
    /// A figure on an axis.
    Tick,
    /// The name of an axis.
    Axis,
    /// A dimension's figure.
    Dim,
    /// A label inside the figure.
    Label,
    /// The same, heavier.
    Strong,
    /// The heading of a figure's part.
    Head,
    /// A figure on a filled bar, in the colour of the sheet.
    Inside,
}

impl Style {
    /// The class in the style sheet.
    pub fn class(self) -> &'static str {
        match self {
            Style::Tick => "t-tick",
            Style::Axis => "t-axis",
            Style::Dim => "t-dim",
            Style::Label => "t-label",
            Style::Strong => "t-strong",
            Style::Head => "t-head",
            Style::Inside => "t-in",
        }
    }

    /// The size in pixels, as in the style sheet.
    pub fn size(self) -> f64 {
        match self {
            Style::Tick | Style::Inside => 12.0,
            Style::Axis | Style::Dim => 12.5,
            Style::Label | Style::Strong => 13.0,
            Style::Head => 14.0,
        }
    }

    fn heavy(self) -> bool {
        matches!(
            self,
            Style::Dim | Style::Strong | Style::Head | Style::Inside
        )
    }
}

/// Width of one character in thousandths of the size.
fn unit_width(c: char) -> f64 {
    match c {
        'i' | 'j' | 'l' | '\'' => 222.0,
        ' ' | '!' | ',' | '.' | '/' | ':' | ';' | 'I' | '[' | ']' | '\\' | 'f' | 't' | '|'
        | '\u{a0}' => 278.0,
        '(' | ')' | '-' | 'r' | '`' | '{' | '}' | '²' | '³' => 333.0,
        '"' | '*' | '°' => 390.0,
        '\u{202f}' | '\u{2009}' => 200.0,
        'c' | 'k' | 's' | 'v' | 'x' | 'y' | 'z' | 'J' => 500.0,
        'F' | 'T' | 'Z' => 611.0,
        'A' | 'B' | 'E' | 'K' | 'P' | 'S' | 'V' | 'X' | 'Y' | '&' => 667.0,
        'C' | 'D' | 'H' | 'N' | 'R' | 'U' | 'w' => 722.0,
        'G' | 'O' | 'Q' => 778.0,
        'M' | 'm' => 833.0,
        '%' => 889.0,
        'W' => 944.0,
        '@' => 1015.0,
        '+' | '<' | '=' | '>' | '~' | '\u{2212}' => 584.0,
        c if u32::from(c) < 0x250 => 556.0,
        c if u32::from(c) < 0x2e80 => 620.0,
        _ => 1000.0,
    }
}

/// How much wider the widest letter of the list of fonts runs (`DejaVu Sans`, Verdana): labels are
/// kept apart by it, so that they stay apart with every font of the list. Measured in a browser.
const WIDER: f64 = 1.13;

/// Width of a text in pixels at that style.
pub fn width(text: &str, style: Style) -> f64 {
    let units: f64 = text.chars().map(unit_width).sum();
    let weight = if style.heavy() { 1.06 } else { 1.0 };
    units * style.size() * weight * WIDER / 1000.0
}

/// The box a text takes when its base line starts, ends or is centred at the point.
pub fn text_box(at: Pt, anchor: Anchor, style: Style, text: &str) -> Rect {
    let w = width(text, style);
    let x = match anchor {
        Anchor::Start => at.x,
        Anchor::Middle => at.x - w / 2.0,
        Anchor::End => at.x - w,
    };
    let size = style.size();
    Rect {
        x,
        y: at.y - 0.76 * size,
        w,
        h: 0.98 * size,
    }
}

/// The text, cut with an ellipsis where it would be wider than the space.
pub fn fit(text: &str, style: Style, space: f64) -> String {
    if width(text, style) <= space {
        return text.to_owned();
    }
    let mut kept = String::new();
    for c in text.chars() {
        kept.push(c);
        if width(&format!("{kept}…"), style) > space {
            kept.pop();
            break;
        }
    }
    format!("{}…", kept.trim_end())
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn long_names_are_cut_to_fit() {
        let long = "Polymer-thickened extreme pressure gear oil of viscosity grade 220";
        let short = fit(long, Style::Label, 120.0);
        assert!(short.ends_with('…') && width(&short, Style::Label) <= 120.0);
        assert_eq!(fit("MG-220", Style::Label, 120.0), "MG-220");
        assert_eq!(fit("MG-220", Style::Label, 1.0), "…");
    }
}
