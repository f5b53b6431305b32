//! Quantities: every number in the program carries its unit.
//!
//! Policy. A public function takes and returns `uom` quantities; inside an empirical formula the
//! numbers are unwrapped once at the top, into names that carry the unit (`n_rpm`, `dm_mm`), and
//! wrapped once at the bottom. User text is read by [`parse`] with the program's own unit tables
//! (`uom`'s own text reader takes `NaN cSt` and refuses `75 degC`), and written by [`show`], the
//! one place that rounds. Base units are those of the SI; [`Amount`] is the same number when the
//! kind is known only at run time (trace, `work`, JSON).

pub mod convert;
pub mod kind;
pub mod parse;
pub mod show;

pub use kind::{Amount, Kind, Measure, Unit};

pub use uom::si::f64::{
    Angle, AngularVelocity, Area, CompressibilityCoefficient, DynamicViscosity, Force,
    HeatFluxDensity, HeatTransfer, KinematicViscosity, Length, Mass, MassDensity, Power, Pressure,
    Ratio, SpecificHeatCapacity, TemperatureInterval, ThermalConductance, ThermalConductivity,
    ThermodynamicTemperature, Time, Torque, Velocity, Volume, VolumeRate,
};

/// Load on a line contact, force per unit length, N/m.
pub type LoadPerLength = uom::si::f64::SurfaceTension;
/// Pressure-viscosity coefficient, 1/Pa.
pub type PressureViscosity = CompressibilityCoefficient;

/// Temperature coefficient of viscosity, `-d ln eta / dT`, 1/K.
#[derive(Clone, Copy, Debug, PartialEq, PartialOrd)]
pub struct TemperatureCoefficient(pub f64);

/// A margin counted in ISO 3448 grades: `6 lg(ratio)` of two viscosities at 40 °C.
#[derive(Clone, Copy, Debug, PartialEq, PartialOrd)]
pub struct VgStep(pub f64);

/// Acid number, mg KOH per gram.
#[derive(Clone, Copy, Debug, PartialEq, PartialOrd)]
pub struct AcidNumber(pub f64);

/// An amount a year, litres of oil a year for example.
#[derive(Clone, Copy, Debug, PartialEq, PartialOrd)]
pub struct VolumePerYear(pub f64);

/// Running time, hours in a year.
#[derive(Clone, Copy, Debug, PartialEq, PartialOrd)]
pub struct HoursPerYear(pub f64);

/// A conventional viscosity: the reading of an efflux viscometer, seconds or degrees, which
/// means nothing without the name of the instrument and the temperature.
#[derive(Clone, Copy, Debug, PartialEq, PartialOrd)]
pub struct Efflux(pub f64);

/// Rate at which a fluid is sheared, 1/s.
#[derive(Clone, Copy, Debug, PartialEq, PartialOrd)]
pub struct ShearRate(pub f64);
