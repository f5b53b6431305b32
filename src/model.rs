//! The checked domain: what a site, a machine, a part and an oil are, after the reader.
//!
//! No text to be read again, no serialisation: the written form may change without touching
//! these types, and the reverse. A number stated by somebody is a [`stated::Stated`]: known, known
//! only to lie in a range, or unknown; `None` around it means that nobody wrote anything.

pub mod facts;
pub mod machine;
pub mod oil;
pub mod part;
pub mod rulebook;
pub mod sample;
pub mod site;
pub mod stated;
pub mod word;

pub use machine::{Fill, Lubrication, OilNow, Point, Sump};
pub use oil::Oil;
pub use part::{Part, PartKind};
pub use site::Site;
pub use stated::{Between, Stated, ViscosityLimit};
