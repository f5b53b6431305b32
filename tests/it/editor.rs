//! What editors and shells are given: schemas that accept what the reader accepts, completions with
//! the names of the folder, manual pages.

use crate::scenario::on;
use filmwright::cli::exit::Exit;
use filmwright::cli::host::MemoryHost;
use std::path::{Path, PathBuf};

const ROOT: &str = env!("CARGO_MANIFEST_DIR");

#[expect(
    clippy::disallowed_methods,
    reason = "a test reads the files it judges"
)]
fn text(path: &Path) -> String {
    std::fs::read_to_string(path).unwrap_or_else(|e| panic!("{}: {e}", path.display()))
}

#[expect(
    clippy::disallowed_methods,
    reason = "a test lists the files it judges"
)]
fn yaml_below(folder: &Path) -> Vec<PathBuf> {
    let mut found = Vec::new();
    for entry in std::fs::read_dir(folder).expect("a folder") {
        let path = entry.expect("an entry").path();
        if path.is_dir() {
            found.extend(yaml_below(&path));
        } else if path.extension().is_some_and(|e| e == "yaml") {
            found.push(path);
        }
    }
    found.sort();
    found
}

/// The validator for a file, by what its first line of content says it is.
fn validator(yaml: &str) -> Option<jsonschema::Validator> {
    let (_, head) = yaml.split_once("file:")?;
    let kind = head.split_whitespace().next()?;
    let schema = text(
        &Path::new(ROOT)
            .join("tests/schemas/.filmwright")
            .join(format!("{kind}.schema.json")),
    );
    let schema: serde_json::Value = serde_json::from_str(&schema).expect("JSON");
    Some(jsonschema::draft7::new(&schema).expect("a schema of draft 7"))
}

fn instance(yaml: &str) -> serde_json::Value {
    serde_yaml::from_str(yaml).expect("YAML")
}

#[test]
fn the_committed_schemas_are_those_of_the_reader() {
    let ran = on(
        MemoryHost::new().with("site.yaml", "file: site 1\n"),
        "schema --write",
    );
    assert_eq!(ran.exit, Exit::Done, "{}", ran.err);
    for kind in ["site", "oils", "samples", "events"] {
        let name = format!(".filmwright/{kind}.schema.json");
        let made = String::from_utf8(ran.host.files[Path::new(&name)].clone()).expect("UTF-8");
        assert!(
            made == text(&Path::new(ROOT).join("tests/schemas").join(&name)),
            "{name}: filmwright schema --write -C tests/schemas writes it anew"
        );
        let printed = on(MemoryHost::new(), &format!("schema {kind}"));
        assert!(printed.out == made);
    }
    let refused = on(MemoryHost::new(), "schema sites");
    assert_eq!(refused.exit, Exit::NoMatch);
    assert!(refused.err.contains("write"), "{}", refused.err);
}

#[test]
fn the_demonstration_and_every_good_case_are_valid() {
    let mut files = yaml_below(&Path::new(ROOT).join("templates/demo"));
    files.extend(yaml_below(&Path::new(ROOT).join("templates/starter")));
    files.extend(yaml_below(&Path::new(ROOT).join("tests/cases/good")));
    assert!(files.len() > 8);
    for path in files {
        let yaml = text(&path);
        let validator =
            validator(&yaml).unwrap_or_else(|| panic!("{} names no kind", path.display()));
        let instance = instance(&yaml);
        let wrong: Vec<String> = validator
            .iter_errors(&instance)
            .map(|e| format!("{} at {}", e, e.instance_path()))
            .collect();
        assert!(wrong.is_empty(), "{}: {}", path.display(), wrong.join("\n"));
    }
}

/// Messages about the shape of a file: keys, records and lists. What a value means is the
/// reader's, which knows more than a schema can say.
const SHAPES: &[&str] = &[
    "key-unknown",
    "key-missing",
    "key-misplaced",
    "list-wanted",
    "record-wanted",
    "part-kind-missing",
    "word-unknown",
    "yes-no-wanted",
    "months-twelve",
    "file-edition",
    "file-kind-other",
    "value-wanted",
    "list-empty",
];

#[test]
fn every_case_of_a_bad_shape_fails() {
    let mut passed = Vec::new();
    let mut seen = 0;
    for name in SHAPES {
        let folder = Path::new(ROOT).join("tests/cases/bad").join(name);
        let mut failed = false;
        for path in yaml_below(&folder) {
            let yaml = text(&path);
            let kind = if path.ends_with("oils.yaml") {
                "oils"
            } else {
                "site"
            };
            let schema = text(
                &Path::new(ROOT).join(format!("tests/schemas/.filmwright/{kind}.schema.json")),
            );
            let schema: serde_json::Value = serde_json::from_str(&schema).expect("JSON");
            let validator = jsonschema::draft7::new(&schema).expect("a schema of draft 7");
            seen += 1;
            failed |= !validator.is_valid(&instance(&yaml));
        }
        if !failed {
            passed.push(*name);
        }
    }
    assert!(passed.is_empty(), "valid by the schema: {passed:?}");
    assert!(seen >= SHAPES.len());
}

