//! Plain bearings: journal and thrust.

use crate::input::fields::Fields;
use crate::input::oils::{say_unusual, stated_twice};
use crate::input::reader::Reader;
use crate::model::part::{Feed, JournalBearing, PadType, ThrustBearing};
use crate::model::stated::{Between, Stated, Tolerance};
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
    JournalBearing {
        diameter,
        width: fields.stated(reader, "width"),
        radial_clearance: radial.or(diametral.map(halved)),
        speed: fields.stated(reader, "speed"),
        load: fields.stated(reader, "load"),
        feed,
        feed_temperature: fields.stated(reader, "feed temperature"),
        feed_pressure: fields.stated(reader, "feed pressure"),
        casing_area: fields.stated(reader, "casing area"),
        shaft_roughness: fields.stated(reader, "shaft roughness"),
        lining: fields.given_text(reader, "lining"),
    }
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
    ThrustBearing {
        pads: number(fields.whole(reader, "pads")),
        pad_length: fields.stated(reader, "pad length"),
        pad_width: fields.stated(reader, "pad width"),
        mean_diameter: fields.stated(reader, "mean diameter"),
        speed: fields.stated(reader, "speed"),
        load: fields.stated(reader, "load"),
        kind,
        ratio: fields.stated(reader, "ratio"),
    }
}

fn number(whole: Option<Given<u32>>) -> Option<Given<Ratio>> {
    whole.map(|n| n.map(|n| Ratio::from_base(f64::from(n))))
}
