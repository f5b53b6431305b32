//! Bad input: a folder a problem, its message as a snapshot, and its own `write` applied.

use filmwright::assets::builtin_rules;
use filmwright::demand::rules::CALCULATED;
use filmwright::input::file::FileKind;
use filmwright::input::load::{Tree, With, load, load_oils, take};
use filmwright::input::rules::rulebook;
use filmwright::input::samples;
use filmwright::model::rulebook::Rulebook;
use filmwright::problem::render::{Look, all};
use filmwright::problem::{Code, Problem, Problems, Severity};
use filmwright::relation::bearing::designation::DimensionTable;
use filmwright::source::{Place, SourceSet};
use std::collections::{BTreeMap, BTreeSet};
use std::path::{Path, PathBuf};
use std::sync::LazyLock;

/// The built-in rules.
static BOOK: LazyLock<Rulebook> =
    LazyLock::new(|| rulebook(&[builtin_rules()]).expect("a test of its own reads them"));

/// Files of a case: path and bytes.
type Files = Vec<(String, Vec<u8>)>;

/// Problems that no change of the text mends; each says in words what does.
const BY_WORDS: &[Code] = &[
    Code::FileTooLarge,
    Code::FileNotUtf8,
    Code::YamlDepth,
    Code::FileMissing,
];

/// Problems found outside the files of a site.
const ELSEWHERE: &[Code] = &[
    Code::FileTooLarge,
    Code::FileMissing,
    Code::TableKind,
    Code::TableDamaged,
    Code::TableTooLarge,
    Code::TableEmpty,
    Code::TableSheet,
    Code::TableEncoding,
    Code::ColumnMissing,
    Code::ColumnTwice,
    Code::ColumnsUnknown,
    Code::RowShifted,
    Code::CellUnread,
    Code::CellWithoutValue,
    Code::CellPlaceholder,
    Code::DateMixed,
    Code::BottleTwice,
    Code::LabelUnknown,
    Code::SetForm,
    Code::SetWhich,
    Code::SetWhose,
    Code::NothingToWeigh,
    Code::ListImpossible,
    Code::KeepIdle,
    Code::NothingDecided,
    Code::RuleRange,
    Code::AcceptExpired,
];

#[expect(clippy::disallowed_methods, reason = "a test reads its own cases")]
fn bytes(path: &Path) -> Vec<u8> {
    std::fs::read(path).expect("a case can be read")
}

#[expect(clippy::disallowed_methods, reason = "a test reads its own cases")]
fn names(folder: &Path) -> Vec<PathBuf> {
    let mut found: Vec<PathBuf> = std::fs::read_dir(folder)
        .expect("a folder of cases")
        .map(|e| e.expect("an entry").path())
        .collect();
    found.sort();
    found
}

fn cases(which: &str) -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR"))
        .join("tests/cases")
        .join(which)
}

fn name_of(path: &Path) -> String {
    path.file_name()
        .expect("a name")
        .to_string_lossy()
        .into_owned()
}

/// What a file is read as, by its name.
fn kind_of(path: &str) -> FileKind {
    let is = |k: &&FileKind| path.starts_with(k.word());
    *FileKind::ALL.iter().find(is).expect("named for its kind")
}

/// The files of a case: one file, or a folder of them.
fn files_of(case: &Path) -> Files {
    if case.is_file() {
        return vec![(name_of(case), bytes(case))];
    }
    let mut found = Vec::new();
    for path in names(case) {
        if path.is_file() {
            found.push((name_of(&path), bytes(&path)));
            continue;
        }
        for inner in names(&path) {
            found.push((
                format!("{}/{}", name_of(&path), name_of(&inner)),
                bytes(&inner),
            ));
        }
    }
    found
}

