//! Problems: what is wrong with an input, where, why, and what to write instead.
//!
//! [`Problems`] is the only collector, so that a reader mends a file once. A function that fails
//! returns [`Reported`], which only [`Problems::error`] makes: a failure without a message does
//! not compile.

pub mod code;
pub mod edit;
pub mod json;
pub mod render;
pub mod suggest;

pub use code::Code;
pub use edit::{Edit, Write};

use crate::source::Place;
use std::collections::BTreeSet;

/// How much a problem weighs.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Severity {
    /// Nothing is worked out until it is mended.
    Error,
    /// Worked out all the same; an error under `--strict`.
    Warning,
    /// Worth knowing.
    Note,
}

impl Severity {
    /// The word printed.
    pub const fn word(self) -> &'static str {
        match self {
            Self::Error => "error",
            Self::Warning => "warning",
            Self::Note => "note",
        }
    }
}

/// One thing wrong.
#[derive(Clone, Debug, PartialEq)]
pub struct Problem {
    /// Its stable name.
    pub code: Code,
    /// How much it weighs.
    pub severity: Severity,
    /// What is wrong: a fragment in lower case, what was found before what was wanted.
    pub message: String,
    /// Where.
    pub place: Place,
    /// The machine, part or oil it is in: `CV-104, rolling bearing 22220`.
    pub within: Option<String>,
    /// A word at the mark, where the mark alone does not say it.
    pub label: Option<String>,
    /// Other places that belong to it, with what stands there.
    pub related: Vec<(Place, String)>,
    /// Why it is a problem.
    pub why: Option<String>,
    /// What follows from it, of warnings.
    pub so: Option<String>,
    /// What to write instead; several are alternatives.
    pub write: Vec<Write>,
    /// Whom to ask.
    pub ask: Option<String>,
    /// The name that was certainly meant.
    pub did_you_mean: Option<String>,
}

impl Problem {
    /// A problem of the code's own severity.
    pub fn new(code: Code, message: impl Into<String>, place: Place) -> Self {
        Self {
            code,
            severity: code.severity(),
            message: message.into(),
            place,
            within: None,
            label: None,
            related: Vec::new(),
            why: None,
            so: None,
            write: Vec::new(),
            ask: None,
            did_you_mean: None,
        }
    }

    /// Names the machine, part or oil it is in; nothing where the text is empty.
    #[must_use]
    pub fn within(mut self, what: impl Into<String>) -> Self {
        let what = what.into();
        self.within = (!what.is_empty()).then_some(what);
        self
    }

    /// A word at the mark.
    #[must_use]
    pub fn label(mut self, label: impl Into<String>) -> Self {
        self.label = Some(label.into());
        self
    }

    /// Why it is a problem.
    #[must_use]
    pub fn why(mut self, why: impl Into<String>) -> Self {
        self.why = Some(why.into());
        self
    }

    /// What follows from it.
    #[must_use]
    pub fn so(mut self, so: impl Into<String>) -> Self {
        self.so = Some(so.into());
        self
    }

    /// One way to mend it.
    #[must_use]
    pub fn write(mut self, write: Write) -> Self {
        self.write.push(write);
        self
    }

    /// Several ways to mend it.
    #[must_use]
    pub fn writes(mut self, writes: impl IntoIterator<Item = Write>) -> Self {
        self.write.extend(writes);
        self
    }

    /// Whom to ask for what.
    #[must_use]
    pub fn ask(mut self, ask: impl Into<String>) -> Self {
        self.ask = Some(ask.into());
        self
    }

    /// The name certainly meant.
    #[must_use]
    pub fn did_you_mean(mut self, name: impl Into<String>) -> Self {
        self.did_you_mean = Some(name.into());
        self
    }

    /// Another place that belongs to it.
    #[must_use]
    pub fn related(mut self, place: Place, says: impl Into<String>) -> Self {
        self.related.push((place, says.into()));
        self
    }

    /// File and position for sorting: problems without a place in a file come first.
    fn position(&self) -> (Option<u32>, u32, u32) {
        match &self.place {
            Place::Text(span) => (Some(span.file.0), span.start, span.end),
            Place::Cell(cell) => (Some(cell.file.0), cell.row, cell.column),
            Place::Rule(_) | Place::Flag(_) | Place::Program => (None, 0, 0),
        }
    }
}

