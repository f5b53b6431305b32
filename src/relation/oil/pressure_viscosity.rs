//! Pressure-viscosity coefficient.
//!
//! The coefficient is defined in several ways that differ by 10 to 30 %, and measured oils of one
//! kind scatter by a quarter; every result here stands for ± 25 %. For mineral oils ISO, AGMA and
//! Gold agree within 7 % and lie about 25 % below So-Klaus and the older measured tables, most
//! likely by definition; film thickness takes about the square root of it. A measured coefficient
//! comes first.

use crate::numeric::math::{lg, pow};
use crate::quantity::convert::{per_gpa, to_celsius, to_mm2_s, to_mpa_s};
use crate::quantity::{
    DynamicViscosity, KinematicViscosity, MassDensity, Measure, PressureViscosity, Ratio,
    ThermodynamicTemperature,
};
use crate::relation::Law;

/// ISO/TR 15144-1, now ISO/TS 6336-22.
pub static ISO_15144: Law = Law {
    name: "pressure-viscosity-iso15144",
    title: "Pressure-viscosity coefficient of ISO/TS 6336-22",
    formula: "alpha = k eta38^s (1 + 516 (1/(theta + 273) - 1/311)), eta38 in Pa.s; 1e9 k, s: \
              mineral 26.57, 0.1348; PAO 14.66, 0.0507; PAG 13.92, 0.1572",
    range: "mineral oil, PAO, PAG",
    source: "ISO/TR 15144-1 (ISO/TS 6336-22), constants from memory, confirmed by those of \
             AGMA 925 within 0.1 %",
};

/// AGMA 925-A03.
pub static AGMA_925: Law = Law {
    name: "pressure-viscosity-agma925",
    title: "Pressure-viscosity coefficient of AGMA 925",
    formula: "alpha = k eta^s mm2/N, eta in mPa.s at the temperature; k, s: mineral 0.010471, \
              0.1348; PAO 0.010326, 0.0507; PAG 0.0047, 0.1572",
    range: "mineral oil, PAO, PAG",
    source: "AGMA 925-A03, constants from memory, confirmed by those of ISO within 0.1 %",
};

/// Gold and others.
pub static GOLD: Law = Law {
    name: "pressure-viscosity-gold",
    title: "Pressure-viscosity coefficient at 2000 bar",
    formula: "alpha = s nu^t 1/GPa, nu in mm2/s at the temperature; s, t: mineral 9.904, 0.139; \
              PAO 7.382, 0.1335; ester 6.605, 0.136; PAG 5.489, 0.1485",
    range: "mineral oil, PAO, ester, PAG",
    source: "Gold et al. 2001, constants from memory",
};

/// So and Klaus.
pub static SO_KLAUS: Law = Law {
    name: "pressure-viscosity-so-klaus",
    title: "Pressure-viscosity coefficient of So and Klaus",
    formula: "alpha = 10 (1.216 + 4.143 l^3.0627 + 2.848e-4 B^5.1903 l^1.5976 \
              - 3.999 l^3.0975 rho^0.1162) 1/GPa, l = lg nu in mm2/s at the temperature, B the \
              slope of ASTM D341, rho in g/cm3 at the temperature",
    range: "mineral oil above 1 mm2/s; 27 to 93 % too high for PAO and ester",
    source: "So and Klaus 1980, from memory",
};

/// Wooster.
pub static WOOSTER: Law = Law {
    name: "pressure-viscosity-wooster",
    title: "Pressure-viscosity coefficient of Wooster",
    formula: "alpha = 10 (0.6 + 0.965 lg eta) 1/GPa, eta in mPa.s at the temperature",
    range: "mineral oil above 1 mPa.s; 6 to 77 % too high for PAO and ester",
    source: "Wooster, as given in textbooks, from memory",
};

