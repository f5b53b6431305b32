//! Results as text for people.

pub mod need;
pub mod oil;
pub mod pool;
pub mod weigh;
pub mod why;
pub mod work;
