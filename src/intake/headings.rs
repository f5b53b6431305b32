//! What a heading means: the words of registers and oil lists, and the unit in them.

use super::target::{Makes, Target};
use super::units::{Unit, unit};

/// A heading taken apart.
#[derive(Clone, Debug, PartialEq)]
pub struct Heading {
    /// Its words, in lower case, without the unit.
    pub words: String,
    /// The unit in it.
    pub unit: Option<Unit>,
    /// The unit as written.
    pub unit_written: Option<String>,
    /// A temperature in it, degC: of `KV 100`.
    pub at: Option<f64>,
}

/// A guess, and how sure it is.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Guess {
    /// What the column holds.
    pub target: Target,
    /// 3 for a heading known as it stands, 2 for one that holds the words, 1 for one nearly it.
    pub sure: u8,
}

/// Words of registers. The longer phrases come first where one holds another.
const SITE: &[(&str, &str)] = &[
    (
        "tag",
        "tag|tag no|tag number|asset|asset no|asset number|asset id|asset tag|equipment no|equipment id|equipment number|equipment|functional location|machine no|machine tag|machine|item no|position no",
    ),
    (
        "row number",
        "row|row no|line|line no|no|nr|item|pos|position|#",
    ),
    (
        "point",
        "point|lube point|lubrication point|point name|component name",
    ),
    (
        "name",
        "desc|description|asset description|equipment description|machine name|name|designation|service|function",
    ),
    (
        "area",
        "area|location|department|plant area|building|section|site area|zone",
    ),
    (
        "count",
        "count|quantity of machines|number of machines|no of machines|pieces|pcs|number off|no off",
    ),
    (
        "lubrication",
        "lubrication|lubrication method|lube method|method|lubrication type|system",
    ),
    (
        "fill",
        "fill|fill quantity|fill volume|sump|sump volume|sump size|sump capacity|capacity|oil capacity|oil quantity|oil volume|volume|tank|tank volume|litres|liters|charge|qty oil",
    ),
    (
        "annual use",
        "annual use|annual consumption|consumption|use per year|yearly use|top up per year",
    ),
    (
        "running hours",
        "running hours|operating hours|hours per year|annual hours|run hours",
    ),
    (
        "oil now",
        "oil|lubricant|oil now|current oil|present oil|oil in use|oil type|lubricant type|lubricant in use|product|oil grade|lube|grease",
    ),
    (
        "asks for",
        "asks for|required class|oem spec|specification|spec required|required spec|additives required",
    ),
    (
        "maker grade",
        "maker grade|recommended grade|recommended viscosity|oem grade|oem viscosity|iso vg required|required viscosity grade|recommended vg|maker vg",
    ),
    ("sump rise", "sump rise|temperature rise|temp rise|rise"),
    (
        "at ambient",
        "at ambient|ambient at reading|air temperature at reading",
    ),
    (
        "start",
        "start|start temperature|start temp|cold start|cold start temperature|minimum start temperature|min start temp",
    ),
    (
        "heater",
        "heater|heater setting|heater set point|heater setpoint",
    ),
    ("heater power", "heater power"),
    (
        "ambient low",
        "amb min|ambient min|ambient low|min ambient|minimum ambient|ambient minimum|coldest ambient|lowest ambient|min air temp",
    ),
    (
        "ambient high",
        "amb max|ambient max|ambient high|max ambient|maximum ambient|ambient maximum|hottest ambient|highest ambient|max air temp",
    ),
    (
        "ambient",
        "ambient|ambient temperature|ambient range|ambient temp|air temperature",
    ),
    (
        "sump",
        "temp|temperature|oil temp|oil temperature|sump temp|sump temperature|operating temperature|operating temp|running temperature|running temp|running temperature of oil|bulk oil temperature|t oil|working temperature",
    ),
    (
        "floor",
        "floor|min viscosity|minimum viscosity|viscosity min",
    ),
    (
        "ceiling",
        "ceiling|max viscosity|maximum viscosity|viscosity max",
    ),
    (
        "start limit",
        "start limit|max start viscosity|maximum start viscosity|max viscosity at start",
    ),
    (
        "oil limit",
        "oil limit|max oil temperature|maximum oil temperature|max oil temp",
    ),
    (
        "yellow metal",
        "yellow metal|yellow metals|bronze|copper alloys",
    ),
    ("backstop", "backstop|holdback|back stop"),
    ("wet clutch", "wet clutch|clutch in oil"),
    ("water entry", "water entry|water ingress|water"),
    ("seals", "seals|seal material|seal|elastomer|seal materials"),
    ("inside paint", "inside paint|internal paint|paint inside"),
    ("sight glass", "sight glass|level gauge"),
    ("food class", "food class|food grade|nsf class"),
    ("environment", "environment class|eal"),
    ("fire class", "fire class|fire resistance"),
    ("shock", "shock|shock load|duty"),
    (
        "cleanliness",
        "cleanliness|cleanliness target|iso 4406|target cleanliness",
    ),
    ("exposure", "exposure|indoor outdoor"),
    ("dust", "dust"),
    ("wet", "wet"),
    ("food zone", "food zone|food area"),
    (
        "motor speed",
        "motor speed|motor rpm|drive speed|motor n|n motor|speed motor",
    ),
    (
        "gear mesh: pinion speed",
        "pinion speed|input speed|speed pinion",
    ),
    (
        "gear mesh: ratio",
        "ratio|gear ratio|reduction ratio|reduction",
    ),
    (
        "gear mesh: centre distance",
        "centre distance|center distance",
    ),
    ("gear mesh: face width", "face width|tooth width"),
    (
        "gear mesh: pitch-line speed",
        "pitch line speed|pitch line velocity|pitchline velocity|plv",
    ),
    (
        "gear mesh: power",
        "power|motor power|drive power|rated power",
    ),
    ("gear mesh: type", "gear type|type of gear|gearing"),
    ("gear mesh: normal module", "module|normal module"),
    (
        "rolling bearing",
        "bearing|bearing no|bearing number|bearing type|bearing designation|bearing de|bearing nde|bearing drive end|bearing non drive end|de bearing|nde bearing|bearings",
    ),
    ("rolling bearing: load", "bearing load|equivalent load"),
    (
        "component: pressure",
        "pressure|working pressure|system pressure|operating pressure",
    ),
    (
        "component",
        "component|component type|machine type|equipment type|type",
    ),
    (
        "speed",
        "speed|shaft speed|n|speed n|rotational speed|bearing speed|output speed|rpm",
    ),
    ("note", "note|notes|remark|remarks|comment|comments"),
    ("path", "path"),
    ("as written", "as written"),
    ("file kind", "file kind"),
];

