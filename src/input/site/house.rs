//! House values and house rules.

use super::{Known, named, named_or_private};
use crate::input::fields::{Fields, Slot};
use crate::input::keys::site::{HOUSE, HOUSE_RULE};
use crate::input::reader::Reader;
use crate::input::value::{Fault, Mend};
use crate::model::site::{House, HouseLimit, HouseRule};
use crate::problem::{Code, suggest};
use crate::quantity::parse::parse;
use crate::quantity::{Kind, Length, Measure, Ratio, Time, VgStep};
use crate::relation::bearing::reference_viscosity::SMALLEST_KAPPA;
use crate::source::Origin;
use crate::source::place::Given;

/// Reserve where the house states none, VG steps.
const RESERVE: f64 = 0.5;
/// Sample age where the house states none, s: twelve months.
const SAMPLE_AGE: f64 = 12.0 * 2_629_746.0;

pub(super) fn read(reader: &mut Reader<'_>, top: &Fields<'_>, known: &Known<'_>) -> House {
    let house = match top.get("house") {
        Some(slot) => Fields::read(reader, slot.node, &HOUSE, "house"),
        None => Fields::empty(&HOUSE, top.span, "house"),
    };
    let reserve = house.given::<VgStep>(reader, "reserve").unwrap_or_else(|| {
        Given::new(
            VgStep(RESERVE),
            "0.5 step",
            Origin::assumed("default reserve"),
        )
    });
    let sample_age = house
        .given::<Time>(reader, "sample age")
        .unwrap_or_else(|| {
            let age = Time::from_base(SAMPLE_AGE);
            Given::new(age, "12 months", Origin::assumed("default age of a sample"))
        });
    House {
        reserve,
        pour_margin: house.given(reader, "pour margin"),
        sample_age,
        rules: rules(reader, &house, known),
    }
}

fn rules(reader: &mut Reader<'_>, house: &Fields<'_>, known: &Known<'_>) -> Vec<HouseRule> {
    let mut found = Vec::new();
    for entry in named(reader, house, "rules", "house rules") {
        let name = entry.key.text.trim();
        let within = format!("house rule {name}");
        let fields = Fields::read(reader, &entry.value, &HOUSE_RULE, &within);
        fields.must(reader, &entry.value);
        let limit = fields.get("limit").and_then(|slot| limit(reader, slot));
        let replaces = replaces(reader, &fields, known);
        let only_for = fields.given_text(reader, "for");
        let source = fields.text(reader, "source");
        if let Some((limit, written)) = limit {
            found.push(HouseRule {
                name: name.to_owned(),
                replaces,
                limit,
                written,
                only_for,
                source,
                origin: fields.origin(),
            });
        }
    }
    found
}

/// The rule replaced; one that does not exist would replace nothing.
fn replaces(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    known: &Known<'_>,
) -> Option<Given<String>> {
    let given = fields.given_text(reader, "replaces")?;
    let slot = fields.get("replaces")?;
    let calculated = known.calculated.iter().copied();
    let window = known.rules.components.get(&given.value).is_some();
    if window || calculated.clone().any(|id| id == given.value) {
        return Some(given);
    }
    let meant = suggest::certain(&given.value, calculated.clone());
    let problem = reader
        .at(
            Code::RuleUnknown,
            format!("there is no rule {} to replace", given.value),
            slot.node.span,
            &slot.within,
        )
        .why("the rules are listed by: filmwright rules");
    let problem = named_or_private(problem, slot, meant, calculated);
    reader.report(problem);
    None
}

fn limit(reader: &mut Reader<'_>, slot: &Slot<'_>) -> Option<(HouseLimit, String)> {
    let text = slot.text(reader)?.trim().to_owned();
    match read_limit(&text) {
        Ok(limit) => Some((limit, text)),
        Err(fault) => {
            reader.faults(slot.node, vec![fault], &slot.within);
            None
        }
    }
}

