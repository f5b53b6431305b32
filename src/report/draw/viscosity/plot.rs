//! What the figure and its details share: grid and ticks, the drawn lines, the item balloons.

use super::lines::{PITCH, end, over, visible};
use super::{OilLine, Reading, Role};
use crate::report::draw::axes::Axes;
use crate::report::draw::measure::{Anchor, Style};
use crate::report::draw::spread::spread;
use crate::report::draw::svg::{BALLOON, Canvas};
use crate::report::draw::{Pt, pt};
use crate::report::model::grouped;

/// A frame with its axes and what has to be kept free around it.
pub(super) struct Plot {
    axes: Axes,
    /// Height of the row of balloons below the frame; zero where none is needed.
    pub(super) tick_row: f64,
}

/// A label at the end of a line.
struct Tag<'a> {
    from: Pt,
    letter: &'a str,
    picked: bool,
    as_new: bool,
}

impl Plot {
    pub(super) fn new(axes: Axes, shown: &[&OilLine]) -> Self {
        let low_ends = shown
            .iter()
            .filter_map(|l| end(&axes, &l.line))
            .filter(|p| leaves_below(*p, &axes))
            .count();
        let tick_row = 16.0
            + if low_ends > 0 {
                2.0 * BALLOON + 7.0
            } else {
                0.0
            };
        Self { axes, tick_row }
    }

    /// Grid lines, tick figures and the frame.
    pub(super) fn grid(&self, canvas: &mut Canvas, nus: &[f64], temps: &[(f64, String)]) {
        let frame = self.axes.frame();
        for nu in nus {
            let y = self.axes.y.px(*nu);
            canvas.grid_line(pt(frame.x, y), pt(frame.right(), y));
            canvas.text(
                pt(frame.x - 7.0, y + 4.2),
                Anchor::End,
                Style::Tick,
                &grouped(*nu),
            );
        }
        for (t, label) in temps {
            let x = self.axes.x.px(*t);
            canvas.grid_line(pt(x, frame.y), pt(x, frame.bottom()));
            let at = pt(x, frame.bottom() + self.tick_row);
            canvas.text(at, Anchor::Middle, Style::Tick, label);
        }
        canvas.rect(frame, "frame");
    }

    /// All lines: tolerance bands first, then the others, the proposed one on top.
    pub(super) fn lines(&self, canvas: &mut Canvas, shown: &[&OilLine]) {
        for line in shown {
            if let Some((thin, thick)) = &line.tolerance {
                self.tolerance(canvas, thin, thick);
            }
        }
        for (index, line) in shown
            .iter()
            .enumerate()
            .filter(|(_, l)| l.role != Role::Proposed)
        {
            self.line(canvas, line, index);
        }
        for (index, line) in shown
            .iter()
            .enumerate()
            .filter(|(_, l)| l.role == Role::Proposed)
        {
            self.line(canvas, line, index);
        }
    }

    fn tolerance(&self, canvas: &mut Canvas, thin: &[Reading], thick: &[Reading]) {
        let (low, high) = (self.axes.x.low, self.axes.x.high);
        let inside = |readings: Vec<Reading>| -> Vec<Pt> {
            let bounds = (self.axes.y.low, self.axes.y.high);
            readings
                .into_iter()
                .map(|(t, nu)| self.axes.at(t, nu.clamp(bounds.0, bounds.1)))
                .collect()
        };
        // a few stops between keep the clamped corners from cutting across the frame
        let stops = |line: &[Reading]| -> Vec<Reading> {
            (0..=24_u8)
                .filter_map(|i| {
                    let t = low + (high - low) * f64::from(i) / 24.0;
                    super::lines::viscosity_at(line, t).map(|nu| (t, nu))
                })
                .collect()
        };
        let mut outline = inside(stops(thin));
        outline.extend(inside(stops(thick)).into_iter().rev());
        if outline.len() > 3 {
            canvas.path(&outline, "tol");
        }
    }

