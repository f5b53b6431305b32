//! A list of oils into an oil file.

mod close;

use super::cell::{Expect, Reading, quantity, text_of};
use super::draft::{Counts, Draft, Record};
use super::finding::{Finding, Kind};
use super::layout::Column;
use super::machine::counted;
use super::site::Context;
use super::table::{Line, Table};
use super::target::Target;
use super::words;
use crate::input::keys::Form;
use crate::input::value::{At, Want};
use crate::quantity::Kind as Measure;
use crate::relation::oil::base_stock::BaseStock;
use crate::table::Content;

const VISCOSITY: Want = Want::one(&[
    Measure::KinematicViscosity,
    Measure::DynamicViscosity,
    Measure::Efflux,
]);

/// Drafts an oil file from a list.
pub fn draft(table: &Table<'_>, context: &Context<'_>) -> Draft {
    let mut all = Oils {
        context,
        findings: Vec::new(),
        counts: Counts::default(),
        records: Vec::new(),
        without: Vec::new(),
    };
    for line in table.lines() {
        all.counts.rows += 1;
        all.row(&line, &table.layout.columns);
    }
    all.counts.records = all.records.len();
    let mut findings = std::mem::take(&mut all.findings);
    findings.sort_by_key(|f| (f.row.unwrap_or(0), f.column.unwrap_or(0), f.kind));
    Draft {
        yaml: all.write(),
        findings,
        counts: all.counts,
        how: Vec::new(),
    }
}

struct Oils<'a> {
    context: &'a Context<'a>,
    findings: Vec<Finding>,
    counts: Counts,
    records: Vec<Record>,
    /// Oils of which no viscosity is known: they cannot be weighed, and stand as remarks.
    without: Vec<String>,
}

/// One oil as its row is read.
struct Row<'o, 'a> {
    all: &'o mut Oils<'a>,
    number: u32,
    record: Record,
    points: Vec<(f64, String)>,
    grade: Option<String>,
    vi: Option<String>,
    /// Families and bases its name tells.
    name: String,
}

impl Oils<'_> {
    fn row(&mut self, line: &Line<'_>, columns: &[Column]) {
        let text = |wanted: fn(&Target) -> bool| {
            let column = columns.iter().find(|c| wanted(&c.target))?;
            let text = line.field(column)?.content.text();
            Some(text.split_whitespace().collect::<Vec<_>>().join(" "))
        };
        let name = text(|t| matches!(t, Target::Key(k) if k.name == "name"));
        let id = text(|t| matches!(t, Target::Name)).or_else(|| name.clone());
        let Some(id) = id.filter(|i| !i.is_empty()) else {
            let finding = about(
                line.number,
                Kind::LeftOut,
                "",
                "the row has neither id nor name",
            );
            self.findings.push(finding);
            return;
        };
        if self.records.iter().any(|r| r.name == id) {
            let says =
                format!("the oil {id} stands in an earlier row as well: this row is not carried");
            let finding = about(line.number, Kind::LeftOut, &id, &says);
            self.findings.push(finding);
            return;
        }
        let record = Record {
            name: id.clone(),
            row: line.number,
            comments: vec![format!("row {}", line.number)],
            ..Record::default()
        };
        let mut row = Row {
            all: self,
            number: line.number,
            record,
            points: Vec::new(),
            grade: None,
            vi: None,
            name: name.unwrap_or_else(|| id.clone()),
        };
        for column in columns {
            match line.field(column) {
                Some(field) => row.field(column, field.content),
                None if counted(&column.target) => row.all.counts.missing += 1,
                None => {}
            }
        }
        row.finish();
    }

    fn write(&self) -> String {
        let mut out = format!(
            "# yaml-language-server: $schema=./.filmwright/oils.schema.json\n\
             # Drafted by filmwright intake from {}. Figures are those of the list; read them\n\
             # against the data sheets.\n\
             file: oils 1\n",
            self.context.file
        );
        for record in &self.records {
            out.push('\n');
            record.write(&mut out, 0);
        }
        if !self.without.is_empty() {
            out.push_str("\n# Oils without any viscosity or grade: they cannot be weighed.\n");
            for line in &self.without {
                out.push_str(line);
            }
        }
        out
    }
}

