//! Everything tested from outside the crate, in one binary.

mod checks;
mod properties_oil;
mod reference_oil;
mod refusals_oil;
