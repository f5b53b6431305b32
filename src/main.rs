//! Arguments in, exit code out.

use filmwright::cli::host::System;
use filmwright::cli::run::run;
use std::process::ExitCode;

fn main() -> ExitCode {
    let mut host = System::new();
    let exit = run(std::env::args_os(), &mut host);
    host.finish();
    exit.into()
}