impl Row<'_, '_> {
    fn say(&mut self, kind: Kind, column: Option<&Column>, text: &str, says: impl Into<String>) {
        let finding = Finding {
            kind,
            row: Some(self.number),
            column: column.map(|c| c.number),
            name: Some(self.record.name.clone()),
            heading: column.map(|c| c.heading.clone()).unwrap_or_default(),
            text: text.to_owned(),
            says: says.into(),
        };
        if matches!(kind, Kind::NotUnderstood | Kind::Question) {
            let note = format!(
                "{} {} \"{text}\": {}",
                finding.cell(),
                finding.heading,
                finding.says
            );
            self.record.notes.push(note);
        }
        self.all.findings.push(finding);
    }

    fn tell(&mut self, column: &Column, content: &Content, reading: Reading) -> Option<Reading> {
        let text = content.text();
        if reading.missing {
            self.all.counts.missing += 1;
        }
        if let Some(fault) = &reading.fault {
            self.say(Kind::NotUnderstood, Some(column), &text, fault.clone());
        } else if let Some(read_as) = &reading.read_as {
            self.say(Kind::ReadAs, Some(column), &text, read_as.clone());
        }
        if let Some(ask) = &reading.ask {
            self.say(Kind::Question, Some(column), &text, ask.clone());
        }
        reading.value.is_some().then_some(reading)
    }

    fn quantity(
        &mut self,
        column: &Column,
        content: &Content,
        key: &str,
        want: &Want,
    ) -> Option<Reading> {
        let expect = Expect {
            key,
            want,
            unit: column.unit,
            grease: false,
        };
        let reading = quantity(content, &expect, &self.all.context.cells);
        self.tell(column, content, reading)
    }

    fn field(&mut self, column: &Column, content: &Content) {
        match &column.target {
            Target::Key(key) if key.name == "viscosity" => self.grade(column, content),
            Target::Key(key) => self.key(column, content, key.name, &key.form),
            Target::ViscosityAt(t) => {
                if let Some(reading) = self.quantity(column, content, "viscosity", &VISCOSITY) {
                    let value = reading.value.unwrap_or_default();
                    self.points.push((*t, format!("{value} at {t} degC")));
                }
            }
            Target::Note => {
                let text = content
                    .text()
                    .split_whitespace()
                    .collect::<Vec<_>>()
                    .join(" ");
                self.record
                    .notes
                    .push(format!("{}: {text}", column.heading));
            }
            _ => {}
        }
    }

    fn grade(&mut self, column: &Column, content: &Content) {
        let text = match text_of(content) {
            Ok(text) => text,
            Err(why) => {
                self.tell(column, content, Reading::fault(why));
                return;
            }
        };
        let Some(reading) = words::read(&Form::Grade, &text) else {
            return;
        };
        if let Some(reading) = self.tell(column, content, reading) {
            self.grade = reading.value;
        }
    }

    fn key(&mut self, column: &Column, content: &Content, name: &str, form: &Form) {
        let text = content.text();
        let value = match form {
            Form::Quantity(want) => {
                let Some(reading) = self.quantity(column, content, name, want) else {
                    return;
                };
                let mut value = reading.value.clone().unwrap_or_default();
                if want.at == At::Must {
                    // A density without its temperature is that at 15 degC, as data sheets have it.
                    value.push_str(if name == "density" {
                        " at 15 degC"
                    } else {
                        " at 40 degC"
                    });
                }
                value
            }
            Form::Flash => {
                const FLASH: Want = Want::one(&[Measure::Temperature]);
                let Some(reading) = self.quantity(column, content, name, &FLASH) else {
                    return;
                };
                let value = reading.value.unwrap_or_default();
                let upper = format!("{} {}", column.heading, text).to_uppercase();
                match ["COC", "PMCC"].iter().find(|cup| upper.contains(**cup)) {
                    Some(cup) => format!("{value} {cup}"),
                    None => value,
                }
            }
            Form::Base if is_pag(&text) => {
                self.say(Kind::Question, Some(column), &text, WHICH_PAG);
                "PAG water-soluble".to_owned()
            }
            Form::Base => match base(&text) {
                Some(base) => base,
                None => {
                    self.say(
                        Kind::NotUnderstood,
                        Some(column),
                        &text,
                        "no base stock known by this name; the base stays unknown",
                    );
                    return;
                }
            },
            Form::Price => {
                let Some(price) = self.price(column, content) else {
                    return;
                };
                price
            }
            form => {
                let Some(reading) = words::read(form, &text) else {
                    return;
                };
                let Some(reading) = self.tell(column, content, reading) else {
                    return;
                };
                reading.value.unwrap_or_default()
            }
        };
        if name == "VI" {
            self.vi = Some(value.clone());
        }
        self.record.set(name, value);
    }

