//! Class needs: what the maker or the duty asks for, and what a component implies.

use super::card::{OilCard, PointCard};
use super::mixing::Tables;
use super::truth::Truth;
use super::value::Context;
use super::{FactGap, Finding};
use crate::model::facts::{Additive, OilFacts, Use};
use crate::model::oil::OilKind;
use crate::model::rulebook::class::{families, plain};
use crate::model::rulebook::{Basis, Confidence, Entry, Level, Need, Rulebook};
use crate::model::word::Word;

/// Classes of the rulebook as a set.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
struct ClassSet(Vec<u64>);

impl ClassSet {
    fn insert(&mut self, place: usize) {
        if self.0.len() <= place / 64 {
            self.0.resize(place / 64 + 1, 0);
        }
        self.0[place / 64] |= 1 << (place % 64);
    }

    fn meets(&self, other: &Self) -> bool {
        self.0.iter().zip(&other.0).any(|(a, b)| a & b != 0)
    }
}

/// What an oil declares, ready to be held against needs.
#[derive(Clone, Debug, PartialEq)]
pub struct Declared {
    tokens: ClassSet,
    /// As written, for grades the rulebook has no entry of its own for.
    literals: Vec<String>,
    any_class: bool,
    additives: Option<usize>,
    grease: bool,
}

impl Declared {
    pub(super) fn of(book: &Rulebook, facts: &OilFacts, classes: &[String]) -> Self {
        let mut tokens = ClassSet::default();
        let words = facts
            .additives
            .iter()
            .flatten()
            .map(|a: &Additive| a.word());
        let food = facts.food_class.map(Word::word);
        let environment = facts.environment.map(Word::word);
        for id in words.chain(food).chain(environment) {
            book.classes
                .place(id)
                .into_iter()
                .for_each(|p| tokens.insert(p));
        }
        for id in classes {
            book.classes
                .place(id)
                .into_iter()
                .for_each(|p| tokens.insert(p));
        }
        Self {
            tokens,
            literals: facts.classes.iter().map(|c| plain(c)).collect(),
            any_class: !facts.classes.is_empty(),
            additives: facts
                .additives
                .as_ref()
                .map(std::collections::BTreeSet::len),
            grease: facts.kind == Some(OilKind::Grease),
        }
    }

    fn anything(&self) -> bool {
        self.any_class || self.additives.is_some()
    }
}

/// One need of a point.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Want {
    whose: Whose,
    accept: ClassSet,
    leave: ClassSet,
}

#[derive(Clone, Debug, PartialEq)]
enum Whose {
    /// Asked for by the maker or the duty.
    Asked(Asked),
    /// Implied by a component or a circumstance; the place of the need.
    Implied(usize),
}

#[derive(Clone, Debug, PartialEq)]
struct Asked {
    written: String,
    plain: String,
    /// The class it means, where the rulebook knows one.
    class: Option<String>,
    /// Whether it is an additive family.
    family: bool,
    /// Whether that class carries an additive family, so that an oil without any cannot be it.
    carries: bool,
    /// Whether it is a numbered grade, which only the same number meets.
    numbered: bool,
}

/// How an oil answers a need.
pub(super) struct Answer {
    /// What follows; none where the need is met.
    pub(super) level: Option<Level>,
    how: How,
}

#[derive(Clone, Copy, Debug, PartialEq, Eq)]
enum How {
    Met,
    Leave,
    Short,
    Undeclared,
}

