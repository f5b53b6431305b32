//! Causes that leave the oil itself as it is: water, dirt, soot, attack on copper alloys. Each
//! needs companions; no metal accuses by itself.

use super::{Cause, Evidence, Named};
use crate::audit::bottle::{Bounds, Figures};
use crate::audit::profile::Profile;
use crate::model::facts::Sulphur;
use crate::model::sample::Reading;
use crate::numeric::math::ln;
use crate::quantity::show::{Toward, fixed, significant};

/// What is known around a sample.
#[derive(Clone, Copy, Debug, Default)]
pub struct Around<'a> {
    /// Watch level of water, ppm.
    pub water_watch: Option<f64>,
    /// Watch level of soot, %; only in engines.
    pub soot_watch: Option<f64>,
    /// Watch level of the rise of the acid number.
    pub acid_watch: Option<f64>,
    /// Whether copper alloys touch the oil.
    pub yellow_metal: Option<bool>,
    /// How reactive the labelled oil's sulphur is.
    pub sulphur: Option<Sulphur>,
    /// Codes over the cleanliness target.
    pub codes_over: Option<i16>,
    /// What is known of water at the point, in words.
    pub water_entry: Option<&'a str>,
}

pub(super) fn causes(
    figures: &Figures,
    label: Option<&Profile>,
    around: &Around<'_>,
) -> Vec<Named> {
    let all = [
        water(figures, label, around),
        copper(figures, label, around),
        dirt(figures, label, around),
        soot(figures, around),
    ];
    all.into_iter().flatten().collect()
}

fn new_of(label: Option<&Profile>, reading: Reading) -> f64 {
    label
        .and_then(|p| p.figures.get(&reading))
        .map_or(0.0, |e| e.value)
}

/// The figure as a number: half of a bound below, the bound itself above.
fn amount(figures: &Figures, reading: Reading) -> Option<f64> {
    let figure = figures.get(reading)?;
    Some(match figure.bounds {
        Bounds::Below => 0.5 * figure.value,
        Bounds::Exactly | Bounds::Above => figure.value,
    })
}

fn rise(figures: &Figures, label: Option<&Profile>, reading: Reading) -> Option<f64> {
    Some(amount(figures, reading)? - new_of(label, reading))
}

fn ppm(value: f64) -> String {
    format!("{} ppm", significant(value, 3, Toward::Nearest))
}

fn water(figures: &Figures, label: Option<&Profile>, around: &Around<'_>) -> Option<Named> {
    let water = amount(figures, Reading::Water)?;
    let watch = around.water_watch?;
    if water < watch {
        return None;
    }
    let mut evidence = vec![Evidence::speaks_for(
        Reading::Water.key(),
        format!("water {}, watch from {}", ppm(water), ppm(watch)),
        ln(water / watch) + 3.0,
    )];
    // salts of cooling water; boron, calcium and magnesium may be additives and count only over new oil
    let salts: Vec<(Reading, f64)> = [
        Reading::Na,
        Reading::K,
        Reading::B,
        Reading::Mg,
        Reading::Ca,
    ]
    .into_iter()
    .filter_map(|r| Some((r, rise(figures, label, r)?)))
    .filter(|(r, up)| *up > 10.0_f64.max(0.3 * new_of(label, *r)))
    .collect();
    let salty = salts
        .iter()
        .any(|(r, up)| matches!(r, Reading::Na | Reading::K) && *up > 15.0);
    for (reading, up) in &salts {
        evidence.push(Evidence::speaks_for(
            reading.key(),
            format!(
                "{} up by {}, as cooling water brings",
                reading.says(),
                ppm(*up)
            ),
            1.0,
        ));
    }
    if let Some(na) = rise(figures, label, Reading::Na)
        && !salty
    {
        evidence.push(Evidence::speaks_for(
            Reading::Na.key(),
            format!(
                "sodium up by no more than {}: condensate or steam rather than cooling water",
                ppm(na.max(0.0))
            ),
            0.3,
        ));
    }
    if let Some(entry) = around.water_entry {
        evidence.push(Evidence::speaks_for(
            "site",
            format!("water entry at the machine: {entry}"),
            0.5,
        ));
    }
    let strength = 4.0 + 2.5 * ln(water / watch);
    let cause = if salty && salts.len() >= 2 {
        Cause::CoolingWater
    } else {
        Cause::Water
    };
    Some(Named::by_signs(cause, strength.min(12.0), evidence))
}

