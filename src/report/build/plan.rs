//! Which sheets there will be, where each stands and what it is called, before any is made: their
//! number and their links are needed on the first.

use crate::model::{Oil, Point};
use crate::report::model::NavLink;
use crate::report::names::{Bundle, Href, Names, Place};
use std::collections::BTreeMap;

/// Sites of more machines than this are parted into sheets by area.
pub(super) const ON_OVERVIEW: usize = 60;
/// Rows on one sheet of an area.
const ON_AREA: usize = 100;
/// Letters of a row as written, beside those of its tag and name.
const ROW: usize = 1_250;
/// Letters of all rows on one sheet: with what stands around them a page stays below 150 kB.
const LETTERS: usize = 118_000;

/// One machine with its sheet.
#[derive(Clone, Debug)]
pub(super) struct Machine<'a> {
    pub(super) tag: &'a str,
    pub(super) points: Vec<&'a Point>,
    pub(super) place: Place,
    /// Number of its sheet.
    pub(super) number: u32,
}

/// The sheet of an area or of a part of it: places of its machines in the plan.
#[derive(Clone, Debug)]
pub(super) struct Area {
    pub(super) name: String,
    pub(super) place: Place,
    pub(super) number: u32,
    pub(super) machines: Vec<usize>,
}

/// A sheet to look things up on.
#[derive(Clone, Debug)]
pub(super) struct Fixed {
    pub(super) place: Place,
    pub(super) number: u32,
}

/// The sheets of a report.
#[derive(Clone, Debug)]
pub(super) struct Plan<'a> {
    pub(super) bundle: Bundle,
    pub(super) overview: Fixed,
    pub(super) areas: Vec<Area>,
    pub(super) machines: Vec<Machine<'a>>,
    /// The oils' sheets, in the order of the list.
    pub(super) oils: Vec<Fixed>,
    /// Their ids, for the bar of links.
    oil_ids: Vec<String>,
    /// The audit, where there are samples.
    pub(super) audit: Option<Fixed>,
    /// What moved, where an older state is named.
    pub(super) revision: Option<Fixed>,
    pub(super) methods: Fixed,
    pub(super) rules: Fixed,
    pub(super) glossary: Fixed,
    /// How many sheets there are.
    pub(super) of: u32,
}

/// Which sheet a bar of links stands on.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum On {
    Overview,
    Area(usize),
    Machine(usize),
    Oil(usize),
    Audit,
    Revision,
    Methods,
    Rules,
    Glossary,
}