impl Want {
    pub(super) fn of_point(book: &Rulebook, tables: &Tables, point: &PointCard<'_>) -> Vec<Self> {
        let asked: Vec<Asked> = point
            .facts
            .asks_for
            .iter()
            .map(|written| Asked::of(book, written))
            .collect();
        let implied: Vec<usize> = (0..book.needs.len())
            .filter(|place| {
                book.needs.at(*place).is_some_and(|need| {
                    applies(book, tables, point, need)
                        && !asked.iter().any(|a| a.replaces(book, need))
                })
            })
            .collect();
        let asked = asked.into_iter().map(|asked| Self {
            accept: asked.class.iter().fold(ClassSet::default(), |set, class| {
                with_servers(set, book, class)
            }),
            leave: ClassSet::default(),
            whose: Whose::Asked(asked),
        });
        let implied = implied.into_iter().filter_map(|place| {
            let need = book.needs.at(place)?;
            let servers = |classes: &[String]| {
                let none = ClassSet::default();
                classes
                    .iter()
                    .fold(none, |set, c| with_servers(set, book, c))
            };
            Some(Self {
                whose: Whose::Implied(place),
                accept: servers(&need.served_by),
                leave: servers(&need.with_leave),
            })
        });
        asked.chain(implied).collect()
    }

    pub(super) fn answer(&self, book: &Rulebook, oil: &OilCard<'_>) -> Answer {
        let has = &oil.declared;
        let how = if has.grease {
            How::Met
        } else {
            match &self.whose {
                Whose::Asked(asked) => asked.answer(&self.accept, has),
                Whose::Implied(_) => self.implied(has),
            }
        };
        let level = match (&self.whose, how) {
            (_, How::Met) => None,
            (Whose::Asked(_), How::Short) => Some(Level::Bars),
            (Whose::Asked(_), How::Leave | How::Undeclared) => Some(Level::Asks),
            (Whose::Implied(place), how) => {
                book.needs
                    .at(*place)
                    .and_then(|need| match (need.level, how) {
                        (level, How::Short) => Some(level),
                        (Level::Notes, _) => None,
                        _ => Some(Level::Asks),
                    })
            }
        };
        Answer { level, how }
    }

    fn implied(&self, has: &Declared) -> How {
        if self.accept.meets(&has.tokens) {
            How::Met
        } else if self.leave.meets(&has.tokens) {
            How::Leave
        } else if has.any_class {
            How::Short
        } else {
            How::Undeclared
        }
    }

    /// The finding, and the gap where nothing is declared.
    pub(super) fn finding(
        &self,
        book: &Rulebook,
        oil: &OilCard<'_>,
    ) -> Option<(Finding, Option<FactGap>)> {
        let answer = self.answer(book, oil);
        let level = answer.level?;
        let text = match &self.whose {
            Whose::Asked(asked) => asked.text(oil, answer.how),
            Whose::Implied(place) => need_text(book.needs.at(*place)?, oil, answer.how),
        };
        let undecided = answer.how == How::Undeclared;
        let gap = undecided.then(|| FactGap {
            rule: text.rule.clone(),
            fact: None,
            says: "classes of the oil".into(),
            question: format!("which classes does {} meet?", oil.facts.id),
        });
        let facts = vec![declared_text(oil)];
        let finding = Finding {
            rule: text.rule,
            level,
            reason: format!("{}: {}; {}", text.title, facts[0], text.why),
            title: text.title,
            facts,
            act: text.act,
            source: text.source,
            basis: text.basis,
            confidence: text.confidence,
            undecided,
        };
        Some((finding, gap))
    }
}

struct Text {
    rule: String,
    title: String,
    why: String,
    act: String,
    source: Vec<String>,
    basis: Basis,
    confidence: Confidence,
}

impl Asked {
    fn of(book: &Rulebook, written: &str) -> Self {
        let class = book.class_id(written).map(str::to_owned);
        let entry = class.as_ref().and_then(|id| book.classes.get(id));
        let plain = plain(written);
        Self {
            written: written.to_owned(),
            family: entry.is_some_and(crate::model::rulebook::Class::is_family),
            carries: class
                .as_ref()
                .is_some_and(|id| families(id, &book.serving, &book.classes).next().is_some()),
            numbered: plain.starts_with("SAE "),
            plain,
            class,
        }
    }

    /// A class of the same group asked for by name takes the place of what a component implies.
    fn replaces(&self, book: &Rulebook, need: &Need) -> bool {
        let class = self.class.as_ref().and_then(|id| book.classes.get(id));
        class.is_some_and(|class| !class.is_family() && class.group == need.group)
    }

