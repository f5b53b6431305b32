//! How sure a verdict is: inputs and oil sampled within their tolerances, the share of cases in
//! which every limit is met. It never replaces the verdict; the reserve does not come into it.

use crate::demand::{Gap, GapKind, Instead, Scenario, demands, is_severe};
use crate::judge::{Judgement, PreparedOil};
use crate::model::oil::{PointsFrom, Viscosity};
use crate::numeric::math::lg;
use crate::numeric::share::interval;
use crate::oil::Curves;
use crate::oil::worn::Worn;
use crate::quantity::Amount;
use crate::quantity::convert::celsius;
use crate::relation::oil::uncertainty::of_one_result;
use crate::trace::Silent;
use crate::weighing::{Scales, Weighed};
use rand_distr::{Distribution, StandardNormal};
use rand_pcg::Pcg64;
use rand_pcg::rand_core::{Rng, SeedableRng};

/// The seed of every run: the same inputs give the same share.
pub const SEED: u64 = 20_260_201;
/// A tolerance is taken to hold 95 of 100 cases.
const WITHIN: f64 = 1.959_963_984_540_054;
/// Data-sheet viscosities are typical values; batches lie about so far off. Common practice.
const DATA_SHEET: f64 = 0.05;
/// A grade lies anywhere within this of its middle (ISO 3448).
const GRADE: f64 = 0.10;
/// A margin this close to zero is met.
const ZERO: f64 = -1e-9;

/// Where a spread comes from.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Basis {
    /// The user stated a tolerance.
    Stated,
    /// The usual one of its kind.
    Usual,
    /// Unknown within a range.
    Unknown,
    /// Assumed, with a plausible range.
    Assumed,
    /// The oil's viscosity.
    Oil,
}

impl Basis {
    /// In words.
    pub fn word(self) -> &'static str {
        match self {
            Self::Stated => "tolerance stated",
            Self::Usual => "usual tolerance",
            Self::Unknown => "unknown, any value alike",
            Self::Assumed => "assumed, plausible range",
            Self::Oil => "tolerance of the oil",
        }
    }
}

/// How an input is spread.
#[derive(Clone, Copy, Debug, PartialEq)]
enum Shape {
    /// Bell-shaped, 95 of 100 within the ends.
    Bell,
    /// Any value alike.
    Even,
    /// Most often the value taken, never beyond the ends.
    Peak(f64),
}

/// One input that is sampled.
#[derive(Clone, Debug, PartialEq)]
pub struct Sampled {
    /// Its key; of the oil, what of it.
    pub key: String,
    /// Its part.
    pub about: Option<String>,
    /// Where its spread comes from.
    pub basis: Basis,
    /// Ends of the spread.
    pub ends: (Amount, Amount),
    /// Share of the spread of the smallest margin that goes with it, 0 to 1.
    pub matters: f64,
    shape: Shape,
    role: Role,
}

/// What a sampled value is put into.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
enum Role {
    Axis(usize),
    Instead,
    Viscosity,
    Loss,
}

/// The result.
#[derive(Clone, Debug, PartialEq)]
pub struct Scatter {
    /// Cases sampled.
    pub cases: u32,
    /// Cases in which every limit is met.
    pub met: u32,
    /// The 95 % interval of the share.
    pub interval: (f64, f64),
    /// What was sampled, the most telling first.
    pub inputs: Vec<Sampled>,
}

impl Scatter {
    /// The share of cases in which every limit is met.
    pub fn share(&self) -> f64 {
        f64::from(self.met) / f64::from(self.cases.max(1))
    }

    /// The two inputs that matter most, those that move the margin at all.
    pub fn most(&self) -> &[Sampled] {
        let telling = self.inputs.iter().take_while(|i| i.matters > 0.005).count();
        &self.inputs[..telling.min(2)]
    }
}

