//! Reads a map file through the gate of all files.

use super::{Fault, Map, Stated, delimiter_of, gallon_of};
use crate::intake::finding::column_of;
use crate::intake::number::Decimal;
use crate::intake::target::{Makes, OTHERS, Target};
use crate::intake::units::unit;
use crate::problem::suggest;
use crate::source::yaml::{Entry, Node};
use crate::source::{SourceFile, SourceSet};

const KEYS: &[&str] = &[
    "file",
    "read",
    "sheet",
    "makes",
    "heading row",
    "encoding",
    "delimiter",
    "decimal",
    "gallon",
    "at ambient",
    "density",
    "columns",
];

const COLUMN_KEYS: &[&str] = &["column", "heading", "is", "unit", "samples"];

/// Reads a map file.
///
/// # Errors
/// The first [`Fault`] found, with its line.
pub fn parse(path: &str, text: &str) -> Result<Map, Fault> {
    let mut set = SourceSet::new();
    let id = set.add(path, text);
    let missing = || Fault {
        path: path.to_owned(),
        line: 1,
        says: "the map does not read".into(),
        write: "delete it, and filmwright intake proposes it anew".into(),
    };
    let file = set.file(id).ok_or_else(missing)?;
    let reading = Reading { path, file };
    let (gated, problems) = crate::input::gate::open(file);
    if let (Some(fault), Some(problem)) = (gated.faults.first(), problems.first()) {
        let says = format!("the map does not read as YAML here: {}", problem.message);
        return Err(reading.fault(fault.span.start, says, "a line as in the proposed map"));
    }
    let root = gated.root.ok_or_else(missing)?;
    let entries = root.entries().ok_or_else(|| {
        reading.fault(
            root.span.start,
            "keys with values are wanted".into(),
            "file: map 1",
        )
    })?;
    let mut map = Map::default();
    for entry in entries.iter().filter(|e| !e.key.text.starts_with("x-")) {
        reading.entry(entry, &mut map)?;
    }
    if !entries.iter().any(|e| e.key.text == "file") {
        return Err(reading.fault(
            root.span.start,
            "the file does not say that it is a map".into(),
            "file: map 1",
        ));
    }
    let makes = map.makes.unwrap_or(Makes::Site);
    if let Some(list) = entries.iter().find(|e| e.key.text.trim() == "columns") {
        let items = list.value.items().ok_or_else(|| {
            reading.fault(
                list.value.span.start,
                "a list of columns is wanted".into(),
                "- column: A",
            )
        })?;
        map.columns = items
            .iter()
            .map(|n| reading.column(n, makes))
            .collect::<Result<_, _>>()?;
    }
    Ok(map)
}

struct Reading<'f> {
    path: &'f str,
    file: &'f SourceFile,
}

