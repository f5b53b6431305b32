//! Lists of viscosities at temperatures, and grades in their place.

mod grade;
mod pieces;

pub use grade::{Grade, read_grade};
pub use pieces::{Piece, pieces};

use super::convert::{Dense, shown, to_kinematic};
use super::fields::Slot;
use super::reader::Reader;
use super::value::{self, At, Body, Clauses, Deviation, Fault, Mend, Want};
use crate::model::oil::{DynamicPoint, ViscosityPoint};
use crate::problem::{Code, Write};
use crate::quantity::{DynamicViscosity, Kind, Measure, Ratio};
use crate::source::place::Given;
use crate::source::{Origin, Span};

const POINT: Want = Want::one(&[
    Kind::KinematicViscosity,
    Kind::DynamicViscosity,
    Kind::Efflux,
])
.at(At::Must);
const COLD: Want = Want::one(&[Kind::DynamicViscosity]).at(At::Must);
/// The key whose points come from a test.
const SHEARED: &str = "sheared";
const INDEX: Want = Want::one(&[Kind::Ratio]);

/// What a list of viscosities holds.
#[derive(Clone, Debug, Default)]
pub struct Listed {
    /// The points, in the order written.
    pub points: Vec<ViscosityPoint>,
    /// The pieces of the points, for messages.
    pub at: Vec<Piece>,
    /// A grade.
    pub grade: Option<Given<Grade>>,
    /// A viscosity index.
    pub index: Option<Given<Ratio>>,
    /// The test named behind the list.
    pub test: Option<String>,
    /// Whether anything could not be read.
    pub faulty: bool,
}

/// Reads a list of viscosities, or a grade with an index.
pub fn read(reader: &mut Reader<'_>, slot: &Slot<'_>, dense: Option<&Dense>) -> Listed {
    let mut listed = Listed::default();
    if without_brackets(reader, slot) {
        listed.faulty = true;
        return listed;
    }
    let Some((list, whole)) = pieces(reader, slot) else {
        listed.faulty = true;
        return listed;
    };
    listed.test.clone_from(&whole.test);
    if listed.test.is_some() && slot.key.name != SHEARED {
        test_unwanted(reader, slot);
        listed.faulty = true;
    }
    let list_of = List { slot, whole, dense };
    for piece in list {
        if list_of.take(reader, &piece, &mut listed).is_none() {
            listed.faulty = true;
        }
    }
    listed
}

/// A test behind viscosities that come from none.
fn test_unwanted(reader: &mut Reader<'_>, slot: &Slot<'_>) {
    let text = reader.set.slice(slot.node.span);
    let start = text.rfind("test ").unwrap_or(0);
    let comma = text[..start].trim_end_matches([' ', ',']).len();
    let end = text[start..]
        .rfind('"')
        .map_or(text.len(), |quote| start + quote + 1);
    let part = |from: usize, to: usize| Span {
        start: slot.node.span.start + u32::try_from(from).unwrap_or(0),
        end: slot.node.span.start + u32::try_from(to).unwrap_or(0),
        ..slot.node.span
    };
    let problem = reader
        .at(
            Code::ClauseUnwanted,
            "a test named behind viscosities of the new oil",
            part(start, end),
            &slot.within,
        )
        .why(
            "only what was measured after a shear test has one; those points stand under `sheared`",
        )
        .write(Write::edit(part(comma, end), ""))
        .write(Write::edit(slot.name.span, SHEARED));
    reader.report(problem);
}

/// What every item of a list shares.
struct List<'s, 't> {
    slot: &'s Slot<'t>,
    /// The clauses behind the whole list.
    whole: Clauses,
    dense: Option<&'s Dense>,
}

/// `220 mm2/s at 40 degC, 19 mm2/s at 100 degC` without brackets round it.
fn without_brackets(reader: &mut Reader<'_>, slot: &Slot<'_>) -> bool {
    let Some(text) = slot.node.text() else {
        return false;
    };
    let mut parts = text.split(", ");
    let several = parts.clone().count() > 1
        && parts.all(|p| {
            let p = p.trim();
            p.contains(" at ") || grade::opens(p) || p.starts_with("VI ")
        });
    if several {
        let problem = reader
            .at(
                Code::ListWanted,
                "several points found, a list in brackets is wanted",
                slot.node.span,
                &slot.within,
            )
            .write(Write::edit(slot.node.span, format!("[{text}]")));
        reader.report(problem);
    }
    several
}

