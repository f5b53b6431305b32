//! What a mend and the gaps of the demonstration cost, as ratios against plain weighing in the
//! same run.
//!
//! `cargo bench --bench decide`

#![expect(clippy::print_stdout, reason = "a benchmark prints its figures")]

use filmwright::assets;
use filmwright::decide::gaps::{of_points, ranked};
use filmwright::decide::mend::mend;
use filmwright::demand::takes_grease;
use filmwright::input::file::FileKind;
use filmwright::input::load::{self, With};
use filmwright::input::rules::rulebook;
use filmwright::model::Site;
use filmwright::model::rulebook::Rulebook;
use filmwright::problem::Problems;
use filmwright::relation::bearing::designation::DimensionTable;
use filmwright::source::SourceSet;
use filmwright::weighing::{Scales, Settings};
use std::hint::black_box;
use std::time::Instant;

/// Longest one mend may take, s.
const MEND: f64 = 0.050;
/// Longest the gaps of the demonstration may take, s.
const GAPS: f64 = 0.500;

fn demo(rules: &Rulebook) -> Site {
    let mut set = SourceSet::new();
    let mut problems = Problems::new();
    let files = [
        (FileKind::Site, "demo/site.yaml"),
        (FileKind::Oils, "demo/oils.yaml"),
    ];
    let trees: Vec<load::Tree> = files
        .iter()
        .map(|(kind, name)| {
            let text = assets::template(name).expect("built in");
            load::take(&mut set, *kind, name, text.as_bytes(), &mut problems)
        })
        .collect();
    let with = With {
        rules,
        bearings: DimensionTable::built_in(),
        calculated: &[],
    };
    load::load(&set, &trees, &with, &[], &mut problems).expect("the demonstration is sound")
}

#[expect(clippy::disallowed_methods, reason = "a benchmark measures time")]
fn now() -> Instant {
    Instant::now()
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

fn verdict(took: f64, allowed: f64) -> &'static str {
    assert!(took <= allowed, "{took} s, allowed {allowed} s");
    "within"
}

/// The dearest mend of all pairs that are weighed.
fn mends(scales: &Scales<'_>) {
    let (mut worst, mut name, mut sum, mut n) = (0.0, String::new(), 0.0, 0_u32);
    for point in &scales.site.points {
        for (i, oil) in scales.oils.iter().enumerate() {
            if oil.grease != takes_grease(point) {
                continue;
            }
            let took = best(2, || {
                black_box(mend(scales, point, i));
            });
            (sum, n) = (sum + took, n + 1);
            if took > worst {
                worst = took;
                name = format!("{} on {}", scales.site.oils[i].id, point.address());
            }
        }
    }
    let all = best(5, || {
        for point in &scales.site.points {
            black_box(scales.weigh(point));
        }
    });
    let one = all / scales.site.points.len() as f64;
    println!(
        "mend, {n} pairs             {:7.2} ms a pair, {:6.1} x weighing one machine",
        sum / f64::from(n) * 1e3,
        sum / f64::from(n) / one
    );
    println!(
        "mend, the dearest, {name}  {:7.2} ms, {:6.1} x weighing one machine, {} the {:.0} ms allowed",
        worst * 1e3,
        worst / one,
        verdict(worst, MEND),
        MEND * 1e3
    );
}

fn gaps(scales: &Scales<'_>) {
    let weighing = best(5, || {
        for point in &scales.site.points {
            black_box(scales.weigh(point));
        }
    });
    let took = best(5, || {
        let all = of_points(scales, &scales.site.points);
        black_box(ranked(&all));
    });
    println!(
        "gaps of the demonstration  {:7.2} ms, {:6.1} x weighing it, {} the {:.0} ms allowed",
        took * 1e3,
        took / weighing,
        verdict(took, GAPS),
        GAPS * 1e3
    );
}

fn main() {
    let rules = rulebook(&[assets::builtin_rules()]).unwrap_or_else(|f| panic!("{f:?}"));
    let site = demo(&rules);
    let scales =
        Scales::new(&site, &rules, Settings::default()).unwrap_or_else(|(oil, _)| panic!("{oil}"));
    mends(&scales);
    gaps(&scales);
}
