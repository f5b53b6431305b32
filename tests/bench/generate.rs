//! A generated site of realistic mix, for benchmarks and for tests at scale: invented machines
//! and oils, the same for the same seed.

use rand_pcg::Pcg64;
use rand_pcg::rand_core::{Rng, SeedableRng};
use std::fmt::Write as _;

/// A generator of its own seed.
pub(crate) struct Chance(Pcg64);

impl Chance {
    /// From a seed.
    pub(crate) fn new(seed: u64) -> Self {
        Self(Pcg64::seed_from_u64(seed))
    }

    /// A number from 0 up to 1.
    pub(crate) fn unit(&mut self) -> f64 {
        (self.0.next_u64() >> 11) as f64 / (1_u64 << 53) as f64
    }

    /// A number between two.
    pub(crate) fn between(&mut self, lo: f64, hi: f64) -> f64 {
        lo + (hi - lo) * self.unit()
    }

    /// A whole number below another.
    pub(crate) fn below(&mut self, count: usize) -> usize {
        let many = u64::try_from(count).unwrap_or(u64::MAX);
        usize::try_from(self.0.next_u64() % many).unwrap_or(0)
    }

    /// One of several.
    pub(crate) fn pick<'a, T>(&mut self, list: &'a [T]) -> &'a T {
        let i = self.below(list.len());
        &list[i]
    }
}

/// Oils: every grade from 32 to 460 in mineral and PAO, one in ten polymer-thickened.
pub(crate) fn oils(count: usize, seed: u64) -> String {
    let mut chance = Chance::new(seed);
    let mut text = String::from("file: oils 1\n");
    let grades = [32.0, 46.0, 68.0, 100.0, 150.0, 220.0, 320.0, 460.0];
    for i in 0..count {
        let nu40 = chance.pick(&grades) * chance.between(0.95, 1.05);
        let pao = i % 3 == 2;
        let thick = i % 10 == 9;
        // 100 degC from the usual run of the index: nu100 grows with nu40^0.77
        let nu100 =
            filmwright::numeric::math::pow(nu40, 0.77) * if pao || thick { 0.415 } else { 0.312 };
        let base = match (pao, thick) {
            (_, true) => "mineral I, polymer-thickened",
            (true, _) => "PAO, no polymer",
            _ => "mineral I",
        };
        let pour = if pao || thick {
            -42.0
        } else {
            chance.between(-24.0, -12.0)
        };
        let _ = write!(
            text,
            "OIL-{i:03}:\n  kind: gear\n  base: {base}\n  classes: [CKC, HM, CKB]\n  additives: [EP]\n  sulphur: inactive\n  copper strip: 1a\n  viscosity: [{nu40:.2} mm2/s at 40 degC, {nu100:.3} mm2/s at 100 degC]\n  pour point: {pour:.0} degC\n  density: 880 kg/m3 at 15 degC\n  price: {:.2} per L\n",
            chance.between(2.0, 12.0)
        );
        if thick {
            let (s40, s100) = (nu40 * 0.85, nu100 * 0.82);
            let _ = writeln!(
                text,
                "  sheared: [{s40:.2} mm2/s at 40 degC, {s100:.3} mm2/s at 100 degC, test \"20 h tapered roller bearing\"]"
            );
        }
    }
    text
}

/// Machines with fixed limits: bearings, pitch-line speeds, stated start limits; every fact that
/// suitability asks is stated. `films`: every tenth is a contact with a film ratio.
pub(crate) fn site(machines: usize, oils: usize, seed: u64, films: bool) -> String {
    let mut chance = Chance::new(seed);
    let mut text = String::from(
        "file: site 1\nsite: Generated works\nareas:\n  yard:\n    ambient: -18 .. 36 degC\n    exposure: outdoor\n  hall:\n    ambient: 5 .. 38 degC\n    exposure: indoor\nmachines:\n",
    );
    let bearings = ["22220", "6312", "22316", "NU 218", "6208", "23134"];
    for i in 0..machines {
        let area = if i % 3 == 0 { "hall" } else { "yard" };
        let rise = chance.between(12.0, 45.0);
        let oil = chance.below(oils);
        let _ = write!(
            text,
            "  MC-{i:06}:\n    area: {area}\n    lubrication: splash\n    oil now: OIL-{oil:03}\n    fill: {:.0} L\n    sump rise: {rise:.1} K\n    start limit: {:.0} mm2/s, maker\n    yellow metal: no\n    backstop: no\n    wet clutch: no\n    silver: no\n    zinc plated: no\n    breathing air: no\n    oxygen: no\n    water entry: no\n    seals: FKM\n    inside paint: two-part epoxy\n    sight glass: glass\n    parts:\n",
            chance.between(5.0, 200.0),
            chance.between(3_000.0, 40_000.0),
        );
        if films && i % 10 == 0 {
            let _ = write!(
                text,
                "      - contact: roller\n        radius: {:.1} mm\n        load per length: {:.0} N/mm\n        entrainment speed: {:.2} m/s\n        roughness 1: 0.2 um\n        roughness 2: 0.2 um\n        film ratio: 1\n",
                chance.between(8.0, 40.0),
                chance.between(60.0, 250.0),
                chance.between(0.8, 6.0)
            );
        } else {
            let _ = write!(
                text,
                "      - rolling bearing: {}\n        speed: {:.0} r/min\n      - gear mesh: stage\n        pitch-line speed: {:.2} m/s\n",
                chance.pick(&bearings),
                chance.between(120.0, 1500.0),
                chance.between(1.5, 14.0)
            );
        }
    }
    text
}
