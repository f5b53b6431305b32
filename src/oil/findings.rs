//! What does not add up in the data of an oil, and what its reader should know.

mod cold;
mod fluid;
mod grease;
mod polymer;

use super::curves::{Curves, implies_polymer, natural_index};
use crate::model::Oil;
use crate::model::oil::{Polymer, Viscosity};
use crate::model::rulebook::Rulebook;
use crate::quantity::convert::celsius;
use crate::quantity::show::{Toward, Units, quantity};
use crate::quantity::{Measure, Ratio};
use crate::relation::oil::grade::IsoGrade;
use crate::relation::oil::viscosity_temperature::ViscosityCurve;

/// Something in an oil's data that does not add up, or that the reader of a sheet should know.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Finding {
    /// Its name, as messages have names.
    pub name: &'static str,
    /// In words.
    pub says: String,
    /// What to do.
    pub act: String,
}

pub(super) fn finding(name: &'static str, says: String, act: &str) -> Finding {
    Finding {
        name,
        says,
        act: act.to_owned(),
    }
}

/// A stated VI is compared with the two viscosities; more than this apart is a finding.
pub const INDEX_TOLERANCE: f64 = 3.5;
/// A residual beyond this share is reported.
pub const RESIDUAL_REPORTED: f64 = 0.03;

/// What was found while the curves were built.
pub(super) struct DataFindings {
    /// How far one line misses each point.
    pub(super) residuals: Vec<Ratio>,
    /// Why stated base and polymer are not used.
    pub(super) not_made: Option<String>,
    /// Viscosity index by the viscosities.
    pub(super) vi: Option<f64>,
}

pub(super) fn findings(
    oil: &Oil,
    curves: &Curves,
    data: &DataFindings,
    rules: &Rulebook,
) -> Vec<Finding> {
    let mut found = Vec::new();
    residual(&mut found, &data.residuals);
    stated_index(&mut found, oil, data.vi);
    slope(&mut found, curves);
    suspected_polymer(&mut found, oil, curves, data.vi);
    grade_claimed(&mut found, oil, curves);
    polymer::findings(&mut found, oil, curves, data, rules);
    cold::findings(&mut found, oil, curves, rules);
    fluid::findings(&mut found, oil, curves);
    grease::findings(&mut found, oil, rules);
    found
}

fn residual(found: &mut Vec<Finding>, residuals: &[Ratio]) {
    let worst = residuals
        .iter()
        .map(|r| r.base())
        .max_by(|a, b| a.abs().total_cmp(&b.abs()));
    if let Some(worst) = worst.filter(|w| w.abs() > RESIDUAL_REPORTED) {
        let per_cent = worst * 100.0;
        found.push(finding(
            "curve-bends",
            format!(
                "one D341 line misses a point by {per_cent:+.1} %: the points are used piecewise, \
                 each pair with its own line"
            ),
            "check the points; wax, polymer, aromatic or silicone chemistry bends the line",
        ));
    }
}

fn stated_index(found: &mut Vec<Finding>, oil: &Oil, vi: Option<f64>) {
    if let (Some(stated), Some(vi)) = (&oil.vi, vi) {
        let stated = stated.value.base();
        if (stated - vi).abs() > INDEX_TOLERANCE {
            found.push(finding(
                "index-disagrees",
                format!("VI {stated} is stated, the two viscosities give {vi:.0}"),
                "the measured viscosities are used; ask the supplier which figure is wrong",
            ));
        }
    }
}

fn slope(found: &mut Vec<Finding>, curves: &Curves) {
    let b = curves.new.line_at(celsius(40.0)).slope().base();
    if !(1.0..=5.0).contains(&b) {
        found.push(finding(
            "slope-unusual",
            format!("the D341 slope is {b:.2}; oils lie between 1 and 5"),
            "look for exchanged or mistyped values",
        ));
    }
}

fn suspected_polymer(found: &mut Vec<Finding>, oil: &Oil, curves: &Curves, vi: Option<f64>) {
    if oil.polymer != Polymer::NotSaid || !curves.thickened || oil.shear.is_some() {
        return;
    }
    let class = oil.facts.classes.iter().find(|c| implies_polymer(c));
    let why = match (class, vi, natural_index(curves.base)) {
        (Some(class), _, _) => format!("class {class} is usually made with polymer"),
        (None, Some(vi), Some(most)) => {
            format!("VI {vi:.0} is above the {most:.0} its base gives by itself")
        }
        _ => return,
    };
    found.push(finding(
        "polymer-suspected",
        format!("{why}: treated as polymer-thickened, with the plausible loss of its kind"),
        "ask for the viscosity after a 20 h shear test, or declare `no polymer`",
    ));
}

/// A data sheet that names a grade its viscosity is not in.
fn grade_claimed(found: &mut Vec<Finding>, oil: &Oil, curves: &Curves) {
    if !matches!(oil.viscosity, Viscosity::Points { .. }) {
        return;
    }
    let Some(name) = &oil.name else { return };
    let Some(grade) = claimed_grade(name).and_then(IsoGrade::of_number) else {
        return;
    };
    let claimed = grade.number();
    let nu40 = curves.new.nu_at(celsius(40.0));
    let is = IsoGrade::of_viscosity(nu40).map(IsoGrade::number);
    if is != Some(claimed) {
        let shown = quantity(nu40.amount(), Units::Si, Toward::Nearest);
        let (lo, hi) = (
            quantity(grade.least().amount(), Units::Si, Toward::Nearest),
            quantity(grade.most().amount(), Units::Si, Toward::Nearest),
        );
        found.push(finding(
            "grade-missed",
            format!(
                "called VG {claimed}, which is {lo} to {hi}; its {shown} at 40 degC is outside"
            ),
            "the measured value is used; a grade on a label is not a viscosity",
        ));
    }
}

/// The number after `VG` in a name.
fn claimed_grade(name: &str) -> Option<u32> {
    let after = name.split("VG ").nth(1)?;
    let digits: String = after.chars().take_while(char::is_ascii_digit).collect();
    digits.parse().ok()
}
