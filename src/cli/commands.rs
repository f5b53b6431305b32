//! One function a command, thin: load, call the room that does the work, print.

pub mod check;
pub mod help;
pub mod labels;
pub mod need;
pub mod need_line;
pub mod new;
pub mod oil;
pub mod report;
pub mod rules;
pub mod weigh;
pub mod why;
pub mod work;

pub use check::check;
pub use help::help;
pub use labels::labels;
pub use need::need;
pub use new::new;
pub use oil::oil;
pub use report::report;
pub use rules::rules;
pub use weigh::weigh;
pub use why::why;
pub use work::work;
