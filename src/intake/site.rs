//! A register into a site file.

mod across;
mod refer;
mod write;

use super::cell::{Reading, Rules};
use super::describe::is_gone;
use super::draft::{Counts, Draft};
use super::finding::{Finding, Kind, letters};
use super::layout::{Column, Layout};
use super::machine::{Machine, RowReader};
use super::table::{Line, Table};
use super::tags;
use super::target::Target;
use crate::model::rulebook::Rulebook;
use across::{alike, named_once, of_columns};
use refer::Ends;
use std::collections::{BTreeMap, BTreeSet};
use write::write;

/// What the rows of a register are read against.
pub struct Context<'a> {
    /// The file's name, for its heading.
    pub file: &'a str,
    /// The rules, for the names of components.
    pub rules: &'a Rulebook,
    /// Ids and names of the oils of the site, where it has a list.
    pub oils: &'a [(String, Option<String>)],
    /// How cells are read.
    pub cells: Rules,
    /// Ambient at which oil temperatures were read, where stated.
    pub at_ambient: Option<&'a str>,
}

/// What all rows share.
pub(super) struct Reader<'a> {
    context: &'a Context<'a>,
    layout: &'a Layout,
    pub(super) rules: Rules,
    pub(super) findings: Vec<Finding>,
    pub(super) missing: usize,
    areas: Vec<String>,
    /// Columns with bare numbers: how many, the first cell, what it was read as.
    bare: BTreeMap<u32, (usize, String, String)>,
    /// Merged cells said.
    merged: BTreeSet<(u32, u32)>,
    sumps: usize,
}

impl<'a> Reader<'a> {
    pub(super) fn columns(&self) -> &'a [Column] {
        &self.layout.columns
    }

    pub(super) fn area(&mut self, name: &str) {
        if !self.areas.iter().any(|a| a == name) {
            self.areas.push(name.to_owned());
        }
    }

    pub(super) fn at_ambient(&mut self) -> String {
        self.sumps += 1;
        match self.context.at_ambient {
            Some(stated) => format!("{stated}, register \"as the map states\""),
            None => "20 degC, assumed \"not in the register\"".into(),
        }
    }

    pub(super) fn unitless(&mut self, column: &Column, row: u32, reading: &Reading) {
        let cell = format!("{}{row}", letters(column.number));
        let read_as = reading.read_as.clone().unwrap_or_default();
        self.bare
            .entry(column.number)
            .or_insert((0, cell, read_as))
            .0 += 1;
    }

    pub(super) fn merged(&mut self, column: &Column, from: u32, row: u32) {
        if !self.merged.insert((column.number, from)) {
            return;
        }
        let quantity = !column.target.kinds().is_empty();
        self.findings.push(Finding {
            kind: if quantity { Kind::Question } else { Kind::ReadAs },
            row: Some(row),
            column: Some(column.number),
            name: None,
            heading: column.heading.clone(),
            text: String::new(),
            says: if quantity {
                format!("merged with row {from}: taken for each of its rows; is it one value for all of them together?")
            } else {
                format!("merged with row {from}: taken for each of its rows")
            },
        });
    }

    pub(super) fn component(&self, text: &str) -> Option<String> {
        let components = &self.context.rules.components;
        components.find(text.trim()).map(|c| c.id.clone())
    }

    pub(super) fn oil_column(&self) -> Option<Column> {
        self.layout
            .columns
            .iter()
            .find(|c| is_key(&c.target, "oil now"))
            .cloned()
    }

    /// The oil of the list with that id or name.
    pub(super) fn oil_in_list(&self, text: &str) -> Option<String> {
        let text = text.trim();
        let named = |t: &str| t.trim().eq_ignore_ascii_case(text);
        let found = self
            .context
            .oils
            .iter()
            .find(|(id, name)| named(id) || name.as_deref().is_some_and(named));
        found.map(|(id, _)| id.clone())
    }
}

fn is_key(target: &Target, name: &str) -> bool {
    matches!(target, Target::Key(key) if key.name == name)
}

/// What is known of a row before it is read.
struct Outline {
    tag: String,
    description: String,
    oil: Option<String>,
    number: Option<u32>,
    row: u32,
}

/// Drafts a site file from a register; `told` hears how many rows of how many are read.
pub fn draft(
    table: &Table<'_>,
    context: &Context<'_>,
    told: &mut dyn FnMut(usize, usize),
) -> Draft {
    let mut reader = Reader {
        context,
        layout: table.layout,
        rules: context.cells,
        findings: Vec::new(),
        missing: 0,
        areas: Vec::new(),
        bare: BTreeMap::new(),
        merged: BTreeSet::new(),
        sumps: 0,
    };
    let lines: Vec<Line<'_>> = table.lines().collect();
    let outlines: Vec<Outline> = lines.iter().map(|l| outline(l, table.layout)).collect();
    let ends = Ends::of(&outlines);
    let mut machines: Vec<Machine> = Vec::new();
    let mut left_out: Vec<String> = Vec::new();
    let mut counts = Counts::default();
    let mut hidden = Vec::new();
    for (i, line) in lines.iter().enumerate() {
        counts.rows += 1;
        told(i, lines.len());
        let one = &outlines[i];
        if let Some(why) = not_carried(line, one, table.layout) {
            let texts: Vec<String> = line.fields().map(|f| f.content.text()).collect();
            left_out.push(format!("row {}: {}", one.row, texts.join(" | ")));
            reader.findings.push(about_row(one, Kind::LeftOut, why));
            continue;
        }
        counts.carried += 1;
        if line.hidden {
            hidden.push(line.number);
        }
        machines.extend(of_row(&mut reader, line, (&outlines, &ends), i));
    }
    if !hidden.is_empty() {
        reader.findings.push(of_file(format!(
            "hidden rows are carried as well: {}",
            listed(&hidden)
        )));
    }
    drop((lines, outlines, ends));
    counts.missing = reader.missing;
    counts.records = machines.len();
    of_columns(&mut reader);
    alike(&mut reader, &mut machines);
    let machines = named_once(&mut reader, machines);
    let mut findings = std::mem::take(&mut reader.findings);
    findings.sort_by_key(|f| (f.row.unwrap_or(0), f.column.unwrap_or(0), f.kind));
    Draft {
        yaml: write(&reader, &machines, &left_out),
        findings,
        counts,
        how: Vec::new(),
    }
}