impl Reading<'_> {
    fn fault(&self, at: u32, says: String, write: &str) -> Fault {
        Fault {
            path: self.path.to_owned(),
            line: self.file.line_of(at),
            says,
            write: write.to_owned(),
        }
    }

    fn text<'e>(&self, entry: &'e Entry) -> Result<&'e str, Fault> {
        let text = entry.value.text().map(str::trim);
        text.ok_or_else(|| {
            self.fault(
                entry.value.span.start,
                format!("one value is wanted behind `{}`", entry.key.text),
                "one value",
            )
        })
    }

    fn entry(&self, entry: &Entry, map: &mut Map) -> Result<(), Fault> {
        let name = entry.key.text.trim().replace('_', " ");
        let bad = |what: &str, write: &str| {
            let text = entry.value.text().unwrap_or("");
            self.fault(
                entry.value.span.start,
                format!("\"{text}\" is no {what}"),
                write,
            )
        };
        match name.as_str() {
            "read" | "columns" => {}
            "file" => {
                if self.text(entry)? != "map 1" {
                    return Err(bad("map of this edition", "file: map 1"));
                }
            }
            "sheet" => map.sheet = Some(self.text(entry)?.to_owned()),
            "makes" => {
                let makes = Makes::of(self.text(entry)?);
                map.makes = Some(makes.ok_or_else(|| {
                    bad("file that is made", "makes: site     or     makes: oils")
                })?);
            }
            "heading row" => {
                let row = self.text(entry)?.parse().ok().filter(|r| *r > 0);
                map.heading_row = Some(row.ok_or_else(|| bad("row", "heading row: 4"))?);
            }
            "encoding" => map.encoding = Some(self.text(entry)?.to_owned()),
            "delimiter" => {
                let c = delimiter_of(self.text(entry)?);
                map.delimiter = Some(c.ok_or_else(|| bad("delimiter", "delimiter: semicolon"))?);
            }
            "decimal" => {
                let rule = Decimal::of(self.text(entry)?);
                map.decimal = Some(rule.ok_or_else(|| {
                    bad("decimal sign", "decimal: comma     or     decimal: point")
                })?);
            }
            "gallon" => {
                let gallon = gallon_of(self.text(entry)?);
                map.gallon =
                    Some(gallon.ok_or_else(|| bad("gallon", "gallon: US     or     gallon: UK"))?);
            }
            "at ambient" => {
                let text = self.text(entry)?;
                let want = crate::input::value::Want::one(&[crate::quantity::Kind::Temperature]);
                if crate::input::value::read(text, &want).is_err() {
                    return Err(bad("temperature", "at ambient: 20 degC"));
                }
                map.at_ambient = Some(text.to_owned());
            }
            "density" => {
                let read = crate::quantity::parse::parse(
                    crate::quantity::Kind::Density,
                    self.text(entry)?,
                );
                map.density_kg_m3 = Some(
                    read.map_err(|_| bad("density", "density: 890 kg/m3"))?
                        .amount
                        .base,
                );
            }
            other => return Err(self.unknown(entry, other, KEYS)),
        }
        Ok(())
    }

    fn unknown(&self, entry: &Entry, name: &str, keys: &[&str]) -> Fault {
        let meant = suggest::certain(name, keys.iter().copied());
        let write = meant.map_or_else(|| format!("one of: {}", keys.join(", ")), str::to_owned);
        self.fault(
            entry.key.span.start,
            format!("unknown key \"{name}\""),
            &write,
        )
    }

    fn column(&self, node: &Node, makes: Makes) -> Result<Stated, Fault> {
        let entries = node.entries().ok_or_else(|| {
            self.fault(
                node.span.start,
                "keys of a column are wanted".into(),
                "- column: A",
            )
        })?;
        let mut out = Stated {
            column: None,
            heading: None,
            target: Target::Note,
            unit: None,
        };
        for entry in entries.iter().filter(|e| !e.key.text.starts_with("x-")) {
            match entry.key.text.trim() {
                "column" => {
                    let text = self.text(entry)?;
                    let column = column_of(text);
                    out.column = Some(column.ok_or_else(|| {
                        self.fault(
                            entry.value.span.start,
                            format!("\"{text}\" is no column"),
                            "column: A",
                        )
                    })?);
                }
                "heading" => out.heading = Some(self.text(entry)?.to_owned()),
                "samples" => {}
                "is" => {
                    let text = self.text(entry)?;
                    out.target = Target::of(makes, text)
                        .ok_or_else(|| self.no_target(entry, text, makes))?;
                }
                "unit" => {
                    let text = self.text(entry)?;
                    let kinds = out.target.kinds();
                    let found = unit(text, kinds).ok_or_else(|| {
                        self.fault(
                            entry.value.span.start,
                            format!("\"{text}\" is no unit"),
                            "unit: L",
                        )
                    })?;
                    out.unit = Some((found, text.to_owned()));
                }
                other => return Err(self.unknown(entry, other, COLUMN_KEYS)),
            }
        }
        // The unit may stand before what the column is.
        if let Some((_, text)) = out.unit.take() {
            out.unit = unit(&text, out.target.kinds()).map(|u| (u, text));
        }
        Ok(out)
    }

    fn no_target(&self, entry: &Entry, text: &str, makes: Makes) -> Fault {
        let keys = match makes {
            Makes::Site => &crate::input::keys::machine::MACHINE,
            Makes::Oils => &crate::input::keys::oil::OIL,
        };
        let names = keys
            .all()
            .map(|k| k.name)
            .chain(OTHERS.iter().map(|o| o.0))
            .chain(["tag"]);
        let meant = suggest::certain(text, names);
        let write = meant.map_or_else(
            || "is: note     keeps it as a note; filmwright help keys lists the keys".into(),
            |m| format!("is: {m}"),
        );
        self.fault(
            entry.value.span.start,
            format!("\"{text}\" is nothing a column can hold"),
            &write,
        )
    }
}