/// Everything found in some files.
fn found_in(files: &Files) -> (SourceSet, Problems) {
    let mut set = SourceSet::new();
    let mut problems = Problems::new();
    let trees: Vec<Tree> = files
        .iter()
        .map(|(path, bytes)| take(&mut set, kind_of(path), path, bytes, &mut problems))
        .collect();
    let rules = &*BOOK;
    let calculated: Vec<&str> = CALCULATED.iter().map(|rule| rule.0).collect();
    let with = With {
        rules,
        bearings: DimensionTable::built_in(),
        calculated: &calculated,
    };
    if files
        .iter()
        .any(|(path, _)| kind_of(path) == FileKind::Site)
    {
        drop(load(&set, &trees, &with, &[], &mut problems));
    } else {
        drop(load_oils(&set, &trees, rules, &mut problems));
        let mut reader = filmwright::input::reader::Reader::new(&set, &mut problems);
        for tree in &trees {
            if let Some(root) = &tree.root {
                match tree.kind {
                    FileKind::Samples => {
                        drop(samples::map(&mut reader, root, None));
                    }
                    FileKind::Events => {
                        drop(samples::events(&mut reader, root, None));
                    }
                    FileKind::Site | FileKind::Oils => {}
                }
            }
        }
    }
    (set, problems)
}

/// Where and what, to find a problem again after a change.
fn key(set: &SourceSet, problem: &Problem) -> (Code, String, usize) {
    let line = match &problem.place {
        Place::Text(span) => set.file(span.file).map_or(0, |f| f.line_of(span.start)),
        _ => 0,
    };
    (problem.code, problem.message.clone(), line)
}

fn with_change(files: &Files, set: &SourceSet, problem: &Problem, way: usize) -> Option<Files> {
    let (id, text) = problem.write[way].applied(set)?;
    let path = &set.file(id)?.path;
    let changed = files.iter().map(|(p, bytes)| {
        let bytes = if p == path {
            text.clone().into_bytes()
        } else {
            bytes.clone()
        };
        (p.clone(), bytes)
    });
    Some(changed.collect())
}

/// Applies every way to mend a problem, and finds it gone.
fn mends(case: &str, files: &Files, set: &SourceSet, problem: &Problem) -> Vec<String> {
    let mut wrong = Vec::new();
    let (_, all_before) = found_in(files);
    let before: BTreeSet<Code> = all_before.sorted().iter().map(|p| p.code).collect();
    let stood: Vec<_> = all_before.sorted().iter().map(|p| key(set, p)).collect();
    let code = problem.code;
    let by_edit = problem.write.iter().any(|w| !w.edits.is_empty());
    let says = problem.ask.is_some() || problem.why.is_some() || problem.so.is_some();
    let note = problem.severity != Severity::Error && says;
    if !(by_edit || note || code.severity() == Severity::Note || BY_WORDS.contains(&code)) {
        wrong.push(format!("{case}: {code} says nothing to write"));
    }
    for way in 0..problem.write.len() {
        let Some(changed) = with_change(files, set, problem, way) else {
            continue;
        };
        let (after_set, after) = found_in(&changed);
        let gone = key(set, problem);
        let left: Vec<_> = after.sorted().iter().map(|p| key(&after_set, p)).collect();
        let text = all(&after_set, &after, Look::default());
        let times = |keys: &[_]| keys.iter().filter(|k| **k == gone).count();
        if times(&left) >= times(&stood) {
            wrong.push(format!("{case}: {code} way {way} leaves it:\n{text}"));
        }
        let broken = |c: Code| c.as_str().starts_with("yaml-") && !before.contains(&c);
        if after.sorted().iter().any(|p| broken(p.code)) {
            wrong.push(format!("{case}: {code} way {way} breaks the file:\n{text}"));
        }
    }
    wrong
}

#[test]
fn every_message_is_as_written_and_mends_what_it_names() {
    let mut settings = insta::Settings::clone_current();
    settings.set_snapshot_path("../snapshots/problems");
    settings.set_prepend_module_to_snapshot(false);
    settings.set_omit_expression(true);
    let mut seen: BTreeMap<Code, usize> = BTreeMap::new();
    let mut wrong: Vec<String> = Vec::new();
    for folder in names(&cases("bad")) {
        let code = Code::named(&name_of(&folder)).expect("a folder is named for a code");
        for case in names(&folder) {
            let label = format!("{code}/{}", name_of(&case));
            let files = files_of(&case);
            let (set, problems) = found_in(&files);
            let here: Vec<&Problem> = problems
                .sorted()
                .into_iter()
                .filter(|p| p.code == code)
                .collect();
            let text = all(&set, &problems, Look::default());
            if here.is_empty() {
                wrong.push(format!("{label} does not give {code}:\n{text}"));
            }
            *seen.entry(code).or_default() += 1;
            for problem in problems.sorted() {
                wrong.extend(mends(&label, &files, &set, problem));
            }
            let snapshot = label.replace('/', "--").replace(".yaml", "");
            settings.bind(|| insta::assert_snapshot!(snapshot, text));
        }
    }
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
    let missing: Vec<&str> = Code::ALL
        .iter()
        .filter(|c| !seen.contains_key(c) && !ELSEWHERE.contains(c))
        .map(|c| c.as_str())
        .collect();
    assert!(missing.is_empty(), "no case for {missing:?}");
    assert!(seen.len() >= 60, "{} codes", seen.len());
}

