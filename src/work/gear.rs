//! Rows of gears and worms.

mod bevel;
mod film;
mod loss;
mod oil;
mod pair;
mod path;
mod pitch_point;
mod rule;
mod temperature;
mod worm;

use super::Relation;

/// The rows, in the order they are listed.
pub(super) static ROWS: &[Relation] = &[
    pitch_point::PITCH_POINT,
    path::PATH_POINT,
    bevel::VIRTUAL,
    film::FILM,
    temperature::BULK,
    temperature::FLASH,
    loss::LOSS,
    rule::GRADE_RULE,
    worm::SLIDING,
    worm::EFFICIENCY,
];

/// The heading they stand under.
const GROUP: &str = "gear";
