//! The causes a sample is asked about.

/// Why an oil in use reads otherwise than new.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Cause {
    /// The polymer is cut by shear.
    PolymerShear,
    /// Bronze or brass is attacked.
    CopperAttack,
    /// Dust has got in.
    Dirt,
    /// Water with the salts of cooling water.
    CoolingWater,
    /// Fuel or solvent.
    Dilution,
    /// Refrigerant or process gas in solution.
    Gas,
    /// An oil thinner than the labelled one.
    LighterOil,
    /// An oil thicker than the labelled one.
    HeavierOil,
    /// Another oil of about the same viscosity.
    LikeOil,
    /// Oxidised.
    Oxidation,
    /// Light ends have gone off.
    LightEndLoss,
    /// Cracked by heat.
    Cracking,
    /// Water.
    Water,
    /// Soot.
    Soot,
    /// Polyglycol or vegetable oil mixed in.
    Admixture,
    /// The laboratory or the label is mistaken.
    LabError,
}

impl Cause {
    /// Every cause.
    pub const ALL: &'static [Self] = &[
        Self::PolymerShear,
        Self::CopperAttack,
        Self::Dirt,
        Self::CoolingWater,
        Self::Dilution,
        Self::Gas,
        Self::LighterOil,
        Self::HeavierOil,
        Self::LikeOil,
        Self::Oxidation,
        Self::LightEndLoss,
        Self::Cracking,
        Self::Water,
        Self::Soot,
        Self::Admixture,
        Self::LabError,
    ];

    /// Its id, that of its entry in the rules (diagnosis).
    pub const fn id(self) -> &'static str {
        match self {
            Self::PolymerShear => "polymer-shear",
            Self::CopperAttack => "copper-attack",
            Self::Dirt => "dirt",
            Self::CoolingWater => "cooling-water",
            Self::Dilution => "fuel-dilution",
            Self::Gas => "dissolved-gas",
            Self::LighterOil => "lighter-oil",
            Self::HeavierOil => "heavier-oil",
            Self::LikeOil => "like-oil",
            Self::Oxidation => "oxidation",
            Self::LightEndLoss => "light-end-loss",
            Self::Cracking => "thermal-cracking",
            Self::Water => "water",
            Self::Soot => "soot",
            Self::Admixture => "admixture",
            Self::LabError => "label-error",
        }
    }

    /// What it is called.
    pub const fn says(self) -> &'static str {
        match self {
            Self::PolymerShear => "polymer shear",
            Self::CopperAttack => "chemical attack on copper alloys",
            Self::Dirt => "dirt",
            Self::CoolingWater => "cooling-water entry",
            Self::Dilution => "fuel or solvent dilution",
            Self::Gas => "refrigerant or process gas",
            Self::LighterOil => "lighter wrong oil",
            Self::HeavierOil => "heavier wrong oil",
            Self::LikeOil => "wrong oil of like viscosity",
            Self::Oxidation => "oxidation",
            Self::LightEndLoss => "light-end loss",
            Self::Cracking => "thermal cracking",
            Self::Water => "water entry",
            Self::Soot => "soot",
            Self::Admixture => "polyglycol or vegetable oil mixed in",
            Self::LabError => "laboratory or label error",
        }
    }

    /// Whether another oil than the labelled one is in the machine.
    pub fn is_other_oil(self) -> bool {
        matches!(
            self,
            Self::LighterOil | Self::HeavierOil | Self::LikeOil | Self::Admixture
        )
    }

    /// What to do about it.
    pub const fn act(self) -> &'static str {
        match self {
            Self::PolymerShear => {
                "change the type of oil, not only the oil: a shear-stable one, or one judged by its sheared viscosity"
            }
            Self::CopperAttack => {
                "change to an oil without active sulphur, and inspect the bronze parts"
            }
            Self::Dirt => "find where dust gets in: breather, seals, filling; filter the oil",
            Self::CoolingWater => "find the leak of the cooler, then dry or change the oil",
            Self::Dilution => "find where fuel or solvent gets in, then change the oil",
            Self::Gas => "degas a warm sample and test it again",
            Self::LighterOil | Self::HeavierOil | Self::LikeOil => {
                "check the can and the label at the filling point; correct at the next change, at once where the oil does not serve"
            }
            Self::Oxidation => "plan the oil change, and look for what heats the oil",
            Self::LightEndLoss => "look for hot spots; plan the change to an oil of narrower cut",
            Self::Cracking => {
                "find the hot spot: a heater of too high watt density, a blocked flow; change the oil"
            }
            Self::Water => "find where water gets in, then dry the oil",
            Self::Soot => "look at combustion and injection; change the oil",
            Self::Admixture => {
                "take another sample for infrared; these oils do not mix with mineral oil: drain, flush and refill once it is certain"
            }
            Self::LabError => {
                "have the sample tested again, and compare the bottle with the machine"
            }
        }
    }
}
