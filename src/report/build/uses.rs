//! Every machine an oil was weighed on or barred from, kept small while the sheets are made.

use super::digest::Digest;
use super::reference::named;
use super::{Report, say};
use crate::report::model::{Mark, OilUse, Phrase};

/// Rows of the table on an oil's sheet at most.
const ROWS: usize = 100;

/// An oil on one point.
#[derive(Clone, Copy, Debug)]
pub(super) struct Use {
    machine: u32,
    point: u16,
    role: Role,
    mark: Option<Mark>,
    margin: Option<f32>,
}

/// What it is there, in the order of the table.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
enum Role {
    InUse,
    Proposed,
    Weighed,
    Barred,
}

/// Keeps what the points of a machine say of each oil.
pub(super) fn keep(all: &mut Vec<Vec<Use>>, machine: usize, points: &[Digest]) {
    let machine = u32::try_from(machine).unwrap_or(u32::MAX);
    for (at, digest) in points.iter().enumerate() {
        for cell in &digest.cells {
            if all.len() <= cell.oil {
                all.resize_with(cell.oil + 1, Vec::new);
            }
            let role = match (cell.in_use, digest.oil == Some(cell.oil), cell.mark) {
                (true, ..) => Role::InUse,
                (_, true, _) => Role::Proposed,
                (_, _, Some(_)) => Role::Weighed,
                (_, _, None) => Role::Barred,
            };
            #[expect(
                clippy::cast_possible_truncation,
                reason = "a margin printed to a tenth"
            )]
            let margin = cell.margin.map(|m| m as f32);
            all[cell.oil].push(Use {
                machine,
                point: u16::try_from(at).unwrap_or(u16::MAX),
                role,
                mark: cell.mark,
                margin,
            });
        }
    }
}

/// Verdicts in the order of the table.
fn rank(mark: Option<Mark>) -> u8 {
    match mark {
        Some(Mark::Holds) => 0,
        Some(Mark::Tight) => 1,
        Some(Mark::Open) => 2,
        Some(Mark::Fails) => 3,
        None => 4,
    }
}

/// The table of an oil's sheet, and in words what it leaves out: the machines the oil is barred
/// from, and those the table has no room for.
pub(super) fn of_oil(report: &Report<'_>, oil: usize) -> (Vec<OilUse>, Phrase) {
    let all: Vec<Use> = report.kept.uses.get(oil).cloned().unwrap_or_default();
    let (barred, mut told): (Vec<Use>, Vec<Use>) =
        all.into_iter().partition(|u| u.role == Role::Barred);
    told.sort_by_key(|u| (u.role, rank(u.mark), u.machine, u.point));
    let mut more = Phrase::new();
    let left = told.len().saturating_sub(ROWS);
    if left > 0 {
        let n = say::count(left, "lubrication point", "lubrication points");
        more = more.and(format!(
            "{} more stand on the sheets of their machines. ",
            say::sentence(&n)
        ));
    }
    if !barred.is_empty() {
        let mut machines: Vec<usize> = barred
            .iter()
            .filter_map(|u| usize::try_from(u.machine).ok())
            .collect();
        machines.dedup();
        more = more
            .and("Barred by a rule, which each sheet names, on ")
            .join(named(report, &machines))
            .and(".");
    }
    let rows = told.iter().take(ROWS).map(|u| row(report, u)).collect();
    (rows, more)
}

fn row(report: &Report<'_>, u: &Use) -> OilUse {
    let machine = usize::try_from(u.machine).unwrap_or(0);
    let plan = &report.plan.machines[machine];
    let digest = &report.kept.machines[machine][usize::from(u.point)];
    let tag = match &digest.point {
        Some(point) if plan.points.len() > 1 => format!("{}, {point}", plan.tag),
        _ => plan.tag.to_owned(),
    };
    let barred = u.mark.is_none();
    OilUse {
        machine: Phrase::new().link(tag, digest.href.clone()),
        name: digest.title.clone(),
        mark: u.mark,
        role: match u.role {
            Role::InUse if barred => "in use, barred",
            Role::InUse => "in use",
            Role::Proposed => "proposed",
            Role::Weighed => "weighed",
            Role::Barred => "barred",
        }
        .to_owned(),
        says: match (barred, u.margin) {
            (true, _) => "by a rule named on the machine's sheet".to_owned(),
            (false, Some(m)) => format!("{} VG steps", say::steps(f64::from(m), 1)),
            (false, None) => "no limit on viscosity".to_owned(),
        },
    }
}