/// Proof that an error was reported.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Reported(());

/// The collector of a run's problems.
#[derive(Clone, Debug, Default)]
pub struct Problems {
    list: Vec<Problem>,
    seen: BTreeSet<(Code, Option<u32>, u32, u32, String)>,
    errors: usize,
}

impl Problems {
    /// Nothing wrong so far.
    pub fn new() -> Self {
        Self::default()
    }

    /// Reports an error; the value returned proves it.
    pub fn error(&mut self, mut problem: Problem) -> Reported {
        problem.severity = Severity::Error;
        self.push(problem);
        Reported(())
    }

    /// Reports a warning or a note; an error given here stays one.
    ///
    /// The same finding at the same place is kept once: a record copied by `like:` is read for
    /// each machine that copies it.
    pub fn push(&mut self, problem: Problem) {
        let (file, start, end) = problem.position();
        let key = (problem.code, file, start, end, problem.message.clone());
        if self.seen.insert(key) {
            self.errors += usize::from(problem.severity == Severity::Error);
            self.list.push(problem);
        }
    }

    /// Whether any error was reported.
    pub fn failed(&self) -> Option<Reported> {
        (self.errors > 0).then_some(Reported(()))
    }

    /// How many of a severity.
    pub fn count(&self, severity: Severity) -> usize {
        self.list.iter().filter(|p| p.severity == severity).count()
    }

    /// Makes warnings into errors, as `--strict` asks.
    pub fn make_strict(&mut self) {
        for problem in &mut self.list {
            if problem.severity == Severity::Warning {
                problem.severity = Severity::Error;
                self.errors += 1;
            }
        }
    }

    /// Drops the warnings of these codes about a machine that allows them; never an error.
    pub fn allow(&mut self, address: &str, codes: &[String]) {
        if codes.is_empty() {
            return;
        }
        self.list.retain(|p| {
            let about = p.within.as_deref().is_some_and(|w| {
                w.strip_prefix(address)
                    .is_some_and(|rest| rest.is_empty() || rest.starts_with([',', '/']))
            });
            let allowed = codes.iter().any(|c| c == p.code.as_str());
            p.severity == Severity::Error || !(about && allowed)
        });
    }

    /// By file, place and code: the order of printing.
    pub fn sorted(&self) -> Vec<&Problem> {
        let mut list: Vec<&Problem> = self.list.iter().collect();
        list.sort_by(|a, b| {
            let key = |p: &Problem| (p.position(), p.code.as_str());
            key(a)
                .cmp(&key(b))
                .then_with(|| a.message.cmp(&b.message))
                .then_with(|| a.within.cmp(&b.within))
        });
        list
    }

    /// Whether nothing was found.
    pub fn is_empty(&self) -> bool {
        self.list.is_empty()
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_same_finding_is_kept_once_and_sorted_by_place() {
        let span = |start| {
            Place::Text(crate::source::Span {
                file: crate::source::FileId(0),
                start,
                end: start + 1,
            })
        };
        let mut problems = Problems::new();
        problems.error(Problem::new(Code::UnitMissing, "no unit", span(9)));
        problems.error(Problem::new(Code::UnitMissing, "no unit", span(9)));
        problems.push(Problem::new(Code::ValueUnusual, "unusual", span(2)).within("A-1, part x"));
        assert_eq!(problems.count(Severity::Error), 1);
        let codes: Vec<Code> = problems.sorted().iter().map(|p| p.code).collect();
        assert_eq!(codes, [Code::ValueUnusual, Code::UnitMissing]);
        assert!(problems.failed().is_some());
        problems.allow("A", &["value-unusual".to_owned()]);
        assert_eq!(problems.count(Severity::Warning), 1);
        problems.allow(
            "A-1",
            &["value-unusual".to_owned(), "unit-missing".to_owned()],
        );
        assert_eq!(problems.count(Severity::Warning), 0);
        assert_eq!(problems.count(Severity::Error), 1);
    }
}
