//! The audit sheet: two-by-two, findings, small multiples, sample by sample, one worked through.

mod steps;

use super::case::mark;
use super::plan::On;
use super::{Report, caution, say};
use crate::audit::Audit;
use crate::audit::cross;
use crate::audit::findings::{Finding as Found, asks, steps as steps_of, trend_words};
use crate::audit::judged::Judged;
use crate::audit::profile::From;
use crate::audit::units::Unit;
use crate::audit::whose::Whose;
use crate::judge::Verdict;
use crate::model::rulebook::used_oil::Reading as On40;
use crate::model::sample::Reading;
use crate::model::word::Word;
use crate::numeric::math::lg;
use crate::quantity::convert::{celsius, to_mm2_s};
use crate::quantity::show::{Toward, Units, fixed};
use crate::report::draw::trend::{TrendPanel, TrendSample};
use crate::report::model::{
    Answer, AuditSheet, Body, Caution, CrossCell, CrossRow, Evidence, Finding, Mark, Panel, Phrase,
    SampleRow, Sheet, SignBox, SignOff,
};
use crate::report::names::plain;
use jiff::civil::Date;

/// Machines named in one cell at most.
const NAMED: usize = 40;
/// Lines of evidence on each side of a cause.
const LINES: usize = 4;
/// Half the height of the panels, VG steps.
const REACH: f64 = 2.5;
/// A grade's tolerance of 10 % in VG steps.
const GRADE: f64 = 0.25;

/// The sheet; none where nothing was sampled.
pub(super) fn sheet(report: &Report<'_>, audit: &Audit) -> Option<Sheet> {
    let fixed = report.plan.audit.as_ref()?;
    let body = AuditSheet {
        answer: answer(report, audit),
        caution: caution_of(audit),
        cross: cross_rows(report, audit),
        findings: findings(audit, report.run.scales.units),
        panels: panels(report, audit),
        panels_caption: caption(audit),
        samples: samples(report, audit),
        steps: Vec::new(),
        steps_title: String::new(),
        trust: trust(audit),
        sign: sign(report, audit),
    };
    let body = steps::with_steps(report, audit, body);
    Some(Sheet {
        place: fixed.place.clone(),
        number: fixed.number,
        of: report.plan.of,
        name: "In-use audit".to_owned(),
        subtitle: "What is in the machines, against the label and against what they need".to_owned(),
        about: "Two questions are kept apart: is it the oil on the label, and does it serve the machine?".into(),
        title: "In-use oil audit".to_owned(),
        nav: report.plan.nav(On::Audit),
        body: Body::Audit(Box::new(body)),
    })
}

fn answer(report: &Report<'_>, audit: &Audit) -> Answer {
    let site = report.run.scales.site;
    let first = audit.findings.first();
    let mut sentences: Vec<Phrase> = Vec::new();
    if let Some(f) = first {
        sentences.push(
            Phrase::new()
                .and("Most pressing: ")
                .tag(f.machines.join(", "))
                .and(format!(". {}.", f.title)),
        );
    }
    if !audit.unmatched.is_empty() {
        let n = say::count(audit.unmatched.len(), "bottle belongs", "bottles belong");
        sentences.push(
            format!("{} to no machine of the site.", say::sentence(&n))
                .as_str()
                .into(),
        );
    }
    Answer {
        mark: None,
        headline: format!("{}.", say::sentence(&cross::answer(audit, site))),
        sentences,
    }
}

fn caution_of(audit: &Audit) -> Caution {
    let any = |f: &dyn Fn(&Judged) -> bool| audit.judged.iter().any(f);
    let mut judged = vec!["viscosity of the oil in use against label and machine".to_owned()];
    for (on, says) in [
        (On40::Water, "water"),
        (On40::AcidNumberRise, "acid number"),
    ] {
        if any(&|j| j.against.iter().any(|a| a.on == on.word())) {
            judged.push(says.to_owned());
        }
    }
    if any(&|j| j.clean.as_ref().is_some_and(|c| c.target.is_some())) {
        judged.push("cleanliness".to_owned());
    }
    Caution {
        judged,
        not_judged: [
            "wear by any threshold of its own: metals are reasons and trends",
            "foam, air release, deposits",
            "additives beyond the elements measured",
            "how the samples were drawn",
        ]
        .map(str::to_owned)
        .to_vec(),
        defer: vec![caution::DEFER.into()],
        before: vec!["A cause is a likelihood from the figures of one laboratory. Sample again before an oil is condemned for it.".into()],
    }
}

