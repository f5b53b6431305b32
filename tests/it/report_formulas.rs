//! Every formula in the program's records is understood by the formula reader.

use filmwright::report::formula::Formula;

/// The formulas of the relations' records, read from the source so that none can be missed.
#[expect(clippy::disallowed_methods, reason = "reads the program's own source")]
fn formulas(folder: &std::path::Path, found: &mut Vec<(String, String)>) {
    let mut entries: Vec<_> = std::fs::read_dir(folder)
        .expect("a folder")
        .map(|e| e.expect("an entry").path())
        .collect();
    entries.sort();
    for path in entries {
        if path.is_dir() {
            formulas(&path, found);
        } else if path.extension().is_some_and(|e| e == "rs") {
            let text = std::fs::read_to_string(&path).expect("a text");
            let name = path.display().to_string();
            found.extend(texts_after(&text, "formula: \"").map(|f| (name.clone(), f)));
        }
    }
}

/// The string literals that follow a mark.
fn texts_after<'a>(source: &'a str, mark: &'a str) -> impl Iterator<Item = String> + 'a {
    source.split(mark).skip(1).map(|rest| {
        let mut out = String::new();
        let mut chars = rest.chars();
        while let Some(c) = chars.next() {
            match c {
                '"' => break,
                '\\' => match chars.next() {
                    // a line carried on: its indentation is no part of the text
                    Some('\n') => {
                        let after = chars.as_str().trim_start();
                        chars = after.chars();
                    }
                    Some(other) => out.push(other),
                    None => break,
                },
                c => out.push(c),
            }
        }
        out
    })
}

/// All of them, with their files.
pub(crate) fn all() -> Vec<(String, String)> {
    let mut found = Vec::new();
    formulas(
        std::path::Path::new(concat!(env!("CARGO_MANIFEST_DIR"), "/src")),
        &mut found,
    );
    found
}

#[test]
fn every_formula_is_understood() {
    let found = all();
    assert!(found.len() > 40, "only {} formulas found", found.len());
    let strange: Vec<_> = found
        .iter()
        .filter(|(_, formula)| Formula::parse(formula).is_none())
        .collect();
    assert!(strange.is_empty(), "not understood: {strange:#?}");
}
