//! Keys of parts. A part begins with the key that says what it is.

use super::form::{
    ANGLE, AREA, DYNAMIC, FORCE, Form, LENGTH, NUMBER, POWER, PRESSURE, RISE, Refers, SPEED,
    TEMPERATURE, TORQUE, VELOCITY, VISCOSITY, one, rough, stated,
};
use super::{Key, Record, key};
use crate::input::value::{At, Roughness, Want};
use crate::quantity::Kind;

/// Types of rolling bearing.
pub const BEARING_TYPE: &[&str] = &[
    "deep groove ball",
    "angular contact ball",
    "double row angular contact ball",
    "self-aligning ball",
    "cylindrical roller",
    "needle roller",
    "spherical roller",
    "tapered roller",
    "thrust ball",
    "cylindrical roller thrust",
    "spherical roller thrust",
];
/// Types of gear.
pub const GEAR_TYPE: &[&str] = &["spur", "helical", "bevel", "spiral bevel", "hypoid"];
/// Materials of a worm wheel.
pub const WHEEL: &[&str] = &["bronze", "cast iron", "steel", "plastic"];
/// How an open gear is lubricated.
pub const APPLICATION: &[&str] = &["bath", "spray", "brush"];
/// How a plain bearing is fed.
pub const FEED: &[&str] = &["pressure", "ring", "bath"];
/// Types of thrust pad.
pub const PAD_TYPE: &[&str] = &["tilting", "fixed"];

const LIMIT: Want = Want::one(VISCOSITY).at(At::May);

/// A kind of part.
#[derive(Debug)]
pub struct PartKey {
    /// The key it begins with.
    pub first: &'static str,
    /// Its record.
    pub record: &'static Record,
}

const fn kind(first: &'static str, record: &'static Record) -> PartKey {
    PartKey { first, record }
}

/// Every kind of part.
pub static KINDS: [PartKey; 10] = [
    kind("rolling bearing", &ROLLING_BEARING),
    kind("gear mesh", &GEAR_MESH),
    kind("worm mesh", &WORM_MESH),
    kind("open gear", &OPEN_GEAR),
    kind("journal bearing", &JOURNAL_BEARING),
    kind("thrust bearing", &THRUST_BEARING),
    kind("contact", &CONTACT),
    kind("component", &COMPONENT),
    kind("engine", &ENGINE),
    kind("axle", &AXLE),
];

/// What every part has.
#[rustfmt::skip]
pub static PART: Record = Record {
    name: "a part",
    also: &[],
    must: &[],
    keys: &[
        key("name", Form::Text, "the first key's", "How the part is called on sheets."),
        key("rule", Form::Name(Refers::HouseRule), "–", "House rule this part takes."),
        key("part rise", stated(RISE), "runs as hot as the sump", "How much hotter than the sump it runs."),
        key("floor", Form::Quantity(LIMIT), "by rules", "Least viscosity at its running temperature."),
        key("ceiling", Form::Quantity(LIMIT), "by rules", "Greatest viscosity at its running temperature."),
        key("start limit", Form::Quantity(LIMIT), "by rules", "Greatest viscosity at start."),
    ],
};

macro_rules! part {
    ($says:literal, $keys:expr) => {
        Record {
            name: $says,
            also: &[&PART],
            must: &[],
            keys: $keys,
        }
    };
}

/// A rolling bearing.
#[rustfmt::skip]
pub static ROLLING_BEARING: Record = part!("a rolling bearing", &[
        key("rolling bearing", Form::Bearing, "error", "Designation, or bore, outside diameter, width and type."),
        key("speed", stated(SPEED), "gap", "Speed of the rotating ring."),
        key("load", stated(FORCE), "gap", "Equivalent dynamic load P."),
        key("C", stated(FORCE), "–", "Basic dynamic load rating."),
        key("C0", stated(FORCE), "–", "Basic static load rating."),
        key("Cu", stated(FORCE), "from C0", "Fatigue load limit."),
        key("cleanliness", Form::Cleanliness, "the machine's", "How clean the oil is kept at the bearing."),
        key("film ratio", one(NUMBER), "none asked", "Film ratio asked for; turns the film into a demand."),
        key("elements", Form::Whole, "–", "Number of rolling elements."),
        key("element diameter", stated(LENGTH), "–", "Diameter of a rolling element."),
        key("element length", stated(LENGTH), "–", "Effective length of a roller."),
        key("contact angle", stated(ANGLE), "0 deg", "Contact angle under load."),
        key("conformity", Form::Quantity(Want::one(NUMBER).such_as("0.52")), "0.52", "Groove radius over ball diameter."),
        key("ring roughness", rough(Roughness::Rq), "–", "Rq of the raceways."),
        key("element roughness", rough(Roughness::Rq), "–", "Rq of the rolling elements."),
    ]
);

/// The sizes of a rolling bearing without a designation.
#[rustfmt::skip]
pub static BEARING_SIZES: Record = Record {
    name: "the sizes of a rolling bearing",
    also: &[],
    must: &[],
    keys: &[
        key("bore", stated(LENGTH), "gap", "Bore diameter."),
        key("outside", stated(LENGTH), "gap", "Outside diameter."),
        key("width", stated(LENGTH), "–", "Width."),
        key("type", Form::Word(BEARING_TYPE), "gap where a rule needs it", "Type of bearing."),
    ],
};

