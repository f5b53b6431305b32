//! Plain bearings: journal and thrust.

use crate::input::fields::Fields;
use crate::input::oils::{say_unusual, stated_twice};
use crate::input::reader::Reader;
use crate::model::part::{Feed, JournalBearing, PadType, ThrustBearing};
use crate::model::stated::{Between, Stated, Tolerance};
use crate::problem::{Code, Write};
use crate::quantity::convert::to_mm;
use crate::quantity::{Length, Measure, Ratio};
use crate::source::place::Given;

pub(super) fn journal(reader: &mut Reader<'_>, fields: &Fields<'_>) -> JournalBearing {
    let feed = fields.word(reader, "feed").and_then(|w| {
        let feed = match w.value {
            "pressure" => Feed::Pressure,
            "ring" => Feed::Ring,
            "bath" => Feed::Bath,
            _ => return None,
        };
        Some(w.map(|_| feed))
    });
    let both = fields
        .get("radial clearance")
        .zip(fields.get("diametral clearance"));
    if let Some((radial, diametral)) = both {
        let why = "the diametral clearance is twice the radial one";
        stated_twice(reader, radial, diametral, why);
    }
    let diameter: Option<Stated<Length>> = fields.stated(reader, "diameter");
    let radial: Option<Stated<Length>> = fields.stated(reader, "radial clearance");
    let diametral: Option<Stated<Length>> = fields.stated(reader, "diametral clearance");
    relative(
        reader,
        fields,
        diameter.as_ref(),
        radial.as_ref(),
        diametral.as_ref(),
    );
    let sound = |reader: &mut Reader<'_>, name, stated: Option<Stated<Length>>| {
        above_zero(reader, fields, name, stated, SHAFT)
    };
    let radial = sound(reader, "radial clearance", radial);
    let diametral = sound(reader, "diametral clearance", diametral);
    let diameter = sound(reader, "diameter", diameter);
    let width = fields.stated(reader, "width");
    let hole = fields.stated(reader, "feed hole");
    let (speed, load) = (
        fields.stated(reader, "speed"),
        fields.stated(reader, "load"),
    );
    JournalBearing {
        radial_clearance: radial
            .filter(|c| {
                fits(
                    reader,
                    fields,
                    ("radial clearance", 1.0),
                    c,
                    diameter.as_ref(),
                )
            })
            .or(diametral
                .filter(|c| {
                    fits(
                        reader,
                        fields,
                        ("diametral clearance", 2.0),
                        c,
                        diameter.as_ref(),
                    )
                })
                .map(halved)),
        width: sound(reader, "width", width),
        diameter,
        speed: above_zero(reader, fields, "speed", speed, STANDS),
        load: above_zero(reader, fields, "load", load, LOAD),
        feed,
        feed_temperature: fields.stated(reader, "feed temperature"),
        feed_pressure: fields.stated(reader, "feed pressure"),
        feed_hole: sound(reader, "feed hole", hole),
        casing_area: fields.stated(reader, "casing area"),
        shaft_roughness: fields.stated(reader, "shaft roughness"),
        lining: fields.given_text(reader, "lining"),
    }
}

/// What is said of a value that is not above zero, and what may be written instead.
type Instead = (&'static str, &'static str);

const SHAFT: Instead = ("a bearing has a size", "0.08 mm");
const PAD: Instead = ("a pad has a size", "60 mm");
const STANDS: Instead = (
    "a standing shaft draws no oil into the film; give the speed it turns at",
    "1480 r/min",
);
const LOAD: Instead = (
    "without a load the film says nothing; give the load, or `unknown` with a range",
    "10 kN",
);

/// The value, refused unless it is above zero.
fn above_zero<Q: Measure>(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    name: &str,
    stated: Option<Stated<Q>>,
    (why, instead): Instead,
) -> Option<Stated<Q>> {
    let least = match stated.as_ref()? {
        Stated::Known(given, _) => given.value.base(),
        Stated::Range(range, _) => range.value.lo.base(),
        Stated::Unknown(..) => return stated,
    };
    if least > 0.0 {
        return stated;
    }
    let what = format!("{name} must be above zero");
    impossible(
        reader,
        fields,
        name,
        what,
        why.to_owned(),
        instead.to_owned(),
    );
    None
}

/// Says that a value cannot be, and why.
fn impossible(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    name: &str,
    what: String,
    why: String,
    instead: String,
) {
    let Some(slot) = fields.get(name) else { return };
    let problem = reader
        .at(Code::ValueImpossible, what, slot.node.span, &slot.within)
        .why(why)
        .write(Write::edit(slot.node.span, instead).remark("with the right figure"));
    reader.report(problem);
}

/// Whether a clearance leaves a shaft in the bore.
fn fits(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    (name, times): (&str, f64),
    clearance: &Stated<Length>,
    diameter: Option<&Stated<Length>>,
) -> bool {
    let most = match clearance {
        Stated::Known(given, _) => given.value,
        Stated::Range(range, _) => range.value.hi,
        Stated::Unknown(..) => return true,
    };
    let smallest = match diameter {
        Some(Stated::Known(given, _)) => given.value,
        Some(Stated::Range(range, _)) => range.value.lo,
        _ => return true,
    };
    let bound = smallest.base() / 2.0 * times;
    if most.base() < bound {
        return true;
    }
    let of = if times > 1.0 { "diameter" } else { "radius" };
    let what = format!("{name} as large as the {of} of the shaft");
    let usual = to_mm(smallest) * 0.0015 / 2.0 * times;
    let why = format!(
        "{} against a {of} of {}; usual is 0.1 to 0.2 % of the diameter, across the diameter",
        shown(to_mm(most)),
        shown(bound * 1e3)
    );
    impossible(reader, fields, name, what, why, shown(usual));
    false
}

