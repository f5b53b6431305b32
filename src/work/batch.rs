//! Many relations at once: JSON Lines in, JSON Lines out, in the same order.

use super::{Args, Refusal, json, relation, run};
use serde_json::{Map, Value as Json, json};

/// The answers to a batch.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Batch {
    /// One JSON object for each line that was not blank.
    pub lines: Vec<String>,
    /// How many of them are errors.
    pub refused: usize,
}

/// Works out a batch, one `{"relation": …, "with": {…}}` a line. A line that cannot be worked out
/// gets its error and does not stop the others; blank lines are passed over. An `id` on a line
/// comes back with its answer.
pub fn run_batch<'t>(lines: impl IntoIterator<Item = &'t str>) -> Batch {
    let mut batch = Batch::default();
    for line in lines.into_iter().filter(|l| !l.trim().is_empty()) {
        let (answer, refused) = run_line(line);
        batch.lines.push(answer);
        batch.refused += usize::from(refused);
    }
    batch
}

impl Batch {
    /// All answers, one a line.
    pub fn text(&self) -> String {
        self.lines.iter().fold(String::new(), |mut all, line| {
            all.push_str(line);
            all.push('\n');
            all
        })
    }
}

/// One relation with its inputs, as a line of the same form; and whether it was refused.
pub fn answer(name: &str, args: Args) -> (String, bool) {
    let outcome =
        relation(name).and_then(|row| run(row.name, args).map(|worked| json::answer(row, &worked)));
    let refused = outcome.is_err();
    (answered(None, &Json::from(name), outcome), refused)
}

/// The answer to one line, and whether it is an error.
pub fn run_line(line: &str) -> (String, bool) {
    let object = match read(line) {
        Ok(object) => object,
        Err(refusal) => return (answered(None, &Json::Null, Err(refusal)), true),
    };
    let relation = object.get("relation").cloned().unwrap_or_default();
    let outcome = work(&object);
    let refused = outcome.is_err();
    (answered(object.get("id"), &relation, outcome), refused)
}

fn answered(id: Option<&Json>, relation: &Json, outcome: Result<Json, Refusal>) -> String {
    let mut answer = Map::new();
    if let Some(id) = id {
        answer.insert("id".to_owned(), id.clone());
    }
    answer.insert("relation".to_owned(), relation.clone());
    match outcome {
        Ok(Json::Object(worked)) => answer.extend(worked),
        Ok(other) => drop(answer.insert("result".to_owned(), other)),
        Err(refusal) => {
            let error = json!({ "name": refusal.name, "message": refusal.message });
            answer.insert("error".to_owned(), error);
        }
    }
    Json::Object(answer).to_string()
}

fn malformed(words: impl Into<String>) -> Refusal {
    Refusal::new("line-malformed", words)
}

fn read(line: &str) -> Result<Map<String, Json>, Refusal> {
    match serde_json::from_str(line) {
        Ok(Json::Object(object)) => Ok(object),
        Ok(_) => Err(malformed("not a JSON object")),
        Err(e) => Err(malformed(format!("not a JSON object: {e}"))),
    }
}

fn work(line: &Map<String, Json>) -> Result<Json, Refusal> {
    let Some(name) = line.get("relation").and_then(Json::as_str) else {
        let words = "no relation; write {\"relation\": \"viscosity-index\", \"with\": {…}}";
        return Err(malformed(words));
    };
    let known = ["relation", "with", "id"];
    if let Some(key) = line.keys().find(|k| !known.contains(&k.as_str())) {
        let words = format!("`{key}` does not belong on a line; inputs go inside `with`");
        return Err(malformed(words));
    }
    let args = match line.get("with") {
        Some(Json::Object(with)) => Args::from_json(with)?,
        None => Args::default(),
        Some(_) => return Err(malformed("`with` is not an object")),
    };
    let worked = run(name, args)?;
    Ok(json::answer(relation(name)?, &worked))
}
