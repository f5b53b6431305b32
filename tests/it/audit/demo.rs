//! The demonstration's samples against the answers worked out beside its data, and the rest of
//! what an audit says: trends, tops-up, matching, gate, shear fed back.

use super::sites::with;
use crate::scenario::{filmwright, on};
use filmwright::cli::exit::Exit;
use serde_json::Value;

fn sample<'v>(document: &'v Value, name: &str) -> &'v Value {
    let samples = document["samples"].as_array().expect("samples");
    samples
        .iter()
        .find(|s| s["sample"] == name)
        .unwrap_or_else(|| panic!("no {name}"))
}

fn causes(sample: &Value) -> Vec<&str> {
    let list = sample["causes"].as_array().expect("causes");
    list.iter()
        .map(|c| c["id"].as_str().expect("an id"))
        .collect()
}

fn change(sample: &Value, which: &str) -> f64 {
    sample["change"][which]["value"].as_f64().expect("a change")
}

/// Expected values: `works.yaml` of the demonstration, samples S-1, S-2, S-3, S-5, S-8 (changes and
/// indices by ASTM D341 and D2270, causes by evidence).
#[test]
fn the_demonstrations_samples_come_out_as_worked_beside_them() {
    let document = filmwright("audit --demo -f json").json();
    assert_eq!(document["format"], "filmwright.audit 1");
    let s1 = sample(&document, "S-1");
    assert!((change(s1, "nu40") + 1.3).abs() < 0.05 && s1["as_labelled"] == "as labelled");
    assert!((s1["change"]["vi"].as_f64().expect("VI") - 102.0).abs() < 0.6);
    assert_eq!(
        (causes(s1).len(), &s1["serves"]),
        (0, &Value::from("holds"))
    );
    assert_eq!(s1["cleanliness"]["target"], "16/14/11");
    let s2 = sample(&document, "S-2");
    assert!((change(s2, "nu40") + 21.7).abs() < 0.05 && (change(s2, "nu100") + 25.8).abs() < 0.05);
    assert!((s2["change"]["vi"].as_f64().expect("VI") - 145.0).abs() < 0.6);
    assert_eq!(causes(s2).first(), Some(&"polymer-shear"));
    assert_eq!(
        (&s2["as_labelled"], &s2["serves"]),
        (&"the labelled oil, changed".into(), &"fails".into())
    );
    let s3 = sample(&document, "S-3");
    assert!((change(s3, "nu40") - 4.3).abs() < 0.06);
    assert_eq!(causes(s3).first(), Some(&"copper-attack"));
    assert_eq!(s3["serves"], "barred");
    let s5 = sample(&document, "S-5");
    assert!((change(s5, "nu40") - 0.7).abs() < 0.05);
    assert_eq!(
        (causes(s5), &s5["as_labelled"]),
        (vec!["water"], &"as labelled".into())
    );
    let s8 = sample(&document, "S-8");
    assert!((change(s8, "nu40") + 2.0).abs() < 0.06 && causes(s8).is_empty());
    assert_eq!(
        (&s8["as_labelled"], &s8["serves"]),
        (&"as labelled".into(), &"barred".into())
    );
}

/// The other samples by the evidence in their figures (common practice): oxidation by thickening
/// with acids and carbonyls; zinc where there is none and a thinner oil; fuel and a fallen flash.
#[test]
fn the_other_samples_are_told_by_their_evidence() {
    let document = filmwright("audit --demo -f json").json();
    let first = |name: &str| {
        causes(sample(&document, name))
            .first()
            .copied()
            .unwrap_or("none")
            .to_owned()
    };
    assert_eq!(first("S-4"), "oxidation");
    assert_eq!(first("S-6"), "water");
    assert_eq!(first("S-7"), "lighter-oil");
    assert_eq!(first("S-9"), "fuel-dilution");
    let s7 = sample(&document, "S-7");
    assert_eq!(s7["as_labelled"], "another oil");
    let oil = &s7["causes"][0]["oils"][0];
    assert_eq!(oil["oil"], "O-04");
    // zinc 147 of 420 ppm is 35 %
    let share = oil["share"]["value"].as_f64().expect("a share");
    assert!((25.0..45.0).contains(&share), "{share}");
    assert_eq!(document["unmatched"].as_array().map(Vec::len), Some(1));
}

