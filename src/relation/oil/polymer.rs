//! Polymer-thickened oils over temperature: base oil on its own line, thickened by a share `P`
//! that moves between two levels.
//!
//! Not every polymer expands as it warms; a constant `P` already raises the viscosity index, so
//! flat and rising shares are both offered. Outside its window `P` stays level and the curve
//! follows the base oil. Whatever the inputs, base ≤ sheared ≤ new at every temperature.

use super::shear::{ShearError, checked_index, stability_index};
use super::tangent::fall;
use super::viscosity_index::{self, IndexError};
use super::viscosity_temperature::{LOWEST_MM2_S, Line, Misfit, ViscosityCurve};
use crate::numeric::root::bracketed;
use crate::quantity::convert::{celsius, mm2_s, number, to_mm2_s};
use crate::quantity::{KinematicViscosity, Measure, Ratio, ThermodynamicTemperature};
use crate::relation::Law;

/// The share by which the polymer thickens.
pub static SHARE: Law = Law {
    name: "polymer-share",
    title: "Share by which the polymer thickens the base oil",
    formula: "P(t) = Pc + (Ph - Pc) u^2 (3 - 2 u), u = (t - tc) / (th - tc) held to 0 … 1",
    range: "level outside the window; below cloud or pour point measured values come first",
    source: "interpolation of the program's own; reduces to a constant share where Pc = Ph",
};

/// The finished oil.
pub static FINISHED: Law = Law {
    name: "polymer-curve",
    title: "Viscosity of a polymer-thickened oil",
    formula: "nu(t) = nu_base(t) (1 + P(t))",
    range: "between the points the base oil and the share were taken from",
    source: "definition of the share; base oil by ASTM D341",
};

/// The sheared oil.
pub static SHEARED: Law = Law {
    name: "polymer-curve-sheared",
    title: "Viscosity of a polymer-thickened oil after permanent shear",
    formula: "nu_s(t) = nu_base(t) (1 + (1 - PSSI) P(t))",
    range: "the same share is taken to be lost at every temperature, which holds to first order",
    source: "ASTM D6022 carried to other temperatures (common practice)",
};

/// A finished oil split into base oil and polymer.
pub static SPLIT: Law = Law {
    name: "polymer-split",
    title: "Base oil and polymer of a finished oil, by an assumed index of the base",
    formula: "the Y at which nu40 / U(Y, VI_base) - 1 = R (nu100 / Y - 1), R = P40 / P100",
    range: "an estimate: the assumptions move P by a third",
    source: "ASTM D2270 with the definition of the share (common practice)",
};

/// Why there is no polymer curve.
#[derive(Clone, Copy, Debug, PartialEq, thiserror::Error)]
pub enum PolymerError {
    /// A share below zero.
    #[error("the polymer cannot thin the base oil: P is {0}")]
    Negative(f64),
    /// A window the wrong way round.
    #[error("the cold end of the polymer's window must lie below its warm end")]
    Window,
    /// Neither stability index nor share.
    #[error(transparent)]
    Shear(#[from] ShearError),
    /// No index for the finished or base oil.
    #[error(transparent)]
    Index(#[from] IndexError),
    /// The finished oil is no better than the base assumed.
    #[error("a viscosity index of {finished:.0} needs no polymer over a base of {base:.0}")]
    NoPolymer {
        /// Index of the finished oil.
        finished: f64,
        /// Index assumed for the base.
        base: f64,
    },
    /// No base oil of 2 mm²/s or more makes that oil.
    #[error("no base oil of index {base:.0} gives this oil: assume a higher index for the base")]
    NoBase {
        /// Index assumed for the base.
        base: f64,
    },
    /// A ratio of shares that is not above zero.
    #[error("the ratio of shares R = P40 / P100 must be above zero, it is {0}")]
    Ratio(f64),
}

/// How much a polymer thickens its base oil, over temperature.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Thickening {
    p_cold: f64,
    p_hot: f64,
    t_cold_k: f64,
    t_hot_k: f64,
}

/// A share that holds from some temperature on.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Level {
    /// The share.
    pub p: Ratio,
    /// The temperature.
    pub at: ThermodynamicTemperature,
}

