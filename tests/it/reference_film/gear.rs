//! Gears, bevel gears and worms.

use super::{Case, Got, number, work, work_json};
use filmwright::quantity::convert::{degrees, mm, number as pure, pascals, rpm};
use filmwright::quantity::{Measure, Power, Velocity};
use filmwright::relation::gear::geometry::{Mesh, Teeth};
use filmwright::relation::gear::load::{tangential_force, torque_of};
use filmwright::relation::gear::path::{Path, Point, Tips};
use filmwright::relation::gear::temperature::{SlidingContact, ThermalContact, flash, flash_blok};
use serde_json::{Map, Value, json};

pub(super) fn worked(oracle: &str, case: &Case) -> Option<Got> {
    Some(match oracle {
        "gear_points" => points(case),
        "gear_film" => film(case),
        "gear_loss" => loss(case),
        "gear_flash" => flashes(case),
        "gear_power_kinematics" => force(case),
        "agma_rule" => rule(case),
        "bevel" => bevel(case),
        "worm" | "worm_dT" => worm(case),
        _ => return None,
    })
}

fn mesh(case: &Case) -> Mesh {
    let teeth = Teeth {
        z1: pure(case.n("z1")),
        z2: pure(case.n("z2")),
        normal_module: mm(case.n("mn_mm")),
        helix: degrees(case.maybe("beta_deg").unwrap_or(0.0)),
        pressure_angle: degrees(case.maybe("alpha_n_deg").unwrap_or(20.0)),
    };
    Mesh::standard(teeth).expect("a pair")
}

fn points(case: &Case) -> Got {
    let mesh = mesh(case);
    let path = Path::new(&mesh, Tips::standard(&mesh)).expect("a path");
    let named = Point::ALL.iter().find(|(n, _)| *n == case.text("point"));
    let at = path.at(named.expect("a point").1, rpm(case.n("n1_rpm")));
    let mut with = pair(case);
    with.retain(|(key, _)| *key != "torque1");
    with.push(("point", case.text("point").to_owned()));
    let got = work("gear-path-point", &with);
    Got::from([
        ("g_mm", json!(at.from_a.base() * 1e3)),
        ("rho_t1_mm", json!(number(&got, "rho1"))),
        ("rho_t2_mm", json!(number(&got, "rho2"))),
        ("rho_n_mm", json!(number(&got, "rho_n"))),
        ("v1_m_s", json!(number(&got, "v1"))),
        ("v2_m_s", json!(number(&got, "v2"))),
        ("v_sum_m_s", json!(number(&got, "v_sum"))),
        ("v_slide_m_s", json!(number(&got, "v_slide"))),
    ])
}

fn pair(case: &Case) -> Vec<(&'static str, String)> {
    vec![
        ("z1", case.n("z1").to_string()),
        ("z2", case.n("z2").to_string()),
        ("normal_module", case.with_unit("mn_mm", "mm")),
        (
            "helix",
            format!("{} deg", case.maybe("beta_deg").unwrap_or(0.0)),
        ),
        ("face_width", case.with_unit("b_mm", "mm")),
        ("speed1", case.with_unit("n1_rpm", "r/min")),
        ("torque1", case.with_unit("T1_Nm", "N.m")),
    ]
}

fn film(case: &Case) -> Got {
    let pitch = work("gear-pitch-point", &pair(case));
    let mut with: Map<String, Value> = pair(case)
        .into_iter()
        .map(|(k, v)| (k.to_owned(), Value::String(v)))
        .collect();
    let oil = ["40", "100"].map(|t| {
        let nu = case.n(&format!("nu{t}_mm2s"));
        Value::String(format!("{nu} mm2/s at {t} degC"))
    });
    with.insert("oil".into(), Value::from(oil.to_vec()));
    for (key, value) in [
        ("density15", case.with_unit("rho15", "kg/m3")),
        ("at", case.with_unit("t_M_C", "degC")),
        ("ra1", case.with_unit("Ra1_um", "um")),
        ("ra2", case.with_unit("Ra2_um", "um")),
        ("load_factor", case.n("K_total").to_string()),
        ("load_share", case.n("X").to_string()),
    ] {
        with.insert(key.into(), Value::String(value));
    }
    let got = work_json("gear-film", &with);
    let v_t = number(&pitch, "v_t");
    let rule = work("gear-grade-rule", &[("v_t", format!("{v_t} m/s"))]);
    Got::from([
        ("v_t_m_s", json!(v_t)),
        ("F_t_N", json!(number(&pitch, "f_t"))),
        ("rho_nC_mm", json!(number(&pitch, "rho_n"))),
        ("p_MPa", json!(number(&got, "p_h"))),
        ("nu_mm2s", json!(number(&got, "nu"))),
        ("eta_Pas", json!(number(&got, "eta") * 1e-3)),
        ("alpha_iso_per_Pa", json!(number(&got, "alpha") * 1e-9)),
        ("h_iso15144_um", json!(number(&got, "h_min"))),
        ("lambda_GF", json!(number(&got, "lambda"))),
        ("hc_agma925_um", json!(number(&got, "h_central"))),
        ("lambda_agma_rq", json!(number(&got, "lambda_rq"))),
        ("nu40_rule_mm2s", json!(number(&rule, "nu40"))),
    ])
}

