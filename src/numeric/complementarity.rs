//! Obstacle problems on a grid: `u >= 0`, `A u >= b`, and at every node one of the two with
//! equality. Solved by policy iteration (Howard): each node takes the row that is violated more,
//! the linear problem is solved directly, and for a matrix of positive type the rows settle after
//! a few rounds.

use super::banded::{NotPositive, SymmetricBand};

/// Most rounds before giving up; nested grids need three to eight.
const ROUNDS: usize = 60;

/// Five-point equations on `columns` by `rows` nodes, the row index running fastest; the
/// neighbours beyond the border are zero unless the coupling says otherwise.
#[derive(Clone, Debug)]
pub struct FivePoint {
    /// Nodes in the slow direction.
    pub columns: usize,
    /// Nodes in the fast direction.
    pub rows: usize,
    /// Diagonal entries.
    pub diagonal: Vec<f64>,
    /// Minus the coupling to the next column.
    pub next_column: Vec<f64>,
    /// Minus the coupling to the next row; not used at the last row.
    pub next_row: Vec<f64>,
    /// Right-hand side.
    pub source: Vec<f64>,
}

/// A solution of the obstacle problem.
#[derive(Clone, Debug)]
pub struct Settled {
    /// Values at the nodes.
    pub values: Vec<f64>,
    /// Linear problems solved on the way.
    pub rounds: usize,
}

/// Why there is no solution.
#[derive(Clone, Copy, Debug, PartialEq, thiserror::Error)]
pub enum Unsettled {
    /// The equations are not of positive type.
    #[error(transparent)]
    NotPositive(#[from] NotPositive),
    /// The rows went on changing.
    #[error("{changing} nodes still change after {rounds} rounds")]
    Rounds {
        /// Rounds done.
        rounds: usize,
        /// Nodes whose row changed in the last one.
        changing: usize,
    },
}

impl FivePoint {
    /// All zero.
    pub fn zero(columns: usize, rows: usize) -> Self {
        let nodes = vec![0.0; columns * rows];
        Self {
            columns,
            rows,
            diagonal: nodes.clone(),
            next_column: nodes.clone(),
            next_row: nodes.clone(),
            source: nodes,
        }
    }

    /// Solves the obstacle problem; `free` marks the nodes to start with as off the obstacle.
    ///
    /// # Errors
    /// [`Unsettled`] where the matrix is not of positive type or the rounds run out.
    pub fn settle(&self, mut free: Vec<bool>) -> Result<Settled, Unsettled> {
        let mut changing = 0;
        for round in 1..=ROUNDS {
            let values = self.solve(&free)?;
            changing = 0;
            for (node, free) in free.iter_mut().enumerate() {
                let slack = self.excess(&values, node) / self.diagonal[node];
                let wanted = if *free {
                    values[node] > 0.0
                } else {
                    slack < 0.0
                };
                if wanted != *free {
                    *free = wanted;
                    changing += 1;
                }
            }
            if changing == 0 {
                return Ok(Settled {
                    values,
                    rounds: round,
                });
            }
        }
        Err(Unsettled::Rounds {
            rounds: ROUNDS,
            changing,
        })
    }

    /// The linear problem with `u = 0` at the nodes that are not free.
    fn solve(&self, free: &[bool]) -> Result<Vec<f64>, NotPositive> {
        let last = free
            .iter()
            .rposition(|f| *f)
            .map_or(0, |n| n / self.rows + 1);
        let size = last * self.rows;
        let mut band = SymmetricBand::zero(size, self.rows);
        let mut values = vec![0.0; free.len()];
        for node in 0..size {
            if !free[node] {
                band.set(node, 0, 1.0);
                continue;
            }
            band.set(node, 0, self.diagonal[node]);
            values[node] = self.source[node];
            if (node + 1) % self.rows != 0 && free[node + 1] {
                band.set(node, 1, -self.next_row[node]);
            }
            let beyond = node + self.rows;
            if beyond < size && free[beyond] {
                band.set(node, self.rows, -self.next_column[node]);
            }
        }
        band.solve(&mut values[..size])?;
        Ok(values)
    }

    /// `A u - b` at one node.
    fn excess(&self, u: &[f64], node: usize) -> f64 {
        let mut sum = self.diagonal[node] * u[node] - self.source[node];
        let row = node % self.rows;
        if row > 0 {
            sum -= self.next_row[node - 1] * u[node - 1];
        }
        if row + 1 < self.rows {
            sum -= self.next_row[node] * u[node + 1];
        }
        if node >= self.rows {
            sum -= self.next_column[node - self.rows] * u[node - self.rows];
        }
        if node + self.rows < u.len() {
            sum -= self.next_column[node] * u[node + self.rows];
        }
        sum
    }
}