    fn answer(&self, accept: &ClassSet, has: &Declared) -> How {
        let named = has.literals.contains(&self.plain);
        let served = accept.meets(&has.tokens);
        match (self.numbered, named, served) {
            (_, true, _) | (false, _, true) => return How::Met,
            // the same scale, another number: viscosity decides, and the maker
            (true, false, true) => return How::Leave,
            _ => {}
        }
        let none_at_all = has.additives == Some(0) && self.carries;
        let family_left_out = self.family && has.additives.is_some();
        if family_left_out || none_at_all || (has.any_class && self.class.is_some()) {
            How::Short
        } else {
            How::Undeclared
        }
    }

    fn text(&self, oil: &OilCard<'_>, how: How) -> Text {
        let act = match how {
            How::Leave => format!(
                "ask the maker whether {} is meant to the number",
                self.written
            ),
            How::Undeclared => {
                format!(
                    "ask the supplier whether {} meets {}",
                    oil.facts.id, self.written
                )
            }
            How::Short | How::Met => format!("an oil that declares {}", self.written),
        };
        Text {
            rule: "class-asked".into(),
            title: format!("{} asked for", self.written),
            why: match how {
                How::Short => "none of it serves".into(),
                _ => "whether it serves is not known".into(),
            },
            act,
            source: vec!["the point's own record".into()],
            basis: Basis::Seen,
            confidence: Confidence::High,
        }
    }
}

fn need_text(need: &Need, oil: &OilCard<'_>, how: How) -> Text {
    Text {
        rule: need.id.clone(),
        title: need.title.clone(),
        why: match how {
            How::Short => format!(
                "none of {} is among them; {}",
                list(&need.served_by),
                need.why
            ),
            How::Leave => format!("it may serve with leave; {}", need.why),
            How::Undeclared | How::Met => need.why.clone(),
        },
        act: match how {
            How::Undeclared => format!(
                "ask the supplier which of {} {} meets",
                list(&need.served_by),
                oil.facts.id
            ),
            How::Short if need.level == Level::Bars => {
                format!("an oil that declares one of {}", list(&need.served_by))
            }
            _ => need.act.clone(),
        },
        source: need.provenance.source.clone(),
        basis: need.provenance.basis,
        confidence: need.provenance.confidence,
    }
}

fn list(classes: &[String]) -> String {
    classes.join(", ")
}

fn declared_text(oil: &OilCard<'_>) -> String {
    let facts = oil.facts;
    let additives: Vec<&str> = facts.additives.iter().flatten().map(|a| a.word()).collect();
    let id = &facts.id;
    match (facts.classes.is_empty(), &facts.additives) {
        (false, _) => format!("{id} declares {}", list(&facts.classes)),
        (true, Some(_)) if additives.is_empty() => {
            format!("{id} declares no class and has no additives")
        }
        (true, Some(_)) => {
            format!("{id} declares no class, additives {}", additives.join(", "))
        }
        (true, None) => format!("{id} declares neither class nor additives"),
    }
}

/// Whether a need applies to a point: a component names it, or its own conditions hold.
fn applies(book: &Rulebook, tables: &Tables, point: &PointCard<'_>, need: &Need) -> bool {
    let named = point
        .components
        .iter()
        .filter_map(|id| book.components.get(id))
        .any(|component| component.needs.iter().any(|id| id == need.id()));
    let context = Context {
        book,
        tables,
        point,
        oil: None,
        how: Use::Fill,
    };
    named || (!need.when.is_empty() && context.all(&need.when) == Truth::True)
}

/// Adds every class that serves where `wanted` is asked for.
fn with_servers(mut set: ClassSet, book: &Rulebook, wanted: &str) -> ClassSet {
    for (place, class) in book.classes.iter().enumerate() {
        if book.serving.between(&class.id, wanted).is_some() {
            set.insert(place);
        }
    }
    set
}

impl Declared {
    /// Whether the oil declares neither classes nor additives.
    pub fn nothing(&self) -> bool {
        !self.anything()
    }
}
