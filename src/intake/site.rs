//! A register into a site file.

use super::cell::{Reading, Rules};
use super::describe::is_gone;
use super::draft::{Counts, Draft, Record};
use super::finding::{Finding, Kind, letters};
use super::layout::{Column, Layout};
use super::machine::{Machine, RowReader, counted};
use super::table::{Line, Table};
use super::tags::{self, Reference};
use super::target::Target;
use super::yaml::scalar;
use crate::model::rulebook::Rulebook;
use std::collections::BTreeMap;
use std::fmt::Write as _;

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
    merged: Vec<(u32, u32)>,
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
        if self.merged.contains(&(column.number, from)) {
            return;
        }
        self.merged.push((column.number, from));
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
    texts: Vec<String>,
}

/// Drafts a site file from a register.
pub fn draft(table: &Table<'_>, context: &Context<'_>) -> Draft {
    let mut reader = Reader {
        context,
        layout: table.layout,
        rules: context.cells,
        findings: Vec::new(),
        missing: 0,
        areas: Vec::new(),
        bare: BTreeMap::new(),
        merged: Vec::new(),
        sumps: 0,
    };
    let lines: Vec<Line<'_>> = table.lines().collect();
    let outlines: Vec<Outline> = lines.iter().map(|l| outline(l, table.layout)).collect();
    let mut machines: Vec<Machine> = Vec::new();
    let mut left_out: Vec<String> = Vec::new();
    let mut counts = Counts::default();
    let mut hidden = Vec::new();
    for (i, line) in lines.iter().enumerate() {
        counts.rows += 1;
        let one = &outlines[i];
        if let Some(why) = not_carried(line, one, table.layout) {
            left_out.push(format!("row {}: {}", one.row, one.texts.join(" | ")));
            reader.findings.push(about_row(one, Kind::LeftOut, why));
            continue;
        }
        counts.carried += 1;
        if line.hidden {
            hidden.push(line.number);
        }
        machines.extend(of_row(&mut reader, line, &outlines, i));
    }
    if !hidden.is_empty() {
        reader.findings.push(of_file(format!(
            "hidden rows are carried as well: {}",
            listed(&hidden)
        )));
    }
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
        texts: line.fields().map(|f| f.content.text()).collect(),
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
    let said = |t: &Target| {
        is_key(t, "name") || matches!(t, Target::Note | Target::Name) || t.word() == "note"
    };
    let texts: Vec<String> = layout
        .columns
        .iter()
        .filter(|c| said(&c.target))
        .filter_map(|c| line.field(c))
        .map(|f| f.content.text())
        .collect();
    let texts: Vec<&str> = texts.iter().map(String::as_str).collect();
    is_gone(&texts).map(|word| {
        format!("the register says \"{word}\": not carried, kept as a remark in the file")
    })
}