/// Words of oil lists.
const OILS: &[(&str, &str)] = &[
    (
        "tag",
        "id|oil id|code|oil code|stock code|item|item no|material no|material number|short name|tag",
    ),
    (
        "name",
        "name|oil|product|lubricant|description|oil name|product name|trade name",
    ),
    ("kind", "kind|application|use|category|oil type|type"),
    (
        "classes",
        "classes|class|iso 6743|din 51517|specification|specifications|din class",
    ),
    ("base", "base|base oil type|base stock|base fluid"),
    ("VI", "vi|viscosity index"),
    ("pour point", "pour point|pour|pourpoint|pp"),
    ("cloud point", "cloud point"),
    (
        "flash point",
        "flash point|flash|flashpoint|flash coc|flash point coc",
    ),
    (
        "oil limit",
        "max temperature|maximum temperature|upper temperature limit|oil limit",
    ),
    (
        "density",
        "density|density at 15 c|density 15|specific gravity|density 15 c",
    ),
    ("additives", "additives|additive|additive type"),
    ("sulphur", "sulphur activity|sulfur activity|sulphur"),
    ("copper strip", "copper strip|copper corrosion|cu corrosion"),
    ("food class", "food class|food grade|nsf"),
    ("environment", "environment|eal"),
    ("fire class", "fire class"),
    ("FZG stage", "fzg|fzg stage|fzg load stage"),
    ("air release", "air release"),
    ("demulsibility", "demulsibility|water separation"),
    ("price", "price|cost|unit price"),
    ("in stock", "stock|in stock|stock quantity"),
    ("thickener", "thickener|soap"),
    ("NLGI", "nlgi|nlgi class|consistency|nlgi grade"),
    ("dropping point", "dropping point|drop point"),
    (
        "viscosity",
        "iso vg|vg|grade|viscosity grade|viscosity class|iso grade",
    ),
    ("source", "source|data sheet|sheet date"),
    ("note", "note|notes|remark|remarks|comment|comments"),
    ("path", "path"),
    ("as written", "as written"),
    ("file kind", "file kind"),
];

