//! Suitability: what bars an oil from a point, what must be asked, what should be said.
//!
//! The rules are data ([`crate::model::rulebook`]); this engine weighs them. It runs for every
//! pair of point and oil, so what depends on the oil alone and on the point alone is worked out
//! once, into an [`OilCard`] and a [`PointCard`]; [`Suitability::screen`] then needs no
//! allocation, and [`Suitability::assess`] allocates only for what it finds.

mod card;
mod compiled;
mod declared;
mod explain;
mod mixing;
mod need;
mod need_text;
mod truth;
mod value;

pub use card::{OilCard, PointCard};
pub use declared::Declared;
pub use truth::Truth;

use crate::model::facts::{OilFacts, PointFacts, Use};
use crate::model::rulebook::{
    Basis, Caution, Clause, Confidence, Fact, Level, Rulebook, SuitabilityRule, WhenUnknown,
};
use compiled::Compiled;
use std::cell::Cell;

/// The engine, with the rules in the form it weighs them.
pub struct Suitability<'r> {
    book: &'r Rulebook,
    compiled: Compiled<'r>,
}

/// What the rules say about one oil at one point.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Eligibility {
    /// Why it is barred; empty where it is not.
    pub barred_by: Vec<Finding>,
    /// Conditions that ride along with the verdict.
    pub conditions: Vec<Finding>,
    /// Remarks for the sheet.
    pub notes: Vec<Finding>,
    /// Facts nobody stated that a rule needs.
    pub gaps: Vec<FactGap>,
}

/// One rule that spoke.
#[derive(Clone, Debug, PartialEq)]
pub struct Finding {
    /// Id of the rule.
    pub rule: String,
    /// What it does.
    pub level: Level,
    /// What it is about.
    pub title: String,
    /// The facts it rests on, with their values.
    pub facts: Vec<String>,
    /// Title, facts and reason in a sentence.
    pub reason: String,
    /// What to do; where a fact is missing, the question to put.
    pub act: String,
    /// Sources, short.
    pub source: Vec<String>,
    /// How the rule was had.
    pub basis: Basis,
    /// How sure it is.
    pub confidence: Confidence,
    /// Whether it asks because a fact is missing.
    pub undecided: bool,
}

/// A fact nobody stated.
#[derive(Clone, Debug, PartialEq)]
pub struct FactGap {
    /// The rule that needs it.
    pub rule: String,
    /// The fact; none for a class or additive the oil does not declare.
    pub fact: Option<Fact>,
    /// The fact in words.
    pub says: String,
    /// The question to put.
    pub question: String,
}

/// The short answer for one pair.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub struct Screen {
    /// Whether any rule bars.
    pub barred: bool,
    /// How many conditions there are; counted only where nothing bars.
    pub conditions: u32,
}

impl<'r> Suitability<'r> {
    /// Prepares the rules of a rulebook.
    pub fn new(book: &'r Rulebook) -> Self {
        Self {
            book,
            compiled: Compiled::of(book),
        }
    }

    /// What depends on the oil alone.
    pub fn oil<'f>(&self, facts: &'f OilFacts) -> OilCard<'f> {
        OilCard::of(self.book, &self.compiled, facts)
    }

    /// What depends on the point alone, its oil in use included.
    pub fn point<'f>(&self, facts: &'f PointFacts) -> PointCard<'f> {
        PointCard::of(self.book, &self.compiled, facts)
    }

    /// Whether anything bars, and how many conditions there are, without a word.
    pub fn screen(&self, point: &PointCard<'_>, oil: &OilCard<'_>) -> Screen {
        let mut screen = Screen::default();
        let pair = self.pair(point, oil, Use::Fill);
        for (place, rule) in self.compiled.live(point, oil, false) {
            match pair.outcome(place, rule) {
                Outcome::Fires(Level::Bars) => screen.barred = true,
                Outcome::Fires(Level::Asks) | Outcome::Undecided => screen.conditions += 1,
                Outcome::Fires(Level::Notes) | Outcome::Silent => {}
            }
        }
        for want in &point.wants {
            match want.answer(self.book, oil).level {
                Some(Level::Bars) => screen.barred = true,
                Some(Level::Asks) => screen.conditions += 1,
                Some(Level::Notes) | None => {}
            }
        }
        if screen.barred {
            screen.conditions = 0;
        }
        screen
    }

    /// Everything the rules say about filling the point with the oil.
    pub fn assess(&self, point: &PointCard<'_>, oil: &OilCard<'_>) -> Eligibility {
        self.assess_use(point, oil, Use::Fill)
    }

    /// The same for another way of bringing the oil in: a top-up onto what is there.
    pub fn assess_use(&self, point: &PointCard<'_>, oil: &OilCard<'_>, how: Use) -> Eligibility {
        let mut found = Eligibility::default();
        let pair = self.pair(point, oil, how);
        for (place, rule) in self.compiled.live(point, oil, true) {
            match pair.outcome(place, rule) {
                Outcome::Fires(level) => found.take(pair.fired(place, rule, level)),
                Outcome::Undecided => pair.undecided(place, rule, &mut found),
                Outcome::Silent => {}
            }
        }
        for want in &point.wants {
            if let Some((finding, gap)) = want.finding(self.book, oil) {
                found.take(finding);
                found.gaps.extend(gap);
            }
        }
        found
    }

    /// Whether conditions hold for a point and, where given, an oil. A condition on an oil that is
    /// not given does not hold.
    pub fn holds(
        &self,
        clauses: &[Clause],
        point: &PointCard<'_>,
        oil: Option<&OilCard<'_>>,
    ) -> Truth {
        value::Context {
            book: self.book,
            tables: &self.compiled.tables,
            point,
            oil,
            how: Use::Fill,
        }
        .all(clauses)
    }

    /// The cautions that belong on the sheet of a point, with the oil proposed where there is one.
    pub fn cautions(&self, point: &PointCard<'_>, oil: Option<&OilCard<'_>>) -> Vec<&'r Caution> {
        self.book
            .cautions
            .iter()
            .filter(|c| self.holds(&c.applies, point, oil) == Truth::True)
            .collect()
    }

    fn pair<'p>(&'p self, point: &'p PointCard<'p>, oil: &'p OilCard<'p>, how: Use) -> Pair<'p> {
        Pair {
            compiled: &self.compiled,
            context: value::Context {
                book: self.book,
                tables: &self.compiled.tables,
                point,
                oil: Some(oil),
                how,
            },
            answers: [const { Cell::new(None) }; 32],
        }
    }
}

