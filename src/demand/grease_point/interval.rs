//! How often a bearing is regreased: the formula with every factor, and the reading of bearing
//! catalogues beside it.

use super::{share, wanted};
use crate::demand::End;
use crate::demand::context::Context;
use crate::demand::inputs::Usual;
use crate::model::machine::Regrease;
use crate::model::part::{BearingClass, Part, RollingBearing};
use crate::model::rulebook::grease::FactorKind;
use crate::quantity::convert::{number, to_celsius};
use crate::quantity::{AngularVelocity, Measure, Ratio, Time};
use crate::relation::bearing::grease::{
    ADJUSTED, BY_FACTORS, INTERVAL, adjusted, by_factors, interval,
};
use crate::trace::{Known, Recorder};

/// Row of the table of bearing factors.
fn case_of(class: BearingClass) -> Option<&'static str> {
    match class {
        c if c.is_thrust() => None,
        c if c.is_ball() => Some("bearing-ball"),
        BearingClass::CylindricalRoller | BearingClass::NeedleRoller => {
            Some("bearing-cylindrical-or-needle-roller")
        }
        _ => Some("bearing-taper-or-spherical-roller"),
    }
}

/// The interval with every factor, and the reading of bearing catalogues beside it.
pub(super) fn times<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    bearing: &RollingBearing,
    n: Known<AngularVelocity>,
) {
    let bore = wanted("bore", "d", "bore", "designation on the ring");
    let Some(d) = cx.maybe(part, bore, bearing.bore.as_ref()) else {
        return;
    };
    let Some(case) = bearing.class.and_then(case_of) else {
        let says = "interval: the table holds radial bearings of a known type only";
        cx.inform(part, says, None);
        return;
    };
    let Some(k) = of_id(cx, "K", "factor of the kind of bearing", case) else {
        return;
    };
    let found = cx.r.attempt(
        "t_0",
        "interval before the other factors",
        &INTERVAL,
        (("k", k), ("n", n), ("d", d)),
        |(k, n, d)| interval(k, n, d),
    );
    let Ok(base) = found else {
        let says = "grease is not suitable at this size and speed: the formula for the interval \
                    turns negative; lubricate with oil";
        cx.inform(part, says, None);
        cx.undecided(
            part,
            End::HotFloor,
            "grease is not suitable at this size and speed",
        );
        return;
    };
    let Some(t) = cx.hot_at(part).hottest else {
        let says = "interval: the temperature of the bearing is not known";
        cx.inform(part, says, None);
        return;
    };
    let factors = factors(cx, part, to_celsius(t.value));
    let [temperature, dirt, moisture, vibration, position] = factors;
    let due = cx.r.law(
        "t",
        "regreasing interval",
        &BY_FACTORS,
        (
            ("t_0", base),
            ("k_T", temperature),
            ("k_d", dirt),
            ("k_m", moisture),
            ("k_v", vibration),
            ("k_p", position),
        ),
        |(base, t, d, m, v, p): (Time, Ratio, Ratio, Ratio, Ratio, Ratio)| {
            by_factors(base, [t, d, m, v, p])
        },
    );
    let says = format!(
        "regreasing interval: kind {} x temperature {} x dirt {} x moisture {} x vibration {} x \
         position {}",
        k.value.base(),
        temperature.value.base(),
        dirt.value.base(),
        moisture.value.base(),
        vibration.value.base(),
        position.value.base()
    );
    cx.inform(part, says, Some((due.value.amount(), due.step)));
    catalogue(cx, part, base, (dirt, moisture, vibration, position), t);
    today(cx, part, due);
}

/// The same with the temperature rule of bearing catalogues: half for every 15 K above 70 °C.
fn catalogue<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    base: Known<Time>,
    (dirt, moisture, vibration, position): (Known<Ratio>, Known<Ratio>, Known<Ratio>, Known<Ratio>),
    t: Known<crate::quantity::ThermodynamicTemperature>,
) {
    let others =
        dirt.value.base() * moisture.value.base() * vibration.value.base() * position.value.base();
    let found = cx.r.attempt(
        "t_cat",
        "interval by the temperature rule of bearing catalogues",
        &ADJUSTED,
        (
            ("t_0", base),
            ("T", t),
            ("k_d", dirt),
            ("k_m", moisture),
            ("k_v", vibration),
            ("k_p", position),
        ),
        |(base, t, _, _, _, _)| adjusted(base, t, number(others)),
    );
    if let Ok(other) = found {
        let says = "the same by the temperature rule of bearing catalogues, for comparison";
        cx.inform(part, says, Some((other.value.amount(), other.step)));
    }
}

