//! Friction of an unloaded, concentric bearing.

use super::Geometry;
use crate::quantity::{AngularVelocity, DynamicViscosity, Measure, Power, Torque};
use crate::relation::Law;
use std::f64::consts::PI;

/// Petroff's formula.
pub static LAW: Law = Law {
    name: "journal-petroff",
    title: "friction torque of an unloaded journal bearing",
    formula: "T = 2 pi r^3 B eta omega/c",
    range: "concentric shaft, laminar; the floor that a loaded bearing's friction lies above",
    source: "Petroff 1883, as in every textbook",
};

/// Friction torque of [`LAW`].
pub fn torque(geometry: &Geometry, speed: AngularVelocity, eta: DynamicViscosity) -> Torque {
    let radius = geometry.diameter().base() / 2.0;
    let shear = eta.base() * speed.base() / geometry.clearance().base();
    Torque::from_base(2.0 * PI * radius * radius * radius * geometry.width().base() * shear)
}

/// Friction power, torque times speed.
pub fn power(geometry: &Geometry, speed: AngularVelocity, eta: DynamicViscosity) -> Power {
    Power::from_base(torque(geometry, speed, eta).base() * speed.base())
}
