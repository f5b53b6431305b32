//! The relations of the oil against `tests/reference/viscosity_checks.json`: through the batch
//! where a row exists, through the library otherwise.

use crate::checks::{Case, Tally, answer, numbers, work};
use filmwright::quantity::convert::{
    celsius, dynamic, kinematic, mm2_s, number, to_celsius, to_mm2_s, to_mpa_s,
};
use filmwright::quantity::show::exact;
use filmwright::quantity::{DynamicViscosity, Efflux, MassDensity, Measure, Pressure};
use filmwright::relation::oil::density::DensityLaw;
use filmwright::relation::oil::efflux::Instrument;
use filmwright::relation::oil::pressure_viscosity::{
    Family, agma_925, gold, iso_15144, so_klaus, wooster,
};
use filmwright::relation::oil::sae_engine::{self, EngineOil, Measured};
use filmwright::relation::oil::start_limit::{Density, temperature_at_dynamic};
use filmwright::relation::oil::viscosity_temperature::{Form, Line, Point, Weights};
use filmwright::relation::oil::{d341_z, density_2004, sae_gear, viscosity_index};
use serde_json::{Map, Value, json};

static CHECKS: &str = include_str!("../reference/viscosity_checks.json");

#[test]
fn every_published_value_is_met() {
    let checks: Value = serde_json::from_str(CHECKS).expect("the checks are JSON");
    let mut tally = Tally::default();
    for case in checks["cases"].as_array().expect("a list of cases") {
        let case = Case::read(case);
        tally.compare(&case, &got(&case));
    }
    tally.finish();
}

fn got(case: &Case) -> Value {
    match case.topic {
        "viscosity_index" => index(case),
        "vi_inverse" => index_inverse(case),
        "iso_vg" => iso_vg(case),
        "agma" => agma(case),
        "saybolt" | "saybolt_furol" | "engler_redwood" => efflux(case),
        "d341" => d341(case),
        "d341_low_viscosity" => d341_low(case),
        "real_fluid_d341" => real_fluid(case),
        "density_d1250" => density(case),
        "blend" => blend(case),
        "pressure_viscosity" => alpha(case),
        "pressure_viscosity_measured" => alpha_measured(case),
        "sae_j300" => j300(case),
        "sae_j306" => j306(case),
        "shear" => shear(case),
        "polymer_model" => polymer(case),
        "temporary_shear" => temporary_shear(case),
        "d6080" => d6080(case),
        "low_temperature" => start(case),
        topic => panic!("{}: no test for topic {topic}", case.id),
    }
}

fn mm2(value: f64) -> String {
    format!("{value} mm2/s")
}

fn deg_c(value: f64) -> String {
    format!("{value} degC")
}

/// Points as `work` takes them.
fn points(pairs: &[(f64, f64)]) -> Value {
    let item = |(t, nu): &(f64, f64)| json!(format!("{nu} mm2/s at {t} degC"));
    Value::Array(pairs.iter().map(item).collect())
}

fn plain(pairs: &[(f64, f64)]) -> Vec<Point> {
    let point = |(t, nu): &(f64, f64)| Point::new(celsius(*t), mm2_s(*nu));
    pairs.iter().map(point).collect()
}

fn two(case: &Case) -> [(f64, f64); 2] {
    [
        (case.number("t1_C"), case.number("kv1_mm2_s")),
        (case.number("t2_C"), case.number("kv2_mm2_s")),
    ]
}

fn line(pairs: &[(f64, f64)]) -> Line {
    Line::fit(&plain(pairs), Weights::PerCent).expect("points fall")
}

fn index(case: &Case) -> Value {
    if case.has("vi_unrounded_examples") {
        let round = |vi: &f64| viscosity_index::whole(number(*vi)).base();
        let rounded: Vec<f64> = case
            .numbers("vi_unrounded_examples")
            .iter()
            .map(round)
            .collect();
        return json!({ "vi_rounded": rounded });
    }
    let nu100 = case.number("kv100_mm2_s");
    if !case.has("kv40_mm2_s") {
        let pair = viscosity_index::references(mm2_s(nu100)).expect("2 mm2/s or more");
        return json!({ "L": exact(to_mm2_s(pair.l)), "H": exact(to_mm2_s(pair.h)) });
    }
    let with = json!({ "nu40": mm2(case.number("kv40_mm2_s")), "nu100": mm2(nu100) });
    let answer = answer("viscosity-index", &with);
    if answer["error"]["name"] == "index-not-defined" {
        return json!({ "vi": null });
    }
    let result = &answer["result"];
    json!({
        "vi_unrounded": result["vi"]["value"], "vi_rounded": result["vi_rounded"]["value"],
        "L": result["L"]["value"], "H": result["H"]["value"],
    })
}

