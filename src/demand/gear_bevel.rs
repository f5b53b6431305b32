//! Bevel gears: the pair at the middle of the face as a virtual pair of cylindrical gears, whose
//! film is then worked out like any other's.

use super::context::Context;
use super::gear_film::{self, Pair};
use super::inputs::Wanted;
use crate::model::part::{GearMesh, Part};
use crate::quantity::convert::number;
use crate::quantity::{Angle, AngularVelocity, Length, Measure, Ratio, Torque};
use crate::relation::gear::bevel::{Bevel, VIRTUAL, VIRTUAL_LOAD, Virtual, virtual_pair};
use crate::trace::{Known, Outcome, Recorder};

/// The virtual gears of a bevel pair, with what is known of the real ones.
pub(super) struct VirtualGears {
    pub(super) gears: Outcome<Virtual>,
    /// Normal module at mid-face.
    pub(super) module: Known<Length>,
    /// Face width of the real pair.
    pub(super) width: Known<Length>,
    /// Speed of the real pinion.
    pub(super) speed: Known<AngularVelocity>,
}

/// The virtual gears, where teeth, mean module, face width and speed are known. Shafts at right
/// angles.
pub(super) fn virtual_gears<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    mesh: &GearMesh,
) -> Option<VirtualGears> {
    let beta = gear_film::helix(cx, part, mesh);
    let alpha = gear_film::pressure_angle(cx, part, mesh);
    let (z1, z2) = mesh.teeth.as_ref()?.value;
    let tooth = |n: u32| mesh.teeth.clone().map(|t| t.map(|_| number(f64::from(n))));
    let z1 = cx.r.given("z1", "teeth of the pinion", &tooth(z1)?);
    let z2 = cx.r.given("z2", "teeth of the wheel", &tooth(z2)?);
    let length = |key, symbol, says| Wanted {
        key,
        about: None,
        symbol,
        says,
        how: "drawing",
    };
    let module = length("normal module", "m_mn", "normal module at mid-face");
    let module = cx.maybe(part, module, mesh.normal_module.as_ref())?;
    let face = length("face width", "b", "face width");
    let width = cx.maybe(part, face, mesh.face_width.as_ref())?;
    let speed = super::gear_mesh::pinion_speed(cx, part, mesh)?;
    let inputs = (
        ("z1", z1),
        ("z2", z2),
        ("m_mn", module),
        ("b", width),
        ("beta_m", beta),
        ("alpha_n", alpha),
    );
    let gears =
        cx.r.attempt_all(
            &VIRTUAL,
            inputs,
            |(z1, z2, m, b, beta, alpha): (Ratio, Ratio, Length, Length, Angle, Angle)| {
                virtual_pair(Bevel {
                    z1,
                    z2,
                    mean_normal_module: m,
                    spiral: beta,
                    pressure_angle: alpha,
                    shaft_angle: Angle::from_base(std::f64::consts::FRAC_PI_2),
                    face_width: b,
                })
            },
        )
        .ok()?;
    Some(VirtualGears {
        gears,
        module,
        width,
        speed,
    })
}

/// The virtual pair as the film takes it.
pub(super) fn pair<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    mesh: &GearMesh,
) -> Option<Pair> {
    let found = virtual_gears(cx, part, mesh)?;
    let (made, n) = (found.gears, found.speed);
    let torque = gear_film::torque(cx, part, mesh, n)?;
    let ratio =
        cx.r.take(&made, "u_v", "ratio of the virtual pair", |v: Virtual| {
            number(v.teeth.z2.base() / v.teeth.z1.base())
        });
    let distance = cx.r.take(
        &made,
        "a_v",
        "centre distance of the virtual pair",
        |v: Virtual| {
            let (d1, d2) = virtual_diameters(&v);
            Length::from_base(0.5 * (d1 + d2))
        },
    );
    let width = cx.r.take(&made, "b_e", "width that carries", |v: Virtual| {
        v.effective_width
    });
    cx.r.note(|| "shafts at right angles; mid-face, straight or spiral teeth".to_owned());
    let (speed, torque) = duty(cx, made.value, ratio, n, torque);
    Some(Pair {
        ratio,
        speed,
        distance,
        width,
        torque,
    })
}

/// Speed and torque of the virtual pinion.
fn duty<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    v: Virtual,
    ratio: Known<Ratio>,
    n: Known<AngularVelocity>,
    torque: Known<Torque>,
) -> (Known<AngularVelocity>, Known<Torque>) {
    let speed = cx.r.law(
        "n_v1",
        "speed of the virtual pinion",
        &VIRTUAL_LOAD,
        (("n1", n), ("u_v", ratio)),
        |(n, _): (AngularVelocity, Ratio)| v.speed(n),
    );
    let torque = cx.r.law(
        "T_v1",
        "torque of the virtual pinion",
        &VIRTUAL_LOAD,
        (("T1", torque), ("u_v", ratio)),
        |(t, _): (Torque, Ratio)| v.torque(t),
    );
    (speed, torque)
}

/// Pitch diameters of the virtual gears, m.
fn virtual_diameters(v: &Virtual) -> (f64, f64) {
    use crate::numeric::math::cos;
    let over = |d: Length, cone: Angle| d.base() / cos(cone.base());
    (
        over(v.mean_diameters.0, v.cones.0),
        over(v.mean_diameters.1, v.cones.1),
    )
}
