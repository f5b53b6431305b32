//! Bulk temperature of the teeth: stated, worked out where the teeth are known, else usual.

use super::pitch_point::PitchPoint;
use super::wanted;
use crate::demand::context::{Context, HotAt};
use crate::demand::gear_bevel;
use crate::demand::thermal::usual_kelvins;
use crate::model::Lubrication;
use crate::model::part::{GearMesh, GearType, Part};
use crate::quantity::convert::{kelvins, number};
use crate::quantity::{
    DynamicViscosity, Length, Measure, Power, Ratio, TemperatureInterval, ThermodynamicTemperature,
    Velocity,
};
use crate::relation::gear::geometry::{Mesh, Teeth};
use crate::relation::gear::loss::{LOSS_FACTOR, POWER, loss_factor, power};
use crate::relation::gear::path::{Path, Tips};
use crate::relation::gear::temperature::{
    BULK, Bulk, Friction, MEAN_FRICTION, Supply, bulk, mean_friction,
};
use crate::relation::gear::viscosity_rule::{RUNNING, running};
use crate::trace::{Known, Recorder};

/// Temperature of the teeth as a function of ambient.
pub(super) fn temperature<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    mesh: &GearMesh,
    point: &PitchPoint,
) -> HotAt {
    let hot = cx.hot_at(part);
    if part.part_rise.is_some() {
        return hot;
    }
    let rise = match worked_out(cx, part, mesh, point) {
        Some(rise) => rise,
        None => usual(cx, part),
    };
    let hottest = hot.hottest.map(|t| {
        cx.r.law(
            "t_tooth",
            "bulk temperature of the teeth",
            &crate::relation::sump::PART,
            (("t", t), ("Delta_t_tooth", rise)),
            |(t, d)| crate::relation::sump::running(t, d),
        )
    });
    HotAt {
        at: hot.at.map(|at| at.raised(rise.value.base())),
        hottest,
        coldest: hot.coldest,
    }
}

fn usual<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part) -> Known<TemperatureInterval> {
    let why = "teeth run hotter than the oil; 10 to 25 K is common practice";
    let key = wanted(
        "part rise",
        "Delta_t_tooth",
        "bulk temperature of the teeth over the oil",
        "teeth and module, from which it is worked out; or an estimate from losses",
    );
    cx.or_assume(part, key, None, usual_kelvins(15.0, 10.0, 25.0, why))
}

/// Rise by ISO/TS 6336-22, where teeth and module are known. The friction is that of the viscosity
/// the pitch-line rule asks for: viscosity enters with the power of 0.036 at most.
fn worked_out<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    mesh: &GearMesh,
    point: &PitchPoint,
) -> Option<Known<TemperatureInterval>> {
    let h_v = factor(cx, part, mesh, point)?;
    let p: Known<Power> = {
        let with = (("T1", point.pair.torque), ("omega", point.pair.speed));
        let says = "power through the mesh";
        cx.r.law("P", says, &POWER, with, |(t, n)| power(t, n))
    };
    let mu = friction(cx, point)?;
    let supply = supply(cx.lubrication());
    let relief = number(1.0);
    let cold = ThermodynamicTemperature::from_base(0.0);
    let with = (
        ("P", p),
        ("H_v", h_v),
        ("mu_m", mu),
        ("a", point.pair.distance),
        ("b", point.pair.width),
    );
    let says = "rise of the teeth over the oil";
    let rise = cx.r.attempt(
        "Delta_t_tooth",
        says,
        &BULK,
        with,
        |(power, loss_factor, mu, centre_distance, face_width): (
            Power,
            Ratio,
            Ratio,
            Length,
            Length,
        )| {
            let found = bulk(Bulk {
                oil: cold,
                power,
                loss_factor,
                mu,
                centre_distance,
                face_width,
                supply,
                relief,
            })?;
            Ok::<_, crate::relation::outside::Outside>(kelvins(found.base()))
        },
    );
    cx.r.note(|| format!("{}; without tip relief, which is the hotter", word(supply)));
    rise.ok()
}

fn supply(lubrication: Option<Lubrication>) -> Supply {
    match lubrication {
        Some(Lubrication::Splash | Lubrication::Bath) => Supply::Dip,
        Some(Lubrication::Flooded) => Supply::Submerged,
        _ => Supply::Spray,
    }
}

fn word(supply: Supply) -> &'static str {
    match supply {
        Supply::Spray => "taken as sprayed",
        Supply::Dip => "a wheel dips",
        Supply::Submerged => "the mesh runs under oil",
    }
}

/// Loss factor of the teeth; a bevel pair by its virtual one.
fn factor<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    mesh: &GearMesh,
    point: &PitchPoint,
) -> Option<Known<Ratio>> {
    let says = "loss factor of the tooth geometry";
    let bevel = matches!(mesh.kind, Some(GearType::Bevel | GearType::SpiralBevel));
    let made = if bevel {
        Mesh::standard(gear_bevel::virtual_gears(cx, part, mesh)?.gears.value.teeth)
    } else {
        let (z1, z2) = mesh.teeth.as_ref()?.value;
        let key = wanted("normal module", "m_n", "normal module", "drawing");
        let module: Known<Length> = cx.maybe(part, key, mesh.normal_module.as_ref())?;
        let teeth = Teeth {
            z1: number(f64::from(z1)),
            z2: number(f64::from(z2)),
            normal_module: module.value,
            helix: point.angles.0.value,
            pressure_angle: point.angles.1.value,
        };
        Mesh::new(teeth, point.pair.distance.value)
    };
    let made = made.ok()?;
    let path = Path::new(&made, Tips::standard(&made)).ok()?;
    let with = (("a", point.pair.distance), ("u", point.pair.ratio));
    Some(cx.r.law("H_v", says, &LOSS_FACTOR, with, |_| {
        loss_factor(&made, &path)
    }))
}

/// Density of a mineral oil near running temperature, for figures that go with no particular oil.
pub(super) const REFERENCE_DENSITY: f64 = 860.0;

/// Mean friction at the viscosity the pitch-line rule asks for.
fn friction<R: Recorder>(cx: &mut Context<'_, '_, R>, point: &PitchPoint) -> Option<Known<Ratio>> {
    let says = "viscosity the pitch-line rule asks for";
    let with = (("v", point.speed),);
    let nu =
        cx.r.attempt("nu", says, &RUNNING, with, |(v,): (Velocity,)| running(v));
    let nu = nu.ok()?;
    let eta = DynamicViscosity::from_base(nu.value.base() * REFERENCE_DENSITY);
    let contact = point.contact;
    let with = (
        ("w", point.load),
        ("rho_n", point.rho),
        ("Ra", point.ra),
        ("nu", nu),
    );
    let says = "mean coefficient of friction, mineral oil";
    let mu = cx.r.attempt(
        "mu_m",
        says,
        &MEAN_FRICTION,
        with,
        |(load, rho_n, ra, _)| {
            mean_friction(Friction {
                load,
                sum_speed: contact.sum_speed,
                rho_n,
                eta,
                ra,
                oil: number(1.0),
            })
        },
    );
    cx.r.note(|| "density 860 kg/m3 at running temperature".to_owned());
    mu.ok()
}
