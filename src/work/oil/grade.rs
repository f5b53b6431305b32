//! Grades.

use super::{GROUP, may, must};
use crate::quantity::convert::{celsius, number};
use crate::quantity::{
    DynamicViscosity, KinematicViscosity, Measure, Pressure, Ratio, ThermodynamicTemperature,
};
use crate::relation::oil::agma::{AGMA, AgmaNumber, Range};
use crate::relation::oil::d6080::{LOW_GRADE, low_grade};
use crate::relation::oil::grade::{ISO_3448, IsoGrade};
use crate::relation::oil::sae_engine::{self, EngineOil, J300, Measured};
use crate::relation::oil::sae_gear::{self, GearOil, J306};
use crate::trace::{Known, Recorder};
use crate::work::{Args, Refusal, Relation, Worked};

pub(super) const ISO_GRADE: Relation = Relation {
    name: "iso-grade",
    group: GROUP,
    law: &ISO_3448,
    with: &[must("nu40", "viscosity at 40 degC")],
    gives: &[("grade", "number of the grade, or none")],
    run: iso_grade,
};

pub(super) const ISO_GRADE_LIMITS: Relation = Relation {
    name: "iso-grade-limits",
    group: GROUP,
    law: &ISO_3448,
    with: &[must("grade", "number of the grade, 46")],
    gives: &[
        ("midpoint", "viscosity at 40 degC, mm2/s"),
        ("min", "lowest viscosity at 40 degC, mm2/s"),
        ("max", "highest viscosity at 40 degC, mm2/s"),
    ],
    run: iso_limits,
};

pub(super) const AGMA_GRADE: Relation = Relation {
    name: "agma-grade",
    group: GROUP,
    law: &AGMA,
    with: &[must(
        "number",
        "AGMA lubricant number with its suffix, \"5 EP\"",
    )],
    gives: &[
        ("iso_grade", "number of the ISO grade, or none"),
        ("min", "lowest viscosity, mm2/s"),
        ("max", "highest viscosity, mm2/s"),
        ("at", "temperature of these limits, degC"),
    ],
    run: agma_grade,
};

const AT_EXAMPLE: &str = "list of viscosities with their temperatures, \"6500 mPa.s at -25 degC\"";

pub(super) const SAE_ENGINE_GRADE: Relation = Relation {
    name: "sae-engine-grade",
    group: GROUP,
    law: &J300,
    with: &[
        must("nu100", "viscosity at 100 degC"),
        may("hths", "viscosity at 150 degC and 1e6 1/s", "not checked"),
        may("ccs", AT_EXAMPLE, "no W grade"),
        may("mrv", AT_EXAMPLE, "no W grade"),
        may("yield_stress", "yield stress seen in the MRV test", "none"),
    ],
    gives: &[
        ("grade", "as printed, 5W-30, or none"),
        ("w_grade", "winter part, or none"),
        ("hot_grade", "hot part, or none"),
    ],
    run: engine_grade,
};

pub(super) const SAE_GEAR_GRADE: Relation = Relation {
    name: "sae-gear-grade",
    group: GROUP,
    law: &J306,
    with: &[
        must("nu100", "viscosity at 100 degC, new"),
        may(
            "nu100_sheared",
            "the same after 20 h of CEC L-45 method C",
            "not checked",
        ),
        may(
            "t150000",
            "temperature of 150 000 mPa.s by ASTM D2983",
            "no W grade",
        ),
    ],
    gives: &[
        (
            "grade",
            "as printed, 75W-90; a hot part that does not last is left out",
        ),
        ("w_grade", "winter part, or none"),
        ("hot_grade_new", "hot part of the new oil, or none"),
        ("hot_grade_sheared", "hot part of the sheared oil, or none"),
        (
            "stays_in_grade",
            "yes or no; none where shear was not measured",
        ),
    ],
    run: gear_grade,
};

pub(super) const D6080_GRADE: Relation = Relation {
    name: "d6080-grade",
    group: GROUP,
    law: &LOW_GRADE,
    with: &[must("t750", "temperature of 750 mPa.s by ASTM D2983")],
    gives: &[("grade", "low-temperature grade, L32, or none")],
    run: d6080,
};

fn iso_grade(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let nu40: Known<KinematicViscosity> = args.quantity(w, "nu40", "viscosity at 40 degC")?;
    let with = (("nu40", nu40),);
    let found = w
        .trace
        .apply(&ISO_3448, with, |(nu,)| IsoGrade::of_viscosity(nu));
    let Some(grade) = found.value else {
        w.remark(between(nu40.value));
        w.text("grade", None);
        return Ok(());
    };
    let says = "ISO viscosity grade";
    let vg = w.trace.take(&found, "VG", says, |_| number_of(grade));
    w.result("grade", vg, "");
    Ok(())
}

fn number_of(grade: IsoGrade) -> Ratio {
    number(f64::from(grade.number()))
}

/// Which grades a viscosity lies between.
fn between(nu40: KinematicViscosity) -> String {
    let thinner = IsoGrade::all().rfind(|g| g.most() < nu40);
    let thicker = IsoGrade::all().find(|g| g.least() > nu40);
    match (thinner, thicker) {
        (Some(a), Some(b)) => {
            format!("between ISO VG {} and {}: no grade", a.number(), b.number())
        }
        (Some(a), None) => format!("thicker than ISO VG {}: no grade", a.number()),
        (None, Some(b)) => format!("thinner than ISO VG {}: no grade", b.number()),
        (None, None) => "no grade".to_owned(),
    }
}

