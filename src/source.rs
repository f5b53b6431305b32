//! Every text ever read, numbered, so that any later finding can point at its place.

pub mod place;

pub use place::{FileId, Origin, Place, Span};
