//! Checks between entries: what one names must be there.

use super::fault::Faults;
use crate::model::rulebook::condition::{Clause, Fact, OilFact, Test, Values};
use crate::model::rulebook::{Entry, Provenance, Rulebook, Table, WhenUnknown};

/// Adds a fault for every name that leads nowhere.
pub(super) fn check(book: &Rulebook, faults: &Faults) {
    let links = Links { book, faults };
    links.components();
    links.stocks();
    links.classes();
    links.conditions();
    links.greases();
    links.sources();
}

struct Links<'a> {
    book: &'a Rulebook,
    faults: &'a Faults,
}

impl Links<'_> {
    fn wants<T: Entry>(&self, entry: &impl Entry, what: &str, name: &str, table: &Table<T>) {
        if table.get(name).is_none() {
            let known: Vec<&str> = table.iter().map(Entry::id).collect();
            self.faults.add(
                &entry.provenance().file,
                Some(entry.id()),
                format!("{what} `{name}` is not there"),
                format!("one of {}", known.join(", ")),
            );
        }
    }

    fn components(&self) {
        for part in &self.book.components {
            for need in &part.needs {
                self.wants(part, "class need", need, &self.book.needs);
            }
            if let Some(target) = &part.cleanliness {
                self.wants(part, "cleanliness target", target, &self.book.cleanliness);
            }
        }
    }

    fn stocks(&self) {
        for base in &self.book.base_stocks {
            self.wants(base, "mixing row", &base.mixing_row, &self.book.mixing);
            if let Some(row) = &base.paint_row {
                self.wants(base, "paint row", row, &self.book.paints);
            }
            let column = base.seal_column.as_deref();
            for seal in &self.book.seals {
                if let Some(column) = column
                    && !seal.marks.iter().any(|(name, _)| name == column)
                {
                    self.faults.add(
                        &seal.provenance.file,
                        Some(&seal.id),
                        format!("no mark in `{column}`, which {} refers to", base.id),
                        format!("{column}: good, care or bad"),
                    );
                }
            }
        }
        for row in &self.book.mixing {
            for (other, _) in &row.marks {
                self.wants(row, "mixing row", other, &self.book.mixing);
            }
        }
    }

    fn classes(&self) {
        for class in &self.book.classes {
            for link in &class.contains {
                self.wants(class, "class", &link.class, &self.book.classes);
            }
        }
        for need in &self.book.needs {
            for class in need.served_by.iter().chain(&need.with_leave) {
                self.wants(need, "class", class, &self.book.classes);
            }
        }
    }

    fn conditions(&self) {
        let book = self.book;
        for rule in &book.suitability {
            self.clauses(rule, &rule.when);
            self.clauses(rule, &rule.bars_when);
            if let WhenUnknown::Asks { only_where, .. } = &rule.unknown {
                self.clauses(rule, only_where);
            }
        }
        book.needs.iter().for_each(|e| self.clauses(e, &e.when));
        book.cautions
            .iter()
            .for_each(|e| self.clauses(e, &e.applies));
        book.pour_margins
            .iter()
            .for_each(|e| self.clauses(e, &e.when));
        book.heaters.iter().for_each(|e| self.clauses(e, &e.when));
        book.used_oil.iter().for_each(|e| self.clauses(e, &e.when));
        book.sampling.iter().for_each(|e| self.clauses(e, &e.when));
        book.changes.iter().for_each(|e| self.clauses(e, &e.when));
    }

    fn clauses(&self, entry: &impl Entry, clauses: &[Clause]) {
        for condition in clauses.iter().flat_map(|c| &c.any) {
            let (Test::Is(Values::Names { names, .. }) | Test::IsNot(Values::Names { names, .. })) =
                &condition.test
            else {
                continue;
            };
            for name in names {
                match condition.fact {
                    Fact::Oil(OilFact::Class) | Fact::Now(OilFact::Class) => {
                        self.wants(entry, "class", name, &self.book.classes);
                    }
                    _ => self.wants(entry, "component", name, &self.book.components),
                }
            }
        }
    }

    fn greases(&self) {
        for row in &self.book.grease_mixing {
            self.wants(row, "thickener", &row.thickener, &self.book.thickeners);
            for (other, _) in row.with.iter().filter(|(other, _)| other != "any") {
                self.wants(row, "thickener", other, &self.book.thickeners);
            }
        }
    }

    /// Built-in entries cite the register; a user's may cite anything.
    fn sources(&self) {
        for (_, entry) in self.book.entries() {
            let Provenance { source, file, .. } = entry.provenance();
            for name in source {
                let unknown = self.book.sources.get(name).is_none();
                if unknown && file.starts_with(crate::assets::BUILT_IN) {
                    self.faults.add(
                        file,
                        Some(entry.id()),
                        format!("source `{name}` is not in the register"),
                        "a source of rules/sources.yaml, or a new entry there",
                    );
                }
            }
        }
    }
}
