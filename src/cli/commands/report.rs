//! `report`: HTML sheets, in a folder or in one file, and the answers on the terminal.

mod pages;

use crate::audit::{Asked, Audit};
use crate::cli::exit::Exit;
use crate::cli::load::Loaded;
use crate::cli::samples::Bottles;
use crate::cli::session::Session;
use crate::cli::{Format, Gate, Paper, Report as Args};
use crate::compare::compare;
use crate::judge::Verdict;
use crate::report::build::{Options, Report, Run, Since};
use crate::report::model::{Image, LOGO_LIMIT, Paper as Size};
use crate::report::names::Bundle;
use crate::report::page::Templates;
use crate::results::csv::{self, Cell, Dialect, Table};
use crate::results::json;
use crate::source::SourceSet;
use crate::weighing::Scales;
use pages::{Answer, Target};
use serde_json::{Value, json};
use std::collections::BTreeMap;
use std::fmt::Write as _;
use std::path::{Path, PathBuf};

/// The folder pages are written to where none is named.
const FOLDER: &str = "filmwright-report";
/// The file, for `--one-file`.
const FILE: &str = "filmwright-report.html";

/// Runs `report`.
pub fn report(session: &mut Session<'_>, args: &Args) -> Exit {
    match run(session, args) {
        Ok(exit) | Err(exit) => exit,
    }
}

fn run(session: &mut Session<'_>, args: &Args) -> Result<Exit, Exit> {
    let target = target(session, args)?;
    let mut loaded = session.load(None)?;
    let bottles = session.bottles(&mut loaded, None)?;
    let settings = session.settings(true)?;
    let points = session.points(&loaded.site, &args.only)?;
    let templates = templates(session, args, &loaded)?;
    let mut options = options(session, args, &loaded)?;
    if let Some(old) = &args.since {
        options.since = Some(since(session, old)?);
    }
    let scales = Scales::new(&loaded.site, &loaded.rules, settings)
        .map_err(|(oil, misfit)| session.misfit(&oil, &misfit))?;
    let head = session.head(&loaded);
    let audited = audit(session, args, &loaded, &scales, bottles)?;
    let mut run = Run::new(&scales, &loaded.sources, head, options);
    if let Some(audited) = &audited {
        run = run.audited(audited);
    }
    let mut report = Report::new(run, &points);
    let written = pages::write(session, &mut report, &templates, &target)?;
    let head = session.head(&loaded);
    tell(session, &head, &target, &written);
    if let Some(path) = &args.xlsx {
        let samples = audited
            .as_ref()
            .map(|a| crate::results::audit::table_of(&scales, a));
        super::workbook::write(session, &scales, &loaded, &points, samples, Path::new(path))?;
    }
    let tripped = session.shared.gate.is_some_and(|gate| {
        let level = |v: Verdict| match v {
            Verdict::Holds => None,
            Verdict::Tight => Some(Gate::Tight),
            Verdict::Open => Some(Gate::Open),
            Verdict::Fails => Some(Gate::Fails),
        };
        let mut gates = written.answers.iter().filter_map(|a| a.gate);
        gates.any(|v| level(v).is_some_and(|l| l >= gate))
    });
    Ok(if tripped { Exit::Gate } else { Exit::Done })
}

/// The audit of the machines wanted, where there are samples.
fn audit(
    session: &mut Session<'_>,
    args: &Args,
    loaded: &Loaded,
    scales: &Scales<'_>,
    bottles: Bottles,
) -> Result<Option<Audit>, Exit> {
    if bottles.list.is_empty() {
        return Ok(None);
    }
    let asked = Asked {
        on: super::audit::day_of(session, loaded)?,
        matches: Vec::new(),
        measured_shear: false,
        only: super::audit::only(session, loaded, &args.only)?,
    };
    let mut problems = Vec::new();
    let audited = crate::audit::audit(scales, bottles.list, &asked, &mut problems);
    session.bottle_problems(loaded, problems)?;
    Ok(Some(audited))
}

