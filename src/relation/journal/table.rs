//! The Reynolds solution, tabulated once and interpolated when used.
//!
//! The file beside this one holds a line for every node; a test solves a sample of them again,
//! and rewrites the file on request. The load is kept as its ratio to that of the short bearing,
//! which is one at zero width and varies slowly, so that the table joins the short bearing
//! without a step. What its reciprocal exceeds one by is levelled and interpolated, cubic in both
//! directions.

use super::characteristic::Characteristic;
use super::reynolds::{Grid, solve};
use super::short;
use crate::numeric::complementarity::Unsettled;
use crate::numeric::interpolate::Cubic;
use crate::numeric::root::bracketed;
use crate::quantity::convert::number;
use crate::quantity::{Angle, Measure, Ratio};
use crate::relation::Law;
use std::fmt::Write as _;
use std::sync::LazyLock;

/// The tabulated solution.
pub static LAW: Law = Law {
    name: "journal-eccentricity",
    title: "eccentricity and attitude of a finite journal bearing",
    formula: "So(e, B/D) from the Reynolds equation, solved for e",
    range: "full bearing fed at the widest gap, laminar; B/D 0.25 to 2, e to 0.97; \
            below 0.25 the short-bearing form with an end correction",
    source: "Reynolds equation with the Reynolds cavitation condition, solved and tabulated by \
             the program; interpolation within 0.5 % of the solution in S",
};

/// Width ratios of the table; zero is the short-bearing limit.
pub const WIDTH_RATIOS: [f64; 14] = [
    0.0, 0.1, 0.175, 0.25, 0.35, 0.45, 0.55, 0.7, 0.85, 1.0, 1.25, 1.5, 1.75, 2.0,
];

/// Eccentricities of the table; the last one only steadies the interpolation before it.
pub const ECCENTRICITIES: [f64; 27] = [
    0.0, 0.05, 0.1, 0.15, 0.2, 0.25, 0.3, 0.35, 0.4, 0.45, 0.5, 0.55, 0.6, 0.65, 0.7, 0.75, 0.8,
    0.825, 0.85, 0.875, 0.9, 0.915, 0.93, 0.945, 0.96, 0.97, 0.98,
];

/// Largest width ratio the table answers for.
pub const WIDEST: f64 = 2.0;
/// Width ratio under which the short-bearing form takes over.
pub const SHORT: f64 = 0.25;
/// Largest eccentricity the table answers for.
pub const FURTHEST: f64 = 0.97;

const COLUMNS: usize = 7;
const LINES: &str = include_str!("table.csv");

/// One value of every column at one node.
type Node = [f64; COLUMNS];

static NODES: LazyLock<Vec<Vec<Node>>> = LazyLock::new(|| {
    read(LINES).expect("the committed table is complete: a test reads it node by node")
});

/// Reads the file: node lines in order of width ratio, then eccentricity.
fn read(text: &str) -> Option<Vec<Vec<Node>>> {
    let mut lines = text.lines().filter(|l| !l.starts_with('#')).skip(1);
    let mut nodes = Vec::new();
    for width_ratio in WIDTH_RATIOS {
        let mut row = Vec::new();
        for eccentricity in ECCENTRICITIES {
            let mut numbers = lines.next()?.split(',').map(str::parse::<f64>);
            let mut next = || numbers.next()?.ok();
            let off = (next()? - width_ratio).abs() + (next()? - eccentricity).abs();
            if off > 1e-12 {
                return None;
            }
            let mut node = [0.0; COLUMNS];
            for value in &mut node {
                *value = next()?;
            }
            // a wide bearing carries 1/(1 - e), a short one 1/(1 - e)^2: level between the two
            node[0] = (1.0 / node[0] - 1.0) * (1.0 - eccentricity);
            row.push(node);
        }
        nodes.push(row);
    }
    lines.next().is_none().then_some(nodes)
}

/// Head of the file.
pub const HEADING: &str = "width_ratio,eccentricity,load_over_short,attitude_rad,flow,side_share,\
                           mean_over_peak,peak_rad,rupture_rad";

