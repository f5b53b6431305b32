use super::*;
use crate::quantity::Kind;
use crate::source::place::Whose;

const TEMPERATURE: &[Kind] = &[Kind::Temperature];
const RISE: &[Kind] = &[Kind::Rise];
const SPEED: &[Kind] = &[Kind::RotationalSpeed];
const LENGTH: &[Kind] = &[Kind::Length];
const VISCOSITY: &[Kind] = &[
    Kind::KinematicViscosity,
    Kind::DynamicViscosity,
    Kind::Efflux,
];

fn body(want: Want, text: &str) -> Body {
    match read(text, &want) {
        Ok(value) => value.body,
        Err(faults) => panic!("{text}: {faults:?}"),
    }
}

fn one(want: Want, text: &str) -> (f64, &'static str) {
    match body(want, text) {
        Body::One { read, .. } => (read.value, read.unit),
        other => panic!("{text}: {other:?}"),
    }
}

#[test]
fn reads_values_with_everything_round_them() {
    let value = read(
        "42 K +/- 3 K, measured 2026-07-18, \"92 % load, one reading\"",
        &Want::stated(RISE),
    )
    .expect("ours");
    assert_eq!(value.written, "42 K +/- 3 K");
    let said = value.clauses.origin.expect("stated");
    assert_eq!(said.whose, Whose::Measured);
    assert_eq!(said.dated.as_deref(), Some("2026-07-18"));
    assert_eq!(said.note.as_deref(), Some("92 % load, one reading"));
    assert!(matches!(
        value.body,
        Body::One { deviation: Some(Deviation::Of(by)), .. } if (by.value - 3.0).abs() < 1e-12
    ));

    assert_eq!(one(Want::one(SPEED), "236 r/min, maker"), (236.0, "r/min"));
    assert_eq!(
        one(
            Want::one(VISCOSITY).at(At::Must),
            "219 mm2/s +/- 3 % at 40 degC"
        ),
        (219.0, "mm2/s")
    );
    assert_eq!(
        one(Want::one(VISCOSITY).at(At::Must), "215 SUS at 100 degF"),
        (215.0, "SUS")
    );
}

#[test]
fn reads_ranges_unknowns_bounds_and_held_values() {
    let ends = |body: Body| match body {
        Body::Range { lo, hi } | Body::Unknown(Some((lo, hi))) => (lo.value, hi.value, lo.unit),
        other => panic!("{other:?}"),
    };
    let ambient = Want::stated(TEMPERATURE).ends(Ends::Range);
    for text in [
        "-18 .. 36 degC, measured 2020..2026",
        "-18 degC .. 36 degC",
        "-18..36degC",
        "\u{2212}18 … 36 °C",
    ] {
        assert_eq!(ends(body(ambient, text)), (-18.0, 36.0, "degC"), "{text}");
    }
    let distance = Want::stated(LENGTH);
    assert_eq!(
        ends(body(distance, "unknown (125 .. 200 mm)")),
        (125.0, 200.0, "mm")
    );
    let asked = read("unknown, ask \"plant, behind guard\"", &distance).expect("ours");
    assert_eq!(asked.body, Body::Unknown(None));
    assert_eq!(asked.clauses.ask.as_deref(), Some("plant, behind guard"));
    let sump = Want::stated(TEMPERATURE).ends(Ends::Either).or_held();
    assert!(matches!(body(sump, "held at 55 degC"), Body::Held(_)));
    assert!(matches!(
        body(sump, "held at unknown (50 .. 60 degC)"),
        Body::Held(inner) if inner.is_unknown()
    ));
    assert_eq!(ends(body(sump, "38 .. 72 degC")), (38.0, 72.0, "degC"));
    assert!(matches!(
        body(Want::one(TEMPERATURE).or_bound(), "below -40 degC"),
        Body::Bound { above: false, .. }
    ));
}

