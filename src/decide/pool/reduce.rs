//! Makes a cover smaller without changing how many oils it takes: an only oil is taken, a place
//! served by whatever serves another is left out, an oil that serves no more than another is left
//! out. Ties are not kept: for them the unreduced cover is searched.

use std::collections::{BTreeMap, BTreeSet};

/// Places as the sets of oils that serve them.
pub type Rows = Vec<BTreeSet<usize>>;

/// What is left of a cover.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Reduced {
    /// Oils that must be taken.
    pub taken: BTreeSet<usize>,
    /// Places still to be served, none of whose oils is taken.
    pub rows: Rows,
}

/// Reduces until nothing more goes.
pub fn reduce(mut rows: Rows) -> Reduced {
    let mut taken = BTreeSet::new();
    loop {
        let before = size(&rows);
        let only: BTreeSet<usize> = rows
            .iter()
            .filter(|r| r.len() == 1)
            .flat_map(|r| r.iter().copied())
            .collect();
        rows.retain(|r| r.is_disjoint(&only));
        taken.extend(only);
        rows = strictest(rows);
        leave_out_weaker_oils(&mut rows);
        if size(&rows) == before {
            return Reduced { taken, rows };
        }
    }
}

fn size(rows: &Rows) -> (usize, usize) {
    (rows.len(), rows.iter().map(BTreeSet::len).sum())
}

/// Places none of which is served by whatever serves another.
pub fn strictest(mut rows: Rows) -> Rows {
    rows.sort_by(|a, b| a.len().cmp(&b.len()).then_with(|| a.cmp(b)));
    rows.dedup();
    let mut kept: Rows = Vec::new();
    for row in rows {
        if !kept.iter().any(|k| k.is_subset(&row)) {
            kept.push(row);
        }
    }
    kept
}

/// Leaves out oils that serve no more places than another; of equals the first stays.
fn leave_out_weaker_oils(rows: &mut Rows) {
    let mut serves: BTreeMap<usize, BTreeSet<usize>> = BTreeMap::new();
    for (i, row) in rows.iter().enumerate() {
        for oil in row {
            serves.entry(*oil).or_default().insert(i);
        }
    }
    let weaker = |oil: usize, mine: &BTreeSet<usize>| {
        serves.iter().any(|(other, theirs)| {
            *other != oil && mine.is_subset(theirs) && (mine.len() < theirs.len() || *other < oil)
        })
    };
    let out: BTreeSet<usize> = serves
        .iter()
        .filter(|(oil, mine)| weaker(**oil, mine))
        .map(|(oil, _)| *oil)
        .collect();
    for row in rows.iter_mut() {
        row.retain(|oil| !out.contains(oil));
    }
}

/// Parts rows into those that have no oil in common: row numbers, in order.
pub fn components(rows: &[BTreeSet<usize>]) -> Vec<Vec<usize>> {
    let mut root: Vec<usize> = (0..rows.len()).collect();
    let mut first: BTreeMap<usize, usize> = BTreeMap::new();
    for (i, row) in rows.iter().enumerate() {
        for oil in row {
            let other = *first.entry(*oil).or_insert(i);
            let (a, b) = (find(&mut root, i), find(&mut root, other));
            root[a.max(b)] = a.min(b);
        }
    }
    let mut parts: BTreeMap<usize, Vec<usize>> = BTreeMap::new();
    for i in 0..rows.len() {
        let r = find(&mut root, i);
        parts.entry(r).or_default().push(i);
    }
    parts.into_values().collect()
}

fn find(root: &mut [usize], mut i: usize) -> usize {
    while root[i] != i {
        root[i] = root[root[i]];
        i = root[i];
    }
    i
}

#[cfg(test)]
mod tests {
    use super::*;

    fn row(oils: &[usize]) -> BTreeSet<usize> {
        oils.iter().copied().collect()
    }

    #[test]
    fn an_only_oil_is_taken_and_serves_its_other_places() {
        let reduced = reduce(vec![row(&[3]), row(&[3, 4]), row(&[5, 6])]);
        assert_eq!(reduced.taken, row(&[3, 5]));
        assert!(reduced.rows.is_empty());
    }

    #[test]
    fn a_cycle_stays() {
        let rows = vec![row(&[0, 1]), row(&[1, 2]), row(&[2, 0])];
        let reduced = reduce(rows.clone());
        assert!(reduced.taken.is_empty());
        assert_eq!(reduced.rows.len(), 3);
        assert_eq!(components(&rows), vec![vec![0, 1, 2]]);
    }

    #[test]
    fn what_has_no_oil_in_common_is_parted() {
        let rows = vec![row(&[0, 1]), row(&[2]), row(&[1, 5]), row(&[])];
        assert_eq!(components(&rows), vec![vec![0, 2], vec![1], vec![3]]);
    }
}
