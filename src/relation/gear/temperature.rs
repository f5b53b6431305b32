//! How hot the teeth get: friction, flash and bulk temperature.
//!
//! Sources: ISO/TS 6336-22 (ISO/TR 15144-1) and Blok, from memory.

use crate::numeric::math::pow;
use crate::quantity::convert::{to_mm, to_mpa_s};
use crate::quantity::{
    DynamicViscosity, Length, LoadPerLength, Measure, Power, Pressure, Ratio, TemperatureInterval,
    ThermodynamicTemperature, Velocity,
};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive};
use std::f64::consts::PI;

/// Mean friction of the mesh.
pub static MEAN_FRICTION: Law = Law {
    name: "gear-mean-friction",
    title: "Mean coefficient of friction of the mesh",
    formula: "mu_m = 0.045 (K F_bt / (b v_sum rho_n))^0.2 eta^-0.05 X_R X_L; X_R = 2.2 (Ra / rho_n)^0.25",
    range: "N/mm, m/s, mm, um, eta in mPa.s at oil temperature",
    source: "ISO/TS 6336-22, ISO/TR 15144-1 (from memory)",
};

/// Flash temperature, ISO form.
pub static FLASH: Law = Law {
    name: "gear-flash",
    title: "Flash temperature between gear teeth, ISO form",
    formula: "theta_fl = sqrt(pi) / 2 mu_m p v_s / (B_M (sqrt(v1) + sqrt(v2))) sqrt(8 rho_n p / E')",
    range: "both gears of the same material; p local pressure, v_s difference of the surface speeds, SI units",
    source: "ISO/TS 6336-22, ISO/TR 15144-1 (from memory)",
};

/// Flash temperature, Blok.
pub static FLASH_BLOK: Law = Law {
    name: "gear-flash-blok",
    title: "Flash temperature between gear teeth, Blok",
    formula: "theta_fl = 1.11 mu_m w (sqrt(v1) - sqrt(v2)) / (B_M sqrt(2 b))",
    range: "both gears of the same material; v1 the faster surface, w load per length, b half-width of contact, SI units",
    source: "Blok 1937",
};

/// Bulk temperature.
pub static BULK: Law = Law {
    name: "gear-bulk",
    title: "Bulk temperature of the teeth",
    formula: "theta_M = theta_oil + 7400 (P H_v mu_m / (a b))^0.72 X_S / (1.2 X_Ca)",
    range: "P in kW, a and b in mm; X_S 1.2 spray, 1.0 dip, 0.2 submerged; X_Ca 1 without tip relief",
    source: "ISO/TS 6336-22, ISO/TR 15144-1 (from memory)",
};

/// Thermal contact coefficient of gear steel, `sqrt(lambda rho c)` with 45 W/(m·K), 7800 kg/m³ and
/// 490 J/(kg·K).
pub fn steel_contact_coefficient() -> ThermalContact {
    ThermalContact((45.0_f64 * 7800.0 * 490.0).sqrt())
}

/// Thermal contact coefficient, W·s^½/(m²·K).
#[derive(Clone, Copy, Debug, PartialEq, PartialOrd)]
pub struct ThermalContact(pub f64);

/// What the friction formula takes.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Friction {
    /// Load per length, with the load factors: `K F_bt / b`.
    pub load: LoadPerLength,
    /// Sum of the surface speeds at the pitch point.
    pub sum_speed: Velocity,
    /// Reduced radius at the pitch point.
    pub rho_n: Length,
    /// Viscosity at oil temperature.
    pub eta: DynamicViscosity,
    /// Mean Ra of the flanks.
    pub ra: Length,
    /// Factor of the oil: [`oil_factor`].
    pub oil: Ratio,
}

impl Friction {
    /// Load over speed and radius, N/mm, m/s, mm; with viscosity and oil factor.
    pub(crate) fn checked(self) -> Result<(f64, f64, f64), Outside> {
        let w = positive("the load", self.load)? * 1e-3;
        let v = positive("the sum of the surface speeds", self.sum_speed)?;
        positive("the reduced radius", self.rho_n)?;
        positive("the viscosity", self.eta)?;
        positive("the mean Ra", self.ra)?;
        let x_l = positive("the factor of the oil", self.oil)?;
        Ok((w / (v * to_mm(self.rho_n)), to_mpa_s(self.eta), x_l))
    }
}

/// Mean coefficient of friction, ISO/TS 6336-22 form.
///
/// # Errors
/// An input that is not above zero.
pub fn mean_friction(f: Friction) -> Result<Ratio, Outside> {
    let (load, eta_mpa_s, x_l) = f.checked()?;
    let ra_um = f.ra.base() * 1e6;
    let rough = 2.2 * pow(ra_um / to_mm(f.rho_n), 0.25);
    Ok(Ratio::from_base(
        0.045 * pow(load, 0.2) * pow(eta_mpa_s, -0.05) * rough * x_l,
    ))
}

/// Kinds of oil in the friction formula.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum OilKind {
    /// Mineral.
    Mineral,
    /// Polyalphaolefin or ester.
    PaoOrEster,
    /// Polyglycol.
    Polyglycol,
    /// Phosphate ester (unsure).
    PhosphateEster,
    /// Traction fluid (unsure).
    Traction,
}

