//! Losses of a gear mesh: rubbing teeth, and the wheel that stirs.

use super::source::Form;
use super::{Lack, LossKind, Source, Tally, With};
use crate::demand::context::Context;
use crate::demand::gear_bevel;
use crate::demand::inputs::{Usual, Wanted};
use crate::model::part::{GearMesh, GearType, Part};
use crate::model::{Lubrication, Stated};
use crate::numeric::math::cos;
use crate::quantity::convert::{degrees, number, rpm, to_rpm, um};
use crate::quantity::{
    Angle, AngularVelocity, DynamicViscosity, KinematicViscosity, Length, LoadPerLength, Measure,
    Power, Ratio, Torque,
};
use crate::relation::gear::geometry::{MESH, Mesh, Teeth};
use crate::relation::gear::load::torque_of;
use crate::relation::gear::loss::churning::Stirring;
use crate::relation::gear::loss::{LOSS_FACTOR, POWER, loss_factor, power as power_of};
use crate::relation::gear::path::{Path, Tips, pitch_speed, sum_speed};
use crate::relation::gear::temperature::Friction;
use crate::trace::{Known, Recorder};

const ALL: &str = "all its losses";
const TEETH: &str = "rubbing of the teeth";

fn wanted(key: &'static str, symbol: &'static str, says: &'static str) -> Wanted<'static> {
    crate::demand::inputs::wanted(key, symbol, says, "nameplate or drawing")
}

/// What of a pair is known. A bevel pair is its virtual cylindrical one, at mid-face.
struct Pair {
    mesh: Mesh,
    path: Path,
    /// Width that carries.
    width: Known<Length>,
    /// Speed of the real pinion.
    speed: Known<AngularVelocity>,
    module: Known<Length>,
    centre: Known<Length>,
    /// Speed of the pinion that rubs, and its torque over that of the real one.
    rubs: (AngularVelocity, f64),
    /// Outside diameter and speed of the wheel that stirs.
    stirs: (Length, AngularVelocity),
}

/// Adds what a mesh loses.
pub(super) fn mesh<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    m: &GearMesh,
    out: &mut Tally,
) -> Result<(), Lack> {
    let pair = match m.kind {
        Some(GearType::Hypoid) => {
            let because = "no loss formula is held for sliding along hypoid teeth";
            return Err(Lack::new(ALL, because));
        }
        Some(GearType::Bevel | GearType::SpiralBevel) => bevel(cx, part, m)?,
        _ => cylindrical(cx, part, m, out)?,
    };
    let dips = matches!(
        cx.lubrication(),
        Some(Lubrication::Splash | Lubrication::Bath | Lubrication::Flooded)
    );
    if dips {
        stirring(cx, part, &pair, out);
    }
    rubbing(cx, part, m, &pair, out)
}

/// A bevel pair by its virtual cylindrical one, ISO 10300. The wheel stirs as a cylindrical one of
/// its outer diameter would.
fn bevel<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    m: &GearMesh,
) -> Result<Pair, Lack> {
    let because = "teeth, module at mid-face, face width or pinion speed are not stated";
    let found = gear_bevel::virtual_gears(cx, part, m);
    let found = found.ok_or(Lack::new(ALL, because))?;
    let v = found.gears.value;
    let misfit = |_| Lack::new(ALL, "the teeth of the virtual pair do not mesh");
    let mesh = Mesh::standard(v.teeth).map_err(misfit)?;
    let path = Path::new(&mesh, Tips::standard(&mesh)).map_err(misfit)?;
    let width = cx.r.take(&found.gears, "b_e", "width that carries", |v| {
        v.effective_width
    });
    let says = "centre distance of the virtual pair";
    let centre =
        cx.r.take(&found.gears, "a_v", says, |_| mesh.centre_distance);
    let cone = v.cones.1.base();
    let outer = v.mean_diameters.1.base()
        + found.width.value.base() * crate::numeric::math::sin(cone)
        + 2.0 * found.module.value.base() * cos(cone);
    let n2 = to_rpm(found.speed.value) * v.mean_diameters.0.base() / v.mean_diameters.1.base();
    let torque = v.torque(Torque::from_base(1.0)).base();
    Ok(Pair {
        mesh,
        path,
        width,
        speed: found.speed,
        module: found.module,
        centre,
        rubs: (v.speed(found.speed.value), torque),
        stirs: (Length::from_base(outer), rpm(n2)),
    })
}

