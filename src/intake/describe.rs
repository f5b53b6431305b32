//! What the words of a description say of a machine. Common practice of registers: a conveyor
//! drive is a gear unit, a reel press a hydraulic unit. What is taken from a description is said.

use super::lubricant::Lubricant;

/// A component by words of a description, the first that fits.
const COMPONENTS: &[(&[&str], &str)] = &[
    (&["worm"], "gear_worm"),
    (&["kiln feeder"], "gear_worm"),
    (&["dryer roll"], "paper_dryer"),
    (&["wet end"], "paper_wet_end"),
    (&["turbine"], "turbine_journal"),
    (&["turb"], "turbine_journal"),
    (&["screw", "compressor"], "comp_screw_flooded_air"),
    (&["recip", "compressor"], "comp_recip_crankcase"),
    (&["reciprocating", "compressor"], "comp_recip_crankcase"),
    (&["vane", "compressor"], "comp_rotary_vane_air"),
    (&["vacuum", "pump"], "vac_rotary_vane"),
    (&["vane", "pump"], "hyd_pump_vane"),
    (&["axial piston"], "hyd_pump_piston_axial"),
    (&["gear pump"], "hyd_pump_gear_external"),
    (&["hydraulic"], "hyd_any_general"),
    (&["hyd"], "hyd_any_general"),
    (&["hpu"], "hyd_any_general"),
    (&["power pack"], "hyd_any_general"),
    (&["chain"], "chain_roller_drip_bath"),
    (&["open gear"], "gear_open_bath"),
    (&["réducteur"], "gear_parallel_bevel"),
    (&["*schnecke"], "gear_worm"),
    (&["*getriebe"], "gear_parallel_bevel"),
    (&["*hydraulik"], "hyd_any_general"),
    (&["*schraubenverdichter"], "comp_screw_flooded_air"),
    (&["*schraubenkompressor"], "comp_screw_flooded_air"),
    (&["*pumpe"], "pump_bearing_bath"),
    (&["*ventilator"], "fan_bearing_bath"),
    (&["*gebläse"], "fan_bearing_bath"),
    (&["gearbox"], "gear_parallel_bevel"),
    (&["gear box"], "gear_parallel_bevel"),
    (&["gearmotor"], "gear_parallel_bevel"),
    (&["geared motor"], "gear_parallel_bevel"),
    (&["gear unit"], "gear_parallel_bevel"),
    (&["reducer"], "gear_parallel_bevel"),
    (&["gbx"], "gear_parallel_bevel"),
    (&["conveyor", "drive"], "gear_parallel_bevel"),
    (&["fan"], "fan_bearing_bath"),
    (&["blower"], "fan_bearing_bath"),
    (&["pump"], "pump_bearing_bath"),
    (&["pumps"], "pump_bearing_bath"),
    (&["electric motor"], "motor_grease_brg"),
    (&["motor"], "motor_grease_brg"),
];

/// A component taken from words.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Taken {
    /// Its id in the rules.
    pub id: &'static str,
    /// Whether the lubricant decided rather than the description.
    pub by_lubricant: bool,
}

/// The component a description names; else the one its lubricant is for.
pub fn component(description: &str, tag: &str, lubricant: Option<&Lubricant>) -> Option<Taken> {
    let words = words(&format!("{description} {tag}"));
    // German writes compounds as one word: behind a star stands a part of one
    let holds = |w: &str| match w.strip_prefix('*') {
        Some(part) => words.contains(part),
        None => words.contains(&format!(" {w} ")),
    };
    let grease = lubricant.is_some_and(Lubricant::is_grease);
    let found = COMPONENTS
        .iter()
        .find(|(all, _)| all.iter().all(|w| holds(w)));
    if let Some((_, id)) = found {
        let greased = *id == "motor_grease_brg";
        let oiled_bearing = matches!(*id, "fan_bearing_bath" | "pump_bearing_bath");
        // A motor with oil and a fan with grease are other points than the rules' own.
        let other_point = (oiled_bearing && grease) || (greased && lubricant.is_some() && !grease);
        if !other_point {
            return Some(Taken {
                id,
                by_lubricant: false,
            });
        }
    }
    let by = |id| {
        Some(Taken {
            id,
            by_lubricant: true,
        })
    };
    match lubricant?.kind? {
        "gear" => by("gear_parallel_bevel"),
        "hydraulic" => by("hyd_any_general"),
        "worm" => by("gear_worm"),
        "turbine" => by("turbine_journal"),
        "chain" => by("chain_roller_drip_bath"),
        "circulating" => by("circ_general"),
        _ => None,
    }
}

