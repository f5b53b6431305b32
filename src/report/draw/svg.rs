//! The one writer of SVG: every text and every attribute goes through it and comes out escaped.

use super::measure::{Anchor, Style, text_box};
use super::{Drawing, Pt, Rect, pt};
use crate::report::escape::{Markup, push_text};
use crate::report::model::Mark;
use std::fmt::Write as _;

/// Radius of a balloon.
pub const BALLOON: f64 = 8.5;

/// What a reader who cannot see the figure is told.
#[derive(Clone, Copy, Debug)]
pub enum Alternative<'a> {
    /// A title and a description inside the figure.
    Told {
        /// What it shows.
        title: &'a str,
        /// What is to be seen in it, with the numbers.
        description: &'a str,
    },
    /// Nothing: the same numbers stand in the text beside it.
    Beside,
}

/// A drawing under way.
#[derive(Clone, Debug)]
pub struct Canvas {
    out: String,
    /// The lines of the grid, behind everything, as one path.
    grid: String,
    width: f64,
    height: f64,
    taken: Vec<Rect>,
}

/// Air on both sides of a label that looks for a place, px.
const AIR: f64 = 2.0;

/// A pixel figure to a tenth: finer than paper shows, and a page holds thousands of them.
fn px(value: f64) -> String {
    let mut text = format!("{value:.1}");
    if text.ends_with(".0") {
        text.truncate(text.len() - 2);
    }
    if text == "-0" { "0".into() } else { text }
}

impl Canvas {
    /// An empty drawing of that size.
    pub fn new(width: f64, height: f64) -> Self {
        Self {
            out: String::new(),
            grid: String::new(),
            width,
            height,
            taken: Vec::new(),
        }
    }

    fn attr(&mut self, name: &str, value: &str) {
        let _ = write!(self.out, " {name}=\"");
        push_text(&mut self.out, value);
        self.out.push('"');
    }

    fn element(&mut self, name: &str, numbers: &[(&str, f64)], words: &[(&str, &str)]) {
        let _ = write!(self.out, "<{name}");
        for (key, value) in numbers {
            self.attr(key, &px(*value));
        }
        for (key, value) in words.iter().filter(|(_, value)| !value.is_empty()) {
            self.attr(key, value);
        }
        self.out.push_str("/>");
    }

    /// A straight line.
    pub fn line(&mut self, a: Pt, b: Pt, class: &str) {
        let ends = [("x1", a.x), ("y1", a.y), ("x2", b.x), ("y2", b.y)];
        self.element("line", &ends, &[("class", class)]);
    }

    /// Upright lines of one kind from `top` to `bottom`.
    pub fn uprights(&mut self, at: &[f64], (top, bottom): (f64, f64), class: &str) {
        let mut d = String::new();
        for x in at {
            let _ = write!(d, "M{} {}V{}", px(*x), px(top), px(bottom));
        }
        self.element("path", &[], &[("d", &d), ("class", class)]);
    }

    /// A line of the grid.
    pub fn grid_line(&mut self, a: Pt, b: Pt) {
        let _ = write!(self.grid, "M{} {}", px(a.x), px(a.y));
        let _ = match (px(a.x) == px(b.x), px(a.y) == px(b.y)) {
            (true, _) => write!(self.grid, "V{}", px(b.y)),
            (_, true) => write!(self.grid, "H{}", px(b.x)),
            _ => write!(self.grid, "L{} {}", px(b.x), px(b.y)),
        };
    }

    /// A line through points.
    pub fn polyline(&mut self, points: &[Pt], class: &str) {
        let mut list = String::new();
        for p in points {
            let _ = write!(
                list,
                "{}{},{}",
                if list.is_empty() { "" } else { " " },
                px(p.x),
                px(p.y)
            );
        }
        self.element("polyline", &[], &[("points", &list), ("class", class)]);
    }

    /// What the closure draws, kept together under the letter of the item it shows.
    pub fn item(&mut self, letter: &str, draw: impl FnOnce(&mut Self)) {
        self.out.push_str("<g");
        self.attr("data-item", letter);
        self.out.push('>');
        draw(self);
        self.out.push_str("</g>");
    }

