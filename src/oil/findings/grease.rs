//! Findings about a grease: its code taken apart and held against its data.

use super::{Finding, finding};
use crate::model::Oil;
use crate::model::facts::Additive;
use crate::model::rulebook::Rulebook;
use crate::oil::grease_code::{GreaseCode, base_letter, of_grease};
use crate::quantity::convert::to_celsius;

pub(super) fn findings(found: &mut Vec<Finding>, oil: &Oil, rules: &Rulebook) {
    let Some(grease) = &oil.grease else { return };
    let Some(stated) = &grease.code else {
        if let Some(code) = of_grease(oil, rules) {
            found.push(finding(
                "grease-code-by-data",
                format!(
                    "no grease code stated; {} by its data (DIN 51502): {}",
                    code.written(),
                    code.says(rules)
                ),
                "compare with the label of the container",
            ));
        }
        return;
    };
    match GreaseCode::read(&stated.value, rules) {
        Ok(code) => {
            found.push(finding(
                "grease-code",
                format!("{} is, by DIN 51502: {}", code.written(), code.says(rules)),
                "compare with the label of the container",
            ));
            differs(found, oil, &code, rules);
        }
        Err(why) => found.push(finding(
            "grease-code-unread",
            format!("grease code {} is not understood: {why}", stated.value),
            "write it as KP2K-30, or leave it out",
        )),
    }
}

/// Where the code and the other data of the sheet disagree.
fn differs(found: &mut Vec<Finding>, oil: &Oil, code: &GreaseCode, rules: &Rulebook) {
    let Some(grease) = &oil.grease else { return };
    let mut say = |what: String| {
        let act = "ask the supplier which of the two holds";
        found.push(finding("grease-code-differs", what, act));
    };
    if let Some(nlgi) = &grease.nlgi
        && nlgi.value.trim() != code.nlgi
    {
        say(format!(
            "the code says NLGI {}, the data {}",
            code.nlgi, nlgi.value
        ));
    }
    if let Some(additives) = &oil.facts.additives {
        let ep = additives.contains(&Additive::Ep) || additives.contains(&Additive::Aw);
        if ep != code.additives.iter().any(|a| a == "P") {
            let (says, data) = if ep {
                ("without", "with")
            } else {
                ("with", "without")
            };
            say(format!(
                "the code is {says} EP or antiwear, the data {data}"
            ));
        }
    }
    if let Some(base) = &oil.base {
        let letter = base_letter(base.value);
        if letter != code.base && code.base != "X" && letter != "X" {
            say(format!(
                "the code's base oil does not agree with {}",
                base.value.word()
            ));
        }
    }
    let thickener = grease.thickener.as_ref();
    let Some(range) = thickener.and_then(|t| rules.thickeners.find(&t.value)) else {
        return;
    };
    if let Some(upper) = code.upper(rules)
        && upper > range.range.hi
    {
        say(format!(
            "the code promises {:.0} degC, its thickener is usually good to {:.0} degC",
            to_celsius(upper),
            to_celsius(range.range.hi)
        ));
    }
    if let Some(lowest) = code.lowest()
        && lowest < range.range.lo
    {
        say(format!(
            "the code promises {:.0} degC cold, its thickener is usually good to {:.0} degC",
            to_celsius(lowest),
            to_celsius(range.range.lo)
        ));
    }
}
