//! Everything tested from outside the crate, in one binary.

mod chance;
mod checks;
mod journal_heat;
mod journal_table;
mod problems;
mod properties_film;
mod properties_oil;
mod reader;
mod reference_film;
mod reference_journal;
mod reference_oil;
mod refusals_film;
mod refusals_oil;
mod rules;
mod work_journal;
