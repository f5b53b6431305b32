//! Any line or point contact.

use crate::input::fields::Fields;
use crate::input::reader::Reader;
use crate::model::part::Contact;

pub(super) fn read(reader: &mut Reader<'_>, fields: &Fields<'_>) -> Contact {
    Contact {
        radius: fields.stated(reader, "radius"),
        rx: fields.stated(reader, "rx"),
        ry: fields.stated(reader, "ry"),
        bodies: ["r1x", "r2x", "r1y", "r2y"].map(|name| fields.stated(reader, name)),
        load: fields.stated(reader, "load"),
        load_per_length: fields.stated(reader, "load per length"),
        entrainment_speed: fields.stated(reader, "entrainment speed"),
        slide_roll: fields.stated(reader, "slide-roll"),
        modulus: ["E1", "E2"].map(|name| fields.stated(reader, name)),
        poisson: ["poisson1", "poisson2"].map(|name| fields.stated(reader, name)),
        roughness: ["roughness 1", "roughness 2"].map(|name| fields.stated(reader, name)),
        film_ratio: fields.given(reader, "film ratio"),
        angle: fields.stated(reader, "angle"),
        inlet_distance: fields.stated(reader, "inlet distance"),
    }
}