/// Every fault carries its code, marks the part that is wrong, and its first mend mends it.
#[expect(clippy::too_many_lines, reason = "a table, one fault a row")]
#[test]
fn every_fault_is_named_marked_and_mended() {
    let t = Want::one(TEMPERATURE);
    let rise = Want::stated(RISE);
    let speed = Want::stated(SPEED);
    let length = Want::stated(LENGTH);
    let ambient = Want::one(TEMPERATURE).ends(Ends::Range);
    let point = Want::one(VISCOSITY).at(At::Must);
    let pour = Want::one(TEMPERATURE).or_bound();
    for (want, text, code, marked, mended) in [
        (rise, "42 degC", Code::RiseNotTemperature, "42 degC", "42 K"),
        (
            rise,
            "42 degC, measured",
            Code::RiseNotTemperature,
            "42 degC",
            "42 K, measured",
        ),
        (speed, "236", Code::UnitMissing, "236", "236 r/min"),
        (t, "75", Code::UnitMissing, "75", "75 degC"),
        (speed, "fast", Code::NumberWanted, "fast", "unknown"),
        (speed, "?", Code::NumberWanted, "?", "unknown"),
        (t, "warm", Code::NumberWanted, "warm", "75 degC"),
        (speed, "", Code::ValueMissing, "", "unknown"),
        (
            speed,
            "1e999 rpm",
            Code::NumberNotFinite,
            "1e999 rpm",
            "unknown",
        ),
        (
            speed,
            "1,480 rpm",
            Code::ThousandsComma,
            "1,480 rpm",
            "1480 rpm",
        ),
        (
            speed,
            "1 480 rpm",
            Code::ThousandsComma,
            "1 480 rpm",
            "1480 rpm",
        ),
        (
            t,
            "75,5 degC, maker",
            Code::DecimalComma,
            "75,5 degC",
            "75.5 degC, maker",
        ),
        (
            length,
            "120 milimetre",
            Code::UnitUnknown,
            "milimetre",
            "120 mm",
        ),
        (length, "120 MM", Code::UnitUnknown, "MM", "120 mm"),
        (
            point,
            "68 cst at 40 degC",
            Code::UnitUnknown,
            "cst",
            "68 mm2/s at 40 degC",
        ),
        (speed, "236 mm", Code::UnitOther, "mm", "236 r/min"),
        (
            t,
            "-300 degC",
            Code::ValueImpossible,
            "-300 degC",
            "75 degC",
        ),
        (
            ambient,
            "36 .. -18 degC",
            Code::RangeReversed,
            "36 .. -18 degC",
            "-18 .. 36 degC",
        ),
        (
            ambient,
            "36 degC",
            Code::RangeWanted,
            "36 degC",
            "36 degC .. 36 degC",
        ),
        (
            ambient,
            "-18 to 36 degC",
            Code::RangeForm,
            "-18 to 36 degC",
            "-18 .. 36 degC",
        ),
        (
            ambient,
            ".. 36 degC",
            Code::RangeForm,
            ".. 36 degC",
            "36 degC .. 36 degC",
        ),
        (
            length,
            "125-200 mm",
            Code::RangeForm,
            "125-200 mm",
            "unknown (125 .. 200 mm)",
        ),
        (
            length,
            "125 .. 200 mm",
            Code::RangeUnwanted,
            "125 .. 200 mm",
            "unknown (125 .. 200 mm)",
        ),
        (
            t,
            "60 .. 70 degC",
            Code::RangeUnwanted,
            "60 .. 70 degC",
            "60 degC",
        ),
        (t, "unknown", Code::UnknownUnwanted, "unknown", "75 degC"),
        (
            length,
            "unknown (150 mm)",
            Code::UnknownForm,
            "(150 mm)",
            "unknown",
        ),
        (
            length,
            "unknown 125 .. 200 mm",
            Code::UnknownForm,
            "125 .. 200 mm",
            "unknown (125 .. 200 mm)",
        ),
        (
            length,
            "unknown ask \"plant\"",
            Code::UnknownForm,
            "ask \"plant\"",
            "unknown, ask \"plant\"",
        ),
        (rise, "42 K +/- 3", Code::ToleranceForm, "3", "42 K +/- 3 K"),
        (rise, "42 K +/-", Code::ToleranceForm, "42 K +/-", "42 K"),
        (rise, "42 K +/- 0 K", Code::ToleranceForm, "0 K", "42 K"),
        (
            point,
            "219 mm2/s at 40 degC +/- 3 %",
            Code::ToleranceForm,
            "3 %",
            "219 mm2/s +/- 3 % at 40 degC",
        ),
        (
            ambient,
            "20 degC +/- 5 K",
            Code::ToleranceUnwanted,
            "20 degC +/- 5 K",
            "",
        ),
        (rise, "about 42 K", Code::ValueVague, "about", "42 K"),
        (
            rise,
            "~42 K, measured",
            Code::ValueVague,
            "~",
            "42 K, measured",
        ),
        (pour, "< -40 degC", Code::BoundForm, "<", "below -40 degC"),
        (
            t,
            "max 90 degC",
            Code::BoundUnwanted,
            "max 90 degC",
            "90 degC",
        ),
        (
            t,
            "below 90 degC",
            Code::BoundUnwanted,
            "below 90 degC",
            "90 degC",
        ),
        (
            t,
            "held at 55 degC",
            Code::HeldUnwanted,
            "held at",
            "55 degC",
        ),
        (
            point,
            "219 mm2/s",
            Code::AtMissing,
            "219 mm2/s",
            "219 mm2/s at 40 degC",
        ),
        (
            speed,
            "236 r/min at 40 degC",
            Code::AtUnwanted,
            "40 degC",
            "236 r/min",
        ),
        (
            rise,
            "42 K measured 2026",
            Code::ClauseUnknown,
            "measured 2026",
            "42 K, measured 2026",
        ),
        (
            rise,
            "42 K (one reading)",
            Code::ClauseUnknown,
            "(one reading)",
            "42 K, \"one reading\"",
        ),
        (
            rise,
            "42 K, mesured 2026",
            Code::ClauseUnknown,
            "mesured 2026",
            "42 K, measured 2026",
        ),
        (rise, "42 K, OEM", Code::ClauseUnknown, "OEM", "42 K, maker"),
        (
            rise,
            "42 K, by thermometer",
            Code::ClauseUnknown,
            "by thermometer",
            "42 K, \"by thermometer\"",
        ),
        (
            rise,
            "42 K, 2026-07-18",
            Code::ClauseUnknown,
            "2026-07-18",
            "42 K, measured 2026-07-18",
        ),
        (rise, "42 K,", Code::ClauseUnknown, "", "42 K"),
        (
            rise,
            "42 K, maker, nameplate",
            Code::ClauseTwice,
            "nameplate",
            "42 K, maker",
        ),
        (
            rise,
            "42 K, maker manual 6.3",
            Code::NoteUnquoted,
            "manual 6.3",
            "42 K, maker \"manual 6.3\"",
        ),
        (
            rise,
            "42 K, maker \"manual 6.3",
            Code::NoteOpen,
            "\"manual 6.3",
            "42 K, maker \"manual 6.3\"",
        ),
        (
            rise,
            "unknown, ask plant",
            Code::NoteUnquoted,
            "plant",
            "unknown, ask \"plant\"",
        ),
        (
            rise,
            "42 K, ask \"plant\"",
            Code::ClauseUnwanted,
            "ask \"plant\"",
            "42 K",
        ),
        (
            rise,
            "42 K, test \"20 h\"",
            Code::ClauseUnwanted,
            "test \"20 h\"",
            "42 K",
        ),
        (
            rise,
            "42 K, measured 18.07.2026",
            Code::DateForm,
            "18.07.2026",
            "42 K, measured 2026-07-18",
        ),
        (
            rise,
            "42 K, measured July 2026",
            Code::DateForm,
            "July 2026",
            "42 K, measured 2026-07",
        ),
        (
            rise,
            "42 K, measured 2026-02-30",
            Code::DateImpossible,
            "2026-02-30",
            "42 K, measured 2026-02-28",
        ),
        (
            rise,
            "42 K, measured 2026..2020 \"x\"",
            Code::DateOrder,
            "2026..2020",
            "42 K, measured 2020..2026 \"x\"",
        ),
        (
            Want::one(&[Kind::Volume]),
            "15 gal",
            Code::GallonWhich,
            "15 gal",
            "15 gal(US)",
        ),
    ] {
        let faults = read(text, &want).expect_err(text);
        let fault = &faults[0];
        assert_eq!(fault.code, code, "{text}: {fault:?}");
        assert_eq!(&text[fault.part.clone()], marked, "{text}");
        let after = fault.mends[0].applied(text);
        if mended.is_empty() {
            continue; // two things wrong: the next message says what remains
        }
        assert_eq!(after, mended, "{text}");
        for mend in &fault.mends {
            let after = mend.applied(text);
            let left = read(&after, &want).err().unwrap_or_default();
            assert_eq!(left, [], "{text} -> {after}");
        }
    }
}

