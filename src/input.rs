//! The reader: text into the checked model, with every problem of every file in one pass.

pub mod convert;
pub mod fields;
pub mod file;
pub mod gate;
pub mod keys;
pub mod like;
pub mod oils;
pub mod points;
pub mod reader;
pub mod schema;
mod syntax;
pub mod value;
