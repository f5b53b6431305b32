//! The workbook of `report --xlsx`.

use crate::cli::exit::Exit;
use crate::cli::load::Loaded;
use crate::cli::session::Session;
use crate::decide::gaps::{PointGaps, of_points};
use crate::model::Point;
use crate::results::csv::Table;
use crate::results::xlsx::{Content, workbook};
use crate::weighing::Scales;
use std::path::Path;

/// Weighs the points and writes the workbook.
///
/// # Errors
/// A file that cannot be written; that has been told.
pub(super) fn write<'s>(
    session: &mut Session<'_>,
    scales: &Scales<'s>,
    loaded: &Loaded,
    points: &[&'s Point],
    samples: Option<Table>,
    path: &Path,
) -> Result<(), Exit> {
    session.may_write_book(path)?;
    let mut weighed: Vec<PointGaps<'s>> = Vec::with_capacity(points.len());
    for point in points {
        weighed.extend(of_points(scales, [*point]));
        session.progress("weighing for the workbook", weighed.len(), points.len());
    }
    session.host.progress_end();
    let head = session.head(loaded);
    let content = Content {
        scales,
        points: &weighed,
        sources: &loaded.sources,
        head: &head,
        samples,
        warning: session.shared.demo.then_some(
            "Demonstration: works, machines and oils are invented. No number here is for use.",
        ),
    };
    let bytes = workbook(&content).map_err(|error| {
        session.fail(&format!("{} cannot be made: {error}", path.display()));
        Exit::Defect
    })?;
    session.put(path, &bytes)?;
    session
        .host
        .out(&format!("workbook in {}\n", path.display()));
    Ok(())
}
