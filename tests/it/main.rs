//! Everything tested from outside the crate, in one binary.

mod chance;
mod checks;
mod demo;
mod hostile;
mod journal_heat;
mod journal_table;
mod judging;
mod problems;
mod properties_film;
mod properties_oil;
mod reader;
mod reference_film;
mod reference_journal;
mod reference_oil;
mod refusals_film;
mod refusals_oil;
mod report_figures;
mod report_formulas;
mod report_pages;
mod rules;
mod scenario;
mod tables;
mod work_journal;
