//! Every text ever read, numbered, so that any later finding can point at its place.
//!
//! The set knows nothing of the disk: whoever has read a file hands over its path and bytes.
//! Paths are kept relative and with `/`, so that messages are the same on every machine.

pub mod place;
pub mod yaml;

pub use place::{FileId, Origin, Place, Span};

/// The name under which values of the command line appear in messages.
pub const COMMAND_LINE: &str = "command line";

/// Files larger than this are not read.
pub const MAX_BYTES: usize = 64 << 20;

/// Why bytes are not a text the program reads.
#[derive(Clone, Copy, Debug, PartialEq, Eq, thiserror::Error)]
pub enum NotText {
    /// Larger than [`MAX_BYTES`].
    #[error("{size} bytes")]
    TooLarge {
        /// Its size in bytes.
        size: usize,
    },
    /// Not UTF-8.
    #[error("not UTF-8 from byte {at} on")]
    NotUtf8 {
        /// The first byte that is not.
        at: u32,
    },
}

/// A text with its path.
#[derive(Clone, Debug)]
pub struct SourceFile {
    /// Its number.
    pub id: FileId,
    /// Path as shown: relative, with `/`.
    pub path: String,
    /// The text, without byte-order mark.
    pub text: String,
    /// Where each line begins.
    line_starts: Vec<u32>,
}

impl SourceFile {
    fn new(id: FileId, path: &str, text: String) -> Self {
        let breaks = text.bytes().enumerate().filter(|(_, b)| *b == b'\n');
        let line_starts = std::iter::once(0)
            .chain(breaks.map(|(at, _)| narrow(at + 1)))
            .collect();
        let path = path.replace('\\', "/");
        let path = path.strip_prefix("./").unwrap_or(&path).to_owned();
        Self {
            id,
            path,
            text,
            line_starts,
        }
    }

    /// Line of a byte, counted from one.
    pub fn line_of(&self, byte: u32) -> usize {
        self.line_starts.partition_point(|start| *start <= byte)
    }

    /// Line and column of a byte, both counted from one, the column in characters.
    pub fn line_column(&self, byte: u32) -> (usize, usize) {
        let line = self.line_of(byte);
        let start = self.line_starts[line - 1] as usize;
        let end = self.boundary(byte);
        let column = self.text[start.min(end)..end].chars().count() + 1;
        (line, column)
    }

    /// Bytes of a line, without its line break; an empty range behind the last line.
    pub fn line_range(&self, line: usize) -> (usize, usize) {
        let Some(start) = line.checked_sub(1).and_then(|at| self.line_starts.get(at)) else {
            return (self.text.len(), self.text.len());
        };
        let start = *start as usize;
        let next = self
            .line_starts
            .get(line)
            .map_or(self.text.len(), |next| *next as usize);
        let end = start + self.text[start..next].trim_end_matches(['\n', '\r']).len();
        (start, end)
    }

    /// The text of a line, without its line break.
    pub fn line(&self, line: usize) -> &str {
        let (start, end) = self.line_range(line);
        &self.text[start..end]
    }

    /// A span of this file.
    pub fn span(&self, start: usize, end: usize) -> Span {
        Span {
            file: self.id,
            start: narrow(start),
            end: narrow(end),
        }
    }

    /// The nearest place at or before a byte where a character begins.
    pub fn boundary(&self, byte: u32) -> usize {
        let mut at = (byte as usize).min(self.text.len());
        while !self.text.is_char_boundary(at) {
            at -= 1;
        }
        at
    }
}

/// Bytes of a file fit 32 bits: the gate refuses files over 64 MiB.
fn narrow(at: usize) -> u32 {
    u32::try_from(at).unwrap_or(u32::MAX)
}

/// All texts of a run.
#[derive(Clone, Debug, Default)]
pub struct SourceSet {
    files: Vec<SourceFile>,
}

impl SourceSet {
    /// An empty set.
    pub fn new() -> Self {
        Self::default()
    }

    /// Takes in a text; a byte-order mark is dropped.
    pub fn add(&mut self, path: &str, text: &str) -> FileId {
        let text = text.strip_prefix('\u{feff}').unwrap_or(text).to_owned();
        let id = FileId(narrow(self.files.len()));
        self.files.push(SourceFile::new(id, path, text));
        id
    }