#[rustfmt::skip]
const GEAR_KEYS: &[Key] = &[
    key("type", Form::Word(GEAR_TYPE), "spur or helical, by its helix", "Kind of teeth."),
    key("pitch-line speed", stated(VELOCITY), "from the geometry", "Pitch-line speed of the slowest mesh."),
    key("centre distance", stated(LENGTH), "gap", "Distance between the shafts."),
    key("ratio", Form::Quantity(Want::stated(NUMBER).such_as("3.5")), "gap", "Teeth of the wheel over teeth of the pinion."),
    key("face width", stated(LENGTH), "gap", "Common face width."),
    key("pinion speed", stated(SPEED), "gap", "Speed of the pinion."),
    key("power", stated(POWER), "gap", "Power through the mesh."),
    key("pinion torque", stated(TORQUE), "from the power", "Torque on the pinion."),
    key("normal module", Form::Quantity(Want::stated(LENGTH).such_as("6 mm")), "–", "Normal module."),
    key("teeth", Form::Teeth, "–", "Teeth of pinion and wheel."),
    key("helix", Form::Quantity(Want::stated(ANGLE).such_as("12 deg")), "0 deg", "Helix angle at the reference cylinder."),
    key("pressure angle", stated(ANGLE), "20 deg", "Normal pressure angle."),
    key("application factor", Form::Quantity(Want::one(NUMBER).such_as("1.25")), "1", "Application and load factors together."),
    key("flank roughness", rough(Roughness::Ra), "–", "Ra of the flanks; Rq is carried over where it is named."),
    key("film ratio", one(NUMBER), "none asked", "Film ratio asked for; turns the film into a demand."),
];

/// What every gear has.
pub static GEAR: Record = Record {
    name: "a gear",
    also: &[],
    must: &[],
    keys: GEAR_KEYS,
};

/// A gear mesh in a casing.
#[rustfmt::skip]
pub static GEAR_MESH: Record = Record {
    name: "a gear mesh",
    also: &[&GEAR, &PART],
    must: &[],
    keys: &[key(
        "gear mesh",
        Form::Label,
        "error",
        "How the mesh is called.",
    )],
};

/// An open gear.
#[rustfmt::skip]
pub static OPEN_GEAR: Record = Record {
    name: "an open gear",
    also: &[&GEAR, &PART],
    must: &[],
    keys: &[
        key("open gear", Form::Label, "error", "How the gear is called."),
        key("application", Form::Word(APPLICATION), "gap", "How the lubricant is applied."),
    ],
};

/// A worm mesh.
#[rustfmt::skip]
pub static WORM_MESH: Record = part!("a worm mesh", &[
        key("worm mesh", Form::Label, "error", "How the mesh is called."),
        key("centre distance", stated(LENGTH), "gap", "Distance between the shafts."),
        key("worm diameter", stated(LENGTH), "from the centre distance", "Reference diameter of the worm."),
        key("worm speed", stated(SPEED), "gap", "Speed of the worm."),
    key("speed", stated(SPEED), "–", "The same as `worm speed`."),
        key("ratio", Form::Quantity(Want::stated(NUMBER).such_as("3.5")), "gap", "Speed of the worm over speed of the wheel."),
        key("lead angle", stated(ANGLE), "–", "Lead angle of the worm."),
        key("wheel", Form::Word(WHEEL), "gap", "Material of the wheel."),
        key("power", stated(POWER), "gap", "Input power."),
    ]
);

/// A plain radial bearing.
#[rustfmt::skip]
pub static JOURNAL_BEARING: Record = part!("a journal bearing", &[
        key("journal bearing", Form::Label, "error", "How the bearing is called."),
        key("diameter", stated(LENGTH), "gap", "Diameter of the shaft."),
        key("width", stated(LENGTH), "gap", "Width of the bearing."),
        key("radial clearance", Form::Quantity(Want::stated(LENGTH).such_as("0.08 mm")), "gap", "Radius of the bore less radius of the shaft."),
        key("diametral clearance", Form::Quantity(Want::stated(LENGTH).such_as("0.16 mm")), "gap", "Diameter of the bore less diameter of the shaft."),
        key("speed", stated(SPEED), "gap", "Speed of the shaft."),
        key("load", stated(FORCE), "gap", "Radial load."),
        key("feed", Form::Word(FEED), "gap", "How the oil gets in."),
        key("feed temperature", Form::Quantity(Want::stated(TEMPERATURE).such_as("45 degC")), "the sump's", "Temperature of the oil fed."),
        key("feed pressure", stated(PRESSURE), "–", "Pressure of the oil fed."),
        key("feed hole", stated(LENGTH), "–", "Diameter of the hole the oil is fed through."),
        key("casing area", stated(AREA), "–", "Surface that gives off heat."),
        key("shaft roughness", rough(Roughness::Ra), "–", "Ra of the shaft."),
        key("lining", Form::Text, "–", "Material of the lining."),
    ]
);

