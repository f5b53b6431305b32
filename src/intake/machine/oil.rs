//! The lubricant of a row, and facts its remarks tell.

use super::RowReader;
use crate::input::keys::Form;
use crate::intake::describe::is_food;
use crate::intake::finding::Kind;
use crate::intake::{lubricant, words};

impl RowReader<'_, '_> {
    pub(super) fn lubricant(&mut self, text: Option<&str>) {
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

    pub(super) fn facts(&mut self) {
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
}
