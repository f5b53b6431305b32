//! One table a kind: what it is called, how it may be written, what is absurd.

use super::{
    AcidNumber, Angle, AngularVelocity, Area, DynamicViscosity, Efflux, Force, HeatFluxDensity,
    HeatTransfer, HoursPerYear, KinematicViscosity, Length, LoadPerLength, Mass, MassDensity,
    Power, Pressure, PressureViscosity, Ratio, ShearRate, SpecificHeatCapacity,
    TemperatureCoefficient, TemperatureInterval, ThermalConductance, ThermalConductivity,
    ThermodynamicTemperature, Time, Torque, Velocity, VgStep, Volume, VolumePerYear, VolumeRate,
};
use std::f64::consts::PI;
use std::marker::PhantomData;

/// What a number measures.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Kind {
    /// A temperature on a scale with a zero.
    Temperature,
    /// A difference of two temperatures.
    Rise,
    /// Kinematic viscosity.
    KinematicViscosity,
    /// Dynamic viscosity.
    DynamicViscosity,
    /// Speed of rotation.
    RotationalSpeed,
    /// Speed along a line.
    Velocity,
    /// Length, diameter, roughness, film thickness.
    Length,
    /// Area.
    Area,
    /// Force.
    Force,
    /// Load on a line contact.
    LoadPerLength,
    /// Torque.
    Torque,
    /// Power.
    Power,
    /// Pressure, and moduli.
    Pressure,
    /// Pressure-viscosity coefficient.
    PressureViscosity,
    /// Volume.
    Volume,
    /// Volume a year.
    VolumePerYear,
    /// Volume flow.
    Flow,
    /// Mass.
    Mass,
    /// Density.
    Density,
    /// Duration.
    Time,
    /// Hours in a year.
    HoursPerYear,
    /// A pure number, or a share.
    Ratio,
    /// Acid number.
    AcidNumber,
    /// Heat transfer coefficient.
    HeatTransfer,
    /// Heat given off by a whole body for every kelvin it is warmer than the air.
    HeatConductance,
    /// Heat through an area.
    WattDensity,
    /// Margin in ISO 3448 grades.
    VgStep,
    /// Angle.
    Angle,
    /// Thermal conductivity.
    Conductivity,
    /// Specific heat capacity.
    SpecificHeat,
    /// Temperature coefficient of viscosity.
    TemperatureCoefficient,
    /// Saybolt, Furol, Engler or Redwood reading.
    Efflux,
    /// Rate of shear.
    ShearRate,
}

/// One way of writing a kind: `base = (value + offset) * factor`.
#[derive(Clone, Copy, Debug)]
pub struct Unit {
    /// The spelling the program writes.
    pub name: &'static str,
    /// Every other spelling it reads.
    pub also: &'static [&'static str],
    /// Size in base units.
    pub factor: f64,
    /// Added before scaling; zero except for temperatures.
    pub offset: f64,
}

