//! Margins as bars from the limit: right is safe, at the hot end as at the cold.
//!
//! Light hatching beside the limit line is the reserve; a whisker is what a measured input may be
//! off by; a dashed ghost is the oil as new.

use super::axes::{Axis, Scale};
use super::measure::{Anchor, Style};
use super::svg::{Alternative, Canvas};
use super::{Draw, Drawing, Rect, pt};
use crate::report::model::Mark;
use serde::{Deserialize, Serialize};

/// One bar.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct MarginBar {
    /// `hot`, `cold`, `running`.
    pub label: String,
    /// The margin in VG steps; none where there is no such limit or it is not known.
    pub steps: Option<f64>,
    /// The margin as printed.
    pub printed: String,
    /// The verdict this margin alone would give.
    pub mark: Mark,
    /// Least and most over the plausible range of an input, VG steps.
    pub whisker: Option<(f64, f64)>,
    /// The margin as new, where the oil is judged worn.
    pub as_new: Option<f64>,
}

/// The bars of one oil, or of one machine's proposal.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct MarginBars {
    /// Id on its sheet.
    pub id: String,
    /// The bars.
    pub bars: Vec<MarginBar>,
    /// Reserve asked, VG steps.
    pub reserve: f64,
    /// Ends of the axis, VG steps, the same for a whole table.
    pub span: (f64, f64),
    /// Whether the axis is written below.
    pub axis: bool,
}

impl MarginBars {
    /// The span that holds all margins, their whiskers and a step to either side, cut at three
    /// steps: beyond that a bar only says "far".
    pub fn span_of<'a>(bars: impl IntoIterator<Item = &'a MarginBar>) -> (f64, f64) {
        let (mut low, mut high) = (-1.0_f64, 1.0_f64);
        for bar in bars {
            let ends = bar.whisker.map(|w| [w.0, w.1]).unwrap_or_default();
            for v in bar.steps.into_iter().chain(bar.as_new).chain(ends) {
                low = low.min(v);
                high = high.max(v);
            }
        }
        let half = |v: f64| (v * 2.0).ceil() / 2.0;
        (-half(-low).min(3.0), half(high).min(3.0))
    }
}

const WIDTH: f64 = 228.0;
const LEFT: f64 = 46.0;
const RIGHT: f64 = 52.0;
const ROW: f64 = 19.0;

impl Draw for MarginBars {
    fn id(&self) -> &str {
        &self.id
    }

    fn draw(&self, uid: &str) -> Drawing {
        let axis = Axis {
            scale: Scale::Linear,
            low: self.span.0,
            high: self.span.1,
            start: LEFT,
            end: WIDTH - RIGHT,
        };
        let depth = ROW * self.bars.len() as f64;
        let height = depth + if self.axis { 17.0 } else { 1.0 };
        let mut canvas = Canvas::new(WIDTH, height);
        let (zero, reserve) = (axis.px_inside(0.0), axis.px_inside(self.reserve));
        canvas.rect(
            Rect {
                x: zero,
                y: 0.0,
                w: reserve - zero,
                h: depth,
            },
            "reserve",
        );
        for (row, bar) in self.bars.iter().enumerate() {
            draw_bar(&mut canvas, &axis, bar, ROW * row as f64);
        }
        canvas.line(pt(zero, 0.0), pt(zero, depth), "limit");
        if self.axis {
            draw_axis(&mut canvas, &axis, depth);
        }
        canvas.finish(uid, "mini", Alternative::Beside)
    }
}

fn draw_bar(canvas: &mut Canvas, axis: &Axis, bar: &MarginBar, top: f64) {
    let middle = top + ROW / 2.0;
    canvas.text(
        pt(0.0, middle + 4.2),
        Anchor::Start,
        Style::Tick,
        &bar.label,
    );
    canvas.text(
        pt(WIDTH, middle + 4.2),
        Anchor::End,
        Style::Dim,
        &bar.printed,
    );
    if let Some(new) = bar.as_new {
        let box_ = Rect::between(
            pt(axis.px_inside(0.0), middle - 5.5),
            pt(axis.px_inside(new), middle + 5.5),
        );
        canvas.rect(box_, "ghost");
    }
    if let Some(steps) = bar.steps {
        let class = format!("bar b-{}", bar.mark.word());
        let tip = axis.px_inside(steps);
        canvas.rect(
            Rect::between(pt(axis.px(0.0), middle - 4.5), pt(tip, middle + 4.5)),
            &class,
        );
        if !axis.holds(steps) {
            let outwards = if steps > 0.0 { 1.0 } else { -1.0 };
            canvas.arrow(pt(tip + 8.0 * outwards, middle), pt(outwards, 0.0));
        }
    }
    if let Some((low, high)) = bar.whisker {
        let (a, b) = (axis.px_inside(low), axis.px_inside(high));
        canvas.line(pt(a, middle), pt(b, middle), "whisker");
        for x in [a, b] {
            canvas.line(pt(x, middle - 3.5), pt(x, middle + 3.5), "whisker");
        }
    }
}

fn draw_axis(canvas: &mut Canvas, axis: &Axis, depth: f64) {
    let y = depth + 12.5;
    canvas.text(pt(axis.px(0.0), y), Anchor::Middle, Style::Tick, "limit");
    for steps in [1.0, -1.0, 2.0, -2.0, 3.0, -3.0] {
        let far = (axis.px(steps) - axis.px(0.0)).abs() > 30.0;
        if axis.holds(steps) && far {
            let label =
                format!("{}{steps}", if steps > 0.0 { "+" } else { "" }).replace('-', "\u{2212}");
            canvas.place(
                Style::Tick,
                &label,
                &[(pt(axis.px(steps), y), Anchor::Middle)],
            );
        }
    }
}
