//! Viscosity against temperature on the axes of ASTM D341, where an oil is a straight line.
//!
//! The limits are two jaws: the floor drawn only over the temperatures the machine runs at and
//! hatched below, the ceiling only over those it starts at and hatched above. An oil is fit where
//! its line passes between them.

mod detail;
mod lines;
mod plot;

use super::axes::{Axes, Axis, Scale, viscosity_groups};
use super::measure::{Anchor, Style, fit};
use super::svg::{Alternative, Canvas};
use super::{Draw, Drawing, Rect, pt};
use crate::report::model::Degrees;
use plot::Plot;
use serde::{Deserialize, Serialize};

pub use detail::{Detail, draw_detail};

/// What an oil is on the figure.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
#[serde(rename_all = "kebab-case")]
pub enum Role {
    /// The one proposed: heaviest line.
    Proposed,
    /// In the machine now: heavy dashes.
    InUse,
    /// Another candidate: thin.
    #[default]
    Other,
}

/// Temperature, °C, and kinematic viscosity, mm²/s.
pub type Reading = (f64, f64);

/// The line of one oil.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct OilLine {
    /// Its letter in the table of candidates.
    pub letter: String,
    /// What it is here.
    pub role: Role,
    /// Readings along the line it is judged by, rising temperatures; two suffice where it is
    /// straight.
    pub line: Vec<Reading>,
    /// Readings along its line as new, where it is judged worn.
    pub as_new: Vec<Reading>,
    /// The readings stated by its source; beyond the first and last the line is extrapolated.
    pub stated: Vec<Reading>,
    /// Readings along its thin end and its thick end, where it has a tolerance.
    pub tolerance: Option<(Vec<Reading>, Vec<Reading>)>,
}

/// One jaw: a limit over the temperatures it applies at.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct Jaw {
    /// Whether it is a floor (the oil must be above) or a ceiling.
    pub floor: bool,
    /// The limit, mm²/s.
    pub nu_mm2_s: f64,
    /// Coldest temperature it applies at, °C.
    pub from_c: f64,
    /// Hottest.
    pub to_c: f64,
    /// Its words.
    pub label: String,
}

/// A band of temperatures, drawn as a dimension below the axis.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct TemperatureBand {
    /// Coldest, °C.
    pub from_c: f64,
    /// Hottest, °C.
    pub to_c: f64,
    /// Its words with the figures.
    pub label: String,
}

/// The whole figure.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct ViscosityFigure {
    /// Id on its sheet.
    pub id: String,
    /// Title for those who cannot see it.
    pub title: String,
    /// What is to be seen in it.
    pub description: String,
    /// Scale of the temperature axis.
    pub degrees: Degrees,
    /// The oils, in the order of the table.
    pub lines: Vec<OilLine>,
    /// The limits.
    pub jaws: Vec<Jaw>,
    /// Start and running bands.
    pub bands: Vec<TemperatureBand>,
    /// Enlarged views of the places that decide.
    pub details: Vec<Detail>,
}

const WIDTH: f64 = 600.0;
const LEFT: f64 = 66.0;
const RIGHT: f64 = 84.0;
const TOP: f64 = 30.0;
const HEIGHT: f64 = 318.0;
const BAND_ROW: f64 = 24.0;

impl Draw for ViscosityFigure {
    fn id(&self) -> &str {
        &self.id
    }

    fn draw(&self, uid: &str) -> Drawing {
        let axes = self.axes();
        let shown = lines::shown(&self.lines, &axes);
        let plot = Plot::new(axes, &shown);
        let below = axes.frame().bottom() + plot.tick_row + 42.0;
        let height = below + BAND_ROW * self.bands.len() as f64 + 4.0;
        let mut canvas = Canvas::new(WIDTH, height);
        plot.grid(
            &mut canvas,
            &axes.y.ticks(&viscosity_groups(), 17.0),
            &self.temperature_ticks(&axes),
        );
        canvas.text(
            pt(axes.frame().x, TOP - 12.0),
            Anchor::Start,
            Style::Axis,
            "Kinematic viscosity ν, mm²/s",
        );
        let axis_name = format!("Oil temperature, {}", self.degrees.unit());
        let name_at = pt(
            axes.frame().right(),
            axes.frame().bottom() + plot.tick_row + 18.0,
        );
        canvas.text(name_at, Anchor::End, Style::Axis, &axis_name);
        plot.lines(&mut canvas, &shown);
        for jaw in &self.jaws {
            draw_jaw(&mut canvas, &axes, jaw);
        }
        plot.balloons(&mut canvas, &shown);
        for detail in &self.details {
            detail.outline(&mut canvas, self, &axes);
        }
        for jaw in &self.jaws {
            label_jaw(&mut canvas, &axes, jaw);
        }
        for detail in &self.details {
            detail.letter(&mut canvas, self, &axes);
        }
        self.draw_bands(&mut canvas, &axes, below);
        let told = Alternative::Told {
            title: &self.title,
            description: &self.description,
        };
        let mut drawing = canvas.finish(uid, "fig-svg", told);
        drawing.left_out = lines::left_out(&self.lines, &shown);
        drawing
    }
}

impl ViscosityFigure {
    fn axes(&self) -> Axes {
        let (low, high) = self.temperatures();
        let (bottom, top) = self.viscosities(low, high);
        Axes {
            x: Axis {
                scale: Scale::LogKelvin,
                low,
                high,
                start: LEFT,
                end: WIDTH - RIGHT,
            },
            y: Axis {
                scale: Scale::DoubleLog,
                low: bottom,
                high: top,
                start: TOP + HEIGHT,
                end: TOP,
            },
        }
    }

