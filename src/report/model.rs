//! Page models: what each kind of sheet holds, in plain words, flags, ids and drawing numbers.
//!
//! Numbers arrive formatted (`quantity::show` rounds, once); only drawings carry numbers. A list
//! that is empty and an option that is none make no heading on the page. A model can be written as
//! JSON and read back, so that a page can be laid out again, or altered, without its results.

mod answer;
mod area;
mod audit;
mod calculation;
mod candidates;
mod frame;
mod label;
mod machine;
mod oil;
mod overview;
mod reference;
mod text;

pub use answer::{Answer, Basis, Caution, CautionNote, Condition, SignBox, SignOff};
pub use area::{AreaRow, AreaSheet, MachineRow, RegisterGroup, RegisterRow};
pub use audit::{AuditSheet, CrossCell, CrossRow, Evidence, Finding, Panel, SampleRow};
pub use calculation::{Assumption, CalcStep, GapRow, Gaps, Put};
pub use candidates::{Barred, Candidate, Candidates, ChangeRow, Changes, NotWeighed};
pub use frame::{Body, Frame, Image, ImageProblem, LOGO_LIMIT, NavLink, Paper, Sheet};
pub use label::FillLabel;
pub use machine::{Ambient, Curves, InputLine, MachineSheet, NeedRow, Needs, Point, Summary};
pub use oil::{OilLife, OilPoint, OilSheet, OilStart, OilUse};
pub use overview::{AcceptRow, Matrix, MatrixCell, MatrixRow, OilRow, Overview};
pub use reference::{
    Glossary, HouseRule, Method, MethodAppendix, RevisionPage, RevisionRow, RuleRow, RulesPage,
    Term,
};
pub use text::{Degrees, Mark, Origin, Phrase, Run, RunKind, grouped, item_letter, minus};