    /// A filled shape through points.
    pub fn path(&mut self, points: &[Pt], class: &str) {
        let mut d = String::new();
        for p in points {
            let _ = write!(
                d,
                "{}{} {}",
                if d.is_empty() { "M" } else { "L" },
                px(p.x),
                px(p.y)
            );
        }
        d.push('Z');
        self.element("path", &[], &[("d", &d), ("class", class)]);
    }

    /// A rectangle; nothing where it has no area.
    pub fn rect(&mut self, r: Rect, class: &str) {
        if r.w > 0.0 && r.h > 0.0 {
            let sides = [("x", r.x), ("y", r.y), ("width", r.w), ("height", r.h)];
            self.element("rect", &sides, &[("class", class)]);
        }
    }

    /// A circle.
    pub fn circle(&mut self, at: Pt, radius: f64, class: &str) {
        self.element(
            "circle",
            &[("cx", at.x), ("cy", at.y), ("r", radius)],
            &[("class", class)],
        );
    }

    /// A text.
    pub fn text(&mut self, at: Pt, anchor: Anchor, style: Style, text: &str) {
        if text.is_empty() {
            return;
        }
        self.taken.push(text_box(at, anchor, style, text));
        let _ = write!(self.out, "<text x=\"{}\" y=\"{}\"", px(at.x), px(at.y));
        match anchor.class() {
            Some(anchor) => self.attr("class", &format!("{} {anchor}", style.class())),
            None => self.attr("class", style.class()),
        }
        self.out.push('>');
        push_text(&mut self.out, text);
        self.out.push_str("</text>");
    }

    /// A text at the first of the places where it lies on no earlier one and inside the drawing;
    /// if there is none, where it covers least.
    pub fn place(&mut self, style: Style, text: &str, places: &[(Pt, Anchor)]) {
        let mut best: Option<(f64, Pt, Anchor)> = None;
        for (at, anchor) in places {
            // letters run a little wider or narrower than measured: a hair of air on both sides
            let mut r = text_box(*at, *anchor, style, text);
            r.x -= AIR;
            r.w += 2.0 * AIR;
            let cost = self.cost(r);
            if best.is_none_or(|(least, ..)| cost < least) {
                best = Some((cost, *at, *anchor));
            }
            if cost == 0.0 {
                break;
            }
        }
        if let Some((_, at, anchor)) = best {
            self.text(at, anchor, style, text);
        }
    }

    /// Square pixels of earlier labels a box would cover, and of itself outside the drawing.
    fn cost(&self, r: Rect) -> f64 {
        let sheet = Rect {
            x: 0.0,
            y: 0.0,
            w: self.width,
            h: self.height,
        };
        let outside = (r.w * r.h - sheet.shared(&r)).max(0.0);
        let covered: f64 = self.taken.iter().map(|t| t.shared(&r)).sum();
        if outside < 1e-9 && covered < 1e-9 {
            0.0
        } else {
            outside + covered
        }
    }

    /// Keeps labels off a place.
    pub fn reserve(&mut self, r: Rect) {
        self.taken.push(r);
    }

    /// An item balloon with its letter.
    pub fn balloon(&mut self, at: Pt, letter: &str, picked: bool) {
        let r = BALLOON + if letter.chars().count() > 1 { 1.5 } else { 0.0 };
        self.circle(at, r, if picked { "bal bal-pick" } else { "bal" });
        self.taken.push(Rect {
            x: at.x - r,
            y: at.y - r,
            w: 2.0 * r,
            h: 2.0 * r,
        });
        let _ = write!(
            self.out,
            "<text x=\"{}\" y=\"{}\"",
            px(at.x),
            px(at.y + 4.4)
        );
        self.attr(
            "class",
            if picked {
                "t-bal am t-pick"
            } else {
                "t-bal am"
            },
        );
        self.out.push('>');
        push_text(&mut self.out, letter);
        self.out.push_str("</text>");
    }

    /// A verdict mark, 26 by 14 scaled to the width.
    pub fn mark(&mut self, at: Pt, mark: Mark, width: f64) {
        let place = [
            ("x", at.x),
            ("y", at.y),
            ("width", width),
            ("height", width * 14.0 / 26.0),
        ];
        let symbol = format!("#fw-mk-{}", mark.word());
        let class = format!("c-{}", mark.word());
        self.element("use", &place, &[("href", &symbol), ("class", &class)]);
    }