/// Takes a heading apart.
pub fn apart(text: &str) -> Heading {
    let one_line = text.split_whitespace().collect::<Vec<_>>().join(" ");
    let (rest, written) = unit_in(&one_line);
    let found = written.as_deref().and_then(|u| unit(u, &[]));
    let lower = if found.is_some() { &rest } else { &one_line }.to_lowercase();
    let at = temperature_in(&lower);
    let spaced: String = lower
        .chars()
        .map(|c| {
            if c.is_alphanumeric() || c == '#' || c == '&' {
                c
            } else {
                ' '
            }
        })
        .collect();
    Heading {
        words: spaced.split_whitespace().collect::<Vec<_>>().join(" "),
        unit: found,
        unit_written: written.filter(|_| found.is_some()),
        at,
    }
}

/// The unit in a heading: in brackets, behind a comma or slash, or as the last word.
fn unit_in(text: &str) -> (String, Option<String>) {
    for (open, close) in [('(', ')'), ('[', ']')] {
        if let (Some(from), Some(to)) = (text.rfind(open), text.rfind(close))
            && from < to
        {
            let inside = text[from + 1..to].trim();
            let whole = inside.strip_prefix("in ").unwrap_or(inside);
            if unit(whole, &[]).is_some() {
                let rest = format!("{}{}", &text[..from], &text[to + close.len_utf8()..]);
                return (rest, Some(whole.to_owned()));
            }
        }
    }
    for mark in [',', '/', '_'] {
        if let Some((before, behind)) = text.split_once(mark)
            && unit(behind.trim(), &[]).is_some()
        {
            return (before.to_owned(), Some(behind.trim().to_owned()));
        }
    }
    let words: Vec<&str> = text.split(' ').collect();
    for n in [2, 1] {
        if words.len() > n {
            let last = words[words.len() - n..].join(" ");
            // "Amb. min" is no time, "no in" no length.
            let plausible = match last.to_lowercase().as_str() {
                "min" | "in" | "day" | "days" | "year" | "years" | "month" | "months" | "hour"
                | "hours" => false,
                one => {
                    one.chars().count() > 1 || matches!(last.as_str(), "L" | "l" | "C" | "F" | "K")
                }
            };
            if plausible && unit(&last, &[]).is_some() {
                return (words[..words.len() - n].join(" "), Some(last));
            }
        }
    }
    (text.to_owned(), None)
}

/// A temperature in a heading about viscosity: `KV40`, `visc. 100 °C`, `V 210F`.
fn temperature_in(lower: &str) -> Option<f64> {
    let viscous = ["visc", "kv", "nu", "v40", "v100", "cst"]
        .iter()
        .any(|w| lower.contains(w));
    if !viscous {
        return None;
    }
    let numbers = lower
        .split(|c: char| !c.is_ascii_digit())
        .filter(|t| !t.is_empty());
    numbers
        .filter_map(|t| t.parse::<f64>().ok())
        .find_map(|t| match t {
            _ if [20.0, 40.0, 50.0, 80.0, 100.0].contains(&t)
                && !lower.contains(&format!("{t}f")) =>
            {
                Some(t)
            }
            _ if [100.0, 130.0, 210.0].contains(&t) => Some(((t - 32.0) / 1.8 * 1e3).round() / 1e3),
            _ => None,
        })
}

/// What a heading means. The samples decide where the words do not: `qty` beside litres is a fill.
pub fn guess(makes: Makes, heading: &Heading, samples: &[String]) -> Option<Guess> {
    if let (Makes::Oils, Some(t)) = (makes, heading.at) {
        return Some(Guess {
            target: Target::ViscosityAt(t),
            sure: 3,
        });
    }
    if makes == Makes::Site && matches!(heading.words.as_str(), "qty" | "quantity" | "amount") {
        let word = if of_volume(heading, samples) {
            "fill"
        } else {
            "count"
        };
        return Target::of(makes, word).map(|target| Guess { target, sure: 2 });
    }
    let table = match makes {
        Makes::Site => SITE,
        Makes::Oils => OILS,
    };
    let mut best: Option<(u8, usize, &str)> = None;
    for (word, phrases) in table {
        for phrase in phrases.split('|') {
            let sure = likeness(&heading.words, phrase);
            let better =
                best.is_none_or(|(s, len, _)| sure > s || (sure == s && phrase.len() > len));
            if sure > 0 && better {
                best = Some((sure, phrase.len(), word));
            }
        }
    }
    let (sure, _, word) = best?;
    Target::of(makes, word).map(|target| Guess { target, sure })
}

