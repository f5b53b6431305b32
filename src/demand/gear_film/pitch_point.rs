//! Speed, load and radius at the pitch point of a mesh, from what the nameplate and drawing say.

use super::wanted;
use crate::demand::context::Context;
use crate::demand::gear_bevel;
use crate::demand::gear_mesh::{pinion_speed, ratio};
use crate::demand::inputs::Usual;
use crate::model::part::{GearMesh, GearType, Part};
use crate::quantity::convert::{degrees, number, um};
use crate::quantity::{
    Angle, AngularVelocity, Force, Length, LoadPerLength, Measure, Pressure, Ratio, Torque,
    Velocity,
};
use crate::relation::film::body::{Material, REDUCED_MODULUS, reduced_modulus};
use crate::relation::film::roughness::{RQ_FROM_RA, rq_from_ra};
use crate::relation::gear::film::ToothContact;
use crate::relation::gear::load::{
    LINE_LOAD, PRESSURE, TANGENTIAL_FORCE, pressure, tangential_force, torque_of,
};
use crate::relation::gear::pitch_point::{
    PITCH_DIAMETER, PITCH_SPEED, REDUCED_RADIUS, REFERENCE_DIAMETER, pitch_diameter,
    reduced_radius, reference_diameter as diameter_of, transverse_sine_cosine,
};
use crate::trace::{Known, Recorder};

/// Reference diameter from module and teeth, where given.
pub(in crate::demand) fn reference_diameter<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    mesh: &GearMesh,
) -> Option<Known<Length>> {
    let (z1, _) = mesh.teeth.as_ref()?.value;
    let module = wanted("normal module", "m_n", "normal module", "drawing");
    let m = cx.maybe(part, module, mesh.normal_module.as_ref())?;
    let z = mesh.teeth.clone()?.map(|_| number(f64::from(z1)));
    let z = cx.r.given("z1", "teeth of the pinion", &z);
    let beta = helix(cx, part, mesh);
    cx.r.attempt(
        "d1",
        "reference diameter of the pinion",
        &REFERENCE_DIAMETER,
        (("m_n", m), ("z1", z), ("beta", beta)),
        |(m, z, b)| diameter_of(m, z, b),
    )
    .ok()
}

pub(in crate::demand) fn helix<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    mesh: &GearMesh,
) -> Known<Angle> {
    let key = wanted("helix", "beta", "helix angle", "drawing");
    let (value, hi, why) = match mesh.kind {
        Some(GearType::Spur | GearType::Bevel) | None => {
            (0.0, 30.0, "straight teeth unless stated")
        }
        Some(GearType::Helical) => (12.0, 30.0, "helical, usual angle"),
        Some(_) => (
            35.0,
            45.0,
            "spiral, usual angle at mid-face; common practice",
        ),
    };
    let usual = Usual {
        value: degrees(value),
        lo: degrees(0.0),
        hi: degrees(hi),
        why,
    };
    match &mesh.helix {
        Some(_) => cx.or_assume(part, key, mesh.helix.as_ref(), usual),
        None => cx.r.assume("beta", "helix angle", usual.value, usual.why),
    }
}

/// What the film needs of geometry and load.
pub(super) struct PitchPoint {
    pub(super) contact: ToothContact,
    pub(super) rho: Known<Length>,
    pub(super) rq: Known<Length>,
    pub(super) ra: Known<Length>,
    /// Pitch-line speed.
    pub(super) speed: Known<Velocity>,
    /// Load per length, load factors included.
    pub(super) load: Known<LoadPerLength>,
    pub(super) pair: Pair,
    /// Helix and normal pressure angle.
    pub(super) angles: (Known<Angle>, Known<Angle>),
}

/// Two cylindrical gears in mesh, as far as speed and load go.
pub(in crate::demand) struct Pair {
    pub(in crate::demand) ratio: Known<Ratio>,
    pub(in crate::demand) speed: Known<AngularVelocity>,
    pub(in crate::demand) distance: Known<Length>,
    pub(in crate::demand) width: Known<Length>,
    pub(in crate::demand) torque: Known<Torque>,
}

