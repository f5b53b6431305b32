//! The two axes of a figure: a transform each way, the clip, and the choice of ticks.

use super::{Pt, Rect, pt};
use crate::numeric::math::{lg, power_of_ten};

/// How a quantity is stretched along an axis.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Scale {
    /// As it is.
    Linear,
    /// lg T with T in kelvin, from degrees Celsius: the abscissa of ASTM D341.
    LogKelvin,
    /// lg lg(ν + 0.7) with ν in mm²/s: the ordinate of ASTM D341.
    DoubleLog,
}

/// Below this the double logarithm leaves its range; a line is cut there.
const LEAST_VISCOSITY: f64 = 0.31;

impl Scale {
    /// From the quantity to the stretched number.
    pub fn stretch(self, value: f64) -> f64 {
        match self {
            Scale::Linear => value,
            Scale::LogKelvin => lg((value + 273.15).max(1.0)),
            Scale::DoubleLog => lg(lg(value.max(LEAST_VISCOSITY) + 0.7)),
        }
    }

    /// Back again.
    pub fn relax(self, stretched: f64) -> f64 {
        match self {
            Scale::Linear => stretched,
            Scale::LogKelvin => power_of_ten(stretched) - 273.15,
            Scale::DoubleLog => power_of_ten(power_of_ten(stretched)) - 0.7,
        }
    }
}

/// One axis: which values lie at which pixels.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Axis {
    /// How it is stretched.
    pub scale: Scale,
    /// Value at the first pixel.
    pub low: f64,
    /// Value at the last pixel.
    pub high: f64,
    /// Pixel of `low`.
    pub start: f64,
    /// Pixel of `high`.
    pub end: f64,
}

impl Axis {
    /// The pixel of a value, also beyond the ends.
    pub fn px(&self, value: f64) -> f64 {
        let low = self.scale.stretch(self.low);
        let high = self.scale.stretch(self.high);
        self.start + (self.scale.stretch(value) - low) / (high - low) * (self.end - self.start)
    }

    /// The value at a pixel.
    pub fn value(&self, px: f64) -> f64 {
        let low = self.scale.stretch(self.low);
        let high = self.scale.stretch(self.high);
        self.scale
            .relax(low + (px - self.start) / (self.end - self.start) * (high - low))
    }

    /// The pixel of a value, held inside the ends.
    pub fn px_inside(&self, value: f64) -> f64 {
        self.px(value.clamp(self.low, self.high))
    }

    /// Whether a value lies on the axis.
    pub fn holds(&self, value: f64) -> bool {
        value >= self.low && value <= self.high
    }

    /// Ticks, chosen by their distance in pixels: of the groups, the first is wanted most; a value
    /// is taken if it lies on the axis and keeps `gap` pixels from every tick taken before it.
    pub fn ticks(&self, groups: &[Vec<f64>], gap: f64) -> Vec<f64> {
        let mut taken: Vec<f64> = Vec::new();
        for value in groups.iter().flatten() {
            let clear = |other: &f64| (self.px(*other) - self.px(*value)).abs() >= gap;
            if self.holds(*value) && taken.iter().all(clear) {
                taken.push(*value);
            }
        }
        taken.sort_by(f64::total_cmp);
        taken
    }
}

/// Round numbers on a linear scale: steps of 1, 2 or 5 times a power of ten, the coarsest that
/// still keeps neighbours `gap` pixels apart being the finest taken.
pub fn round_ticks(axis: &Axis, gap: f64) -> Vec<f64> {
    let per_px = (axis.high - axis.low).abs() / (axis.end - axis.start).abs().max(1.0);
    let wanted = (per_px * gap).max(1e-9);
    let decade = decade_below(wanted);
    let step = [1.0, 2.0, 5.0, 10.0]
        .into_iter()
        .map(|m| m * decade)
        .find(|step| *step >= wanted - 1e-12)
        .unwrap_or(10.0 * decade);
    let mut k = (axis.low / step).ceil();
    let mut out = Vec::new();
    while k * step <= axis.high + 1e-9 {
        out.push(k * step);
        k += 1.0;
    }
    out
}

/// The power of ten at or below a positive number, without the noise of exponentials.
pub fn decade_below(value: f64) -> f64 {
    let mut decade = 1.0_f64;
    while decade > value && decade > 1e-12 {
        decade /= 10.0;
    }
    while decade * 10.0 <= value && decade < 1e12 {
        decade *= 10.0;
    }
    decade
}

