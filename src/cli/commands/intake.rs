//! `intake`: a register or oil list into a draft, its map, and what is to be said of both.

mod files;

use crate::cli::exit::Exit;
use crate::cli::load::fingerprint;
use crate::cli::session::Session;
use crate::cli::text_of::intake::report;
use crate::cli::{Decimal as CliDecimal, Format, Intake, IntakeGallon, IntakeMakes};
use crate::intake::cell::Rules;
use crate::intake::decimals::{Decimals, decimals};
use crate::intake::draft::Draft;
use crate::intake::layout::{Layout, Where, find};
use crate::intake::map::{self, Head, Map};
use crate::intake::number::Decimal;
use crate::intake::site::Context;
use crate::intake::table::Table;
use crate::intake::target::Makes;
use crate::intake::{inputs, oils, site};
use crate::problem::Problems;
use crate::results::intake::{Outcome, document_of, table_of};
use crate::results::json;
use crate::source::{Place, SourceSet};
use crate::table::{Book, Form, Stated, read};
use std::path::{Path, PathBuf};

/// Density by which a mass of oil becomes a volume, kg/m3: mineral gear and hydraulic oils lie
/// between 870 and 905 (common practice).
const DENSITY_KG_M3: f64 = 890.0;

/// Runs `intake`.
pub fn intake(session: &mut Session<'_>, args: &Intake) -> Exit {
    match run(session, args) {
        Ok(exit) | Err(exit) => exit,
    }
}

/// The file with everything found of it.
struct Opened {
    name: String,
    bytes: Vec<u8>,
    book: Book,
    layout: Layout,
    decimals: Decimals,
    map: Map,
    /// Where the map stands, and whether it was there.
    map_path: PathBuf,
    map_there: bool,
    differs: map::Differs,
}

fn run(session: &mut Session<'_>, args: &Intake) -> Result<Exit, Exit> {
    let opened = open(session, args)?;
    let target = target(session, opened.layout.makes);
    let mut draft = drafted(session, &opened, target.as_deref())?;
    draft.how = how(&opened);
    let mut outcome = Outcome::default();
    if !opened.map_there {
        let text = map::propose(&head(&opened), &opened.layout);
        session.put(&opened.map_path, text.as_bytes())?;
        outcome.written.push(format!(
            "{}, the map of its columns",
            opened.map_path.display()
        ));
    }
    match &target {
        None => session.host.out(&draft.yaml),
        Some(path) => {
            let map = session.host.read(&opened.map_path).unwrap_or_default();
            let state = fingerprint(&[&opened.bytes, &map]);
            files::keep(
                session,
                path,
                &draft,
                &opened.name,
                &state,
                args.accept,
                &mut outcome,
            )?;
        }
    }
    tell(session, &opened, &draft, &outcome, target.is_none());
    if target.is_some() && opened.layout.makes == Makes::Site {
        session.note("next: filmwright check");
    }
    Ok(Exit::Done)
}

/// Reads the file and its map, and finds its table.
fn open(session: &mut Session<'_>, args: &Intake) -> Result<Opened, Exit> {
    let path = Path::new(&args.file);
    let name = path
        .file_name()
        .map_or(args.file.clone(), |n| n.to_string_lossy().into_owned());
    let limit = crate::table::limits::TEXT_FILE_BYTES as u64;
    if session.host.size(path).is_ok_and(|size| size > limit) {
        session.fail(&format!("{} is larger than 64 MiB\n  write  split it, or delete sheets that are not read  [table-too-large]", args.file));
        return Err(Exit::Input);
    }
    let bytes = session.host.read(path).map_err(|error| {
        session.fail(&format!("{} cannot be read: {error}", args.file));
        Exit::File
    })?;
    let map_path = args
        .map
        .as_ref()
        .map_or_else(|| path.with_extension("map.yaml"), PathBuf::from);
    let map_there = session.host.exists(&map_path);
    let mut map = if map_there {
        read_map(session, &map_path)?
    } else {
        Map::default()
    };
    overrule(session, args, &mut map)?;
    let stated = Stated {
        sheet: map.sheet.clone(),
        encoding: map.encoding.clone(),
        delimiter: map.delimiter,
    };
    let book = read(&bytes, &stated).map_err(|fault| {
        let sources = SourceSet::new();
        let mut problems = Problems::new();
        problems.error(fault.problem(&args.file, Place::Program));
        session.told(&sources, &problems)
    })?;
    let place = Where {
        makes: map.makes,
        heading_row: map.heading_row,
    };
    let mut layout = find(&book, place).map_err(|fault| {
        session.fail(&format!(
            "{}: {fault}\n  write  heading row: 4     into {}, below  file: map 1",
            args.file,
            map_path.display()
        ));
        Exit::Input
    })?;
    let differs = map::apply(&map, &mut layout);
    let decimals = match map.decimal {
        Some(rule) => Decimals::Stated(rule),
        None => decimals(&book.sheets[layout.sheet], &layout),
    };
    let opened = Opened {
        name,
        bytes,
        book,
        layout,
        decimals,
        map,
        map_path,
        map_there,
        differs,
    };
    lacking(session, args, &opened)?;
    Ok(opened)
}

