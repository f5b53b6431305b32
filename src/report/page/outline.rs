//! Numbers sections, tables and figures in the order they stand in, counting only what is there.

mod machine;

use crate::report::model::{
    AreaSheet, AuditSheet, Body, OilSheet, Origin, Overview, RulesPage, Sheet,
};
use crate::report::names::{Href, Place};
use serde::Serialize;
use std::collections::BTreeMap;

/// One section.
#[derive(Clone, Debug, Serialize)]
pub(super) struct Section {
    number: u32,
    id: String,
    title: &'static str,
    short: &'static str,
    href: Href,
}

/// The numbers of a sheet, or of one point on it.
#[derive(Clone, Debug, Default, Serialize)]
pub(super) struct Part {
    /// Sections by key.
    sections: BTreeMap<&'static str, Section>,
    /// The same in order.
    list: Vec<Section>,
    /// Numbers of tables by key.
    tables: BTreeMap<&'static str, u32>,
    /// Numbers of figures by key or id.
    figures: BTreeMap<String, u32>,
    /// Origin letters that occur, for their key.
    origins: Vec<Origin>,
}

/// The numbers of a sheet.
#[derive(Clone, Debug, Default, Serialize)]
pub(super) struct Outline {
    /// The sheet's own sections; on a machine's sheet those after its points.
    sheet: Part,
    /// Those of each point.
    points: Vec<Part>,
}

/// A section that may be there: key, heading, short form for the list, whether it is there.
type Wanted = (&'static str, &'static str, &'static str, bool);

struct Counter<'a> {
    place: &'a Place,
    section: u32,
    table: u32,
    figure: u32,
}

