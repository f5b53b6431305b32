//! Viscosity of blends at one temperature.
//!
//! The double-logarithm rules (Walther, Refutas, pipeline index) agree within 0.2 %; expect 3 to
//! 5 % against the laboratory for like base stocks up to a viscosity ratio of ten, 10 % and more
//! beyond (common practice). None holds for polymer-thickened oils as a whole, for additive
//! packages, or for fluids that do not mix. Fractions are by volume except for Refutas, by mass.

use super::viscosity_temperature::{Form, SHORT_FORM_FROM_MM2_S};
use crate::numeric::math::{exp, lg, ln, power_of_ten};
use crate::quantity::convert::{mm2_s, number, to_mm2_s};
use crate::quantity::show::{Toward, Units, quantity};
use crate::quantity::{KinematicViscosity, Measure, Ratio};
use crate::relation::Law;

/// Walther.
pub static WALTHER: Law = Law {
    name: "blend-walther",
    title: "Viscosity of a blend at one temperature, volume fractions",
    formula: "W = sum(x_i W(nu_i)), W = lg lg Z, Z = nu + 0.7 (all components 2 mm2/s or more), \
              else Z = nu + 0.7 + exp(-1.47 - 1.84 nu - 0.51 nu^2)",
    range: "miscible fluids without polymer; a viscosity ratio up to about 10",
    source: "constant-temperature method of ASTM D7152",
};

/// Refutas.
pub static REFUTAS: Law = Law {
    name: "blend-refutas",
    title: "Viscosity of a blend at one temperature, mass fractions",
    formula: "VBN = 14.534 ln ln(nu + 0.8) + 10.975; VBN = sum(x_i VBN_i)",
    range: "miscible fluids without polymer, above 0.2 mm2/s",
    source: "Refutas, as given by Maples",
};

/// Pipeline index.
pub static PIPELINE: Law = Law {
    name: "blend-pipeline",
    title: "Viscosity of a blend at one temperature by the pipeline index",
    formula: "H = 40.073 - 46.414 lg lg(nu + 0.6); H = sum(x_i H_i)",
    range: "1.5 mm2/s or more",
    source: "Menon, Liquid Pipeline Hydraulics, eq. 2.22 to 2.24",
};

/// Ratio of logarithms.
pub static LOG_RATIO: Law = Law {
    name: "blend-log-ratio",
    title: "Viscosity of a blend at one temperature by a ratio of logarithms",
    formula: "VBI = ln nu / ln(1000 nu); VBI = sum(x_i VBI_i)",
    range: "miscible fluids without polymer, volume fractions",
    source: "from memory",
};

/// Arrhenius.
pub static ARRHENIUS: Law = Law {
    name: "blend-arrhenius",
    title: "Viscosity of a blend at one temperature, logarithmic",
    formula: "ln nu = sum(x_i ln nu_i)",
    range: "viscosity ratios up to about 2; too high beyond",
    source: "Arrhenius; textbook",
};

/// Share of one component for a target.
pub static FRACTION: Law = Law {
    name: "blend-fraction",
    title: "Share of one of two components for a target viscosity",
    formula: "x_a = (W_target - W_b) / (W_a - W_b)",
    range: "target strictly between the components",
    source: "ASTM D7152, solved for the fraction",
};

/// Polymer of a blend.
pub static POLYMER: Law = Law {
    name: "blend-polymer",
    title: "Share by which the polymers of two oils thicken their blend",
    formula: "ln(1 + P) = sum(x_i ln(1 + P_i)); the blend is held between its components",
    range: "to first order in the concentration of the polymer, volume fractions",
    source: "common practice: the logarithm of the relative viscosity rises with concentration",
};

/// Share by which polymers thicken a blend, each diluted to its fraction.
///
/// # Errors
/// [`BlendError::Lengths`], [`BlendError::Fraction`], [`BlendError::Sum`].
pub fn polymer(fractions: &[Ratio], shares: &[Ratio]) -> Result<Ratio, BlendError> {
    check_fractions(fractions, shares.len())?;
    let parts = fractions.iter().zip(shares);
    let sum: f64 = parts.map(|(x, p)| x.base() * ln(1.0 + p.base())).sum();
    Ok(number(exp(sum) - 1.0))
}

/// A blending rule.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Rule {
    /// Double logarithm of ASTM D341.
    #[default]
    Walther,
    /// Refutas.
    Refutas,
    /// Pipeline index.
    Pipeline,
    /// Ratio of logarithms.
    LogRatio,
    /// Arrhenius.
    Arrhenius,
}

/// Why a blend cannot be worked out.
#[derive(Clone, Copy, Debug, PartialEq, thiserror::Error)]
pub enum BlendError {
    /// No components, or not one fraction for each.
    #[error("{fractions} fractions for {components} components: one fraction for each is needed")]
    Lengths {
        /// How many fractions.
        fractions: usize,
        /// How many components.
        components: usize,
    },
    /// A fraction outside 0 to 1.
    #[error("a fraction is {0}; each is between 0 and 1")]
    Fraction(f64),
    /// Fractions of more or less than the whole.
    #[error("the fractions add up to {0:.6}, not 1")]
    Sum(f64),
    /// A component the rule does not cover.
    #[error("{} is too thin for this rule, which holds above {limit} mm2/s",
        shown(*nu))]
    TooThin {
        /// Its viscosity.
        nu: KinematicViscosity,
        /// The limit, mm²/s.
        limit: f64,
    },
    /// Blending reaches nothing outside its components.
    #[error("{} cannot be blended from {} and {}: the target must lie between them",
        shown(*target), shown(*a), shown(*b))]
    Infeasible {
        /// The target.
        target: KinematicViscosity,
        /// One component.
        a: KinematicViscosity,
        /// The other.
        b: KinematicViscosity,
    },
}

