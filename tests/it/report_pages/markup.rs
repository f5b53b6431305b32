//! Reads pages with an HTML tokenizer, as a browser would.

use html5ever::tendril::StrTendril;
use html5ever::tokenizer::states::RawKind;
use html5ever::tokenizer::{
    BufferQueue, TagKind, Token, TokenSink, TokenSinkResult, Tokenizer, TokenizerOpts,
};
use std::cell::RefCell;

/// A start tag with its attributes, or a text.
#[derive(Clone, Debug, PartialEq, Eq)]
pub(crate) enum Piece {
    Open(String, Vec<(String, String)>),
    Close(String),
    Text(String),
}

impl Piece {
    pub(crate) fn attr(&self, name: &str) -> Option<&str> {
        match self {
            Piece::Open(_, attrs) => attrs
                .iter()
                .find(|(key, _)| key == name)
                .map(|(_, v)| v.as_str()),
            _ => None,
        }
    }

    pub(crate) fn is(&self, wanted: &str) -> bool {
        matches!(self, Piece::Open(name, _) if name == wanted)
    }

    pub(crate) fn class(&self, wanted: &str) -> bool {
        self.attr("class")
            .is_some_and(|c| c.split(' ').any(|c| c == wanted))
    }

    /// A number attribute.
    pub(crate) fn num(&self, name: &str) -> f64 {
        self.attr(name)
            .and_then(|v| v.parse().ok())
            .unwrap_or_else(|| panic!("{name} of {self:?}"))
    }
}

struct Sink(RefCell<Vec<Piece>>);

impl TokenSink for Sink {
    type Handle = ();

    fn process_token(&self, token: Token, _: u64) -> TokenSinkResult<()> {
        let mut pieces = self.0.borrow_mut();
        match token {
            Token::TagToken(tag) if tag.kind == TagKind::StartTag => {
                let attrs = tag
                    .attrs
                    .iter()
                    .map(|a| (a.name.local.to_string(), a.value.to_string()))
                    .collect();
                pieces.push(Piece::Open(tag.name.to_string(), attrs));
                return match tag.name.as_ref() {
                    "style" => TokenSinkResult::RawData(RawKind::Rawtext),
                    // the document's title; a figure's title is an element of SVG and read as such
                    "title" if tag.attrs.is_empty() => TokenSinkResult::RawData(RawKind::Rcdata),
                    _ => TokenSinkResult::Continue,
                };
            }
            Token::TagToken(tag) => pieces.push(Piece::Close(tag.name.to_string())),
            Token::CharacterTokens(text) => match pieces.last_mut() {
                Some(Piece::Text(before)) => before.push_str(&text),
                _ => pieces.push(Piece::Text(text.to_string())),
            },
            Token::ParseError(message) => panic!("the page is not sound: {message}"),
            _ => {}
        }
        TokenSinkResult::Continue
    }
}

/// The pieces of a page in order. Panics where the tokenizer objects.
pub(crate) fn tags(page: &str) -> Vec<Piece> {
    let tokenizer = Tokenizer::new(Sink(RefCell::new(Vec::new())), TokenizerOpts::default());
    let input = BufferQueue::default();
    input.push_back(StrTendril::from_slice(page));
    let _ = tokenizer.feed(&input);
    tokenizer.end();
    tokenizer.sink.0.into_inner()
}