    /// From well below the coldest start to well above the hottest oil, in whole tens.
    fn temperatures(&self) -> (f64, f64) {
        let ends = self
            .bands
            .iter()
            .map(|b| (b.from_c, b.to_c))
            .chain(self.jaws.iter().map(|j| (j.from_c, j.to_c)));
        let (mut low, mut high) = (f64::INFINITY, f64::NEG_INFINITY);
        for (from, to) in ends {
            low = low.min(from);
            high = high.max(to);
        }
        if !low.is_finite() || !high.is_finite() {
            (low, high) = (-10.0, 90.0);
        }
        let low = ((low - 10.0) / 10.0).floor() * 10.0;
        let high = (((high + 16.0) / 10.0).ceil() * 10.0).max(low + 80.0);
        (low.max(-80.0), high.min(300.0))
    }

    /// The limits, with room beyond them for the lines that break them.
    fn viscosities(&self, low: f64, high: f64) -> (f64, f64) {
        let floor = self
            .jaws
            .iter()
            .filter(|j| j.floor)
            .map(|j| j.nu_mm2_s)
            .fold(f64::INFINITY, f64::min);
        let ceiling = self
            .jaws
            .iter()
            .filter(|j| !j.floor)
            .map(|j| j.nu_mm2_s)
            .fold(0.0, f64::max);
        let at = |t: f64| {
            self.lines
                .iter()
                .filter_map(move |l| lines::viscosity_at(&l.line, t))
        };
        let thinnest = at(high).fold(f64::INFINITY, f64::min);
        let thickest = at(low).fold(0.0, f64::max);
        let bottom = (thinnest / 1.25)
            .min(floor / 2.5)
            .max(if floor.is_finite() { floor / 8.0 } else { 0.0 });
        let top = if ceiling > 0.0 {
            ceiling * 5.0
        } else {
            // no machine starts in oil thicker than this; beyond it only figures of the axis grow
            (thickest * 1.5).min(1.5e6)
        };
        let bottom = if bottom.is_finite() {
            bottom.max(0.6)
        } else {
            5.0
        };
        (bottom, top.clamp(bottom * 40.0, 2e7_f64.max(bottom * 50.0)))
    }

    fn temperature_ticks(&self, axes: &Axes) -> Vec<(f64, String)> {
        self.degrees.ticks(&axes.x, 34.0)
    }

    fn draw_bands(&self, canvas: &mut Canvas, axes: &Axes, below: f64) {
        for (row, band) in self.bands.iter().enumerate() {
            let y = below + BAND_ROW * row as f64 + 10.0;
            let (a, b) = (axes.x.px_inside(band.from_c), axes.x.px_inside(band.to_c));
            for x in [a, b] {
                canvas.line(pt(x, axes.frame().bottom()), pt(x, y + 4.0), "ext");
            }
            canvas.across(a, b, y, &fit(&band.label, Style::Dim, WIDTH - 8.0));
        }
    }
}

/// The ends of a jaw in pixels; never shorter than a hand's breadth of the drawing.
fn jaw_ends(axes: &Axes, jaw: &Jaw) -> (f64, f64) {
    let (a, b) = (axes.x.px_inside(jaw.from_c), axes.x.px_inside(jaw.to_c));
    if b - a >= 16.0 {
        (a, b)
    } else {
        (a - 8.0, b + 8.0)
    }
}

fn draw_jaw(canvas: &mut Canvas, axes: &Axes, jaw: &Jaw) {
    let (a, b) = jaw_ends(axes, jaw);
    let y = axes.y.px(jaw.nu_mm2_s);
    let depth = 9.0;
    let top = if jaw.floor { y } else { y - depth };
    for x in [a, b] {
        canvas.line(pt(x, y), pt(x, axes.frame().bottom()), "ext");
    }
    canvas.rect(
        Rect {
            x: a,
            y: top,
            w: b - a,
            h: depth,
        },
        "jaw-hatch",
    );
    canvas.line(
        pt(a, y),
        pt(b, y),
        if jaw.floor {
            "jaw jaw-floor"
        } else {
            "jaw jaw-ceiling"
        },
    );
}

fn label_jaw(canvas: &mut Canvas, axes: &Axes, jaw: &Jaw) {
    let (a, b) = jaw_ends(axes, jaw);
    let y = axes.y.px(jaw.nu_mm2_s);
    let near = if jaw.floor { y + 23.0 } else { y - 14.0 };
    let far = if jaw.floor { y + 39.0 } else { y - 30.0 };
    let farther = if jaw.floor { y + 55.0 } else { y - 46.0 };
    // on the side that serves, where the forbidden one has no room left
    let other = if jaw.floor { y - 8.0 } else { y + 17.0 };
    let inside = axes.frame().x + 4.0;
    let places = [
        (pt(f64::midpoint(a, b), near), Anchor::Middle),
        (pt(a, near), Anchor::Start),
        (pt(b, near), Anchor::End),
        (pt(inside, near), Anchor::Start),
        (pt(f64::midpoint(a, b), far), Anchor::Middle),
        (pt(inside, far), Anchor::Start),
        (pt(b, far), Anchor::End),
        (pt(axes.frame().right() - 4.0, near), Anchor::End),
        (pt(axes.frame().right() - 4.0, far), Anchor::End),
        (pt(f64::midpoint(a, b), farther), Anchor::Middle),
        (pt(inside, farther), Anchor::Start),
        (pt(axes.frame().right() - 4.0, farther), Anchor::End),
        (pt(f64::midpoint(a, b), other), Anchor::Middle),
        (pt(inside, other), Anchor::Start),
        (pt(axes.frame().right() - 4.0, other), Anchor::End),
    ];
    let label = fit(&jaw.label, Style::Strong, axes.frame().w - 8.0);
    canvas.place(Style::Strong, &label, &places);
}
