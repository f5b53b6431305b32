//! One function a command, thin: load, call the room that does the work, print.

pub mod audit;
pub mod check;
pub mod gaps;
pub mod help;
pub mod labels;
pub mod mend;
pub mod need;
pub mod need_line;
pub mod new;
pub mod oil;
pub mod pool;
pub mod report;
pub mod rules;
pub mod weigh;
pub mod whatif;
pub mod why;
pub mod work;

pub use audit::audit;
pub use check::check;
pub use gaps::gaps;
pub use help::help;
pub use labels::labels;
pub use mend::mend;
pub use need::need;
pub use new::new;
pub use oil::oil;
pub use pool::pool;
pub use report::report;
pub use rules::rules;
pub use weigh::weigh;
pub use whatif::whatif;
pub use why::why;
pub use work::work;
