//! Every key of every file: one table from which the reader, `help keys` and the editor schemas
//! are made, so that they cannot differ.

pub mod form;
pub mod list;
pub mod machine;
pub mod oil;
pub mod part;
pub mod samples;
pub mod site;

pub use form::{Form, Refers};

use crate::problem::suggest;

/// One key of a record.
#[derive(Debug)]
pub struct Key {
    /// Its name, with spaces.
    pub name: &'static str,
    /// What it takes.
    pub form: Form,
    /// What stands in where it is not stated; `–` for nothing.
    pub unstated: &'static str,
    /// What it is, in one sentence.
    pub says: &'static str,
}

/// A record: what may stand under one name.
#[derive(Debug)]
pub struct Record {
    /// With its article: "a machine".
    pub name: &'static str,
    /// Its own keys.
    pub keys: &'static [Key],
    /// Records whose keys it has as well.
    pub also: &'static [&'static Record],
    /// Keys that must be there.
    pub must: &'static [&'static str],
}

impl Record {
    /// Every key, those of the records it takes in included.
    pub fn all(&'static self) -> impl Iterator<Item = &'static Key> {
        let own = self.keys.iter();
        own.chain(self.also.iter().flat_map(|r| r.keys))
    }

    /// The key of that name, however its words are parted.
    pub fn key(&'static self, written: &str) -> Option<&'static Key> {
        let name = spelt(written);
        self.all().find(|k| k.name == name)
    }

    /// The key certainly meant by a name that is none.
    pub fn meant(&'static self, written: &str) -> Option<&'static str> {
        suggest::certain(&spelt(written), self.all().map(|k| k.name))
    }
}

/// A key as the table spells it: underscores are spaces.
pub fn spelt(written: &str) -> String {
    written.trim().replace('_', " ")
}

/// Whether a key is kept and ignored.
pub fn is_private(written: &str) -> bool {
    written.trim_start().starts_with("x-")
}

/// A right value of a key, as it would be written.
pub fn example(key: &Key) -> String {
    match key.form {
        Form::FileKind => "site 1".into(),
        Form::Quantity(want) => want.example(),
        Form::Word(words) | Form::Words(words) => words.first().copied().unwrap_or("").into(),
        Form::YesNo | Form::YesNoOr(_) => "yes".into(),
        Form::Day => "2026-07-18".into(),
        Form::Whole => "1".into(),
        Form::HouseLimit => "kappa >= 0.4".into(),
        Form::Price => "3.10 per L".into(),
        Form::Teeth => "19 / 68".into(),
        Form::Grade => "ISO VG 220".into(),
        Form::Cleanliness => "-/17/14".into(),
        Form::Points => "[220 mm2/s at 40 degC, 19.0 mm2/s at 100 degC]".into(),
        Form::ColdPoints => "[6500 mPa.s at -25 degC]".into(),
        Form::Bearing => "22220".into(),
        Form::Parts => "[{ rolling bearing: 22220 }]".into(),
        Form::Named(record) if record.name == "a machine" => {
            "{ GB-1: { parts: [{ rolling bearing: 22220, speed: 1480 r/min }] } }".into()
        }
        Form::Named(_) | Form::Fills | Form::Record(_) | Form::Table => "{ }".into(),
        Form::List(_) => "[ ]".into(),
        _ => "NAME".into(),
    }
}

/// Groups of keys that state one thing: a value of one takes the place of all.
pub const TOGETHER: &[&[&str]] = &[
    &["sump rise", "sump", "at ambient"],
    &["radial clearance", "diametral clearance"],
    &["power", "pinion torque"],
    &["worm speed", "speed"],
    &["sheared", "shear loss", "PSSI"],
];

/// A shorter way to write a row of a table.
pub(crate) const fn key(
    name: &'static str,
    form: Form,
    unstated: &'static str,
    says: &'static str,
) -> Key {
    Key {
        name,
        form,
        unstated,
        says,
    }
}

/// Every record of every file, in the order `help keys` prints them.
pub fn records() -> Vec<&'static Record> {
    let mut all = vec![
        &site::SITE,
        &site::HOUSE,
        &site::HOUSE_RULE,
        &machine::AREA,
        &machine::MACHINE,
        &machine::LOSSES,
        &machine::REGREASE,
        &machine::USED_OIL,
        &part::PART,
        &part::GEAR,
        &part::DRIVE,
    ];
    all.extend(part::KINDS.iter().map(|k| k.record));
    all.extend([
        &part::BEARING_SIZES,
        &site::ACCEPT,
        &site::EXPECT,
        &oil::OIL,
        &samples::SAMPLES,
        &samples::COLUMNS,
        &samples::EVENTS,
        &samples::EVENT,
    ]);
    all
}

/// The records, other than one, that have a key of that name.
pub fn owners(name: &str, except: &Record) -> Vec<&'static Record> {
    let mut found: Vec<&'static Record> = Vec::new();
    for record in records() {
        let known = found.iter().any(|r| r.name == record.name) || record.name == except.name;
        if !known && record.keys.iter().any(|k| k.name == name) {
            found.push(record);
        }
    }
    found
}

#[cfg(test)]
mod tests;
