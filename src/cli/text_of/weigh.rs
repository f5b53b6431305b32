//! `weigh`: candidate oils against what machines need, as text.

use crate::cli::Marks;
use crate::cli::text::{Column, band, hanging, sentence, table, verdict};
use crate::demand::{Demand, End, PointDemands};
use crate::judge::Verdict;
use crate::judge::weigh::Margin;
use crate::quantity::show::{Toward, margin, quantity};
use crate::quantity::{Measure, ThermodynamicTemperature};
use crate::results::need::limit_amount;
use crate::weighing::{Barred, Candidate, Condition, Scales, Weighed};
use std::fmt::Write as _;

/// How a weighing is printed.
#[derive(Clone, Copy, Debug)]
pub struct Style {
    /// Verdict marks.
    pub marks: Marks,
    /// Columns of the terminal.
    pub width: usize,
}

const COLUMNS: [Column; 8] = [
    Column::text("", 0),
    Column::text("oil", 0),
    Column::text("verdict", 0),
    Column::number("grade", 4),
    Column::number("hot", 4),
    Column::number("cold", 4),
    Column::text("holds in", 2),
    Column::text("because", 0),
];

/// One machine.
pub fn one(scales: &Scales<'_>, w: &Weighed<'_>, style: Style) -> String {
    let mut out = headline(scales, w, style.width);
    out.push('\n');
    needs(&mut out, scales, &w.demands, style.width);
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
        out.push_str(&candidates(&rows, style.width));
    }
    super::running::running(&mut out, scales, w, style.width);
    conditions(&mut out, scales, w, style);
    barred(&mut out, scales, w, style);
    ambient(&mut out, scales, w);
    out
}

/// The table of candidates, without the columns that say nothing here.
fn candidates(rows: &[Vec<String>], width: usize) -> String {
    let said = |i: usize| rows.iter().any(|r| r[i] != "-");
    let kept: Vec<usize> = (0..COLUMNS.len()).filter(|i| said(*i)).collect();
    let columns: Vec<Column> = kept.iter().map(|i| COLUMNS[*i]).collect();
    let rows: Vec<Vec<String>> = rows
        .iter()
        .map(|r| kept.iter().map(|i| r[*i].clone()).collect())
        .collect();
    table(&columns, &rows, width)
}

/// What is said where the list holds nothing of the sort a point takes.
pub fn nothing_to_weigh(scales: &Scales<'_>, w: &Weighed<'_>) -> String {
    let sort = if crate::demand::takes_grease(w.point) {
        "grease"
    } else {
        "oil"
    };
    let grease = crate::demand::takes_grease(w.point);
    if scales.oils.iter().any(|o| o.grease == grease) {
        return format!("nothing weighed: no {sort} was asked about  [nothing-to-weigh]");
    }
    format!("nothing weighed: the oil list holds no {sort}  [nothing-to-weigh]")
}

/// The answer, first.
fn headline(scales: &Scales<'_>, w: &Weighed<'_>, width: usize) -> String {
    let address = w.point.address();
    let id = |c: &Candidate| scales.site.oils[c.oil].id.clone();
    let Some(best) = w.candidates.first() else {
        return if w.barred.is_empty() {
            format!("{address}  {}\n", nothing_to_weigh(scales, w))
        } else {
            format!("{address}  every oil is barred here\n")
        };
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
        Verdict::Open => {
            let lead = format!("{address}  not decided: ");
            let why = sentence(&format!("{} is open. {}", id(best), open_because(best)));
            hanging(&lead, &why, width)
        }
        Verdict::Fails => format!(
            "{address}  none of the {} oils weighed holds; the nearest is {}\n",
            w.candidates.len(),
            id(best)
        ),
    }
}

fn open_because(c: &Candidate) -> String {
    c.because.first().map_or(String::new(), |b| sentence(b))
}

fn ends(c: &Candidate) -> String {
    let mut parts = Vec::new();
    let j = &c.judgement;
    for (m, word) in [
        (j.maker, "on the maker's grade"),
        (j.hot, "hot"),
        (j.cold, "cold"),
    ] {
        if let Some(m) = m {
            let step = if parts.is_empty() { " step" } else { "" };
            parts.push(format!("{}{step} {word}", margin(m.value, 1)));
        }
    }
    if parts.is_empty() {
        String::new()
    } else {
        format!("{} ", parts.join(", "))
    }
}

