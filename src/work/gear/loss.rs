//! `gear-loss`: power lost in the mesh and by churning.

use super::GROUP;
use super::pair::{
    CENTRE, FACE_WIDTH, HELIX, KnownLoad, KnownPair, MODULE, POWER, PRESSURE_ANGLE, SPEED1,
    TORQUE1, Z1, Z2, depth,
};
use crate::quantity::convert::{mm, to_mm};
use crate::quantity::{LoadPerLength, Measure, Ratio};
use crate::relation::gear::load::path_force;
use crate::relation::gear::loss::churning::{self, Dip};
use crate::relation::gear::loss::{self, LOSS_FACTOR, MESH, MESH_FRICTION};
use crate::relation::gear::path::{Path, Tips};
use crate::relation::gear::temperature::{Friction, OilKind, oil_factor};
use crate::trace::{Known, Recorder};
use crate::work::contact::{default_number, may, must};
use crate::work::{Args, Refusal, Relation, Worked};

pub(super) const LOSS: Relation = Relation {
    name: "gear-loss",
    group: GROUP,
    law: &MESH,
    with: &[
        Z1,
        Z2,
        MODULE,
        HELIX,
        PRESSURE_ANGLE,
        FACE_WIDTH,
        SPEED1,
        TORQUE1,
        POWER,
        CENTRE,
        must("eta", "dynamic viscosity at oil temperature, 35 mPa.s"),
        must("ra", "mean roughness Ra of the flanks, 0.5 um"),
        may(
            "base",
            "mineral, pao, ester or pag: how slippery the oil is",
            "mineral",
        ),
        may("dip1", "depth of the pinion in the oil", "0, above it"),
        may("dip2", "depth of the wheel in the oil", "0, above it"),
        may("splash", "splash factor of the housing", "1"),
    ],
    gives: &[
        ("h_v", "loss factor of the geometry"),
        ("mu", "mean coefficient of friction"),
        ("power_in", "power through the mesh, W"),
        ("mesh", "power lost in the mesh, W"),
        ("churning_torque", "churning torque at the pinion, N.m"),
        ("churning", "power lost by churning, W"),
    ],
    run,
};

fn run(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let pair = KnownPair::read(args, worked)?;
    let load = KnownLoad::read(args, worked, &pair)?;
    let h_v = loss_factor(worked, &pair)?;
    let mu = friction(args, worked, &pair, &load)?;
    let trace = &mut worked.trace;
    let inputs = (("T1", load.torque1), ("n1", load.speed1));
    let says = "power through the mesh";
    let power = trace.law("P", says, &loss::POWER, inputs, |(t, n)| loss::power(t, n));
    let inputs = (("P", power), ("mu_mz", mu), ("H_v", h_v));
    let says = "power lost in the mesh";
    let lost = trace.law("P_VZ", says, &MESH, inputs, |(p, mu, h)| {
        loss::mesh(p, mu, h)
    });
    worked.result("h_v", h_v, "");
    worked.result("mu", mu, "");
    worked.result("power_in", power, "W");
    worked.result("mesh", lost, "W");
    churn(args, worked, &pair, &load)
}

pub(super) fn loss_factor(worked: &mut Worked, pair: &KnownPair) -> Result<Known<Ratio>, Refusal> {
    let (z1, z2, mn, beta, alpha_n) = pair.teeth;
    let inputs = (z1, z2, mn, beta, alpha_n, ("a", pair.centre_distance));
    // The pair was worked out from these very inputs.
    let mesh = pair.mesh;
    let says = "loss factor of the geometry, addendum one module";
    let trace = &mut worked.trace;
    let h_v = trace.attempt("H_v", says, &LOSS_FACTOR, inputs, |_| {
        Path::new(&mesh, Tips::standard(&mesh)).map(|path| loss::loss_factor(&mesh, &path))
    })?;
    Ok(h_v)
}

/// How slippery the oil is, by its base.
pub(super) fn oil_kind(args: &mut Args) -> Result<OilKind, Refusal> {
    let words = ["mineral", "pao", "ester", "pag"];
    Ok(match args.choice("base", &words, Some("mineral"))? {
        "mineral" => OilKind::Mineral,
        "pag" => OilKind::Polyglycol,
        _ => OilKind::PaoOrEster,
    })
}

fn friction(
    args: &mut Args,
    worked: &mut Worked,
    pair: &KnownPair,
    load: &KnownLoad,
) -> Result<Known<Ratio>, Refusal> {
    let eta = args.quantity(worked, "eta", "dynamic viscosity at oil temperature")?;
    let ra = args.quantity(worked, "ra", "mean roughness Ra of the flanks")?;
    let kind = oil_kind(args)?;
    let inputs = (
        ("F_t", load.force),
        ("b", pair.face_width),
        ("alpha_t", pair.transverse_angle),
        ("v_sum", load.sum_speed),
        ("rho_n", pair.rho_n),
        ("eta", eta),
        ("Ra", ra),
    );
    let says = "mean coefficient of friction";
    let law = &MESH_FRICTION;
    let trace = &mut worked.trace;
    let mu = trace.attempt(
        "mu_mz",
        says,
        law,
        inputs,
        |(f, b, angle, v, rho, eta, ra)| {
            let along = path_force(f, angle).base() / b.base();
            loss::mesh_friction(Friction {
                load: LoadPerLength::from_base(along),
                sum_speed: v,
                rho_n: rho,
                eta,
                ra,
                oil: oil_factor(kind, v)?,
            })
        },
    )?;
    Ok(mu)
}

fn churn(
    args: &mut Args,
    worked: &mut Worked,
    pair: &KnownPair,
    load: &KnownLoad,
) -> Result<(), Refusal> {
    let pinion = depth(args, worked, "dip1", "depth of the pinion in the oil")?;
    let wheel = depth(args, worked, "dip2", "depth of the wheel in the oil")?;
    let splash = match args.maybe(worked, "splash", "splash factor")? {
        Some(given) => given,
        None => default_number(worked, "C_Sp", "splash factor", 1.0, "none given"),
    };
    let trace = &mut worked.trace;
    let inputs = (
        ("he1", pinion),
        ("he2", wheel),
        ("b", pair.face_width),
        ("v_t", load.pitch_speed),
        ("C_Sp", splash),
    );
    let says = "churning torque at the pinion";
    let law = &churning::TORQUE;
    let torque = trace.attempt("T_H", says, law, inputs, |(dip1, dip2, b, v, splash)| {
        let dip = Dip {
            pinion: dip1,
            wheel: dip2,
            face_width: b,
            pitch_speed: v,
        };
        churning::torque(dip, splash)
    })?;
    let inputs = (("T_H", torque), ("n1", load.speed1));
    let says = "power lost by churning";
    let lost = trace.law("P_H", says, &loss::POWER, inputs, |(t, n)| {
        loss::power(t, n)
    });
    worked.result("churning_torque", torque, "N.m");
    worked.result("churning", lost, "W");
    if pair.face_width.value > mm(100.0) && to_mm(wheel.value) + to_mm(pinion.value) > 0.0 {
        worked.remark("the churning formula is too high for faces wider than about 100 mm");
    }
    Ok(())
}
