//! Hertz contact, films, regimes, heating, starvation, film ratio and the needed viscosity.

use super::{Case, Got, number, work};
use filmwright::quantity::convert::{celsius, mm2_s, newtons, pascals, per_gpa};
use filmwright::quantity::{DynamicViscosity, Length, Measure, Ratio, Velocity};
use filmwright::relation::film::body::{Material, Radii, reduced_modulus};
use filmwright::relation::film::groups::{Inlet, PointLoad, of_ellipse};
use filmwright::relation::film::hertz::approximate::{self, Variant};
use filmwright::relation::film::regime;
use filmwright::relation::film::{ellipse, groups::Groups, hertz};
use filmwright::relation::oil::pressure_viscosity::{Family, agma_925, iso_15144, wooster};
use filmwright::relation::oil_fits::sae_viscosity;
use serde_json::json;

pub(super) fn worked(oracle: &str, case: &Case) -> Option<Got> {
    Some(match oracle {
        "e_prime" => modulus(case),
        "hertz_line" => hertz_line(case),
        "hertz_ellipse" => hertz_ellipse(case),
        "hertz_ellipse_approx" => hertz_approximate(case),
        "ehl_line" => film_line(case),
        "ehl_point" => film_point(case),
        "ehl_sb_exercise" => rolling_ball(case),
        "ehl_numeric_line" => numeric_line(case),
        "regimes_line" => regimes(case, true),
        "regimes_elliptical" => regimes(case, false),
        "thermal" => thermal(case),
        "starvation" => starvation(case),
        "lambda_ratio" => film_ratio(case),
        "eta_for_lambda_line" => needed(case),
        "alpha_models" => alpha(case),
        "walther" => walther(case),
        "sae_visc" => sae(case),
        _ => return None,
    })
}

fn modulus(case: &Case) -> Got {
    let with = [
        ("E1", case.with_unit("E1_Pa", "Pa")),
        ("poisson1", case.n("nu1").to_string()),
        ("E2", case.with_unit("E2_Pa", "Pa")),
        ("poisson2", case.n("nu2").to_string()),
    ];
    let e = number(&work("reduced-modulus", &with), "E_reduced");
    Got::from([("E_prime_Pa", json!(e * 1e9))])
}

/// Materials as the cases give them: the second body as the first.
fn materials(case: &Case) -> Vec<(&'static str, String)> {
    if case.maybe("E_prime_Pa").is_some() {
        return vec![("E_reduced", case.with_unit("E_prime_Pa", "Pa"))];
    }
    vec![
        ("E1", case.with_unit("E1_Pa", "Pa")),
        (
            "poisson1",
            case.maybe("nu1").map_or("0.3".into(), |v| v.to_string()),
        ),
    ]
}

fn hertz_line(case: &Case) -> Got {
    let mut with = materials(case);
    with.push(("load", case.with_unit("w_N_per_m", "N/m")));
    with.push(("radius", case.with_unit("R_m", "m")));
    let got = work("hertz-line", &with);
    Got::from([("pmax_Pa", json!(number(&got, "p_max") * 1e6))])
}

fn hertz_ellipse(case: &Case) -> Got {
    let mut with = materials(case);
    with.push(("load", case.with_unit("F_N", "N")));
    with.push(("rx", case.with_unit("Rx_m", "m")));
    with.push(("ry", case.with_unit("Ry_m", "m")));
    let row = work("hertz-ellipse", &with);
    let radii = Radii {
        x: Length::from_base(case.n("Rx_m")),
        y: Length::from_base(case.n("Ry_m")),
    };
    let e = pascals(case.n("E_prime_Pa"));
    let api = hertz::ellipse(newtons(case.n("F_N")), radii, e).expect("sound");
    // The row states the axes by size, the function by direction.
    assert!((number(&row, "a_long") / (api.a_long.base() * 1e6) - 1.0).abs() < 1e-12);
    Got::from([
        ("ax_m", json!(api.a_x.base())),
        ("ay_m", json!(api.a_y.base())),
        ("k", json!(number(&row, "k"))),
        ("pmax_Pa", json!(number(&row, "p_max") * 1e6)),
        ("delta_m", json!(number(&row, "delta") * 1e-6)),
    ])
}

