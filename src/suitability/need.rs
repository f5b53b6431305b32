//! Class needs: what the maker or the duty asks for, and what a component implies.

use super::card::{OilCard, PointCard};
use super::compiled::Compiled;
use super::declared::{ClassSet, Declared};
use super::explain::sentence;
use super::mixing::Tables;
use super::need_text::{declared_text, need_text};
use super::truth::Truth;
use super::value::Context;
use super::{FactGap, Finding};
use crate::model::facts::Use;
use crate::model::rulebook::class::{families, plain};
use crate::model::rulebook::{Confidence, Entry, Level, Need, Rulebook};

/// One need of a point.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Want {
    whose: Whose,
    accept: ClassSet,
    leave: ClassSet,
    /// Whether every class that serves carries an additive family, so that an oil stated to have
    /// no additives cannot be one.
    carries: bool,
}

#[derive(Clone, Debug, PartialEq)]
enum Whose {
    /// Asked for by the maker or the duty.
    Asked(Asked),
    /// Implied by a component or a circumstance; the place of the need.
    Implied(usize),
}

/// A class or an additive family asked for by name.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Asked {
    pub(super) written: String,
    plain: String,
    /// The class it means, where the rulebook knows one.
    class: Option<String>,
    /// Whether it is an additive family.
    family: bool,
    /// Whether it is a numbered grade, which only the same number meets.
    pub(super) numbered: bool,
}

/// How an oil answers a need.
pub(super) struct Answer {
    /// What follows; none where the need is met.
    pub(super) level: Option<Level>,
    how: How,
}

/// How the classes of an oil stand to a need.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum How {
    /// One of them serves.
    Met,
    /// One of them may serve, if somebody allows it.
    Leave,
    /// None of them serves.
    Short,
    /// Nothing is declared.
    Undeclared,
}

impl Want {
    pub(super) fn of_point(
        book: &Rulebook,
        compiled: &Compiled<'_>,
        point: &PointCard<'_>,
    ) -> Vec<Self> {
        let asked: Vec<Asked> = point
            .facts
            .asks_for
            .iter()
            .map(|written| Asked::of(book, written))
            .collect();
        let replaced = |need: &Need| asked.iter().any(|a| a.replaces(book, need));
        let implied: Vec<Self> = book
            .needs
            .iter()
            .enumerate()
            .filter(|(_, need)| applies(book, &compiled.tables, point, need) && !replaced(need))
            .map(|(place, _)| compiled.needs.implied[place].clone())
            .collect();
        let mut wants: Vec<Self> = asked
            .into_iter()
            .map(|asked| compiled.needs.asked(book, asked))
            .collect();
        wants.extend(implied);
        wants
    }

    pub(super) fn answer(&self, book: &Rulebook, oil: &OilCard<'_>) -> Answer {
        let has = &oil.declared;
        let how = if has.grease {
            How::Met
        } else {
            match &self.whose {
                Whose::Asked(asked) => asked.answer(self, has),
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
        } else if has.any_class || (has.bare && self.carries) {
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
            title: text.short,
            facts,
            act: sentence(&text.act),
            source: text.source,
            basis: text.basis,
            confidence: text.confidence,
            undecided,
        };
        Some((finding, gap))
    }
}

impl Asked {
    fn of(book: &Rulebook, written: &str) -> Self {
        let class = book.class_id(written).map(str::to_owned);
        let entry = class.as_ref().and_then(|id| book.classes.get(id));
        let plain = plain(written);
        Self {
            written: written.to_owned(),
            family: entry.is_some_and(crate::model::rulebook::Class::is_family),
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

    fn answer(&self, want: &Want, has: &Declared) -> How {
        if has.literals.contains(&self.plain) {
            return How::Met;
        }
        let stated = has.families.as_ref();
        let left_out = self.family && stated.is_some_and(|stated| !want.accept.meets(stated));
        if want.accept.meets(&has.tokens) {
            // the same scale with another number, or a class that may carry the family beside a
            // list of additives that does not name it: viscosity or the maker decides
            let leave = self.numbered || left_out;
            return if leave { How::Leave } else { How::Met };
        }
        if left_out || (has.bare && want.carries) || (has.any_class && self.class.is_some()) {
            How::Short
        } else {
            How::Undeclared
        }
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

/// What is worked out once about classes and needs.
pub(super) struct Needs {
    /// By class: every class that serves where it is wanted.
    servers: Vec<ClassSet>,
    /// By class: whether it carries an additive family.
    carries: Vec<bool>,
    /// By need: what a point that has it wants.
    implied: Vec<Want>,
}

impl Needs {
    pub(super) fn of(book: &Rulebook) -> Self {
        let classes = book.classes.len();
        let mut needs = Self {
            servers: vec![ClassSet::default(); classes],
            carries: vec![false; classes],
            implied: Vec::new(),
        };
        for (declared, class) in book.classes.iter().enumerate() {
            let served = book.serving.served_by(&class.id);
            for wanted in served.filter_map(|b| book.classes.place(&b.wanted)) {
                let set = std::mem::take(&mut needs.servers[wanted]);
                needs.servers[wanted] = set.with(declared);
            }
            needs.carries[declared] = families(&class.id, &book.serving, &book.classes)
                .next()
                .is_some();
        }
        let implied = book.needs.iter().enumerate();
        needs.implied = implied
            .map(|(place, need)| needs.implied(book, place, need))
            .collect();
        needs
    }

    fn implied(&self, book: &Rulebook, place: usize, need: &Need) -> Want {
        Want {
            whose: Whose::Implied(place),
            accept: self.serving_any(book, &need.served_by),
            leave: self.serving_any(book, &need.with_leave),
            carries: self.all_carry(book, &need.served_by),
        }
    }

    fn asked(&self, book: &Rulebook, asked: Asked) -> Want {
        let place = asked.class.as_ref().and_then(|id| book.classes.place(id));
        Want {
            accept: place
                .map(|place| self.servers[place].clone())
                .unwrap_or_default(),
            leave: ClassSet::default(),
            carries: place.is_some_and(|place| self.carries[place]),
            whose: Whose::Asked(asked),
        }
    }

    fn serving_any(&self, book: &Rulebook, classes: &[String]) -> ClassSet {
        let places = classes.iter().filter_map(|id| book.classes.place(id));
        places.fold(ClassSet::default(), |set, place| {
            set.and(&self.servers[place])
        })
    }

    /// Whether all of these classes carry a family, those apart whose meaning is not sure.
    fn all_carry(&self, book: &Rulebook, classes: &[String]) -> bool {
        let sure = |place: &usize| {
            let class = book.classes.at(*place);
            class.is_some_and(|c| c.provenance.confidence > Confidence::Low)
        };
        let places = classes.iter().filter_map(|id| book.classes.place(id));
        places.filter(sure).all(|place| self.carries[place])
    }
}
