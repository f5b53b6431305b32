//! Weighs one oil against the demands of one point: margins, verdict, ambient band.
//!
//! A pair is judged on plain quantities, a few exponentials, without allocation; [`explain`] runs
//! the same relations with a recorder and gives the same bits (tested). Several settings of the
//! point's unknowns are judged one by one and combined: what fails in all of them fails, what
//! fails in some is open, and else the worst one speaks.

pub mod allowance;
pub mod band;
pub mod because;
pub mod brief;
pub mod explain;
pub mod margin;
pub mod numbers;
pub mod order;
pub mod own;
pub mod prepared;
mod straight;
pub mod tested;
pub mod verdict;
pub mod weigh;

pub use band::Band;
pub use prepared::{PreparedOil, PreparedPoint};
pub use verdict::Verdict;
pub use weigh::{Judgement, Margin, weigh};
