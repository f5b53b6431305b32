//! Base stocks, as far as the relations distinguish them.

use super::density::DensityLaw;
use super::pressure_viscosity::Family;

/// The fluid an oil is made of.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum BaseStock {
    /// API Group I mineral oil.
    MineralI,
    /// API Group II mineral oil.
    MineralII,
    /// API Group III, and oils made from gas.
    MineralIII,
    /// Naphthenic mineral oil.
    Naphthenic,
    /// Polyalphaolefin.
    Pao,
    /// Diester.
    DiEster,
    /// Polyol ester.
    PolyolEster,
    /// Polyalkylene glycol that dissolves in water.
    PagWaterSoluble,
    /// Polyalkylene glycol that dissolves in oil.
    PagOilSoluble,
    /// Alkylated naphthalene.
    AlkylatedNaphthalene,
    /// Dimethyl silicone.
    Silicone,
    /// Perfluoropolyether.
    Pfpe,
    /// Vegetable oil.
    Vegetable,
    /// Phosphate ester.
    PhosphateEster,
    /// Water-glycol.
    WaterGlycol,
}

impl BaseStock {
    /// The words users write, the preferred one of each first. `mineral` alone stands for
    /// Group I, `ester` alone for a polyol ester.
    pub const WRITTEN: &'static [(&'static str, Self)] = &[
        ("mineral I", Self::MineralI),
        ("mineral", Self::MineralI),
        ("mineral II", Self::MineralII),
        ("mineral III", Self::MineralIII),
        ("naphthenic", Self::Naphthenic),
        ("PAO", Self::Pao),
        ("diester", Self::DiEster),
        ("polyol ester", Self::PolyolEster),
        ("ester", Self::PolyolEster),
        ("PAG water-soluble", Self::PagWaterSoluble),
        ("PAG oil-soluble", Self::PagOilSoluble),
        ("alkylated naphthalene", Self::AlkylatedNaphthalene),
        ("silicone", Self::Silicone),
        ("PFPE", Self::Pfpe),
        ("vegetable", Self::Vegetable),
        ("phosphate ester", Self::PhosphateEster),
        ("water-glycol", Self::WaterGlycol),
    ];

    /// The word users write.
    pub fn word(self) -> &'static str {
        let found = Self::WRITTEN.iter().find(|(_, b)| *b == self);
        found.map_or("", |(word, _)| word)
    }

    /// How its density changes with temperature.
    ///
    /// Mineral oil and PAO follow the tables for lubricating oils within 0.6 % at 100 °C
    /// (computed from reference fluids); esters, alkylated naphthalenes and vegetable oils
    /// acceptably (common practice). The others have coefficients of their own, from memory: the
    /// supplier's comes first. That of silicone, phosphate ester and water-glycol is the middle
    /// of the usual expansion at the middle of the usual density.
    pub fn density_law(self) -> DensityLaw {
        match self {
            Self::PagWaterSoluble | Self::PagOilSoluble => DensityLaw::falling_by(0.78),
            Self::Pfpe => DensityLaw::falling_by(1.7),
            Self::Silicone => DensityLaw::falling_by(0.90),
            Self::PhosphateEster => DensityLaw::falling_by(0.80),
            Self::WaterGlycol => DensityLaw::falling_by(0.64),
            Self::MineralI
            | Self::MineralII
            | Self::MineralIII
            | Self::Naphthenic
            | Self::Pao
            | Self::DiEster
            | Self::PolyolEster
            | Self::AlkylatedNaphthalene
            | Self::Vegetable => DensityLaw::LubricatingOil,
        }
    }

    /// Whose pressure-viscosity correlation serves it; `None` where only a measured coefficient
    /// will do.
    ///
    /// Vegetable oils are esters of glycerol and measured alike (12 to 17 1/GPa, from memory).
    /// Alkylated naphthalene is taken as PAO, which is on the low side and so thins the film
    /// worked out (common practice).
    pub fn pressure_family(self) -> Option<Family> {
        match self {
            Self::MineralI | Self::MineralII | Self::MineralIII | Self::Naphthenic => {
                Some(Family::Mineral)
            }
            Self::Pao | Self::AlkylatedNaphthalene => Some(Family::Pao),
            Self::PagWaterSoluble | Self::PagOilSoluble => Some(Family::Pag),
            Self::DiEster | Self::PolyolEster | Self::Vegetable => Some(Family::Ester),
            Self::Silicone | Self::Pfpe | Self::PhosphateEster | Self::WaterGlycol => None,
        }
    }
}
