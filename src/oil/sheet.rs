//! The sheet of one oil: everything the command prints and the report's page draws, each number
//! with the step behind it.

mod cold;
mod drawn;
mod polymer;
mod rows;
mod teller;
mod words;

use super::curves::curves;
use super::findings::Finding;
use super::grades::{Graded, grades};
use super::life::{LifeAt, LifeBasis, NoLife, basis};
use crate::model::Oil;
use crate::model::rulebook::Rulebook;
use crate::quantity::convert::{celsius, to_celsius};
use crate::quantity::{
    DynamicViscosity, KinematicViscosity, MassDensity, PressureViscosity, Ratio,
    ThermodynamicTemperature,
};
use crate::relation::oil::viscosity_temperature::Misfit;
use crate::trace::{Derivation, Known};
pub use cold::{ColdRow, ColdSheet, StartRow};
pub use drawn::{DrawnLine, LineOf, Reading};
pub use polymer::{Loss, PolymerSheet};
pub use words::standing;

use super::start::Standing;
use teller::Teller;

/// One oil.
#[derive(Clone, Debug, PartialEq)]
pub struct OilSheet {
    /// Its id.
    pub id: String,
    /// Its name in plain words.
    pub name: Option<String>,
    /// The answer, in one line.
    pub headline: String,
    /// The reason, in one line.
    pub because: String,
    /// What is stated of it: kind, base, classes, additives, source.
    pub facts: Vec<(&'static str, String)>,
    /// Viscosity index by its viscosities, new and worn at the greatest loss.
    pub index: Option<Known<Ratio>>,
    /// How far the index of the new oil may be off by the tests; none where only ends are known.
    pub index_spread: Option<Known<Ratio>>,
    /// The index after shear.
    pub index_worn: Option<Known<Ratio>>,
    /// Grades, new and worn.
    pub grades: Vec<Graded>,
    /// At temperatures.
    pub rows: Vec<Row>,
    /// What its spread rests on.
    pub spread: SpreadOf,
    /// Polymer and shear; `None` for an oil without polymer.
    pub polymer: Option<PolymerSheet>,
    /// The cold end.
    pub cold: ColdSheet,
    /// Life against temperature, or why there is none.
    pub life: Result<(LifeBasis, Vec<LifeAt>), NoLife>,
    /// What does not add up, and what the reader should know.
    pub findings: Vec<Finding>,
    /// Lines for the figure.
    pub lines: Vec<DrawnLine>,
    /// Lowest and highest temperature anything is stated at.
    pub stated: (ThermodynamicTemperature, ThermodynamicTemperature),
    /// The calculation.
    pub steps: Derivation,
}

/// What the thin and thick values of a sheet are.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum SpreadOf {
    /// Ends of a grade or of stated tolerances: judged.
    Ends,
    /// Reproducibility of the tests carried along the line: drawn, not judged.
    Tests,
    /// None to be had.
    Nothing,
}

/// The oil at one temperature.
#[derive(Clone, Debug, PartialEq)]
pub struct Row {
    /// The temperature.
    pub at: ThermodynamicTemperature,
    /// New, on the line of its points.
    pub new: Known<KinematicViscosity>,
    /// New, through viscosities measured cold; only below the coldest point stated.
    pub cold: Option<Known<KinematicViscosity>>,
    /// Thin and thick end.
    pub ends: Option<(Known<KinematicViscosity>, Known<KinematicViscosity>)>,
    /// Worn, at the least and at the greatest loss; equal where the loss is known.
    pub worn: Option<(Known<KinematicViscosity>, Known<KinematicViscosity>)>,
    /// Base oil, thinner and thicker estimate; equal where it is stated.
    pub base: Option<(KinematicViscosity, KinematicViscosity)>,
    /// Density.
    pub density: Known<MassDensity>,
    /// Dynamic viscosity of the new oil.
    pub dynamic: Known<DynamicViscosity>,
    /// Pressure-viscosity coefficient, where one is to be had.
    pub alpha: Option<Known<PressureViscosity>>,
    /// How the temperature stands to what is known.
    pub standing: Standing,
    /// What else is to be said: near the pour point, below the polymer's window.
    pub remarks: Vec<String>,
}

/// Temperatures printed where none are asked for, °C.
const USUAL_C: [f64; 9] = [-30.0, -20.0, -10.0, 0.0, 20.0, 40.0, 60.0, 80.0, 100.0];
/// Running temperatures the life is printed at, °C.
const LIFE_C: [f64; 6] = [60.0, 70.0, 80.0, 90.0, 100.0, 110.0];

/// The sheet of an oil, at the temperatures asked for or at the usual ones.
///
/// # Errors
/// [`Misfit`] where its points make no curve; the reader refuses such oils.
pub fn sheet(
    oil: &Oil,
    rules: &Rulebook,
    asked: &[ThermodynamicTemperature],
) -> Result<OilSheet, Misfit> {
    let curves = curves(oil, rules)?;
    let mut teller = Teller::new(oil, &curves, rules);
    let temperatures = temperatures(&teller, asked);
    let rows = temperatures.iter().map(|t| teller.row(*t)).collect();
    let index = teller.index(false);
    let index_spread = index.and_then(|index| teller.index_spread(index));
    let index_worn = teller.index(true);
    let grades = grades(oil, &curves);
    teller.grades(&grades);
    let polymer = teller.polymer();
    let cold = teller.cold();
    let life = teller.life();
    let (headline, because) = words::headline(oil, &curves, &grades, index, index_worn);
    let lines = drawn::lines(&teller);
    let spread = teller.spread_of();
    Ok(OilSheet {
        id: oil.id.clone(),
        name: oil.name.clone(),
        headline,
        because,
        facts: words::facts(oil, &curves),
        index,
        index_spread,
        index_worn,
        grades,
        rows,
        spread,
        polymer,
        cold,
        life,
        findings: curves.findings.clone(),
        lines,
        stated: (curves.lowest, curves.highest),
        steps: teller.d,
    })
}

/// Those asked for; else the usual ones and those stated.
fn temperatures(
    teller: &Teller<'_>,
    asked: &[ThermodynamicTemperature],
) -> Vec<ThermodynamicTemperature> {
    let mut all: Vec<f64> = if asked.is_empty() {
        let usual = USUAL_C.iter().copied();
        usual
            .chain(teller.stated.iter().map(|t| to_celsius(*t)))
            .collect()
    } else {
        asked.iter().map(|t| to_celsius(*t)).collect()
    };
    all.sort_by(f64::total_cmp);
    all.dedup_by(|a, b| (*a - *b).abs() < 1e-6);
    all.into_iter().map(celsius).collect()
}

impl Teller<'_> {
    fn life(&mut self) -> Result<(LifeBasis, Vec<LifeAt>), NoLife> {
        let basis = basis(self.oil, self.curves, self.rules)?;
        let rows = LIFE_C
            .iter()
            .map(|t| self.life_at(&basis, celsius(*t)))
            .collect();
        Ok((basis, rows))
    }
}
