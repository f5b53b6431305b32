//! Keys of the site file.

use super::form::{Form, RISE, Refers, TIME, one};
use super::machine::{AREA, MACHINE};
use super::{Key, Record, key};
use crate::input::value::Want;
use crate::quantity::Kind;

const STEP: &[Kind] = &[Kind::VgStep];

/// The top of the site file.
pub static SITE: Record = Record {
    name: "the site file",
    also: &[],
    must: &["file", "machines"],
    keys: SITE_KEYS,
};

#[rustfmt::skip]
const SITE_KEYS: &[Key] = &[
    key("file", Form::FileKind, "error", "Which kind of file this is, and of which edition of the format."),
    key("site", Form::Text, "left out of the frame", "Name of the site, printed in the frame of every sheet."),
    key("client", Form::Text, "left out of the frame", "For whom the sheets are made."),
    key("document", Form::Text, "left out of the frame", "Document number of the sheets."),
    key("revision", Form::Text, "left out of the frame", "Revision of the sheets."),
    key("author", Form::Text, "left out of the frame", "Who answers for the sheets."),
    key("status", Form::Text, "left out of the frame", "State of the document, as `for review`."),
    key("reviewed", Form::Day, "today", "Day of the judgement: ages of samples and acceptances count to it."),
    key("notes", Form::Markdown, "–", "Remarks printed on the overview."),
    key("logo", Form::Path, "–", "SVG or PNG file embedded in the frame."),
    key("currency", Form::Text, "prices without a unit of money", "Unit of money of the prices."),
    key("house", Form::Record(&HOUSE), "–", "Values and rules of the site's own."),
    key("areas", Form::Named(&AREA), "–", "Places on the site, with what machines there inherit."),
    key("machines", Form::Named(&MACHINE), "error", "The machines, by tag."),
    key("accept", Form::List(&ACCEPT), "–", "Tight verdicts somebody answers for."),
    key("expect", Form::List(&EXPECT), "–", "Verdicts `check` compares with those worked out."),
];

/// House values.
#[rustfmt::skip]
pub static HOUSE: Record = Record {
    name: "house",
    also: &[],
    must: &[],
    keys: &[
        key("reserve", one(STEP), "0.5 step", "Margin asked beyond every viscosity limit."),
        key("pour margin", Form::Quantity(Want::one(RISE).such_as("5 K")), "by lubrication", "Least difference between start temperature and pour point."),
        key("sample age", Form::Quantity(Want::one(TIME).such_as("12 months")), "12 months", "Age beyond which a sample says nothing about the oil in use."),
        key("rules", Form::Named(&HOUSE_RULE), "–", "House rules by name; a part takes one with `rule`."),
    ],
};

/// A house rule.
#[rustfmt::skip]
pub static HOUSE_RULE: Record = Record {
    name: "a house rule",
    also: &[],
    must: &["limit"],
    keys: &[
        key("replaces", Form::Name(Refers::Rule), "adds a limit", "Rule of the program it stands in for."),
        key("limit", Form::HouseLimit, "error", "What it asks."),
        key("for", Form::Text, "all oils", "Additive or class an oil needs for the rule to hold."),
        key("source", Form::Text, "–", "Where the rule comes from."),
    ],
};

/// The acceptance of a tight verdict.
#[rustfmt::skip]
pub static ACCEPT: Record = Record {
    name: "an acceptance",
    also: &[],
    must: &["machine", "oil", "by", "on", "until", "because"],
    keys: &[
        key("machine", Form::Name(Refers::Point), "error", "The point accepted."),
        key("oil", Form::Name(Refers::Oil), "error", "The oil accepted on it."),
        key("verdict", Form::Word(&["tight"]), "tight", "The verdict accepted."),
        key("by", Form::Text, "error", "Who accepts it, by name or role."),
        key("on", Form::Day, "error", "From which day."),
        key("until", Form::Day, "error", "Until which day; then the machine is open work again."),
        key("because", Form::Text, "error", "Why it can be lived with."),
    ],
};

/// An expected verdict.
#[rustfmt::skip]
pub static EXPECT: Record = Record {
    name: "an expectation",
    also: &[],
    must: &["machine", "oil", "verdict"],
    keys: &[
        key("machine", Form::Name(Refers::Point), "error", "The point."),
        key("oil", Form::Name(Refers::Oil), "error", "The oil."),
        key("verdict", Form::Word(&["holds", "tight", "fails", "open", "barred"]), "error", "The word expected."),
    ],
};
