//! Viscosity of an oil: new, and after shear.

use crate::input::convert::Dense;
use crate::input::fields::{Fields, Slot};
use crate::input::points::{self, Grade, Listed};
use crate::input::reader::Reader;
use crate::input::value::Body;
use crate::model::Oil;
use crate::model::oil::{GradeOnly, OilKind, PointsFrom, Shear, Viscosity, ViscosityPoint};
use crate::problem::{Code, Problem, Write};
use crate::quantity::convert::celsius;
use crate::quantity::show::{Toward, Units, quantity, significant};
use crate::quantity::{KinematicViscosity, Measure, Ratio};
use crate::relation::oil::viscosity_index;
use crate::source::place::Given;
use crate::source::yaml::Entry;
use crate::source::{Place, Span};

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
fn say_density(reader: &mut Reader<'_>, slot: &Slot<'_>, listed: &Listed, density: &Density) {
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

/// Points that make a line: two or more, at different temperatures, falling as it gets warmer.
fn line(reader: &mut Reader<'_>, slot: &Slot<'_>, listed: &Listed) -> Option<Vec<ViscosityPoint>> {
    let mut order: Vec<usize> = (0..listed.points.len()).collect();
    order.sort_by(|a, b| {
        let at = |i: &usize| listed.points[*i].at.base();
        at(a).total_cmp(&at(b)).then(a.cmp(b))
    });
    if order.len() < 2 {
        too_few(reader, slot, listed);
        return None;
    }
    let mut sound = true;
    for pair in order.windows(2) {
        let (cold, hot) = (&listed.points[pair[0]], &listed.points[pair[1]]);
        if (hot.at.base() - cold.at.base()).abs() < 1e-9 {
            same_temperature(reader, slot, listed, pair);
            sound = false;
        } else if hot.nu.value.base() >= cold.nu.value.base() {
            upside_down(reader, slot, listed, pair);
            sound = false;
        }
    }
    sound.then(|| order.iter().map(|i| listed.points[*i].clone()).collect())
}

fn problem_at(reader: &Reader<'_>, slot: &Slot<'_>, code: Code, message: &str) -> Problem {
    reader.at(code, message, slot.node.span, &slot.within)
}

fn too_few(reader: &mut Reader<'_>, slot: &Slot<'_>, listed: &Listed) {
    let mut problem = problem_at(
        reader,
        slot,
        Code::PointsTooFew,
        "one viscosity found, two at different temperatures are wanted",
    )
    .why("one point says nothing about how the oil thins when it gets warm; with the index it is a grade, as [ISO VG 220, VI 95]");
    if let (Some(index), Some(point)) = (&listed.index, listed.points.first()) {
        let at_40 = (point.at.base() - celsius(40.0).base()).abs() < 1e-6;
        let nu100 = viscosity_index::nu100(point.nu.value, index.value);
        if let (true, Ok(nu100)) = (at_40, nu100) {
            let second = format!("{} at 100 degC", figure(nu100.base()));
            let text = format!("[{}, {second}]", point.nu.written);
            problem = problem.write(Write::edit(slot.node.span, text).remark("by that index"));
            reader.report(problem);
            return;
        }
    }
    let (first, second) = match listed.points.first() {
        Some(p) if (p.at.base() - celsius(100.0).base()).abs() < 5.0 => {
            let cold = format!("{} at 40 degC", figure(p.nu.value.base() * 12.0));
            (cold, p.nu.written.clone())
        }
        Some(p) => {
            let hot = format!("{} at 100 degC", figure(p.nu.value.base() * 0.09));
            (p.nu.written.clone(), hot)
        }
        None => (
            "220 mm2/s at 40 degC".into(),
            "19.0 mm2/s at 100 degC".into(),
        ),
    };
    let text = format!("[{first}, {second}]");
    problem = problem.write(Write::edit(slot.node.span, text).remark("with the right figure"));
    reader.report(problem);
}

/// A viscosity in m²/s as it would be written.
fn figure(base: f64) -> String {
    let digits = significant(base * 1e6, 3, Toward::Nearest);
    format!("{} mm2/s", digits.replace('\u{202f}', ""))
}

fn same_temperature(reader: &mut Reader<'_>, slot: &Slot<'_>, listed: &Listed, pair: &[usize]) {
    let second = &listed.at[pair[0].max(pair[1])];
    let first = &listed.at[pair[0].min(pair[1])];
    let text = second.text();
    let moved = match text.rfind(" at ") {
        Some(at) => format!("{} at 100 degC", &text[..at]),
        None => text.to_owned(),
    };
    let problem = reader
        .at(
            Code::PointsSameTemperature,
            "two viscosities at one temperature",
            second.node.span,
            &slot.within,
        )
        .related(Place::Text(first.node.span), "")
        .why("a line needs two temperatures")
        .write(
            Write::edit(second.node.span, moved).remark("or the temperature it was measured at"),
        );
    reader.report(problem);
}

fn upside_down(reader: &mut Reader<'_>, slot: &Slot<'_>, listed: &Listed, pair: &[usize]) {
    let (cold, hot) = (&listed.at[pair[0]], &listed.at[pair[1]]);
    let value = |text: &str| text.rfind(" at ").map_or(text.len(), |at| at);
    let (a, b) = (cold.text().to_owned(), hot.text().to_owned());
    let exchanged =
        |own: &str, other: &str| format!("{}{}", &other[..value(other)], &own[value(own)..]);
    let problem = problem_at(
        reader,
        slot,
        Code::CurveUpsideDown,
        "viscosity rises with temperature",
    )
    .why("the two values look exchanged")
    .write(Write::edit(cold.node.span, exchanged(&a, &b)).and(hot.node.span, exchanged(&b, &a)));
    reader.report(problem);
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

/// What permanent shear leaves, stated in one of three ways.
pub(super) fn shear(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    density: &Density,
    new: Option<&Viscosity>,
) -> Option<Shear> {
    let ways = ["sheared", "shear loss", "PSSI"];
    let stated: Vec<&Slot<'_>> = ways.iter().filter_map(|k| fields.get(k)).collect();
    if let [first, second, ..] = stated.as_slice() {
        stated_twice(reader, first, second, "one test says what shear leaves");
        return None;
    }
    let slot = stated.first()?;
    match slot.key.name {
        "sheared" => {
            let listed = points::read(reader, slot, Some(&density.dense));
            if listed.faulty {
                return None;
            }
            say_density(reader, slot, &listed, density);
            let points = line(reader, slot, &listed)?;
            thinner(reader, slot, &listed, new);
            Some(Shear::Points {
                points,
                test: listed.test,
            })
        }
        "shear loss" => loss(reader, slot),
        _ => pssi(reader, slot),
    }
}

/// Two ways of stating one thing.
pub(in crate::input) fn stated_twice(
    reader: &mut Reader<'_>,
    first: &Slot<'_>,
    second: &Slot<'_>,
    why: &str,
) {
    let private = format!("x-{}", second.name.text);
    let problem = reader
        .at(
            Code::StatedTwice,
            format!("`{}` and `{}` both stated", first.key.name, second.key.name),
            first.name.span,
            &first.within,
        )
        .related(Place::Text(second.name.span), "")
        .why(why)
        .write(
            Write::edit(second.name.span, private).remark("keeps it as a remark; or delete one"),
        );
    reader.report(problem);
}

/// A sheared oil cannot be thicker than the new one.
fn thinner(reader: &mut Reader<'_>, slot: &Slot<'_>, listed: &Listed, new: Option<&Viscosity>) {
    let Some(Viscosity::Points { points, .. }) = new else {
        return;
    };
    for (sheared, piece) in listed.points.iter().zip(&listed.at) {
        let same = points
            .iter()
            .find(|p| (p.at.base() - sheared.at.base()).abs() < 1e-6);
        let Some(new) = same.filter(|p| sheared.nu.value.base() > p.nu.value.base()) else {
            continue;
        };
        let written = new.nu.written.clone();
        let problem = reader
            .at(
                Code::ShearedThicker,
                format!("sheared thicker than new, {written}"),
                piece.node.span,
                &slot.within,
            )
            .why("shear breaks polymer and thins the oil; new and sheared may be exchanged")
            .write(Write::edit(piece.node.span, written).remark("at most; or the right figure"));
        reader.report(problem);
    }
}

fn loss(reader: &mut Reader<'_>, slot: &Slot<'_>) -> Option<Shear> {
    let value = slot.value(reader)?;
    let origin = slot.origin(&value.clauses);
    let Body::One {
        read, at: Some(at), ..
    } = value.body
    else {
        return None;
    };
    let loss = share(
        reader,
        slot,
        read.amount.base,
        "a share of the viscosity lost",
    )?;
    Some(Shear::Loss {
        loss: Given::new(Ratio::from_base(loss), value.written, origin),
        at: at.amount.as_measure()?,
        test: value.clauses.test,
    })
}

fn pssi(reader: &mut Reader<'_>, slot: &Slot<'_>) -> Option<Shear> {
    let value = slot.value(reader)?;
    let origin = slot.origin(&value.clauses);
    let Body::One { read, .. } = value.body else {
        return None;
    };
    // The index is customarily written as a number of per cent.
    let as_share = if read.unit == "%" {
        read.amount.base
    } else {
        read.amount.base / 100.0
    };
    let pssi = share(reader, slot, as_share, "a stability index")?;
    Some(Shear::Pssi {
        pssi: Given::new(Ratio::from_base(pssi), value.written, origin),
        test: value.clauses.test,
    })
}

fn share(reader: &mut Reader<'_>, slot: &Slot<'_>, share: f64, what: &str) -> Option<f64> {
    if (0.0..1.0).contains(&share) {
        return Some(share);
    }
    let text = slot.node.text().unwrap_or("");
    let example = if slot.key.name == "PSSI" {
        "25"
    } else {
        "26 % at 100 degC"
    };
    let clauses = text.find(", ").map_or("", |at| &text[at..]);
    let problem = reader
        .at(
            Code::ValueImpossible,
            format!("{what} lies between 0 and 100 %"),
            slot.node.span,
            &slot.within,
        )
        .write(
            Write::edit(slot.node.span, format!("{example}{clauses}"))
                .remark("with the right figure"),
        );
    reader.report(problem);
    None
}

/// A polymer-thickened oil without any figure after shear.
pub(super) fn no_shear(reader: &mut Reader<'_>, fields: &Fields<'_>, oil: &Oil) {
    let slot = fields.get("viscosity").or_else(|| fields.get("base"));
    let Some(slot) = slot else { return };
    let hot = match &oil.viscosity {
        Viscosity::Points { points, .. } => points.last().map(|p| p.nu.written.clone()),
        Viscosity::Grade(grade) => Some(grade.iso_vg.written.clone()),
    };
    let hot = hot.unwrap_or_default();
    let note = reader
        .at(
            Code::ShearMissing,
            format!("{hot} was used as new; no sheared value"),
            slot.node.span,
            &slot.within,
        )
        .so("hot verdicts with this oil are judged over the plausible loss of its class")
        .ask("supplier for viscosity after a 20 h shear test");
    reader.report(note);
}
