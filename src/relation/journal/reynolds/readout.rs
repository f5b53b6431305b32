//! Load, flow and peak from the pressures of a solved grid.

use super::mesh::Mesh;
use crate::numeric::math::atan2;
use std::f64::consts::PI;

/// What a solved grid says; angles in radians from the widest gap.
#[derive(Clone, Copy, Debug)]
pub(super) struct Readout {
    /// Load number along the line of centres and across it.
    pub(super) radial: f64,
    pub(super) tangential: f64,
    /// Oil drawn in at the widest gap, over `r c N B`.
    pub(super) inflow: f64,
    /// Oil leaving at both edges, the same unit.
    pub(super) side: f64,
    /// Oil carried past the rupture, the same unit.
    pub(super) carried: f64,
    pub(super) peak: f64,
    pub(super) peak_at: f64,
    pub(super) rupture_at: f64,
}

/// Pressures with the zero borders around them.
struct Pressures<'a> {
    mesh: &'a Mesh,
    values: &'a [f64],
}

impl Pressures<'_> {
    fn at(&self, column: usize, row: usize) -> f64 {
        let inside = (1..self.mesh.around).contains(&column) && row < self.mesh.across;
        if inside {
            self.values[(column - 1) * self.mesh.across + row]
        } else {
            0.0
        }
    }

    /// Column, with its fraction, where the film of a row ruptures: the pressure ends as a
    /// parabola, so its root ends as a straight line.
    fn rupture(&self, row: usize) -> f64 {
        let columns = 1..self.mesh.around;
        let last = columns.rev().find(|c| self.at(*c, row) > 0.0).unwrap_or(1);
        let (end, before) = (self.at(last, row).sqrt(), self.at(last - 1, row).sqrt());
        let beyond = if before > end {
            end / (before - end)
        } else {
            1.0
        };
        last as f64 + beyond.min(1.0)
    }

    /// Highest pressure in the middle of the width and its column, by a parabola.
    fn peak(&self) -> (f64, f64) {
        let columns = 1..self.mesh.around;
        let top = columns
            .max_by(|a, b| self.at(*a, 0).total_cmp(&self.at(*b, 0)))
            .unwrap_or(1);
        let (before, here, after) = (self.at(top - 1, 0), self.at(top, 0), self.at(top + 1, 0));
        let off = 0.5 * (before - after) / (before - 2.0 * here + after);
        (here - 0.25 * (before - after) * off, top as f64 + off)
    }
}

/// Reads everything from the pressures at the inner nodes.
pub(super) fn read(mesh: &Mesh, values: &[f64]) -> Readout {
    let p = Pressures { mesh, values };
    let (radial, tangential) = load(&p);
    let side = side_flow(&p);
    let (peak, peak_column) = p.peak();
    let rupture_at = angle(mesh, p.rupture(0));
    Readout {
        radial,
        tangential,
        inflow: inflow(&p),
        side,
        carried: carried(&p),
        peak,
        peak_at: angle(mesh, peak_column),
        rupture_at,
    }
}

/// Angle from the widest gap, 0 to 2 pi.
fn angle(mesh: &Mesh, column: f64) -> f64 {
    let (cosine, sine) = mesh.direction(column);
    let t = atan2(sine, cosine);
    if t < 0.0 { t + 2.0 * PI } else { t }
}

fn load(p: &Pressures) -> (f64, f64) {
    let (mut radial, mut tangential) = (0.0, 0.0);
    for column in 1..p.mesh.around {
        let rows = 0..p.mesh.across;
        let line: f64 = rows.map(|r| p.mesh.weight(r) * p.at(column, r)).sum();
        let (cosine, sine) = p.mesh.direction(column as f64);
        let arc = p.mesh.pace(column as f64) * p.mesh.step();
        radial -= 0.5 * line * cosine * arc;
        tangential += 0.5 * line * sine * arc;
    }
    (radial, tangential)
}

/// Couette flow of the widest gap less what the pressure pushes back, from the balance of the
/// half cell behind the cut.
fn inflow(p: &Pressures) -> f64 {
    let mesh = p.mesh;
    let rows = 0..mesh.across;
    let first: f64 = rows.map(|r| mesh.weight(r) * p.at(1, r)).sum();
    let narrowing = mesh.gap(0.0) - mesh.gap(0.5);
    let back = mesh.along(0.5) * first + 6.0 * narrowing - first_leak(p);
    PI * mesh.gap(0.0) - PI / 6.0 * back
}

/// What leaves through the edge of the half cell behind the cut, where the leak rises from zero
/// in proportion to the angle.
fn first_leak(p: &Pressures) -> f64 {
    p.mesh.leak(1, p.at(1, p.mesh.across - 1)) / 8.0
}

fn side_flow(p: &Pressures) -> f64 {
    let edge = p.mesh.across - 1;
    let columns = 1..p.mesh.around;
    let film = columns.filter(|c| p.at(*c, edge) > 0.0);
    let leaks: f64 = film.map(|c| p.mesh.leak(c, p.at(c, edge))).sum();
    PI / 6.0 * (leaks + first_leak(p))
}

fn carried(p: &Pressures) -> f64 {
    let rows = 0..=p.mesh.across;
    let edge = p.mesh.across - 1;
    let gap = |row: usize| p.mesh.gap(p.rupture(row.min(edge)));
    PI * rows.map(|r| p.mesh.weight(r) * gap(r)).sum::<f64>()
}