fn index_inverse(case: &Case) -> Value {
    let vi = case.number("vi");
    if case.has("kv100_mm2_s") {
        let with = json!({ "nu100": mm2(case.number("kv100_mm2_s")), "vi": vi });
        return json!({ "kv40_mm2_s": work("nu40-from-index", &with)["nu40"] });
    }
    let with = json!({ "nu40": mm2(case.number("kv40_mm2_s")), "vi": vi });
    let answer = answer("nu100-from-index", &with);
    json!({ "kv100_mm2_s": answer["result"]["nu100"]["value"] })
}

fn iso_vg(case: &Case) -> Value {
    if case.has("iso_vg") {
        let got = work(
            "iso-grade-limits",
            &json!({ "grade": case.number("iso_vg") }),
        );
        return json!({
            "midpoint_mm2_s": got["midpoint"], "min_mm2_s": got["min"], "max_mm2_s": got["max"],
        });
    }
    let got = work(
        "iso-grade",
        &json!({ "nu40": mm2(case.number("kv40_mm2_s")) }),
    );
    json!({ "iso_vg": got["grade"] })
}

fn agma(case: &Case) -> Value {
    let got = work("agma-grade", &json!({ "number": case.text("agma_number") }));
    if got["at"] == json!(100.0) {
        return json!({ "kv100_min_mm2_s": got["min"], "kv100_max_mm2_s": got["max"] });
    }
    json!({
        "iso_vg": got["iso_grade"], "kv40_min_mm2_s": got["min"], "kv40_max_mm2_s": got["max"],
    })
}

fn efflux(case: &Case) -> Value {
    let at = || format!("{} degF", case.number("t_F"));
    let older = |instrument: Instrument, key: &str| {
        let nu = instrument
            .viscosity(Efflux(case.number(key)))
            .expect("in range");
        json!({ "kv_mm2_s": to_mm2_s(nu) })
    };
    let by_work = |relation: &str, key: &str, reading: String| {
        let got = work(relation, &json!({ key: reading }));
        json!({ "kv_mm2_s": got["nu"] })
    };
    let furol = case.topic == "saybolt_furol";
    if case.has("kv_mm2_s") {
        let with = json!({ "nu": mm2(case.number("kv_mm2_s")), "at": at() });
        let (relation, name, field) = if furol {
            ("furol", "sfs", "sfs_s")
        } else {
            ("saybolt", "sus", "sus_s")
        };
        return json!({ field: work(relation, &with)[name] });
    }
    if case.has("sus_s") || case.has("sfs_s") {
        let (relation, name, key, unit) = if furol {
            ("furol-to-nu", "sfs", "sfs_s", "SFS")
        } else {
            ("saybolt-to-nu", "sus", "sus_s", "SUS")
        };
        let with = json!({ name: format!("{} {unit}", case.number(key)), "at": at() });
        return json!({ "kv_mm2_s": work(relation, &with)["nu"] });
    }
    if case.has("ssu_s") {
        older(Instrument::SayboltOlder, "ssu_s")
    } else if case.has("ssf_s") {
        older(Instrument::FurolOlder, "ssf_s")
    } else if case.has("engler_deg") {
        by_work(
            "engler-to-nu",
            "engler",
            format!("{} degE", case.number("engler_deg")),
        )
    } else if case.has("redwood_no1_s") {
        let reading = format!("{} s Redwood", case.number("redwood_no1_s"));
        by_work("redwood-to-nu", "redwood", reading)
    } else {
        let reading = format!("{} s Redwood 2", case.number("redwood_no2_s"));
        by_work("redwood-to-nu", "redwood", reading)
    }
}

