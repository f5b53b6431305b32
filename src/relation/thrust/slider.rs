//! The infinitely wide slider: a flat pad that narrows from inlet to outlet, in closed form.

use crate::numeric::math::ln;
use crate::numeric::maximum::golden;
use crate::numeric::root::bracketed;
use crate::quantity::convert::number;
use crate::quantity::{Measure, Ratio};
use crate::relation::Law;

/// Load of the slider.
pub static LAW: Law = Law {
    name: "thrust-slider",
    title: "load, friction and flow of an infinitely wide flat pad",
    formula: "W* = (6/K^2)(ln m - 2K/(2 + K)), F* = 4 ln m/K - 6/(2 + K), q* = (1 + K)/(2 + K), \
              p* = 3K/(2 (1 + K)(2 + K)), K = m - 1, m inlet over outlet film",
    range: "m above 1; W* = W h_out^2/(eta U B^2 L), B in the direction of motion",
    source: "Reynolds 1886, as in textbooks of tribology",
};

/// Where the load acts, and so where a pivot must be.
pub static PIVOT: Law = Law {
    name: "thrust-pivot",
    title: "film ratio of a tilting pad from its pivot, infinitely wide",
    formula: "x_c(m), the centre of pressure from the inlet over the length, solved for m",
    range: "pivot 0.501 to 0.74 of the length from the inlet; a central pivot carries nothing in \
            this theory",
    source: "Reynolds 1886, as in textbooks of tribology",
};

/// What a pad does at a ratio of films, as pure numbers.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Slider {
    /// Load, `W h_out^2/(eta U B^2 L)`.
    pub load: Ratio,
    /// Friction on the runner, `F h_out/(eta U B L)`.
    pub friction: Ratio,
    /// Oil drawn in at the inlet, `Q/(U h_out L)`.
    pub flow: Ratio,
    /// Centre of pressure from the inlet, over the length.
    pub centre: Ratio,
    /// Highest pressure, `p h_out^2/(eta U B)`.
    pub peak: Ratio,
}

/// Foremost pivot that is told from the middle.
pub(super) const FIRST_PIVOT: f64 = 0.501;
/// Largest ratio looked at.
pub(super) const STEEPEST: f64 = 10.0;

/// The slider at a ratio; `None` unless it is above 1.
pub fn slider(ratio: Ratio) -> Option<Slider> {
    let m = ratio.base();
    if m.is_nan() || m <= 1.0 || m.is_infinite() {
        return None;
    }
    let k = m - 1.0;
    let load = load(m);
    Some(Slider {
        load: number(load),
        friction: number(ln(m) / k + 0.5 * k * load),
        flow: number(m / (1.0 + m)),
        centre: number(centre(m)),
        peak: number(1.5 * k / (m * (1.0 + m))),
    })
}

/// `W*`; by its series close to 1, where the closed form cancels.
fn load(m: f64) -> f64 {
    let k = m - 1.0;
    if k < 1e-3 {
        return k * (0.5 - 0.75 * k + 0.825 * k * k);
    }
    6.0 / (k * k) * (ln(m) - 2.0 * k / (2.0 + k))
}

/// Centre of pressure from the inlet; the moment is integrated, which does not cancel.
fn centre(m: f64) -> f64 {
    const STEPS: u32 = 2000;
    let (mut force, mut moment) = (0.0, 0.0);
    for step in 1..STEPS {
        let x = f64::from(step) / f64::from(STEPS);
        let h = m - (m - 1.0) * x;
        // Simpson's rule for 6 K x (1 - x)/((2 + K) H^2), without its constant
        let pressure = x * (1.0 - x) / (h * h);
        let weight = if step % 2 == 1 { 4.0 } else { 2.0 };
        force += weight * pressure;
        moment += weight * pressure * x;
    }
    moment / force
}

/// Ratio with the largest load, and that load: 2.19 and 0.1602.
pub fn optimum() -> (Ratio, Ratio) {
    let (m, load) = golden(1.01, STEEPEST, load);
    (number(m), number(load))
}

/// Ratio of a tilting pad from its pivot, [`PIVOT`]; `None` outside its range.
pub fn ratio_from_pivot(pivot: Ratio) -> Option<Ratio> {
    if pivot.base() < FIRST_PIVOT {
        return None;
    }
    let root = bracketed(1.001, STEEPEST, |m| centre(m) - pivot.base());
    root.ok().map(|r| number(r.at))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn series_and_closed_form_meet() {
        let per_taper = |m: f64| load(m) / (m - 1.0);
        let (below, above) = (per_taper(1.000_999_9), per_taper(1.001_000_1));
        assert!((below / above - 1.0).abs() < 1e-6, "{below} {above}");
    }

    #[test]
    fn no_load_without_taper() {
        assert_eq!(slider(number(1.0)), None);
        assert_eq!(slider(number(0.5)), None);
        assert_eq!(ratio_from_pivot(number(0.5)), None);
    }
}
