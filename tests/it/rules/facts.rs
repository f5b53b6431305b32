//! Facts of an oil at a point written in a line, for fixtures:
//! `oil additives EP, AW; now base mineral; point backstop sprag; use top-up`.

use filmwright::model::facts::{OilFacts, PointFacts, SumpNow, Use, YesNo, exactly};
use filmwright::model::stated::Between;
use filmwright::model::word::Word;
use filmwright::quantity::convert::celsius;
use filmwright::quantity::{Measure, ThermodynamicTemperature, Time};
use std::collections::BTreeSet;

/// An oil at a point.
pub(super) struct Setting {
    pub(super) oil: OilFacts,
    pub(super) point: PointFacts,
    pub(super) how: Use,
}

impl Setting {
    pub(super) fn of(text: &str) -> Self {
        let mut oil = OilFacts {
            id: "NEW".into(),
            ..OilFacts::default()
        };
        let mut now = OilFacts {
            id: "OLD".into(),
            ..OilFacts::default()
        };
        let mut point = PointFacts::default();
        let mut has_now = false;
        let mut how = Use::Fill;
        for line in text.split(';').map(str::trim).filter(|l| !l.is_empty()) {
            let (subject, rest) = line.split_once(' ').expect("a subject");
            match subject {
                "oil" => set_oil(&mut oil, rest),
                "now" => {
                    has_now = true;
                    set_oil(&mut now, rest);
                }
                "point" => set_point(&mut point, rest),
                "use" => how = word(rest),
                _ => panic!("{line}"),
            }
        }
        if has_now {
            point.oil_now = SumpNow::Oil(Box::new(now));
        }
        Self { oil, point, how }
    }
}

fn word<W: Word>(text: &str) -> W {
    W::from_word(text).unwrap_or_else(|| panic!("{text} is not {}", W::NOUN))
}

fn words<W: Word>(text: &str) -> BTreeSet<W> {
    text.split(',')
        .map(str::trim)
        .filter(|t| *t != "none")
        .map(word)
        .collect()
}

fn list(text: &str) -> Vec<String> {
    text.split(',').map(|t| t.trim().to_owned()).collect()
}

fn yes(text: &str) -> bool {
    word::<YesNo>(text) == YesNo::Yes
}

fn temperature(text: &str) -> Between<ThermodynamicTemperature> {
    let number = |t: &str| celsius(t.trim().parse().expect("a number"));
    match text.split_once("..") {
        Some((lo, hi)) => Between {
            lo: number(lo),
            hi: number(hi),
        },
        None => exactly(number(text)),
    }
}

fn minutes(text: &str) -> Time {
    Time::from_base(60.0 * text.parse::<f64>().expect("minutes"))
}

/// The rest of a line behind a key.
fn after<'t>(text: &'t str, key: &str) -> Option<&'t str> {
    text.strip_prefix(key)?.strip_prefix(' ')
}

/// A key and what sets its fact.
type Setter<F> = (&'static str, fn(&mut F, &str));

fn set_oil(oil: &mut OilFacts, text: &str) {
    let keys: &[Setter<OilFacts>] = &[
        ("id", |o, t| t.clone_into(&mut o.id)),
        ("kind", |o, t| o.kind = Some(word(t))),
        ("base", |o, t| o.base = Some(word(t))),
        ("polymer", |o, t| o.polymer = Some(yes(t))),
        ("shear data", |o, t| o.shear_data = yes(t)),
        ("additives", |o, t| o.additives = Some(words(t))),
        ("sulphur", |o, t| o.sulphur = Some(word(t))),
        ("copper strip", |o, t| o.copper_strip = Some(word(t))),
        ("classes", |o, t| o.classes = list(t)),
        ("food class", |o, t| o.food_class = Some(word(t))),
        ("environment", |o, t| o.environment = Some(word(t))),
        ("fire class", |o, t| o.fire_class = Some(word(t))),
        ("flash", |o, t| o.flash = Some(temperature(t))),
        ("air release", |o, t| o.air_release = Some(minutes(t))),
        ("demulsibility", |o, t| o.demulsibility = Some(minutes(t))),
        ("nu40", |o, t| {
            let nu: f64 = t.parse().expect("mm2/s");
            o.nu40 = Some(filmwright::quantity::convert::mm2_s(nu));
        }),
        ("thickener", |o, t| o.thickener = Some(t.to_owned())),
    ];
    let found = keys
        .iter()
        .find_map(|(key, set)| Some((set, after(text, key)?)));
    let (set, value) = found.unwrap_or_else(|| panic!("{text} is no fact of an oil"));
    set(oil, value);
}

fn set_point(point: &mut PointFacts, text: &str) {
    let keys: &[Setter<PointFacts>] = &[
        ("serves", |p, t| p.serves = words(t)),
        ("component", |p, t| p.components = list(t)),
        ("lubrication", |p, t| p.lubrication = Some(word(t))),
        ("asks", |p, t| p.asks_for = list(t)),
        ("empty", |p, _| p.oil_now = SumpNow::Nothing),
        ("yellow metal", |p, t| p.yellow_metal = Some(yes(t))),
        ("silver", |p, t| p.silver = Some(yes(t))),
        ("zinc plated", |p, t| p.zinc_plated = Some(yes(t))),
        ("backstop", |p, t| p.backstop = Some(word(t))),
        ("wet clutch", |p, t| p.wet_clutch = Some(yes(t))),
        ("breathing air", |p, t| p.breathing_air = Some(yes(t))),
        ("oxygen", |p, t| p.oxygen = Some(yes(t))),
        ("water entry", |p, t| p.water_entry = Some(word(t))),
        ("seals", |p, t| p.seals = Some(words(t))),
        ("inside paint", |p, t| p.inside_paint = Some(word(t))),
        ("sight glass", |p, t| p.sight_glass = Some(word(t))),
        ("filter", |p, t| p.filter = Some(yes(t))),
        ("food class", |p, t| p.food_class = Some(word(t))),
        ("environment", |p, t| p.environment = Some(word(t))),
        ("fire class", |p, t| p.fire_class = Some(word(t))),
        ("wet area", |p, t| p.wet = Some(yes(t))),
        ("food zone", |p, t| p.food_zone = Some(yes(t))),
        ("water protection", |p, t| p.water_protection = Some(yes(t))),
        ("fire zone", |p, t| p.fire_zone = Some(yes(t))),
        ("hot surface", |p, t| p.hot_surface = Some(temperature(t))),
        ("oil temperature", |p, t| {
            p.oil_temperature = Some(temperature(t));
        }),
        ("part temperature", |p, t| {
            p.part_temperature = Some(temperature(t));
        }),
        ("start temperature", |p, t| {
            p.start_temperature = Some(temperature(t));
        }),
        ("dwell", |p, t| p.dwell = Some(exactly(minutes(t)))),
    ];
    let found = keys
        .iter()
        .find_map(|(key, set)| Some((set, after(text, key)?)));
    let (set, value) = found.unwrap_or_else(|| panic!("{text} is no fact of a point"));
    set(point, value);
}
