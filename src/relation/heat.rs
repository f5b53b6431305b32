//! Losses and the temperature they lead to.

pub mod balance;
pub mod heater;
pub mod seal;
