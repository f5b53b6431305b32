//! The shortest oil list: the fewest oils such that every lubrication point that can be decided
//! has one that holds, or is tight.
//!
//! ```text
//! weighed points ─case─▶ places with their offers ─solve─▶ stocks, bound, nodes
//!                                                            ├─step─▶ one shorter, one longer
//!                                                            ├─figures─▶ litres, money, margins
//!                                                            └─check─▶ weighed again
//! ```
//!
//! The problem is a set cover. It is solved exactly: parted into what does not hang together,
//! reduced by dominance ([`reduce`]), then searched depth first with a bound ([`search`]). The
//! length is proven before ties are looked at; ties go by fewest changes from today (of
//! as many changes those that bring fewer conditions), then cost, then name. Nothing is bought for two sides of a fence as one: an oil on both sides of one stands on
//! the list twice.

pub mod case;
pub mod check;
pub mod fence;
pub mod figures;
pub mod reduce;
pub mod search;
pub mod solve;
pub mod step;
pub mod ties;

pub use case::{Offer, Pick, Place, Terms};
pub use fence::Fence;
pub use solve::{Impossible, Outcome, Solved, Stock};
