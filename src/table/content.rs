//! What a cell holds.

/// What a cell holds.
#[derive(Clone, Debug, PartialEq)]
pub enum Content {
    /// Text.
    Text(String),
    /// A number.
    Number {
        /// The number stored.
        value: f64,
        /// The unit its number format prints behind it: `L` of the format `0.0" L"`.
        unit: Option<Box<str>>,
    },
    /// A share: the number stored is 0.85 where 85 % is shown.
    Percent(f64),
    /// A day, `2026-07-18`, or a day and time, `2026-07-18 13:30`.
    Date(String),
    /// True or false.
    Truth(bool),
    /// A fault of the spreadsheet: `#REF!`.
    Fault(String),
    /// A formula whose value was never stored.
    NoValue {
        /// The formula, with its equals sign.
        formula: String,
    },
}

impl Content {
    /// As text: numbers with the fewest digits that give them back, to fifteen.
    pub fn text(&self) -> String {
        match self {
            Self::Text(text) | Self::Date(text) | Self::Fault(text) => text.clone(),
            Self::Number { value, unit: None } => number(*value),
            Self::Number {
                value,
                unit: Some(unit),
            } => format!("{} {unit}", number(*value)),
            Self::Percent(share) => format!("{} %", number(share * 100.0)),
            Self::Truth(yes) => if *yes { "yes" } else { "no" }.to_owned(),
            Self::NoValue { formula } => formula.clone(),
        }
    }

    /// Whether nothing but space is in it.
    pub fn is_blank(&self) -> bool {
        matches!(self, Self::Text(text) if text.trim().is_empty())
    }
}

/// Spreadsheets count with fifteen digits: 0.1 + 0.2 is shown as 0.3 there, and here.
fn number(value: f64) -> String {
    let digits: f64 = format!("{value:.14e}").parse().unwrap_or(value);
    format!("{digits}")
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn numbers_are_shown_as_spreadsheets_show_them() {
        let plain = |value| Content::Number { value, unit: None }.text();
        assert_eq!(plain(0.1 + 0.2), "0.3");
        assert_eq!(plain(1480.0), "1480");
        assert_eq!(plain(-15.5), "-15.5");
        let litres = Content::Number {
            value: 68.0,
            unit: Some("L".into()),
        };
        assert_eq!(litres.text(), "68 L");
        assert_eq!(Content::Percent(0.855).text(), "85.5 %");
        assert!(Content::Text(" \u{a0}\n".into()).is_blank());
    }
}