#[test]
fn good_sites_read_without_a_word() {
    for case in names(&cases("good")) {
        let (set, problems) = found_in(&files_of(&case));
        let text = all(&set, &problems, Look::default());
        let worse: Vec<&Problem> = problems
            .sorted()
            .into_iter()
            .filter(|p| p.severity != Severity::Note)
            .collect();
        assert!(worse.is_empty(), "{}:\n{text}", case.display());
    }
}

#[test]
fn messages_speak_no_programmers_language() {
    let words = [
        "parse",
        "deserial",
        "null",
        "NaN",
        "panic",
        "index out",
        "token",
        "!",
    ];
    let mut texts = BTreeSet::new();
    for folder in names(&cases("bad")) {
        for case in names(&folder) {
            let (_, problems) = found_in(&files_of(&case));
            for p in problems.sorted() {
                texts.insert(p.message.clone());
                texts.extend(p.why.clone());
                texts.extend(p.so.clone());
                for w in &p.write {
                    texts.extend(w.words.clone());
                    texts.extend(w.remark.clone());
                }
            }
        }
    }
    for text in texts {
        for word in words {
            let quoted = text.contains('"') || text.contains("tag !");
            assert!(quoted || !text.contains(word), "\"{word}\" in: {text}");
        }
    }
}

/// The text of a case with something done to it: a piece cut out, doubled, or put in.
fn mutated(text: &str, at: usize, len: usize, put: &str) -> String {
    let chars: Vec<char> = text.chars().collect();
    let from = at % (chars.len() + 1);
    let to = (from + len).min(chars.len());
    let before: String = chars[..from].iter().collect();
    let behind: String = chars[to..].iter().collect();
    format!("{before}{put}{behind}")
}

proptest::proptest! {
    #![proptest_config(proptest::test_runner::Config::with_cases(200))]

    #[test]
    fn no_text_breaks_the_reader(
        at in 0..4000_usize,
        len in 0..40_usize,
        put in "(\\PC|[-:#\\[\\]{}&*!|>'\"%@`,? \n\t0-9]|unknown|parts|like){0,12}",
        which in 0..5_usize,
    ) {
        let folder = cases("good").join("lime-works");
        let mut files = files_of(&folder);
        let place = which % files.len();
        let text = String::from_utf8_lossy(&files[place].1).into_owned();
        files[place].1 = mutated(&text, at, len, &put).into_bytes();
        let (set, problems) = found_in(&files);
        drop(all(&set, &problems, Look::default()));
        for problem in problems.sorted() {
            filmwright::problem::json::object(&set, problem);
            for write in &problem.write {
                drop(write.applied(&set));
            }
        }
    }

    #[test]
    fn no_bytes_break_the_reader(bytes in proptest::collection::vec(0..=255_u8, 0..200)) {
        for name in ["site.yaml", "oils.yaml", "samples.yaml", "events.yaml"] {
            let (set, problems) = found_in(&vec![(name.to_owned(), bytes.clone())]);
            drop(all(&set, &problems, Look::default()));
        }
    }
}

#[test]
fn a_file_over_the_limit_is_refused_at_once() {
    let bytes = vec![b'#'; (64 << 20) + 1];
    let (set, problems) = found_in(&vec![("site.yaml".to_owned(), bytes)]);
    let codes: Vec<Code> = problems.sorted().iter().map(|p| p.code).collect();
    assert!(codes.contains(&Code::FileTooLarge), "{codes:?}");
    assert!(
        all(&set, &problems, Look::default()).contains("65 MiB")
            || all(&set, &problems, Look::default()).contains("64 MiB")
    );
}
