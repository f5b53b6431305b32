use super::*;

const FIRST: &str = "file: site 1\n\nmachines:\n  A-1:\n    register row: 2\n    fill: 46 L, register\n    oil now: unknown\n    parts:\n      - component: gear_worm\n\n  B-1:\n    fill: 3 L, register\n    parts:\n      - rolling bearing: 22220\n";

#[test]
fn nothing_new_changes_nothing() {
    let merged = merge(Some(FIRST), FIRST, FIRST).expect("reads");
    assert_eq!(merged.text, FIRST);
    assert!(merged.changes.is_empty() && merged.by_hand == 0);
}

#[test]
fn hand_edits_stay_and_the_register_moves_the_rest() {
    let hand = FIRST
        .replace(
            "oil now: unknown",
            "oil now: SG-220   # drum label, 2026-07",
        )
        .replace("22220\n", "22222   # seen\n        speed: 236 r/min\n");
    let new = FIRST.replace("46 L", "48 L").replace(
        "  B-1:\n    fill: 3 L, register\n",
        "  B-1:\n    fill: 3 L, register\n    seals: NBR\n",
    ) + "\n  C-1:\n    fill: 9 L, register\n    parts:\n      - component: gear_worm\n";
    let merged = merge(Some(FIRST), &hand, &new).expect("merges");
    assert!(
        merged.text.contains("fill: 48 L, register\n"),
        "{}",
        merged.text
    );
    assert!(
        merged
            .text
            .contains("oil now: SG-220   # drum label, 2026-07"),
        "{}",
        merged.text
    );
    assert!(merged.text.contains("22222   # seen"), "{}", merged.text);
    assert!(
        merged.text.contains("    seals: NBR\n    parts:"),
        "{}",
        merged.text
    );
    assert!(
        merged.text.contains("\n  C-1:\n    fill: 9 L"),
        "{}",
        merged.text
    );
    let told: Vec<(What, &str, Option<&str>)> = merged
        .changes
        .iter()
        .map(|c| (c.what, c.record.as_str(), c.key.as_deref()))
        .collect();
    assert_eq!(
        told,
        [
            (What::Added, "C-1", None),
            (What::Changed, "A-1", Some("fill")),
            (What::Added, "B-1", Some("seals")),
        ]
    );
    assert_eq!(merged.by_hand, 2);
}

#[test]
fn a_key_changed_on_both_sides_keeps_the_hand() {
    let hand = FIRST.replace("46 L, register", "50 L, measured 2026-07-01");
    let new = FIRST.replace("46 L", "48 L");
    let merged = merge(Some(FIRST), &hand, &new).expect("merges");
    assert_eq!(merged.text, hand);
    assert_eq!(merged.changes[0].what, What::Both);
    assert_eq!(merged.changes[0].now.as_deref(), Some("48 L, register"));
}

#[test]
fn what_leaves_the_register_is_told_and_a_key_goes() {
    let new = FIRST
        .replace("    fill: 46 L, register\n", "")
        .split("\n  B-1:")
        .next()
        .map(str::to_owned)
        .expect("a part");
    let merged = merge(Some(FIRST), FIRST, &new).expect("merges");
    assert!(!merged.text.contains("46 L"));
    assert!(
        merged.text.contains("B-1"),
        "a machine is not deleted: {}",
        merged.text
    );
    assert!(
        merged
            .changes
            .iter()
            .any(|c| c.what == What::Gone && c.record == "B-1" && c.key.is_none())
    );
    assert!(
        merged
            .changes
            .iter()
            .any(|c| c.what == What::Gone && c.key.as_deref() == Some("fill"))
    );
}

#[test]
fn without_a_last_draft_what_stands_is_kept() {
    let hand = FIRST.replace("46 L", "50 L");
    let merged = merge(None, &hand, FIRST).expect("merges");
    assert_eq!(merged.text, hand);
    assert_eq!(merged.changes.len(), 1);
}
