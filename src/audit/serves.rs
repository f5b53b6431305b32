//! Whether the oil in use serves its machine: the machine's demands against the sample's own line.
//!
//! The sample is judged as an oil of two measured points, by the judge of all oils. Its margins
//! carry each end's strictest demand to 40 °C along the sample's own slope, so that the
//! laboratory's figure can be read against floor and ceiling.

use super::bottle::Figures;
use crate::demand::{End, PointDemands};
use crate::judge::because::because;
use crate::judge::margin::Jaw;
use crate::judge::prepared::ReadyLimit;
use crate::judge::{Judgement, PreparedOil, PreparedPoint, Verdict, weigh};
use crate::model::Oil;
use crate::model::oil::{OilKind, PointsFrom, Polymer, Viscosity, ViscosityPoint};
use crate::model::rulebook::Rulebook;
use crate::model::sample::Reading;
use crate::numeric::math::power_of_ten;
use crate::oil::Curves;
use crate::quantity::convert::{celsius, mm2_s, to_mm2_s};
use crate::quantity::show::Units;
use crate::quantity::{KinematicViscosity, Measure};
use crate::relation::oil::viscosity_temperature::{Line, Point as LinePoint};
use crate::source::Origin;
use crate::source::place::Given;

/// Whose slope the demands were carried along.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Slope {
    /// The sample's own: both viscosities were measured.
    Own,
    /// That of the labelled oil: one viscosity was not measured. A guide.
    OfLabel,
}

/// How the oil in use serves.
#[derive(Clone, Debug)]
pub struct Serves {
    /// The word.
    pub verdict: Verdict,
    /// The judgement behind it.
    pub judgement: Judgement,
    /// Why, the main reason first.
    pub because: Vec<String>,
    /// Least viscosity that serves, read at 40 °C, mm²/s.
    pub floor40: Option<f64>,
    /// Greatest viscosity that serves, read at 40 °C.
    pub ceiling40: Option<f64>,
    /// The floor read at 100 °C.
    pub floor100: Option<f64>,
    /// The ceiling read at 100 °C.
    pub ceiling100: Option<f64>,
    /// Whose slope it is.
    pub slope: Slope,
    /// The line judged.
    pub line: Line,
    /// Below the maker's grade, within what practice allows oil in use.
    pub below_grade: bool,
}

impl Serves {
    /// Whether no viscosity of this slope serves: the floor lies above the ceiling.
    pub fn no_value_fits(&self) -> bool {
        matches!((self.floor40, self.ceiling40), (Some(f), Some(c)) if f > c)
    }

    /// Smallest margin of viscosity, VG steps.
    pub fn margin(&self) -> Option<f64> {
        let j = &self.judgement;
        let all = [j.hot, j.cold, j.maker].into_iter().flatten();
        all.map(|m| m.value).min_by(f64::total_cmp)
    }
}

/// The labelled oil stripped to what a sample of it keeps: pour point, density, base, classes.
pub(super) fn frame(label: Option<&Oil>) -> Oil {
    let mut oil = match label {
        Some(label) => label.clone(),
        None => unknown_oil(),
    };
    oil.polymer = Polymer::Free;
    oil.shear = None;
    oil.formulation = None;
    oil.cold_viscosity.clear();
    oil.ccs.clear();
    oil.mrv.clear();
    oil.yield_stress = None;
    oil.t150000 = None;
    oil.hths = None;
    oil.vi = None;
    oil.inputs.clear();
    oil
}

fn unknown_oil() -> Oil {
    Oil {
        id: "oil in use".into(),
        name: None,
        source: None,
        note: None,
        kind: OilKind::Other,
        base: None,
        polymer: Polymer::Free,
        viscosity: Viscosity::Points {
            points: Vec::new(),
            from: PointsFrom::Measured,
        },
        shear: None,
        formulation: None,
        cold_viscosity: Vec::new(),
        ccs: Vec::new(),
        mrv: Vec::new(),
        yield_stress: None,
        t150000: None,
        hths: None,
        pour_point: None,
        cloud_point: None,
        flash_point: None,
        oil_limit: None,
        density: None,
        alpha: None,
        vi: None,
        facts: crate::model::facts::OilFacts::default(),
        price: None,
        in_stock: None,
        grease: None,
        inputs: Vec::new(),
        origin: Origin::assumed("oil in use, known by its sample"),
    }
}

