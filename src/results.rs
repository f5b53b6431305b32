//! Results for machines and spreadsheets: JSON documents and CSV tables. Fields are added, never
//! renamed, within a format number.

pub mod csv;
pub mod intake;
pub mod json;
pub mod need;
pub mod oil;
pub mod weigh;
pub mod xlsx;
