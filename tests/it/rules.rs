//! The built-in rules: every entry, every suitability rule, classes, the user's own on top.

mod facts;
mod fixtures;
mod needs;
mod pairs;
mod schema;

use filmwright::assets::{Layer, TextFile, builtin_rules};
use filmwright::input::rules::{RuleFault, rulebook};
use filmwright::model::machine::Lubrication;
use filmwright::model::rulebook::grease::Agreement;
use filmwright::model::rulebook::{
    Confidence, Level, Provenance, Replaced, Rulebook, SuitabilityRule, WhenUnknown, WindowLimit,
};
use filmwright::model::stated::ViscosityLimit;
use filmwright::model::word::Word;
use filmwright::quantity::Measure;
use filmwright::quantity::convert::{to_celsius, to_mm2_s, to_mpa_s};
use filmwright::suitability::{Finding, Suitability};
use std::sync::LazyLock;

static BOOK: LazyLock<Rulebook> = LazyLock::new(|| {
    rulebook(&[builtin_rules()]).unwrap_or_else(|faults| {
        let lines: Vec<String> = faults.iter().map(ToString::to_string).collect();
        panic!("{}", lines.join("\n"))
    })
});

fn walk(visit: &mut dyn FnMut(&str, &str, &Provenance)) {
    for (kind, entry) in BOOK.entries() {
        visit(kind, entry.id(), entry.provenance());
    }
}

#[test]
fn every_entry_names_a_source_of_the_register() {
    let mut count = 0;
    walk(&mut |kind, id, provenance| {
        count += 1;
        assert!(!provenance.source.is_empty(), "{kind} {id}");
        for source in &provenance.source {
            assert_ne!(BOOK.citation(source), "", "{kind} {id}");
            assert!(BOOK.sources.get(source).is_some(), "{kind} {id}: {source}");
        }
        assert!(
            provenance.file.starts_with("<builtin>/rules/"),
            "{kind} {id}"
        );
    });
    assert!(count > 550, "{count}");
}

#[test]
fn every_entry_of_every_file_is_read() {
    let mut written = 0;
    for file in builtin_rules().files {
        written += if file.path.rsplit('.').next() == Some("md") {
            1
        } else {
            file.text.matches("\n  - id: ").count()
        };
    }
    let mut read = 0;
    walk(&mut |_, _, _| read += 1);
    assert_eq!(read, written);
}

#[test]
fn low_confidence_never_bars() {
    for rule in &BOOK.suitability {
        if rule.provenance.confidence == Confidence::Low {
            assert_ne!(rule.heaviest(), Level::Bars, "{}", rule.id);
        }
    }
    for need in &BOOK.needs {
        if need.provenance.confidence == Confidence::Low {
            assert_ne!(need.level, Level::Bars, "{}", need.id);
        }
    }
}

#[test]
fn no_source_names_a_maker_and_no_text_is_empty() {
    for rule in &BOOK.suitability {
        for text in [&rule.title, &rule.why, &rule.act] {
            assert!(text.len() > 5, "{}", rule.id);
            assert!(!text.contains('!'), "{}: {text}", rule.id);
        }
        if let WhenUnknown::Asks { question, .. } = &rule.unknown {
            assert!(question.ends_with('?'), "{}: {question}", rule.id);
        }
    }
}

/// Findings of one rule in a fixture.
fn of_rule(rule: &SuitabilityRule, setting: &str) -> Vec<Finding> {
    let facts = facts::Setting::of(setting);
    let engine = Suitability::new(&BOOK);
    let (point, oil) = (engine.point(&facts.point), engine.oil(&facts.oil));
    let found = engine.assess_use(&point, &oil, facts.how);
    let all = found
        .barred_by
        .into_iter()
        .chain(found.conditions)
        .chain(found.notes);
    all.filter(|f| f.rule == rule.id).collect()
}

