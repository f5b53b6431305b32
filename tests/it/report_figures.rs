//! The figures: their numbers read back from the drawing, and no label on another.
//!
//! Positions are turned into values with nothing but the figure's own ticks, as a reader with a
//! ruler would do it.

mod labels;
mod read_back;

use crate::report_pages::fixtures;
use crate::report_pages::markup::{Piece, tags};
use filmwright::report::draw::axes::Scale;
use filmwright::report::draw::viscosity::{ViscosityFigure, draw_detail};
use filmwright::report::draw::{Draw, Drawing};
use filmwright::report::model::{Body, Degrees, Point, Sheet};

/// The figures of all fixtures, drawn, with a name for messages.
fn drawings() -> Vec<(String, Drawing)> {
    let mut out = Vec::new();
    for (name, sheet) in crate::report_pages::all() {
        for (id, drawing) in of_sheet(&sheet) {
            out.push((format!("{name}: {id}"), drawing));
        }
    }
    let mut fahrenheit = fixtures::curves();
    fahrenheit.degrees = Degrees::Fahrenheit;
    put_curves(&mut out, &fahrenheit);
    for (low, high, floor, ceiling) in [
        (-50.0, 20.0, 4.0, 1000.0),
        (10.0, 12.0, 300.0, 500_000.0),
        (20.0, 45.0, 90.0, 120.0),
    ] {
        let mut odd = fixtures::curves();
        odd.jaws[0].nu_mm2_s = floor;
        odd.details[0].limit_mm2_s = floor;
        odd.jaws[1].nu_mm2_s = ceiling;
        odd.details[1].limit_mm2_s = ceiling;
        (odd.jaws[1].from_c, odd.jaws[1].to_c) = (low, high);
        (odd.bands[0].from_c, odd.bands[0].to_c) = (low, high);
        odd.details[1].at_c = low;
        put_curves(&mut out, &odd);
    }
    out
}

fn put_curves(out: &mut Vec<(String, Drawing)>, figure: &ViscosityFigure) {
    out.push((
        format!("{:?} {:?}", figure.id, figure.jaws),
        figure.draw("u"),
    ));
    for detail in &figure.details {
        out.push((
            format!("{:?} {:?}", detail.id, figure.jaws),
            draw_detail(figure, detail, "u"),
        ));
    }
}

fn add<T: Draw>(out: &mut Vec<(String, Drawing)>, figure: Option<&T>) {
    out.extend(figure.map(|f| (f.id().to_owned(), f.draw("u"))));
}

fn of_sheet(sheet: &Sheet) -> Vec<(String, Drawing)> {
    let mut out = Vec::new();
    match &sheet.body {
        Body::Overview(body) => {
            add(&mut out, body.band_axis.as_ref());
            body.machines
                .iter()
                .for_each(|row| add(&mut out, row.band.as_ref()));
            add(&mut out, body.lists.as_ref());
            add(&mut out, body.gaps.head.as_ref());
        }
        Body::Machine(body) => body
            .points
            .iter()
            .for_each(|point| of_point(&mut out, point)),
        Body::Audit(body) => body
            .panels
            .iter()
            .for_each(|panel| add(&mut out, Some(&panel.figure))),
        Body::Oil(body) => add(&mut out, body.curves.as_ref().map(|c| &c.figure)),
        _ => {}
    }
    out
}

fn of_point(out: &mut Vec<(String, Drawing)>, point: &Point) {
    for row in point.candidates.iter().flat_map(|c| &c.rows) {
        add(out, Some(&row.bars));
    }
    add(out, point.summary.as_ref().map(|s| &s.bars));
    if let Some(ambient) = &point.ambient {
        add(out, ambient.bands.as_ref());
        add(out, ambient.season.as_ref());
    }
    if let Some(curves) = &point.curves {
        put_curves(out, &curves.figure);
    }
    add(out, point.gaps.head.as_ref());
}

/// A figure taken apart.
struct Read {
    pieces: Vec<Piece>,
}

/// A text of a figure.
struct Word {
    x: f64,
    y: f64,
    class: String,
    anchor: String,
    text: String,
}