impl Unit {
    const fn of(name: &'static str, factor: f64, also: &'static [&'static str]) -> Self {
        Self {
            name,
            also,
            factor,
            offset: 0.0,
        }
    }

    /// From a number in this unit to base units.
    pub fn to_base(&self, value: f64) -> f64 {
        (value + self.offset) * self.factor
    }

    /// From base units to a number in this unit.
    pub fn from_base(&self, base: f64) -> f64 {
        base / self.factor - self.offset
    }
}

/// Everything the program knows about a kind.
#[derive(Clone, Copy, Debug)]
pub struct Spec {
    /// With its article, for messages: "a temperature rise".
    pub noun: &'static str,
    /// A right example.
    pub example: &'static str,
    /// How it may be written; the first is the one shown.
    pub units: &'static [Unit],
    /// The unit shown under `--units us`, an index into `units`.
    pub us: usize,
    /// Values outside are refused, base units.
    pub possible: (f64, f64),
    /// Whether a number without a unit is a value of this kind.
    pub bare: bool,
}

const LBF: f64 = 4.448_221_615_260_5;

const TEMPERATURE: &[Unit] = &[
    Unit {
        name: "degC",
        also: &["°C", "C", "deg C", "℃"],
        factor: 1.0,
        offset: 273.15,
    },
    Unit {
        name: "degF",
        also: &["°F", "F", "deg F", "℉"],
        factor: 5.0 / 9.0,
        offset: 459.67,
    },
    Unit::of("K", 1.0, &["kelvin"]),
];
const RISE: &[Unit] = &[
    Unit::of("K", 1.0, &["degC difference", "°C difference", "kelvin"]),
    Unit::of("degF difference", 5.0 / 9.0, &["°F difference"]),
];
const KINEMATIC: &[Unit] = &[
    Unit::of("mm2/s", 1e-6, &["mm²/s", "mm^2/s", "cSt"]),
    Unit::of("m2/s", 1.0, &["m²/s", "m^2/s"]),
    Unit::of("St", 1e-4, &[]),
];
const DYNAMIC: &[Unit] = &[
    Unit::of("mPa.s", 1e-3, &["mPa·s", "mPa*s", "mPa s", "cP"]),
    Unit::of("Pa.s", 1.0, &["Pa·s", "Pa*s", "Pa s"]),
];
const ROTATION: &[Unit] = &[
    Unit::of(
        "r/min",
        2.0 * PI / 60.0,
        &["rpm", "1/min", "min-1", "rev/min"],
    ),
    Unit::of("1/s", 2.0 * PI, &["r/s", "rev/s"]),
    Unit::of("Hz", 2.0 * PI, &[]),
    Unit::of("rad/s", 1.0, &[]),
];
const VELOCITY: &[Unit] = &[
    Unit::of("m/s", 1.0, &[]),
    Unit::of("m/min", 1.0 / 60.0, &[]),
    Unit::of("ft/min", 0.3048 / 60.0, &["fpm"]),
    Unit::of("mm/s", 1e-3, &[]),
];
const LENGTH: &[Unit] = &[
    Unit::of("mm", 1e-3, &[]),
    Unit::of("um", 1e-6, &["µm", "μm"]),
    Unit::of("m", 1.0, &[]),
    Unit::of("in", 0.0254, &["inch"]),
    Unit::of("ft", 0.3048, &[]),
];
const AREA: &[Unit] = &[
    Unit::of("m2", 1.0, &["m²", "m^2"]),
    Unit::of("cm2", 1e-4, &["cm²", "cm^2"]),
];
const FORCE: &[Unit] = &[
    Unit::of("N", 1.0, &[]),
    Unit::of("kN", 1e3, &[]),
    Unit::of("MN", 1e6, &[]),
    Unit::of("lbf", LBF, &[]),
];
const LINE_LOAD: &[Unit] = &[
    Unit::of("N/mm", 1e3, &[]),
    Unit::of("N/m", 1.0, &[]),
    Unit::of("kN/m", 1e3, &[]),
];
const TORQUE: &[Unit] = &[
    Unit::of("N.m", 1.0, &["N·m", "N m", "Nm"]),
    Unit::of("kN.m", 1e3, &["kN·m", "kN m", "kNm"]),
    Unit::of("lbf.ft", LBF * 0.3048, &["lbf·ft", "lbf ft", "ft.lbf"]),
];
const POWER: &[Unit] = &[
    Unit::of("kW", 1e3, &[]),
    Unit::of("W", 1.0, &[]),
    Unit::of("MW", 1e6, &[]),
    Unit::of("hp", 745.699_871_582_270_2, &[]),
];
const PRESSURE: &[Unit] = &[
    Unit::of("bar", 1e5, &[]),
    Unit::of("MPa", 1e6, &[]),
    Unit::of("GPa", 1e9, &[]),
    Unit::of("kPa", 1e3, &[]),
    Unit::of("Pa", 1.0, &[]),
    Unit::of("psi", 6_894.757_293_168_361, &[]),
    Unit::of("N/mm2", 1e6, &["N/mm²"]),
];
const ALPHA: &[Unit] = &[
    Unit::of("1/GPa", 1e-9, &["GPa-1"]),
    Unit::of("1/Pa", 1.0, &["Pa-1"]),
];
const VOLUME: &[Unit] = &[
    Unit::of("L", 1e-3, &["l", "litre", "litres", "dm3"]),
    Unit::of("m3", 1.0, &["m³", "m^3"]),
    Unit::of("gal(US)", 3.785_411_784e-3, &["US gal"]),
    Unit::of("gal(UK)", 4.546_09e-3, &["UK gal", "imp gal"]),
    Unit::of("mL", 1e-6, &["ml"]),
];
const VOLUME_YEAR: &[Unit] = &[
    Unit::of("L a year", 1e-3, &["L/a", "l a year", "L/year"]),
    Unit::of("gal(US) a year", 3.785_411_784e-3, &[]),
    Unit::of("gal(UK) a year", 4.546_09e-3, &[]),
];
const FLOW: &[Unit] = &[
    Unit::of("L/min", 1e-3 / 60.0, &["l/min"]),
    Unit::of("m3/s", 1.0, &["m³/s"]),
    Unit::of("L/s", 1e-3, &["l/s"]),
    Unit::of("m3/h", 1.0 / 3600.0, &["m³/h"]),
    Unit::of("gal(US)/min", 3.785_411_784e-3 / 60.0, &[]),
];
const MASS: &[Unit] = &[
    Unit::of("kg", 1.0, &[]),
    Unit::of("g", 1e-3, &[]),
    Unit::of("lb", 0.453_592_37, &[]),
];
const DENSITY: &[Unit] = &[
    Unit::of("kg/m3", 1.0, &["kg/m³", "kg/m^3"]),
    Unit::of("g/cm3", 1e3, &["g/cm³", "kg/L", "kg/l", "g/ml", "g/mL"]),
];
const TIME: &[Unit] = &[
    Unit::of("h", 3600.0, &["hours", "hour"]),
    Unit::of("min", 60.0, &["minutes"]),
    Unit::of("s", 1.0, &["seconds"]),
    Unit::of("d", 86_400.0, &["days", "day"]),
    Unit::of("months", 2_629_746.0, &["month"]),
    Unit::of("years", 31_556_952.0, &["year", "a"]),
];
const HOURS_YEAR: &[Unit] = &[Unit::of(
    "h a year",
    1.0,
    &["h/a", "h/year", "hours a year"],
)];
const RATIO: &[Unit] = &[
    Unit::of("", 1.0, &[]),
    Unit::of("%", 0.01, &["per cent", "percent"]),
    Unit::of("ppm", 1e-6, &["mg/kg"]),
];
const ACID: &[Unit] = &[Unit::of("mg KOH/g", 1.0, &["mgKOH/g"])];
const HEAT_TRANSFER: &[Unit] = &[Unit::of(
    "W/(m2.K)",
    1.0,
    &["W/(m²·K)", "W/m2K", "W/(m2 K)"],
)];
const HEAT_CONDUCTANCE: &[Unit] = &[Unit::of("W/K", 1.0, &[])];
const WATT_DENSITY: &[Unit] = &[
    Unit::of("W/cm2", 1e4, &["W/cm²"]),
    Unit::of("W/in2", 1.0 / (0.0254 * 0.0254), &["W/in²"]),
];
const STEP: &[Unit] = &[Unit::of("step", 1.0, &["steps", "VG step", "VG steps"])];
const ANGLE: &[Unit] = &[
    Unit::of("deg", PI / 180.0, &["°"]),
    Unit::of("rad", 1.0, &[]),
];
const CONDUCTIVITY: &[Unit] = &[Unit::of("W/(m.K)", 1.0, &["W/(m·K)", "W/mK"])];
const SPECIFIC_HEAT: &[Unit] = &[
    Unit::of("J/(kg.K)", 1.0, &["J/(kg·K)"]),
    Unit::of("kJ/(kg.K)", 1e3, &["kJ/(kg·K)"]),
];
const PER_KELVIN: &[Unit] = &[Unit::of("1/K", 1.0, &["K-1"])];
const EFFLUX: &[Unit] = &[
    Unit::of("SUS", 1.0, &["SSU", "SUV"]),
    Unit::of("SFS", 1.0, &["SSF"]),
    Unit::of("degE", 1.0, &["°E", "deg E"]),
    Unit::of("s Redwood", 1.0, &["s Redwood 1", "Redwood s"]),
    Unit::of("s Redwood 2", 1.0, &["s Admiralty"]),
];

const PER_SECOND: &[Unit] = &[Unit::of("1/s", 1.0, &["s-1"])];

const ANY: (f64, f64) = (f64::MIN, f64::MAX);
const POSITIVE: (f64, f64) = (f64::MIN_POSITIVE, f64::MAX);
const NOT_NEGATIVE: (f64, f64) = (0.0, f64::MAX);

const fn spec(
    noun: &'static str,
    example: &'static str,
    units: &'static [Unit],
    us: usize,
    possible: (f64, f64),
) -> Spec {
    Spec {
        noun,
        example,
        units,
        us,
        possible,
        bare: false,
    }
}

impl Kind {
    /// Every kind.
    pub const ALL: &'static [Self] = &[
        Self::Temperature,
        Self::Rise,
        Self::KinematicViscosity,
        Self::DynamicViscosity,
        Self::RotationalSpeed,
        Self::Velocity,
        Self::Length,
        Self::Area,
        Self::Force,
        Self::LoadPerLength,
        Self::Torque,
        Self::Power,
        Self::Pressure,
        Self::PressureViscosity,
        Self::Volume,
        Self::VolumePerYear,
        Self::Flow,
        Self::Mass,
        Self::Density,
        Self::Time,
        Self::HoursPerYear,
        Self::Ratio,
        Self::AcidNumber,
        Self::HeatTransfer,
        Self::HeatConductance,
        Self::WattDensity,
        Self::VgStep,
        Self::Angle,
        Self::Conductivity,
        Self::SpecificHeat,
        Self::TemperatureCoefficient,
        Self::Efflux,
        Self::ShearRate,
    ];

