//! Results as text for people.

pub mod need;
pub mod weigh;
pub mod why;
pub mod work;
