//! Results as text for people.

pub mod need;
pub mod oil;
pub mod running;
pub mod weigh;
pub mod why;
pub mod work;
