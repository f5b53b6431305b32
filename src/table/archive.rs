//! The files packed inside a workbook, unpacked under a count.

use super::Fault;
use super::limits::{self, Limit};
use std::cell::Cell;
use std::collections::BTreeMap;
use std::io::{self, BufReader, Cursor, Read};
use std::rc::Rc;
use zip::ZipArchive;
use zip::read::ZipFile;

/// A packed workbook.
pub(super) struct Archive<'b> {
    zip: ZipArchive<Cursor<&'b [u8]>>,
    /// Places by path in lower case: some programs write `SharedStrings.xml`.
    places: BTreeMap<String, usize>,
    left: Rc<Cell<u64>>,
}

/// One part, being unpacked.
pub(super) type Part<'a, 'b> = BufReader<Counted<ZipFile<'a, Cursor<&'b [u8]>>>>;

impl<'b> Archive<'b> {
    pub(super) fn open(bytes: &'b [u8]) -> Result<Self, Fault> {
        let zip = ZipArchive::new(Cursor::new(bytes))
            .map_err(|e| Fault::damaged("it cannot be unpacked", e))?;
        if zip.len() > limits::PARTS {
            return Err(Fault::too_large(Limit::Parts));
        }
        let mut places = BTreeMap::new();
        for (at, name) in zip.file_names_raw().enumerate() {
            let name = String::from_utf8_lossy(name).to_lowercase();
            places.insert(name.replace('\\', "/"), at);
        }
        Ok(Self {
            zip,
            places,
            left: Rc::new(Cell::new(limits::UNPACKED_BYTES)),
        })
    }

    /// Whether a part is there.
    pub(super) fn holds(&self, path: &str) -> bool {
        self.places.contains_key(&path.to_lowercase())
    }

    /// A part, where it is there.
    pub(super) fn part(&mut self, path: &str) -> Result<Option<Part<'_, 'b>>, Fault> {
        let path = path.trim_start_matches('/').to_lowercase();
        let Some(at) = self.places.get(&path) else {
            return Ok(None);
        };
        let left = Rc::clone(&self.left);
        let file = self.zip.by_index(*at).map_err(|e| {
            if matches!(e, zip::result::ZipError::InvalidPassword)
                || e.to_string().to_lowercase().contains("password")
            {
                Fault::Protected
            } else {
                Fault::damaged(&path, e)
            }
        })?;
        Ok(Some(BufReader::new(Counted { inner: file, left })))
    }

    /// A part that must be there.
    pub(super) fn must(&mut self, path: &str) -> Result<Part<'_, 'b>, Fault> {
        self.part(path)?
            .ok_or_else(|| Fault::damaged(path, "this part of the workbook is not there"))
    }

    /// Whether the count has run out: what then looks like damage is size.
    pub(super) fn left(&self) -> Rc<Cell<u64>> {
        Rc::clone(&self.left)
    }
}

/// A reader that stops where the count of unpacked bytes runs out.
pub(super) struct Counted<R> {
    inner: R,
    left: Rc<Cell<u64>>,
}

impl<R: Read> Read for Counted<R> {
    fn read(&mut self, into: &mut [u8]) -> io::Result<usize> {
        let count = self.inner.read(into)?;
        let left = self.left.get();
        let taken = u64::try_from(count).unwrap_or(u64::MAX);
        if taken > left {
            self.left.set(0);
            return Err(io::Error::other("unpacks to too much"));
        }
        self.left.set(left - taken);
        Ok(count)
    }
}
