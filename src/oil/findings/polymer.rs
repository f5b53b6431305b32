//! Findings about polymer and shear.

use super::{DataFindings, Finding, finding};
use crate::model::Oil;
use crate::model::oil::Shear;
use crate::model::rulebook::{Rulebook, ShearsLike};
use crate::oil::curves::Curves;
use crate::oil::grades::{Worn, grades};
use crate::oil::makeup::Makeup;
use crate::quantity::convert::celsius;
use crate::quantity::show::{Toward, Units, quantity};
use crate::quantity::{Measure, ThermodynamicTemperature};
use crate::relation::oil::viscosity_temperature::ViscosityCurve;

pub(super) fn findings(
    found: &mut Vec<Finding>,
    oil: &Oil,
    curves: &Curves,
    data: &DataFindings,
    rules: &Rulebook,
) {
    if let Some(why) = &data.not_made {
        found.push(finding(
            "base-oil-not-used",
            why.clone(),
            "check the points of the base oil; it is the finished oil without its polymer",
        ));
    }
    if curves.makeup == Makeup::Unknown {
        found.push(finding(
            "split-impossible",
            format!(
                "no {} base of its usual index gives this oil with a polymer: base oil and share \
                 are not estimated",
                curves.base.word()
            ),
            "ask the supplier for the viscosity of the base oil",
        ));
    }
    named_polymer(found, oil, rules);
    test(found, oil, rules);
    sheared_points(found, oil, curves);
    grade_left(found, oil, curves);
    if let Some(why) = curves
        .thinning
        .as_ref()
        .and_then(|t| t.not_calibrated.as_ref())
    {
        found.push(finding(
            "hths-not-used",
            format!("the high-shear viscosity is not used: {why}"),
            "check HTHS and density; both base oil and oil at rest must fit around it",
        ));
    }
}

fn named_polymer(found: &mut Vec<Finding>, oil: &Oil, rules: &Rulebook) {
    let named = oil.formulation.as_ref().and_then(|f| f.polymer.as_ref());
    if let Some(named) = named.filter(|p| rules.polymer(&p.value).is_none()) {
        let known: Vec<&str> = rules.polymers.iter().map(|p| p.name.as_str()).collect();
        found.push(finding(
            "polymer-unknown",
            format!(
                "polymer {} is not known; the ranges of all kinds are used",
                named.value
            ),
            &format!("write one of: {}", known.join("; ")),
        ));
    }
}

/// Tests are not interchangeable.
fn test(found: &mut Vec<Finding>, oil: &Oil, rules: &Rulebook) {
    let Some(shear) = &oil.shear else {
        return;
    };
    let Some(written) = shear.test() else {
        found.push(finding(
            "shear-test-unnamed",
            "the loss by shear is stated without its test".to_owned(),
            "ask which test it is: losses of different tests are not interchangeable",
        ));
        return;
    };
    match rules.shear_test(written) {
        None => found.push(finding(
            "shear-test-unknown",
            format!("shear test \"{written}\" is not one known here: its severity cannot be placed"),
            "ask for the loss in a test of the severity of the machine",
        )),
        Some(test) if test.like == ShearsLike::Mild => found.push(finding(
            "shear-test-mild",
            format!(
                "the loss is that of a mild test ({}): gears and rolling bearings shear more",
                test.name
            ),
            "for gears and rolling bearings ask for the viscosity after 20 h in the roller bearing test",
        )),
        Some(_) => {}
    }
}

/// Sheared points against the new oil and, where it is stated, against its base.
fn sheared_points(found: &mut Vec<Finding>, oil: &Oil, curves: &Curves) {
    let Some(Shear::Points { points, .. }) = &oil.shear else {
        return;
    };
    let shown = |t: ThermodynamicTemperature| quantity(t.amount(), Units::Si, Toward::Nearest);
    for p in points {
        if p.nu.value > curves.new.nu_at(p.at) {
            found.push(finding(
                "sheared-thicker",
                format!(
                    "the sheared oil is thicker than the new one at {}",
                    shown(p.at)
                ),
                "check which values are new and which are sheared",
            ));
        }
        if let Makeup::Stated(made) = &curves.makeup
            && p.nu.value < made.base().nu_at(p.at)
        {
            found.push(finding(
                "sheared-below-base",
                format!(
                    "the sheared oil is thinner than its own base oil at {}: that is not the loss \
                     of a polymer alone",
                    shown(p.at)
                ),
                "check the points of the base oil and the sheared ones",
            ));
        }
    }
    if let Some((worn, _)) = curves.worn_range(true) {
        let coldest = (-40..=100).rev().step_by(5).map(|t| celsius(f64::from(t)));
        if let Some(t) = coldest.into_iter().find(|t| worn.crosses(*t)) {
            found.push(finding(
                "sheared-line-crosses",
                format!(
                    "carried on from its points, the line of the sheared oil would pass that of the \
                     new one at about {}: the new one is taken there",
                    shown(t)
                ),
                "a loss cannot turn into a gain: the sheared points do not carry that far",
            ));
        }
    }
}

/// An oil whose grade does not last.
fn grade_left(found: &mut Vec<Finding>, oil: &Oil, curves: &Curves) {
    for graded in grades(oil, curves) {
        let (Some(new), Some(sure)) = (&graded.new, graded.leaves()) else {
            continue;
        };
        let after = match &graded.worn {
            Some(Worn::Grade(grade) | Worn::AtWorst(grade)) => grade.as_deref(),
            None => None,
        };
        let system = graded.system.word();
        let after = after.map_or("no grade".to_owned(), |g| format!("{system} {g}"));
        let (name, says) = if sure {
            (
                "grade-left",
                format!("leaves its grade by shear: {system} {new} new, {after} worn"),
            )
        } else {
            (
                "grade-may-leave",
                format!(
                    "may leave its grade by shear: {system} {new} new, {after} at the greatest plausible loss"
                ),
            )
        };
        found.push(finding(
            name,
            says,
            "judge it by its worn viscosity, not by its label",
        ));
    }
}
