//! `grease-interval` and `grease-amount`.

use super::GROUP;
use crate::quantity::{Ratio, ThermodynamicTemperature};
use crate::relation::bearing::class::BearingKind;
use crate::relation::bearing::grease::{self, ADJUSTED, surroundings};
use crate::relation::bearing::speed_limit;
use crate::trace::{Known, Recorder};
use crate::work::contact::{default_number, form, may, must};
use crate::work::{Args, Refusal, Relation, Worked};

/// The words for a kind of bearing here, beside the full names.
const KINDS: &[(&str, BearingKind)] = &[
    ("ball", BearingKind::DeepGrooveBall),
    ("radial-ball", BearingKind::DeepGrooveBall),
    ("cylindrical", BearingKind::CylindricalRoller),
    ("cylindrical-roller", BearingKind::CylindricalRoller),
    ("needle", BearingKind::NeedleRoller),
    ("needle-roller", BearingKind::NeedleRoller),
    ("spherical", BearingKind::SphericalRoller),
    ("spherical-roller", BearingKind::SphericalRoller),
    ("tapered", BearingKind::TaperedRoller),
    ("taper", BearingKind::TaperedRoller),
    ("tapered-roller", BearingKind::TaperedRoller),
];

pub(super) const INTERVAL: Relation = Relation {
    name: "grease-interval",
    group: GROUP,
    law: &grease::INTERVAL,
    with: &[
        form(
            "class",
            "ball, cylindrical, needle, spherical or tapered (or the full name: deep groove ball)",
            "by kind",
        ),
        form(
            "k",
            "factor of the kind, where known otherwise",
            "by factor",
        ),
        must("speed", "speed, 1480 r/min"),
        must("bore", "bore, 70 mm"),
        must("temperature", "bearing temperature, 75 degC"),
        may("position", "shaft: horizontal or vertical", "horizontal"),
        may("dirt", "light, severe or extreme", "light"),
        may("moisture", "dry, humid, condensation or water", "dry"),
        may(
            "vibration",
            "low, medium or high: below 5 mm/s, to 10 mm/s, above",
            "low",
        ),
        may("factor", "any further factor on the interval", "1"),
    ],
    gives: &[
        ("interval", "relubrication interval, h"),
        (
            "interval_70",
            "the same at 70 degC, without further factors, h",
        ),
    ],
    run: run_interval,
};

fn run_interval(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let k = kind_factor(args, worked)?;
    let n = args.quantity(worked, "speed", "speed")?;
    let bore = args.quantity(worked, "bore", "bore")?;
    let says = "bearing temperature";
    let t: Known<ThermodynamicTemperature> = args.quantity(worked, "temperature", says)?;
    let others = factors(args, worked)?;
    let inputs = (("k", k), ("n", n), ("d", bore));
    let says = "interval at 70 degC";
    let law = &grease::INTERVAL;
    let at_70 = worked
        .trace
        .attempt("t70", says, law, inputs, |(k, n, d)| {
            grease::interval(k, n, d)
        })?;
    let inputs = (("t70", at_70), ("T", t), ("f", others));
    let says = "interval under running conditions";
    let interval = worked
        .trace
        .attempt("t", says, &ADJUSTED, inputs, |(t70, t, f)| {
            grease::adjusted(t70, t, f)
        })?;
    worked.result("interval", interval, "h");
    worked.result("interval_70", at_70, "h");
    if t.value > speed_limit::grease_hottest() {
        worked.remark("above 120 degC ordinary greases do not serve");
    }
    Ok(())
}

fn kind_factor(args: &mut Args, worked: &mut Worked) -> Result<Known<Ratio>, Refusal> {
    if let Some(k) = args.maybe(worked, "k", "factor of the kind of bearing")? {
        return Ok(k);
    }
    let words: Vec<&'static str> = KINDS
        .iter()
        .chain(BearingKind::NAMES)
        .map(|(word, _)| *word)
        .collect();
    let word = args.choice("class", &words, None)?;
    let mut all = KINDS.iter().chain(BearingKind::NAMES);
    let kind = all.find(|(w, _)| *w == word).map(|(_, kind)| *kind);
    let kind = kind.expect("one of the list");
    let k = grease::kind_factor(kind).ok_or_else(|| {
        let words = format!(
            "the formula does not cover a {} bearing; follow the maker of the bearing",
            kind.name()
        );
        Refusal::new("no-answer", words)
    })?;
    let (says, why) = ("factor of the kind of bearing", "of the table by kind");
    Ok(worked.trace.assume("k", says, k, why))
}

/// The product of the factors of the surroundings.
fn factors(args: &mut Args, worked: &mut Worked) -> Result<Known<Ratio>, Refusal> {
    let mut product = 1.0;
    for (key, table) in [
        ("position", surroundings::POSITION),
        ("dirt", surroundings::DIRT),
        ("moisture", surroundings::MOISTURE),
        ("vibration", surroundings::VIBRATION),
    ] {
        let words: Vec<&'static str> = table.iter().map(|(word, _)| *word).collect();
        let word = args.choice(key, &words, Some(words[0]))?;
        let found = table.iter().find(|(w, _)| *w == word);
        product *= found.map_or(1.0, |(_, factor)| *factor);
    }
    let says = "factor of the surroundings";
    let of_words = default_number(
        worked,
        "f",
        says,
        product,
        "common practice, by the words given",
    );
    match args.maybe::<Ratio>(worked, "factor", "further factor")? {
        None => Ok(of_words),
        Some(further) => {
            let inputs = (("f1", of_words), ("f2", further));
            Ok(worked
                .trace
                .law("f", says, &grease::FACTORS, inputs, |(a, b)| {
                    grease::together(a, b)
                }))
        }
    }
}

pub(super) const AMOUNT: Relation = Relation {
    name: "grease-amount",
    group: GROUP,
    law: &grease::AMOUNT,
    with: &[
        must("outside", "outside diameter, 125 mm"),
        must("width", "width; total height for thrust bearings, 31 mm"),
    ],
    gives: &[("mass", "grease for one relubrication, g")],
    run: run_amount,
};

fn run_amount(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let outside = args.quantity(worked, "outside", "outside diameter")?;
    let width = args.quantity(worked, "width", "width")?;
    let inputs = (("D", outside), ("B", width));
    let says = "grease for one relubrication";
    let law = &grease::AMOUNT;
    let mass = worked
        .trace
        .attempt("G", says, law, inputs, |(d, b)| grease::amount(d, b))?;
    worked.result("mass", mass, "g");
    Ok(())
}
