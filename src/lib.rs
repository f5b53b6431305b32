//! filmwright works out the viscosity machines need and weighs candidate lubricants against it.
//!
//! ```text
//! bytes ─source─▶ located text ─input─▶ model::Site        ┐
//! rules/ (embedded, then the user's) ─────▶ model::Rulebook ┤
//!                                                           ▼
//!            demand::demands ──▶ per lubrication point: its limits, each traced
//!                                                           ▼  × every oil (oil::Curves)
//!            suitability (bars, asks, notes) ──▶ judge ──▶ verdict, margins, band
//!                                                           ▼
//!            decide (mend, season, gaps, pool …) · audit ──▶ report · tables
//! ```
//!
//! The pipeline runs in one direction; nothing reaches back. The rooms, in the order of the arrows:

pub mod assets;
pub mod audit;
pub mod cli;
pub mod compare;
pub mod decide;
pub mod demand;
pub mod input;
pub mod intake;
pub mod judge;
pub mod model;
pub mod numeric;
pub mod oil;
pub mod problem;
pub mod quantity;
pub mod relation;
pub mod report;
pub mod results;
pub mod source;
pub mod suitability;
pub mod table;
pub mod trace;
pub mod weighing;
pub mod work;
