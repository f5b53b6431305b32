//! `rules`: what is in force, entry by entry, and the rules the program works limits out by.

use crate::cli::exit::Exit;
use crate::cli::select::matches;
use crate::cli::session::Session;
use crate::cli::text::folded;
use crate::cli::{Format, Rules};
use crate::demand::rules::CALCULATED;
use crate::input::rules::listing::{Listed, listing};
use crate::results::csv::{Cell, Table};
use serde_json::json;
use std::fmt::Write as _;

/// Runs `rules`.
pub fn rules(session: &mut Session<'_>, args: &Rules) -> Exit {
    let folder = (!session.shared.demo).then(|| session.folder());
    if let Err(exit) = session.rules(folder.as_deref()) {
        return exit;
    }
    let mut all = calculated();
    all.extend(listing(&session.layers(folder.as_deref())));
    let kind = args.kind.as_deref().map(folded_name);
    let chosen: Vec<&Listed> = all
        .iter()
        .filter(|r| kind.as_ref().is_none_or(|k| folded_name(&r.kind) == *k))
        .filter(|r| args.rules.is_empty() || args.rules.iter().any(|w| is(w, r)))
        .collect();
    if chosen.is_empty() {
        let mut kinds: Vec<&str> = all.iter().map(|r| r.kind.as_str()).collect();
        kinds.dedup();
        let what = match (&args.kind, args.rules.is_empty()) {
            (Some(kind), true) => format!("no rules are of the kind '{kind}'"),
            (Some(kind), false) => {
                format!(
                    "no rule of the kind '{kind}' matches {}",
                    args.rules.join(", ")
                )
            }
            (None, _) => format!("no rule matches {}", args.rules.join(", ")),
        };
        session.fail(&format!(
            "{what}\n  filmwright rules lists them; kinds: {}",
            kinds.join(", ")
        ));
        return Exit::NoMatch;
    }
    if session.wants(Format::Json) {
        let list: Vec<_> = chosen.iter().map(|r| one_json(r)).collect();
        let mut text = serde_json::to_string_pretty(&json!({ "rules": list })).unwrap_or_default();
        text.push('\n');
        return session.result(&text);
    }
    if session.wants(Format::Csv) {
        return session.table(&table(&chosen));
    }
    let text = if args.rules.is_empty() {
        overview(&chosen, session.width())
    } else {
        chosen
            .iter()
            .map(|r| one(r, session.width()))
            .collect::<Vec<_>>()
            .join("\n")
    };
    session.result(&text)
}

/// A row a field, so that entries of different kinds share a table.
fn table(chosen: &[&Listed]) -> Table {
    let mut rows = Vec::new();
    for r in chosen {
        for (field, says) in &r.says {
            rows.push(
                [&r.kind, &r.id, &r.title, field, says, &r.file]
                    .map(|t| Cell::from(t.as_str()))
                    .to_vec(),
            );
        }
    }
    Table {
        headings: ["kind", "id", "title", "field", "says", "file"]
            .map(str::to_owned)
            .to_vec(),
        rows,
    }
}

fn folded_name(name: &str) -> String {
    name.to_lowercase().replace(['_', ' '], "-")
}

fn is(wanted: &str, r: &Listed) -> bool {
    matches(wanted, &r.id)
        || folded_name(wanted) == folded_name(&r.id)
        || wanted.eq_ignore_ascii_case(&r.title)
}

/// The rules by which limits are worked out, with their formulas.
fn calculated() -> Vec<Listed> {
    CALCULATED
        .iter()
        .map(|(id, law, default)| Listed {
            kind: "calculated limits".to_owned(),
            id: (*id).to_owned(),
            title: law.title.to_owned(),
            says: [
                ("formula", law.formula),
                ("range", law.range),
                ("default", *default),
                ("source", law.source),
            ]
            .iter()
            .map(|(k, v)| ((*k).to_owned(), (*v).to_owned()))
            .collect(),
            file: "worked out by the program".to_owned(),
        })
        .collect()
}

fn one_json(r: &Listed) -> serde_json::Value {
    let mut entry = serde_json::Map::new();
    entry.insert("kind".into(), json!(r.kind));
    entry.insert("id".into(), json!(r.id));
    entry.insert("title".into(), json!(r.title));
    for (key, says) in &r.says {
        entry.insert(key.clone(), json!(says));
    }
    entry.insert("file".into(), json!(r.file));
    serde_json::Value::Object(entry)
}

fn overview(rules: &[&Listed], width: usize) -> String {
    let mut out = String::from("Rules in force. filmwright rules ID prints one with its source.\n");
    let mut kind = "";
    for r in rules {
        if r.kind != kind {
            kind = &r.kind;
            let _ = writeln!(out, "\n  {kind}");
        }
        let sure = r
            .field("confidence")
            .map_or(String::new(), |c| format!("  [{c}]"));
        let left = width.saturating_sub(39 + sure.len()).max(20);
        let _ = writeln!(out, "    {:<34} {}{sure}", r.id, cut(gist(r), left));
    }
    out
}

/// The title, else the first thing an entry says in words.
fn gist(r: &Listed) -> &str {
    let words = |s: &&str| s.split_whitespace().count() > 3;
    if r.title.is_empty() {
        r.says
            .iter()
            .filter(|(key, _)| key != "source")
            .map(|(_, says)| says.as_str())
            .find(words)
            .unwrap_or("")
    } else {
        &r.title
    }
}

/// So many letters of a text at most, cut at a word.
fn cut(text: &str, most: usize) -> String {
    if text.chars().count() <= most {
        return text.to_owned();
    }
    let mut short = String::new();
    for word in text.split_whitespace() {
        if short.chars().count() + word.chars().count() + 5 > most {
            break;
        }
        short.push_str(word);
        short.push(' ');
    }
    short + "..."
}

fn one(r: &Listed, width: usize) -> String {
    let mut out = format!("{}  {}\n", r.id, r.title);
    for (key, says) in &r.says {
        out.push_str(&folded(&format!("{key}: {says}"), "  ", width));
    }
    let _ = writeln!(out, "  file: {}", r.file);
    out
}
