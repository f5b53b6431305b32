//! What is wrong with a rule file.

use std::cell::RefCell;

/// One fault of a rule file.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
#[error("{file}{}: {what}; write {write}", .id.as_ref().map(|id| format!(", {id}")).unwrap_or_default())]
pub struct RuleFault {
    /// The file.
    pub file: String,
    /// The entry, where it has an id.
    pub id: Option<String>,
    /// What is wrong.
    pub what: String,
    /// What to write instead.
    pub write: String,
}

/// Faults found so far.
#[derive(Debug, Default)]
pub(super) struct Faults(RefCell<Vec<RuleFault>>);

impl Faults {
    pub(super) fn add(
        &self,
        file: &str,
        id: Option<&str>,
        what: impl Into<String>,
        write: impl Into<String>,
    ) {
        self.0.borrow_mut().push(RuleFault {
            file: file.to_owned(),
            id: id.map(str::to_owned),
            what: what.into(),
            write: write.into(),
        });
    }

    pub(super) fn into_inner(self) -> Vec<RuleFault> {
        self.0.into_inner()
    }
}