fn cell(names: &[String], means: &str) -> CrossCell {
    let mut machines = Phrase::new();
    for (i, name) in names.iter().take(NAMED).enumerate() {
        if i > 0 {
            machines = machines.and(", ");
        }
        machines = machines.tag(name.as_str());
    }
    if names.len() > NAMED {
        machines = machines.and(format!(" and {} more", names.len() - NAMED));
    }
    CrossCell {
        count: u32::try_from(names.len()).unwrap_or(u32::MAX),
        machines,
        means: if names.is_empty() {
            String::new()
        } else {
            means.to_owned()
        },
    }
}

fn cross_rows(report: &Report<'_>, audit: &Audit) -> Vec<CrossRow> {
    let (site, units) = (report.run.scales.site, report.run.scales.units);
    let mut list = Vec::new();
    let mut open: Vec<String> = Vec::new();
    for row in cross::rows(audit, site) {
        let (note, leave, act) = match row.whose {
            Whose::AsLabelled => (
                "within the limits of its class",
                "Leave alone.",
                "The specification is wrong, not the oil. Change the specification.",
            ),
            Whose::Changed => (
                "moved beyond the limits of its class",
                "Find out why. No hurry to drain.",
                "Change the oil, and mend the cause.",
            ),
            Whose::Another => (
                "another oil, or one mixed in",
                "Find the source; correct at the next change.",
                "Act now, and find the source.",
            ),
            Whose::NotKnown => ("", "", "Find out what is in it."),
        };
        open.extend(
            row.open
                .iter()
                .map(|(name, why)| format!("{name} ({})", say::told(why, units))),
        );
        if row.whose == Whose::NotKnown && row.serves.is_empty() && row.not.is_empty() {
            continue;
        }
        list.push(CrossRow {
            label: row.whose.words().to_owned(),
            note: note.to_owned(),
            serves: Some(cell(&row.serves, leave)),
            not: cell(&row.not, act),
        });
    }
    if !open.is_empty() {
        list.push(CrossRow {
            label: "not known".to_owned(),
            note: "no sample that says, or service open".to_owned(),
            serves: None,
            not: cell(&open, ""),
        });
    }
    list
}

fn findings(audit: &Audit, units: Units) -> Vec<Finding> {
    audit
        .findings
        .iter()
        .enumerate()
        .map(|(i, f)| finding(audit, units, i, f))
        .collect()
}

fn finding(audit: &Audit, units: Units, i: usize, f: &Found) -> Finding {
    let causes = match (f.kind, f.judged) {
        ("changed" | "unmatched", Some(place)) => audit.judged[place]
            .diagnosis
            .causes
            .iter()
            .map(|n| {
                let lines = |sign: f64| -> Vec<String> {
                    let mine = n.evidence.iter().filter(|e| e.weight * sign > 0.0);
                    mine.take(LINES)
                        .map(|e| say::told(&e.says, units))
                        .collect()
                };
                Evidence {
                    cause: format!("{}, {}", say::sentence(n.cause.says()), n.word()),
                    speaks_for: lines(1.0),
                    against: lines(-1.0),
                }
            })
            .collect(),
        _ => Vec::new(),
    };
    Finding {
        id: format!("f{}", i + 1),
        number: u32::try_from(i + 1).unwrap_or(u32::MAX),
        level: f.level.word().to_owned(),
        title: format!("{}: {}", f.machines.join(", "), f.title),
        text: say::told(&f.text, units).as_str().into(),
        causes,
        what: say::stopped(&say::sentence(&say::told(&f.act, units)))
            .as_str()
            .into(),
    }
}

fn day_number(day: Date) -> f64 {
    let from = Date::constant(2000, 1, 1);
    f64::from(from.until(day).map_or(0, |s| s.get_days()))
}

fn mark_of(j: &Judged) -> Mark {
    if j.word() == Some("barred") {
        return Mark::Fails;
    }
    j.verdict().map_or(Mark::Open, mark)
}

/// Small multiples: fills with two dated viscosities or more come first; all share one scale.
fn panels(report: &Report<'_>, audit: &Audit) -> Vec<Panel> {
    let days = audit.bottles.iter().filter_map(|b| b.drawn);
    let (first, last) = (days.clone().min(), days.max());
    let (Some(first), Some(last)) = (first, last) else {
        return Vec::new();
    };
    let ends = [
        (first.to_string(), day_number(first)),
        (last.to_string(), day_number(last)),
    ];
    audit
        .units
        .iter()
        .filter_map(|u| panel(report, audit, u, &ends))
        .collect()
}

