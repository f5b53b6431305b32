//! The oil list against how many machines it serves: one verdict mark a machine and list, or, on
//! sites too large for that, one bar per verdict with its count.

use super::measure::{Anchor, Style, fit};
use super::svg::{Alternative, Canvas};
use super::{Draw, Drawing, Rect, pt};
use crate::report::model::Mark;
use serde::{Deserialize, Serialize};

/// One list.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct ListRow {
    /// `4 oils`.
    pub title: String,
    /// What is particular about it: `proposed`, `without SG-320`.
    pub note: String,
    /// Whether it is the one proposed.
    pub picked: bool,
    /// How many machines hold, are tight, fail, are open.
    pub counts: [u32; 4],
}

/// The figure.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct ListFigure {
    /// Id on its sheet.
    pub id: String,
    /// Title for those who cannot see it.
    pub title: String,
    /// What is to be seen in it.
    pub description: String,
    /// The caption.
    pub caption: String,
    /// The lists, shortest first.
    pub rows: Vec<ListRow>,
}

const WIDTH: f64 = 920.0;
const LEFT: f64 = 230.0;
const RIGHT: f64 = 210.0;
const ROW: f64 = 42.0;
const MARK: f64 = 24.0;
const ORDER: [Mark; 4] = [Mark::Holds, Mark::Tight, Mark::Fails, Mark::Open];

impl Draw for ListFigure {
    fn id(&self) -> &str {
        &self.id
    }

    fn draw(&self, uid: &str) -> Drawing {
        let mut canvas = Canvas::new(WIDTH, ROW * self.rows.len() as f64 + 4.0);
        let most = self
            .rows
            .iter()
            .map(|r| r.counts.iter().sum::<u32>())
            .max()
            .unwrap_or(0);
        let pitch = (WIDTH - LEFT - RIGHT) / f64::from(most.max(1));
        for (index, row) in self.rows.iter().enumerate() {
            let y = ROW * (index as f64 + 0.5);
            let style = if row.picked {
                Style::Strong
            } else {
                Style::Label
            };
            canvas.text(
                pt(0.0, y - 3.0),
                Anchor::Start,
                style,
                &fit(&row.title, style, LEFT - 12.0),
            );
            canvas.text(
                pt(0.0, y + 13.0),
                Anchor::Start,
                Style::Tick,
                &fit(&row.note, Style::Tick, LEFT - 12.0),
            );
            if pitch >= MARK + 1.0 {
                marks(&mut canvas, row, pitch.min(MARK + 5.0), y);
            } else {
                bars(&mut canvas, row, pitch, y);
            }
            let says = counts_in_words(row.counts);
            canvas.text(
                pt(WIDTH - RIGHT + 14.0, y + 4.0),
                Anchor::Start,
                Style::Tick,
                &fit(&says, Style::Tick, RIGHT - 14.0),
            );
        }
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

fn marks(canvas: &mut Canvas, row: &ListRow, pitch: f64, y: f64) {
    let mut x = LEFT;
    for (mark, count) in ORDER.iter().zip(row.counts) {
        for _ in 0..count {
            canvas.mark(pt(x, y - 6.5), *mark, MARK);
            x += pitch;
        }
    }
}

fn bars(canvas: &mut Canvas, row: &ListRow, per_machine: f64, y: f64) {
    let mut x = LEFT;
    for (mark, count) in ORDER.iter().zip(row.counts) {
        let w = f64::from(count) * per_machine;
        let class = format!("bar b-{}", mark.word());
        canvas.rect(
            Rect {
                x,
                y: y - 9.0,
                w: (w - 1.5).max(0.0),
                h: 18.0,
            },
            &class,
        );
        x += w;
    }
}

/// `10 hold, 3 tight, 1 fails`.
pub fn counts_in_words(counts: [u32; 4]) -> String {
    let words = [
        ("holds", "hold"),
        ("tight", "tight"),
        ("fails", "fail"),
        ("open", "open"),
    ];
    let parts: Vec<String> = counts
        .iter()
        .zip(words)
        .filter(|(n, _)| **n > 0)
        .map(|(n, (one, many))| format!("{n} {}", if *n == 1 { one } else { many }))
        .collect();
    parts.join(", ")
}
