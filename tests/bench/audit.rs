//! What an audit costs: ten thousand samples read and judged, with a floor of the same run.
//!
//! `cargo bench --bench audit`

#![expect(clippy::print_stdout, reason = "a benchmark prints its figures")]

use filmwright::assets::template;
use filmwright::cli::host::MemoryHost;
use filmwright::cli::run::run;
use filmwright::numeric::math::ln;
use rand_pcg::Pcg64;
use rand_pcg::rand_core::{Rng, SeedableRng};
use std::fmt::Write as _;
use std::hint::black_box;
use std::time::Instant;

/// Samples on the machines of the demonstration, a third of them sheared, mixed or wetted.
fn table(count: usize) -> String {
    let mut chance = Pcg64::seed_from_u64(5);
    let mut unit = move || (chance.next_u64() >> 11) as f64 / (1_u64 << 53) as f64;
    let oils = [
        ("M03", "O-04", 46.2, 6.83),
        ("M04", "O-05", 46.5, 9.1),
        ("M05", "O-03", 322.0, 24.1),
        ("M06", "O-09", 46.9, 7.0),
        ("M07", "O-08", 45.8, 6.85),
        ("M08", "O-11", 150.5, 14.9),
        ("M10", "O-10", 67.4, 8.75),
        ("M16", "O-07", 68.3, 8.72),
    ];
    let mut text = String::from(
        "bottle,machine,label,drawn,hours on oil,nu40,nu100,flash,acid number,water,iso4406,Fe,Cu,Sn,Si,Al,Zn,P,Ca,Na\n",
    );
    for n in 0..count {
        let (machine, oil, nu40, nu100) = oils[n % oils.len()];
        let moved = if n % 3 == 0 {
            0.7 + 0.5 * unit()
        } else {
            0.99 + 0.02 * unit()
        };
        let day = format!(
            "20{:02}-{:02}-{:02}",
            10 + n / 1500 % 16,
            1 + n / 120 % 12,
            1 + n % 28
        );
        let _ = writeln!(
            text,
            "b{n},{machine},{oil},{day},{},{:.2},{:.3},{:.0},{:.2},{:.0},19/17/14,{:.0},{:.0},{:.0},{:.0},{:.0},{:.0},{:.0},{:.0},{:.0}",
            n % 5000,
            nu40 * moved,
            nu100 * (0.4 + 0.6 * moved),
            200.0 + 40.0 * unit(),
            0.2 + unit(),
            50.0 + 600.0 * unit() * unit(),
            40.0 * unit(),
            30.0 * unit(),
            5.0 * unit(),
            20.0 * unit(),
            6.0 * unit(),
            400.0 * unit(),
            300.0 * unit(),
            50.0 * unit(),
            10.0 * unit(),
        );
    }
    text
}

fn host(count: usize) -> MemoryHost {
    let file = |name: &str| template(&format!("demo/{name}")).unwrap_or("").to_owned();
    MemoryHost::new()
        .with("site.yaml", &file("site.yaml"))
        .with("oils.yaml", &file("oils.yaml"))
        .with("lab.csv", &table(count))
        .with("samples.yaml", "file: samples 1\nread: lab.csv\n")
}

fn seconds(arguments: &[&str], count: usize) -> f64 {
    let mut host = host(count);
    let start = now();
    let exit = run(arguments.iter().copied(), &mut host);
    let took = start.elapsed().as_secs_f64();
    println!(
        "  {} samples: {took:.3} s, exit {exit:?}, {} bytes out",
        count,
        host.stdout.len()
    );
    took
}

#[expect(clippy::disallowed_methods, reason = "a benchmark measures time")]
fn now() -> Instant {
    Instant::now()
}

fn main() {
    let csv = ["filmwright", "audit", "-f", "csv", "-q"];
    let none = seconds(&csv, 1);
    let all = seconds(&csv, 10_000);
    // the floor: a million logarithms
    let start = now();
    let mut sum = 0.0;
    for i in 1..1_000_000_u32 {
        sum += ln(black_box(f64::from(i)));
    }
    black_box(sum);
    let floor = start.elapsed().as_secs_f64();
    println!(
        "10 000 samples beyond one: {:.3} s, {:.0} times a million logarithms; 2 s are allowed",
        all - none,
        (all - none) / floor
    );
}
