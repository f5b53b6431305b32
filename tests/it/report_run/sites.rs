//! Sites in memory, and what their pages say in every state a machine can be in.

use super::pages::{Pages, articles, written};
use crate::scenario::on;
use filmwright::cli::host::MemoryHost;

/// The demonstration as a user's own files in a folder.
pub(super) fn demo_in(folder: &str) -> MemoryHost {
    MemoryHost::new()
        .with(
            &format!("{folder}/site.yaml"),
            include_str!("../../../templates/demo/site.yaml"),
        )
        .with(
            &format!("{folder}/oils.yaml"),
            include_str!("../../../templates/demo/oils.yaml"),
        )
}

const BAD: &str =
    "\\\"'><script>alert(1)</script></style></title></svg><img src=x onerror=y>{{ 7*7 }}";

/// The same where the words stand in quotes of their own already.
const NOTE: &str =
    "'><script>alert(1)</script></style></title></svg><img src=x onerror=y>{{ 7*7 }}";

/// A site whose every name would break out of a page that let it.
pub(super) fn hostile() -> MemoryHost {
    let site = format!(
        "file: site 1\nsite: \"{BAD}\"\nclient: \"{BAD}\"\ndocument: \"{BAD}\"\nrevision: \"{BAD}\"\nauthor: \"{BAD}\"\nstatus: \"{BAD}\"\nnotes: \"{BAD} [x](javascript:alert(1))\"\nareas:\n  \"{BAD}\":\n    ambient: -5 .. 35 degC, measured \"{NOTE}\"\nmachines:\n  \"M/1 {BAD}\":\n    name: \"{BAD}\"\n    area: \"{BAD}\"\n    lubrication: splash\n    oil now: \"{BAD}\"\n    sump rise: 40 K +/- 3 K, measured \"{NOTE}\"\n    parts:\n      - gear mesh: \"{BAD}\"\n        pitch-line speed: unknown (2 .. 4 m/s), ask \"{NOTE}\"\n"
    );
    let oils = format!(
        "file: oils 1\n\"{BAD}\":\n  name: \"{BAD}\"\n  kind: gear\n  base: mineral\n  source: \"{BAD}\"\n  viscosity: [220 mm2/s at 40 degC, 18.9 mm2/s at 100 degC]\n  pour point: -18 degC\n"
    );
    MemoryHost::new()
        .with("site.yaml", &site)
        .with("oils.yaml", &oils)
}

const OILS: &str = "file: oils 1
T-220:
  name: PAO gear oil
  kind: gear
  base: PAO
  viscosity: [220 mm2/s at 40 degC, 26.4 mm2/s at 100 degC]
  pour point: -42 degC
  density: 855 kg/m3 at 15 degC
V-100:
  name: multigrade gear oil
  kind: gear
  base: mineral, polymer-thickened
  viscosity: [150 mm2/s at 40 degC, 21 mm2/s at 100 degC]
  pour point: -36 degC
";

fn site(head: &str, machine: &str) -> MemoryHost {
    let text = format!(
        "file: site 1\nsite: Test yard\n{head}machines:\n  G-1:\n    name: mill gearbox\n    lubrication: splash\n{machine}    parts:\n      - gear mesh: slow stage\n        pitch-line speed: 12 m/s\n"
    );
    MemoryHost::new()
        .with("site.yaml", &text)
        .with("oils.yaml", OILS)
}

fn pages(host: MemoryHost, more: &str) -> Pages {
    let ran = on(host, &format!("report -q -o out {more}"));
    assert_eq!(ran.exit as u8, 0, "{}", ran.err);
    written(&ran.host, "out")
}

const YARD: &str = "    ambient: -10 .. 35 degC, measured\n    sump rise: 40 K, measured\n";

#[test]
fn an_unknown_oil_in_use_is_said() {
    let pages = pages(site("", &format!("{YARD}    oil now: unknown\n")), "");
    let sheet = &pages["machine-G-1.html"];
    assert!(sheet.contains("What is in it now is not known."));
    assert!(pages["index.html"].contains("find out what is in it"));
}

#[test]
fn without_ambient_the_sheet_says_so_and_draws_no_band() {
    let pages = pages(
        site(
            "",
            "    sump: held at 70 degC, measured\n    oil now: T-220\n",
        ),
        "",
    );
    let sheet = &pages["machine-G-1.html"];
    assert!(
        sheet.contains("mbient not stated"),
        "the line under the name"
    );
    assert!(!sheet.contains("Where each oil holds"));
    assert!(sheet.contains("ambient"), "a gap");
}

