//! The lines of the oils: interpolated on the stretched axes, where they are straight.

use super::{OilLine, Reading, Role};
use crate::report::draw::Pt;
use crate::report::draw::axes::{Axes, Scale};
use crate::report::draw::svg::BALLOON;

/// Pixels between the centres of two balloons.
pub(super) const PITCH: f64 = 2.0 * BALLOON + 3.0;

/// The viscosity on a line at a temperature, carried on straight beyond its ends.
pub(super) fn viscosity_at(line: &[Reading], at_c: f64) -> Option<f64> {
    let x = Scale::LogKelvin.stretch(at_c);
    let next = line
        .iter()
        .position(|(t, _)| *t >= at_c)
        .unwrap_or(line.len());
    let upper = next.clamp(1, line.len().max(2) - 1);
    let (a, b) = (line.get(upper - 1)?, line.get(upper)?);
    let (xa, xb) = (Scale::LogKelvin.stretch(a.0), Scale::LogKelvin.stretch(b.0));
    let (ya, yb) = (Scale::DoubleLog.stretch(a.1), Scale::DoubleLog.stretch(b.1));
    Some(Scale::DoubleLog.relax(ya + (x - xa) / (xb - xa) * (yb - ya)))
}

/// The readings of a line over a range: its own between the ends, and the ends themselves.
pub(super) fn over(line: &[Reading], from_c: f64, to_c: f64) -> Vec<Reading> {
    let mut out = Vec::new();
    let mut take = |t: f64| {
        if let Some(nu) = viscosity_at(line, t) {
            out.push((t, nu));
        }
    };
    take(from_c);
    for (t, _) in line {
        if *t > from_c && *t < to_c {
            take(*t);
        }
    }
    take(to_c);
    out
}

/// The stretches of a run of readings inside the frame.
pub(super) fn visible(axes: &Axes, readings: &[Reading]) -> Vec<Vec<Pt>> {
    let mut runs: Vec<Vec<Pt>> = Vec::new();
    for pair in readings.windows(2) {
        let (a, b) = (axes.at(pair[0].0, pair[0].1), axes.at(pair[1].0, pair[1].1));
        let Some((a, b)) = axes.clip(a, b) else {
            continue;
        };
        match runs.last_mut() {
            Some(run) if run.last() == Some(&a) => run.push(b),
            _ => runs.push(vec![a, b]),
        }
    }
    runs
}

/// The last point of a line inside the frame.
pub(super) fn end(axes: &Axes, line: &[Reading]) -> Option<Pt> {
    let whole = over(line, axes.x.low, axes.x.high);
    visible(axes, &whole).last()?.last().copied()
}

/// The oils the figure has room for: those proposed or in use, then the order of the table.
pub(super) fn shown<'a>(all: &'a [OilLine], axes: &Axes) -> Vec<&'a OilLine> {
    let mut room = axes.frame().h - 4.0;
    let mut order: Vec<usize> = (0..all.len()).collect();
    order.sort_by_key(|i| (all[*i].role == Role::Other, *i));
    order.retain(|i| {
        let labels = if all[*i].as_new.is_empty() { 1.0 } else { 2.0 };
        room -= labels * PITCH;
        room >= 0.0
    });
    order.sort_unstable();
    order.into_iter().map(|i| &all[i]).collect()
}

/// What to say of the others.
pub(super) fn left_out(all: &[OilLine], shown: &[&OilLine]) -> Option<String> {
    match all.len() - shown.len() {
        0 => None,
        1 => Some("One further candidate stands in the table only.".into()),
        n => Some(format!("{n} further candidates stand in the table only.")),
    }
}
