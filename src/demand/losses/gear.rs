//! Losses of a gear mesh: rubbing teeth, and the wheel that stirs.

use super::{Form, LossKind, Source, Unknown, With, known};
use crate::demand::context::Context;
use crate::demand::inputs::Wanted;
use crate::model::Lubrication;
use crate::model::part::{GearMesh, GearType, Part};
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

fn wanted(key: &'static str, symbol: &'static str, says: &'static str) -> Wanted<'static> {
    Wanted {
        key,
        about: None,
        symbol,
        says,
        how: "nameplate or drawing",
    }
}

/// What of a pair is stated.
struct Pair {
    mesh: Mesh,
    path: Path,
    width: Known<Length>,
    speed: Known<AngularVelocity>,
    module: Known<Length>,
    centre: Known<Length>,
}

/// Adds what a mesh loses.
pub(super) fn mesh<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    m: &GearMesh,
    out: &mut Vec<Source>,
) -> Result<(), Unknown> {
    if matches!(
        m.kind,
        Some(GearType::Bevel | GearType::SpiralBevel | GearType::Hypoid)
    ) {
        return Err("losses of bevel and hypoid pairs are not worked out");
    }
    let pair = pair(cx, part, m)?;
    rubbing(cx, part, m, &pair, out)?;
    let lubrication = cx.lubrication();
    let dips = matches!(
        lubrication,
        Some(Lubrication::Splash | Lubrication::Bath | Lubrication::Flooded)
    );
    if dips {
        stirring(cx, part, &pair, out);
    }
    Ok(())
}

fn pair<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    m: &GearMesh,
) -> Result<Pair, Unknown> {
    let given = m
        .teeth
        .as_ref()
        .ok_or("the teeth of a gear mesh are missing")?;
    let key = wanted("normal module", "m_n", "normal module");
    let module = cx.maybe(part, key, known(m.normal_module.as_ref()));
    let module = module.ok_or("the module of a gear mesh is missing")?;
    let key = wanted("face width", "b", "face width");
    let width = cx.maybe(part, key, known(m.face_width.as_ref()));
    let width = width.ok_or("the face width of a gear mesh is missing")?;
    let key = wanted("pinion speed", "n1", "pinion speed");
    let speed = cx.maybe(part, key, known(m.pinion_speed.as_ref()));
    let speed = speed.ok_or("the pinion speed of a gear mesh is missing")?;
    let teeth = teeth(cx, part, m, (given.value, module.value));
    let key = wanted("centre distance", "a", "centre distance");
    let stated: Option<Known<Length>> = cx.maybe(part, key, known(m.centre_distance.as_ref()));
    let mesh = match &stated {
        Some(a) => Mesh::new(teeth, a.value),
        None => Mesh::standard(teeth),
    };
    let path = mesh.and_then(|mesh| Ok((mesh, Path::new(&mesh, Tips::standard(&mesh))?)));
    let (mesh, path) =
        path.map_err(|_| "the teeth of a gear mesh do not fit its centre distance")?;
    let z = given.clone().map(|_| teeth.z1);
    let z: Known<Ratio> = cx.r.given("z1", "teeth of the pinion", &z);
    let centre = stated.unwrap_or_else(|| {
        let says = "centre distance without profile shift";
        let with = (("m_n", module), ("z1", z));
        cx.r.law("a", says, &MESH, with, |_| mesh.centre_distance)
    });
    Ok(Pair {
        mesh,
        path,
        width,
        speed,
        module,
        centre,
    })
}

/// The teeth, with usual angles where none are stated.
fn teeth<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    m: &GearMesh,
    ((z1, z2), normal_module): ((u32, u32), Length),
) -> Teeth {
    let mut angle = |key, symbol, stated, usual: f64| -> Angle {
        let known: Option<Known<Angle>> = cx.maybe(part, wanted(key, symbol, key), stated);
        known.map_or(degrees(usual), |k| k.value)
    };
    let usual = if m.kind == Some(GearType::Helical) {
        12.0
    } else {
        0.0
    };
    Teeth {
        z1: number(f64::from(z1)),
        z2: number(f64::from(z2)),
        normal_module,
        helix: angle("helix", "beta", known(m.helix.as_ref()), usual),
        pressure_angle: angle(
            "pressure angle",
            "alpha",
            known(m.pressure_angle.as_ref()),
            20.0,
        ),
    }
}

