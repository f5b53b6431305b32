//! Every component of practice through `weigh` on a site file: once inside its window, once
//! outside each of its limits, with the end named. Limits are read from the rules, so that a
//! component added there is tested here.
//!
//! Source of the limits: the entries of `rules/parts`, each with its own. The oils are made for
//! the purpose, with lines of one slope (ASTM D341, B = 3.55).

#![expect(
    clippy::disallowed_methods,
    reason = "the oils of the tests need no bits that are the same everywhere"
)]

use crate::scenario::on;
use filmwright::assets::builtin_rules;
use filmwright::cli::host::MemoryHost;
use filmwright::input::rules::rulebook;
use filmwright::model::facts::PartGroup;
use filmwright::model::machine::Lubrication;
use filmwright::model::rulebook::{Component, Confidence, Rulebook, WindowLimit};
use filmwright::model::stated::ViscosityLimit;
use filmwright::quantity::convert::to_mm2_s;
use filmwright::quantity::{KinematicViscosity, Measure};
use serde_json::Value;
use std::sync::LazyLock;

static BOOK: LazyLock<Rulebook> =
    LazyLock::new(|| rulebook(&[builtin_rules()]).expect("built-in rules"));

/// Slope of every oil here.
const B: f64 = 3.55;
/// Running temperature, degC.
const RUNNING: f64 = 60.0;
/// Off a limit by this factor: about one VG step at running temperature, under the two at which
/// a rule of low confidence fails an oil.
const OFF: f64 = 1.35;

fn double_lg(nu: f64) -> f64 {
    (nu + 0.7).log10().log10()
}

/// Viscosity at another temperature on the line through one point, mm2/s.
fn at(nu: f64, from_c: f64, to_c: f64) -> f64 {
    let w = double_lg(nu) - B * ((to_c + 273.15).log10() - (from_c + 273.15).log10());
    10f64.powf(10f64.powf(w)) - 0.7
}

/// Temperature at which the line through one point has a viscosity, degC.
fn where_it_has(nu: f64, from_c: f64, wanted: f64) -> f64 {
    let lg_t = (from_c + 273.15).log10() - (double_lg(wanted) - double_lg(nu)) / B;
    10f64.powf(lg_t) - 273.15
}

/// What a run of one component with one oil gave.
struct Given {
    verdict: String,
    because: String,
    conditions: String,
    whole: Value,
}

/// Weighs an oil of `nu` at running temperature on a component.
fn weighed(c: &Component, nu: f64, start_c: f64, extra: &str) -> Given {
    let grease = c.lubrication == Some(Lubrication::Grease);
    let cold = start_c.min(20.0);
    let site = format!(
        "file: site 1\nsite: Test yard\nmachines:\n  M-1:\n    ambient: {cold:.3} .. 20 degC\n    sump: held at {RUNNING} degC\n    start: {start_c:.6} degC\n    oil now: none\n    parts:\n      - component: {}\n{extra}",
        c.id
    );
    let low = start_c.min(40.0);
    let (kind, key, more) = if grease {
        (
            "grease",
            "base oil",
            "  thickener: polyurea\n  NLGI: \"2\"\n",
        )
    } else {
        ("other", "viscosity", "  pour point: -80 degC\n")
    };
    let oils = format!(
        "file: oils 1\nX-1:\n  kind: {kind}\n  base: PAO, no polymer\n{more}  density: 850 kg/m3 at 15 degC\n  {key}: [{:.9} mm2/s at {low:.6} degC, {:.9} mm2/s at 100 degC]\n",
        at(nu, RUNNING, low),
        at(nu, RUNNING, 100.0),
    );
    let host = MemoryHost::new()
        .with("site.yaml", &site)
        .with("oils.yaml", &oils);
    let ran = on(host, "weigh -f json -q");
    assert!(!ran.out.is_empty(), "{}: {}\n{site}\n{oils}", c.id, ran.err);
    let whole = ran.json()["judgements"][0].clone();
    Given {
        verdict: whole["verdict"].as_str().unwrap_or("none").to_owned(),
        because: whole["because"].to_string(),
        conditions: whole["conditions"].to_string(),
        whole,
    }
}

fn kinematic(limit: Option<WindowLimit>) -> Option<f64> {
    match limit? {
        WindowLimit::Fixed(ViscosityLimit::Kinematic(nu)) => Some(to_mm2_s(nu)),
        // 850 kg/m3 at 15 degC; the density at start hardly moves the limit against `OFF`
        WindowLimit::Fixed(ViscosityLimit::Dynamic(eta)) => {
            Some(to_mm2_s(KinematicViscosity::from_base(eta.base() / 850.0)))
        }
        WindowLimit::TimesReference { .. } => None,
    }
}

