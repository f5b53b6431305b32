//! The sheet says what would mend each oil, what would unsettle the proposal, and, where asked,
//! how sure it is; with the figures of the commands.

use crate::scenario::filmwright;
use std::path::Path;

fn sheet(options: &str, machine: &str) -> String {
    let ran = filmwright(&format!(
        "report --demo -q -o out --only {machine} {options}"
    ));
    let path = format!("out/machine-{machine}.html");
    let bytes = ran.host.files.get(Path::new(&path));
    String::from_utf8(bytes.expect("the sheet is written").clone()).expect("text")
}

#[test]
fn the_sheet_tells_the_mends_of_the_command() {
    let page = sheet("", "M02");
    assert!(page.contains("Would hold with"), "no table of changes");
    let json = filmwright("mend M02 O-13 --demo -f json -q").json();
    let says = json["changes"][0]["says"].as_str().expect("words");
    // the page ties figure and unit and writes the true minus; the words before them are the same
    let begins = says.split(" 6.").next().expect("words");
    assert!(page.contains(begins), "{begins}");
    assert!(
        !page.contains("meets every limit in"),
        "sampled without being asked"
    );
}

#[test]
fn the_sheet_tells_how_sure_it_is_only_where_asked() {
    let page = sheet("--scatter 40", "M01");
    assert!(
        page.contains("Of 40 cases within the tolerances"),
        "not told"
    );
    assert!(page.contains("The verdict stands as it is."));
    assert!(page.contains("What would unsettle the proposal"));
}

/// Eight oils are mended on a sheet, and the sheet says where the others are found.
#[test]
fn oils_without_a_row_are_counted_and_the_command_is_named() {
    let weighed = filmwright("weigh M08 --demo -f json -q").json();
    let short = weighed["judgements"].as_array().expect("a list").iter();
    let short = short.filter(|j| matches!(j["verdict"].as_str(), Some("tight" | "open" | "fails")));
    let left = short.count() - 8;
    assert!(left > 1, "{left}");
    let page = sheet("", "M08");
    assert!(page.contains(&format!("{left} other oils")), "not counted");
    assert!(page.contains("Not worked out here; found by: filmwright mend M08 OIL"));
}
