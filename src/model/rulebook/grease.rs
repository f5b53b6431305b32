//! Greases: thickeners and how they mix, consistency, codes, base oil by speed, regreasing.

use super::provenance::Provenance;
use super::table::entry;
use crate::model::stated::Between;
use crate::model::word::words;
use crate::quantity::{KinematicViscosity, Ratio, ThermodynamicTemperature};

/// A thickener.
#[derive(Clone, Debug, PartialEq)]
pub struct Thickener {
    /// Its id.
    pub id: String,
    /// Its name.
    pub name: String,
    /// Other names.
    pub also: Vec<String>,
    /// Coldest start and hottest use.
    pub range: Between<ThermodynamicTemperature>,
    /// Dropping point; not a working limit. None: it does not drop.
    pub dropping: Option<ThermodynamicTemperature>,
    /// Against water.
    pub water: String,
    /// In pumped systems.
    pub pumping: String,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(Thickener, |t| {
    let mut names = vec![t.name.as_str()];
    names.extend(t.also.iter().map(String::as_str));
    names
});

words! {
    /// How two greases agree.
    Agreement, "a mark of grease agreement" {
        Compatible = "compatible" | "C", Borderline = "borderline" | "B",
        Incompatible = "incompatible" | "I",
    }
}

/// How one thickener mixes with others.
#[derive(Clone, Debug, PartialEq)]
pub struct GreaseMix {
    /// Its id.
    pub id: String,
    /// The thickener.
    pub thickener: String,
    /// The other and the mark; `any` for all others.
    pub with: Vec<(String, Agreement)>,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(GreaseMix);

/// An NLGI number.
#[derive(Clone, Debug, PartialEq)]
pub struct Nlgi {
    /// `000` to `6`.
    pub id: String,
    /// Worked penetration, 0.1 mm.
    pub penetration: Between<Ratio>,
    /// What it feels like.
    pub feel: String,
    /// What it is used for.
    pub usage: Option<String>,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(Nlgi);

words! {
    /// Place of a letter in the code.
    CodePlace, "a place in the grease code" {
        Use = "use", Base = "base", Additive = "additive", Temperature = "temperature",
    }
}

/// A letter of the DIN 51502 grease code.
#[derive(Clone, Debug, PartialEq)]
pub struct CodeLetter {
    /// Its id.
    pub id: String,
    /// Its place.
    pub place: CodePlace,
    /// The letter or letters; empty where their absence means something.
    pub letter: String,
    /// What it means.
    pub meaning: String,
    /// Highest temperature, for the temperature letter.
    pub upper: Option<ThermodynamicTemperature>,
    /// Behaviour with water by DIN 51807, for the temperature letter.
    pub water: Option<String>,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(CodeLetter);

/// Base oil of a grease by the speed factor n·dm.
#[derive(Clone, Debug, PartialEq)]
pub struct SpeedBand {
    /// Its id.
    pub id: String,
    /// From n·dm, mm/min.
    pub from: Option<Ratio>,
    /// To n·dm, mm/min.
    pub to: Option<Ratio>,
    /// Base oil at 40 °C.
    pub nu40: Between<KinematicViscosity>,
    /// NLGI numbers.
    pub nlgi: Vec<String>,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(SpeedBand);

/// Highest n·dm a grease serves.
#[derive(Clone, Debug, PartialEq)]
pub struct SpeedLimit {
    /// Its id.
    pub id: String,
    /// What, in words.
    pub what: String,
    /// n·dm, mm/min.
    pub at_most: Ratio,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(SpeedLimit);

words! {
    /// What a factor on the interval stands for.
    FactorKind, "a kind of factor" {
        Bearing = "bearing", Temperature = "temperature", Dirt = "dirt", Moisture = "moisture",
        Vibration = "vibration", Position = "position",
    }
}

/// A factor on the regreasing interval.
#[derive(Clone, Debug, PartialEq)]
pub struct IntervalFactor {
    /// Its id.
    pub id: String,
    /// What it stands for.
    pub kind: FactorKind,
    /// When, in words.
    pub case: String,
    /// Up to this figure of its kind (degC or mm/s), where it is a figure.
    pub up_to: Option<Ratio>,
    /// The factor.
    pub factor: Ratio,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(IntervalFactor, |f| vec![f.case.as_str()]);

/// How full a bearing is packed.
#[derive(Clone, Debug, PartialEq)]
pub struct FirstFill {
    /// Its id.
    pub id: String,
    /// Slow, medium, fast.
    pub case: String,
    /// Share of the free space.
    pub share: Between<Ratio>,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(FirstFill);