/// The pair as the nameplate gives it.
fn cylindrical<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    mesh: &GearMesh,
) -> Option<Pair> {
    let ratio = ratio(cx, part, mesh)?;
    let speed = pinion_speed(cx, part, mesh)?;
    let centre = wanted(
        "centre distance",
        "a",
        "centre distance",
        "drawing or a rule",
    );
    let distance = match cx.maybe(part, centre, mesh.centre_distance.as_ref()) {
        Some(a) => a,
        None => distance(cx, part, mesh, ratio)?,
    };
    let face = wanted("face width", "b", "face width", "drawing or a rule");
    let width = cx.maybe(part, face, mesh.face_width.as_ref())?;
    let torque = torque(cx, part, mesh, speed)?;
    Some(Pair {
        ratio,
        speed,
        distance,
        width,
        torque,
    })
}

pub(super) fn pitch_point<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    mesh: &GearMesh,
) -> Option<PitchPoint> {
    let beta = helix(cx, part, mesh);
    let an = pressure_angle(cx, part, mesh);
    let bevel = matches!(mesh.kind, Some(GearType::Bevel | GearType::SpiralBevel));
    let pair = if bevel {
        gear_bevel::pair(cx, part, mesh)?
    } else {
        cylindrical(cx, part, mesh)?
    };
    let (u, n, a, b, torque) = (
        pair.ratio,
        pair.speed,
        pair.distance,
        pair.width,
        pair.torque,
    );
    let d1 =
        cx.r.attempt(
            "d1",
            "pitch diameter of the pinion",
            &PITCH_DIAMETER,
            (("a", a), ("u", u)),
            |(a, u)| pitch_diameter(a, u),
        )
        .ok()?;
    let v = cx.r.law(
        "v",
        "pitch-line speed",
        &PITCH_SPEED,
        (("n1", n), ("d1", d1)),
        |(n, d)| crate::quantity::convert::surface_speed(n, d),
    );
    let rho =
        cx.r.attempt(
            "rho_n",
            "reduced radius at the pitch point",
            &REDUCED_RADIUS,
            (("a", a), ("u", u), ("alpha", an), ("beta", beta)),
            |(a, u, an, b)| reduced_radius(a, u, an, b),
        )
        .ok()?;
    let load = line_load(cx, part, mesh, (torque, d1, b), (an, beta))?;
    let e = steel(cx);
    let p =
        cx.r.attempt(
            "p_H",
            "Hertzian pressure at the pitch point",
            &PRESSURE,
            (("w", load), ("rho_n", rho), ("E", e)),
            |(w, r, e)| pressure(w, r, e),
        )
        .ok()?;
    let (sine, _) = transverse_sine_cosine(an.value, beta.value);
    let contact = ToothContact {
        sum_speed: Velocity::from_base(2.0 * v.value.base() * sine.base()),
        rho_n: rho.value,
        pressure: p.value,
        modulus: e.value,
    };
    let (ra, rq) = flanks(cx, part, mesh);
    Some(PitchPoint {
        contact,
        rho,
        rq,
        ra,
        speed: v,
        load,
        pair,
        angles: (beta, an),
    })
}

fn distance<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    mesh: &GearMesh,
    u: Known<Ratio>,
) -> Option<Known<Length>> {
    let d1 = reference_diameter(cx, part, mesh)?;
    Some(cx.r.law(
        "a",
        "centre distance",
        &PITCH_DIAMETER,
        (("d1", d1), ("u", u)),
        |(d, u)| Length::from_base(d.base() * (u.base() + 1.0) / 2.0),
    ))
}

pub(in crate::demand) fn torque<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    mesh: &GearMesh,
    n: Known<AngularVelocity>,
) -> Option<Known<Torque>> {
    let key = wanted("pinion torque", "T1", "pinion torque", "power and speed");
    if let Some(t) = cx.maybe(part, key, mesh.pinion_torque.as_ref()) {
        return Some(t);
    }
    let key = wanted(
        "power",
        "P",
        "power through the mesh",
        "nameplate of the motor",
    );
    let p = cx.maybe(part, key, mesh.power.as_ref())?;
    cx.r.attempt(
        "T1",
        "pinion torque",
        &TANGENTIAL_FORCE,
        (("P", p), ("n1", n)),
        |(p, n)| torque_of(p, n),
    )
    .ok()
}

