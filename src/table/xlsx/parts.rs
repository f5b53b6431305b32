//! Everything of a workbook but its cells: which parts there are, texts, styles.

use crate::table::archive::Archive;
use crate::table::number_format::{self, Meaning};
use crate::table::xml::{Next, Tag, Xml};
use crate::table::{Fault, limits, limits::Limit};
use std::collections::BTreeMap;

/// What a part refers to, by id.
#[derive(Default)]
pub(super) struct Relations(Vec<Relation>);

struct Relation {
    id: String,
    /// The last word of its type.
    kind: String,
    path: String,
}

impl Relations {
    /// The path of the only part of a kind.
    pub(super) fn of_kind(&self, kind: &str) -> Option<&str> {
        let found = self.0.iter().find(|r| r.kind == kind);
        found.map(|r| r.path.as_str())
    }
}

/// A sheet as the workbook lists it.
pub(super) struct Listed {
    pub(super) name: String,
    pub(super) hidden: bool,
    /// Its part; none for a chart.
    pub(super) path: Option<String>,
}

/// What the workbook part says.
#[derive(Default)]
pub(super) struct Outline {
    pub(super) sheets: Vec<Listed>,
    pub(super) from_1904: bool,
}

/// The path of the workbook part.
pub(super) fn workbook_path(archive: &mut Archive<'_>) -> Result<String, Fault> {
    let root = relations(archive, "")?;
    let path = root.of_kind("officeDocument").unwrap_or("xl/workbook.xml");
    Ok(path.to_owned())
}

/// What a part refers to; an empty path for the package itself.
pub(super) fn relations(archive: &mut Archive<'_>, of: &str) -> Result<Relations, Fault> {
    let (folder, name) = of.rsplit_once('/').unwrap_or(("", of));
    let path = join(folder, &format!("_rels/{name}.rels"));
    let mut found = Relations::default();
    each(archive, &path, |tag| {
        if tag.name == "Relationship"
            && let (Some(id), Some(kind), Some(target)) =
                (tag.get("Id"), tag.get("Type"), tag.get("Target"))
        {
            found.0.push(Relation {
                id: id.to_owned(),
                kind: kind.rsplit('/').next().unwrap_or(kind).to_owned(),
                path: join(folder, target),
            });
        }
        Ok(())
    })?;
    Ok(found)
}

/// A path from a folder; one that begins with a stroke is from the top.
fn join(folder: &str, target: &str) -> String {
    let whole = if target.starts_with('/') || folder.is_empty() {
        target.to_owned()
    } else {
        format!("{folder}/{target}")
    };
    let mut out: Vec<&str> = Vec::new();
    for step in whole.split('/') {
        match step {
            "" | "." => {}
            ".." => drop(out.pop()),
            step => out.push(step),
        }
    }
    out.join("/")
}

/// The sheets and the first day.
pub(super) fn outline(
    archive: &mut Archive<'_>,
    workbook: &str,
    relations: &Relations,
) -> Result<Outline, Fault> {
    let mut outline = Outline::default();
    each(archive, workbook, |tag| {
        match tag.name.as_str() {
            "workbookPr" => outline.from_1904 = tag.yes("date1904"),
            "sheet" => {
                let relation = tag
                    .get("id")
                    .and_then(|id| relations.0.iter().find(|r| r.id == id));
                outline.sheets.push(Listed {
                    name: tag.get("name").unwrap_or("").to_owned(),
                    hidden: tag.get("state").is_some_and(|s| s != "visible"),
                    path: relation
                        .filter(|r| r.kind == "worksheet")
                        .map(|r| r.path.clone()),
                });
            }
            _ => {}
        }
        Ok(())
    })?;
    Ok(outline)
}

/// Calls for every opening element of a part that may be missing.
fn each(
    archive: &mut Archive<'_>,
    path: &str,
    mut see: impl FnMut(&Tag) -> Result<(), Fault>,
) -> Result<(), Fault> {
    let left = archive.left();
    let Some(part) = archive.part(path)? else {
        return Ok(());
    };
    let mut xml = Xml::new(part, path, left);
    loop {
        match xml.next()? {
            Next::Open(tag) => see(&tag)?,
            Next::End => return Ok(()),
            Next::Close(_) | Next::Text(_) => {}
        }
    }
}