    /// Takes in the bytes of a file; what is no text is taken in as far as it is one.
    pub fn add_bytes(&mut self, path: &str, bytes: &[u8]) -> (FileId, Option<NotText>) {
        if bytes.len() > MAX_BYTES {
            let size = bytes.len();
            return (self.add(path, ""), Some(NotText::TooLarge { size }));
        }
        match std::str::from_utf8(bytes) {
            Ok(text) => (self.add(path, text), None),
            Err(error) => {
                let id = self.add(path, &String::from_utf8_lossy(bytes));
                let dropped = if bytes.starts_with(b"\xef\xbb\xbf") {
                    3
                } else {
                    0
                };
                let at = narrow(error.valid_up_to().saturating_sub(dropped));
                (id, Some(NotText::NotUtf8 { at }))
            }
        }
    }

    /// The file of a number.
    pub fn file(&self, id: FileId) -> Option<&SourceFile> {
        self.files.get(id.0 as usize)
    }

    /// All files in the order they were read.
    pub fn files(&self) -> &[SourceFile] {
        &self.files
    }

    /// The text under a span; empty where the span is not of this set.
    pub fn slice(&self, span: Span) -> &str {
        self.file(span.file)
            .and_then(|f| f.text.get(span.start as usize..span.end as usize))
            .unwrap_or("")
    }

    /// `site.yaml:33`, for sentences that name a second place.
    pub fn shown(&self, place: &Place) -> String {
        match place {
            Place::Text(span) => self.file(span.file).map_or_else(String::new, |f| {
                if f.path == COMMAND_LINE {
                    COMMAND_LINE.to_owned()
                } else {
                    format!("{}:{}", f.path, f.line_of(span.start))
                }
            }),
            Place::Cell(cell) => {
                let path = self.file(cell.file).map_or("", |f| f.path.as_str());
                let at = cell_name(cell.row, cell.column);
                if cell.sheet.is_empty() {
                    format!("{path}, {at}")
                } else {
                    format!("{path}, sheet \"{}\", {at}", cell.sheet)
                }
            }
            Place::Rule(id) => format!("rule {id}"),
            Place::Flag(name) => (*name).to_owned(),
            Place::Program => "the program's own default".to_owned(),
        }
    }
}

/// `C7` for row 7, column 3.
pub fn cell_name(row: u32, column: u32) -> String {
    let mut letters = Vec::new();
    let mut rest = column;
    while rest > 0 {
        rest -= 1;
        letters.push(char::from(
            b'A' + u8::try_from(rest % 26).unwrap_or_default(),
        ));
        rest /= 26;
    }
    let letters: String = letters.into_iter().rev().collect();
    format!("{letters}{row}")
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn lines_and_columns_count_from_one_in_characters() {
        let mut set = SourceSet::new();
        let id = set.add("./a\\b.yaml", "\u{feff}one\nµm two\r\n\nlast");
        let file = set.file(id).expect("just added");
        assert_eq!(file.path, "a/b.yaml");
        assert_eq!(file.line_column(0), (1, 1));
        let two = u32::try_from(file.text.find("two").expect("there")).expect("small");
        assert_eq!(file.line_column(two), (2, 4));
        assert_eq!(file.line(2), "µm two");
        assert_eq!(file.line(3), "");
        assert_eq!(file.line(4), "last");
        assert_eq!(file.line(9), "");
        assert_eq!(file.line_column(5).0, 2); // inside µ
    }

    #[test]
    fn bytes_that_are_no_text_are_named_with_their_place() {
        let mut set = SourceSet::new();
        let (id, bad) = set.add_bytes("latin.yaml", b"\xef\xbb\xbfa: 75 \xb0C\n");
        assert_eq!(bad, Some(NotText::NotUtf8 { at: 6 }));
        let file = set.file(id).expect("taken in all the same");
        assert_eq!(file.line_column(6), (1, 7));
        let (_, bad) = set.add_bytes("large.yaml", &vec![b' '; MAX_BYTES + 1]);
        assert_eq!(
            bad,
            Some(NotText::TooLarge {
                size: MAX_BYTES + 1
            })
        );
        assert_eq!(set.add_bytes("good.yaml", "a: °".as_bytes()).1, None);
    }

    #[test]
    fn cells_are_named_as_spreadsheets_do() {
        assert_eq!(cell_name(7, 3), "C7");
        assert_eq!(cell_name(1, 26), "Z1");
        assert_eq!(cell_name(12, 28), "AB12");
    }
}