impl Thickening {
    /// From the level below a cold temperature to the level above a warm one.
    ///
    /// # Errors
    /// [`PolymerError::Negative`], [`PolymerError::Window`].
    pub fn between(cold: Level, hot: Level) -> Result<Self, PolymerError> {
        for p in [cold.p.base(), hot.p.base()] {
            if p.is_nan() || p < 0.0 {
                return Err(PolymerError::Negative(p));
            }
        }
        if cold.at >= hot.at {
            return Err(PolymerError::Window);
        }
        Ok(Self {
            p_cold: cold.p.base(),
            p_hot: hot.p.base(),
            t_cold_k: cold.at.base(),
            t_hot_k: hot.at.base(),
        })
    }

    /// The same share at every temperature.
    ///
    /// # Errors
    /// [`PolymerError::Negative`].
    pub fn flat(p: Ratio) -> Result<Self, PolymerError> {
        let (cold, hot) = (celsius(0.0), celsius(100.0));
        Self::between(Level { p, at: cold }, Level { p, at: hot })
    }

    /// Level outside, smooth within the window, through a share at two temperatures inside it: a
    /// level that would have to lie below zero is held at zero, and the share at the colder of
    /// the two is then missed.
    ///
    /// # Errors
    /// [`PolymerError::Negative`], [`PolymerError::Window`].
    pub fn through(
        window: (ThermodynamicTemperature, ThermodynamicTemperature),
        cold: Level,
        hot: Level,
    ) -> Result<Self, PolymerError> {
        let flat = |p: f64| Self {
            p_cold: p,
            p_hot: p,
            t_cold_k: window.0.base(),
            t_hot_k: window.1.base(),
        };
        let (s_cold, s_hot) = (flat(0.0).smooth(cold.at), flat(0.0).smooth(hot.at));
        if window.0 >= window.1 || cold.at >= hot.at || s_hot <= s_cold {
            return Err(PolymerError::Window);
        }
        let rise = (hot.p.base() - cold.p.base()) / (s_hot - s_cold);
        let p_cold = (cold.p.base() - rise * s_cold).max(0.0);
        let p_hot = p_cold + (hot.p.base() - p_cold) / s_hot;
        let level = |p: f64, at| Level { p: number(p), at };
        Self::between(level(p_cold, window.0), level(p_hot.max(0.0), window.1))
    }

    /// How far between the levels, 0 to 1.
    fn smooth(&self, at: ThermodynamicTemperature) -> f64 {
        let u = (at.base() - self.t_cold_k) / (self.t_hot_k - self.t_cold_k);
        let u = u.clamp(0.0, 1.0);
        u * u * (3.0 - 2.0 * u)
    }

    /// The share at a temperature.
    pub fn share_at(&self, at: ThermodynamicTemperature) -> Ratio {
        number(self.p_cold + (self.p_hot - self.p_cold) * self.smooth(at))
    }

    /// Rise of the share with temperature, 1/K; zero outside the window.
    fn slope_at(&self, at: ThermodynamicTemperature) -> f64 {
        let width = self.t_hot_k - self.t_cold_k;
        let u = ((at.base() - self.t_cold_k) / width).clamp(0.0, 1.0);
        (self.p_hot - self.p_cold) * 6.0 * u * (1.0 - u) / width
    }

    /// The window, cold end first.
    pub fn window(&self) -> (ThermodynamicTemperature, ThermodynamicTemperature) {
        let at = ThermodynamicTemperature::from_base;
        (at(self.t_cold_k), at(self.t_hot_k))
    }
}

/// Viscosity of a base oil thickened by a share.
pub fn finished(base: KinematicViscosity, share: Ratio) -> KinematicViscosity {
    KinematicViscosity::from_base(base.base() * (1.0 + share.base()))
}

/// The same after permanent shear by a test with that stability index.
///
/// # Errors
/// [`ShearError::Index`].
pub fn after_shear(
    base: KinematicViscosity,
    share: Ratio,
    stability_index: Ratio,
) -> Result<KinematicViscosity, ShearError> {
    let left = 1.0 - checked_index(stability_index)?;
    Ok(finished(base, number(left * share.base())))
}

/// A polymer-thickened oil, new or with part of its polymer's effect lost.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct ThickenedOil {
    base: Line,
    thickening: Thickening,
    /// What is left of the share, 0 to 1, over temperature.
    left: Thickening,
}

impl ThickenedOil {
    /// The new oil.
    pub fn new(base: Line, thickening: Thickening) -> Self {
        Self {
            base,
            thickening,
            left: Thickening {
                p_cold: 1.0,
                p_hot: 1.0,
                ..thickening
            },
        }
    }

