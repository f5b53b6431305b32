//! The other kinds of sheet: audit, oil, area, and those to look things up on.

use super::fixtures::{caution, curves, overview, sheet};
use filmwright::report::draw::trend::{TrendPanel, TrendSample};
use filmwright::report::model::*;
use filmwright::report::names::Href;

fn panel(tag: &str, steps: [f64; 5], floor: f64, ceiling: f64, mark: Mark, latest: &str) -> Panel {
    Panel {
        tag: tag.into(),
        label: "MG-220".into(),
        mark,
        figure: TrendPanel {
            id: format!("trend-{tag}"),
            title: format!("{tag}: viscosity at 40 °C over five quarters"),
            description: format!("Latest {latest} mm²/s; {steps:?} VG steps from the label."),
            samples: steps
                .into_iter()
                .enumerate()
                .map(|(i, s)| TrendSample {
                    day: 91.0 * i as f64,
                    steps: s,
                })
                .collect(),
            tolerance: 0.25,
            floor: Some(floor),
            ceiling: Some(ceiling),
            latest: latest.into(),
            dates: [("Sep 2025".into(), 0.0), ("Sep 2026".into(), 364.0)],
            reach: 2.5,
        },
    }
}

fn cell(count: u32, machines: &str, means: &str) -> CrossCell {
    CrossCell {
        count,
        machines: machines.into(),
        means: means.into(),
    }
}

#[expect(clippy::too_many_lines, reason = "a page model written out")]
pub(crate) fn audit() -> Sheet {
    let row = |label: &str, note: &str, serves: Option<CrossCell>, not: CrossCell| CrossRow {
        label: label.into(),
        note: note.into(),
        serves,
        not,
    };
    let sample = |tag: &str, mark: Mark, margins: &[&str], missing: &str| SampleRow {
        machine: Phrase::new().tag(tag),
        label: "MG-220".into(),
        drawn: "2026-09-15".into(),
        nu40: "148".into(),
        nu100: "14.1".into(),
        as_labelled: "no, −33 %".into(),
        asks: "174 to 663".into(),
        mark,
        margins: margins.iter().map(|m| (*m).into()).collect(),
        flags: "none".into(),
        missing: missing.into(),
    };
    let body = AuditSheet {
        answer: Answer {
            mark: None,
            headline: "One oil must come out now. Four are what the label says and do not serve."
                .into(),
            sentences: vec!["EL-701 runs on oil a full grade too thin.".into()],
        },
        caution: caution(),
        cross: vec![
            row(
                "as labelled",
                "within its grade",
                Some(cell(3, "KL-501, PM-115, SC-221", "Leave alone.")),
                cell(
                    4,
                    "CV-104, CV-105, HP-210, SC-220",
                    "Change the specification.",
                ),
            ),
            row(
                "the labelled oil, changed",
                "",
                Some(cell(2, "HP-710, ML-301", "Find out why.")),
                cell(0, "", ""),
            ),
            row(
                "another oil",
                "",
                Some(cell(1, "PM-116", "Correct at the next change.")),
                cell(1, "EL-701", "Act, and find the source."),
            ),
            row(
                "not known",
                "",
                None,
                cell(4, "FN-402 (sample too old), ML-302, KL-502, RL-801", ""),
            ),
        ],
        findings: vec![Finding {
            id: "f1".into(),
            number: 1,
            level: "act".into(),
            title: "EL-701: thin by a third, and falling.".into(),
            text: "148 mm²/s at 40 °C under a VG 220 label; the machine cannot go below 174."
                .into(),
            causes: vec![Evidence {
                cause: "VG 46 oil in the top-up can".into(),
                speaks_for: vec!["both viscosities fall together".into()],
                against: vec!["no zinc found".into()],
            }],
            what: "Drain and refill. Check the can.".into(),
        }],
        panels: vec![
            panel(
                "EL-701",
                [0.0, -0.02, -0.05, -0.6, -1.04],
                -0.61,
                2.9,
                Mark::Fails,
                "148",
            ),
            panel(
                "CV-104",
                [0.0, 0.0, -0.01, -0.02, -0.03],
                0.3,
                -0.98,
                Mark::Fails,
                "217",
            ),
            panel(
                "ML-301",
                [0.0, 0.05, 0.12, 0.2, 0.28],
                -1.13,
                1.33,
                Mark::Holds,
                "356",
            ),
        ],
        panels_caption: "Viscosity at 40 °C, quarterly. The figure is the latest value in mm²/s."
            .into(),
        samples: vec![
            sample("EL-701", Mark::Fails, &["−0.5 hot", "+3.9 cold"], ""),
            sample("ML-302", Mark::Open, &[], "never sampled"),
        ],
        steps: Vec::new(),
        steps_title: String::new(),
        trust: vec!["Drawn live from the drain line on 8 machines, by suction on 4.".into()],
        sign: SignOff {
            meaning: "Accepting the findings releases no change of oil.".into(),
            boxes: vec![SignBox {
                role: "Audited".into(),
                accepts: "Samples and labels as found.".into(),
            }],
        },
    };
    let mut sheet = sheet("audit", "", "Audit", Body::Audit(Box::new(body)));
    sheet.subtitle = "What is in the machines, against what they need".into();
    sheet
}

