//! `oil`: one oil as text: what it is at temperatures, how far its data carry, what it shears to.

mod blend;
mod cold;
mod machines;

use crate::cli::text::{Column, folded, table};
use crate::oil::grades::{Graded, Worn};
use crate::oil::sheet::{Loss, OilSheet, PolymerSheet, Row, SpreadOf};
use crate::oil::start::Standing;
use crate::quantity::kind::Kind;
use crate::quantity::show::{Toward, Units, fixed, quantity, significant, unit_of};
use crate::quantity::{Amount, KinematicViscosity, Measure, Ratio, ThermodynamicTemperature, Time};
use crate::trace::Known;
use std::fmt::Write as _;

pub use blend::text as blend_text;
pub use machines::text as machines_text;

/// The sheet of an oil.
pub fn text(sheet: &OilSheet, units: Units, width: usize) -> String {
    let mut out = folded(&sheet.headline, "", width);
    out.push_str(&folded(&sheet.because, "", width));
    out.push('\n');
    for (key, says) in &sheet.facts {
        out.push_str(&entry(key, says, width));
    }
    out.push('\n');
    out.push_str(&rows(sheet, units, width));
    grades(&mut out, sheet, width);
    if let Some(polymer) = &sheet.polymer {
        shear(&mut out, polymer, units, width);
    }
    cold::cold(&mut out, &sheet.cold, units, width);
    cold::life(&mut out, sheet, units, width);
    if !sheet.findings.is_empty() {
        out.push('\n');
    }
    for f in &sheet.findings {
        let says = format!("{}; {} [{}]", f.says, f.act, f.name);
        out.push_str(&entry("found", &says, width));
    }
    out
}

/// A word and what is said of it, folded beside it.
fn entry(key: &str, says: &str, width: usize) -> String {
    let body = folded(says, "               ", width);
    let head = format!("  {key:<11}  ");
    format!("{head}{}", body.trim_start())
}

fn temperature(t: ThermodynamicTemperature, units: Units) -> String {
    quantity(t.amount(), units, Toward::Nearest)
}

fn viscosity(nu: KinematicViscosity, units: Units) -> String {
    quantity(nu.amount(), units, Toward::Nearest)
}

fn per_cent(share: Ratio) -> String {
    format!("{} %", fixed(100.0 * share.base(), 0, Toward::Nearest))
}

fn hours(t: Time) -> String {
    let unit = unit_of(Kind::Time, Units::Si);
    format!(
        "{} h",
        significant(t.amount().in_unit(unit), 2, Toward::Nearest)
    )
}

/// A range, or the one value where both ends read alike.
fn span(a: String, b: String) -> String {
    if a == b { a } else { format!("{a} to {b}") }
}

/// The figure alone, to as many digits as it deserves: two where it is extrapolated.
fn figure(base: f64, kind: Kind, units: Units, extrapolated: bool) -> String {
    let unit = unit_of(kind, units);
    let digits = if extrapolated { 2 } else { 3 };
    significant(Amount { kind, base }.in_unit(unit), digits, Toward::Nearest)
}

fn rows(sheet: &OilSheet, units: Units, width: usize) -> String {
    let (nu, eta) = (
        unit_of(Kind::KinematicViscosity, units).name,
        unit_of(Kind::DynamicViscosity, units).name,
    );
    let mut out = match sheet.spread {
        SpreadOf::Ends => "  thin and thick: ends of the grade or of the tolerance, judged\n",
        SpreadOf::Tests => {
            "  thin and thick: what the tests themselves leave open, carried along the line\n"
        }
        SpreadOf::Nothing => "",
    }
    .to_owned();
    let _ = writeln!(out, "  viscosities in {nu}, dynamic in {eta}");
    let worn = sheet.rows.iter().any(|r| r.worn.is_some());
    let measured = sheet.rows.iter().any(|r| r.cold.is_some());
    let mut columns = vec![Column::text("at", 0), Column::number("new", 0)];
    if measured {
        columns.push(Column::number("measured", 0));
    }
    if worn {
        columns.push(Column::number("worn", 0));
    }
    columns.push(Column::number("thin", 3));
    columns.push(Column::number("thick", 3));
    columns.push(Column::number("dynamic", 4));
    columns.push(Column::text("", 5));
    let lines: Vec<Vec<String>> = sheet
        .rows
        .iter()
        .map(|r| cells(r, units, measured, worn))
        .collect();
    out.push_str(&table(&columns, &lines, width));
    out
}

