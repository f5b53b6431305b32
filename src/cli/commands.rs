//! One function a command, thin: load, call the room that does the work, print.

mod check;
mod help;
mod need;
mod need_line;
mod new;
mod oil;
mod report;
mod rules;
mod weigh;
mod why;
mod work;

pub use check::check;
pub use help::help;
pub use need::need;
pub use new::new;
pub use oil::oil;
pub use report::report;
pub use rules::rules;
pub use weigh::weigh;
pub use why::why;
pub use work::work;
