//! Everything tested from outside the crate, in one binary.

mod rules;
