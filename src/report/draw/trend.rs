//! Samples of one machine over time, in VG steps from the labelled grade.
//!
//! The tint is the grade's tolerance; the hatched edges are the machine's floor and ceiling,
//! carried to 40 °C along the sample's own slope, so that a laboratory's figure can be read
//! against them. A floor above the ceiling shows that no grade of that slope can serve.

use super::axes::{Axes, Axis, Scale};
use super::measure::{Anchor, Style};
use super::svg::{Alternative, Canvas};
use super::{Draw, Drawing, Rect, pt};
use crate::report::model::grouped;
use serde::{Deserialize, Serialize};

/// One sample.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct TrendSample {
    /// Day, counted from any fixed day.
    pub day: f64,
    /// VG steps from the labelled grade.
    pub steps: f64,
}

/// One panel.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct TrendPanel {
    /// Id on its sheet.
    pub id: String,
    /// Title for those who cannot see it.
    pub title: String,
    /// What is to be seen in it.
    pub description: String,
    /// The samples, oldest first.
    pub samples: Vec<TrendSample>,
    /// Half the width of the grade's tolerance, VG steps.
    pub tolerance: f64,
    /// The machine's floor, VG steps from the label.
    pub floor: Option<f64>,
    /// Its ceiling.
    pub ceiling: Option<f64>,
    /// The latest reading as printed.
    pub latest: String,
    /// First and last date on the axis, as printed and as day.
    pub dates: [(String, f64); 2],
    /// Half the height of the shared scale, VG steps.
    pub reach: f64,
}

const WIDTH: f64 = 252.0;
const LEFT: f64 = 34.0;
const RIGHT: f64 = 10.0;
const TOP: f64 = 8.0;
const HEIGHT: f64 = 150.0;

impl TrendPanel {
    fn axes(&self) -> Axes {
        let (first, last) = (self.dates[0].1, self.dates[1].1);
        let room = ((last - first) * 0.06).max(1.0);
        Axes {
            x: Axis {
                scale: Scale::Linear,
                low: first - room,
                high: last + room,
                start: LEFT,
                end: WIDTH - RIGHT,
            },
            y: Axis {
                scale: Scale::Linear,
                low: -self.reach,
                high: self.reach,
                start: TOP + HEIGHT,
                end: TOP,
            },
        }
    }

    fn scale(canvas: &mut Canvas, axes: &Axes) {
        let frame = axes.frame();
        for steps in super::axes::round_ticks(&axes.y, 24.0) {
            let y = axes.y.px(steps);
            canvas.grid_line(pt(frame.x, y), pt(frame.right(), y));
            let sign = if steps > 0.0 { "+" } else { "" };
            let label = format!("{sign}{}", grouped(steps));
            canvas.text(pt(frame.x - 6.0, y + 4.2), Anchor::End, Style::Tick, &label);
        }
    }

    fn edge(canvas: &mut Canvas, axes: &Axes, steps: f64, floor: bool) {
        if !axes.y.holds(steps) {
            return;
        }
        let frame = axes.frame();
        let y = axes.y.px(steps);
        let top = if floor { y } else { y - 8.0 };
        canvas.rect(
            Rect {
                x: frame.x,
                y: top,
                w: frame.w,
                h: 8.0,
            },
            "jaw-hatch",
        );
        canvas.line(
            pt(frame.x, y),
            pt(frame.right(), y),
            if floor {
                "jaw jaw-floor"
            } else {
                "jaw jaw-ceiling"
            },
        );
    }

    fn readings(&self, canvas: &mut Canvas, axes: &Axes) {
        let points: Vec<_> = self
            .samples
            .iter()
            .map(|s| pt(axes.x.px(s.day), axes.y.px_inside(s.steps)))
            .collect();
        if points.len() > 1 {
            canvas.polyline(&points, "trend");
        }
        for (index, p) in points.iter().enumerate() {
            let last = index + 1 == points.len();
            canvas.circle(
                *p,
                if last { 4.2 } else { 3.0 },
                if last { "pt-last" } else { "pt-stated" },
            );
        }
        if let Some(p) = points.last() {
            let places = [
                (pt(p.x, p.y - 9.0), Anchor::End),
                (pt(p.x, p.y + 18.0), Anchor::End),
                (pt(p.x - 9.0, p.y + 4.0), Anchor::End),
            ];
            canvas.place(Style::Dim, &self.latest, &places);
        }
    }
}

impl Draw for TrendPanel {
    fn id(&self) -> &str {
        &self.id
    }

    fn draw(&self, uid: &str) -> Drawing {
        let axes = self.axes();
        let frame = axes.frame();
        let mut canvas = Canvas::new(WIDTH, TOP + HEIGHT + 22.0);
        let tint = Rect::between(
            axes.at(axes.x.low, self.tolerance),
            axes.at(axes.x.high, -self.tolerance),
        );
        canvas.rect(tint, "tint");
        Self::scale(&mut canvas, &axes);
        if let Some(steps) = self.floor {
            Self::edge(&mut canvas, &axes, steps, true);
        }
        if let Some(steps) = self.ceiling {
            Self::edge(&mut canvas, &axes, steps, false);
        }
        canvas.rect(frame, "frame");
        self.readings(&mut canvas, &axes);
        let ends = [(frame.x, Anchor::Start), (frame.right(), Anchor::End)];
        for ((label, _), (x, anchor)) in self.dates.iter().zip(ends) {
            canvas.text(pt(x, frame.bottom() + 16.0), anchor, Style::Tick, label);
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
