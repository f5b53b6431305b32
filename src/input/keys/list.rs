//! The table of keys as `help keys` prints it.

use super::{Record, records};
use std::fmt::Write as _;

/// Every key of every file, grouped by record.
pub fn text() -> String {
    let mut out = String::from(
        "Keys may be written with spaces or underscores. Keys that begin with x- are kept and ignored.\n",
    );
    for record in records() {
        let _ = write!(out, "\n{}\n", record.name.to_uppercase());
        table(&mut out, record);
    }
    out
}

fn table(out: &mut String, record: &Record) {
    for key in record.keys {
        let _ = writeln!(out, "  {:<20} {}", key.name, key.says);
        let _ = writeln!(out, "  {:<20}   {}", "", key.form.says());
        if key.unstated != "–" {
            let _ = writeln!(out, "  {:<20}   unstated: {}", "", key.unstated);
        }
    }
    let taken: Vec<&str> = record.also.iter().map(|r| r.name).collect();
    if !taken.is_empty() {
        let _ = writeln!(out, "  and the keys of {}", taken.join(", of "));
    }
}
