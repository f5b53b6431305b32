//! What an oil is at a temperature: new, at the thin and the thick end of its tolerance, and worn.

pub mod curve;
pub mod curves;
pub mod density;
pub mod findings;
pub mod pressure;

pub use curve::Curve;
pub use curves::{Curves, Worn, curves};
