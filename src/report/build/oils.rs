//! The sheet of an oil: its line new and worn, its window, grades, cold limits and life, what is
//! stated and what is carried on, and the machines it was weighed on.

use super::oil_says::{cold, facts, grades, life, starts};
use super::oil_steps::OilSteps;
use super::plan::On;
use super::uses;
use super::{Report, caution, say};
use crate::oil::sheet::{DrawnLine, LineOf, OilSheet as Told, Row, SpreadOf, sheet as told};
use crate::oil::start::Standing;
use crate::quantity::show::{Toward, Units, significant, unit_of};
use crate::quantity::{Amount, Kind, KinematicViscosity, Measure, ThermodynamicTemperature};
use crate::relation::Law;
use crate::report::draw::viscosity::{OilLine, Reading, Role, TemperatureBand, ViscosityFigure};
use crate::report::model::{
    Body, Caution, Curves, OilPoint, OilSheet, Origin, Phrase, Sheet, item_letter,
};
use crate::trace::Known;
use std::collections::BTreeMap;

/// Relations used on a sheet, by name.
pub(super) type Laws = BTreeMap<&'static str, &'static Law>;

/// The sheet of an oil of the list; none for an oil whose points make no curve, which the reader
/// refuses.
pub(super) fn oil(report: &Report<'_>, place: usize) -> Option<Sheet> {
    let run = &report.run;
    let units = run.scales.units;
    let oil = &run.scales.site.oils[place];
    let plan = &report.plan.oils[place];
    let t = told(oil, run.scales.rules, &[]).ok()?;
    let steps = OilSteps::of(&t.steps, units, &plan.place);
    let (uses, more_uses) = uses::of_oil(report, place);
    let columns = Columns::of(&t);
    let body = OilSheet {
        headline: headline(&t, units),
        because: say::stopped(&say::sentence(&say::told(&t.because, units))),
        facts: facts(&t, units),
        caution: of_oil(&t, units),
        findings: t
            .findings
            .iter()
            .map(|f| {
                Phrase::new()
                    .and(say::stopped(&say::sentence(&say::told(&f.says, units))))
                    .and(" ")
                    .strong(say::stopped(&say::sentence(&say::told(&f.act, units))))
            })
            .collect(),
        curves: Some(curves(&t, units)),
        columns: columns.heads(units),
        points: t
            .rows
            .iter()
            .map(|r| columns.row(r, &steps, units))
            .collect(),
        grades: grades(&t, &steps, units),
        cold: cold(&t, &steps, units),
        starts: starts(&t, &steps, units),
        life: life(&t, units).0,
        lives: life(&t, units).1,
        uses,
        more_uses,
        steps: steps.list,
    };
    let name = oil.name.clone().unwrap_or_default();
    let sheet = Sheet {
        place: plan.place.clone(),
        number: plan.number,
        of: report.plan.of,
        name: oil.id.clone(),
        title: format!(
            "{}: viscosity over temperature, and where it serves",
            oil.id
        ),
        subtitle: name,
        about: format!(
            "{}; stated {} to {}.",
            say::sentence(oil.kind.word()),
            say::temperature_figure(t.stated.0.base(), units),
            say::temperature(t.stated.1.base(), units)
        )
        .into(),
        nav: report.plan.nav(On::Oil(place)),
        body: Body::Oil(Box::new(body)),
    };
    Some(sheet)
}

/// The relations the sheet of an oil stands on.
pub(super) fn laws(report: &Report<'_>, place: usize) -> Laws {
    let scales = report.run.scales;
    told(&scales.site.oils[place], scales.rules, &[]).map_or_else(
        |_| Laws::new(),
        |t| OilSteps::of(&t.steps, scales.units, &report.plan.oils[place].place).laws,
    )
}

/// The headline of the command without the oil's id and name, which head the sheet.
fn headline(t: &Told, units: Units) -> String {
    let own = t
        .name
        .as_ref()
        .map_or_else(|| format!("{}: ", t.id), |n| format!("{}  {n}: ", t.id));
    let text = t.headline.strip_prefix(&own).unwrap_or(&t.headline);
    say::stopped(&say::sentence(&say::told(text, units)))
}

