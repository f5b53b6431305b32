//! What the shortest list costs on a works of 300 machines and 60 oils, beside weighing it.
//!
//! `cargo bench --bench pool`

#![expect(clippy::print_stdout, reason = "a benchmark prints its figures")]

mod generate;
mod mix;

use filmwright::assets;
use filmwright::decide::pool::figures::pool;
use filmwright::decide::pool::{Outcome, Terms};
use filmwright::input::file::FileKind;
use filmwright::input::load::{self, With};
use filmwright::input::rules::rulebook;
use filmwright::model::Site;
use filmwright::model::rulebook::Rulebook;
use filmwright::problem::Problems;
use filmwright::relation::bearing::designation::DimensionTable;
use filmwright::source::SourceSet;
use filmwright::weighing::{Scales, Settings, Weighed};
use std::time::Instant;

/// Longest the list of 300 machines and 60 oils may take, s.
const ALLOWED: f64 = 10.0;

fn read(site: &str, oils: &str, rules: &Rulebook) -> Site {
    let mut set = SourceSet::new();
    let mut problems = Problems::new();
    let files = [
        (FileKind::Site, "site.yaml", site),
        (FileKind::Oils, "oils.yaml", oils),
    ];
    let trees: Vec<load::Tree> = files
        .iter()
        .map(|(kind, name, text)| load::take(&mut set, *kind, name, text.as_bytes(), &mut problems))
        .collect();
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

#[expect(clippy::disallowed_methods, reason = "a benchmark measures time")]
fn now() -> Instant {
    Instant::now()
}

fn one(name: &str, site: &str, oils: &str, rules: &Rulebook) {
    let site = read(site, oils, rules);
    let scales =
        Scales::new(&site, rules, Settings::default()).unwrap_or_else(|(oil, _)| panic!("{oil}"));
    let start = now();
    let weighed: Vec<Weighed<'_>> = site.points.iter().map(|p| scales.weigh(p)).collect();
    let weighing = start.elapsed().as_secs_f64();
    let start = now();
    let found = pool(&scales, &weighed, &Terms::default(), "2026-11-02")
        .unwrap_or_else(|wrong| panic!("{wrong}"));
    let took = start.elapsed().as_secs_f64();
    let Outcome::Solved(solved) = &found.outcome else {
        panic!("{name}: {:?}", found.outcome);
    };
    println!(
        "{name}: {:2} oils proven for {:3} decided (greedy {:2}, ties {}), {:7} nodes, {took:6.3} s   {:5.2} x weighing ({weighing:.3} s)",
        solved.bound,
        found.places.len(),
        solved.greedy,
        if solved.ties_proven {
            "all compared"
        } else {
            "NOT all compared"
        },
        solved.nodes,
        took / weighing
    );
    assert!(took <= ALLOWED, "{took} s where {ALLOWED} s are allowed");
}

fn main() {
    let rules = rulebook(&[assets::builtin_rules()]).unwrap_or_else(|f| panic!("{f:?}"));
    for seed in [1, 2, 3, 4, 5] {
        let (site, oils) = (mix::site(300, 60, seed), mix::oils(60, seed + 1));
        one(
            &format!("300 machines x 60 oils, seed {seed}"),
            &site,
            &oils,
            &rules,
        );
    }
    let (site, oils) = (generate::site(300, 60, 7, false), generate::oils(60, 11));
    one("300 gear drives x 60 gear oils ", &site, &oils, &rules);
}
