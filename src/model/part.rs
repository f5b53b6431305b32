//! The parts a lubrication point serves.

use super::machine::Limits;
use super::stated::Stated;
use crate::quantity::{
    Angle, AngularVelocity, Area, Force, Length, LoadPerLength, Power, Pressure, Ratio,
    TemperatureInterval, ThermodynamicTemperature, Torque, Velocity,
};
use crate::source::Origin;
use crate::source::place::Given;

/// One part.
#[derive(Clone, Debug, PartialEq)]
pub struct Part {
    /// How it is called on sheets: `rolling bearing 22220`, `gear mesh low-speed stage`.
    pub label: String,
    /// A house rule taken by name.
    pub rule: Option<Given<String>>,
    /// How much hotter it runs than the sump.
    pub part_rise: Option<Stated<TemperatureInterval>>,
    /// Limits stated for this part.
    pub limits: Limits,
    /// What it is.
    pub kind: PartKind,
    /// Where it stands.
    pub origin: Origin,
}

/// What a part is.
#[derive(Clone, Debug, PartialEq)]
pub enum PartKind {
    /// Rolling bearing.
    RollingBearing(Box<RollingBearing>),
    /// Spur, helical, bevel or hypoid mesh in a casing.
    GearMesh(Box<GearMesh>),
    /// Worm and wheel.
    WormMesh(Box<WormMesh>),
    /// Open gear.
    OpenGear(Box<OpenGear>),
    /// Plain radial bearing.
    JournalBearing(Box<JournalBearing>),
    /// Thrust bearing with pads.
    ThrustBearing(Box<ThrustBearing>),
    /// Any line or point contact.
    Contact(Box<Contact>),
    /// A component with a practice window.
    Component(Box<Component>),
    /// Piston engine.
    Engine(Box<Drive>),
    /// Drive axle.
    Axle(Box<Drive>),
}

/// Class of a rolling bearing, as far as the rules distinguish.
pub use crate::relation::bearing::class::BearingKind as BearingClass;

/// Rolling bearing.
#[derive(Clone, Debug, PartialEq)]
pub struct RollingBearing {
    /// Designation as written, if given.
    pub designation: Option<String>,
    /// Its class.
    pub class: Option<BearingClass>,
    /// Bore.
    pub bore: Option<Stated<Length>>,
    /// Outside diameter.
    pub outside: Option<Stated<Length>>,
    /// Width.
    pub width: Option<Stated<Length>>,
    /// Speed of rotation.
    pub speed: Option<Stated<AngularVelocity>>,
    /// Equivalent dynamic load P.
    pub load: Option<Stated<Force>>,
    /// Dynamic load rating C.
    pub c: Option<Stated<Force>>,
    /// Static load rating C0.
    pub c0: Option<Stated<Force>>,
    /// Fatigue load limit Cu.
    pub cu: Option<Stated<Force>>,
    /// Cleanliness: an ISO 4406 code or a word of ISO 281.
    pub cleanliness: Option<Given<String>>,
    /// Film ratio asked for.
    pub film_ratio: Option<Given<Ratio>>,
    /// Inner geometry, for a film worked out directly.
    pub inner: Option<InnerGeometry>,
}

/// Inner geometry of a rolling bearing.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct InnerGeometry {
    /// Number of rolling elements.
    pub elements: Option<Given<Ratio>>,
    /// Diameter of a rolling element.
    pub element_diameter: Option<Stated<Length>>,
    /// Effective length of a roller.
    pub element_length: Option<Stated<Length>>,
    /// Contact angle.
    pub contact_angle: Option<Stated<Angle>>,
    /// Groove radius over ball diameter.
    pub conformity: Option<Given<Ratio>>,
    /// Rq of the ring.
    pub ring_roughness: Option<Stated<Length>>,
    /// Rq of the rolling elements.
    pub element_roughness: Option<Stated<Length>>,
}