/// A table without a column of names is not read.
fn lacking(session: &mut Session<'_>, args: &Intake, opened: &Opened) -> Result<(), Exit> {
    let has = |word: &str| {
        opened
            .layout
            .columns
            .iter()
            .any(|c| c.target.word() == word)
    };
    let named = has("tag") || (opened.layout.makes == Makes::Oils && has("name"));
    if named || inputs::is_one(&opened.layout) {
        return Ok(());
    }
    let what = match opened.layout.makes {
        Makes::Site => "tags of machines",
        Makes::Oils => "ids or names of oils",
    };
    if !opened.map_there {
        let text = map::propose(&head(opened), &opened.layout);
        session.put(&opened.map_path, text.as_bytes())?;
    }
    session.fail(&format!(
        "{}: no column holds the {what}\n  write  is: tag     at one of the columns of {}",
        args.file,
        opened.map_path.display()
    ));
    Err(Exit::Input)
}

fn read_map(session: &mut Session<'_>, path: &Path) -> Result<Map, Exit> {
    let shown = path.display().to_string();
    let bytes = session.host.read(path).map_err(|error| {
        session.fail(&format!("{shown} cannot be read: {error}"));
        Exit::File
    })?;
    let text = String::from_utf8(bytes).map_err(|_| {
        session.fail(&format!(
            "{shown} is not UTF-8 text\n  write  save it as UTF-8 in the editor"
        ));
        Exit::Input
    })?;
    map::parse(&shown, &text).map_err(|fault| {
        session.fail(&fault.to_string());
        Exit::Input
    })
}

/// What the command line states comes before the map.
fn overrule(session: &mut Session<'_>, args: &Intake, map: &mut Map) -> Result<(), Exit> {
    if let Some(sheet) = &args.sheet {
        map.sheet = Some(sheet.clone());
    }
    if let Some(makes) = args.makes {
        map.makes = Some(match makes {
            IntakeMakes::Site => Makes::Site,
            IntakeMakes::Oils => Makes::Oils,
        });
    }
    if let Some(decimal) = args.decimal {
        map.decimal = Some(match decimal {
            CliDecimal::Point => Decimal::Point,
            CliDecimal::Comma => Decimal::Comma,
        });
    }
    if let Some(gallon) = args.gallon {
        map.gallon = Some(match gallon {
            IntakeGallon::Us => "gal(US)",
            IntakeGallon::Uk => "gal(UK)",
        });
    }
    if let Some(encoding) = &args.encoding {
        map.encoding = Some(encoding.clone());
    }
    if let Some(word) = &args.delimiter {
        let found = map::delimiter_of(word);
        map.delimiter = Some(found.ok_or_else(|| {
            session.fail(&format!(
                "--delimiter {word} is none\n  write  --delimiter semicolon     or comma, tab, bar"
            ));
            Exit::Usage
        })?);
    }
    Ok(())
}

/// The file the draft goes to; none for standard output.
fn target(session: &Session<'_>, makes: Makes) -> Option<PathBuf> {
    match session.shared.out.as_deref() {
        Some("-") => None,
        Some(path) => Some(PathBuf::from(path)),
        None => Some(session.folder().join(makes.file())),
    }
}

