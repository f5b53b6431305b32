//! How thin, hot, loaded and fast a journal bearing may be.

pub mod clearance;
pub mod laminar;
pub mod least_film;
pub mod load;
pub mod temperature;
pub mod whirl;