#[test]
fn every_suitability_rule_fires_once_and_once_does_not() {
    let mut rows = fixtures::ROWS.to_vec();
    for rule in &BOOK.suitability {
        let place = rows.iter().position(|row| row.rule == rule.id);
        let row = rows.remove(place.unwrap_or_else(|| panic!("no fixture for {}", rule.id)));
        let fired = of_rule(rule, row.fires);
        assert_eq!(fired.len(), 1, "{} should fire: {}", rule.id, row.fires);
        assert!(
            !fired[0].undecided,
            "{} was undecided: {}",
            rule.id, fired[0].reason
        );
        assert_eq!(fired[0].level, rule.level, "{}", rule.id);
        let silent = of_rule(rule, row.silent);
        assert_eq!(silent, [], "{} should be silent: {}", rule.id, row.silent);
        if let Some(setting) = row.bars {
            let barred = of_rule(rule, setting);
            assert!(
                matches!(barred.as_slice(), [f] if f.level == Level::Bars),
                "{} should bar: {setting}",
                rule.id
            );
        }
        assert_eq!(
            row.bars.is_some(),
            !rule.bars_when.is_empty(),
            "{}",
            rule.id
        );
        let asks = matches!(rule.unknown, WhenUnknown::Asks { .. });
        assert_eq!(
            row.unknown.is_some(),
            asks,
            "{}: a row for the unknown",
            rule.id
        );
        if let Some(setting) = row.unknown {
            let asked = of_rule(rule, setting);
            assert!(
                matches!(asked.as_slice(), [f] if f.undecided && f.level == Level::Asks),
                "{} should ask: {setting}",
                rule.id
            );
        }
    }
    let left: Vec<&str> = rows.iter().map(|row| row.rule).collect();
    assert_eq!(left, [""; 0], "fixtures for rules that are not there");
}

#[test]
fn screening_agrees_with_assessing() {
    let engine = Suitability::new(&BOOK);
    for row in fixtures::ROWS {
        for setting in [Some(row.fires), Some(row.silent), row.bars, row.unknown] {
            let facts = facts::Setting::of(setting.unwrap_or(""));
            let (point, oil) = (engine.point(&facts.point), engine.oil(&facts.oil));
            let found = engine.assess(&point, &oil);
            let screen = engine.screen(&point, &oil);
            assert_eq!(screen.barred, found.barred(), "{setting:?}");
            if !screen.barred {
                let conditions = u32::try_from(found.conditions.len()).expect("few");
                assert_eq!(screen.conditions, conditions, "{setting:?}");
            }
        }
    }
}

#[test]
fn a_finding_says_its_facts() {
    let rule = BOOK.suitability.get("sulphur-bronze").expect("built in");
    let found = of_rule(
        rule,
        "oil additives EP; oil sulphur active; point yellow metal yes; point part temperature 75",
    );
    assert_eq!(
        found[0].reason,
        "Active sulphur on a copper alloy: oil additive EP, oil sulphur active, yellow metal, \
         part temperature 75 degC; active sulphur attacks copper alloys, the faster the hotter: a \
         wheel softens and copper climbs in the samples"
    );
    assert_eq!(found[0].source, ["ANSI/AGMA 9005-D94", "common practice"]);
}

#[test]
fn a_missing_fact_is_a_gap() {
    let facts =
        facts::Setting::of("oil additives EP; oil sulphur active; point part temperature 75");
    let engine = Suitability::new(&BOOK);
    let found = engine.assess(&engine.point(&facts.point), &engine.oil(&facts.oil));
    let gap = found
        .gaps
        .iter()
        .find(|g| g.rule == "sulphur-bronze")
        .expect("a gap");
    assert_eq!(gap.says, "yellow metal");
}

