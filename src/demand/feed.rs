//! Chains: how the oil is brought limits the speed, and the ambient names a grade.

use super::End;
use super::context::Context;
use super::inputs::Wanted;
use crate::model::Lubrication;
use crate::model::facts::PartGroup;
use crate::model::part::{Component, Part};
use crate::model::rulebook::component::Component as Window;
use crate::quantity::convert::to_celsius;
use crate::quantity::{Measure, ThermodynamicTemperature};
use crate::trace::Recorder;

/// The component that holds the ways of feeding a chain.
const METHODS: &str = "chain_methods";

/// Adds what a window says of feeding and of grades by ambient.
pub fn add<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    component: &Component,
    window: &Window,
) {
    let chain = window.group == PartGroup::Chain;
    let feeds = if window.feeds.is_empty() && chain {
        cx.rules.components.get(METHODS).cloned()
    } else {
        (!window.feeds.is_empty()).then(|| window.clone())
    };
    if let Some(feeds) = feeds {
        methods(cx, part, component, &feeds);
    }
    by_ambient(cx, part, window);
}

fn methods<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    component: &Component,
    window: &Window,
) {
    let wanted = Wanted {
        key: "chain speed",
        about: None,
        symbol: "v",
        says: "chain speed",
        how: "sprocket speed, teeth and pitch",
    };
    let Some(speed) = cx.take(part, wanted, component.chain_speed.as_ref()) else {
        return;
    };
    let v = speed.value.base();
    let serving: Vec<String> = window
        .feeds
        .iter()
        .filter(|f| f.from.is_none_or(|x| v >= x.base()) && f.to.is_none_or(|x| v <= x.base()))
        .map(|f| match &f.amount {
            Some(amount) => format!("{}, {amount}", f.method),
            None => f.method.clone(),
        })
        .collect();
    let figure = Some((speed.value.amount(), speed.step));
    cx.inform(
        part,
        format!("feeds that serve this speed: {}", serving.join("; ")),
        figure,
    );
    let word = match cx.lubrication() {
        Some(Lubrication::Drip) => "drip",
        Some(Lubrication::Bath | Lubrication::Splash) => "dip",
        Some(Lubrication::PressureFed | Lubrication::Circulated) => "spray",
        _ => return,
    };
    if !serving.iter().any(|s| s.contains(word)) {
        let says = format!("{word} feed does not serve a chain at {v} m/s");
        cx.inform(part, says.clone(), figure);
        // no oil mends it, so no oil fails by it; nor can one be said to hold
        cx.undecided(part, End::HotFloor, &says);
    }
}

fn by_ambient<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part, window: &Window) {
    let Some((_, hot)) = cx.thermal.ambient else {
        return;
    };
    let at = |t: ThermodynamicTemperature| to_celsius(t);
    let found = window
        .by_ambient
        .iter()
        .find(|g| at(hot.value) >= at(g.ambient.lo) && at(hot.value) <= at(g.ambient.hi));
    if let Some(grade) = found {
        cx.inform(
            part,
            format!("usual grade at the hottest ambient: ISO VG {}", grade.vg),
            None,
        );
    }
}