fn iso_limits(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let asked: Known<Ratio> = args.quantity(w, "grade", "number of the grade")?;
    let found = w.trace.apply(&ISO_3448, (("VG", asked),), |(vg,)| {
        IsoGrade::all().find(|g| (number_of(*g).base() - vg.base()).abs() < 1e-9)
    });
    let Some(grade) = found.value else {
        let words = format!("ISO 3448 has no grade {}", asked.value.base());
        return Err(Refusal::new("grade-unknown", words));
    };
    for (name, says, nu) in [
        ("midpoint", "midpoint at 40 degC", grade.midpoint()),
        ("min", "lowest at 40 degC", grade.least()),
        ("max", "highest at 40 degC", grade.most()),
    ] {
        let limit = w.trace.take(&found, "nu40", says, |_| nu);
        w.result(name, limit, "mm2/s");
    }
    Ok(())
}

fn agma_grade(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let agma = AgmaNumber::read(&args.text("number", "\"5 EP\"")?)?;
    let (least, most, t_c) = match agma.range {
        Range::Iso(grade) => (grade.least(), grade.most(), 40.0),
        Range::At40(least, most) => (least, most, 40.0),
        Range::At100(least, most) => (least, most, 100.0),
    };
    match agma.iso_grade() {
        Some(grade) => {
            let says = "ISO viscosity grade of the AGMA number";
            let vg = w.trace.law("VG", says, &AGMA, (), |()| number_of(grade));
            w.result("iso_grade", vg, "");
        }
        None => w.text("iso_grade", None),
    }
    let min = w
        .trace
        .law("nu_min", "lowest viscosity", &AGMA, (), |()| least);
    let max = w
        .trace
        .law("nu_max", "highest viscosity", &AGMA, (), |()| most);
    let at = w
        .trace
        .law("t", "temperature of the limits", &AGMA, (), |()| {
            celsius(t_c)
        });
    w.result("min", min, "mm2/s");
    w.result("max", max, "mm2/s");
    w.result("at", at, "degC");
    if agma.edition_dependent {
        w.remark(
            "numbers 10 to 12 differ between editions: these are the limits of 9005-D94; ask for \
             the ISO grade",
        );
    }
    Ok(())
}

/// A list of dynamic viscosities with their temperatures; empty where not given.
fn measured(args: &mut Args, w: &mut Worked, key: &'static str) -> Result<Vec<Measured>, Refusal> {
    if !args.has(key) {
        return Ok(Vec::new());
    }
    let points = args.dynamic_points(w, key)?;
    let plain = points.iter().map(|p| Measured {
        at: p.at.value,
        eta: p.eta.value,
    });
    Ok(plain.collect())
}

fn engine_grade(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let nu100: Known<KinematicViscosity> = args.quantity(w, "nu100", "viscosity at 100 degC")?;
    let hths: Option<Known<DynamicViscosity>> =
        args.maybe(w, "hths", "viscosity at 150 degC and 1e6 1/s")?;
    let ccs = measured(args, w, "ccs")?;
    let mrv = measured(args, w, "mrv")?;
    let yield_stress: Option<Known<Pressure>> =
        args.maybe(w, "yield_stress", "yield stress in the MRV test")?;
    let grade = sae_engine::classify(&EngineOil {
        nu100: nu100.value,
        hths: hths.map(|h| h.value),
        ccs: &ccs,
        mrv: &mrv,
        yield_stress: yield_stress.map(|y| y.value),
    });
    if grade.hths_unchecked {
        w.remark("HTHS not given: the minimum of the hot grade is not checked");
    }
    if ccs.is_empty() != mrv.is_empty() {
        w.remark("a W grade needs both CCS and MRV");
    }
    w.text("grade", grade.name());
    w.text("w_grade", grade.winter.map(|g| g.name.to_owned()));
    w.text("hot_grade", grade.hot.map(|g| g.name.to_owned()));
    Ok(())
}

fn gear_grade(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let nu100: Known<KinematicViscosity> = args.quantity(w, "nu100", "viscosity at 100 degC")?;
    let sheared: Option<Known<KinematicViscosity>> = args.maybe(
        w,
        "nu100_sheared",
        "viscosity at 100 degC after the shear test",
    )?;
    let t150000: Option<Known<ThermodynamicTemperature>> =
        args.maybe(w, "t150000", "temperature of 150 000 mPa.s")?;
    let grade = sae_gear::classify(&GearOil {
        nu100: nu100.value,
        nu100_sheared: sheared.map(|s| s.value),
        t150000: t150000.map(|t| t.value),
    });
    match grade.stays {
        None => w.remark("sheared viscosity not given: the grade is that of the new oil"),
        Some(false) => w.remark("the sheared oil leaves the window of the new one"),
        Some(true) => {}
    }
    let stays = grade.stays.map(|s| if s { "yes" } else { "no" }.to_owned());
    w.text("grade", grade.name());
    w.text("w_grade", grade.winter.map(|g| g.name.to_owned()));
    w.text("hot_grade_new", grade.hot_new.map(|g| g.name.to_owned()));
    w.text(
        "hot_grade_sheared",
        grade.hot_sheared.map(|g| g.name.to_owned()),
    );
    w.text("stays_in_grade", stays);
    Ok(())
}

fn d6080(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let t: Known<ThermodynamicTemperature> =
        args.quantity(w, "t750", "temperature of 750 mPa.s")?;
    w.text("grade", low_grade(t.value).map(str::to_owned));
    Ok(())
}
