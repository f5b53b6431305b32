//! Thirty machines in ordinary, sound use with the oil such machines ordinarily run on: none may
//! fail and none may be barred. The oils are the usual grades of the trade for each machine
//! (common practice unless a source stands beside the line); temperatures are ordinary ones.

use crate::judging::{rules, site};
use filmwright::judge::Verdict;
use filmwright::weighing::{Scales, Settings};
use std::fmt::Write as _;

const OILS: &str = "\
file: oils 1
TO-32: { kind: turbine, base: mineral II, classes: [TSA, THA, HL], additives: [R&O], viscosity: [32 mm2/s at 40 degC, 5.5 mm2/s at 100 degC], pour point: -15 degC }
TO-46: { kind: turbine, base: mineral II, classes: [TSA, THA, HL], additives: [R&O], viscosity: [46 mm2/s at 40 degC, 6.9 mm2/s at 100 degC], pour point: -15 degC }
TO-68: { kind: turbine, base: mineral II, classes: [TSA, THA, HL], additives: [R&O], viscosity: [68 mm2/s at 40 degC, 8.9 mm2/s at 100 degC], pour point: -15 degC }
HM-32: { kind: hydraulic, base: mineral I, classes: [HM], additives: [AW], viscosity: [32 mm2/s at 40 degC, 5.4 mm2/s at 100 degC], pour point: -27 degC }
HM-46: { kind: hydraulic, base: mineral I, classes: [HM], additives: [AW], viscosity: [46 mm2/s at 40 degC, 6.8 mm2/s at 100 degC], pour point: -24 degC }
HM-68: { kind: hydraulic, base: mineral I, classes: [HM], additives: [AW], viscosity: [68 mm2/s at 40 degC, 8.7 mm2/s at 100 degC], pour point: -24 degC }
CI-68: { kind: circulating, base: mineral II, classes: [CKB, HL], additives: [R&O], viscosity: [68 mm2/s at 40 degC, 8.8 mm2/s at 100 degC], pour point: -15 degC }
CI-100: { kind: circulating, base: mineral II, classes: [CKB, HL], additives: [R&O], viscosity: [100 mm2/s at 40 degC, 11.4 mm2/s at 100 degC], pour point: -15 degC }
CI-150: { kind: circulating, base: mineral II, classes: [CKB, HL], additives: [R&O], viscosity: [150 mm2/s at 40 degC, 14.8 mm2/s at 100 degC], pour point: -12 degC }
PM-220: { kind: circulating, base: mineral II, classes: [CKB], additives: [R&O], viscosity: [220 mm2/s at 40 degC, 19 mm2/s at 100 degC], pour point: -12 degC }
EP-150: { kind: gear, base: mineral I, classes: [CKC, CLP], additives: [EP], sulphur: inactive, viscosity: [150 mm2/s at 40 degC, 14.7 mm2/s at 100 degC], pour point: -24 degC }
EP-220: { kind: gear, base: mineral I, classes: [CKC, CLP], additives: [EP], sulphur: inactive, viscosity: [220 mm2/s at 40 degC, 18.9 mm2/s at 100 degC], pour point: -21 degC }
EP-320: { kind: gear, base: mineral I, classes: [CKC, CLP], additives: [EP], sulphur: inactive, viscosity: [320 mm2/s at 40 degC, 24 mm2/s at 100 degC], pour point: -18 degC }
SY-220: { kind: gear, base: PAO, classes: [CKC, CKE, CLP], additives: [EP], sulphur: inactive, viscosity: [220 mm2/s at 40 degC, 26 mm2/s at 100 degC], pour point: -42 degC }
WG-460: { kind: gear, base: PAG water-soluble, classes: [CKE], additives: [AW], sulphur: inactive, viscosity: [460 mm2/s at 40 degC, 78 mm2/s at 100 degC], pour point: -30 degC }
SC-46: { kind: compressor, base: mineral II, classes: [DAH, DAJ], additives: [R&O], viscosity: [46 mm2/s at 40 degC, 6.9 mm2/s at 100 degC], pour point: -15 degC }
RC-100: { kind: compressor, base: mineral I, classes: [DAA, DAB], additives: [R&O], viscosity: [100 mm2/s at 40 degC, 11.2 mm2/s at 100 degC], pour point: -12 degC }
VP-100: { kind: compressor, base: mineral II, classes: [DVA, DVC], viscosity: [100 mm2/s at 40 degC, 11.4 mm2/s at 100 degC], pour point: -12 degC }
SW-68: { kind: slideway, base: mineral I, classes: [CKG, G], additives: [AW], viscosity: [68 mm2/s at 40 degC, 8.6 mm2/s at 100 degC], pour point: -15 degC }
SP-10: { kind: spindle, base: mineral II, classes: [FD], additives: [AW], viscosity: [10 mm2/s at 40 degC, 2.6 mm2/s at 100 degC], pour point: -15 degC }
AX-90: { kind: axle, base: mineral I, classes: [GL-5], additives: [EP], viscosity: [146 mm2/s at 40 degC, 14.6 mm2/s at 100 degC], pour point: -27 degC }
";

