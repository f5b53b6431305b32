//! An enlarged view of a place that decides: the limit, the lines near it, and the margin as a
//! dimension.

use super::lines::{shown, viscosity_at};
use super::plot::Plot;
use super::{OilLine, ViscosityFigure};
use crate::report::draw::axes::{Axes, Axis, Scale, decade_below, viscosity_groups};
use crate::report::draw::measure::{Anchor, Style, fit};
use crate::report::draw::svg::{Alternative, Canvas};
use crate::report::draw::{Drawing, Rect, pt};
use serde::{Deserialize, Serialize};

/// One enlarged view.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct Detail {
    /// Id on its sheet.
    pub id: String,
    /// Its letter: H at the hot end, K at the cold.
    pub letter: String,
    /// Its heading: `hottest sump`.
    pub title: String,
    /// What is to be seen in it.
    pub description: String,
    /// The caption.
    pub caption: String,
    /// The temperature that decides, °C.
    pub at_c: f64,
    /// The limit there, mm²/s.
    pub limit_mm2_s: f64,
    /// Whether the limit is a floor.
    pub floor: bool,
    /// The oil whose margin is dimensioned, by its letter.
    pub of: String,
    /// The margin in words: `+0.67 step`.
    pub margin: String,
}

const WIDTH: f64 = 384.0;
const LEFT: f64 = 67.0;
const RIGHT: f64 = 66.0;
const TOP: f64 = 34.0;
const HEIGHT: f64 = 186.0;
/// Half the width of the window, kelvin.
const HALF_WINDOW: f64 = 6.0;

impl Detail {
    fn dimensioned<'a>(&self, figure: &'a ViscosityFigure) -> Option<&'a OilLine> {
        figure.lines.iter().find(|line| line.letter == self.of)
    }

    /// The viscosities of the window: the limit, the line dimensioned, and room around both.
    fn window(&self, figure: &ViscosityFigure) -> (f64, f64) {
        let of = self
            .dimensioned(figure)
            .and_then(|oil| viscosity_at(&oil.line, self.at_c))
            .unwrap_or(self.limit_mm2_s);
        let (low, high) = (of.min(self.limit_mm2_s), of.max(self.limit_mm2_s));
        let spread = (high / low).max(1.08);
        let room = if spread > 3.0 {
            1.5
        } else {
            1.32 * spread.sqrt()
        };
        (low / room, high * room)
    }

    fn axes(&self, figure: &ViscosityFigure) -> Axes {
        let (low, high) = self.window(figure);
        let (from, to) = (self.at_c - HALF_WINDOW, self.at_c + HALF_WINDOW);
        Axes {
            x: Axis {
                scale: Scale::LogKelvin,
                low: from,
                high: to,
                start: LEFT,
                end: WIDTH - RIGHT,
            },
            y: Axis {
                scale: Scale::DoubleLog,
                low,
                high,
                start: TOP + HEIGHT,
                end: TOP,
            },
        }
    }

    /// Marks its window on the main figure.
    pub(super) fn outline(&self, canvas: &mut Canvas, figure: &ViscosityFigure, main: &Axes) {
        canvas.rect(self.outlined(figure, main), "window");
    }

    /// The part of the main figure that the view enlarges.
    fn outlined(&self, figure: &ViscosityFigure, main: &Axes) -> Rect {
        let (low, high) = self.window(figure);
        let x = |t: f64| main.x.px_inside(t);
        let y = |nu: f64| main.y.px_inside(nu);
        let a = pt(x(self.at_c - HALF_WINDOW), y(high));
        let b = pt(x(self.at_c + HALF_WINDOW), y(low));
        Rect::between(a, b)
    }

    /// Its letter on the main figure, set after the labels of the limits, which have fewer places.
    pub(super) fn letter(&self, canvas: &mut Canvas, figure: &ViscosityFigure, main: &Axes) {
        let window = self.outlined(figure, main);
        let places = [
            (pt(window.right() + 4.0, window.y + 12.0), Anchor::Start),
            (pt(window.x - 4.0, window.bottom() - 2.0), Anchor::End),
            (pt(window.x - 4.0, window.y + 12.0), Anchor::End),
            (
                pt(window.right() + 4.0, window.bottom() - 2.0),
                Anchor::Start,
            ),
            (pt(window.x + 4.0, window.y - 4.0), Anchor::Start),
            (pt(window.x + 4.0, window.bottom() + 14.0), Anchor::Start),
            (
                pt(window.right() - 4.0, window.bottom() + 14.0),
                Anchor::End,
            ),
            (pt(window.right() + 4.0, window.y - 4.0), Anchor::Start),
        ];
        canvas.place(Style::Head, &self.letter, &places);
    }
}

