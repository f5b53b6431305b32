//! Viscosity of an oil: new, and after shear.

use super::line::{line, problem_at};
use crate::input::convert::Dense;
use crate::input::fields::{Fields, Slot};
use crate::input::points::{self, Grade, Listed};
use crate::input::reader::Reader;
use crate::model::oil::{GradeOnly, OilKind, PointsFrom, Viscosity, ViscosityPoint};
use crate::problem::{Code, Write};
use crate::quantity::convert::celsius;
use crate::quantity::show::{Toward, Units, quantity};
use crate::quantity::{KinematicViscosity, Measure};
use crate::relation::oil::viscosity_index;
use crate::source::Span;
use crate::source::place::Given;
use crate::source::yaml::Entry;

/// What makes a dynamic viscosity kinematic, and whether it is only typical.
pub(super) struct Density {
    pub(super) dense: Dense,
    pub(super) assumed: bool,
}

/// An oil's record as far as its viscosity depends on it.
pub(super) struct Sheet<'f, 't> {
    pub(super) entry: &'t Entry,
    pub(super) fields: &'f Fields<'t>,
    pub(super) kind: OilKind,
    /// Whether a base is stated.
    pub(super) has_base: bool,
}

/// The viscosity of the new oil, of a grease that of its base oil.
pub(super) fn viscosity(
    reader: &mut Reader<'_>,
    sheet: &Sheet<'_, '_>,
    density: &Density,
) -> Option<Viscosity> {
    let fields = sheet.fields;
    let name = if sheet.kind == OilKind::Grease && fields.has("base oil") {
        "base oil"
    } else {
        "viscosity"
    };
    let Some(slot) = fields.get(name) else {
        if fields.lacks(name) {
            missing(reader, sheet.entry, sheet.kind);
        }
        return None;
    };
    let listed = points::read(reader, slot, Some(&density.dense));
    if listed.faulty {
        return None;
    }
    say_density(reader, slot, &listed, density);
    if let Some(grade) = &listed.grade {
        return by_grade(reader, slot, &listed, grade, sheet.has_base);
    }
    let points = line(reader, slot, &listed)?;
    let from = match fields.word(reader, "points").map(|w| w.value) {
        Some("batch") => PointsFrom::Batch,
        Some("measured") => PointsFrom::Measured,
        _ => PointsFrom::DataSheet,
    };
    Some(Viscosity::Points { points, from })
}

fn missing(reader: &mut Reader<'_>, entry: &Entry, kind: OilKind) {
    let (key, example) = if kind == OilKind::Grease {
        ("base oil", "[100 mm2/s at 40 degC, 11.0 mm2/s at 100 degC]")
    } else {
        (
            "viscosity",
            "[220 mm2/s at 40 degC, 19.0 mm2/s at 100 degC]",
        )
    };
    let id = entry.key.text.trim();
    let mut problem = reader
        .at(Code::ViscosityMissing, format!("no `{key}`"), entry.key.span, id)
        .why("an oil without viscosity cannot be weighed; a grade with its index is enough, as [ISO VG 220, VI 95]");
    let value = entry.value.span;
    let at = Span {
        end: value.start,
        ..value
    };
    let line = format!("{key}: {example}");
    let remark = "with the figures of the data sheet";
    let bracketed = reader.set.slice(value).starts_with('{');
    problem = if bracketed {
        let behind = Span {
            start: at.start + 1,
            end: at.start + 1,
            ..at
        };
        problem.write(
            Write::edit(behind, format!(" {line},"))
                .said(line)
                .remark(remark),
        )
    } else if entry.value.is_blank() {
        problem.write(
            Write::edit(at, format!("\n  {line}"))
                .said(line)
                .remark(remark),
        )
    } else {
        let source = reader.source(&entry.value);
        let before = source[..value.start as usize].rsplit('\n').next();
        let indent = " ".repeat(before.map_or(0, str::len));
        let text = format!("{line}\n{indent}");
        problem.write(Write::edit(at, text).said(line).remark(remark))
    };
    reader.report(problem);
}

