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
