//! Draws the figures of a sheet and puts the numbers into its formulas.

use crate::report::draw::viscosity::draw_detail;
use crate::report::draw::{Draw, Drawing};
use crate::report::formula::Formula;
use crate::report::model::{
    Ambient, AreaSheet, AuditSheet, Body, CalcStep, Curves, Gaps, MachineRow, MachineSheet,
    OilSheet, Overview, Point, Sheet, Summary,
};
use std::collections::BTreeMap;
use tera::Value;

/// The drawings of a sheet by the ids of their figures.
struct Drawn<'a> {
    prefix: &'a str,
    by_id: BTreeMap<String, Value>,
}

/// Every figure of the sheet, drawn.
pub(super) fn all(sheet: &Sheet) -> Value {
    let mut drawn = Drawn {
        prefix: &sheet.place.prefix,
        by_id: BTreeMap::new(),
    };
    match &sheet.body {
        Body::Overview(body) => drawn.overview(body),
        Body::Area(body) => drawn.area(body),
        Body::Machine(body) => drawn.machine(body),
        Body::Oil(body) => drawn.oil(body),
        Body::Audit(body) => drawn.audit(body),
        Body::Revision(_) | Body::Methods(_) | Body::Rules(_) | Body::Glossary(_) => {}
    }
    Value::from(drawn.by_id)
}

impl Drawn<'_> {
    fn figure<T: Draw>(&mut self, figure: Option<&T>) {
        if let Some(figure) = figure {
            let drawing = figure.draw(&format!("{}-{}", self.prefix, figure.id()));
            self.put(figure.id(), drawing);
        }
    }

    fn put(&mut self, id: &str, drawing: Drawing) {
        let left_out = drawing.left_out.map_or(Value::none(), Value::from);
        let parts = BTreeMap::from([
            ("svg", Value::safe_string(drawing.svg.as_str())),
            ("left_out", left_out),
        ]);
        self.by_id.insert(id.to_owned(), Value::from(parts));
    }

    fn overview(&mut self, body: &Overview) {
        self.figure(body.band_axis.as_ref());
        self.rows(&body.machines);
        self.figure(body.lists.as_ref());
        self.gaps(&body.gaps);
    }

    fn area(&mut self, body: &AreaSheet) {
        self.figure(body.band_axis.as_ref());
        self.rows(&body.machines);
    }

    fn rows(&mut self, rows: &[MachineRow]) {
        for row in rows {
            self.figure(row.band.as_ref());
        }
    }

    fn gaps(&mut self, gaps: &Gaps) {
        self.figure(gaps.head.as_ref());
        for row in &gaps.rows {
            self.figure(row.bar.as_ref());
        }
    }

    fn machine(&mut self, body: &MachineSheet) {
        for point in &body.points {
            self.point(point);
        }
    }

    fn point(&mut self, point: &Point) {
        self.summary(point.summary.as_ref());
        self.curves(point.curves.as_ref());
        for row in point.candidates.iter().flat_map(|c| &c.rows) {
            self.figure((!row.bars.bars.is_empty()).then_some(&row.bars));
        }
        if let Some(Ambient { bands, season, .. }) = &point.ambient {
            self.figure(bands.as_ref());
            self.figure(season.as_ref());
        }
        self.gaps(&point.gaps);
    }

    fn summary(&mut self, summary: Option<&Summary>) {
        if let Some(summary) = summary {
            self.figure(Some(&summary.bars));
            self.figure(summary.band.as_ref());
            self.figure(summary.band_axis.as_ref());
        }
    }

    fn curves(&mut self, curves: Option<&Curves>) {
        let Some(Curves { figure, .. }) = curves else {
            return;
        };
        self.figure(Some(figure));
        for detail in &figure.details {
            let uid = format!("{}-{}", self.prefix, detail.id);
            self.put(&detail.id, draw_detail(figure, detail, &uid));
        }
    }

    fn oil(&mut self, body: &OilSheet) {
        self.curves(body.curves.as_ref());
    }

    fn audit(&mut self, body: &AuditSheet) {
        for panel in &body.panels {
            self.figure(Some(&panel.figure));
        }
    }
}

/// The formulas of the sheet's steps with their numbers put in, by the ids of the steps.
pub(super) fn numbers(sheet: &Sheet) -> Value {
    let steps: Vec<&CalcStep> = match &sheet.body {
        Body::Machine(body) => body.points.iter().flat_map(|p| &p.steps).collect(),
        Body::Oil(body) => body.steps.iter().collect(),
        Body::Audit(body) => body.steps.iter().collect(),
        _ => Vec::new(),
    };
    let set: BTreeMap<String, Value> = steps
        .into_iter()
        .map(|step| (step.id.clone(), with_numbers(step).unwrap_or(Value::none())))
        .collect();
    Value::from(set)
}

fn with_numbers(step: &CalcStep) -> Option<Value> {
    let formula = Formula::parse(step.formula.as_deref()?)?;
    let numbers: Vec<(&str, &str)> = step
        .with
        .iter()
        .map(|put| (put.symbol.as_str(), put.number.as_str()))
        .collect();
    let set = formula.with_numbers(&numbers)?;
    Some(Value::safe_string(set.as_str()))
}