fn outline(line: &Line<'_>, layout: &Layout) -> Outline {
    let text = |wanted: &dyn Fn(&Target) -> bool| {
        let column = layout.columns.iter().find(|c| wanted(&c.target))?;
        let text = line.field(column)?.content.text();
        Some(text.split_whitespace().collect::<Vec<_>>().join(" "))
    };
    let tag = text(&|t| matches!(t, Target::Name)).unwrap_or_default();
    let number = text(&|t| matches!(t, Target::RowNumber)).and_then(|t| t.parse().ok());
    Outline {
        tag,
        description: text(&|t| is_key(t, "name")).unwrap_or_default(),
        oil: text(&|t| is_key(t, "oil now")),
        number,
        row: line.number,
    }
}

/// Why a row is no machine.
fn not_carried(line: &Line<'_>, one: &Outline, layout: &Layout) -> Option<String> {
    let lower = one.tag.to_lowercase();
    if ["total", "totals", "sum", "subtotal"]
        .iter()
        .any(|w| lower.trim_end_matches(':') == *w)
    {
        return Some("a row of totals is no machine".into());
    }
    let figures = one.tag.chars().any(|c| c.is_ascii_digit());
    if line.is_heading() && !figures {
        return Some("one text alone, taken as a heading between rows".into());
    }
    let texts = |wanted: &dyn Fn(&Target) -> bool| -> Vec<String> {
        let columns = layout.columns.iter().filter(|c| wanted(&c.target));
        columns
            .filter_map(|c| line.field(c))
            .map(|f| f.content.text())
            .collect()
    };
    let names = texts(&|t| is_key(t, "name") || matches!(t, Target::Name));
    // a remark may say of a filter that it was removed; of the machine it says so at once
    let remarks = texts(&|t| matches!(t, Target::Note) || t.word() == "note");
    let first_words = remarks
        .iter()
        .map(|t| t.split_whitespace().next().unwrap_or(""));
    let said: Vec<&str> = names
        .iter()
        .map(String::as_str)
        .chain(first_words)
        .collect();
    is_gone(&said).map(|word| {
        format!("the register says \"{word}\": not carried, kept as a remark in the file")
    })
}

fn of_row(
    reader: &mut Reader<'_>,
    line: &Line<'_>,
    (outlines, ends): (&[Outline], &Ends),
    at: usize,
) -> Vec<Machine> {
    let one = &outlines[at];
    let oil = ends.resolved(reader, outlines, at);
    let mut tag = one.tag.clone();
    if tag.is_empty() {
        tag = format!("row {}", one.row);
        reader.findings.push(about_row(
            one,
            Kind::Question,
            "the row has no tag: what is the machine called?",
        ));
    }
    if tag.contains('/') && tags::machines(&tag).len() == 1 {
        // An oblique parts a machine from its point.
        let plain = tag.replace('/', "-");
        reader.findings.push(about_row(
            one,
            Kind::ReadAs,
            format!("the tag is written {plain}: an oblique parts a machine from its point"),
        ));
        tag = plain;
    }
    let names = tags::machines(&tag);
    let mut machine = RowReader::new(reader, line, &names[0]).read(oil.as_deref());
    let point = reader
        .layout
        .columns
        .iter()
        .find(|c| matches!(c.target, Target::Point));
    machine.point = point
        .and_then(|c| line.field(c))
        .map(|f| f.content.text().trim().to_owned())
        .filter(|t| !t.is_empty());
    if names.len() == 1 {
        return vec![machine];
    }
    let n = names.len();
    let each = if machine.each {
        ""
    } else {
        "; is the fill that of each?"
    };
    let says = format!(
        "one row, {n} machines: {}; are they all alike{each}",
        names.join(", ")
    );
    let question = about_row(
        one,
        Kind::Question,
        if machine.each {
            format!("{says}?")
        } else {
            says
        },
    );
    machine
        .record
        .notes
        .push(format!("row {}: {}", one.row, question.says));
    reader.findings.push(question);
    names
        .into_iter()
        .map(|name| {
            let mut copy = machine.clone();
            copy.record.name = name;
            copy
        })
        .collect()
}

fn about_row(one: &Outline, kind: Kind, says: impl Into<String>) -> Finding {
    Finding {
        kind,
        row: Some(one.row),
        column: None,
        name: Some(one.tag.clone()).filter(|t| !t.is_empty()),
        heading: String::new(),
        text: String::new(),
        says: says.into(),
    }
}

fn of_file(says: impl Into<String>) -> Finding {
    Finding {
        kind: Kind::ReadAs,
        row: None,
        column: None,
        name: None,
        heading: String::new(),
        text: String::new(),
        says: says.into(),
    }
}

fn listed(rows: &[u32]) -> String {
    const SHOWN: usize = 12;
    let mut shown: Vec<String> = rows.iter().take(SHOWN).map(u32::to_string).collect();
    if rows.len() > SHOWN {
        shown.push(format!("and {} more", rows.len() - SHOWN));
    }
    shown.join(", ")
}