/// A thrust bearing with pads.
#[rustfmt::skip]
pub static THRUST_BEARING: Record = part!("a thrust bearing", &[
        key("thrust bearing", Form::Label, "error", "How the bearing is called."),
        key("pads", Form::Whole, "gap", "Number of pads."),
        key("pad length", stated(LENGTH), "gap", "Length of a pad in the direction of motion."),
        key("pad width", stated(LENGTH), "gap", "Width of a pad across the motion."),
        key("mean diameter", stated(LENGTH), "gap", "Mean diameter of the ring of pads."),
        key("speed", stated(SPEED), "gap", "Speed of the collar."),
        key("load", stated(FORCE), "gap", "Load on all pads together."),
        key("type", Form::Word(PAD_TYPE), "gap", "Whether the pads tilt."),
        key("ratio", Form::Quantity(Want::stated(NUMBER).such_as("2.2")), "2.2, close to the best", "Film at the inlet over film at the outlet."),
    ]
);

/// Any line or point contact.
#[rustfmt::skip]
pub static CONTACT: Record = part!("a contact", &[
        key("contact", Form::Label, "error", "How the contact is called."),
        key("radius", stated(LENGTH), "gap", "Reduced radius of a line contact."),
        key("rx", stated(LENGTH), "gap", "Reduced radius along rolling."),
        key("ry", stated(LENGTH), "gap", "Reduced radius across rolling."),
        key("r1x", stated(LENGTH), "–", "Radius of the first body along rolling; negative where hollow."),
        key("r2x", stated(LENGTH), "–", "Radius of the second body along rolling."),
        key("r1y", stated(LENGTH), "–", "Radius of the first body across rolling."),
        key("r2y", stated(LENGTH), "–", "Radius of the second body across rolling."),
        key("load", stated(FORCE), "gap", "Load of a point contact."),
        key("load per length", stated(&[Kind::LoadPerLength]), "gap", "Load of a line contact."),
        key("entrainment speed", stated(VELOCITY), "gap", "Mean speed of both surfaces relative to the contact."),
        key("slide-roll", Form::Quantity(Want::stated(NUMBER).such_as("0.1")), "0", "Sliding speed over mean speed."),
        key("E1", Form::Quantity(Want::stated(PRESSURE).such_as("206 GPa")), "steel", "Young's modulus of the first body."),
        key("E2", Form::Quantity(Want::stated(PRESSURE).such_as("206 GPa")), "steel", "Young's modulus of the second body."),
        key("poisson1", Form::Quantity(Want::stated(NUMBER).such_as("0.3")), "0.3", "Poisson's ratio of the first body."),
        key("poisson2", Form::Quantity(Want::stated(NUMBER).such_as("0.3")), "0.3", "Poisson's ratio of the second body."),
        key("roughness 1", rough(Roughness::Rq), "gap", "Rq of the first body."),
        key("roughness 2", rough(Roughness::Rq), "gap", "Rq of the second body."),
        key("film ratio", one(NUMBER), "1", "Film ratio asked for."),
        key("angle", Form::Quantity(Want::stated(ANGLE).such_as("30 deg")), "0 deg", "Angle between the principal planes of the bodies."),
        key("inlet distance", stated(LENGTH), "flooded", "Distance of the oil's meniscus from the centre of the contact."),
    ]
);

/// A component with a practice window.
#[rustfmt::skip]
pub static COMPONENT: Record = part!("a component", &[
        key("component", Form::Component, "error", "Id or name of the component in the rules."),
        key("pressure", stated(PRESSURE), "–", "Working pressure."),
        key("speed", stated(SPEED), "–", "Speed of rotation."),
        key("chain speed", stated(VELOCITY), "–", "Speed of the chain."),
        key("orientation", Form::Text, "–", "How a slideway or a chain lies: horizontal, vertical."),
    ]
);

#[rustfmt::skip]
const DRIVE_KEYS: &[Key] = &[
    key("hot grade", Form::Text, "–", "SAE grade at running temperature, as 40 or 90."),
    key("HTHS at least", one(DYNAMIC), "–", "Least viscosity at 150 °C under high shear."),
    key("duty", Form::Text, "–", "Duty in words of the rules."),
    key("level", Form::Text, "–", "Service level the maker asks."),
];

/// What engines and axles have.
pub static DRIVE: Record = Record {
    name: "a drive",
    also: &[],
    must: &[],
    keys: DRIVE_KEYS,
};

/// An engine.
#[rustfmt::skip]
pub static ENGINE: Record = Record {
    name: "an engine",
    also: &[&DRIVE, &PART],
    must: &[],
    keys: &[key(
        "engine",
        Form::Label,
        "error",
        "How the engine is called.",
    )],
};

/// A drive axle.
#[rustfmt::skip]
pub static AXLE: Record = Record {
    name: "an axle",
    also: &[&DRIVE, &PART],
    must: &[],
    keys: &[key("axle", Form::Label, "error", "How the axle is called.")],
};