fn d341(case: &Case) -> Value {
    if case.has("target_kv_mm2_s") {
        let with = json!({
            "points": points(&two(case)), "nu": mm2(case.number("target_kv_mm2_s")),
        });
        return json!({ "t_C": work("temperature-at", &with)["temperature"] });
    }
    if case.has("weights") {
        return equal_weights(case);
    }
    let pairs = two(case);
    let mut nus = Map::new();
    let mut constants = Map::new();
    for t in case.expect["kv_mm2_s"]
        .as_object()
        .expect("by temperature")
        .keys()
    {
        let with = json!({ "points": points(&pairs), "at": format!("{t} degC") });
        let got = work("viscosity-at", &with);
        nus.insert(t.clone(), got["nu"].clone());
        constants = got;
    }
    json!({ "A": constants["A"], "B": constants["B"], "kv_mm2_s": nus })
}

fn equal_weights(case: &Case) -> Value {
    let (ts, nus) = (case.numbers("t_C"), case.numbers("kv_mm2_s"));
    let pairs: Vec<(f64, f64)> = ts.iter().copied().zip(nus).collect();
    let with = json!({ "points": points(&pairs), "at": "40 degC", "weights": "equal" });
    let got = work("viscosity-at", &with);
    let line = Line::fit(&plain(&pairs), Weights::Equal).expect("points fall");
    let residuals = line.residuals(&plain(&pairs));
    let by_t: Map<String, Value> = ts
        .iter()
        .zip(residuals)
        .map(|(t, r)| (format!("{t}"), json!(r.base())))
        .collect();
    json!({ "A": got["A"], "B": got["B"], "rel_residual": by_t })
}

fn d341_low(case: &Case) -> Value {
    if case.has("kv_mm2_s") {
        let nu = mm2_s(case.number("kv_mm2_s"));
        let z = d341_z::z_2009(nu);
        return json!({
            "Z_d341_09": z.base(),
            "Z_d341_93": d341_z::z_1993(nu).base(),
            "kv_back_from_approx_inverse": to_mm2_s(d341_z::approximate_viscosity(z)),
        });
    }
    let pairs = two(case);
    let full = line(&pairs);
    let short = Line::fit_as(&plain(&pairs), Weights::PerCent, Form::Short).expect("points fall");
    let wanted = case.expect["kv_mm2_s_exact_inverse"].as_object();
    let (mut exact, mut approximate, mut compared) = (Map::new(), Map::new(), Map::new());
    let mut constants = Map::new();
    for t in wanted.expect("by temperature").keys() {
        let at = celsius(t.parse().expect("a temperature"));
        let with = json!({ "points": points(&pairs), "at": format!("{t} degC") });
        constants = work("viscosity-at", &with);
        exact.insert(t.clone(), constants["nu"].clone());
        let approximately = to_mm2_s(d341_z::approximate_viscosity(full.z_at(at)));
        approximate.insert(t.clone(), json!(approximately));
        compared.insert(t.clone(), json!(to_mm2_s(short.nu_at(at))));
    }
    json!({
        "A": constants["A"], "B": constants["B"], "kv_mm2_s_exact_inverse": exact,
        "kv_mm2_s_approx_inverse": approximate, "kv_mm2_s_short_form_for_comparison": compared,
    })
}

/// Data by temperature, as `(t, value)`.
fn by_temperature(map: &Value) -> Vec<(f64, f64)> {
    let fields = map.as_object().expect("by temperature");
    fields
        .iter()
        .map(|(t, v)| {
            (
                t.parse().expect("a temperature"),
                v.as_f64().expect("a number"),
            )
        })
        .collect()
}

/// Kinematic viscosities of an oil of which dynamic ones and the density are known.
fn from_dynamic(case: &Case) -> Vec<(f64, f64)> {
    let rho15 = MassDensity::from_base(case.number("assumed_rho15_kg_m3"));
    let law = DensityLaw::LubricatingOil;
    let nu = |(t, mu): &(f64, f64)| {
        let eta = DynamicViscosity::from_base(mu * 1e-3);
        (
            *t,
            to_mm2_s(kinematic(eta, law.density(rho15, celsius(*t)))),
        )
    };
    by_temperature(&case.inputs["mu_mPas"])
        .iter()
        .map(nu)
        .collect()
}