fn rubbing<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    m: &GearMesh,
    pair: &Pair,
    out: &mut Vec<Source>,
) -> Result<(), Unknown> {
    let (torque, power) = torque(cx, part, m, pair)?;
    let says = "loss factor of the tooth geometry";
    let with = (("m_n", pair.module), ("a", pair.centre));
    let (mesh, path) = (pair.mesh, pair.path);
    let factor = cx.r.law("H_v", says, &LOSS_FACTOR, with, |_| {
        loss_factor(&mesh, &path)
    });
    let why = "ground flanks; 0.3 to 0.8 um is common practice";
    let key = wanted("flank roughness", "Ra", "Ra of the flanks");
    let stated = cx.maybe(part, key, known(m.flank_roughness.as_ref()));
    let ra = stated.unwrap_or_else(|| cx.r.assume("Ra", "Ra of the flanks", um(0.5), why));
    let v = pitch_speed(mesh.working_diameter, pair.speed.value)
        .map_err(|_| "the mesh stands still")?;
    let across = pair.width.value.base();
    let force = 2.0 * torque.base() / mesh.base_diameters.0.base();
    let friction = Friction {
        load: LoadPerLength::from_base(force / across),
        sum_speed: sum_speed(v, mesh.working_pressure_angle),
        rho_n: mesh.pitch_reduced_radius(),
        eta: DynamicViscosity::from_base(1.0),
        ra: ra.value,
        oil: number(1.0),
    };
    out.push(Source {
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
) -> Result<(Torque, Known<Power>), Unknown> {
    let key = wanted("pinion torque", "T1", "pinion torque");
    let stated: Option<Known<Torque>> = cx.maybe(part, key, known(m.pinion_torque.as_ref()));
    if let Some(torque) = stated {
        let with = (("T", torque), ("omega", pair.speed));
        let says = "power through the mesh";
        let power = cx.r.law("P", says, &POWER, with, |(t, n)| power_of(t, n));
        return Ok((torque.value, power));
    }
    let key = wanted("power", "P", "power through the mesh");
    let power: Option<Known<Power>> = cx.maybe(part, key, known(m.power.as_ref()));
    let power = power.ok_or("the power of a gear mesh is missing")?;
    let torque = torque_of(power.value, pair.speed.value).map_err(|_| "the mesh stands still")?;
    Ok((torque, power))
}

/// Share of the wheel below the oil: dipping to a quarter of its height. Common practice.
const DIPPED: f64 = 0.25;

/// The wheel dips, the pinion does not. The form with viscosity in it is taken: by the other one
/// oils would not differ.
fn stirring<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    pair: &Pair,
    out: &mut Vec<Source>,
) {
    let why = "the wheel dips to about a quarter of its height, common practice";
    let dip = cx.r.assume(
        "f_g",
        "share of the wheel below the oil",
        number(DIPPED),
        why,
    );
    let mesh = &pair.mesh;
    let module = pair.module.value.base();
    let n_rpm = to_rpm(pair.speed.value) / mesh.ratio().base().abs();
    let stirring = Stirring {
        dip_factor: dip.value,
        nu: KinematicViscosity::from_base(1.0),
        speed: rpm(n_rpm),
        diameter: Length::from_base(mesh.d2.base().abs() + 2.0 * module),
        length: Length::from_base(0.0),
        face_width: pair.width.value,
        transverse_module: Length::from_base(module / cos(mesh.teeth.helix.base())),
        helix: mesh.teeth.helix,
    };
    out.push(Source {
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
