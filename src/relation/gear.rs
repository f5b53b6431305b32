//! Gears: geometry and speeds of the mesh, its film, its heat, and the rules of thumb for the
//! viscosity it needs.
//!
//! Notation of ISO 6336. Torque and speed are those of the pinion; `z2` and the centre distance
//! of an internal gear pair are negative.

pub mod bevel;
pub mod film;
pub mod geometry;
pub mod grade_table;
pub mod load;
pub mod loss;
pub mod path;
pub mod pitch_point;
pub mod temperature;
pub mod viscosity_rule;
pub mod worm;
pub mod worm_grades;
