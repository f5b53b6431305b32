//! Base stocks, as far as the relations distinguish them.

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