fn real_fluid(case: &Case) -> Value {
    let data = if case.has("mu_mPas") {
        from_dynamic(case)
    } else {
        by_temperature(&case.inputs["kv_mm2_s"])
    };
    let ends = case.numbers("fit_points_C");
    let chosen: Vec<(f64, f64)> = data
        .iter()
        .copied()
        .filter(|(t, _)| ends.iter().any(|e| (e - t).abs() < 1e-9))
        .collect();
    let short = Line::fit_as(&plain(&chosen), Weights::PerCent, Form::Short).expect("points fall");
    let chosen_form = line(&chosen);
    let miss = |line: Line, (t, nu): (f64, f64)| to_mm2_s(line.nu_at(celsius(t))) / nu - 1.0;
    let worst = |line: Line, within: &dyn Fn(f64) -> bool| {
        let errors = data.iter().filter(|(t, _)| within(*t));
        errors.map(|p| miss(line, *p).abs()).fold(0.0, f64::max)
    };
    if case.has("predict_C") {
        let at = case.number("predict_C");
        let point = data
            .iter()
            .find(|(t, _)| (t - at).abs() < 1e-9)
            .expect("a datum");
        return json!({ "rel_error_60C": miss(chosen_form, *point) });
    }
    if case.expect.contains_key("max_abs_rel_error_full_form") {
        assert_eq!(chosen_form.form(), Form::Full, "{}", case.id);
        let wanted = case
            .expect
            .get("predict_at_C")
            .or(case.inputs.get("predict_at_C"));
        let wanted = numbers(wanted.expect("temperatures to predict at"));
        let error = worst(chosen_form, &|t| {
            wanted.iter().any(|w| (w - t).abs() < 1e-9)
        });
        return json!({ "max_abs_rel_error_full_form": error });
    }
    let errors: Map<String, Value> = data
        .iter()
        .map(|p| (format!("{}", p.0), json!(miss(short, *p))))
        .collect();
    json!({
        "max_abs_rel_error_short_form_20_120C": worst(short, &|t| (20.0..=120.0).contains(&t)),
        "rel_error_short_form": errors,
    })
}

fn density(case: &Case) -> Value {
    if case.has("algorithm") {
        let rho15 = MassDensity::from_base(case.number("rho15_kg_m3"));
        let at = celsius(case.number("t_C"));
        return json!({
            "vcf15_unrounded": density_2004::volume_correction(rho15, at).base(),
            "rho60F_kg_m3": density_2004::density_60_f(rho15).base(),
        });
    }
    if case.has("mu_mPas") {
        let eta = DynamicViscosity::from_base(case.number("mu_mPas") * 1e-3);
        let rho = MassDensity::from_base(case.number("rho_kg_m3"));
        return json!({ "kv_mm2_s": to_mm2_s(kinematic(eta, rho)) });
    }
    let with = json!({
        "density15": format!("{} kg/m3", case.number("rho15_kg_m3")),
        "at": deg_c(case.number("t_C")),
    });
    let got = work("density-at", &with);
    if case.has("kv_mm2_s") {
        let rho = MassDensity::from_base(got["density"].as_f64().expect("a density"));
        let eta = dynamic(mm2_s(case.number("kv_mm2_s")), rho);
        return json!({ "mu_mPas": to_mpa_s(eta) });
    }
    json!({ "vcf15": got["vcf"], "rho_kg_m3": got["density"] })
}

fn blend(case: &Case) -> Value {
    if case.has("kv40_kv100_mm2_s") {
        return blend_two_temperatures(case);
    }
    if case.has("target_mm2_s") {
        return blend_target(case);
    }
    let nus: Vec<String> = case
        .numbers("kv_mm2_s_same_T")
        .iter()
        .map(|v| mm2(*v))
        .collect();
    let of = |method: &str| {
        let with = json!({ "fractions": case.inputs["fractions"], "nu": nus, "method": method });
        work("blend", &with)["nu"].clone()
    };
    json!({
        "walther_W_07": of("walther"), "refutas": of("refutas"),
        "log_ratio_index": of("log-ratio"), "pipeline_index_H_0p6": of("pipeline"),
        "arrhenius_log": of("arrhenius"),
    })
}

