//! Rows of concentrated contacts: pressure, film, and the viscosity a film needs.

mod ellipse;
mod heat;
mod hertz;
mod known;
mod line;
mod needed;
mod ratio;
mod regime;

use super::Relation;

/// The rows, in the order they are listed.
pub(super) static ROWS: &[Relation] = &[
    hertz::REDUCED_MODULUS,
    hertz::LINE,
    hertz::ELLIPSE,
    line::LINE,
    ellipse::ELLIPSE,
    regime::REGIME,
    heat::THERMAL,
    heat::STARVED,
    ratio::FILM_RATIO,
    needed::VISCOSITY,
];

/// The heading they stand under.
const GROUP: &str = "contact and film";
