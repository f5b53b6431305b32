//! The reader: text into the checked model, with every problem of every file in one pass.

pub mod file;
pub mod keys;
pub mod schema;
pub mod value;