    /// An arrow head at the point, pointing along the direction.
    pub fn arrow(&mut self, tip: Pt, direction: Pt) {
        const LENGTH: f64 = 7.0;
        const HALF: f64 = 2.4;
        let back = pt(tip.x - LENGTH * direction.x, tip.y - LENGTH * direction.y);
        let side = pt(-direction.y * HALF, direction.x * HALF);
        let corners = [
            tip,
            pt(back.x + side.x, back.y + side.y),
            pt(back.x - side.x, back.y - side.y),
        ];
        self.path(&corners, "arw");
    }

    /// A dimension across: line, arrows, and the label where it fits.
    pub fn across(&mut self, x0: f64, x1: f64, y: f64, label: &str) {
        let (a, b) = (x0.min(x1), x0.max(x1));
        self.line(pt(a, y), pt(b, y), "dim");
        self.arrow(pt(a, y), pt(-1.0, 0.0));
        self.arrow(pt(b, y), pt(1.0, 0.0));
        let middle = f64::midpoint(a, b);
        let half = super::measure::width(label, Style::Dim) / 2.0;
        let centred = middle.max(half + 2.0).min(self.width - half - 2.0);
        let places = [
            (pt(centred, y - 4.5), Anchor::Middle),
            (pt(b + 6.0, y + 4.0), Anchor::Start),
            (pt(a - 6.0, y + 4.0), Anchor::End),
            (pt(centred, y + 13.5), Anchor::Middle),
        ];
        self.place(Style::Dim, label, &places);
    }

    /// A dimension upright: line, arrows (from outside where it is short), and the label beside it.
    pub fn upright(&mut self, x: f64, y0: f64, y1: f64, label: &str) {
        let (a, b) = (y0.min(y1), y0.max(y1));
        let short = b - a < 18.0;
        if short {
            self.line(pt(x, a - 14.0), pt(x, b + 14.0), "dim");
            self.arrow(pt(x, a), pt(0.0, 1.0));
            self.arrow(pt(x, b), pt(0.0, -1.0));
        } else {
            self.line(pt(x, a), pt(x, b), "dim");
            self.arrow(pt(x, a), pt(0.0, -1.0));
            self.arrow(pt(x, b), pt(0.0, 1.0));
        }
        let middle = f64::midpoint(a, b) + 4.2;
        let places = [
            (pt(x - 6.0, middle), Anchor::End),
            (pt(x + 6.0, middle), Anchor::Start),
            (pt(x - 6.0, a - 16.0), Anchor::End),
            (pt(x - 6.0, b + 22.0), Anchor::End),
            (pt(x + 6.0, a - 16.0), Anchor::Start),
            (pt(x + 6.0, b + 22.0), Anchor::Start),
        ];
        self.place(Style::Dim, label, &places);
    }

    /// Closes the drawing.
    pub fn finish(self, uid: &str, class: &str, alternative: Alternative<'_>) -> Drawing {
        let mut svg = Self::new(0.0, 0.0);
        svg.out.push_str("<svg");
        svg.attr(
            "viewBox",
            &format!("0 0 {} {}", px(self.width), px(self.height)),
        );
        svg.attr("width", &px(self.width));
        svg.attr("height", &px(self.height));
        svg.attr("class", class);
        match alternative {
            Alternative::Beside => {
                svg.attr("aria-hidden", "true");
                svg.out.push('>');
            }
            Alternative::Told { title, description } => {
                svg.attr("role", "img");
                svg.attr("aria-labelledby", &format!("{uid}-t {uid}-d"));
                svg.out.push('>');
                svg.told("title", &format!("{uid}-t"), title);
                svg.told("desc", &format!("{uid}-d"), description);
            }
        }
        if !self.grid.is_empty() {
            svg.element("path", &[], &[("d", &self.grid), ("class", "grid")]);
        }
        svg.out.push_str(&self.out);
        svg.out.push_str("</svg>");
        Drawing {
            svg: Markup::trusted(svg.out),
            left_out: None,
        }
    }

    fn told(&mut self, element: &str, id: &str, text: &str) {
        let _ = write!(self.out, "<{element}");
        self.attr("id", id);
        self.out.push('>');
        push_text(&mut self.out, text);
        let _ = write!(self.out, "</{element}>");
    }
}