const SITE: &str = "file: site 1\nmachines:\n  CV-104:\n    name: Conveyor, head drive\n    parts: [{ component: gear_worm }]\n  HPU REEL:\n    name: Reel press\n    points:\n      tank:\n        parts: [{ component: hyd_any_general }]\n";
const OILS: &str = "file: oils 1\nSG-220:\n  name: PAO gear oil\n  viscosity: [220 mm2/s at 40 degC, 26 mm2/s at 100 degC]\n";

#[test]
fn names_of_the_folder_are_completed_with_what_they_are() {
    let host = MemoryHost::new()
        .with("site.yaml", SITE)
        .with("oils.yaml", OILS);
    let names = |kind: &str| on(host.clone(), &format!("completions --names {kind}")).out;
    assert_eq!(
        names("tags"),
        "CV-104\tConveyor, head drive\nHPU REEL\tReel press\nHPU REEL/tank\tReel press\n"
    );
    assert_eq!(names("oils"), "SG-220\tPAO gear oil\n");
    assert!(names("rules").contains("gear_parallel_bevel\t"));
    // A file with mistakes still completes.
    let broken = MemoryHost::new().with("site.yaml", &SITE.replace("parts", "prats"));
    assert!(
        on(broken, "completions --names tags")
            .out
            .contains("CV-104")
    );
    assert!(
        on(MemoryHost::new(), "completions --names tags --demo")
            .out
            .contains("M01\t")
    );
}

#[test]
fn every_shell_has_a_script_that_asks_for_the_names() {
    for (shell, wanted) in [
        (
            "bash",
            vec![
                "complete -F _filmwright_all",
                "why) if ((n == 0)); then kind=tags; else kind=oils; fi",
                "\"weigh --oil\") kind=oils",
            ],
        ),
        (
            "zsh",
            vec![
                "#compdef filmwright",
                "_filmwright_named",
                ":_filmwright_tags'",
                ":_filmwright_oils'",
            ],
        ),
        (
            "fish",
            vec![
                "__fish_filmwright_using_subcommand weigh\" -f -a \"(filmwright completions --names tags",
                "-l oil -x -a \"(filmwright completions --names oils",
            ],
        ),
        (
            "powershell",
            vec![
                "Register-ArgumentCompleter",
                "'filmwright;why' { 'oils', 'tags' }",
                "--names $kind",
            ],
        ),
    ] {
        let ran = on(MemoryHost::new(), &format!("completions {shell}"));
        assert_eq!(ran.exit, Exit::Done, "{}", ran.err);
        for want in wanted {
            assert!(ran.out.contains(want), "{shell}: {want}\n{}", ran.out);
        }
        assert!(!ran.out.contains('\r'));
    }
}

#[test]
fn bash_takes_its_script_and_completes_a_tag() {
    let script = on(MemoryHost::new(), "completions bash").out;
    let test = format!(
        "filmwright() {{ printf 'CV-104\\tConveyor\\nCV-105\\tOther\\nHPU REEL\\tPress\\n'; }}\n{script}\n\
         COMP_WORDS=(filmwright weigh CV); COMP_CWORD=2\n_filmwright_all filmwright CV weigh\nprintf '%s\\n' \"${{COMPREPLY[@]}}\"\n"
    );
    let out = std::process::Command::new("bash")
        .arg("-c")
        .arg(&test)
        .output();
    let out = out.expect("bash is there");
    let said = String::from_utf8_lossy(&out.stdout);
    assert!(
        said.contains("CV-104\n") && said.contains("CV-105\n") && !said.contains("HPU"),
        "{said}{}",
        String::from_utf8_lossy(&out.stderr)
    );
}

#[test]
fn manual_pages_are_made_for_every_command() {
    let main = on(MemoryHost::new(), "man");
    assert!(
        main.out.contains(".TH filmwright 1") && main.out.contains("weigh"),
        "{}",
        main.out
    );
    let one = on(MemoryHost::new(), "man weigh");
    assert!(
        one.out.contains("filmwright weigh") && one.out.contains("\\-\\-oil"),
        "{}",
        one.out
    );
    let all = on(MemoryHost::new(), "man -o man1");
    let pages = all
        .host
        .files
        .keys()
        .filter(|p| p.starts_with("man1"))
        .count();
    assert!(pages > 10, "{pages} pages");
    assert_eq!(on(MemoryHost::new(), "man nothing").exit, Exit::NoMatch);
}
