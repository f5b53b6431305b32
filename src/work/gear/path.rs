//! `gear-path-point`.

use super::GROUP;
use super::pair::{CENTRE, FACE_WIDTH, HELIX, KnownPair, MODULE, PRESSURE_ANGLE, SPEED1, Z1, Z2};
use crate::quantity::{Length, Velocity};
use crate::relation::gear::path::{self, At, Path, Point, Tips};
use crate::trace::Recorder;
use crate::work::contact::{may, must};
use crate::work::{Args, Refusal, Relation, Worked};

pub(super) const PATH_POINT: Relation = Relation {
    name: "gear-path-point",
    group: GROUP,
    law: &path::POINT,
    with: &[
        Z1,
        Z2,
        MODULE,
        HELIX,
        PRESSURE_ANGLE,
        FACE_WIDTH,
        SPEED1,
        CENTRE,
        must("point", "A, AB, B, C, D, DE or E"),
        may(
            "tip_diameter1",
            "tip diameter of the pinion",
            "addendum one module",
        ),
        may(
            "tip_diameter2",
            "tip diameter of the wheel",
            "addendum one module",
        ),
    ],
    gives: &[
        ("rho1", "radius of curvature of the pinion flank, mm"),
        ("rho2", "radius of curvature of the wheel flank, mm"),
        ("rho_n", "reduced radius, mm"),
        ("v1", "surface speed of the pinion flank, m/s"),
        ("v2", "surface speed of the wheel flank, m/s"),
        ("v_sum", "sum of the surface speeds, m/s"),
        ("v_slide", "difference of the surface speeds, m/s"),
    ],
    run,
};

fn run(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let pair = KnownPair::read(args, worked)?;
    let speed = args.quantity(worked, "speed1", "speed of the pinion")?;
    let words: Vec<&'static str> = Point::ALL.iter().map(|(word, _)| *word).collect();
    let word = args.choice("point", &words, None)?;
    let found = Point::ALL.iter().find(|(w, _)| *w == word);
    let point = found.map(|(_, p)| *p).expect("the word is one of the list");
    let standard = Tips::standard(&pair.mesh);
    let mut tip = |key, says, otherwise| -> Result<_, Refusal> {
        let given = args.maybe(worked, key, says)?;
        let why = "addendum one module, no profile shift";
        Ok(given.unwrap_or_else(|| worked.trace.assume(key, says, otherwise, why)))
    };
    let says = "tip diameter of the pinion";
    let tip1 = tip("tip_diameter1", says, standard.pinion)?;
    let says = "tip diameter of the wheel";
    let tip2 = tip("tip_diameter2", says, standard.wheel)?;
    let (z1, z2, mn, beta, alpha_n) = pair.teeth;
    let a = ("a", pair.centre_distance);
    let tips = (("da1", tip1), ("da2", tip2));
    let inputs = (z1, z2, mn, beta, alpha_n, a, tips.0, tips.1, ("n1", speed));
    // The pair was worked out from these very inputs.
    let mesh = pair.mesh;
    let trace = &mut worked.trace;
    let at = trace.attempt_all(&path::POINT, inputs, |v| {
        let tips = Tips {
            pinion: v.6,
            wheel: v.7,
        };
        Path::new(&mesh, tips).map(|path| path.at(point, v.8))
    })?;
    let mut length = |symbol, says, f: fn(At) -> Length| trace.take(&at, symbol, says, f);
    let rho1 = length("rho1", "radius of curvature, pinion", |p| p.rho1);
    let rho2 = length("rho2", "radius of curvature, wheel", |p| p.rho2);
    let rho_n = length("rho_n", "reduced radius", |p| p.rho_n);
    let mut speed = |symbol, says, f: fn(At) -> Velocity| trace.take(&at, symbol, says, f);
    let v1 = speed("v1", "surface speed, pinion", |p| p.v1);
    let v2 = speed("v2", "surface speed, wheel", |p| p.v2);
    let sum = speed("v_sum", "sum of the surface speeds", |p| p.sum());
    let says = "difference of the surface speeds";
    let slide = speed("v_slide", says, |p| p.sliding());
    for (name, radius) in [("rho1", rho1), ("rho2", rho2), ("rho_n", rho_n)] {
        worked.result(name, radius, "mm");
    }
    for (name, v) in [("v1", v1), ("v2", v2), ("v_sum", sum), ("v_slide", slide)] {
        worked.result(name, v, "m/s");
    }
    Ok(())
}