    /// The table of this kind.
    #[expect(clippy::too_many_lines, reason = "one row a kind")]
    pub const fn spec(self) -> Spec {
        match self {
            Self::Temperature => spec(
                "a temperature",
                "75 degC",
                TEMPERATURE,
                1,
                (f64::MIN_POSITIVE, 3000.0),
            ),
            Self::Rise => spec("a temperature rise", "42 K", RISE, 1, (-1000.0, 1000.0)),
            Self::KinematicViscosity => {
                spec("a kinematic viscosity", "68 mm2/s", KINEMATIC, 0, POSITIVE)
            }
            Self::DynamicViscosity => spec("a dynamic viscosity", "60 mPa.s", DYNAMIC, 0, POSITIVE),
            Self::RotationalSpeed => spec("a speed", "1480 r/min", ROTATION, 0, NOT_NEGATIVE),
            Self::Velocity => spec("a velocity", "4.5 m/s", VELOCITY, 2, ANY),
            Self::Length => spec("a length", "120 mm", LENGTH, 3, ANY),
            Self::Area => spec("an area", "1.8 m2", AREA, 0, POSITIVE),
            Self::Force => spec("a force", "12 kN", FORCE, 3, ANY),
            Self::LoadPerLength => spec("a load per length", "200 N/mm", LINE_LOAD, 0, POSITIVE),
            Self::Torque => spec("a torque", "650 N.m", TORQUE, 2, ANY),
            Self::Power => spec("a power", "55 kW", POWER, 3, NOT_NEGATIVE),
            Self::Pressure => spec("a pressure", "250 bar", PRESSURE, 5, NOT_NEGATIVE),
            Self::PressureViscosity => spec(
                "a pressure-viscosity coefficient",
                "22 1/GPa",
                ALPHA,
                0,
                POSITIVE,
            ),
            Self::Volume => spec("a volume", "46 L", VOLUME, 2, NOT_NEGATIVE),
            Self::VolumePerYear => spec(
                "a volume a year",
                "80 L a year",
                VOLUME_YEAR,
                1,
                NOT_NEGATIVE,
            ),
            Self::Flow => spec("a flow", "4.2 L/min", FLOW, 4, NOT_NEGATIVE),
            Self::Mass => spec("a mass", "45 g", MASS, 2, NOT_NEGATIVE),
            Self::Density => spec("a density", "893 kg/m3", DENSITY, 0, (50.0, 5000.0)),
            Self::Time => spec("a time", "20 h", TIME, 0, NOT_NEGATIVE),
            Self::HoursPerYear => spec(
                "hours a year",
                "8000 h a year",
                HOURS_YEAR,
                0,
                (0.0, 8784.0),
            ),
            Self::Ratio => Spec {
                noun: "a number",
                example: "0.7",
                units: RATIO,
                us: 0,
                possible: ANY,
                bare: true,
            },
            Self::AcidNumber => spec("an acid number", "0.6 mg KOH/g", ACID, 0, NOT_NEGATIVE),
            Self::HeatTransfer => spec(
                "a heat transfer coefficient",
                "16 W/(m2.K)",
                HEAT_TRANSFER,
                0,
                POSITIVE,
            ),
            Self::HeatConductance => spec(
                "a heat conductance",
                "24 W/K",
                HEAT_CONDUCTANCE,
                0,
                POSITIVE,
            ),
            Self::WattDensity => spec("a watt density", "1.6 W/cm2", WATT_DENSITY, 1, NOT_NEGATIVE),
            Self::VgStep => spec("a number of VG steps", "0.5 step", STEP, 0, (-100.0, 100.0)),
            Self::Angle => spec("an angle", "20 deg", ANGLE, 0, ANY),
            Self::Conductivity => spec(
                "a thermal conductivity",
                "0.14 W/(m.K)",
                CONDUCTIVITY,
                0,
                POSITIVE,
            ),
            Self::SpecificHeat => spec(
                "a specific heat",
                "2000 J/(kg.K)",
                SPECIFIC_HEAT,
                0,
                POSITIVE,
            ),
            Self::TemperatureCoefficient => {
                spec("a temperature coefficient", "0.04 1/K", PER_KELVIN, 0, ANY)
            }
            Self::Efflux => spec("an efflux reading", "215 SUS", EFFLUX, 0, POSITIVE),
            Self::ShearRate => spec("a shear rate", "1e6 1/s", PER_SECOND, 0, NOT_NEGATIVE),
        }
    }