fn panel(
    report: &Report<'_>,
    audit: &Audit,
    unit: &Unit,
    ends: &[(String, f64); 2],
) -> Option<Panel> {
    let scales = report.run.scales;
    let latest = &audit.judged[unit.latest()?];
    let oil = latest.label.oil?;
    let new = to_mm2_s(scales.oils[oil].curves.nu_new(celsius(40.0)));
    let above = |nu40: f64| 6.0 * lg(nu40 / new);
    let readings: Vec<(Date, f64)> = unit
        .judged
        .iter()
        .filter_map(|j| {
            let b = &audit.bottles[audit.judged[*j].bottle];
            Some((b.drawn?, b.figures.exact(Reading::Nu40)?))
        })
        .collect();
    let (_, value) = *readings.last()?;
    let serves = latest.serves.as_ref();
    let floor = serves.and_then(|s| s.floor40);
    let ceiling = serves.and_then(|s| s.ceiling40);
    let id = &scales.site.oils[oil].id;
    let moved: Vec<String> = readings
        .iter()
        .map(|(_, nu)| steps_of(Some(above(*nu))))
        .collect();
    Some(Panel {
        tag: unit.name.clone(),
        label: id.clone(),
        mark: mark_of(latest),
        figure: TrendPanel {
            id: format!("trend-{}", plain(&unit.name)),
            title: format!("{}: viscosity at 40 °C of {id}", unit.name),
            description: format!(
                "Latest {} mm²/s; {} VG steps from the label. The machine asks {}. Trend: {}.",
                fixed(value, 1, Toward::Nearest),
                moved.join(", "),
                say::told(&asks(latest), scales.units),
                say::told(&trend_words(&unit.trend), scales.units)
            ),
            samples: readings
                .iter()
                .map(|(day, nu)| TrendSample {
                    day: day_number(*day),
                    steps: above(*nu),
                })
                .collect(),
            tolerance: GRADE,
            floor: floor.map(above),
            ceiling: ceiling.map(above),
            latest: fixed(value, 1, Toward::Nearest),
            dates: ends.clone(),
            reach: REACH,
        },
    })
}

fn caption(audit: &Audit) -> String {
    let n = audit.units.iter().filter(|u| u.judged.len() > 1).count();
    format!(
        "Viscosity at 40 °C, the figure is the latest value in mm²/s. All panels share one scale, VG steps from new oil. {} sampled more than once.",
        say::sentence(&say::count(n, "fill was", "fills were"))
    )
}

fn samples(report: &Report<'_>, audit: &Audit) -> Vec<SampleRow> {
    let site = report.run.scales.site;
    let latest = audit.units.iter().filter_map(|u| Some((u, u.latest()?)));
    let mut rows: Vec<SampleRow> = latest
        .map(|(u, p)| sample(report, audit, &u.name, &audit.judged[p]))
        .collect();
    for u in &audit.unmatched {
        let name = format!("\u{201c}{}\u{201d}", audit.bottles[u.bottle].machine);
        if let Some(j) = audit.judged.iter().find(|j| j.bottle == u.bottle) {
            rows.push(SampleRow {
                asks: "machine not known".to_owned(),
                ..sample(report, audit, &name, j)
            });
        }
    }
    for u in &audit.unsampled {
        let verdict = match (u.barred.is_empty(), u.verdict) {
            (false, _) => "barred",
            (true, Some(v)) => v.word(),
            (true, None) => "oil unknown",
        };
        rows.push(SampleRow {
            machine: Phrase::new().tag(site.points[u.point].address()),
            label: u
                .oil
                .map_or_else(|| "unknown".to_owned(), |o| site.oils[o].id.clone()),
            mark: match (u.barred.is_empty(), u.verdict) {
                (false, _) | (true, Some(Verdict::Fails)) => Mark::Fails,
                (true, Some(v)) => mark(v),
                (true, None) => Mark::Open,
            },
            missing: format!("never sampled; judged as the label says: {verdict}"),
            ..SampleRow::default()
        });
    }
    rows
}