fn hertz_approximate(case: &Case) -> Got {
    let variant = match case.text("variant") {
        "brewe_hamrock" => Variant::BreweHamrock,
        _ => Variant::HamrockBrewe,
    };
    let radii = Radii {
        x: Length::from_base(case.n("Rx_m")),
        y: Length::from_base(case.n("Ry_m")),
    };
    let e = pascals(case.n("E_prime_Pa"));
    let c = approximate::ellipse(newtons(case.n("F_N")), radii, e, variant).expect("sound");
    Got::from([
        ("ax_m", json!(c.a_x.base())),
        ("ay_m", json!(c.a_y.base())),
        ("k", json!(c.k.base())),
        ("pmax_Pa", json!(c.max_pressure.base())),
        ("delta_m", json!(c.approach.base())),
    ])
}

fn inlet(case: &Case) -> Vec<(&'static str, String)> {
    let mut with = materials(case);
    with.push(("eta", case.with_unit("eta_Pas", "Pa.s")));
    with.push(("alpha", case.with_unit("alpha_per_Pa", "1/Pa")));
    with.push(("speed", case.with_unit("u_mean_m_s", "m/s")));
    with
}

fn film_line(case: &Case) -> Got {
    let mut with = inlet(case);
    with.push(("load", case.with_unit("w_N_per_m", "N/m")));
    with.push(("radius", case.with_unit("R_m", "m")));
    let by = |form: &str| {
        let mut with = with.clone();
        with.push(("form", form.to_owned()));
        work("film-line", &with)
    };
    let (f68, f66) = (work("film-line", &with), by("1966"));
    let (dt, ph) = (by("dowson-toyoda"), by("pan-hamrock"));
    Got::from([
        ("U", json!(number(&f68, "U"))),
        ("G", json!(number(&f68, "G"))),
        ("W", json!(number(&f68, "W"))),
        ("hmin_DH1966_um", json!(number(&f66, "h_min"))),
        ("hmin_DH1968_um", json!(number(&f68, "h_min"))),
        ("hc_DowsonToyoda_um", json!(number(&dt, "h_central"))),
        ("hmin_PanHamrock_um", json!(number(&ph, "h_min"))),
        ("hc_PanHamrock_um", json!(number(&ph, "h_central"))),
    ])
}

fn film_point(case: &Case) -> Got {
    let mut with = inlet(case);
    with.push(("load", case.with_unit("F_N", "N")));
    with.push(("rx", case.with_unit("Rx_m", "m")));
    with.push(("ry", case.with_unit("Ry_m", "m")));
    let got = work("film-ellipse", &with);
    Got::from([
        ("U", json!(number(&got, "U"))),
        ("G", json!(number(&got, "G"))),
        ("W", json!(number(&got, "W"))),
        ("k", json!(number(&got, "k"))),
        ("hmin_um", json!(number(&got, "h_min"))),
        ("hc_um", json!(number(&got, "h_central"))),
    ])
}

/// A steel ball that has rolled down a slope. The book reduces the radius in both planes, takes
/// half the speed of the ball's centre and the ellipticity of 1977.
fn rolling_ball(case: &Case) -> Got {
    let r = case.n("d_m") / 2.0;
    let slope = case.n("slope_deg").to_radians();
    let (g, pi) = (9.81, std::f64::consts::PI);
    let volume = 4.0 / 3.0 * pi * r * r * r;
    let weight = volume * case.n("rho_ball") * g;
    let velocity = (2.0 * 5.0 / 7.0 * g * libm::sin(slope) * case.n("distance_m")).sqrt();
    let body = Material {
        youngs: pascals(case.n("E_Pa")),
        poisson: Ratio::from_base(case.n("nu")),
    };
    let inlet = Inlet {
        eta: DynamicViscosity::from_base(case.n("eta_Pas")),
        alpha: per_gpa(case.n("alpha_per_Pa") * 1e9),
        speed: Velocity::from_base(velocity / 2.0),
    };
    let half = Length::from_base(r / 2.0);
    let contact = PointLoad {
        load: newtons(weight * libm::cos(slope)),
        radii: Radii { x: half, y: half },
        modulus: reduced_modulus(body, body).expect("sound"),
    };
    let groups = of_ellipse(inlet, contact).expect("sound");
    let h = ellipse::minimum(groups, Ratio::from_base(1.0339), half);
    Got::from([("hmin_book_convention_um", json!(h.base() * 1e6))])
}

