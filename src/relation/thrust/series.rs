//! The flat pad of finite width: Reynolds equation, in waves across the width.
//!
//! The film narrows along the motion only, so the pressure parts into cosines of the place across,
//! each with an ordinary equation along the pad: `(H^3 g')' - (n pi B/L)^2 H^3 g = 6 H'`,
//! `n = 1, 3, 5 ...`. Each is solved on two grids, and a third of their difference is added to
//! the finer result. Nothing cavitates: the film narrows everywhere.

use super::slider::{FIRST_PIVOT, STEEPEST, Slider};
use crate::numeric::banded::{NotPositive, SymmetricBand};
use crate::numeric::math::ln;
use crate::numeric::maximum::golden;
use crate::numeric::root::bracketed;
use crate::quantity::convert::number;
use crate::quantity::{Measure, Ratio};
use crate::relation::Law;
use std::f64::consts::PI;

/// The finite pad.
pub static LAW: Law = Law {
    name: "thrust-pad-load",
    title: "load, friction and centre of pressure of a flat pad of finite width",
    formula: "d/dx(H^3 dP/dx) + (B/L)^2 d/dz(H^3 dP/dz) = 6 dH/dx, H = m - (m - 1) x",
    range: "rectangular pad, width over length 0.1 to 10, ratio of films above 1 to 10, one \
            viscosity, rigid and flat",
    source: "Reynolds equation solved by the program; the square pad at m 2.2 carries 0.44 of \
             the infinitely wide one, as handbooks say",
};

/// Waves taken: the rest adds under 1e-5 of the load at any width in the range.
const WAVES: u32 = 40;
/// Steps along the pad on the finer grid.
const STEPS: usize = 128;
/// Least and largest width over length.
pub(super) const ASPECTS: (f64, f64) = (0.1, 10.0);

/// Sums over the waves on one grid.
#[derive(Clone, Debug)]
struct Sums {
    load: f64,
    moment: f64,
    inflow: f64,
    ridge: Vec<f64>,
}

/// Film over outlet film at a step, whole or half.
fn film(m: f64, steps: usize, at: f64) -> f64 {
    m - (m - 1.0) * at / steps as f64
}

/// Solves one wave; pressures at the inner steps.
fn wave(m: f64, steps: usize, decay: f64) -> Result<Vec<f64>, NotPositive> {
    let step = 1.0 / steps as f64;
    let cube = |at: f64| {
        let h = film(m, steps, at);
        h * h * h
    };
    let mut band = SymmetricBand::zero(steps - 1, 1);
    let mut pressure = vec![6.0 * (m - 1.0) * step; steps - 1];
    for i in 1..steps {
        let x = i as f64;
        let (before, after) = (cube(x - 0.5) / step, cube(x + 0.5) / step);
        band.set(i - 1, 0, before + after + decay * decay * cube(x) * step);
        if i + 1 < steps {
            band.set(i - 1, 1, -after);
        }
    }
    band.solve(&mut pressure)?;
    Ok(pressure)
}

fn sums(m: f64, aspect: f64, steps: usize) -> Result<Sums, NotPositive> {
    let step = 1.0 / steps as f64;
    let mut total = Sums {
        load: 0.0,
        moment: 0.0,
        inflow: 0.5 * m,
        ridge: vec![0.0; steps + 1],
    };
    let (half, inlet) = (film(m, steps, 0.5), m * m * m);
    for index in 0..WAVES {
        let n = f64::from(2 * index + 1);
        let decay = n * PI / aspect;
        let pressure = wave(m, steps, decay)?;
        let share = 8.0 / (n * n * PI * PI);
        let sign = if index % 2 == 0 { 1.0 } else { -1.0 };
        for (i, p) in pressure.iter().enumerate() {
            let x = (i + 1) as f64 * step;
            total.load += share * p * step;
            total.moment += share * p * x * step;
            total.ridge[i + 1] += sign * 4.0 / (n * PI) * p;
        }
        // flux at the inlet from the balance of the first half cell
        let first = half * half * half * pressure[0] / step;
        let aside = decay * decay * inlet * pressure[0] * step / 8.0;
        total.inflow -= share / 12.0 * (first + 6.0 * (m - half) - aside);
    }
    Ok(total)
}

