//! `gear-bulk` and `gear-flash`: how hot the teeth get.

use super::GROUP;
use super::loss::{loss_factor, oil_kind};
use super::pair::{
    CENTRE, FACE_WIDTH, HELIX, KnownLoad, KnownPair, MODULE, MODULUS, POWER, PRESSURE_ANGLE,
    SPEED1, TORQUE1, Z1, Z2,
};
use crate::quantity::{LoadPerLength, Measure, Power, Ratio, ThermodynamicTemperature};
use crate::relation::gear::load::path_force;
use crate::relation::gear::loss;
use crate::relation::gear::temperature::{
    self, Bulk, Friction, MEAN_FRICTION, SlidingContact, Supply, mean_friction, oil_factor,
    steel_contact_coefficient,
};
use crate::trace::{Known, Recorder};
use crate::work::contact::{default_number, may, modulus, must};
use crate::work::{Args, Refusal, Relation, Worked};

pub(super) const BULK: Relation = Relation {
    name: "gear-bulk",
    group: GROUP,
    law: &temperature::BULK,
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
        must("oil_temperature", "oil temperature, 65 degC"),
        must("eta", "dynamic viscosity at oil temperature, 60 mPa.s"),
        must("ra", "mean roughness Ra of the flanks, 0.5 um"),
        may("base", "mineral, pao, ester or pag", "mineral"),
        may("supply", "dip, spray or submerged", "dip"),
        may("load_factor", "product of the load factors", "1"),
        may("relief", "tip relief factor", "1, no relief"),
    ],
    gives: &[
        ("mu", "mean coefficient of friction"),
        ("h_v", "loss factor of the geometry"),
        ("bulk", "bulk temperature of the teeth, degC"),
    ],
    run: run_bulk,
};

fn run_bulk(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let pair = KnownPair::read(args, worked)?;
    let load = KnownLoad::read(args, worked, &pair)?;
    let says = "oil temperature";
    let oil: Known<ThermodynamicTemperature> = args.quantity(worked, "oil_temperature", says)?;
    let supply = match args.choice("supply", &["dip", "spray", "submerged"], Some("dip"))? {
        "spray" => Supply::Spray,
        "submerged" => Supply::Submerged,
        _ => Supply::Dip,
    };
    let mu = friction(args, worked, &pair, &load)?;
    let h_v = loss_factor(worked, &pair)?;
    let relief = factor(args, worked, "relief", "tip relief factor")?;
    let trace = &mut worked.trace;
    let inputs = (("T1", load.torque1), ("n1", load.speed1));
    let says = "power through the mesh";
    let power: Known<Power> =
        trace.law("P", says, &loss::POWER, inputs, |(t, n)| loss::power(t, n));
    let inputs = (
        ("theta_oil", oil),
        ("P", power),
        ("H_v", h_v),
        ("mu_m", mu),
        ("a", pair.centre_distance),
        ("b", pair.face_width),
        ("X_Ca", relief),
    );
    let says = "bulk temperature of the teeth";
    let law = &temperature::BULK;
    let bulk = trace.attempt("theta_M", says, law, inputs, |v| {
        temperature::bulk(Bulk {
            oil: v.0,
            power: v.1,
            loss_factor: v.2,
            mu: v.3,
            centre_distance: v.4,
            face_width: v.5,
            supply,
            relief: v.6,
        })
    })?;
    worked.result("mu", mu, "");
    worked.result("h_v", h_v, "");
    worked.result("bulk", bulk, "degC");
    Ok(())
}

fn factor(
    args: &mut Args,
    worked: &mut Worked,
    key: &'static str,
    says: &'static str,
) -> Result<Known<Ratio>, Refusal> {
    let given = args.maybe(worked, key, says)?;
    Ok(given.unwrap_or_else(|| default_number(worked, key, says, 1.0, "none given")))
}

fn friction(
    args: &mut Args,
    worked: &mut Worked,
    pair: &KnownPair,
    load: &KnownLoad,
) -> Result<Known<Ratio>, Refusal> {
    let eta = args.quantity(worked, "eta", "dynamic viscosity at oil temperature")?;
    let ra = args.quantity(worked, "ra", "mean roughness Ra of the flanks")?;
    let k = factor(args, worked, "load_factor", "product of the load factors")?;
    let kind = oil_kind(args)?;
    let inputs = (
        ("F_t", load.force),
        ("b", pair.face_width),
        ("alpha_t", pair.transverse_angle),
        ("v_sum", load.sum_speed),
        ("rho_n", pair.rho_n),
        ("eta", eta),
        ("Ra", ra),
        ("K", k),
    );
    let says = "mean coefficient of friction";
    let law = &MEAN_FRICTION;
    let trace = &mut worked.trace;
    let mu = trace.attempt("mu_m", says, law, inputs, |v| {
        let along = v.7.base() * path_force(v.0, v.2).base() / v.1.base();
        mean_friction(Friction {
            load: LoadPerLength::from_base(along),
            sum_speed: v.3,
            rho_n: v.4,
            eta: v.5,
            ra: v.6,
            oil: oil_factor(kind, v.3)?,
        })
    })?;
    Ok(mu)
}

pub(super) const FLASH: Relation = Relation {
    name: "gear-flash",
    group: GROUP,
    law: &temperature::FLASH,
    with: &[
        must("mu", "coefficient of friction, 0.06"),
        must("pressure", "local pressure, 1000 MPa"),
        must("v1", "surface speed of the pinion flank, 6 m/s"),
        must("v2", "surface speed of the wheel flank, 2 m/s"),
        must("rho_n", "reduced radius, 12 mm"),
        MODULUS,
    ],
    gives: &[
        ("flash", "flash temperature over the bulk, ISO form, K"),
        ("flash_blok", "the same after Blok, K"),
    ],
    run: run_flash,
};

fn run_flash(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let mu = args.quantity(worked, "mu", "coefficient of friction")?;
    let p = args.quantity(worked, "pressure", "local pressure")?;
    let v1 = args.quantity(worked, "v1", "surface speed of the pinion flank")?;
    let v2 = args.quantity(worked, "v2", "surface speed of the wheel flank")?;
    let rho = args.quantity(worked, "rho_n", "reduced radius")?;
    let e = modulus(args, worked)?;
    let inputs = (
        ("mu_m", mu),
        ("p", p),
        ("v1", v1),
        ("v2", v2),
        ("rho_n", rho),
        ("E'", e),
    );
    let thermal = steel_contact_coefficient();
    let contact = |(mu, pressure, v1, v2, rho_n, modulus)| SlidingContact {
        mu,
        pressure,
        v1,
        v2,
        rho_n,
        modulus,
        thermal,
    };
    let says = "flash temperature over the bulk";
    let trace = &mut worked.trace;
    let law = &temperature::FLASH;
    let iso = trace.attempt("theta_fl", says, law, inputs, |v| {
        temperature::flash(contact(v))
    })?;
    let law = &temperature::FLASH_BLOK;
    let blok = trace.attempt("theta_fl", says, law, inputs, |v| {
        temperature::flash_blok(contact(v))
    })?;
    worked.result("flash", iso, "K");
    worked.result("flash_blok", blok, "K");
    worked.remark("steel gears: thermal contact coefficient 13.1 kW s^0.5/(m2 K)");
    Ok(())
}
