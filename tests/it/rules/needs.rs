//! Class needs: asked for by name, and implied by a component (practice: families and
//! specifications; which class serves which is held apart).

use super::{BOOK, facts::Setting};
use filmwright::model::rulebook::Level;
use filmwright::suitability::Suitability;

/// Setting, rule, what it does, whether for want of a declaration.
const NEEDS: &[(&str, &str, Option<Level>, bool)] = &[
    // asked for by name
    (
        "oil classes CKC; point asks CKC",
        "class-asked",
        None,
        false,
    ),
    (
        "oil classes CKSMP; point asks CKC",
        "class-asked",
        None,
        false,
    ),
    (
        "oil classes HM; point asks CKC",
        "class-asked",
        Some(Level::Bars),
        false,
    ),
    ("point asks CKC", "class-asked", Some(Level::Asks), true),
    (
        "oil additives EP; point asks EP",
        "class-asked",
        None,
        false,
    ),
    (
        "oil additives R&O; point asks EP",
        "class-asked",
        Some(Level::Bars),
        false,
    ),
    (
        "oil additives none; point asks CKC",
        "class-asked",
        Some(Level::Bars),
        false,
    ),
    (
        "oil additives EP; point asks CKC",
        "class-asked",
        Some(Level::Asks),
        true,
    ),
    (
        "oil classes SAE 15W-40; point asks SAE 15W-40",
        "class-asked",
        None,
        false,
    ),
    (
        "oil classes SAE 10W-40; point asks SAE 15W-40",
        "class-asked",
        Some(Level::Asks),
        false,
    ),
    (
        "oil classes CKC; oil additives AW; point asks EP",
        "class-asked",
        Some(Level::Asks),
        false,
    ),
    (
        "oil classes CKC; oil additives EP; point asks AW",
        "class-asked",
        None,
        false,
    ),
    // implied by a component
    (
        "oil additives none; point serves gear",
        "gear-steel",
        Some(Level::Bars),
        false,
    ),
    (
        "oil classes HM; point component hyd_pump_vane",
        "hydraulic",
        None,
        false,
    ),
    (
        "oil classes HFC; point component hyd_pump_vane",
        "hydraulic",
        None,
        false,
    ),
    (
        "oil classes CKC; point component hyd_pump_vane",
        "hydraulic",
        Some(Level::Bars),
        false,
    ),
    (
        "oil classes HL; point component hyd_pump_vane",
        "hydraulic",
        Some(Level::Asks),
        false,
    ),
    (
        "point component hyd_pump_vane",
        "hydraulic",
        Some(Level::Asks),
        true,
    ),
    (
        "oil classes CKC; point serves gear",
        "gear-steel",
        None,
        false,
    ),
    (
        "oil classes CKB; point serves gear",
        "gear-steel",
        Some(Level::Asks),
        false,
    ),
    (
        "oil classes HM; point serves gear",
        "gear-steel",
        Some(Level::Bars),
        false,
    ),
    (
        "oil classes CKE; point component gear_worm",
        "gear-worm",
        None,
        false,
    ),
    (
        "oil classes CKC; point component gear_worm",
        "gear-worm",
        Some(Level::Asks),
        false,
    ),
    (
        "oil classes CKC; point component circ_general",
        "bearings-circulating",
        None,
        false,
    ),
    (
        "oil classes DAG; point component circ_general",
        "bearings-circulating",
        Some(Level::Asks),
        false,
    ),
    // the maker's class of the same group takes the place of the implied one
    (
        "oil classes CKB; point serves gear; point asks CKB",
        "gear-steel",
        None,
        false,
    ),
    (
        "oil classes HM; point serves gear; point asks EP",
        "gear-steel",
        Some(Level::Bars),
        false,
    ),
    (
        "oil kind grease; point serves motor bearing; point asks CKC",
        "class-asked",
        None,
        false,
    ),
];

#[test]
fn class_needs_bar_ask_and_pass() {
    let engine = Suitability::new(&BOOK);
    for (setting, rule, level, undecided) in NEEDS {
        let facts = Setting::of(setting);
        let found = engine.assess(&engine.point(&facts.point), &engine.oil(&facts.oil));
        let mut all = found
            .barred_by
            .iter()
            .chain(&found.conditions)
            .chain(&found.notes);
        let got = all.find(|f| f.rule == *rule);
        assert_eq!(got.map(|f| f.level), *level, "{setting}");
        assert_eq!(got.is_some_and(|f| f.undecided), *undecided, "{setting}");
    }
}
