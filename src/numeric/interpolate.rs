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

/// Weights of four neighbouring nodes, from `first` on, for a value between the middle two (or
/// in the end intervals of the table).
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Cubic {
    /// Index of the first of the four nodes.
    pub first: usize,
    /// Their weights, which sum to one.
    pub weights: [f64; 4],
}

impl Cubic {
    /// Cubic interpolation at `x` with a continuous slope: at every node the slope of the
    /// parabola through it and its neighbours. Exact for parabolas. `xs` strictly rising, at
    /// least four. `None` outside the table.
    pub fn at(xs: &[f64], x: f64) -> Option<Self> {
        let (low, high) = (*xs.first()?, *xs.last()?);
        if xs.len() < 4 || !(low..=high).contains(&x) {
            return None;
        }
        let left = xs.partition_point(|t| *t <= x).clamp(1, xs.len() - 1) - 1;
        let first = left.saturating_sub(1).min(xs.len() - 4);
        let near = [xs[first], xs[first + 1], xs[first + 2], xs[first + 3]];
        Some(Self {
            first,
            weights: hermite(near, left - first, x),
        })
    }

    /// The value, where `get` gives the tabulated value at a node.
    pub fn of(self, get: impl Fn(usize) -> f64) -> f64 {
        let nodes = self.first..;
        self.weights
            .iter()
            .zip(nodes)
            .map(|(w, i)| w * get(i))
            .sum()
    }
}

/// Hermite's cubic between nodes `left` and `left + 1` of four, as weights.
fn hermite(xs: [f64; 4], left: usize, x: f64) -> [f64; 4] {
    let step = xs[left + 1] - xs[left];
    let t = (x - xs[left]) / step;
    let (square, cube) = (t * t, t * t * t);
    let start = slope(xs, left);
    let end = slope(xs, left + 1);
    let mut weights = [0.0; 4];
    weights[left] = 2.0 * cube - 3.0 * square + 1.0;
    weights[left + 1] = 3.0 * square - 2.0 * cube;
    for (weight, (start, end)) in weights.iter_mut().zip(start.iter().zip(&end)) {
        *weight += step * ((cube - 2.0 * square + t) * start + (cube - square) * end);
    }
    weights
}

/// Slope at a node of four, of the parabola through the node and its neighbours, as weights.
fn slope(xs: [f64; 4], node: usize) -> [f64; 4] {
    let from = node.clamp(1, 2) - 1;
    let (a, b, c) = (xs[from], xs[from + 1], xs[from + 2]);
    let x = xs[node];
    let mut weights = [0.0; 4];
    weights[from] = ((x - b) + (x - c)) / ((a - b) * (a - c));
    weights[from + 1] = ((x - a) + (x - c)) / ((b - a) * (b - c));
    weights[from + 2] = ((x - a) + (x - b)) / ((c - a) * (c - b));
    weights
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

    const NODES: [f64; 7] = [0.0, 0.1, 0.3, 0.7, 1.0, 1.2, 2.0];

    fn cubic(x: f64, f: impl Fn(f64) -> f64) -> f64 {
        let cubic = Cubic::at(&NODES, x).unwrap();
        cubic.of(|i| f(NODES[i]))
    }

    #[test]
    fn cubic_is_exact_for_parabolas_and_smooth_at_nodes() {
        let parabola = |x: f64| 2.0 - 3.0 * x + 0.7 * x * x;
        for i in 0..=200 {
            let x = f64::from(i) / 100.0;
            assert!((cubic(x, parabola) - parabola(x)).abs() < 1e-14, "{x}");
        }
        let wave = |x: f64| 1.0 / (0.3 + x);
        for node in &NODES[1..6] {
            let d = 1e-6;
            let before = (cubic(*node, wave) - cubic(node - d, wave)) / d;
            let after = (cubic(node + d, wave) - cubic(*node, wave)) / d;
            assert!((before - after).abs() < 1e-3, "{node}");
        }
        assert_eq!(Cubic::at(&NODES, 2.1), None);
    }
}
