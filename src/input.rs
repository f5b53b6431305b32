//! From text to checked types.

pub mod rules;