pub(crate) fn oil() -> Sheet {
    let mut figure = curves();
    figure.lines.truncate(1);
    figure.lines[0].tolerance = Some((
        vec![(40.0, 198.0), (100.0, 24.4)],
        vec![(40.0, 242.0), (100.0, 28.4)],
    ));
    figure.jaws.clear();
    figure.bands.clear();
    figure.details.clear();
    let at = |at: &str, nu: &str, origin, remark: &str| OilPoint {
        at: at.into(),
        values: vec![nu.into()],
        origin,
        remark: remark.into(),
    };
    let body = OilSheet {
        headline: "PAO EP gear oil of ISO VG 220, VI 155.".into(),
        because: "Stated at two temperatures, 40 to 100 °C.".into(),
        grades: vec![("ISO VG".into(), "220 new, 220 worn.".into())],
        cold: vec![("Pour point".into(), "−42 °C.".into())],
        starts: vec![OilStart {
            at: "−19 °C".into(),
            limit: "25\u{202f}000 mm²/s".into(),
            below: "59 K".into(),
            of: "splash lubrication".into(),
            step: "9".into(),
        }],
        life: vec![("Guidance".into(), "never a promise.".into())],
        lives: vec![OilLife {
            at: "80 °C".into(),
            equation: "2900 h to 12\u{202f}000 h".into(),
            rule_of_ten: "3000 h to 11\u{202f}000 h".into(),
            remark: String::new(),
        }],
        more_uses: "Three more lubrication points stand on the sheets of their machines.".into(),
        facts: vec![
            ("Base".into(), "PAO".into()),
            ("Additives".into(), "EP".into()),
            ("Pour point".into(), "−42 °C".into()),
        ],
        caution: caution(),
        findings: vec!["Stated VI 160; the two viscosities give 155.".into()],
        curves: Some(Curves {
            figure,
            caption: "The line with the ends of its grade.".into(),
            notes: Vec::new(),
        }),
        points: vec![
            at(
                "−18 °C",
                "14\u{202f}600",
                None,
                "58 K below the coldest stated point",
            ),
            at("40 °C", "220", Some(Origin::Supplier), ""),
            at("100 °C", "26.4", Some(Origin::Supplier), ""),
        ],
        columns: vec!["ν, mm²/s".into()],
        uses: vec![
            OilUse {
                machine: Phrase::new().link("CV-104", Href::here("cv")),
                name: "head drive".into(),
                mark: Some(Mark::Holds),
                role: "proposed".into(),
                says: "+0.67 hot".into(),
            },
            OilUse {
                machine: Phrase::new().tag("HP-210"),
                name: "hydraulic set".into(),
                mark: None,
                role: "barred".into(),
                says: "class needed".into(),
            },
        ],
        steps: Vec::new(),
    };
    sheet("oil", "SG-220", "SG-220", Body::Oil(Box::new(body)))
}

