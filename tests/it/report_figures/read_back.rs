//! What a ruler reads off the figures is what went in.

use super::{Read, Ruler, figure, fixtures};
use crate::report_pages::{all, fixtures::OILS};
use filmwright::report::draw::Draw;
use filmwright::report::draw::axes::Scale;
use filmwright::report::draw::gap_bars::GapBar;
use filmwright::report::draw::list_length::{ListFigure, ListRow};
use filmwright::report::draw::viscosity::draw_detail;
use filmwright::report::model::{Body, Degrees};

/// Viscosity on the straight line through two readings, at a temperature.
fn on_line(line: &[(f64, f64)], t: f64) -> f64 {
    let x = |t: f64| Scale::LogKelvin.stretch(t);
    let y = |nu: f64| Scale::DoubleLog.stretch(nu);
    let share = (x(t) - x(line[0].0)) / (x(line[1].0) - x(line[0].0));
    Scale::DoubleLog.relax(y(line[0].1) + share * (y(line[1].1) - y(line[0].1)))
}

fn close(found: f64, wanted: f64, tolerance: f64, what: &str) {
    assert!(
        (found - wanted).abs() <= tolerance,
        "{what}: {found} read, {wanted} drawn"
    );
}

#[test]
fn oil_lines_run_through_their_readings() {
    let figure = fixtures::curves();
    for read in [
        Read::new(&figure.draw("u")),
        Read::new(&draw_detail(&figure, &figure.details[0], "u")),
    ] {
        let y = Ruler::new(Scale::DoubleLog, &read.ticks("end", false));
        let x = Ruler::new(Scale::LogKelvin, &read.ticks("middle", true));
        for oil in &OILS {
            let points = read.item(oil.letter, "ln");
            assert!(points.len() >= 2, "{} is drawn", oil.letter);
            let drawn_as_new = oil.letter == "E";
            for (px, py) in points.into_iter().filter(|_| !drawn_as_new) {
                let (t, nu) = (x.value(px), y.value(py));
                close(
                    nu / on_line(&oil.line, t),
                    1.0,
                    0.004,
                    &format!("{} at {t:.1} °C", oil.letter),
                );
            }
        }
    }
}

#[test]
fn worn_and_new_lines_are_both_there() {
    let figure = fixtures::curves();
    let read = Read::new(&figure.draw("u"));
    let y = Ruler::new(Scale::DoubleLog, &read.ticks("end", false));
    let x = Ruler::new(Scale::LogKelvin, &read.ticks("middle", true));
    let new = read.item("E", "ln-new");
    assert!(new.len() >= 2);
    for (px, py) in &new {
        close(
            y.value(*py) / on_line(&figure.lines[4].as_new, x.value(*px)),
            1.0,
            0.004,
            "as new",
        );
    }
    let worn: Vec<_> = read
        .item("E", "ln")
        .into_iter()
        .filter(|p| !new.contains(p))
        .collect();
    for (px, py) in worn {
        close(
            y.value(py) / on_line(&OILS[4].line, x.value(px)),
            1.0,
            0.004,
            "worn",
        );
    }
}

#[test]
fn lines_beyond_the_stated_readings_are_drawn_apart() {
    let figure = fixtures::curves();
    let read = Read::new(&figure.draw("u"));
    let x = Ruler::new(Scale::LogKelvin, &read.ticks("middle", true));
    let out = read.item("A", "ln-out");
    let hottest = out
        .iter()
        .map(|p| x.value(p.0))
        .fold(f64::NEG_INFINITY, f64::max);
    close(hottest, 40.0, 0.1, "the coldest stated reading");
}

#[test]
fn jaws_stand_at_their_limits_over_their_ranges() {
    let figure = fixtures::curves();
    let read = Read::new(&figure.draw("u"));
    let y = Ruler::new(Scale::DoubleLog, &read.ticks("end", false));
    let x = Ruler::new(Scale::LogKelvin, &read.ticks("middle", true));
    for (class, jaw) in ["jaw-floor", "jaw-ceiling"].iter().zip(&figure.jaws) {
        let line = read.all("line", class)[0];
        close(y.value(line.num("y1")) / jaw.nu_mm2_s, 1.0, 0.004, class);
        close(x.value(line.num("x1")), jaw.from_c, 0.1, class);
        close(x.value(line.num("x2")), jaw.to_c, 0.1, class);
    }
    // hatched on the forbidden side
    let floor = read.all("line", "jaw-floor")[0].num("y1");
    assert!(
        read.all("rect", "jaw-hatch")
            .iter()
            .any(|r| (r.num("y") - floor).abs() < 0.02),
        "below the floor"
    );
    let ceiling = read.all("line", "jaw-ceiling")[0].num("y1");
    assert!(
        read.all("rect", "jaw-hatch")
            .iter()
            .any(|r| (r.num("y") + r.num("height") - ceiling).abs() < 0.02),
        "above the ceiling"
    );
}

