//! Label sheets as plain text: every label as wide as a hand, a line to cut along between them.

use crate::cli::text::folded;
use crate::report::model::FillLabel;
use std::fmt::Write as _;

/// Width of a label in characters.
const WIDTH: usize = 56;

/// The line under every label that says which document it belongs to.
pub struct Foot {
    /// Document number.
    pub document: Option<String>,
    /// Revision.
    pub revision: Option<String>,
    /// Date of judgement.
    pub date: String,
}

impl Foot {
    fn line(&self) -> String {
        let document = self.document.as_deref();
        let revision = self.revision.as_ref().map(|r| format!("rev {r}"));
        let parts = [document, revision.as_deref(), Some(self.date.as_str())];
        parts.into_iter().flatten().collect::<Vec<_>>().join("  ")
    }
}

/// The labels of all points that have an oil proposed.
pub fn text(all: &[FillLabel], foot: &Foot) -> String {
    let cut = format!("{}\n", "- ".repeat(WIDTH / 2).trim_end());
    let mut out = String::new();
    for label in all {
        let Some(oil) = &label.oil else { continue };
        if out.is_empty() {
            out.push_str(&cut);
        }
        one(&mut out, label, oil, foot);
        out.push_str(&cut);
    }
    out
}

fn one(out: &mut String, label: &FillLabel, oil: &str, foot: &Foot) {
    out.push_str(&folded(&label.address, "", WIDTH));
    if !label.title.is_empty() {
        out.push_str(&folded(&label.title, "", WIDTH));
    }
    out.push('\n');
    let act = if label.grease {
        "Grease with"
    } else {
        "Fill with"
    };
    let amount = label
        .fill
        .as_ref()
        .map_or(String::new(), |f| format!(", {f}"));
    out.push_str(&folded(&format!("{act}  {oil}{amount}"), "  ", WIDTH));
    if !label.oil_name.is_empty() {
        out.push_str(&folded(&label.oil_name, "  ", WIDTH));
    }
    out.push('\n');
    let mut rules = vec!["Nothing else goes in here.".to_owned()];
    if let Some(old) = &label.remove {
        rules.push(format!("{old} comes out first."));
    }
    match label.conditions {
        0 => {}
        1 => rules.push("One condition on its sheet is met first.".to_owned()),
        n => rules.push(format!("{n} conditions on its sheet are met first.")),
    }
    out.push_str(&folded(&rules.join(" "), "", WIDTH));
    if label.count > 1 {
        let _ = writeln!(out, "Print {} of these.", label.count);
    }
    out.push_str(&folded(&foot.line(), "", WIDTH));
    out.push_str("Put up only when the sheet is signed.\n");
}
