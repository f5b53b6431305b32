//! Limits on a viscosity that a test measures and no line gives: cranking and pumping of engine
//! oils, the cold end of axle oils, the viscosity of engine oils at high shear.

use crate::quantity::DynamicViscosity;

/// A limit on the viscosity by one test, at the temperature of its demand.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct TestedLimit {
    /// The test.
    pub test: GradeTest,
    /// The limit: greatest cold, least at high shear.
    pub eta: DynamicViscosity,
}

/// A test that grades are made by.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum GradeTest {
    /// Cranking simulator, ASTM D5293.
    Cranking,
    /// Mini-rotary viscometer, ASTM D4684.
    Pumping,
    /// Low shear, ASTM D2983, of axle oils.
    Axle,
    /// At 150 °C and 1e6 1/s.
    HighShear,
}

impl GradeTest {
    /// What the oil cannot do where the limit is not met.
    pub fn fault(self) -> &'static str {
        match self {
            Self::Cranking => "too thick to crank",
            Self::Pumping => "too thick to pump",
            Self::Axle => "too thick to flow to the bearings",
            Self::HighShear => "too thin under high shear",
        }
    }

    /// What to ask the supplier for.
    pub fn ask(self) -> &'static str {
        match self {
            Self::Cranking => "the cranking viscosity (CCS, ASTM D5293)",
            Self::Pumping => "the pumping viscosity (MRV, ASTM D4684)",
            Self::Axle => "the temperature of 150 000 mPa.s (ASTM D2983)",
            Self::HighShear => "the viscosity at 150 degC and high shear (HTHS)",
        }
    }
}
