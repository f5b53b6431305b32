//! Thrust pads: flat pads on a runner, tilted by a fixed taper or by their pivot.

pub mod limits;
pub mod pad;
pub mod series;
pub mod shape;
pub mod slider;
pub mod warming;
