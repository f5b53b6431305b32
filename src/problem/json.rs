//! Problems for other programs: the same facts as the human form, as objects.

use super::{Edit, Problem};
use crate::source::{Place, SourceSet};
use serde_json::{Map, Value, json};

/// One problem as an object; what does not apply is left out.
///
/// `line` and `column` count from one; `start` and `end` of an edit count bytes from zero.
pub fn object(set: &SourceSet, problem: &Problem) -> Value {
    let mut out = Map::new();
    out.insert("code".into(), json!(problem.code.as_str()));
    out.insert("severity".into(), json!(problem.severity.word()));
    out.insert("message".into(), json!(problem.message));
    place_into(&mut out, set, &problem.place);
    let texts = [
        ("in", &problem.within),
        ("label", &problem.label),
        ("why", &problem.why),
        ("so", &problem.so),
        ("ask", &problem.ask),
        ("did_you_mean", &problem.did_you_mean),
    ];
    for (key, text) in texts {
        if let Some(text) = text {
            out.insert(key.into(), json!(text));
        }
    }
    if !problem.related.is_empty() {
        let related: Vec<Value> = problem
            .related
            .iter()
            .map(|(place, says)| {
                let mut at = Map::new();
                place_into(&mut at, set, place);
                at.insert("says".into(), json!(says));
                Value::Object(at)
            })
            .collect();
        out.insert("related".into(), Value::Array(related));
    }
    if !problem.write.is_empty() {
        let writes: Vec<Value> = problem
            .write
            .iter()
            .map(|w| {
                let edits: Vec<Value> = w.edits.iter().map(|e| edit(set, e)).collect();
                let mut one = Map::new();
                one.insert("write".into(), json!(w.shown(set).join("\n")));
                if let Some(remark) = &w.remark {
                    one.insert("remark".into(), json!(remark));
                }
                if !edits.is_empty() {
                    one.insert("edits".into(), Value::Array(edits));
                }
                Value::Object(one)
            })
            .collect();
        out.insert("write".into(), Value::Array(writes));
    }
    Value::Object(out)
}

fn edit(set: &SourceSet, edit: &Edit) -> Value {
    let path = set.file(edit.span.file).map_or("", |f| f.path.as_str());
    json!({"file": path, "start": edit.span.start, "end": edit.span.end, "text": edit.text})
}

fn place_into(out: &mut Map<String, Value>, set: &SourceSet, place: &Place) {
    match place {
        Place::Text(span) => {
            if let Some(file) = set.file(span.file) {
                let (line, column) = file.line_column(span.start);
                out.insert("file".into(), json!(file.path));
                out.insert("line".into(), json!(line));
                out.insert("column".into(), json!(column));
                out.insert("text".into(), json!(file.line(line)));
            }
        }
        Place::Cell(cell) => {
            let path = set.file(cell.file).map_or("", |f| f.path.as_str());
            out.insert("file".into(), json!(path));
            if !cell.sheet.is_empty() {
                out.insert("sheet".into(), json!(cell.sheet));
            }
            let name = crate::source::cell_name(cell.row, cell.column);
            out.insert("cell".into(), json!(name));
        }
        Place::Rule(id) => {
            out.insert("rule".into(), json!(id));
        }
        Place::Flag(name) => {
            out.insert("option".into(), json!(name));
        }
        Place::Program => {}
    }
}
