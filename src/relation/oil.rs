//! Relations of the oil itself: viscosity and temperature, index, grade, density, blends,
//! pressure-viscosity, polymer and shear.

pub mod agma;
pub mod base_stock;
pub mod blend;
pub mod blend_wright;
mod d2270_table;
pub mod d341_z;
pub mod density;
pub mod density_2004;
pub mod efflux;
pub mod grade;
pub mod piecewise;
pub mod pressure_viscosity;
pub mod sae_engine;
pub mod sae_gear;
pub mod saybolt;
pub mod viscosity_index;
pub mod viscosity_temperature;
