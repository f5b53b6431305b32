//! The grammar of a value: `number unit`, with what may stand round it.
//!
//! ```text
//! value   = body { "," clause }
//! body    = quantity [ "+/-" tolerance ] [ "at" temperature ]
//!         | quantity ".." quantity            the unit on both, or on the second
//!         | "unknown" [ "(" range ")" ]
//!         | "held at" ( quantity | "unknown" … )
//!         | ( "below" | "above" ) quantity
//! clause  = origin [ date ] [ "note" ]        measured, maker, nameplate …
//!         | "ask" "whom" | "test" "which" | "note"        texts in quotation marks
//! ```
//!
//! Nothing here knows of files: a failure is a [`Fault`] that marks bytes of the text it was
//! given, and the reader carries it to its place.

mod beside;
pub mod body;
pub mod clauses;
pub mod date;
pub mod fault;
mod misread;
mod range;
pub mod want;

pub use body::{Body, Deviation};
pub use clauses::{Clauses, Said};
pub use fault::{Fault, Mend};
pub use want::{At, Ends, Roughness, Want};

use crate::problem::Code;

/// A value with its clauses.
#[derive(Clone, Debug, PartialEq)]
pub struct Value {
    /// The value itself.
    pub body: Body,
    /// What stands behind it.
    pub clauses: Clauses,
    /// The body as written.
    pub written: String,
    /// Which roughness was written, where one was named.
    pub roughness: Option<Roughness>,
}

/// Reads a value of the kind wanted.
///
/// # Errors
/// Everything wrong with the body and with the clauses.
pub fn read(text: &str, want: &Want) -> Result<Value, Vec<Fault>> {
    let split = clauses::split(text);
    let head = &text[split.head.clone()];
    let (roughness, bare) = named_roughness(head, want);
    let from = split.head.end - bare.len();
    let body = body::read(bare, want).map_err(|f| f.shifted(from));
    let mut faults = split.faults;
    if let Some(at) = &split.test_at
        && !want.test
    {
        faults.push(unwanted(
            text,
            at.clone(),
            "test",
            "no test belongs to this value",
        ));
    }
    let known = matches!(&body, Ok(b) if !b.is_unknown());
    if let Some(at) = &split.ask_at
        && known
    {
        let why = "`ask` names whom to ask for a value that is unknown; this one is stated";
        faults.push(unwanted(text, at.clone(), "ask", why));
    }
    match body {
        Ok(body) if faults.is_empty() => Ok(Value {
            body,
            clauses: split.clauses,
            written: head.to_owned(),
            roughness,
        }),
        Ok(_) => Err(faults),
        Err(fault) => {
            faults.insert(0, fault);
            Err(faults)
        }
    }
}

/// Parts `Ra` or `Rq` from a roughness.
fn named_roughness<'t>(head: &'t str, want: &Want) -> (Option<Roughness>, &'t str) {
    if want.roughness.is_none() {
        return (None, head);
    }
    for roughness in [Roughness::Ra, Roughness::Rq] {
        let rest = head.strip_prefix(roughness.symbol());
        if let Some(rest) = rest.filter(|r| r.starts_with(' ')) {
            return (Some(roughness), rest.trim_start());
        }
    }
    (None, head)
}

/// Reads words with clauses behind them: a value that is no quantity.
///
/// # Errors
/// Everything wrong with the clauses.
pub fn read_words(text: &str) -> Result<(String, Clauses), Vec<Fault>> {
    let split = clauses::split(text);
    let mut faults = split.faults;
    if let Some(at) = split.test_at {
        faults.push(unwanted(text, at, "test", "no test belongs to this value"));
    }
    if faults.is_empty() {
        Ok((text[split.head].to_owned(), split.clauses))
    } else {
        Err(faults)
    }
}

/// A clause that is understood but has no meaning here; taken out with its comma.
fn unwanted(text: &str, at: std::ops::Range<usize>, clause: &str, why: &str) -> Fault {
    let before = text[..at.start].trim_end_matches([' ', ',']).len();
    Fault::new(
        Code::ClauseUnwanted,
        format!("`{clause}` has no meaning here"),
        at.clone(),
    )
    .why(why)
    .mend(Mend::new(before..at.end, ""))
}

#[cfg(test)]
mod tests;