/// Factor of the oil in the friction formula; that of polyglycol falls with speed.
///
/// # Errors
/// A speed that is not above zero.
pub fn oil_factor(kind: OilKind, sum_speed: Velocity) -> Result<Ratio, Outside> {
    let factor = match kind {
        OilKind::Mineral => 1.0,
        OilKind::PaoOrEster => 0.8,
        OilKind::Polyglycol => {
            let v = positive("the sum of the surface speeds", sum_speed)?;
            0.75 * pow(6.0 / v, 0.2)
        }
        OilKind::PhosphateEster => 1.3,
        OilKind::Traction => 1.5,
    };
    Ok(Ratio::from_base(factor))
}

/// Pressure, speeds and body of a sliding contact.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct SlidingContact {
    /// Coefficient of friction.
    pub mu: Ratio,
    /// Local pressure.
    pub pressure: Pressure,
    /// Surface speed of the pinion.
    pub v1: Velocity,
    /// Surface speed of the wheel.
    pub v2: Velocity,
    /// Reduced radius.
    pub rho_n: Length,
    /// Reduced modulus.
    pub modulus: Pressure,
    /// Thermal contact coefficient of both bodies.
    pub thermal: ThermalContact,
}

/// Flash temperature, ISO form.
///
/// # Errors
/// An input that is not above zero.
pub fn flash(c: SlidingContact) -> Result<TemperatureInterval, Outside> {
    let (mu, p, v1, v2) = sliding(c)?;
    let rho = positive("the reduced radius", c.rho_n)?;
    let e = positive("the reduced modulus", c.modulus)?;
    let heat = PI.sqrt() / 2.0 * mu * p * (v1 - v2).abs();
    let carried = c.thermal.0 * (v1.sqrt() + v2.sqrt());
    Ok(TemperatureInterval::from_base(
        heat / carried * (8.0 * rho * p / e).sqrt(),
    ))
}

/// Flash temperature, Blok.
///
/// # Errors
/// An input that is not above zero.
pub fn flash_blok(c: SlidingContact) -> Result<TemperatureInterval, Outside> {
    let (mu, p, v1, v2) = sliding(c)?;
    let rho = positive("the reduced radius", c.rho_n)?;
    let e = positive("the reduced modulus", c.modulus)?;
    let w = 2.0 * PI * p * p * rho / e;
    let half_width = (8.0 * w * rho / (PI * e)).sqrt();
    let sliding = (v1.sqrt() - v2.sqrt()).abs();
    Ok(TemperatureInterval::from_base(
        1.11 * mu * w * sliding / (c.thermal.0 * (2.0 * half_width).sqrt()),
    ))
}

fn sliding(c: SlidingContact) -> Result<(f64, f64, f64, f64), Outside> {
    let mu = positive("the coefficient of friction", c.mu)?;
    let p = positive("the pressure", c.pressure)?;
    let v1 = positive("the surface speed of the pinion", c.v1)?;
    let v2 = positive("the surface speed of the wheel", c.v2)?;
    if c.thermal.0.is_nan() || c.thermal.0 <= 0.0 {
        return Err(Outside::NotPositive {
            what: "the thermal contact coefficient",
        });
    }
    Ok((mu, p, v1, v2))
}

/// How the oil reaches the teeth.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Supply {
    /// Sprayed into the mesh.
    Spray,
    /// A wheel dips into the oil.
    Dip,
    /// The mesh runs under oil.
    Submerged,
}

/// What the bulk temperature formula takes.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Bulk {
    /// Oil temperature.
    pub oil: ThermodynamicTemperature,
    /// Power through the mesh.
    pub power: Power,
    /// Loss factor of the geometry, `H_v`.
    pub loss_factor: Ratio,
    /// Mean coefficient of friction.
    pub mu: Ratio,
    /// Centre distance.
    pub centre_distance: Length,
    /// Face width.
    pub face_width: Length,
    /// How the oil reaches the teeth.
    pub supply: Supply,
    /// Tip relief factor, 1 without relief.
    pub relief: Ratio,
}

/// Bulk temperature of the teeth.
///
/// # Errors
/// An input that is not above zero.
pub fn bulk(b: Bulk) -> Result<ThermodynamicTemperature, Outside> {
    let power_kw = positive("the power", b.power)? * 1e-3;
    let h_v = positive("the loss factor", b.loss_factor)?;
    let mu = positive("the coefficient of friction", b.mu)?;
    let relief = positive("the tip relief factor", b.relief)?;
    let a_mm = to_mm(b.centre_distance).abs();
    positive("the face width", b.face_width)?;
    if a_mm.is_nan() || a_mm <= 0.0 {
        return Err(Outside::NotPositive {
            what: "the centre distance",
        });
    }
    let x_s = match b.supply {
        Supply::Spray => 1.2,
        Supply::Dip => 1.0,
        Supply::Submerged => 0.2,
    };
    let loss = power_kw * h_v * mu / (a_mm * to_mm(b.face_width));
    let rise = 7400.0 * pow(loss, 0.72) * x_s / (1.2 * relief);
    Ok(ThermodynamicTemperature::from_base(b.oil.base() + rise))
}
