//! Tables of gear oil grades.
//!
//! Sources: AGMA 9005-D94 (lubricant numbers as in public reprints, table of speeds from memory),
//! Neale (ed.), *The Tribology Handbook*, 2nd edition, section C9, machine-design textbooks (from
//! memory). These are older practice and a fallback; the film calculation comes first.

use crate::quantity::convert::{celsius, mm2_s};
use crate::quantity::{
    KinematicViscosity, Length, LoadPerLength, Measure, Ratio, ThermodynamicTemperature, Velocity,
};
use crate::relation::outside::{Outside, positive};

/// AGMA lubricant numbers and the ISO viscosity grades they stand for.
pub const AGMA_NUMBERS: &[(&str, u32)] = &[
    ("0", 32),
    ("1", 46),
    ("2", 68),
    ("3", 100),
    ("4", 150),
    ("5", 220),
    ("6", 320),
    ("7", 460),
    ("8", 680),
    ("8A", 1000),
    ("9", 1500),
];

/// AGMA numbers of open-gear compounds and what they are at 100 °C before any diluent, mm²/s
/// (public reprints of AGMA 9005).
pub const AGMA_OPEN: &[(&str, f64, f64)] = &[
    ("13", 190.0, 220.0),
    ("14R", 428.5, 857.0),
    ("15R", 857.0, 1714.0),
];

/// How sure we are of a cell recalled from memory.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Sureness {
    /// Sure.
    High,
    /// Fairly sure.
    Medium,
}

/// Ambient temperature bands of the table of 1994: from and to, °C.
pub const AMBIENT_BANDS: [(f64, f64); 4] =
    [(-40.0, -10.0), (-10.0, 10.0), (10.0, 35.0), (35.0, 55.0)];

/// AGMA numbers by pitch-line speed of the slowest mesh (up to so many m/s) and ambient band;
/// spur, helical and bevel gears (from memory).
pub const D94: [(f64, [(&str, Sureness); 4]); 4] = {
    use Sureness::{High, Medium};
    [
        (5.0, [("3S", Medium), ("4", High), ("6", High), ("8", High)]),
        (
            15.0,
            [("3S", Medium), ("3", High), ("5", High), ("7", High)],
        ),
        (
            25.0,
            [("2S", Medium), ("2", High), ("4", High), ("6", High)],
        ),
        (
            f64::INFINITY,
            [("0S", Medium), ("0", Medium), ("2", High), ("3", Medium)],
        ),
    ]
};

/// AGMA number for a pitch-line speed and an ambient temperature; `None` outside the bands.
pub fn d94(
    pitch_speed: Velocity,
    ambient: ThermodynamicTemperature,
) -> Option<(&'static str, Sureness)> {
    let v = pitch_speed.base();
    let (_, cells) = D94
        .iter()
        .enumerate()
        // the first row ends below 5 m/s, the others at their own speed
        .find(|(i, (to, _))| if *i == 0 { v < *to } else { v <= *to })
        .map(|(_, row)| row)?;
    let band = AMBIENT_BANDS
        .iter()
        .position(|(from, to)| celsius(*from) <= ambient && ambient <= celsius(*to))?;
    Some(cells[band])
}

/// What the teeth are made of, in the textbook table.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum ToothMaterial {
    /// Plastic, cast iron or bronze.
    Soft,
    /// Steel of 450 to 1000 `MPa`.
    Steel,
    /// Steel of 1000 to 1250 `MPa`.
    StrongSteel,
    /// Carburised or surface hardened steel.
    Hardened,
}

/// Upper ends of the speed columns, m/s.
const SPEED_COLUMNS: [f64; 7] = [0.5, 1.0, 2.5, 5.0, 12.5, 25.0, f64::INFINITY];

/// Viscosity at 40 °C of a closed gear's oil by material and pitch-line speed, machine-design
/// textbooks (from memory); `None` where the table has no figure.
///
/// # Errors
/// A speed that is not above zero.
pub fn textbook(
    material: ToothMaterial,
    pitch_speed: Velocity,
) -> Result<Option<KinematicViscosity>, Outside> {
    let v = positive("the pitch-line speed", pitch_speed)?;
    let row: [f64; 7] = match material {
        ToothMaterial::Soft => [350.0, 220.0, 150.0, 100.0, 80.0, 55.0, f64::NAN],
        ToothMaterial::Steel => [500.0, 350.0, 220.0, 150.0, 100.0, 80.0, 55.0],
        ToothMaterial::StrongSteel => [500.0, 500.0, 350.0, 220.0, 150.0, 100.0, 80.0],
        ToothMaterial::Hardened => [900.0, 500.0, 500.0, 350.0, 220.0, 150.0, 100.0],
    };
    let column = SPEED_COLUMNS
        .iter()
        .position(|to| v < *to)
        .unwrap_or(SPEED_COLUMNS.len() - 1);
    let nu = row[column];
    Ok((!nu.is_nan()).then(|| mm2_s(nu)))
}

/// Parameter of the chart in the handbook's section C9 (its lines are not reproduced here).
pub const CHART_PARAMETER: &str = "Sc*HV/(Vp+100)";
/// Ambient temperatures for which that chart holds, °C; one grade lower below, one higher above.
pub const CHART_AMBIENT: (f64, f64) = (10.0, 25.0);

/// The chart's parameter: contact stress number `S_c` (load per length over the relative radius)
/// times Vickers hardness, over the pitch-line speed in ft/min plus 100.
///
/// # Errors
/// An input that is not above zero.
pub fn chart_parameter(
    load: LoadPerLength,
    relative_radius: Length,
    vickers: Ratio,
    pitch_speed: Velocity,
) -> Result<Ratio, Outside> {
    let w = positive("the load", load)?;
    let r = positive("the relative radius", relative_radius)?;
    let hv = positive("the hardness", vickers)?;
    let v_ft_min = positive("the pitch-line speed", pitch_speed)? * 60.0 / 0.3048;
    let psi = w / r / 6_894.757_293_168_361;
    Ok(Ratio::from_base(psi * hv / (v_ft_min + 100.0)))
}

/// How many grades to move for an ambient temperature, from the chart's reading.
pub fn chart_shift(ambient: ThermodynamicTemperature) -> i8 {
    if ambient < celsius(CHART_AMBIENT.0) {
        -1
    } else {
        i8::from(ambient > celsius(CHART_AMBIENT.1))
    }
}
