//! Whose oil it is, and how far it has changed.

use super::causes::Diagnosis;
use super::limits::Level;

/// The answer to "is it the oil on the label".
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Whose {
    /// The oil on the label, within the limits of its class.
    AsLabelled,
    /// The oil on the label, changed beyond them.
    Changed,
    /// Another oil, or one mixed in.
    Another,
    /// Not known.
    NotKnown,
}

impl Whose {
    /// Every answer, in the order of the table.
    pub const ALL: [Self; 4] = [
        Self::AsLabelled,
        Self::Changed,
        Self::Another,
        Self::NotKnown,
    ];

    /// The words.
    pub fn words(self) -> &'static str {
        match self {
            Self::AsLabelled => "as labelled",
            Self::Changed => "the labelled oil, changed",
            Self::Another => "another oil",
            Self::NotKnown => "not known",
        }
    }
}

/// From the causes and the movement of the viscosity; the reason where it is not known.
pub(super) fn of(diagnosis: &Diagnosis, viscosity: Option<Level>) -> (Whose, Option<String>) {
    use super::causes::Cause;
    let named = |c: Cause| {
        diagnosis
            .causes
            .iter()
            .any(|n| n.cause == c && n.likelihood >= 0.5)
    };
    if named(Cause::LabError) {
        return (
            Whose::NotKnown,
            Some("the figures do not belong together".to_owned()),
        );
    }
    if diagnosis.other_oil >= 0.5 && diagnosis.causes.iter().any(|n| n.cause.is_other_oil()) {
        return (Whose::Another, None);
    }
    let doubt =
        diagnosis.other_oil >= 0.25 && diagnosis.causes.iter().any(|n| n.cause.is_other_oil());
    match viscosity {
        None => (
            Whose::NotKnown,
            Some("no viscosity was measured".to_owned()),
        ),
        Some(_) if doubt => (
            Whose::NotKnown,
            Some("not decided between another oil and a changed one".to_owned()),
        ),
        Some(Level::Fine) => (Whose::AsLabelled, None),
        Some(_) => (Whose::Changed, None),
    }
}
