//! Rolling bearings: the viscosity they need, what cleanliness and film do to their life, their
//! friction, and their grease.
//!
//! Speeds are those of the inner ring against the outer ring, diameters in the bearing's own
//! standard sense: bore `d`, outside `D`, pitch circle `Dpw` close to their mean.

pub mod class;
pub mod contamination;
pub mod designation;
pub mod film;
pub mod friction;
pub mod grease;
pub mod kinematics;
pub mod life;
pub mod life_factor;
pub mod minimum_viscosity;
pub mod reference_viscosity;
pub mod required;
pub mod speed_limit;
pub mod thermal_reference;