fn today<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, due: Known<Time>) {
    let stated = cx.point.regrease.as_ref().and_then(|r| r.interval.clone());
    let key = wanted(
        "regrease interval",
        "t_now",
        "interval today",
        "the greaser",
    );
    let Some(now) = cx.maybe(part, key, stated.as_ref()) else {
        return;
    };
    let share = share(cx, (now.value.base(), now), (due.value.base(), due));
    let says = if share.value.base() > 1.0 {
        "interval today over the one needed (too long)"
    } else if share.value.base() < 0.5 {
        "interval today over the one needed (oftener than needed)"
    } else {
        "interval today over the one needed"
    };
    cx.inform(part, says, Some((share.value.amount(), share.step)));
}

/// A factor of the rules by its id.
fn of_id<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    symbol: &'static str,
    says: &'static str,
    id: &str,
) -> Option<Known<Ratio>> {
    let value = cx.rules.grease_factors.get(id)?.factor;
    Some(cx.rule_value(symbol, says, value, id))
}

/// Temperature, dirt, moisture, vibration, position.
fn factors<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    bearing_c: f64,
) -> [Known<Ratio>; 5] {
    use crate::model::facts::WaterEntry;
    let regrease: Option<Regrease> = cx.point.regrease.clone();
    let dirt = match cx.point.dust.as_ref().map(|d| d.value.as_str()) {
        Some("high") => Some("extreme"),
        Some("yes") => Some("severe"),
        Some(_) => Some("light"),
        None => None,
    };
    let moisture = match (cx.point.facts.water_entry, cx.point.facts.wet) {
        (Some(WaterEntry::Steady), _) => Some("water"),
        (Some(WaterEntry::Seldom), _) | (_, Some(true)) => Some("condensation"),
        (Some(WaterEntry::No), _) | (_, Some(false)) => Some("below 80 % humidity"),
        _ => None,
    };
    let vibration = regrease.as_ref().and_then(|r| r.vibration.as_ref());
    let vibration = vibration.map(|v| match v.value.as_str() {
        "high" => "above 10 mm/s",
        "medium" => "5 to 10 mm/s",
        _ => "below 5 mm/s",
    });
    let position = regrease.as_ref().and_then(|r| r.position.as_ref());
    let position = position.map(|p| match p.value.as_str() {
        "vertical" => "vertical",
        "sloping" => "at 45 deg",
        _ => "horizontal",
    });
    [
        by_figure(cx, FactorKind::Temperature, bearing_c),
        of_case(
            cx,
            part,
            (FactorKind::Dirt, "dust", "k_d", "factor of dirt"),
            dirt,
            "light",
        ),
        of_case(
            cx,
            part,
            (
                FactorKind::Moisture,
                "water entry",
                "k_m",
                "factor of moisture",
            ),
            moisture,
            "below 80 % humidity",
        ),
        of_case(
            cx,
            part,
            (
                FactorKind::Vibration,
                "vibration",
                "k_v",
                "factor of vibration",
            ),
            vibration,
            "below 5 mm/s",
        ),
        of_case(
            cx,
            part,
            (
                FactorKind::Position,
                "position",
                "k_p",
                "factor of position",
            ),
            position,
            "horizontal",
        ),
    ]
}

/// The row of a figure: the first whose end it does not pass, else the open one.
fn by_figure<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    kind: FactorKind,
    figure: f64,
) -> Known<Ratio> {
    let rows = cx.rules.grease_factors.iter().filter(|f| f.kind == kind);
    let mut rows: Vec<_> = rows.cloned().collect();
    rows.sort_by(|a, b| {
        let end = |f: &crate::model::rulebook::grease::IntervalFactor| {
            f.up_to.map_or(f64::INFINITY, Measure::base)
        };
        end(a).total_cmp(&end(b))
    });
    let found = rows
        .iter()
        .find(|f| f.up_to.is_none_or(|to| figure <= to.base() + 1e-9));
    let (value, id) = found.map_or((number(1.0), "grease factors"), |f| {
        (f.factor, f.id.as_str())
    });
    cx.rule_value("k_T", "factor of temperature", value, id)
}

type Factor = (FactorKind, &'static str, &'static str, &'static str);

/// The row of a case; the mildest stands in where nobody says, with the whole table as its range.
fn of_case<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    (kind, key, symbol, says): Factor,
    case: Option<&'static str>,
    mildest: &'static str,
) -> Known<Ratio> {
    let of_kind = cx.rules.grease_factors.iter().filter(|f| f.kind == kind);
    let rows: Vec<_> = of_kind.cloned().collect();
    let row = |case: &str| rows.iter().find(|f| f.case == case);
    if let Some(found) = case.and_then(row) {
        return cx.rule_value(symbol, says, found.factor, &found.id);
    }
    let least = rows.iter().map(|f| f.factor.base()).fold(1.0, f64::min);
    let usual = Usual {
        value: row(mildest).map_or(number(1.0), |f| f.factor),
        lo: number(least),
        hi: number(1.0),
        why: "nobody says: the mildest case of the table",
    };
    cx.or_assume::<Ratio>(
        part,
        wanted(key, symbol, says, "look at the bearing"),
        None,
        usual,
    )
}
