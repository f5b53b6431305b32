//! Points that make a line, and what keeps them from it.

use crate::input::fields::Slot;
use crate::input::points::Listed;
use crate::input::reader::Reader;
use crate::model::oil::ViscosityPoint;
use crate::problem::{Code, Problem, Write};
use crate::quantity::Measure;
use crate::quantity::convert::celsius;
use crate::quantity::show::{Toward, significant};
use crate::relation::oil::viscosity_index;
use crate::source::Place;

/// Points that make a line: two or more, at different temperatures, falling as it gets warmer.
pub(super) fn line(
    reader: &mut Reader<'_>,
    slot: &Slot<'_>,
    listed: &Listed,
) -> Option<Vec<ViscosityPoint>> {
    let mut order: Vec<usize> = (0..listed.points.len()).collect();
    order.sort_by(|a, b| {
        let at = |i: &usize| listed.points[*i].at.base();
        at(a).total_cmp(&at(b)).then(a.cmp(b))
    });
    if order.len() < 2 {
        too_few(reader, slot, listed);
        return None;
    }
    let mut sound = true;
    for pair in order.windows(2) {
        let (cold, hot) = (&listed.points[pair[0]], &listed.points[pair[1]]);
        if (hot.at.base() - cold.at.base()).abs() < 1e-9 {
            same_temperature(reader, slot, listed, pair);
            sound = false;
        } else if hot.nu.value.base() >= cold.nu.value.base() {
            upside_down(reader, slot, listed, pair);
            sound = false;
        }
    }
    sound.then(|| order.iter().map(|i| listed.points[*i].clone()).collect())
}

pub(super) fn problem_at(
    reader: &Reader<'_>,
    slot: &Slot<'_>,
    code: Code,
    message: &str,
) -> Problem {
    reader.at(code, message, slot.node.span, &slot.within)
}

fn too_few(reader: &mut Reader<'_>, slot: &Slot<'_>, listed: &Listed) {
    let mut problem = problem_at(
        reader,
        slot,
        Code::PointsTooFew,
        "one viscosity found, two at different temperatures are wanted",
    )
    .why("one point says nothing about how the oil thins when it gets warm; with the index it is a grade, as [ISO VG 220, VI 95]");
    if let (Some(index), Some(point)) = (&listed.index, listed.points.first()) {
        let at_40 = (point.at.base() - celsius(40.0).base()).abs() < 1e-6;
        let nu100 = viscosity_index::nu100(point.nu.value, index.value);
        if let (true, Ok(nu100)) = (at_40, nu100) {
            let second = format!("{} at 100 degC", figure(nu100.base()));
            let text = format!("[{}, {second}]", point.nu.written);
            problem = problem.write(Write::edit(slot.node.span, text).remark("by that index"));
            reader.report(problem);
            return;
        }
    }
    let (first, second) = match listed.points.first() {
        Some(p) if (p.at.base() - celsius(100.0).base()).abs() < 5.0 => {
            let cold = format!("{} at 40 degC", figure(p.nu.value.base() * 12.0));
            (cold, p.nu.written.clone())
        }
        Some(p) => {
            let hot = format!("{} at 100 degC", figure(p.nu.value.base() * 0.09));
            (p.nu.written.clone(), hot)
        }
        None => (
            "220 mm2/s at 40 degC".into(),
            "19.0 mm2/s at 100 degC".into(),
        ),
    };
    let text = format!("[{first}, {second}]");
    problem = problem.write(Write::edit(slot.node.span, text).remark("with the right figure"));
    reader.report(problem);
}

/// A viscosity in m²/s as it would be written.
fn figure(base: f64) -> String {
    let digits = significant(base * 1e6, 3, Toward::Nearest);
    format!("{} mm2/s", digits.replace('\u{202f}', ""))
}

fn same_temperature(reader: &mut Reader<'_>, slot: &Slot<'_>, listed: &Listed, pair: &[usize]) {
    let second = &listed.at[pair[0].max(pair[1])];
    let first = &listed.at[pair[0].min(pair[1])];
    let text = second.text();
    let moved = match text.rfind(" at ") {
        Some(at) => format!("{} at 100 degC", &text[..at]),
        None => text.to_owned(),
    };
    let problem = reader
        .at(
            Code::PointsSameTemperature,
            "two viscosities at one temperature",
            second.node.span,
            &slot.within,
        )
        .related(Place::Text(first.node.span), "")
        .why("a line needs two temperatures")
        .write(
            Write::edit(second.node.span, moved).remark("or the temperature it was measured at"),
        );
    reader.report(problem);
}

fn upside_down(reader: &mut Reader<'_>, slot: &Slot<'_>, listed: &Listed, pair: &[usize]) {
    let (cold, hot) = (&listed.at[pair[0]], &listed.at[pair[1]]);
    let value = |text: &str| text.rfind(" at ").map_or(text.len(), |at| at);
    let (a, b) = (cold.text().to_owned(), hot.text().to_owned());
    let exchanged =
        |own: &str, other: &str| format!("{}{}", &other[..value(other)], &own[value(own)..]);
    let problem = problem_at(
        reader,
        slot,
        Code::CurveUpsideDown,
        "viscosity rises with temperature",
    )
    .why("the two values look exchanged")
    .write(Write::edit(cold.node.span, exchanged(&a, &b)).and(hot.node.span, exchanged(&b, &a)));
    reader.report(problem);
}
