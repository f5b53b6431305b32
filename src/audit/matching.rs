//! Which machine a bottle is from. Nothing is guessed: what is not certain is suggested.

use super::bottle::Bottle;
use crate::model::{Point, Site};
use crate::problem::suggest;
use std::collections::BTreeMap;

/// What a bottle belongs to.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum Match {
    /// A point, by its place in the site.
    Point(usize),
    /// New oil from the drum.
    NewOil,
    /// Nothing certain.
    None {
        /// The point that may be meant.
        meant: Option<String>,
        /// Why there is no match.
        why: String,
    },
}

/// Words for a sample of new oil in the place of a machine.
const NEW: &[&str] = &[
    "new oil",
    "new",
    "drum",
    "fresh oil",
    "unused",
    "reference",
    "baseline",
];

/// What names are looked up in.
pub struct Matcher<'s> {
    site: &'s Site,
    by_name: BTreeMap<String, Vec<usize>>,
    aliases: BTreeMap<String, String>,
}

fn key(name: &str) -> String {
    name.split_whitespace()
        .collect::<Vec<_>>()
        .join(" ")
        .to_lowercase()
}

impl<'s> Matcher<'s> {
    /// From a site and what stands on the command line, name and address.
    pub fn new(site: &'s Site, more: &[(String, String)]) -> Self {
        let mut by_name: BTreeMap<String, Vec<usize>> = BTreeMap::new();
        for (i, point) in site.points.iter().enumerate() {
            let address = point.address();
            by_name.entry(key(&address)).or_default().push(i);
            if point.machine != address {
                by_name.entry(key(&point.machine)).or_default().push(i);
            }
        }
        let maps = site.samples.iter().flat_map(|m| &m.aliases);
        let mut aliases: BTreeMap<String, String> = maps
            .map(|(name, to)| (key(name), to.value.clone()))
            .collect();
        aliases.extend(more.iter().map(|(name, to)| (key(name), to.clone())));
        Self {
            site,
            by_name,
            aliases,
        }
    }

    /// What a bottle belongs to.
    pub fn find(&self, bottle: &Bottle) -> Match {
        let written = bottle.machine.trim();
        if written.is_empty() || written == "-" {
            return Match::None {
                meant: None,
                why: "no machine on the bottle".to_owned(),
            };
        }
        let name = self
            .aliases
            .get(&key(written))
            .map_or(written, String::as_str);
        if NEW.contains(&key(name).as_str()) {
            return Match::NewOil;
        }
        match self.by_name.get(&key(name)).map(Vec::as_slice) {
            Some([one]) => Match::Point(*one),
            Some(several) => Match::None {
                meant: None,
                why: format!(
                    "{name} has several points: {}",
                    several
                        .iter()
                        .map(|i| self.site.points[*i].address())
                        .collect::<Vec<_>>()
                        .join(", ")
                ),
            },
            None => Match::None {
                meant: self.meant(name),
                why: "no machine of that name".to_owned(),
            },
        }
    }

    /// The one point that may be meant: by its letters, by its number, by what it is called.
    fn meant(&self, name: &str) -> Option<String> {
        let addresses: Vec<String> = self.site.points.iter().map(Point::address).collect();
        if let Some(certain) = suggest::certain(name, addresses.iter().map(String::as_str)) {
            return Some(certain.to_owned());
        }
        one_of(&addresses, |_, a| {
            let (n, m) = (figures(name), figures(a));
            !n.is_empty() && n == m
        })
        .or_else(|| {
            let words = words(name);
            one_of(&addresses, |i, _| {
                let title = self.site.points[i].title.as_deref().unwrap_or("");
                let title = self::words(title);
                let shared = words.iter().filter(|w| title.contains(w)).count();
                shared > 0 && shared * 2 >= words.len()
            })
        })
        .or_else(|| {
            one_of(&addresses, |_, a| {
                strsim::jaro_winkler(&key(name), &key(a)) > 0.9
            })
        })
    }
}

/// The only address that fits.
fn one_of(addresses: &[String], fits: impl Fn(usize, &str) -> bool) -> Option<String> {
    let mut found = addresses.iter().enumerate().filter(|(i, a)| fits(*i, a));
    let (_, first) = found.next()?;
    found.next().is_none().then(|| first.clone())
}

fn figures(text: &str) -> Vec<String> {
    let parts = text.split(|c: char| !c.is_ascii_digit());
    let bare = parts
        .filter(|p| !p.is_empty())
        .map(|p| p.trim_start_matches('0'));
    bare.filter(|p| !p.is_empty()).map(str::to_owned).collect()
}

fn words(text: &str) -> Vec<String> {
    let letters = text.split(|c: char| !c.is_alphabetic());
    letters
        .filter(|w| w.chars().count() > 3)
        .map(str::to_lowercase)
        .collect()
}