/// The closed form of the isoviscous-elastic regime against a numerical solution of the line
/// contact.
fn numeric_line(case: &Case) -> Got {
    let groups = groups(case);
    let radius = Length::from_base(1.0);
    let by = regime::line(groups, radius).expect("sound");
    assert_eq!(by.regime, regime::Regime::IsoviscousElastic);
    Got::from([("Hmin", json!(by.film.base()))])
}

fn groups(case: &Case) -> Groups {
    Groups {
        speed: Ratio::from_base(case.n("U")),
        material: Ratio::from_base(case.n("G")),
        load: Ratio::from_base(case.n("W")),
    }
}

fn regimes(case: &Case, line: bool) -> Got {
    let mut with: Vec<(&str, String)> = ["U", "G", "W"]
        .into_iter()
        .map(|key| (key, case.n(key).to_string()))
        .collect();
    let (by, scale) = if line {
        with.push(("radius", "1 m".into()));
        let by = regime::line(groups(case), Length::from_base(1.0));
        (by.expect("sound"), 1.0)
    } else {
        with.push(("rx", case.with_unit("Rx_m", "m")));
        with.push(("ry", case.with_unit("Ry_m", "m")));
        let rx = Length::from_base(case.n("Rx_m"));
        let ratio = Ratio::from_base(case.n("Ry_m") / case.n("Rx_m"));
        let by = regime::ellipse(groups(case), ratio, rx);
        (by.expect("sound"), case.n("Rx_m"))
    };
    let row = work("film-regime", &with);
    let short = match row["regime"].as_str().expect("a name") {
        "isoviscous-rigid" => "IR",
        "piezoviscous-rigid" => "VR",
        "isoviscous-elastic" => "IE",
        _ => "VE",
    };
    Got::from([
        ("gV", json!(number(&row, "g_v"))),
        ("gE", json!(number(&row, "g_e"))),
        ("regime", json!(short)),
        ("H", json!(number(&row, "h") * 1e-6 / scale)),
        ("hat_IR", json!(by.isoviscous_rigid.base())),
        ("hat_VR", json!(by.piezoviscous_rigid.base())),
        ("hat_IE", json!(by.isoviscous_elastic.base())),
        ("hat_VE", json!(by.piezoviscous_elastic.base())),
    ])
}

fn thermal(case: &Case) -> Got {
    let with = [
        ("beta", case.with_unit("beta_per_K", "1/K")),
        ("eta", case.with_unit("eta_Pas", "Pa.s")),
        ("speed", case.with_unit("u_mean_m_s", "m/s")),
        ("k_f", case.with_unit("kf_W_mK", "W/(m.K)")),
        ("slide_roll", case.n("S_slide_roll").to_string()),
        ("p_max", case.with_unit("pmax_Pa", "Pa")),
        ("E_reduced", case.with_unit("E_prime_Pa", "Pa")),
    ];
    let got = work("film-thermal", &with);
    Got::from([
        ("L", json!(number(&got, "L"))),
        ("phi_gupta", json!(number(&got, "phi_gupta"))),
        ("phi_murch_wilson", json!(number(&got, "phi_murch_wilson"))),
    ])
}