/// A density that nobody stated is named where it was used.
pub(super) fn say_density(
    reader: &mut Reader<'_>,
    slot: &Slot<'_>,
    listed: &Listed,
    density: &Density,
) {
    let used = listed.at.iter().any(|p| {
        let text = p.text();
        text.contains("Pa.s")
            || text.contains("cP")
            || text.contains("Pa·s")
            || text.contains("Pa s")
    });
    if used && density.assumed {
        let rho = quantity(density.dense.rho15.amount(), Units::Si, Toward::Nearest);
        let note = reader
            .at(
                Code::DensityAssumed,
                format!("mPa.s divided by a density of {rho} at 15 degC, typical of the base"),
                slot.node.span,
                &slot.within,
            )
            .ask("supplier for the density, and write it as density: 890 kg/m3 at 15 degC");
        reader.report(note);
    }
}

/// A grade with its index, or with a base that implies a range of indices.
fn by_grade(
    reader: &mut Reader<'_>,
    slot: &Slot<'_>,
    listed: &Listed,
    grade: &Given<Grade>,
    has_base: bool,
) -> Option<Viscosity> {
    if let Some(point) = listed.at.first() {
        let problem = reader
            .at(
                Code::StatedTwice,
                "a grade and a viscosity found, one of them is wanted",
                point.node.span,
                &slot.within,
            )
            .why("measured points outrank the grade, which only says that they lie within 10 % of it")
            .write(Write::edit(slot.node.span, without_grade(listed)));
        reader.report(problem);
        return None;
    }
    if listed.index.is_none() && (!has_base || !matches!(grade.value, Grade::Iso { .. })) {
        let text = format!("[{}, VI 95]", grade.written);
        let problem = problem_at(
            reader,
            slot,
            Code::GradeAlone,
            "a grade found without viscosity index",
        )
        .why("a grade holds at one temperature; how the oil thins is said by its index, or by `base` for an ISO grade")
        .write(Write::edit(slot.node.span, text).remark("with the right index"));
        reader.report(problem);
        return None;
    }
    match grade.value {
        Grade::Iso { number, .. } => Some(Viscosity::Grade(Box::new(GradeOnly {
            iso_vg: grade.clone().map(|_| number),
            vi: listed.index.clone(),
        }))),
        Grade::At40(lo, hi) => from_limits(listed, grade, (lo, hi), false),
        Grade::At100(lo, hi) => from_limits(listed, grade, (lo, hi), true),
    }
}

fn without_grade(listed: &Listed) -> String {
    let texts: Vec<&str> = listed.at.iter().map(points::Piece::text).collect();
    let index = listed.index.as_ref().map(|i| i.written.as_str());
    let all: Vec<&str> = texts.into_iter().chain(index).collect();
    format!("[{}]", all.join(", "))
}

/// A class of viscosity that is no ISO grade: the middle of its limits, with its ends as tolerance.
fn from_limits(
    listed: &Listed,
    grade: &Given<Grade>,
    (lo, hi): (KinematicViscosity, KinematicViscosity),
    at_100: bool,
) -> Option<Viscosity> {
    let index = listed.index.as_ref()?.value;
    let other = |nu| {
        if at_100 {
            viscosity_index::nu40(nu, index).ok()
        } else {
            viscosity_index::nu100(nu, index).ok()
        }
    };
    let point = |lo: KinematicViscosity, hi: KinematicViscosity, at: f64| {
        let middle = f64::midpoint(lo.base(), hi.base());
        let nu = KinematicViscosity::from_base(middle);
        ViscosityPoint {
            nu: grade.clone().map(|_| nu),
            at: celsius(at),
            tolerance: Some((hi.base() - middle) / middle),
        }
    };
    let (known, derived) = if at_100 { (100.0, 40.0) } else { (40.0, 100.0) };
    let mut points = vec![point(lo, hi, known), point(other(lo)?, other(hi)?, derived)];
    points.sort_by(|a, b| a.at.base().total_cmp(&b.at.base()));
    Some(Viscosity::Points {
        points,
        from: PointsFrom::DataSheet,
    })
}
