//! How a text offends against the format: the scanner's errors, sorted by what a reader of the
//! file did wrong, with the bytes that show it.

use super::MAX_DEPTH;
use super::build::{Builder, Open};
use super::fault::{Fault, FaultKind, Syntax};
use granit_parser::{ErrorKind, ScanError};

impl Builder<'_> {
    /// A scanner's error as a fault with its place.
    pub(super) fn syntax(&self, error: &ScanError) -> Fault {
        let at = error
            .marker()
            .byte_offset()
            .unwrap_or(self.text.len())
            .min(self.text.len());
        let kind = match error.kind() {
            ErrorKind::RecursionLimitExceeded => {
                return Fault {
                    kind: FaultKind::Depth { limit: MAX_DEPTH },
                    span: self.span(at, at + 1),
                };
            }
            ErrorKind::DirectiveDisallowed => {
                return Fault {
                    kind: FaultKind::Directive,
                    span: self.span(at, self.line_end(at)),
                };
            }
            kind => kind,
        };
        let (syntax, start, end) = self.offence(kind, at, error);
        Fault {
            kind: FaultKind::Syntax(syntax),
            span: self.span(start, end),
        }
    }

    fn offence(&self, kind: &ErrorKind, at: usize, error: &ScanError) -> (Syntax, usize, usize) {
        use ErrorKind as E;
        let one = |s: Syntax| (s, at, self.next_char(at));
        match kind {
            E::TabNotAllowed
            | E::TabInBlockIndentation
            | E::TabInIndentation
            | E::TabAtBlockScalarStart => one(Syntax::Tab),
            E::UnclosedQuotedScalar | E::DocumentIndicatorInQuotedScalar => {
                (Syntax::QuoteOpen, at, self.line_end(at))
            }
            E::InvalidTrailingSingleQuotedScalar | E::InvalidTrailingDoubleQuotedScalar => {
                (Syntax::QuoteTail, at, self.line_end(at))
            }
            E::UnknownQuotedScalarEscape | E::InvalidQuotedScalarHexEscape => {
                (Syntax::Escape, at, self.line_end(at))
            }
            E::UnclosedFlowCollection { open } => one(Syntax::Bracket {
                open: Some(*open),
                close: None,
            }),
            E::MismatchedFlowCollectionEnd { open, close } => one(Syntax::Bracket {
                open: Some(*open),
                close: Some(*close),
            }),
            E::MisplacedFlowCollectionEnd => one(Syntax::Bracket {
                open: None,
                close: self.text[at..].chars().next(),
            }),
            E::InvalidColonPlacement
            | E::ExpectedFlowSequenceSeparator
            | E::ExpectedFlowMappingSeparator => self.in_brackets(at, error),
            E::MappingValueNotAllowed => self.misplaced_colon(at),
            E::ExpectedBlockMappingKey
            | E::ExpectedBlockSequenceEntry
            | E::InvalidIndentation
            | E::BlockSequenceEntryNotAllowed
            | E::InvalidQuotedScalarIndent => self.whole_line(Syntax::Indent, at),
            E::SimpleKeyExpected | E::InvalidSimpleKey => self.whole_line(Syntax::KeyWanted, at),
            E::UnexpectedCharacter { character } => one(Syntax::Character(*character)),
            E::BomInsideDocument => one(Syntax::Character('\u{feff}')),
            E::MissingAnchorOrAliasName => one(Syntax::Character(
                self.text[at..].chars().next().unwrap_or('&'),
            )),
            _ => self.other(at, error),
        }
    }

    /// A colon met while brackets are open: the bracket is the mistake.
    fn in_brackets(&self, at: usize, error: &ScanError) -> (Syntax, usize, usize) {
        let opened = self.stack.iter().rev().find_map(|open| {
            let (Open::Map { start, flow, .. } | Open::Seq { start, flow, .. }) = open;
            let bracket = self.text[*start..].chars().next()?;
            flow.then_some((*start, bracket))
        });
        match opened {
            Some((start, bracket)) => (
                Syntax::Bracket {
                    open: Some(bracket),
                    close: None,
                },
                start,
                start + 1,
            ),
            None => self.other(at, error),
        }
    }

    /// `a: b: c`, or a line above whose colon has no space behind it and so ran on.
    fn misplaced_colon(&self, at: usize) -> (Syntax, usize, usize) {
        let (start, end) = self.last_scalar;
        let scalar = self.text.get(start..end).unwrap_or("");
        let Some((first, _)) = scalar.split_once('\n') else {
            return (Syntax::Colon, start, self.value_end(at));
        };
        let first = first.trim_end();
        let glued = first.split_once(':').is_some_and(|(key, value)| {
            !key.is_empty() && !value.is_empty() && !value.starts_with(' ')
        });
        if glued {
            (Syntax::ColonSpace, start, start + first.len())
        } else {
            self.whole_line(Syntax::Indent, at)
        }
    }

    fn other(&self, at: usize, error: &ScanError) -> (Syntax, usize, usize) {
        // A comma or a bracket at the beginning of a value ends the record for the scanner.
        if let Some(c @ (',' | ']' | '}')) = self.text[at..].chars().next() {
            return (Syntax::Character(c), at, at + 1);
        }
        let words = other_words(error.kind()).to_owned();
        self.whole_line(Syntax::Other(words), at)
    }

    /// The line of a byte without its indentation.
    fn whole_line(&self, syntax: Syntax, at: usize) -> (Syntax, usize, usize) {
        let begin = self.text[..at].rfind('\n').map_or(0, |b| b + 1);
        let end = self.line_end(at);
        let line = &self.text[begin..end];
        let start = begin + (line.len() - line.trim_start().len());
        (syntax, start.min(end), end)
    }

    /// The end of a line without its comment.
    fn value_end(&self, at: usize) -> usize {
        let end = self.line_end(at);
        let rest = &self.text[at..end];
        at + rest
            .find(" #")
            .map_or(rest, |c| &rest[..c])
            .trim_end()
            .len()
    }

    fn line_end(&self, at: usize) -> usize {
        let rest = &self.text[at..];
        at + rest
            .find('\n')
            .map_or(rest, |b| &rest[..b])
            .trim_end()
            .len()
    }

    fn next_char(&self, at: usize) -> usize {
        at + self.text[at..].chars().next().map_or(0, char::len_utf8)
    }
}

/// The rarer offences in words.
fn other_words(kind: &ErrorKind) -> &'static str {
    use ErrorKind as E;
    match kind {
        E::InvalidBlockScalarHeader | E::ZeroBlockScalarIndent | E::InvalidBlockScalarIndent => {
            "a block of text does not begin on the line below its | or >"
        }
        E::CommentInterceptedScalar => "a comment inside a value of several lines",
        E::CommentNotSeparated => "no space before the #",
        E::ExpectedNodeContent => "no value where one must stand",
        E::UnexpectedEof | E::UnexpectedEofBlockMapping | E::UnexpectedEofBlockSequence => {
            "the file ends in the middle of a record"
        }
        E::InvalidDocumentEnd => "text behind the end of the document",
        _ => "the text has a form that is not understood here",
    }
}