#[test]
fn every_cause_named_has_evidence_and_every_finding_an_act() {
    let document = filmwright("audit --demo -f json").json();
    for sample in document["samples"].as_array().expect("samples") {
        for cause in sample["causes"].as_array().expect("causes") {
            assert!(!cause["for"].as_array().expect("for").is_empty(), "{cause}");
        }
    }
    let findings = document["findings"].as_array().expect("findings");
    assert!(findings.len() > 5);
    let mut act = true;
    for f in findings {
        assert!(f["act"].as_str().is_some_and(|a| a.len() > 10));
        let level = f["level"].as_str().expect("a level");
        assert!(level == "watch" || level == "act");
        assert!(act || level == "watch", "act after watch");
        act = level == "act";
    }
}

#[test]
fn the_text_begins_with_the_two_by_two_and_lists_every_bottle() {
    let ran = filmwright("audit --demo");
    assert_eq!(ran.exit, Exit::Done);
    assert!(ran.out.starts_with("of 8 fills sampled"), "{}", ran.out);
    let row = ran.out.find("as labelled").expect("the table");
    assert!(
        row < ran
            .out
            .find("findings, most pressing first")
            .expect("findings")
    );
    for n in 1..=9 {
        assert!(ran.out.contains(&format!("S-{n}")), "S-{n}");
    }
    assert!(ran.out.contains("M01 (never sampled"));
    assert_eq!(filmwright("audit --demo --gate fails").exit, Exit::Gate);
    let csv = filmwright("audit --demo -f csv").out;
    assert_eq!(csv.lines().count(), 1 + 9 + 7);
    assert!(
        filmwright("audit --demo --unmatched")
            .out
            .starts_with("1 of 9 bottles")
    );
}

/// A limit carried to 40 °C along the sample's own slope touches the machine's limit there: 10
/// mm²/s at 55 °C on the line through 30 and 5.2 mm²/s, worked with ASTM D341 by hand: 16.6.
#[test]
fn the_machine_asks_along_the_samples_own_slope() {
    let host = with(
        "machine,label,drawn,nu40,nu100\nHP-1,H46,2026-10-01,30,5.2\n",
        "",
    );
    let document = on(host, "audit -f json").json();
    let s = &document["samples"][0];
    let floor = s["asks"]["at_40"]["floor"]["value"]
        .as_f64()
        .expect("a floor");
    // lg lg (nu + 0.7): B from the two points, then the parallel through 10 at 328.15 K
    let w = |nu: f64| libm::log10(libm::log10(nu + 0.7));
    let (t40, t100, t) = (
        libm::log10(313.15),
        libm::log10(373.15),
        libm::log10(328.15),
    );
    let b = (w(30.0) - w(5.2)) / (t100 - t40);
    let expected = libm::pow(10.0, libm::pow(10.0, w(10.0) + b * (t - t40))) - 0.7;
    assert!(
        (floor - expected).abs() < 1e-6 * expected,
        "{floor} {expected}"
    );
    let hot = s["margins"]["hot"]["value"].as_f64().expect("a margin");
    assert!((hot - 6.0 * libm::log10(30.0 / expected)).abs() < 1e-6);
}

#[test]
fn a_trend_names_its_day_and_begins_anew_at_an_oil_change() {
    let table = "machine,label,drawn,nu40,nu100\n\
        GB-104,G220,2025-11-01,300,23\n\
        GB-104,G220,2026-01-01,218,18.8\nGB-104,G220,2026-04-01,208,18.2\nGB-104,G220,2026-07-01,198,17.6\nGB-104,G220,2026-10-01,188,17\n";
    let events = "file: events 1\nevents:\n  - { machine: GB-104, date: 2025-12-01, what: change, oil: G220, amount: 46 L }\n";
    let host = with(table, "").with("events.yaml", events);
    let document = on(host, "audit -f json").json();
    let trend = &document["trends"][0];
    assert_eq!(trend["of_this_fill"], 4);
    let slope = trend["slope"]["value"].as_f64().expect("a slope");
    // 30 mm2/s in 273 days, by hand
    assert!((slope + 30.0 / 273.0 * 365.25).abs() < 0.5, "{slope}");
    let reached = &trend["reaches"];
    assert!(
        reached["on"].as_str().is_some_and(|d| d.starts_with("202")),
        "{trend}"
    );
    let early = reached["between"][0].as_str().expect("an early day");
    assert!(early <= reached["on"].as_str().expect("a day"));
    let one = with("machine,label,drawn,nu40\nGB-104,G220,2026-10-01,188\n", "");
    assert!(on(one, "audit").out.contains("too few to say"));
}