struct Pair {
    oil: &'static str,
    machine: &'static str,
    why: &'static str,
}

const fn pair(oil: &'static str, machine: &'static str, why: &'static str) -> Pair {
    Pair { oil, machine, why }
}

const PAIRS: [Pair; 30] = [
    pair(
        "TO-32",
        "sump: held at 45 degC, start: 20 degC, parts: [{component: turbine_journal}]",
        "steam turbine on ISO VG 32 at a 45 degC header, ISO 8068",
    ),
    pair(
        "TO-46",
        "sump: held at 48 degC, start: 22 degC, parts: [{component: turbine_journal}]",
        "geared turbine on ISO VG 46, ISO 8068",
    ),
    pair(
        "TO-32",
        "sump: held at 45 degC, start: 20 degC, parts: [{component: comp_centrifugal}]",
        "centrifugal compressor on ISO VG 32, API 614 practice",
    ),
    pair(
        "TO-68",
        "sump: held at 45 degC, start: 12 degC, parts: [{component: turbine_hydro}]",
        "hydro set on ISO VG 68",
    ),
    pair(
        "HM-46",
        "sump: held at 50 degC, start: 15 degC, parts: [{component: hyd_pump_piston_axial, pressure: 210 bar}]",
        "axial piston pump on HM 46 indoors at 50 degC",
    ),
    pair(
        "HM-32",
        "sump: held at 45 degC, start: 10 degC, parts: [{component: hyd_pump_piston_axial, pressure: 160 bar}]",
        "axial piston pump on HM 32 in a cool hall",
    ),
    pair(
        "HM-46",
        "sump: held at 50 degC, start: 10 degC, parts: [{component: hyd_pump_vane, pressure: 140 bar}]",
        "vane pump on HM 46",
    ),
    pair(
        "HM-46",
        "sump: held at 55 degC, start: 0 degC, parts: [{component: hyd_pump_gear_external, pressure: 180 bar}]",
        "gear pump on HM 46",
    ),
    pair(
        "HM-68",
        "sump: held at 60 degC, start: 10 degC, parts: [{component: hyd_motor_orbit, pressure: 140 bar}]",
        "orbital motor on HM 68",
    ),
    pair(
        "HM-46",
        "sump: held at 48 degC, start: 18 degC, parts: [{component: hyd_pump_piston_axial, pressure: 250 bar}, {component: hyd_valve_servo, pressure: 250 bar}]",
        "press with proportional valves on HM 46 started warm",
    ),
    pair(
        "CI-68",
        "lubrication: bath, sump: held at 60 degC, start: 10 degC, parts: [{component: fan_bearing_bath}]",
        "fan bearings in a bath on VG 68",
    ),
    pair(
        "CI-100",
        "lubrication: bath, sump: held at 65 degC, start: 15 degC, parts: [{component: fan_bearing_bath}]",
        "warm fan on VG 100",
    ),
    pair(
        "CI-68",
        "lubrication: bath, sump: held at 60 degC, start: 10 degC, parts: [{component: pump_bearing_bath}]",
        "process pump bearings on VG 68",
    ),
    pair(
        "TO-46",
        "lubrication: ring, sump: held at 55 degC, start: 12 degC, parts: [{component: brg_plain_ring_oiled}]",
        "ring-oiled motor bearing on VG 46",
    ),
    pair(
        "TO-68",
        "lubrication: ring, sump: held at 60 degC, start: 12 degC, parts: [{component: brg_plain_ring_oiled}]",
        "ring-oiled fan bearing on VG 68",
    ),
    pair(
        "CI-150",
        "lubrication: circulated, sump: held at 55 degC, start: 20 degC, parts: [{component: circ_general}]",
        "circulating system of a mill on VG 150",
    ),
    pair(
        "PM-220",
        "lubrication: circulated, sump: held at 75 degC, start: 30 degC, parts: [{rolling bearing: 23160, speed: 220 r/min}]",
        "dryer roll bearings of a paper machine on VG 220",
    ),
    pair(
        "PM-220",
        "lubrication: circulated, sump: held at 80 degC, start: 30 degC, parts: [{component: paper_dryer}]",
        "the same by its window",
    ),
    pair(
        "EP-220",
        "lubrication: splash, backstop: no, sump: held at 60 degC, start: 5 degC, parts: [{gear mesh: low stage, pitch-line speed: 5 m/s}]",
        "industrial helical gearbox on VG 220 at 5 m/s, the usual grade of gear practice",
    ),
    pair(
        "EP-150",
        "lubrication: splash, backstop: no, sump: held at 55 degC, start: 0 degC, parts: [{gear mesh: single stage, pitch-line speed: 12 m/s}]",
        "single-stage gearbox at 12 m/s on VG 150",
    ),
    pair(
        "EP-320",
        "lubrication: splash, backstop: no, sump: held at 65 degC, start: 5 degC, parts: [{gear mesh: slow stage, pitch-line speed: 2.5 m/s}]",
        "slow mixer drive on VG 320",
    ),
    pair(
        "SY-220",
        "lubrication: splash, backstop: no, sump: held at 70 degC, start: -20 degC, parts: [{gear mesh: low stage, pitch-line speed: 6 m/s}]",
        "outdoor conveyor gearbox on synthetic VG 220",
    ),
    pair(
        "WG-460",
        "lubrication: splash, yellow metal: yes, wet: no, seals: FKM, sump: held at 80 degC, start: 5 degC, parts: [{component: gear_worm}]",
        "worm gear with bronze wheel on polyglycol VG 460",
    ),
    pair(
        "SC-46",
        "lubrication: flooded, sump: held at 75 degC, start: 10 degC, parts: [{component: comp_screw_flooded_air}]",
        "screw compressor on VG 46 injected at 75 degC",
    ),
    pair(
        "RC-100",
        "sump: held at 60 degC, start: 10 degC, parts: [{component: comp_recip_crankcase}]",
        "crankcase of a piston compressor on VG 100",
    ),
    pair(
        "VP-100",
        "lubrication: flooded, sump: held at 70 degC, start: 15 degC, parts: [{component: vac_rotary_vane}]",
        "rotary vane vacuum pump on VG 100",
    ),
    pair(
        "SW-68",
        "sump: held at 30 degC, start: 15 degC, parts: [{component: slideway_horizontal}]",
        "horizontal slideway on VG 68",
    ),
    pair(
        "SP-10",
        "sump: held at 35 degC, start: 15 degC, parts: [{component: spindle_plain}]",
        "plain-bearing spindle on VG 10",
    ),
    pair(
        "EP-220",
        "lubrication: splash, backstop: no, sump: held at 65 degC, start: 0 degC, parts: [{rolling bearing: 22220, speed: 400 r/min}]",
        "gearbox shaft bearing on VG 220, ISO 281 kappa above 1",
    ),
    pair(
        "AX-90",
        "lubrication: splash, sump: held at 85 degC, start: -15 degC, parts: [{component: gear_hypoid_axle}]",
        "hypoid axle on SAE 90 in a mild winter",
    ),
];

#[test]
fn ordinary_pairs_do_not_fail() {
    let rules = rules();
    let mut machines = String::from("file: site 1\nmachines:\n");
    for (i, p) in PAIRS.iter().enumerate() {
        let _ = writeln!(
            machines,
            "  P{i:02}: {{ ambient: 10 .. 30 degC, oil now: {}, {} }}",
            p.oil, p.machine
        );
    }
    let site = site(&machines, OILS, &rules);
    let scales = Scales::new(&site, &rules, Settings::default()).expect("curves");
    let mut wrong = Vec::new();
    for (point, p) in site.points.iter().zip(&PAIRS) {
        let w = scales.weigh(point);
        let found = w.candidates.iter().find(|c| c.in_use);
        match found {
            Some(c) if c.judgement.verdict == Verdict::Fails => {
                wrong.push(format!("{} on {}: fails: {:?}", p.why, p.oil, c.because));
            }
            Some(_) => {}
            None => {
                let by = w.barred.iter().find(|b| b.in_use).map(|b| &b.by);
                wrong.push(format!("{} on {}: barred: {by:?}", p.why, p.oil));
            }
        }
    }
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
    assert_eq!(site.points.len(), PAIRS.len());
}
