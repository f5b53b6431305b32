//! What reading a register costs, and what files made to do harm cost, each in a process of its
//! own so that its greatest memory is its own.
//!
//! `cargo bench --bench intake`

#![expect(clippy::print_stdout, reason = "a benchmark prints its figures")]
#![expect(
    clippy::disallowed_methods,
    reason = "a benchmark measures time and reads what the system says of its memory"
)]

#[expect(
    dead_code,
    reason = "the tests look at where a file ends, the benchmark at the time"
)]
#[path = "../it/hostile.rs"]
mod hostile;

use filmwright::cli::host::MemoryHost;
use filmwright::cli::run::run;
use rust_xlsxwriter::Workbook;
use std::path::PathBuf;
use std::process::Command;
use std::time::Instant;

/// A register of so many rows with the dirt of the demonstration's: tags alike, units mixed,
/// several machines in a row, references, question marks.
fn register(rows: u32) -> Vec<u8> {
    let oils = [
        "ISO 220 EP",
        "HLP46",
        "AGMA 7 Comp?",
        "R&O 68 or equivalent",
        "315 SUS",
        "SAE 20",
        "same as row 12",
    ];
    let fills = ["15 gal", "68 l", "1.200", "22", "1,2 L ea", "9 kg", "999"];
    let temperatures = ["140", "60 C", "52,0", "113F", "", "92 (discharge)", "88"];
    let names = [
        "gearbox conveyor",
        "press hyd",
        "kiln feeder worm",
        "pumps",
        "turbine",
        "fan",
        "mixer",
    ];
    let mut book = Workbook::new();
    let sheet = book.add_worksheet();
    let headings = [
        "tag",
        "desc",
        "area",
        "lubricant",
        "qty",
        "temp",
        "bearing",
        "speed rpm",
        "note",
    ];
    for (i, h) in (0_u16..).zip(headings) {
        sheet.write_string(0, i, h).expect("memory");
    }
    for r in 1..=rows {
        let at = (r % 7) as usize;
        let tag = if r % 50 == 0 {
            format!("P-{r} A/B/C")
        } else {
            format!("CV-{r}")
        };
        sheet.write_string(r, 0, tag).expect("memory");
        for (c, text) in [
            (1, names[at]),
            (3, oils[at]),
            (4, fills[(at + 3) % 7]),
            (5, temperatures[at]),
            (6, "22220 EK C3"),
        ] {
            sheet.write_string(r, c, text).expect("memory");
        }
        sheet
            .write_string(r, 2, format!("area {}", r % 12))
            .expect("memory");
        sheet.write_number(r, 7, 1480.0).expect("memory");
        sheet
            .write_string(r, 8, "seen in the walk-down")
            .expect("memory");
    }
    book.save_to_buffer().expect("memory")
}

/// Greatest memory of this process so far, MiB.
fn peak_mib() -> Option<f64> {
    let status = std::fs::read_to_string("/proc/self/status").ok()?;
    let line = status.lines().find(|l| l.starts_with("VmHWM:"))?;
    let kib: f64 = line.split_whitespace().nth(1)?.parse().ok()?;
    Some(kib / 1024.0)
}

/// Runs the command on a file in memory: seconds, greatest memory before and after, outcome.
fn measured(name: &str, bytes: Vec<u8>) -> (f64, f64, f64, String) {
    let mut host = MemoryHost::new();
    host.files.insert(PathBuf::from(name), bytes);
    let before = peak_mib().unwrap_or(0.0);
    let start = Instant::now();
    let exit = run(["filmwright", "intake", name], &mut host);
    let took = start.elapsed().as_secs_f64();
    let said = if host.stderr.is_empty() {
        host.stdout
    } else {
        host.stderr
    };
    let first = said.lines().next().unwrap_or("").to_owned();
    (
        took,
        before,
        peak_mib().unwrap_or(0.0),
        format!("{exit:?}: {first}"),
    )
}

fn child(what: &str) {
    let (name, bytes) = match what.split_once(' ') {
        Some((name, path)) => (
            name.to_owned(),
            std::fs::read(path).expect("the file its parent wrote"),
        ),
        None => return,
    };
    let (took, before, after, said) = measured(&name, bytes);
    println!("{took:.3} s   {after:.0} MiB at most ({before:.0} before)   {said}");
}

/// Reads bytes in a process of its own, which has seen nothing but the file they are written to.
fn in_its_own_process(name: &str, bytes: &[u8]) -> String {
    let folder = tempfile::tempdir().expect("a folder");
    let path = folder.path().join("table");
    std::fs::write(&path, bytes).expect("a file");
    let what = format!("{name} {}", path.display());
    let me = std::env::current_exe().expect("a path");
    let out = Command::new(me)
        .arg("child")
        .arg(what)
        .output()
        .expect("a child");
    String::from_utf8_lossy(&out.stdout).trim().to_owned()
}

fn main() {
    let arguments: Vec<String> = std::env::args()
        .skip(1)
        .filter(|a| !a.starts_with("--"))
        .collect();
    if let [first, what] = arguments.as_slice()
        && first == "child"
    {
        return child(what);
    }
    for rows in [1_000, 5_000, 20_000] {
        println!(
            "{rows:>6} rows   {}",
            in_its_own_process("register.xlsx", &register(rows))
        );
    }
    for case in &hostile::all() {
        println!(
            "{:<44} {}",
            format!("{}, {}", case.file, case.name),
            in_its_own_process(case.file, &case.bytes)
        );
    }
}
