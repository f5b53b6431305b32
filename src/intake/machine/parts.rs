//! The parts of a row: what is stated of them, else what its description says.

use super::{Loose, RowReader};
use crate::intake::describe::{component, is_geared, is_motor_speed};
use crate::intake::finding::Kind;

impl<'r> RowReader<'r, '_> {
    /// The parts of the row: what is stated of them, else what the description says.
    pub(super) fn parts(&mut self) {
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
                // Gears and worms are worked out as such, and their missing figures are gaps.
                match taken.id {
                    "gear_worm" => vec![("worm mesh".into(), "not stated".into())],
                    "gear_parallel_bevel" => vec![("gear mesh".into(), "not stated".into())],
                    id => vec![("component".into(), id.into())],
                }
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