    fn line(&self, canvas: &mut Canvas, oil: &OilLine, index: usize) {
        let class = match oil.role {
            Role::Proposed => "ln ln-pick".to_owned(),
            Role::InUse => "ln ln-now".to_owned(),
            Role::Other => format!("ln ln-{}", index % 6),
        };
        canvas.item(&oil.letter, |canvas| {
            if !oil.as_new.is_empty() {
                self.stretch(
                    canvas,
                    &oil.as_new,
                    (self.axes.x.low, self.axes.x.high),
                    "ln ln-new",
                );
            }
            for (from, to, extrapolated) in self.parts(oil) {
                let class = if extrapolated {
                    format!("{class} ln-out")
                } else {
                    class.clone()
                };
                self.stretch(canvas, &oil.line, (from, to), &class);
            }
            if oil.role != Role::Other {
                for (t, nu) in oil
                    .stated
                    .iter()
                    .filter(|(t, nu)| self.axes.x.holds(*t) && self.axes.y.holds(*nu))
                {
                    canvas.circle(self.axes.at(*t, *nu), 2.6, "pt-stated");
                }
            }
        });
    }

    /// The temperature stretches of a line: extrapolated, as stated, extrapolated.
    fn parts(&self, oil: &OilLine) -> Vec<(f64, f64, bool)> {
        let (low, high) = (self.axes.x.low, self.axes.x.high);
        let (Some(first), Some(last)) = (oil.stated.first(), oil.stated.last()) else {
            return vec![(low, high, false)];
        };
        let (a, b) = (first.0.clamp(low, high), last.0.clamp(low, high));
        [(low, a, true), (a, b, false), (b, high, true)]
            .into_iter()
            .filter(|(from, to, _)| to > from)
            .collect()
    }

    fn stretch(&self, canvas: &mut Canvas, line: &[Reading], ends: (f64, f64), class: &str) {
        for run in visible(&self.axes, &over(line, ends.0, ends.1)) {
            canvas.polyline(&run, class);
        }
    }

    /// Balloons where the lines leave the frame: a column at the right, a row below.
    pub(super) fn balloons(&self, canvas: &mut Canvas, shown: &[&OilLine]) {
        let mut tags = Vec::new();
        for oil in shown {
            let picked = oil.role == Role::Proposed;
            if let Some(from) = end(&self.axes, &oil.line) {
                tags.push(Tag {
                    from,
                    letter: &oil.letter,
                    picked,
                    as_new: false,
                });
            }
            if let Some(from) = end(&self.axes, &oil.as_new) {
                tags.push(Tag {
                    from,
                    letter: &oil.letter,
                    picked,
                    as_new: true,
                });
            }
        }
        let (below, beside): (Vec<_>, Vec<_>) = tags
            .into_iter()
            .partition(|t| leaves_below(t.from, &self.axes));
        self.beside(canvas, &beside);
        self.below(canvas, &below);
    }

    fn beside(&self, canvas: &mut Canvas, tags: &[Tag<'_>]) {
        let frame = self.axes.frame();
        let wanted: Vec<f64> = tags.iter().map(|t| t.from.y).collect();
        let ys = spread(&wanted, PITCH, frame.y + 2.0, frame.bottom() - 2.0);
        let x = frame.right() + 26.0;
        for (tag, y) in tags.iter().zip(ys) {
            let at = pt(x, y);
            canvas.line(tag.from, pt(x - BALLOON, y), "leader");
            if tag.as_new {
                let words = format!("{} new", tag.letter);
                canvas.text(pt(x - BALLOON, y + 4.2), Anchor::Start, Style::Tick, &words);
            } else {
                canvas.balloon(at, tag.letter, tag.picked);
            }
        }
    }

    fn below(&self, canvas: &mut Canvas, tags: &[Tag<'_>]) {
        let frame = self.axes.frame();
        let tags: Vec<_> = tags.iter().filter(|t| !t.as_new).collect();
        let wanted: Vec<f64> = tags.iter().map(|t| t.from.x).collect();
        let xs = spread(
            &wanted,
            PITCH + 2.0,
            frame.x + BALLOON,
            frame.right() - BALLOON,
        );
        let y = frame.bottom() + BALLOON + 4.0;
        for (tag, x) in tags.iter().zip(xs) {
            canvas.line(tag.from, pt(x, y - BALLOON), "leader");
            canvas.balloon(pt(x, y), tag.letter, tag.picked);
        }
    }
}

fn leaves_below(p: Pt, axes: &Axes) -> bool {
    let frame = axes.frame();
    p.y >= frame.bottom() - 0.01 && p.x < frame.right() - 0.01
}
