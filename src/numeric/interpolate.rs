//! Interpolation in ordered tables.

/// Straight-line interpolation of `y` at `x`; `xs` strictly rising, same length as `ys`.
/// `None` outside the table.
pub fn linear(xs: &[f64], ys: &[f64], x: f64) -> Option<f64> {
    let (first, last) = (*xs.first()?, *xs.last()?);
    if !(first..=last).contains(&x) {
        return None;
    }
    let i = xs.partition_point(|t| *t <= x).clamp(1, xs.len() - 1);
    let (x0, x1) = (xs[i - 1], xs[i]);
    let (y0, y1) = (ys[i - 1], ys[i]);
    Some(y0 + (y1 - y0) * (x - x0) / (x1 - x0))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn hits_its_nodes_and_does_not_extrapolate() {
        let (xs, ys) = ([1.0, 2.0, 4.0], [10.0, 20.0, 0.0]);
        assert_eq!(linear(&xs, &ys, 1.0), Some(10.0));
        assert_eq!(linear(&xs, &ys, 3.0), Some(10.0));
        assert_eq!(linear(&xs, &ys, 4.0), Some(0.0));
        assert_eq!(linear(&xs, &ys, 4.1), None);
    }
}
