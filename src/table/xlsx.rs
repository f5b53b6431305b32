//! Office Open XML workbooks, ECMA-376 part 1: the parts that say what the cells hold.

mod parts;
mod sheet;

use super::archive::Archive;
use super::gather::{Gather, Taken};
use super::limits::{self, Limit};
use super::number_format::Meaning;
use super::{Book, Fault, Form, Sheet, Stated};
use parts::Listed;

/// What the cells of every sheet refer to.
pub(super) struct Shared {
    /// Texts by number.
    texts: Vec<Box<str>>,
    /// Meanings of numbers by cell style.
    meanings: Vec<Meaning>,
    /// Whether days count from 1904.
    from_1904: bool,
}

pub(super) fn read(archive: &mut Archive<'_>, stated: &Stated) -> Result<Book, Fault> {
    let workbook = parts::workbook_path(archive)?;
    if !archive.holds(&workbook) {
        return Err(if archive.holds("encryptioninfo") {
            Fault::Protected
        } else {
            Fault::NoTable
        });
    }
    let relations = parts::relations(archive, &workbook)?;
    let outline = parts::outline(archive, &workbook, &relations)?;
    if outline.sheets.len() > limits::SHEETS {
        return Err(Fault::too_large(Limit::Sheets));
    }
    wanted(&outline.sheets, stated)?;
    let shared = Shared {
        texts: parts::texts(archive, relations.of_kind("sharedStrings"))?,
        meanings: parts::meanings(archive, relations.of_kind("styles"))?,
        from_1904: outline.from_1904,
    };
    let mut taken = Taken::default();
    let mut sheets = Vec::new();
    for listed in &outline.sheets {
        let skip = stated.sheet.as_ref().is_some_and(|s| *s != listed.name);
        sheets.push(match (&listed.path, skip) {
            (Some(path), false) => {
                let gather = Gather::new(&listed.name, listed.hidden, &mut taken);
                sheet::read(archive, path, &shared, gather)?
            }
            _ => Sheet {
                name: listed.name.clone(),
                hidden: listed.hidden,
                ..Sheet::default()
            },
        });
    }
    let form = Form::Xlsx {
        from_1904: outline.from_1904,
    };
    Ok(Book { form, sheets })
}

/// Whether the sheet asked for is there.
fn wanted(sheets: &[Listed], stated: &Stated) -> Result<(), Fault> {
    match &stated.sheet {
        Some(asked) if !sheets.iter().any(|s| s.name == *asked) => Err(Fault::NoSheet {
            asked: asked.clone(),
            there: sheets.iter().map(|s| s.name.clone()).collect(),
        }),
        _ => Ok(()),
    }
}