/// Components that no oil is chosen for.
fn out_of_scope(c: &Component) -> bool {
    c.group == PartGroup::OutOfScope
}

/// Viscosity well inside the window while running.
fn inside(c: &Component) -> f64 {
    let least = kinematic(c.min);
    let most = kinematic(c.max_run).filter(|_| !c.max_run_is_note);
    match (c.id.as_str(), least, most) {
        // grades of practice: ISO VG 460 and AGMA 13 with room above them
        ("gear_open_bath", ..) => at(700.0, 40.0, RUNNING),
        ("gear_open_intermittent", ..) => at(300.0, 100.0, RUNNING),
        (_, Some(least), Some(most)) => (least * 1.5).min(0.5 * (least + most)),
        (_, Some(least), None) => least * 1.5,
        (_, None, Some(most)) => most / 2.0,
        _ => 30.0,
    }
}

/// Base oil of a grease in the middle of its window at 40 degC, else any.
fn base_oil(c: &Component) -> Option<f64> {
    let window = c.base_oil?;
    Some(0.5 * (to_mm2_s(window.lo) + to_mm2_s(window.hi)))
}

fn unmet(c: &Component, given: &Given, end: &str) -> Result<(), String> {
    let wanted = if c.provenance.confidence == Confidence::Low {
        "open"
    } else {
        "fails"
    };
    let named = given.because.contains(end) && given.because.contains(&c.name);
    let asked = wanted != "open" || given.conditions.contains(&c.id);
    if given.verdict == wanted && named && asked {
        Ok(())
    } else {
        Err(format!(
            "{}: {wanted} with `{end}` wanted, got {}: {} {}",
            c.id, given.verdict, given.because, given.conditions
        ))
    }
}

fn all(test: impl Fn(&Component) -> Result<bool, String>) -> usize {
    let (mut count, mut wrong) = (0, Vec::new());
    for c in BOOK.components.iter().filter(|c| !out_of_scope(c)) {
        match test(c) {
            Ok(true) => count += 1,
            Ok(false) => {}
            Err(says) => wrong.push(says),
        }
    }
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
    count
}

/// Components whose window hangs on a part that carries size and speed.
const NEED_A_PART: [&str; 2] = ["gear_parallel_bevel", "brg_rolling_kappa"];

#[test]
fn inside_its_window_an_oil_holds() {
    let count = all(|c| {
        let extra = match c.id.as_str() {
            "chain_methods" => "        chain speed: 2 m/s\n    lubrication: drip\n",
            "chain_roller_drip_bath" => "        chain speed: 4 m/s\n    lubrication: drip\n",
            _ => "",
        };
        let nu = base_oil(c).map_or_else(|| inside(c), |nu40| at(nu40, 40.0, RUNNING));
        let given = weighed(c, nu, RUNNING, extra);
        let alone = NEED_A_PART.contains(&c.id.as_str());
        let right = if c.id == "comp_reactive_gas" {
            // ammonia, chlorine, acid gas: nothing but the maker's own oil
            given.verdict == "barred"
        } else if alone {
            given.verdict == "open" && given.because.contains("describe it as")
        } else {
            matches!(given.verdict.as_str(), "holds" | "tight")
        };
        if right {
            Ok(true)
        } else {
            Err(format!("{}: {}", c.id, given.whole))
        }
    });
    assert!(count >= 53, "{count} components");
}

#[test]
fn below_its_floor_an_oil_is_too_thin() {
    let count = all(|c| {
        let Some(least) = kinematic(c.min) else {
            return Ok(false);
        };
        unmet(
            c,
            &weighed(c, least / OFF, RUNNING, ""),
            "too thin at 60 degC",
        )?;
        Ok(true)
    });
    assert!(count >= 34, "{count} floors");
}

#[test]
fn above_its_running_ceiling_an_oil_is_too_thick() {
    let count = all(|c| {
        let Some(most) = kinematic(c.max_run) else {
            return Ok(false);
        };
        let given = weighed(c, most * OFF, RUNNING, "");
        if c.max_run_is_note {
            // a note is printed and never judges
            let clean = !given.because.contains("too thick");
            return if clean { Ok(true) } else { Err(given.because) };
        }
        unmet(c, &given, "too thick at 60 degC")?;
        Ok(true)
    });
    assert!(count >= 20, "{count} running ceilings");
}

