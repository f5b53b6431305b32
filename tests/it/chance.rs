//! Seeded random numbers, the same on every machine.

use rand_pcg::Pcg64;
use rand_pcg::rand_core::{Rng, SeedableRng};

/// A generator with a stated seed.
pub(crate) struct Chance(Pcg64);

impl Chance {
    /// From a seed.
    pub(crate) fn seeded(seed: u64) -> Self {
        Self(Pcg64::seed_from_u64(seed))
    }

    /// Uniform between two ends.
    pub(crate) fn between(&mut self, low: f64, high: f64) -> f64 {
        // 53 bits of a 64-bit word fill the mantissa
        let unit = (self.0.next_u64() >> 11) as f64 / (1_u64 << 53) as f64;
        low + (high - low) * unit
    }

    /// Between two positive ends, uniform in the logarithm.
    pub(crate) fn spread(&mut self, low: f64, high: f64) -> f64 {
        libm::exp(self.between(libm::log(low), libm::log(high)))
    }
}