/// A class serves what the standards say it contains (practice: families and specifications).
#[test]
fn classes_serve_what_they_contain() {
    for (declared, wanted, serves) in [
        ("CKC", "EP", true),
        ("CKD", "EP", true),
        ("CLP", "EP", true),
        ("CKC", "CKB", true),
        ("CKD", "CKB", true),
        ("CLP", "CKB", true),
        ("CKSMP", "CKC", true),
        ("CKB", "CKC", false),
        ("CKB", "EP", false),
        ("HM", "AW", true),
        ("HV", "AW", true),
        ("HM", "HL", true),
        ("HV", "HL", true),
        ("HVLP", "HM", true),
        ("HL", "HM", false),
        ("HM", "HV", false),
        ("DAH", "DAG", true),
        ("DAJ", "DAG", true),
        ("DAG", "DAH", false),
        ("TSE", "TSA", true),
        ("TSA", "TSE", false),
        ("VDL", "VBL", true),
        ("CLP-PG", "CKC", true),
        ("CKC", "CKE", false),
        ("CKE", "CKC", false),
        ("AGMA 7 Comp", "CKE", true),
        ("AGMA 5 EP", "CKC", true),
        ("ISO-L-CKC 220", "CKB", true),
        ("3H", "H1", true),
        ("H1", "H2", true),
        ("H2", "H1", false),
        ("GL-5", "GL-4", false),
        ("SAE 15W-40", "SAE engine grade", true),
        ("SAE 80W-90", "SAE engine grade", false),
        ("SAE 80W-90", "SAE gear grade", true),
    ] {
        let because = BOOK.serves(declared, wanted);
        assert_eq!(because.is_some(), serves, "{declared} for {wanted}");
        if let Some(because) = because {
            assert!(!because.source.is_empty(), "{declared} for {wanted}");
            assert!(
                because.confidence > Confidence::Low,
                "{declared} for {wanted}"
            );
        }
    }
}

fn own(path: &str, text: &str) -> Layer {
    Layer {
        name: "own".into(),
        files: vec![TextFile {
            path: path.into(),
            text: text.into(),
        }],
    }
}

const OWN_RULE: &str = "\
file: suitability 1
entries:
  - id: copper-strip
    title: Copper strip, site practice
    when:
      - oil copper strip worse than 2a
      - point yellow metal is yes
    level: bars
    unknown: passes
    why: a wheel was lost
    act: another oil
    source: site practice 2024
    basis: common
    confidence: medium
  - id: site-only
    title: Something of our own
    when: oil kind is other
    level: notes
    why: so it is
    act: look twice
    source: site practice 2024
    basis: common
    confidence: medium
";

#[test]
fn a_users_rule_replaces_by_id_and_is_reported() {
    let layers = [builtin_rules(), own("site/rules/own.yaml", OWN_RULE)];
    let book = rulebook(&layers).expect("both layers are right");
    assert_eq!(
        book.replaced,
        [Replaced {
            kind: "suitability",
            id: "copper-strip".into(),
            was: "<builtin>/rules/suitability/sulphur.yaml".into(),
            by: "site/rules/own.yaml".into(),
        }]
    );
    assert_eq!(book.suitability.len(), BOOK.suitability.len() + 1);
    let rule = book
        .suitability
        .find("Copper strip, site practice")
        .expect("by its name");
    assert_eq!(rule.level, Level::Bars);
    assert_eq!(
        book.suitability.place("copper-strip"),
        BOOK.suitability.place("copper-strip")
    );
    assert_eq!(book.citation("site practice 2024"), "site practice 2024");
}

#[test]
fn every_fault_of_a_file_is_reported_at_once() {
    let text = OWN_RULE
        .replace(
            "confidence: medium\n  - id: site-only",
            "confidence: low\n  - id: site-only",
        )
        .replace("when: oil kind is other", "when: oil colour is green")
        .replace("act: look twice", "acts: look twice")
        .replace("level: notes", "level: shouts");
    let faults = rulebook(&[builtin_rules(), own("own.yaml", &text)]).expect_err("five faults");
    let says = |what: &str| faults.iter().any(|f: &RuleFault| f.what.contains(what));
    for what in [
        "it bars and its confidence is low",
        "`colour is green` does not begin with a fact of an oil",
        "unknown key `acts`",
        "no `act`",
        "`shouts`: a level is wanted",
    ] {
        assert!(says(what), "{what}: {faults:#?}");
    }
    assert!(
        faults
            .iter()
            .all(|f| f.file == "own.yaml" && !f.write.is_empty())
    );
    assert!(faults.iter().any(|f| f.id.as_deref() == Some("site-only")));
}