fn shown(nu: KinematicViscosity) -> String {
    quantity(nu.amount(), Units::Si, Toward::Nearest)
}

impl Rule {
    /// The words users write.
    pub const WRITTEN: &'static [(&'static str, Self)] = &[
        ("walther", Self::Walther),
        ("refutas", Self::Refutas),
        ("pipeline", Self::Pipeline),
        ("log-ratio", Self::LogRatio),
        ("arrhenius", Self::Arrhenius),
    ];

    /// The law to name in a calculation.
    pub fn law(self) -> &'static Law {
        match self {
            Self::Walther => &WALTHER,
            Self::Refutas => &REFUTAS,
            Self::Pipeline => &PIPELINE,
            Self::LogRatio => &LOG_RATIO,
            Self::Arrhenius => &ARRHENIUS,
        }
    }

    /// Viscosity of a blend, all viscosities at one temperature.
    ///
    /// # Errors
    /// See [`BlendError`].
    pub fn blend(
        self,
        fractions: &[Ratio],
        nu: &[KinematicViscosity],
    ) -> Result<KinematicViscosity, BlendError> {
        check_fractions(fractions, nu.len())?;
        let form = self.form(nu)?;
        let sum: f64 = fractions
            .iter()
            .zip(nu)
            .map(|(x, nu)| x.base() * self.index(to_mm2_s(*nu), form))
            .sum();
        let total: f64 = fractions.iter().map(|x| x.base()).sum();
        Ok(self.undo(sum / total, form))
    }

    /// Share of `a` in a blend of `a` and `b` that has the target viscosity.
    ///
    /// # Errors
    /// See [`BlendError`].
    pub fn fraction(
        self,
        a: KinematicViscosity,
        b: KinematicViscosity,
        target: KinematicViscosity,
    ) -> Result<Ratio, BlendError> {
        if !((a < target && target < b) || (b < target && target < a)) {
            return Err(BlendError::Infeasible { target, a, b });
        }
        let form = self.form(&[a, b])?;
        let of = |nu| self.index(to_mm2_s(nu), form);
        Ok(number((of(target) - of(b)) / (of(a) - of(b))))
    }

    /// Refuses what the rule does not cover, and chooses the `Z` for all components alike.
    fn form(self, nu: &[KinematicViscosity]) -> Result<Form, BlendError> {
        let limit = match self {
            Self::Walther => 0.21,
            Self::Refutas => 0.2001,
            // Below 1.5 the published constant does not meet that above; it is not used.
            Self::Pipeline => 1.5,
            Self::LogRatio => 0.01,
            Self::Arrhenius => 0.0,
        };
        for nu in nu {
            if to_mm2_s(*nu) < limit * (1.0 - 1e-9) {
                return Err(BlendError::TooThin { nu: *nu, limit });
            }
        }
        let short = SHORT_FORM_FROM_MM2_S * (1.0 - 1e-12);
        let all_short = nu.iter().all(|nu| to_mm2_s(*nu) >= short);
        Ok(if all_short { Form::Short } else { Form::Full })
    }

    fn index(self, nu_mm2_s: f64, form: Form) -> f64 {
        match self {
            Self::Walther => lg(lg(form.z(nu_mm2_s))),
            Self::Refutas => 14.534 * ln(ln(nu_mm2_s + 0.8)) + 10.975,
            Self::Pipeline => 40.073 - 46.414 * lg(lg(nu_mm2_s + 0.6)),
            Self::LogRatio => ln(nu_mm2_s) / ln(1000.0 * nu_mm2_s),
            Self::Arrhenius => ln(nu_mm2_s),
        }
    }

    fn undo(self, index: f64, form: Form) -> KinematicViscosity {
        match self {
            Self::Walther => form.undo(power_of_ten(power_of_ten(index))),
            Self::Refutas => mm2_s(exp(exp((index - 10.975) / 14.534)) - 0.8),
            Self::Pipeline => mm2_s(power_of_ten(power_of_ten((40.073 - index) / 46.414)) - 0.6),
            Self::LogRatio => mm2_s(exp(index * ln(1000.0) / (1.0 - index))),
            Self::Arrhenius => mm2_s(exp(index)),
        }
    }
}

/// One fraction for each component, each between 0 and 1, together 1 within 1e-6.
pub(super) fn check_fractions(fractions: &[Ratio], components: usize) -> Result<(), BlendError> {
    if fractions.len() != components || components == 0 {
        let fractions = fractions.len();
        return Err(BlendError::Lengths {
            fractions,
            components,
        });
    }
    if let Some(x) = fractions.iter().find(|x| !(0.0..=1.0).contains(&x.base())) {
        return Err(BlendError::Fraction(x.base()));
    }
    let sum: f64 = fractions.iter().map(|x| x.base()).sum();
    if (sum - 1.0).abs() > 1e-6 {
        return Err(BlendError::Sum(sum));
    }
    Ok(())
}