/// Text in lower case with single spaces around every word.
fn words(text: &str) -> String {
    let lower: String = text
        .to_lowercase()
        .chars()
        .map(|c| if c.is_alphanumeric() { c } else { ' ' })
        .collect();
    let parts: Vec<&str> = lower.split_whitespace().collect();
    format!(" {} ", parts.join(" "))
}

/// Whether a row is of a machine that is no more.
pub fn is_gone(texts: &[&str]) -> Option<&'static str> {
    const GONE: [&str; 9] = [
        "scrapped",
        "decommissioned",
        "demolished",
        "removed",
        "out of use",
        "obsolete",
        "dismantled",
        "sold",
        "deleted",
    ];
    texts.iter().find_map(|t| {
        let words = words(t);
        GONE.into_iter().find(|g| words.contains(&format!(" {g} ")))
    })
}

/// Whether food or goods that touch food are near.
pub fn is_food(texts: &[&str]) -> bool {
    texts.iter().any(|t| {
        let words = words(t);
        ["food area", "food zone", "food contact", "food"]
            .iter()
            .any(|f| words.contains(&format!(" {f} ")))
    })
}

/// Whether a machine is usually driven through a gear, so that its shaft runs slower than a motor.
pub fn is_geared(description: &str, tag: &str) -> bool {
    let words = words(&format!("{description} {tag}"));
    let slow = [
        "gearbox", "gear", "gbx", "reducer", "conveyor", "mixer", "kiln", "roll", "dryer",
        "crusher", "mill", "elevator", "feeder", "screw", "agitator", "winch", "hoist", "screen",
        "drum",
    ];
    slow.iter().any(|w| words.contains(&format!(" {w} ")))
}

/// Whether a speed is that of a mains motor at load, r/min: synchronous at 50 or 60 Hz less up to
/// 5 per cent slip (common practice).
pub fn is_motor_speed(n_rpm: f64) -> bool {
    [3600.0, 3000.0, 1800.0, 1500.0, 1200.0, 1000.0, 900.0, 750.0]
        .into_iter()
        .any(|sync| (0.95 * sync..=sync).contains(&n_rpm))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::intake::lubricant;

    #[test]
    fn components_follow_the_words() {
        let id = |d: &str, tag: &str, oil: &str| {
            component(d, tag, Some(&lubricant::read(oil))).map(|t| t.id)
        };
        assert_eq!(
            id("gearbox conveyor", "CV-101 GBX", "ISO 220 EP"),
            Some("gear_parallel_bevel")
        );
        assert_eq!(
            id("press hyd", "HPU REEL", "HLP46"),
            Some("hyd_any_general")
        );
        assert_eq!(id("pumps", "P-210", "R&O 68"), Some("pump_bearing_bath"));
        assert_eq!(id("kiln feeder", "WORM-K3", "AGMA 7"), Some("gear_worm"));
        assert_eq!(
            id("mixer", "MIX-4", "Gear 150"),
            Some("gear_parallel_bevel")
        );
        assert_eq!(id("compressor", "CMP-2", "315 SUS"), None);
        assert_eq!(
            id("bearing oil", "FAN ID", "SAE 20"),
            Some("fan_bearing_bath")
        );
        assert_eq!(id("something", "X-1", "ISO 68"), None);
    }

    #[test]
    fn motors_run_near_their_synchronous_speed() {
        assert!(is_motor_speed(1480.0) && is_motor_speed(2980.0) && is_motor_speed(1750.0));
        assert!(!is_motor_speed(236.0) && !is_motor_speed(1300.0));
        assert_eq!(is_gone(&["scrapped 2019"]), Some("scrapped"));
        assert_eq!(is_gone(&["spare"]), None);
    }
}
