//! `help TOPIC`.

use crate::assets;
use crate::cli::exit::Exit;
use crate::cli::session::Session;
use crate::cli::{Cli, Help};
use clap::CommandFactory;

/// Topics with a text of their own; `keys` is printed from the reader's table.
const TOPICS: [&str; 5] = ["units", "verdicts", "files", "keys", "steps"];

/// Runs `help`.
pub fn help(session: &mut Session<'_>, args: &Help) -> Exit {
    let Some(topic) = args.topic.as_deref() else {
        let text = Cli::command().render_long_help().to_string();
        return session.result(&text);
    };
    if topic == "keys" {
        return session.result(&crate::input::keys::list::text());
    }
    if let Some(text) = assets::template(&format!("help/{topic}.md")) {
        return session.result(text);
    }
    if let Some(text) = assets::rule_text(&format!("messages/{topic}.md")) {
        return session.result(text);
    }
    let mut command = Cli::command();
    if let Some(sub) = command.find_subcommand_mut(topic) {
        let text = sub.render_long_help().to_string();
        return session.result(&text);
    }
    session.fail(&format!(
        "no help on '{topic}'\n  topics: {}; a command; or the name of a message, as rise-not-temperature",
        TOPICS.join(", ")
    ));
    Exit::NoMatch
}