#[test]
fn a_margin_is_dimensioned_from_its_limit_to_its_line() {
    let figure = fixtures::curves();
    for detail in &figure.details {
        let read = Read::new(&draw_detail(&figure, detail, "u"));
        let y = Ruler::new(Scale::DoubleLog, &read.ticks("end", false));
        let dim = read.all("line", "dim").into_iter().find(|l| {
            (l.num("x1") - l.num("x2")).abs() < 1e-9 && {
                let ends = [y.value(l.num("y1")), y.value(l.num("y2"))];
                ends.iter()
                    .any(|nu| (nu / detail.limit_mm2_s - 1.0).abs() < 0.004)
            }
        });
        let dim = dim.expect("a dimension that starts at the limit");
        let ends = [y.value(dim.num("y1")), y.value(dim.num("y2"))];
        let oil = on_line(&OILS[0].line, detail.at_c);
        assert!(
            ends.iter().any(|nu| (nu / oil - 1.0).abs() < 0.004),
            "{ends:?} should reach {oil}"
        );
        assert!(
            read.words()
                .iter()
                .any(|w| w.text == detail.margin && w.class == "t-dim")
        );
    }
}

#[test]
fn fahrenheit_ticks_stand_at_their_celsius() {
    let mut curves = fixtures::curves();
    curves.degrees = Degrees::Fahrenheit;
    let celsius: Vec<(f64, f64)> = Read::new(&curves.draw("u"))
        .ticks("middle", true)
        .into_iter()
        .map(|(f, px)| ((f - 32.0) / 1.8, px))
        .collect();
    let x = Ruler::new(Scale::LogKelvin, &celsius);
    let read = Read::new(&curves.draw("u"));
    close(
        x.value(read.all("line", "jaw-floor")[0].num("x2")),
        78.0,
        0.1,
        "the hottest sump",
    );
}

#[test]
fn margin_bars_end_at_their_margins() {
    for (index, oil) in OILS.iter().enumerate() {
        let read = Read::new(&fixtures::bars("bars", oil, true).draw("u"));
        let zero = read.all("line", "limit")[0].num("x1");
        let mut ticks = read.ticks("middle", true);
        ticks.push((0.0, zero));
        let ruler = Ruler::new(Scale::Linear, &ticks);
        let bars = read.all("rect", "bar");
        assert_eq!(bars.len(), 2, "{index}");
        for (bar, steps) in bars.iter().zip([oil.hot, oil.cold]) {
            let (left, right) = (bar.num("x"), bar.num("x") + bar.num("width"));
            let (tip, foot) = if steps < 0.0 {
                (left, right)
            } else {
                (right, left)
            };
            close(ruler.value(tip), steps, 0.01, oil.id);
            close(ruler.value(foot), 0.0, 0.01, oil.id);
        }
        let reserve = read.all("rect", "reserve")[0];
        close(
            ruler.value(reserve.num("x") + reserve.num("width")),
            0.5,
            0.01,
            "reserve",
        );
        let printed: Vec<f64> = read
            .words()
            .iter()
            .filter(|w| w.class == "t-dim")
            .filter_map(|w| figure(&w.text))
            .collect();
        assert_eq!(printed, [oil.hot, oil.cold]);
    }
}

#[test]
fn bands_reach_from_end_to_end() {
    let sheet = fixtures::machine();
    let Body::Machine(body) = &sheet.body else {
        panic!("a machine")
    };
    let bands = body.points[0]
        .ambient
        .as_ref()
        .and_then(|a| a.bands.as_ref())
        .expect("drawn");
    let read = Read::new(&bands.draw("u"));
    let ruler = Ruler::new(Scale::Linear, &read.ticks("middle", true));
    for (bar, oil) in read.all("rect", "bar").iter().zip(&OILS) {
        close(ruler.value(bar.num("x")), oil.band.0, 0.05, oil.id);
        close(
            ruler.value(bar.num("x") + bar.num("width")),
            oil.band.1,
            0.05,
            oil.id,
        );
    }
    let needs: Vec<f64> = read
        .all("line", "need")
        .iter()
        .map(|l| ruler.value(l.num("x1")))
        .collect();
    close(needs[0], -18.0, 0.05, "coldest");
    close(needs[1], 36.0, 0.05, "warmest");
    // C leaves −18 to −12 and 33 to 36 bare
    let bare: Vec<(f64, f64)> = read
        .all("rect", "bare")
        .iter()
        .map(|r| {
            (
                ruler.value(r.num("x")),
                ruler.value(r.num("x") + r.num("width")),
            )
        })
        .collect();
    close(bare[0].0, -18.0, 0.05, "bare");
    close(bare[0].1, -12.0, 0.05, "bare");
    close(bare[1].0, 33.0, 0.05, "bare");
    close(bare[1].1, 36.0, 0.05, "bare");
}

