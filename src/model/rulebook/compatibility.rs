//! What gets on with what: seals, paints, plastics, other oils.

use super::provenance::Provenance;
use super::table::entry;
use crate::model::facts::{Elastomer, Mark, Paint, SightGlass};
use crate::quantity::{Ratio, ThermodynamicTemperature};

/// One seal material against the fluid columns.
#[derive(Clone, Debug, PartialEq)]
pub struct SealRule {
    /// Its id.
    pub id: String,
    /// The material.
    pub material: Elastomer,
    /// Fluid column and mark.
    pub marks: Vec<(String, Mark)>,
    /// Highest temperature of the material; none where the table states none.
    pub limit: Option<ThermodynamicTemperature>,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(SealRule);

/// One fluid against paints, plastics and metals.
#[derive(Clone, Debug, PartialEq)]
pub struct PaintRule {
    /// The paint row base stocks refer to.
    pub id: String,
    /// Paints it attacks.
    pub attacks_paint: Vec<Paint>,
    /// Sight glasses it attacks.
    pub attacks_glass: Vec<SightGlass>,
    /// Plastics it attacks, in words.
    pub attacks_plastic: Vec<String>,
    /// Metals it attacks, in words.
    pub attacks_metal: Vec<String>,
    /// What is safe.
    pub safe: String,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(PaintRule);

/// One fluid against the others.
#[derive(Clone, Debug, PartialEq)]
pub struct MixRule {
    /// The mixing row base stocks refer to.
    pub id: String,
    /// The other fluid and the mark: good may be topped up in need, care loses properties, bad
    /// must be drained and flushed.
    pub marks: Vec<(String, Mark)>,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(MixRule);

/// What may be left of the old oil after a change.
#[derive(Clone, Debug, PartialEq)]
pub struct ResidualRule {
    /// Its id.
    pub id: String,
    /// From what to what, in words.
    pub change: String,
    /// Share that may be left.
    pub at_most: Ratio,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(ResidualRule);

/// The mark a row gives a column.
pub fn mark(marks: &[(String, Mark)], column: &str) -> Option<Mark> {
    marks
        .iter()
        .find(|(name, _)| name == column)
        .map(|(_, mark)| *mark)
}
