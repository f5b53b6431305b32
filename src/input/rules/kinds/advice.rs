//! Sources, cautions, advice, crossings.

use crate::input::rules::fields::Fields;
use crate::model::rulebook::caution::CautionKind;
use crate::model::rulebook::{
    Advice, Basis, Caution, Confidence, GradeCrossing, Provenance, SourceEntry,
};
use crate::model::stated::Between;
use crate::quantity::Kind;

pub(super) fn source(f: &Fields<'_>) -> SourceEntry {
    let id = f.text("id");
    SourceEntry {
        citation: f.text("citation"),
        access: f.text("access"),
        provenance: Provenance {
            source: vec![id.clone()],
            basis: Basis::Seen,
            confidence: Confidence::High,
            note: f.opt_text("note"),
            file: f.file().to_owned(),
        },
        id,
    }
}

pub(super) fn caution(f: &Fields<'_>, text: String) -> Caution {
    if text.is_empty() {
        f.fault("no text after the front matter", "the caution in Markdown");
    }
    Caution {
        id: f.text("id"),
        title: f.text("title"),
        kind: f.word::<CautionKind>("kind"),
        applies: if f.texts("applies") == ["always"] {
            Vec::new()
        } else {
            f.clauses("applies")
        },
        text,
        provenance: f.provenance(),
    }
}

const FIGURES: &[(&str, Kind)] = &[
    ("temperature", Kind::Temperature),
    ("rise", Kind::Rise),
    ("time", Kind::Time),
    ("volume", Kind::Volume),
    ("share", Kind::Ratio),
    ("specific heat", Kind::SpecificHeat),
    ("pressure", Kind::Pressure),
];

pub(super) fn advice(f: &Fields<'_>) -> Advice {
    Advice {
        id: f.text("id"),
        topic: f.text("topic"),
        text: f.text("text"),
        figure: FIGURES
            .iter()
            .find_map(|(key, kind)| f.opt_amount(key, *kind)),
        provenance: f.provenance(),
    }
}

pub(super) fn crossing(f: &Fields<'_>) -> GradeCrossing {
    let lo = f.count("lowest VG");
    GradeCrossing {
        id: f.text("id"),
        grade: f.text("grade"),
        vg: Between {
            lo,
            hi: f.opt_count("highest VG").unwrap_or(lo),
        },
        provenance: f.provenance(),
    }
}