fn of_row(
    reader: &mut Reader<'_>,
    line: &Line<'_>,
    outlines: &[Outline],
    at: usize,
) -> Vec<Machine> {
    let one = &outlines[at];
    let oil = resolved(reader, outlines, at);
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

/// The text of the lubricant cell, references followed.
fn resolved(reader: &mut Reader<'_>, outlines: &[Outline], from: usize) -> Option<String> {
    let mut at = from;
    let mut seen = vec![from];
    loop {
        let text = outlines[at].oil.clone()?;
        let Some(reference) = tags::reference(&text) else {
            if at != from {
                let to = &outlines[at];
                let says = format!("{} of row {}: \"{text}\"", to.tag, to.row);
                let mut finding = about_row(&outlines[from], Kind::ReadAs, says);
                finding.column = reader.oil_column().map(|c| c.number);
                finding.text = outlines[from].oil.clone().unwrap_or_default();
                reader.findings.push(finding);
            }
            return Some(text);
        };
        let next = target_of(&reference, outlines, at);
        match next.filter(|n| !seen.contains(n)) {
            Some(next) => {
                seen.push(next);
                at = next;
            }
            None => {
                let why = match next {
                    Some(_) => "the rows refer to each other in a circle".to_owned(),
                    None => "no one row answers to this reference".to_owned(),
                };
                let mut finding = about_row(&outlines[from], Kind::NotUnderstood, why);
                finding.column = reader.oil_column().map(|c| c.number);
                finding.heading = reader.oil_column().map(|c| c.heading).unwrap_or_default();
                finding.text = text;
                reader.findings.push(finding);
                return outlines[from].oil.clone();
            }
        }
    }
}

fn target_of(reference: &Reference, outlines: &[Outline], at: usize) -> Option<usize> {
    match reference {
        Reference::Above => at.checked_sub(1),
        Reference::Row(n) => {
            let numbered = outlines.iter().any(|o| o.number.is_some());
            let is = |o: &Outline| {
                if numbered {
                    o.number == Some(*n)
                } else {
                    o.row == *n
                }
            };
            outlines.iter().position(is)
        }
        Reference::Named(word) => {
            let mut found = (0..outlines.len())
                .filter(|i| *i != at)
                .filter(|i| tags::answers(word, &outlines[*i].tag, &outlines[*i].description));
            let first = found.next();
            first.filter(|_| found.next().is_none())
        }
    }
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

/// What is to be said of whole columns.
fn of_columns(reader: &mut Reader<'_>) {
    for (number, (n, cell, read_as)) in std::mem::take(&mut reader.bare) {
        let column = reader.layout.columns.iter().find(|c| c.number == number);
        let heading = column.map(|c| c.heading.clone()).unwrap_or_default();
        let cells = if n == 1 {
            "1 number".to_owned()
        } else {
            format!("{n} numbers")
        };
        reader.findings.push(Finding {
            kind: Kind::Question,
            row: None,
            column: Some(number),
            name: None,
            heading,
            text: String::new(),
            says: format!("{cells} without a unit, the first in {cell}, {read_as} and so on, as assumed: which unit? State it in the map"),
        });
    }
    if reader.sumps > 0 && reader.context.at_ambient.is_none() {
        let n = reader.sumps;
        let mut finding = of_file(format!(
            "{n} oil temperatures are given without the ambient they were read at; 20 degC is assumed: state it in the map or at the machine"
        ));
        finding.kind = Kind::Question;
        reader.findings.push(finding);
    }
    let unread: Vec<&Column> = reader
        .layout
        .columns
        .iter()
        .filter(|c| c.sure == 0 && matches!(c.target, Target::Note))
        .collect();
    for column in unread {
        let finding = Finding {
            kind: Kind::ReadAs,
            row: None,
            column: Some(column.number),
            name: None,
            heading: column.heading.clone(),
            text: String::new(),
            says: "the heading was not recognised: every cell is kept as a note; the map can say what it is".into(),
        };
        reader.findings.push(finding);
    }
    let hidden: Vec<String> = reader
        .layout
        .columns
        .iter()
        .filter(|c| c.hidden && counted(&c.target))
        .map(|c| c.heading.clone())
        .collect();
    if !hidden.is_empty() {
        reader.findings.push(of_file(format!(
            "hidden columns are carried as well: {}",
            hidden.join(", ")
        )));
    }
}

/// Machines that may be one.
fn alike(reader: &mut Reader<'_>, machines: &mut [Machine]) {
    let names: Vec<String> = machines.iter().map(|m| m.record.name.clone()).collect();
    let names: Vec<&str> = names.iter().map(String::as_str).collect();
    for (a, b) in tags::duplicates(&names) {
        if names[a] == names[b] || machines[a].record.row == machines[b].record.row {
            continue;
        }
        let mut says = format!(
            "{} of row {} and {} of row {} may be the same machine: look, and delete one",
            names[a], machines[a].record.row, names[b], machines[b].record.row
        );
        for (what, x, y) in [
            ("fill", &machines[a].fill, &machines[b].fill),
            ("temperature", &machines[a].sump, &machines[b].sump),
        ] {
            if let Some(more) = agreement(what, x, y) {
                says.push_str("; ");
                says.push_str(&more);
            }
        }
        for i in [a, b] {
            machines[i].record.notes.push(says.clone());
        }
        reader.findings.push(Finding {
            kind: Kind::Question,
            row: Some(machines[b].record.row),
            column: None,
            name: Some(names[b].to_owned()),
            heading: String::new(),
            text: names[b].to_owned(),
            says,
        });
    }
}

/// Whether readings of two rows agree, and which of several then.
fn agreement(what: &str, a: &[(String, f64)], b: &[(String, f64)]) -> Option<String> {
    if a.is_empty() || b.is_empty() {
        return None;
    }
    // Half a per cent apart are two roundings of one value.
    let same = |x: f64, y: f64| (x - y).abs() <= 0.005 * x.abs().max(y.abs());
    let pairs = a.iter().flat_map(|x| b.iter().map(move |y| (x, y)));
    let agree: Vec<_> = pairs.clone().filter(|(x, y)| same(x.1, y.1)).collect();
    Some(match agree.first() {
        Some((x, y)) if x.0 == y.0 => format!("their {what} agrees, {}", x.0),
        Some((x, y)) => format!("their {what} agrees as {} and {}", x.0, y.0),
        None => {
            let (x, y) = pairs.into_iter().next()?;
            format!("their {what} differs, {} and {}", x.0, y.0)
        }
    })
}

/// Machines of one tag: points where the register names points, else machines of their own.
fn named_once(reader: &mut Reader<'_>, machines: Vec<Machine>) -> Vec<Vec<Machine>> {
    let mut groups: Vec<Vec<Machine>> = Vec::new();
    let mut at: BTreeMap<String, usize> = BTreeMap::new();
    for mut machine in machines {
        let name = machine.record.name.clone();
        match at.get(&name).copied() {
            None => {
                at.insert(name, groups.len());
                groups.push(vec![machine]);
            }
            Some(first) => {
                let new = machine.point.as_ref().is_some_and(|p| {
                    groups[first]
                        .iter()
                        .all(|m| m.point.as_ref().is_some_and(|q| q != p))
                });
                if new {
                    groups[first].push(machine);
                    continue;
                }
                let row = machine.record.row;
                let other = groups[first][0].record.row;
                let says = format!(
                    "the tag {name} stands in row {other} and row {row}: the same machine, or several points of it? Written as {name} (row {row})"
                );
                reader.findings.push(Finding {
                    kind: Kind::Question,
                    row: Some(row),
                    column: None,
                    name: Some(name.clone()),
                    heading: String::new(),
                    text: name.clone(),
                    says: says.clone(),
                });
                machine.record.notes.push(says);
                machine.record.name = format!("{name} (row {row})");
                at.insert(machine.record.name.clone(), groups.len());
                groups.push(vec![machine]);
            }
        }
    }
    groups
}

fn write(reader: &Reader<'_>, machines: &[Vec<Machine>], left_out: &[String]) -> String {
    let mut out = format!(
        "# yaml-language-server: $schema=./.filmwright/site.schema.json\n\
         # Drafted by filmwright intake from {}. Values carry `register` where they stand there,\n\
         # `assumed` where something had to be added; cells that were not understood are notes.\n\
         file: site 1\n",
        reader.context.file
    );
    if !reader.areas.is_empty() {
        out.push_str("\nareas:\n");
        for area in &reader.areas {
            let _ = writeln!(
                out,
                "  {}: {{}}                  # ambient: coldest .. hottest",
                scalar(area)
            );
        }
    }
    if machines.is_empty() {
        out.push_str("\nmachines: {}\n");
    } else {
        out.push_str("\nmachines:\n");
    }
    for group in machines {
        match group.as_slice() {
            [one] => one.record.write(&mut out, 2),
            several => points(&mut out, several),
        }
        out.push('\n');
    }
    if !left_out.is_empty() {
        out.push_str("# Rows of the register that were not carried:\n");
        for line in left_out {
            let _ = writeln!(
                out,
                "# {}",
                line.split_whitespace().collect::<Vec<_>>().join(" ")
            );
        }
    }
    out
}

/// A machine with several points.
fn points(out: &mut String, several: &[Machine]) {
    let shared = ["name", "area", "register row"];
    let first = &several[0].record;
    let mut head = Record {
        name: first.name.clone(),
        ..Record::default()
    };
    for key in shared {
        let value = first.get(key);
        if let Some(value) = value.filter(|v| several.iter().all(|m| m.record.get(key) == Some(*v)))
        {
            head.set(key, value);
        }
    }
    head.write(out, 2);
    out.push_str("    points:\n");
    for machine in several {
        let mut record = machine.record.clone();
        if head.get("register row").is_none() {
            // The row of a point stands in its notes: a machine has one row.
            record.keys.retain(|(k, _)| k != "register row");
            record
                .notes
                .insert(0, format!("row {} of the register", record.row));
        }
        record.name = machine.point.clone().unwrap_or_default();
        record.keys.retain(|(k, _)| head.get(k).is_none());
        record.write(out, 6);
    }
}
