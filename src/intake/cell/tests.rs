use super::*;
use crate::input::value::Ends;

const FILL: Want = Want::stated(&[Kind::Volume, Kind::Mass]);
const SUMP: Want = Want::stated(&[Kind::Temperature]).ends(Ends::Either);

fn read(key: &str, want: &Want, text: &str, unit: Option<Unit>) -> Reading {
    let expect = Expect {
        key,
        want,
        unit,
        grease: false,
    };
    let rules = Rules {
        decimal: Some(Decimal::Comma),
        gallon: None,
        density_kg_m3: 890.0,
    };
    quantity(&Content::Text(text.into()), &expect, &rules)
}

fn value(key: &str, want: &Want, text: &str) -> String {
    let r = read(key, want, text, None);
    r.written(text).unwrap_or_else(|| format!("{r:?}"))
}

#[test]
fn fills_of_a_dirty_register() {
    // 3.785411784 and 4.54609 L a gallon: NIST SP 811 table B.8 and the UK Units of
    // Measurement Regulations 1995
    assert_eq!(
        value("fill", &FILL, "15 gal"),
        "unknown (56.8 .. 68.2 L), ask \"15 gal: US (56.8 L) or UK (68.2 L)?\""
    );
    assert_eq!(value("fill", &FILL, "68 l"), "68 L, register \"68 l\"");
    assert_eq!(
        value("fill", &FILL, "1.200"),
        "1200 L, assumed \"register: 1200 without a unit\""
    );
    assert_eq!(
        value("fill", &FILL, "1,2 L ea"),
        "1.2 L, register \"1,2 L ea\""
    );
    // 9 kg at 890 kg/m3 is 10.1 L
    assert_eq!(
        value("fill", &FILL, "9 kg"),
        "10.1 L, assumed \"register: 9 kg, at 890 kg/m3\""
    );
    assert!(read("fill", &FILL, "999", None).missing);
    assert!(read("fill", &FILL, "see plate", None).fault.is_some());
}

#[test]
fn temperatures_are_told_by_their_unit_alone() {
    assert_eq!(value("sump", &SUMP, "113F"), "113 degF, register \"113F\"");
    assert_eq!(
        value("sump", &SUMP, "52,0"),
        "52.0 degC, assumed \"register: 52.0 without a unit\""
    );
    let r = read("sump", &SUMP, "140", None);
    assert_eq!(r.value.as_deref(), Some("140 degF"));
    assert!(r.assumed && r.ask.is_some(), "{r:?}");
    let r = read(
        "sump",
        &SUMP,
        "140",
        Some(Unit::Of(Kind::Temperature, "degC")),
    );
    assert!(r.value.is_none() && r.ask.is_some(), "{r:?}");
    let r = read("sump", &SUMP, "92 (discharge)", None);
    assert!(r.value.is_none() && r.ask.is_some(), "{r:?}");
    let r = read("start", &SUMP, "-15°", None);
    assert_eq!(r.value.as_deref(), Some("-15 degC"));
    assert!(r.assumed && r.fault.is_some(), "{r:?}");
    assert!(read("sump", &SUMP, "0", None).missing);
    assert!(!read("start", &SUMP, "0", None).missing);
}