fn cylindrical<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    m: &GearMesh,
    out: &Tally,
) -> Result<Pair, Lack> {
    let key = wanted("pinion speed", "n1", "pinion speed");
    let speed = cx.maybe(part, key, out.known(m.pinion_speed.as_ref()));
    let speed = speed.ok_or(Lack::of(ALL, "the pinion speed is not stated", key))?;
    let key = wanted("centre distance", "a", "centre distance");
    let stated: Option<Known<Length>> = cx.maybe(part, key, out.known(m.centre_distance.as_ref()));
    let counts = counts(cx, part, m, (stated, out))?;
    let helix = angle(cx, part, m, out);
    let module = module(cx, part, m, (stated, counts, helix.0), out)?;
    let width = width(cx, part, m, (stated, out))?;
    let teeth = Teeth {
        z1: counts.0.value,
        z2: counts.1,
        normal_module: module.value,
        helix: helix.0,
        pressure_angle: helix.1,
    };
    let mesh = match &stated {
        Some(a) => Mesh::new(teeth, a.value),
        None => Mesh::standard(teeth),
    };
    let path = mesh.and_then(|mesh| Ok((mesh, Path::new(&mesh, Tips::standard(&mesh))?)));
    let (mesh, path) =
        path.map_err(|_| Lack::new(ALL, "the teeth do not fit the centre distance"))?;
    let centre = stated.unwrap_or_else(|| {
        let says = "centre distance without profile shift";
        let with = (("m_n", module), ("z1", counts.0));
        cx.r.law("a", says, &MESH, with, |_| mesh.centre_distance)
    });
    let wheel = mesh.d2.base().abs() + 2.0 * module.value.base();
    let n2 = to_rpm(speed.value) / mesh.ratio().base().abs();
    Ok(Pair {
        mesh,
        path,
        width,
        speed,
        module,
        centre,
        rubs: (speed.value, 1.0),
        stirs: (Length::from_base(wheel), rpm(n2)),
    })
}

/// Teeth of the pinion usual for a hardened pair.
const PINION_TEETH: (f64, f64, f64) = (20.0, 17.0, 30.0);

/// Teeth of pinion and wheel: counted, or a usual pinion with the ratio stated.
fn counts<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    m: &GearMesh,
    (distance, out): (Option<Known<Length>>, &Tally),
) -> Result<(Known<Ratio>, Ratio), Lack> {
    let key = wanted("teeth", "z1", "teeth of the pinion");
    if let Some(given) = &m.teeth {
        let (z1, z2) = given.value;
        let z1 = given.clone().map(|_| number(f64::from(z1)));
        return Ok((cx.r.given("z1", key.says, &z1), number(f64::from(z2))));
    }
    let ratio = crate::demand::gear_mesh::ratio(cx, part, m).filter(|_| out.asked);
    let (Some(u), Some(_)) = (ratio, distance) else {
        return Err(Lack::of(ALL, "the teeth are not stated", key));
    };
    let (value, lo, hi) = PINION_TEETH;
    let usual = Usual {
        value: number(value),
        lo: number(lo),
        hi: number(hi),
        why: "17 to 30 teeth of the pinion are common practice",
    };
    let nobody: Option<&Stated<Ratio>> = None;
    let z1 = cx.or_assume(part, key, nobody, usual);
    Ok((z1, number(z1.value.base() * u.value.base())))
}

/// Helix and normal pressure angle, usual where not stated.
fn angle<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    m: &GearMesh,
    out: &Tally,
) -> (Angle, Angle) {
    let mut of = |key, symbol, stated, usual: f64| -> Angle {
        let known: Option<Known<Angle>> = cx.maybe(part, wanted(key, symbol, key), stated);
        known.map_or(degrees(usual), |k| k.value)
    };
    let usual = if m.kind == Some(GearType::Helical) {
        12.0
    } else {
        0.0
    };
    let helix = of("helix", "beta", out.known(m.helix.as_ref()), usual);
    let stated = out.known(m.pressure_angle.as_ref());
    (helix, of("pressure angle", "alpha", stated, 20.0))
}

/// Normal module: stated, or from the centre distance without profile shift.
fn module<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    m: &GearMesh,
    (distance, (z1, z2), helix): (Option<Known<Length>>, (Known<Ratio>, Ratio), Angle),
    out: &Tally,
) -> Result<Known<Length>, Lack> {
    let key = wanted("normal module", "m_n", "normal module");
    if let Some(module) = cx.maybe(part, key, out.known(m.normal_module.as_ref())) {
        return Ok(module);
    }
    let Some(a) = distance.filter(|_| out.asked) else {
        return Err(Lack::of(ALL, "the module is not stated", key));
    };
    let says = "normal module, without profile shift";
    let with = (("a", a), ("z1", z1));
    Ok(cx
        .r
        .law("m_n", says, &MESH, with, |(a, z1): (Length, Ratio)| {
            Length::from_base(2.0 * a.base() * cos(helix.base()) / (z1.base() + z2.base()))
        }))
}

