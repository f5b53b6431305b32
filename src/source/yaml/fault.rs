//! What the gate refuses.

use crate::source::place::Span;

/// Something refused, with its place.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Fault {
    /// What.
    pub kind: FaultKind,
    /// Where.
    pub span: Span,
}

/// What was refused.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
pub enum FaultKind {
    /// `&name`.
    #[error("anchor `&{0}`")]
    Anchor(String),
    /// `*name`.
    #[error("alias `*{0}`")]
    Alias(String),
    /// `<<:`.
    #[error("merge key")]
    Merge,
    /// `!name`.
    #[error("tag `{0}`")]
    Tag(String),
    /// `%YAML` and the like.
    #[error("directive")]
    Directive,
    /// `---` behind the first document.
    #[error("second document")]
    SecondDocument,
    /// Nesting beyond the limit.
    #[error("nested deeper than {limit} levels")]
    Depth {
        /// The limit.
        limit: usize,
    },
    /// A list or a record as a key.
    #[error("key is not a text")]
    KeyNotText,
    /// Nothing in the file.
    #[error("empty file")]
    Empty,
    /// Text the format does not allow.
    #[error("{0}")]
    Syntax(Syntax),
}

/// How a text offends against the format.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
pub enum Syntax {
    /// A tab indents a line.
    #[error("tab in the indentation")]
    Tab,
    /// A line is indented differently from those it belongs with.
    #[error("indentation")]
    Indent,
    /// A quotation mark is not closed.
    #[error("open quotation mark")]
    QuoteOpen,
    /// Text behind a closed quotation mark.
    #[error("text behind a quotation mark")]
    QuoteTail,
    /// A backslash with an unknown letter.
    #[error("unknown escape")]
    Escape,
    /// A bracket not closed, closed by another, or closed without being opened.
    #[error("bracket")]
    Bracket {
        /// The bracket that opened, if one did.
        open: Option<char>,
        /// The bracket that closed, if one did.
        close: Option<char>,
    },
    /// `: ` inside a plain value.
    #[error("colon inside a value")]
    Colon,
    /// `key:value` read as one text; the span covers it.
    #[error("no space behind a colon")]
    ColonSpace,
    /// A line that is neither key nor item.
    #[error("key wanted")]
    KeyWanted,
    /// A character that may not stand there.
    #[error("character `{0}`")]
    Character(char),
    /// Anything else, in words.
    #[error("{0}")]
    Other(String),
}
