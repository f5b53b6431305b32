//! What somebody wrote: a value, a range it lies in, or only that it is not known.

use crate::quantity::{DynamicViscosity, KinematicViscosity};
use crate::source::Origin;
use crate::source::place::Given;

/// A quantity as far as it is stated.
#[derive(Clone, Debug, PartialEq)]
pub enum Stated<T> {
    /// A value; a tolerance beside it ranks gaps and draws whiskers, it does not judge.
    Known(Given<T>, Option<Tolerance<T>>),
    /// Unknown, but within these ends; whom to ask.
    Range(Given<Between<T>>, Option<String>),
    /// Unknown without a range; whom to ask, and where that is written.
    Unknown(Option<String>, Origin),
}

impl<T> Stated<T> {
    /// The value where it is known.
    pub fn known(&self) -> Option<&Given<T>> {
        match self {
            Self::Known(given, _) => Some(given),
            _ => None,
        }
    }

    /// Where it is written.
    pub fn origin(&self) -> &Origin {
        match self {
            Self::Known(given, _) => &given.origin,
            Self::Range(given, _) => &given.origin,
            Self::Unknown(_, origin) => origin,
        }
    }

    /// Whom to ask, where the user said so.
    pub fn ask(&self) -> Option<&str> {
        match self {
            Self::Known(..) => None,
            Self::Range(_, ask) | Self::Unknown(ask, _) => ask.as_deref(),
        }
    }
}

/// Two ends of a range, the lower first.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Between<T> {
    /// Lower end.
    pub lo: T,
    /// Upper end.
    pub hi: T,
}

/// How far a stated value may be off, to both sides.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Tolerance<T> {
    /// In its own unit; of a temperature, a difference in kelvins as base units.
    Of(T),
    /// In kelvins, for a value that is itself a temperature.
    Kelvins(f64),
    /// As a share of the value.
    Share(f64),
}

/// A limit on viscosity, in whichever of the two it is written.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum ViscosityLimit {
    /// mm²/s.
    Kinematic(KinematicViscosity),
    /// mPa·s; needs the oil's density to be compared.
    Dynamic(DynamicViscosity),
}

/// A temperature that may be only a bound, as `below -40 degC`.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Bound<T> {
    /// The value itself.
    Exactly(T),
    /// It lies below this.
    Below(T),
    /// It lies above this.
    Above(T),
}

impl<T: Copy> Bound<T> {
    /// In words, the figure as `shown`: `below -40 degC`.
    pub fn says(&self, shown: impl Fn(T) -> String) -> String {
        match self {
            Self::Exactly(t) => shown(*t),
            Self::Below(t) => format!("below {}", shown(*t)),
            Self::Above(t) => format!("above {}", shown(*t)),
        }
    }

    /// The figure written, whatever it bounds.
    pub fn figure(&self) -> T {
        match self {
            Self::Exactly(t) | Self::Below(t) | Self::Above(t) => *t,
        }
    }
}