    /// The oil after permanent shear by a test with that stability index.
    ///
    /// # Errors
    /// [`ShearError::Index`].
    pub fn sheared(self, stability_index: Ratio) -> Result<Self, ShearError> {
        let left = 1.0 - checked_index(stability_index)?;
        let left = Thickening {
            p_cold: self.left.p_cold * left,
            p_hot: self.left.p_hot * left,
            ..self.left
        };
        Ok(Self { left, ..self })
    }

    /// The oil as measured after a test at two temperatures: what is left of the share is found
    /// at both, moves smoothly between them and stays level beyond.
    ///
    /// # Errors
    /// [`ShearError::Thicker`], [`ShearError::BelowBase`], [`ShearError::NoPolymer`].
    pub fn sheared_to(
        self,
        cold: (ThermodynamicTemperature, KinematicViscosity),
        hot: (ThermodynamicTemperature, KinematicViscosity),
    ) -> Result<Self, ShearError> {
        let left = |(at, sheared)| {
            let (new, base) = (self.nu_at(at), self.base.nu_at(at));
            stability_index(new, sheared, base).map(|index| 1.0 - index.base())
        };
        let left = Thickening {
            p_cold: left(cold)?,
            p_hot: left(hot)?,
            t_cold_k: cold.0.base(),
            t_hot_k: hot.0.base(),
        };
        Ok(Self { left, ..self })
    }

    /// The same polymer in another base oil.
    #[must_use]
    pub fn on(self, base: Line) -> Self {
        Self { base, ..self }
    }

    /// Its base oil.
    pub fn base(&self) -> Line {
        self.base
    }

    /// Where the share of its polymer moves.
    pub fn window(&self) -> (ThermodynamicTemperature, ThermodynamicTemperature) {
        self.thickening.window()
    }

    /// The share by which its polymer still thickens.
    pub fn share_at(&self, at: ThermodynamicTemperature) -> Ratio {
        number(self.left.share_at(at).base() * self.thickening.share_at(at).base())
    }

    /// `-d ln nu / d ln T` at a temperature: that of the base oil, less what the polymer gains
    /// as it warms.
    pub fn fall_at(&self, at: ThermodynamicTemperature) -> f64 {
        let (left, p) = (
            self.left.share_at(at).base(),
            self.thickening.share_at(at).base(),
        );
        let gain = self.left.slope_at(at) * p + left * self.thickening.slope_at(at);
        fall(self.base, at) - at.base() * gain / (1.0 + left * p)
    }
}

impl ViscosityCurve for ThickenedOil {
    fn nu_at(&self, at: ThermodynamicTemperature) -> KinematicViscosity {
        finished(self.base.nu_at(at), self.share_at(at))
    }

    /// Temperature at which it has a viscosity; one of them, should the polymer's window be so
    /// narrow that the curve turns.
    fn temperature_at(&self, nu: KinematicViscosity) -> Result<ThermodynamicTemperature, Misfit> {
        let highest = |t: &Thickening| t.p_cold.max(t.p_hot);
        let most = 1.0 + highest(&self.left) * highest(&self.thickening);
        let thinned = KinematicViscosity::from_base(nu.base() / most);
        // The base oil alone is too thin at the cold end and thick enough at the warm one; the
        // small step beyond either keeps rounding from closing the bracket.
        let coldest = self.base.temperature_at(nu)?.base() - 0.01;
        let warmest = self.base.temperature_at(thinned)?.base() + 0.01;
        let miss =
            |t_k: f64| self.nu_at(ThermodynamicTemperature::from_base(t_k)).base() - nu.base();
        let lowest = LOWEST_MM2_S;
        let root =
            bracketed(coldest, warmest, miss).map_err(|_| Misfit::OutOfRange { nu, lowest })?;
        Ok(ThermodynamicTemperature::from_base(root.at))
    }
}

/// A finished oil split by assumption.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Split {
    /// Base oil at 40 °C.
    pub base_nu40: KinematicViscosity,
    /// Base oil at 100 °C.
    pub base_nu100: KinematicViscosity,
    /// Share of the polymer at 40 °C.
    pub p40: Ratio,
    /// Share of the polymer at 100 °C.
    pub p100: Ratio,
}

