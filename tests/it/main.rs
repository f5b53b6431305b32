//! Everything tested from outside the crate, in one binary.

mod chance;
mod journal_heat;
mod journal_table;
mod reference_journal;
mod work_journal;
