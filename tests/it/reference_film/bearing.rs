//! Rolling bearings and grease.

use super::{Case, Got, number, work, work_json};
use filmwright::quantity::convert::{degrees, mm, newtons, pascals, per_gpa, rpm};
use filmwright::quantity::{DynamicViscosity, Length, Measure, Ratio};
use filmwright::relation::bearing::kinematics::{Inside, Race};
use filmwright::relation::bearing::reference_viscosity::film_ratio;
use filmwright::relation::film::body::Radii;
use filmwright::relation::film::ellipse;
use filmwright::relation::film::groups::{Inlet, PointLoad, of_ellipse};
use serde_json::{Map, Value, json};

pub(super) fn worked(oracle: &str, case: &Case) -> Option<Got> {
    Some(match oracle {
        "nu1" => nu1(case),
        "kappa_lambda" => kappa_lambda(case),
        "a_iso" => life_factor(case),
        "e_c" => contamination(case),
        "cu" => fatigue_limit(case),
        "l10h" => life(case),
        "bearing_life" => machine(case),
        "bearing_film_elliptic_as_roller" => elliptic_roller(case),
        "bearing_film" => film(case),
        "palmgren" => friction(case),
        "relube" => grease(case),
        _ => return None,
    })
}

fn nu1(case: &Case) -> Got {
    let with = [
        ("speed", case.with_unit("n_rpm", "r/min")),
        ("pitch_diameter", case.with_unit("Dpw_mm", "mm")),
        ("nu", case.with_unit("nu_mm2s", "mm2/s")),
    ];
    let nu1 = work("bearing-nu1", &with[..2]);
    let kappa = number(&work("bearing-kappa", &with), "kappa");
    let lambda = film_ratio(Ratio::from_base(kappa)).expect("above zero");
    Got::from([
        ("nu1_mm2s", json!(number(&nu1, "nu1"))),
        ("kappa", json!(kappa)),
        ("lambda_equiv", json!(lambda.base())),
    ])
}

fn kappa_lambda(case: &Case) -> Got {
    let there = work("kappa-lambda", &[("lambda", case.n("lambda").to_string())]);
    let kappa = number(&there, "kappa");
    let back = work("kappa-lambda", &[("kappa", kappa.to_string())]);
    Got::from([
        ("kappa", json!(kappa)),
        ("lambda_back", json!(number(&back, "lambda"))),
    ])
}

fn class(case: &Case) -> String {
    case.text("bearing_class").replace('_', "-")
}

fn life_factor(case: &Case) -> Got {
    let mut with = vec![
        ("class", class(case)),
        ("kappa", case.n("kappa").to_string()),
        ("x", case.n("eC_Cu_over_P").to_string()),
    ];
    if case.inputs.get("ep") == Some(&Value::Bool(true)) {
        with.push(("ep", "yes".into()));
        with.push(("e_c", case.n("eC").to_string()));
    }
    let got = work("bearing-life-factor", &with);
    Got::from([("a_iso", json!(number(&got, "a_iso")))])
}

fn contamination(case: &Case) -> Got {
    let kappa = case.n("kappa").to_string();
    Got::from([("e_C", json!(e_c(case, kappa)))])
}

fn e_c(case: &Case, kappa: String) -> f64 {
    let with = [
        ("method", case.text("method").replace('_', "-")),
        ("cleanliness", case.text("cleanliness").replace('_', "-")),
        ("kappa", kappa),
        ("pitch_diameter", case.with_unit("Dpw_mm", "mm")),
    ];
    number(&work("bearing-contamination", &with), "e_c")
}

fn fatigue_limit(case: &Case) -> Got {
    Got::from([("Cu_N", json!(c_u(case, case.text("kind"))))])
}

fn c_u(case: &Case, kind: &str) -> f64 {
    let with = [
        ("class", format!("radial-{kind}")),
        ("c0", case.with_unit("C0_N", "N")),
        ("pitch_diameter", case.with_unit("Dpw_mm", "mm")),
    ];
    number(&work("bearing-fatigue-limit", &with), "c_u")
}

