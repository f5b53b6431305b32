//! No label lies on another, none leaves its figure.

use super::{Read, drawings};
use filmwright::report::draw::measure::{Anchor, Style, text_box};
use filmwright::report::draw::{Rect, pt};

fn style(class: &str) -> Style {
    match class {
        "t-tick" => Style::Tick,
        "t-axis" => Style::Axis,
        "t-dim" => Style::Dim,
        "t-label" => Style::Label,
        "t-strong" => Style::Strong,
        "t-head" => Style::Head,
        "t-in" => Style::Inside,
        other => panic!("a text of class {other}"),
    }
}

fn boxes(read: &Read) -> Vec<(String, Rect)> {
    let words = read
        .words()
        .into_iter()
        .filter(|w| !w.class.starts_with("t-bal"))
        .map(|w| {
            let anchor = match w.anchor.as_str() {
                "start" => Anchor::Start,
                "middle" => Anchor::Middle,
                _ => Anchor::End,
            };
            let r = text_box(pt(w.x, w.y), anchor, style(&w.class), &w.text);
            (w.text, r)
        });
    let balloons = read.all("circle", "bal").into_iter().map(|c| {
        let r = c.num("r");
        (
            format!("balloon at {} {}", c.num("cx"), c.num("cy")),
            Rect {
                x: c.num("cx") - r,
                y: c.num("cy") - r,
                w: 2.0 * r,
                h: 2.0 * r,
            },
        )
    });
    words.chain(balloons).collect()
}

#[test]
fn no_label_lies_on_another() {
    let mut faults = Vec::new();
    for (name, drawing) in drawings() {
        let boxes = boxes(&Read::new(&drawing));
        for (i, (a, first)) in boxes.iter().enumerate() {
            for (b, second) in &boxes[i + 1..] {
                // half a square pixel is the roundness of a balloon's corner
                if first.shared(second) > 0.5 {
                    faults.push(format!(
                        "{name}: \"{a}\" and \"{b}\" share {:.1}",
                        first.shared(second)
                    ));
                }
            }
        }
    }
    assert!(
        faults.is_empty(),
        "{} labels lie on others:\n{}",
        faults.len(),
        faults.join("\n")
    );
}

#[test]
fn no_label_leaves_its_figure() {
    for (name, drawing) in drawings() {
        let read = Read::new(&drawing);
        let size: Vec<f64> = ["width", "height"].map(|a| read.pieces[0].num(a)).to_vec();
        for (text, r) in boxes(&read) {
            assert!(
                r.x >= -0.5
                    && r.y >= -0.5
                    && r.right() <= size[0] + 0.5
                    && r.bottom() <= size[1] + 0.5,
                "{name}: {text} {r:?} of {size:?}"
            );
        }
    }
}
