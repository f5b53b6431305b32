//! How the viscosity of a fill moves, and when it reaches a limit.

use crate::numeric::distribution::student;
use jiff::civil::Date;

/// One sample of a fill on the time axis.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Reading {
    /// The day.
    pub day: Date,
    /// Viscosity at 40 °C, mm²/s.
    pub nu40: f64,
    /// Standard deviation of the test, mm²/s.
    pub sigma: f64,
    /// Hours on the oil, where known.
    pub hours: Option<f64>,
    /// Share of the fill that was added since the last change.
    pub added: f64,
}

/// What is known of how a fill moves.
#[derive(Clone, Debug, PartialEq)]
pub enum Trend {
    /// Fewer than two samples of this fill.
    TooFew {
        /// How many there are.
        samples: usize,
    },
    /// Two samples or more, and no movement beyond the scatter of the test.
    Level {
        /// How many samples.
        samples: usize,
        /// Slope, mm²/s a year, with half the width of its interval.
        slope: (f64, f64),
    },
    /// It moves.
    Moves(Moving),
}

/// A fill that moves.
#[derive(Clone, Debug, PartialEq)]
pub struct Moving {
    /// How many samples.
    pub samples: usize,
    /// Slope, mm²/s a year.
    pub slope: f64,
    /// Half the width of the 95 % interval of the slope.
    pub slope_half: f64,
    /// Value of the line on the day of the latest sample, mm²/s.
    pub now: f64,
    /// The latest day.
    pub latest: Date,
    /// When it reaches the limit that lies ahead, where one does.
    pub reaches: Option<Reached>,
}

/// A limit reached.
#[derive(Clone, Debug, PartialEq)]
pub struct Reached {
    /// Which limit: `floor`, `ceiling`, `label limit`.
    pub limit: &'static str,
    /// The limit, mm²/s at 40 °C.
    pub nu40: f64,
    /// The day the line reaches it.
    pub on: Date,
    /// First and last day of the 95 % interval; none at an end that lies beyond a hundred years.
    pub between: (Option<Date>, Option<Date>),
}

/// Limits that may lie ahead, mm²/s at 40 °C.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Ahead {
    /// The machine's floor.
    pub floor: Option<f64>,
    /// The machine's ceiling.
    pub ceiling: Option<f64>,
    /// The label's limit below.
    pub label_low: Option<f64>,
    /// The label's limit above.
    pub label_high: Option<f64>,
}

const DAYS_A_YEAR: f64 = 365.25;
/// Days beyond which a date says nothing.
const FARTHEST: f64 = 36_525.0;

/// A line through the samples of one fill, oldest first; `new` is the viscosity of new oil, by
/// which oil added since is set right.
pub fn of(readings: &[Reading], new: Option<f64>, ahead: &Ahead) -> Trend {
    let n = readings.len();
    let days: std::collections::BTreeSet<Date> = readings.iter().map(|r| r.day).collect();
    if days.len() < 2 {
        return Trend::TooFew { samples: n };
    }
    let first = readings[0].day;
    let xs: Vec<f64> = readings.iter().map(|r| between(first, r.day)).collect();
    let ys: Vec<f64> = readings.iter().map(|r| without_top_up(r, new)).collect();
    let Some(fit) = Fit::of(&xs, &ys, readings) else {
        return Trend::TooFew { samples: n };
    };
    let half = fit.quantile * fit.slope_error;
    if fit.slope.abs() <= half {
        return Trend::Level {
            samples: n,
            slope: (fit.slope * DAYS_A_YEAR, half * DAYS_A_YEAR),
        };
    }
    let last = xs[n - 1];
    Trend::Moves(Moving {
        samples: n,
        slope: fit.slope * DAYS_A_YEAR,
        slope_half: half * DAYS_A_YEAR,
        now: fit.at(last),
        latest: readings[n - 1].day,
        reaches: fit.reaches(first, last, ahead),
    })
}

/// What the fill would read had nothing been added: new oil pulls it back towards new.
fn without_top_up(r: &Reading, new: Option<f64>) -> f64 {
    match new {
        Some(new) if r.added > 0.0 && r.added < 0.9 => new + (r.nu40 - new) / (1.0 - r.added),
        _ => r.nu40,
    }
}

fn between(first: Date, day: Date) -> f64 {
    let span = first.until(day).map(|s| s.get_days());
    f64::from(span.unwrap_or(0))
}

/// A straight line by least squares.
struct Fit {
    mean_x: f64,
    mean_y: f64,
    slope: f64,
    slope_error: f64,
    error: f64,
    sxx: f64,
    n: f64,
    quantile: f64,
}