#[test]
fn measured_shear_is_fed_to_the_other_machines_on_request() {
    let site = super::sites::SITE
        .replace("oil now: H46", "oil now: V46")
        .replace("  GB-104:\n", "  HP-2:\n    like: HP-1\n  GB-104:\n");
    let table = "machine,label,drawn,nu40,nu100,Zn\nHP-1,V46,2026-10-01,33,5.9,430\n";
    let host = with(table, "").with("site.yaml", &site);
    let plain = on(host, "audit -f json").json();
    assert_eq!(plain["measured_shear"], serde_json::json!([]));
    let host = with(table, "").with("site.yaml", &site);
    let fed = on(host, "audit -f json --use-measured-shear").json();
    let one = &fed["measured_shear"][0];
    assert_eq!(
        (&one["machine"], &one["oil"]),
        (&"HP-2".into(), &"V46".into())
    );
    let (before, after) = (
        &one["hot"]["before"]["value"],
        &one["hot"]["after"]["value"],
    );
    assert!(
        after.as_f64().expect("after") < before.as_f64().expect("before"),
        "{one}"
    );
}

#[test]
fn old_samples_and_new_oil_are_kept_apart() {
    let table = "machine,label,drawn,nu40,nu100,Zn\n\
        new oil,H46,2026-09-01,45.0,6.70,350\n\
        HP-1,H46,2025-01-01,45.1,6.71,348\nGB-104,G220,2026-10-01,221,19.0,\n";
    let document = on(with(table, ""), "audit -f json").json();
    let old = &document["samples"][0];
    assert_eq!(
        (&old["serves"], &old["machine"]),
        (&"open".into(), &"HP-1".into())
    );
    assert_eq!(old["baseline"], "new-oil sample, row 2");
    assert!((change(old, "nu40") - 0.222).abs() < 0.01);
    assert_eq!(document["samples"].as_array().map(Vec::len), Some(2 + 1));
}

#[test]
fn the_makers_limits_outrank_those_of_practice() {
    let table = "machine,label,drawn,nu40,nu100,water\nHP-1,H46,2026-10-01,46.1,6.8,350\n";
    let water = |host| {
        let document = on(host, "audit -f json").json();
        let limits = document["samples"][0]["limits"]
            .as_array()
            .expect("limits")
            .clone();
        limits
            .into_iter()
            .find(|l| l["on"] == "water")
            .expect("water")
    };
    assert_eq!(water(with(table, ""))["level"], "watch");
    let site = super::sites::SITE.replace(
        "    cleanliness: 18/16/13\n",
        "    cleanliness: 18/16/13\n    used oil:\n      water: 100 ppm .. 300 ppm, maker\n",
    );
    let own = water(with(table, "").with("site.yaml", &site));
    assert_eq!(
        (&own["level"], &own["rule"]),
        (&"act".into(), &"used oil".into())
    );
}

#[test]
fn findings_closed_since_the_last_audit_are_listed() {
    let wet = "machine,label,drawn,nu40,nu100,water\nHP-1,H46,2026-06-01,46.1,6.8,900\n";
    let dry = "machine,label,drawn,nu40,nu100,water\nHP-1,H46,2026-10-01,46.1,6.8,60\n";
    let old = on(with(wet, ""), "audit -f json").out;
    let new = on(with(dry, ""), "audit -f json").out;
    let host = with(dry, "").with("old.json", &old).with("new.json", &new);
    let ran = on(host, "compare old.json new.json");
    assert!(ran.out.contains("closed\n"), "{}{}", ran.out, ran.err);
    assert!(ran.out.contains("HP-1: Water entry"), "{}", ran.out);
    let host = with(dry, "").with("old.json", &old).with("new.json", &new);
    let document = on(host, "compare old.json new.json -f json").json();
    assert_eq!(document["changes"][0]["finding"], "closed");
}

/// Water-soluble polyglycol holds thousands of ppm in solution (common practice), wherever it runs;
/// a mineral oil in the same machine does not.
#[test]
fn the_limit_for_water_is_that_of_the_base() {
    let table = "bottle,machine,label,drawn,nu40,nu100,water\n\
                 a,GB-104,P220,2026-10-01,222,40.1,2000\n\
                 b,FAN,C68,2026-10-01,67.4,8.75,2000\n";
    let host = with(table, "").with(
        "oils.yaml",
        &format!(
            "{}P220: {{ kind: gear, classes: [CKS], base: PAG water-soluble, viscosity: [222 mm2/s at 40 degC, 40 mm2/s at 100 degC] }}\n",
            super::sites::OILS
        ),
    );
    let document = on(host, "audit -f json --on 2026-11-02").json();
    assert!(causes(sample(&document, "a")).is_empty());
    assert_eq!(causes(sample(&document, "b")), ["water"]);
}
