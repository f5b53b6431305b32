//! Registers read by the command: the dirty one row by row, hand edits kept, real files, the way
//! out to a workbook and back.

mod again;
mod dirty;
mod files;
mod wide;
mod workbook;
