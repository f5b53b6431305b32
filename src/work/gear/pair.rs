//! A gear pair and its load as known numbers, and the inputs they are read from.

use crate::quantity::convert::degrees;
use crate::quantity::{
    Angle, AngularVelocity, Force, Length, Measure, Pressure, Ratio, Torque, Velocity,
};
use crate::relation::gear::geometry::{self, CENTRE_DISTANCE, MESH, Mesh, PITCH_RADIUS, Teeth};
use crate::relation::gear::load::{self, LINE_LOAD, PRESSURE, TANGENTIAL_FORCE, TORQUE};
use crate::relation::gear::path::{self, PITCH_SPEED, SUM_SPEED};
use crate::trace::{Known, Recorder};
use crate::work::contact::{default_number, form, may, modulus, must};
use crate::work::{Args, Input, Refusal, Worked};

pub(super) const Z1: Input = must("z1", "teeth of the pinion");
pub(super) const Z2: Input = must("z2", "teeth of the wheel, negative for an internal gear");
pub(super) const MODULE: Input = must("normal_module", "normal module, 5 mm");
pub(super) const HELIX: Input = may("helix", "helix angle, 12 deg", "0, spur");
pub(super) const PRESSURE_ANGLE: Input = may("pressure_angle", "normal pressure angle", "20 deg");
pub(super) const FACE_WIDTH: Input = must("face_width", "face width, 60 mm");
pub(super) const SPEED1: Input = must("speed1", "speed of the pinion, 1480 r/min");
pub(super) const TORQUE1: Input = form("torque1", "torque of the pinion, 650 N.m", "torque");
pub(super) const POWER: Input = form("power", "power through the mesh, 100 kW", "power");
pub(super) const CENTRE: Input = may(
    "centre_distance",
    "centre distance, negative for an internal pair",
    "that of gears without profile shift",
);
pub(super) const LOAD_FACTOR: Input = may(
    "load_factor",
    "product of the load factors K_A K_gamma K_v K_Hbeta K_Halpha",
    "1",
);
pub(super) const LOAD_SHARE: Input = may(
    "load_share",
    "share of the load at the pitch point; near 1 / contact ratio for helical gears",
    "1",
);
pub(super) const MODULUS: Input = may(
    "E_reduced",
    "reduced modulus, or E1, poisson1 …",
    "steel on steel",
);

/// The geometry, every number with its step.
pub(super) struct KnownPair {
    pub(super) mesh: Mesh,
    pub(super) teeth: TeethInputs,
    pub(super) centre_distance: Known<Length>,
    pub(super) face_width: Known<Length>,
    pub(super) d1: Known<Length>,
    pub(super) working_diameter: Known<Length>,
    pub(super) transverse_angle: Known<Angle>,
    pub(super) working_angle: Known<Angle>,
    pub(super) rho_n: Known<Length>,
}

