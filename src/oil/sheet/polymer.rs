//! Polymer and shear on the sheet.

use super::teller::Teller;
use crate::model::rulebook::ShearsLike;
use crate::oil::makeup::Makeup;
use crate::oil::thinning::{End, Kept};
use crate::quantity::convert::{celsius, number};
use crate::quantity::{KinematicViscosity, Measure, Ratio, ShearRate, ThermodynamicTemperature};
use crate::relation::oil::polymer::{SPLIT, ThickenedOil};
use crate::relation::oil::shear::{LOSS, PSSI, stability_index};
use crate::relation::oil::temporary_shear::{HIGH_SHEAR, RATIO};
use crate::relation::oil::viscosity_temperature::ViscosityCurve;
use crate::trace::{Both, Known, Recorder};

/// What is known of polymer and shear.
#[derive(Clone, Debug, PartialEq)]
pub struct PolymerSheet {
    /// Whether base oil and polymer are stated, not split by assumption.
    pub stated: bool,
    /// The polymer as named.
    pub named: Option<String>,
    /// Base oil at 40 and 100 °C, thinner and thicker end; equal where stated.
    pub base: Option<[(Known<KinematicViscosity>, Known<KinematicViscosity>); 2]>,
    /// Share of the viscosity at 100 °C that the polymer carries, least and greatest.
    pub carries: Option<(Ratio, Ratio)>,
    /// Where the polymer's share moves; outside it the oil follows its base.
    pub window: (ThermodynamicTemperature, ThermodynamicTemperature),
    /// Permanent loss.
    pub loss: Loss,
    /// Stability index, where base and loss are known.
    pub index: Option<Known<Ratio>>,
    /// The shear test as written, and as the rules know it, with what it stands for.
    pub test: Option<(String, Option<(String, ShearsLike)>)>,
    /// All tests the rules know, mildest first, with their severity.
    pub severity: Vec<(String, Ratio)>,
    /// Viscosity kept at 150 °C and 1e6 1/s, least and greatest, with steps.
    pub kept_150: Option<(Known<Ratio>, Known<Ratio>)>,
    /// Whether that is calibrated on a stated high-shear viscosity.
    pub calibrated: bool,
}

impl PolymerSheet {
    /// The shear test as written, and what the rules know it as.
    pub fn test_says(&self) -> Option<String> {
        let (written, known) = self.test.as_ref()?;
        let known = known.as_ref().map_or("a test not known here", |k| &k.0);
        Some(format!("test: {written} ({known})"))
    }

    /// The tests the rules know, in their order.
    pub fn order_of_tests(&self) -> Option<String> {
        let order: Vec<&str> = self
            .severity
            .iter()
            .map(|(name, _)| name.as_str())
            .collect();
        (!order.is_empty()).then(|| {
            format!(
                "Tests are not interchangeable; from mild to severe: {}",
                order.join("; ")
            )
        })
    }
}

/// Permanent loss at 40 and 100 °C.
#[derive(Clone, Debug, PartialEq)]
pub enum Loss {
    /// Nothing is lost, or nothing is known to be.
    Nothing,
    /// Known.
    Known {
        /// At 40 °C.
        at40: Known<Ratio>,
        /// At 100 °C.
        at100: Known<Ratio>,
    },
    /// Only a plausible range, the same at every temperature.
    Between {
        /// Least.
        least: Ratio,
        /// Greatest in engines and hydraulics.
        most_mild: Ratio,
        /// Greatest in gears and rolling bearings.
        most_severe: Ratio,
    },
}