/// The governing demand of each end.
pub fn needs(out: &mut String, scales: &Scales<'_>, demands: &PointDemands, width: usize) {
    let mut first = true;
    for end in [
        End::HotFloor,
        End::RunningCeiling,
        End::StartCeiling,
        End::MakerGrade,
        End::PourMargin,
    ] {
        let Some(i) = demands.middle.governing(end) else {
            continue;
        };
        let demand = &demands.middle.list[i];
        let lead = if first { "  needs  " } else { "         " };
        first = false;
        let (limit, whose) = need_line(scales, demands, demand);
        out.push_str(&hanging(&format!("{lead}{limit:<28}  "), &whose, width));
    }
    for u in &demands.middle.undecided {
        let lead = if first { "  needs  " } else { "         " };
        first = false;
        let part = u.part.as_deref().unwrap_or("the point");
        let text = format!("not decided: {part}: {}", u.because);
        out.push_str(&hanging(lead, &text, width));
    }
}

fn need_line(scales: &Scales<'_>, demands: &PointDemands, demand: &Demand) -> (String, String) {
    let t = demands.middle.governing_temperature(demand);
    let (sign, toward) = match demand.end {
        End::HotFloor | End::MakerGrade | End::PourMargin => (">=", Toward::Up),
        _ => ("<=", Toward::Down),
    };
    let limit = limit_amount(demand, t).map(|a| quantity(a, scales.units, toward));
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
    let source = if demand.says.contains(&demand.source) {
        String::new()
    } else {
        format!(", {}", demand.source)
    };
    // a limit that is each oil's or grease's own has no figure here
    let what = limit.map_or_else(
        || format!("serves{at}"),
        |limit| format!("{sign} {limit}{at}"),
    );
    (what, format!("{}{source}", demand.asks()))
}

fn row(scales: &Scales<'_>, i: usize, c: &Candidate, style: Style) -> Vec<String> {
    let j = &c.judgement;
    let shown = |m: Option<Margin>| m.map_or_else(|| "-".to_owned(), |m| margin(m.value, 2));
    let because = if c.in_use {
        format!("in use; {}", c.brief)
    } else {
        c.brief.clone()
    };
    vec![
        letter(i),
        scales.site.oils[c.oil].id.clone(),
        verdict(j.verdict, style.marks),
        shown(j.maker),
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
        let text = format!("{} {} [{}]", sentence(&c.says), sentence(&c.act), c.rule);
        out.push_str(&hanging(&format!("  {:>3}  ", i + 1), &text, style.width));
    }
}

/// Barred oils by rule; the reason in full for the oil in use, and where there is one oil only.
fn barred(out: &mut String, scales: &Scales<'_>, w: &Weighed<'_>, style: Style) {
    if w.barred.is_empty() {
        return;
    }
    let n = w.barred.len();
    let oils = if n == 1 { "oil" } else { "oils" };
    let _ = writeln!(out, "\n  {n} {oils} barred");
    let mut groups: Vec<(&Condition, Vec<&Barred>)> = Vec::new();
    for b in &w.barred {
        let by = &b.by[0];
        match groups.iter_mut().find(|(c, _)| c.rule == by.rule) {
            Some((_, list)) => list.push(b),
            None => groups.push((by, vec![b])),
        }
    }
    for (rule, list) in groups {
        let named: Vec<String> = list
            .iter()
            .map(|b| {
                let now = if b.in_use { " (in use)" } else { "" };
                format!("{}{now}", scales.site.oils[b.oil].id)
            })
            .collect();
        let told = list.iter().find(|b| b.in_use || list.len() == 1);
        let why = told.map_or_else(
            || sentence(&rule.title),
            |b| sentence(b.by[0].says.as_str()),
        );
        let text = format!("{}: {why} [{}]", named.join(", "), rule.rule);
        out.push_str(&hanging("     ", &text, style.width));
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
