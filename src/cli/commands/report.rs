//! `report`: HTML sheets.

use crate::cli::Report;
use crate::cli::exit::Exit;
use crate::cli::session::Session;

/// Runs `report`.
pub fn report(session: &mut Session<'_>, args: &Report) -> Exit {
    session.fail(&format!("no report yet {:?}", args.only));
    Exit::Defect
}
