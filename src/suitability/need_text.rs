//! Class needs in words.

use super::card::OilCard;
use super::need::{Asked, How};
use crate::model::rulebook::{Basis, Confidence, Level, Need};
use crate::model::word::Word;

/// The words of a finding on a class need.
pub(super) struct Text {
    pub(super) rule: String,
    pub(super) title: String,
    /// The same where many oils are told of at once.
    pub(super) short: String,
    pub(super) why: String,
    pub(super) act: String,
    pub(super) source: Vec<String>,
    pub(super) basis: Basis,
    pub(super) confidence: Confidence,
}

impl Asked {
    /// The words for a class asked for by name.
    pub(super) fn text(&self, oil: &OilCard<'_>, how: How) -> Text {
        let act = match how {
            How::Leave if self.numbered => {
                format!(
                    "ask the maker whether {} is meant to the number",
                    self.written
                )
            }
            How::Leave => format!(
                "ask the maker whether this oil will do for {}",
                self.written
            ),
            How::Undeclared => {
                format!(
                    "ask the supplier whether {} meets {}",
                    oil.facts.id, self.written
                )
            }
            How::Short | How::Met => format!("an oil that declares {}", self.written),
        };
        Text {
            rule: "class-asked".into(),
            title: format!("{} asked for", self.written),
            short: format!("{} asked for", self.written),
            why: match how {
                How::Short => "none of it serves".into(),
                How::Leave if self.numbered => "another grade of the same scale".into(),
                How::Leave => format!("its list of additives has no {}", self.written),
                How::Undeclared | How::Met => "whether it serves is not known".into(),
            },
            act,
            source: vec!["the point's own record".into()],
            basis: Basis::Seen,
            confidence: Confidence::High,
        }
    }
}

/// The words for a class a component implies.
pub(super) fn need_text(need: &Need, oil: &OilCard<'_>, how: How) -> Text {
    Text {
        rule: need.id.clone(),
        title: need.title.clone(),
        short: format!("not declared to serve as {}", lower_first(&need.title)),
        why: match how {
            How::Short => format!(
                "none of {} is among them; {}",
                list(&need.served_by),
                need.why
            ),
            How::Leave => format!("it may serve with leave; {}", need.why),
            How::Undeclared | How::Met => need.why.clone(),
        },
        act: match how {
            How::Undeclared => format!(
                "ask the supplier which of {} {} meets",
                list(&need.served_by),
                oil.facts.id
            ),
            How::Short if need.level == Level::Bars => {
                format!("an oil that declares one of {}", list(&need.served_by))
            }
            _ => need.act.clone(),
        },
        source: need.provenance.source.clone(),
        basis: need.provenance.basis,
        confidence: need.provenance.confidence,
    }
}

/// As the middle of a sentence has it; what begins with two capitals stays.
fn lower_first(text: &str) -> String {
    let mut chars = text.chars();
    match (chars.next(), chars.next()) {
        (Some(a), Some(b)) if !b.is_uppercase() => {
            format!("{}{b}{}", a.to_lowercase(), chars.as_str())
        }
        _ => text.to_owned(),
    }
}

fn list(classes: &[String]) -> String {
    classes.join(", ")
}

/// What an oil declares, in words.
pub(super) fn declared_text(oil: &OilCard<'_>) -> String {
    let facts = oil.facts;
    let additives: Vec<&str> = facts.additives.iter().flatten().map(|a| a.word()).collect();
    let id = &facts.id;
    match (facts.classes.is_empty(), &facts.additives) {
        (false, _) => format!("{id} declares {}", list(&facts.classes)),
        (true, Some(_)) if additives.is_empty() => {
            format!("{id} declares no class and has no additives")
        }
        (true, Some(_)) => {
            format!("{id} declares no class, additives {}", additives.join(", "))
        }
        (true, None) => format!("{id} declares neither class nor additives"),
    }
}
