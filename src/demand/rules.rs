//! The rules by which limits are worked out, by the ids demands carry.

use super::{bearing_film, contact, gear_film, gear_mesh, journal, rolling_bearing, thrust};
use crate::relation::Law;
use crate::relation::bearing::film as race;
use crate::relation::bearing::reference_viscosity::REFERENCE_VISCOSITY;
use crate::relation::film::line;
use crate::relation::gear::film as tooth;
use crate::relation::gear::viscosity_rule;
use crate::relation::journal::limits::whirl;
use crate::relation::journal::{transition, viscosity, warming};
use crate::relation::sump::{CEILING_MARGIN, POUR_MARGIN};
use crate::relation::thrust::pad;

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
        journal::FILM_RULE,
        &viscosity::LAW,
        "the greatest of the films of ISO 7902-3, of Trumpler and over the roughness; a house rule may ask a film height",
    ),
    (
        journal::TRANSITION_RULE,
        &transition::VISCOSITY,
        "twice the transition speed; low confidence",
    ),
    (
        journal::TEMPERATURE_RULE,
        &warming::THICKEST,
        "bearing at most 90 to 100 degC at the hottest ambient; low confidence, for information where the housing cools it",
    ),
    (
        journal::WHIRL_RULE,
        &whirl::LAW,
        "eccentricity at least 0.5: low confidence above 10 m/s and below 1 MPa, else a condition",
    ),
    (
        thrust::FILM_RULE,
        &pad::VISCOSITY,
        "10 um at the outlet of small pads, 25 um from 0.5 m mean diameter; a house rule may ask a film height",
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
