//! Numbers as registers hold them: decimal points or commas, marks between thousands.
//!
//! One rule holds for a file, because a register is typed by one office: it is found from cells
//! that can only be read one way, or stated. A number that both rules can read and no rule decides
//! is not read.

/// What stands between whole and fraction.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Decimal {
    /// `52.0`; a comma parts thousands.
    Point,
    /// `52,0`; a point parts thousands.
    Comma,
}

impl Decimal {
    /// Its name.
    pub const fn word(self) -> &'static str {
        match self {
            Self::Point => "point",
            Self::Comma => "comma",
        }
    }

    /// The rule of that name.
    pub fn of(word: &str) -> Option<Self> {
        [Self::Point, Self::Comma]
            .into_iter()
            .find(|d| d.word() == word.trim())
    }

    const fn mark(self) -> char {
        match self {
            Self::Point => '.',
            Self::Comma => ',',
        }
    }

    const fn other(self) -> Self {
        match self {
            Self::Point => Self::Comma,
            Self::Comma => Self::Point,
        }
    }
}

/// A number as far as it could be read.
#[derive(Clone, Debug, PartialEq)]
pub enum Read {
    /// Digits with a point, as the site file takes them.
    Is(String),
    /// Two readings, and no rule that decides.
    Either(String, String),
}

/// Parts a text into the number it begins with and the rest.
pub fn split(text: &str) -> Option<(&str, &str)> {
    let unsigned = text.strip_prefix(['+', '-', '\u{2212}']).unwrap_or(text);
    let signs = text.len() - unsigned.len();
    if !unsigned.starts_with(|c: char| c.is_ascii_digit()) {
        return None;
    }
    let bytes = unsigned.as_bytes();
    let mut end = 0;
    while end < unsigned.len() {
        let rest = &unsigned[end..];
        let Some(c) = rest.chars().next() else { break };
        let behind = &unsigned[end + c.len_utf8()..];
        let figures = behind.bytes().take_while(u8::is_ascii_digit).count();
        let goes_on = match c {
            '0'..='9' => true,
            '.' | ',' => figures > 0,
            '\'' | '\u{2019}' | ' ' | '\u{a0}' | '\u{202f}' | '\u{2009}' => {
                figures == 3 && bytes[..end].iter().all(u8::is_ascii_digit) && end <= 3
            }
            _ => false,
        };
        if !goes_on {
            break;
        }
        end += c.len_utf8();
    }
    Some((&text[..signs + end], &unsigned[end..]))
}

/// The rule by which alone a number can be read, where there is one.
pub fn evidence(token: &str) -> Option<Decimal> {
    let count = |d: Decimal| token.matches(d.mark()).count();
    let (points, commas) = (count(Decimal::Point), count(Decimal::Comma));
    let last = token
        .chars()
        .rev()
        .find(|c| *c == '.' || *c == ',')
        .map(|c| match c {
            '.' => Decimal::Point,
            _ => Decimal::Comma,
        })?;
    match (points, commas) {
        (1.., 1..) if count(last) == 1 => Some(last),
        (1.., 1..) => None,
        _ if count(last) > 1 => Some(last.other()),
        _ => {
            let (whole, fraction) = token.split_once(last.mark())?;
            let whole = whole.trim_start_matches(['+', '-', '\u{2212}']);
            let sure = fraction.len() != 3 || whole == "0" || whole.len() > 3;
            sure.then_some(last)
        }
    }
}

/// Reads a number under the rule of its file.
pub fn read(token: &str, rule: Option<Decimal>) -> Read {
    let separated = token.contains(['.', ',']);
    match evidence(token).or(rule) {
        Some(decimal) => Read::Is(plain(token, decimal)),
        None if !separated => Read::Is(plain(token, Decimal::Point)),
        None => Read::Either(plain(token, Decimal::Point), plain(token, Decimal::Comma)),
    }
}

fn plain(token: &str, decimal: Decimal) -> String {
    token
        .chars()
        .filter_map(|c| match c {
            '\u{2212}' => Some('-'),
            '-' | '0'..='9' => Some(c),
            c if c == decimal.mark() => Some('.'),
            _ => None,
        })
        .collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    fn is(text: &str) -> Read {
        Read::Is(text.into())
    }

    #[test]
    fn numbers_are_parted_from_what_follows() {
        assert_eq!(split("15 gal"), Some(("15", " gal")));
        assert_eq!(split("1,2 L ea"), Some(("1,2", " L ea")));
        assert_eq!(split("1 200 L"), Some(("1 200", " L")));
        assert_eq!(split("-15°"), Some(("-15", "°")));
        assert_eq!(split("60-65 C"), Some(("60", "-65 C")));
        assert_eq!(split("6312-2RS"), Some(("6312", "-2RS")));
        assert_eq!(split("68."), Some(("68", ".")));
        assert_eq!(split("see plate"), None);
        assert_eq!(split("-"), None);
        assert_eq!(split("--5"), None);
    }

    #[test]
    fn the_rule_of_a_file_decides_what_a_number_alone_does_not() {
        // 1.200 and 52,0 of one register: common practice, one rule a file
        assert_eq!(evidence("52,0"), Some(Decimal::Comma));
        assert_eq!(evidence("1.200"), None);
        assert_eq!(evidence("1.200,5"), Some(Decimal::Comma));
        assert_eq!(evidence("1,200.5"), Some(Decimal::Point));
        assert_eq!(evidence("1.200.000"), Some(Decimal::Comma));
        assert_eq!(evidence("0.855"), Some(Decimal::Point));
        assert_eq!(evidence("1480"), None);
        assert_eq!(read("1.200", Some(Decimal::Comma)), is("1200"));
        assert_eq!(read("1.200", Some(Decimal::Point)), is("1.200"));
        assert_eq!(
            read("1.200", None),
            Read::Either("1.200".into(), "1200".into())
        );
        assert_eq!(read("52,0", None), is("52.0"));
        assert_eq!(read("1 200", None), is("1200"));
        assert_eq!(read("\u{2212}15", None), is("-15"));
    }
}
