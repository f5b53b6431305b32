//! What each cause would make of an oil: its viscosities, flash point, acid number and additive
//! elements at one size. The grid of sizes comes from the rules ([`super::grid`]).

use super::Cause;
use crate::audit::profile::Profile;
use std::sync::Arc;

/// A shift of a figure, with how far it may lie from it.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub(super) struct Shift {
    pub(super) by: f64,
    pub(super) spread: f64,
}

/// An oil mixed in.
#[derive(Clone, Debug)]
pub(super) struct Mixed {
    /// Its profile.
    pub(super) profile: Arc<Profile>,
    /// Its place in the oil list; none for an oil that is not on the site.
    pub(super) oil: Option<usize>,
    /// What it is, where it is not on the site.
    pub(super) says: Arc<str>,
}

/// One setting of one cause, or of two at once.
#[derive(Clone, Debug)]
pub(super) struct Theta {
    pub(super) causes: [Option<Cause>; 2],
    pub(super) log_prior: f64,
    /// Change of ln nu at 40 and at 100 °C.
    pub(super) d: [f64; 2],
    /// How far the model may be off, as a share of the viscosity.
    pub(super) spread: f64,
    /// Flash point, K.
    pub(super) flash: Shift,
    /// Acid number, mg KOH/g.
    pub(super) acid: Shift,
    /// Oxidation, absorbance per cm.
    pub(super) oxidation: Shift,
    /// Fuel, %.
    pub(super) fuel: Shift,
    /// Share of the labelled oil left.
    pub(super) kept: f64,
    /// The oil mixed in; its share is what is not kept.
    pub(super) mixed: Option<Arc<Mixed>>,
    /// How far it has gone: a share lost, a share mixed in, a rise.
    pub(super) size: f64,
}

impl Theta {
    pub(super) fn none() -> Self {
        Self {
            causes: [None, None],
            log_prior: 0.0,
            d: [0.0, 0.0],
            spread: 0.003,
            flash: Shift::default(),
            acid: Shift {
                by: 0.03,
                spread: 0.08,
            },
            oxidation: Shift {
                by: 1.0,
                spread: 2.0,
            },
            fuel: Shift {
                by: 0.1,
                spread: 0.2,
            },
            kept: 1.0,
            mixed: None,
            size: 0.0,
        }
    }

    pub(super) fn of(cause: Cause, d: [f64; 2], size: f64) -> Self {
        Self {
            causes: [Some(cause), None],
            d,
            size,
            spread: 0.004 + 0.05 * d[0].abs().max(d[1].abs()),
            ..Self::none()
        }
    }

    /// Both at once.
    pub(super) fn with(&self, other: &Self) -> Self {
        let both = |a: Shift, b: Shift, none: Shift| Shift {
            by: a.by + b.by - none.by,
            spread: a.spread.max(b.spread),
        };
        let none = Self::none();
        Self {
            causes: [self.causes[0], other.causes[0]],
            log_prior: self.log_prior + other.log_prior + PAIR,
            d: [self.d[0] + other.d[0], self.d[1] + other.d[1]],
            spread: self.spread + other.spread,
            flash: both(self.flash, other.flash, none.flash),
            acid: both(self.acid, other.acid, none.acid),
            oxidation: both(self.oxidation, other.oxidation, none.oxidation),
            fuel: both(self.fuel, other.fuel, none.fuel),
            kept: self.kept * other.kept,
            mixed: self.mixed.clone().or_else(|| other.mixed.clone()),
            size: self.size,
        }
    }
}

/// Two causes at once are less common than either, but more common than chance.
const PAIR: f64 = 1.0;
