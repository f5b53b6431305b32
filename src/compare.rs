//! What moved between two states of a site, and why.
//!
//! Both states are read and weighed. Where they differ in a verdict, an oil proposed or a limit,
//! the causes are found by weighing again: the old state with one change of the new, for each
//! change alone; and where no change alone gives what is new, the new state with one change taken
//! back. So "because" is worked out, not guessed.

pub mod cause;
pub mod diff;
pub mod outcome;
pub mod state;

pub use cause::{Comparison, Moved, compare};
pub use diff::Change;
pub use outcome::What;
pub use state::{State, Unread};
