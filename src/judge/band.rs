//! The ambient interval in which every demand is met.

use crate::demand::AtAmbient;
use crate::numeric::root::bracketed;
use crate::quantity::convert::ZERO_CELSIUS;

/// Coldest ambient looked at, K.
pub const COLDEST: f64 = ZERO_CELSIUS - 60.0;
/// Hottest ambient looked at, K.
pub const HOTTEST: f64 = ZERO_CELSIUS + 80.0;

/// An interval of ambient temperatures, K. An end that nothing limits lies at infinity.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Band {
    /// Cold end.
    pub low: f64,
    /// Hot end.
    pub high: f64,
}

impl Band {
    /// Nothing limits it.
    pub const OPEN: Self = Self {
        low: f64::NEG_INFINITY,
        high: f64::INFINITY,
    };

    /// No ambient meets every demand.
    pub const NOWHERE: Self = Self {
        low: f64::INFINITY,
        high: f64::NEG_INFINITY,
    };

    /// Whether no ambient is in it.
    pub fn is_nowhere(self) -> bool {
        self.low > self.high || self.low > HOTTEST || self.high < COLDEST
    }

    /// Both at once.
    #[must_use]
    pub fn and(self, other: Self) -> Self {
        Self {
            low: self.low.max(other.low),
            high: self.high.min(other.high),
        }
    }

    /// Cold end, where something limits it within the range looked at.
    pub fn low_end(self) -> Option<f64> {
        (self.low > COLDEST).then_some(self.low)
    }

    /// Hot end, where something limits it within the range looked at.
    pub fn high_end(self) -> Option<f64> {
        (self.high < HOTTEST).then_some(self.high)
    }

    /// Whether the whole of another band is in it; ends within 1e-9 K count as equal.
    pub fn covers(self, low: f64, high: f64) -> bool {
        self.low <= low + 1e-9 && self.high >= high - 1e-9
    }

    /// Ambients at which a temperature stays at or below `most`.
    pub fn at_most(at: AtAmbient, most: f64) -> Self {
        if at.least > most {
            return Self::NOWHERE;
        }
        Self::upto(at, most)
    }

    /// Ambients at which a temperature reaches at least `least`.
    pub fn at_least(at: AtAmbient, least: f64) -> Self {
        if at.least >= least {
            return Self::OPEN;
        }
        if at.slope > 0.0 {
            Self {
                low: (least - at.offset) / at.slope,
                high: f64::INFINITY,
            }
        } else if at.slope < 0.0 {
            Self {
                low: f64::NEG_INFINITY,
                high: (least - at.offset) / at.slope,
            }
        } else if at.offset >= least {
            Self::OPEN
        } else {
            Self::NOWHERE
        }
    }

    fn upto(at: AtAmbient, most: f64) -> Self {
        if at.slope > 0.0 {
            Self {
                low: f64::NEG_INFINITY,
                high: (most - at.offset) / at.slope,
            }
        } else if at.slope < 0.0 {
            Self {
                low: (most - at.offset) / at.slope,
                high: f64::INFINITY,
            }
        } else if at.offset <= most {
            Self::OPEN
        } else {
            Self::NOWHERE
        }
    }

    /// Ambients at which a margin that moves with the ambient is not negative, for margins that
    /// fall (`falls`) or rise with it. Bracketed between the ends looked at.
    pub fn by_root(falls: bool, margin: impl Fn(f64) -> f64) -> Self {
        let (cold, hot) = (margin(COLDEST), margin(HOTTEST));
        if cold >= 0.0 && hot >= 0.0 {
            return Self::OPEN;
        }
        if cold < 0.0 && hot < 0.0 {
            return Self::NOWHERE;
        }
        let Ok(root) = bracketed(COLDEST, HOTTEST, margin) else {
            return Self::NOWHERE;
        };
        if falls {
            Self {
                low: f64::NEG_INFINITY,
                high: root.at,
            }
        } else {
            Self {
                low: root.at,
                high: f64::INFINITY,
            }
        }
    }
}

impl Band {
    /// The ambients around one at which a margin is not negative, for margins that may fall
    /// towards both ends. Nowhere, where it is negative there.
    pub fn around(middle: f64, margin: impl Fn(f64) -> f64) -> Self {
        if margin(middle).is_nan() || margin(middle) < 0.0 {
            return Self::NOWHERE;
        }
        let end = |from: f64| {
            if margin(from) >= 0.0 {
                return None;
            }
            let (cold, hot) = (from.min(middle), from.max(middle));
            bracketed(cold, hot, &margin).ok().map(|root| root.at)
        };
        Self {
            low: end(COLDEST).unwrap_or(f64::NEG_INFINITY),
            high: end(HOTTEST).unwrap_or(f64::INFINITY),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_rise_shifts_the_band_and_a_held_sump_has_none() {
        let rising = AtAmbient {
            offset: 42.0,
            ..AtAmbient::AMBIENT
        };
        assert_eq!(
            Band::at_most(rising, 351.0),
            Band {
                low: f64::NEG_INFINITY,
                high: 309.0
            }
        );
        assert_eq!(Band::at_most(AtAmbient::held(350.0), 351.0), Band::OPEN);
        assert!(Band::at_most(AtAmbient::held(352.0), 351.0).is_nowhere());
    }

    #[test]
    fn a_heater_holds_the_start_at_every_colder_ambient() {
        let start = AtAmbient {
            least: 268.0,
            ..AtAmbient::AMBIENT
        };
        assert_eq!(Band::at_least(start, 260.0), Band::OPEN);
        assert_eq!(
            Band::at_least(start, 270.0),
            Band {
                low: 270.0,
                high: f64::INFINITY
            }
        );
    }

    #[test]
    fn a_moving_margin_is_bracketed() {
        let band = Band::by_root(true, |a| 300.0 - a);
        assert!((band.high - 300.0).abs() < 1e-9);
        assert!(Band::by_root(true, |_| -1.0).is_nowhere());
        let both = Band::around(290.0, |a| 10.0 - (a - 290.0).abs());
        assert!((both.low - 280.0).abs() < 1e-9 && (both.high - 300.0).abs() < 1e-9);
        assert!(Band::around(310.0, |a| 10.0 - (a - 290.0).abs()).is_nowhere());
        assert_eq!(Band::by_root(false, |_| 1.0), Band::OPEN);
    }
}
