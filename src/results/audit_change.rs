//! Findings closed, new and standing between two audits, from their JSON documents.

use super::csv::{Cell, Table};
use super::json::{self, Head, document};
use serde_json::{Value, json};
use std::collections::BTreeMap;

/// A finding as an audit's document has it.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Noted {
    /// Its stable name.
    pub kind: String,
    /// `watch` or `act`.
    pub level: String,
    /// Its machines.
    pub machines: String,
    /// What was the matter.
    pub title: String,
    /// In the older audit, where the level or the title was another.
    pub before: Option<String>,
}

/// What became of the findings.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct AuditChange {
    /// Days of the two audits.
    pub dates: (String, String),
    /// Findings of the older audit that the newer has not.
    pub closed: Vec<Noted>,
    /// Findings of the newer audit that the older has not.
    pub new: Vec<Noted>,
    /// Findings of both.
    pub standing: Vec<Noted>,
}

/// Whether a text is the document of an audit.
pub fn read(text: &str) -> Option<Value> {
    let value: Value = serde_json::from_str(text).ok()?;
    (value["format"] == "filmwright.audit 1").then_some(value)
}

/// What became of the findings between two audits.
pub fn between(old: &Value, new: &Value) -> AuditChange {
    let (before, after) = (findings(old), findings(new));
    let mut change = AuditChange {
        dates: (text_of(old, "date"), text_of(new, "date")),
        ..AuditChange::default()
    };
    for (key, noted) in &before {
        if !after.contains_key(key) {
            change.closed.push(noted.clone());
        }
    }
    for (key, noted) in after {
        match before.get(&key) {
            None => change.new.push(noted),
            Some(was) => {
                let moved = was.level != noted.level || was.title != noted.title;
                let before = moved.then(|| format!("{}: {}", was.level, was.title));
                change.standing.push(Noted { before, ..noted });
            }
        }
    }
    change
}

fn text_of(value: &Value, key: &str) -> String {
    value[key].as_str().unwrap_or_default().to_owned()
}

/// Findings by machines and kind: what stands on the same machine for the same reason is the same.
fn findings(document: &Value) -> BTreeMap<(String, String), Noted> {
    let list = document["findings"].as_array().into_iter().flatten();
    list.map(|f| {
        let machines = f["machines"].as_array().into_iter().flatten();
        let machines: Vec<&str> = machines.filter_map(Value::as_str).collect();
        let noted = Noted {
            kind: text_of(f, "kind"),
            level: text_of(f, "level"),
            machines: machines.join(", "),
            title: text_of(f, "title"),
            before: None,
        };
        ((noted.machines.clone(), noted.kind.clone()), noted)
    })
    .collect()
}

impl AuditChange {
    fn lists(&self) -> [(&'static str, &[Noted]); 3] {
        [
            ("closed", &self.closed),
            ("new", &self.new),
            ("standing", &self.standing),
        ]
    }

    /// As text.
    pub fn text(&self) -> String {
        use std::fmt::Write as _;
        let mut out = format!(
            "{} findings closed, {} new, {} standing, audits of {} and {}\n",
            self.closed.len(),
            self.new.len(),
            self.standing.len(),
            self.dates.0,
            self.dates.1
        );
        for (name, list) in self.lists() {
            if list.is_empty() {
                continue;
            }
            let _ = writeln!(out, "\n{name}");
            for f in list {
                let _ = write!(out, "  {:<5}  {}: {}", f.level, f.machines, f.title);
                if let Some(before) = &f.before {
                    let _ = write!(out, " (was {before})");
                }
                out.push('\n');
            }
        }
        out
    }

    /// As a JSON document.
    pub fn document(&self, head: &Head) -> String {
        let mut top = document("compare", head);
        let mut changes = Vec::new();
        for (name, list) in self.lists() {
            changes.extend(list.iter().map(|f| {
                json!({
                    "finding": name,
                    "kind": f.kind,
                    "level": f.level,
                    "machines": f.machines,
                    "title": f.title,
                    "before": f.before,
                })
            }));
        }
        top.insert("between".into(), json!([self.dates.0, self.dates.1]));
        top.insert("changes".into(), Value::Array(changes));
        json::text(top)
    }

    /// As a table.
    pub fn table(&self) -> Table {
        let mut table = Table {
            headings: ["finding", "kind", "level", "machines", "title", "before"]
                .map(str::to_owned)
                .to_vec(),
            rows: Vec::new(),
        };
        for (name, list) in self.lists() {
            table.rows.extend(list.iter().map(|f| {
                vec![
                    Cell::from(name),
                    Cell::from(f.kind.as_str()),
                    Cell::from(f.level.as_str()),
                    Cell::from(f.machines.as_str()),
                    Cell::from(f.title.as_str()),
                    Cell::maybe(f.before.as_deref()),
                ]
            }));
        }
        table
    }
}