fn blend_target(case: &Case) -> Value {
    let of = |method: &str| {
        let with = json!({
            "nu_a": mm2(case.number("kv_a_mm2_s")), "nu_b": mm2(case.number("kv_b_mm2_s")),
            "target": mm2(case.number("target_mm2_s")), "method": method,
        });
        answer("blend-fraction", &with)
    };
    let (walther, refutas) = (of("walther"), of("refutas"));
    json!({
        "fraction_a_walther": walther["result"]["fraction_a"]["value"],
        "fraction_a_refutas": refutas["result"]["fraction_a"]["value"],
        "feasible": walther["error"]["name"] != "target-infeasible",
    })
}

fn blend_two_temperatures(case: &Case) -> Value {
    use filmwright::relation::oil::blend::Rule;
    use filmwright::relation::oil::blend_wright::wright;
    let pairs = case.inputs["kv40_kv100_mm2_s"].as_array().expect("a list");
    let pairs: Vec<Vec<f64>> = pairs.iter().map(numbers).collect();
    let shares = case.numbers("fractions");
    let x: Vec<_> = shares.iter().map(|x| number(*x)).collect();
    let lines: Vec<Line> = pairs
        .iter()
        .map(|p| line(&[(40.0, p[0]), (100.0, p[1])]))
        .collect();
    let mixed = wright(&x, &lines).expect("fractions fit");
    let column = |i: usize| -> Vec<String> { pairs.iter().map(|p| mm2(p[i])).collect() };
    let of = |method: &str| {
        let with = json!({
            "fractions": shares, "nu40": column(0), "nu100": column(1), "method": method,
        });
        work("blend", &with)
    };
    let (by_wright, by_walther) = (of("wright"), of("walther"));
    let mut all = Map::new();
    for t in case.expect["kv_mm2_s"]
        .as_object()
        .expect("by temperature")
        .keys()
    {
        let at = celsius(t.parse().expect("a temperature"));
        let nus: Vec<_> = lines.iter().map(|l| l.nu_at(at)).collect();
        let mut pair = json!({
            "wright": to_mm2_s(mixed.nu_at(at)),
            "constant_temperature_walther":
                to_mm2_s(Rule::Walther.blend(&x, &nus).expect("fractions fit")),
        });
        if let Some(name) = [("40", "nu40"), ("100", "nu100")]
            .iter()
            .find(|(k, _)| k == t)
        {
            pair = json!({
                "wright": by_wright[name.1],
                "constant_temperature_walther": by_walther[name.1],
            });
        }
        all.insert(t.clone(), pair);
    }
    json!({ "kv_mm2_s": all })
}

fn alpha(case: &Case) -> Value {
    let of = |with: Value| work("pressure-viscosity", &with)["alpha"].clone();
    if case.has("d341_slope_B") {
        let rho = 1000.0 * case.number("rho_g_cm3_at_T");
        return json!({ "alpha_per_GPa": of(json!({
            "model": "so-klaus", "base": "mineral", "nu": mm2(case.number("kv_mm2_s")),
            "B": case.number("d341_slope_B"), "density": format!("{rho} kg/m3"),
        })) });
    }
    if case.has("mu0_mPas") {
        let eta = format!("{} mPa.s", case.number("mu0_mPas"));
        return json!({ "alpha_per_GPa": of(json!({
            "model": "wooster", "base": "mineral", "eta": eta,
        })) });
    }
    let base = case.text("base");
    if case.has("kv_mm2_s_at_T") {
        let nu = mm2(case.number("kv_mm2_s_at_T"));
        return json!({ "alpha_p2000bar_per_GPa": of(json!({
            "model": "gold", "base": base, "nu": nu,
        })) });
    }
    if case.has("mu_mPas_at_T") {
        let eta = format!("{} mPa.s", case.number("mu_mPas_at_T"));
        return json!({ "alpha_per_GPa": of(json!({
            "model": "agma925", "base": base, "eta": eta,
        })) });
    }
    let at = |t: f64| {
        let eta38 = format!("{} Pa.s", case.number("eta38_Pas"));
        of(json!({ "model": "iso15144", "base": base, "eta38": eta38, "at": deg_c(t) }))
    };
    let by_t: Map<String, Value> = case
        .numbers("t_C")
        .iter()
        .map(|t| (format!("{t}"), at(*t)))
        .collect();
    json!({ "alpha38_per_GPa": at(38.0), "alpha_t_per_GPa": by_t })
}

