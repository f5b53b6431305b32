//! The figures of a sample against the limits of its class.

use super::bottle::{Bounds, Figures};
use super::limits::{Level, Levels, Limits};
use super::profile::{From, Profile};
use crate::model::rulebook::used_oil::Reading as On;
use crate::model::sample::Reading;
use crate::quantity::show::{Toward, fixed, significant};

/// A figure against its limit.
#[derive(Clone, Debug, PartialEq)]
pub struct Against {
    /// The key of what it is on: `viscosity change at 40 degC`, `water`.
    pub on: &'static str,
    /// The figure in words, with what it was compared with.
    pub says: String,
    /// What it calls for.
    pub level: Level,
    /// The limit.
    pub limit: Levels,
}

/// Movement of the viscosity from new oil.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Change {
    /// At 40 °C, a share.
    pub nu40: Option<f64>,
    /// At 100 °C, a share.
    pub nu100: Option<f64>,
    /// Viscosity index of the sample and of new oil.
    pub vi: (Option<f64>, Option<f64>),
}

impl Change {
    pub(super) fn of(figures: &Figures, label: &Profile) -> Self {
        let nu = |r| figures.exact(r);
        let (nu40, nu100) = (nu(Reading::Nu40), nu(Reading::Nu100));
        let vi = match (nu40, nu100) {
            (Some(a), Some(b)) => super::profile::index(a, b),
            _ => None,
        };
        Self {
            nu40: nu40.map(|v| v / label.nu40() - 1.0),
            nu100: nu100.map(|v| v / label.nu100() - 1.0),
            vi: (vi, label.vi),
        }
    }
}

fn signed(share: f64) -> String {
    let text = fixed(100.0 * share, 1, Toward::Nearest);
    if share > 0.0 && text != "0.0" {
        format!("+{text} %")
    } else {
        format!("{text} %")
    }
}

/// The movement of the viscosity against the practice limits of its class; `None` where neither
/// was measured. Where no limit applies nothing calls for anything.
pub(super) fn viscosity(change: &Change, limits: &Limits) -> (Option<Level>, Vec<Against>) {
    if change.nu40.is_none() && change.nu100.is_none() {
        return (None, Vec::new());
    }
    let mut list = Vec::new();
    for (moved, on, at) in [
        (change.nu40, On::ViscosityChange40, "40"),
        (change.nu100, On::ViscosityChange100, "100"),
    ] {
        let Some(moved) = moved else {
            continue;
        };
        let limit = if moved >= 0.0 {
            limits.high(on)
        } else {
            limits.low(on)
        };
        let Some(limit) = limit else {
            continue;
        };
        list.push(Against {
            on: crate::model::word::Word::word(on),
            says: format!("viscosity at {at} degC {} against new oil", signed(moved)),
            level: limit.above(moved.abs()),
            limit: limit.clone(),
        });
    }
    // without a reading at the temperature of the limit the other one stands in
    if list.is_empty() {
        let moved = change.nu100.or(change.nu40).unwrap_or(0.0);
        let mut any = [On::ViscosityChange40, On::ViscosityChange100].into_iter();
        let limit = any.find_map(|on| {
            if moved >= 0.0 {
                limits.high(on)
            } else {
                limits.low(on)
            }
        });
        if let Some(limit) = limit {
            list.push(Against {
                on: "viscosity change",
                says: format!(
                    "viscosity {} against new oil, at the one temperature measured",
                    signed(moved)
                ),
                level: limit.above(moved.abs()),
                limit: limit.clone(),
            });
        }
    }
    let worst = list.iter().map(|a| a.level).max().unwrap_or_default();
    (Some(worst), list)
}