/// Samples one oil on one weighed point; `None` where a limit cannot be worked out, so that no
/// share can be given.
pub fn scatter(scales: &Scales<'_>, w: &Weighed<'_>, oil: usize, cases: u32) -> Option<Scatter> {
    let candidate = w.candidate(oil)?;
    let doubts = candidate.judgement.doubts;
    if cases == 0 || doubts.undecided || doubts.alpha_unknown {
        return None;
    }
    let mut inputs = sampled(scales, w, oil);
    let mut chance = Pcg64::seed_from_u64(SEED);
    let mut met = 0;
    let mut margins = Vec::new();
    let mut drawn: Vec<Vec<f64>> = vec![Vec::new(); inputs.len()];
    let axes = w.demands.middle.axes.len();
    for _ in 0..cases {
        let draws: Vec<f64> = inputs.iter().map(|i| draw(i, &mut chance)).collect();
        let j = one(scales, w, oil, &inputs, &draws, axes);
        let least = least(&j);
        met += u32::from(least >= ZERO);
        margins.push(steps(&j).unwrap_or(least));
        for (all, x) in drawn.iter_mut().zip(draws) {
            all.push(x);
        }
    }
    for (input, values) in inputs.iter_mut().zip(&drawn) {
        input.matters = explained(values, &margins);
    }
    inputs.sort_by(|a, b| {
        b.matters
            .total_cmp(&a.matters)
            .then_with(|| (&a.about, &a.key).cmp(&(&b.about, &b.key)))
    });
    Some(Scatter {
        cases,
        met,
        interval: interval(met, cases),
        inputs,
    })
}

/// What is sampled: unknowns, assumptions, stated and usual tolerances, the oil.
fn sampled(scales: &Scales<'_>, w: &Weighed<'_>, oil: usize) -> Vec<Sampled> {
    let listing = Scenario {
        list_usual: true,
        ..Scenario::middle()
    };
    let house = &scales.site.house;
    let all = demands(&mut Silent, w.point, house, scales.rules, &listing);
    let mut inputs = Vec::new();
    for (i, gap) in all.axes.iter().enumerate() {
        inputs.extend(of_gap(gap, Basis::Unknown, Role::Axis(i)));
    }
    for (gaps, basis) in [
        (&all.gaps, Basis::Assumed),
        (&all.tolerances, Basis::Stated),
        (&all.usual, Basis::Usual),
    ] {
        for gap in gaps {
            inputs.extend(of_gap(gap, basis, Role::Instead));
        }
    }
    inputs.extend(of_oil(scales, w, oil));
    inputs
}

fn of_gap(gap: &Gap, basis: Basis, role: Role) -> Option<Sampled> {
    let (ends, shape) = match (&gap.kind, basis) {
        (GapKind::Range(lo, hi), _) => ((*lo, *hi), Shape::Even),
        (GapKind::Assumed { taken, lo, hi }, Basis::Assumed) => {
            ((*lo, *hi), Shape::Peak(taken.base))
        }
        (GapKind::Assumed { lo, hi, .. }, _) => ((*lo, *hi), Shape::Bell),
        (GapKind::Missing | GapKind::Fact, _) => return None,
    };
    Some(Sampled {
        key: gap.key.clone(),
        about: gap.about.clone(),
        basis,
        ends,
        matters: 0.0,
        shape,
        role,
    })
}

/// The oil's own spread: its viscosity as a share, and a loss that is not known.
fn of_oil(scales: &Scales<'_>, w: &Weighed<'_>, oil: usize) -> Vec<Sampled> {
    let curves = &scales.oils[oil].curves;
    let share = |x: f64| Amount {
        kind: crate::quantity::Kind::Ratio,
        base: x,
    };
    let (by, shape) = match &scales.site.oils[oil].viscosity {
        Viscosity::Grade(_) => (GRADE, Shape::Even),
        Viscosity::Points { points, from } => {
            let stated = points.iter().filter_map(|p| p.tolerance);
            let stated = stated.max_by(f64::total_cmp);
            let typical = match from {
                PointsFrom::DataSheet => DATA_SHEET,
                PointsFrom::Batch | PointsFrom::Measured => {
                    crate::quantity::Measure::base(of_one_result(celsius(40.0)))
                }
            };
            (stated.unwrap_or(typical), Shape::Bell)
        }
    };
    let sampled = |key: &str, ends: (f64, f64), shape, role| Sampled {
        key: key.to_owned(),
        about: Some(scales.site.oils[oil].id.clone()),
        basis: Basis::Oil,
        ends: (share(ends.0), share(ends.1)),
        matters: 0.0,
        shape,
        role,
    };
    let mut all = vec![sampled(
        "viscosity",
        (1.0 - by, 1.0 + by),
        shape,
        Role::Viscosity,
    )];
    if let Worn::Between { .. } = curves.worn
        && let Some(range) = curves.loss_range(is_severe(w.point))
    {
        all.push(sampled(
            "permanent shear loss",
            range,
            Shape::Even,
            Role::Loss,
        ));
    }
    all
}

/// A number from 0 up to 1.
fn unit(chance: &mut Pcg64) -> f64 {
    (chance.next_u64() >> 11) as f64 / (1_u64 << 53) as f64
}

