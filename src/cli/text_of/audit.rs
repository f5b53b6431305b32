//! `audit`: the two-by-two, the findings, the table, as text.

use super::weigh::Style;
use crate::audit::causes::Named;
use crate::audit::cross;
use crate::audit::findings::{Finding, asks, steps, trend_words};
use crate::audit::judged::Judged;
use crate::audit::{Audit, Unmatched};
use crate::cli::text::{Column, folded, hanging, table};
use crate::model::sample::Reading;
use crate::quantity::show::{Toward, fixed};
use crate::weighing::Scales;
use std::fmt::Write as _;

/// The whole audit.
pub fn whole(scales: &Scales<'_>, audit: &Audit, style: Style) -> String {
    let mut out = format!("{}\n\n", cross::answer(audit, scales.site));
    two_by_two(&mut out, scales, audit, style.width);
    findings(&mut out, audit, style.width);
    samples(&mut out, scales, audit, style);
    trends(&mut out, audit, style.width);
    fed(&mut out, scales, audit);
    out
}

fn names(list: &[String]) -> String {
    if list.is_empty() {
        "0".to_owned()
    } else {
        format!("{}  {}", list.len(), list.join(", "))
    }
}

fn two_by_two(out: &mut String, scales: &Scales<'_>, audit: &Audit, width: usize) {
    for row in cross::rows(audit, scales.site) {
        let _ = writeln!(out, "{}", row.whose.words());
        out.push_str(&hanging("  serves          ", &names(&row.serves), width));
        out.push_str(&hanging("  does not serve  ", &names(&row.not), width));
        if !row.open.is_empty() {
            let open: Vec<String> = row
                .open
                .iter()
                .map(|(m, why)| format!("{m} ({why})"))
                .collect();
            out.push_str(&hanging("  open            ", &names(&open), width));
        }
    }
    if !audit.unmatched.is_empty() {
        let n = audit.unmatched.len();
        let _ = writeln!(out, "bottles without a machine\n  {n}");
        for u in &audit.unmatched {
            out.push_str(&hanging("    ", &unmatched_line(audit, u), width));
        }
    }
}

fn unmatched_line(audit: &Audit, u: &Unmatched) -> String {
    let b = &audit.bottles[u.bottle];
    let meant = u
        .meant
        .as_ref()
        .map_or("add an alias or use --match".to_owned(), |m| {
            format!("did you mean {m}? add an alias or use --match")
        });
    format!(
        "\"{}\" ({}, row {})  {}; {meant}",
        b.machine,
        b.name(),
        b.place.row,
        u.why
    )
}

/// Only the bottles without a machine.
pub fn unmatched(audit: &Audit) -> String {
    if audit.unmatched.is_empty() {
        return "every bottle belongs to a machine\n".to_owned();
    }
    let n = audit.unmatched.len();
    let mut out = format!(
        "{n} of {} bottles belong to no machine\n",
        audit.bottles.len()
    );
    for u in &audit.unmatched {
        let _ = writeln!(out, "  {}", unmatched_line(audit, u));
    }
    out
}

fn findings(out: &mut String, audit: &Audit, width: usize) {
    if audit.findings.is_empty() {
        out.push_str("\nno findings\n");
        return;
    }
    out.push_str("\nfindings, most pressing first\n");
    for (i, f) in audit.findings.iter().enumerate() {
        let lead = format!("{:>3}  {:<5}  ", i + 1, f.level.word());
        let head = format!("{}: {}. {}", f.machines.join(", "), f.title, f.text);
        out.push_str(&hanging(&lead, &head, width));
        causes(out, audit, f, width);
        out.push_str(&hanging("            do   ", &f.act, width));
    }
}

/// The evidence of the causes a finding rests on.
fn causes(out: &mut String, audit: &Audit, f: &Finding, width: usize) {
    let Some(j) = f.judged.map(|p| &audit.judged[p]) else {
        return;
    };
    if !matches!(f.kind, "changed" | "unmatched") {
        return;
    }
    for named in &j.diagnosis.causes {
        let word = format!(
            "{} ({}, {} %)",
            named.cause.says(),
            named.word(),
            fixed(100.0 * named.likelihood, 0, Toward::Down)
        );
        out.push_str(&hanging("            ", &word, width));
        for (lead, sign) in [
            ("              for      ", 1.0),
            ("              against  ", -1.0),
        ] {
            let lines: Vec<&str> = weighty(named, sign);
            if !lines.is_empty() {
                out.push_str(&hanging(lead, &lines.join("; "), width));
            }
        }
    }
}

