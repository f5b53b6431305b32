//! Everything tested from outside the crate, in one binary.

mod properties_film;
mod reference_film;
mod refusals_film;
