//! One published relation at a time, on values given by hand: the register behind
//! `filmwright work`.
//!
//! Each row names the relation's inputs and results as users spell them, and runs the same
//! function the demands and the judge call, with a [`Derivation`] that keeps the steps.

pub mod args;
pub mod batch;
mod bearing;
mod contact;
mod film;
mod gear;
mod heat;
mod journal;
mod json;
mod oil;

pub use args::Args;

use crate::quantity::{Amount, Measure};
use crate::relation::{Law, Outside};
use crate::trace::{Derivation, Known, StepId};

/// The rows of each group, in the order they are listed.
static GROUPS: &[&[Relation]] = &[
    oil::ROWS,
    film::ROWS,
    bearing::ROWS,
    gear::ROWS,
    journal::ROWS,
    heat::ROWS,
];

/// Every relation, in the order they are listed.
pub fn relations() -> impl Iterator<Item = &'static Relation> {
    GROUPS.iter().copied().flatten()
}

/// The relation of that name; hyphens, underscores and capitals do not matter.
///
/// # Errors
/// `relation-unknown`, with the name nearly written where that is certain.
pub fn relation(name: &str) -> Result<&'static Relation, Refusal> {
    let wanted = plain(name);
    if let Some(found) = relations().find(|r| r.name == wanted) {
        return Ok(found);
    }
    let near = relations()
        .map(|r| (strsim::damerau_levenshtein(r.name, &wanted), r.name))
        .min();
    let hint = match near {
        Some((distance, near)) if distance <= near.len() / 5 => format!("; nearest: {near}"),
        _ => "; see the list: filmwright work".to_owned(),
    };
    Err(Refusal::new(
        "relation-unknown",
        format!("no relation `{}`{hint}", name.trim()),
    ))
}

fn plain(name: &str) -> String {
    name.trim().to_lowercase().replace(['_', ' '], "-")
}

/// Works out one relation with values given by hand.
///
/// # Errors
/// What the relation refuses, keys it does not take, and results that are no numbers.
pub fn run(name: &str, mut args: Args) -> Result<Worked, Refusal> {
    let relation = relation(name)?;
    let mut worked = Worked::default();
    (relation.run)(&mut args, &mut worked)?;
    args.finish(relation.name)?;
    for (result, value) in &worked.results {
        if let Value::Quantity { amount, .. } = value
            && !amount.base.is_finite()
        {
            let words = format!("{result} has no finite value with these inputs; see the range");
            return Err(Refusal::new("out-of-range", words));
        }
    }
    Ok(worked)
}

/// One row of the register.
pub struct Relation {
    /// Its name on the command line.
    pub name: &'static str,
    /// Under which heading it is listed.
    pub group: &'static str,
    /// Title, formula, range and source.
    pub law: &'static Law,
    /// What it takes.
    pub with: &'static [Input],
    /// What it gives: name and meaning with unit.
    pub gives: &'static [(&'static str, &'static str)],
    /// Works it out.
    pub run: fn(&mut Args, &mut Worked) -> Result<(), Refusal>,
}

/// One input of a relation.
pub struct Input {
    /// Its key.
    pub name: &'static str,
    /// What it is, with an example where the form is not plain.
    pub says: &'static str,
    /// Whether it must be given, and what stands in for it otherwise.
    pub need: Need,
}

/// Whether an input must be given.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Need {
    /// It must.
    Always,
    /// It need not; this is used instead, in words.
    Otherwise(&'static str),
    /// One of several ways, told apart by this word: the form it belongs to.
    Form(&'static str),
}

/// Why a relation gave no result.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Refusal {
    /// Kebab-case name: `input-missing`, `out-of-range` …
    pub name: &'static str,
    /// In words, with what to write instead.
    pub message: String,
}

impl Refusal {
    /// A refusal with its words.
    pub fn new(name: &'static str, message: impl Into<String>) -> Self {
        Self {
            name,
            message: message.into(),
        }
    }
}

impl From<Outside> for Refusal {
    fn from(outside: Outside) -> Self {
        Self::new(outside.name(), outside.to_string())
    }
}

/// A result's value.
#[derive(Clone, Debug, PartialEq)]
pub enum Value {
    /// A number with its unit, one of its kind's.
    Quantity {
        /// The number.
        amount: Amount,
        /// The unit it is given in.
        unit: &'static str,
        /// The step that made it.
        step: StepId,
    },
    /// A name, a grade; `None` where there is none.
    Text(Option<String>),
}

/// The calculation and its results.
#[derive(Default)]
pub struct Worked {
    /// The steps.
    pub trace: Derivation,
    /// Results by name, in the order given.
    pub results: Vec<(&'static str, Value)>,
    /// Remarks: out of range, assumed, extrapolated.
    pub notes: Vec<String>,
}

impl Worked {
    /// States a quantity as a result, in that unit of its kind.
    pub fn result<Q: Measure>(&mut self, name: &'static str, known: Known<Q>, unit: &'static str) {
        let value = Value::Quantity {
            amount: known.value.amount(),
            unit,
            step: known.step,
        };
        self.results.push((name, value));
    }

    /// States a name as a result.
    pub fn text(&mut self, name: &'static str, text: Option<String>) {
        self.results.push((name, Value::Text(text)));
    }

    /// Adds a remark.
    pub fn remark(&mut self, remark: impl Into<String>) {
        self.notes.push(remark.into());
    }
}
