//! What to do where no oil holds, as text: the pair of oils by season, the oil to ask for.

use crate::cli::text::hanging;
use crate::decide::ask::{Ask, NO_GREASE};
use crate::decide::season::{Pair, Season, in_words};
use crate::quantity::show::{Toward, margin, quantity};
use crate::quantity::{Measure, ThermodynamicTemperature};
use crate::weighing::{Scales, Weighed};

fn degrees(scales: &Scales<'_>, kelvin: f64, toward: Toward) -> String {
    let t = ThermodynamicTemperature::from_base(kelvin);
    quantity(t.amount(), scales.units, toward)
}

/// The pair by season.
pub fn season(scales: &Scales<'_>, pair: &Pair, width: usize) -> String {
    let id = |s: &Season| scales.site.oils[s.oil].id.as_str();
    let one = |s: &Season| {
        let months = in_words(&s.months);
        let when = if months.is_empty() {
            String::new()
        } else {
            format!(", {months}")
        };
        let margin = s.margin.map_or(String::new(), |m| {
            format!(", smallest margin {}", margin(m, 2))
        });
        let now = if s.in_use { ", in use" } else { "" };
        format!("{} {}{margin}{now}{when}", id(s), s.verdict.word())
    };
    let text = format!(
        "below {} {}; above it {}. Both hold from {} to {}: change over in between.",
        degrees(scales, pair.change_over, Toward::Nearest),
        one(&pair.winter),
        one(&pair.summer),
        degrees(scales, pair.overlap.0, Toward::Up),
        degrees(scales, pair.overlap.1, Toward::Down),
    );
    format!("\n{}", hanging("  by season  ", &text, width))
}

/// The oil to ask for.
pub fn ask(scales: &Scales<'_>, weighed: &Weighed<'_>, ask: &Ask, width: usize) -> String {
    let lead = "  ask for  ";
    let body = match ask {
        Ask::Specification(spec) => {
            let test = spec.shear_test(scales.rules);
            let lines = spec.lines(&test, |t| degrees(scales, t, Toward::Down));
            let mut out = String::from("\n");
            for (i, line) in lines.iter().enumerate() {
                let lead = if i == 0 { lead } else { "           " };
                out.push_str(&hanging(lead, line, width));
            }
            for (rule, says) in &spec.contents.conditions {
                let text = format!("on the condition: {says} [{rule}]");
                out.push_str(&hanging("           ", &text, width));
            }
            let text = format!(
                "such an oil was weighed on {} and holds, reserve kept",
                weighed.point.address()
            );
            out.push_str(&hanging("           ", &text, width));
            return out;
        }
        Ask::Undecided(why) => format!("nothing yet, this has to be known first: {why}"),
        Ask::NoRoom { vi } => format!(
            "no oil of one grade holds here, up to a viscosity index of {vi:.0}: the limits leave no room. Two oils by season, a heater or another limit may help: filmwright mend {} OIL",
            weighed.point.address()
        ),
        Ask::NoGrease => NO_GREASE.to_owned(),
    };
    format!("\n{}", hanging(lead, &body, width))
}
