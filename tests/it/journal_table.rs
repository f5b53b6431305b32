//! The committed journal-bearing table against the solver that made it.

#![expect(clippy::print_stdout, reason = "the worst row is worth reading")]

use crate::chance::Chance;
use filmwright::quantity::Measure;
use filmwright::quantity::convert::number;
use filmwright::relation::journal::reynolds::{Grid, solve};
use filmwright::relation::journal::table::{
    Cut, ECCENTRICITIES, HEADING, WIDTH_RATIOS, solved_line,
};
use rayon::prelude::*;

const FILE: &str = "src/relation/journal/table.csv";
const COMMITTED: &str = include_str!("../../src/relation/journal/table.csv");

fn nodes() -> Vec<(f64, f64)> {
    let row = |b: f64| ECCENTRICITIES.iter().map(move |e| (b, *e));
    WIDTH_RATIOS.iter().flat_map(|b| row(*b)).collect()
}

/// Run with `cargo test rewrite_the_journal_table -- --ignored` after a change of the solver.
#[test]
#[ignore = "rewrites the committed table; takes minutes without optimisation"]
#[expect(
    clippy::disallowed_methods,
    reason = "a test that writes a source file"
)]
fn rewrite_the_journal_table() {
    let mut text = String::from(
        "# full journal bearing, solved by relation/journal/reynolds.rs on its fine grid\n",
    );
    text.push_str(HEADING);
    text.push('\n');
    for (b, e) in nodes() {
        text.push_str(&solved_line(number(e), number(b)).unwrap());
        text.push('\n');
    }
    std::fs::write(FILE, text).unwrap();
}

#[test]
fn a_sample_solved_again_gives_the_committed_lines() {
    let lines: Vec<&str> = COMMITTED.lines().skip(2).collect();
    let nodes = nodes();
    assert_eq!(lines.len(), nodes.len());
    // every 19th node: all width ratios and, over the sample, the whole range of eccentricity
    let sample: Vec<usize> = (0..nodes.len()).step_by(19).collect();
    sample.par_iter().for_each(|i| {
        let (b, e) = nodes[*i];
        let again = solved_line(number(e), number(b)).unwrap();
        let parts = again.split(',').zip(lines[*i].split(','));
        for (new, old) in parts {
            let (new, old): (f64, f64) = (new.parse().unwrap(), old.parse().unwrap());
            assert!(
                (new - old).abs() <= 2e-7,
                "{b} {e}: {again} / {}",
                lines[*i]
            );
        }
    });
}

/// Between the nodes: load within 0.5 % of the solver, the rest within half a per cent of its
/// own range or, for the two places that a grid only brackets, within a degree.
#[test]
fn interpolation_agrees_with_the_solver_on_a_random_grid() {
    let mut chance = Chance::seeded(20_240_607);
    let points: Vec<(f64, f64)> = (0..160)
        .map(|_| (chance.between(0.25, 2.0), chance.between(0.001, 0.97)))
        .collect();
    let errors: Vec<[f64; 7]> = points
        .par_iter()
        .map(|(b, e)| {
            let cut = Cut::at(number(*b)).unwrap();
            let table = cut.characteristic(number(*e)).unwrap();
            let solved = solve(number(*e), number(*b), Grid::QUICK).unwrap();
            let s = solved.characteristic;
            [
                (table.so.base() / s.so.base() - 1.0).abs(),
                (table.attitude.base() - s.attitude.base())
                    .abs()
                    .to_degrees(),
                (table.flow.base() / s.flow.base() - 1.0).abs(),
                (table.side_share.base() - s.side_share.base()).abs(),
                (table.mean_over_peak.base() / s.mean_over_peak.base() - 1.0).abs(),
                (table.peak_at.base() - s.peak_at.base()).abs().to_degrees(),
                (table.rupture_at.base() - s.rupture_at.base())
                    .abs()
                    .to_degrees(),
            ]
        })
        .collect();
    let worst = |c: usize| errors.iter().map(|e| e[c]).fold(0.0, f64::max);
    println!(
        "worst over {} points: {:?}",
        points.len(),
        [0, 1, 2, 3, 4, 5, 6].map(worst)
    );
    assert!(worst(0) < 0.005, "load {}", worst(0));
    assert!(worst(1) < 0.2, "attitude {}", worst(1));
    assert!(worst(2) < 0.005, "flow {}", worst(2));
    assert!(worst(3) < 0.005, "side share {}", worst(3));
    assert!(worst(4) < 0.005, "peak {}", worst(4));
    assert!(worst(5) < 1.0, "peak angle {}", worst(5));
    assert!(worst(6) < 1.5, "rupture angle {}", worst(6));
}

/// A grid twice as fine has a quarter of the error.
#[test]
fn halving_the_grid_quarters_the_error() {
    for (b, e) in [(0.25, 0.3), (0.5, 0.8), (1.0, 0.5), (1.0, 0.95), (2.0, 0.7)] {
        let at = |grid| {
            solve(number(e), number(b), grid)
                .unwrap()
                .loads
                .map(Measure::base)
        };
        let [coarse, middle] = at(Grid::QUICK);
        let [_, fine] = at(Grid::FINE);
        let order = libm::log2((coarse - middle) / (middle - fine));
        // at high eccentricity the rupture line, which moves by whole nodes, blurs the order
        assert!((1.7..2.6).contains(&order), "{b} {e}: order {order}");
    }
}

/// What is drawn in leaves at the edges or past the rupture.
#[test]
fn no_oil_is_lost() {
    for (b, e) in [
        (0.25, 0.1),
        (0.25, 0.97),
        (0.6, 0.6),
        (1.0, 0.5),
        (2.0, 0.05),
        (2.0, 0.97),
    ] {
        let solved = solve(number(e), number(b), Grid::QUICK).unwrap();
        let lost = solved.imbalance.base();
        assert!(
            lost.abs() < 1e-3,
            "{b} {e}: {lost} of the oil is unaccounted for"
        );
    }
}

/// Below 0.25 the table runs into the short bearing without a step.
#[test]
fn the_short_bearing_is_the_limit() {
    for e in [0.05, 0.4, 0.7, 0.9, 0.97] {
        let at = |b: f64| {
            let c = Cut::at(number(b))
                .unwrap()
                .characteristic(number(e))
                .unwrap();
            c.so.base() / (b * b)
        };
        assert!((at(0.2499) / at(0.2501) - 1.0).abs() < 1e-3);
        let short = filmwright::relation::journal::short::load_number(number(e), number(1.0));
        assert!((at(0.01) / short.base() - 1.0).abs() < 0.02, "{e}");
        let solved = solve(number(e), number(0.2), Grid::QUICK)
            .unwrap()
            .characteristic;
        assert!(
            (at(0.2) * 0.04 / solved.so.base() - 1.0).abs() < 0.005,
            "{e}"
        );
    }
}
