//! `weigh`: candidate oils against what machines need, as text.

use crate::cli::Marks;
use crate::cli::text::{Column, band, folded, table, verdict};
use crate::demand::{Demand, End, PointDemands};
use crate::judge::Verdict;
use crate::judge::weigh::Margin;
use crate::quantity::show::{Toward, margin, quantity};
use crate::quantity::{Measure, ThermodynamicTemperature};
use crate::results::need::limit_amount;
use crate::weighing::{Candidate, Scales, Weighed};
use std::fmt::Write as _;

/// How a weighing is printed.
#[derive(Clone, Copy, Debug)]
pub struct Style {
    /// Verdict marks.
    pub marks: Marks,
    /// Columns of the terminal.
    pub width: usize,
}

const COLUMNS: [Column; 7] = [
    Column::text("", 0),
    Column::text("oil", 0),
    Column::text("verdict", 0),
    Column::number("hot", 4),
    Column::number("cold", 4),
    Column::text("holds in", 2),
    Column::text("because", 1),
];

/// One machine.
pub fn one(scales: &Scales<'_>, w: &Weighed<'_>, style: Style) -> String {
    let mut out = headline(scales, w);
    out.push('\n');
    needs(&mut out, scales, &w.demands);
    if w.candidates.is_empty() {
        out.push_str("\n  no oil is eligible here\n");
    } else {
        out.push('\n');
        let rows: Vec<Vec<String>> = w
            .candidates
            .iter()
            .enumerate()
            .map(|(i, c)| row(scales, i, c, style))
            .collect();
        out.push_str(&table(&COLUMNS, &rows, style.width));
    }
    conditions(&mut out, scales, w, style);
    barred(&mut out, scales, w, style);
    ambient(&mut out, scales, w);
    out
}

/// The answer, first.
fn headline(scales: &Scales<'_>, w: &Weighed<'_>) -> String {
    let address = w.point.address();
    let id = |c: &Candidate| scales.site.oils[c.oil].id.clone();
    let Some(best) = w.candidates.first() else {
        return format!("{address}  every oil is barred here\n");
    };
    let ends = ends(best);
    match best.judgement.verdict {
        Verdict::Holds | Verdict::Tight => {
            let act = if best.in_use {
                format!("keep {}", id(best))
            } else {
                format!("fill with {}", id(best))
            };
            let word = best.judgement.verdict.word();
            let it = if word == "holds" {
                "It holds"
            } else {
                "It is tight"
            };
            let n = best.conditions.len();
            let with = match n {
                0 => String::new(),
                1 => ", on 1 condition".to_owned(),
                n => format!(", on {n} conditions"),
            };
            format!(
                "{address}  {act}. {it}{with}: {ends}(reserve asked {})\n",
                best.judgement.reserve
            )
        }
        Verdict::Open => format!(
            "{address}  not decided: {} is open. {}\n",
            id(best),
            best.because.first().map_or("", String::as_str)
        ),
        Verdict::Fails => format!(
            "{address}  none of the {} oils weighed holds; the nearest is {}\n",
            w.candidates.len(),
            id(best)
        ),
    }
}

fn ends(c: &Candidate) -> String {
    let mut parts = Vec::new();
    for (m, word) in [(c.judgement.hot, "hot"), (c.judgement.cold, "cold")] {
        if let Some(m) = m {
            parts.push(format!("{} step {word}", margin(m.value, 1)));
        }
    }
    if parts.is_empty() {
        String::new()
    } else {
        format!("{} ", parts.join(", "))
    }
}

/// The governing demand of each end.
pub fn needs(out: &mut String, scales: &Scales<'_>, demands: &PointDemands) {
    let mut first = true;
    for end in [
        End::HotFloor,
        End::RunningCeiling,
        End::StartCeiling,
        End::PourMargin,
    ] {
        let Some(i) = demands.middle.governing(end) else {
            continue;
        };
        let demand = &demands.middle.list[i];
        let lead = if first { "  needs  " } else { "         " };
        first = false;
        let _ = writeln!(out, "{lead}{}", need_line(scales, demands, demand));
    }
    for u in &demands.middle.undecided {
        let lead = if first { "  needs  " } else { "         " };
        first = false;
        let part = u.part.as_deref().unwrap_or("the point");
        let _ = writeln!(out, "{lead}not decided: {part}: {}", u.because);
    }
}

