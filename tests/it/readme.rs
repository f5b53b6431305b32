//! The README's commands are run, and what it shows is what they print.
//!
//! `README_UPDATE=1 cargo test --test it readme` writes the output anew; read the change.

#![expect(
    clippy::disallowed_methods,
    reason = "the README is read where it stands, not through a host"
)]

use crate::scenario::on;
use filmwright::cli::host::MemoryHost;
use std::path::PathBuf;

const PATH: &str = concat!(env!("CARGO_MANIFEST_DIR"), "/README.md");

/// A line that stands for any number of lines.
const CUT: &str = "...";
/// How many lines stand before a cut that is written anew.
const SHOWN: usize = 22;

#[test]
fn the_readme_shows_what_its_commands_print() {
    let text = std::fs::read_to_string(PATH).expect("the README is there");
    let anew = run(&text);
    if std::env::var_os("README_UPDATE").is_some() {
        std::fs::write(PATH, &anew).expect("the README is written");
        return;
    }
    for (was, is) in text.lines().zip(anew.lines()) {
        assert_eq!(was, is, "README_UPDATE=1 writes it anew");
    }
    assert_eq!(text.lines().count(), anew.lines().count());
}

#[test]
fn the_job_comes_first_and_both_commands_are_named() {
    let text = std::fs::read_to_string(PATH).expect("the README is there");
    let first = text.lines().filter(|l| !l.is_empty()).nth(1);
    assert!(first.is_some_and(|l| l.starts_with("filmwright helps people who choose lubricants")));
    assert!(text.contains("\n    tests/run\n"));
    assert!(text.contains("\n    cargo run --release -- report --demo\n"));
}

/// The text with the output of every command in place.
fn run(text: &str) -> String {
    let mut host = MemoryHost::new();
    let mut out = String::new();
    let mut lines = text.lines();
    let mut commands = 0;
    while let Some(line) = lines.next() {
        out.push_str(line);
        out.push('\n');
        let Some(language) = line.strip_prefix("```").filter(|l| !l.is_empty()) else {
            continue;
        };
        let block: Vec<&str> = lines.by_ref().take_while(|l| *l != "```").collect();
        match language.split_once(' ') {
            Some((_, file)) => {
                let text = block.join("\n") + "\n";
                out.push_str(&text);
                host.files.insert(PathBuf::from(file), text.into_bytes());
            }
            None if language == "console" => {
                commands += session(&mut host, &block, &mut out);
            }
            None => panic!("a block of {language} is not checked"),
        }
        out.push_str("```\n");
    }
    assert!(commands > 8, "only {commands} commands were found");
    out
}

/// Runs a block's commands one after another.
fn session(host: &mut MemoryHost, block: &[&str], out: &mut String) -> usize {
    let starts: Vec<usize> = (0..block.len())
        .filter(|i| block[*i].starts_with("$ "))
        .collect();
    for (n, start) in starts.iter().enumerate() {
        let end = starts.get(n + 1).copied().unwrap_or(block.len());
        let command = &block[*start][2..];
        out.push_str(block[*start]);
        out.push('\n');
        if let Some(folder) = command.strip_prefix("cd ") {
            enter(host, folder);
            continue;
        }
        let arguments = command
            .strip_prefix("filmwright ")
            .unwrap_or_else(|| panic!("{command} is not a command of the program"));
        let ran = on(host.clone(), arguments);
        host.files.clone_from(&ran.host.files);
        let cut = block[start + 1..end].contains(&CUT);
        // What stands on standard error comes after the answer, as on a terminal.
        let printed = format!("{}{}", ran.out, ran.err);
        let printed: Vec<&str> = printed.trim_end().lines().map(str::trim_end).collect();
        let kept = if cut {
            SHOWN.min(printed.len())
        } else {
            printed.len()
        };
        for line in &printed[..kept] {
            out.push_str(line);
            out.push('\n');
        }
        if cut {
            out.push_str(CUT);
            out.push('\n');
        }
    }
    starts.len()
}

/// The host has one folder: files outside it are out of sight.
fn enter(host: &mut MemoryHost, folder: &str) {
    let inside = |(path, bytes): (PathBuf, Vec<u8>)| {
        let path = path.strip_prefix(folder).ok()?.to_path_buf();
        Some((path, bytes))
    };
    host.files = std::mem::take(&mut host.files)
        .into_iter()
        .filter_map(inside)
        .collect();
}
