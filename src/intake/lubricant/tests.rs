use super::*;

#[test]
fn grade_and_family_are_read_apart() {
    let r = read("ISO 220 EP");
    assert_eq!(
        (r.grade, r.families.as_slice(), r.base),
        (Some(220), &["EP"][..], None)
    );
    assert!(r.rest.is_empty());
    assert_eq!(r.says(), "ISO VG 220; family EP; base unknown");
    let r = read("HLP46");
    assert_eq!((r.grade, r.classes), (Some(46), vec!["HLP".to_owned()]));
    let r = read("gear oil 220");
    assert_eq!((r.grade, r.kind), (Some(220), Some("gear")));
    let r = read("R&O 68 or equivalent");
    assert_eq!(
        (r.grade, r.families, r.or_equivalent),
        (Some(68), vec!["R&O"], true)
    );
    let r = read("CLP-PG 460");
    assert!(r.grade == Some(460), "{r:?}");
    let r = read("220 gear?");
    assert!(r.doubtful && r.grade == Some(220));
}

#[test]
fn other_grades_are_said_as_what_they_are() {
    // AGMA 9005-D94: number 7 is ISO VG 460
    let r = read("AGMA 7 Comp?");
    assert!(r.doubtful && r.grade == Some(460), "{r:?}");
    assert_eq!(r.families, ["compounded"]);
    let r = read("5EP");
    assert_eq!((r.grade, r.families), (Some(220), vec!["EP"]));
    // SAE J300: grade 20 is 6.9 to 9.3 mm2/s at 100 degC; about VG 46 to 68 (common practice)
    let r = read("SAE 20");
    assert_eq!(r.grade, None);
    assert!(r.says().contains("roughly ISO VG 46 to 68"), "{}", r.says());
    let r = read("80W-90");
    assert!(r.says().contains("range"), "{}", r.says());
    let r = read("SAE 15W40 engine");
    assert!(
        r.says().contains("range") && r.kind == Some("engine"),
        "{}",
        r.says()
    );
}

#[test]
fn a_viscosity_is_no_name() {
    // 315 SUS at 100 degF is about 68 mm2/s at 37.8 degC: ASTM D2161
    let r = read("315 SUS");
    assert!(r.viscosity_for_name && r.grade == Some(68), "{r:?}");
    assert!(
        r.says().contains("is 68.0 mm2/s") || r.says().contains("is 67.9 mm2/s"),
        "{}",
        r.says()
    );
}

#[test]
fn names_of_products_stay_whole() {
    let r = read("Quillmere Special X");
    assert_eq!(r.rest, ["Quillmere", "Special", "X"]);
    assert_eq!(r.says(), "");
}

#[test]
fn the_temperature_of_a_viscosity_is_the_one_stated() {
    // 150 SUS at 210 degF is 31.8 mm2/s at 98.9 degC: ASTM D2161, from memory; of VG 460 at an
    // index of 95
    for text in [
        "150 SUS @ 210F",
        "150 SUS @210 °F",
        "150 SUS at 210",
        "150SUS at 210 deg F",
    ] {
        let r = read(text);
        let says = r.says();
        assert!(
            says.contains("31.") && says.contains("mm2/s at 99 degC") || says.contains("98.9 degC"),
            "{text}: {says}"
        );
        assert_eq!(r.grade, Some(460), "{text}: {says}");
        assert!(r.rest.is_empty(), "{text}: {:?}", r.rest);
    }
    // at 50 degC nobody knows the grade without the slope
    assert_eq!(read("30 cSt at 50").grade, None);
    assert_eq!(read("68 cSt at 40 C").grade, Some(68));
}

#[test]
fn a_small_number_behind_ep_is_a_consistency() {
    // NLGI consistency numbers (common practice): EP 2 is the commonest name of a grease
    for (text, want) in [
        ("EP2 grease", "2"),
        ("EP 2", "2"),
        ("Lithium EP2", "2"),
        ("MP-00", "00"),
    ] {
        let r = read(text);
        assert_eq!((r.nlgi.as_deref(), r.grade), (Some(want), None), "{text}");
        assert!(r.is_grease());
    }
    assert_eq!(read("EP 220").grade, Some(220));
    assert_eq!(read("AGMA 2 EP").nlgi, None);
}

#[test]
fn a_winter_grade_alone_is_said_to_be_one() {
    // SAE J300: W grades are of cold starting
    assert!(read("SAE 10W").says().contains("starts in the cold"));
}
