//! Kinds of rolling bearing, and the classes in which the standards put them.

/// The classes of ISO 281.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum RatingClass {
    /// Radial ball bearings.
    RadialBall,
    /// Radial roller bearings.
    RadialRoller,
    /// Thrust ball bearings.
    ThrustBall,
    /// Thrust roller bearings.
    ThrustRoller,
}

impl RatingClass {
    /// As written by the user.
    pub const WORDS: &'static [&'static str] = &[
        "radial-ball",
        "radial-roller",
        "thrust-ball",
        "thrust-roller",
    ];

    /// The class of a word of [`Self::WORDS`].
    pub fn of_word(word: &str) -> Option<Self> {
        match word {
            "radial-ball" => Some(Self::RadialBall),
            "radial-roller" => Some(Self::RadialRoller),
            "thrust-ball" => Some(Self::ThrustBall),
            "thrust-roller" => Some(Self::ThrustRoller),
            _ => None,
        }
    }

    /// Whether the elements are balls.
    pub fn is_ball(self) -> bool {
        matches!(self, Self::RadialBall | Self::ThrustBall)
    }
}

/// Kinds of rolling bearing.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum BearingKind {
    /// Deep groove ball bearing.
    DeepGrooveBall,
    /// Angular contact ball bearing, single row.
    AngularContactBall,
    /// Angular contact ball bearing, double row.
    DoubleRowAngularContactBall,
    /// Self-aligning ball bearing.
    SelfAligningBall,
    /// Cylindrical roller bearing.
    CylindricalRoller,
    /// Needle roller bearing.
    NeedleRoller,
    /// Spherical roller bearing.
    SphericalRoller,
    /// Tapered roller bearing.
    TaperedRoller,
    /// Thrust ball bearing.
    ThrustBall,
    /// Cylindrical roller thrust bearing.
    CylindricalRollerThrust,
    /// Spherical roller thrust bearing.
    SphericalRollerThrust,
}

impl BearingKind {
    /// Every kind with its name.
    pub const NAMES: &'static [(&'static str, Self)] = &[
        ("deep groove ball", Self::DeepGrooveBall),
        ("angular contact ball", Self::AngularContactBall),
        (
            "double row angular contact ball",
            Self::DoubleRowAngularContactBall,
        ),
        ("self-aligning ball", Self::SelfAligningBall),
        ("cylindrical roller", Self::CylindricalRoller),
        ("needle roller", Self::NeedleRoller),
        ("spherical roller", Self::SphericalRoller),
        ("tapered roller", Self::TaperedRoller),
        ("thrust ball", Self::ThrustBall),
        ("cylindrical roller thrust", Self::CylindricalRollerThrust),
        ("spherical roller thrust", Self::SphericalRollerThrust),
    ];

    /// The words users write for `type`.
    pub const WRITTEN: &'static [(&'static str, Self)] = Self::NAMES;

    /// The word users write.
    pub fn word(self) -> &'static str {
        self.name()
    }

    /// Whether its rolling elements are balls.
    pub fn is_ball(self) -> bool {
        self.class().is_ball()
    }

    /// Its name.
    pub fn name(self) -> &'static str {
        Self::NAMES
            .iter()
            .find(|(_, kind)| *kind == self)
            .map_or("rolling bearing", |(name, _)| name)
    }

    /// The kind of that name.
    pub fn of_name(name: &str) -> Option<Self> {
        Self::NAMES
            .iter()
            .find(|(n, _)| *n == name)
            .map(|(_, kind)| *kind)
    }

    /// The class of ISO 281 it belongs to.
    pub fn class(self) -> RatingClass {
        match self {
            Self::DeepGrooveBall
            | Self::AngularContactBall
            | Self::DoubleRowAngularContactBall
            | Self::SelfAligningBall => RatingClass::RadialBall,
            Self::CylindricalRoller
            | Self::NeedleRoller
            | Self::SphericalRoller
            | Self::TaperedRoller => RatingClass::RadialRoller,
            Self::ThrustBall => RatingClass::ThrustBall,
            Self::CylindricalRollerThrust | Self::SphericalRollerThrust => {
                RatingClass::ThrustRoller
            }
        }
    }

    /// Whether it carries along the shaft rather than across it.
    pub fn is_thrust(self) -> bool {
        matches!(
            self.class(),
            RatingClass::ThrustBall | RatingClass::ThrustRoller
        )
    }
}
