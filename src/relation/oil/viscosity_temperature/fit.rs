//! Lines through measured points.

use super::{Form, HIGHEST_MM2_S, LN_LN_10, LOWEST_MM2_S, Line, Misfit};
use crate::numeric::math::ln;
use crate::quantity::convert::to_mm2_s;
use crate::quantity::{KinematicViscosity, Measure, ThermodynamicTemperature};
use std::f64::consts::LN_10;

/// A viscosity at a temperature.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Point {
    /// The temperature.
    pub at: ThermodynamicTemperature,
    /// The viscosity.
    pub nu: KinematicViscosity,
}

impl Point {
    /// A viscosity at a temperature.
    pub fn new(at: ThermodynamicTemperature, nu: KinematicViscosity) -> Self {
        Self { at, nu }
    }
}

/// How a fit weighs its points.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Weights {
    /// So that the per-cent error of viscosity is least.
    #[default]
    PerCent,
    /// All alike in `lg lg Z`, as published fits commonly are; a per-cent error counts more the
    /// thinner the oil.
    Equal,
}

impl Line {
    /// Through two points or more, by least squares of `lg lg Z` over `lg T`.
    ///
    /// # Errors
    /// See [`Misfit`].
    pub fn fit(points: &[Point], weights: Weights) -> Result<Self, Misfit> {
        Self::fit_as(points, weights, Form::of(points))
    }

    /// The same with a form of `Z` chosen by the caller, for comparison.
    ///
    /// # Errors
    /// See [`Misfit`].
    pub fn fit_as(points: &[Point], weights: Weights, form: Form) -> Result<Self, Misfit> {
        let points = in_order(points)?;
        let lowest = match form {
            Form::Short => 0.31,
            Form::Full => LOWEST_MM2_S,
        };
        for p in &points {
            let within = lowest * (1.0 - 1e-9)..=HIGHEST_MM2_S * (1.0 + 1e-9);
            if !within.contains(&to_mm2_s(p.nu)) {
                return Err(Misfit::OutOfRange { nu: p.nu, lowest });
            }
        }
        Ok(least_squares(&points, weights, form))
    }
}

/// Rising in temperature; refused where the oil would not thin from each to the next.
pub(in crate::relation::oil) fn in_order(points: &[Point]) -> Result<Vec<Point>, Misfit> {
    if points.len() < 2 {
        return Err(Misfit::TooFew);
    }
    let mut points = points.to_vec();
    points.sort_by(|a, b| {
        (a.at.base().total_cmp(&b.at.base())).then(a.nu.base().total_cmp(&b.nu.base()))
    });
    for pair in points.windows(2) {
        let (cold, hot) = (pair[0], pair[1]);
        if hot.at.base() - cold.at.base() < 1e-6 {
            return Err(Misfit::SameTemperature { at: hot.at });
        }
        if cold.nu <= hot.nu {
            return Err(Misfit::UpsideDown { cold, hot });
        }
    }
    Ok(points)
}

/// `ln ln Z = c - B ln T` about the weighted mean.
fn least_squares(points: &[Point], weights: Weights, form: Form) -> Line {
    let terms: Vec<(f64, f64, f64)> = points
        .iter()
        .map(|p| {
            let nu_mm2_s = to_mm2_s(p.nu);
            let z = form.z(nu_mm2_s);
            let ln_z = ln(z);
            let weight = match weights {
                Weights::Equal => 1.0,
                Weights::PerCent => {
                    let per_cent = z * ln_z / (nu_mm2_s * form.dz(nu_mm2_s));
                    per_cent * per_cent
                }
            };
            (ln(p.at.base()), ln(ln_z), weight)
        })
        .collect();
    let total: f64 = terms.iter().map(|(_, _, w)| w).sum();
    let x_mean = terms.iter().map(|(x, _, w)| w * x).sum::<f64>() / total;
    let y_mean = terms.iter().map(|(_, y, w)| w * y).sum::<f64>() / total;
    let (mut sxy, mut sxx) = (0.0, 0.0);
    for (x, y, w) in &terms {
        sxy += w * (x - x_mean) * (y - y_mean);
        sxx += w * (x - x_mean) * (x - x_mean);
    }
    let b = -sxy / sxx;
    let a = (y_mean + b * x_mean - LN_LN_10) / LN_10;
    Line { a, b, form }
}
