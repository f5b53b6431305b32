//! The settings of a point's unknowns that are judged: ends and interior of every range.

use super::{Demands, Scenario, demands};
use crate::model::Point;
use crate::model::rulebook::Rulebook;
use crate::model::site::House;
use crate::trace::{Derivation, Silent};

/// Up to so many unknowns every combination of both ends and the middle is tried.
const FULL_GRID: usize = 3;
/// Up to so many, every combination of ends.
const CORNERS: usize = 6;

/// Everything about the demands of one point.
#[derive(Clone, Debug)]
pub struct PointDemands {
    /// The calculation, every unknown in the middle of its range.
    pub trace: Derivation,
    /// The demands in that setting.
    pub middle: Demands,
    /// All settings judged; the middle alone where nothing is unknown.
    pub settings: Vec<Demands>,
    /// The shares of each setting.
    pub shares: Vec<Scenario>,
}

/// Works out the demands of a point in every setting of its unknowns.
pub fn point_demands(point: &Point, house: &House, rules: &Rulebook) -> PointDemands {
    let mut trace = Derivation::new();
    let middle = demands(&mut trace, point, house, rules, &Scenario::middle());
    let shares = settings(middle.axes.len());
    let settings = if shares.len() == 1 {
        vec![middle.clone()]
    } else {
        shares
            .iter()
            .map(|s| demands(&mut Silent, point, house, rules, s))
            .collect()
    };
    PointDemands {
        trace,
        middle,
        settings,
        shares,
    }
}

/// The same without the calculation written down: for points that are tried many times.
pub fn untraced(point: &Point, house: &House, rules: &Rulebook) -> PointDemands {
    let (settings, shares) = every_setting(point, house, rules);
    PointDemands {
        trace: Derivation::new(),
        middle: settings[0].clone(),
        settings,
        shares,
    }
}

/// The demands in every setting of the unknowns and the shares of each, the middle first.
pub fn every_setting(
    point: &Point,
    house: &House,
    rules: &Rulebook,
) -> (Vec<Demands>, Vec<Scenario>) {
    let middle = demands(&mut Silent, point, house, rules, &Scenario::middle());
    let shares = settings(middle.axes.len());
    let mut all = vec![middle];
    all.extend(
        shares[1..]
            .iter()
            .map(|s| demands(&mut Silent, point, house, rules, s)),
    );
    (all, shares)
}

/// The settings for so many unknowns, the middle first.
pub fn settings(axes: usize) -> Vec<Scenario> {
    let mut all = vec![of_shares(vec![0.5; axes])];
    if axes == 0 {
        return all;
    }
    if axes <= FULL_GRID {
        all.extend(grid(axes, &[0.0, 0.5, 1.0]));
    } else if axes <= CORNERS {
        all.extend(grid(axes, &[0.0, 1.0]));
    } else {
        all.extend(one_at_a_time(axes));
    }
    let middle = all[0].clone();
    let mut seen = vec![middle];
    for setting in all {
        if !seen.contains(&setting) {
            seen.push(setting);
        }
    }
    seen
}

fn of_shares(shares: Vec<f64>) -> Scenario {
    Scenario {
        shares,
        ..Scenario::default()
    }
}

fn grid(axes: usize, levels: &[f64]) -> Vec<Scenario> {
    let mut all = vec![Vec::new()];
    for _ in 0..axes {
        all = all
            .into_iter()
            .flat_map(|shares: Vec<f64>| {
                levels.iter().map(move |level| {
                    let mut next = shares.clone();
                    next.push(*level);
                    next
                })
            })
            .collect();
    }
    all.into_iter().map(of_shares).collect()
}

/// Beyond six unknowns: all low, all high, and each alone at either end with the others at
/// either end; every limit moves one way with each of its inputs, so the extremes are among them
/// unless two limits pull one input apart.
fn one_at_a_time(axes: usize) -> Vec<Scenario> {
    let mut all = Vec::new();
    for rest in [0.0, 0.5, 1.0] {
        all.push(of_shares(vec![rest; axes]));
        for axis in 0..axes {
            for end in [0.0, 1.0] {
                let mut shares = vec![rest; axes];
                shares[axis] = end;
                all.push(of_shares(shares));
            }
        }
    }
    all
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn ends_and_interior_are_tried_once_each() {
        assert_eq!(settings(0).len(), 1);
        assert_eq!(settings(1).len(), 3);
        assert_eq!(settings(2).len(), 9);
        assert_eq!(settings(5).len(), 33);
        assert_eq!(settings(5)[0].shares, vec![0.5; 5]);
        assert!(settings(8).len() < 60);
    }
}