#[test]
fn files_that_are_no_rules_are_named() {
    for (path, text, what) in [
        (
            "own.yaml",
            "file: brakes 1\nentries: []\n",
            "is not a kind of rule file",
        ),
        (
            "own.yaml",
            "file: seals 2\nentries: []\n",
            "edition 2 of seals is not known",
        ),
        ("own.yaml", "file: seals 1\n", "no list of entries"),
        ("own.yaml", "", "nothing in it"),
        ("own.yaml", "file: [", "not readable as YAML"),
        (
            "own.yaml",
            "file: seals 1\nentries: [ 3 ]\n",
            "an entry without keys",
        ),
        ("own.md", "# no front matter\n", "no front matter"),
    ] {
        let faults = rulebook(&[builtin_rules(), own(path, text)]).expect_err(what);
        assert!(faults[0].what.contains(what), "{what}: {faults:?}");
    }
}

#[test]
fn names_that_lead_nowhere_are_named() {
    let text = OWN_RULE.replace("oil kind is other", "oil class is CKX");
    let faults = rulebook(&[builtin_rules(), own("own.yaml", &text)]).expect_err("no such class");
    assert!(
        faults[0].what.contains("class `CKX` is not there"),
        "{faults:?}"
    );
}

/// A window as `min / max run / max start` in mm2/s.
fn window(id: &str) -> String {
    let part = BOOK.components.get(id).unwrap_or_else(|| panic!("{id}"));
    let show = |limit: Option<WindowLimit>| match limit {
        Some(WindowLimit::Fixed(ViscosityLimit::Kinematic(nu))) => format!("{:.0}", to_mm2_s(nu)),
        Some(WindowLimit::Fixed(ViscosityLimit::Dynamic(eta))) => {
            format!("{:.0} mPa.s", to_mpa_s(eta))
        }
        Some(WindowLimit::TimesReference { factor, .. }) => format!("{} nu_ref", factor.base()),
        None => "-".into(),
    };
    format!(
        "{} / {} / {}",
        show(part.min),
        show(part.max_run),
        show(part.max_start)
    )
}

/// Fluid-power, turbine, chain and bearing windows (makers' pages and handbook tables, as each
/// entry cites them); the gear rule of the ASM Handbook; SAE J306.
#[test]
fn windows_carry_their_figures() {
    for (id, figures) in [
        ("hyd_any_general", "13 / - / 860"),
        ("hyd_pump_gear_external", "10 / 300 / 1600"),
        ("hyd_pump_vane", "10 / 108 / 860"),
        ("hyd_pump_piston_axial", "10 / 160 / 1000"),
        ("hyd_pump_piston_radial", "12 / 160 / 850"),
        ("hyd_motor_radial", "18 / 200 / 1000"),
        ("hyd_valve_servo", "10 / 100 / 400"),
        ("comp_screw_flooded_air", "7 / 60 / 500"),
        ("turbine_journal", "13 / 70 / 300"),
        ("paper_dryer", "20 / - / 860"),
        ("gear_parallel_bevel", "0.7 nu_ref / 4 nu_ref / -"),
        ("gear_hypoid_axle", "7 / - / 150000 mPa.s"),
        ("gear_worm", "40 / 400 / -"),
        ("chain_roller_drip_bath", "20 / 500 / 1500"),
        ("brg_ball_cyl", "12 / - / -"),
        ("brg_spherical_taper", "20 / - / -"),
        ("brg_spherical_thrust", "32 / - / -"),
        ("fan_bearing_bath", "20 / - / 1000"),
        ("wet_brake_transmission", "7 / - / 4000"),
    ] {
        assert_eq!(window(id), figures, "{id}");
    }
    for (name, id) in [
        ("vane pump", "hyd_pump_vane"),
        ("helical gear", "gear_parallel_bevel"),
        ("Steam Turbine", "turbine_journal"),
        ("roller chain", "chain_roller_drip_bath"),
    ] {
        assert_eq!(BOOK.components.find(name).map(|c| c.id.as_str()), Some(id));
    }
}

