//! One machine, with one lubrication point or several.

use super::{
    Answer, Assumption, Barred, CalcStep, Candidates, Caution, CautionNote, Changes, Condition,
    Gaps, Origin, Phrase, SignOff,
};
use crate::report::draw::band::{BandFigure, MiniBand};
use crate::report::draw::margin_bars::MarginBars;
use crate::report::draw::season::SeasonFigure;
use crate::report::draw::viscosity::ViscosityFigure;
use serde::{Deserialize, Serialize};

/// The sheet of a machine.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct MachineSheet {
    /// The answer for the whole machine, where it has several points; else its point's.
    pub answer: Answer,
    /// The caution.
    pub caution: Caution,
    /// Its lubrication points.
    pub points: Vec<Point>,
    /// The paragraph for the work order.
    pub work_order: Option<String>,
    /// Cautions and deferrals that apply.
    pub cautions: Vec<CautionNote>,
    /// The user's notes, Markdown.
    pub notes: Option<String>,
    /// The signatures.
    pub sign: SignOff,
}

/// The small figure beside the answer.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct Summary {
    /// The oil shown.
    pub oil: String,
    /// Its margins.
    pub bars: MarginBars,
    /// Its ambient band.
    pub band: Option<MiniBand>,
    /// The axis of that band.
    pub band_axis: Option<MiniBand>,
    /// The same in words.
    pub says: String,
}

/// One limit.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct NeedRow {
    /// Which end: `hot floor`, `start ceiling`.
    pub end: String,
    /// The limit as shown: `≥ 40.8`.
    pub limit: String,
    /// Its unit.
    pub unit: String,
    /// At which temperature.
    pub at: String,
    /// What sets it.
    pub set_by: Phrase,
    /// The rule, its source and its steps.
    pub rule: Phrase,
    /// Where the limit comes from.
    pub origin: Option<Origin>,
    /// How sure the rule is, where it is less than high.
    pub confidence: Option<String>,
    /// Whether it governs its end.
    pub governs: bool,
}

/// What the point needs.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct Needs {
    /// The unit of temperatures in the heading.
    pub degrees: String,
    /// The limits, strictest first at each end.
    pub rows: Vec<NeedRow>,
    /// Limits replaced, practice windows that do not count, and the like.
    pub notes: Vec<Phrase>,
}

/// One input.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct InputLine {
    /// Where it comes from.
    pub origin: Origin,
    /// What it is, with its value.
    pub text: Phrase,
    /// Where it was written: `site.yaml:33`, `area yard`.
    pub from: String,
}

/// The viscosity–temperature figure.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct Curves {
    /// The figure with its details.
    pub figure: ViscosityFigure,
    /// The caption.
    pub caption: String,
    /// Remarks: how far below the coldest measured point a line goes.
    pub notes: Vec<Phrase>,
}

/// Where the oils hold over the ambient range.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct Ambient {
    /// Bands of all candidates.
    pub bands: Option<BandFigure>,
    /// The year, where months are known.
    pub season: Option<SeasonFigure>,
    /// Oils by season, and the like.
    pub notes: Vec<Phrase>,
}

/// One lubrication point.
#[derive(Clone, Debug, Default, PartialEq, Serialize, Deserialize)]
pub struct Point {
    /// Key of its ids; unique on the sheet.
    pub key: String,
    /// Its name; none for the only point of a machine.
    pub name: Option<String>,
    /// The line under the name.
    pub about: Phrase,
    /// Its answer.
    pub answer: Answer,
    /// The figure beside the answer.
    pub summary: Option<Summary>,
    /// Its limits.
    pub needs: Needs,
    /// What they were worked from.
    pub inputs: Vec<InputLine>,
    /// The curves.
    pub curves: Option<Curves>,
    /// The oils weighed.
    pub candidates: Option<Candidates>,
    /// The oils barred.
    pub barred: Vec<Barred>,
    /// The conditions.
    pub conditions: Vec<Condition>,
    /// The ambient bands.
    pub ambient: Option<Ambient>,
    /// What would change it.
    pub changes: Option<Changes>,
    /// The change-over, step by step.
    pub change_over: Vec<Phrase>,
    /// The calculation.
    pub steps: Vec<CalcStep>,
    /// The point whose calculation it shares, figure for figure.
    pub steps_as: Option<String>,
    /// The command that prints it.
    pub steps_command: String,
    /// What is taken as true.
    pub assumptions: Vec<Assumption>,
    /// What is missing.
    pub gaps: Gaps,
}