pub(crate) fn area() -> Sheet {
    let overview = overview();
    let Body::Overview(body) = overview.body else {
        panic!("an overview")
    };
    let body = AreaSheet {
        machines: body.machines,
        band_axis: body.band_axis,
        caution: caution(),
    };
    sheet("area", "yard", "Yard", Body::Area(Box::new(body)))
}

pub(crate) fn revision() -> Sheet {
    let body = RevisionPage {
        since: "revision B, 2026-06-04".into(),
        rows: vec![RevisionRow {
            what: Phrase::new().tag("CV-104"),
            was_mark: Some(Mark::Tight),
            was: "on SG-320".into(),
            is_mark: Some(Mark::Holds),
            is: "on SG-220".into(),
            because: "Sump rise measured: 42 K, was assumed 55 K.".into(),
        }],
        rest: "Seven smaller changes moved nothing.".into(),
    };
    sheet("changes", "", "Changes", Body::Revision(Box::new(body)))
}

pub(crate) fn methods() -> Sheet {
    let body = MethodAppendix {
        methods: vec![Method {
            id: "bearing-nu1".into(),
            name: "bearing-nu1".into(),
            title: "Reference viscosity of a rolling bearing".into(),
            formula:
                "nu1 = 45000 n^-0.83 Dpw^-0.5 for n < 1000, nu1 = 4500 n^-0.5 Dpw^-0.5 otherwise"
                    .into(),
            range: "n in r/min, Dpw in mm".into(),
            source: "ISO 281:2007".into(),
            validation: "published values, 1 %".into(),
            used_by: Phrase::new().tag("CV-104"),
        }],
    };
    sheet("methods", "", "Methods", Body::Methods(Box::new(body)))
}

/// Every formula of the program on one sheet, to be looked at.
pub(crate) fn formulas() -> Sheet {
    let methods = crate::report_formulas::all()
        .into_iter()
        .enumerate()
        .map(|(i, (file, formula))| Method {
            id: format!("f{i}"),
            name: format!("{i} {file}"),
            title: format!("{i}"),
            range: formula.clone(),
            formula,
            ..Method::default()
        })
        .collect();
    sheet(
        "methods",
        "",
        "Formulas",
        Body::Methods(Box::new(MethodAppendix { methods })),
    )
}

pub(crate) fn rules() -> Sheet {
    let body = RulesPage {
        house: vec![HouseRule {
            id: "H-1".into(),
            name: "slow bearing, EP oil".into(),
            says: "κ ≥ 0.4 for oils with EP".into(),
            replaces: "iso281-kappa".into(),
            source: "site practice 2024".into(),
            used_by: Phrase::new().tag("CV-104"),
        }],
        rules: vec![RuleRow {
            id: "ep-backstop".into(),
            rule: "ep-backstop".into(),
            title: "EP oil in a backstop".into(),
            level: "bars".into(),
            confidence: "medium".into(),
            says: "Active sulphur EP may keep a *sprag* from gripping.".into(),
            source: "common practice".into(),
            replaced: true,
        }],
    };
    sheet("rules", "", "Rules", Body::Rules(Box::new(body)))
}

pub(crate) fn glossary() -> Sheet {
    let body = Glossary {
        reserve: "0.5 step".into(),
        audit: true,
        terms: vec![Term {
            word: "sump rise".into(),
            means: "How much hotter than ambient the sump runs at load.".into(),
        }],
    };
    sheet("glossary", "", "Words", Body::Glossary(Box::new(body)))
}
