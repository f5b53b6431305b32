//! `mend`: what would make an oil hold, as text.

use crate::cli::text::{Column, folded, hanging, sentence, table};
use crate::decide::mend::heater::{Fitted, HeaterAdvice};
use crate::decide::mend::lever::{Lever, Target};
use crate::decide::mend::{Mend, Mended, Tried};
use crate::model::Point;
use crate::quantity::show::{Toward, Units, margin, quantity, significant};
use crate::quantity::{Area, Measure, Power, ThermodynamicTemperature};
use crate::weighing::{Candidate, Scales};
use std::fmt::Write as _;

const COLUMNS: [Column; 4] = [
    Column::text("change", 0),
    Column::text("every limit met", 0),
    Column::text("full reserve", 0),
    Column::text("then", 1),
];

/// One oil on one point.
pub fn one(scales: &Scales<'_>, point: &Point, mended: &Mended, width: usize) -> String {
    let id = &scales.site.oils[mended.oil].id;
    let lead = format!("{}  ", point.address());
    let now = match &mended.now {
        Ok(now) => now,
        Err(barred) => {
            let by = barred.by.first();
            let why = by.map_or(String::new(), |c| {
                format!("{} [{}]", sentence(&c.says), c.rule)
            });
            let text =
                format!("{id} is barred, which no change of temperature or grade mends. {why}");
            return hanging(&lead, &text, width);
        }
    };
    let missing = mended.missing();
    let Some(target) = missing.first().copied() else {
        return hanging(&lead, &format!("{id} holds; nothing to mend."), width);
    };
    if now.judgement.doubts.undecided {
        let text = format!(
            "{id} is open: a limit cannot be worked out, so no change can be solved for. See: filmwright gaps {}",
            point.address()
        );
        return hanging(&lead, &text, width);
    }
    let units = scales.units;
    let mut out = String::new();
    headline(&mut out, &lead, id, mended, target, units, width);
    out.push_str(&folded(&format!("today: {}", today(now)), "  ", width));
    singles(&mut out, mended, units, width);
    for caution in cautions(mended) {
        out.push_str(&hanging("  - ", caution, width));
    }
    pairs(&mut out, mended, target, units, width);
    not_enough(&mut out, mended, width);
    if let Some(advice) = &mended.heater {
        heater(&mut out, advice, units, width);
    }
    conditions(&mut out, mended, width);
    out
}

/// What is to be known of the changes, each once.
fn cautions(mended: &Mended) -> Vec<&str> {
    let mut all: Vec<&str> = Vec::new();
    for mend in mended.single.iter().chain(&mended.pairs) {
        if let Some(caution) = mend.caution.as_deref().filter(|c| !all.contains(c)) {
            all.push(caution);
        }
    }
    all
}

fn today(now: &Candidate) -> String {
    let word = now.judgement.verdict.word();
    match now.because.first() {
        Some(why) => format!("{word}; {why}"),
        None => word.to_owned(),
    }
}

/// What the first change does, in the words of the verdict it comes to.
fn headline(
    out: &mut String,
    lead: &str,
    id: &str,
    mended: &Mended,
    target: Target,
    units: Units,
    width: usize,
) {
    let does = |target: Target| match target {
        Target::Met => format!("{id} would meet every limit with"),
        Target::Reserve => format!("{id} would hold, reserve kept, with"),
    };
    let first = mended.of(target).next();
    let text = match first {
        Some(mend) if mend.changes.len() == 1 => {
            format!("{} {}", does(target), mend.words(units))
        }
        Some(mend) => {
            let reached = match target {
                Target::Met => "meet every limit",
                Target::Reserve => "hold with its reserve",
            };
            format!(
                "no single change makes {id} {reached}. It needs two: {}",
                mend.words(units)
            )
        }
        None => format!("neither one change nor two that were tried make {id} hold"),
    };
    out.push_str(&hanging(lead, &text, width));
    if target == Target::Met {
        let text = match mended.of(Target::Reserve).next() {
            Some(mend) => mend.words(units),
            None => "nothing that was tried".to_owned(),
        };
        out.push_str(&hanging("  for the full reserve: ", &text, width));
    }
}