/// Every correlation for mineral oil against the measured values; the farthest one is compared.
fn alpha_measured(case: &Case) -> Value {
    let data = from_dynamic(case);
    let rho15 = MassDensity::from_base(case.number("assumed_rho15_kg_m3"));
    let law = DensityLaw::LubricatingOil;
    let line = line(&[data[0], data[data.len() - 1]]);
    let eta_at = |t: f64| dynamic(line.nu_at(celsius(t)), law.density(rho15, celsius(t)));
    let measured = case.expect["alpha_measured_per_GPa"]
        .as_object()
        .expect("by temperature");
    let mut farthest = Map::new();
    for (t, nu) in &data {
        let (at, eta) = (celsius(*t), eta_at(*t));
        let nu = mm2_s(*nu);
        let density = law.density(rho15, at);
        let alphas = [
            iso_15144(Family::Mineral, eta_at(38.0), at).expect("mineral"),
            agma_925(Family::Mineral, eta).expect("mineral"),
            gold(Family::Mineral, nu),
            so_klaus(Family::Mineral, nu, line.slope(), density).expect("mineral"),
            wooster(Family::Mineral, eta).expect("mineral"),
        ];
        let key = format!("{t}");
        let is = measured[&key].as_f64().expect("a number");
        let apart = |a: &f64| (a / is - 1.0).abs();
        let far = alphas.iter().map(|a| a.base() * 1e9);
        let far = far
            .max_by(|a, b| apart(a).total_cmp(&apart(b)))
            .expect("five of them");
        farthest.insert(key, json!(far));
    }
    json!({ "alpha_measured_per_GPa": farthest })
}

fn measured(case: &Case, key: &str) -> Vec<Measured> {
    let one = |(t, eta): &(f64, f64)| Measured {
        at: celsius(*t),
        eta: DynamicViscosity::from_base(eta * 1e-3),
    };
    by_temperature(&case.inputs[key]).iter().map(one).collect()
}

fn j300(case: &Case) -> Value {
    if case.has("grade") {
        return j300_row(case.text("grade"));
    }
    let (ccs, mrv) = (
        measured(case, "ccs_mPas_by_T_C"),
        measured(case, "mrv_mPas_by_T_C"),
    );
    let hths = case.number("hths150_mPas");
    let grade = sae_engine::classify(&EngineOil {
        nu100: mm2_s(case.number("kv100_mm2_s")),
        hths: Some(DynamicViscosity::from_base(hths * 1e-3)),
        ccs: &ccs,
        mrv: &mrv,
        yield_stress: Some(Pressure::from_base(case.number("mrv_yield_stress_Pa"))),
    });
    let (winter, hot) = (grade.winter.map(|g| g.name), grade.hot.map(|g| g.name));
    let list = |points: &[Measured]| -> Vec<String> {
        let one = |m: &Measured| {
            format!(
                "{} mPa.s at {} degC",
                exact(to_mpa_s(m.eta)),
                exact(to_celsius(m.at))
            )
        };
        points.iter().map(one).collect()
    };
    let mut with = json!({
        "nu100": mm2(case.number("kv100_mm2_s")), "hths": format!("{hths} mPa.s"),
        "yield_stress": format!("{} Pa", case.number("mrv_yield_stress_Pa")),
    });
    if !ccs.is_empty() {
        with["ccs"] = json!(list(&ccs));
        with["mrv"] = json!(list(&mrv));
    }
    let by_work = work("sae-engine-grade", &with);
    assert_eq!(by_work["grade"], json!(grade.name()), "{}", case.id);
    assert_eq!(by_work["w_grade"], json!(winter), "{}", case.id);
    json!({ "w_grade": winter, "hot_grade": hot })
}

