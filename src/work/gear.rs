//! Rows of gears and worms.

mod film;
mod loss;
mod oil;
mod pair;
mod pitch_point;
mod rule;
mod worm;

use super::Relation;

/// The rows, in the order they are listed.
pub(super) static ROWS: &[Relation] = &[
    pitch_point::PITCH_POINT,
    film::FILM,
    loss::LOSS,
    rule::GRADE_RULE,
    worm::SLIDING,
    worm::EFFICIENCY,
];

/// The heading they stand under.
const GROUP: &str = "gear";
