//! What an oil is at a temperature: new, at the thin and the thick end of its tolerance, and worn;
//! what it is made of, how it thins in fast contacts, and how far its data carry.

pub mod blend;
pub mod cold;
pub mod curve;
pub mod curves;
pub mod density;
pub mod findings;
pub mod grades;
pub mod grease_code;
pub mod life;
pub mod makeup;
pub mod pressure;
pub mod shape;
pub mod sheet;
pub mod slid;
pub mod spread;
pub mod start;
pub mod thinning;
pub mod told;
pub mod worn;

pub use curve::Curve;
pub use curves::{Curves, curves};
pub use worn::Worn;
