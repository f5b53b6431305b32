//! Takes a plain-text formula apart: figures, names, signs.

#[derive(Clone, Debug, PartialEq)]
pub(super) enum Token {
    Number(String),
    Name(String),
    Sign(&'static str),
}

/// A token with the place of its text.
pub(super) struct Placed {
    pub(super) token: Token,
    pub(super) from: usize,
    pub(super) to: usize,
}

/// Signs of two or more characters first.
const SIGNS: [(&str, &str); 29] = [
    ("…", "…"),
    ("...", "…"),
    ("..", "…"),
    ("<=", "≤"),
    (">=", "≥"),
    ("->", "→"),
    ("±", "±"),
    ("+/-", "±"),
    ("+-", "±"),
    ("≤", "≤"),
    ("≥", "≥"),
    ("≈", "≈"),
    ("~", "≈"),
    ("=", "="),
    ("<", "<"),
    (">", ">"),
    ("+", "+"),
    ("-", "−"),
    ("−", "−"),
    ("*", "*"),
    ("·", "*"),
    ("×", "*"),
    ("/", "/"),
    ("^", "^"),
    ("(", "("),
    (")", ")"),
    ("[", "["),
    ("]", "]"),
    ("|", "|"),
];
const MORE_SIGNS: [(&str, &str); 8] = [
    ("{", "{"),
    ("}", "}"),
    (",", ","),
    (";", ";"),
    (":", ":"),
    ("²", "²"),
    ("³", "³"),
    ("%", "%"),
];

/// The tokens of a text with their places; `None` where a character has no place in a formula.
pub(super) fn tokens(text: &str) -> Option<Vec<Placed>> {
    let mut out = Vec::new();
    let mut from = text.len() - text.trim_start().len();
    while let Some(first) = text[from..].chars().next() {
        let rest = &text[from..];
        let point = first == '.' && rest[1..].starts_with(|c: char| c.is_ascii_digit());
        let (token, length) = if first.is_ascii_digit() || point {
            let length = number(rest);
            (Token::Number(rest[..length].replace(' ', "")), length)
        } else if first.is_alphabetic() {
            let length = name(rest);
            (Token::Name(rest[..length].into()), length)
        } else {
            let sign = SIGNS
                .iter()
                .chain(&MORE_SIGNS)
                .find(|(raw, _)| rest.starts_with(raw))?;
            (Token::Sign(sign.1), sign.0.len())
        };
        let to = from + length;
        out.push(Placed { token, from, to });
        from = to + (text[to..].len() - text[to..].trim_start().len());
    }
    (!out.is_empty()).then_some(out)
}

/// Length of the number at the start: digits, perhaps parted in threes, a point, an exponent.
fn number(text: &str) -> usize {
    let bytes = text.as_bytes();
    let digits = |from: usize| {
        bytes[from..]
            .iter()
            .take_while(|b| b.is_ascii_digit())
            .count()
    };
    let mut len = digits(0);
    let leading = len <= 3;
    while leading && bytes.get(len) == Some(&b' ') && digits(len + 1) == 3 {
        len += 4;
    }
    if bytes.get(len) == Some(&b'.') && bytes.get(len + 1).is_some_and(u8::is_ascii_digit) {
        len += 1 + digits(len + 1);
    }
    if matches!(bytes.get(len), Some(b'e' | b'E')) {
        let sign = usize::from(matches!(bytes.get(len + 1), Some(b'-' | b'+')));
        let power = bytes
            .get(len + 1 + sign)
            .map_or(0, |_| digits(len + 1 + sign));
        if power > 0 {
            len += 1 + sign + power;
        }
    }
    len
}

/// Length of the name at the start: letters, digits, `_`, primes, and the point of `Pa.s`.
fn name(text: &str) -> usize {
    let mut before = ' ';
    for (i, c) in text.char_indices() {
        let point =
            c == '.' && before.is_alphabetic() && text[i + 1..].starts_with(char::is_alphabetic);
        let letter = c.is_alphanumeric() && !matches!(c, '²' | '³');
        if !(letter || point || matches!(c, '_' | '\'' | '′')) {
            return i;
        }
        before = c;
    }
    text.len()
}
