//! Everything tested from outside the crate, in one binary.

mod checks;
mod properties_film;
mod properties_oil;
mod reference_film;
mod reference_oil;
mod refusals_film;
mod refusals_oil;