/// Single changes side by side: what meets the limits, what keeps the reserve.
fn singles(out: &mut String, mended: &Mended, units: Units, width: usize) {
    if mended.single.is_empty() {
        return;
    }
    let mut rows: Vec<Vec<String>> = Vec::new();
    for lever in Lever::ALL {
        let of = |target: Target| {
            let mut all = mended.single.iter();
            all.find(|m| m.target == target && m.changes[0].lever == lever)
        };
        let (met, full) = (of(Target::Met), of(Target::Reserve));
        let Some(any) = full.or(met) else { continue };
        let shown = |m: Option<&Mend>| m.map_or_else(|| "-".to_owned(), |m| amount(m, units));
        rows.push(vec![
            lever.word().to_owned(),
            shown(met),
            shown(full),
            ends(&any.then),
        ]);
    }
    out.push('\n');
    let met = rows.iter().any(|r| r[1] != "-");
    if met {
        out.push_str(&table(&COLUMNS, &rows, width));
        return;
    }
    let columns = [COLUMNS[0], COLUMNS[2], COLUMNS[3]];
    let rows: Vec<Vec<String>> = rows
        .into_iter()
        .map(|r| vec![r[0].clone(), r[2].clone(), r[3].clone()])
        .collect();
    out.push_str(&table(&columns, &rows, width));
}

/// The amount of a single change, with its bound.
fn amount(mend: &Mend, units: Units) -> String {
    let change = mend.changes[0];
    let shown = change.shown(units);
    match (change.lever, mend.grade) {
        (Lever::Grade, Some(g)) => format!("{shown}, ISO VG {}", g.number()),
        (Lever::Grade, None) => shown,
        _ if change.to >= change.from => format!(">= {shown}"),
        _ => format!("<= {shown}"),
    }
}

/// Verdict and margins after a change.
fn ends(c: &Candidate) -> String {
    let j = &c.judgement;
    let mut parts = vec![j.verdict.word().to_owned()];
    for (m, word) in [(j.hot, "hot"), (j.cold, "cold")] {
        if let Some(m) = m {
            parts.push(format!("{word} {}", margin(m.value, 2)));
        }
    }
    parts.join("  ")
}

/// The pair for the full reserve, where the headline told only the limits.
fn pairs(out: &mut String, mended: &Mended, told: Target, units: Units, width: usize) {
    for pair in mended.pairs.iter().filter(|p| p.target != told) {
        let text = format!("{}; then {}", pair.words(units), ends(&pair.then));
        let lead = "  two changes for the full reserve: ";
        out.push_str(&hanging(lead, &text, width));
    }
}

fn not_enough(out: &mut String, mended: &Mended, width: usize) {
    let solved = |lever: Lever| mended.single.iter().any(|m| m.changes[0].lever == lever);
    let tried = mended.tried.iter().filter(|t| !solved(t.lever));
    let (idle, little): (Vec<&Tried>, Vec<&Tried>) = tried.partition(|t| t.because.is_empty());
    if !little.is_empty() {
        let each: Vec<String> = little
            .iter()
            .map(|t| format!("{} ({})", t.lever.word(), t.because))
            .collect();
        out.push('\n');
        let text = format!("{}.", each.join("; "));
        out.push_str(&hanging("  not enough alone: ", &text, width));
    }
    if !idle.is_empty() {
        let each: Vec<&str> = idle.iter().map(|t| t.lever.word()).collect();
        let text = format!("{}.", each.join(", "));
        out.push_str(&hanging("  do not act on what is missed: ", &text, width));
    }
}

