//! How well the figures of a sample fit a setting of a cause.
//!
//! Figures are compared by a distribution with heavy tails (Student, seven degrees of freedom): one
//! odd figure does not outweigh the others. The two viscosities share what moves both alike, the
//! batch and the drift of service, so that their ratio counts more than either.

use super::theta::Theta;
use crate::audit::bottle::{Bounds, Figures};
use crate::audit::profile::{ADDITIVE, From, Profile};
use crate::audit::scatter::Scatter;
use crate::model::sample::Reading;
use crate::numeric::math::ln;

/// What a figure is and what is expected of new oil.
#[derive(Clone, Copy, Debug)]
pub(super) struct Seen {
    pub(super) reading: Reading,
    pub(super) value: f64,
    pub(super) bounds: Bounds,
    /// New oil, and how far it may lie from that.
    pub(super) new: f64,
    pub(super) spread: f64,
    /// Standard deviation of the test.
    pub(super) sigma: f64,
    /// Whether new oil is only what oils of its kind usually read.
    pub(super) assumed: bool,
}

/// The figures of a sample, ready to be weighed.
#[derive(Clone, Debug)]
pub(super) struct Sample {
    /// Change of ln nu at 40 and 100 °C, with the variance of the test.
    pub(super) nu: [Option<(f64, f64)>; 2],
    /// Variance of what moves both alike.
    pub(super) common: f64,
    /// Flash, acid number, oxidation, fuel, density.
    pub(super) others: Vec<Seen>,
    /// Additive elements.
    pub(super) additive: Vec<Seen>,
}

/// Square of the standard deviations beyond which a setting is not weighed.
const FAR_SQUARED: f64 = 90.0;

/// Drift of service that is no cause, one standard deviation as a share.
const DRIFT: f64 = 0.006;

/// How often the additives of an oil are not those usual for its kind. Where nobody has measured
/// the new oil, an element out of place may be the oil's own and accuses little.
const UNUSUAL: f64 = 0.05;

impl Sample {
    pub(super) fn new(figures: &Figures, label: &Profile, scatter: &Scatter) -> Self {
        let nu = |reading, ln_new: f64| {
            let value = figures.exact(reading)?;
            let share = scatter.sigma(reading, value) / value;
            Some((ln(value) - ln_new, share * share))
        };
        let batch = label.batch_spread();
        let seen = |reading: Reading| {
            let figure = figures.get(reading)?;
            let (new, spread, assumed) = match (label.figures.get(&reading), reading) {
                (Some(e), _) => (e.value, e.spread, e.from == From::Usual),
                (None, Reading::Fuel) => (0.0, 0.1, false),
                (None, _) => return None,
            };
            Some(Seen {
                reading,
                value: figure.value,
                bounds: figure.bounds,
                new,
                spread,
                assumed,
                sigma: scatter.sigma(reading, figure.value.abs().max(new.abs())),
            })
        };
        let others = [
            Reading::Flash,
            Reading::AcidNumber,
            Reading::Oxidation,
            Reading::Fuel,
            Reading::Density,
        ];
        Self {
            nu: [
                nu(Reading::Nu40, label.ln40),
                nu(Reading::Nu100, label.ln100),
            ],
            common: batch * batch + DRIFT * DRIFT,
            others: others.into_iter().filter_map(seen).collect(),
            additive: ADDITIVE.into_iter().filter_map(seen).collect(),
        }
    }

    /// Whether there is anything to weigh.
    pub(super) fn is_empty(&self) -> bool {
        self.nu.iter().all(Option::is_none) && self.others.is_empty() && self.additive.is_empty()
    }

    /// Whether a viscosity lies so far from a setting that it need not be weighed.
    #[inline]
    pub(super) fn is_far(&self, theta: &Theta) -> bool {
        let model = theta.spread * theta.spread + self.common;
        let far = |i: usize| {
            self.nu[i].is_some_and(|(d, v)| {
                let r = d - theta.d[i];
                r * r > FAR_SQUARED * (v + model)
            })
        };
        far(0) || far(1)
    }

    /// Log-likelihood of the viscosities.
    pub(super) fn viscosity(&self, theta: &Theta) -> f64 {
        let model = theta.spread * theta.spread;
        let mut product = Product::default();
        match self.nu {
            [Some((a, va)), Some((b, vb))] => {
                let (ra, rb) = (a - theta.d[0], b - theta.d[1]);
                let (va, vb, c) = (
                    va + model + self.common,
                    vb + model + self.common,
                    self.common,
                );
                let det = va * vb - c * c;
                let m = (vb * ra * ra - 2.0 * c * ra * rb + va * rb * rb) / det;
                let y = 1.0 + m / 7.0;
                product.take(det * eighth(y) * y);
            }
            [Some((a, v)), None] => {
                product.take(student(a - theta.d[0], v + model + self.common));
            }
            [None, Some((b, v))] => {
                product.take(student(b - theta.d[1], v + model + self.common));
            }
            [None, None] => {}
        }
        product.log()
    }

