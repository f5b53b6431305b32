//! Journal bearing: the viscosity at which its film reaches the greatest of its limits is the
//! floor; the one at which it gets too hot, or rides too near the middle, a ceiling.
//!
//! Where the oil carries the heat, the film is warmer than the oil fed by a rise that depends on
//! the viscosity in the film alone. Each limit is therefore judged at the feed temperature plus
//! the rise of that very limit: a settled bearing meets the limit just where the oil meets the
//! viscosity there.

mod ceiling;
mod findings;
mod floor;
pub(super) mod shape;
pub(super) mod warm;

use super::context::Context;
use super::inputs::wanted;
use super::{Demand, End, Limit};
use crate::model::part::{JournalBearing, Part};
use crate::model::rulebook::Confidence;
use crate::quantity::DynamicViscosity;
use crate::trace::{Known, Recorder};
pub use ceiling::HeatCeiling;

/// Id of the rule of the least film.
pub const FILM_RULE: &str = "journal-film";
/// Id of the rule of the transition speed.
pub const TRANSITION_RULE: &str = "journal-transition";
/// Id of the rule of the largest temperature.
pub const TEMPERATURE_RULE: &str = "journal-temperature";
/// Id of the rule of the least eccentricity.
pub const WHIRL_RULE: &str = "journal-whirl";

/// Adds the demands of a journal bearing.
pub fn add<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, bearing: &JournalBearing) {
    let Some(shape) = shape::shape(cx, part, bearing) else {
        return;
    };
    let oil = warm::oil(cx, part, bearing);
    let floor = floor::film(cx, part, bearing, &shape, oil);
    floor::transition(cx, part, &shape, oil, floor);
    ceiling::whirl(cx, part, &shape, oil);
    ceiling::temperature(cx, part, bearing, &shape, oil);
    findings::findings(cx, part, bearing, &shape, floor);
}

/// A limit on dynamic viscosity, the rest to be filled in.
fn dynamic(end: End, eta: Known<DynamicViscosity>, rule: &str, blank: Demand) -> Demand {
    Demand {
        end,
        limit: Limit::Dynamic(eta.value),
        limit_step: Some(eta.step),
        rule: rule.to_owned(),
        confidence: Confidence::Low,
        ..blank
    }
}