/// Continuous and peak temperatures, degC, and the range of the viscosity index (practice of
/// finished oils, from memory).
#[test]
fn base_stocks_carry_their_figures() {
    for (id, continuous, peak, low, high) in [
        ("min_1", 85.0, 120.0, 90.0, Some(105.0)),
        ("min_3", 100.0, 135.0, 120.0, Some(145.0)),
        ("pao", 120.0, 150.0, 130.0, Some(180.0)),
        ("ester_polyol", 150.0, 200.0, 120.0, Some(200.0)),
        ("pag_ws", 120.0, 160.0, 180.0, Some(280.0)),
        ("veg", 65.0, 90.0, 190.0, Some(230.0)),
        ("water_glycol", 50.0, 60.0, 180.0, Some(220.0)),
    ] {
        let base = BOOK.base_stocks.get(id).unwrap_or_else(|| panic!("{id}"));
        assert!(
            (to_celsius(base.continuous) - continuous).abs() < 1e-9,
            "{id}"
        );
        assert!((to_celsius(base.peak) - peak).abs() < 1e-9, "{id}");
        assert!((base.vi.0.base() - low).abs() < 1e-9, "{id}");
        assert_eq!(base.vi.1.map(|v| v.base().round()), high, "{id}");
    }
    for base in &BOOK.base_stocks {
        assert!(base.continuous < base.peak, "{}", base.id);
    }
}

/// Pour margins by lubrication (ASM Handbook and TM 5-3895 for splash, else common practice).
#[test]
fn every_way_of_lubrication_has_a_pour_rule_or_is_grease() {
    for lubrication in Lubrication::ALL {
        let rules = BOOK.pour_margins.iter();
        let found = rules
            .filter(|rule| rule.lubrication.contains(lubrication))
            .count();
        let wanted = usize::from(*lubrication != Lubrication::Grease);
        assert_eq!(found, wanted, "{}", lubrication.word());
    }
    let splash = BOOK.pour_margins.get("pour-splash").expect("built in");
    assert_eq!(splash.least.map(|k| k.base().round()), Some(5.0));
    assert_eq!(splash.preferred.map(|k| k.base().round()), Some(10.0));
}

/// A table of 1990 (FIST 2-4) is the same read by row and by column.
#[test]
fn the_grease_table_is_symmetrical() {
    let marked = |row: &str, column: &str| {
        let rule = BOOK.grease_mixing.get(&format!("mix-{row}"))?;
        let (_, mark) = rule.with.iter().find(|(name, _)| name == column)?;
        Some(*mark)
    };
    let rows = ["na", "alx", "ba", "ca", "cax", "clay", "li", "lix", "pu"];
    for row in rows {
        for column in rows {
            assert_eq!(marked(row, column), marked(column, row), "{row} {column}");
            assert!(marked(row, column).is_some(), "{row} {column}");
        }
    }
    assert_eq!(marked("li", "pu"), Some(Agreement::Incompatible));
    assert_eq!(marked("li", "lix"), Some(Agreement::Compatible));
}

#[test]
fn cautions_follow_the_facts() {
    let engine = Suitability::new(&BOOK);
    let ids = |setting: &str| {
        let facts = facts::Setting::of(setting);
        let (point, oil) = (engine.point(&facts.point), engine.oil(&facts.oil));
        let found = engine.cautions(&point, Some(&oil));
        found.iter().map(|c| c.id.clone()).collect::<Vec<_>>()
    };
    let plain = ids("point lubrication splash; point oil temperature 40");
    for always in ["lockout", "environment", "defer-maker", "defer-proof"] {
        assert!(plain.iter().any(|id| id == always), "{always}: {plain:?}");
    }
    for never in ["hot-oil", "food", "oxygen", "grease-gun", "pfpe"] {
        assert!(!plain.iter().any(|id| id == never), "{never}: {plain:?}");
    }
    assert!(ids("point oil temperature 75").contains(&"hot-oil".into()));
    assert!(
        ids("").contains(&"hot-oil".into()),
        "not stated is not cool"
    );
    assert!(ids("point lubrication grease").contains(&"grease-gun".into()));
    assert!(ids("oil base PFPE").contains(&"pfpe".into()));
    assert!(ids("point food zone yes").contains(&"food".into()));
}
