//! Everything tested from outside the crate, in one binary.

mod chance;
mod checks;
mod journal_heat;
mod journal_table;
mod problems;
mod properties_oil;
mod reference_journal;
mod reference_oil;