/// Kind of gear.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum GearType {
    /// Straight teeth.
    Spur,
    /// Helical teeth.
    Helical,
    /// Straight bevel.
    Bevel,
    /// Spiral bevel.
    SpiralBevel,
    /// Hypoid.
    Hypoid,
}

impl GearType {
    /// The words users write for `type`.
    pub const WRITTEN: &'static [(&'static str, Self)] = &[
        ("spur", Self::Spur),
        ("helical", Self::Helical),
        ("bevel", Self::Bevel),
        ("spiral bevel", Self::SpiralBevel),
        ("hypoid", Self::Hypoid),
    ];
}

/// Gear mesh in a casing.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct GearMesh {
    /// Kind; helical or spur where not stated.
    pub kind: Option<GearType>,
    /// Pitch-line speed, where stated instead of geometry.
    pub pitch_line_speed: Option<Stated<Velocity>>,
    /// Centre distance.
    pub centre_distance: Option<Stated<Length>>,
    /// Ratio, wheel over pinion teeth.
    pub ratio: Option<Stated<Ratio>>,
    /// Face width.
    pub face_width: Option<Stated<Length>>,
    /// Pinion speed.
    pub pinion_speed: Option<Stated<AngularVelocity>>,
    /// Power through the mesh.
    pub power: Option<Stated<Power>>,
    /// Pinion torque, instead of power.
    pub pinion_torque: Option<Stated<Torque>>,
    /// Normal module.
    pub normal_module: Option<Stated<Length>>,
    /// Teeth of pinion and wheel.
    pub teeth: Option<Given<(u32, u32)>>,
    /// Helix angle at the reference cylinder.
    pub helix: Option<Stated<Angle>>,
    /// Normal pressure angle.
    pub pressure_angle: Option<Stated<Angle>>,
    /// Application and load factors together.
    pub application_factor: Option<Given<Ratio>>,
    /// Ra of the flanks.
    pub flank_roughness: Option<Stated<Length>>,
    /// Film ratio asked for.
    pub film_ratio: Option<Given<Ratio>>,
}

/// How an open gear gets its lubricant.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum OpenGearApplication {
    /// Dips.
    Bath,
    /// Sprayed now and then.
    Spray,
    /// By brush.
    Brush,
}

/// Open gear.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct OpenGear {
    /// The mesh.
    pub mesh: GearMesh,
    /// How the lubricant is applied.
    pub application: Option<OpenGearApplication>,
}

/// Material of a worm wheel.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum WheelMaterial {
    /// Bronze.
    Bronze,
    /// Cast iron.
    CastIron,
    /// Steel.
    Steel,
    /// Plastic.
    Plastic,
}

/// Worm and wheel.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct WormMesh {
    /// Centre distance.
    pub centre_distance: Option<Stated<Length>>,
    /// Pitch diameter of the worm.
    pub worm_diameter: Option<Stated<Length>>,
    /// Speed of the worm.
    pub worm_speed: Option<Stated<AngularVelocity>>,
    /// Ratio.
    pub ratio: Option<Stated<Ratio>>,
    /// Lead angle.
    pub lead_angle: Option<Stated<Angle>>,
    /// Material of the wheel.
    pub wheel: Option<Given<WheelMaterial>>,
    /// Input power.
    pub power: Option<Stated<Power>>,
}

/// How a plain bearing is fed.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Feed {
    /// Under pressure, oil carries the heat.
    Pressure,
    /// By ring.
    Ring,
    /// By dipping.
    Bath,
}

