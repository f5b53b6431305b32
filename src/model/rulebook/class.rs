//! Classes of lubricants, which class serves where another is wanted, and what components need.

use super::condition::Clause;
use super::provenance::{Confidence, Provenance};
use super::suitability::Level;
use super::table::{Entry, Table, entry};
use crate::quantity::ThermodynamicTemperature;
use std::collections::{BTreeMap, VecDeque};

/// A class, or an additive family that can be asked for like one.
#[derive(Clone, Debug, PartialEq)]
pub struct Class {
    /// The symbol: `CKC`, `HLP`, `EP`.
    pub id: String,
    /// Other spellings.
    pub also: Vec<String>,
    /// What it belongs to: `gear`, `hydraulic`, `additive family`.
    pub group: String,
    /// Standard that defines it.
    pub standard: String,
    /// What it means.
    pub meaning: String,
    /// Where it is used.
    pub usage: Option<String>,
    /// What the standard asks of it, in words.
    pub needs: Option<String>,
    /// Coldest and hottest use; an end may be open.
    pub limits: Option<(
        Option<ThermodynamicTemperature>,
        Option<ThermodynamicTemperature>,
    )>,
    /// Whether it is withdrawn and met only on nameplates.
    pub withdrawn: bool,
    /// Classes it may stand in for.
    pub contains: Vec<Contains>,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(Class, |c| c.also.iter().map(String::as_str).collect());

/// One class contained in another.
#[derive(Clone, Debug, PartialEq)]
pub struct Contains {
    /// The contained class, by id.
    pub class: String,
    /// Why, in words.
    pub why: String,
    /// Sources; those of the class where none are given.
    pub source: Vec<String>,
    /// How sure that is.
    pub confidence: Confidence,
}

/// Why a declared class serves a wanted one.
#[derive(Clone, Debug, PartialEq)]
pub struct Because {
    /// The declared class.
    pub declared: String,
    /// The wanted class.
    pub wanted: String,
    /// The chain from one to the other, both ends included.
    pub chain: Vec<String>,
    /// The reason in words.
    pub reason: String,
    /// Sources along the chain.
    pub source: Vec<String>,
    /// The weakest confidence along the chain.
    pub confidence: Confidence,
}

/// Which class serves which, along chains of containment.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Serving {
    pairs: BTreeMap<String, BTreeMap<String, Because>>,
}

impl Serving {
    /// Works out every chain. A shorter chain is preferred to a longer one; a chain with a link
    /// of low confidence is left out, because barring and admitting both hang on it.
    pub fn of(classes: &Table<Class>) -> Self {
        let mut pairs = BTreeMap::new();
        for class in classes {
            pairs.insert(class.id.clone(), reach(class, classes));
        }
        Self { pairs }
    }

    /// Why the one serves the other, both by id.
    pub fn between(&self, declared: &str, wanted: &str) -> Option<&Because> {
        self.pairs.get(declared)?.get(wanted)
    }

    /// Everything a declared class serves.
    pub fn served_by(&self, declared: &str) -> impl Iterator<Item = &Because> {
        self.pairs
            .get(declared)
            .into_iter()
            .flat_map(BTreeMap::values)
    }
}

fn reach(from: &Class, classes: &Table<Class>) -> BTreeMap<String, Because> {
    let itself = Because {
        declared: from.id.clone(),
        wanted: from.id.clone(),
        chain: vec![from.id.clone()],
        reason: format!("{} is declared", from.id),
        source: from.provenance.source.clone(),
        confidence: from.provenance.confidence.max(Confidence::Medium),
    };
    let mut found = BTreeMap::from([(from.id.clone(), itself)]);
    let mut queue = VecDeque::from([from.id.clone()]);
    while let Some(at) = queue.pop_front() {
        let Some(class) = classes.get(&at) else {
            continue;
        };
        for link in &class.contains {
            if link.confidence == Confidence::Low || found.contains_key(&link.class) {
                continue;
            }
            let next = extended(&found[&at], link);
            found.insert(link.class.clone(), next);
            queue.push_back(link.class.clone());
        }
    }
    found
}