impl Read {
    fn new(drawing: &Drawing) -> Self {
        Self {
            pieces: tags(drawing.svg.as_str()),
        }
    }

    fn words(&self) -> Vec<Word> {
        let mut out = Vec::new();
        for pair in self.pieces.windows(2) {
            let [open, Piece::Text(text)] = pair else {
                continue;
            };
            if open.is("text") {
                let attr = |name| open.attr(name).expect("set").to_owned();
                let classes = attr("class");
                let (class, rest) = classes.split_once(' ').unwrap_or((&classes, ""));
                let anchor = match rest.split(' ').next() {
                    Some("am") => "middle",
                    Some("ae") => "end",
                    _ => "start",
                };
                out.push(Word {
                    x: open.num("x"),
                    y: open.num("y"),
                    class: class.to_owned(),
                    anchor: anchor.to_owned(),
                    text: text.clone(),
                });
            }
        }
        out
    }

    fn all(&self, element: &str, class: &str) -> Vec<&Piece> {
        self.pieces
            .iter()
            .filter(|p| p.is(element) && p.class(class))
            .collect()
    }

    /// The points of the lines drawn for an item.
    fn item(&self, letter: &str, class: &str) -> Vec<(f64, f64)> {
        let start = self
            .pieces
            .iter()
            .position(|p| p.attr("data-item") == Some(letter))
            .expect("drawn");
        self.pieces[start + 1..]
            .iter()
            .take_while(|p| !matches!(p, Piece::Close(n) if n == "g"))
            .filter(|p| p.is("polyline") && p.class(class))
            .flat_map(points)
            .collect()
    }

    /// The ticks whose figures are set at that side, as value and pixel.
    fn ticks(&self, anchor: &str, across: bool) -> Vec<(f64, f64)> {
        self.words()
            .iter()
            .filter(|w| w.class == "t-tick" && w.anchor == anchor)
            .filter_map(|w| figure(&w.text).map(|v| (v, if across { w.x } else { w.y - 4.2 })))
            .collect()
    }
}

fn points(polyline: &Piece) -> Vec<(f64, f64)> {
    let list = polyline.attr("points").expect("points");
    list.split(' ')
        .map(|p| {
            let (x, y) = p.split_once(',').expect("a pair");
            (x.parse().expect("a number"), y.parse().expect("a number"))
        })
        .collect()
}

/// A printed figure as a number.
fn figure(text: &str) -> Option<f64> {
    text.replace('\u{2212}', "-")
        .replace('\u{202f}', "")
        .trim_start_matches('+')
        .parse()
        .ok()
}

/// A ruler laid along an axis: made from the outermost two ticks, checked against all others.
struct Ruler {
    scale: Scale,
    at: (f64, f64),
    per_px: f64,
}

impl Ruler {
    fn new(scale: Scale, ticks: &[(f64, f64)]) -> Self {
        assert!(ticks.len() >= 2, "two ticks at least: {ticks:?}");
        let by_px = |a: &&(f64, f64), b: &&(f64, f64)| a.1.total_cmp(&b.1);
        let (first, last) = (
            ticks.iter().min_by(by_px).expect("some"),
            ticks.iter().max_by(by_px).expect("some"),
        );
        let per_px = (scale.stretch(last.0) - scale.stretch(first.0)) / (last.1 - first.1);
        let ruler = Self {
            scale,
            at: (scale.stretch(first.0), first.1),
            per_px,
        };
        for (value, px) in ticks {
            // a pixel figure is written to a tenth: the ends and the tick itself
            assert!(
                (ruler.px(*value) - px).abs() < 0.11,
                "{value} at {px}, the ruler says {}",
                ruler.px(*value)
            );
        }
        ruler
    }

    fn value(&self, px: f64) -> f64 {
        self.scale.relax(self.at.0 + (px - self.at.1) * self.per_px)
    }

    fn px(&self, value: f64) -> f64 {
        self.at.1 + (self.scale.stretch(value) - self.at.0) / self.per_px
    }
}
