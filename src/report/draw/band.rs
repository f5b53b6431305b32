//! Ambient bands: a bar where an oil holds, two uprights for what the place gets, steep hatching
//! over the part left uncovered.

use super::axes::{Axis, Scale};
use super::measure::{Anchor, Style, fit};
use super::svg::{Alternative, BALLOON, Canvas};
use super::{Draw, Drawing, Pt, Rect, pt};
use crate::report::model::{Degrees, Mark};
use serde::{Deserialize, Serialize};

/// Where an oil holds, °C of ambient. An end that nothing limits is `None`.
#[derive(Clone, Copy, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct Band {
    /// Coldest ambient; `None`: not limited.
    pub low_c: Option<f64>,
    /// Hottest ambient; `None`: not limited.
    pub high_c: Option<f64>,
}

/// One row of the figure.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct BandRow {
    /// The oil's letter.
    pub letter: String,
    /// The oil.
    pub label: String,
    /// `proposed`, `in use`.
    pub role: String,
    /// Whether it is the one proposed.
    pub picked: bool,
    /// Its verdict.
    pub mark: Mark,
    /// Where it holds; `None`: nowhere.
    pub band: Option<Band>,
    /// What the bar says in words: `covers the band`, `8 K short when cold`.
    pub says: String,
}

/// The figure of a machine's candidates.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct BandFigure {
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
    /// What the place gets, °C.
    pub need_c: (f64, f64),
    /// The same in words.
    pub need: String,
    /// The oils.
    pub rows: Vec<BandRow>,
}

/// The bands of one machine in a row of the overview.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct MiniBand {
    /// Id on its sheet.
    pub id: String,
    /// Ends of the axis, °C, the same for the whole table.
    pub axis_c: (f64, f64),
    /// Scale of the axis.
    pub degrees: Degrees,
    /// What the place gets, °C.
    pub need_c: (f64, f64),
    /// Where the oil in use holds, if it is another.
    pub now: Option<Band>,
    /// Where the oil proposed holds.
    pub proposed: Option<Band>,
    /// Its verdict.
    pub mark: Mark,
    /// Whether the figures of the axis are written, for the head of the table.
    pub head: bool,
}

impl Band {
    /// The ends in pixels, an unlimited one being the end of the axis.
    fn ends(&self, axis: &Axis) -> (f64, f64) {
        let low = self.low_c.unwrap_or(f64::NEG_INFINITY);
        let high = self.high_c.unwrap_or(f64::INFINITY);
        (
            axis.px_inside(low.max(axis.low)),
            axis.px_inside(high.min(axis.high)),
        )
    }

    /// The parts of the need it leaves uncovered, °C.
    fn bare(&self, need: (f64, f64)) -> Vec<(f64, f64)> {
        let low = self.low_c.unwrap_or(f64::NEG_INFINITY);
        let high = self.high_c.unwrap_or(f64::INFINITY);
        [(need.0, low.min(need.1)), (high.max(need.0), need.1)]
            .into_iter()
            .filter(|(a, b)| b > a)
            .collect()
    }
}

/// Half the height of a bar, by what it shows.
fn half_height(class: &str) -> f64 {
    match class {
        "bar b-now" => 3.0,
        c if c.ends_with("large") => 7.5,
        _ => 5.0,
    }
}

/// Draws a band's bar, arrows where it is not limited, and the hatching of what it leaves bare.
fn draw_bar(
    canvas: &mut Canvas,
    axis: &Axis,
    band: Option<Band>,
    bar: (Pt, &str),
    need: (f64, f64),
) {
    let (at, class) = bar;
    let half = half_height(class);
    let bare = band.map_or(vec![need], |band| band.bare(need));
    if let Some(band) = band {
        let (a, b) = band.ends(axis);
        canvas.rect(
            Rect {
                x: a,
                y: at.y - half,
                w: b - a,
                h: 2.0 * half,
            },
            class,
        );
        if band.low_c.is_none_or(|t| t < axis.low) {
            canvas.arrow(pt(a - 8.0, at.y), pt(-1.0, 0.0));
        }
        if band.high_c.is_none_or(|t| t > axis.high) {
            canvas.arrow(pt(b + 8.0, at.y), pt(1.0, 0.0));
        }
    }
    for (from, to) in bare {
        let (a, b) = (axis.px_inside(from), axis.px_inside(to));
        canvas.rect(
            Rect {
                x: a,
                y: at.y - half,
                w: b - a,
                h: 2.0 * half,
            },
            "bare",
        );
    }
}

const WIDTH: f64 = 920.0;
const LEFT: f64 = 284.0;
const RIGHT: f64 = 200.0;
const TOP: f64 = 40.0;
const ROW: f64 = 27.0;
/// Space for the figure beside the end of a bar.
const END: f64 = 34.0;

impl BandFigure {
    fn axis(&self) -> Axis {
        let (mut low, mut high) = self.need_c;
        for band in self.rows.iter().filter_map(|row| row.band) {
            low = low.min(band.low_c.unwrap_or(low));
            high = high.max(band.high_c.unwrap_or(high));
        }
        let low = ((low - 4.0) / 5.0).floor() * 5.0;
        let high = ((high + 4.0) / 5.0).ceil() * 5.0;
        let (low, high) = (low.max(-65.0), high.min(85.0));
        Axis {
            scale: Scale::Linear,
            low,
            high,
            start: LEFT,
            end: WIDTH - RIGHT,
        }
    }

