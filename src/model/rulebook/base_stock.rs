//! What base stocks are like: the ranges of finished, inhibited oils in air.

use super::provenance::Provenance;
use super::table::entry;
use crate::model::stated::Between;
use crate::quantity::{MassDensity, PressureViscosity, Ratio, ThermodynamicTemperature};
use crate::relation::oil::base_stock::BaseStock;

/// A base stock.
#[derive(Clone, Debug, PartialEq)]
pub struct BaseStockRule {
    /// Its id.
    pub id: String,
    /// Its name in words.
    pub name: String,
    /// Which one it is.
    pub base: BaseStock,
    /// Viscosity index of the base without polymer; the upper end may be open.
    pub vi: (Ratio, Option<Ratio>),
    /// Usual pour points.
    pub pour: Between<ThermodynamicTemperature>,
    /// Pressure-viscosity coefficient near 40 °C.
    pub alpha: Between<PressureViscosity>,
    /// Density at 15 °C.
    pub density15: Between<MassDensity>,
    /// Thermal expansion, 1e-4/K, as a pure number.
    pub expansion: Between<Ratio>,
    /// Loss of density a kelvin, kg/(m³·K) as a pure number, for the linear law.
    pub density_slope: Option<Ratio>,
    /// Bulk temperature for a long life.
    pub continuous: ThermodynamicTemperature,
    /// Bulk temperature for short excursions.
    pub peak: ThermodynamicTemperature,
    /// Usual flash points; none where there is no flash point.
    pub flash: Option<Between<ThermodynamicTemperature>>,
    /// Whether wax can set it solid in the cold.
    pub wax_bearing: bool,
    /// Biodegradation in 28 days.
    pub biodegradation: Between<Ratio>,
    /// Price against Group I.
    pub relative_cost: Ratio,
    /// How it gets on with water.
    pub water: String,
    /// How well it dissolves varnish and seals.
    pub solvency: String,
    /// Column of the seal table.
    pub seal_column: Option<String>,
    /// Row of the paint table.
    pub paint_row: Option<String>,
    /// Row and column of the mixing table.
    pub mixing_row: String,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(BaseStockRule, |b| vec![
    b.name.as_str(),
    crate::model::word::Word::word(b.base)
]);
