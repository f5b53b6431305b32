//! Real files of two spreadsheet programs, text tables of other encodings, and files made to do
//! harm, through the command.

use super::dirty::{file, machine};
use crate::hostile;
use crate::scenario::{Ran, on};
use filmwright::cli::exit::Exit;
use filmwright::cli::host::MemoryHost;
use std::path::{Path, PathBuf};

#[expect(clippy::disallowed_methods, reason = "a test reads its own cases")]
fn host_with(name: &str) -> MemoryHost {
    let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("tests/cases/tables");
    let bytes = std::fs::read(folder.join(name)).expect("a committed table");
    let mut host = MemoryHost::new();
    host.files.insert(PathBuf::from(name), bytes);
    host
}

fn intake(name: &str) -> Ran {
    let ran = on(host_with(name), &format!("intake {name}"));
    assert_eq!(ran.exit, Exit::Done, "{name}: {}", ran.err);
    ran
}

/// Text with its line breaks folded.
fn plain(text: &str) -> String {
    text.split_whitespace().collect::<Vec<_>>().join(" ")
}

#[test]
fn workbooks_of_other_programs_are_read_alike() {
    let first = intake("openpyxl.xlsx");
    let site = file(&first, "site.yaml");
    let said = &plain(&first.out);
    assert!(said.contains("sheet \"Assets 2026\""), "{said}");
    assert!(
        said.contains("not read: \"Notes\", \"Old\" (hidden)"),
        "{said}"
    );
    assert!(said.contains("headings in row 4"), "{said}");
    assert!(
        said.contains("hidden rows are carried as well: 8"),
        "{said}"
    );
    assert!(
        machine(&site, "CV-201").contains("D5 comment: changed to CLP 320 in 2025?"),
        "{site}"
    );
    // 999 is no fill, whatever unit its format prints.
    assert!(!machine(&site, "SC-204").contains("999"), "{site}");
    // A merged area holds for its three rows; a formula without value is refused by name.
    for tag in ["CV-201", "FN-202", "PU-203"] {
        assert!(machine(&site, tag).contains("area: Crushing"), "{site}");
    }
    assert!(said.contains("=E5/3.785 has no stored value"), "{said}");
    assert!(
        machine(&site, "CV-201").contains("rolling bearing: 22220 EK C3"),
        "{site}"
    );
    assert!(
        machine(&site, "CV-201").contains("fill: 46 L, register"),
        "{site}"
    );
    assert!(
        machine(&site, "FN-202").contains("rolling bearing: 6312-2RS"),
        "{site}"
    );
    assert!(
        machine(&site, "CV-201").contains("Last change: 2026-03-02"),
        "{site}"
    );
    let checked = on(first.host.clone(), "check");
    assert_eq!(checked.exit, Exit::Done, "{}", checked.err);
    for name in [
        "openpyxl-1904.xlsx",
        "libreoffice.xlsx",
        "libreoffice.ods",
        "libreoffice-1904.xlsx",
    ] {
        let other = intake(name);
        let alike = |t: &str, name: &str| {
            let own = t.replace(name, "FILE");
            // The other program has worked the formula out.
            let lines = own
                .lines()
                .filter(|l| !l.contains("3.785") && !l.contains("12.15"));
            lines.collect::<Vec<_>>().join("\n")
        };
        assert_eq!(
            alike(&file(&other, "site.yaml"), name),
            alike(&site, "openpyxl.xlsx"),
            "{name}"
        );
    }
}

#[test]
fn text_tables_say_how_they_were_read() {
    let ran = intake("windows-1252.csv");
    assert!(
        plain(&ran.out).contains(
            "encoding windows-1252 found from the contents, delimiter semicolon found from the"
        ),
        "{}",
        ran.out
    );
    let first = file(&ran, "site.yaml");
    let bom = intake("bom.csv");
    assert!(
        plain(&bom.out).contains("encoding UTF-8 by the mark at the beginning, delimiter comma"),
        "{}",
        bom.out
    );
    assert_eq!(
        file(&bom, "site.yaml").replace("bom.csv", "windows-1252.csv"),
        first
    );
    let wide = intake("utf-16.csv");
    assert!(wide.out.contains("UTF-16LE"), "{}", wide.out);
}

#[test]
fn files_made_to_do_harm_end_in_a_named_problem() {
    for case in hostile::all() {
        let mut host = MemoryHost::new();
        host.files.insert(PathBuf::from(case.file), case.bytes);
        let ran = on(host, &format!("intake {}", case.file));
        let named = ran.err.contains("[table-")
            || ran.err.contains("no row of headings")
            || ran.err.contains("no column holds");
        assert!(
            ran.exit == Exit::Done
                || (ran.exit == Exit::Input && named && ran.err.contains("write")),
            "{}, {}: {:?} {}",
            case.file,
            case.name,
            ran.exit,
            ran.err
        );
    }
}

#[test]
fn a_list_of_oils_becomes_an_oil_file() {
    let text = "id;name;type;KV40 (cSt);KV100 (cSt);VI;pour point;flash COC;density;price per L;ISO VG\n\
        G1;gear oil EP 220;gear;220;19,0;95;< -18;240;0,893;3,10;220\n\
        G2;PAG 460;gear;;;;-33;;;;460\n\
        G3;mystery;hydraulic;;;;;;;;\n\
        G1;twice;gear;1;1;1;;;;;\n";
    let ran = on(MemoryHost::new().with("oils.csv", text), "intake oils.csv");
    assert_eq!(ran.exit, Exit::Done, "{}", ran.err);
    let oils = file(&ran, "oils.yaml");
    for wanted in [
        "viscosity: [220 mm2/s at 40 degC, 19.0 mm2/s at 100 degC]",
        "pour point: below -18 degC",
        "flash point: 240 degC COC",
        "density: 0.893 g/cm3 at 15 degC",
        "price: 3.10 per L",
        "additives: [EP]",
        "# G3:",
    ] {
        assert!(oils.contains(wanted), "{wanted} is not in\n{oils}");
    }
    assert!(
        ran.out.contains("a PAG: water-soluble or oil-soluble?"),
        "{}",
        ran.out
    );
    assert!(
        ran.out.contains("stands in an earlier row as well"),
        "{}",
        ran.out
    );
    let site = "file: site 1\nmachines:\n  A:\n    parts: [{ component: gear_worm }]\n";
    let checked = on(ran.host.with("site.yaml", site), "check");
    assert_eq!(checked.exit, Exit::Done, "{}\n{oils}", checked.err);
}
