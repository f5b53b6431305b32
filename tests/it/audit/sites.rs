//! Small sites for audits, in memory.

use filmwright::cli::host::MemoryHost;

/// Three machines: a hydraulic unit, a gearbox, two fans alike.
pub(crate) const SITE: &str = "\
file: site 1
site: Audit tests
reviewed: 2026-11-02
areas:
  hall: { ambient: 5 .. 38 degC }
machines:
  HP-1:
    name: Press hydraulics
    area: hall
    lubrication: reservoir
    fill: 200 L
    oil now: H46
    sump: held at 55 degC
    start: 12 degC
    floor: 10 mm2/s, maker
    start limit: 1000 mm2/s, maker
    cleanliness: 18/16/13
    parts: [{ component: hyd_pump_vane }]
  GB-104:
    name: Conveyor gearbox north
    area: hall
    lubrication: splash
    fill: 46 L
    oil now: G220
    sump: held at 70 degC
    start: 5 degC
    floor: 40 mm2/s, maker
    start limit: 20000 mm2/s, maker
    yellow metal: no
    parts: [{ gear mesh: only, pitch-line speed: 5 m/s }]
  FAN:
    area: hall
    count: 2
    lubrication: bath
    oil now: C68
    sump: held at 60 degC
    start: 5 degC
    parts: [{ component: fan_bearing_bath }]
";

pub(crate) const OILS: &str = "\
file: oils 1
H46: { kind: hydraulic, classes: [HM], base: mineral I, additives: [AW, zinc], viscosity: [46.2 mm2/s at 40 degC, 6.83 mm2/s at 100 degC], flash point: 220 degC COC, pour point: -27 degC }
V46: { kind: hydraulic, classes: [HV], base: \"mineral I, polymer-thickened\", additives: [AW, zinc], viscosity: [46.5 mm2/s at 40 degC, 9.1 mm2/s at 100 degC], shear loss: 20 % at 100 degC, flash point: 205 degC COC, pour point: -42 degC }
G220: { kind: gear, classes: [CKC], base: mineral I, additives: [EP], sulphur: inactive, viscosity: [220 mm2/s at 40 degC, 18.9 mm2/s at 100 degC], flash point: 240 degC COC, pour point: -18 degC }
C68: { kind: circulating, classes: [HL], base: mineral I, additives: [R&O], viscosity: [67.4 mm2/s at 40 degC, 8.75 mm2/s at 100 degC], flash point: 232 degC COC, pour point: -18 degC }
";

/// The site with a table of samples and a map.
pub(crate) fn with(table: &str, map: &str) -> MemoryHost {
    MemoryHost::new()
        .with("site.yaml", SITE)
        .with("oils.yaml", OILS)
        .with("lab.csv", table)
        .with(
            "samples.yaml",
            &format!("file: samples 1\nread: lab.csv\n{map}"),
        )
}