fn drafted(
    session: &mut Session<'_>,
    opened: &Opened,
    target: Option<&Path>,
) -> Result<Draft, Exit> {
    let folder = target
        .and_then(|t| t.parent().map(Path::to_path_buf))
        .unwrap_or_else(|| session.folder());
    let rules = session.rules(Some(&folder))?;
    let listed = if opened.layout.makes == Makes::Site {
        files::oils(session, &folder)
    } else {
        Vec::new()
    };
    let context = Context {
        file: &opened.name,
        rules: &rules,
        oils: &listed,
        cells: Rules {
            decimal: opened.decimals.rule(),
            gallon: opened.map.gallon,
            density_kg_m3: opened.map.density_kg_m3.unwrap_or(DENSITY_KG_M3),
        },
        at_ambient: opened.map.at_ambient.as_deref(),
    };
    let table = Table::new(&opened.book, &opened.layout);
    let draft = match opened.layout.makes {
        _ if inputs::is_one(&opened.layout) => {
            inputs::draft(&table, opened.layout.makes, &opened.name)
        }
        Makes::Site => site::draft(&table, &context, &mut |done, of| {
            session.progress("reading rows", done, of);
        }),
        Makes::Oils => oils::draft(&table, &context),
    };
    session.host.progress_end();
    Ok(draft)
}

/// How the file was read, a clause each.
fn how(opened: &Opened) -> Vec<String> {
    let sheet = &opened.book.sheets[opened.layout.sheet];
    let mut how = vec![match &opened.book.form {
        Form::Xlsx { from_1904: true } => "xlsx workbook, days counted from 1904".to_owned(),
        Form::Xlsx { .. } => "xlsx workbook".to_owned(),
        Form::Ods => "ods workbook".to_owned(),
        Form::Csv {
            encoding,
            delimiter,
        } => format!(
            "CSV, encoding {} {}, delimiter {} {}",
            encoding.name,
            encoding.by.says(),
            delimiter.says(),
            delimiter.by.says()
        ),
    }];
    if !sheet.name.is_empty() {
        how.push(format!("sheet \"{}\"", sheet.name));
    }
    let others: Vec<String> = opened
        .book
        .sheets
        .iter()
        .enumerate()
        .filter(|(i, _)| *i != opened.layout.sheet)
        .map(|(_, s)| format!("\"{}\"{}", s.name, if s.hidden { " (hidden)" } else { "" }))
        .collect();
    if !others.is_empty() {
        how.push(format!("not read: {}", others.join(", ")));
    }
    how.push(format!("headings in row {}", opened.layout.heading_row));
    if let Some(row) = opened.layout.unit_row {
        how.push(format!("units in row {row}"));
    }
    how.push(opened.decimals.says());
    if !opened.differs.gone.is_empty() {
        how.push(format!(
            "columns of the map that are not there: {}",
            opened.differs.gone.join(", ")
        ));
    }
    if !opened.differs.new.is_empty() {
        how.push(format!(
            "columns that the map does not name: {}",
            opened.differs.new.join(", ")
        ));
    }
    how
}

fn head(opened: &Opened) -> Head {
    let sheet = &opened.book.sheets[opened.layout.sheet];
    Head {
        file: opened.name.clone(),
        sheet: Some(sheet.name.clone()).filter(|n| !n.is_empty()),
        decimal: opened.decimals.rule(),
        decimal_says: opened.decimals.says(),
        text: match &opened.book.form {
            Form::Csv {
                encoding,
                delimiter,
            } => Some((
                encoding.name.to_owned(),
                encoding.by.says().to_owned(),
                delimiter.character,
                delimiter.by.says().to_owned(),
            )),
            _ => None,
        },
    }
}

/// The reading report; beside the draft where that goes to standard output.
fn tell(
    session: &mut Session<'_>,
    opened: &Opened,
    draft: &Draft,
    outcome: &Outcome,
    draft_on_out: bool,
) {
    let text = match session.shared.format {
        Format::Text => report(
            &opened.name,
            draft,
            outcome,
            session.host.width().clamp(60, 120),
        ),
        Format::Json => {
            let head = json::Head {
                inputs: fingerprint(&[&opened.bytes]),
                rules: "built in".to_owned(),
                date: session.date(None),
                ..json::Head::default()
            };
            document_of(&head, &opened.name, draft, outcome)
        }
        Format::Csv => session.csv(&table_of(draft)),
    };
    if draft_on_out {
        session.host.err(&text);
    } else {
        session.host.out(&text);
    }
}
