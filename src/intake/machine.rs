//! One row of a register as a machine: its keys, its parts, its notes.

mod of_parts;
mod oil;
mod parts;

use super::cell::{Expect, Reading, quantity, text_of};
use super::draft::Record;
use super::finding::{Finding, Kind, letters};
use super::layout::Column;
use super::lubricant::Lubricant;
use super::site::Reader;
use super::table::Line;
use super::target::Target;
use super::words;
use crate::input::keys::Form;
use crate::input::value::Want;
use crate::quantity::Kind as Measure;
use crate::table::Content;

const TEMPERATURE: Want = Want::stated(&[Measure::Temperature]);
const SPEED: Want = Want::stated(&[Measure::RotationalSpeed]);

/// A machine drafted, with what is compared between rows.
#[derive(Clone, Debug, Default)]
pub(super) struct Machine {
    pub(super) record: Record,
    pub(super) point: Option<String>,
    pub(super) fill: Vec<(String, f64)>,
    pub(super) sump: Vec<(String, f64)>,
    pub(super) each: bool,
}

/// A value of a part that waits for its part.
struct Loose<'c> {
    column: &'c Column,
    part: &'static str,
    key: &'static str,
    written: String,
}

/// A row as it is read.
pub(super) struct RowReader<'r, 'a> {
    reader: &'r mut Reader<'a>,
    line: &'r Line<'r>,
    name: String,
    machine: Machine,
    ambient: [Option<Reading>; 2],
    loose: Vec<Loose<'r>>,
    bearings: Vec<(String, String)>,
    speed: Option<(Reading, &'r Column, String)>,
    oil: Option<Lubricant>,
}

impl<'r, 'a> RowReader<'r, 'a> {
    pub(super) fn new(reader: &'r mut Reader<'a>, line: &'r Line<'r>, name: &str) -> Self {
        Self {
            reader,
            line,
            name: name.to_owned(),
            machine: Machine {
                record: Record {
                    name: name.to_owned(),
                    row: line.number,
                    ..Record::default()
                },
                ..Machine::default()
            },
            ambient: [None, None],
            loose: Vec::new(),
            bearings: Vec::new(),
            speed: None,
            oil: None,
        }
    }

    pub(super) fn read(mut self, lubricant: Option<&str>) -> Machine {
        let number = self.line.number.to_string();
        self.machine.record.set("register row", number);
        self.lubricant(lubricant);
        let line = self.line;
        let columns: &'r [Column] = self.reader.columns();
        for column in columns {
            let field = line.field(column);
            match field {
                Some(field) => {
                    if let Some(from) = field.merged_from {
                        self.reader.merged(column, from, line.number);
                    }
                    self.field(column, field.content);
                }
                None => {
                    if counted(&column.target) {
                        self.reader.missing += 1;
                    }
                }
            }
        }
        for comment in line.comments() {
            let cell = format!("{}{}", letters(comment.column), comment.row);
            self.machine
                .record
                .notes
                .push(format!("{cell} comment: {}", comment.text));
        }
        self.join_ambient();
        self.parts();
        self.facts();
        // The name comes first, as in files written by hand.
        if let Some(at) = self
            .machine
            .record
            .keys
            .iter()
            .position(|(k, _)| k == "name")
        {
            let name = self.machine.record.keys.remove(at);
            self.machine.record.keys.insert(0, name);
        }
        // a register may hold many thousands of them
        self.machine.record.keys.shrink_to_fit();
        self.machine.record.notes.shrink_to_fit();
        self.machine
    }

    fn say(&mut self, kind: Kind, column: Option<&Column>, text: &str, says: impl Into<String>) {
        let finding = Finding {
            kind,
            row: Some(self.line.number),
            column: column.map(|c| c.number),
            name: Some(self.name.clone()),
            heading: column.map(|c| c.heading.clone()).unwrap_or_default(),
            text: text.to_owned(),
            says: says.into(),
        };
        if matches!(kind, Kind::NotUnderstood | Kind::Question) {
            let quoted = if text.is_empty() || column.is_none() {
                String::new()
            } else {
                format!(" {} \"{text}\"", finding.heading)
            };
            let note = format!("{}{quoted}: {}", finding.cell(), finding.says);
            self.machine.record.notes.push(note);
        }
        self.reader.findings.push(finding);
    }

    fn field(&mut self, column: &'r Column, content: &Content) {
        match &column.target {
            Target::Name | Target::Point | Target::RowNumber | Target::Skip => {}
            Target::Path | Target::AsWritten | Target::FileKind => {}
            Target::Note | Target::ViscosityAt(_) => self.note(column, content),
            Target::AmbientLow => {
                self.ambient[0] = self.quantity(column, content, "ambient low", &TEMPERATURE);
            }
            Target::AmbientHigh => {
                self.ambient[1] = self.quantity(column, content, "ambient high", &TEMPERATURE);
            }
            Target::MotorSpeed => self.motor_speed(column, content),
            Target::Speed => {
                if let Some(reading) = self.quantity(column, content, "speed", &SPEED) {
                    self.speed = Some((reading, column, content.text()));
                }
            }
            Target::Key(key) if key.name == "oil now" => {}
            Target::Key(key) => self.key(column, content, key.name, &key.form),
            Target::Part(kind, key)
                if kind.first == "rolling bearing" && key.name == kind.first =>
            {
                self.bearing(column, content);
            }
            Target::Part(kind, key) => self.part(column, content, kind.first, key.name, &key.form),
        }
    }

