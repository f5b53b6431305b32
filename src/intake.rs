//! Registers and oil lists of spreadsheets into drafts of site and oil files. Nothing is guessed
//! in silence and nothing dropped: what a cell was read as is said, what was not understood stays
//! as a note on its row.

pub mod cell;
pub mod compare;
pub mod decimals;
pub mod describe;
pub mod draft;
pub mod finding;
pub mod headings;
pub mod inputs;
pub mod layout;
pub mod lubricant;
mod machine;
pub mod map;
pub mod number;
pub mod oils;
pub mod parsed;
pub mod site;
pub mod table;
pub mod tags;
pub mod target;
pub mod units;
pub mod words;
pub mod yaml;
