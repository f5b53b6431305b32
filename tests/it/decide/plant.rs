//! One invented machine and one invented oil, written as files and read by the program: a change
//! is a changed line, so that nothing of the room under test is used to check it.

use crate::chance::Chance;
use crate::judging::{rules, site};
use filmwright::judge::Verdict;
use filmwright::model::Site;
use filmwright::model::rulebook::Rulebook;
use filmwright::weighing::{Scales, Settings};
use std::fmt::Write as _;
use std::sync::LazyLock;

/// The built-in rules, read once.
pub(super) fn book() -> &'static Rulebook {
    static BOOK: LazyLock<Rulebook> = LazyLock::new(rules);
    &BOOK
}

/// A machine and an oil, by the figures that matter. Temperatures in degC, viscosities in mm2/s.
#[derive(Clone, Debug)]
pub(super) struct Plant {
    pub(super) ambient: (f64, f64),
    pub(super) rise: f64,
    pub(super) sump: Option<(f64, f64)>,
    pub(super) heater: Option<f64>,
    pub(super) start: Option<f64>,
    pub(super) start_limit: f64,
    pub(super) speed: f64,
    pub(super) pitch_line: f64,
    pub(super) reserve: f64,
    pub(super) nu: (f64, f64),
    pub(super) thickened: bool,
    pub(super) loss: Option<f64>,
    pub(super) pour: f64,
}

impl Plant {
    /// One by chance: cold to hot places, thin to thick oils, so that verdicts of every kind occur.
    pub(super) fn by_chance(seed: u64) -> Self {
        let mut chance = Chance::seeded(seed);
        let grades = [32.0, 46.0, 68.0, 100.0, 150.0, 220.0, 320.0, 460.0];
        let at = chance.between(0.0, 8.0);
        let which = (1..8).filter(|i| at >= f64::from(*i)).count();
        let nu40 = grades[which] * chance.between(0.95, 1.05);
        let factor = chance.between(0.30, 0.42);
        let thickened = chance.between(0.0, 1.0) < 0.3;
        Self {
            ambient: (chance.between(-30.0, 5.0), chance.between(25.0, 45.0)),
            rise: chance.between(15.0, 48.0),
            sump: None,
            heater: None,
            start: None,
            start_limit: chance.between(2_000.0, 40_000.0),
            speed: chance.between(120.0, 1500.0),
            pitch_line: chance.between(1.5, 14.0),
            reserve: 0.5,
            nu: (nu40, filmwright::numeric::math::pow(nu40, 0.77) * factor),
            thickened,
            loss: None,
            pour: chance.between(-50.0, -20.0),
        }
    }

    fn site_text(&self) -> String {
        let mut text = format!(
            "file: site 1\nhouse:\n  reserve: {:.15} step\nmachines:\n  M1:\n    ambient: {:.15} .. {:.15} degC\n    lubrication: splash\n    fill: 60 L\n    oil now: X\n    start limit: {:.12} mm2/s, maker\n",
            self.reserve, self.ambient.0, self.ambient.1, self.start_limit
        );
        match self.sump {
            Some((a, b)) => {
                let _ = writeln!(text, "    sump: {a:.15} .. {b:.15} degC");
            }
            None => {
                let _ = writeln!(text, "    sump rise: {:.15} K", self.rise);
            }
        }
        for (key, value) in [("heater", self.heater), ("start", self.start)] {
            if let Some(value) = value {
                let _ = writeln!(text, "    {key}: {value:.15} degC");
            }
        }
        let _ = write!(
            text,
            "    parts:\n      - rolling bearing: 22220\n        speed: {:.6} r/min\n      - gear mesh: stage\n        pitch-line speed: {:.6} m/s\n",
            self.speed, self.pitch_line
        );
        text
    }

    fn oils_text(&self) -> String {
        let base = if self.thickened {
            "PAO, polymer-thickened"
        } else {
            "PAO, no polymer"
        };
        let mut text = format!(
            "file: oils 1\nX:\n  kind: gear\n  base: {base}\n  classes: [CKC]\n  additives: [EP]\n  sulphur: inactive\n  viscosity: [{:.15} mm2/s at 40 degC, {:.15} mm2/s at 100 degC]\n  pour point: {:.3} degC\n  density: 870 kg/m3 at 15 degC\n",
            self.nu.0, self.nu.1, self.pour
        );
        if let Some(loss) = self.loss {
            let _ = writeln!(
                text,
                "  shear loss: {:.15} % at 100 degC, test \"20 h tapered roller bearing\"",
                100.0 * loss
            );
        }
        text
    }

    /// Read as files are.
    pub(super) fn site(&self) -> Site {
        site(&self.site_text(), &self.oils_text(), book())
    }

    /// The verdict; none where the oil is barred.
    pub(super) fn verdict(&self) -> Option<Verdict> {
        let site = self.site();
        let scales = Scales::new(&site, book(), Settings::default()).expect("curves");
        let weighed = scales.weigh(&site.points[0]);
        weighed.candidates.first().map(|c| c.judgement.verdict)
    }
}
