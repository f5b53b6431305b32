//! A change in words, and as the user may type it.

use super::lever::Lever;
use super::{Change, Mend};
use crate::numeric::math::exp;
use crate::quantity::show::{Toward, Units, fixed, margin, quantity};
use crate::quantity::{
    Amount, Kind, KinematicViscosity, Measure, Ratio, TemperatureInterval,
    ThermodynamicTemperature, VgStep,
};
use crate::relation::oil::grade::IsoGrade;

impl Change {
    /// Which way the shown amount may be rounded: towards the side that does.
    pub fn toward(&self) -> Toward {
        if self.to >= self.from {
            Toward::Up
        } else {
            Toward::Down
        }
    }

    /// The amount as a quantity: what is to be set.
    pub fn amount(&self) -> Amount {
        amount(self.lever, self.to)
    }

    /// What is set today; of a start limit nothing, where it stands is on the sheet.
    pub fn was(&self) -> Option<Amount> {
        (self.lever != Lever::StartLimit).then(|| amount(self.lever, self.from))
    }

    /// The amount shown, rounded to the side that does.
    pub fn shown(&self, units: Units) -> String {
        let a = self.amount();
        match self.lever {
            Lever::ShearLoss => format!("{} %", fixed(a.base * 100.0, 1, Toward::Down)),
            Lever::Index => fixed(a.base, 0, Toward::Up),
            Lever::Grade => {
                // away from zero is the side that does
                let up = fixed(a.base.abs(), 2, Toward::Up);
                format!("{}{up} step", if a.base < 0.0 { "-" } else { "+" })
            }
            Lever::Reserve => format!("{} step", fixed(a.base, 2, Toward::Down)),
            _ => quantity(a, units, self.toward()),
        }
    }

    /// The change in words, with its amount: `a sump heater set to -8 degC or above`.
    pub fn words(&self, grade: Option<IsoGrade>, units: Units) -> String {
        let shown = self.shown(units);
        match self.lever {
            Lever::Heater => format!("a sump heater set to {shown} or above"),
            Lever::ColdestStart => format!("no start colder than {shown}"),
            Lever::StartLimit => format!("a start limit of {shown} or more, allowed by the maker"),
            Lever::SumpRise => format!("a sump rise of {shown} or less"),
            Lever::HottestAmbient => format!("an ambient of {shown} or cooler"),
            Lever::Cooler => format!("a cooler that holds the sump at {shown} or below"),
            Lever::ShearLoss => format!("a permanent shear loss of {shown} or less"),
            Lever::Index => format!("the same grade with a VI of {shown} or more"),
            Lever::Grade => {
                let way = if self.to > 0.0 { "thicker" } else { "thinner" };
                let step = shown.trim_start_matches(['+', '-']);
                match grade {
                    Some(g) => format!(
                        "ISO VG {} of the same slope ({step} {way} is enough)",
                        g.number()
                    ),
                    None => format!("an oil of the same slope, {step} {way}"),
                }
            }
            Lever::Reserve => format!("a reserve of {shown} asked instead of {}", self.asked()),
        }
    }

    fn asked(&self) -> String {
        margin(self.from, 2).trim_start_matches('+').to_owned()
    }

    /// As `--set` takes it; none for changes of the oil and of the reserve.
    pub fn setting(&self, cold_end: Option<f64>) -> Option<String> {
        let shown = plain(&self.shown(Units::Si));
        Some(match self.lever {
            Lever::Heater => format!("heater={shown}"),
            Lever::ColdestStart => format!("start={shown}"),
            Lever::StartLimit => format!("start limit={shown}, maker"),
            Lever::SumpRise => format!("sump rise={shown}"),
            Lever::HottestAmbient => format!("ambient={} .. {shown}", end(cold_end?)),
            Lever::Cooler => match cold_end {
                Some(cold) => format!("sump={} .. {shown}", end(cold)),
                None => format!("sump=held at {shown}"),
            },
            _ => return None,
        })
    }
}

/// The cold end of a range, without its unit.
fn end(kelvins: f64) -> String {
    let t = ThermodynamicTemperature::from_base(kelvins).amount();
    let shown = quantity(t, Units::Si, Toward::Nearest);
    plain(shown.trim_end_matches(" degC"))
}

/// Digits as the reader takes them: no narrow spaces.
fn plain(text: &str) -> String {
    text.chars().filter(|c| *c != '\u{202f}').collect()
}

fn amount(lever: Lever, at: f64) -> Amount {
    match lever {
        Lever::Heater | Lever::ColdestStart | Lever::HottestAmbient | Lever::Cooler => {
            ThermodynamicTemperature::from_base(at).amount()
        }
        Lever::StartLimit => KinematicViscosity::from_base(exp(at)).amount(),
        Lever::SumpRise => TemperatureInterval::from_base(at).amount(),
        Lever::ShearLoss | Lever::Index => Amount {
            kind: Kind::Ratio,
            base: Ratio::from_base(at).base(),
        },
        Lever::Grade | Lever::Reserve => VgStep(at).amount(),
    }
}

impl Mend {
    /// All its changes in words.
    pub fn words(&self, units: Units) -> String {
        let each: Vec<String> = self
            .changes
            .iter()
            .map(|c| c.words(self.grade, units))
            .collect();
        each.join(", and ")
    }

    /// The arguments of `whatif` that show the same, where every change can be typed.
    pub fn settings(&self) -> Option<Vec<String>> {
        self.changes
            .iter()
            .map(|c| c.setting(self.cold_end))
            .collect()
    }
}
