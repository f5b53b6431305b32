//! How hard a journal bearing may be loaded.

use crate::quantity::convert::pascals;
use crate::quantity::{Force, Measure, Pressure};
use crate::relation::Law;
use crate::relation::journal::{Duty, Geometry, NoFilm};

/// The table of the standard.
pub static LAW: Law = Law {
    name: "journal-load-limit",
    title: "largest specific load of a journal bearing",
    formula: "P_lim by lining",
    range: "general use; the larger value in special cases, with proof of the lining's strength \
            and of slow or short running",
    source: "ISO 7902-3 (from memory)",
};

/// Alloy the shaft runs on.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Lining {
    /// White metals on lead or tin.
    WhiteMetal,
    /// Copper and lead.
    CopperLead,
    /// Copper and tin, bronze.
    CopperTin,
    /// Aluminium and tin.
    AluminiumTin,
    /// Aluminium and zinc.
    AluminiumZinc,
}

impl Lining {
    /// Every lining.
    pub const ALL: [Self; 5] = [
        Self::WhiteMetal,
        Self::CopperLead,
        Self::CopperTin,
        Self::AluminiumTin,
        Self::AluminiumZinc,
    ];

    /// Its name as users write it.
    pub fn name(self) -> &'static str {
        match self {
            Self::WhiteMetal => "white-metal",
            Self::CopperLead => "copper-lead",
            Self::CopperTin => "copper-tin",
            Self::AluminiumTin => "aluminium-tin",
            Self::AluminiumZinc => "aluminium-zinc",
        }
    }
}

/// The lining of a word or two as users write them: `white metal`, `babbitt`, `CuSn`.
pub fn lining_of(written: &str) -> Option<Lining> {
    let word = written.trim().to_ascii_lowercase().replace([' ', '_'], "-");
    let named = Lining::ALL.into_iter().find(|l| word == l.name());
    named.or(match word.as_str() {
        "babbitt" | "white-metal-tin" | "white-metal-lead" | "whitemetal" | "pbsn" | "snpb" => {
            Some(Lining::WhiteMetal)
        }
        "cupb" | "lead-bronze" => Some(Lining::CopperLead),
        "cusn" | "bronze" | "tin-bronze" => Some(Lining::CopperTin),
        "alsn" => Some(Lining::AluminiumTin),
        "alzn" => Some(Lining::AluminiumZinc),
        _ => None,
    })
}

/// Largest specific load in general use, and in special cases, [`LAW`].
pub fn permissible(lining: Lining) -> (Pressure, Pressure) {
    let (general, special) = match lining {
        Lining::WhiteMetal => (5.0, 15.0),
        Lining::CopperLead | Lining::AluminiumZinc => (7.0, 20.0),
        Lining::CopperTin => (7.0, 25.0),
        Lining::AluminiumTin => (7.0, 18.0),
    };
    (pascals(general * 1e6), pascals(special * 1e6))
}

/// Trumpler's largest specific load at starting, 300 psi (from memory).
pub fn trumpler_start() -> Pressure {
    pascals(300.0 * 6_894.757_293_168_361)
}

/// The duty with Trumpler's design factor of two on the load (from memory).
///
/// # Errors
/// None for a sound duty: twice a load above zero is above zero.
pub fn trumpler_duty(duty: &Duty) -> Result<Duty, NoFilm> {
    Duty::new(Force::from_base(2.0 * duty.load().base()), duty.speed())
}

/// Share of the general limit that a bearing uses.
pub fn share(duty: &Duty, geometry: &Geometry, lining: Lining) -> crate::quantity::Ratio {
    let (general, _) = permissible(lining);
    crate::quantity::convert::number(duty.specific_load(geometry).base() / general.base())
}
