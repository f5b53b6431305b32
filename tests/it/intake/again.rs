//! A register that comes a second time: hand edits are kept, differences proposed and taken.

use super::dirty::{REGISTER, file, machine, read};
use crate::scenario::on;
use filmwright::cli::exit::Exit;
use filmwright::cli::host::MemoryHost;

fn edited(mut host: MemoryHost, from: &str, to: &str) -> MemoryHost {
    let path = std::path::Path::new("site.yaml");
    let text = String::from_utf8(host.files[path].clone()).expect("UTF-8");
    assert!(text.contains(from), "{from} is not in\n{text}");
    let text = text.replacen(from, to, 1);
    host = host.with("site.yaml", &text);
    host.stdout.clear();
    host.stderr.clear();
    host
}

#[test]
fn the_same_register_again_changes_nothing() {
    let first = read(REGISTER, "-q");
    let before = first.host.files.clone();
    let second = on(first.host, "intake register.csv -q");
    assert_eq!(second.exit, Exit::Done, "{}", second.err);
    assert_eq!(second.host.files, before);
}

#[test]
fn hand_edits_stay_and_what_the_register_changed_is_proposed_and_taken() {
    let first = read(REGISTER, "-q");
    let hand = "oil now: SG-460   # drum beside it, 2026-08";
    let host = edited(
        first.host,
        "    oil now: unknown\n    fill: '22 L",
        &format!("    {hand}\n    fill: '22 L"),
    );
    let next = REGISTER
        .replace("55 l", "58 l")
        .replace("10;SPARE-X", "11;PU-9;pump;ISO 46;2 L;;\n10;SPARE-X");
    let host = host.with("register.csv", &next);
    let ran = on(host, "intake register.csv");
    assert_eq!(ran.exit, Exit::Done, "{}", ran.err);
    assert!(ran.out.contains("PU-9: new in the register"), "{}", ran.out);
    assert!(ran.out.contains("CMP-2, fill"), "{}", ran.out);
    assert!(
        ran.out.contains("1 value changed by hand alone: kept"),
        "{}",
        ran.out
    );
    let site = file(&ran, "site.yaml");
    assert!(
        site.contains(hand) && !site.contains("PU-9"),
        "the file in use is not touched"
    );
    let proposal = file(&ran, "site.yaml.proposed");
    assert!(
        machine(&proposal, "CMP-2").contains("fill: 58 L, register"),
        "{proposal}"
    );
    assert!(proposal.contains(hand));
    assert!(machine(&proposal, "PU-9").contains("fill: 2 L"));

    let taken = on(ran.host, "intake register.csv --accept");
    assert_eq!(taken.exit, Exit::Done, "{}", taken.err);
    let site = file(&taken, "site.yaml");
    assert!(
        site.contains(hand) && machine(&site, "CMP-2").contains("58 L"),
        "{site}"
    );
    assert!(
        !taken
            .host
            .files
            .contains_key(std::path::Path::new("site.yaml.proposed"))
    );
    let again = on(taken.host, "intake register.csv");
    assert!(
        again.out.contains("nothing: site.yaml holds all"),
        "{}",
        again.out
    );
}

#[test]
fn a_key_changed_on_both_sides_is_told_and_the_hand_stays() {
    let first = read(REGISTER, "-q");
    let host = edited(
        first.host,
        "fill: 55 L, register \"55 l\"",
        "fill: 60 L, measured 2026-08-01",
    );
    let host = host.with("register.csv", &REGISTER.replace("55 l", "58 l"));
    let ran = on(host, "intake register.csv");
    assert!(
        ran.out
            .contains("60 L, measured 2026-08-01 by hand is kept"),
        "{}",
        ran.out
    );
    assert!(
        !ran.host
            .files
            .contains_key(std::path::Path::new("site.yaml.proposed"))
    );
}

#[test]
fn a_proposal_of_another_state_is_not_taken() {
    let first = read(REGISTER, "-q");
    let host = first
        .host
        .with("register.csv", &REGISTER.replace("55 l", "58 l"));
    let ran = on(host, "intake register.csv -q");
    let host = ran
        .host
        .with("register.csv", &REGISTER.replace("55 l", "59 l"));
    let refused = on(host, "intake register.csv --accept");
    assert_eq!(refused.exit, Exit::Input);
    assert!(refused.err.contains("another state"), "{}", refused.err);
    assert!(refused.err.contains("write"), "{}", refused.err);
}

#[test]
fn the_map_is_proposed_once_and_then_followed() {
    let text = "Kennung;Was;Oel;Menge\nA-1;gearbox;ISO 220;46 L\nB-1;pump;ISO 46;2 L\n";
    let first = read(text, "");
    assert_eq!(first.exit, Exit::Input);
    assert!(first.err.contains("no row of headings"), "{}", first.err);
    let host = first
        .host
        .with("register.map.yaml", "file: map 1\nheading row: 1\n");
    let second = on(host, "intake register.csv");
    assert_eq!(second.exit, Exit::Input);
    assert!(
        second.err.contains("no column holds the tags"),
        "{}",
        second.err
    );
    let map = "file: map 1\nheading row: 1\nmakes: site\ncolumns:\n  - { column: A, heading: Kennung, is: tag }\n  - { column: B, heading: Was, is: name }\n  - { column: C, heading: Oel, is: oil now }\n  - { column: D, heading: Menge, is: fill }\n";
    let third = on(
        second.host.with("register.map.yaml", map),
        "intake register.csv -q",
    );
    assert_eq!(third.exit, Exit::Done, "{}", third.err);
    let site = file(&third, "site.yaml");
    assert!(
        machine(&site, "A-1").contains("fill: 46 L, register"),
        "{site}"
    );
    // A column that moved is found by its heading.
    let moved = "Was;Kennung;Oel;Menge\ngearbox;A-1;ISO 220;48 L\n";
    let fourth = on(
        third.host.with("register.csv", moved),
        "intake register.csv",
    );
    assert!(
        fourth.out.contains("A-1, fill: 46 L"),
        "{}{}",
        fourth.out,
        fourth.err
    );
}

#[test]
fn a_wrong_map_is_told_with_its_line() {
    for (map, wanted) in [
        (
            "file: map 1\ncolumns:\n  - column: A\n    is: sumpf\n",
            "register.map.yaml:4: \"sumpf\" is nothing a column can hold",
        ),
        (
            "file: map 1\ndecimal: dot\n",
            "register.map.yaml:2: \"dot\" is no decimal sign",
        ),
        (
            "file: map 1\nshett: x\n",
            "unknown key \"shett\"\n  write  sheet",
        ),
        ("read: x\n", "does not say that it is a map"),
        ("file: [\n", "does not read as YAML"),
    ] {
        let host = MemoryHost::new()
            .with("register.csv", REGISTER)
            .with("register.map.yaml", map);
        let ran = on(host, "intake register.csv");
        assert_eq!(ran.exit, Exit::Input, "{map}");
        assert!(ran.err.contains(wanted), "{map}: {}", ran.err);
    }
}