/// Every other figure that has a limit here.
#[expect(clippy::too_many_lines, reason = "one paragraph for each figure")]
pub(super) fn others(figures: &Figures, label: Option<&Profile>, limits: &Limits) -> Vec<Against> {
    let mut list = Vec::new();
    let mut push = |on: On, high: bool, value: f64, says: String| {
        let limit = if high {
            limits.high(on)
        } else {
            limits.low(on)
        };
        if let Some(limit) = limit {
            let level = if high {
                limit.above(value)
            } else {
                limit.below(value)
            };
            list.push(Against {
                on: crate::model::word::Word::word(on),
                says,
                level,
                limit: limit.clone(),
            });
        }
    };
    // a bound says something of a limit only on its own side
    let value = |reading: Reading, high: bool| {
        let figure = figures.get(reading)?;
        match figure.bounds {
            Bounds::Exactly => Some(figure.value),
            Bounds::Above if high => Some(figure.value),
            Bounds::Below if !high => Some(figure.value),
            _ => None,
        }
    };
    let new = |reading: Reading| {
        let expected = label?.figures.get(&reading)?;
        Some((
            expected.value,
            if expected.from == From::Usual {
                ", assumed"
            } else {
                ""
            },
        ))
    };
    let two = |v: f64| fixed(v, 2, Toward::Nearest);
    let three = |v: f64| significant(v, 3, Toward::Nearest);
    if let Some(water) = value(Reading::Water, true) {
        push(
            On::Water,
            true,
            water,
            format!("water {} ppm", three(water)),
        );
    }
    if let Some(acid) = value(Reading::AcidNumber, true) {
        push(
            On::AcidNumber,
            true,
            acid,
            format!("acid number {} mg KOH/g", two(acid)),
        );
        if let Some((fresh, how)) = new(Reading::AcidNumber) {
            let says = format!(
                "acid number {} mg KOH/g, up by {} (new {}{how})",
                two(acid),
                two(acid - fresh),
                two(fresh)
            );
            push(On::AcidNumberRise, true, acid - fresh, says);
        }
    }
    if let (Some(flash), Some((fresh, _))) = (value(Reading::Flash, false), new(Reading::Flash)) {
        let says = format!(
            "flash point {} degC, {} K below new",
            fixed(flash, 0, Toward::Nearest),
            fixed(fresh - flash, 0, Toward::Nearest)
        );
        push(On::FlashDrop, true, fresh - flash, says);
    }
    if let Some(bands) = value(Reading::Oxidation, true) {
        let fresh = new(Reading::Oxidation).map_or(0.0, |(v, _)| v);
        let says = format!(
            "oxidation {} per cm over new",
            fixed(bands - fresh, 1, Toward::Nearest)
        );
        push(On::OxidationRise, true, bands - fresh, says);
    }
    if let Some(bands) = value(Reading::Nitration, true) {
        let fresh = new(Reading::Nitration).map_or(0.0, |(v, _)| v);
        let says = format!(
            "nitration {} per cm over new",
            fixed(bands - fresh, 1, Toward::Nearest)
        );
        push(On::NitrationRise, true, bands - fresh, says);
    }
    if let Some(left) = value(Reading::OxidationLife, false) {
        let says = format!("oxidation life left {} %", fixed(left, 0, Toward::Nearest));
        push(On::OxidationStabilityShare, false, left / 100.0, says);
    }
    if let Some(fuel) = value(Reading::Fuel, true) {
        push(
            On::Fuel,
            true,
            fuel,
            format!("fuel {} %", fixed(fuel, 1, Toward::Nearest)),
        );
    }
    if let Some(soot) = value(Reading::Soot, true) {
        push(
            On::Soot,
            true,
            soot,
            format!("soot {} %", fixed(soot, 1, Toward::Nearest)),
        );
    }
    if let (Some(base), Some((fresh, _))) =
        (value(Reading::BaseNumber, false), new(Reading::BaseNumber))
        && fresh > 0.0
    {
        let says = format!(
            "base number {} mg KOH/g of {} when new",
            two(base),
            two(fresh)
        );
        push(On::BaseNumberShare, false, base / fresh, says);
    }
    list
}
