//! `gear-pitch-point`.

use super::GROUP;
use super::pair::{
    CENTRE, FACE_WIDTH, HELIX, KnownLoad, KnownPair, LOAD_FACTOR, LOAD_SHARE, MODULE, MODULUS,
    POWER, PRESSURE_ANGLE, SPEED1, TORQUE1, Z1, Z2,
};
use crate::relation::gear::path;
use crate::work::{Args, Refusal, Relation, Worked};

pub(super) const PITCH_POINT: Relation = Relation {
    name: "gear-pitch-point",
    group: GROUP,
    law: &path::SUM_SPEED,
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
        LOAD_FACTOR,
        LOAD_SHARE,
        MODULUS,
    ],
    gives: &[
        ("v_t", "pitch-line speed, m/s"),
        ("f_t", "tangential force, N"),
        ("rho_n", "reduced radius, mm"),
        ("v_sum", "sum of the surface speeds, m/s"),
        ("p_h", "pressure between the flanks, MPa"),
    ],
    run,
};

fn run(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let pair = KnownPair::read(args, worked)?;
    let load = KnownLoad::read(args, worked, &pair)?;
    let (pressure, _) = load.pressure(args, worked, &pair)?;
    worked.result("v_t", load.pitch_speed, "m/s");
    worked.result("f_t", load.force, "N");
    worked.result("rho_n", pair.rho_n, "mm");
    worked.result("v_sum", load.sum_speed, "m/s");
    worked.result("p_h", pressure, "MPa");
    Ok(())
}
