//! Power lost in a gear stage.
//!
//! Sources: ISO/TR 14179-2 and ISO/TR 14179-1 (after AGMA), from memory. The two estimates of
//! churning can differ by several times: the former has no viscosity in it, the latter rises
//! straight with it.

pub mod churning;

use super::geometry::Mesh;
use super::path::Path;
use super::temperature::Friction;
use crate::numeric::math::{cos, pow};
use crate::quantity::convert::{to_mm, to_mm2_s};
use crate::quantity::{
    AngularVelocity, KinematicViscosity, Length, Measure, Power, Ratio, Torque, Velocity,
};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive};
use std::f64::consts::PI;

/// Loss factor of the geometry.
pub static LOSS_FACTOR: Law = Law {
    name: "gear-loss-factor",
    title: "Loss factor of the tooth geometry",
    formula: "H_v = pi (u + 1) / (z1 u cos(beta_b)) (1 - eps + eps1^2 + eps2^2)",
    range: "eps transverse contact ratio, eps1 and eps2 its parts on either side of the pitch point",
    source: "ISO/TR 14179-2 (from memory)",
};

/// Friction of the mesh.
pub static MESH_FRICTION: Law = Law {
    name: "gear-mesh-friction",
    title: "Mean coefficient of friction of the mesh for power loss",
    formula: "mu_mz = 0.048 (F_bt / b / (v_sum rho_n))^0.2 eta^-0.05 Ra^0.25 X_L",
    range: "N/mm, m/s, mm, mPa.s, um",
    source: "ISO/TR 14179-2 (from memory)",
};

/// Power lost in the mesh.
pub static MESH: Law = Law {
    name: "gear-loss",
    title: "Power lost in the mesh",
    formula: "P_VZ = P mu_mz H_v",
    range: "load-dependent part only",
    source: "ISO/TR 14179-2 (from memory)",
};

/// Power through the mesh.
pub static POWER: Law = Law {
    name: "gear-power",
    title: "Power of a torque at a speed",
    formula: "P = T omega",
    range: "steady running",
    source: "mechanics",
};

/// Power lost in the mesh, other form.
pub static MESH_AGMA: Law = Law {
    name: "gear-loss-agma",
    title: "Power lost in the mesh, form of ISO/TR 14179-1",
    formula: "P = f_m T1 n1 cos(beta)^2 / (9549 M); f_m = nu^-0.223 K^-0.40 / (3.239 V^0.70)",
    range: "kW; K = 1000 T1 (z1 + z2) / (2 b r_w1^2 z2) in N/mm2, V pitch-line speed in m/s, M mechanical advantage of the mesh",
    source: "ISO/TR 14179-1 (from memory)",
};

/// Loss factor of a pair.
pub fn loss_factor(mesh: &Mesh, path: &Path) -> Ratio {
    let u = mesh.ratio().base();
    let (e1, e2) = path.addendum_ratios();
    let (e1, e2) = (e1.base(), e2.base());
    let parts = 1.0 - (e1 + e2) + e1 * e1 + e2 * e2;
    let cosine = cos(mesh.base_helix.base());
    Ratio::from_base(PI * (u + 1.0) / (mesh.teeth.z1.base() * u * cosine) * parts)
}

/// Mean coefficient of friction for power loss.
///
/// # Errors
/// An input that is not above zero.
pub fn mesh_friction(f: Friction) -> Result<Ratio, Outside> {
    let (load, eta_mpa_s, x_l) = f.checked()?;
    let ra_um = f.ra.base() * 1e6;
    Ok(Ratio::from_base(
        0.048 * pow(load, 0.2) * pow(eta_mpa_s, -0.05) * pow(ra_um, 0.25) * x_l,
    ))
}

/// Power of a torque at a speed.
pub fn power(torque: Torque, speed: AngularVelocity) -> Power {
    Power::from_base(torque.base() * speed.base())
}

/// Power lost in the mesh.
pub fn mesh(power: Power, mu: Ratio, loss_factor: Ratio) -> Power {
    Power::from_base(power.base() * mu.base() * loss_factor.base())
}

/// What the form of ISO/TR 14179-1 takes beside the pair.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct AgmaLoss {
    /// Torque of the pinion.
    pub torque: Torque,
    /// Its speed.
    pub speed: AngularVelocity,
    /// Pitch-line speed.
    pub pitch_speed: Velocity,
    /// Face width.
    pub face_width: Length,
    /// Viscosity at oil temperature.
    pub nu: KinematicViscosity,
}

