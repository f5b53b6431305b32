//! Cells that belong to a part: bearings, speeds, gears.

use super::{Loose, RowReader, SPEED};
use crate::input::keys::Form;
use crate::intake::cell::{Reading, text_of};
use crate::intake::finding::Kind;
use crate::intake::layout::Column;
use crate::intake::words;
use crate::relation::bearing::designation::{DimensionTable, read as designated};
use crate::table::Content;

impl<'r> RowReader<'r, '_> {
    pub(super) fn motor_speed(&mut self, column: &Column, content: &Content) {
        if let Some(reading) = self.quantity(column, content, "motor speed", &SPEED) {
            let value = reading.value.unwrap_or_default();
            let says = format!(
                "the motor runs at {value}: what is the ratio, and how fast does the driven shaft turn?"
            );
            self.say(Kind::Question, Some(column), &content.text(), says);
        }
    }

    pub(super) fn bearing(&mut self, column: &Column, content: &Content) {
        let text = match text_of(content) {
            Ok(text) => text,
            Err(why) => {
                self.tell(column, content, Reading::fault(why));
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
        let list: &[String] = if apart.len() > 1 && known(&apart) {
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

    pub(super) fn part(
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
}