impl Fit {
    fn of(xs: &[f64], ys: &[f64], readings: &[Reading]) -> Option<Self> {
        let n = xs.len() as f64;
        let mean = |v: &[f64]| v.iter().sum::<f64>() / n;
        let (mean_x, mean_y) = (mean(xs), mean(ys));
        let sxx: f64 = xs.iter().map(|x| (x - mean_x) * (x - mean_x)).sum();
        if sxx <= 0.0 {
            return None;
        }
        let sxy: f64 = xs
            .iter()
            .zip(ys)
            .map(|(x, y)| (x - mean_x) * (y - mean_y))
            .sum();
        let slope = sxy / sxx;
        let residual: f64 = xs
            .iter()
            .zip(ys)
            .map(|(x, y)| y - mean_y - slope * (x - mean_x))
            .map(|r| r * r)
            .sum();
        // the test cannot scatter less than between laboratories, however well few points lie
        let test = readings.iter().map(|r| r.sigma * r.sigma).sum::<f64>() / n;
        let degrees = xs.len().saturating_sub(2);
        let scatter = if degrees > 0 {
            residual / degrees as f64
        } else {
            0.0
        };
        let (variance, quantile) = if scatter > test && degrees > 0 {
            (scatter, student(0.95, u32::try_from(degrees).ok()?)?)
        } else {
            (test, 1.96)
        };
        let error = variance.sqrt();
        Some(Self {
            mean_x,
            mean_y,
            slope,
            slope_error: error / sxx.sqrt(),
            error,
            sxx,
            n,
            quantile,
        })
    }

    fn at(&self, x: f64) -> f64 {
        self.mean_y + self.slope * (x - self.mean_x)
    }

    /// Half the width of the interval of the line.
    fn half(&self, x: f64) -> f64 {
        let dx = x - self.mean_x;
        self.quantile * self.error * (1.0 / self.n + dx * dx / self.sxx).sqrt()
    }

    /// The first limit ahead.
    fn reaches(&self, first: Date, last: f64, ahead: &Ahead) -> Option<Reached> {
        let falls = self.slope < 0.0;
        let limits = if falls {
            [("floor", ahead.floor), ("label limit", ahead.label_low)]
        } else {
            [
                ("ceiling", ahead.ceiling),
                ("label limit", ahead.label_high),
            ]
        };
        let now = self.at(last);
        let lies_ahead = |l: &f64| if falls { *l < now } else { *l > now };
        let nearest = limits
            .into_iter()
            .filter_map(|(name, limit)| Some((name, limit.filter(lies_ahead)?)))
            .min_by(|a, b| (a.1 - now).abs().total_cmp(&(b.1 - now).abs()))?;
        let (limit, nu40) = nearest;
        let x = self.mean_x + (nu40 - self.mean_y) / self.slope;
        let day = |x: f64| {
            (x.is_finite() && x - last < FARTHEST).then(|| {
                #[expect(clippy::cast_possible_truncation, reason = "within a hundred years")]
                let days = jiff::Span::new().days(x.round() as i64);
                first.checked_add(days).ok()
            })?
        };
        // where the edges of the interval reach it
        let edge = |side: f64| {
            let gap = |x: f64| self.at(x) + side * self.half(x) - nu40;
            if gap(last).signum() != (now - nu40).signum() {
                return Some(last);
            }
            let root = crate::numeric::root::bracketed(last, last + FARTHEST, gap);
            root.ok().map(|r| r.at)
        };
        let (early, late) = if falls {
            (edge(-1.0), edge(1.0))
        } else {
            (edge(1.0), edge(-1.0))
        };
        Some(Reached {
            limit,
            nu40,
            on: day(x)?,
            between: (early.and_then(day), late.and_then(day)),
        })
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn reading(day: &str, nu40: f64, sigma: f64) -> Reading {
        Reading {
            day: day.parse().expect("a day"),
            nu40,
            sigma,
            hours: None,
            added: 0.0,
        }
    }

    /// Worked by hand: 220, 210, 200 at equal steps of 100 days falls 0.1 a day; from 200 to 174
    /// takes 260 days after 2026-07-20.
    #[test]
    fn a_falling_fill_reaches_its_floor_on_a_day() {
        let readings = [
            reading("2026-01-01", 220.0, 0.5),
            reading("2026-04-11", 210.0, 0.5),
            reading("2026-07-20", 200.0, 0.5),
        ];
        let ahead = Ahead {
            floor: Some(174.0),
            ..Ahead::default()
        };
        let Trend::Moves(m) = of(&readings, None, &ahead) else {
            panic!("it moves");
        };
        assert!((m.slope / DAYS_A_YEAR + 0.1).abs() < 1e-9 && (m.now - 200.0).abs() < 1e-9);
        let reached = m.reaches.expect("a floor ahead");
        assert_eq!(reached.on.to_string(), "2027-04-06");
        let (early, late) = reached.between;
        assert!(early.expect("early") < reached.on && reached.on < late.expect("late"));
    }

    #[test]
    fn scatter_is_no_trend_and_one_sample_is_too_few() {
        let two = [
            reading("2026-01-01", 46.0, 0.3),
            reading("2026-07-01", 46.3, 0.3),
        ];
        assert!(matches!(
            of(&two, None, &Ahead::default()),
            Trend::Level { samples: 2, .. }
        ));
        assert_eq!(
            of(&two[..1], None, &Ahead::default()),
            Trend::TooFew { samples: 1 }
        );
    }

    /// A third of the fill replaced by new oil of 60 hides a third of a fall to 45: 50 is read.
    #[test]
    fn a_top_up_is_set_right() {
        let mut r = reading("2026-01-01", 50.0, 0.3);
        r.added = 1.0 / 3.0;
        assert!((without_top_up(&r, Some(60.0)) - 45.0).abs() < 1e-9);
    }
}