fn j300_row(name: &str) -> Value {
    if let Some(row) = sae_engine::WINTER.iter().find(|r| r.name == name) {
        let (ccs, mrv) = (row.cranking(), row.pumping());
        return json!({
            "ccs_max_mPas": exact(to_mpa_s(ccs.eta)), "ccs_T_C": exact(to_celsius(ccs.at)),
            "mrv_max_mPas": exact(to_mpa_s(mrv.eta)), "mrv_T_C": exact(to_celsius(mrv.at)),
            "kv100_min_mm2_s": exact(to_mm2_s(row.nu100_least())),
        });
    }
    let row = sae_engine::HOT
        .iter()
        .find(|r| r.name == name)
        .expect("a hot grade");
    let hths = |beside: &str| {
        let winter = sae_engine::WINTER.iter().find(|r| r.name == beside);
        exact(to_mpa_s(row.hths_least(winter)))
    };
    json!({
        "kv100_min_mm2_s": exact(to_mm2_s(row.nu100_least())),
        "kv100_lt_mm2_s": exact(to_mm2_s(row.nu100_below())),
        "hths150_min_mPas": hths("10W"),
        "hths150_min_mPas_with_0W_5W_10W": hths("10W"),
        "hths150_min_mPas_with_15W_20W_25W_or_monograde": hths(""),
    })
}

fn j306(case: &Case) -> Value {
    if case.has("grade") {
        let name = case.text("grade");
        if let Some(row) = sae_gear::WINTER.iter().find(|r| r.name == name) {
            return json!({
                "t_max_for_150000_mPas_C": exact(to_celsius(row.t150000_most())),
                "kv100_min_mm2_s": exact(to_mm2_s(row.nu100_least())),
            });
        }
        let row = sae_gear::HOT
            .iter()
            .find(|r| r.name == name)
            .expect("a hot grade");
        return json!({
            "kv100_min_mm2_s": exact(to_mm2_s(row.nu100_least())),
            "kv100_lt_mm2_s": row.nu100_below().map(|nu| exact(to_mm2_s(nu))),
        });
    }
    let mut with = json!({
        "nu100": mm2(case.number("kv100_new_mm2_s")),
        "nu100_sheared": mm2(case.number("kv100_after_20h_KRL_mm2_s")),
    });
    if let Some(t) = case.inputs["t_for_150000_mPas_C"].as_f64() {
        with["t150000"] = json!(deg_c(t));
    }
    let got = work("sae-gear-grade", &with);
    json!({
        "w_grade": got["w_grade"], "hot_grade_new": got["hot_grade_new"],
        "stays_in_grade_after_shear": got["stays_in_grade"] == "yes",
    })
}

fn shear(case: &Case) -> Value {
    let (new, base) = (case.number("kv100_new"), case.number("kv100_base"));
    if case.has("pssi_pct") {
        let with = json!({
            "nu100_new": mm2(new), "nu100_base": mm2(base),
            "pssi": format!("{} %", case.number("pssi_pct")),
        });
        let got = work("shear-from-pssi", &with);
        return json!({ "kv100_sheared": got["nu100_sheared"], "pvl_pct": got["loss"] });
    }
    let sheared = case.number("kv100_sheared");
    let with = json!({
        "nu100_new": mm2(new), "nu100_sheared": mm2(sheared), "nu100_base": mm2(base),
    });
    let got = work("shear-loss", &with);
    let p = |nu: f64| {
        let p = filmwright::relation::oil::shear::thickening(mm2_s(nu), mm2_s(base));
        json!(p.expect("thickened").base())
    };
    json!({ "pssi_pct": got["pssi"], "pvl_pct": got["loss"], "P_new": p(new), "P_sheared": p(sheared) })
}

fn polymer(case: &Case) -> Value {
    if case.has("assumed_base_vi") {
        return polymer_split(case);
    }
    let at = |t: &str| {
        let with = json!({
            "base_nu40": mm2(case.number("base_kv40")), "base_nu100": mm2(case.number("base_kv100")),
            "p_cold": case.number("P_cold"), "p_hot": case.number("P_hot"),
            "t_cold": deg_c(case.number("t_cold_C")), "t_hot": deg_c(case.number("t_hot_C")),
            "pssi": format!("{} %", case.number("pssi_pct")), "at": format!("{t} degC"),
        });
        work("polymer-curve", &with)
    };
    let mut all = Map::new();
    for t in case.expect["kv_mm2_s"]
        .as_object()
        .expect("by temperature")
        .keys()
    {
        let got = at(t);
        all.insert(
            t.clone(),
            json!({
                "base": got["base"], "P": got["p"], "finished": got["finished"],
                "sheared": got["sheared"],
            }),
        );
    }
    let (cold, hot) = (at("40"), at("100"));
    let vi = |which: &str| {
        let nu = |at: &Map<String, Value>| mm2(at[which].as_f64().expect("a number"));
        work(
            "viscosity-index",
            &json!({ "nu40": nu(&cold), "nu100": nu(&hot) }),
        )["vi"]
            .clone()
    };
    json!({
        "kv_mm2_s": all, "vi_base": vi("base"), "vi_finished": vi("finished"),
        "vi_sheared": vi("sheared"),
    })
}

