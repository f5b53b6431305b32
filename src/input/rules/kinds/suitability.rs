//! Suitability rules.

use super::classes::low_never_bars;
use crate::input::rules::fields::Fields;
use crate::model::rulebook::{Level, SuitabilityRule, WhenUnknown};

pub(super) fn rule(f: &Fields<'_>) -> SuitabilityRule {
    let level = f.word::<Level>("level");
    let rule = SuitabilityRule {
        id: f.text("id"),
        title: f.text("title"),
        when: f.clauses("when"),
        level,
        bars_when: f.clauses("bars when"),
        unknown: unknown(f, level),
        why: f.text("why"),
        act: f.text("act"),
        provenance: f.provenance(),
    };
    if rule.when.is_empty() {
        f.fault(
            "nothing says when it applies",
            "when: and a list of conditions",
        );
    }
    low_never_bars(f, &rule.provenance, rule.heaviest());
    rule
}

/// `unknown: passes`, or a block with the question. A note passes where nothing is written;
/// every other rule must say which.
fn unknown(f: &Fields<'_>, level: Level) -> WhenUnknown {
    if let Some(block) = f.child("unknown") {
        let asks = WhenUnknown::Asks {
            question: block.text("ask"),
            only_where: block.clauses("only where"),
        };
        block.finish();
        return asks;
    }
    match f.opt_text("unknown").as_deref() {
        Some("passes") => {}
        None if level == Level::Notes => {}
        _ => f.fault(
            "nothing says what happens where a fact is not stated",
            "unknown: passes, or unknown: { ask: the question to put }",
        ),
    }
    WhenUnknown::Passes
}
