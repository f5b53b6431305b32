//! `oil`: one oil, its line and what does not add up.

use crate::cli::Oil;
use crate::cli::exit::Exit;
use crate::cli::session::Session;

/// Runs `oil`.
pub fn oil(session: &mut Session<'_>, args: &Oil) -> Exit {
    session.fail(&format!("{} is not printed yet", args.oil));
    Exit::Defect
}