/// A measured coefficient moved to another temperature.
pub static MOVED: Law = Law {
    name: "alpha-at",
    title: "Measured pressure-viscosity coefficient at another temperature",
    formula: "alpha(t) = alpha(t0) f(t) / f(t0), f = 1 + 516 (1/(t + 273) - 1/311)",
    range: "0 to 150 degC",
    source: "temperature factor of ISO/TR 15144-1, from memory; its use on a measured value is \
             common practice",
};

/// Which constants serve.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Family {
    /// Mineral oil.
    Mineral,
    /// Polyalphaolefin.
    Pao,
    /// Polyalkylene glycol.
    Pag,
    /// Ester.
    Ester,
}

impl Family {
    /// The words users write.
    pub const WRITTEN: &'static [(&'static str, Self)] = &[
        ("mineral", Self::Mineral),
        ("pao", Self::Pao),
        ("pag", Self::Pag),
        ("ester", Self::Ester),
    ];

    fn noun(self) -> &'static str {
        match self {
            Self::Mineral => "mineral oil",
            Self::Pao => "PAO",
            Self::Pag => "PAG",
            Self::Ester => "ester",
        }
    }
}

/// Why a correlation gives nothing.
#[derive(Clone, Copy, Debug, PartialEq, thiserror::Error)]
pub enum NoAlpha {
    /// No constants for the family, or known to be wrong for it.
    #[error("{model} does not hold for {}; use {instead}", family.noun())]
    NotForFamily {
        /// The correlation.
        model: &'static str,
        /// The family.
        family: Family,
        /// What does hold.
        instead: &'static str,
    },
    /// Too thin for the correlation.
    #[error("{model} holds above {limit}")]
    TooThin {
        /// The correlation.
        model: &'static str,
        /// The limit.
        limit: &'static str,
    },
}

/// By ISO/TR 15144-1 from the dynamic viscosity at 38 °C.
///
/// # Errors
/// [`NoAlpha::NotForFamily`] for esters.
pub fn iso_15144(
    family: Family,
    eta38: DynamicViscosity,
    at: ThermodynamicTemperature,
) -> Result<PressureViscosity, NoAlpha> {
    let (k, s) = match family {
        Family::Mineral => (26.57, 0.1348),
        Family::Pao => (14.66, 0.0507),
        Family::Pag => (13.92, 0.1572),
        Family::Ester => return Err(not_for("iso15144", family, "gold")),
    };
    let eta38_pa_s = eta38.base();
    Ok(per_gpa(k * pow(eta38_pa_s, s) * temperature_factor(at)))
}

/// Factor on the coefficient at 38 °C. The standard counts kelvins from 273.
fn temperature_factor(at: ThermodynamicTemperature) -> f64 {
    1.0 + 516.0 * (1.0 / (to_celsius(at) + 273.0) - 1.0 / 311.0)
}

/// By AGMA 925 from the dynamic viscosity at the temperature of the contact's inlet.
///
/// # Errors
/// [`NoAlpha::NotForFamily`] for esters.
pub fn agma_925(family: Family, eta: DynamicViscosity) -> Result<PressureViscosity, NoAlpha> {
    let (k, s) = match family {
        Family::Mineral => (0.010_471, 0.1348),
        Family::Pao => (0.010_326, 0.0507),
        Family::Pag => (0.0047, 0.1572),
        Family::Ester => return Err(not_for("agma925", family, "gold")),
    };
    Ok(per_gpa(1000.0 * k * pow(to_mpa_s(eta), s)))
}

/// By Gold et al. from the kinematic viscosity at the temperature; the secant at 2000 bar.
pub fn gold(family: Family, nu: KinematicViscosity) -> PressureViscosity {
    let (s, t) = match family {
        Family::Mineral => (9.904, 0.139),
        Family::Pao => (7.382, 0.1335),
        Family::Ester => (6.605, 0.136),
        Family::Pag => (5.489, 0.1485),
    };
    per_gpa(s * pow(to_mm2_s(nu), t))
}