    fn row(&self, canvas: &mut Canvas, axis: &Axis, row: &BandRow, y: f64) {
        canvas.balloon(pt(BALLOON + 1.5, y), &row.letter, row.picked);
        let style = if row.picked {
            Style::Strong
        } else {
            Style::Label
        };
        let role_width = super::measure::width(&row.role, Style::Tick) + 10.0;
        let name = fit(&row.label, style, LEFT - 26.0 - END - role_width);
        canvas.text(pt(26.0, y + 4.5), Anchor::Start, style, &name);
        let after = 26.0 + super::measure::width(&name, style) + 8.0;
        canvas.text(pt(after, y + 4.5), Anchor::Start, Style::Tick, &row.role);
        let class = format!("bar b-{} large", row.mark.word());
        draw_bar(canvas, axis, row.band, (pt(0.0, y), &class), self.need_c);
        if let Some(band) = row.band {
            self.figures(canvas, axis, (band, row.mark), y + 4.2);
        }
        let says = fit(&row.says, Style::Tick, RIGHT - END - 6.0);
        canvas.text(
            pt(WIDTH - RIGHT + END + 6.0, y + 4.2),
            Anchor::Start,
            Style::Tick,
            &says,
        );
    }

    /// The figures at the ends of a bar: beside it, or on it where a bare part lies beside it.
    fn figures(&self, canvas: &mut Canvas, axis: &Axis, row: (Band, Mark), y: f64) {
        let (band, mark) = row;
        let (a, b) = band.ends(axis);
        let inside = if mark == Mark::Open {
            Style::Dim
        } else {
            Style::Inside
        };
        let wide = b - a > 2.0 * END;
        if let Some(low) = band.low_c.filter(|t| axis.holds(*t)) {
            let bare = low > self.need_c.0;
            let beside = pt(
                if bare {
                    axis.px(self.need_c.0).min(a)
                } else {
                    a
                } - 5.0,
                y,
            );
            let (at, anchor, style) = if bare && wide {
                (pt(a + 4.0, y), Anchor::Start, inside)
            } else {
                (beside, Anchor::End, Style::Tick)
            };
            canvas.text(at, anchor, style, &self.degrees.figure_up(low));
        }
        if let Some(high) = band.high_c.filter(|t| axis.holds(*t)) {
            let bare = high < self.need_c.1;
            let beside = pt(
                if bare {
                    axis.px(self.need_c.1).max(b)
                } else {
                    b
                } + 5.0,
                y,
            );
            let (at, anchor, style) = if bare && wide {
                (pt(b - 4.0, y), Anchor::End, inside)
            } else {
                (beside, Anchor::Start, Style::Tick)
            };
            canvas.text(at, anchor, style, &self.degrees.figure_down(high));
        }
    }
}

impl Draw for BandFigure {
    fn id(&self) -> &str {
        &self.id
    }

    fn draw(&self, uid: &str) -> Drawing {
        let axis = self.axis();
        let bottom = TOP + ROW * self.rows.len() as f64;
        let mut canvas = Canvas::new(WIDTH, bottom + 24.0);
        for (t, label) in self.degrees.ticks(&axis, 40.0) {
            let x = axis.px(t);
            canvas.grid_line(pt(x, TOP - 6.0), pt(x, bottom));
            canvas.text(pt(x, bottom + 16.0), Anchor::Middle, Style::Tick, &label);
        }
        canvas.text(
            pt(WIDTH - RIGHT + END + 6.0, bottom + 16.0),
            Anchor::Start,
            Style::Axis,
            &format!("ambient, {}", self.degrees.unit()),
        );
        let (a, b) = (axis.px(self.need_c.0), axis.px(self.need_c.1));
        for (index, row) in self.rows.iter().enumerate() {
            self.row(&mut canvas, &axis, row, TOP + ROW * (index as f64 + 0.5));
        }
        for x in [a, b] {
            canvas.line(pt(x, TOP - 20.0), pt(x, bottom), "need");
        }
        canvas.across(a, b, TOP - 16.0, &self.need);
        canvas.finish(
            uid,
            "fig-svg fig-wide",
            Alternative::Told {
                title: &self.title,
                description: &self.description,
            },
        )
    }
}

const MINI: f64 = 224.0;

impl Draw for MiniBand {
    fn id(&self) -> &str {
        &self.id
    }

    fn draw(&self, uid: &str) -> Drawing {
        let axis = Axis {
            scale: Scale::Linear,
            low: self.axis_c.0,
            high: self.axis_c.1,
            start: 12.0,
            end: MINI - 12.0,
        };
        let height = if self.head { 15.0 } else { 34.0 };
        let mut canvas = Canvas::new(MINI, height);
        for (t, label) in self.degrees.ticks(&axis, 42.0) {
            if self.head {
                canvas.place(
                    Style::Tick,
                    &label,
                    &[(pt(axis.px(t), 11.0), Anchor::Middle)],
                );
            } else {
                canvas.grid_line(pt(axis.px(t), 1.0), pt(axis.px(t), height - 1.0));
            }
        }
        if self.head {
            return canvas.finish(uid, "mini", Alternative::Beside);
        }
        let y = if self.now.is_some() { 23.0 } else { 17.0 };
        if self.now.is_some() {
            draw_bar(
                &mut canvas,
                &axis,
                self.now,
                (pt(0.0, 9.0), "bar b-now"),
                self.need_c,
            );
        }
        let class = format!("bar b-{}", self.mark.word());
        draw_bar(
            &mut canvas,
            &axis,
            self.proposed,
            (pt(0.0, y), &class),
            self.need_c,
        );
        let need = [self.need_c.0, self.need_c.1].map(|t| axis.px_inside(t));
        canvas.uprights(&need, (1.0, height - 1.0), "need");
        canvas.finish(uid, "mini", Alternative::Beside)
    }
}
