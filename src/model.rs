//! Checked types of the domain.

pub mod bearing_table;