fn life(case: &Case) -> Got {
    let with = [
        ("class", "radial-ball".to_owned()),
        ("c", case.with_unit("C_N", "N")),
        ("p", case.with_unit("P_N", "N")),
        ("speed", case.with_unit("n_rpm", "r/min")),
    ];
    let got = work("bearing-life", &with);
    Got::from([("L10h_h", json!(number(&got, "l10h")))])
}

/// A bearing of a machine from the oil's viscosity to its modified life.
fn machine(case: &Case) -> Got {
    let mut oil = Map::new();
    let points = ["40", "100"].map(|t| {
        let nu = case.n(&format!("nu{t}_mm2s"));
        Value::String(format!("{nu} mm2/s at {t} degC"))
    });
    oil.insert("points".into(), Value::from(points.to_vec()));
    oil.insert("at".into(), case.with_unit("t_C", "degC").into());
    let nu = number(&work_json("viscosity-at", &oil), "nu");
    let size = [
        ("speed", case.with_unit("n_rpm", "r/min")),
        ("pitch_diameter", case.with_unit("Dpw_mm", "mm")),
        ("nu", format!("{nu} mm2/s")),
    ];
    let kappa = work("bearing-kappa", &size);
    let (kappa, nu1) = (number(&kappa, "kappa"), number(&kappa, "nu1"));
    let e_c = e_c(case, kappa.to_string());
    let c_u = c_u(case, case.text("cu_kind"));
    let mut factor = vec![
        ("class", class(case)),
        ("kappa", kappa.to_string()),
        ("e_c", e_c.to_string()),
        ("c_u", format!("{c_u} N")),
        ("p", case.with_unit("P_N", "N")),
    ];
    if case.inputs.get("ep") == Some(&Value::Bool(true)) {
        factor.push(("ep", "yes".into()));
    }
    let a_iso = number(&work("bearing-life-factor", &factor), "a_iso");
    let life = work(
        "bearing-life",
        &[
            ("class", class(case)),
            ("c", case.with_unit("C_N", "N")),
            ("p", case.with_unit("P_N", "N")),
            ("speed", case.with_unit("n_rpm", "r/min")),
            ("a_iso", a_iso.to_string()),
        ],
    );
    Got::from([
        ("nu_mm2s", json!(nu)),
        ("nu1_mm2s", json!(nu1)),
        ("kappa", json!(kappa)),
        ("e_C", json!(e_c)),
        ("Cu_N", json!(c_u)),
        ("a_iso", json!(a_iso)),
        ("L10h_h", json!(number(&life, "l10h"))),
        ("Lnmh_h", json!(number(&life, "lnmh"))),
        ("nu_for_kappa1_mm2s", json!(nu1)),
        ("nu_for_kappa2_mm2s", json!(2.0 * nu1)),
    ])
}

/// The cylindrical roller example of NASA RP-1126, which takes the formula for elliptical
/// contacts at its limit of a line.
fn elliptic_roller(case: &Case) -> Got {
    let inside = Inside {
        pitch_diameter: mm(case.n("dm_mm")),
        element_diameter: mm(case.n("Dw_mm")),
        contact_angle: degrees(0.0),
    };
    let speed = inside
        .rolling_speed(rpm(case.n("n_i_rpm")))
        .expect("a bearing");
    let at = |race| {
        let x = inside.rolling_radius(race).expect("a bearing");
        let inlet = Inlet {
            eta: DynamicViscosity::from_base(case.n("eta_Pas")),
            alpha: per_gpa(case.n("alpha_per_Pa") * 1e9),
            speed,
        };
        let contact = PointLoad {
            load: newtons(case.n("Q_N")),
            radii: Radii {
                x,
                y: Length::from_base(f64::INFINITY),
            },
            modulus: pascals(case.n("E_prime_Pa")),
        };
        let groups = of_ellipse(inlet, contact).expect("sound");
        let h = ellipse::minimum(groups, Ratio::from_base(f64::INFINITY), x);
        (groups.speed.base(), h.base() * 1e6)
    };
    let (inner, outer) = (at(Race::Inner), at(Race::Outer));
    Got::from([
        ("u_mean_m_s", json!(speed.base())),
        ("U_i", json!(inner.0)),
        ("hmin_i_um", json!(inner.1)),
        ("U_o", json!(outer.0)),
        ("hmin_o_um", json!(outer.1)),
    ])
}

