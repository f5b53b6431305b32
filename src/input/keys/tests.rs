use super::*;
use crate::model::machine::Lubrication;
use crate::model::oil::OilKind;
use crate::model::part::{BearingClass, GearType};
use std::collections::BTreeSet;

#[test]
fn keys_are_unique_in_their_record_and_described() {
    for record in records() {
        let mut seen = BTreeSet::new();
        for key in record.all() {
            assert!(
                seen.insert(key.name),
                "{} twice in {}",
                key.name,
                record.name
            );
            assert_eq!(spelt(key.name), key.name);
            assert!(
                key.says.ends_with('.') && !key.says.contains('!'),
                "{}",
                key.name
            );
            assert!(!key.unstated.is_empty() && !key.form.says().is_empty());
        }
        for must in record.must {
            assert!(record.key(must).is_some(), "{must}");
        }
    }
}

#[test]
fn both_spellings_are_one_key_and_x_keys_are_none() {
    for written in ["sump rise", "sump_rise", " sump_rise"] {
        assert_eq!(
            machine::MACHINE.key(written).map(|k| k.name),
            Some("sump rise")
        );
    }
    assert!(is_private("x-cost centre"));
    assert_eq!(machine::MACHINE.meant("start limt"), Some("start limit"));
    assert_eq!(machine::MACHINE.meant("Sump-Rise"), Some("sump rise"));
    assert_eq!(machine::MACHINE.meant("colour"), None);
}

#[test]
fn a_key_knows_where_it_belongs() {
    let names = |key, except: &'static Record| -> Vec<&str> {
        owners(key, except).iter().map(|r| r.name).collect()
    };
    assert_eq!(
        names("pitch-line speed", &part::ROLLING_BEARING),
        ["a gear"]
    );
    assert_eq!(names("worm diameter", &part::GEAR_MESH), ["a worm mesh"]);
    assert!(names("nonsense", &part::GEAR_MESH).is_empty());
}

#[test]
fn words_of_the_table_are_the_words_of_the_model() {
    let words = |written: &[(&'static str, Lubrication)]| -> Vec<&'static str> {
        written.iter().map(|(w, _)| *w).collect()
    };
    assert_eq!(words(Lubrication::WRITTEN), machine::LUBRICATION);
    let kinds: Vec<&str> = OilKind::WRITTEN.iter().map(|(w, _)| *w).collect();
    assert_eq!(kinds, oil::KIND);
    let types: Vec<&str> = BearingClass::WRITTEN.iter().map(|(w, _)| *w).collect();
    assert_eq!(types, part::BEARING_TYPE);
    let types: Vec<&str> = GearType::WRITTEN.iter().map(|(w, _)| *w).collect();
    assert_eq!(types, part::GEAR_TYPE);
}

#[test]
fn the_printed_table_holds_every_key() {
    let text = list::text();
    for record in records() {
        for key in record.keys {
            assert!(
                text.contains(&format!("\n  {:<20} {}", key.name, key.says)),
                "{}",
                key.name
            );
        }
    }
}
