//! One problem of many cells told once: a table written with decimal commas is one mistake, not a
//! thousand.

use crate::problem::{Code, Problem};
use crate::source::Place;
use std::collections::BTreeMap;

/// As many cells of a column are told one by one; more are told together.
const ONE_BY_ONE: usize = 3;
/// Rows listed by number.
const LISTED: usize = 8;

/// Problems that are alike but for their row, in the place of the first of them.
pub(super) fn told_once(problems: Vec<Problem>) -> Vec<Problem> {
    let mut groups: BTreeMap<String, Vec<u32>> = BTreeMap::new();
    for problem in &problems {
        if let Some((key, row)) = kind(problem) {
            groups.entry(key).or_default().push(row);
        }
    }
    let mut told = Vec::new();
    for mut problem in problems {
        let Some((key, row)) = kind(&problem) else {
            told.push(problem);
            continue;
        };
        let rows = groups.get(&key).map_or(&[][..], Vec::as_slice);
        if rows.len() <= ONE_BY_ONE {
            told.push(problem);
        } else if rows.first() == Some(&row) {
            problem.message = format!("{}; {}", problem.message, more(&rows[1..]));
            told.push(problem);
        }
    }
    told
}

/// `and 12 more cells of this column are alike, rows 6, 7, 8 and on`.
fn more(rows: &[u32]) -> String {
    let listed: Vec<String> = rows.iter().take(LISTED).map(u32::to_string).collect();
    let on = if rows.len() > LISTED { " and on" } else { "" };
    format!(
        "{} more cells of this column are alike, rows {}{on}",
        rows.len(),
        listed.join(", ")
    )
}

/// What two problems must share to be told together, and the row.
fn kind(problem: &Problem) -> Option<(String, u32)> {
    let Place::Cell(cell) = &problem.place else {
        return None;
    };
    let of_cells = matches!(
        problem.code,
        Code::CellUnread | Code::DateMixed | Code::CellPlaceholder | Code::CellWithoutValue
    );
    let same = (
        problem.code,
        cell.column,
        &problem.so,
        &problem.why,
        &problem.write,
        &problem.ask,
    );
    of_cells.then(|| (format!("{same:?}"), cell.row))
}
