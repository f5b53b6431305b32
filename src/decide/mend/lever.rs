//! What can be changed so that an oil holds, and what each change costs in trouble.

use crate::judge::Judgement;

/// One thing that can be changed.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Lever {
    /// A sump heater, set to a temperature.
    Heater,
    /// Another oil of the same grade that loses less to shear.
    ShearLoss,
    /// Another grade of the same slope.
    Grade,
    /// The machine is not started colder than a temperature.
    ColdestStart,
    /// The sump runs less above ambient.
    SumpRise,
    /// The same grade with a higher viscosity index.
    Index,
    /// The machine does not run at a hotter ambient.
    HottestAmbient,
    /// A cooler: the sump runs no hotter than a temperature.
    Cooler,
    /// The maker allows a thicker oil at start.
    StartLimit,
    /// The site asks for less reserve.
    Reserve,
}

/// Which limits a change acts on.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Side {
    /// Floors and the oil's ceiling, at running temperature.
    Hot,
    /// Ceilings and the pour margin, cold.
    Cold,
    /// All of them.
    Both,
}

/// How far an oil is to be mended.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Target {
    /// Every limit is met.
    Met,
    /// Every limit is met with the reserve asked.
    Reserve,
}

impl Target {
    /// Both, the nearer first.
    pub const ALL: [Self; 2] = [Self::Met, Self::Reserve];

    /// Its name in documents.
    pub fn word(self) -> &'static str {
        match self {
            Self::Met => "every limit met",
            Self::Reserve => "full reserve",
        }
    }
}

impl Lever {
    /// All of them, the least trouble first.
    pub const ALL: [Self; 10] = [
        Self::Heater,
        Self::ShearLoss,
        Self::Grade,
        Self::ColdestStart,
        Self::SumpRise,
        Self::Index,
        Self::HottestAmbient,
        Self::Cooler,
        Self::StartLimit,
        Self::Reserve,
    ];

    /// What a change costs in trouble, from 1: fitting or buying something (2), bounding how the
    /// machine is run (3), a larger change or one that others must agree to (4), asking for less
    /// (5). The site's own judgement may differ; the order only ranks what is printed first.
    pub fn effort(self) -> u8 {
        match self {
            Self::Heater | Self::ShearLoss | Self::Grade => 2,
            Self::ColdestStart | Self::SumpRise | Self::Index => 3,
            Self::HottestAmbient | Self::Cooler | Self::StartLimit => 4,
            Self::Reserve => 5,
        }
    }

    /// The limits it acts on.
    pub fn side(self) -> Side {
        match self {
            Self::Heater | Self::ColdestStart | Self::StartLimit => Side::Cold,
            Self::ShearLoss | Self::SumpRise | Self::HottestAmbient | Self::Cooler => Side::Hot,
            Self::Grade | Self::Index | Self::Reserve => Side::Both,
        }
    }

    /// Whether it changes the oil and not the machine.
    pub fn of_oil(self) -> bool {
        matches!(self, Self::ShearLoss | Self::Grade | Self::Index)
    }

    /// Its name in documents and lists.
    pub fn word(self) -> &'static str {
        match self {
            Self::Heater => "heater",
            Self::ShearLoss => "shear loss",
            Self::Grade => "grade of the same slope",
            Self::ColdestStart => "coldest start",
            Self::SumpRise => "sump rise",
            Self::Index => "viscosity index",
            Self::HottestAmbient => "hottest ambient",
            Self::Cooler => "cooler",
            Self::StartLimit => "start limit",
            Self::Reserve => "reserve",
        }
    }
}

/// How much is left over what is wanted on some of the limits: not negative exactly where those
/// limits let the target be reached. VG steps and kelvins are not weighed against each other; only
/// the sign and the nearness of zero matter.
pub fn excess(j: &Judgement, side: Side, target: Target) -> f64 {
    let need = match target {
        Target::Met => 0.0,
        Target::Reserve => j.reserve,
    };
    let full = target == Target::Reserve;
    let d = j.doubts;
    let mut left = f64::INFINITY;
    let mut barred = d.undecided;
    if side != Side::Cold {
        let least = [j.hot.map(|m| m.value - need), value(j.oil), value(j.maker)];
        left = least.into_iter().flatten().fold(left, f64::min);
        barred |= d.alpha_unknown || full && d.above_continuous;
    }
    if side != Side::Hot {
        let least = [j.cold.map(|m| m.value - need), value(j.pour)];
        left = least.into_iter().flatten().fold(left, f64::min);
        barred |= d.wax || d.pour_unknown;
        barred |= full && (d.far_below || d.window || d.pour_close);
    }
    if barred {
        left.min(-1e-6)
    } else {
        left.min(1e9)
    }
}

fn value(m: Option<crate::judge::weigh::Margin>) -> Option<f64> {
    m.map(|m| m.value)
}