fn of_oil(t: &Told, units: Units) -> Caution {
    let known = say::temperature(t.cold.coldest.base(), units);
    let mut before: Vec<Phrase> = vec![
        format!(
            "Nothing is known below {known}: figures for colder oil are carried on along its line."
        )
        .into(),
    ];
    if t.polymer.is_some() {
        before.push(
            "It holds a polymer: new oil, worn oil and oil in a fast contact are three viscosities.".into(),
        );
    }
    Caution {
        judged: vec!["viscosity over temperature, new and after shear, from what its source states".to_owned()],
        not_judged: vec![
            "whether it suits a machine: that stands on the machine's sheet, with rules and conditions".to_owned(),
            "wear protection, foam, air, filterability, health and safety".to_owned(),
        ],
        defer: vec![caution::DEFER.into()],
        before,
    }
}

fn reading(r: &crate::oil::sheet::Reading) -> Reading {
    (say::celsius(r.at.base()), say::mm2_s(r.nu.base()))
}

/// The figure: new oil heaviest, its ends tinted, every other line with a letter of its own.
fn curves(t: &Told, units: Units) -> Curves {
    let of = |kind: LineOf| t.lines.iter().find(|l| l.of == kind);
    let points = |l: &DrawnLine| -> Vec<Reading> { l.readings.iter().map(reading).collect() };
    let tolerance = of(LineOf::Thin)
        .zip(of(LineOf::Thick))
        .map(|(thin, thick)| (points(thin), points(thick)));
    let mut lines = Vec::new();
    let mut words = Vec::new();
    for drawn in &t.lines {
        if matches!(drawn.of, LineOf::Thin | LineOf::Thick) {
            continue;
        }
        let letter = item_letter(lines.len());
        let new = drawn.of == LineOf::New;
        words.push(format!("{letter} {}", drawn.of.word()));
        let known: Vec<Reading> = drawn
            .readings
            .iter()
            .filter(|r| !r.extrapolated)
            .map(reading)
            .collect();
        let ends = [known.first(), known.last()];
        lines.push(OilLine {
            letter,
            role: if new { Role::Proposed } else { Role::Other },
            line: points(drawn),
            as_new: Vec::new(),
            stated: ends.into_iter().flatten().copied().collect(),
            tolerance: if new { tolerance.clone() } else { None },
        });
    }
    let spread = match t.spread {
        SpreadOf::Ends => " Tint: ends of the grade or of the stated tolerance.",
        SpreadOf::Tests => " Tint: what the tests themselves leave open.",
        SpreadOf::Nothing => "",
    };
    let figure = ViscosityFigure {
        id: "fig-curves".to_owned(),
        title: format!("Viscosity over temperature of {}", t.id),
        description: format!(
            "Lines drawn: {}. Their figures stand in the table.",
            words.join(", ")
        ),
        degrees: say::degrees(units),
        lines,
        jaws: Vec::new(),
        bands: bands(t, units),
        details: Vec::new(),
    };
    Curves {
        caption: format!("{}.{spread}", words.join(", ")),
        figure,
        notes: Vec::new(),
    }
}

/// What is stated, what is only carried on, and where a polymer works.
fn bands(t: &Told, units: Units) -> Vec<TemperatureBand> {
    let drawn = t.lines.first().map(|l| &l.readings);
    let coldest = drawn
        .and_then(|r| r.first())
        .map_or(t.cold.coldest, |r| r.at);
    let known = t.cold.coldest;
    let band = |from: ThermodynamicTemperature, to: ThermodynamicTemperature, what: &str| {
        TemperatureBand {
            from_c: say::celsius(from.base()),
            to_c: say::celsius(to.base()),
            label: format!(
                "{what}, {} to {}",
                say::temperature_figure(from.base(), units),
                say::temperature(to.base(), units)
            ),
        }
    };
    let mut bands = vec![band(t.stated.0, t.stated.1, "stated")];
    if known < t.stated.0 {
        bands.push(band(known, t.stated.0, "measured cold"));
    }
    if coldest < known {
        bands.push(band(coldest, known, "carried on"));
    }
    if let Some(p) = &t.polymer {
        bands.push(band(p.window.0, p.window.1, "the polymer works"));
    }
    bands
}

