//! A list of entries found by id or by name.

use super::provenance::Provenance;
use std::collections::BTreeMap;

/// Something the rulebook lists.
pub trait Entry {
    /// Its id, unique within its table.
    fn id(&self) -> &str;
    /// Names it is also found by.
    fn names(&self) -> Vec<&str>;
    /// Where it comes from.
    fn provenance(&self) -> &Provenance;
}

/// Makes an entry of a type with `id` and `provenance`; a second argument gives its names.
macro_rules! entry {
    ($type:ty) => {
        entry!($type, |_| Vec::new());
    };
    ($type:ty, $names:expr) => {
        impl $crate::model::rulebook::table::Entry for $type {
            fn id(&self) -> &str {
                &self.id
            }
            fn names(&self) -> Vec<&str> {
                let names: fn(&$type) -> Vec<&str> = $names;
                names(self)
            }
            fn provenance(&self) -> &$crate::model::rulebook::provenance::Provenance {
                &self.provenance
            }
        }
    };
}
pub(crate) use entry;

/// Entries in the order of their files.
#[derive(Clone, Debug)]
pub struct Table<T> {
    entries: Vec<T>,
    places: BTreeMap<String, usize>,
}

impl<T> Default for Table<T> {
    fn default() -> Self {
        Self {
            entries: Vec::new(),
            places: BTreeMap::new(),
        }
    }
}

/// Names compare without regard to letter case, spaces, hyphens and underscores.
fn folded(name: &str) -> String {
    name.chars()
        .filter(|c| !matches!(c, ' ' | '-' | '_'))
        .flat_map(char::to_lowercase)
        .collect()
}

impl<T: Entry> Table<T> {
    /// Adds an entry, or puts it in the place of the one with the same id, which comes back.
    pub fn put(&mut self, entry: T) -> Option<T> {
        if let Some(place) = self.place(entry.id()) {
            let old = std::mem::replace(&mut self.entries[place], entry);
            self.places.clear();
            (0..self.entries.len()).for_each(|place| self.enter(place));
            return Some(old);
        }
        self.entries.push(entry);
        self.enter(self.entries.len() - 1);
        None
    }

    /// Enters id and names of an entry. An id outranks a name that folds to the same letters.
    fn enter(&mut self, place: usize) {
        let entry = &self.entries[place];
        for name in entry.names() {
            self.places.entry(folded(name)).or_insert(place);
        }
        self.places.insert(folded(entry.id()), place);
        self.places.insert(format!("={}", entry.id()), place);
    }

    /// The entry with that id, exactly.
    pub fn get(&self, id: &str) -> Option<&T> {
        self.places
            .get(&format!("={id}"))
            .map(|place| &self.entries[*place])
    }

    /// The entry with that id or name, however it is spaced and capitalised.
    pub fn find(&self, id_or_name: &str) -> Option<&T> {
        self.get(id_or_name).or_else(|| {
            self.places
                .get(&folded(id_or_name))
                .map(|place| &self.entries[*place])
        })
    }

    /// The place of an id in the order of the table.
    pub fn place(&self, id: &str) -> Option<usize> {
        self.places.get(&format!("={id}")).copied()
    }

    /// The entry at a place.
    pub fn at(&self, place: usize) -> Option<&T> {
        self.entries.get(place)
    }

    /// All entries in order.
    pub fn iter(&self) -> std::slice::Iter<'_, T> {
        self.entries.iter()
    }

    /// How many there are.
    pub fn len(&self) -> usize {
        self.entries.len()
    }

    /// Whether there are none.
    pub fn is_empty(&self) -> bool {
        self.entries.is_empty()
    }
}

impl<'t, T: Entry> IntoIterator for &'t Table<T> {
    type Item = &'t T;
    type IntoIter = std::slice::Iter<'t, T>;

    fn into_iter(self) -> Self::IntoIter {
        self.iter()
    }
}
