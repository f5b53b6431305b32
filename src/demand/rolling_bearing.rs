//! Rolling bearing: viscosity ratio by ISO 281, the minimum of its type where size or speed is
//! not known, a direct film where the inner geometry is given.

use super::context::Context;
use super::inputs::Wanted;
use super::{Demand, End, For, Limit};
use crate::model::part::{Part, RollingBearing};
use crate::model::rulebook::Confidence;
use crate::model::site::{HouseLimit, HouseRule};
use crate::quantity::convert::number;
use crate::quantity::{AngularVelocity, KinematicViscosity, Length, Ratio};
use crate::relation::bearing::reference_viscosity::{
    PITCH_DIAMETER, REFERENCE_VISCOSITY, pitch_diameter, reference_viscosity,
};
use crate::relation::bearing::required::{REQUIRED, required_viscosity};
use crate::source::place::Whose;
use crate::trace::{Known, Recorder};

/// Id of the rule.
pub const KAPPA_RULE: &str = "iso281-kappa";
/// The viscosity ratio asked for where no house rule says otherwise.
pub const KAPPA: f64 = 1.0;

/// Adds the demands of a rolling bearing.
pub fn add<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, bearing: &RollingBearing) {
    let size = size(cx, part, bearing);
    let speed = cx.maybe(part, speed_wanted(), bearing.speed.as_ref());
    match (size, speed) {
        (Some(dm), Some(n)) => ratio(cx, part, bearing, (dm, n)),
        _ => minimum(cx, part, bearing),
    }
    if bearing.film_ratio.is_some() {
        super::bearing_film::add(cx, part, bearing, speed);
    }
}

fn speed_wanted() -> Wanted<'static> {
    Wanted {
        key: "speed",
        about: None,
        symbol: "n",
        says: "speed of rotation",
        how: "nameplate and ratio, or a stopwatch",
    }
}

fn length_wanted(key: &'static str, symbol: &'static str, says: &'static str) -> Wanted<'static> {
    Wanted {
        key,
        about: None,
        symbol,
        says,
        how: "designation on the ring or in the parts list",
    }
}

/// Pitch diameter, where bore and outside diameter are known at least as ranges.
fn size<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    bearing: &RollingBearing,
) -> Option<Known<Length>> {
    let bore = cx.maybe(
        part,
        length_wanted("bore", "d", "bore"),
        bearing.bore.as_ref(),
    );
    let outside = cx.maybe(
        part,
        length_wanted("outside", "D", "outside diameter"),
        bearing.outside.as_ref(),
    );
    let (bore, outside) = (bore?, outside?);
    cx.r.attempt(
        "Dpw",
        "pitch diameter",
        &PITCH_DIAMETER,
        (("d", bore), ("D", outside)),
        |(d, o)| pitch_diameter(d, o),
    )
    .ok()
}

/// The viscosity ratio demand, and its house rule where the part takes one.
fn ratio<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    bearing: &RollingBearing,
    (dm, n): (Known<Length>, Known<AngularVelocity>),
) {
    let nu1 = cx.r.attempt(
        "nu1",
        "reference viscosity",
        &REFERENCE_VISCOSITY,
        (("n", n), ("Dpw", dm)),
        |(n, dm)| reference_viscosity(n, dm),
    );
    let Ok(nu1) = nu1 else {
        cx.undecided(
            part,
            End::HotFloor,
            "the bearing stands still or has no size",
        );
        return;
    };
    super::bearing_facts::add(cx, part, bearing, (dm, n), nu1);
    super::grease_point::add(cx, part, bearing, (dm, n));
    match cx.house_rule(part, KAPPA_RULE) {
        Some((number_of, rule)) => house(cx, part, nu1, number_of, &rule),
        None => floor(cx, part, nu1, KAPPA, None, For::All),
    }
}

