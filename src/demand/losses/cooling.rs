//! What takes the heat away: the reading that tells it, or surface and heat transfer.

use crate::demand::context::Context;
use crate::demand::inputs::Wanted;
use crate::model::part::PartKind;
use crate::model::{Lubrication, Stated, Sump};
use crate::quantity::{Area, HeatTransfer, Power, ThermalConductance, ThermodynamicTemperature};
use crate::relation::heat::balance::{CONDUCTANCE, conductance};
use crate::relation::journal::heat::still_air;
use crate::trace::{Known, Recorder};

/// A reading of the sump with the ambient it was taken at.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Reading {
    /// The sump.
    pub sump: Known<ThermodynamicTemperature>,
    /// The ambient.
    pub ambient: Known<ThermodynamicTemperature>,
}

/// Whether the housing cools the oil: not where a tank and a cooler elsewhere do.
pub(super) fn housed<R: Recorder>(cx: &Context<'_, '_, R>) -> bool {
    !matches!(
        cx.lubrication(),
        Some(Lubrication::Circulated | Lubrication::PressureFed | Lubrication::Reservoir)
    )
}

pub(super) fn reading<R: Recorder>(cx: &mut Context<'_, '_, R>) -> Option<Reading> {
    let Some(Sump::Reading { sump, ambient }) = &cx.point.sump else {
        return None;
    };
    if !housed(cx) {
        return None;
    }
    Some(Reading {
        sump: cx.r.given("t_sump", "sump, as read", sump),
        ambient: cx.r.given("t_amb", "ambient at the reading", ambient),
    })
}

type Cools = (Option<Known<ThermalConductance>>, Option<Known<Power>>);

pub(super) fn cooling<R: Recorder>(cx: &mut Context<'_, '_, R>) -> Cools {
    let stated = cx.point.losses.clone().unwrap_or_default();
    let of_bearing = cx.point.parts.iter().find_map(|p| match &p.kind {
        PartKind::JournalBearing(b) => b.casing_area.clone(),
        _ => None,
    });
    let area = stated.casing_area.clone().or(of_bearing);
    let wanted = |key, symbol, says| Wanted {
        key,
        about: None,
        symbol,
        says,
        how: "drawing, or the outside of the housing with a rule",
    };
    let key = wanted("casing area", "A", "surface that gives off heat");
    let area: Option<Known<Area>> = cx.inputs.maybe(cx.r, key, known(area.as_ref()));
    let key = wanted("cooler", "P_c", "heat a cooler takes");
    let cooler = cx.inputs.maybe(cx.r, key, known(stated.cooler.as_ref()));
    let by_surface = area.filter(|_| housed(cx)).map(|area| {
        let key = wanted("heat transfer", "k", "heat transfer to the air");
        let transfer: Option<Known<HeatTransfer>> =
            cx.inputs
                .maybe(cx.r, key, known(stated.heat_transfer.as_ref()));
        let why = "the lower end of 15 to 20 W/(m2.K) in still air, ISO 7902-1 (from memory)";
        let k = transfer.unwrap_or_else(|| {
            cx.r.assume("k", "heat transfer to the air", still_air(), why)
        });
        let says = "heat given off for every kelvin";
        cx.r.law(
            "kA",
            says,
            &CONDUCTANCE,
            (("k", k), ("A", area)),
            |(k, a)| conductance(k, a),
        )
    });
    (by_surface, cooler)
}

/// A value that is stated, not one that is unknown: what is for information only is no axis.
fn known<Q>(stated: Option<&Stated<Q>>) -> Option<&Stated<Q>> {
    stated.filter(|s| matches!(s, Stated::Known(..)))
}