fn extended(because: &Because, link: &Contains) -> Because {
    let mut next = because.clone();
    next.wanted.clone_from(&link.class);
    next.chain.push(link.class.clone());
    next.reason = if because.chain.len() == 1 {
        link.why.clone()
    } else {
        format!("{}; {}", because.reason, link.why)
    };
    if because.chain.len() == 1 {
        next.source.clear();
        next.confidence = link.confidence;
    }
    for source in &link.source {
        if !next.source.contains(source) {
            next.source.push(source.clone());
        }
    }
    next.confidence = next.confidence.min(link.confidence);
    next
}

/// What a component or a circumstance needs by class.
#[derive(Clone, Debug, PartialEq)]
pub struct Need {
    /// Its id.
    pub id: String,
    /// What it is, in words.
    pub title: String,
    /// When it applies beyond the components that name it; empty: only by those.
    pub when: Vec<Clause>,
    /// What happens to an oil that declares classes none of which serves.
    pub level: Level,
    /// Any of these serves.
    pub served_by: Vec<String>,
    /// Any of these may serve, with leave.
    pub with_leave: Vec<String>,
    /// Why.
    pub why: String,
    /// What to do where only leave serves, or nothing is declared.
    pub act: String,
    /// Group of classes; a class of this group asked for by the maker takes the need's place.
    pub group: String,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(Need);

/// A designation without its standard's prefix, in capitals, spaces single.
pub fn plain(written: &str) -> String {
    let upper = written.to_uppercase();
    let words: Vec<&str> = upper.split_whitespace().collect();
    let mut text = words.join(" ");
    for prefix in [
        "ISO-L-",
        "ISO L-",
        "L-",
        "ISO ",
        "DIN 51524 ",
        "DIN 51517 ",
        "DIN ",
        "API ",
    ] {
        if let Some(rest) = text.strip_prefix(prefix)
            && !rest.starts_with(|c: char| c.is_ascii_digit())
        {
            text = rest.to_owned();
        }
    }
    text
}

/// The class a numbered grade belongs to: `SAE 15W-40` is an engine grade, `AGMA 7 COMP` a
/// compounded gear oil.
pub fn family_of(plain: &str) -> Option<&'static str> {
    if let Some(grade) = plain.strip_prefix("SAE ") {
        let digits: String = grade.chars().take_while(char::is_ascii_digit).collect();
        let number: u32 = digits.parse().ok()?;
        // J300 ends at 60, J306 begins at 65W
        return Some(if number >= 65 {
            "SAE gear grade"
        } else {
            "SAE engine grade"
        });
    }
    let agma = plain.strip_prefix("AGMA ")?;
    Some(if agma.contains("COMP") {
        "AGMA compounded"
    } else if agma.contains("EP") {
        "AGMA EP"
    } else {
        "AGMA inhibited"
    })
}

/// A class without the ISO VG number behind it: `CLP 220` is `CLP`.
pub fn without_grade(plain: &str) -> Option<&str> {
    let (class, grade) = plain.rsplit_once([' ', '-'])?;
    let is_grade = !grade.is_empty() && grade.bytes().all(|b| b.is_ascii_digit());
    is_grade.then_some(class)
}

impl Class {
    /// Whether it is an additive family and not a class of a standard.
    pub fn is_family(&self) -> bool {
        self.group == "additive family"
    }
}

/// The additive families a class carries, by id.
pub fn families<'c>(
    class: &str,
    serving: &'c Serving,
    classes: &'c Table<Class>,
) -> impl Iterator<Item = &'c str> {
    serving
        .served_by(class)
        .filter_map(|b| classes.get(&b.wanted))
        .filter(|c| c.is_family())
        .map(Entry::id)
}