impl<'a> Plan<'a> {
    /// Plans the sheets for these points, in their order.
    pub(super) fn new(
        points: &[&'a Point],
        oils: &[Oil],
        bundle: Bundle,
        audited: bool,
        revised: bool,
    ) -> Self {
        let mut names = Names::new();
        let mut number = 0;
        let mut next = || {
            number += 1;
            number
        };
        let fixed = |names: &mut Names, kind: &str, number: u32| Fixed {
            place: Place::new(names, kind, ""),
            number,
        };
        let overview = fixed(&mut names, "index", next());
        let grouped = by_machine(points);
        let areas = areas(&mut names, &grouped, &mut next);
        let machines = grouped
            .into_iter()
            .map(|(tag, points)| Machine {
                tag,
                points,
                place: Place::new(&mut names, "machine", tag),
                number: next(),
            })
            .collect();
        let oil_ids: Vec<String> = oils.iter().map(|o| o.id.clone()).collect();
        let oils = oil_ids
            .iter()
            .map(|id| Fixed {
                place: Place::new(&mut names, "oil", id),
                number: next(),
            })
            .collect();
        let audit = audited.then(|| fixed(&mut names, "audit", next()));
        let revision = revised.then(|| fixed(&mut names, "changes", next()));
        let methods = fixed(&mut names, "methods", next());
        let rules = fixed(&mut names, "rules", next());
        let glossary = fixed(&mut names, "words", next());
        Self {
            bundle,
            of: glossary.number,
            overview,
            areas,
            machines,
            oils,
            oil_ids,
            audit,
            revision,
            methods,
            rules,
            glossary,
        }
    }

    /// The files of a folder of pages.
    pub(super) fn files(&self) -> Vec<String> {
        let fixed = [&self.overview, &self.methods, &self.rules, &self.glossary];
        fixed
            .into_iter()
            .chain(self.audit.as_ref())
            .chain(&self.revision)
            .map(|f| &f.place)
            .chain(self.areas.iter().map(|a| &a.place))
            .chain(self.machines.iter().map(|m| &m.place))
            .chain(self.oils.iter().map(|o| &o.place))
            .map(Place::file)
            .collect()
    }

    /// A link to a sheet of the plan.
    pub(super) fn href(&self, place: &Place) -> Href {
        place.href(self.bundle, None)
    }

    /// The bar of links of a sheet.
    pub(super) fn nav(&self, on: On) -> Vec<NavLink> {
        let link = |text: String, place: &Place, current: bool| NavLink {
            text,
            href: self.href(place),
            current,
        };
        let mut bar = vec![link(
            "Overview".into(),
            &self.overview.place,
            on == On::Overview,
        )];
        match on {
            On::Area(i) => bar.push(link(self.areas[i].name.clone(), &self.areas[i].place, true)),
            On::Machine(i) => {
                if let Some(before) = i.checked_sub(1) {
                    let m = &self.machines[before];
                    bar.push(link(format!("Before: {}", m.tag), &m.place, false));
                }
                let m = &self.machines[i];
                bar.push(link(m.tag.to_owned(), &m.place, true));
                if let Some(m) = self.machines.get(i + 1) {
                    bar.push(link(format!("Next: {}", m.tag), &m.place, false));
                }
            }
            On::Oil(i) => {
                if let Some(before) = i.checked_sub(1) {
                    let text = format!("Before: {}", self.oil_ids[before]);
                    bar.push(link(text, &self.oils[before].place, false));
                }
                bar.push(link(self.oil_ids[i].clone(), &self.oils[i].place, true));
                if let Some(next) = self.oils.get(i + 1) {
                    let text = format!("Next: {}", self.oil_ids[i + 1]);
                    bar.push(link(text, &next.place, false));
                }
            }
            _ => {}
        }
        if let Some(audit) = &self.audit {
            bar.push(link("Audit".into(), &audit.place, on == On::Audit));
        }
        if let Some(revision) = &self.revision {
            let current = on == On::Revision;
            bar.push(link("Changes".into(), &revision.place, current));
        }
        bar.push(link(
            "Methods".into(),
            &self.methods.place,
            on == On::Methods,
        ));
        bar.push(link("Rules".into(), &self.rules.place, on == On::Rules));
        bar.push(link(
            "Words".into(),
            &self.glossary.place,
            on == On::Glossary,
        ));
        bar
    }
}

/// Points by machine, machines in the order of their first point.
fn by_machine<'a>(points: &[&'a Point]) -> Vec<(&'a str, Vec<&'a Point>)> {
    let mut places: BTreeMap<&str, usize> = BTreeMap::new();
    let mut grouped: Vec<(&'a str, Vec<&'a Point>)> = Vec::new();
    for point in points {
        let place = *places.entry(&point.machine).or_insert(grouped.len());
        if place == grouped.len() {
            grouped.push((&point.machine, Vec::new()));
        }
        grouped[place].1.push(point);
    }
    grouped
}

/// Large sites: areas in the order of their first machine, at most a hundred rows a sheet.
fn areas(
    names: &mut Names,
    machines: &[(&str, Vec<&Point>)],
    next: &mut impl FnMut() -> u32,
) -> Vec<Area> {
    if machines.len() <= ON_OVERVIEW {
        return Vec::new();
    }
    let mut found: Vec<(&str, Vec<usize>)> = Vec::new();
    let mut places: BTreeMap<&str, usize> = BTreeMap::new();
    for (i, (_, points)) in machines.iter().enumerate() {
        let name = points[0].area.as_deref().unwrap_or("no area");
        let place = *places.entry(name).or_insert(found.len());
        if place == found.len() {
            found.push((name, Vec::new()));
        }
        found[place].1.push(i);
    }
    let mut sheets = Vec::new();
    for (name, all) in found {
        let parts = by_page(machines, &all);
        let of = parts.len();
        for (part, machines) in parts.into_iter().enumerate() {
            let title = if of == 1 {
                name.to_owned()
            } else {
                format!("{name}, sheet {} of {of}", part + 1)
            };
            sheets.push(Area {
                place: Place::new(names, "area", &title),
                name: title,
                number: next(),
                machines,
            });
        }
    }
    sheets
}

/// Parts the machines of an area into pages, by their rows and the letters of those.
fn by_page(machines: &[(&str, Vec<&Point>)], all: &[usize]) -> Vec<Vec<usize>> {
    let (mut pages, mut page) = (Vec::new(), Vec::new());
    let (mut rows, mut letters) = (0, 0);
    for machine in all {
        let (tag, points) = &machines[*machine];
        let title = |p: &&Point| p.title.as_ref().map_or(0, String::len);
        let named: usize = points.iter().map(|p| 4 * tag.len() + title(p)).sum();
        let more = (points.len(), points.len() * ROW + named);
        if rows > 0 && (rows + more.0 > ON_AREA || letters + more.1 > LETTERS) {
            pages.push(std::mem::take(&mut page));
            (rows, letters) = (0, 0);
        }
        rows += more.0;
        letters += more.1;
        page.push(*machine);
    }
    pages.push(page);
    pages
}