/// What a heater would have to be.
fn heater(out: &mut String, h: &HeaterAdvice, units: Units, width: usize) {
    let show = |a: crate::quantity::Amount, toward| quantity(a, units, toward);
    let t = |t: ThermodynamicTemperature| show(t.amount(), Toward::Nearest);
    let rise = format!("from {} to {}", t(h.from), show(h.to.amount(), Toward::Up));
    let text = match (h.volume, h.power) {
        (Some(volume), Some(power)) => format!(
            "{} {rise} within {} (assumed) takes {}{}",
            show(volume.amount(), Toward::Nearest),
            show(h.within.amount(), Toward::Nearest),
            watts(power, Toward::Up),
            if h.loss.is_some() {
                ", loss of the housing included"
            } else {
                "; what the housing loses comes on top"
            }
        ),
        _ => format!("{rise}; without a fill no power can be worked out"),
    };
    out.push('\n');
    out.push_str(&hanging("  heater  ", &format!("{text}."), width));
    if let Some((limit, rule, source)) = &h.bears {
        let sheath = h.sheath.map_or(String::new(), |a| {
            format!(", so a sheath of {} at least", sheath(a, Toward::Up))
        });
        let text = format!(
            "This oil bears {}{sheath} [{rule}; {source}].",
            show(limit.amount(), Toward::Down)
        );
        out.push_str(&hanging("          ", &text, width));
    }
    if let Some((limit, rule)) = &h.cautious {
        let text = format!(
            "With its additives {} is the cautious figure [{rule}].",
            show(limit.amount(), Toward::Down)
        );
        out.push_str(&hanging("          ", &text, width));
    }
    if let Some(fitted) = &h.fitted {
        out.push_str(&hanging("          ", &fitted_words(fitted, units), width));
    }
    for (caution, _) in &h.cautions {
        out.push_str(&hanging("        - ", caution, width));
    }
}

/// A power in kW, two digits: a heater is bought in steps.
fn watts(power: Power, toward: Toward) -> String {
    format!("{} kW", significant(power.base() / 1e3, 2, toward))
}

/// A sheath in cm2, three digits.
fn sheath(area: Area, toward: Toward) -> String {
    format!("{} cm2", significant(area.base() * 1e4, 3, toward))
}

fn fitted_words(f: &Fitted, units: Units) -> String {
    let show = |a: crate::quantity::Amount, toward| quantity(a, units, toward);
    let mut text = format!(
        "The heater fitted, {}",
        show(f.power.amount(), Toward::Nearest)
    );
    if let Some(time) = f.time {
        let hours = time.base() / 3600.0;
        let hours = crate::quantity::show::fixed(hours, 1, Toward::Up);
        let _ = write!(text, ", takes {hours} h");
    }
    if let (Some(density), Some(area)) = (f.density, f.area) {
        let _ = write!(
            text,
            "; on {} it gives {}",
            sheath(area, Toward::Nearest),
            show(density.amount(), Toward::Up)
        );
        if f.too_hot {
            let may = f.may_give.map(|p| watts(p, Toward::Down));
            let needs = f.needs.map(|a| sheath(a, Toward::Up));
            let _ = write!(
                text,
                ", too hot for this oil: run it at {} or fit {} of sheath",
                may.unwrap_or_default(),
                needs.unwrap_or_default()
            );
        } else {
            text.push_str(", within what the oil bears");
        }
    } else {
        text.push_str("; its sheath is not stated, so its watt density is not known");
    }
    text.push('.');
    text
}

/// Conditions that ride with the first mend.
fn conditions(out: &mut String, mended: &Mended, width: usize) {
    let first = mended.single.iter().chain(&mended.pairs).next();
    let Some(then) = first.map(|m| &m.then).filter(|c| !c.conditions.is_empty()) else {
        return;
    };
    out.push_str("\n  conditions then\n");
    for (i, c) in then.conditions.iter().enumerate() {
        let text = format!("{} {} [{}]", sentence(&c.says), sentence(&c.act), c.rule);
        out.push_str(&hanging(&format!("  {:>3}  ", i + 1), &text, width));
    }
}
