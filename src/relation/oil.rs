//! Relations of the oil itself: viscosity and temperature, index, grade, density, blends,
//! pressure-viscosity, polymer and shear.

pub mod base_stock;
