//! Judging: the short cut, the general way and the explanation agree to the last bit.

#[path = "../bench/generate.rs"]
mod generate;

use filmwright::assets;
use filmwright::input::file::FileKind;
use filmwright::input::load::{self, With};
use filmwright::input::rules::rulebook;
use filmwright::judge::explain::agrees;
use filmwright::judge::weigh::weigh_generally;
use filmwright::judge::{Verdict, weigh};
use filmwright::model::Site;
use filmwright::model::rulebook::Rulebook;
use filmwright::problem::Problems;
use filmwright::relation::bearing::designation::DimensionTable;
use filmwright::source::SourceSet;
use filmwright::weighing::{Scales, Settings};

/// The built-in rules.
pub(crate) fn rules() -> Rulebook {
    rulebook(&[assets::builtin_rules()]).unwrap_or_else(|f| panic!("{f:?}"))
}

/// A site from texts.
pub(crate) fn site(site: &str, oils: &str, rules: &Rulebook) -> Site {
    let mut set = SourceSet::new();
    let mut problems = Problems::new();
    let trees = [
        load::take(
            &mut set,
            FileKind::Site,
            "site.yaml",
            site.as_bytes(),
            &mut problems,
        ),
        load::take(
            &mut set,
            FileKind::Oils,
            "oils.yaml",
            oils.as_bytes(),
            &mut problems,
        ),
    ];
    let with = With {
        rules,
        bearings: DimensionTable::built_in(),
        calculated: &[],
    };
    load::load(&set, &trees, &with, &[], &mut problems).unwrap_or_else(|_| {
        let look = filmwright::problem::render::Look::default();
        panic!(
            "{}",
            filmwright::problem::render::all(&set, &problems, look)
        )
    })
}

fn demo(rules: &Rulebook) -> Site {
    let text = |name| assets::template(name).unwrap_or_default();
    site(text("demo/site.yaml"), text("demo/oils.yaml"), rules)
}

#[test]
fn the_short_cut_gives_the_same_bits() {
    let rules = rules();
    let generated = site(
        &generate::site(60, 20, 3, true),
        &generate::oils(20, 5),
        &rules,
    );
    for site in [demo(&rules), generated] {
        let scales = Scales::new(&site, &rules, Settings::default()).expect("curves");
        for point in &site.points {
            let (_, ready) = scales.prepare(point);
            for oil in &scales.oils {
                let (short, general) = (weigh(&ready, oil), weigh_generally(&ready, oil));
                assert_eq!(short, general, "{} with {}", point.address(), oil.curves.id);
            }
        }
    }
}

#[test]
fn the_explanation_gives_the_same_bits() {
    let rules = rules();
    let site = demo(&rules);
    let scales = Scales::new(&site, &rules, Settings::default()).expect("curves");
    for point in &site.points {
        let weighed = scales.weigh(point);
        for candidate in &weighed.candidates {
            let told = scales.explain(&weighed, candidate);
            let settings = weighed.ready.settings.len();
            // with unknowns the margins of different ends may come from different settings
            if settings == 1 {
                assert!(
                    agrees(&candidate.judgement, &told),
                    "{} with {}: {:?} against {:?}",
                    point.address(),
                    site.oils[candidate.oil].id,
                    candidate.judgement,
                    told.margins
                );
            }
        }
    }
}

/// The word never disagrees with the margins beside it.
#[test]
fn the_word_agrees_with_the_margins() {
    let rules = rules();
    let site = site(
        &generate::site(80, 30, 17, false),
        &generate::oils(30, 23),
        &rules,
    );
    let scales = Scales::new(&site, &rules, Settings::default()).expect("curves");
    for point in &site.points {
        for candidate in scales.weigh(point).candidates {
            let j = candidate.judgement;
            let margins: Vec<f64> = [j.hot, j.cold]
                .into_iter()
                .flatten()
                .map(|m| m.value)
                .collect();
            match j.verdict {
                Verdict::Holds => assert!(margins.iter().all(|m| *m >= j.reserve)),
                Verdict::Tight => assert!(margins.iter().all(|m| *m >= -1e-9)),
                Verdict::Fails => assert!(!j.unmet.is_empty()),
                Verdict::Open => {}
            }
        }
    }
}

/// Weighing does not depend on the order of the oils.
#[test]
fn the_order_of_oils_changes_no_verdict() {
    let rules = rules();
    let oils = generate::oils(12, 31);
    let mut blocks: Vec<&str> = oils.split("\nOIL-").collect();
    let head = blocks.remove(0);
    blocks.reverse();
    let reversed = format!("{head}\nOIL-{}", blocks.join("\nOIL-").trim_end());
    let text = generate::site(20, 12, 41, true);
    let verdicts = |oils: &str| {
        let site = site(&text, oils, &rules);
        let scales = Scales::new(&site, &rules, Settings::default()).expect("curves");
        let mut all = Vec::new();
        for point in &site.points {
            for c in scales.weigh(point).candidates {
                all.push((
                    point.address(),
                    site.oils[c.oil].id.clone(),
                    c.judgement.verdict.word(),
                    c.judgement.hot.map(|m| m.value.to_bits()),
                ));
            }
        }
        all
    };
    assert_eq!(verdicts(&oils), verdicts(&format!("{reversed}\n")));
}
