//! `bevel-virtual`: a bevel pair as the cylindrical pair that stands for it.

use super::GROUP;
use crate::quantity::convert::degrees;
use crate::quantity::{Angle, AngularVelocity, Length, Ratio, Torque};
use crate::relation::gear::bevel::{self, Bevel, Virtual, virtual_pair};
use crate::trace::{Known, Recorder};
use crate::work::contact::{form, may, must};
use crate::work::{Args, Refusal, Relation, Worked};

pub(super) const VIRTUAL: Relation = Relation {
    name: "bevel-virtual",
    group: GROUP,
    law: &bevel::VIRTUAL,
    with: &[
        must("z1", "teeth of the pinion"),
        must("z2", "teeth of the wheel"),
        must(
            "mean_normal_module",
            "normal module at the middle of the face, 5 mm",
        ),
        may("spiral", "spiral angle at the middle of the face", "0"),
        may("pressure_angle", "normal pressure angle", "20 deg"),
        may("shaft_angle", "angle between the shafts", "90 deg"),
        must("face_width", "face width, 40 mm"),
        form("speed1", "speed of the pinion", "load"),
        form("torque1", "torque of the pinion", "load"),
    ],
    gives: &[
        ("delta1", "cone angle of the pinion, deg"),
        ("delta2", "cone angle of the wheel, deg"),
        ("z1", "teeth of the virtual pinion"),
        ("z2", "teeth of the virtual wheel"),
        ("face_width", "width that carries, mm"),
        ("speed1", "speed of the virtual pinion, r/min"),
        ("torque1", "torque of the virtual pinion, N.m"),
    ],
    run,
};

fn run(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let z1 = args.quantity(worked, "z1", "teeth of the pinion")?;
    let z2 = args.quantity(worked, "z2", "teeth of the wheel")?;
    let says = "normal module at the middle of the face";
    let module = args.quantity(worked, "mean_normal_module", says)?;
    let face = args.quantity(worked, "face_width", "face width")?;
    let mut angle = |key, says, usual| -> Result<Known<Angle>, Refusal> {
        let given = args.maybe(worked, key, says)?;
        Ok(given.unwrap_or_else(|| {
            let why = "the usual one, none given";
            worked.trace.assume(key, says, degrees(usual), why)
        }))
    };
    let spiral = angle("spiral", "spiral angle", 0.0)?;
    let pressure = angle("pressure_angle", "normal pressure angle", 20.0)?;
    let shafts = angle("shaft_angle", "angle between the shafts", 90.0)?;
    let inputs = (
        ("z1", z1),
        ("z2", z2),
        ("mmn", module),
        ("beta", spiral),
        ("alpha_n", pressure),
        ("S", shafts),
        ("b", face),
    );
    let trace = &mut worked.trace;
    let pair = trace.attempt_all(&bevel::VIRTUAL, inputs, |v| {
        virtual_pair(Bevel {
            z1: v.0,
            z2: v.1,
            mean_normal_module: v.2,
            spiral: v.3,
            pressure_angle: v.4,
            shaft_angle: v.5,
            face_width: v.6,
        })
    })?;
    let mut cone = |symbol, says, f: fn(Virtual) -> Angle| trace.take(&pair, symbol, says, f);
    let delta1 = cone("delta1", "cone angle of the pinion", |v| v.cones.0);
    let delta2 = cone("delta2", "cone angle of the wheel", |v| v.cones.1);
    let mut teeth = |symbol, says, f: fn(Virtual) -> Ratio| trace.take(&pair, symbol, says, f);
    let zv1 = teeth("z_v1", "teeth of the virtual pinion", |v| v.teeth.z1);
    let zv2 = teeth("z_v2", "teeth of the virtual wheel", |v| v.teeth.z2);
    let says = "width that carries";
    let width: Known<Length> = trace.take(&pair, "b_v", says, |v| v.effective_width);
    worked.result("delta1", delta1, "deg");
    worked.result("delta2", delta2, "deg");
    worked.result("z1", zv1, "");
    worked.result("z2", zv2, "");
    worked.result("face_width", width, "mm");
    loads(args, worked, (delta1, pair.value))?;
    worked.remark("put these into gear-pitch-point or gear-film; not for hypoid gears");
    Ok(())
}

/// Speed and torque of the virtual pinion, where those of the real one are given.
fn loads(
    args: &mut Args,
    worked: &mut Worked,
    (delta1, pair): (Known<Angle>, Virtual),
) -> Result<(), Refusal> {
    let law = &bevel::VIRTUAL_LOAD;
    let speed: Option<Known<AngularVelocity>> =
        args.maybe(worked, "speed1", "speed of the pinion")?;
    if let Some(n) = speed {
        let says = "speed of the virtual pinion";
        let inputs = (("n1", n), ("delta1", delta1));
        let trace = &mut worked.trace;
        let n = trace.law("n_v1", says, law, inputs, |(n, _)| pair.speed(n));
        worked.result("speed1", n, "r/min");
    }
    let torque: Option<Known<Torque>> = args.maybe(worked, "torque1", "torque of the pinion")?;
    if let Some(t) = torque {
        let says = "torque of the virtual pinion";
        let inputs = (("T1", t), ("delta1", delta1));
        let trace = &mut worked.trace;
        let t = trace.law("T_v1", says, law, inputs, |(t, _)| pair.torque(t));
        worked.result("torque1", t, "N.m");
    }
    Ok(())
}
