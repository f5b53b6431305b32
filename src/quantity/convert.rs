//! The few conversions `uom` leaves ambiguous or awkward, and makers for the units of the trade.

use super::{
    Angle, AngularVelocity, DynamicViscosity, Force, KinematicViscosity, Length, MassDensity,
    Measure, Pressure, PressureViscosity, Ratio, TemperatureInterval, ThermodynamicTemperature,
    Velocity,
};
use std::f64::consts::PI;

/// Zero of the Celsius scale, K.
pub const ZERO_CELSIUS: f64 = 273.15;

/// A temperature from degrees Celsius.
pub fn celsius(t: f64) -> ThermodynamicTemperature {
    ThermodynamicTemperature::from_base(t + ZERO_CELSIUS)
}

/// A temperature in degrees Celsius.
pub fn to_celsius(t: ThermodynamicTemperature) -> f64 {
    t.base() - ZERO_CELSIUS
}

/// A temperature difference from kelvins.
pub fn kelvins(k: f64) -> TemperatureInterval {
    TemperatureInterval::from_base(k)
}

/// How much hotter `hot` is than `cold`.
pub fn rise(hot: ThermodynamicTemperature, cold: ThermodynamicTemperature) -> TemperatureInterval {
    TemperatureInterval::from_base(hot.base() - cold.base())
}

/// A temperature raised by a difference.
pub fn warmed(t: ThermodynamicTemperature, by: TemperatureInterval) -> ThermodynamicTemperature {
    ThermodynamicTemperature::from_base(t.base() + by.base())
}

/// A kinematic viscosity from mm²/s.
pub fn mm2_s(nu: f64) -> KinematicViscosity {
    KinematicViscosity::from_base(nu * 1e-6)
}

/// A kinematic viscosity in mm²/s.
pub fn to_mm2_s(nu: KinematicViscosity) -> f64 {
    nu.base() * 1e6
}

/// A dynamic viscosity in mPa·s.
pub fn to_mpa_s(eta: DynamicViscosity) -> f64 {
    eta.base() * 1e3
}

/// Dynamic viscosity, `eta = nu rho`.
pub fn dynamic(nu: KinematicViscosity, rho: MassDensity) -> DynamicViscosity {
    DynamicViscosity::from_base(nu.base() * rho.base())
}

/// Kinematic viscosity, `nu = eta / rho`.
pub fn kinematic(eta: DynamicViscosity, rho: MassDensity) -> KinematicViscosity {
    KinematicViscosity::from_base(eta.base() / rho.base())
}

/// Speed of a surface at a diameter, `v = omega d / 2`.
pub fn surface_speed(omega: AngularVelocity, diameter: Length) -> Velocity {
    Velocity::from_base(omega.base() * diameter.base() / 2.0)
}

/// A speed in revolutions a minute.
pub fn to_rpm(omega: AngularVelocity) -> f64 {
    omega.base() * 60.0 / (2.0 * PI)
}

/// A speed from revolutions a minute.
pub fn rpm(n: f64) -> AngularVelocity {
    AngularVelocity::from_base(n * 2.0 * PI / 60.0)
}

/// A length in millimetres.
pub fn to_mm(length: Length) -> f64 {
    length.base() * 1e3
}

/// A length from millimetres.
pub fn mm(length: f64) -> Length {
    Length::from_base(length * 1e-3)
}

/// A length in micrometres.
pub fn to_um(length: Length) -> f64 {
    length.base() * 1e6
}

/// A length from micrometres.
pub fn um(length: f64) -> Length {
    Length::from_base(length * 1e-6)
}

/// A force from newtons.
pub fn newtons(force: f64) -> Force {
    Force::from_base(force)
}

/// A pressure from pascals.
pub fn pascals(pressure: f64) -> Pressure {
    Pressure::from_base(pressure)
}

/// A pressure-viscosity coefficient from 1/GPa.
pub fn per_gpa(alpha: f64) -> PressureViscosity {
    PressureViscosity::from_base(alpha * 1e-9)
}

/// An angle from degrees.
pub fn degrees(angle: f64) -> Angle {
    Angle::from_base(angle * PI / 180.0)
}

/// A pure number.
pub fn number(value: f64) -> Ratio {
    Ratio::from_base(value)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn dynamic_and_kinematic_undo_each_other() {
        let rho = MassDensity::from_base(870.0);
        let nu = mm2_s(46.0);
        assert!((to_mm2_s(kinematic(dynamic(nu, rho), rho)) - 46.0).abs() < 1e-12);
    }

    #[test]
    fn surface_speed_uses_the_radius() {
        // 80 mm at 1450 r/min: pi d n / 60 = 6.0737 m/s
        let v = surface_speed(rpm(1450.0), mm(80.0));
        assert!((v.base() - PI * 0.08 * 1450.0 / 60.0).abs() < 1e-12);
    }
}
