//! Symmetric positive definite systems whose entries lie near the diagonal.

/// A symmetric matrix with `width` entries on either side of the diagonal; the upper half is
/// kept, row by row.
#[derive(Clone, Debug)]
pub struct SymmetricBand {
    size: usize,
    width: usize,
    rows: Vec<f64>,
}

/// The matrix is not positive definite.
#[derive(Clone, Copy, Debug, PartialEq, thiserror::Error)]
#[error("pivot {pivot} in row {row}: the matrix is not positive definite")]
pub struct NotPositive {
    /// Where elimination stopped.
    pub row: usize,
    /// What stood on the diagonal there.
    pub pivot: f64,
}

impl SymmetricBand {
    /// All zero.
    pub fn zero(size: usize, width: usize) -> Self {
        Self {
            size,
            width,
            rows: vec![0.0; size * (width + 1)],
        }
    }

    /// Sets the entry in `row`, `offset` columns right of the diagonal, and its mirror image.
    pub fn set(&mut self, row: usize, offset: usize, value: f64) {
        self.rows[row * (self.width + 1) + offset] = value;
    }

    /// Solves by elimination without exchange of rows; `rhs` becomes the solution.
    ///
    /// # Errors
    /// [`NotPositive`] at the first pivot that is not above zero.
    pub fn solve(mut self, rhs: &mut [f64]) -> Result<(), NotPositive> {
        let stride = self.width + 1;
        for k in 0..self.size {
            let (head, tail) = self.rows.split_at_mut((k + 1) * stride);
            let pivot_row = &head[k * stride..];
            let pivot = pivot_row[0];
            if pivot.is_nan() || pivot <= 0.0 {
                return Err(NotPositive { row: k, pivot });
            }
            let below = self.width.min(self.size - 1 - k);
            for d in 1..=below {
                let factor = pivot_row[d] / pivot;
                if factor != 0.0 {
                    let row = &mut tail[(d - 1) * stride..][..stride - d];
                    for (a, p) in row.iter_mut().zip(&pivot_row[d..]) {
                        *a -= factor * p;
                    }
                    rhs[k + d] -= factor * rhs[k];
                }
            }
        }
        for k in (0..self.size).rev() {
            let row = &self.rows[k * stride..(k + 1) * stride];
            let below = self.width.min(self.size - 1 - k);
            let known: f64 = (1..=below).map(|d| row[d] * rhs[k + d]).sum();
            rhs[k] = (rhs[k] - known) / row[0];
        }
        Ok(())
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn undoes_a_multiplication() {
        let (size, width) = (40, 5);
        let entry = |i: usize, j: usize| {
            if i == j {
                12.0 + i as f64
            } else {
                1.0 / (1.0 + (i + j) as f64 + i.abs_diff(j) as f64)
            }
        };
        let mut band = SymmetricBand::zero(size, width);
        for i in 0..size {
            for d in 0..=width.min(size - 1 - i) {
                band.set(i, d, entry(i, i + d));
            }
        }
        let wanted: Vec<f64> = (0..size).map(|i| (i as f64 - 7.0) * 0.3).collect();
        let near = |i: usize| i.saturating_sub(width)..(i + width + 1).min(size);
        let mut x: Vec<f64> = (0..size)
            .map(|i| near(i).map(|j| entry(i, j) * wanted[j]).sum())
            .collect();
        band.solve(&mut x).unwrap();
        for (got, want) in x.iter().zip(&wanted) {
            assert!((got - want).abs() < 1e-12);
        }
    }

    #[test]
    fn refuses_an_indefinite_matrix() {
        let mut band = SymmetricBand::zero(2, 1);
        band.set(0, 0, 1.0);
        band.set(0, 1, 2.0);
        band.set(1, 0, 1.0);
        let refused = band.solve(&mut [1.0, 1.0]);
        assert_eq!(
            refused,
            Err(NotPositive {
                row: 1,
                pivot: -3.0
            })
        );
    }
}
