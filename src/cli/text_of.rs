//! Results as text for people.

pub mod audit;
pub mod need;
pub mod oil;
pub mod weigh;
pub mod why;
pub mod work;