/// Power lost in the mesh, form of ISO/TR 14179-1.
///
/// # Errors
/// An input that is not above zero, or tips that leave no path of contact.
pub fn mesh_agma(mesh: &Mesh, path: &Path, loss: AgmaLoss) -> Result<Power, Outside> {
    let torque = positive("the torque", loss.torque)?;
    let speed = positive("the speed", loss.speed)?;
    let v = positive("the pitch-line speed", loss.pitch_speed)?;
    positive("the viscosity", loss.nu)?;
    positive("the face width", loss.face_width)?;
    let (z1, z2) = (mesh.teeth.z1.base(), mesh.teeth.z2.base());
    let r_mm = to_mm(mesh.working_diameter) / 2.0;
    let b_mm = to_mm(loss.face_width);
    let k = 1000.0 * torque * (z1 + z2) / (2.0 * b_mm * r_mm * r_mm * z2);
    let f_m = pow(to_mm2_s(loss.nu), -0.223) * pow(k, -0.40) / (3.239 * pow(v, 0.70));
    let slope = cos(mesh.teeth.helix.base());
    let advantage = mechanical_advantage(mesh, path);
    Ok(Power::from_base(
        f_m * torque * speed * slope * slope / advantage,
    ))
}

/// `2 cos(alpha_w) (Hs + Ht) / (Hs^2 + Ht^2)` from the sliding ratios at the ends of the path:
/// the length of path before or after the pitch point over the pinion's pitch radius, `(u + 1)`
/// times over `u` for the start.
fn mechanical_advantage(mesh: &Mesh, path: &Path) -> f64 {
    let (after, before) = path.addendum_ratios();
    let z1 = mesh.teeth.z1.base();
    let u = mesh.ratio().base();
    // g / r_b1 = eps 2 pi / z1; over the pitch radius: times cos(alpha_wt)
    let cosine = cos(mesh.working_pressure_angle.base());
    let per_pitch = 2.0 * PI / z1 * cosine * (u + 1.0) / u;
    let (start, end) = (before.base() * per_pitch, after.base() * per_pitch);
    2.0 * cosine * (start + end) / (start * start + end * end)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::{degrees, mm, mm2_s, number, rpm};
    use crate::relation::gear::geometry::Teeth;
    use crate::relation::gear::path::Tips;

    /// The mechanical advantage from the tip radii, as ISO/TR 14179-1 writes it (from memory):
    /// `Ht = (u + 1) / u (sqrt(ro1^2 / r1^2 - cos^2) - sin)`, `Hs` likewise with the wheel.
    #[test]
    fn the_mechanical_advantage_agrees_with_the_tip_radii() {
        let teeth = Teeth {
            z1: number(24.0),
            z2: number(72.0),
            normal_module: mm(4.0),
            helix: degrees(0.0),
            pressure_angle: degrees(20.0),
        };
        let mesh = Mesh::standard(teeth).expect("a pair");
        let path = Path::new(&mesh, Tips::standard(&mesh)).expect("a path");
        let angle = mesh.working_pressure_angle.base();
        let (c, s) = (cos(angle), crate::numeric::math::sin(angle));
        let h = |tip: f64, pitch: f64| ((tip / pitch) * (tip / pitch) - c * c).sqrt() - s;
        let (ht, hs) = (4.0 / 3.0 * h(52.0, 48.0), 4.0 * h(148.0, 144.0));
        let want = 2.0 * c * (hs + ht) / (hs * hs + ht * ht);
        assert!((mechanical_advantage(&mesh, &path) / want - 1.0).abs() < 1e-12);
    }

    #[test]
    fn a_thicker_oil_rubs_less_in_the_mesh() {
        let teeth = Teeth {
            z1: number(20.0),
            z2: number(63.0),
            normal_module: mm(5.0),
            helix: degrees(12.0),
            pressure_angle: degrees(20.0),
        };
        let mesh = Mesh::standard(teeth).expect("a pair");
        let path = Path::new(&mesh, Tips::standard(&mesh)).expect("a path");
        let lost = |nu: f64| {
            let loss = AgmaLoss {
                torque: Torque::from_base(650.0),
                speed: rpm(1480.0),
                pitch_speed: Velocity::from_base(7.92),
                face_width: mm(60.0),
                nu: mm2_s(nu),
            };
            mesh_agma(&mesh, &path, loss).map_or(f64::NAN, Measure::base)
        };
        assert!(lost(70.0) < lost(35.0));
        // a single stage loses a fraction of a per cent to a per cent and a half in its mesh
        let share = lost(35.0) / 100_740.0;
        assert!((0.001..0.015).contains(&share), "{share}");
    }
}
