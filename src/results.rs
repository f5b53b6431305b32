//! Results for machines and spreadsheets: JSON documents and CSV tables. Fields are added, never
//! renamed, within a format number.

pub mod audit;
pub mod audit_change;
pub mod compare;
pub mod csv;
pub mod decided;
pub mod gaps;
pub mod intake;
pub mod json;
pub mod mend;
pub mod need;
pub mod oil;
pub mod pool;
pub mod scatter;
pub mod weigh;
pub mod whatif;
pub mod xlsx;