    /// Log-likelihood of everything else.
    pub(super) fn rest(&self, theta: &Theta) -> f64 {
        let mut product = Product::default();
        for seen in self.others.iter().chain(&self.additive) {
            product.take(fit(seen, theta));
        }
        product.log()
    }
}

/// Densities multiplied, each as its inverse square, so that one logarithm serves for many figures.
struct Product {
    product: f64,
    sum: f64,
}

impl Default for Product {
    fn default() -> Self {
        Self {
            product: 1.0,
            sum: 0.0,
        }
    }
}

impl Product {
    fn take(&mut self, inverse_square: f64) {
        self.product *= inverse_square;
        if !(1e-100..=1e100).contains(&self.product) {
            self.sum += ln(self.product);
            self.product = 1.0;
        }
    }

    /// Logarithm of the density of all together.
    fn log(&self) -> f64 {
        -0.5 * (self.sum + ln(self.product))
    }
}

fn eighth(y: f64) -> f64 {
    let square = y * y;
    let fourth = square * square;
    fourth * fourth
}

/// The density of a Student distribution of seven degrees of freedom, without its constant, as its
/// inverse square: `variance (1 + r^2 / 7 variance)^8`.
fn student(r: f64, variance: f64) -> f64 {
    variance * eighth(1.0 + r * r / (7.0 * variance))
}

/// The value a setting expects of a figure, and its variance without that of the test.
pub(super) fn expected(seen: &Seen, theta: &Theta) -> (f64, f64) {
    let other = theta.mixed.as_ref().map(|m| &m.profile);
    let share = 1.0 - theta.kept;
    let own = theta.kept * seen.new;
    let mixed = |fallback: f64, unknown: f64| match other {
        // fuel and solvent bring no additives, and no acids to speak of
        None if seen.reading.is_element() => (0.0, 0.0),
        None => (share * fallback, 0.0),
        Some(p) => match p.figures.get(&seen.reading) {
            Some(e) => (share * e.value, share * e.spread),
            None => (share * fallback, share * unknown),
        },
    };
    let shift = match seen.reading {
        Reading::Flash => theta.flash,
        Reading::AcidNumber => theta.acid,
        Reading::Oxidation => theta.oxidation,
        Reading::Fuel => theta.fuel,
        _ => super::theta::Shift::default(),
    };
    let (from_other, spread_other) = match seen.reading {
        // the flash point of a mixture lies nearer that of the lighter part
        Reading::Flash => mixed(seen.new, 15.0),
        Reading::AcidNumber => mixed(seen.new, 0.4),
        Reading::Density => mixed(seen.new, 20.0),
        Reading::Oxidation | Reading::Fuel => (0.0, 0.0),
        _ => mixed(seen.new, 200.0),
    };
    let own = match seen.reading {
        Reading::Oxidation | Reading::Fuel => seen.new,
        Reading::Flash | Reading::AcidNumber | Reading::Density if other.is_none() => {
            seen.new - from_other
        }
        _ => own,
    };
    // additives deplete by some per cent in service
    let service = if seen.reading.is_element() {
        0.06 * seen.new
    } else {
        0.0
    };
    let spread = theta.kept * seen.spread;
    let variance = spread * spread
        + spread_other * spread_other
        + shift.spread * shift.spread
        + service * service;
    (own + from_other + shift.by, variance)
}

/// The density of a figure at a setting, as its inverse square.
fn fit(seen: &Seen, theta: &Theta) -> f64 {
    let (mean, variance) = expected(seen, theta);
    let (value, sigma) = match seen.bounds {
        Bounds::Exactly => (seen.value, seen.sigma),
        // anything below the bound fits alike
        Bounds::Below => (mean.min(seen.value), 0.4 * seen.value),
        Bounds::Above => (mean.max(seen.value), seen.sigma),
    };
    let usual = student(value - mean, variance + sigma * sigma);
    if !(seen.assumed && seen.reading.is_element()) {
        return usual;
    }
    let anything = 100.0 + 0.5 * seen.value;
    let density = 1.0 / usual.sqrt() + UNUSUAL / anything;
    1.0 / (density * density)
}

/// Standard deviations between a figure and what a setting expects.
pub(super) fn apart(seen: &Seen, theta: &Theta) -> f64 {
    let (mean, variance) = expected(seen, theta);
    let value = match seen.bounds {
        Bounds::Exactly => seen.value,
        Bounds::Below => mean.min(seen.value),
        Bounds::Above => mean.max(seen.value),
    };
    (value - mean) / (variance + seen.sigma * seen.sigma).sqrt()
}
