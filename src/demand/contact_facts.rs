//! What is said beside the film of a contact: its regime, what heating of the inlet takes, what a
//! meniscus that stands close takes, all for the mineral oil that just meets the demand.

use super::context::{Context, HotAt};
use super::film::{FilmContact, FilmDemand};
use super::governing::{COMPARED_VI, carried_on_vi_95, film_on_mineral, line_of_vi_95};
use super::inputs::Wanted;
use crate::model::part::{Contact, Part};
use crate::quantity::convert::dynamic;
use crate::quantity::{DynamicViscosity, MassDensity, Measure, Ratio, TemperatureCoefficient};
use crate::relation::film::thermal::{
    GUPTA, GUPTA_LARGEST, MURCH_WILSON, PARAMETER, gupta, murch_wilson, usual_conductivity,
};
use crate::relation::oil::pressure_viscosity::{Family, agma_925};
use crate::trace::{Known, Recorder};

/// Adds the figures.
pub(super) fn add<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    contact: &Contact,
    film: &FilmDemand,
    at: HotAt,
) {
    let Some(t) = at.hottest else { return };
    let Some(nu) = film_on_mineral(film, t.value) else {
        return;
    };
    // a comparison oil, so its density is a round figure
    let eta = dynamic(nu, MassDensity::from_base(860.0));
    let Ok(alpha) = agma_925(Family::Mineral, eta) else {
        return;
    };
    if let Some(regime) = film.contact.regime(eta, alpha) {
        let says = format!(
            "regime {} by the chart of four, for the mineral oil of VI {COMPARED_VI} that just \
             meets the film; the film counted is that of {}",
            regime.words(),
            film.contact.law().source
        );
        cx.inform(part, says, None);
    }
    let Some(line) = carried_on_vi_95(nu, t.value).and_then(line_of_vi_95) else {
        return;
    };
    heating(cx, part, contact, film.contact, (eta, line.beta(t.value)));
    if contact.inlet_distance.is_none() && matches!(film.contact, FilmContact::Ellipse { .. }) {
        let says = "taken as flooded; state `inlet distance` where oil is scarce";
        cx.inform(part, says, None);
    }
}

fn heating<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    contact: &Contact,
    film: FilmContact,
    (eta, beta): (DynamicViscosity, TemperatureCoefficient),
) {
    let (Some(value), Some(speed)) = (film.heating(eta, beta), film.speed()) else {
        return;
    };
    let why = "mineral oil that just meets the film";
    let eta = cx.r.assume("eta", "viscosity at the inlet", eta, why);
    let beta =
        cx.r.assume("beta", "fall of its viscosity with temperature", beta, why);
    let speed =
        cx.r.assume("u", "mean speed of the surfaces", speed, "of this contact");
    let k_f = usual_conductivity();
    let k_f =
        cx.r.assume("k_f", "thermal conductivity of the oil", k_f, "mineral oil");
    let l = cx.r.law(
        "L",
        "thermal loading parameter of the inlet",
        &PARAMETER,
        (("beta", beta), ("eta", eta), ("u", speed), ("k_f", k_f)),
        |_| value,
    );
    let phi = cx.r.law(
        "phi_T",
        "share of the film left by the heating of the inlet",
        &MURCH_WILSON,
        (("L", l),),
        |(l,)| murch_wilson(l),
    );
    let says = "share of the film left by the heating of the inlet (Murch and Wilson), counted";
    cx.inform(part, says, Some((phi.value.amount(), phi.step)));
    sliding(cx, part, contact, film, l);
}

/// Gupta's factor where sliding is stated and the parameter is within its range.
fn sliding<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    contact: &Contact,
    film: FilmContact,
    l: Known<Ratio>,
) {
    let key = Wanted {
        key: "slide-roll",
        about: None,
        symbol: "S",
        says: "sliding over mean speed",
        how: "speeds of both surfaces",
    };
    let Some(s) = cx.maybe(part, key, contact.slide_roll.as_ref()) else {
        return;
    };
    if l.value.base() > GUPTA_LARGEST {
        let says = format!(
            "heating with sliding (Gupta) is outside its range: L {:.0}, at most {GUPTA_LARGEST}",
            l.value.base()
        );
        cx.inform(part, says, None);
        return;
    }
    let (Some(p), Some(e)) = (film.pressure(), film.modulus()) else {
        return;
    };
    let p =
        cx.r.assume("p_max", "largest pressure", p, "of this contact, by Hertz");
    let e = cx.r.assume("E", "reduced modulus", e, "of this contact");
    let phi = cx.r.attempt(
        "phi_T",
        "share of the film left with sliding",
        &GUPTA,
        (("L", l), ("S", s), ("p_max", p), ("E", e)),
        |(l, s, p, e)| gupta(l, s, p, e),
    );
    if let Ok(phi) = phi {
        let says = "share of the film left with sliding and pressure (Gupta), for comparison";
        cx.inform(part, says, Some((phi.value.amount(), phi.step)));
    }
}
