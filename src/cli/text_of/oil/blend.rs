//! A blend as text.

use super::{entry, per_cent, temperature, viscosity};
use crate::cli::Marks;
use crate::cli::text::{Column, table, verdict};
use crate::judge::Judgement;
use crate::model::word::Word;
use crate::oil::blend::{Became, Blend};
use crate::quantity::Measure;
use crate::quantity::show::{Toward, Units, fixed, margin};
use crate::results::oil::{BlendResult, Target};
use crate::weighing::top_up::TopUp;
use std::fmt::Write as _;

/// Everything asked of a blend.
pub fn text(b: &BlendResult<'_>, units: Units, marks: Marks, width: usize) -> String {
    let mut out = String::new();
    match b.blend {
        None => {}
        Some(Err(why)) => out.push_str(&entry("blend", &format!("none: {why}"), width)),
        Some(Ok(blend)) => one(&mut out, blend, units, width),
    }
    if let Some(t) = b.target {
        out.push_str(&target(b.with, t, units, width));
    }
    for machine in b.machines {
        top_up(&mut out, machine, marks, width);
    }
    out
}

fn one(out: &mut String, b: &Blend, units: Units, width: usize) {
    let share = per_cent(b.share);
    let word = |w: &Became| {
        let grade = w.grade.map_or("between the ISO grades".to_owned(), |g| {
            format!("ISO VG {g}")
        });
        let vi = w.index.map_or(String::new(), |vi| {
            format!(", VI {}", fixed(vi.value.base(), 0, Toward::Nearest))
        });
        format!("{grade}{vi}")
    };
    let _ = writeln!(
        out,
        "{} with {share} {} by volume: {}, {} at 40 degC\n",
        b.a,
        b.b,
        word(&b.walther),
        viscosity(b.walther.nu40.value, units)
    );
    let columns = [
        Column::text("at", 0),
        Column::number("Walther", 0),
        Column::number("Wright", 0),
    ];
    let mut rows = vec![
        vec![
            "40 degC".to_owned(),
            viscosity(b.walther.nu40.value, units),
            viscosity(b.wright.nu40.value, units),
        ],
        vec![
            "100 degC".to_owned(),
            viscosity(b.walther.nu100.value, units),
            viscosity(b.wright.nu100.value, units),
        ],
    ];
    for (t, walther, wright) in &b.at {
        rows.push(vec![
            temperature(*t, units),
            viscosity(walther.value, units),
            viscosity(wright.value, units),
        ]);
    }
    rows.push(vec![String::new(), word(&b.walther), word(&b.wright)]);
    out.push_str(&table(&columns, &rows, width));
    let says = format!(
        "Wright lies {} above Walther at 40 degC, {} at 100 degC; the laboratory decides",
        per_cent_signed(b.disagreement.0.base()),
        per_cent_signed(b.disagreement.1.base())
    );
    out.push_str(&entry("two rules", &says, width));
    if let Some((thin, thick)) = b.by_split {
        let says = format!(
            "{} to {} at 40 degC, by how base and polymer are split",
            viscosity(thin, units),
            viscosity(thick, units)
        );
        out.push_str(&entry("range", &says, width));
    }
    let says = format!("{} [{}]", b.mixing.word(), b.mixing_source);
    out.push_str(&entry("mixing", &says, width));
    for f in &b.findings {
        let says = format!("{}; {} [{}]", f.says, f.act, f.name);
        out.push_str(&entry("found", &says, width));
    }
}

fn per_cent_signed(share: f64) -> String {
    format!("{} %", fixed(100.0 * share, 1, Toward::Nearest))
}

fn target(with: &str, t: &Target, units: Units, width: usize) -> String {
    let wanted = format!("{} at {}", viscosity(t.nu, units), temperature(t.at, units));
    let says = match &t.share {
        Err(why) => format!("{wanted}: {why}"),
        Ok((walther, wright)) => format!(
            "{wanted} with {} % {with} by Walther, {} % by Wright",
            fixed(100.0 * walther.base(), 1, Toward::Nearest),
            fixed(100.0 * wright.base(), 1, Toward::Nearest)
        ),
    };
    entry("target", &says, width)
}

fn top_up(out: &mut String, t: &TopUp, marks: Marks, width: usize) {
    let side = |j: &Judgement| {
        let mut ends = vec![verdict(j.verdict, marks).trim().to_owned()];
        for (m, end) in [(j.hot, "hot"), (j.cold, "cold")] {
            ends.extend(m.map(|m| format!("{} {end}", margin(m.value, 2))));
        }
        ends.join(" ")
    };
    let _ = writeln!(out, "\n  {}", t.address);
    out.push_str(&entry("as it is", &side(&t.alone), width));
    out.push_str(&entry("blended", &side(&t.blended), width));
    if let Some(because) = t.because.first() {
        out.push_str(&entry("because", because, width));
    }
    for (word, list) in [("barred", &t.barred_by), ("asks", &t.conditions)] {
        for c in list {
            let says = format!("{}. {} [{}]", c.says, c.act, c.rule);
            out.push_str(&entry(word, &says, width));
        }
    }
}