/// Round viscosities in the order they are wanted: decades, then 5, 2, 3, 1.5 and 7 in each.
pub fn viscosity_groups() -> Vec<Vec<f64>> {
    [1.0, 5.0, 2.0, 3.0, 1.5, 7.0, 4.0, 6.0]
        .into_iter()
        .map(|m| {
            [0.1, 1.0, 10.0, 100.0, 1e3, 1e4, 1e5, 1e6, 1e7]
                .into_iter()
                .map(|decade| m * decade)
                .collect()
        })
        .collect()
}

/// Two axes at right angles.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Axes {
    /// Across.
    pub x: Axis,
    /// Up.
    pub y: Axis,
}

impl Axes {
    /// Where a pair of values lies.
    pub fn at(&self, x: f64, y: f64) -> Pt {
        pt(self.x.px(x), self.y.px(y))
    }

    /// The plot's rectangle.
    pub fn frame(&self) -> Rect {
        Rect::between(pt(self.x.start, self.y.start), pt(self.x.end, self.y.end))
    }

    /// The part of a straight stretch inside the frame (Liang and Barsky's method), if any.
    pub fn clip(&self, a: Pt, b: Pt) -> Option<(Pt, Pt)> {
        let frame = self.frame();
        let (dx, dy) = (b.x - a.x, b.y - a.y);
        let sides = [
            (-dx, a.x - frame.x),
            (dx, frame.right() - a.x),
            (-dy, a.y - frame.y),
            (dy, frame.bottom() - a.y),
        ];
        let (mut from, mut to) = (0.0_f64, 1.0_f64);
        for (p, q) in sides {
            if p == 0.0 {
                if q < 0.0 {
                    return None;
                }
            } else if p < 0.0 {
                from = from.max(q / p);
            } else {
                to = to.min(q / p);
            }
        }
        (from <= to).then(|| {
            (
                pt(a.x + from * dx, a.y + from * dy),
                pt(a.x + to * dx, a.y + to * dy),
            )
        })
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn axes() -> Axes {
        Axes {
            x: Axis {
                scale: Scale::LogKelvin,
                low: -30.0,
                high: 100.0,
                start: 60.0,
                end: 500.0,
            },
            y: Axis {
                scale: Scale::DoubleLog,
                low: 8.0,
                high: 150_000.0,
                start: 320.0,
                end: 20.0,
            },
        }
    }

    #[test]
    fn pixels_and_values_agree_both_ways() {
        let axes = axes();
        for t in [-30.0, -18.0, 0.0, 40.0, 78.0, 100.0] {
            assert!((axes.x.value(axes.x.px(t)) - t).abs() < 1e-9);
        }
        for nu in [8.0, 26.4, 220.0, 25_000.0, 150_000.0] {
            assert!((axes.y.value(axes.y.px(nu)) / nu - 1.0).abs() < 1e-9);
        }
    }

    #[test]
    fn clipping_keeps_what_is_inside() {
        let axes = axes();
        let frame = axes.frame();
        let (a, b) = axes.clip(pt(0.0, 0.0), pt(600.0, 400.0)).expect("crosses");
        assert!(frame.holds(a) && frame.holds(b));
        assert!(axes.clip(pt(0.0, 0.0), pt(600.0, 10.0)).is_none());
        assert_eq!(
            axes.clip(pt(100.0, 100.0), pt(200.0, 90.0)),
            Some((pt(100.0, 100.0), pt(200.0, 90.0)))
        );
    }

    #[test]
    fn ticks_keep_their_distance() {
        let axes = axes();
        let ticks = axes.y.ticks(&viscosity_groups(), 17.0);
        assert!(ticks.contains(&10.0) && ticks.contains(&100_000.0));
        for pair in ticks.windows(2) {
            assert!(axes.y.px(pair[0]) - axes.y.px(pair[1]) >= 17.0 - 1e-9);
        }
        let round = Axis {
            scale: Scale::Linear,
            low: -32.0,
            high: 55.0,
            start: 0.0,
            end: 300.0,
        };
        assert_eq!(round_ticks(&round, 40.0), [-20.0, 0.0, 20.0, 40.0]);
    }
}