impl List<'_, '_> {
    fn take(&self, reader: &mut Reader<'_>, piece: &Piece, listed: &mut Listed) -> Option<()> {
        let slot = self.slot;
        let text = piece.text();
        if let Some(number) = text
            .strip_prefix("VI ")
            .or_else(|| text.strip_prefix("VI="))
        {
            let value = value_of(reader, slot, piece, number, &INDEX)?;
            let Body::One { read, .. } = value.body else {
                return None;
            };
            let origin = origin(slot, &self.whole, &value.clauses);
            let index = Ratio::from_base(read.amount.base);
            listed.index = Some(Given::new(index, text, origin));
            return Some(());
        }
        if grade::opens(text) {
            let (grade, clauses) = grade_of(reader, slot, piece)?;
            let origin = origin(slot, &self.whole, &clauses);
            listed.grade = Some(Given { origin, ..grade });
            return Some(());
        }
        let want = if slot.key.name == SHEARED {
            POINT.with_test()
        } else {
            POINT
        };
        let value = value_of(reader, slot, piece, text, &want)?;
        if let Some(test) = &value.clauses.test {
            listed.test = Some(test.clone());
        }
        let point = self.point(reader, piece, value)?;
        listed.points.push(point);
        listed.at.push(piece.clone());
        Some(())
    }

    fn point(
        &self,
        reader: &mut Reader<'_>,
        piece: &Piece,
        value: value::Value,
    ) -> Option<ViscosityPoint> {
        let slot = self.slot;
        let Body::One {
            read,
            deviation,
            at: Some(at),
        } = value.body
        else {
            return None;
        };
        let at = at.amount.as_measure()?;
        let nu = match to_kinematic(&read, at, self.dense, &value.written) {
            Ok(nu) => nu,
            Err(fault) => {
                reader.faults(&piece.node, vec![fault], &slot.within);
                return None;
            }
        };
        if read.amount.kind != Kind::KinematicViscosity {
            let note = reader.at(
                Code::ViscosityRead,
                format!("{} read as {}", value.written, shown(nu)),
                piece.node.span,
                &slot.within,
            );
            reader.report(note);
        }
        let tolerance = match deviation {
            Some(Deviation::Share(share)) => Some(share),
            Some(Deviation::Of(by)) => Some(by.amount.base / read.amount.base),
            None => None,
        };
        if tolerance.is_some_and(|t| t >= 1.0) {
            let fault = Fault::new(
                Code::ValueImpossible,
                "the tolerance is as large as the viscosity",
                0..piece.text().len(),
            )
            .mend(Mend::new(
                0..piece.text().len(),
                without_tolerance(piece.text()),
            ));
            reader.faults(&piece.node, vec![fault], &slot.within);
            return None;
        }
        let origin = origin(slot, &self.whole, &value.clauses);
        let nu = Given::new(nu, value.written, origin);
        Some(ViscosityPoint { nu, at, tolerance })
    }
}

/// A grade with what it was read as.
pub fn grade_of(
    reader: &mut Reader<'_>,
    slot: &Slot<'_>,
    piece: &Piece,
) -> Option<(Given<Grade>, Clauses)> {
    let text = piece.text();
    let (head, clauses) = super::fields::words::parted(text);
    match read_grade(&head) {
        Ok(grade) => {
            if let Some(read_as) = grade.read_as() {
                let note = reader.at(
                    Code::GradeRead,
                    format!("{head} read as {read_as}"),
                    piece.node.span,
                    &slot.within,
                );
                reader.report(note);
            }
            let origin = slot.origin(&clauses);
            Some((Given::new(grade, head, origin), clauses))
        }
        Err(fault) => {
            reader.faults(&piece.node, vec![fault], &slot.within);
            None
        }
    }
}

/// A value of a piece; a text that begins inside it keeps its bytes.
fn value_of(
    reader: &mut Reader<'_>,
    slot: &Slot<'_>,
    piece: &Piece,
    text: &str,
    want: &Want,
) -> Option<value::Value> {
    let shift = piece.text().len() - text.len();
    match value::read(text, want) {
        Ok(value) => Some(value),
        Err(faults) => {
            let shifted = faults.into_iter().map(|f| f.shifted(shift)).collect();
            reader.faults(&piece.node, shifted, &slot.within);
            None
        }
    }
}

fn without_tolerance(text: &str) -> String {
    let value = text.split("+/-").next().unwrap_or(text).trim_end();
    let at = text.rfind(" at ").map_or("", |at| &text[at..]);
    format!("{value}{at}")
}

/// The piece's own origin, else that of the whole list.
fn origin(slot: &Slot<'_>, whole: &Clauses, own: &Clauses) -> Origin {
    slot.origin(if own.origin.is_some() { own } else { whole })
}

/// Reads dynamic viscosities measured cold.
pub fn read_cold(reader: &mut Reader<'_>, slot: &Slot<'_>) -> Vec<Given<DynamicPoint>> {
    let Some((list, whole)) = pieces(reader, slot) else {
        return Vec::new();
    };
    let mut found = Vec::new();
    for piece in list {
        let Some(value) = value_of(reader, slot, &piece, piece.text(), &COLD) else {
            continue;
        };
        let origin = origin(slot, &whole, &value.clauses);
        if let Body::One {
            read, at: Some(at), ..
        } = value.body
            && let Some(at) = at.amount.as_measure()
        {
            let eta = DynamicViscosity::from_base(read.amount.base);
            let point = DynamicPoint { eta, at };
            found.push(Given::new(point, value.written, origin));
        }
    }
    found
}
