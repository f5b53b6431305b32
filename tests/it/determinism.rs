//! Same inputs, same bytes: twice, from another folder, on another number of threads.

use crate::scenario::filmwright;
use filmwright::cli::exit::Exit;
use std::process::{Command, Output};

/// Commands over the whole demonstration, in every form they print.
const COMMANDS: [&str; 6] = [
    "weigh --demo",
    "weigh --demo -f json",
    "weigh --demo -f csv",
    "need --demo -f json",
    "why M02 O-03 --demo",
    "rules --demo -f json",
];

#[test]
fn twice_in_one_process() {
    for command in COMMANDS {
        let (one, two) = (filmwright(command), filmwright(command));
        same(command, one.out.as_bytes(), two.out.as_bytes());
        assert!(one.out.len() > 500, "{command} prints {}", one.out.len());
        assert!(
            matches!(one.exit, Exit::Done),
            "{command}: {:?} {}",
            one.exit,
            one.err
        );
        assert!(one.host.files.is_empty(), "{command} wrote files");
    }
}

/// Fails with the first line that differs, not with all of both.
fn same(command: &str, one: &[u8], two: &[u8]) {
    let (one, two) = (String::from_utf8_lossy(one), String::from_utf8_lossy(two));
    for (a, b) in one.lines().zip(two.lines()) {
        assert_eq!(a, b, "{command}");
    }
    assert_eq!(one.len(), two.len(), "{command}");
}

fn program(folder: &str, arguments: &str, threads: &str) -> Output {
    Command::new(env!("CARGO_BIN_EXE_filmwright"))
        .args(arguments.split(' '))
        .current_dir(folder)
        .env("RAYON_NUM_THREADS", threads)
        .env("TZ", if threads == "1" { "UTC" } else { "Asia/Tokyo" })
        .env("LANG", if threads == "1" { "C" } else { "de_DE.UTF-8" })
        .output()
        .expect("the program starts")
}

#[test]
fn from_other_folders_with_other_threads_and_locales() {
    for command in COMMANDS {
        let command = format!("{command} --on 2026-11-02");
        let one = program("/", &command, "1");
        let two = program(env!("CARGO_MANIFEST_DIR"), &command, "2");
        assert!(one.status.success(), "{command}: {one:?}");
        same(&command, &one.stdout, &two.stdout);
    }
}