pub(super) type TeethInputs = (
    (&'static str, Known<Ratio>),
    (&'static str, Known<Ratio>),
    (&'static str, Known<Length>),
    (&'static str, Known<Angle>),
    (&'static str, Known<Angle>),
);

fn read_teeth(args: &mut Args, worked: &mut Worked) -> Result<TeethInputs, Refusal> {
    let z1 = args.quantity(worked, "z1", "teeth of the pinion")?;
    let z2 = args.quantity(worked, "z2", "teeth of the wheel")?;
    let module = args.quantity(worked, "normal_module", "normal module")?;
    let helix = args.maybe(worked, "helix", "helix angle")?;
    let helix = helix.unwrap_or_else(|| {
        let (says, why) = ("helix angle", "spur gears, none given");
        worked.trace.assume("beta", says, degrees(0.0), why)
    });
    let pressure = args.maybe(worked, "pressure_angle", "normal pressure angle")?;
    let pressure = pressure.unwrap_or_else(|| {
        let (says, why) = ("normal pressure angle", "the usual basic rack");
        worked.trace.assume("alpha_n", says, degrees(20.0), why)
    });
    Ok((
        ("z1", z1),
        ("z2", z2),
        ("mn", module),
        ("beta", helix),
        ("alpha_n", pressure),
    ))
}

fn teeth(
    (z1, z2, normal_module, helix, pressure_angle): (Ratio, Ratio, Length, Angle, Angle),
) -> Teeth {
    Teeth {
        z1,
        z2,
        normal_module,
        helix,
        pressure_angle,
    }
}

impl KnownPair {
    pub(super) fn read(args: &mut Args, worked: &mut Worked) -> Result<Self, Refusal> {
        let known = read_teeth(args, worked)?;
        let centre = args.maybe(worked, "centre_distance", "centre distance")?;
        let face_width = args.quantity(worked, "face_width", "face width")?;
        let trace = &mut worked.trace;
        let centre_distance = if let Some(a) = centre {
            a
        } else {
            let says = "centre distance without profile shift";
            let law = &CENTRE_DISTANCE;
            trace.attempt("a", says, law, known, |t| {
                geometry::centre_distance(teeth(t))
            })?
        };
        let (z1, z2, mn, beta, alpha_n) = known;
        let inputs = (z1, z2, mn, beta, alpha_n, ("a", centre_distance));
        let mesh = |(z1, z2, mn, beta, alpha, a)| Mesh::new(teeth((z1, z2, mn, beta, alpha)), a);
        let out = trace.attempt_all(&MESH, inputs, mesh)?;
        let says = "reduced radius at the pitch point";
        let rho_n = trace.attempt("rho_n", says, &PITCH_RADIUS, inputs, |values| {
            mesh(values).map(|m| m.pitch_reduced_radius())
        })?;
        let mut length = |symbol, says, f: fn(Mesh) -> Length| trace.take(&out, symbol, says, f);
        let d1 = length("d1", "reference diameter of the pinion", |m| m.d1);
        let says = "pitch diameter of the pinion";
        let working_diameter = length("dw1", says, |m| m.working_diameter);
        let mut angle = |symbol, says, f: fn(Mesh) -> Angle| trace.take(&out, symbol, says, f);
        let says = "transverse pressure angle";
        let transverse_angle = angle("alpha_t", says, |m| m.transverse_pressure_angle);
        let says = "working transverse pressure angle";
        let working_angle = angle("alpha_wt", says, |m| m.working_pressure_angle);
        Ok(Self {
            mesh: out.value,
            teeth: known,
            centre_distance,
            face_width,
            d1,
            working_diameter,
            transverse_angle,
            working_angle,
            rho_n,
        })
    }
}

/// Speeds and loads at the pitch point.
pub(super) struct KnownLoad {
    pub(super) speed1: Known<AngularVelocity>,
    pub(super) torque1: Known<Torque>,
    pub(super) pitch_speed: Known<Velocity>,
    pub(super) sum_speed: Known<Velocity>,
    pub(super) force: Known<Force>,
}

impl KnownLoad {
    pub(super) fn read(
        args: &mut Args,
        worked: &mut Worked,
        pair: &KnownPair,
    ) -> Result<Self, Refusal> {
        let speed1 = args.quantity(worked, "speed1", "speed of the pinion")?;
        let torque1 = torque(args, worked, speed1)?;
        let trace = &mut worked.trace;
        let inputs = (("dw1", pair.working_diameter), ("n1", speed1));
        let says = "pitch-line speed";
        let pitch_speed = trace.attempt("v_t", says, &PITCH_SPEED, inputs, |(d, n)| {
            path::pitch_speed(d, n)
        })?;
        let inputs = (("v_t", pitch_speed), ("alpha_wt", pair.working_angle));
        let says = "sum of the surface speeds at the pitch point";
        let sum_speed = trace.law("v_sum", says, &SUM_SPEED, inputs, |(v, a)| {
            path::sum_speed(v, a)
        });
        let inputs = (("T1", torque1), ("d1", pair.d1));
        let says = "tangential force";
        let force = trace.attempt("F_t", says, &TANGENTIAL_FORCE, inputs, |(t, d)| {
            load::tangential_force(t, d)
        })?;
        Ok(Self {
            speed1,
            torque1,
            pitch_speed,
            sum_speed,
            force,
        })
    }

    /// Pressure at the pitch point, and the reduced modulus it was worked out with.
    pub(super) fn pressure(
        &self,
        args: &mut Args,
        worked: &mut Worked,
        pair: &KnownPair,
    ) -> Result<(Known<Pressure>, Known<Pressure>), Refusal> {
        let mut one = |key, says| -> Result<Known<Ratio>, Refusal> {
            Ok(match args.maybe(worked, key, says)? {
                Some(given) => given,
                None => default_number(worked, key, says, 1.0, "none given"),
            })
        };
        let factor = one("load_factor", "product of the load factors")?;
        let share = one("load_share", "share of the load at the pitch point")?;
        let e = modulus(args, worked)?;
        let trace = &mut worked.trace;
        let inputs = (
            ("F_t", self.force),
            ("b", pair.face_width),
            ("K", factor),
            ("X", share),
            ("alpha_t", pair.transverse_angle),
        );
        let says = "load per length of contact line";
        let w = trace.attempt(
            "w",
            says,
            &LINE_LOAD,
            inputs,
            |(force, width, factor, share, angle)| {
                load::line_load(force, width, factor, share, angle)
            },
        )?;
        let inputs = (("w", w), ("rho_n", pair.rho_n), ("E'", e));
        let says = "pressure at the pitch point";
        let p = trace.attempt("p_H", says, &PRESSURE, inputs, |(w, r, e)| {
            load::pressure(w, r, e)
        })?;
        Ok((p, e))
    }
}

fn torque(
    args: &mut Args,
    worked: &mut Worked,
    speed: Known<AngularVelocity>,
) -> Result<Known<Torque>, Refusal> {
    if !args.has("power") {
        return args.quantity(worked, "torque1", "torque of the pinion");
    }
    if args.has("torque1") {
        let words = "give torque1 or power, not both";
        return Err(Refusal::new("input-contradictory", words));
    }
    let power = args.quantity(worked, "power", "power through the mesh")?;
    let inputs = (("P", power), ("omega", speed));
    let says = "torque of the pinion";
    let trace = &mut worked.trace;
    Ok(trace.attempt("T1", says, &TORQUE, inputs, |(p, n)| load::torque_of(p, n))?)
}

/// A depth, zero where not given.
pub(super) fn depth(
    args: &mut Args,
    worked: &mut Worked,
    key: &'static str,
    says: &'static str,
) -> Result<Known<Length>, Refusal> {
    let given = args.maybe(worked, key, says)?;
    Ok(given.unwrap_or_else(|| {
        let nothing = Length::from_base(0.0);
        worked.trace.assume(key, says, nothing, "none given")
    }))
}
