//! Every rule entry as it is written, for reading: kind, id, and its fields in order.

use crate::assets::Layer;
use serde_yaml::Value;

/// One entry of the rules.
#[derive(Clone, Debug, PartialEq)]
pub struct Listed {
    /// Kind of entry: `suitability`.
    pub kind: String,
    /// Its id.
    pub id: String,
    /// Its title or name; empty where it has none.
    pub title: String,
    /// Its other fields, in the order written.
    pub says: Vec<(String, String)>,
    /// The file it stands in.
    pub file: String,
}

impl Listed {
    /// A field by name.
    pub fn field(&self, name: &str) -> Option<&str> {
        self.says
            .iter()
            .find(|(k, _)| k == name)
            .map(|(_, v)| v.as_str())
    }
}

/// All entries of all layers; an entry of a later layer stands in the place of the earlier one
/// of the same kind and id. Files that are not understood are left to the reader of the rulebook.
pub fn listing(layers: &[Layer]) -> Vec<Listed> {
    let mut all: Vec<Listed> = Vec::new();
    for layer in layers {
        for file in &layer.files {
            for entry in entries(&file.path, &file.text) {
                match all
                    .iter_mut()
                    .find(|e| e.kind == entry.kind && e.id == entry.id)
                {
                    Some(old) => *old = entry,
                    None => all.push(entry),
                }
            }
        }
    }
    all.sort_by(|a, b| a.kind.cmp(&b.kind));
    all
}

fn entries(path: &str, text: &str) -> Vec<Listed> {
    let is_page = std::path::Path::new(path)
        .extension()
        .is_some_and(|e| e == "md");
    if let Some(front) = text.strip_prefix("---\n").filter(|_| is_page) {
        let (head, body) = front.split_once("\n---").unwrap_or((front, ""));
        let Ok(value) = serde_yaml::from_str::<Value>(head) else {
            return Vec::new();
        };
        let mut entry = listed("cautions", &value, path);
        entry.says.push(("text".to_owned(), body.trim().to_owned()));
        return vec![entry];
    }
    let Ok(Value::Mapping(top)) = serde_yaml::from_str::<Value>(text) else {
        return Vec::new();
    };
    let heading = top.get("file").map(plain).unwrap_or_default();
    let kind = heading
        .rsplit_once(' ')
        .map_or(heading.as_str(), |(k, _)| k)
        .to_owned();
    match top.get("entries") {
        Some(Value::Sequence(list)) => list.iter().map(|v| listed(&kind, v, path)).collect(),
        _ => Vec::new(),
    }
}

fn listed(kind: &str, value: &Value, path: &str) -> Listed {
    let mut entry = Listed {
        kind: kind.to_owned(),
        id: String::new(),
        title: String::new(),
        says: Vec::new(),
        file: path.to_owned(),
    };
    if let Value::Mapping(fields) = value {
        for (key, field) in fields {
            let (key, text) = (plain(key), plain(field));
            match key.as_str() {
                "id" => entry.id = text,
                "title" | "name" if entry.title.is_empty() => entry.title = text,
                _ => entry.says.push((key, text)),
            }
        }
    }
    entry
}

/// A value in one line.
fn plain(value: &Value) -> String {
    match value {
        Value::Null => String::new(),
        Value::Bool(b) => if *b { "yes" } else { "no" }.to_owned(),
        Value::Number(n) => n.to_string(),
        Value::String(s) => s.trim().to_owned(),
        Value::Sequence(list) => list.iter().map(plain).collect::<Vec<_>>().join("; "),
        Value::Mapping(map) => map
            .iter()
            .map(|(k, v)| format!("{} {}", plain(k), plain(v)))
            .collect::<Vec<_>>()
            .join(", "),
        Value::Tagged(tagged) => plain(&tagged.value),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_built_in_entry_is_listed_with_id_and_source() {
        let all = listing(&[crate::assets::builtin_rules()]);
        assert!(all.len() > 200, "{}", all.len());
        for entry in &all {
            assert!(!entry.id.is_empty(), "{} in {}", entry.kind, entry.file);
        }
    }
}