impl Teller<'_> {
    /// Polymer and shear; `None` for an oil without polymer.
    pub(super) fn polymer(&mut self) -> Option<PolymerSheet> {
        if self.curves.makeup == Makeup::Plain {
            return None;
        }
        let named = self
            .oil
            .formulation
            .as_ref()
            .and_then(|f| f.polymer.as_ref());
        let window = self
            .curves
            .makeup
            .oils()
            .first()
            .map_or_else(|| (celsius(0.0), celsius(100.0)), ThickenedOil::window);
        let carries = self.curves.makeup.carried_at_100();
        let kept_150 = self.kept_150();
        Some(PolymerSheet {
            stated: matches!(self.curves.makeup, Makeup::Stated(_)),
            named: named.map(|p| p.value.clone()),
            base: self.base_points(),
            carries: carries.map(|(a, b)| (number(a), number(b))),
            window,
            loss: self.loss(),
            index: self.stability(),
            test: self.test(),
            severity: self.severity(),
            kept_150,
            calibrated: self.curves.thinning.as_ref().is_some_and(|t| t.calibrated),
        })
    }

    fn base_points(
        &mut self,
    ) -> Option<[(Known<KinematicViscosity>, Known<KinematicViscosity>); 2]> {
        let oils = self.curves.makeup.oils();
        let (first, last) = (*oils.first()?, *oils.last()?);
        let stated = matches!(self.curves.makeup, Makeup::Stated(_));
        let mut at = |t: f64| {
            let t = self.asked(celsius(t));
            let new = self.nu_new(t, "viscosity of the new oil");
            let mut end = |nu: KinematicViscosity, says: &'static str| {
                if stated {
                    return self.d.assume("nu_base", says, nu, "base oil stated");
                }
                self.d.law(
                    "nu_base",
                    says,
                    &SPLIT,
                    Both((("nu", new),), (("t", t),)),
                    |_: ((KinematicViscosity,), (ThermodynamicTemperature,))| nu,
                )
            };
            let thin = end(
                first.base().nu_at(t.value),
                "base oil, thinner end of the estimate",
            );
            (
                thin,
                end(
                    last.base().nu_at(t.value),
                    "base oil, thicker end of the estimate",
                ),
            )
        };
        Some([at(40.0), at(100.0)])
    }

    fn loss(&mut self) -> Loss {
        use crate::oil::Worn;
        match self.curves.worn {
            Worn::AsNew => Loss::Nothing,
            Worn::Between {
                least,
                most_mild,
                most_severe,
            } => Loss::Between {
                least: number(least),
                most_mild: number(most_mild),
                most_severe: number(most_severe),
            },
            Worn::Known(_) => {
                let mut at = |t: f64| {
                    let t = self.asked(celsius(t));
                    let new = self.nu_new(t, "viscosity of the new oil");
                    let (_, worn) = self.worn(t, new)?;
                    Some(self.d.law(
                        "PVL",
                        "viscosity lost by shear",
                        &LOSS,
                        (("nu_new", new), ("nu_sheared", worn)),
                        |(n, s): (KinematicViscosity, KinematicViscosity)| {
                            number(1.0 - s.base() / n.base())
                        },
                    ))
                };
                match (at(40.0), at(100.0)) {
                    (Some(at40), Some(at100)) => Loss::Known { at40, at100 },
                    _ => Loss::Nothing,
                }
            }
        }
    }

    /// Stability index where the base is stated and the loss is known.
    fn stability(&mut self) -> Option<Known<Ratio>> {
        let Makeup::Stated(made) = self.curves.makeup else {
            return None;
        };
        self.curves.loss_range(true).is_none().then_some(())?;
        let t = self.asked(celsius(100.0));
        let new = self.nu_new(t, "viscosity of the new oil");
        let (_, worn) = self.worn(t, new)?;
        let base = made.base().nu_at(t.value);
        let base = self
            .d
            .assume("nu_base", "base oil at 100 degC", base, "base oil stated");
        self.d
            .attempt(
                "PSSI",
                "permanent shear stability index",
                &PSSI,
                (("nu_new", new), ("nu_sheared", worn), ("nu_base", base)),
                |(n, s, b)| stability_index(n, s, b),
            )
            .ok()
    }

    fn test(&self) -> Option<(String, Option<(String, ShearsLike)>)> {
        let written = self.oil.shear.as_ref()?.test()?.to_owned();
        let known = self.rules.shear_test(&written);
        Some((written, known.map(|t| (t.name.clone(), t.like))))
    }

    fn severity(&self) -> Vec<(String, Ratio)> {
        let mut all: Vec<(String, Ratio)> = self
            .rules
            .shear_tests
            .iter()
            .map(|t| (t.name.clone(), t.severity))
            .collect();
        all.sort_by(|a, b| {
            a.1.base()
                .total_cmp(&b.1.base())
                .then_with(|| a.0.cmp(&b.0))
        });
        all
    }

    /// What is kept in the high-shear test, least and greatest.
    fn kept_150(&mut self) -> Option<(Known<Ratio>, Known<Ratio>)> {
        let thinning = self.curves.thinning.as_ref()?;
        let t150 = celsius(150.0);
        // above its window the share is level: the oil by base and polymer, not the line
        let oils = self.curves.makeup.oils();
        let at_rest = oils.first()?.nu_at(t150);
        let kept = |end| thinning.kept(at_rest, t150, HIGH_SHEAR, end);
        let (most, least) = (kept(End::MostLost)?, kept(End::LeastLost)?);
        let rate = self
            .d
            .assume("g", "shear rate of the test", HIGH_SHEAR, "high-shear test");
        let from = if thinning.calibrated {
            "calibrated on the high-shear viscosity stated"
        } else {
            "plausible constants: no high-shear viscosity is stated"
        };
        let mut end = |kept: Kept, says: &'static str| {
            let p = self
                .d
                .assume("P_0", "share of the polymer at rest", kept.at_rest, from);
            let left = self
                .d
                .assume("P", "the same under shear", kept.under_shear, from);
            self.d.law(
                "kept",
                says,
                &RATIO,
                Both((("P", left), ("P_0", p)), (("g", rate),)),
                |_: ((Ratio, Ratio), (ShearRate,))| kept.viscosity,
            )
        };
        let low = end(most, "viscosity kept at 150 degC and 1e6 1/s, lower end");
        Some((low, end(least, "the same, upper end")))
    }
}