/// Plain radial bearing.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct JournalBearing {
    /// Diameter.
    pub diameter: Option<Stated<Length>>,
    /// Width.
    pub width: Option<Stated<Length>>,
    /// Radial clearance, also where the diametral one was stated.
    pub radial_clearance: Option<Stated<Length>>,
    /// Speed.
    pub speed: Option<Stated<AngularVelocity>>,
    /// Load.
    pub load: Option<Stated<Force>>,
    /// Feed.
    pub feed: Option<Given<Feed>>,
    /// Temperature of the oil fed.
    pub feed_temperature: Option<Stated<ThermodynamicTemperature>>,
    /// Pressure of the oil fed.
    pub feed_pressure: Option<Stated<Pressure>>,
    /// Diameter of the hole the oil is fed through, opposite the load.
    pub feed_hole: Option<Stated<Length>>,
    /// Surface that gives off heat.
    pub casing_area: Option<Stated<Area>>,
    /// Ra of the shaft.
    pub shaft_roughness: Option<Stated<Length>>,
    /// Lining, as written.
    pub lining: Option<Given<String>>,
}

/// Whether thrust pads tilt.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum PadType {
    /// Tilting pads: the pivot sets the film ratio.
    Tilting,
    /// Fixed inclination.
    Fixed,
}

/// Thrust bearing with pads.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct ThrustBearing {
    /// Number of pads.
    pub pads: Option<Given<Ratio>>,
    /// Length of a pad in the direction of motion.
    pub pad_length: Option<Stated<Length>>,
    /// Width of a pad across the motion.
    pub pad_width: Option<Stated<Length>>,
    /// Mean diameter of the pad ring.
    pub mean_diameter: Option<Stated<Length>>,
    /// Speed.
    pub speed: Option<Stated<AngularVelocity>>,
    /// Total load.
    pub load: Option<Stated<Force>>,
    /// Tilting or fixed.
    pub kind: Option<Given<PadType>>,
    /// Inlet over outlet film.
    pub ratio: Option<Stated<Ratio>>,
}

/// Any line or point contact.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Contact {
    /// Reduced radius of a line contact.
    pub radius: Option<Stated<Length>>,
    /// Reduced radius along rolling.
    pub rx: Option<Stated<Length>>,
    /// Reduced radius across rolling.
    pub ry: Option<Stated<Length>>,
    /// Radii of the bodies: r1x, r2x, r1y, r2y; negative where concave.
    pub bodies: [Option<Stated<Length>>; 4],
    /// Load of a point contact.
    pub load: Option<Stated<Force>>,
    /// Load of a line contact.
    pub load_per_length: Option<Stated<LoadPerLength>>,
    /// Mean speed of the surfaces relative to the contact.
    pub entrainment_speed: Option<Stated<Velocity>>,
    /// Sliding over mean speed.
    pub slide_roll: Option<Stated<Ratio>>,
    /// Young's moduli.
    pub modulus: [Option<Stated<Pressure>>; 2],
    /// Poisson's ratios.
    pub poisson: [Option<Stated<Ratio>>; 2],
    /// Rq of the bodies.
    pub roughness: [Option<Stated<Length>>; 2],
    /// Film ratio asked for; 1 where none is.
    pub film_ratio: Option<Given<Ratio>>,
    /// Angle between the principal planes of the bodies; none where they coincide.
    pub angle: Option<Stated<Angle>>,
    /// Distance of the oil's meniscus from the centre of the contact; flooded where none.
    pub inlet_distance: Option<Stated<Length>>,
}

/// A component with a practice window.
#[derive(Clone, Debug, PartialEq)]
pub struct Component {
    /// Id of the window in the rules.
    pub id: String,
    /// Working pressure.
    pub pressure: Option<Stated<Pressure>>,
    /// Speed.
    pub speed: Option<Stated<AngularVelocity>>,
    /// Chain speed.
    pub chain_speed: Option<Stated<Velocity>>,
    /// Orientation of a slideway, as written.
    pub orientation: Option<Given<String>>,
}

/// Engine or axle.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Drive {
    /// The hot grade asked: `40`, `90`.
    pub hot_grade: Option<Given<String>>,
    /// Least viscosity at high temperature and high shear.
    pub hths_at_least: Option<Given<crate::quantity::DynamicViscosity>>,
    /// Duty in words of the rules.
    pub duty: Option<Given<String>>,
    /// Service level, as written.
    pub level: Option<Given<String>>,
}