/// Splits a finished oil into a base of an assumed index and a polymer whose share at 40 °C is
/// `ratio` times that at 100 °C (0.6 to 0.9 for polymers that open as they warm, 1.0 to 1.2 for
/// those that do not; common practice). An estimate, to be shown as one.
///
/// # Errors
/// See [`PolymerError`].
pub fn split(
    nu40: KinematicViscosity,
    nu100: KinematicViscosity,
    base_index: Ratio,
    ratio: Ratio,
) -> Result<Split, PolymerError> {
    let finished = viscosity_index::index(nu40, nu100)?.base();
    let (base, r) = (base_index.base(), ratio.base());
    if finished <= base {
        return Err(PolymerError::NoPolymer { finished, base });
    }
    if r.is_nan() || r <= 0.0 {
        return Err(PolymerError::Ratio(r));
    }
    let (u, y) = (to_mm2_s(nu40), to_mm2_s(nu100));
    let base_u = |v: f64| viscosity_index::nu40(mm2_s(v), base_index).map_or(f64::NAN, to_mm2_s);
    let miss = |v: f64| u / base_u(v) - 1.0 - r * (y / v - 1.0);
    let lowest = viscosity_index::LOWEST_Y_MM2_S;
    let root = bracketed(lowest, y, miss).map_err(|_| PolymerError::NoBase { base })?;
    let base_nu100 = mm2_s(root.at);
    let p100 = y / root.at - 1.0;
    Ok(Split {
        base_nu40: viscosity_index::nu40(base_nu100, base_index)?,
        base_nu100,
        p40: number(r * p100),
        p100: number(p100),
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::relation::oil::viscosity_temperature::Point;

    fn base() -> Line {
        let point = |t, nu| Point::new(celsius(t), mm2_s(nu));
        Line::through(point(40.0, 30.0), point(100.0, 5.2)).expect("two good points")
    }

    fn level(p: f64, t: f64) -> Level {
        Level {
            p: number(p),
            at: celsius(t),
        }
    }

    #[test]
    fn the_share_goes_through_two_points_within_its_window() {
        let window = (celsius(0.0), celsius(100.0));
        for (p40, p100) in [(0.5, 0.8), (0.8, 0.8), (0.9, 0.7)] {
            let found = Thickening::through(window, level(p40, 40.0), level(p100, 100.0));
            let share = |t| found.map_or(f64::NAN, |f| f.share_at(celsius(t)).base());
            assert!((share(40.0) - p40).abs() < 1e-12 && (share(100.0) - p100).abs() < 1e-12);
            assert!(
                (share(-30.0) - share(0.0)).abs() < 1e-12,
                "level below the window"
            );
        }
        // a share that would start below nothing starts at nothing
        let steep = Thickening::through(window, level(0.1, 40.0), level(0.8, 100.0));
        let share = |t| steep.map_or(f64::NAN, |f| f.share_at(celsius(t)).base());
        assert!(share(0.0).abs() < 1e-12 && (share(100.0) - 0.8).abs() < 1e-12);
    }

    #[test]
    fn what_a_test_left_is_met_at_both_temperatures_and_stays_between_base_and_new() {
        let window = (celsius(0.0), celsius(100.0));
        let new = ThickenedOil::new(
            base(),
            Thickening::through(window, level(0.5, 40.0), level(0.7, 100.0)).expect("a window"),
        );
        let sheared = new.sheared_to((celsius(40.0), mm2_s(39.0)), (celsius(100.0), mm2_s(7.0)));
        let nu = |t: f64| sheared.map_or(f64::NAN, |s| to_mm2_s(s.nu_at(celsius(t))));
        assert!((nu(40.0) - 39.0).abs() < 1e-9 && (nu(100.0) - 7.0).abs() < 1e-9);
        for t in [-40.0, 0.0, 70.0, 150.0] {
            let at = celsius(t);
            assert!(nu(t) <= to_mm2_s(new.nu_at(at)) && nu(t) >= to_mm2_s(base().nu_at(at)));
        }
        let thinner = new.sheared_to((celsius(40.0), mm2_s(29.0)), (celsius(100.0), mm2_s(7.0)));
        assert!(matches!(thinner, Err(ShearError::BelowBase { .. })));
    }

    #[test]
    fn the_fall_is_that_of_the_curve() {
        let window = (celsius(0.0), celsius(100.0));
        let shares = Thickening::through(window, level(0.4, 40.0), level(0.8, 100.0));
        let oil = ThickenedOil::new(base(), shares.expect("a window"));
        for t in [-20.0, 30.0, 75.0, 130.0] {
            let nu = |dt: f64| oil.nu_at(celsius(t + dt)).base();
            let slope = -(nu(0.01) - nu(-0.01)) / 0.02 / nu(0.0) * celsius(t).base();
            assert!((oil.fall_at(celsius(t)) / slope - 1.0).abs() < 1e-5, "{t}");
        }
    }
}
