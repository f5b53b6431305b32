//! One row of a register as a machine: its keys, its parts, its notes.

use super::cell::{Expect, Reading, quantity, text_of};
use super::describe::{component, is_food, is_geared, is_motor_speed};
use super::draft::Record;
use super::finding::{Finding, Kind};
use super::layout::Column;
use super::lubricant::Lubricant;
use super::site::Reader;
use super::table::Line;
use super::target::Target;
use super::{lubricant, words};
use crate::input::keys::Form;
use crate::input::value::Want;
use crate::quantity::Kind as Measure;
use crate::relation::bearing::designation::{DimensionTable, read as designated};
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
                self.ambient[0] = self.quantity(column, content, "ambient low", &TEMPERATURE)
            }
            Target::AmbientHigh => {
                self.ambient[1] = self.quantity(column, content, "ambient high", &TEMPERATURE)
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
            Err(reading) => {
                let why = reading.fault.unwrap_or_default();
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
            Err(reading) => {
                self.tell(column, content, reading);
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

    fn motor_speed(&mut self, column: &Column, content: &Content) {
        if let Some(reading) = self.quantity(column, content, "motor speed", &SPEED) {
            let value = reading.value.unwrap_or_default();
            let says = format!(
                "the motor runs at {value}: what is the ratio, and how fast does the driven shaft turn?"
            );
            self.say(Kind::Question, Some(column), &content.text(), says);
        }
    }

    fn bearing(&mut self, column: &Column, content: &Content) {
        let text = match text_of(content) {
            Ok(text) => text,
            Err(reading) => {
                self.tell(column, content, reading);
                return;
            }
        };
        let form = Form::Text;
        let Some(reading) = words::read(&form, &text) else {
            return;
        };
        let Some(reading) = self.tell(column, content, reading) else {
            return;
        };
        let value = reading.value.unwrap_or_default();
        let table = DimensionTable::built_in();
        let whole = [value.clone()];
        let apart: Vec<String> = value
            .split(['/', ',', ';', '+'])
            .map(|t| t.trim().to_owned())
            .collect();
        let known = |list: &[String]| list.iter().all(|t| designated(table, t).is_ok());
        let list: &[String] = if !known(&whole) && apart.len() > 1 && known(&apart) {
            &apart
        } else {
            &whole
        };
        for one in list {
            match designated(table, one) {
                Ok(_) => self.bearings.push((one.clone(), String::new())),
                Err(why) => {
                    self.say(Kind::NotUnderstood, Some(column), &text, why.to_string());
                    self.bearings.push((
                        "{ bore: unknown, outside: unknown }".into(),
                        format!("bearing {one}"),
                    ));
                }
            }
        }
    }

    fn part(
        &mut self,
        column: &'r Column,
        content: &Content,
        part: &'static str,
        key: &'static str,
        form: &Form,
    ) {
        let text = content.text();
        let written = match form {
            Form::Quantity(want) => {
                let word = format!("{part}: {key}");
                self.quantity(column, content, &word, want)
                    .and_then(|r| r.written(&text))
            }
            Form::Component => {
                self.component_named(column, &text);
                return;
            }
            form => self.words(column, content, form).and_then(|(r, text)| {
                if matches!(form, Form::Text | Form::Label | Form::Whole) {
                    r.value
                } else {
                    r.written(&text)
                }
            }),
        };
        if let Some(written) = written {
            self.loose.push(Loose {
                column,
                part,
                key,
                written,
            });
        }
    }

    fn component_named(&mut self, column: &'r Column, text: &str) {
        match self.reader.component(text) {
            Some(id) => self.loose.push(Loose {
                column,
                part: "component",
                key: "component",
                written: id,
            }),
            None => {
                self.machine
                    .record
                    .notes
                    .push(format!("{}: {text}", column.heading));
            }
        }
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

    fn lubricant(&mut self, text: Option<&str>) {
        let column = self.reader.oil_column();
        let Some(text) = text.filter(|t| !t.trim().is_empty()) else {
            self.machine.record.set("oil now", "unknown");
            return;
        };
        let column = column.as_ref();
        if let Some(id) = self.reader.oil_in_list(text) {
            self.machine.record.set("oil now", id);
            return;
        }
        self.machine.record.set("oil now", "unknown");
        let empty = words::read(&Form::Text, text).is_none_or(|r| r.value.is_none());
        if empty {
            let elsewhere = words::read(&Form::Text, text).is_some_and(|r| r.fault.is_some());
            self.reader.missing += 1;
            if elsewhere {
                self.say(
                    Kind::NotUnderstood,
                    column,
                    text,
                    "unknown; it stands elsewhere",
                );
            }
            return;
        }
        let read = lubricant::read(text);
        let says = read.says();
        let understood = if says.is_empty() {
            String::new()
        } else {
            format!("{says}; ")
        };
        if read.doubtful {
            self.say(
                Kind::NotUnderstood,
                column,
                text,
                format!(
                    "{understood}the register doubts it itself: kept as note; oil now: unknown"
                ),
            );
        } else if says.is_empty() {
            self.say(
                Kind::NotUnderstood,
                column,
                text,
                "kept as note; oil now: unknown; no oil of the list has this name or id",
            );
        } else if read.viscosity_for_name {
            self.say(
                Kind::Question,
                column,
                text,
                format!("a viscosity stands in place of a name: {says}; which oil is it?"),
            );
        } else if read.or_equivalent {
            self.say(
                Kind::Question,
                column,
                text,
                format!("{says}; \"or equivalent\" is no name: which oil is in it?"),
            );
        } else {
            self.machine
                .record
                .notes
                .push(format!("oil in the register \"{text}\": {says}"));
            self.say(
                Kind::ReadAs,
                column,
                text,
                format!("{says}; oil now: unknown until an oil of the list is named"),
            );
        }
        self.oil = Some(read);
    }

    fn facts(&mut self) {
        let texts: Vec<String> = self.machine.record.notes.clone();
        let description = self.machine.record.get("name").unwrap_or("").to_owned();
        let mut all: Vec<&str> = texts
            .iter()
            .filter(|t| !t.starts_with("oil in the register"))
            .map(String::as_str)
            .collect();
        all.push(&description);
        if is_food(&all)
            && self.machine.record.get("food zone").is_none()
            && self.machine.record.get("food class").is_none()
        {
            self.machine.record.set(
                "food zone",
                format!("yes, register \"row {}\"", self.line.number),
            );
            self.say(
                Kind::Question,
                None,
                "",
                "the row speaks of food, and no food class is given: is H1 required?",
            );
        }
    }

    /// The parts of the row: what is stated of them, else what the description says.
    fn parts(&mut self) {
        let description = self.machine.record.get("name").unwrap_or("").to_owned();
        let mut parts: Vec<Vec<(String, String)>> = Vec::new();
        for (designation, label) in std::mem::take(&mut self.bearings) {
            let mut part = vec![("rolling bearing".to_owned(), designation)];
            if !label.is_empty() {
                part.push(("name".into(), label));
            }
            parts.push(part);
        }
        self.speeds(&mut parts, &description);
        self.stated_parts(&mut parts, &description);
        if parts.is_empty() {
            parts.push(self.described(&description));
        }
        for loose in std::mem::take(&mut self.loose) {
            self.late(&mut parts, loose);
        }
        self.machine.record.parts = parts;
    }

    fn speeds(&mut self, parts: &mut [Vec<(String, String)>], description: &str) {
        let Some((reading, column, text)) = self.speed.take() else {
            return;
        };
        let rpm = reading.candidates.first().map(|(_, base)| {
            crate::quantity::convert::to_rpm(crate::quantity::Measure::from_base(*base))
        });
        let motor = rpm.is_some_and(is_motor_speed) && is_geared(description, &self.name);
        if motor {
            let says = format!(
                "{} is the speed of a motor; a machine such as this is driven through a gear: is it the speed of the driven shaft?",
                reading.value.clone().unwrap_or_default()
            );
            self.say(Kind::Question, Some(column), &text, says);
        }
        let Some(written) = reading.written(&text) else {
            return;
        };
        if parts.is_empty() {
            if !motor {
                let says =
                    "no bearing is named that this speed could belong to: of which shaft is it?";
                self.say(Kind::Question, Some(column), &text, says);
            }
            return;
        }
        for part in parts {
            part.push(("speed".into(), written.clone()));
        }
    }

    /// Gears, components and others whose keys have columns of their own.
    fn stated_parts(&mut self, parts: &mut Vec<Vec<(String, String)>>, description: &str) {
        let loose = std::mem::take(&mut self.loose);
        let kinds: Vec<&'static str> = loose.iter().fold(Vec::new(), |mut kinds, l| {
            if !kinds.contains(&l.part) {
                kinds.push(l.part);
            }
            kinds
        });
        let geared = is_geared(description, &self.name);
        let mut rest = Vec::new();
        let mut by_kind: Vec<(&'static str, Vec<Loose<'r>>)> =
            kinds.iter().map(|k| (*k, Vec::new())).collect();
        for one in loose {
            if let Some((_, list)) = by_kind.iter_mut().find(|(k, _)| *k == one.part) {
                list.push(one);
            }
        }
        for (kind, list) in by_kind {
            let first = list
                .iter()
                .find(|l| l.key == kind)
                .map(|l| l.written.clone());
            let proves = |l: &Loose<'_>| !matches!(l.key, "power" | "speed" | "pressure" | "load");
            let stands = match kind {
                "component" => first.is_some(),
                "rolling bearing" => first.is_some() || !parts.is_empty(),
                _ => list.iter().any(proves) || (geared && kind == "gear mesh" && list.len() > 1),
            };
            if !stands {
                rest.extend(list);
                continue;
            }
            if kind == "rolling bearing" && first.is_none() {
                for part in parts.iter_mut().filter(|p| p[0].0 == "rolling bearing") {
                    part.extend(list.iter().map(|l| (l.key.to_owned(), l.written.clone())));
                }
                continue;
            }
            let label = first.unwrap_or_else(|| "as in the register".into());
            let mut part = vec![(kind.to_owned(), label)];
            part.extend(
                list.iter()
                    .filter(|l| l.key != kind)
                    .map(|l| (l.key.to_owned(), l.written.clone())),
            );
            parts.push(part);
        }
        self.loose = rest;
    }

    /// A part from the words of the row; a contact of which nothing is known where there are none.
    fn described(&mut self, description: &str) -> Vec<(String, String)> {
        match component(description, &self.name, self.oil.as_ref()) {
            Some(taken) => {
                let by = if taken.by_lubricant {
                    "its lubricant".to_owned()
                } else {
                    format!("\"{description}\"")
                };
                let says = format!("no part is named: {} is taken from {by}", taken.id);
                self.machine.record.notes.push(format!("parts: {says}"));
                self.say(Kind::ReadAs, None, description, says);
                vec![("component".into(), taken.id.into())]
            }
            None => {
                self.say(Kind::Question, None, description, "what does its lubricant serve? No part is named and the description tells none");
                vec![("contact".into(), "not stated".into())]
            }
        }
    }

    /// A value whose part is none of its own: to a part that takes it, else a note.
    fn late(&mut self, parts: &mut [Vec<(String, String)>], loose: Loose<'_>) {
        let takes = |part: &Vec<(String, String)>| {
            part[0].0 == loose.part
                && !part.iter().any(|(k, _)| k == loose.key)
                && !(loose.part == "component"
                    && loose.key == "pressure"
                    && !part[0].1.starts_with("hyd_"))
        };
        if let Some(part) = parts.iter_mut().find(|p| takes(p)) {
            part.push((loose.key.to_owned(), loose.written));
        } else {
            self.machine
                .record
                .notes
                .push(format!("{}: {}", loose.column.heading, loose.written));
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
