//! Lays the sheets out and writes them: one file a sheet as soon as it is made, or all in one.

use crate::cli::exit::Exit;
use crate::cli::session::Session;
use crate::judge::Verdict;
use crate::report::build::{Made, Report};
use crate::report::model::{Body, Frame, Sheet};
use crate::report::page::{Position, TemplateProblem, Templates};
use rayon::iter::{IntoParallelRefIterator, ParallelIterator};
use std::path::{Path, PathBuf};

/// Sheets of machines made side by side: enough for the processor, few enough for the memory.
const SIDE_BY_SIDE: usize = 32;

/// Where the pages go.
#[derive(Clone, Debug, PartialEq, Eq)]
pub(super) enum Target {
    /// A file a sheet.
    Folder(PathBuf),
    /// All sheets in one file.
    File(PathBuf),
    /// All sheets in one, to standard output.
    Output,
}

/// The answer of a machine, as printed.
pub(super) struct Answer {
    pub(super) tag: String,
    pub(super) headline: String,
    pub(super) state: &'static str,
    pub(super) gate: Option<Verdict>,
    /// Its file, or its place in the one file.
    pub(super) page: String,
}

/// What was written.
pub(super) struct Written {
    /// The answer of the site in one line.
    pub(super) headline: String,
    pub(super) answers: Vec<Answer>,
    pub(super) pages: Vec<String>,
    pub(super) sheets: u32,
}

/// Tells what is wrong with a template.
pub(super) fn template(session: &mut Session<'_>, problem: &TemplateProblem) -> Exit {
    session.fail(&format!("template {problem}"));
    Exit::Input
}

/// Makes and writes every sheet.
pub(super) fn write(
    session: &mut Session<'_>,
    report: &mut Report<'_>,
    templates: &Templates,
    target: &Target,
) -> Result<Written, Exit> {
    match target {
        Target::Folder(folder) => into_folder(session, report, templates, folder),
        Target::File(file) => {
            session.may_write(file)?;
            let (page, mut written) = in_one(session, report, templates)?;
            session.put(file, page.as_bytes())?;
            written.pages = vec![file.to_string_lossy().replace('\\', "/")];
            Ok(written)
        }
        Target::Output => {
            let (page, written) = in_one(session, report, templates)?;
            session.host.out(&page);
            Ok(written)
        }
    }
}

fn into_folder(
    session: &mut Session<'_>,
    report: &mut Report<'_>,
    templates: &Templates,
    folder: &Path,
) -> Result<Written, Exit> {
    for file in report.files() {
        session.may_write(&folder.join(file))?;
    }
    let frame = report.frame();
    let mut written = begun(report);
    each_machine(
        session,
        report,
        |sheet| templates.page(&frame, sheet),
        |session, made, page| {
            let file = made.sheet.place.file();
            session.put(&folder.join(&file), page.as_bytes())?;
            written.pages.push(file.clone());
            written.answers.push(answer(made, file));
            Ok(())
        },
    )?;
    for sheet in report.others() {
        one(session, templates, &frame, &sheet, folder)?;
        take_headline(&mut written, &sheet);
        written.pages.push(sheet.place.file());
    }
    written.pages.sort();
    Ok(written)
}

/// Makes and lays out the sheets of the machines, so many side by side, and hands them on in
/// their order.
fn each_machine(
    session: &mut Session<'_>,
    report: &mut Report<'_>,
    lay: impl Fn(&Sheet) -> Result<String, TemplateProblem> + Sync,
    mut take: impl FnMut(&mut Session<'_>, Made, String) -> Result<(), Exit>,
) -> Result<(), Exit> {
    let (mut done, all) = (0, report.machines());
    while done < all {
        let made = report.next_machines(SIDE_BY_SIDE);
        let laid: Vec<Result<String, TemplateProblem>> =
            made.par_iter().map(|made| lay(&made.sheet)).collect();
        for (made, page) in made.into_iter().zip(laid) {
            let page = page.map_err(|problem| template(session, &problem))?;
            take(session, made, page)?;
            done += 1;
        }
        session.progress("writing sheets of machines", done, all);
    }
    session.host.progress_end();
    Ok(())
}

fn one(
    session: &mut Session<'_>,
    templates: &Templates,
    frame: &Frame,
    sheet: &Sheet,
    folder: &Path,
) -> Result<(), Exit> {
    let page = templates
        .page(frame, sheet)
        .map_err(|problem| template(session, &problem))?;
    session.put(&folder.join(sheet.place.file()), page.as_bytes())
}

/// All sheets in one page, the overview first.
fn in_one(
    session: &mut Session<'_>,
    report: &mut Report<'_>,
    templates: &Templates,
) -> Result<(String, Written), Exit> {
    let frame = report.frame();
    let mut written = begun(report);
    let mut middle = Vec::new();
    each_machine(
        session,
        report,
        |sheet| templates.sheet(&frame, sheet, Position::Following),
        |_, made, laid| {
            middle.push(laid);
            let page = format!("#{}", made.sheet.place.id("sheet"));
            written.answers.push(answer(made, page));
            Ok(())
        },
    )?;
    let title = frame.site.clone();
    let mut page = templates
        .open(&frame, &title, None, &report.nav())
        .map_err(|problem| template(session, &problem))?;
    let mut machines = Some(middle);
    for sheet in report.others() {
        let position = match sheet.body {
            Body::Overview(_) => Position::Leading,
            _ => Position::Following,
        };
        // overview and areas come before the machines, what is looked up after them
        if !matches!(sheet.body, Body::Overview(_) | Body::Area(_)) {
            page.extend(machines.take().into_iter().flatten());
        }
        let laid = templates.sheet(&frame, &sheet, position);
        page.push_str(&laid.map_err(|problem| template(session, &problem))?);
        take_headline(&mut written, &sheet);
    }
    let closed = templates.close(&frame);
    page.push_str(&closed.map_err(|problem| template(session, &problem))?);
    Ok((page, written))
}

fn begun(report: &Report<'_>) -> Written {
    Written {
        headline: String::new(),
        answers: Vec::new(),
        pages: Vec::new(),
        sheets: report.sheets(),
    }
}

fn answer(made: Made, page: String) -> Answer {
    Answer {
        tag: made.tag,
        headline: made.headline,
        state: made.state,
        gate: made.gate,
        page,
    }
}

fn take_headline(written: &mut Written, sheet: &Sheet) {
    if let Body::Overview(body) = &sheet.body {
        written.headline.clone_from(&body.answer.headline);
    }
}
