//! Concentrated contacts: pressure between elastic bodies, the oil film that separates them, and
//! the viscosity a wanted film needs.
//!
//! Conventions, fixed once for the room: the reduced modulus is `E' = 2 / sum((1 - nu²) / E)`,
//! the speed is the mean of the two surface speeds relative to the contact, `Rx` is the reduced
//! radius in the rolling direction and scales the elliptical formulas, viscosity and
//! pressure-viscosity coefficient are those at the inlet temperature and atmospheric pressure,
//! and roughness is the root mean square height Rq.

pub mod body;
pub mod ellipse;
pub mod groups;
pub mod hertz;
pub mod inverse;
pub mod line;
pub mod regime;
pub mod roughness;
pub mod starvation;
pub mod thermal;