fn starvation(case: &Case) -> Got {
    let rx = case.n("Rx_m");
    let film = |key: &str| format!("{} m", case.n(key) * rx);
    let with = [
        ("h_central", film("Hc_flooded")),
        ("h_min", film("Hmin_flooded")),
        ("rx", case.with_unit("Rx_m", "m")),
        ("b", case.with_unit("b_m", "m")),
        ("m", case.n("m").to_string()),
    ];
    let got = work("film-starved", &with);
    Got::from([
        ("Hc", json!(number(&got, "h_central") * 1e-6 / rx)),
        ("Hmin", json!(number(&got, "h_min") * 1e-6 / rx)),
        ("mstar_c", json!(number(&got, "m_central"))),
        ("mstar_min", json!(number(&got, "m_min"))),
    ])
}

fn film_ratio(case: &Case) -> Got {
    let with = [
        ("h", case.with_unit("h_um", "um")),
        ("rq1", case.with_unit("Rq1_um", "um")),
        ("rq2", case.with_unit("Rq2_um", "um")),
    ];
    let got = work("film-ratio", &with);
    Got::from([
        ("composite_Rq_um", json!(number(&got, "sigma"))),
        ("lambda", json!(number(&got, "lambda"))),
        ("band", got["band"].clone()),
    ])
}

fn needed(case: &Case) -> Got {
    let mut with = materials(case);
    with.push(("speed", case.with_unit("u_mean_m_s", "m/s")));
    with.push(("load", case.with_unit("w_N_per_m", "N/m")));
    with.push(("radius", case.with_unit("R_m", "m")));
    with.push(("rq1", case.with_unit("Rq1_um", "um")));
    with.push(("rq2", case.with_unit("Rq2_um", "um")));
    with.push(("lambda", case.n("lambda_target").to_string()));
    let base = case.text("alpha_model").strip_prefix("agma925_");
    with.push(("base", base.expect("an AGMA 925 model").to_owned()));
    let got = work("film-viscosity", &with);
    Got::from([
        ("eta_required_Pas", json!(number(&got, "eta") * 1e-3)),
        ("alpha_per_Pa", json!(number(&got, "alpha") * 1e-9)),
        ("hmin_um", json!(number(&got, "h_min"))),
    ])
}

fn alpha(case: &Case) -> Got {
    let eta = DynamicViscosity::from_base(case.n("eta_mPas") * 1e-3);
    // The cases give the viscosity at 38 °C, where the ISO temperature factor is 1.
    let iso = |family| {
        let alpha = iso_15144(family, eta, celsius(38.0)).expect("a family it knows");
        json!(alpha.base())
    };
    let agma = agma_925(Family::Mineral, eta).expect("mineral").base();
    let by_wooster = wooster(Family::Mineral, eta).expect("mineral").base();
    Got::from([
        ("alpha_iso_mineral", iso(Family::Mineral)),
        ("alpha_iso_pao", iso(Family::Pao)),
        ("alpha_iso_pag", iso(Family::Pag)),
        ("alpha_agma_mineral", json!(agma)),
        ("alpha_wooster", json!(by_wooster)),
    ])
}

fn walther(case: &Case) -> Got {
    use filmwright::relation::oil::viscosity_temperature::{Line, Point};
    let point = |t: f64, nu: &str| Point::new(celsius(t), mm2_s(case.n(nu)));
    let line = Line::through(point(40.0, "nu40_mm2s"), point(100.0, "nu100_mm2s"));
    let line = line.expect("two points");
    let at = celsius(case.n("t_C"));
    Got::from([
        ("nu_mm2s", json!(line.nu_at(at).base() * 1e6)),
        ("beta_per_K", json!(line.beta(at).base())),
    ])
}

fn sae(case: &Case) -> Got {
    #[expect(
        clippy::cast_possible_truncation,
        clippy::cast_sign_loss,
        reason = "SAE numbers are small whole numbers"
    )]
    let grade = case.n("grade") as u32;
    let eta = sae_viscosity(grade, celsius(case.n("t_C"))).expect("a grade it knows");
    Got::from([("eta_Pas", json!(eta.base()))])
}