fn need_line(scales: &Scales<'_>, demands: &PointDemands, demand: &Demand) -> String {
    let t = demands.middle.governing_temperature(demand);
    let (sign, toward) = match demand.end {
        End::HotFloor | End::MakerGrade | End::PourMargin => (">=", Toward::Up),
        _ => ("<=", Toward::Down),
    };
    let limit = limit_amount(demand, t).map_or_else(
        || "as its own limit".to_owned(),
        |a| quantity(a, scales.units, toward),
    );
    let at = t.map_or(String::new(), |t| {
        format!(
            " at {}",
            quantity(
                ThermodynamicTemperature::from_base(t).amount(),
                scales.units,
                Toward::Nearest
            )
        )
    });
    let part = demand
        .part
        .as_ref()
        .map_or(String::new(), |p| format!("{p}: "));
    let text = format!("{sign} {limit}{at}");
    let source = if demand.says.contains(&demand.source) {
        String::new()
    } else {
        format!(", {}", demand.source)
    };
    format!("{text:<34}{part}{}{source}", demand.says)
}

fn row(scales: &Scales<'_>, i: usize, c: &Candidate, style: Style) -> Vec<String> {
    let j = &c.judgement;
    let shown = |m: Option<Margin>| m.map_or_else(|| "-".to_owned(), |m| margin(m.value, 2));
    let mut because = c.because.first().cloned().unwrap_or_default();
    if c.in_use {
        because = format!("in use; {because}");
    }
    vec![
        letter(i),
        scales.site.oils[c.oil].id.clone(),
        verdict(j.verdict, style.marks),
        shown(j.hot),
        shown(j.cold),
        band(j.band, scales.units),
        because,
    ]
}

/// A, B … Z, AA, AB …
pub fn letter(i: usize) -> String {
    let last = char::from(b'A' + u8::try_from(i % 26).unwrap_or(0));
    if i < 26 {
        last.to_string()
    } else {
        format!("{}{last}", letter(i / 26 - 1))
    }
}

fn conditions(out: &mut String, scales: &Scales<'_>, w: &Weighed<'_>, style: Style) {
    let Some(best) = w.candidates.first() else {
        return;
    };
    if best.judgement.verdict == Verdict::Fails || best.conditions.is_empty() {
        return;
    }
    let _ = writeln!(out, "\n  conditions of {}", scales.site.oils[best.oil].id);
    for (i, c) in best.conditions.iter().enumerate() {
        let text = format!("{}  {}. {}  [{}]", i + 1, c.says, c.act, c.rule);
        out.push_str(&folded(&text, "     ", style.width));
    }
}

fn barred(out: &mut String, scales: &Scales<'_>, w: &Weighed<'_>, style: Style) {
    if w.barred.is_empty() {
        return;
    }
    let n = w.barred.len();
    let _ = writeln!(
        out,
        "\n  {n} {} barred",
        if n == 1 { "oil" } else { "oils" }
    );
    for b in &w.barred {
        let id = &scales.site.oils[b.oil].id;
        let now = if b.in_use { ", in use" } else { "" };
        let text = format!("{id}{now}: {}  [{}]", b.by[0].says, b.by[0].rule);
        out.push_str(&folded(&text, "     ", style.width));
    }
}

fn ambient(out: &mut String, scales: &Scales<'_>, w: &Weighed<'_>) {
    let Some((cold, hot)) = w.demands.middle.thermal.ambient else {
        return;
    };
    let shown = |t: ThermodynamicTemperature| quantity(t.amount(), scales.units, Toward::Nearest);
    let place = w.point.area.as_deref().unwrap_or("the place");
    let _ = writeln!(
        out,
        "\n  {place} gets {} to {}. Margins in VG steps, rounded down.",
        shown(cold.value),
        shown(hot.value)
    );
}
