//! The finite journal bearing: Reynolds equation with the Reynolds cavitation condition.
//!
//! With `H = 1 + e cos t` (`t` from the widest gap), `Z = 2z/B`, `P = p psi^2/(eta omega)`:
//! `d/dt(H^3 dP/dt) + (D/B)^2 d/dZ(H^3 dP/dZ) = 6 dH/dt`, `P = 0` at the widest gap and at both
//! edges, `P = dP/dn = 0` where the film ruptures. That last condition makes it an obstacle
//! problem, `min(P, A P - b) = 0`, settled on nested grids. Loads and flows of the two finest
//! grids differ by a fixed factor of four, so a third of the difference is added to the finer.

mod mesh;
mod readout;

use super::characteristic::Characteristic;
use crate::numeric::complementarity::Unsettled;
use crate::numeric::math::atan2;
use crate::quantity::convert::number;
use crate::quantity::{Angle, Measure, Ratio};
use crate::relation::Law;
use mesh::Mesh;
use readout::Readout;

/// The solution of the Reynolds equation.
pub static LAW: Law = Law {
    name: "journal-reynolds",
    title: "load, attitude and flow of a finite journal bearing",
    formula: "d/dt(H^3 dP/dt) + (D/B)^2 d/dZ(H^3 dP/dZ) = 6 dH/dt, H = 1 + e cos t",
    range: "full bearing fed at the widest gap, laminar, one viscosity, aligned shaft",
    source: "Reynolds equation with the Reynolds cavitation condition, solved by the program; \
             within 1.5 % of the table of Raimondi and Boyd 1958 in S to e 0.9",
};

/// How fine the grid is.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Grid {
    /// Steps around the bearing on the finest grid.
    pub around: usize,
    /// Steps from the middle to the edge on the finest grid.
    pub across: usize,
    /// Grids, each twice as fine as the one before; at least two, and the coarsest must still
    /// have an even number of steps both ways.
    pub levels: u32,
}

impl Grid {
    /// The grid the table is made with.
    pub const FINE: Self = Self {
        around: 384,
        across: 32,
        levels: 4,
    };
    /// For a single point: load within 0.01 % of the fine grid, in about a millisecond.
    pub const QUICK: Self = Self {
        around: 192,
        across: 16,
        levels: 3,
    };
}

/// A solved bearing with what its grid says about the error.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Solved {
    /// The extrapolated numbers.
    pub characteristic: Characteristic,
    /// Load numbers of the two finest grids, the finer last, as solved.
    pub loads: [Ratio; 2],
    /// Oil drawn in less oil leaving at the edges and past the rupture, over the oil drawn in,
    /// on the finest grid.
    pub imbalance: Ratio,
}

/// Solves for an eccentricity (0 to below 1) and a width ratio `B/D`.
///
/// # Errors
/// [`Unsettled`] where the cavitated region does not settle.
pub fn solve(eccentricity: Ratio, width_ratio: Ratio, grid: Grid) -> Result<Solved, Unsettled> {
    // the equation is linear in e near zero; its limit is read at an eccentricity that small
    let e = eccentricity.base().max(1e-5);
    let mut free: Option<Vec<bool>> = None;
    let mut readouts = Vec::new();
    for level in (0..grid.levels).rev() {
        let mesh = Mesh::new(
            e,
            width_ratio.base(),
            grid.around >> level,
            grid.across >> level,
        );
        let start = match &free {
            None => vec![true; (mesh.around - 1) * mesh.across],
            Some(coarse) => refined(coarse, &mesh),
        };
        let settled = mesh.equations().settle(start)?;
        readouts.push(readout::read(&mesh, &settled.values));
        free = Some(settled.values.iter().map(|v| *v > 0.0).collect());
    }
    let fine = readouts[readouts.len() - 1];
    let coarse = readouts[readouts.len().saturating_sub(2)];
    Ok(Solved {
        characteristic: extrapolated(e, coarse, fine),
        loads: [coarse, fine].map(|r| number(load(r.radial, r.tangential))),
        imbalance: number((fine.inflow - fine.side - fine.carried) / fine.inflow),
    })
}

/// Film nodes of the coarser grid carried over to one twice as fine.
fn refined(coarse: &[bool], mesh: &Mesh) -> Vec<bool> {
    let rows = mesh.across / 2;
    let mut free = Vec::with_capacity((mesh.around - 1) * mesh.across);
    for column in 1..mesh.around {
        let above = column.div_ceil(2);
        for row in 0..mesh.across {
            let inside = above < mesh.around / 2;
            free.push(inside && coarse[(above - 1) * rows + row / 2]);
        }
    }
    free
}

fn load(radial: f64, tangential: f64) -> f64 {
    (radial * radial + tangential * tangential).sqrt()
}

/// Richardson's step on everything smooth; places of peak and rupture are taken as found.
fn extrapolated(e: f64, coarse: Readout, fine: Readout) -> Characteristic {
    let finer = |get: fn(&Readout) -> f64| get(&fine) + (get(&fine) - get(&coarse)) / 3.0;
    let (radial, tangential) = (finer(|r| r.radial), finer(|r| r.tangential));
    let so = load(radial, tangential);
    let inflow = finer(|r| r.inflow);
    Characteristic {
        eccentricity: number(e),
        so: number(so),
        attitude: Angle::from_base(atan2(tangential, radial)),
        flow: number(inflow),
        side_share: number(finer(|r| r.side) / inflow),
        mean_over_peak: number(so / finer(|r| r.peak)),
        peak_at: Angle::from_base(fine.peak_at),
        rupture_at: Angle::from_base(fine.rupture_at),
    }
}
