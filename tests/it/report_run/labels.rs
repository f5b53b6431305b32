//! Label sheets: words only, one label a lubrication point that has an oil proposed.

use crate::scenario::filmwright;

#[test]
fn a_label_for_every_point_with_an_oil() {
    let ran = filmwright("labels --demo");
    assert_eq!(ran.exit as u8, 0, "{}", ran.err);
    let labels = ran.out.matches("Nothing else goes in here.").count();
    assert_eq!(
        labels, 16,
        "one for each point but M02, where nothing holds"
    );
    assert!(ran.err.contains("no label for M02"), "{}", ran.err);
    assert!(
        ran.out.is_ascii() || !ran.out.contains('\u{1b}'),
        "no colour"
    );
    assert!(
        ran.out.lines().all(|l| l.chars().count() <= 56),
        "a label is 56 wide"
    );
    assert!(
        ran.out
            .contains("M04\nWheeled loaders, vane and axial piston pumps\n\n  Fill with O-12, 180"),
        "{}",
        ran.out
    );
    assert!(ran.out.contains("O-05 comes out first."));
}

#[test]
fn labels_as_a_table_and_as_a_document() {
    let csv = filmwright("labels M04 --demo -q -f csv");
    assert!(
        csv.out
            .lines()
            .nth(1)
            .is_some_and(|l| l.starts_with("M04,")),
        "{}",
        csv.out
    );
    let document = filmwright("labels M04 --demo -q -f json").json();
    assert_eq!(document["labels"][0]["oil"], "O-12");
    let us = filmwright("labels M04 --demo -q --units us");
    assert!(us.out.contains("gal"), "{}", us.out);
    assert_eq!(filmwright("labels X-99 --demo -q").exit as u8, 5);
}
