//! Grades of an oil, new and after shear, side by side.

use super::curves::Curves;
use crate::model::oil::{Oil, OilKind};
use crate::quantity::KinematicViscosity;
use crate::quantity::convert::celsius;
use crate::relation::oil::grade::IsoGrade;
use crate::relation::oil::sae_engine::{self, EngineOil, Measured};
use crate::relation::oil::sae_gear::{self, GearOil};
use crate::relation::oil::viscosity_temperature::ViscosityCurve;

/// A grade in one system, new and worn.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Graded {
    /// The system.
    pub system: System,
    /// New; `None` where the oil meets no grade.
    pub new: Option<String>,
    /// After shear; `None` where the oil does not shear or where its loss is not known.
    pub worn: Option<Worn>,
}

/// The grade after shear.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum Worn {
    /// This one, or none.
    Grade(Option<String>),
    /// The loss is not known: at the greatest plausible loss, this one or none.
    AtWorst(Option<String>),
}

/// A classification.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum System {
    /// ISO 3448.
    IsoVg,
    /// SAE J300, engine oils.
    Engine,
    /// SAE J306, axle oils.
    Axle,
}

impl System {
    /// As it is printed.
    pub fn word(self) -> &'static str {
        match self {
            Self::IsoVg => "ISO VG",
            Self::Engine => "SAE J300",
            Self::Axle => "SAE J306",
        }
    }
}

impl Graded {
    /// Whether it leaves its grade by shear: surely, or at the worst.
    pub fn leaves(&self) -> Option<bool> {
        let new = self.new.as_ref()?;
        match self.worn.as_ref()? {
            Worn::Grade(worn) => (worn.as_ref() != Some(new)).then_some(true),
            Worn::AtWorst(worn) => (worn.as_ref() != Some(new)).then_some(false),
        }
    }
}

/// Grades in every system that suits the oil.
pub fn grades(oil: &Oil, curves: &Curves) -> Vec<Graded> {
    let mut systems = vec![System::IsoVg];
    let engine = oil.kind == OilKind::Engine || !oil.ccs.is_empty() || !oil.mrv.is_empty();
    let axle = oil.kind == OilKind::Axle || oil.t150000.is_some();
    if engine && !axle {
        systems.push(System::Engine);
    }
    if axle {
        systems.push(System::Axle);
    }
    systems
        .into_iter()
        .map(|s| graded(s, oil, curves))
        .collect()
}

fn graded(system: System, oil: &Oil, curves: &Curves) -> Graded {
    let t = celsius(if system == System::IsoVg { 40.0 } else { 100.0 });
    let new = curves.new.nu_at(t);
    let worn = curves.worn_range(true).map(|(_, most)| most.nu_at(t));
    let name = |nu: KinematicViscosity| named(system, oil, nu);
    let known = curves.loss_range(true).is_none();
    Graded {
        system,
        new: name(new),
        worn: worn.map(|nu| {
            let grade = name(nu);
            if known {
                Worn::Grade(grade)
            } else {
                Worn::AtWorst(grade)
            }
        }),
    }
}

/// The grade by that viscosity, at 40 °C for ISO VG and at 100 °C for the others. The
/// high-shear viscosity is that of the new oil throughout: a worn one is not measured.
fn named(system: System, oil: &Oil, nu: KinematicViscosity) -> Option<String> {
    let measured = |list: &[crate::source::place::Given<crate::model::oil::DynamicPoint>]| {
        list.iter()
            .map(|p| Measured {
                at: p.value.at,
                eta: p.value.eta,
            })
            .collect::<Vec<_>>()
    };
    match system {
        System::IsoVg => IsoGrade::of_viscosity(nu).map(|g| g.number().to_string()),
        System::Engine => {
            let (ccs, mrv) = (measured(&oil.ccs), measured(&oil.mrv));
            sae_engine::classify(&EngineOil {
                nu100: nu,
                hths: oil.hths.as_ref().map(|h| h.value),
                ccs: &ccs,
                mrv: &mrv,
                yield_stress: oil.yield_stress.as_ref().map(|y| y.value.0),
            })
            .name()
        }
        System::Axle => sae_gear::classify(&GearOil {
            nu100: nu,
            nu100_sheared: None,
            t150000: oil.t150000.as_ref().map(|t| t.value),
        })
        .name_new(),
    }
}
