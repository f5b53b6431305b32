//! Tells prose between formulas from the formulas.

use super::tokens::{Placed, Token};

/// Words that join formulas.
pub(super) const JOINTS: [&str; 28] = [
    "for",
    "if",
    "where",
    "else",
    "and",
    "with",
    "in",
    "at",
    "or",
    "otherwise",
    "from",
    "to",
    "below",
    "above",
    "over",
    "under",
    "up",
    "then",
    "than",
    "of",
    "by",
    "is",
    "are",
    "between",
    "held",
    "taken",
    "but",
    "as",
];
/// Names of functions.
pub(super) const FUNCTIONS: [&str; 21] = [
    "lg", "ln", "log", "log10", "exp", "sqrt", "sin", "cos", "tan", "asin", "acos", "atan",
    "arcsin", "arccos", "arctan", "sum", "min", "max", "abs", "tanh", "inv",
];

/// Whether a name is a word of prose rather than a symbol.
fn wordlike(name: &str) -> bool {
    let word = name.len() >= 3 && name.chars().all(char::is_lowercase);
    (word && !FUNCTIONS.contains(&name) && super::super::symbol::take_apart(name).base == name)
        || JOINTS.contains(&name)
}

/// Units made of two, which would read as fractions.
const UNITS: [(&str, &str); 5] = [
    ("r", "min"),
    ("rev", "s"),
    ("m", "s"),
    ("ft", "min"),
    ("mm2", "s"),
];

/// Whether a stretch is a figure with such a unit, or the unit alone.
fn unit(tokens: &[Placed]) -> bool {
    let rest = match tokens {
        [first, rest @ ..] if matches!(first.token, Token::Number(_)) => rest,
        all => all,
    };
    match rest {
        [a, stroke, b] => match (&a.token, &stroke.token, &b.token) {
            (Token::Name(a), Token::Sign("/"), Token::Name(b)) => {
                UNITS.contains(&(a.as_str(), b.as_str()))
            }
            _ => false,
        },
        _ => false,
    }
}

/// Whether a stretch reads as prose: two words side by side, a word and a figure, or nothing but
/// names with a word among them.
pub(super) fn prose(tokens: &[Placed]) -> bool {
    let name = |t: &Placed| match &t.token {
        Token::Name(name) => Some(wordlike(name)),
        _ => None,
    };
    let names = tokens.len() >= 2 && tokens.iter().all(|t| name(t).is_some());
    let names = names && tokens.iter().any(|t| name(t) == Some(true));
    let told = tokens
        .windows(2)
        .any(|pair| match (&pair[0].token, &pair[1].token) {
            (Token::Name(a), Token::Name(b)) => wordlike(a) && wordlike(b),
            (Token::Name(a), Token::Number(_)) => {
                wordlike(a) || (a.len() >= 2 && a.chars().all(char::is_uppercase))
            }
            _ => false,
        });
    names || told || unit(tokens)
}