/// The line of a sample: its own, or through the one viscosity measured along the label's slope.
pub(super) fn line(figures: &Figures, label: Option<&Curves>) -> Option<(Line, Slope)> {
    let point = |nu: f64, t: f64| LinePoint::new(celsius(t), mm2_s(nu));
    match (figures.exact(Reading::Nu40), figures.exact(Reading::Nu100)) {
        (Some(nu40), Some(nu100)) => {
            let line = Line::through(point(nu40, 40.0), point(nu100, 100.0)).ok()?;
            (nu100 < nu40).then_some((line, Slope::Own))
        }
        (Some(nu40), None) => {
            let slope = label?.new.line_at(celsius(40.0));
            Some((
                slope.parallel_through(mm2_s(nu40), celsius(40.0)),
                Slope::OfLabel,
            ))
        }
        (None, Some(nu100)) => {
            let slope = label?.new.line_at(celsius(100.0));
            Some((
                slope.parallel_through(mm2_s(nu100), celsius(100.0)),
                Slope::OfLabel,
            ))
        }
        (None, None) => None,
    }
}

/// A sample as an oil of measured points.
pub(super) fn as_oil(frame: &Oil, line: Line, row: &str) -> Oil {
    let point = |nu: KinematicViscosity, t: f64| ViscosityPoint {
        nu: Given::new(nu, "", Origin::assumed(format!("laboratory, {row}"))),
        at: celsius(t),
        tolerance: None,
    };
    Oil {
        viscosity: Viscosity::Points {
            points: vec![point(line.nu40(), 40.0), point(line.nu100(), 100.0)],
            from: PointsFrom::Measured,
        },
        ..frame.clone()
    }
}

/// A point made ready for oils in use: the maker's grade speaks of new oil, and in use it is
/// undercut by what practice allows its class.
pub(super) fn in_use(ready: &PreparedPoint, allowed: f64) -> PreparedPoint {
    let mut ready = ready.clone();
    for setting in &mut ready.settings {
        for demand in &mut setting.demands {
            if let (End::MakerGrade, ReadyLimit::Jaw(jaw)) = (demand.end, &demand.limit) {
                let nu = KinematicViscosity::from_base(jaw.nu * (1.0 - allowed));
                let at = crate::quantity::ThermodynamicTemperature::from_base(jaw.t);
                demand.limit = ReadyLimit::Jaw(Jaw::new(nu, at));
            }
        }
    }
    ready
}

/// What a sample is judged against.
pub(super) struct Against<'a> {
    pub(super) demands: &'a PointDemands,
    pub(super) ready: &'a PreparedPoint,
    /// What practice allows below the maker's grade, a share.
    pub(super) allowed: f64,
    pub(super) rules: &'a Rulebook,
    pub(super) units: Units,
}

/// Judges a sample.
pub(super) fn judge(
    frame: &Oil,
    line: Line,
    slope: Slope,
    row: &str,
    by: &Against<'_>,
) -> Option<Serves> {
    let oil = as_oil(frame, line, row);
    let prepared = PreparedOil::new(&oil, by.rules, false).ok()?;
    let judgement = weigh(by.ready, &prepared);
    let because = because(by.demands, by.ready, &prepared, &judgement, by.units);
    let nu40 = to_mm2_s(line.nu40());
    let end = |margin: f64| nu40 * power_of_ten(margin / 6.0);
    let hot = judgement.hot.map(|m| end(-m.value));
    let maker = judgement.maker.map(|m| end(-m.value));
    let floor40 = [hot, maker].into_iter().flatten().max_by(f64::total_cmp);
    let ceiling40 = judgement.cold.map(|m| end(m.value));
    let at100 = |nu40: f64| to_mm2_s(line.parallel_through(mm2_s(nu40), celsius(40.0)).nu100());
    // the maker's own lower limit, before what practice allows is taken off
    let below_grade = maker.is_some_and(|limit| nu40 < limit / (1.0 - by.allowed) - 1e-9);
    let verdict = match judgement.verdict {
        Verdict::Holds if below_grade => Verdict::Tight,
        verdict => verdict,
    };
    Some(Serves {
        verdict,
        because,
        floor40,
        ceiling40,
        floor100: floor40.map(at100),
        ceiling100: ceiling40.map(at100),
        slope,
        line,
        below_grade,
        judgement,
    })
}