/// Reads `kappa >= 0.4`, `film ratio >= 0.7`, `film height >= 15 um`, `floor = 0.7 nu_ref`.
fn read_limit(text: &str) -> Result<HouseLimit, Fault> {
    let plain = text.replace('≥', ">=").replace("=>", ">=");
    let parts = plain
        .split_once(">=")
        .map(|(what, value)| (what, value, true))
        .or_else(|| plain.split_once('=').map(|(w, v)| (w, v, false)));
    let (what, value, at_least) = parts.ok_or_else(|| no_limit(text))?;
    let value = value.trim();
    let number = |value: &str| {
        parse(Kind::Ratio, value)
            .ok()
            .map(|r| r.amount.base)
            .filter(|v| *v > 0.0)
    };
    let found = match (what.trim(), at_least) {
        ("kappa" | "κ", true) => number(value).map(HouseLimit::Kappa),
        ("film ratio" | "lambda", true) => number(value).map(HouseLimit::FilmRatio),
        ("film height", true) => parse(Kind::Length, value)
            .ok()
            .filter(|r| r.amount.base > 0.0)
            .map(|r| HouseLimit::FilmHeight(Length::from_base(r.amount.base))),
        ("floor", false) => value
            .strip_suffix("nu_ref")
            .and_then(|v| number(v.trim()))
            .map(|v| HouseLimit::ShareOfReference(Ratio::from_base(v))),
        _ => None,
    };
    match found {
        Some(HouseLimit::Kappa(kappa)) if kappa < SMALLEST_KAPPA => Err(below_range(text, kappa)),
        found => found.ok_or_else(|| no_limit(text)),
    }
}

/// Below 0.1 the standard covers nothing: a bearing there is judged by static rules, not by a
/// smaller ratio.
fn below_range(text: &str, kappa: f64) -> Fault {
    let all = 0..text.len();
    Fault::new(
        Code::ValueImpossible,
        format!("a viscosity ratio of {kappa} is outside ISO 281"),
        all.clone(),
    )
    .why("ISO 281 covers kappa from 0.1 on; below it there is no film to speak of")
    .mend(Mend::new(all, format!("kappa >= {SMALLEST_KAPPA}")))
}

fn no_limit(text: &str) -> Fault {
    let all = 0..text.len();
    let number = text
        .split(|c: char| !(c.is_ascii_digit() || c == '.'))
        .find(|p| p.parse::<f64>().is_ok_and(|v| v > 0.0));
    let number = number.unwrap_or("0.4");
    let instead = if text.contains("height") {
        format!("film height >= {number} um")
    } else if text.contains("film") || text.contains("lambda") {
        format!("film ratio >= {number}")
    } else if text.contains("floor") || text.contains("nu_ref") {
        format!("floor = {number} nu_ref")
    } else {
        format!("kappa >= {number}")
    };
    Fault::new(
        Code::HouseLimitForm,
        format!("limit \"{text}\" not understood"),
        all.clone(),
    )
    .why("a house rule asks kappa >= a number, film ratio >= a number, film height >= a length, or floor = a number nu_ref")
    .mend(Mend::new(all, instead))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::um;

    #[test]
    fn limits_are_read_and_others_mended() {
        assert_eq!(read_limit("kappa >= 0.4"), Ok(HouseLimit::Kappa(0.4)));
        assert_eq!(
            read_limit("film ratio ≥ 0.7"),
            Ok(HouseLimit::FilmRatio(0.7))
        );
        assert_eq!(
            read_limit("film height >= 15 um"),
            Ok(HouseLimit::FilmHeight(um(15.0)))
        );
        assert_eq!(
            read_limit("floor = 0.7 nu_ref"),
            Ok(HouseLimit::ShareOfReference(Ratio::from_base(0.7)))
        );
        for text in [
            "kappa 0.4",
            "0.4",
            "kappa > x",
            "film height 15",
            "floor >= 0.7 nu_ref",
            "",
        ] {
            let fault = read_limit(text).expect_err(text);
            let mended = fault.mends[0].applied(text);
            assert!(read_limit(&mended).is_ok(), "{text} -> {mended}");
        }
    }

    /// ISO 281 covers viscosity ratios from 0.1 on.
    #[test]
    fn a_ratio_outside_the_standard_is_refused() {
        let fault = read_limit("kappa >= 0.05").expect_err("below 0.1");
        assert_eq!(fault.code, Code::ValueImpossible);
        assert_eq!(fault.mends[0].applied("kappa >= 0.05"), "kappa >= 0.1");
        assert!(read_limit("kappa >= 0.1").is_ok());
    }
}