/// One oil at one point.
pub struct Pair<'p> {
    compiled: &'p Compiled<'p>,
    context: value::Context<'p>,
    /// Answers to the first questions on a pair; any beyond are worked out each time.
    answers: [Cell<Option<Truth>>; 32],
}

/// What a rule comes to.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
enum Outcome {
    /// It does not apply.
    Silent,
    /// It applies, at this level.
    Fires(Level),
    /// A fact is missing and the rule wants it.
    Undecided,
}

impl Pair<'_> {
    fn outcome(&self, place: usize, rule: &SuitabilityRule) -> Outcome {
        match self.truth(self.compiled.when(place)) {
            Truth::False => Outcome::Silent,
            Truth::True => Outcome::Fires(self.level(place, rule)),
            Truth::Unknown => match &rule.unknown {
                WhenUnknown::Passes => Outcome::Silent,
                WhenUnknown::Asks { .. } => {
                    if self.truth(self.compiled.only_where(place)) == Truth::True {
                        Outcome::Undecided
                    } else {
                        Outcome::Silent
                    }
                }
            },
        }
    }

    fn level(&self, place: usize, rule: &SuitabilityRule) -> Level {
        let bars = self.compiled.bars_when(place);
        if !bars.is_empty() && self.truth(bars) == Truth::True {
            Level::Bars
        } else {
            rule.level
        }
    }

    /// All of a range of clauses.
    fn truth(&self, clauses: std::ops::Range<usize>) -> Truth {
        let mut all = Truth::True;
        for place in clauses {
            let truth = self.clause(place);
            if truth == Truth::False {
                return truth;
            }
            all = all.min(truth);
        }
        all
    }

    /// One clause: the better of what oil, point and pair say.
    fn clause(&self, place: usize) -> Truth {
        let point = self.context.point.said.truths[place];
        let oil = self
            .context
            .oil
            .map_or(Truth::False, |o| o.said.truths[place]);
        let mut best = point.max(oil);
        for question in &self.compiled.clauses[place].asks {
            if best == Truth::True {
                break;
            }
            best = best.max(self.answer(*question));
        }
        best
    }

    /// A question on the pair, worked out when it is first put.
    fn answer(&self, question: usize) -> Truth {
        let Some(known) = self.answers.get(question) else {
            return self.context.condition(self.compiled.questions[question]);
        };
        known.get().unwrap_or_else(|| {
            let truth = self.context.condition(self.compiled.questions[question]);
            known.set(Some(truth));
            truth
        })
    }
}

impl Eligibility {
    /// Whether any rule bars.
    pub fn barred(&self) -> bool {
        !self.barred_by.is_empty()
    }

    fn take(&mut self, finding: Finding) {
        match finding.level {
            Level::Bars => self.barred_by.push(finding),
            Level::Asks => self.conditions.push(finding),
            Level::Notes => self.notes.push(finding),
        }
    }
}

/// What the rules say about one oil at one point, for a single question. Many pairs are better
/// asked through [`Suitability`].
pub fn assess(book: &Rulebook, point: &PointFacts, oil: &OilFacts, how: Use) -> Eligibility {
    let engine = Suitability::new(book);
    engine.assess_use(&engine.point(point), &engine.oil(oil), how)
}