    /// The unit of this kind with that spelling, exactly as written.
    pub fn unit(self, spelling: &str) -> Option<&'static Unit> {
        self.spec()
            .units
            .iter()
            .find(|u| u.name == spelling || u.also.contains(&spelling))
    }
}

/// A quantity whose kind is known to the compiler.
pub trait Measure: Copy + PartialOrd {
    /// What it measures.
    const KIND: Kind;
    /// From base units of the SI.
    fn from_base(base: f64) -> Self;
    /// In base units of the SI.
    fn base(self) -> f64;
    /// The same number with its kind as a value.
    fn amount(self) -> Amount {
        Amount {
            kind: Self::KIND,
            base: self.base(),
        }
    }
}

macro_rules! measures {
    ($($quantity:ident => $kind:ident),+ $(,)?) => {$(
        impl Measure for $quantity {
            const KIND: Kind = Kind::$kind;
            fn from_base(base: f64) -> Self {
                Self { dimension: PhantomData, units: PhantomData, value: base }
            }
            fn base(self) -> f64 {
                self.value
            }
        }
    )+};
}

macro_rules! plain_measures {
    ($($quantity:ident => $kind:ident),+ $(,)?) => {$(
        impl Measure for $quantity {
            const KIND: Kind = Kind::$kind;
            fn from_base(base: f64) -> Self {
                Self(base)
            }
            fn base(self) -> f64 {
                self.0
            }
        }
    )+};
}

