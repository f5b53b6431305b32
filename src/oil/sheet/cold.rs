//! The cold end on the sheet: what is measured, what the line says, and where limits are reached.

use super::teller::Teller;
use crate::model::stated::{Bound, ViscosityLimit};
use crate::oil::cold::ColdPoint;
use crate::oil::start::{ColdDesignation, Standing, StartAt, designation, start_temperatures};
use crate::quantity::show::{Toward, Units, quantity};
use crate::quantity::{
    DynamicViscosity, KinematicViscosity, Measure, Ratio, ThermodynamicTemperature,
};
use crate::relation::oil::d6080::{LOW_GRADE, T750};
use crate::relation::oil::start_limit::START_LIMIT;
use crate::relation::oil::viscosity_temperature::TEMPERATURE;
use crate::trace::{Known, Recorder};

/// The cold end of an oil.
#[derive(Clone, Debug, PartialEq)]
pub struct ColdSheet {
    /// Pour point: stated, or the range of its base.
    pub pour: Option<Bound<ThermodynamicTemperature>>,
    /// Cloud point.
    pub cloud: Option<Bound<ThermodynamicTemperature>>,
    /// Measured viscosities with what the line gives there.
    pub measured: Vec<ColdRow>,
    /// Temperatures at start limits, warmest first.
    pub starts: Vec<StartRow>,
    /// Coldest temperature anything is known at.
    pub coldest: ThermodynamicTemperature,
    /// Low-temperature designation of a hydraulic oil.
    pub designation: Option<(ColdDesignation, Known<ThermodynamicTemperature>)>,
}

/// One viscosity measured cold.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct ColdRow {
    /// The measurement.
    pub point: ColdPoint,
    /// Measured over line.
    pub ratio: Ratio,
}

/// One start limit.
#[derive(Clone, Debug, PartialEq)]
pub struct StartRow {
    /// The limit and where it is reached.
    pub start: StartAt,
    /// The temperature with its step.
    pub at: Known<ThermodynamicTemperature>,
}

impl Teller<'_> {
    /// The cold end.
    pub(super) fn cold(&mut self) -> ColdSheet {
        let measured = self.curves.cold_points.iter().map(|p| ColdRow {
            point: *p,
            ratio: Ratio::from_base(p.nu.base() / p.line.base()),
        });
        let measured = measured.collect();
        let starts = start_temperatures(self.oil, self.curves, self.rules);
        let starts = starts.into_iter().map(|s| self.start(s)).collect();
        ColdSheet {
            pour: self.oil.pour_point.as_ref().map(|p| p.value),
            cloud: self.oil.cloud_point.as_ref().map(|c| c.value),
            measured,
            starts,
            coldest: self.curves.coldest_known(),
            designation: self.designation(),
        }
    }

    fn start(&mut self, start: StartAt) -> StartRow {
        let value = start.at;
        let at = match start.limit {
            ViscosityLimit::Kinematic(nu) => {
                let limit = self
                    .d
                    .assume("nu", "start limit", nu, "rules, start limits");
                self.d.law(
                    "t",
                    "temperature at which the new oil reaches it",
                    &TEMPERATURE,
                    (("nu", limit),),
                    |_: (KinematicViscosity,)| value,
                )
            }
            ViscosityLimit::Dynamic(eta) => {
                let limit = self
                    .d
                    .assume("eta", "start limit", eta, "rules, start limits");
                self.d.law(
                    "t",
                    "temperature at which the new oil reaches it",
                    &START_LIMIT,
                    (("eta", limit),),
                    |_: (DynamicViscosity,)| value,
                )
            }
        };
        self.d.note(|| format!("{} [{}]", start.part, start.rule));
        if let Standing::Below(by) = start.standing {
            self.d
                .note(|| format!("extrapolated {by:.0} K below the lowest point known"));
        }
        StartRow { start, at }
    }

    fn designation(&mut self) -> Option<(ColdDesignation, Known<ThermodynamicTemperature>)> {
        let found = designation(self.oil, self.curves, self.rules)?;
        let eta = DynamicViscosity::from_base(0.75);
        let limit = self
            .d
            .assume("eta", "viscosity of the designation", eta, "ASTM D6080");
        let (law, t750) = (
            if found.measured { &T750 } else { &START_LIMIT },
            found.t750,
        );
        let at = self.d.law(
            "t_750",
            "temperature of 750 mPa.s",
            law,
            (("eta", limit),),
            |_: (DynamicViscosity,)| t750,
        );
        if !found.measured {
            self.d.note(|| {
                "read off the curve: the practice wants three measured temperatures".to_owned()
            });
        }
        let whole = found.whole.clone();
        let grade = found.grade;
        self.d.law(
            "t_750",
            "low-temperature grade",
            &LOW_GRADE,
            (("t_750", at),),
            |(t,): (ThermodynamicTemperature,)| t,
        );
        self.d.note(|| match (whole, grade) {
            (Some(whole), _) => whole,
            (None, Some(grade)) => grade.to_owned(),
            (None, None) => "too thick for a low-temperature grade".to_owned(),
        });
        Some((found, at))
    }
}

/// A bound in words.
pub(super) fn bound(b: Bound<ThermodynamicTemperature>) -> String {
    let shown = |t: ThermodynamicTemperature| quantity(t.amount(), Units::Si, Toward::Nearest);
    b.says(shown)
}