fn polymer_split(case: &Case) -> Value {
    let (nu40, nu100) = (
        mm2(case.number("finished_kv40")),
        mm2(case.number("finished_kv100")),
    );
    let with = json!({
        "nu40": nu40, "nu100": nu100, "base_vi": case.number("assumed_base_vi"),
        "ratio": case.number("R_P40_over_P100"),
    });
    let got = work("polymer-split", &with);
    let vi = work("viscosity-index", &json!({ "nu40": nu40, "nu100": nu100 }));
    json!({
        "base_kv100": got["base_nu100"], "base_kv40": got["base_nu40"], "P100": got["p100"],
        "P40": got["p40"], "vi_finished": vi["vi"],
    })
}

fn temporary_shear(case: &Case) -> Value {
    let with = json!({
        "p": case.number("P0"), "plateau": case.number("f_inf"),
        "rate": format!("{} 1/s", case.number("shear_rate_1_s")),
        "critical_rate": format!("{} 1/s", case.number("critical_rate_1_s")),
        "exponent": case.number("m"),
    });
    let got = work("temporary-shear", &with);
    json!({ "P_effective": got["p"], "viscosity_ratio_to_low_shear": got["ratio"] })
}

fn temperature_of(pairs: &[(f64, f64)], rho15: f64, eta: f64) -> Value {
    let with = json!({
        "points": points(pairs), "density15": format!("{rho15} kg/m3"),
        "eta": format!("{eta} mPa.s"),
    });
    work("temperature-at-dynamic", &with)["temperature"].clone()
}

fn d6080(case: &Case) -> Value {
    if case.has("t_for_750_mPas_C") {
        let with = json!({ "t750": deg_c(case.number("t_for_750_mPas_C")) });
        return json!({ "low_temp_grade": work("d6080-grade", &with)["grade"] });
    }
    let nu40 = case.number("kv40_mm2_s");
    let nu100 = viscosity_index::nu100(mm2_s(nu40), number(case.number("vi")));
    let pairs = [
        (40.0, nu40),
        (100.0, to_mm2_s(nu100.expect("an oil of that index"))),
    ];
    let t = temperature_of(
        &pairs,
        case.number("rho15_kg_m3"),
        case.number("target_mPas"),
    );
    let with = json!({ "t750": deg_c(t.as_f64().expect("a temperature")) });
    json!({ "t_C": t, "low_temp_grade": work("d6080-grade", &with)["grade"] })
}

fn start(case: &Case) -> Value {
    let pairs = [
        (40.0, case.number("kv40_mm2_s")),
        (100.0, case.number("kv100_mm2_s")),
    ];
    let rho15 = case.number("rho15_kg_m3");
    let mut all = Map::new();
    for limit in [860.0, 1000.0, 1600.0, 2000.0] {
        let with = json!({ "points": points(&pairs), "nu": mm2(limit) });
        let t = work("temperature-at", &with)["temperature"].clone();
        all.insert(format!("t_at_{limit}_mm2_s_C"), t);
    }
    let density = Density {
        rho15: MassDensity::from_base(rho15),
        law: DensityLaw::LubricatingOil,
    };
    let t = temperature_of(&pairs, rho15, 150_000.0);
    let again = temperature_at_dynamic(&line(&pairs), density, DynamicViscosity::from_base(150.0));
    let again = to_celsius(again.expect("in range"));
    assert!(
        (again - t.as_f64().expect("a temperature")).abs() < 1e-9,
        "{}",
        case.id
    );
    all.insert("t_at_150000_mPas_C".to_owned(), t);
    Value::Object(all)
}