/// The pad at a ratio of films and a width over length; both must lie in the range of [`LAW`],
/// else `None`.
pub fn pad(ratio: Ratio, aspect: Ratio) -> Option<Slider> {
    let (m, aspect) = (ratio.base(), aspect.base());
    let inside =
        m > 1.0 && m <= STEEPEST && (ASPECTS.0 - 1e-9..=ASPECTS.1 + 1e-9).contains(&aspect);
    if !inside {
        return None;
    }
    // the matrix is diagonally dominant, so both solutions exist
    let coarse = sums(m, aspect, STEPS / 2).ok()?;
    let fine = sums(m, aspect, STEPS).ok()?;
    let finer = |get: fn(&Sums) -> f64| get(&fine) + (get(&fine) - get(&coarse)) / 3.0;
    let load = finer(|s| s.load);
    let k = m - 1.0;
    Some(Slider {
        load: number(load),
        friction: number(ln(m) / k + 0.5 * k * load),
        flow: number(finer(|s| s.inflow)),
        centre: number(finer(|s| s.moment) / load),
        peak: number(finer(|s| peak(&s.ridge))),
    })
}

/// Highest value, by the parabola through the highest node and its neighbours.
fn peak(values: &[f64]) -> f64 {
    let inner = 1..values.len() - 1;
    let top = inner.max_by(|a, b| values[*a].total_cmp(&values[*b]));
    let top = top.unwrap_or(1);
    let (before, here, after) = (values[top - 1], values[top], values[top + 1]);
    let bend = before - 2.0 * here + after;
    here - (before - after) * (before - after) / (8.0 * bend)
}

/// The ratio with the largest load at a width over length, and the pad there; `None` outside
/// the range of [`LAW`].
pub fn optimum(aspect: Ratio) -> Option<(Ratio, Slider)> {
    pad(number(2.0), aspect)?;
    let load = |m: f64| pad(number(m), aspect).map_or(f64::NAN, |p| p.load.base());
    let (m, _) = golden(1.05, 8.0, load);
    Some((number(m), pad(number(m), aspect)?))
}

/// The ratio at which the centre of pressure is at the pivot; `None` for a pivot before 0.501
/// of the length or beyond what ratio 10 reaches, or outside the range of [`LAW`].
pub fn ratio_from_pivot(pivot: Ratio, aspect: Ratio) -> Option<Ratio> {
    pad(number(2.0), aspect)?;
    if pivot.base() < FIRST_PIVOT {
        return None;
    }
    let centre = |m: f64| pad(number(m), aspect).map_or(f64::NAN, |p| p.centre.base());
    let root = bracketed(1.001, STEEPEST, |m| centre(m) - pivot.base());
    root.ok().map(|r| number(r.at))
}

#[cfg(test)]
mod tests {
    use super::super::slider::slider;
    use super::*;

    #[test]
    fn a_wide_pad_nears_the_infinite_one() {
        for m in [1.2, 2.2, 4.0] {
            let wide = pad(number(m), number(10.0)).unwrap();
            let endless = slider(number(m)).unwrap();
            let ratio = wide.load.base() / endless.load.base();
            // each side loses a strip about a third of the length wide
            assert!((0.9..0.96).contains(&ratio), "{m}: {ratio}");
            assert!((wide.peak.base() / endless.peak.base() - 1.0).abs() < 1e-3);
            // what the sides draw in and lose does not depend on the width
            let half = pad(number(m), number(5.0)).unwrap();
            let excess = |of: Slider| of.flow.base() - endless.flow.base();
            assert!((excess(half) / excess(wide) - 2.0).abs() < 0.01);
        }
    }

    #[test]
    fn halving_the_step_quarters_the_error() {
        for aspect in [0.5, 1.0, 3.0] {
            let load = |steps| sums(2.5, aspect, steps).unwrap().load;
            let (a, b, c) = (load(32), load(64), load(128));
            let order = libm::log2((b - a) / (c - b));
            assert!((order - 2.0).abs() < 0.1, "{aspect}: {order}");
        }
    }

    #[test]
    fn a_narrow_pad_loses_oil_at_its_sides() {
        let (narrow, endless) = (pad(number(2.0), number(0.25)), slider(number(2.0)));
        let (narrow, endless) = (narrow.unwrap(), endless.unwrap());
        // almost all of the Couette flow of the inlet, m/2, comes in
        assert!(narrow.flow.base() > 0.9 && narrow.flow.base() < 1.0);
        assert!(narrow.flow.base() > endless.flow.base());
    }
}
