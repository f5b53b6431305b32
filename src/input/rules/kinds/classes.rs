//! Classes, what contains what, and class needs.

use crate::input::rules::fields::Fields;
use crate::model::rulebook::{Basis, Class, Confidence, Contains, Level, Need, Provenance};

pub(super) fn class(f: &Fields<'_>) -> Class {
    let provenance = f.provenance();
    let id = f.text("id");
    let mut contains: Vec<Contains> = f
        .texts("contains")
        .into_iter()
        .map(|class| Contains {
            why: format!("{id} contains {class}"),
            class,
            source: provenance.source.clone(),
            confidence: provenance.confidence,
        })
        .collect();
    contains.extend(f.children("stands in for").iter().map(stands_in));
    Class {
        also: f.texts("also"),
        group: f.text("group"),
        standard: f.text("standard"),
        meaning: f.text("meaning"),
        usage: f.opt_text("use"),
        needs: f.opt_text("needs"),
        limits: f.open("limits"),
        withdrawn: f.flag("withdrawn"),
        contains,
        provenance,
        id,
    }
}

fn stands_in(f: &Fields<'_>) -> Contains {
    let link = Contains {
        class: f.text("class"),
        why: f.text("why"),
        source: f.texts("source"),
        confidence: f.word::<Confidence>("confidence"),
    };
    f.word::<Basis>("basis");
    if link.source.is_empty() {
        f.fault(
            "no `source` for a class that stands in",
            "source: [ISO 12925-1]",
        );
    }
    f.finish();
    link
}

pub(super) fn need(f: &Fields<'_>) -> Need {
    let need = Need {
        id: f.text("id"),
        title: f.text("title"),
        when: f.clauses("when"),
        level: f.word::<Level>("level"),
        served_by: f.texts("served by"),
        with_leave: f.texts("with leave"),
        why: f.text("why"),
        act: f.text("act"),
        group: f.text("group"),
        provenance: f.provenance(),
    };
    if need.served_by.is_empty() {
        f.fault("no class serves", "served by: [CKC, CKD]");
    }
    low_never_bars(f, &need.provenance, need.level);
    need
}

/// A rule nobody is sure of may raise a question; it must not take an oil out.
pub(super) fn low_never_bars(f: &Fields<'_>, provenance: &Provenance, heaviest: Level) {
    if heaviest == Level::Bars && provenance.confidence == Confidence::Low {
        f.fault(
            "it bars and its confidence is low",
            "level: asks, or a source that allows medium confidence",
        );
    }
}