/// Draws one enlarged view of the figure.
pub fn draw_detail(figure: &ViscosityFigure, detail: &Detail, uid: &str) -> Drawing {
    let axes = detail.axes(figure);
    let shown = shown(&figure.lines, &axes);
    let plot = Plot::new(axes, &shown);
    let frame = axes.frame();
    let mut canvas = Canvas::new(WIDTH, frame.bottom() + plot.tick_row + 24.0);
    let heading = format!("Detail {}: {}", detail.letter, detail.title);
    let shown_heading = fit(&heading, Style::Head, WIDTH - LEFT);
    canvas.text(
        pt(frame.x, TOP - 13.0),
        Anchor::Start,
        Style::Head,
        &shown_heading,
    );
    plot.grid(
        &mut canvas,
        &axes.y.ticks(&fine_groups(&axes), 17.0),
        &figure.degrees.ticks(&axes.x, 30.0),
    );
    let unit_at = pt(frame.right(), frame.bottom() + plot.tick_row + 17.0);
    canvas.text(unit_at, Anchor::End, Style::Axis, figure.degrees.unit());
    let x = axes.x.px(detail.at_c);
    canvas.line(pt(x, frame.y), pt(x, frame.bottom()), "at");
    plot.lines(&mut canvas, &shown);
    jaw(&mut canvas, &axes, detail);
    plot.balloons(&mut canvas, &shown);
    margin(&mut canvas, &axes, detail, figure);
    shearing(&mut canvas, &axes, &shown);
    let told = Alternative::Told {
        title: &heading,
        description: &detail.description,
    };
    canvas.finish(uid, "fig-svg", told)
}

/// Round numbers close together, for a window of less than a decade.
fn fine_groups(axes: &Axes) -> Vec<Vec<f64>> {
    let mut groups = viscosity_groups();
    let span = axes.y.high - axes.y.low;
    let decade = decade_below(span);
    for step in [0.5, 0.2, 0.1] {
        let step = step * decade;
        let first = (axes.y.low / step).ceil();
        let count = ((axes.y.high / step).floor() - first).clamp(0.0, 60.0);
        groups.push(
            (0..=60_u8)
                .map(f64::from)
                .filter(|i| *i <= count)
                .map(|i| (first + i) * step)
                .collect(),
        );
    }
    groups
}

fn jaw(canvas: &mut Canvas, axes: &Axes, detail: &Detail) {
    let frame = axes.frame();
    let x = axes.x.px(detail.at_c);
    let y = axes.y.px(detail.limit_mm2_s);
    let (a, b) = if detail.floor {
        (frame.x, x)
    } else {
        (x, frame.right())
    };
    let top = if detail.floor { y } else { y - 9.0 };
    canvas.rect(
        Rect {
            x: a,
            y: top,
            w: b - a,
            h: 9.0,
        },
        "jaw-hatch",
    );
    canvas.line(
        pt(a, y),
        pt(b, y),
        if detail.floor {
            "jaw jaw-floor"
        } else {
            "jaw jaw-ceiling"
        },
    );
}

fn margin(canvas: &mut Canvas, axes: &Axes, detail: &Detail, figure: &ViscosityFigure) {
    let line = detail.dimensioned(figure);
    let Some(nu) = line.and_then(|oil| viscosity_at(&oil.line, detail.at_c)) else {
        return;
    };
    let x = axes.x.px(detail.at_c);
    let y = axes.y.px(nu);
    canvas.circle(pt(x, y), 3.0, "pt-stated");
    // on the jaw's side of the line, where its extension line is the jaw itself
    let shift = if detail.floor { -9.0 } else { 9.0 };
    canvas.line(pt(x, y), pt(x + 1.6 * shift, y), "ext");
    canvas.upright(x + shift, axes.y.px(detail.limit_mm2_s), y, &detail.margin);
}

/// An arrow from the line as new to the line as worn.
fn shearing(canvas: &mut Canvas, axes: &Axes, shown: &[&OilLine]) {
    for oil in shown.iter().filter(|oil| !oil.as_new.is_empty()) {
        let places =
            [0.12, 0.3, 0.7, 0.85].map(|share| axes.x.low + share * (axes.x.high - axes.x.low));
        let words = format!("{} shears", oil.letter);
        for t in places {
            let (Some(new), Some(worn)) =
                (viscosity_at(&oil.as_new, t), viscosity_at(&oil.line, t))
            else {
                break;
            };
            let (a, b) = (axes.at(t, new), axes.at(t, worn));
            let frame = axes.frame();
            if !frame.holds(a) || !frame.holds(b) || b.y - a.y < 10.0 {
                continue;
            }
            canvas.line(a, b, "dim");
            canvas.arrow(b, pt(0.0, 1.0));
            let beside = pt(a.x + 5.0, f64::midpoint(a.y, b.y) + 4.0);
            let above = pt(a.x + 5.0, a.y - 4.0);
            canvas.place(
                Style::Label,
                &words,
                &[
                    (beside, Anchor::Start),
                    (above, Anchor::Start),
                    (pt(a.x - 5.0, beside.y), Anchor::End),
                ],
            );
            break;
        }
    }
}
