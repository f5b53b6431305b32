//! What whole commands cost, from start to exit, beside a process that does nothing.
//!
//! `cargo bench --bench process`

#![expect(clippy::print_stdout, reason = "a benchmark prints its figures")]
#![expect(
    clippy::disallowed_methods,
    reason = "a benchmark measures time and makes the files it measures with"
)]

#[expect(
    dead_code,
    reason = "the other benchmarks make their sites with it, this one draws its chances"
)]
mod generate;
mod mix;

use std::path::Path;
use std::process::{Command, Stdio};
use std::time::Instant;

const BIN: &str = env!("CARGO_BIN_EXE_filmwright");

/// Milliseconds of one run: the best of several, which a busy machine lengthens least, and the
/// median.
fn times(rounds: usize, command: &mut Command) -> (f64, f64) {
    let mut all: Vec<f64> = (0..rounds).map(|_| once(command)).collect();
    all.sort_by(f64::total_cmp);
    (all[0], all[rounds / 2])
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

fn now() -> Instant {
    Instant::now()
}

fn main() {
    let folder = tempfile::tempdir().expect("a folder for the pages");
    let (empty, usual) = times(101, &mut Command::new("true"));
    println!("an empty process: {empty:.2} ms at best, {usual:.2} ms usually");
    println!("command             best, ms   x empty   median, ms   aim");
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
        let command = &mut Command::new(BIN);
        let (best, usual) = times(rounds, command.args(args).current_dir(folder.path()));
        println!(
            "{name:<19} {best:>8.1} {:>9.1} {usual:>12.1}   {aim}",
            best / empty
        );
    }
    large(folder.path(), empty);
}

/// The report of a thousand machines with forty oils: 5 s, 300 MB, 150 kB a page.
fn large(folder: &Path, empty: f64) {
    let pages = folder.join("large");
    std::fs::write(folder.join("site.yaml"), mix::site(1_000, 40, 1)).expect("a folder");
    std::fs::write(folder.join("oils.yaml"), mix::oils(40, 1)).expect("a folder");
    let command = &mut Command::new(BIN);
    let (best, usual) = times(3, command.args(LARGE).current_dir(folder));
    println!(
        "report, 1 000 points {best:>7.1} {:>9.1} {usual:>12.1}   5 s",
        best / empty
    );
    let sizes = std::fs::read_dir(pages).expect("pages");
    let sizes = sizes.filter_map(|entry| entry.ok()?.metadata().ok());
    let (count, most) = sizes.fold((0, 0), |(n, most), m| (n + 1, most.max(m.len())));
    println!("   {count} pages, the largest {most} bytes of 150 000");
}

const LARGE: [&str; 6] = [
    "report",
    "-q",
    "-o",
    "large",
    "--replace",
    "--on=2026-11-02",
];
