//! What every part of the reader needs: the texts, and the collector of problems.

use super::value::{Fault, Mend};
use crate::problem::{Code, Edit, Problem, Problems, Write};
use crate::source::yaml::{Node, NodeKind, Scalar, Style};
use crate::source::{Place, SourceSet, Span};
use std::collections::BTreeSet;

/// The texts of a run and its problems.
pub struct Reader<'a> {
    /// Every text.
    pub set: &'a SourceSet,
    /// The collector.
    pub problems: &'a mut Problems,
    /// Oils that are in the files but could not be read: not unknown, only unusable.
    pub unread_oils: BTreeSet<String>,
}

impl<'a> Reader<'a> {
    /// A reader of some texts.
    pub fn new(set: &'a SourceSet, problems: &'a mut Problems) -> Self {
        Self {
            set,
            problems,
            unread_oils: BTreeSet::new(),
        }
    }

    /// Reports a problem at a span.
    pub fn report(&mut self, problem: Problem) {
        self.problems.push(problem);
    }

    /// A problem at a span of a text.
    pub fn at(&self, code: Code, message: impl Into<String>, span: Span, within: &str) -> Problem {
        Problem::new(code, message, Place::Text(span)).within(within)
    }

    /// The source text of a file.
    pub fn source(&self, node: &Node) -> &str {
        self.set
            .file(node.span.file)
            .map_or("", |f| f.text.as_str())
    }

    /// Carries faults of a value's text to their places.
    pub fn faults(&mut self, node: &Node, faults: Vec<Fault>, within: &str) {
        for fault in faults {
            let problem = self.carried(node, fault, within);
            self.report(problem);
        }
    }

    /// A fault of a value's text as a problem at its place.
    pub fn carried(&self, node: &Node, fault: Fault, within: &str) -> Problem {
        let span = node.part(self.source(node), fault.part.clone());
        let mut problem = self.at(fault.code, fault.message, span, within);
        problem.why = fault.why;
        let writes = fault.mends.iter().map(|m| self.mended(node, m));
        problem.write = writes.collect();
        if problem.code == Code::NoteOpen
            && let Some(whole) = self.cut_by_comment(node)
        {
            problem.write = vec![whole];
        }
        problem
    }

    /// A value that a `#` inside a remark has cut off: the whole line in single quotes.
    fn cut_by_comment(&self, node: &Node) -> Option<Write> {
        let rest = self.source(node).get(node.span.end as usize..)?;
        let rest = rest.lines().next()?.trim_end();
        if !rest.starts_with(" #") {
            return None;
        }
        let whole = Span {
            end: node.span.end + u32::try_from(rest.len()).ok()?,
            ..node.span
        };
        Some(Write::edit(whole, single_quoted(self.set.slice(whole))))
    }

    /// A change of a value's text as a change of the file.
    pub fn mended(&self, node: &Node, mend: &Mend) -> Write {
        let mut write = Write::default();
        write.edits.push(self.edit(node, mend));
        write.remark.clone_from(&mend.remark);
        write
    }

    fn edit(&self, node: &Node, mend: &Mend) -> Edit {
        let NodeKind::Scalar(scalar) = &node.kind else {
            return Edit {
                span: node.span,
                text: mend.text.clone(),
            };
        };
        let after = mend.applied(&scalar.text);
        if node.is_blank() {
            return Edit {
                span: node.span,
                text: format!(" {}", as_plain(&after, scalar.in_brackets)),
            };
        }
        let span = node.part(self.source(node), mend.part.clone());
        let same_bytes = self.set.slice(span) == scalar.text.get(mend.part.clone()).unwrap_or("");
        let fits = match scalar.style {
            Style::Plain => is_plain(&after, scalar.in_brackets),
            Style::Single => !mend.text.contains('\''),
            Style::Double => !mend.text.contains(['"', '\\']),
            Style::Block => false,
        };
        if same_bytes && fits {
            return Edit {
                span,
                text: mend.text.clone(),
            };
        }
        Edit {
            span: node.span,
            text: rewritten(&after, scalar),
        }
    }
}

/// A text as it may stand in the file, in the style it had where that is possible.
fn rewritten(text: &str, scalar: &Scalar) -> String {
    match scalar.style {
        Style::Double if !text.contains(['"', '\\']) => format!("\"{text}\""),
        Style::Plain => as_plain(text, scalar.in_brackets),
        _ => single_quoted(text),
    }
}

/// A text without quotation marks where it may stand so, else in single ones.
pub fn as_plain(text: &str, in_brackets: bool) -> String {
    if is_plain(text, in_brackets) {
        text.to_owned()
    } else {
        single_quoted(text)
    }
}

/// A text in single quotation marks.
pub fn single_quoted(text: &str) -> String {
    format!("'{}'", text.replace('\'', "''"))
}

/// Whether a text may stand without quotation marks.
fn is_plain(text: &str, in_brackets: bool) -> bool {
    let first = text.chars().next();
    let opens = first.is_some_and(|c| "[]{},#&*!|>'\"%@`".contains(c));
    let dash = text.starts_with("- ") || text.starts_with("? ") || text.starts_with(": ");
    let inside = text.contains(": ") || text.ends_with(':') || text.contains(" #");
    let comma = in_brackets && text.contains(['[', ']', '{', '}', ',']);
    !(opens || dash || inside || comma || text.trim() != text || text.contains('\n'))
}
