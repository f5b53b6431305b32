//! Parts labels that would lie on each other, moving each as little as the order allows.

/// Moves positions on a line so that neighbours are at least `gap` apart and all lie within
/// `low ..= high`, keeping their order. Returns them in the order given. Where the space is too
/// small for all, the gap shrinks to what there is room for.
pub fn spread(wanted: &[f64], gap: f64, low: f64, high: f64) -> Vec<f64> {
    let count = wanted.len();
    if count == 0 {
        return Vec::new();
    }
    let mut order: Vec<usize> = (0..count).collect();
    order.sort_by(|a, b| wanted[*a].total_cmp(&wanted[*b]).then(a.cmp(b)));
    let room = (high - low) / (count.max(2) - 1) as f64;
    let gap = gap.min(room);
    let placed = settle(
        &order.iter().map(|i| wanted[*i]).collect::<Vec<_>>(),
        gap,
        low,
        high,
    );
    let mut out = vec![0.0; count];
    for (place, index) in order.iter().enumerate() {
        out[*index] = placed[place];
    }
    out
}

/// A run of labels that touch, moved as one block.
struct Block {
    first: f64,
    count: usize,
    sum: f64,
}

/// Positions in rising order, least squares: blocks that overlap are merged and centred.
fn settle(sorted: &[f64], gap: f64, low: f64, high: f64) -> Vec<f64> {
    let mut blocks: Vec<Block> = Vec::new();
    for wanted in sorted {
        let mut block = Block {
            first: *wanted,
            count: 1,
            sum: *wanted,
        };
        block.first = clamp_block(&block, gap, low, high);
        while let Some(before) = blocks.last() {
            if before.first + gap * before.count as f64 <= block.first {
                break;
            }
            // the new block's members hang on behind those of the one before
            let shift = gap * before.count as f64 * block.count as f64;
            block = Block {
                first: 0.0,
                count: before.count + block.count,
                sum: before.sum + block.sum - shift,
            };
            block.first = clamp_block(&block, gap, low, high);
            blocks.pop();
        }
        blocks.push(block);
    }
    blocks
        .iter()
        .flat_map(|block| (0..block.count).map(move |i| block.first + gap * i as f64))
        .collect()
}

fn clamp_block(block: &Block, gap: f64, low: f64, high: f64) -> f64 {
    let mean = block.sum / block.count as f64;
    let length = gap * (block.count - 1) as f64;
    mean.min(high - length).max(low)
}

#[cfg(test)]
mod tests {
    use super::*;
    use proptest::prelude::*;

    #[test]
    fn those_apart_stay() {
        assert_eq!(spread(&[10.0, 50.0], 18.0, 0.0, 100.0), [10.0, 50.0]);
        assert_eq!(spread(&[50.0, 50.0], 18.0, 0.0, 100.0), [41.0, 59.0]);
        assert_eq!(spread(&[50.0, 10.0], 18.0, 0.0, 100.0), [50.0, 10.0]);
    }

    proptest! {
        #[test]
        fn parted_in_order_and_inside(mut wanted in prop::collection::vec(-50.0_f64..350.0, 1..16)) {
            wanted.sort_by(f64::total_cmp);
            let placed = spread(&wanted, 18.0, 0.0, 300.0);
            for p in &placed {
                prop_assert!((-1e-9..=300.0 + 1e-9).contains(p));
            }
            for pair in placed.windows(2) {
                prop_assert!(pair[1] - pair[0] >= 18.0 - 1e-6, "{placed:?}");
            }
        }
    }
}
