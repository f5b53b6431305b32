//! `need`: what machines need, as text.

use super::weigh::needs;
use crate::cli::text::{Column, folded, table};
use crate::demand::{Demand, GapKind, PointDemands, Standing};
use crate::model::Point;
use crate::quantity::show::{Toward, Units, quantity};
use crate::quantity::{Measure, ThermodynamicTemperature};
use crate::results::need::{confidence, end_word, limit_amount};
use crate::source::place::Place;
use crate::weighing::Scales;

const COLUMNS: [Column; 7] = [
    Column::text("end", 0),
    Column::text("limit", 0),
    Column::text("at", 4),
    Column::text("", 3),
    Column::text("part", 4),
    Column::text("confidence", 1),
    Column::text("asks", 2),
];

/// One machine.
pub fn one(scales: &Scales<'_>, point: &Point, demands: &PointDemands, width: usize) -> String {
    let title = point.title.as_deref().unwrap_or("");
    let mut out = format!("{}  {title}", point.address());
    out.truncate(out.trim_end().len());
    out.push_str("\n\n");
    needs(&mut out, scales, demands, width);
    out.push('\n');
    let rows: Vec<Vec<String>> = demands
        .middle
        .list
        .iter()
        .enumerate()
        .map(|(i, d)| row(scales.units, demands, i, d))
        .collect();
    out.push_str(&table(&COLUMNS, &rows, width));
    for info in &demands.middle.information {
        let figure = info.amount.map_or(String::new(), |a| {
            format!(": {}", quantity(a, scales.units, Toward::Nearest))
        });
        let part = info
            .part
            .as_ref()
            .map_or(String::new(), |p| format!("{p}, "));
        out.push_str(&folded(
            &format!("also  {part}{}{figure}", info.says),
            "  ",
            width,
        ));
    }
    gaps(&mut out, scales.units, demands, width);
    out
}

fn row(units: Units, demands: &PointDemands, i: usize, d: &Demand) -> Vec<String> {
    use crate::demand::End;
    let t = demands.middle.governing_temperature(d);
    let floor = matches!(d.end, End::HotFloor | End::MakerGrade | End::PourMargin);
    let toward = if floor { Toward::Up } else { Toward::Down };
    let limit =
        limit_amount(d, t).map_or_else(|| "its own".to_owned(), |a| quantity(a, units, toward));
    let state = match &d.standing {
        Standing::Judges if demands.middle.governing(d.end) == Some(i) => "governs".to_owned(),
        Standing::Judges => String::new(),
        Standing::Replaced { .. } => "replaced".to_owned(),
        Standing::Condition => "condition".to_owned(),
        Standing::Information => "information".to_owned(),
    };
    vec![
        end_word(d.end).to_owned(),
        limit,
        t.map_or_else(
            || "?".to_owned(),
            |t| {
                quantity(
                    ThermodynamicTemperature::from_base(t).amount(),
                    units,
                    Toward::Nearest,
                )
            },
        ),
        state,
        d.part.clone().unwrap_or_default(),
        confidence(d).to_owned(),
        d.says.clone(),
    ]
}

/// What is missing or assumed.
fn gaps(out: &mut String, units: Units, demands: &PointDemands, width: usize) {
    for gap in demands.middle.axes.iter().chain(&demands.middle.gaps) {
        let about = gap
            .about
            .as_ref()
            .map_or(String::new(), |a| format!("{a}, "));
        let show = |a| quantity(a, units, Toward::Nearest);
        let how = gap.ask.as_deref().unwrap_or(gap.how);
        let text = match &gap.kind {
            GapKind::Range(lo, hi) => {
                format!(
                    "gap   {about}{}: unknown, {} .. {} ({how})",
                    gap.key,
                    show(*lo),
                    show(*hi)
                )
            }
            GapKind::Assumed { taken, lo, hi } => format!(
                "gap   {about}{}: {} assumed, {} .. {} plausible ({how})",
                gap.key,
                show(*taken),
                show(*lo),
                show(*hi)
            ),
            GapKind::Word { taken, .. } => {
                format!("gap   {about}{}: {taken} assumed ({how})", gap.key)
            }
            GapKind::Missing | GapKind::Fact => {
                format!("gap   {about}{}: not stated ({how})", gap.key)
            }
        };
        out.push_str(&folded(&text, "  ", width));
    }
}

/// Where every value of a point comes from.
pub fn origins(point: &Point, place: impl Fn(&Place) -> String) -> String {
    let columns = [
        Column::text("key", 0),
        Column::text("value", 0),
        Column::text("whose", 1),
        Column::text("from", 3),
        Column::text("stands at", 2),
    ];
    let rows: Vec<Vec<String>> = point
        .inputs
        .iter()
        .map(|line| {
            let key = match &line.about {
                Some(about) => format!("{about}, {}", line.key),
                None => line.key.clone(),
            };
            vec![
                key,
                line.written.clone(),
                line.origin.words(),
                line.origin.inherited.clone().unwrap_or_default(),
                place(&line.origin.place),
            ]
        })
        .collect();
    format!(
        "\n  where each value comes from\n{}",
        table(&columns, &rows, 120)
    )
}
