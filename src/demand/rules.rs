//! The rules by which limits are worked out, by the ids demands carry.

use super::{bearing_film, contact, gear_film, gear_mesh, rolling_bearing};
use crate::relation::Law;
use crate::relation::bearing::film as race;
use crate::relation::bearing::reference_viscosity::REFERENCE_VISCOSITY;
use crate::relation::film::line;
use crate::relation::gear::film as tooth;
use crate::relation::gear::viscosity_rule;
use crate::relation::sump::{CEILING_MARGIN, POUR_MARGIN};

/// Id, relation, and the default asked for.
pub static CALCULATED: &[(&str, &Law, &str)] = &[
    (
        rolling_bearing::KAPPA_RULE,
        &REFERENCE_VISCOSITY,
        "kappa >= 1; a lower floor only by house rule, for oils with a proven EP or antiwear additive",
    ),
    (
        gear_mesh::PITCH_LINE_RULE,
        &viscosity_rule::RUNNING,
        "floor 0.7 times the reference at running temperature, house value; the published figure at 40 degC is printed beside it",
    ),
    (
        gear_film::FILM_RULE,
        &tooth::MINIMUM,
        "worked out wherever geometry and load allow; a demand only where a film ratio is asked for",
    ),
    (
        bearing_film::FILM_RULE,
        &race::FILM,
        "a demand only where a film ratio is asked for",
    ),
    (
        contact::CONTACT_RULE,
        &line::MINIMUM_1968,
        "film ratio >= 1 unless another is asked for",
    ),
    (
        "oil-ceiling",
        &CEILING_MARGIN,
        "the oil's own limit; else the base stock's: tight above the continuous, fails above the peak one",
    ),
    (
        "pour-margin",
        &POUR_MARGIN,
        "by lubrication; a house value replaces it",
    ),
];