fn of_volume(heading: &Heading, samples: &[String]) -> bool {
    use crate::quantity::Kind;
    let volume = |u: Unit| matches!(u, Unit::Gallon | Unit::Of(Kind::Volume | Kind::Mass, _));
    if heading.unit.is_some_and(volume) {
        return true;
    }
    samples.iter().any(|s| {
        let parsed = super::parsed::parse(s, &[Kind::Volume, Kind::Mass]);
        parsed.is_some_and(|p| p.unit.is_some_and(volume) || p.number.contains(['.', ',']))
    })
}

fn likeness(words: &str, phrase: &str) -> u8 {
    if words == phrase {
        return 3;
    }
    let padded = format!(" {words} ");
    if phrase.len() > 2 && padded.contains(&format!(" {phrase} ")) {
        return 2;
    }
    let near = phrase.len() > 4 && strsim::normalized_damerau_levenshtein(words, phrase) >= 0.85;
    u8::from(near)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::Kind;

    fn word(makes: Makes, text: &str) -> String {
        guess(makes, &apart(text), &[]).map_or("none".into(), |g| g.target.word())
    }

    #[test]
    fn headings_of_registers_are_known() {
        for (text, want) in [
            ("Asset No.", "tag"),
            ("tag", "tag"),
            ("desc", "name"),
            ("Description", "name"),
            ("lubricant", "oil now"),
            ("Fill (L)", "fill"),
            ("Oil temp", "sump"),
            ("temp", "sump"),
            ("Oil temperature °C", "sump"),
            ("Speed rpm", "speed"),
            ("n", "speed"),
            ("Motor speed [1/min]", "motor speed"),
            ("Bearing DE", "rolling bearing"),
            ("Amb. min", "ambient low"),
            ("Amb. max", "ambient high"),
            ("Lubricnt", "oil now"),
            ("Seal material", "seals"),
            ("Colour of the fence", "none"),
        ] {
            assert_eq!(word(Makes::Site, text), want, "{text}");
        }
        for (text, want) in [
            ("KV40 (cSt)", "viscosity at 40 degC"),
            ("Visc. 100 °C", "viscosity at 100 degC"),
            ("Pour point °C", "pour point"),
            ("ISO VG", "viscosity"),
            ("Product", "name"),
        ] {
            assert_eq!(word(Makes::Oils, text), want, "{text}");
        }
    }

    #[test]
    fn units_in_headings_are_found() {
        let u = |t: &str| apart(t).unit;
        assert_eq!(u("Fill (L)"), Some(Unit::Of(Kind::Volume, "L")));
        assert_eq!(u("Fill (gal)"), Some(Unit::Gallon));
        assert_eq!(
            u("Speed rpm"),
            Some(Unit::Of(Kind::RotationalSpeed, "r/min"))
        );
        assert_eq!(u("Oil temp, °F"), Some(Unit::Of(Kind::Temperature, "degF")));
        assert_eq!(u("Power [kW]"), Some(Unit::Of(Kind::Power, "kW")));
        assert_eq!(u("Lubricant"), None);
        assert_eq!(u("Amb. min"), None);
    }

    #[test]
    fn a_quantity_is_a_fill_where_the_cells_say_so() {
        let g = |samples: &[&str]| {
            let samples: Vec<String> = samples.iter().map(|s| (*s).to_owned()).collect();
            guess(Makes::Site, &apart("qty"), &samples).map(|g| g.target.word())
        };
        assert_eq!(g(&["15 gal", "68 l"]).as_deref(), Some("fill"));
        assert_eq!(g(&["1", "4"]).as_deref(), Some("count"));
    }
}
