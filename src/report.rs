//! What the client holds: page models, the drawings in them, and the templates that lay them out.
//!
//! A page model ([`model`]) carries words, flags, ids and the numbers of its drawings, and nothing
//! else; `build` fills it from results. [`page`] draws the figures ([`draw`]), sets the formulas
//! ([`formula`]), makes users' prose safe ([`markdown`]) and lays the page out with Tera. Every
//! figure is drawn from the model, so a figure and the table beside it cannot disagree.

pub mod build;
pub mod draw;
pub mod escape;
pub mod formula;
pub mod markdown;
pub mod model;
pub mod names;
pub mod page;
