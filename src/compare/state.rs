//! A state of a site: its files as trees, the rules in force, the options it was weighed with.

use super::diff::{Change, File, differences, with};
use super::outcome::{Book, Outcome, Rules};
use crate::demand::rules::CALCULATED;
use crate::input::file::FileKind;
use crate::input::load::{self, Tree, With};
use crate::model::Site;
use crate::model::rulebook::Rulebook;
use crate::problem::Problems;
use crate::relation::bearing::designation::DimensionTable;
use crate::source::SourceSet;
use crate::source::yaml::{Node, NodeKind};
use crate::weighing::Settings;

/// A state, ready to be weighed with changes put in.
pub struct State {
    site: Node,
    oils: Option<Node>,
    others: Vec<Tree>,
    /// The rules in force.
    pub rules: Rulebook,
    /// In words, where they are not the built-in ones alone: what tells two of them apart.
    pub own_rules: String,
    /// Options it is weighed with.
    pub settings: Settings,
}

/// Why a state cannot be compared.
#[derive(Clone, Copy, Debug, PartialEq, Eq, thiserror::Error)]
pub enum Unread {
    /// It holds no site file.
    #[error("it holds no site file")]
    NoSite,
    /// Its files are wrong: the reader says where.
    #[error("its files are wrong; see: filmwright check")]
    Wrong,
}

impl State {
    /// From the files taken in; several of a kind count as one.
    ///
    /// # Errors
    /// No site file.
    pub fn new(
        trees: Vec<Tree>,
        rules: Rulebook,
        own_rules: String,
        settings: Settings,
    ) -> Result<Self, Unread> {
        let of = |kind: FileKind| trees.iter().filter(move |t| t.kind == kind);
        let site = joined(of(FileKind::Site)).ok_or(Unread::NoSite)?;
        let oils = joined(of(FileKind::Oils));
        let others = trees
            .iter()
            .filter(|t| !matches!(t.kind, FileKind::Site | FileKind::Oils))
            .cloned()
            .collect();
        Ok(Self {
            site,
            oils,
            others,
            rules,
            own_rules,
            settings,
        })
    }

    /// The inputs in which another state differs from this one.
    pub fn changes(&self, set: &SourceSet, new: &Self) -> Vec<Change> {
        let mut found = differences(set, File::Site, &self.site, &new.site);
        match (&self.oils, &new.oils) {
            (Some(a), Some(b)) => found.extend(differences(set, File::Oils, a, b)),
            (None, None) => {}
            (a, _) => {
                let (was, is) = if a.is_some() {
                    (Some(String::new()), None)
                } else {
                    (None, Some(String::new()))
                };
                found.push(Change::whole(File::Oils, "the oil list", was, is));
            }
        }
        if self.own_rules != new.own_rules {
            found.push(Change::whole(File::Rules, "own rules", None, None));
        }
        if self.settings.worn != new.settings.worn {
            let state = |s: &Self| Some(if s.settings.worn { "worn" } else { "new" }.to_owned());
            found.push(Change::whole(
                File::As,
                "option --as",
                state(self),
                state(new),
            ));
        }
        let reserve = |s: &Self| {
            s.settings
                .reserve
                .map_or("the site's".to_owned(), |r| format!("{r} step"))
        };
        if self.settings.reserve != new.settings.reserve {
            found.push(Change::whole(
                File::Option,
                "option --reserve",
                Some(reserve(self)),
                Some(reserve(new)),
            ));
        }
        found
    }

    /// The site with some of the changes towards another state put in; none where the reader
    /// refuses it.
    pub fn site_with(&self, set: &SourceSet, changes: &[&Change], new: &Self) -> Option<Site> {
        let (rules, _) = self.in_force(changes, new);
        let rules = rules.all;
        let whole = changes
            .iter()
            .any(|c| c.file == File::Oils && c.span.is_none());
        let oils = if whole { &new.oils } else { &self.oils };
        let mut trees = vec![tree(FileKind::Site, with(&self.site, File::Site, changes))];
        trees.extend(
            oils.as_ref()
                .map(|oils| tree(FileKind::Oils, with(oils, File::Oils, changes))),
        );
        trees.extend(self.others.iter().cloned());
        let calculated: Vec<&str> = CALCULATED.iter().map(|rule| rule.0).collect();
        let with = With {
            rules,
            bearings: DimensionTable::built_in(),
            calculated: &calculated,
        };
        let mut problems = Problems::new();
        load::load(set, &trees, &with, &[], &mut problems).ok()
    }

    /// What it gives with some of the changes put in; none where the reader refuses it.
    pub fn outcome_with(
        &self,
        set: &SourceSet,
        changes: &[&Change],
        new: &Self,
        book: &mut Book,
    ) -> Option<Outcome> {
        let site = self.site_with(set, changes, new)?;
        let (rules, settings) = self.in_force(changes, new);
        book.outcome(&site, rules, settings)
    }

    fn in_force<'s>(&'s self, changes: &[&Change], new: &'s Self) -> (Rules<'s>, Settings) {
        let of = |file: File| {
            let changed = changes.iter().any(|c| c.file == file);
            if changed { new } else { self }
        };
        let rules = of(File::Rules);
        let rules = Rules {
            all: &rules.rules,
            own: &rules.own_rules,
        };
        let settings = Settings {
            reserve: of(File::Option).settings.reserve,
            worn: of(File::As).settings.worn,
            ..self.settings
        };
        (rules, settings)
    }
}

fn tree(kind: FileKind, root: Node) -> Tree {
    Tree {
        file: root.span.file,
        kind,
        root: Some(root),
        complete: true,
    }
}

/// Files of one kind as one tree: records under the same key are put together.
fn joined<'t>(trees: impl Iterator<Item = &'t Tree>) -> Option<Node> {
    let mut roots = trees.filter_map(|t| t.root.clone());
    let mut first = roots.next()?;
    let NodeKind::Map(entries) = &mut first.kind else {
        return Some(first);
    };
    for root in roots {
        let NodeKind::Map(more) = root.kind else {
            continue;
        };
        for entry in more {
            let same = entries.iter_mut().find(|e| e.key.text == entry.key.text);
            match (same, entry.value.kind) {
                (Some(same), NodeKind::Map(more)) => {
                    if let NodeKind::Map(known) = &mut same.value.kind {
                        known.extend(more);
                    }
                }
                (Some(same), NodeKind::Seq(more)) => {
                    if let NodeKind::Seq(known) = &mut same.value.kind {
                        known.extend(more);
                    }
                }
                (Some(_), _) => {}
                (None, kind) => entries.push(crate::source::yaml::Entry {
                    key: entry.key,
                    value: Node {
                        span: entry.value.span,
                        kind,
                    },
                }),
            }
        }
    }
    Some(first)
}
