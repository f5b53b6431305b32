//! What moved since the last revision.

use super::plan::{Fixed, On};
use super::{Report, say};
use crate::compare::{Comparison, Moved, What};
use crate::report::model::{Body, Mark, Phrase, RevisionPage, RevisionRow, Sheet};

/// A comparison with an older state.
#[derive(Clone, Debug, Default)]
pub struct Since {
    /// What the older state is called.
    pub name: String,
    /// What moved since.
    pub found: Comparison,
}

/// The page of changes, where a comparison was asked for.
pub(super) fn sheet(report: &Report<'_>, fixed: &Fixed, since: &Since) -> Sheet {
    let body = RevisionPage {
        since: since.name.clone(),
        rows: since
            .found
            .moved
            .iter()
            .map(|m| row(report, &since.found, m))
            .collect(),
        rest: rest(&since.found),
    };
    Sheet {
        place: fixed.place.clone(),
        number: fixed.number,
        of: report.plan.of,
        name: "Changes".to_owned(),
        subtitle: format!("What moved since {}, and why", since.name),
        about: Phrase::new(),
        title: "Changes since the last revision".to_owned(),
        nav: report.plan.nav(On::Revision),
        body: Body::Revision(Box::new(body)),
    }
}

fn row(report: &Report<'_>, found: &Comparison, moved: &Moved) -> RevisionRow {
    let tag = moved.point.split('/').next().unwrap_or(&moved.point);
    let machine = report.plan.machines.iter().find(|m| m.tag == tag);
    let mut what = match machine {
        Some(m) => Phrase::new().link(moved.point.as_str(), report.plan.href(&m.place)),
        None => Phrase::new().and(moved.point.as_str()),
    };
    what = match &moved.what {
        What::Verdict(oil) => what.and(" with ").tag(oil),
        What::Limit(end) => what.and(format!(", {end}")),
        What::Oil => what.and(", oil proposed"),
        What::Point => what,
    };
    let mark = |says: &Option<String>| match (&moved.what, says.as_deref()) {
        (What::Verdict(_), Some("holds")) => Some(Mark::Holds),
        (What::Verdict(_), Some("tight")) => Some(Mark::Tight),
        (What::Verdict(_), Some("open")) => Some(Mark::Open),
        (What::Verdict(_), Some("fails")) => Some(Mark::Fails),
        _ => None,
    };
    let (was_mark, is_mark) = (mark(&moved.was), mark(&moved.is));
    // the mark carries its word
    let text = |says: &Option<String>, mark: Option<Mark>| match (says, mark) {
        (_, Some(_)) => String::new(),
        (Some(says), None) => say::set(says),
        (None, None) => "none".to_owned(),
    };
    RevisionRow {
        what,
        was: text(&moved.was, was_mark),
        was_mark,
        is: text(&moved.is, is_mark),
        is_mark,
        because: because(found, moved),
    }
}

fn because(found: &Comparison, moved: &Moved) -> Phrase {
    let causes: Vec<String> = moved
        .because
        .iter()
        .map(|i| {
            let c = &found.changes[*i];
            say::set(&format!(
                "{} {}",
                c.input,
                c.says().replace("->", "\u{2192}")
            ))
        })
        .collect();
    match causes.as_slice() {
        [] => "no single input: everything that changed together".into(),
        [one] => one.clone().into(),
        several if moved.alone => format!("{}, each by itself", several.join("; or ")).into(),
        several => format!("{}, together", several.join("; and ")).into(),
    }
}

fn rest(found: &Comparison) -> String {
    let idle = found.idle();
    if idle.is_empty() {
        return String::new();
    }
    let named: Vec<String> = idle
        .iter()
        .map(|i| {
            let c = &found.changes[*i];
            format!("{} {}", c.input, c.says().replace("->", "\u{2192}"))
        })
        .collect();
    say::stopped(&format!(
        "Changed without moving a verdict, an oil or a limit: {}",
        named.join("; ")
    ))
}