/// What moved since an older state.
fn since(session: &mut Session<'_>, old: &str) -> Result<Since, Exit> {
    let mut set = SourceSet::new();
    let before = session.state(&mut set, old)?;
    let now = session.state_now(&mut set)?;
    let found = compare(&set, &before.state, &now.state).map_err(|unread| {
        session.fail(&format!("{old} cannot be compared with the site: {unread}"));
        Exit::Input
    })?;
    Ok(Since {
        name: before.name,
        found,
    })
}

/// Where the pages go.
fn target(session: &mut Session<'_>, args: &Args) -> Result<Target, Exit> {
    match (session.shared.out.as_deref(), args.one_file) {
        (Some("-"), true) => Ok(Target::Output),
        (Some("-"), false) => {
            session.fail(
                "a folder of pages cannot go to standard output\n  write  --one-file -o -     or     -o FOLDER",
            );
            Err(Exit::Usage)
        }
        (Some(path), true) => Ok(Target::File(PathBuf::from(path))),
        (Some(path), false) => Ok(Target::Folder(PathBuf::from(path))),
        (None, true) => Ok(Target::File(PathBuf::from(FILE))),
        (None, false) => Ok(Target::Folder(PathBuf::from(FOLDER))),
    }
}

fn options(session: &mut Session<'_>, args: &Args, loaded: &Loaded) -> Result<Options, Exit> {
    let mut flags = String::new();
    if session.shared.demo {
        flags.push_str(" --demo");
    }
    if let Some(reserve) = &session.shared.reserve {
        flags.push_str(" --reserve ");
        flags.push_str(reserve);
    }
    Ok(Options {
        bundle: if args.one_file {
            Bundle::OneFile
        } else {
            Bundle::Folder
        },
        paper: match args.paper {
            Paper::A4 => Size::A4,
            Paper::Letter => Size::Letter,
        },
        logo: logo(session, loaded)?,
        warning: session.shared.demo.then(|| {
            "Demonstration: works, machines and oils are invented. No number here is for use."
                .to_owned()
        }),
        flags,
        scatter: match args.scatter {
            Some(cases) => Some(session.cases(cases)?),
            None => None,
        },
        since: None,
    })
}

/// The client's logo, where the site file names one.
fn logo(session: &mut Session<'_>, loaded: &Loaded) -> Result<Option<Image>, Exit> {
    let frame = &loaded.site.frame;
    let (Some(path), Some(folder)) = (&frame.logo, &loaded.folder) else {
        return Ok(None);
    };
    let full = folder.join(path);
    let limit = LOGO_LIMIT as u64;
    if session.host.size(&full).is_ok_and(|size| size > limit) {
        session.fail(&format!(
            "the logo {path} is larger than {LOGO_LIMIT} bytes\n  write  a smaller picture: it is carried on every sheet"
        ));
        return Err(Exit::Input);
    }
    let bytes = session.host.read(&full).map_err(|error| {
        session.fail(&format!("the logo {path} cannot be read: {error}"));
        Exit::File
    })?;
    let owner = frame.client.as_ref().or(frame.site.as_ref());
    let alt = owner.map_or_else(|| "logo".to_owned(), |name| format!("logo of {name}"));
    Image::embed(&bytes, alt).map(Some).map_err(|problem| {
        session.fail(&format!(
            "the logo {path}: {problem}\n  write  logo: the path of an SVG or PNG picture"
        ));
        Exit::Input
    })
}

/// The templates: built in, the site's own, those of `--templates`; the later stand in the place
/// of the earlier by name.
fn templates(session: &mut Session<'_>, args: &Args, loaded: &Loaded) -> Result<Templates, Exit> {
    let mut own: BTreeMap<String, String> = BTreeMap::new();
    let beside = loaded.folder.as_ref().map(|f| f.join("templates"));
    if let Some(folder) = beside.filter(|f| session.host.exists(f)) {
        read_templates(session, &folder, &mut own)?;
    }
    if let Some(folder) = &args.templates {
        read_templates(session, Path::new(folder), &mut own)?;
    }
    let own: Vec<(String, String)> = own.into_iter().collect();
    Templates::new(&own).map_err(|problem| pages::template(session, &problem))
}