/// A house rule may go below 1 only for the oils it names; the others keep 1.
fn house<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    nu1: Known<KinematicViscosity>,
    number_of: usize,
    rule: &HouseRule,
) {
    let HouseLimit::Kappa(kappa) = rule.limit else {
        floor(cx, part, nu1, KAPPA, None, For::All);
        return;
    };
    let label = format!("H-{number_of} {}", rule.name);
    match &rule.only_for {
        Some(tag) => {
            let tag = tag.value.clone();
            floor(
                cx,
                part,
                nu1,
                kappa,
                Some((&label, rule)),
                For::With(tag.clone()),
            );
            floor(cx, part, nu1, KAPPA, None, For::Without(tag));
        }
        None => floor(cx, part, nu1, kappa, Some((&label, rule)), For::All),
    }
}

fn floor<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    nu1: Known<KinematicViscosity>,
    kappa: f64,
    house: Option<(&str, &HouseRule)>,
    only: For,
) {
    let ratio: Known<Ratio> = cx.r.assume(
        "kappa_min",
        "viscosity ratio asked for",
        number(kappa),
        if house.is_some() {
            "house rule"
        } else {
            "ISO 281: full credit for the film from 1 on"
        },
    );
    let need = cx.r.law(
        "nu_min",
        "viscosity the ratio needs",
        &REQUIRED,
        (("kappa_min", ratio), ("nu1", nu1)),
        |(k, nu1)| required_viscosity(k, nu1),
    );
    let says = format!("viscosity ratio kappa >= {kappa}");
    let (rule, source, whose) = match house {
        Some((label, rule)) => (
            label.to_owned(),
            rule.source
                .clone()
                .unwrap_or_else(|| "house rule".to_owned()),
            Whose::House,
        ),
        None => (
            KAPPA_RULE.to_owned(),
            "ISO 281:2007".to_owned(),
            Whose::Standard,
        ),
    };
    let at = cx.hot_at(part);
    cx.push(Demand {
        end: End::HotFloor,
        limit: Limit::Kinematic(need.value),
        limit_step: Some(need.step),
        rule,
        says,
        source,
        whose,
        confidence: Confidence::High,
        only,
        ..cx.blank(part, at)
    });
}

/// Where size or speed is not known at all: the minimum of the type fails an oil below it and
/// leaves the verdict open above it.
fn minimum<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, bearing: &RollingBearing) {
    if bearing.bore.is_none() || bearing.outside.is_none() {
        cx.missing(part, length_wanted("bore", "d", "bore"), None);
    }
    if !cx.has(bearing.speed.as_ref()) {
        cx.missing(
            part,
            speed_wanted(),
            bearing
                .speed
                .as_ref()
                .and_then(|s| s.ask().map(str::to_owned)),
        );
    }
    cx.undecided(
        part,
        End::HotFloor,
        "viscosity ratio: size or speed is not known",
    );
    let Some(class) = bearing.class else { return };
    let Some(window) = cx.rules.bearing_minimum(class) else {
        return;
    };
    let Some(least) = window.fixed_minimum() else {
        return;
    };
    let id = window.id.clone();
    let source = window.provenance.cited();
    let confidence = window.provenance.confidence;
    let known = cx.rule_value("nu_min", "least viscosity of the type", least, &id);
    let at = cx.hot_at(part);
    cx.push(Demand {
        end: End::HotFloor,
        limit: Limit::Kinematic(least),
        limit_step: Some(known.step),
        rule: id,
        says: format!(
            "least viscosity of a {} bearing at moderate speed",
            class.word()
        ),
        source,
        whose: Whose::Standard,
        confidence,
        ..cx.blank(part, at)
    });
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::Measure;
    use crate::quantity::convert::{mm, rpm};

    /// ISO 281: 22220 (100 x 180 mm) at 236 r/min, worked by hand:
    /// 45000 x 236^-0.83 x 140^-0.5 = 40.80 mm2/s.
    #[test]
    fn the_first_ten_minutes_example() {
        let dm = pitch_diameter(mm(100.0), mm(180.0)).expect("a bearing");
        let nu1 = reference_viscosity(rpm(236.0), dm).expect("it turns");
        assert!((nu1.base() * 1e6 - 40.797).abs() < 1e-3);
    }
}