fn loss(case: &Case) -> Got {
    let mut with = pair(case);
    with.push(("eta", case.with_unit("eta_mPas", "mPa.s")));
    with.push(("ra", case.with_unit("Ra_um", "um")));
    with.push(("dip1", case.with_unit("he1_mm", "mm")));
    with.push(("dip2", case.with_unit("he2_mm", "mm")));
    let got = work("gear-loss", &with);
    Got::from([
        ("H_v", json!(number(&got, "h_v"))),
        ("mu_mz", json!(number(&got, "mu"))),
        ("P_in_W", json!(number(&got, "power_in"))),
        ("P_mesh_W", json!(number(&got, "mesh"))),
        ("T_churn_Nm", json!(number(&got, "churning_torque"))),
        ("P_churn_W", json!(number(&got, "churning"))),
    ])
}

fn flashes(case: &Case) -> Got {
    let contact = SlidingContact {
        mu: pure(case.n("mu")),
        pressure: pascals(case.n("p_MPa") * 1e6),
        v1: Velocity::from_base(case.n("v1_m_s")),
        v2: Velocity::from_base(case.n("v2_m_s")),
        rho_n: mm(case.n("rho_mm")),
        // Steel on steel, 206 GPa and 0.3.
        modulus: pascals(206e9 / (1.0 - 0.09)),
        thermal: ThermalContact(case.n("BM")),
    };
    Got::from([
        (
            "flash_iso15144_K",
            json!(flash(contact).expect("sound").base()),
        ),
        (
            "flash_blok_K",
            json!(flash_blok(contact).expect("sound").base()),
        ),
    ])
}

fn force(case: &Case) -> Got {
    let torque = torque_of(Power::from_base(case.n("P_W")), rpm(case.n("n1_rpm")));
    let force = tangential_force(torque.expect("sound"), mm(case.n("d1_mm")));
    Got::from([("F_t_N", json!(force.expect("sound").base()))])
}

fn rule(case: &Case) -> Got {
    // The rule's own conversion between feet and metres.
    let v = case.n("v_ft_min") * 0.005_08;
    let got = work("gear-grade-rule", &[("v_t", format!("{v} m/s"))]);
    Got::from([
        ("v_ft_min", json!(v / 0.005_08)),
        ("nu40_mm2s", json!(number(&got, "nu40"))),
    ])
}

fn bevel(case: &Case) -> Got {
    let with = [
        ("z1", case.n("z1").to_string()),
        ("z2", case.n("z2").to_string()),
        ("mean_normal_module", case.with_unit("mmn_mm", "mm")),
        ("face_width", "40 mm".to_owned()),
    ];
    let got = work("bevel-virtual", &with);
    // u_v = u^2 for shafts at a right angle
    let u = case.n("z2") / case.n("z1");
    assert!((number(&got, "z2") / number(&got, "z1") / (u * u) - 1.0).abs() < 1e-12);
    Got::from([
        ("delta1", json!(number(&got, "delta1"))),
        ("delta2", json!(number(&got, "delta2"))),
    ])
}

fn worm(case: &Case) -> Got {
    let mut with = vec![
        ("worm_diameter", case.with_unit("d1_mm", "mm")),
        ("speed", case.with_unit("n1_rpm", "r/min")),
        ("lead_angle", case.with_unit("lead_deg", "deg")),
    ];
    let sliding = number(&work("worm-sliding", &with), "v_g");
    with.push(("pressure_angle", case.with_unit("alpha_n_deg", "deg")));
    if let Some(mu) = case.maybe("mu") {
        with.push(("mu", mu.to_string()));
    }
    if case.maybe("P_W").is_some() {
        with.push(("power", case.with_unit("P_W", "W")));
        with.push(("k", case.with_unit("k_W_m2K", "W/(m2.K)")));
        with.push(("area", case.with_unit("A_m2", "m2")));
    }
    let got = work("worm-efficiency", &with);
    let mut all = Got::from([
        ("v_slide_m_s", json!(sliding)),
        ("v_slide_ft_min", json!(sliding * 60.0 / 0.3048)),
        ("mu", json!(number(&got, "mu"))),
        ("efficiency", json!(number(&got, "efficiency"))),
    ]);
    if got.contains_key("rise") {
        all.insert("dT_K", json!(number(&got, "rise")));
    }
    all
}