fn sample(report: &Report<'_>, audit: &Audit, name: &str, j: &Judged) -> SampleRow {
    let site = report.run.scales.site;
    let b = &audit.bottles[j.bottle];
    let figure = |r: Reading| {
        b.figures
            .get(r)
            .map_or("not run".to_owned(), |f| f.written.to_string())
    };
    let moved = j.change.nu40.map_or(String::new(), |x| {
        let text = fixed(100.0 * x, 1, Toward::Nearest);
        let sign = if x > 0.0 && text != "0.0" { "+" } else { "" };
        format!(", {sign}{} %", crate::report::model::minus(&text))
    });
    let missing = match (&b, j) {
        (_, j) if j.twice => "two bottles of one day: neither is judged".to_owned(),
        (b, j) if j.too_old => format!(
            "last sample {}, past the age the site allows",
            b.drawn_written
        ),
        (b, _) if b.shifted => {
            "the row was not read: its cells stand under other headings".to_owned()
        }
        _ => String::new(),
    };
    let mut margins: Vec<String> = j.serves.as_ref().map_or(Vec::new(), |s| {
        let one = |m: Option<crate::judge::Margin>, word: &str| {
            m.map(|m| format!("{} {word}", say::steps(m.value, 1)))
        };
        [one(s.judgement.hot, "hot"), one(s.judgement.cold, "cold")]
            .into_iter()
            .flatten()
            .collect()
    });
    if j.is_barred() {
        margins.push("barred here".to_owned());
    }
    SampleRow {
        machine: Phrase::new().tag(name),
        label: j
            .label
            .oil
            .map(|o| site.oils[o].id.clone())
            .or(j.label.written.clone())
            .unwrap_or_else(|| "unknown".to_owned()),
        drawn: format!(
            "{}, row {}",
            b.drawn
                .map_or_else(|| b.drawn_written.clone(), |d| d.to_string()),
            b.place.row
        ),
        nu40: figure(Reading::Nu40),
        nu100: figure(Reading::Nu100),
        as_labelled: format!("{}{moved}", j.whose.words()),
        asks: say::told(&asks(j), report.run.scales.units),
        mark: mark_of(j),
        margins,
        flags: b.flags.clone().unwrap_or_else(|| "none".to_owned()),
        missing,
    }
}

fn trust(audit: &Audit) -> Vec<Phrase> {
    let baselines = |f: &dyn Fn(&Judged) -> bool| audit.judged.iter().filter(|j| f(j)).count();
    let sheets = baselines(&|j| matches!(j.baseline, Some(From::DataSheet | From::Usual)));
    let samples = baselines(&|j| matches!(j.baseline, Some(From::Beside | From::NewOil(_))));
    let single = audit.units.iter().filter(|u| u.judged.len() < 2).count();
    let guides = audit
        .judged
        .iter()
        .filter(|j| {
            j.serves
                .as_ref()
                .is_some_and(|s| s.slope == crate::audit::serves::Slope::OfLabel)
        })
        .count();
    let mut list: Vec<Phrase> = vec![
        format!(
            "The viscosity of new oil is that of the data sheet for {}, of new-oil samples for {}.",
            say::count(sheets, "sample", "samples"),
            say::count(samples, "sample", "samples")
        )
        .as_str()
        .into(),
        "The machine's own floor and ceiling decide whether an oil serves; the limits of its class say how far it has changed. A machine's own limits, stated in the site file, outrank those of practice.".into(),
        "Causes are weighed by how the figures move together, against the reproducibility of each test. Several may stand, and \u{201c}not decided\u{201d} is an answer.".into(),
    ];
    if guides > 0 {
        list.push(format!("One viscosity was not run for {}: the slope of the labelled oil is used there, as a guide.", say::count(guides, "sample", "samples")).as_str().into());
    }
    if single > 0 {
        list.push(
            format!(
                "{} sampled once: no trend.",
                say::sentence(&say::count(single, "fill was", "fills were"))
            )
            .as_str()
            .into(),
        );
    }
    list
}

fn sign(report: &Report<'_>, audit: &Audit) -> SignOff {
    let client = report.run.scales.site.frame.client.as_deref();
    let act = audit
        .findings
        .iter()
        .filter(|f| f.level == crate::audit::limits::Level::Act)
        .count();
    let bottles = say::count(audit.bottles.len(), "bottle", "bottles");
    SignOff {
        meaning: "Accepting the findings is not a release for oil changes.".to_owned(),
        boxes: vec![
            SignBox {
                role: "Audited".to_owned(),
                accepts: format!("Samples and labels as found, {bottles}.")
                    .as_str()
                    .into(),
            },
            SignBox {
                role: "Checked".to_owned(),
                accepts: "The table against the laboratory's report.".into(),
            },
            SignBox {
                role: client.map_or_else(|| "Accepted".to_owned(), |c| format!("Accepted for {c}")),
                accepts: format!(
                    "{}, {} of them to act on.",
                    say::sentence(&say::count(audit.findings.len(), "finding", "findings")),
                    say::number(act)
                )
                .as_str()
                .into(),
            },
        ],
    }
}
