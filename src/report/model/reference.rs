//! The sheets to look things up on: changes, methods, rules, words.

use super::{Mark, Phrase};
use serde::{Deserialize, Serialize};

/// What moved since the last revision.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct RevisionPage {
    /// The revision compared with, and its date.
    pub since: String,
    /// What moved.
    pub rows: Vec<RevisionRow>,
    /// What else changed without moving a verdict.
    pub rest: String,
}

/// One change.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct RevisionRow {
    /// Machine, oil or `all machines`.
    pub what: Phrase,
    /// The verdict before.
    pub was_mark: Option<Mark>,
    /// What it was.
    pub was: String,
    /// The verdict now.
    pub is_mark: Option<Mark>,
    /// What it is.
    pub is: String,
    /// Why, worked out.
    pub because: Phrase,
}

/// One relation.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct Method {
    /// Id on its sheet.
    pub id: String,
    /// Its name in `work`.
    pub name: String,
    /// What it works out.
    pub title: String,
    /// The formula in plain text.
    pub formula: String,
    /// Range of use.
    pub range: String,
    /// Source.
    pub source: String,
    /// How it was validated here.
    pub validation: String,
    /// Where it is used.
    pub used_by: Phrase,
}

/// The relations used.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct MethodAppendix {
    /// The relations, by name.
    pub methods: Vec<Method>,
}

/// A rule of the house.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct HouseRule {
    /// `H-1`.
    pub id: String,
    /// Its name in the site file.
    pub name: String,
    /// What it says.
    pub says: Phrase,
    /// What it replaces.
    pub replaces: String,
    /// On whose word.
    pub source: String,
    /// Where it is used.
    pub used_by: Phrase,
}

/// A rule built in, or the user's in its place.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct RuleRow {
    /// Id on its sheet.
    pub id: String,
    /// The rule's id.
    pub rule: String,
    /// Its title.
    pub title: String,
    /// `bars`, `asks`, `notes`, or the end it limits.
    pub level: String,
    /// How sure it is.
    pub confidence: String,
    /// What it says, Markdown.
    pub says: String,
    /// Source.
    pub source: String,
    /// Whether a user's file stands in its place.
    pub replaced: bool,
}

/// The rules used in this run.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct RulesPage {
    /// The rules of the house.
    pub house: Vec<HouseRule>,
    /// The others.
    pub rules: Vec<RuleRow>,
}

/// A word beside those every glossary has.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct Term {
    /// The word.
    pub word: String,
    /// What it means here.
    pub means: Phrase,
}

/// The words used. Those for verdicts, states, margins and origins are part of the page.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct Glossary {
    /// Reserve asked on this site, as shown.
    pub reserve: String,
    /// Whether the audit's words are wanted.
    pub audit: bool,
    /// Further words.
    pub terms: Vec<Term>,
}
