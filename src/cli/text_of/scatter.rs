//! How sure verdicts are, as text.

use crate::cli::text::{Column, hanging, table};
use crate::decide::scatter::{Basis, Sampled, Scatter};
use crate::quantity::show::{Toward, Units, fixed, quantity};
use crate::results::scatter::named;
use crate::results::weigh::Scatters;
use crate::weighing::{Scales, Weighed};

const COLUMNS: [Column; 4] = [
    Column::text("oil", 0),
    Column::number("limits met", 0),
    Column::text("95 % interval", 0),
    Column::text("what matters most", 0),
];

/// The samplings of one point; nothing where none was asked for.
pub fn told(
    scales: &Scales<'_>,
    (n, w): (usize, &Weighed<'_>),
    scatters: &Scatters,
    width: usize,
) -> String {
    if scatters.is_empty() {
        return String::new();
    }
    let mut rows = Vec::new();
    let mut inputs: Vec<&Sampled> = Vec::new();
    let mut cases = 0;
    for c in &w.candidates {
        let id = scales.site.oils[c.oil].id.clone();
        let Some(s) = scatters.get(&(n, c.oil)) else {
            let why = "not sampled: a limit cannot be worked out".to_owned();
            rows.push(vec![id, "-".to_owned(), String::new(), why]);
            continue;
        };
        cases = s.cases;
        rows.push(row(id, s));
        for i in &s.inputs {
            if i.basis != Basis::Oil && !inputs.iter().any(|k| named(k) == named(i)) {
                inputs.push(i);
            }
        }
    }
    inputs.sort_by_key(|i| named(i));
    let mut out = if cases == 0 {
        String::from("\n  how sure\n")
    } else {
        format!(
            "\n  how sure: {cases} cases within the tolerances, the verdicts stand as they are\n"
        )
    };
    out.push_str(&table(&COLUMNS, &rows, width));
    let listed: Vec<String> = inputs.iter().map(|i| spread(i, scales.units)).collect();
    if !listed.is_empty() {
        let text = format!(
            "{}; the oil's viscosity by its own tolerance.",
            listed.join("; ")
        );
        out.push_str(&hanging("  sampled: ", &text, width));
    }
    out
}

fn percent(share: f64, toward: Toward) -> String {
    fixed(100.0 * share, 1, toward)
}

fn row(id: String, s: &Scatter) -> Vec<String> {
    let most: Vec<String> = s
        .most()
        .iter()
        .map(|i| format!("{} ({} %)", named(i), percent(i.matters, Toward::Nearest)))
        .collect();
    vec![
        id,
        format!("{} %", percent(s.share(), Toward::Down)),
        format!(
            "{} to {} %",
            percent(s.interval.0, Toward::Down),
            percent(s.interval.1, Toward::Up)
        ),
        most.join(", "),
    ]
}

fn spread(i: &Sampled, units: Units) -> String {
    let show = |a| quantity(a, units, Toward::Nearest);
    format!(
        "{} {} .. {} ({})",
        named(i),
        show(i.ends.0),
        show(i.ends.1),
        i.basis.word()
    )
}
