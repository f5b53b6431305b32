//! `gaps`: what is missing, by what it would decide, as text.

use crate::cli::text::{Column, hanging, table};
use crate::decide::gaps::effect::words;
use crate::decide::gaps::letter::Question;
use crate::decide::gaps::{Found, Missing, Place, PointGaps, Waits, Weight, figure};
use crate::demand::GapKind;
use crate::model::Site;
use crate::quantity::Amount;
use crate::quantity::show::margin;
use crate::weighing::Scales;
use std::fmt::Write as _;

/// Rows shown unless all are asked for.
const ROWS: usize = 40;
/// Machines named beside a fact.
const NAMED: usize = 4;

const COLUMNS: [Column; 6] = [
    Column::number("", 0),
    Column::text("machine", 0),
    Column::text("missing", 0),
    Column::text("value", 1),
    Column::text("margin", 2),
    Column::text("decides", 0),
];

/// The gaps of the points, the most telling first.
pub fn text(
    scales: &Scales<'_>,
    points: &[PointGaps<'_>],
    ranked: &[Place],
    all: bool,
    width: usize,
) -> String {
    let mut out = headline(points, ranked);
    let rows = rows(scales, points, ranked);
    if rows.is_empty() {
        return out;
    }
    let shown = if all { rows.len() } else { ROWS };
    let left = rows.len().saturating_sub(shown);
    out.push('\n');
    let first: Vec<Vec<String>> = rows.into_iter().take(shown).collect();
    out.push_str(&table(&COLUMNS, &first, width));
    if left > 0 {
        let _ = writeln!(out, "  {left} more: filmwright gaps --all");
    }
    out.push_str("\n  Margins in VG steps over the range, of the oil proposed or the nearest.\n");
    out
}

fn headline(points: &[PointGaps<'_>], ranked: &[Place]) -> String {
    let of = |weight: Weight| {
        let is = |p: &&Place| points[p.point].gaps[p.gap].weight == weight;
        ranked.iter().filter(is).count()
    };
    if ranked.is_empty() {
        return "no gaps: nothing is missing and nothing is assumed\n".to_owned();
    }
    let kinds = [
        (Weight::Oil, "decides which oil", "decide which oil"),
        (Weight::Verdict, "decides a verdict", "decide a verdict"),
        (
            Weight::Condition,
            "settles a condition",
            "settle a condition",
        ),
        (Weight::Margin, "moves a margin", "move a margin"),
        (Weight::Nothing, "changes nothing", "change nothing"),
    ];
    let mut parts: Vec<String> = Vec::new();
    for (weight, one, many) in kinds {
        let n = of(weight);
        if n > 0 {
            let noun = match (parts.is_empty(), n) {
                (true, 1) => " gap",
                (true, _) => " gaps",
                _ => "",
            };
            parts.push(format!("{n}{noun} {}", if n == 1 { one } else { many }));
        }
    }
    format!("{}\n", parts.join(", "))
}

/// The rows; a fact missing on several machines stands once.
fn rows(scales: &Scales<'_>, points: &[PointGaps<'_>], ranked: &[Place]) -> Vec<Vec<String>> {
    let mut rows: Vec<Vec<String>> = Vec::new();
    let mut facts: Vec<(&str, usize, Vec<String>)> = Vec::new();
    for place in ranked {
        let of = &points[place.point];
        let found = &of.gaps[place.gap];
        let address = of.weighed.point.address();
        if let Missing::Fact { says, .. } = &found.missing {
            match facts.iter_mut().find(|(known, _, _)| known == says) {
                Some((_, _, machines)) => machines.push(address),
                None => {
                    facts.push((says, rows.len(), vec![address]));
                    rows.push(vec![String::new(); COLUMNS.len()]);
                }
            }
            continue;
        }
        rows.push(vec![
            String::new(),
            address,
            found.says(),
            value(scales, found),
            range(found),
            decides(scales, of, found),
        ]);
    }
    for (says, at, machines) in facts {
        let n = machines.len();
        let mut named = machines[..n.min(NAMED)].join(" ");
        if n > NAMED {
            let _ = write!(named, " +{}", n - NAMED);
        }
        let decides = if n == 1 {
            "a condition".to_owned()
        } else {
            format!("a condition on {n} points")
        };
        rows[at] = vec![
            String::new(),
            named,
            says.to_owned(),
            "not stated".to_owned(),
            String::new(),
            decides,
        ];
    }
    for (i, row) in rows.iter_mut().enumerate() {
        row[0] = (i + 1).to_string();
    }
    rows
}

fn value(scales: &Scales<'_>, found: &Found) -> String {
    let Some(gap) = found.input() else {
        return String::new();
    };
    let show = |a: Amount| figure(gap, a, scales.units);
    match &gap.kind {
        GapKind::Range(lo, hi) => format!("{} .. {}", show(*lo), show(*hi)),
        GapKind::Assumed { taken, lo, hi } => {
            format!("{} ({} .. {})", show(*taken), show(*lo), show(*hi))
        }
        GapKind::Word { taken, among } => format!("{taken} (or {})", among.join(", ")),
        GapKind::Missing | GapKind::Fact => "missing".to_owned(),
    }
}

fn range(found: &Found) -> String {
    let margins = found.effect.as_ref().and_then(|e| e.margin);
    margins.map_or(String::new(), |(lo, hi)| {
        format!("{}..{}", margin(lo, 1), margin(hi, 1))
    })
}

fn decides(scales: &Scales<'_>, of: &PointGaps<'_>, found: &Found) -> String {
    let id = |oil: usize| scales.site.oils[oil].id.as_str();
    match (&found.effect, found.weight) {
        (Some(e), Weight::Oil) => {
            let names: Vec<&str> = e.proposed.iter().map(|o| o.map_or("none", id)).collect();
            format!("which oil: {}", names.join(" or "))
        }
        (Some(e), Weight::Verdict) => match of.weighed.in_use() {
            Some(now) if e.verdicts.len() < 2 => {
                format!("{} {}", id(now.oil), words(&e.in_use))
            }
            _ => {
                let lead = crate::decide::gaps::lead(&of.weighed);
                let lead = lead.map_or("", |c| id(c.oil));
                format!("{lead} {}", words(&e.verdicts))
            }
        },
        (_, Weight::Margin) if found.waits == Some(Waits::Limit) => {
            "a further limit is not worked out".to_owned()
        }
        (_, Weight::Margin) => "margin only".to_owned(),
        (None, Weight::Verdict) => "no verdict without it".to_owned(),
        _ => "nothing".to_owned(),
    }
}

/// The letter: numbered questions in plain sentences.
pub fn letter(site: &Site, questions: &[Question], width: usize) -> String {
    if questions.is_empty() {
        return "nothing to ask: no missing or assumed input would decide anything\n".to_owned();
    }
    let n = questions.len();
    let name = site
        .frame
        .site
        .as_ref()
        .map_or(String::new(), |s| format!(" about {s}"));
    let plural = if n == 1 { "question" } else { "questions" };
    let mut out = format!("{n} {plural}{name}, the most telling first\n");
    for (i, q) in questions.iter().enumerate() {
        let title = q.title.as_ref().map_or(String::new(), |t| format!(", {t}"));
        let text = format!("{}{title}. {}", q.address, q.text);
        out.push('\n');
        out.push_str(&hanging(&format!("{:>2}. ", i + 1), &text, width));
    }
    out
}
