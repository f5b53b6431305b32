//! Relations of the oil itself: viscosity and temperature, index, grade, density, blends,
//! pressure-viscosity, polymer and shear.

pub mod agma;
pub mod base_stock;
pub mod blend;
pub mod blend_wright;
mod d2270_table;
pub mod d341_z;
pub mod d6080;
pub mod density;
pub mod density_2004;
pub mod density_iso15144;
pub mod efflux;
pub mod grade;
pub mod life;
pub mod piecewise;
pub mod polymer;
pub mod pressure_viscosity;
pub mod sae_engine;
pub mod sae_gear;
pub mod saybolt;
pub mod shear;
pub mod shear_in_use;
pub mod slide;
pub mod start_limit;
pub mod tangent;
pub mod temporary_shear;
pub mod uncertainty;
pub mod vg_step;
pub mod viscosity_index;
pub mod viscosity_temperature;