fn copper(figures: &Figures, label: Option<&Profile>, around: &Around<'_>) -> Option<Named> {
    let copper = rise(figures, label, Reading::Cu)?;
    if copper < 40.0 || around.yellow_metal == Some(false) {
        return None;
    }
    let mut evidence = vec![Evidence::speaks_for(
        Reading::Cu.key(),
        format!("copper {} over new oil", ppm(copper)),
        1.0 + ln(copper / 40.0),
    )];
    let mut signs = 0;
    for (reading, alloy) in [
        (Reading::Sn, "bronze"),
        (Reading::Pb, "bronze or an overlay"),
        (Reading::Zn, "brass"),
    ] {
        if let Some(up) = rise(figures, label, reading)
            && up >= (0.03 * copper).max(5.0)
            && (reading != Reading::Zn || up >= 0.2 * copper)
        {
            signs += 1;
            let says = format!("{} {} with it: {alloy}", reading.says(), ppm(up));
            evidence.push(Evidence::speaks_for(reading.key(), says, 1.5));
        }
    }
    if let Some(up) = rise(figures, label, Reading::AcidNumber)
        && up >= around.acid_watch.unwrap_or(0.5)
    {
        signs += 1;
        let says = format!(
            "acid number up by {} mg KOH/g: corrosive",
            fixed(up, 2, Toward::Nearest)
        );
        evidence.push(Evidence::speaks_for(Reading::AcidNumber.key(), says, 1.0));
    }
    if around.sulphur == Some(Sulphur::Active) {
        signs += 1;
        evidence.push(Evidence::speaks_for(
            "label",
            "the labelled oil carries active sulphur".to_owned(),
            1.5,
        ));
    }
    if around.yellow_metal == Some(true) {
        evidence.push(Evidence::speaks_for(
            "site",
            "copper alloys in the machine".to_owned(),
            0.5,
        ));
    }
    if let Some(iron) = rise(figures, label, Reading::Fe) {
        // wear takes iron and copper together, attack takes copper alone
        if iron < 0.4 * copper {
            signs += 1;
            evidence.push(Evidence::speaks_for(
                Reading::Fe.key(),
                format!("iron only {}: attack rather than wear", ppm(iron.max(0.0))),
                0.8,
            ));
        } else {
            evidence.push(Evidence::against(
                Reading::Fe.key(),
                format!("iron {} with it: wear takes both", ppm(iron)),
                1.5,
            ));
        }
    }
    if signs < 2 {
        return None;
    }
    let strength: f64 = evidence.iter().map(|e| e.weight).sum();
    (strength >= 3.0)
        .then(|| Named::by_signs(Cause::CopperAttack, (1.5 * strength).min(12.0), evidence))
}

fn dirt(figures: &Figures, label: Option<&Profile>, around: &Around<'_>) -> Option<Named> {
    let silicon = rise(figures, label, Reading::Si)?;
    let aluminium = rise(figures, label, Reading::Al)?;
    let ratio = silicon / aluminium.max(0.1);
    if silicon < 12.0 || aluminium < 3.0 || !(1.5..=8.0).contains(&ratio) {
        return None;
    }
    let mut evidence = vec![Evidence::speaks_for(
        Reading::Si.key(),
        format!(
            "silicon up by {} with aluminium by {}: the ratio of dust",
            ppm(silicon),
            ppm(aluminium)
        ),
        2.0 + ln(silicon / 12.0),
    )];
    for reading in [Reading::Fe, Reading::Cr] {
        if let Some(up) = rise(figures, label, reading)
            && up >= 20.0
        {
            let says = format!("{} up by {}: abrasive wear", reading.says(), ppm(up));
            evidence.push(Evidence::speaks_for(reading.key(), says, 0.8));
        }
    }
    if let Some(over) = around.codes_over.filter(|o| *o >= 2) {
        let says = format!("cleanliness {over} codes over its target");
        evidence.push(Evidence::speaks_for("iso4406", says, 1.0));
    }
    let strength: f64 = evidence.iter().map(|e| e.weight).sum();
    Some(Named::by_signs(
        Cause::Dirt,
        (1.5 * strength).min(12.0),
        evidence,
    ))
}

fn soot(figures: &Figures, around: &Around<'_>) -> Option<Named> {
    let soot = amount(figures, Reading::Soot)?;
    let watch = around.soot_watch?;
    (soot >= watch).then(|| {
        let says = format!(
            "soot {} %, watch from {} %",
            fixed(soot, 1, Toward::Nearest),
            fixed(watch, 1, Toward::Nearest)
        );
        let evidence = vec![Evidence::speaks_for(Reading::Soot.key(), says, 3.0)];
        Named::by_signs(Cause::Soot, 4.0 + 2.5 * ln(soot / watch), evidence)
    })
}
