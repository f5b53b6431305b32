//! What the relations of the oil refuse, by name.

use crate::relation::oil::agma::NotAgma;
use crate::relation::oil::blend::BlendError;
use crate::relation::oil::blend_wright::WrightError;
use crate::relation::oil::d6080::NotBetween;
use crate::relation::oil::efflux::EffluxOutOfRange;
use crate::relation::oil::polymer::PolymerError;
use crate::relation::oil::pressure_viscosity::NoAlpha;
use crate::relation::oil::saybolt::SayboltError;
use crate::relation::oil::shear::ShearError;
use crate::relation::oil::shear_in_use::NoTrend;
use crate::relation::oil::temporary_shear::RateError;
use crate::relation::oil::viscosity_index::IndexError;
use crate::relation::oil::viscosity_temperature::Misfit;
use crate::work::Refusal;

macro_rules! refusals {
    ($($error:ty: $refused:ident => $name:expr;)+) => {$(
        impl From<$error> for Refusal {
            fn from($refused: $error) -> Self {
                let name = $name;
                Self::new(name, $refused.to_string())
            }
        }
    )+};
}

refusals! {
    Misfit: e => match e {
        Misfit::TooFew => "points-too-few",
        Misfit::SameTemperature { .. } => "points-same-temperature",
        Misfit::OutOfRange { .. } => "viscosity-out-of-range",
        Misfit::UpsideDown { .. } => "points-upside-down",
        Misfit::Slope(_) => "slope-not-positive",
    };
    IndexError: e => match e {
        IndexError::NotDefined { .. } => "index-not-defined",
        IndexError::NoSolution { .. } => "no-solution",
        IndexError::IndexOutOfRange(_) => "index-out-of-range",
    };
    BlendError: e => match e {
        BlendError::Lengths { .. } => "fractions-count",
        BlendError::Fraction(_) => "fraction-out-of-range",
        BlendError::Sum(_) => "fractions-sum",
        BlendError::TooThin { .. } => "viscosity-out-of-range",
        BlendError::Infeasible { .. } => "target-infeasible",
    };
    WrightError: e => match &e {
        WrightError::Blend(blend) => Self::from(*blend).name,
        WrightError::Line(misfit) => Self::from(*misfit).name,
        WrightError::Forms => "forms-mixed",
    };
    NoTrend: e => match e {
        NoTrend::Order => "samples-order",
        NoTrend::NotGrowing => "loss-not-growing",
        NoTrend::Passed => "limit-passed",
    };
    SayboltError: e => match e {
        SayboltError::TooThin { .. } => "viscosity-out-of-range",
        SayboltError::TooShort { .. } => "reading-out-of-range",
        SayboltError::FurolTemperature { .. } => "temperature-not-defined",
    };
    EffluxOutOfRange: e => "reading-out-of-range";
    NotAgma: e => match e {
        NotAgma::Number(_) => "agma-unknown",
        NotAgma::Suffix(_) => "agma-suffix-unknown",
    };
    NotBetween: e => "points-do-not-span";
    NoAlpha: e => match e {
        NoAlpha::NotForFamily { .. } => "model-not-for-base",
        NoAlpha::TooThin { .. } => "viscosity-out-of-range",
    };
    ShearError: e => match e {
        ShearError::NoPolymer { .. } => "no-polymer",
        ShearError::Thicker { .. } => "sheared-thicker",
        ShearError::BelowBase { .. } => "sheared-below-base",
        ShearError::Index(_) => "share-out-of-range",
    };
    PolymerError: e => match e {
        PolymerError::Negative(_) => "share-out-of-range",
        PolymerError::Window => "window-upside-down",
        PolymerError::Shear(shear) => Self::from(shear).name,
        PolymerError::Index(index) => Self::from(index).name,
        PolymerError::NoPolymer { .. } => "no-polymer",
        PolymerError::NoBase { .. } => "no-solution",
        PolymerError::Ratio(_) => "ratio-not-positive",
    };
    RateError: e => match e {
        RateError::Parameter { .. } => "out-of-range",
        RateError::BelowBase => "below-base-oil",
        RateError::NotReached { .. } => "no-solution",
    };
}
