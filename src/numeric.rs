//! The numeric layer: plain `f64`, one method a file.
//!
//! Rules. Elementary functions come from `libm`, so that every machine prints the same digits.
//! Roots are found only inside a bracket. Every loop has a cap, and running out is an error with
//! numbers. Tables are monotone and never extrapolated unless the caller says how far.

pub mod banded;
pub mod complementarity;
pub mod distribution;
pub mod elliptic;
pub mod interpolate;
pub mod math;
pub mod maximum;
pub mod root;
pub mod share;
