//! The figures. Each file draws one kind from plain numbers in stated units and labels; what they
//! share is one pair of axes ([`axes`]), one writer that escapes ([`svg`]), one way to part labels
//! ([`spread`]) and one estimate of how wide a text is ([`measure`]).
//!
//! Hatching marks the forbidden side of a limit; a margin is a dimension; nothing is told by
//! colour alone.

pub mod axes;
pub mod band;
pub mod gap_bars;
pub mod list_length;
pub mod margin_bars;
pub mod marks;
pub mod measure;
pub mod season;
pub mod spread;
pub mod svg;
pub mod trend;
pub mod viscosity;

use crate::report::escape::Markup;

/// A drawn figure.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Drawing {
    /// The SVG.
    pub svg: Markup,
    /// What the drawing had to leave out, for the caption.
    pub left_out: Option<String>,
}

/// Something that can be drawn.
pub trait Draw {
    /// Its id on its sheet.
    fn id(&self) -> &str;
    /// Draws it; every id inside starts with `uid`, which is unique on the page.
    fn draw(&self, uid: &str) -> Drawing;
}

/// A point on the drawing, in pixels from the upper left corner.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Pt {
    /// To the right.
    pub x: f64,
    /// Down.
    pub y: f64,
}

/// A point at `x`, `y`.
pub fn pt(x: f64, y: f64) -> Pt {
    Pt { x, y }
}

/// An upright rectangle in pixels.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Rect {
    /// Left edge.
    pub x: f64,
    /// Upper edge.
    pub y: f64,
    /// Width.
    pub w: f64,
    /// Height.
    pub h: f64,
}

impl Rect {
    /// The rectangle between two corners, in whichever order they come.
    pub fn between(a: Pt, b: Pt) -> Self {
        Self {
            x: a.x.min(b.x),
            y: a.y.min(b.y),
            w: (a.x - b.x).abs(),
            h: (a.y - b.y).abs(),
        }
    }

    /// Right edge.
    pub fn right(&self) -> f64 {
        self.x + self.w
    }

    /// Lower edge.
    pub fn bottom(&self) -> f64 {
        self.y + self.h
    }

    /// The area two rectangles share, square pixels.
    pub fn shared(&self, other: &Self) -> f64 {
        let w = self.right().min(other.right()) - self.x.max(other.x);
        let h = self.bottom().min(other.bottom()) - self.y.max(other.y);
        if w > 0.0 && h > 0.0 { w * h } else { 0.0 }
    }

    /// Whether the point lies inside.
    pub fn holds(&self, p: Pt) -> bool {
        p.x >= self.x && p.x <= self.right() && p.y >= self.y && p.y <= self.bottom()
    }
}
