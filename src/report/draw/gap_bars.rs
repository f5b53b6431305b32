//! What a missing input may do to a margin: a bar over its plausible range. A bar that crosses the
//! heavy line decides something.

use super::axes::{Axis, Scale};
use super::measure::{Anchor, Style};
use super::svg::{Alternative, Canvas};
use super::{Draw, Drawing, Rect, pt};
use crate::report::model::grouped;
use serde::{Deserialize, Serialize};

/// One bar.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct GapBar {
    /// Id on its sheet.
    pub id: String,
    /// Least margin over the range, VG steps.
    pub low: f64,
    /// Greatest.
    pub high: f64,
    /// The margin at the value used meanwhile.
    pub used: Option<f64>,
    /// Reserve asked, VG steps.
    pub reserve: f64,
    /// Ends of the axis, VG steps, the same for the whole table.
    pub span: (f64, f64),
    /// Whether the figures of the axis are written instead, for the head of the table.
    pub head: bool,
}

const WIDTH: f64 = 200.0;
const HEIGHT: f64 = 26.0;

impl Draw for GapBar {
    fn id(&self) -> &str {
        &self.id
    }

    fn draw(&self, uid: &str) -> Drawing {
        let axis = Axis {
            scale: Scale::Linear,
            low: self.span.0,
            high: self.span.1,
            start: 10.0,
            end: WIDTH - 10.0,
        };
        if self.head {
            return Self::scale(&axis, uid);
        }
        let mut canvas = Canvas::new(WIDTH, HEIGHT);
        let zero = axis.px_inside(0.0);
        canvas.rect(
            Rect {
                x: zero,
                y: 2.0,
                w: axis.px_inside(self.reserve) - zero,
                h: HEIGHT - 4.0,
            },
            "reserve",
        );
        let (a, b) = (axis.px_inside(self.low), axis.px_inside(self.high));
        canvas.rect(
            Rect {
                x: a,
                y: 9.0,
                w: (b - a).max(1.5),
                h: 8.0,
            },
            "bar b-range",
        );
        for x in [a, b] {
            canvas.line(pt(x, 6.0), pt(x, 20.0), "whisker");
        }
        canvas.line(pt(zero, 0.0), pt(zero, HEIGHT), "limit");
        if let Some(used) = self.used {
            canvas.circle(pt(axis.px_inside(used), 13.0), 4.6, "pt-used");
        }
        canvas.finish(uid, "mini", Alternative::Beside)
    }
}

impl GapBar {
    fn scale(axis: &Axis, uid: &str) -> Drawing {
        let mut canvas = Canvas::new(WIDTH, 15.0);
        canvas.text(
            pt(axis.px_inside(0.0), 11.0),
            Anchor::Middle,
            Style::Tick,
            "limit",
        );
        for steps in super::axes::round_ticks(axis, 34.0) {
            let far = (axis.px(steps) - axis.px(0.0)).abs() > 30.0;
            if far {
                let sign = if steps > 0.0 { "+" } else { "" };
                let label = format!("{sign}{}", grouped(steps));
                canvas.place(
                    Style::Tick,
                    &label,
                    &[(pt(axis.px(steps), 11.0), Anchor::Middle)],
                );
            }
        }
        canvas.finish(uid, "mini", Alternative::Beside)
    }
}