#[test]
fn a_range_is_drawn_as_a_gap_with_what_it_decides() {
    let unknown = "    ambient: -10 .. 35 degC, measured\n    sump rise: unknown (25 .. 75 K), ask \"fitter\"\n    oil now: T-220\n";
    let pages = pages(site("", unknown), "");
    let sheet = &pages["machine-G-1.html"];
    assert!(sheet.contains("G-1"), "numbered");
    assert!(sheet.contains("sump rise"), "named");
    assert!(sheet.contains("fitter"), "whom to ask");
    assert!(
        sheet.contains("holds or fails") || sheet.contains("which oil"),
        "what it decides"
    );
    assert!(
        pages["index.html"].contains("G-1, G-1"),
        "the overview names sheet and gap"
    );
}

#[test]
fn a_tolerance_becomes_a_whisker_and_judges_nothing() {
    let line = |tolerance: &str| {
        format!(
            "    ambient: -10 .. 35 degC, measured\n    sump rise: 40 K{tolerance}, measured\n    oil now: T-220\n"
        )
    };
    let with = pages(site("", &line(" +/- 5 K")), "");
    let without = pages(site("", &line("")), "");
    assert!(with["machine-G-1.html"].contains("over the stated tolerance of sump rise"));
    assert!(with["machine-G-1.html"].contains("class=\"whisker\""));
    assert!(!without["machine-G-1.html"].contains("class=\"whisker\""));
    let answer = "Keep T-220. It holds";
    for pages in [&with, &without] {
        assert!(articles(&pages["machine-G-1.html"])[0].contains(answer));
    }
}

#[test]
fn an_unknown_loss_is_drawn_worn_and_new() {
    let pages = pages(site("", &format!("{YARD}    oil now: V-100\n")), "");
    let sheet = &pages["machine-G-1.html"];
    assert!(sheet.contains("greatest plausible loss") || sheet.contains("Faint: as new"));
}

#[test]
fn a_tight_oil_is_settled_while_its_acceptance_lasts() {
    let accept = "accept:\n  - machine: G-1\n    oil: T-220\n    verdict: tight\n    by: works engineer\n    on: 2026-01-10\n    until: 2026-12-31\n    because: low load\n";
    // a floor of 52 mm2/s at 75 degC lies a third of a step below this oil
    let floor = format!("{YARD}    oil now: T-220\n    floor: 48 mm2/s, maker\n");
    let host = || site(accept, &floor);
    let inside = pages(host(), "--on 2026-06-01");
    let after = pages(host(), "--on 2027-06-01");
    assert!(inside["machine-G-1.html"].contains("is tight, accepted by works engineer"));
    assert!(inside["index.html"].contains("One machine is settled."));
    assert!(after["index.html"].contains("One machine needs attention."));
    assert!(after["index.html"].contains("no longer in force"));
}

#[test]
fn units_of_the_united_states_are_used_throughout() {
    let pages = pages(
        site("", &format!("{YARD}    oil now: T-220\n")),
        "--units us --paper letter",
    );
    let sheet = &pages["machine-G-1.html"];
    assert!(sheet.contains("\u{202f}°F") && sheet.contains("size:letter"));
    // 75 °C running hot, -10 °C at the start
    assert!(
        sheet.contains("<small>mm²/s, 167\u{202f}°F</small>"),
        "the hot column"
    );
    assert!(
        sheet.contains("<small>mm²/s, 14\u{202f}°F</small>"),
        "the cold column"
    );
    assert!(sheet.contains("At<small>°F</small>"), "the limits");
}

#[test]
fn a_logo_is_carried_or_refused_with_its_reason() {
    let head = "client: Test client\nlogo: logo.svg\n";
    let machine = format!("{YARD}    oil now: T-220\n");
    let carried = pages(
        site(head, &machine).with("logo.svg", "<svg xmlns='http://www.w3.org/2000/svg'/>"),
        "",
    );
    assert!(carried["index.html"].contains("alt=\"logo of Test client\""));
    let missing = on(site(head, &machine), "report -q -o out");
    assert_eq!(missing.exit as u8, 4, "{}", missing.err);
    let other = on(
        site(head, &machine).with("logo.svg", "GIF89a"),
        "report -q -o out",
    );
    assert_eq!(other.exit as u8, 3, "{}", other.err);
    assert!(
        other.err.contains("neither a PNG nor an SVG"),
        "{}",
        other.err
    );
}

#[test]
fn the_users_templates_stand_in_the_place_of_the_built_in() {
    let machine = format!("{YARD}    oil now: T-220\n");
    let host = site("", &machine)
        .with(
            "templates/close.html",
            "<p>beside the site: {{ frame.site }}</p></main></body></html>",
        )
        .with(
            "mine/close.html",
            "<p>named: {{ frame.site }}</p></main></body></html>",
        );
    let beside = pages(host.clone(), "");
    assert!(beside["index.html"].contains("beside the site: Test yard"));
    let named = pages(host.clone(), "--templates mine");
    assert!(named["index.html"].contains("named: Test yard"));
    let broken = on(
        host.with("mine/close.html", "{% if %}"),
        "report -q -o out --templates mine",
    );
    assert_eq!(broken.exit as u8, 3);
    assert!(broken.err.contains("close.html:1"), "{}", broken.err);
}
