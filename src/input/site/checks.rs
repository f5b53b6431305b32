//! What does not fit together in the values of a point.

use super::point::{Ambient, Start};
use crate::input::fields::Fields;
use crate::input::oils::say_unusual;
use crate::input::reader::Reader;
use crate::model::machine::{Fill, Point, Sump};
use crate::model::stated::Stated;
use crate::problem::{Code, Write};
use crate::quantity::convert::to_celsius;
use crate::quantity::show::{Toward, Units, quantity};
use crate::quantity::{Measure, ThermodynamicTemperature};
use crate::source::Span;
use crate::source::yaml::Entry;

pub(super) fn no_parts(reader: &mut Reader<'_>, entry: &Entry, fields: &Fields<'_>) {
    let id = fields.within.to_string();
    let mut problem = reader
        .at(Code::KeyMissing, "no `parts`", entry.key.span, &id)
        .why("a point is weighed for the parts its fill serves");
    let value = &entry.value;
    let example = "parts: [{ rolling bearing: 22220 }]";
    let remark = "with the right parts; filmwright help keys lists their kinds";
    let start = Span {
        end: value.span.start,
        ..value.span
    };
    let bracketed = reader.set.slice(value.span).starts_with('{');
    let source = reader.source(value);
    let column = source[..value.span.start as usize]
        .rsplit('\n')
        .next()
        .map_or(0, str::len);
    let write = if bracketed {
        let behind = Span {
            start: start.start + 1,
            end: start.start + 1,
            ..start
        };
        let comma = if value.entries().is_some_and(<[Entry]>::is_empty) {
            ""
        } else {
            ","
        };
        Write::edit(behind, format!(" {example}{comma}"))
    } else if value.is_blank() {
        Write::edit(start, format!(" {{ {example} }}"))
    } else {
        Write::edit(start, format!("{example}\n{}", " ".repeat(column)))
    };
    problem = problem.write(write.said(example).remark(remark));
    reader.report(problem);
}

/// Starting hotter than running at the hottest ambient.
pub(super) fn start_hotter(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    (ambient, sump, start): (Option<&Ambient>, Option<&Sump>, Option<&Start>),
) {
    let Some(start) = start.and_then(Stated::known) else {
        return;
    };
    let hottest = ambient.and_then(Stated::known).map(|a| a.value.hi.base());
    let running = match (sump, hottest) {
        (Some(Sump::Rise(rise)), Some(hot)) => rise.known().map(|r| hot + r.value.base()),
        (Some(Sump::Reading { sump, ambient }), Some(hot)) => {
            Some(hot + sump.value.base() - ambient.value.base())
        }
        (Some(Sump::Held(held)), _) => held.known().map(|h| h.value.base()),
        (Some(Sump::Across(range)), _) => Some(range.value.hi.base()),
        _ => None,
    };
    let Some(running) = running.filter(|r| start.value.base() > r + 1e-9) else {
        return;
    };
    let Some(slot) = fields.get("start") else {
        return;
    };
    let shown = |t: f64| {
        let t = ThermodynamicTemperature::from_base(t);
        quantity(t.amount(), Units::Si, Toward::Nearest)
    };
    let private = format!("x-{}", slot.name.text);
    let problem = reader
        .at(
            Code::StartHotter,
            format!(
                "start at {} is hotter than running at {}",
                start.written,
                shown(running)
            ),
            slot.node.span,
            &slot.within,
        )
        .why("an oil is at its thickest at start; the two may be exchanged")
        .write(
            Write::edit(slot.name.span, private)
                .remark("the coldest ambient then counts; or the right figure"),
        );
    reader.report(problem);
}

/// A start colder than the coldest ambient, which then counts.
pub(super) fn start_colder(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    ambient: Option<&Ambient>,
    start: Option<&Start>,
) {
    let (Some(start), Some(ambient)) = (
        start.and_then(Stated::known),
        ambient.and_then(Stated::known),
    ) else {
        return;
    };
    let coldest = ambient.value.lo;
    let Some(slot) = fields.get("start").filter(|_| start.value < coldest) else {
        return;
    };
    let coldest = quantity(coldest.amount(), Units::Si, Toward::Nearest);
    let private = format!("x-{}", slot.name.text);
    let problem = reader
        .at(
            Code::StartColder,
            format!(
                "start at {} is colder than the coldest ambient, {coldest}",
                start.written
            ),
            slot.node.span,
            &slot.within,
        )
        .why(format!(
            "the warmer of the two counts: starts are judged at {coldest}; if it does start colder, widen the ambient"
        ))
        .write(
            Write::edit(slot.name.span, private)
                .remark("the coldest ambient then counts; or a wider ambient"),
        );
    reader.report(problem);
}

/// What can be, but rarely is.
pub(super) fn unusual(reader: &mut Reader<'_>, fields: &Fields<'_>, point: &Point) {
    if let Some(range) = point.ambient.as_ref().and_then(Stated::known) {
        let (lo, hi) = (to_celsius(range.value.lo), to_celsius(range.value.hi));
        if lo < -60.0 || hi > 80.0 {
            let why = "outdoor air lies between -60 and 50 °C; beside a furnace it may reach 80 °C";
            say_unusual(reader, fields, "ambient", why, None);
        }
    }
    if let Some(Sump::Rise(rise)) = &point.sump
        && let Some(rise) = rise.known()
        && !(0.0..=100.0).contains(&rise.value.base())
    {
        let why = "sumps run 10 to 70 K above ambient";
        say_unusual(reader, fields, "sump rise", why, None);
    }
    if let Some(Fill::Oil(volume)) = point.fill.as_ref().and_then(Stated::known).map(|g| g.value)
        && volume.base() > 200.0
    {
        let why = "200 000 L is the tank of a whole works";
        say_unusual(reader, fields, "fill", why, None);
    }
}
