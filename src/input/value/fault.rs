//! What is wrong with a text, in bytes of that text, and what to put instead.

use crate::problem::Code;
use std::ops::Range;

/// Something wrong with a value.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Fault {
    /// Its name.
    pub code: Code,
    /// What is wrong.
    pub message: String,
    /// The bytes to mark.
    pub part: Range<usize>,
    /// Why it is a problem.
    pub why: Option<String>,
    /// What to put instead; several are alternatives.
    pub mends: Vec<Mend>,
}

/// A change that mends a fault.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Mend {
    /// The bytes replaced.
    pub part: Range<usize>,
    /// By what.
    pub text: String,
    /// Said beside it.
    pub remark: Option<String>,
}

impl Fault {
    /// A fault at some bytes.
    pub fn new(code: Code, message: impl Into<String>, part: Range<usize>) -> Self {
        Self {
            code,
            message: message.into(),
            part,
            why: None,
            mends: Vec::new(),
        }
    }

    /// Why it is a problem.
    #[must_use]
    pub fn why(mut self, why: impl Into<String>) -> Self {
        self.why = Some(why.into());
        self
    }

    /// One way to mend it.
    #[must_use]
    pub fn mend(mut self, mend: Mend) -> Self {
        self.mends.push(mend);
        self
    }

    /// The same fault of a text that begins so many bytes later.
    #[must_use]
    pub fn shifted(mut self, by: usize) -> Self {
        let shift = |r: &mut Range<usize>| *r = r.start + by..r.end + by;
        shift(&mut self.part);
        for mend in &mut self.mends {
            shift(&mut mend.part);
        }
        self
    }
}

impl Mend {
    /// Replaces some bytes.
    pub fn new(part: Range<usize>, text: impl Into<String>) -> Self {
        Self {
            part,
            text: text.into(),
            remark: None,
        }
    }

    /// Says this beside it.
    #[must_use]
    pub fn remark(mut self, remark: impl Into<String>) -> Self {
        self.remark = Some(remark.into());
        self
    }

    /// The text after the change.
    pub fn applied(&self, text: &str) -> String {
        let before = text.get(..self.part.start).unwrap_or("");
        let behind = text.get(self.part.end..).unwrap_or("");
        format!("{before}{}{behind}", self.text)
    }
}

/// Bytes of a slice inside the text it was cut from.
pub fn place_in(whole: &str, part: &str) -> Range<usize> {
    let start = part
        .as_ptr()
        .addr()
        .saturating_sub(whole.as_ptr().addr())
        .min(whole.len());
    start..(start + part.len()).min(whole.len())
}
