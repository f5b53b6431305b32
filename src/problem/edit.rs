//! What to write instead: changes to the user's own text, shown as the lines they make.

use crate::source::{FileId, SourceFile, SourceSet, Span};

/// A change of text: the bytes under the span are replaced.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Edit {
    /// What is replaced; empty to insert.
    pub span: Span,
    /// By what.
    pub text: String,
}

/// One way to mend a problem.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Write {
    /// The changes, all in one file, not overlapping.
    pub edits: Vec<Edit>,
    /// Said instead of the mended line, where a line would not say it.
    pub words: Option<String>,
    /// Said beside it.
    pub remark: Option<String>,
}

impl Write {
    /// Replaces the text under a span.
    pub fn edit(span: Span, text: impl Into<String>) -> Self {
        let text = text.into();
        Self {
            edits: vec![Edit { span, text }],
            ..Self::default()
        }
    }

    /// Advice that is not one certain change of the text.
    pub fn words(words: impl Into<String>) -> Self {
        Self {
            words: Some(words.into()),
            ..Self::default()
        }
    }

    /// Adds a change.
    #[must_use]
    pub fn and(mut self, span: Span, text: impl Into<String>) -> Self {
        let text = text.into();
        self.edits.push(Edit { span, text });
        self
    }

    /// Says this instead of showing the mended line.
    #[must_use]
    pub fn said(mut self, words: impl Into<String>) -> Self {
        self.words = Some(words.into());
        self
    }

    /// Says this beside it.
    #[must_use]
    pub fn remark(mut self, remark: impl Into<String>) -> Self {
        self.remark = Some(remark.into());
        self
    }

    /// The lines as they are to stand in the file, or the words.
    pub fn shown(&self, set: &SourceSet) -> Vec<String> {
        if let Some(words) = &self.words {
            return vec![words.clone()];
        }
        let Some(file) = self.edits.first().and_then(|e| set.file(e.span.file)) else {
            return Vec::new();
        };
        dedented(&mended_lines(file, &self.edits))
    }

    /// The whole text of the file after the changes, with its number.
    pub fn applied(&self, set: &SourceSet) -> Option<(FileId, String)> {
        let file = set.file(self.edits.first()?.span.file)?;
        Some((file.id, replaced(file, &self.edits, 0, file.text.len())))
    }
}

/// The lines the changes touch, after them.
fn mended_lines(file: &SourceFile, edits: &[Edit]) -> String {
    let first = edits.iter().map(|e| e.span.start).min().unwrap_or(0);
    let last = edits.iter().map(|e| e.span.end).max().unwrap_or(0);
    let (start, _) = file.line_range(file.line_of(first));
    let (_, mut end) = file.line_range(file.line_of(last));
    // A change that ends at the beginning of a line does not touch that line.
    let inserted = edits.iter().any(|e| e.text.ends_with('\n'));
    let at_line_start = last == 0 || file.text[..last as usize].ends_with('\n');
    if inserted && at_line_start {
        end = last as usize;
    }
    replaced(file, edits, start, end.max(start))
}

/// The text between two bytes with the changes made.
fn replaced(file: &SourceFile, edits: &[Edit], start: usize, end: usize) -> String {
    let mut sorted: Vec<&Edit> = edits.iter().collect();
    sorted.sort_by_key(|e| (e.span.start, e.span.end));
    let mut out = String::new();
    let mut at = start;
    for edit in sorted {
        let from = (edit.span.start as usize).max(at);
        out.push_str(file.text.get(at..from).unwrap_or(""));
        out.push_str(&edit.text);
        at = (edit.span.end as usize).max(from);
    }
    out.push_str(file.text.get(at..end.max(at)).unwrap_or(""));
    out
}

/// Lines without the indentation they share.
fn dedented(text: &str) -> Vec<String> {
    let lines: Vec<&str> = text.trim_end_matches(['\n', '\r']).lines().collect();
    let indent = |l: &&str| l.len() - l.trim_start_matches(' ').len();
    let shared = lines
        .iter()
        .filter(|l| !l.trim().is_empty())
        .map(indent)
        .min()
        .unwrap_or(0);
    lines
        .iter()
        .map(|l| l.get(shared..).unwrap_or("").trim_end().to_owned())
        .collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    fn set() -> SourceSet {
        let mut set = SourceSet::new();
        set.add("site.yaml", "a:\n  b: 42 degC # c\n  d: 1\n");
        set
    }

    fn span(start: u32, end: u32) -> Span {
        Span {
            file: FileId(0),
            start,
            end,
        }
    }

    #[test]
    fn the_line_shown_is_the_line_mended() {
        let set = set();
        let write = Write::edit(span(8, 15), "42 K");
        assert_eq!(write.shown(&set), ["b: 42 K # c"]);
        let (_, text) = write.applied(&set).expect("one file");
        assert_eq!(text, "a:\n  b: 42 K # c\n  d: 1\n");
    }

    #[test]
    fn several_changes_and_insertions_show_every_line_they_make() {
        let set = set();
        let both = Write::edit(span(5, 6), "x").and(span(8, 15), "1\n    z: 2");
        assert_eq!(both.shown(&set), ["x: 1", "  z: 2 # c"]);
        let top = Write::edit(span(0, 0), "file: site 1\n");
        assert_eq!(top.shown(&set), ["file: site 1"]);
        let (_, text) = top.applied(&set).expect("one file");
        assert!(text.starts_with("file: site 1\na:\n"));
    }
}
