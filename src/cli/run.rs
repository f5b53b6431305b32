//! Reads the command line and hands it to the command.

use super::exit::Exit;
use super::host::Host;
use super::session::Session;
use super::{Cli, Command, commands};
use clap::Parser;
use clap::error::ErrorKind;

/// Runs the program.
pub fn run<I, T>(arguments: I, host: &mut dyn Host) -> Exit
where
    I: IntoIterator<Item = T>,
    T: Into<std::ffi::OsString> + Clone,
{
    let cli = match Cli::try_parse_from(arguments) {
        Ok(cli) => cli,
        Err(error) => return misunderstood(&error, host),
    };
    let mut session = Session::new(host, cli.shared);
    let exit = command(&mut session, cli.command);
    session.finish();
    exit
}

fn misunderstood(error: &clap::Error, host: &mut dyn Host) -> Exit {
    let text = error.render().to_string();
    match error.kind() {
        ErrorKind::DisplayHelp | ErrorKind::DisplayVersion => {
            host.out(&text);
            Exit::Done
        }
        ErrorKind::DisplayHelpOnMissingArgumentOrSubcommand => {
            host.out(&text);
            Exit::Usage
        }
        _ => {
            host.err(&text);
            Exit::Usage
        }
    }
}

fn command(session: &mut Session<'_>, command: Command) -> Exit {
    match command {
        Command::New(args) => commands::new(session, &args),
        Command::Intake(args) => commands::intake(session, &args),
        Command::Check => commands::check(session),
        Command::Need(args) => commands::need(session, &args),
        Command::Weigh(args) => commands::weigh(session, &args),
        Command::Why(args) => commands::why(session, &args),
        Command::Mend(args) => commands::mend(session, &args),
        Command::Whatif(args) => commands::whatif(session, &args),
        Command::Gaps(args) => commands::gaps(session, &args),
        Command::Oil(args) => commands::oil(session, &args),
        Command::Compare(args) => commands::compare(session, &args),
        Command::Pool(args) => commands::pool(session, &args),
        Command::Audit(args) => commands::audit(session, &args),
        Command::Report(args) => commands::report(session, &args),
        Command::Labels(args) => commands::labels(session, &args),
        Command::Rules(args) => commands::rules(session, &args),
        Command::Work(args) => commands::work(session, &args),
        Command::Schema(args) => commands::schema(session, &args),
        Command::Completions(args) => commands::completions(session, &args),
        Command::Man(args) => commands::man(session, &args),
        Command::Help(args) => commands::help(session, &args),
    }
}