fn cells(r: &Row, units: Units, measured: bool, worn: bool) -> Vec<String> {
    let far = matches!(r.standing, Standing::Below(_) | Standing::Above(_));
    let line_far = far || r.cold.is_some();
    let nu = |k: Known<KinematicViscosity>, far| {
        figure(k.value.base(), Kind::KinematicViscosity, units, far)
    };
    let mut cells = vec![temperature(r.at, units), nu(r.new, line_far)];
    if measured {
        cells.push(r.cold.map_or(String::new(), |k| nu(k, far)));
    }
    if worn {
        cells.push(r.worn.map_or(String::new(), |(least, most)| {
            if least.value == most.value {
                nu(most, line_far)
            } else {
                format!("{}..{}", nu(most, line_far), nu(least, line_far))
            }
        }));
    }
    for second in [false, true] {
        let end = r
            .ends
            .map(|(thin, thick)| if second { thick } else { thin });
        cells.push(end.map_or(String::new(), |k| nu(k, line_far)));
    }
    cells.push(figure(
        r.dynamic.value.base(),
        Kind::DynamicViscosity,
        units,
        far,
    ));
    let mut says = r.remarks.clone();
    match r.standing {
        Standing::Stated => says.insert(0, "stated".to_owned()),
        Standing::Measured => says.insert(0, "measured, or between measured points".to_owned()),
        _ => {}
    }
    cells.push(says.join("; "));
    cells
}

fn grades(out: &mut String, sheet: &OilSheet, width: usize) {
    out.push('\n');
    let vi = |k: Option<Known<Ratio>>| {
        k.map_or("none".to_owned(), |k| {
            fixed(k.value.base(), 0, Toward::Nearest)
        })
    };
    let mut says = format!("VI {}", vi(sheet.index));
    if let Some(off) = sheet.index_spread {
        let _ = write!(says, " +/- {}", fixed(off.value.base(), 0, Toward::Up));
    }
    if sheet.index_worn.is_some() {
        let _ = write!(says, " new, {} worn", vi(sheet.index_worn));
    }
    out.push_str(&entry("index", &says, width));
    for g in &sheet.grades {
        out.push_str(&entry(g.system.word(), &graded(g), width));
    }
}

fn graded(g: &Graded) -> String {
    let name = |grade: &Option<String>| grade.clone().unwrap_or_else(|| "no grade".to_owned());
    let new = name(&g.new);
    match &g.worn {
        None => new,
        Some(Worn::Grade(worn)) => {
            let leaves = if g.leaves() == Some(true) {
                ": leaves its grade"
            } else {
                ""
            };
            format!("{new} new, {} worn{leaves}", name(worn))
        }
        Some(Worn::AtWorst(worn)) => {
            let may = if g.leaves().is_some() {
                ": may leave its grade"
            } else {
                ""
            };
            format!(
                "{new} new, {} at the greatest plausible loss{may}",
                name(worn)
            )
        }
    }
}

fn shear(out: &mut String, p: &PolymerSheet, units: Units, width: usize) {
    out.push('\n');
    let made = if p.stated { "stated" } else { "estimated" };
    let named = p.named.as_ref().map_or(String::new(), |n| format!(", {n}"));
    let mut says = match &p.base {
        None => format!("base oil and polymer cannot be estimated{named}"),
        Some(ends) => {
            let at = |(thin, thick): (Known<KinematicViscosity>, Known<KinematicViscosity>)| {
                span(viscosity(thin.value, units), viscosity(thick.value, units))
            };
            format!(
                "base oil {made}: {} at 40 degC, {} at 100 degC{named}",
                at(ends[0]),
                at(ends[1])
            )
        }
    };
    if let Some((least, most)) = p.carries {
        let carries = span(per_cent(least), per_cent(most));
        let _ = write!(
            says,
            "; the polymer carries {carries} of the viscosity at 100 degC"
        );
    }
    let (from, to) = p.window;
    let _ = write!(
        says,
        "; outside {} to {} the oil follows its base",
        temperature(from, units),
        temperature(to, units)
    );
    out.push_str(&entry("polymer", &says, width));
    out.push_str(&entry("shear", &loss(p), width));
    if let Some((least, most)) = p.kept_150 {
        let by = if p.calibrated {
            "by the HTHS stated"
        } else {
            "no HTHS stated, plausible"
        };
        let range = span(per_cent(least.value), per_cent(most.value));
        let says = format!(
            "keeps {range} of its viscosity at 150 degC and 1e6 1/s ({by}); returns when the shear ends"
        );
        out.push_str(&entry("in contacts", &says, width));
    }
}

fn loss(p: &PolymerSheet) -> String {
    let mut says = match p.loss {
        Loss::Nothing => "no loss known".to_owned(),
        Loss::Known { at40, at100 } => {
            let index = p
                .index
                .map_or(String::new(), |i| format!(", PSSI {}", per_cent(i.value)));
            format!(
                "loses {} at 40 degC and {} at 100 degC for good{index}",
                per_cent(at40.value),
                per_cent(at100.value)
            )
        }
        Loss::Between {
            least,
            most_mild,
            most_severe,
        } => format!(
            "the loss is not known: {} to {} in engines and hydraulics, to {} in gears and rolling \
             bearings is plausible",
            per_cent(least),
            per_cent(most_mild),
            per_cent(most_severe)
        ),
    };
    if let Some(test) = p.test_says() {
        let _ = write!(says, "; {test}");
    }
    if let Some(order) = p.order_of_tests() {
        let _ = write!(says, ". {order}");
    }
    says
}