/// Face width: stated, or a usual share of the centre distance.
fn width<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    m: &GearMesh,
    (distance, out): (Option<Known<Length>>, &Tally),
) -> Result<Known<Length>, Lack> {
    let key = wanted("face width", "b", "face width");
    if let Some(width) = cx.maybe(part, key, out.known(m.face_width.as_ref())) {
        return Ok(width);
    }
    let Some(a) = distance.filter(|_| out.asked) else {
        return Err(Lack::of(ALL, "the face width is not stated", key));
    };
    let share = |k: f64| Length::from_base(a.value.base() * k);
    let usual = Usual {
        value: share(0.35),
        lo: share(0.2),
        hi: share(0.5),
        why: "0.2 to 0.5 of the centre distance is common practice",
    };
    Ok(cx.or_assume(part, key, m.face_width.as_ref(), usual))
}

fn rubbing<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    m: &GearMesh,
    pair: &Pair,
    out: &mut Tally,
) -> Result<(), Lack> {
    let (torque, power) = torque(cx, part, m, pair, out)?;
    let says = "loss factor of the tooth geometry";
    let with = (("m_n", pair.module), ("a", pair.centre));
    let (mesh, path) = (pair.mesh, pair.path);
    let factor = cx.r.law("H_v", says, &LOSS_FACTOR, with, |_| {
        loss_factor(&mesh, &path)
    });
    let why = "ground flanks; 0.3 to 0.8 um is common practice";
    let key = wanted("flank roughness", "Ra", "Ra of the flanks");
    let stated = cx.maybe(part, key, out.known(m.flank_roughness.as_ref()));
    let ra = stated.unwrap_or_else(|| cx.r.assume("Ra", "Ra of the flanks", um(0.5), why));
    let v = pitch_speed(mesh.working_diameter, pair.rubs.0)
        .map_err(|_| Lack::new(TEETH, "the mesh stands still"))?;
    let across = pair.width.value.base();
    let force = 2.0 * torque.base() * pair.rubs.1 / mesh.base_diameters.0.base();
    let friction = Friction {
        load: LoadPerLength::from_base(force / across),
        sum_speed: sum_speed(v, mesh.working_pressure_angle),
        rho_n: mesh.pitch_reduced_radius(),
        eta: DynamicViscosity::from_base(1.0),
        ra: ra.value,
        oil: number(1.0),
    };
    out.sources.push(Source {
        kind: LossKind::Mesh,
        part: part.label.clone(),
        with: With(vec![
            ("P", power.step),
            ("H_v", factor.step),
            ("b", pair.width.step),
            ("n1", pair.speed.step),
            ("Ra", ra.step),
        ]),
        form: Form::Mesh {
            power: power.value,
            factor: factor.value,
            friction,
        },
    });
    Ok(())
}

fn torque<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    m: &GearMesh,
    pair: &Pair,
    out: &Tally,
) -> Result<(Torque, Known<Power>), Lack> {
    let key = wanted("pinion torque", "T1", "pinion torque");
    let stated: Option<Known<Torque>> = cx.maybe(part, key, out.known(m.pinion_torque.as_ref()));
    if let Some(torque) = stated {
        let with = (("T", torque), ("omega", pair.speed));
        let says = "power through the mesh";
        let power = cx.r.law("P", says, &POWER, with, |(t, n)| power_of(t, n));
        return Ok((torque.value, power));
    }
    let key = wanted("power", "P", "power through the mesh");
    let power: Option<Known<Power>> = cx.maybe(part, key, out.known(m.power.as_ref()));
    let power = power.ok_or(Lack::of(TEETH, "the power is not stated", key))?;
    let torque = torque_of(power.value, pair.speed.value)
        .map_err(|_| Lack::new(TEETH, "the mesh stands still"))?;
    Ok((torque, power))
}

/// Share of the wheel below the oil: dipping to a quarter of its height. Common practice.
const DIPPED: f64 = 0.25;

/// The wheel dips, the pinion does not. The form with viscosity in it is taken: by the other one
/// oils would not differ.
fn stirring<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, pair: &Pair, out: &mut Tally) {
    let why = "the wheel dips to about a quarter of its height, common practice";
    let dip = cx.r.assume(
        "f_g",
        "share of the wheel below the oil",
        number(DIPPED),
        why,
    );
    let mesh = &pair.mesh;
    let module = pair.module.value.base();
    let stirring = Stirring {
        dip_factor: dip.value,
        nu: KinematicViscosity::from_base(1.0),
        speed: pair.stirs.1,
        diameter: pair.stirs.0,
        length: Length::from_base(0.0),
        face_width: pair.width.value,
        transverse_module: Length::from_base(module / cos(mesh.teeth.helix.base())),
        helix: mesh.teeth.helix,
    };
    out.sources.push(Source {
        kind: LossKind::Churning,
        part: part.label.clone(),
        with: With(vec![
            ("f_g", dip.step),
            ("n1", pair.speed.step),
            ("m_n", pair.module.step),
            ("b", pair.width.step),
        ]),
        form: Form::Churning(stirring),
    });
}