    fn note(&mut self, column: &Column, content: &Content) {
        match text_of(content) {
            Ok(text) => {
                let text = text.split_whitespace().collect::<Vec<_>>().join(" ");
                let heading = if column.heading.is_empty() {
                    "note"
                } else {
                    &column.heading
                };
                self.machine.record.notes.push(format!("{heading}: {text}"));
            }
            Err(why) => {
                self.say(Kind::NotUnderstood, Some(column), &content.text(), why);
            }
        }
    }

    /// Reads a quantity and says what is to be said of it; the reading where it has a value.
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
            grease: self.oil.as_ref().is_some_and(Lubricant::is_grease),
        };
        let reading = quantity(content, &expect, &self.reader.rules);
        self.tell(column, content, reading)
    }

    fn tell(&mut self, column: &Column, content: &Content, reading: Reading) -> Option<Reading> {
        let text = content.text();
        if reading.unitless {
            self.reader.unitless(column, self.line.number, &reading);
        }
        if reading.missing {
            self.reader.missing += 1;
        }
        if let Some(fault) = &reading.fault {
            self.say(Kind::NotUnderstood, Some(column), &text, fault.clone());
        }
        if let Some(read_as) = reading
            .read_as
            .as_ref()
            .filter(|_| !reading.unitless && reading.fault.is_none() && reading.ask.is_none())
        {
            self.say(Kind::ReadAs, Some(column), &text, read_as.clone());
        }
        if let Some(ask) = &reading.ask {
            self.say(Kind::Question, Some(column), &text, ask.clone());
        }
        reading.value.is_some().then_some(reading)
    }

    fn key(&mut self, column: &Column, content: &Content, name: &str, form: &Form) {
        if let Form::Quantity(want) = form {
            if let Some(reading) = self.quantity(column, content, name, want) {
                self.keep(name, &reading, &content.text());
            }
            return;
        }
        if let Some((reading, text)) = self.words(column, content, form)
            && let Some(value) = reading.value.as_ref()
        {
            let plain = matches!(
                form,
                Form::Text | Form::Whole | Form::Name(_) | Form::Names | Form::Markdown
            );
            let written = if plain || value.starts_with('[') {
                value.clone()
            } else {
                reading.written(&text).unwrap_or_default()
            };
            if name == "area" {
                self.reader.area(value);
            }
            self.machine.record.set(name, written);
        }
    }

    fn words(
        &mut self,
        column: &Column,
        content: &Content,
        form: &Form,
    ) -> Option<(Reading, String)> {
        let text = match text_of(content) {
            Ok(text) => text,
            Err(why) => {
                self.tell(column, content, Reading::fault(why));
                return None;
            }
        };
        let reading = words::read(form, &text)?;
        self.tell(column, content, reading).map(|r| (r, text))
    }

    fn keep(&mut self, name: &str, reading: &Reading, text: &str) {
        let Some(written) = reading.written(text) else {
            return;
        };
        match name {
            "fill" => {
                self.machine.fill.clone_from(&reading.candidates);
                self.machine.each = reading.each;
            }
            "sump" => {
                self.machine.sump.clone_from(&reading.candidates);
                let ambient = self.reader.at_ambient();
                self.machine.record.set("at ambient", ambient);
            }
            _ => {}
        }
        self.machine.record.set(name, written);
    }

    fn join_ambient(&mut self) {
        let [low, high] = std::mem::take(&mut self.ambient);
        let value = |r: &Option<Reading>| r.as_ref().and_then(|r| r.value.clone());
        match (value(&low), value(&high)) {
            (Some(lo), Some(hi)) => {
                let assumed = low.iter().chain(&high).any(|r| r.assumed);
                let whose = if assumed {
                    "assumed \"register, without a unit\""
                } else {
                    "register"
                };
                self.machine
                    .record
                    .set("ambient", format!("{lo} .. {hi}, {whose}"));
            }
            (Some(one), None) | (None, Some(one)) => {
                let end = if low.is_some() { "coldest" } else { "hottest" };
                let says =
                    format!("only the {end} ambient is given, {one}: the other end is missing");
                self.say(Kind::Question, None, "", says);
            }
            (None, None) => {}
        }
    }
}

/// Whether an empty cell of a column is a value missing.
pub(super) fn counted(target: &Target) -> bool {
    !matches!(
        target,
        Target::Name
            | Target::RowNumber
            | Target::Point
            | Target::Note
            | Target::Skip
            | Target::Path
            | Target::AsWritten
            | Target::FileKind
    )
}
