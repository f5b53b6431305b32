//! A few words for the reason behind a verdict, for tables; [`because`] has the sentences.
//!
//! [`because`]: super::because::because

use super::prepared::{PreparedOil, PreparedPoint, ReadyDemand, ReadyLimit};
use super::verdict::Verdict;
use super::weigh::{Judgement, Margin, ZERO};
use crate::demand::{End, PointDemands};
use crate::quantity::show::{Toward, Units, margin, quantity};
use crate::quantity::{Measure, ThermodynamicTemperature};

/// A few words: what decides, at which end, by how much.
pub fn brief(
    point: &PointDemands,
    ready: &PreparedPoint,
    oil: &PreparedOil,
    j: &Judgement,
    units: Units,
) -> String {
    match j.verdict {
        Verdict::Holds => holds(j).to_owned(),
        Verdict::Tight => tight(j),
        Verdict::Fails => fails(point, ready, oil, j, units),
        Verdict::Open => open(point, ready, oil, j, units),
    }
}

fn holds(j: &Judgement) -> &'static str {
    match (j.hot.is_some(), j.cold.is_some()) {
        (true, true) => "both ends, reserve kept",
        (true, false) => "hot, reserve kept",
        (false, true) => "cold, reserve kept",
        (false, false) => "no viscosity limit applies",
    }
}

fn tight(j: &Judgement) -> String {
    let short = |m: Option<Margin>, word: &str| {
        m.filter(|m| m.value < j.reserve).map(|m| {
            let left = margin(m.value, 2);
            format!("{word} reserve {}", left.trim_start_matches('+'))
        })
    };
    let mut parts: Vec<String> = [short(j.hot, "hot"), short(j.cold, "cold")]
        .into_iter()
        .flatten()
        .collect();
    if let Some(last) = parts.last_mut() {
        *last = format!("{last}, asked {}", j.reserve);
    }
    let d = j.doubts;
    for (stands, words) in [
        (d.far_below, "start far below its lowest point"),
        (d.window, "start below the window of two points"),
        (d.pour_close, "pour margin short of the preferred"),
        (d.above_continuous, "hotter than its base likes"),
    ] {
        if stands {
            parts.push(words.to_owned());
        }
    }
    parts.join("; ")
}

fn fails(
    point: &PointDemands,
    ready: &PreparedPoint,
    oil: &PreparedOil,
    j: &Judgement,
    units: Units,
) -> String {
    let ends = unmet_ends(point, j);
    let sheared = ends.contains(&End::HotFloor) && holds_new(ready, oil, j);
    let one_start = ends.len() == 1 && ends[0] == End::StartCeiling;
    if one_start && let Some((t, times)) = j.cold.and_then(|m| over_the_ceiling(ready, oil, m)) {
        let t = quantity(
            ThermodynamicTemperature::from_base(t).amount(),
            units,
            Toward::Nearest,
        );
        return format!("{times:.1} x too thick at {t}");
    }
    let words: Vec<&str> = ends
        .iter()
        .map(|end| match end {
            End::HotFloor if sheared => "holds new, too thin after shear-down",
            End::HotFloor => "too thin hot",
            End::RunningCeiling => "too thick running",
            End::StartCeiling => "too thick cold",
            End::PourMargin => "pour point too high",
            End::OilCeiling => "too hot for the oil",
            End::MakerGrade => "thinner than the maker's grade",
        })
        .collect();
    words.join(", ")
}

fn open(
    point: &PointDemands,
    ready: &PreparedPoint,
    oil: &PreparedOil,
    j: &Judgement,
    units: Units,
) -> String {
    let d = j.doubts;
    let mut parts = Vec::new();
    if j.failing_settings.0 > 0 {
        let how = fails(point, ready, oil, j, units);
        parts.push(format!("{how} at one end of an unknown"));
    }
    for (stands, words) in [
        (d.undecided, "an input is missing"),
        (d.low_confidence, "a rule of low confidence is not met"),
        (d.wax, "waxy near its start, not measured cold"),
        (d.pour_unknown, "pour point not stated"),
        (d.alpha_unknown, "pressure-viscosity not known"),
    ] {
        if stands {
            parts.push(words.to_owned());
        }
    }
    parts.join("; ")
}

/// The ends at which a demand is not met, each once, in the order of [`End`].
fn unmet_ends(point: &PointDemands, j: &Judgement) -> Vec<End> {
    let mut ends: Vec<End> = j
        .unmet
        .iter()
        .filter_map(|n| point.middle.list.get(usize::from(n)).map(|d| d.end))
        .collect();
    ends.sort();
    ends.dedup();
    ends
}

/// Whether every unmet hot floor would be met before shear.
fn holds_new(ready: &PreparedPoint, oil: &PreparedOil, j: &Judgement) -> bool {
    let unmet = |d: &&ReadyDemand| {
        d.end == End::HotFloor && j.unmet.iter().any(|number| number == d.number)
    };
    let mut floors = ready
        .settings
        .iter()
        .flat_map(|s| s.demands.iter())
        .filter(unmet)
        .peekable();
    floors.peek().is_some()
        && floors.all(|d| match &d.limit {
            ReadyLimit::Jaw(jaw) => oil.thin.above(jaw).0 >= -ZERO,
            _ => false,
        })
}

/// Temperature of the ceiling a margin belongs to, K, and how many times too thick the oil is.
fn over_the_ceiling(ready: &PreparedPoint, oil: &PreparedOil, m: Margin) -> Option<(f64, f64)> {
    let setting = ready.settings.get(usize::from(m.setting))?;
    let demand = setting.demands.iter().find(|d| d.number == m.demand)?;
    match &demand.limit {
        ReadyLimit::Jaw(jaw) => Some((demand.t, oil.thick.nu(demand.t) / jaw.nu)),
        _ => None,
    }
}
