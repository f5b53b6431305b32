//! A generated works of realistic mix: gear drives, hydraulic units, bearings and turbines, some
//! in food zones or above protected water, and the oils that are sold for them. Invented, the
//! same for the same seed.

use super::generate::Chance;
use std::fmt::Write as _;

/// What is stated of every machine, so that suitability rules have nothing to ask.
const FACTS: &str = "    yellow metal: no\n    backstop: no\n    wet clutch: no\n    silver: no\n    zinc plated: no\n    breathing air: no\n    oxygen: no\n    water entry: no\n    seals: FKM\n    inside paint: two-part epoxy\n    sight glass: glass\n";

/// Families of oils: what they are sold as, and from which grade to which.
struct Family {
    head: &'static str,
    grades: &'static [f64],
    /// Share of viscosity at 100 degC in `nu40^0.77`: the index.
    index: f64,
    pour: f64,
    price: (f64, f64),
}

const FAMILIES: [Family; 6] = [
    Family {
        head: "  kind: gear\n  classes: [CKC]\n  base: mineral I\n  additives: [EP]\n",
        grades: &[68.0, 100.0, 150.0, 220.0, 320.0, 460.0],
        index: 0.312,
        pour: -18.0,
        price: (2.4, 3.6),
    },
    Family {
        head: "  kind: gear\n  classes: [CKC, CKD]\n  base: PAO, no polymer\n  additives: [EP]\n",
        grades: &[100.0, 150.0, 220.0, 320.0, 460.0],
        index: 0.405,
        pour: -42.0,
        price: (8.5, 11.0),
    },
    Family {
        head: "  kind: hydraulic\n  classes: [HM, HLP]\n  base: mineral II\n  additives: [AW]\n",
        grades: &[22.0, 32.0, 46.0, 68.0, 100.0],
        index: 0.335,
        pour: -30.0,
        price: (1.9, 2.8),
    },
    Family {
        head: "  kind: turbine\n  classes: [TSA, HL, CKB]\n  base: mineral II\n  additives: [R&O]\n",
        grades: &[32.0, 46.0, 68.0, 100.0],
        index: 0.33,
        pour: -18.0,
        price: (2.2, 3.0),
    },
    Family {
        head: "  kind: gear\n  classes: [CKC, CLP]\n  base: PAO, no polymer\n  additives: [AW]\n  food class: H1\n",
        grades: &[150.0, 220.0, 320.0],
        index: 0.4,
        pour: -36.0,
        price: (10.0, 13.0),
    },
    Family {
        head: "  kind: hydraulic\n  classes: [HEES, HM]\n  base: ester, no polymer\n  additives: [AW]\n  environment: EAL\n",
        grades: &[32.0, 46.0, 68.0],
        index: 0.4,
        pour: -39.0,
        price: (6.0, 9.0),
    },
];

/// How often each family is met.
const SHARES: [usize; 12] = [0, 0, 0, 1, 1, 2, 2, 2, 3, 3, 4, 5];

/// So many oils.
pub(crate) fn oils(count: usize, seed: u64) -> String {
    let mut chance = Chance::new(seed);
    let mut text = String::from("file: oils 1\n");
    for i in 0..count {
        let family = &FAMILIES[SHARES[i % SHARES.len()]];
        let nu40 = family.grades[(i / 3) % family.grades.len()] * chance.between(0.96, 1.04);
        let nu100 = filmwright::numeric::math::pow(nu40, 0.77) * family.index;
        let (low, high) = family.price;
        let _ = write!(
            text,
            "OIL-{i:03}:\n{}  sulphur: inactive\n  copper strip: 1a\n  viscosity: [{nu40:.2} mm2/s at 40 degC, {nu100:.3} mm2/s at 100 degC]\n  pour point: {:.0} degC\n  flash point: 230 degC COC\n  density: 880 kg/m3 at 15 degC\n  price: {:.2} per L\n",
            family.head,
            family.pour + chance.between(-4.0, 4.0),
            chance.between(low, high)
        );
    }
    text
}

/// So many machines, filled today with one of so many oils.
pub(crate) fn site(machines: usize, oils: usize, seed: u64) -> String {
    let mut chance = Chance::new(seed);
    let mut text = String::from(
        "file: site 1\nsite: Generated works\ncurrency: cu\nareas:\n  yard:\n    ambient: -18 .. 36 degC\n    exposure: outdoor\n  hall:\n    ambient: 5 .. 38 degC\n    exposure: indoor\n  kitchen:\n    ambient: 8 .. 38 degC\n    exposure: indoor\n    food zone: yes\n  river:\n    ambient: -12 .. 34 degC\n    exposure: outdoor\n    water protection: yes\nmachines:\n",
    );
    for i in 0..machines {
        let area = match i % 20 {
            0 => "kitchen",
            1 => "river",
            n if n % 2 == 0 => "yard",
            _ => "hall",
        };
        let oil = chance.below(oils);
        let fill = chance.between(4.0, 300.0);
        let _ = write!(
            text,
            "  MC-{i:04}:\n    area: {area}\n    oil now: OIL-{oil:03}\n    fill: {fill:.0} L\n    annual use: {:.0} L a year\n    sump rise: {:.1} K\n{FACTS}",
            fill * chance.between(0.3, 1.5),
            chance.between(12.0, 40.0),
        );
        text.push_str(&parts(i, &mut chance));
    }
    text
}

fn parts(i: usize, chance: &mut Chance) -> String {
    let bearings = ["22220", "6312", "22316", "NU 218", "6208", "23134"];
    match i % 20 {
        3 | 7 | 11 | 15 | 19 => format!(
            "    lubrication: reservoir\n    start limit: {:.0} mm2/s, maker\n    cleanliness: 18/16/13\n    parts:\n      - component: hyd_pump_gear_external\n        pressure: {:.0} bar\n",
            chance.between(800.0, 1800.0),
            chance.between(80.0, 180.0)
        ),
        5 | 9 | 13 => format!(
            "    lubrication: bath\n    start limit: {:.0} mm2/s, maker\n    parts:\n      - rolling bearing: {}\n        speed: {:.0} r/min\n",
            chance.between(1500.0, 6000.0),
            chance.pick(&bearings),
            chance.between(700.0, 3000.0)
        ),
        _ => format!(
            "    lubrication: splash\n    start limit: {:.0} mm2/s, maker\n    parts:\n      - rolling bearing: {}\n        speed: {:.0} r/min\n      - gear mesh: stage\n        pitch-line speed: {:.2} m/s\n",
            chance.between(8_000.0, 45_000.0),
            chance.pick(&bearings),
            chance.between(150.0, 1500.0),
            chance.between(1.5, 14.0)
        ),
    }
}