#[test]
fn above_its_start_ceiling_an_oil_is_too_thick_to_start() {
    let count = all(|c| {
        let Some(most) = kinematic(c.max_start) else {
            return Ok(false);
        };
        let nu = inside(c);
        let cold = where_it_has(nu, RUNNING, most * OFF);
        let given = weighed(c, nu, cold, "");
        unmet(c, &given, "too thick at")?;
        Ok(true)
    });
    assert!(count >= 26, "{count} start ceilings");
}

#[test]
fn pump_fed_gears_have_a_start_ceiling_of_their_own() {
    let count = all(|c| {
        let Some(most) = kinematic(c.max_start_pump_fed) else {
            return Ok(false);
        };
        let nu = inside(c);
        let cold = where_it_has(nu, RUNNING, most * OFF);
        // the feed pump asks for the same and is of medium confidence, so the oil fails
        let given = weighed(c, nu, cold, "    lubrication: circulated\n");
        let said = format!("{}{}", given.because, given.conditions);
        let right = given.whole["verdict"] != "holds" && said.contains(&c.name);
        if right {
            Ok(true)
        } else {
            Err(format!("{}: {said}", c.id))
        }
    });
    assert_eq!(count, 2);
}

#[test]
fn the_base_oil_of_a_grease_has_both_ends() {
    let count = all(|c| {
        let Some(window) = c.base_oil else {
            return Ok(false);
        };
        for (nu40, end) in [
            (to_mm2_s(window.lo) / OFF, "too thin at 40 degC"),
            (to_mm2_s(window.hi) * OFF, "too thick at 40 degC"),
        ] {
            unmet(c, &weighed(c, at(nu40, 40.0, RUNNING), RUNNING, ""), end)?;
        }
        Ok(true)
    });
    assert_eq!(count, 1);
}

/// The Tribology Handbook, section C9: slow drip to 3 m/s, fast drip to 7.5, dip to 10, spray
/// from 7.5.
#[test]
fn a_chain_too_fast_for_its_feed_is_open_and_says_so() {
    let chain = BOOK
        .components
        .get("chain_roller_drip_bath")
        .expect("built in");
    for (feed, speed, serves) in [
        ("drip", 7.0, true),
        ("drip", 8.0, false),
        ("bath", 9.5, true),
        ("bath", 10.5, false),
        ("pressure-fed", 8.0, true),
        ("pressure-fed", 7.0, false),
    ] {
        let extra = format!("        chain speed: {speed} m/s\n    lubrication: {feed}\n");
        let given = weighed(chain, 30.0, RUNNING, &extra);
        let said = given.because.contains("feed does not serve a chain");
        assert_eq!(said, !serves, "{feed} at {speed}: {}", given.whole);
        assert_eq!(given.verdict == "open", !serves, "{feed} at {speed}");
    }
}

/// Components without a window that go by grade: thinner than their thinnest usual grade an oil is
/// open, with the question to the maker (ISO VG 460 from 414 mm2/s at 40 degC, ISO 3448; AGMA 13
/// from 190 mm2/s at 100 degC, public reprints of AGMA 9005).
#[test]
fn an_open_gear_thinner_than_its_thinnest_grade_is_open() {
    for (id, least, at_c) in [
        ("gear_open_bath", 414.0, 40.0),
        ("gear_open_intermittent", 190.0, 100.0),
    ] {
        let c = BOOK.components.get(id).expect("built in");
        let met = weighed(c, at(least * OFF, at_c, RUNNING), RUNNING, "");
        assert!(
            matches!(met.verdict.as_str(), "holds" | "tight"),
            "{id}: {}",
            met.whole
        );
        let short = weighed(c, at(least / OFF, at_c, RUNNING), RUNNING, "");
        assert_eq!(short.verdict, "open", "{id}: {}", short.whole);
        let end = format!("too thin at {at_c:.0} degC");
        assert!(short.because.contains(&end), "{id}: {}", short.because);
        assert!(short.conditions.contains(id), "{id}: {}", short.conditions);
    }
}

#[test]
fn what_is_out_of_scope_is_never_given_an_oil() {
    for c in BOOK.components.iter().filter(|c| out_of_scope(c)) {
        let given = weighed(c, 30.0, RUNNING, "");
        let kept = given.verdict == "barred" || given.conditions.contains("specialist");
        assert!(kept, "{}: {}", c.id, given.whole);
    }
}
