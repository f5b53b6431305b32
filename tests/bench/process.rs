//! What whole commands cost, from start to exit, beside a process that does nothing.
//!
//! `cargo bench --bench process`

#![expect(clippy::print_stdout, reason = "a benchmark prints its figures")]

use std::path::PathBuf;
use std::process::{Command, Stdio};
use std::time::Instant;

const BIN: &str = env!("CARGO_BIN_EXE_filmwright");

/// Milliseconds of one run: the median of several, so that one late wake-up does not count.
fn median(rounds: usize, command: &mut Command) -> f64 {
    let mut all: Vec<f64> = (0..rounds).map(|_| once(command)).collect();
    all.sort_by(f64::total_cmp);
    all[rounds / 2]
}

fn once(command: &mut Command) -> f64 {
    let start = now();
    let status = command
        .stdout(Stdio::null())
        .stderr(Stdio::null())
        .status()
        .expect("the command is there");
    let ms = start.elapsed().as_secs_f64() * 1e3;
    assert!(
        status.success(),
        "{command:?} ended with {status}: its time says nothing"
    );
    ms
}

#[expect(clippy::disallowed_methods, reason = "a benchmark measures time")]
fn now() -> Instant {
    Instant::now()
}

fn main() {
    let folder: PathBuf = std::env::temp_dir().join("filmwright-bench-process");
    std::fs::create_dir_all(&folder).expect("a folder for the pages");
    let empty = median(101, &mut Command::new("true"));
    println!("an empty process: {empty:.2} ms");
    println!("command                     ms   x empty   aim");
    let rows: [(&str, &[&str], usize, &str); 6] = [
        ("--version", &["--version"], 51, ""),
        ("need --demo M01", &["need", "--demo", "M01"], 31, ""),
        ("weigh --demo M01", &["weigh", "--demo", "M01"], 31, "30 ms"),
        ("weigh --demo", &["weigh", "--demo"], 31, ""),
        ("oil --demo O-05", &["oil", "--demo", "O-05"], 31, "30 ms"),
        (
            "report --demo",
            &["report", "--demo", "--replace"],
            11,
            "1 s",
        ),
    ];
    for (name, args, rounds, aim) in rows {
        let ms = median(rounds, Command::new(BIN).args(args).current_dir(&folder));
        println!("{name:<22} {ms:>7.1} {:>9.1}   {aim}", ms / empty);
    }
    // A folder of the system's temporary place; what stays behind there harms nobody.
    std::fs::remove_dir_all(&folder).ok();
}
