//! A small set of demand numbers that costs nothing to make.

/// Numbers of demands, in order. Up to 128 need no allocation; points with more are rare.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Numbers {
    bits: u128,
    more: Vec<u16>,
}

impl Numbers {
    /// Adds a number.
    #[inline]
    pub fn add(&mut self, number: u16) {
        if number < 128 {
            self.bits |= 1 << number;
        } else if let Err(at) = self.more.binary_search(&number) {
            self.more.insert(at, number);
        }
    }

    /// Adds all of another set.
    pub fn add_all(&mut self, other: &Self) {
        self.bits |= other.bits;
        for number in &other.more {
            self.add(*number);
        }
    }

    /// Whether there are none.
    pub fn is_empty(&self) -> bool {
        self.bits == 0 && self.more.is_empty()
    }

    /// The numbers, rising.
    pub fn iter(&self) -> impl Iterator<Item = u16> + '_ {
        let low = (0..128_u16).filter(|n| self.bits >> n & 1 == 1);
        low.chain(self.more.iter().copied())
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn small_and_large_numbers_come_back_in_order() {
        let mut set = Numbers::default();
        for n in [300, 5, 127, 5, 200, 0] {
            set.add(n);
        }
        assert_eq!(set.iter().collect::<Vec<_>>(), [0, 5, 127, 200, 300]);
        assert!(!set.is_empty() && Numbers::default().is_empty());
    }
}
