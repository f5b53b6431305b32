//! The year: what each month brings, between the limits of the oil in use that season.

use super::axes::{Axis, Scale};
use super::measure::{Anchor, Style};
use super::svg::{Alternative, Canvas};
use super::{Draw, Drawing, Rect, pt};
use crate::report::model::Degrees;
use serde::{Deserialize, Serialize};

/// The oil of one season.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct Season {
    /// First month, 1 to 12.
    pub first: u8,
    /// Last month, 1 to 12, not before the first; a winter over the new year is given as two.
    pub last: u8,
    /// Coldest ambient it holds in, °C.
    pub low_c: Option<f64>,
    /// Hottest.
    pub high_c: Option<f64>,
    /// The oil, by letter and name.
    pub label: String,
}

/// The figure.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct SeasonFigure {
    /// Id on its sheet.
    pub id: String,
    /// Title for those who cannot see it.
    pub title: String,
    /// What is to be seen in it.
    pub description: String,
    /// The caption.
    pub caption: String,
    /// Scale of the axis.
    pub degrees: Degrees,
    /// Coldest and hottest of each month, °C, January first.
    pub months_c: Vec<(f64, f64)>,
    /// The seasons.
    pub seasons: Vec<Season>,
}

const WIDTH: f64 = 560.0;
const LEFT: f64 = 40.0;
const TOP: f64 = 26.0;
const HEIGHT: f64 = 210.0;
const INITIALS: [&str; 12] = ["J", "F", "M", "A", "M", "J", "J", "A", "S", "O", "N", "D"];

impl SeasonFigure {
    fn axis(&self) -> Axis {
        let months = self.months_c.iter().flat_map(|m| [m.0, m.1]);
        let limits = self
            .seasons
            .iter()
            .flat_map(|s| [s.low_c, s.high_c])
            .flatten();
        let (low, high) = months
            .chain(limits)
            .fold((f64::INFINITY, f64::NEG_INFINITY), |(l, h), v| {
                (l.min(v), h.max(v))
            });
        let (low, high) = if low.is_finite() {
            (low, high)
        } else {
            (-20.0, 40.0)
        };
        Axis {
            scale: Scale::Linear,
            low: ((low - 6.0) / 10.0).floor() * 10.0,
            high: ((high + 6.0) / 10.0).ceil() * 10.0,
            start: TOP + HEIGHT,
            end: TOP,
        }
    }

    fn limits(canvas: &mut Canvas, axis: &Axis, season: &Season, column: f64) {
        let from = LEFT + column * f64::from(season.first.saturating_sub(1));
        let to = LEFT + column * f64::from(season.last);
        if let Some(low) = season.low_c {
            let y = axis.px(low);
            canvas.rect(
                Rect {
                    x: from,
                    y,
                    w: to - from,
                    h: 8.0,
                },
                "jaw-hatch",
            );
            canvas.line(pt(from, y), pt(to, y), "jaw season-low");
        }
        if let Some(high) = season.high_c {
            let y = axis.px(high);
            canvas.rect(
                Rect {
                    x: from,
                    y: y - 8.0,
                    w: to - from,
                    h: 8.0,
                },
                "jaw-hatch",
            );
            canvas.line(pt(from, y), pt(to, y), "jaw season-high");
        }
        let middle = f64::midpoint(from, to);
        let places = [
            (pt(middle, TOP - 10.0), Anchor::Middle),
            (pt(from + 2.0, TOP - 10.0), Anchor::Start),
            (pt(middle, TOP + 12.0), Anchor::Middle),
            (pt(middle, TOP + 28.0), Anchor::Middle),
        ];
        let label = super::measure::fit(&season.label, Style::Strong, (to - from).max(90.0));
        canvas.place(Style::Strong, &label, &places);
    }
}

impl Draw for SeasonFigure {
    fn id(&self) -> &str {
        &self.id
    }

    fn draw(&self, uid: &str) -> Drawing {
        let axis = self.axis();
        let column = (WIDTH - LEFT) / 12.0;
        let mut canvas = Canvas::new(WIDTH, TOP + HEIGHT + 24.0);
        for (t, label) in self.degrees.ticks(&axis, 34.0) {
            let y = axis.px(t);
            canvas.grid_line(pt(LEFT, y), pt(WIDTH, y));
            canvas.text(pt(LEFT - 6.0, y + 4.2), Anchor::End, Style::Tick, &label);
        }
        canvas.text(
            pt(0.0, TOP + HEIGHT + 17.0),
            Anchor::Start,
            Style::Axis,
            self.degrees.unit(),
        );
        for (month, (low, high)) in self.months_c.iter().take(12).enumerate() {
            let x = LEFT + column * month as f64;
            let bar = Rect::between(
                pt(x + column * 0.3, axis.px(*low)),
                pt(x + column * 0.7, axis.px(*high)),
            );
            canvas.rect(bar, "bar month");
            let at = pt(x + column / 2.0, TOP + HEIGHT + 17.0);
            canvas.text(at, Anchor::Middle, Style::Tick, INITIALS[month]);
        }
        for season in &self.seasons {
            Self::limits(&mut canvas, &axis, season, column);
        }
        for edge in self.seasons.iter().map(|s| s.last).filter(|m| *m < 12) {
            let x = LEFT + column * f64::from(edge);
            canvas.line(pt(x, TOP), pt(x, TOP + HEIGHT), "need");
        }
        canvas.finish(
            uid,
            "fig-svg",
            Alternative::Told {
                title: &self.title,
                description: &self.description,
            },
        )
    }
}