/// By So and Klaus, mineral oils only: kinematic viscosity and density at the temperature, slope
/// `B` of ASTM D341.
///
/// # Errors
/// [`NoAlpha`] for any other family, and at 1 mm²/s or thinner.
pub fn so_klaus(
    family: Family,
    nu: KinematicViscosity,
    slope: Ratio,
    density: MassDensity,
) -> Result<PressureViscosity, NoAlpha> {
    let model = "so-klaus";
    if family != Family::Mineral {
        return Err(not_for(model, family, "gold or iso15144"));
    }
    let l = lg(to_mm2_s(nu));
    if l <= 0.0 {
        let limit = "1 mm2/s";
        return Err(NoAlpha::TooThin { model, limit });
    }
    let (b, rho_g_cm3) = (slope.base(), density.base() / 1000.0);
    let sum = 1.216 + 4.143 * pow(l, 3.0627) + 2.848e-4 * pow(b, 5.1903) * pow(l, 1.5976)
        - 3.999 * pow(l, 3.0975) * pow(rho_g_cm3, 0.1162);
    Ok(per_gpa(10.0 * sum))
}

/// By Wooster, mineral oils only, from the dynamic viscosity at the temperature.
///
/// # Errors
/// [`NoAlpha`] for any other family, and at 1 mPa·s or thinner.
pub fn wooster(family: Family, eta: DynamicViscosity) -> Result<PressureViscosity, NoAlpha> {
    let model = "wooster";
    if family != Family::Mineral {
        return Err(not_for(model, family, "gold or iso15144"));
    }
    let lg_eta = lg(to_mpa_s(eta));
    if lg_eta <= 0.0 {
        let limit = "1 mPa.s";
        return Err(NoAlpha::TooThin { model, limit });
    }
    Ok(per_gpa(10.0 * (0.6 + 0.965 * lg_eta)))
}

/// A coefficient measured at one temperature, moved to another.
pub fn moved(
    alpha: PressureViscosity,
    measured_at: ThermodynamicTemperature,
    at: ThermodynamicTemperature,
) -> PressureViscosity {
    let ratio = temperature_factor(at) / temperature_factor(measured_at);
    PressureViscosity::from_base(alpha.base() * ratio)
}

fn not_for(model: &'static str, family: Family, instead: &'static str) -> NoAlpha {
    NoAlpha::NotForFamily {
        model,
        family,
        instead,
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::celsius;

    #[test]
    fn iso_and_agma_are_one_curve_at_38_degrees() {
        for family in [Family::Mineral, Family::Pao, Family::Pag] {
            let eta = DynamicViscosity::from_base(0.1);
            let iso = iso_15144(family, eta, celsius(38.0)).map_or(f64::NAN, Measure::base);
            let agma = agma_925(family, eta).map_or(f64::NAN, Measure::base);
            assert!((iso / agma - 1.0).abs() < 1e-3, "{family:?}");
        }
    }

    #[test]
    fn mineral_correlations_refuse_synthetics() {
        let (nu, eta) = (
            KinematicViscosity::from_base(46e-6),
            DynamicViscosity::from_base(0.04),
        );
        let density = MassDensity::from_base(850.0);
        for family in [Family::Pao, Family::Pag, Family::Ester] {
            assert!(so_klaus(family, nu, Ratio::from_base(3.0), density).is_err());
            assert!(wooster(family, eta).is_err());
        }
        assert!(iso_15144(Family::Ester, eta, celsius(40.0)).is_err());
    }

    #[test]
    fn a_measured_value_keeps_its_own_temperature() {
        let alpha = per_gpa(22.0);
        let back = moved(
            moved(alpha, celsius(25.0), celsius(80.0)),
            celsius(80.0),
            celsius(25.0),
        );
        assert!((back.base() / alpha.base() - 1.0).abs() < 1e-14);
        assert!(moved(alpha, celsius(25.0), celsius(80.0)) < alpha);
    }
}
