//! The command line: what may be typed, with every help text; no logic.

pub mod exit;
pub mod host;
