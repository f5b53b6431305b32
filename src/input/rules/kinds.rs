//! Which kinds of rule file there are, and what reads each.

mod advice;
mod causes;
mod classes;
mod grease;
mod parts;
mod polymers;
mod start;
mod stocks;
mod suitability;
mod used_oil;

use super::fields::Fields;
use super::{EDITION, Filling};
use crate::model::rulebook::{Entry, Replaced, Rulebook, Table};
use serde_yaml::Value;

/// Reads the entries of one kind into the rulebook.
type Reader = fn(&mut Filling<'_>, &'static str, &[Value]);

macro_rules! reader {
    ($table:ident, $read:path) => {
        |filling, kind, entries| fill(filling, kind, entries, |book| &mut book.$table, $read)
    };
}

const KINDS: &[(&str, Reader)] = &[
    ("sources", sources),
    ("components", reader!(components, parts::component)),
    ("base stocks", reader!(base_stocks, stocks::base_stock)),
    ("seals", reader!(seals, stocks::seal)),
    ("paints", reader!(paints, stocks::paint)),
    ("mixing", reader!(mixing, stocks::mixing)),
    ("residuals", reader!(residuals, stocks::residual)),
    ("life", reader!(life, stocks::life)),
    ("polymers", reader!(polymers, polymers::polymer)),
    ("shear tests", reader!(shear_tests, polymers::shear_test)),
    ("grade crossings", reader!(crossings, advice::crossing)),
    ("advice", reader!(advice, advice::advice)),
    ("classes", reader!(classes, classes::class)),
    ("class needs", reader!(needs, classes::need)),
    ("suitability", reader!(suitability, suitability::rule)),
    ("start limits", reader!(start_limits, start::limit)),
    ("pour margins", reader!(pour_margins, start::pour_margin)),
    ("heaters", reader!(heaters, start::heater)),
    ("air release", reader!(air_release, start::air_release)),
    ("used-oil limits", reader!(used_oil, used_oil::limit)),
    ("cleanliness", reader!(cleanliness, used_oil::cleanliness)),
    ("wear", reader!(wear, used_oil::wear)),
    ("diagnosis", reader!(diagnosis, used_oil::diagnosis)),
    ("new-oil readings", reader!(new_oil, used_oil::new_oil)),
    ("cause sizes", reader!(cause_sizes, causes::size)),
    ("foreign oils", reader!(foreign_oils, causes::foreign)),
    ("test scatter", reader!(scatter, used_oil::scatter)),
    ("sampling", reader!(sampling, used_oil::sampling)),
    ("change intervals", reader!(changes, used_oil::change)),
    ("thickeners", reader!(thickeners, grease::thickener)),
    ("grease mixing", reader!(grease_mixing, grease::mixing)),
    ("nlgi", reader!(nlgi, grease::nlgi)),
    ("grease code", reader!(grease_code, grease::code)),
    ("grease speeds", reader!(grease_speeds, grease::speed)),
    (
        "grease speed limits",
        reader!(grease_speed_limits, grease::speed_limit),
    ),
    ("grease factors", reader!(grease_factors, grease::factor)),
    ("grease fills", reader!(grease_fills, grease::first_fill)),
];

/// The kinds of rule file.
pub(super) fn known() -> Vec<&'static str> {
    KINDS.iter().map(|(kind, _)| *kind).collect()
}

/// Reads the entries of a file; `false` where its kind is not known.
pub(super) fn read(filling: &mut Filling<'_>, kind: &str, entries: &[Value]) -> bool {
    let found = KINDS.iter().find(|(name, _)| *name == kind);
    if let Some((name, reader)) = found {
        reader(filling, name, entries);
    }
    found.is_some()
}

/// Reads a caution: its front matter and its text.
pub(super) fn caution(filling: &mut Filling<'_>, head: &Value, body: &str) {
    let text = body.to_owned();
    let read = |f: &Fields<'_>| advice::caution(f, text.clone());
    fill(
        filling,
        "cautions",
        std::slice::from_ref(head),
        |book| &mut book.cautions,
        read,
    );
}

/// The register of sources is its own source.
fn sources(filling: &mut Filling<'_>, kind: &'static str, entries: &[Value]) {
    fill(
        filling,
        kind,
        entries,
        |book| &mut book.sources,
        advice::source,
    );
}

fn fill<T: Entry>(
    filling: &mut Filling<'_>,
    kind: &'static str,
    entries: &[Value],
    table: fn(&mut Rulebook) -> &mut Table<T>,
    read: impl Fn(&Fields<'_>) -> T,
) {
    for value in entries {
        let path = &filling.file.path;
        let Some(fields) = Fields::of(value, path, filling.faults, filling.probe) else {
            continue;
        };
        let entry = read(&fields);
        fields.finish();
        let id = entry.id().to_owned();
        if !filling.seen.insert((kind, id.clone())) {
            let write = format!("another id, or leave one of the two out (file: {kind} {EDITION})");
            fields.fault(format!("two entries called `{id}`"), write);
            continue;
        }
        if let Some(old) = table(filling.book).put(entry) {
            filling.book.replaced.push(Replaced {
                kind,
                id,
                was: old.provenance().file.clone(),
                by: path.clone(),
            });
        }
    }
}
