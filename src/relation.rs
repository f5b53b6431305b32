//! The published relations, one a file, each once. `work`, `why`, the judge and the report all
//! call these functions; nothing here knows of machines, messages or files.

pub use outside::Outside;

pub mod bearing;
pub mod film;
pub mod gear;
pub mod guidance;
pub mod heat;
pub mod journal;
pub mod oil;
pub mod oil_fits;
pub mod outside;
pub mod sump;
pub mod thrust;

/// What the program says about a relation wherever it prints a result of it.
#[derive(Debug, PartialEq, Eq)]
pub struct Law {
    /// The name `work` knows it by, where it has a row there; else a name of the same form.
    pub name: &'static str,
    /// What it works out, in words.
    pub title: &'static str,
    /// The formula, in plain text with the symbols of its inputs: `nu1 = 45000 n^-0.83 Dpw^-0.5`.
    pub formula: &'static str,
    /// Range of validity, in words.
    pub range: &'static str,
    /// Standard or publication, with the equation where known, and how sure we are of it.
    pub source: &'static str,
}