impl Counter<'_> {
    fn sections(&mut self, part: &mut Part, under: &str, wanted: &[Wanted]) {
        for (key, title, short, _) in wanted.iter().filter(|w| w.3) {
            self.section += 1;
            let local = if under.is_empty() {
                (*key).to_owned()
            } else {
                format!("{under}-{key}")
            };
            let id = self.place.id(&local);
            let section = Section {
                number: self.section,
                href: Href::here(&id),
                id,
                title,
                short,
            };
            part.list.push(section.clone());
            part.sections.insert(key, section);
        }
    }

    fn tables(&mut self, part: &mut Part, wanted: &[(&'static str, bool)]) {
        for (key, _) in wanted.iter().filter(|w| w.1) {
            self.table += 1;
            part.tables.insert(key, self.table);
        }
    }

    fn figure(&mut self, part: &mut Part, id: Option<&str>) {
        if let Some(id) = id {
            self.figure += 1;
            part.figures.insert(id.to_owned(), self.figure);
        }
    }
}

/// Numbers a sheet.
pub(super) fn outline(sheet: &Sheet) -> Outline {
    let mut counter = Counter {
        place: &sheet.place,
        section: 0,
        table: 0,
        figure: 0,
    };
    let mut out = Outline::default();
    match &sheet.body {
        Body::Overview(body) => overview(&mut counter, &mut out.sheet, body),
        Body::Area(body) => area(&mut counter, &mut out.sheet, body),
        Body::Machine(body) => machine::machine(&mut counter, &mut out, body),
        Body::Oil(body) => oil(&mut counter, &mut out.sheet, body),
        Body::Audit(body) => audit(&mut counter, &mut out.sheet, body),
        Body::Rules(body) => rules(&mut counter, &mut out.sheet, body),
        Body::Revision(_) | Body::Methods(_) | Body::Glossary(_) => {}
    }
    out
}

fn overview(counter: &mut Counter<'_>, part: &mut Part, body: &Overview) {
    let oils = !body.oils.is_empty() || body.lists.is_some() || !body.matrix.is_empty();
    let gaps = !body.gaps.rows.is_empty() || !body.gaps.idle.is_empty();
    counter.sections(
        part,
        "",
        &[
            (
                "register",
                "Parts list",
                "Parts list",
                !body.groups.is_empty(),
            ),
            ("areas", "Sheets by area", "Areas", !body.areas.is_empty()),
            (
                "machines",
                "Machine by machine",
                "Machines",
                !body.machines.is_empty(),
            ),
            ("oils", "Oil list", "Oils", oils),
            ("gaps", "What is missing", "Gaps", gaps),
            (
                "accepted",
                "Tight and accepted",
                "Accepted",
                !body.accepted.is_empty(),
            ),
            ("notes", "Notes", "Notes", body.notes.is_some()),
            (
                "basis",
                "Basis and cautions",
                "Basis",
                !body.basis.lines.is_empty() || !body.basis.cautions.is_empty(),
            ),
            ("sign", "Sign-off", "Sign-off", !body.sign.boxes.is_empty()),
        ],
    );
    counter.tables(
        part,
        &[
            ("areas", !body.areas.is_empty()),
            ("machines", !body.machines.is_empty()),
            ("oils", !body.oils.is_empty()),
            ("matrix", !body.matrix.is_empty()),
            ("gaps", !body.gaps.rows.is_empty()),
            ("accepted", !body.accepted.is_empty()),
        ],
    );
    counter.figure(part, body.lists.as_ref().map(|f| f.id.as_str()));
}

fn area(counter: &mut Counter<'_>, part: &mut Part, body: &AreaSheet) {
    counter.sections(
        part,
        "",
        &[(
            "machines",
            "Machine by machine",
            "Machines",
            !body.machines.is_empty(),
        )],
    );
    counter.tables(part, &[("machines", !body.machines.is_empty())]);
}

fn oil(counter: &mut Counter<'_>, part: &mut Part, body: &OilSheet) {
    counter.sections(
        part,
        "",
        &[
            ("facts", "What is stated", "Stated", !body.facts.is_empty()),
            (
                "findings",
                "What to know of it",
                "Findings",
                !body.findings.is_empty(),
            ),
            (
                "curves",
                "Viscosity over temperature",
                "Curves",
                body.curves.is_some() || !body.points.is_empty(),
            ),
            (
                "grades",
                "Grades and shear",
                "Grades",
                !body.grades.is_empty(),
            ),
            ("cold", "The cold end", "Cold", !body.cold.is_empty()),
            ("life", "Life", "Life", !body.life.is_empty()),
            (
                "uses",
                "Where it is weighed",
                "Machines",
                !body.uses.is_empty(),
            ),
            ("calc", "Calculation", "Calculation", !body.steps.is_empty()),
        ],
    );
    counter.tables(
        part,
        &[
            ("points", !body.points.is_empty()),
            ("starts", !body.starts.is_empty()),
            ("lives", !body.lives.is_empty()),
            ("uses", !body.uses.is_empty()),
        ],
    );
    counter.figure(part, body.curves.as_ref().map(|c| c.figure.id.as_str()));
}

fn audit(counter: &mut Counter<'_>, part: &mut Part, body: &AuditSheet) {
    counter.sections(
        part,
        "",
        &[
            (
                "findings",
                "Findings",
                "Findings",
                !body.findings.is_empty(),
            ),
            ("trends", "Over time", "Trends", !body.panels.is_empty()),
            (
                "samples",
                "Sample by sample",
                "Samples",
                !body.samples.is_empty(),
            ),
            (
                "calc",
                "One sample worked through",
                "Calculation",
                !body.steps.is_empty(),
            ),
            (
                "trust",
                "How far to trust it",
                "Trust",
                !body.trust.is_empty(),
            ),
            ("sign", "Sign-off", "Sign-off", !body.sign.boxes.is_empty()),
        ],
    );
    counter.tables(
        part,
        &[
            ("cross", !body.cross.is_empty()),
            ("samples", !body.samples.is_empty()),
        ],
    );
    counter.figure(part, (!body.panels.is_empty()).then_some("trends"));
}

fn rules(counter: &mut Counter<'_>, part: &mut Part, body: &RulesPage) {
    counter.sections(
        part,
        "",
        &[
            (
                "house",
                "Rules of the house",
                "House",
                !body.house.is_empty(),
            ),
            (
                "rules",
                "Rules built in",
                "Built in",
                !body.rules.is_empty(),
            ),
        ],
    );
}