/// A diametral clearance as the radial one; the spelling stays the user's.
fn halved(stated: Stated<Length>) -> Stated<Length> {
    let half = |l: Length| Length::from_base(l.base() / 2.0);
    match stated {
        Stated::Known(given, tolerance) => {
            let tolerance = tolerance.map(|t| match t {
                Tolerance::Of(l) => Tolerance::Of(half(l)),
                other => other,
            });
            Stated::Known(given.map(half), tolerance)
        }
        Stated::Range(given, ask) => {
            let halves = |b: Between<Length>| Between {
                lo: half(b.lo),
                hi: half(b.hi),
            };
            Stated::Range(given.map(halves), ask)
        }
        Stated::Unknown(ask, origin) => Stated::Unknown(ask, origin),
    }
}

/// Usual clearance over diameter: 0.1 to 0.2 %; a tenth or ten times as much is kept, and said.
fn relative(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    diameter: Option<&Stated<Length>>,
    radial: Option<&Stated<Length>>,
    diametral: Option<&Stated<Length>>,
) {
    let known = |s: Option<&Stated<Length>>| s.and_then(Stated::known).cloned();
    let (name, given, factor) = match (known(radial), known(diametral)) {
        (Some(given), _) => ("radial clearance", given, 2.0),
        (_, Some(given)) => ("diametral clearance", given, 1.0),
        _ => return,
    };
    let Some(diameter) = known(diameter) else {
        return;
    };
    let gap = to_mm(given.value) * factor;
    let share = gap / to_mm(diameter.value);
    if (0.000_3..=0.006).contains(&share) {
        return;
    }
    let digits: String = given
        .written
        .chars()
        .take_while(|c| c.is_ascii_digit() || *c == '.')
        .collect();
    let as_mm = digits
        .parse::<f64>()
        .ok()
        .map(|v| v * factor / to_mm(diameter.value));
    let meant = as_mm.filter(|s| (0.000_3..=0.006).contains(s));
    let question = meant.map_or(String::new(), |_| format!(" Was {digits} mm meant?"));
    let why = format!(
        "{} on a {} shaft is {} %; 0.1 to 0.2 % is usual.{question}",
        shown(gap / factor),
        shown(to_mm(diameter.value)),
        figures(share * 100.0, 2)
    );
    let instead = meant.map(|_| format!("{digits} mm"));
    say_unusual(reader, fields, name, &why, instead);
}

fn shown(millimetres: f64) -> String {
    format!("{} mm", figures(millimetres, 3))
}

/// Up to so many significant figures.
fn figures(value: f64, digits: i32) -> String {
    use crate::quantity::show::{Toward, significant};
    let text = significant(value, digits, Toward::Nearest);
    if text.contains('.') {
        text.trim_end_matches('0').trim_end_matches('.').to_owned()
    } else {
        text
    }
}

pub(super) fn thrust(reader: &mut Reader<'_>, fields: &Fields<'_>) -> ThrustBearing {
    let kind = fields.word(reader, "type").and_then(|w| {
        let kind = match w.value {
            "tilting" => PadType::Tilting,
            "fixed" => PadType::Fixed,
            _ => return None,
        };
        Some(w.map(|_| kind))
    });
    let mut size = |name| {
        let stated = fields.stated(reader, name);
        above_zero(reader, fields, name, stated, PAD)
    };
    let (pad_length, pad_width) = (size("pad length"), size("pad width"));
    let mean_diameter = size("mean diameter");
    let (speed, load) = (
        fields.stated(reader, "speed"),
        fields.stated(reader, "load"),
    );
    let pads = number(fields.whole(reader, "pads"));
    let ratio: Option<Stated<Ratio>> = fields.stated(reader, "ratio");
    ThrustBearing {
        pads,
        pad_length,
        pad_width,
        mean_diameter,
        speed: above_zero(reader, fields, "speed", speed, STANDS),
        load: above_zero(reader, fields, "load", load, LOAD),
        kind,
        ratio: ratio.filter(|ratio| narrows(reader, fields, ratio)),
    }
}

/// Whether films narrow at all: ratio 1 carries nothing.
fn narrows(reader: &mut Reader<'_>, fields: &Fields<'_>, ratio: &Stated<Ratio>) -> bool {
    let least = match ratio {
        Stated::Known(given, _) => given.value.base(),
        Stated::Range(range, _) => range.value.lo.base(),
        Stated::Unknown(..) => return true,
    };
    if least > 1.0 {
        return true;
    }
    let what = if (least - 1.0).abs() < 1e-12 {
        "ratio 1 means films that do not narrow"
    } else {
        "ratio is inlet over outlet film and must lie above 1"
    };
    let why = "with one viscosity and flat faces such a pad carries nothing; usual is 2 to 3, and \
               without a ratio the best is taken";
    let instead = "2.2".to_owned();
    impossible(
        reader,
        fields,
        "ratio",
        what.to_owned(),
        why.to_owned(),
        instead,
    );
    false
}

fn number(whole: Option<Given<u32>>) -> Option<Given<Ratio>> {
    whole.map(|n| n.map(|n| Ratio::from_base(f64::from(n))))
}