/// The line of a node as it should stand in the file, solved afresh.
///
/// # Errors
/// [`Unsettled`] where the solver fails.
pub fn solved_line(eccentricity: Ratio, width_ratio: Ratio) -> Result<String, Unsettled> {
    let solved = if width_ratio.base() == 0.0 {
        short::characteristic(eccentricity, number(1.0))
    } else {
        solve(eccentricity, width_ratio, Grid::FINE)?.characteristic
    };
    let ratio = if width_ratio.base() == 0.0 {
        1.0
    } else {
        solved.so.base() / short::load_number(solved.eccentricity, width_ratio).base()
    };
    let mut line = format!("{},{}", width_ratio.base(), eccentricity.base());
    let values = [
        ratio,
        solved.attitude.base(),
        solved.flow.base(),
        solved.side_share.base(),
        solved.mean_over_peak.base(),
        solved.peak_at.base(),
        solved.rupture_at.base(),
    ];
    for value in values {
        // writing into a string cannot fail
        let _ = write!(line, ",{value:.7}");
    }
    Ok(line)
}

/// The table cut at one width ratio.
#[derive(Clone, Copy, Debug)]
pub struct Cut {
    width_ratio: f64,
    cubic: Cubic,
    /// The levelled load at every eccentricity, which inversion reads over and over.
    lacks: [f64; ECCENTRICITIES.len()],
}

impl Cut {
    /// Cuts the table; `None` above a width ratio of 2 or below zero.
    pub fn at(width_ratio: Ratio) -> Option<Self> {
        let cubic = Cubic::at(&WIDTH_RATIOS, width_ratio.base())?;
        let nodes = &*NODES;
        let lacks = std::array::from_fn(|node| cubic.of(|row| nodes[row][node][0]));
        Some(Self {
            width_ratio: width_ratio.base(),
            cubic,
            lacks,
        })
    }

    /// Whether the short-bearing form stands behind the numbers.
    pub fn is_short(&self) -> bool {
        self.width_ratio < SHORT
    }

    /// Everything at an eccentricity; `None` above 0.97 or below zero.
    pub fn characteristic(&self, eccentricity: Ratio) -> Option<Characteristic> {
        let e = eccentricity.base();
        if e > FURTHEST {
            return None;
        }
        let along = Cubic::at(&ECCENTRICITIES, e)?;
        let column = |c: usize| self.column(&along, c);
        Some(Characteristic {
            eccentricity,
            so: number(self.load(e)),
            attitude: Angle::from_base(column(1)),
            flow: number(column(2)),
            side_share: number(column(3)),
            mean_over_peak: number(column(4)),
            peak_at: Angle::from_base(column(5)),
            rupture_at: Angle::from_base(column(6)),
        })
    }

    /// The eccentricity at which the film carries that load number; `None` beyond 0.97.
    pub fn carrying(&self, so: Ratio) -> Option<Characteristic> {
        let left = |e: f64| self.load(e) - so.base();
        let root = bracketed(0.0, FURTHEST, left).ok()?;
        self.characteristic(number(root.at))
    }

    /// The load number at the largest eccentricity of the table.
    pub fn most(&self) -> Ratio {
        number(self.load(FURTHEST))
    }

    /// Load number at an eccentricity; not a number outside the table.
    fn load(&self, e: f64) -> f64 {
        let along = Cubic::at(&ECCENTRICITIES, e);
        let lack = along.map_or(f64::NAN, |along| along.of(|node| self.lacks[node]));
        let short = short::load_number(number(e), number(self.width_ratio)).base();
        short / (1.0 + lack / (1.0 - e))
    }

    fn column(&self, along: &Cubic, column: usize) -> f64 {
        let nodes = &*NODES;
        self.cubic
            .of(|row| along.of(|node| nodes[row][node][column]))
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_file_is_complete() {
        let nodes = read(LINES).expect("every node in order");
        for (b, row) in WIDTH_RATIOS.iter().zip(&nodes) {
            for (e, node) in ECCENTRICITIES.iter().zip(row) {
                assert!(node.iter().all(|v| v.is_finite()), "{b} {e}");
            }
        }
    }

    #[test]
    fn load_rises_with_eccentricity_and_width() {
        let mut narrower = vec![0.0; 98];
        for b in 1..=200 {
            let cut = Cut::at(number(f64::from(b) / 100.0)).unwrap();
            let mut before = -1.0;
            for (e, narrow) in narrower.iter_mut().enumerate() {
                let c = cut.characteristic(number(e as f64 / 100.0)).unwrap();
                assert!(c.so.base() > before, "{b} {e}");
                assert!(e == 0 || c.so.base() > *narrow, "{b} {e}");
                (before, *narrow) = (c.so.base(), c.so.base());
            }
        }
    }

    #[test]
    fn refuses_what_it_does_not_hold() {
        assert!(Cut::at(number(2.01)).is_none());
        let cut = Cut::at(number(1.0)).unwrap();
        assert!(cut.characteristic(number(0.971)).is_none());
        assert!(cut.carrying(number(1.01 * cut.most().base())).is_none());
    }
}