fn read_templates(
    session: &mut Session<'_>,
    folder: &Path,
    own: &mut BTreeMap<String, String>,
) -> Result<(), Exit> {
    let unread = |session: &mut Session<'_>, path: &Path, why: &str| {
        session.fail(&format!("{} cannot be read: {why}", path.display()));
        Exit::File
    };
    let names = session
        .host
        .list(folder)
        .map_err(|e| unread(session, folder, &e.to_string()))?;
    for name in names {
        if ![".html", ".css"].iter().any(|end| name.ends_with(end)) {
            continue;
        }
        let path = folder.join(&name);
        let bytes = session
            .host
            .read(&path)
            .map_err(|e| unread(session, &path, &e.to_string()))?;
        let text =
            String::from_utf8(bytes).map_err(|_| unread(session, &path, "it is not UTF-8 text"))?;
        own.insert(name, text);
    }
    Ok(())
}

/// The answers, then where the pages are.
fn tell(session: &mut Session<'_>, head: &json::Head, target: &Target, written: &pages::Written) {
    let text = match session.shared.format {
        Format::Text => text(target, written),
        Format::Json => {
            let mut top = json::document("report", head);
            top.insert("answer".into(), json!(written.headline));
            let answers = written.answers.iter().map(answer_json).collect();
            top.insert("answers".into(), Value::Array(answers));
            top.insert("pages".into(), json!(written.pages));
            json::text(top)
        }
        Format::Csv => {
            let dialect = if session.shared.csv_excel {
                Dialect::Spreadsheet
            } else {
                Dialect::Plain
            };
            csv::write(&table(&written.answers), dialect)
        }
    };
    if *target == Target::Output {
        session.host.err(&text);
    } else {
        session.host.out(&text);
    }
}

fn text(target: &Target, written: &pages::Written) -> String {
    let mut out = format!("{}\n\n", written.headline);
    let width = written.answers.iter().map(|a| a.tag.chars().count()).max();
    for answer in &written.answers {
        let pad = width
            .unwrap_or(0)
            .saturating_sub(answer.tag.chars().count());
        let _ = writeln!(
            out,
            "  {}{}  {}",
            answer.tag,
            " ".repeat(pad),
            answer.headline
        );
    }
    let n = written.sheets;
    let sheets = if n == 1 { "sheet" } else { "sheets" };
    match target {
        Target::Folder(folder) => {
            let _ = writeln!(
                out,
                "\n{n} {sheets} in {}/, begin with {}",
                shown(folder),
                shown(&folder.join("index.html"))
            );
        }
        Target::File(file) => {
            let _ = writeln!(out, "\n{n} {sheets} in {}", shown(file));
        }
        Target::Output => {
            let _ = writeln!(out, "\n{n} {sheets}");
        }
    }
    out
}

fn shown(path: &Path) -> String {
    path.to_string_lossy()
        .replace('\\', "/")
        .trim_end_matches('/')
        .to_owned()
}

fn answer_json(a: &Answer) -> Value {
    json!({ "machine": a.tag, "state": a.state, "answer": a.headline, "page": a.page })
}

fn table(answers: &[Answer]) -> Table {
    Table {
        headings: ["machine", "state", "answer", "page"]
            .map(str::to_owned)
            .to_vec(),
        rows: answers
            .iter()
            .map(|a| {
                vec![
                    Cell::from(a.tag.as_str()),
                    Cell::from(a.state),
                    Cell::from(a.headline.as_str()),
                    Cell::from(a.page.as_str()),
                ]
            })
            .collect(),
    }
}