    /// A price says for how much: in the cell, or in the heading as `price per L`.
    fn price(&mut self, column: &Column, content: &Content) -> Option<String> {
        let text = content.text();
        let heading = column.heading.to_lowercase();
        let litre = |t: &str| {
            [
                "per l",
                "/l",
                "/ l",
                "a litre",
                "per litre",
                "per liter",
                "per ltr",
            ]
            .iter()
            .any(|w| t.ends_with(w) || t.contains(&format!("{w} ")) || t.contains(&format!("{w})")))
        };
        let mass = |t: &str| ["per kg", "/kg", "/ kg"].iter().any(|w| t.contains(w));
        let per = match (text.to_lowercase(), heading) {
            (t, h) if mass(&t) || mass(&h) => "kg",
            (t, h) if litre(&t) || litre(&h) => "L",
            _ => {
                self.say(
                    Kind::Question,
                    Some(column),
                    &text,
                    "the price of how much? It is kept as a note",
                );
                return None;
            }
        };
        let figures = text.trim_start_matches(|c: char| !c.is_ascii_digit());
        let (token, _) = super::number::split(figures)?;
        match super::number::read(token, self.all.context.cells.decimal) {
            super::number::Read::Is(number) => Some(format!("{number} per {per}")),
            super::number::Read::Either(a, b) => {
                self.say(
                    Kind::NotUnderstood,
                    Some(column),
                    &text,
                    format!("{a} or {b}?"),
                );
                None
            }
        }
    }
}

/// Said of a polyglycol of which nobody states the kind. It must not pass for a mineral oil: the
/// two neither mix nor have a slope alike.
const WHICH_PAG: &str =
    "a PAG: water-soluble or oil-soluble? Water-soluble, the commoner, is assumed";

fn is_pag(text: &str) -> bool {
    let lower = text.trim().to_lowercase();
    matches!(
        lower.as_str(),
        "pag" | "pg" | "polyglycol" | "polyalkylene glycol" | "polyalkyleneglycol"
    )
}

/// A base stock of a list, in the reader's words.
fn base(text: &str) -> Option<String> {
    let lower = text.trim().to_lowercase();
    let plain = match lower.as_str() {
        "mineral" | "mineral oil" | "min" => "mineral",
        "group i" | "gr i" | "group 1" | "mineral i" => "mineral I",
        "group ii" | "gr ii" | "group 2" | "mineral ii" => "mineral II",
        "group iii" | "gr iii" | "group 3" | "mineral iii" => "mineral III",
        "naphthenic" => "naphthenic",
        "pao" | "polyalphaolefin" => "PAO",
        "ester" | "synthetic ester" | "poe" => "ester",
        "silicone" => "silicone",
        "pfpe" => "PFPE",
        "vegetable" | "rapeseed" => "vegetable",
        "water glycol" | "water-glycol" | "hfc" => "water-glycol",
        "phosphate ester" => "phosphate ester",
        _ => {
            let (head, polymer) = text
                .split_once(',')
                .map_or((text.trim(), None), |(h, p)| (h.trim(), Some(p.trim())));
            let known = BaseStock::WRITTEN
                .iter()
                .find(|(w, _)| w.eq_ignore_ascii_case(head))?
                .0;
            return match polymer {
                None => Some(known.to_owned()),
                Some(p @ ("polymer-thickened" | "no polymer")) => Some(format!("{known}, {p}")),
                Some(_) => None,
            };
        }
    };
    Some(plain.to_owned())
}

/// A finding about a whole row.
fn about(row: u32, kind: Kind, name: &str, says: &str) -> Finding {
    Finding {
        kind,
        row: Some(row),
        column: None,
        name: Some(name.to_owned()).filter(|n| !n.is_empty()),
        heading: String::new(),
        text: String::new(),
        says: says.to_owned(),
    }
}
