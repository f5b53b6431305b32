//! Oil in use.

use crate::input::rules::fields::Fields;
use crate::model::rulebook::used_oil::{Movement, Reading, Side};
use crate::model::rulebook::{
    ChangeInterval, Cleanliness, Diagnosis, NewOilReading, SamplingInterval, TestScatter,
    UsedOilLimit, WearSign,
};
use crate::model::sample::Reading as Figure;
use crate::quantity::{Amount, Kind};

/// The kind a limit of a reading is written in.
fn kind_of(reading: Reading) -> Kind {
    match reading {
        Reading::AcidNumberRise | Reading::AcidNumber => Kind::AcidNumber,
        Reading::FlashDrop => Kind::Rise,
        Reading::Demulsibility => Kind::Time,
        Reading::ViscosityChange40
        | Reading::ViscosityChange100
        | Reading::BaseNumberShare
        | Reading::Water
        | Reading::AntioxidantShare
        | Reading::OxidationStabilityShare
        | Reading::OxidationRise
        | Reading::NitrationRise
        | Reading::PatchColour
        | Reading::Fuel
        | Reading::Soot => Kind::Ratio,
    }
}

pub(super) fn limit(f: &Fields<'_>) -> UsedOilLimit {
    let reading = f.word::<Reading>("reading");
    let kind = kind_of(reading);
    let limit = UsedOilLimit {
        id: f.text("id"),
        reading,
        side: f.word::<Side>("side"),
        oil: f.text("oil"),
        when: f.clauses("when"),
        watch: f.opt_amount("watch", kind),
        act: f.opt_amount("act", kind),
        condemn: f.opt_amount("condemn", kind),
        new: f.opt_amount("new", kind),
        test: f.opt_text("test"),
        rule: f.opt_text("rule"),
        provenance: f.provenance(),
    };
    if limit.watch.is_none() && limit.act.is_none() {
        f.fault("neither watch nor act", "watch: and act:, one at least");
    }
    limit
}

/// An ISO 4406 code, or nothing.
fn code(f: &Fields<'_>, key: &'static str) -> Option<String> {
    let text = f.opt_text(key)?;
    let numbers: Vec<&str> = text.split('/').collect();
    if numbers.len() != 3
        || !numbers
            .iter()
            .all(|n| n.parse::<u8>().is_ok_and(|n| n <= 28))
    {
        f.fault(
            format!("{key}: `{text}` is not an ISO 4406 code"),
            format!("{key}: 18/16/13"),
        );
    }
    Some(text)
}

pub(super) fn cleanliness(f: &Fields<'_>) -> Cleanliness {
    Cleanliness {
        id: f.text("id"),
        part: f.text("part"),
        when: f.clauses("when"),
        low: code(f, "target").unwrap_or_else(|| f.text("target")),
        middle: code(f, "140 to 210 bar"),
        high: code(f, "above 210 bar"),
        realistic: code(f, "realistic"),
        provenance: f.provenance(),
    }
}

pub(super) fn wear(f: &Fields<'_>) -> WearSign {
    WearSign {
        id: f.text("id"),
        elements: f.texts("elements"),
        from: f.text("from"),
        with: f.pairs("with"),
        tell: f.opt_text("tell"),
        urgent: f.flag("urgent"),
        provenance: f.provenance(),
    }
}

const READINGS: &[&str] = &[
    "kv40",
    "kv100",
    "vi",
    "flash",
    "acid number",
    "water",
    "oxidation",
];

pub(super) fn diagnosis(f: &Fields<'_>) -> Diagnosis {
    let movements = f.word_pairs::<Movement>("movements");
    for (reading, _) in &movements {
        if !READINGS.contains(&reading.as_str()) {
            f.fault(
                format!("movements: `{reading}` is not a reading"),
                format!("one of {}", READINGS.join(", ")),
            );
        }
    }
    Diagnosis {
        id: f.text("id"),
        cause: f.text("cause"),
        movements,
        moves_more: f.opt_text("moves more"),
        elements: f.opt_text("elements"),
        more: f.text("more"),
        provenance: f.provenance(),
    }
}

pub(super) fn sampling(f: &Fields<'_>) -> SamplingInterval {
    SamplingInterval {
        id: f.text("id"),
        machine: f.text("machine"),
        hours: f.opt_between("hours"),
        calendar: f.text("calendar"),
        when: f.clauses("when"),
        provenance: f.provenance(),
    }
}

pub(super) fn change(f: &Fields<'_>) -> ChangeInterval {
    ChangeInterval {
        id: f.text("id"),
        oil: f.text("oil"),
        when: f.clauses("when"),
        up_to: f.opt("up to"),
        hours: f.between("hours"),
        calendar: f.opt_text("calendar"),
        provenance: f.provenance(),
    }
}

/// A figure of a laboratory by its key.
pub(super) fn figure(f: &Fields<'_>, key: &str, text: &str) -> Figure {
    Figure::of(text).unwrap_or_else(|| {
        f.fault(
            format!("{key}: `{text}` is no figure of a laboratory"),
            format!("{key}: Zn"),
        );
        Figure::Zn
    })
}

/// An amount that must be there.
pub(super) fn amount(f: &Fields<'_>, key: &'static str, kind: Kind) -> Amount {
    f.opt_amount(key, kind).unwrap_or_else(|| {
        f.fault(
            format!("no {key}"),
            format!("{key}: {}", kind.spec().example),
        );
        Amount { kind, base: 1.0 }
    })
}

/// The kind of a difference between two values of a figure.
pub(super) fn spread_of(reading: Figure) -> Kind {
    match reading.kind() {
        Kind::Temperature => Kind::Rise,
        kind => kind,
    }
}

pub(super) fn new_oil(f: &Fields<'_>) -> NewOilReading {
    let reading = figure(f, "reading", &f.text("reading"));
    NewOilReading {
        id: f.text("id"),
        reading,
        when: f.clauses("when"),
        value: amount(f, "value", reading.kind()),
        spread: amount(f, "spread", spread_of(reading)),
        provenance: f.provenance(),
    }
}

pub(super) fn scatter(f: &Fields<'_>) -> TestScatter {
    let reading = figure(f, "reading", &f.text("reading"));
    let scatter = TestScatter {
        id: f.text("id"),
        reading,
        also: f
            .texts("also")
            .iter()
            .map(|t| figure(f, "also", t))
            .collect(),
        test: f.text("test"),
        share: f.opt("share"),
        least: f.opt_amount("at least", spread_of(reading)),
        provenance: f.provenance(),
    };
    if scatter.share.is_none() && scatter.least.is_none() {
        f.fault(
            "neither share nor at least",
            "share: 25 %, or at least: 3 ppm",
        );
    }
    scatter
}