/// The weightiest lines on one side.
fn weighty(named: &Named, sign: f64) -> Vec<&str> {
    let mine = named.evidence.iter().filter(|e| e.weight * sign > 0.0);
    mine.take(6).map(|e| e.says.as_str()).collect()
}

const COLUMNS: [Column; 10] = [
    Column::text("sample", 0),
    Column::text("machine", 0),
    Column::text("label", 3),
    Column::text("drawn", 2),
    Column::number("40 degC", 5),
    Column::number("100", 4),
    Column::text("as labelled", 6),
    Column::text("serves", 0),
    Column::text("asks at 40 degC", 1),
    Column::text("hot, cold", 3),
];

fn samples(out: &mut String, scales: &Scales<'_>, audit: &Audit, style: Style) {
    if audit.judged.is_empty() {
        return;
    }
    out.push_str("\nsamples, viscosity in mm2/s, margins in VG steps rounded down\n");
    let rows: Vec<Vec<String>> = audit.judged.iter().map(|j| row(scales, audit, j)).collect();
    out.push_str(&table(&COLUMNS, &rows, style.width));
    let flagged: Vec<String> = audit
        .judged
        .iter()
        .filter_map(|j| {
            let b = &audit.bottles[j.bottle];
            Some(format!("{}: {}", b.name(), b.flags.as_ref()?))
        })
        .collect();
    if !flagged.is_empty() {
        out.push_str("laboratory flags, passed on untouched\n");
        for flag in flagged {
            out.push_str(&folded(&flag, "  ", style.width));
        }
    }
}

fn row(scales: &Scales<'_>, audit: &Audit, j: &Judged) -> Vec<String> {
    let b = &audit.bottles[j.bottle];
    let figure = |r: Reading| {
        b.figures
            .get(r)
            .map_or("-".to_owned(), |f| f.written.to_string())
    };
    let label = j
        .label
        .oil
        .map(|o| scales.site.oils[o].id.clone())
        .or_else(|| j.label.written.clone());
    let machine = j.point.map_or(format!("\"{}\"", b.machine), |p| {
        scales.site.points[p].address()
    });
    let margins = j.serves.as_ref().map_or("-".to_owned(), |s| {
        format!(
            "{}, {}",
            steps(s.judgement.hot.map(|m| m.value)),
            steps(s.judgement.cold.map(|m| m.value))
        )
    });
    vec![
        b.name(),
        machine,
        label.unwrap_or_else(|| "-".to_owned()),
        b.drawn
            .map_or_else(|| b.drawn_written.clone(), |d| d.to_string()),
        figure(Reading::Nu40),
        figure(Reading::Nu100),
        j.whose.words().to_owned(),
        j.word().unwrap_or("-").to_owned(),
        asks(j),
        margins,
    ]
}

fn trends(out: &mut String, audit: &Audit, width: usize) {
    let several: Vec<_> = audit.units.iter().filter(|u| u.judged.len() > 1).collect();
    let single = audit.units.len() - several.len();
    if audit.units.is_empty() {
        return;
    }
    out.push_str("\ntrend of the viscosity at 40 degC since the last oil change\n");
    for unit in several {
        out.push_str(&hanging(
            &format!("  {}  ", unit.name),
            &trend_words(&unit.trend),
            width,
        ));
        for event in &unit.events {
            let _ = writeln!(out, "    {event}");
        }
    }
    if single > 0 {
        let _ = writeln!(out, "  {single} with one sample: too few to say");
    }
}

fn fed(out: &mut String, scales: &Scales<'_>, audit: &Audit) {
    if audit.fed.is_empty() {
        return;
    }
    out.push_str("\nwith the shear loss measured in service\n");
    for f in &audit.fed {
        let _ = writeln!(
            out,
            "  {}  {}: {} -> {}, hot {} -> {} ({} % at 100 degC, measured in {})",
            scales.site.points[f.point].address(),
            scales.site.oils[f.oil].id,
            f.before.word(),
            f.after.word(),
            steps(f.hot.0),
            steps(f.hot.1),
            fixed(100.0 * f.loss, 1, Toward::Up),
            f.measured_in,
        );
    }
}