#[test]
fn months_stand_between_their_ends() {
    let sheet = fixtures::machine();
    let Body::Machine(body) = &sheet.body else {
        panic!("a machine")
    };
    let season = body.points[0]
        .ambient
        .as_ref()
        .and_then(|a| a.season.as_ref())
        .expect("drawn");
    let read = Read::new(&season.draw("u"));
    let ruler = Ruler::new(Scale::Linear, &read.ticks("end", false));
    let months = read.all("rect", "month");
    assert_eq!(months.len(), 12);
    for (bar, (low, high)) in months.iter().zip(&season.months_c) {
        close(ruler.value(bar.num("y")), *high, 0.1, "hottest");
        close(
            ruler.value(bar.num("y") + bar.num("height")),
            *low,
            0.1,
            "coldest",
        );
    }
    close(
        ruler.value(read.all("line", "season-low")[1].num("y1")),
        -8.0,
        0.1,
        "limit of the summer oil",
    );
}

#[test]
fn trends_show_their_samples_and_limits() {
    let (_, sheet) = all()
        .into_iter()
        .find(|(name, _)| *name == "audit")
        .expect("there");
    let Body::Audit(body) = &sheet.body else {
        panic!("an audit")
    };
    for panel in &body.panels {
        let read = Read::new(&panel.figure.draw("u"));
        let ruler = Ruler::new(Scale::Linear, &read.ticks("end", false));
        let line = super::points(read.all("polyline", "trend")[0]);
        for ((_, y), sample) in line.iter().zip(&panel.figure.samples) {
            close(ruler.value(*y), sample.steps, 0.01, &panel.tag);
        }
        if let Some(floor) = panel.figure.floor {
            close(
                ruler.value(read.all("line", "jaw-floor")[0].num("y1")),
                floor,
                0.01,
                "floor",
            );
        }
    }
}

#[test]
fn gap_bars_span_their_range() {
    let bar = GapBar {
        id: "g".into(),
        low: -0.4,
        high: 0.3,
        used: Some(0.1),
        reserve: 0.5,
        span: (-2.0, 2.0),
        head: false,
    };
    let head = Read::new(
        &GapBar {
            head: true,
            ..bar.clone()
        }
        .draw("u"),
    );
    let ruler = Ruler::new(Scale::Linear, &head.ticks("middle", true));
    let read = Read::new(&bar.draw("u"));
    let range = read.all("rect", "b-range")[0];
    close(ruler.value(range.num("x")), -0.4, 0.01, "least");
    close(
        ruler.value(range.num("x") + range.num("width")),
        0.3,
        0.01,
        "greatest",
    );
    close(
        ruler.value(read.all("circle", "pt-used")[0].num("cx")),
        0.1,
        0.01,
        "used",
    );
    close(
        ruler.value(read.all("line", "limit")[0].num("x1")),
        0.0,
        0.01,
        "limit",
    );
}

#[test]
fn list_lengths_count_machines() {
    let row = |counts| ListRow {
        title: "4 oils".into(),
        note: String::new(),
        picked: true,
        counts,
    };
    let mut lists = ListFigure {
        id: "l".into(),
        rows: vec![row([11, 3, 1, 2])],
        ..ListFigure::default()
    };
    let read = Read::new(&lists.draw("u"));
    let count = |word: &str| {
        read.pieces
            .iter()
            .filter(|p| p.is("use") && p.class(&format!("c-{word}")))
            .count()
    };
    assert_eq!(
        [
            count("holds"),
            count("tight"),
            count("fails"),
            count("open")
        ],
        [11, 3, 1, 2]
    );
    // a large site: lengths in proportion instead of marks
    lists.rows = vec![row([600, 300, 100, 0])];
    let read = Read::new(&lists.draw("u"));
    let widths: Vec<f64> = read
        .all("rect", "bar")
        .iter()
        .map(|r| r.num("width") + 1.5)
        .collect();
    close(
        widths[0] / widths[2],
        6.0,
        0.02,
        "six times as many hold as fail",
    );
    assert!(
        read.words()
            .iter()
            .any(|w| w.text == "600 hold, 300 tight, 100 fail")
    );
}