measures! {
    ThermodynamicTemperature => Temperature,
    TemperatureInterval => Rise,
    KinematicViscosity => KinematicViscosity,
    DynamicViscosity => DynamicViscosity,
    AngularVelocity => RotationalSpeed,
    Velocity => Velocity,
    Length => Length,
    Area => Area,
    Force => Force,
    LoadPerLength => LoadPerLength,
    Torque => Torque,
    Power => Power,
    Pressure => Pressure,
    PressureViscosity => PressureViscosity,
    Volume => Volume,
    VolumeRate => Flow,
    Mass => Mass,
    MassDensity => Density,
    Time => Time,
    Ratio => Ratio,
    HeatTransfer => HeatTransfer,
    ThermalConductance => HeatConductance,
    HeatFluxDensity => WattDensity,
    Angle => Angle,
    ThermalConductivity => Conductivity,
    SpecificHeatCapacity => SpecificHeat,
}

plain_measures! {
    VgStep => VgStep,
    AcidNumber => AcidNumber,
    VolumePerYear => VolumePerYear,
    HoursPerYear => HoursPerYear,
    TemperatureCoefficient => TemperatureCoefficient,
    Efflux => Efflux,
    ShearRate => ShearRate,
}

/// A quantity whose kind is known only at run time.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Amount {
    /// What it measures.
    pub kind: Kind,
    /// The number, base units.
    pub base: f64,
}

impl Amount {
    /// In a unit of its kind.
    pub fn in_unit(self, unit: &Unit) -> f64 {
        unit.from_base(self.base)
    }

    /// As the quantity it is; `None` where the kinds differ.
    pub fn as_measure<Q: Measure>(self) -> Option<Q> {
        (self.kind == Q::KIND).then(|| Q::from_base(self.base))
    }
}
