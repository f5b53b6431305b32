//! What moved, and the inputs that moved it, found by weighing again.

use super::diff::Change;
use super::outcome::{Book, Outcome, Shown, What};
use super::state::{State, Unread};
use crate::source::SourceSet;
use std::cell::RefCell;
use std::collections::BTreeSet;

/// One thing that moved.
#[derive(Clone, Debug, PartialEq)]
pub struct Moved {
    /// The point, by its address.
    pub point: String,
    /// What moved.
    pub what: What,
    /// As it was; none where it was not there.
    pub was: Option<String>,
    /// As it is; none where it is not there any more.
    pub is: Option<String>,
    /// The changes that moved it, by their place in the list of changes.
    pub because: Vec<usize>,
    /// Whether each of them alone gives what is new; otherwise they do it together.
    pub alone: bool,
}

/// Two states compared.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Comparison {
    /// Inputs that differ, in file order.
    pub changes: Vec<Change>,
    /// What moved, by point.
    pub moved: Vec<Moved>,
}

impl Comparison {
    /// Whether nothing differs and nothing moved.
    pub fn is_empty(&self) -> bool {
        self.changes.is_empty() && self.moved.is_empty()
    }

    /// Changes that moved nothing, by their place in the list.
    pub fn idle(&self) -> Vec<usize> {
        let named: BTreeSet<usize> = self.moved.iter().flat_map(|m| m.because.clone()).collect();
        (0..self.changes.len())
            .filter(|i| !named.contains(i))
            .collect()
    }

    /// How many things of a kind moved.
    pub fn count(&self, word: &str) -> usize {
        self.moved.iter().filter(|m| m.what.word() == word).count()
    }
}

/// Compares two states read into the same set of sources.
///
/// # Errors
/// One of them is refused by the reader.
pub fn compare(set: &SourceSet, old: &State, new: &State) -> Result<Comparison, Unread> {
    let changes = old.changes(set, new);
    let mut book = Book::default();
    let before = old.outcome_with(set, &[], new, &mut book);
    let before = before.ok_or(Unread::Wrong)?;
    let after = new.outcome_with(set, &[], old, &mut book);
    let after = after.ok_or(Unread::Wrong)?;
    let mut moved = moves(&before, &after);
    if !moved.is_empty() {
        let finder = Finder {
            set,
            old,
            new,
            changes: &changes,
            before: &before,
            after: &after,
            book: RefCell::new(book),
        };
        finder.causes(&mut moved);
    }
    Ok(Comparison { changes, moved })
}

type Key = (String, What);

/// What differs. Of a point that came or went nothing else is told; of an oil that came or went
/// on the whole site no verdicts.
fn moves(before: &Outcome, after: &Outcome) -> Vec<Moved> {
    let keys: BTreeSet<&Key> = before.keys().chain(after.keys()).collect();
    let there = |side: &Outcome, point: &str| side.contains_key(&(point.to_owned(), What::Point));
    let mut found = Vec::new();
    for key in keys {
        let (was, is) = (before.get(key), after.get(key));
        let both = there(before, &key.0) && there(after, &key.0);
        let told = both || key.1 == What::Point;
        let came_or_went = matches!(key.1, What::Verdict(_)) && (was.is_none() || is.is_none());
        if !told || came_or_went || same(was, is) {
            continue;
        }
        let (was, is) = Shown::apart(was, is);
        found.push(Moved {
            point: key.0.clone(),
            what: key.1.clone(),
            was,
            is,
            because: Vec::new(),
            alone: false,
        });
    }
    found
}

fn same(a: Option<&Shown>, b: Option<&Shown>) -> bool {
    match (a, b) {
        (Some(a), Some(b)) => a.same(b),
        (None, None) => true,
        _ => false,
    }
}

struct Finder<'f> {
    set: &'f SourceSet,
    old: &'f State,
    new: &'f State,
    changes: &'f [Change],
    before: &'f Outcome,
    after: &'f Outcome,
    book: RefCell<Book>,
}

impl Finder<'_> {
    fn with(&self, which: impl Fn(usize) -> bool) -> Option<Outcome> {
        let chosen: Vec<&Change> = (0..self.changes.len())
            .filter(|i| which(*i))
            .map(|i| &self.changes[i])
            .collect();
        let mut book = self.book.borrow_mut();
        self.old
            .outcome_with(self.set, &chosen, self.new, &mut book)
    }

    fn causes(&self, moved: &mut [Moved]) {
        if self.changes.is_empty() {
            return;
        }
        let alone: Vec<Option<Outcome>> = (0..self.changes.len())
            .map(|i| self.with(|k| k == i))
            .collect();
        for m in moved.iter_mut() {
            let key = (m.point.clone(), m.what.clone());
            let full = |o: &Option<Outcome>| {
                o.as_ref()
                    .is_some_and(|o| same(o.get(&key), self.after.get(&key)))
            };
            m.because = places(&alone, full);
            m.alone = !m.because.is_empty();
        }
        if moved.iter().all(|m| m.alone) {
            return;
        }
        let without: Vec<Option<Outcome>> = (0..self.changes.len())
            .map(|i| self.with(|k| k != i))
            .collect();
        for m in moved.iter_mut().filter(|m| !m.alone) {
            let key = (m.point.clone(), m.what.clone());
            let part = |o: &Option<Outcome>| {
                o.as_ref()
                    .is_some_and(|o| !same(o.get(&key), self.before.get(&key)))
            };
            let needed = |o: &Option<Outcome>| {
                o.as_ref()
                    .is_some_and(|o| !same(o.get(&key), self.after.get(&key)))
            };
            let mut found: BTreeSet<usize> = places(&alone, part).into_iter().collect();
            found.extend(places(&without, needed));
            m.because = if found.is_empty() {
                self.least(&key)
            } else {
                found.into_iter().collect()
            };
        }
    }

    /// A least set of changes that together give what is new: each is left out in turn, and stays
    /// out where the new is reached without it.
    fn least(&self, key: &Key) -> Vec<usize> {
        let mut kept: BTreeSet<usize> = (0..self.changes.len()).collect();
        for i in 0..self.changes.len() {
            let mut fewer = kept.clone();
            fewer.remove(&i);
            let reached = self
                .with(|k| fewer.contains(&k))
                .is_some_and(|o| same(o.get(key), self.after.get(key)));
            if reached {
                kept = fewer;
            }
        }
        kept.into_iter().collect()
    }
}

fn places(outcomes: &[Option<Outcome>], test: impl Fn(&Option<Outcome>) -> bool) -> Vec<usize> {
    (0..outcomes.len())
        .filter(|i| test(&outcomes[*i]))
        .collect()
}
