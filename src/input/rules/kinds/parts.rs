//! Components.

use crate::input::rules::fields::Fields;
use crate::model::facts::PartGroup;
use crate::model::part::BearingClass;
use crate::model::rulebook::component::{FeedMethod, GradeByAmbient, RatioBand};
use crate::model::rulebook::{Component, WindowLimit};
use crate::model::stated::{Between, ViscosityLimit};
use crate::quantity::{DynamicViscosity, Kind, KinematicViscosity, Measure, Ratio, parse};

pub(super) fn component(f: &Fields<'_>) -> Component {
    Component {
        id: f.text("id"),
        name: f.text("name"),
        also: f.texts("also"),
        group: f.word::<PartGroup>("group"),
        evaluate_at: f.opt_text("evaluate at"),
        min: limit(f, "min"),
        prefer: prefer(f),
        max_run: limit(f, "max run"),
        max_run_is_note: f.flag("max run is a note"),
        max_start: limit(f, "max start"),
        max_start_pump_fed: limit(f, "max start pump-fed"),
        short_term_min: f.opt("short-term min"),
        short_term_start: f.opt("short-term start"),
        typical_vg: f.counts("typical VG"),
        typical: f.texts("typical"),
        formula: f.opt_text("formula"),
        restates: f.flag("restates the formula"),
        lubrication: f.opt_word("lubrication"),
        needs: f.texts("class needs"),
        cleanliness: f.opt_text("cleanliness"),
        choose_by: f.opt_text("choose by"),
        by_ambient: f
            .children("grade by ambient")
            .iter()
            .map(by_ambient)
            .collect(),
        feeds: f.children("feeds").iter().map(feed).collect(),
        bands: f.children("bands").iter().map(band).collect(),
        base_oil: f.opt_between("base oil at 40 degC"),
        high_shear: high_shear(f),
        bearings: bearings(f),
        keys: f.texts("keys"),
        concerns: f.texts("concerns"),
        provenance: f.provenance(),
    }
}

/// `10 mm2/s`, `150000 mPa.s`, `0.7 nu_ref`, `4 nu_ref, at most 500 mm2/s`.
fn limit(f: &Fields<'_>, key: &'static str) -> Option<WindowLimit> {
    let text = f.opt_text(key)?;
    let read = read_limit(&text);
    if read.is_none() {
        f.fault(
            format!("{key}: `{text}` is not a limit"),
            format!("{key}: 10 mm2/s, or 150000 mPa.s, or 0.7 nu_ref"),
        );
    }
    read
}

fn read_limit(text: &str) -> Option<WindowLimit> {
    if let Some((factor, rest)) = text.split_once("nu_ref") {
        let at_most = match rest.trim().strip_prefix(", at most ") {
            Some(cap) => Some(kinematic(cap)?),
            None if rest.trim().is_empty() => None,
            None => return None,
        };
        return Some(WindowLimit::TimesReference {
            factor: Ratio::from_base(factor.trim().parse().ok()?),
            at_most,
        });
    }
    if let Some(nu) = kinematic(text) {
        return Some(WindowLimit::Fixed(ViscosityLimit::Kinematic(nu)));
    }
    let eta = parse::parse(Kind::DynamicViscosity, text).ok()?.amount.base;
    Some(WindowLimit::Fixed(ViscosityLimit::Dynamic(
        DynamicViscosity::from_base(eta),
    )))
}

fn kinematic(text: &str) -> Option<KinematicViscosity> {
    let read = parse::parse(Kind::KinematicViscosity, text).ok()?;
    Some(KinematicViscosity::from_base(read.amount.base))
}

/// `16 .. 54 mm2/s` or `1 .. 2 nu_ref`.
fn prefer(f: &Fields<'_>) -> Option<Between<WindowLimit>> {
    let text = f.opt_text("prefer")?;
    let ends = text.split_once("..").and_then(|(low, high)| {
        let (low, high) = (low.trim(), high.trim());
        let unit = high.split_once(' ')?.1;
        Some(Between {
            lo: read_limit(&format!("{low} {unit}"))?,
            hi: read_limit(high)?,
        })
    });
    if ends.is_none() {
        f.fault(
            format!("prefer: `{text}` is not a range"),
            "prefer: 16 .. 54 mm2/s, or 1 .. 2 nu_ref",
        );
    }
    ends
}

fn by_ambient(f: &Fields<'_>) -> GradeByAmbient {
    let band = GradeByAmbient {
        ambient: f.between("ambient"),
        vg: f.count("VG"),
    };
    f.finish();
    band
}

fn feed(f: &Fields<'_>) -> FeedMethod {
    let method = FeedMethod {
        method: f.text("method"),
        from: f.opt("from"),
        to: f.opt("to"),
        amount: f.opt_text("amount"),
    };
    f.finish();
    method
}

fn band(f: &Fields<'_>) -> RatioBand {
    let band = RatioBand {
        from: f.opt("from"),
        to: f.opt("to"),
        act: f.text("act"),
    };
    f.finish();
    band
}

fn high_shear(f: &Fields<'_>) -> Vec<(String, DynamicViscosity)> {
    f.pairs("HTHS at least")
        .into_iter()
        .filter_map(
            |(duty, text)| match parse::parse(Kind::DynamicViscosity, &text) {
                Ok(read) => Some((duty, DynamicViscosity::from_base(read.amount.base))),
                Err(bad) => {
                    f.fault(
                        format!("HTHS at least, {duty}: `{text}`: {bad}"),
                        "3.5 mPa.s",
                    );
                    None
                }
            },
        )
        .collect()
}

fn bearings(f: &Fields<'_>) -> Vec<BearingClass> {
    f.texts("bearings")
        .iter()
        .filter_map(|text| {
            let found = BearingClass::WRITTEN.iter().find(|(word, _)| word == text);
            if found.is_none() {
                let known: Vec<&str> = BearingClass::WRITTEN.iter().map(|(w, _)| *w).collect();
                f.fault(
                    format!("bearings: `{text}` is not a kind of bearing"),
                    format!("one of {}", known.join(", ")),
                );
            }
            found.map(|(_, class)| *class)
        })
        .collect()
}
