//! Tables of limits and grades.

use super::{Case, Got};
use filmwright::quantity::Measure;
use filmwright::quantity::convert::{celsius, to_celsius, to_mm2_s};
use filmwright::relation::bearing::class::{BearingKind, RatingClass};
use filmwright::relation::bearing::minimum_viscosity::minimum_viscosity;
use filmwright::relation::bearing::{speed_limit, thermal_reference};
use filmwright::relation::gear::grade_table;
use filmwright::relation::guidance;
use serde_json::{Value, json};

pub(super) fn worked(id: &str, _: &Case) -> Option<Got> {
    Some(match id {
        "rb-96-dn-limits" => speed_limits(),
        "rb-98-iso15312-ref" => reference(),
        "rb-95-min-visc" => minimum(),
        "gr-44-agma-grades" => grade_table::AGMA_NUMBERS
            .iter()
            .map(|(number, vg)| (*number, json!(vg)))
            .collect(),
        "gr-45-neale-criterion" => chart(),
        "tb-02-rope-neale" => Got::from([("SAE", json!(guidance::ROPE_OVER_SHEAVES))]),
        id if id.starts_with("tb-04-chain") => chain(),
        "tb-05-slideway" => {
            let (horizontal, vertical) = guidance::SLIDEWAYS;
            Got::from([("ISO_VG", json!([horizontal, vertical]))])
        }
        _ => return None,
    })
}

fn speed_limits() -> Got {
    let whole = |(lo, hi): (f64, f64)| json!([lo, hi]);
    Got::from([
        ("grease_dn_max", whole(speed_limit::GREASE)),
        ("oil_dn_max", whole(speed_limit::OIL)),
        (
            "grease_max_C",
            json!(to_celsius(speed_limit::grease_hottest())),
        ),
        (
            "oil_bulk_max_C",
            json!(to_celsius(speed_limit::oil_hottest())),
        ),
    ])
}

fn reference() -> Got {
    let radial = thermal_reference::reference(RatingClass::RadialRoller);
    let thrust = thermal_reference::reference(RatingClass::ThrustRoller);
    Got::from([
        ("T_bearing_C", json!(to_celsius(radial.bearing))),
        ("T_ambient_C", json!(to_celsius(radial.ambient))),
        ("radial_load_fraction_C0", json!(radial.load_share.base())),
        ("nu70_radial_mm2s", json!(to_mm2_s(radial.nu70))),
        ("nu70_thrust_roller_mm2s", json!(to_mm2_s(thrust.nu70))),
    ])
}

fn minimum() -> Got {
    let of = |kind: BearingKind| {
        let row = super::work(
            "bearing-minimum-viscosity",
            &[("kind", kind.name().to_owned())],
        );
        let nu = super::number(&row, "nu");
        assert!((nu - to_mm2_s(minimum_viscosity(kind))).abs() < 1e-9);
        json!(nu)
    };
    assert_eq!(
        of(BearingKind::DeepGrooveBall),
        of(BearingKind::CylindricalRoller)
    );
    Got::from([
        (
            "ball_and_cylindrical_roller_mm2s",
            of(BearingKind::DeepGrooveBall),
        ),
        ("spherical_roller_mm2s", of(BearingKind::SphericalRoller)),
        (
            "spherical_thrust_mm2s",
            of(BearingKind::SphericalRollerThrust),
        ),
    ])
}

fn chart() -> Got {
    let words = |shift| match shift {
        -1 => "one grade lower",
        1 => "one grade higher",
        _ => "as read",
    };
    let (from, to) = grade_table::CHART_AMBIENT;
    assert_eq!(grade_table::chart_shift(celsius(15.0)), 0);
    Got::from([
        ("parameter", json!(grade_table::CHART_PARAMETER)),
        ("ambient_C", json!([from, to])),
        (
            "below_10C",
            json!(words(grade_table::chart_shift(celsius(5.0)))),
        ),
        (
            "above_25C",
            json!(words(grade_table::chart_shift(celsius(30.0)))),
        ),
    ])
}

fn chain() -> Got {
    let grades = [0.0, 20.0, 45.0, 55.0].map(|t| guidance::chain_grade(celsius(t)));
    let grades = grades.map(|g| g.expect("within -5 to 60 °C"));
    Got::from([
        ("SAE", Value::from(grades.map(|g| g.0).to_vec())),
        ("ISO_VG_approx", Value::from(grades.map(|g| g.1).to_vec())),
    ])
}
