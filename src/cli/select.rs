//! Machines and oils by name or pattern.

use super::exit::Exit;
use super::session::Session;
use crate::model::{Point, Site};
use crate::problem::suggest;

/// Most cases sampled for one oil.
const MOST_CASES: u32 = 1_000_000;

impl Session<'_> {
    /// A number of cases to sample.
    ///
    /// # Errors
    /// None, or more than can be sampled in a run.
    pub fn cases(&mut self, cases: u32) -> Result<u32, Exit> {
        if (1..=MOST_CASES).contains(&cases) {
            return Ok(cases);
        }
        self.fail(&format!(
            "--scatter {cases} is not a number of cases from 1 to {MOST_CASES}\n  write  --scatter 1000"
        ));
        Err(Exit::Usage)
    }

    /// Points by tag, address or pattern; all where none is given.
    ///
    /// # Errors
    /// Nothing matches; near names are suggested.
    pub fn points<'s>(&mut self, site: &'s Site, tags: &[String]) -> Result<Vec<&'s Point>, Exit> {
        let mut found: Vec<&Point> = Vec::new();
        for tag in tags {
            let matching: Vec<&Point> = site
                .points
                .iter()
                .filter(|p| matches(tag, &p.machine) || matches(tag, &p.address()))
                .collect();
            if matching.is_empty() {
                return Err(self.no_match(
                    "machine",
                    tag,
                    site.points.iter().map(|p| p.machine.as_str()),
                ));
            }
            for point in matching {
                if !found.iter().any(|f| f.address() == point.address()) {
                    found.push(point);
                }
            }
        }
        if tags.is_empty() {
            found = site.points.iter().collect();
        }
        Ok(found)
    }

    /// Places of oils by id or pattern; `None` where all are meant.
    ///
    /// # Errors
    /// Nothing matches; near names are suggested.
    pub fn oils(&mut self, site: &Site, ids: &[String]) -> Result<Option<Vec<usize>>, Exit> {
        if ids.is_empty() {
            return Ok(None);
        }
        let mut found = Vec::new();
        for id in ids {
            let matching: Vec<usize> = site
                .oils
                .iter()
                .enumerate()
                .filter(|(_, o)| matches(id, &o.id))
                .map(|(i, _)| i)
                .collect();
            if matching.is_empty() {
                return Err(self.no_match("oil", id, site.oils.iter().map(|o| o.id.as_str())));
            }
            found.extend(matching);
        }
        found.sort_unstable();
        found.dedup();
        Ok(Some(found))
    }

    fn no_match<'c>(
        &mut self,
        what: &str,
        name: &str,
        known: impl Iterator<Item = &'c str> + Clone,
    ) -> Exit {
        let near = suggest::certain(name, known.clone());
        let mut all: Vec<&str> = known.collect();
        all.dedup();
        let told = match near {
            Some(near) => format!("did you mean {near}?"),
            None if all.is_empty() => format!("there is no {what} in the files"),
            None => format!("there are: {}", some_of(&all)),
        };
        self.fail(&format!(
            "no {what} matches '{name}'  [nothing-to-weigh]\n  {told}"
        ));
        Exit::NoMatch
    }
}

/// So many names are listed before the rest is only counted.
const NAMED: usize = 10;

fn some_of(names: &[&str]) -> String {
    let listed = names[..names.len().min(NAMED)].join(", ");
    match names.len() {
        n if n > NAMED => format!("{listed} and {} more", n - NAMED),
        _ => listed,
    }
}

/// Shell-style patterns: `*` for any letters, `?` for one.
pub fn matches(pattern: &str, name: &str) -> bool {
    let p: Vec<char> = pattern.chars().collect();
    let n: Vec<char> = name.chars().collect();
    let (mut at, mut read) = (0, 0);
    // The last star, and how far the name was read when it took its letters.
    let mut star: Option<(usize, usize)> = None;
    while read < n.len() {
        match p.get(at) {
            Some('*') => {
                star = Some((at, read));
                at += 1;
            }
            Some(c) if *c == '?' || *c == n[read] => {
                at += 1;
                read += 1;
            }
            _ => match star {
                Some((place, taken)) => {
                    star = Some((place, taken + 1));
                    at = place + 1;
                    read = taken + 1;
                }
                None => return false,
            },
        }
    }
    p[at..].iter().all(|c| *c == '*')
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn patterns_match_as_in_a_shell() {
        for (pattern, name, want) in [
            ("CV-*", "CV-104", true),
            ("*", "", true),
            ("M0?", "M01", true),
            ("*4", "CV-104", true),
            ("C*-*4", "CV-1-04", true),
            ("C*5", "CV-104", false),
            ("M0?", "M0", false),
            ("CV-*", "FN-402", false),
            ("cv-104", "CV-104", false),
        ] {
            assert_eq!(matches(pattern, name), want, "{pattern} {name}");
        }
        // Many stars on a long name take no time to speak of.
        assert!(!matches(&"*a".repeat(40), &"a".repeat(39)));
    }
}