fn film(case: &Case) -> Got {
    let mut with = vec![
        ("element", case.text("kind").to_owned()),
        ("pitch_diameter", case.with_unit("dm_mm", "mm")),
        ("element_diameter", case.with_unit("Dw_mm", "mm")),
        ("speed", case.with_unit("n_i_rpm", "r/min")),
        ("load", case.with_unit("Fr_N", "N")),
        ("elements", case.n("Z").to_string()),
        ("eta", case.with_unit("eta_Pas", "Pa.s")),
        ("alpha", case.with_unit("alpha_per_Pa", "1/Pa")),
        ("ring_roughness", case.with_unit("Rq_ring_um", "um")),
        ("element_roughness", case.with_unit("Rq_element_um", "um")),
    ];
    if case.text("kind") == "roller" {
        with.push(("element_length", case.with_unit("Lw_mm", "mm")));
    } else {
        with.push(("conformity", case.n("f").to_string()));
    }
    let got = work("bearing-film", &with);
    Got::from([
        ("u_mean_m_s", json!(number(&got, "u"))),
        ("Q_max_N", json!(number(&got, "q_max"))),
        ("hmin_i_um", json!(number(&got, "h_inner"))),
        ("hmin_o_um", json!(number(&got, "h_outer"))),
        ("pmax_i_Pa", json!(number(&got, "p_inner") * 1e6)),
        ("pmax_o_Pa", json!(number(&got, "p_outer") * 1e6)),
        ("lambda_i", json!(number(&got, "lambda_inner"))),
        ("lambda_o", json!(number(&got, "lambda_outer"))),
    ])
}

fn friction(case: &Case) -> Got {
    let with = [
        ("f0", case.n("f0").to_string()),
        ("f1", case.n("f1").to_string()),
        ("nu", case.with_unit("nu_mm2s", "mm2/s")),
        ("speed", case.with_unit("n_rpm", "r/min")),
        ("pitch_diameter", case.with_unit("dm_mm", "mm")),
        ("load", case.with_unit("P1_N", "N")),
    ];
    let got = work("bearing-friction", &with);
    let (m0, m1) = (number(&got, "m0") * 1e3, number(&got, "m1") * 1e3);
    Got::from([
        ("M0_Nmm", json!(m0)),
        ("M1_Nmm", json!(m1)),
        ("M_Nmm", json!(m0 + m1)),
        ("P_W", json!(number(&got, "power"))),
    ])
}

fn grease(case: &Case) -> Got {
    let interval = [
        ("k", case.n("k").to_string()),
        ("speed", case.with_unit("n_rpm", "r/min")),
        ("bore", case.with_unit("d_mm", "mm")),
        ("temperature", case.with_unit("t_C", "degC")),
    ];
    let interval = work("grease-interval", &interval);
    let amount = [
        ("outside", case.with_unit("D_mm", "mm")),
        ("width", case.with_unit("B_mm", "mm")),
    ];
    let amount = work("grease-amount", &amount);
    Got::from([
        ("t_f_70C_h", json!(number(&interval, "interval_70"))),
        ("t_f_h", json!(number(&interval, "interval"))),
        ("grease_g", json!(number(&amount, "mass"))),
        ("dn_mm_rpm", json!(case.n("d_mm") * case.n("n_rpm"))),
    ])
}
