//! Results as text for people.

pub mod audit;
pub mod compare;
pub mod decided;
pub mod gaps;
pub mod intake;
pub mod labels;
pub mod mend;
pub mod need;
pub mod oil;
pub mod pool;
mod pool_lists;
pub mod running;
pub mod scatter;
pub mod weigh;
pub mod whatif;
pub mod why;
pub mod work;
