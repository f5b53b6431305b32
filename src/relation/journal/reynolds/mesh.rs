//! The grid of the journal bearing and its difference equations.

use crate::numeric::complementarity::FivePoint;
use crate::numeric::math::{cos, sin};
use std::f64::consts::PI;

/// How much closer the lines lie at the edge: spacing 1.4 in the middle to 0.2 at the edge.
const GRADING: f64 = 0.4;

/// Share of the eccentricity that bends the angle. At one it would be Sommerfeld's substitution
/// itself, which leaves too few lines at the widest gap to read the oil drawn in there.
const BENDING: f64 = 0.8;

/// Half a bearing, cut at the widest gap and at the middle of the width.
///
/// Columns run around: `tan(t/2) = sqrt((1+k)/(1-k)) tan(g/2)` with `g` uniform. Rows run from
/// the middle (row 0) towards the edge.
pub(super) struct Mesh {
    eccentricity: f64,
    bend: f64,
    /// `(D/B)^2`.
    aspect: f64,
    pub(super) around: usize,
    pub(super) across: usize,
}

impl Mesh {
    pub(super) fn new(eccentricity: f64, width_ratio: f64, around: usize, across: usize) -> Self {
        Self {
            eccentricity,
            bend: BENDING * eccentricity,
            aspect: 1.0 / (width_ratio * width_ratio),
            around,
            across,
        }
    }

    /// Uniform step around.
    pub(super) fn step(&self) -> f64 {
        2.0 * PI / self.around as f64
    }

    fn squeeze(&self, column: f64) -> f64 {
        1.0 - self.bend * cos(column * self.step())
    }

    /// `(cos t, sin t)` at a column, whole or not.
    pub(super) fn direction(&self, column: f64) -> (f64, f64) {
        let g = column * self.step();
        let squeeze = self.squeeze(column);
        let root = (1.0 - self.bend * self.bend).sqrt();
        ((cos(g) - self.bend) / squeeze, root * sin(g) / squeeze)
    }

    /// Gap over clearance.
    pub(super) fn gap(&self, column: f64) -> f64 {
        1.0 + self.eccentricity * self.direction(column).0
    }

    /// `dt/dg`.
    pub(super) fn pace(&self, column: f64) -> f64 {
        (1.0 - self.bend * self.bend).sqrt() / self.squeeze(column)
    }

    /// Place of a row, 0 in the middle and 1 at the edge.
    fn place(&self, row: f64) -> f64 {
        let s = row / self.across as f64;
        s + GRADING * (s - s * s * s)
    }

    /// Width that a row stands for in the balance of its cell.
    fn breadth(&self, row: usize) -> f64 {
        let y = row as f64;
        let low = if row == 0 { 0.0 } else { self.place(y - 0.5) };
        let high = if row == self.across {
            1.0
        } else {
            self.place(y + 0.5)
        };
        high - low
    }

    /// Weight of a row in Simpson's rule over the half width.
    pub(super) fn weight(&self, row: usize) -> f64 {
        let s = row as f64 / self.across as f64;
        let share = match row {
            _ if row == 0 || row == self.across => 1.0,
            _ if row % 2 == 1 => 4.0,
            _ => 2.0,
        };
        share / (3.0 * self.across as f64) * (1.0 + GRADING * (1.0 - 3.0 * s * s))
    }

    /// Conductance `H^3` along the circumference at a face between columns.
    pub(super) fn along(&self, face: f64) -> f64 {
        let h = self.gap(face);
        h * h * h / self.pace(face) / self.step()
    }

    /// Conductance `(D/B)^2 H^3` towards the edge from a row to the next.
    fn aside(&self, column: usize, row: usize) -> f64 {
        let (x, y) = (column as f64, row as f64);
        let h = self.gap(x);
        let cell = self.aspect * h * h * h * self.pace(x) * self.step();
        cell / (self.place(y + 1.0) - self.place(y))
    }

    /// How much the gap opens over a column's cell.
    pub(super) fn opening(&self, column: usize) -> f64 {
        let x = column as f64;
        self.gap(x + 0.5) - self.gap(x - 0.5)
    }

    /// Side flow through the edge of a column's cell, from the balance of the half cell there.
    pub(super) fn leak(&self, column: usize, beside: f64) -> f64 {
        let through = self.aside(column, self.across - 1) * beside;
        through - 6.0 * self.opening(column) * self.breadth(self.across)
    }

    /// Balance of flow over every cell, second order in both steps.
    pub(super) fn equations(&self) -> FivePoint {
        let (columns, rows) = (self.around - 1, self.across);
        let mut equations = FivePoint::zero(columns, rows);
        let breadths: Vec<f64> = (0..rows).map(|row| self.breadth(row)).collect();
        for column in 1..self.around {
            let x = column as f64;
            let (before, after) = (self.along(x - 0.5), self.along(x + 0.5));
            let source = -6.0 * self.opening(column);
            let mut inner = 0.0;
            for (row, breadth) in breadths.iter().enumerate() {
                let outer = self.aside(column, row);
                let node = (column - 1) * rows + row;
                equations.diagonal[node] = (before + after) * breadth + inner + outer;
                equations.next_column[node] = after * breadth;
                equations.next_row[node] = outer;
                equations.source[node] = source * breadth;
                inner = outer;
            }
        }
        equations
    }
}