fn draw(input: &Sampled, chance: &mut Pcg64) -> f64 {
    let (lo, hi) = (input.ends.0.base, input.ends.1.base);
    match input.shape {
        Shape::Bell => {
            let z: f64 = StandardNormal.sample(chance);
            f64::midpoint(lo, hi) + z * 0.5 * (hi - lo) / WITHIN
        }
        Shape::Even => lo + (hi - lo) * unit(chance),
        Shape::Peak(at) => triangle(lo, at, hi, unit(chance)),
    }
}

/// The triangular distribution, from a number between 0 and 1.
fn triangle(lo: f64, peak: f64, hi: f64, u: f64) -> f64 {
    let (width, rise) = (hi - lo, peak - lo);
    if width <= 0.0 {
        return lo;
    }
    if u < rise / width {
        lo + (u * width * rise).sqrt()
    } else {
        hi - ((1.0 - u) * width * (hi - peak)).sqrt()
    }
}

/// One case judged.
fn one(
    scales: &Scales<'_>,
    w: &Weighed<'_>,
    oil: usize,
    inputs: &[Sampled],
    draws: &[f64],
    axes: usize,
) -> Judgement {
    let mut setting = Scenario {
        shares: vec![0.5; axes],
        ..Scenario::default()
    };
    let (mut times, mut loss) = (1.0, None);
    for (input, x) in inputs.iter().zip(draws) {
        match input.role {
            Role::Axis(i) => {
                let (lo, hi) = (input.ends.0.base, input.ends.1.base);
                setting.shares[i] = if hi > lo { (x - lo) / (hi - lo) } else { 0.5 };
            }
            Role::Instead => setting.instead.push(Instead {
                key: input.key.clone(),
                about: input.about.clone(),
                base: *x,
            }),
            Role::Viscosity => times = x.max(0.1),
            Role::Loss => loss = Some(*x),
        }
    }
    let drawn = state(scales, oil, times, loss);
    scales.judge_under(w.point, setting, &drawn, 0.0)
}

/// The oil as drawn: its own viscosity, without tolerance, with a loss of its own.
fn state(scales: &Scales<'_>, oil: usize, times: f64, loss: Option<f64>) -> PreparedOil {
    let own = &scales.oils[oil].curves;
    let plain = own.without_ends();
    let steps = 6.0 * lg(times);
    let moved: Curves = plain.thicker_by(steps).unwrap_or(plain);
    let worn = match loss {
        Some(loss) => moved.with_loss(loss),
        None => moved,
    };
    PreparedOil::of(&scales.site.oils[oil], worn, scales.rules, true)
}

/// The smallest of all margins: steps and kelvins, whichever is least.
fn least(j: &Judgement) -> f64 {
    [j.hot, j.cold, j.pour, j.oil, j.maker]
        .into_iter()
        .flatten()
        .map(|m| m.value)
        .fold(f64::INFINITY, f64::min)
}

/// The smallest margin of viscosity, VG steps.
fn steps(j: &Judgement) -> Option<f64> {
    [j.hot, j.cold]
        .into_iter()
        .flatten()
        .map(|m| m.value)
        .min_by(f64::total_cmp)
}

/// The share of the spread of `y` that goes with `x`: the square of their correlation.
fn explained(x: &[f64], y: &[f64]) -> f64 {
    let n = x.len() as f64;
    let mean = |v: &[f64]| v.iter().sum::<f64>() / n;
    let (mx, my) = (mean(x), mean(y));
    let (mut xx, mut yy, mut xy) = (0.0, 0.0, 0.0);
    for (a, b) in x.iter().zip(y) {
        xx += (a - mx) * (a - mx);
        yy += (b - my) * (b - my);
        xy += (a - mx) * (b - my);
    }
    let r2 = xy * xy / (xx * yy);
    if r2.is_finite() { r2 } else { 0.0 }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn draws_follow_their_shape() {
        // the triangle: at the peak the share below is (peak - lo)/(hi - lo), from its definition
        assert!((triangle(0.0, 1.0, 4.0, 0.25) - 1.0).abs() < 1e-12);
        assert!(triangle(0.0, 1.0, 4.0, 0.0).abs() < 1e-12);
        assert!((triangle(0.0, 1.0, 4.0, 1.0) - 4.0).abs() < 1e-12);
        // correlation of a line with itself and with a constant
        let line = [1.0, 2.0, 3.0, 4.0];
        assert!((explained(&line, &[2.0, 4.0, 6.0, 8.0]) - 1.0).abs() < 1e-12);
        assert!(explained(&line, &[1.0; 4]).abs() < 1e-12);
    }
}
