//! The rows of the oil: viscosity and temperature, index, grades, density, blends,
//! pressure-viscosity, polymer and shear.

mod ageing;
mod alpha;
mod blend;
pub(super) mod curve;
mod efflux;
mod grade;
mod index;
mod polymer;
mod refusals;

use super::{Args, Input, Need, Refusal, Relation, Worked};
use crate::quantity::convert::celsius;
use crate::quantity::{Ratio, ThermodynamicTemperature};
use crate::relation::oil::base_stock::BaseStock;
use crate::relation::oil::density::DensityLaw;
use crate::trace::{Known, Recorder};

/// The rows of this group.
pub(super) static ROWS: &[Relation] = &[
    curve::VISCOSITY_AT,
    curve::TEMPERATURE_AT,
    curve::TEMPERATURE_AT_DYNAMIC,
    index::VISCOSITY_INDEX,
    index::NU40_FROM_INDEX,
    index::NU100_FROM_INDEX,
    grade::ISO_GRADE,
    grade::ISO_GRADE_LIMITS,
    grade::AGMA_GRADE,
    grade::SAE_ENGINE_GRADE,
    grade::SAE_GEAR_GRADE,
    grade::D6080_GRADE,
    efflux::SAYBOLT,
    efflux::SAYBOLT_TO_NU,
    efflux::FUROL,
    efflux::FUROL_TO_NU,
    efflux::ENGLER_TO_NU,
    efflux::REDWOOD_TO_NU,
    curve::DENSITY_AT,
    blend::BLEND,
    blend::BLEND_FRACTION,
    alpha::PRESSURE_VISCOSITY,
    alpha::ALPHA_AT,
    polymer::SHEAR_LOSS,
    polymer::SHEAR_FROM_PSSI,
    polymer::POLYMER_CURVE,
    polymer::POLYMER_SPLIT,
    polymer::TEMPORARY_SHEAR,
    ageing::CONTACT_SHEAR_RATE,
    ageing::SHEAR_IN_USE,
    ageing::LINE_TOLERANCE,
    ageing::OIL_LIFE,
];

const GROUP: &str = "oil";

const fn must(name: &'static str, says: &'static str) -> Input {
    Input {
        name,
        says,
        need: Need::Always,
    }
}

const fn may(name: &'static str, says: &'static str, otherwise: &'static str) -> Input {
    Input {
        name,
        says,
        need: Need::Otherwise(otherwise),
    }
}

const fn form(name: &'static str, says: &'static str, of: &'static str) -> Input {
    Input {
        name,
        says,
        need: Need::Form(of),
    }
}

/// The temperature a viscosity is defined at, as a number the calculation can point to.
fn by_definition(w: &mut Worked, t_c: f64) -> Known<ThermodynamicTemperature> {
    w.trace.assume(
        "T",
        "temperature of a viscosity",
        celsius(t_c),
        "the temperature its name states",
    )
}

/// The density law of the base named, that of lubricating oils where none is.
fn density_law(args: &mut Args) -> Result<DensityLaw, Refusal> {
    let Some(word) = args.maybe_text("base")? else {
        return Ok(DensityLaw::LubricatingOil);
    };
    if word.trim().eq_ignore_ascii_case("pag") {
        return Ok(BaseStock::PagWaterSoluble.density_law());
    }
    let known = BaseStock::WRITTEN;
    let found = known
        .iter()
        .find(|(w, _)| w.eq_ignore_ascii_case(word.trim()));
    found.map(|(_, base)| base.density_law()).ok_or_else(|| {
        let words: Vec<&str> = known.iter().map(|(w, _)| *w).collect();
        let message = format!("base is `{word}`; it is one of {}, PAG", words.join(", "));
        Refusal::new("choice-unknown", message)
    })
}

/// A share that must lie between zero and one; a per-cent sign forgotten is named.
fn share(
    args: &mut Args,
    w: &mut Worked,
    key: &'static str,
    says: &'static str,
) -> Result<Known<Ratio>, Refusal> {
    let known: Known<Ratio> = args.quantity(w, key, says)?;
    let value = crate::quantity::Measure::base(known.value);
    if (0.0..=1.0).contains(&value) {
        return Ok(known);
    }
    let hint = if (1.0..=100.0).contains(&value) {
        format!("; write {key}=\"{value} %\"")
    } else {
        String::new()
    };
    let words = format!("{key} is {value}; a share is between 0 and 1{hint}");
    Err(Refusal::new("share-out-of-range", words))
}
