//! Grades of habit for contacts that are not calculated: chains, ropes, slideways.
//!
//! Sources by table. Nothing here is a limit: how the oil gets in, and its additives, decide more.

use crate::quantity::ThermodynamicTemperature;
use crate::quantity::convert::celsius;

/// Ambient from, to in °C, SAE number and the ISO grade close to it; roller chains (from memory).
pub const CHAIN_GRADES: &[(f64, f64, u32, u32)] = &[
    (-5.0, 5.0, 20, 68),
    (5.0, 40.0, 30, 100),
    (40.0, 50.0, 40, 150),
    (50.0, 60.0, 50, 220),
];

/// SAE number and ISO grade of a roller chain's oil; `None` outside -5 to 60 °C.
pub fn chain_grade(ambient: ThermodynamicTemperature) -> Option<(u32, u32)> {
    CHAIN_GRADES
        .iter()
        .find(|(from, to, _, _)| celsius(*from) <= ambient && ambient <= celsius(*to))
        .map(|(_, _, sae, vg)| (*sae, *vg))
}

/// SAE number of a general dressing for ropes that run over sheaves, where neither wear nor
/// corrosion is severe: Neale (ed.), *The Tribology Handbook*, 2nd edition, section C12.
pub const ROPE_OVER_SHEAVES: u32 = 30;

/// ISO grades of slideway oils: horizontal, and vertical or heavily loaded (ISO 19378 category G,
/// from memory).
pub const SLIDEWAYS: (u32, u32) = (68, 220);
