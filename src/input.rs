//! The reader: text into the checked model, with every problem of every file in one pass.

pub mod bearing_table;
pub mod convert;
pub mod fields;
pub mod file;
pub mod gate;
pub mod keys;
pub mod like;
pub mod load;
pub mod oils;
pub mod overlay;
mod parts;
pub mod points;
pub mod reader;
pub mod rules;
pub mod samples;
pub mod schema;
pub mod site;
mod syntax;
pub mod value;
