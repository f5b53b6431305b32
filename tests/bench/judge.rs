//! What judging costs, as ratios against floors measured in the same run.
//!
//! `cargo bench --bench judge`

#![expect(clippy::print_stdout, reason = "a benchmark prints its figures")]

mod generate;

use filmwright::assets;
use filmwright::demand::{PointDemands, is_severe, point_demands};
use filmwright::input::file::FileKind;
use filmwright::input::load::{self, With};
use filmwright::input::rules::rulebook;
use filmwright::judge::{PreparedOil, PreparedPoint, Verdict, weigh};
use filmwright::model::Site;
use filmwright::model::rulebook::Rulebook;
use filmwright::numeric::math::{exp, ln};
use filmwright::problem::Problems;
use filmwright::quantity::convert::{celsius, mm2_s};
use filmwright::relation::bearing::designation::DimensionTable;
use filmwright::relation::oil::viscosity_temperature::{Line, Point};
use filmwright::source::SourceSet;
use std::hint::black_box;
use std::time::Instant;

fn read(site: &str, oils: &str, rules: &Rulebook) -> Site {
    let mut set = SourceSet::new();
    let mut problems = Problems::new();
    let trees = [
        load::take(
            &mut set,
            FileKind::Site,
            "site.yaml",
            site.as_bytes(),
            &mut problems,
        ),
        load::take(
            &mut set,
            FileKind::Oils,
            "oils.yaml",
            oils.as_bytes(),
            &mut problems,
        ),
    ];
    let with = With {
        rules,
        bearings: DimensionTable::built_in(),
        calculated: &[],
    };
    load::load(&set, &trees, &with, &[], &mut problems).unwrap_or_else(|_| {
        let look = filmwright::problem::render::Look::default();
        panic!(
            "{}",
            filmwright::problem::render::all(&set, &problems, look)
        )
    })
}

/// Seconds for one call, the best of several rounds.
fn best(rounds: usize, mut f: impl FnMut()) -> f64 {
    let mut best = f64::INFINITY;
    for _ in 0..rounds {
        let start = now();
        f();
        best = best.min(start.elapsed().as_secs_f64());
    }
    best
}

#[expect(clippy::disallowed_methods, reason = "a benchmark measures time")]
fn now() -> Instant {
    Instant::now()
}

/// Seconds for so many exponentials and logarithms of `libm`, the functions the program uses, at
/// arguments spread as they are on viscosity-temperature lines: `ln ln Z` from -1 to 2 and
/// `ln Z` up to 7 for the exponentials, kelvins and ratios for the logarithms.
fn floor_of_one(exps: usize, lns: usize) -> f64 {
    let n = 20_000;
    best(60, || {
        let mut sum = 0.0;
        for i in 0..n {
            let x = f64::from(i) / f64::from(n);
            for k in 0..exps {
                let from = if k % 2 == 0 { -1.0 } else { 0.3 };
                let to = if k % 2 == 0 { 2.0 } else { 7.0 };
                sum += exp(from + (to - from) * x + 0.01 * k as f64);
            }
            for k in 0..lns {
                sum += ln(250.0 + 100.0 * x + k as f64);
            }
        }
        black_box(sum);
    }) / f64::from(n)
}

fn d341() {
    let line = Line::through(
        Point::new(celsius(40.0), mm2_s(220.0)),
        Point::new(celsius(100.0), mm2_s(19.4)),
    )
    .expect("two points");
    let n = 20_000;
    let took = best(60, || {
        let mut sum = 0.0;
        for i in 0..n {
            let t = celsius(-20.0 + f64::from(i) * 5e-3);
            sum += filmwright::quantity::Measure::base(line.nu_at(t));
        }
        black_box(sum);
    }) / f64::from(n);
    let floor = floor_of_one(2, 1);
    println!(
        "D341 evaluation            {:8.1} ns   {:5.2} x the bare two exp and one ln",
        took * 1e9,
        took / floor
    );
}

fn pairs(name: &str, points: usize, oils: usize, films: bool, rules: &Rulebook) {
    let (site_text, oil_text) = (
        generate::site(points, oils, 7, films),
        generate::oils(oils, 11),
    );
    let start = now();
    let site = read(&site_text, &oil_text, rules);
    let reading = start.elapsed().as_secs_f64();
    let ready: Vec<PreparedOil> = site
        .oils
        .iter()
        .map(|o| PreparedOil::new(o, rules, true).expect("a curve"))
        .collect();
    let start = now();
    let prepared: Vec<PreparedPoint> = site
        .points
        .iter()
        .map(|p| {
            let d: PointDemands = point_demands(p, &site.house, rules);
            PreparedPoint::new(&d.settings, is_severe(p), 0.5)
        })
        .collect();
    let preparing = start.elapsed().as_secs_f64();
    let pairs = (points * oils) as f64;
    // point by point, each the best of several, so that other work on the machine does not count
    let mut holds = 0_usize;
    let mut took = 0.0;
    for point in &prepared {
        let mut here = 0;
        took += best(5, || {
            here = 0;
            for oil in &ready {
                here += usize::from(weigh(point, oil).verdict == Verdict::Holds);
            }
        });
        holds += here;
    }
    let floor = floor_of_one(10, 2);
    println!(
        "{name:<26} {:8.1} ns a pair   {:5.2} x the floor of 10 exp and 2 ln   {:.2} million pairs/s   ({holds} hold; read {reading:.2} s, demands {preparing:.2} s)",
        took / pairs * 1e9,
        took / pairs / floor,
        pairs / took / 1e6
    );
}

fn main() {
    // `cargo bench --bench judge -- d341` runs one part
    let only = std::env::args().nth(1).filter(|a| !a.starts_with("--"));
    if only.as_deref() == Some("d341") {
        return d341();
    }
    let rules = rulebook(&[assets::builtin_rules()]).unwrap_or_else(|f| panic!("{f:?}"));
    d341();
    if only.as_deref() == Some("pairs") {
        return pairs("fixed limits, 300 x 50", 300, 50, false, &rules);
    }
    pairs("fixed limits, 1 000 x 50", 1_000, 50, false, &rules);
    pairs("fixed limits, 10 000 x 50", 10_000, 50, false, &rules);
    pairs("one in ten a film, 1 000 x 50", 1_000, 50, true, &rules);
}
