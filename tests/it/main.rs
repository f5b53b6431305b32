//! Everything tested from outside the crate, in one binary.

mod report_figures;
mod report_formulas;
mod report_pages;