#[test]
fn all_that_is_wrong_is_said_at_once() {
    let faults = read("42 degC, measured 18.07.2026, foo", &Want::stated(RISE)).expect_err("bad");
    let codes: Vec<Code> = faults.iter().map(|f| f.code).collect();
    assert_eq!(
        codes,
        [
            Code::RiseNotTemperature,
            Code::DateForm,
            Code::ClauseUnknown
        ]
    );
}

proptest::proptest! {
    #[test]
    fn no_text_breaks_the_grammar(
        text in "(unknown|held at|below|about|[0-9]|\\.\\.|\\+/-|at|degC|K|mm|measured|ask|test|[\"(),. -]|\\PC){0,12}"
    ) {
        let ends = [Ends::One, Ends::Range, Ends::Either];
        for (kinds, ends) in [TEMPERATURE, RISE, VISCOSITY, LENGTH].into_iter().zip(ends.into_iter().cycle()) {
            for want in [
                Want::one(kinds).ends(ends),
                Want::stated(kinds).ends(ends).at(At::May).or_held().or_bound().with_test(),
                Want::stated(kinds).at(At::Must),
            ] {
                for fault in read(&text, &want).err().unwrap_or_default() {
                    proptest::prop_assert!(text.get(fault.part.clone()).is_some(), "{:?}", fault);
                    for mend in fault.mends {
                        proptest::prop_assert!(text.get(mend.part.clone()).is_some(), "{:?}", mend);
                    }
                }
            }
        }
    }
}
