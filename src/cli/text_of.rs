//! Results as text for people.

pub mod intake;
pub mod need;
pub mod oil;
pub mod weigh;
pub mod why;
pub mod work;
