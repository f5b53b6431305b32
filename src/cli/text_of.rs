//! Results as text for people.

pub mod labels;
pub mod need;
pub mod oil;
pub mod weigh;
pub mod why;
pub mod work;
