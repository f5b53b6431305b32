//! The words facts are stated in, the same in site files, oil files and rules.

use crate::model::machine::Lubrication;
use crate::model::oil::OilKind;
use crate::model::word::{Word, words};
use crate::relation::oil::base_stock::BaseStock;

/// Takes the spelling of an enum that lists its own words.
macro_rules! written_words {
    ($name:ident, $noun:literal { $($variant:ident = $word:literal $(| $also:literal)*),+ $(,)? }) => {
        impl Word for $name {
            const NOUN: &'static str = $noun;
            const ALL: &'static [Self] = &[$(Self::$variant),+];

            fn word(self) -> &'static str {
                match self { $(Self::$variant => $word),+ }
            }

            fn spellings(self) -> &'static [&'static str] {
                match self { $(Self::$variant => &[$word $(, $also)*]),+ }
            }

            fn place(self) -> usize {
                self as usize
            }
        }
    };
}

written_words! {
    OilKind, "a kind of oil" {
        Gear = "gear", Hydraulic = "hydraulic", Turbine = "turbine", Compressor = "compressor",
        Circulating = "circulating", Engine = "engine", Axle = "axle", Spindle = "spindle",
        Slideway = "slideway", Chain = "chain", Worm = "worm", Other = "other",
        Grease = "grease",
    }
}

// Plain `mineral` is Group I and plain `ester` a polyol ester.
written_words! {
    BaseStock, "a base stock" {
        MineralI = "mineral I" | "mineral", MineralII = "mineral II",
        MineralIII = "mineral III", Naphthenic = "naphthenic", Pao = "PAO",
        DiEster = "diester", PolyolEster = "ester" | "polyol ester",
        PagWaterSoluble = "PAG water-soluble", PagOilSoluble = "PAG oil-soluble",
        AlkylatedNaphthalene = "alkylated naphthalene", Silicone = "silicone", Pfpe = "PFPE",
        Vegetable = "vegetable", PhosphateEster = "phosphate ester",
        WaterGlycol = "water-glycol",
    }
}

written_words! {
    Lubrication, "a way of lubrication" {
        Splash = "splash", Bath = "bath", Circulated = "circulated",
        PressureFed = "pressure-fed", Ring = "ring", Gravity = "gravity", Drip = "drip",
        Wick = "wick", Mist = "mist", Flooded = "flooded", Reservoir = "reservoir",
        Grease = "grease",
    }
}

words! {
    /// Yes or no.
    YesNo, "yes or no" { Yes = "yes", No = "no" }
}

impl From<bool> for YesNo {
    fn from(yes: bool) -> Self {
        if yes { Self::Yes } else { Self::No }
    }
}

words! {
    /// An additive family an oil declares.
    Additive, "an additive family" {
        Ep = "EP", Aw = "AW", Ro = "R&O", Zinc = "zinc", Detergent = "detergent",
        FrictionModifier = "friction modifier", Moly = "moly", Graphite = "graphite",
        Compounded = "compounded",
    }
}

words! {
    /// How reactive the sulphur in an oil is towards copper.
    Sulphur, "a word for sulphur" { None = "none", Inactive = "inactive", Active = "active" }
}

words! {
    /// Rating of the copper strip test, ASTM D130, from best to worst.
    CopperStrip, "a copper strip rating" {
        C1a = "1a", C1b = "1b", C2a = "2a", C2b = "2b", C2c = "2c", C2d = "2d", C2e = "2e",
        C3a = "3a", C3b = "3b", C4a = "4a", C4b = "4b", C4c = "4c",
    }
}

words! {
    /// Registration of a lubricant for food plants.
    FoodClass, "a food class" { H1 = "H1", H2 = "H2", H3 = "H3", H3h = "3H" }
}

words! {
    /// Environmental class.
    Environment, "an environmental class" { Eal = "EAL" }
}

words! {
    /// Fire class, from least to most.
    FireClass, "a fire class" {
        LessFlammable = "less flammable", FireResistant = "fire resistant",
        NonFlammable = "non-flammable",
    }
}

words! {
    /// Seal material. `labyrinth` is a seal without an elastomer.
    Elastomer, "a seal material" {
        Nbr = "NBR", Hnbr = "HNBR", Fkm = "FKM", Acm = "ACM", Vmq = "VMQ", Epdm = "EPDM",
        Cr = "CR", Iir = "IIR", Au = "AU" | "polyurethane", Ptfe = "PTFE",
        Labyrinth = "labyrinth" | "none",
    }
}

words! {
    /// Paint inside a housing.
    Paint, "an inside paint" {
        TwoPartEpoxy = "two-part epoxy", SinglePack = "single-pack", None = "none",
    }
}

words! {
    /// Material of a sight glass.
    SightGlass, "a sight glass" {
        Glass = "glass", Polycarbonate = "polycarbonate", Acrylic = "acrylic", None = "none",
    }
}

words! {
    /// A backstop running in the oil. `yes` where its kind is not stated.
    Backstop, "a backstop" { No = "no", Yes = "yes", Sprag = "sprag", Cam = "cam" }
}

words! {
    /// How water gets in.
    WaterEntry, "a word for water entry" {
        No = "no", Yes = "yes", Seldom = "seldom", Steady = "steady",
    }
}

words! {
    /// What kind of part a point serves.
    PartGroup, "a kind of part" {
        Hydraulic = "hydraulic", Pneumatic = "pneumatic", Compressor = "compressor",
        Vacuum = "vacuum pump", Turbine = "turbine", Circulating = "circulating system",
        PaperMachine = "paper machine", Gear = "gear", Hypoid = "hypoid gear",
        Worm = "worm gear", OpenGear = "open gear", Chain = "chain", Slideway = "slideway",
        Spindle = "spindle", Rope = "wire rope", Coupling = "coupling",
        RollingBearing = "rolling bearing", PlainBearing = "plain bearing",
        MotorBearing = "motor bearing", Contact = "contact", Engine = "engine", Axle = "axle",
        Transmission = "transmission", OutOfScope = "out of scope",
    }
}

words! {
    /// How an oil is brought to a point.
    Use, "a way of filling" { Fill = "fill", TopUp = "top-up" }
}

words! {
    /// How two things agree in a published table.
    Mark, "a mark of agreement" { Good = "good", Care = "care", Bad = "bad" }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn in_order<W: Word>() {
        for (place, word) in W::ALL.iter().enumerate() {
            assert_eq!(word.place(), place, "{}", word.word());
            assert!(W::from_word(word.word()) == Some(*word), "{}", word.word());
        }
    }

    #[test]
    fn lists_follow_the_order_of_their_enums() {
        in_order::<OilKind>();
        in_order::<BaseStock>();
        in_order::<Lubrication>();
        in_order::<CopperStrip>();
        in_order::<PartGroup>();
    }
}