/// The texts cells refer to by number. Readings aid for East Asian scripts is left out.
pub(super) fn texts(archive: &mut Archive<'_>, path: Option<&str>) -> Result<Vec<Box<str>>, Fault> {
    let path = path.unwrap_or("xl/sharedStrings.xml");
    let left = archive.left();
    let Some(part) = archive.part(path)? else {
        return Ok(Vec::new());
    };
    let mut xml = Xml::new(part, path, left);
    let (mut found, mut text) = (Vec::new(), String::new());
    let (mut inside, mut aid) = (false, 0_usize);
    loop {
        match xml.next()? {
            Next::Open(tag) => match tag.name.as_str() {
                "si" => text.clear(),
                "t" => inside = aid == 0,
                "rPh" => aid += 1,
                _ => {}
            },
            Next::Close(name) => match name.as_str() {
                "si" => found.push(plain(&text).into_boxed_str()),
                "t" => inside = false,
                "rPh" => aid = aid.saturating_sub(1),
                _ => {}
            },
            Next::Text(piece) if inside => text.push_str(&piece),
            Next::Text(_) => {}
            Next::End => return Ok(found),
        }
        if found.len() > 2 * limits::CELLS {
            return Err(Fault::too_large(Limit::Cells));
        }
    }
}

/// `_x000D_` and its like stand for characters XML has no place for: ECMA-376 part 1, 22.9.2.19.
pub(super) fn plain(text: &str) -> String {
    let mut out = String::with_capacity(text.len());
    let mut rest = text;
    while let Some(at) = rest.find("_x") {
        let code = rest
            .get(at + 2..at + 6)
            .filter(|_| rest[at..].get(6..7) == Some("_"));
        let known = code
            .and_then(|c| u32::from_str_radix(c, 16).ok())
            .and_then(char::from_u32);
        out.push_str(&rest[..at]);
        match known {
            Some(c) => {
                out.push(c);
                rest = &rest[at + 7..];
            }
            None => {
                out.push_str("_x");
                rest = &rest[at + 2..];
            }
        }
    }
    out.push_str(rest);
    out
}

/// The meaning of numbers, by the number of the cell style.
pub(super) fn meanings(
    archive: &mut Archive<'_>,
    path: Option<&str>,
) -> Result<Vec<Meaning>, Fault> {
    let mut codes: BTreeMap<u32, Meaning> = BTreeMap::new();
    let mut styles = Vec::new();
    let mut of_cells = false;
    each(archive, path.unwrap_or("xl/styles.xml"), |tag| {
        match tag.name.as_str() {
            "numFmt" => {
                if let (Some(id), Some(code)) = (tag.number("numFmtId"), tag.get("formatCode")) {
                    codes.insert(id, number_format::meaning(code));
                }
            }
            "cellXfs" => of_cells = true,
            "cellStyleXfs" | "cellStyles" | "dxfs" => of_cells = false,
            "xf" if of_cells => styles.push(tag.number("numFmtId").unwrap_or(0)),
            _ => {}
        }
        Ok(())
    })?;
    Ok(styles
        .into_iter()
        .map(|id| {
            codes
                .get(&id)
                .cloned()
                .unwrap_or_else(|| number_format::built_in(id))
        })
        .collect())
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn paths_are_joined_as_the_package_says() {
        assert_eq!(
            join("xl", "worksheets/sheet1.xml"),
            "xl/worksheets/sheet1.xml"
        );
        assert_eq!(join("xl", "/xl/styles.xml"), "xl/styles.xml");
        assert_eq!(join("xl/worksheets", "../media/a.png"), "xl/media/a.png");
        assert_eq!(join("", "xl/workbook.xml"), "xl/workbook.xml");
    }

    #[test]
    fn coded_characters_are_read() {
        assert_eq!(plain("two_x000D_\nlines"), "two\r\nlines");
        assert_eq!(plain("file_xyz _x00"), "file_xyz _x00");
    }
}