/// Which columns the table of viscosities has.
struct Columns {
    measured: bool,
    worn: bool,
    ends: bool,
}

impl Columns {
    fn of(t: &Told) -> Self {
        Self {
            measured: t.rows.iter().any(|r| r.cold.is_some()),
            worn: t.rows.iter().any(|r| r.worn.is_some()),
            ends: t.rows.iter().any(|r| r.ends.is_some()),
        }
    }

    fn heads(&self, units: Units) -> Vec<String> {
        let nu = crate::quantity::show::pretty_unit(unit_of(Kind::KinematicViscosity, units).name);
        let eta = crate::quantity::show::pretty_unit(unit_of(Kind::DynamicViscosity, units).name);
        let mut heads = vec![format!("new, {nu}")];
        if self.measured {
            heads.push("measured cold".to_owned());
        }
        if self.worn {
            heads.push("worn".to_owned());
        }
        if self.ends {
            heads.push("thin end".to_owned());
            heads.push("thick end".to_owned());
        }
        heads.push(format!("dynamic, {eta}"));
        heads
    }

    fn row(&self, r: &Row, steps: &OilSteps, units: Units) -> OilPoint {
        let far = matches!(r.standing, Standing::Below(_) | Standing::Above(_));
        let line_far = far || r.cold.is_some();
        let nu = |k: Known<KinematicViscosity>, far| figure(k.value.amount(), units, far);
        let mut values = vec![nu(r.new, line_far)];
        if self.measured {
            values.push(r.cold.map_or(String::new(), |k| nu(k, far)));
        }
        if self.worn {
            values.push(r.worn.map_or(String::new(), |(least, most)| {
                let (a, b) = (nu(most, line_far), nu(least, line_far));
                if a == b { a } else { format!("{a} to {b}") }
            }));
        }
        if self.ends {
            for second in [false, true] {
                let end = r
                    .ends
                    .map(|(thin, thick)| if second { thick } else { thin });
                values.push(end.map_or(String::new(), |k| nu(k, line_far)));
            }
        }
        values.push(figure(r.dynamic.value.amount(), units, far));
        let (origin, mut says) = standing(r.standing, units);
        // a remark that says how far a figure is carried says more than its standing
        if r.remarks.iter().any(|s| s.starts_with("extrapolated")) {
            says.clear();
        }
        says.extend(r.remarks.iter().map(|s| say::told(s, units)));
        if let Some(number) = steps.number(r.new.step) {
            says.push(format!("step {number}"));
        }
        OilPoint {
            at: say::temperature(r.at.base(), units),
            values,
            origin,
            remark: says.join("; "),
        }
    }
}

/// Two digits where a figure is carried on, three elsewhere.
fn figure(amount: Amount, units: Units, far: bool) -> String {
    let digits = if far { 2 } else { 3 };
    significant(
        amount.in_unit(unit_of(amount.kind, units)),
        digits,
        Toward::Nearest,
    )
}

fn standing(of: Standing, units: Units) -> (Option<Origin>, Vec<String>) {
    let by = |kelvins: f64| {
        let rise = Amount {
            kind: Kind::Rise,
            base: kelvins,
        };
        say::amount(rise, units, Toward::Nearest)
    };
    match of {
        Standing::Stated => (Some(Origin::Supplier), vec!["stated".to_owned()]),
        Standing::Measured => (
            Some(Origin::Supplier),
            vec!["measured cold, or between such points".to_owned()],
        ),
        Standing::Between => (None, Vec::new()),
        Standing::Below(k) => (
            None,
            vec![format!("carried on {} below what is known", by(k))],
        ),
        Standing::Above(k) => (
            None,
            vec![format!("carried on {} above what is stated", by(k))],
        ),
    }
}