pub(in crate::demand) fn pressure_angle<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    mesh: &GearMesh,
) -> Known<Angle> {
    let key = wanted(
        "pressure angle",
        "alpha",
        "normal pressure angle",
        "drawing",
    );
    match &mesh.pressure_angle {
        Some(_) => cx.or_assume(
            part,
            key,
            mesh.pressure_angle.as_ref(),
            Usual {
                value: degrees(20.0),
                lo: degrees(14.5),
                hi: degrees(25.0),
                why: "standard rack",
            },
        ),
        None => cx.r.assume(
            "alpha",
            "normal pressure angle",
            degrees(20.0),
            "standard rack",
        ),
    }
}

type Loaded = (Known<Torque>, Known<Length>, Known<Length>);

/// Load per length of contact, on the shortest line, load factors included.
fn line_load<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    mesh: &GearMesh,
    (torque, d1, b): Loaded,
    (an, beta): (Known<Angle>, Known<Angle>),
) -> Option<Known<LoadPerLength>> {
    let force =
        cx.r.attempt(
            "F_t",
            "tangential force",
            &TANGENTIAL_FORCE,
            (("T1", torque), ("d1", d1)),
            |(t, d)| tangential_force(t, d),
        )
        .ok()?;
    let factor = match &mesh.application_factor {
        Some(given) => cx.r.given("K", "load factors together", given),
        None => {
            let key = wanted(
                "application factor",
                "K",
                "load factors together",
                "duty and drive",
            );
            let why = "moderate shock; 1 to 2 is common practice";
            let usual = Usual {
                value: number(1.25),
                lo: number(1.0),
                hi: number(2.0),
                why,
            };
            cx.or_assume(part, key, None, usual)
        }
    };
    Some(cx.r.law(
        "w",
        "load per length at the pitch point, one pair carrying",
        &LINE_LOAD,
        (
            ("F_t", force),
            ("b", b),
            ("K", factor),
            ("alpha", an),
            ("beta", beta),
        ),
        |(f, b, k, an, beta): (Force, Length, Ratio, Angle, Angle)| {
            let (_, cosine) = transverse_sine_cosine(an, beta);
            LoadPerLength::from_base(k.base() * f.base() / (b.base() * cosine.base()))
        },
    ))
}

/// Reduced modulus of steel on steel.
pub(in crate::demand) fn steel<R: Recorder>(cx: &mut Context<'_, '_, R>) -> Known<Pressure> {
    let steel = Material::steel();
    let e = cx.r.assume(
        "E1",
        "Young's modulus of steel",
        steel.youngs,
        "steel on steel",
    );
    cx.r.law(
        "E",
        "reduced modulus",
        &REDUCED_MODULUS,
        (("E1", e),),
        |_: (Pressure,)| reduced_modulus(steel, steel).unwrap_or(steel.youngs),
    )
}

/// Roughness of the flanks: Ra stated or usual, Rq from it.
fn flanks<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    mesh: &GearMesh,
) -> (Known<Length>, Known<Length>) {
    let key = wanted(
        "flank roughness",
        "Ra",
        "Ra of the flanks",
        "drawing, or a replica of a flank",
    );
    let why = "ground flanks; 0.3 to 0.8 um is common practice";
    let ra = cx.or_assume(
        part,
        key,
        mesh.flank_roughness.as_ref(),
        Usual {
            value: um(0.5),
            lo: um(0.3),
            hi: um(0.8),
            why,
        },
    );
    let rq = cx.r.law(
        "Rq",
        "Rq of the flanks",
        &RQ_FROM_RA,
        (("Ra", ra),),
        |(ra,)| rq_from_ra(ra),
    );
    (ra, rq)
}
