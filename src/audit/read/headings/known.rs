//! The names under which laboratories head their columns (common practice).

use crate::model::sample::{Column, Reading};
use crate::quantity::Kind;

/// Other names under which a column is known, in the bare form of [`bare`].
const KNOWN: &[(&str, &[&str])] = &[
    (
        "bottle",
        &[
            "sample",
            "sampleno",
            "sampleid",
            "samplenumber",
            "bottleno",
            "bottleid",
            "labno",
            "reportno",
        ],
    ),
    (
        "machine",
        &[
            "unit",
            "unitid",
            "tag",
            "equipment",
            "equipmentid",
            "equipmentno",
            "equipmentnumber",
            "equipmentname",
            "equipmenttag",
            "asset",
            "assetid",
            "assetno",
            "assetnumber",
            "assetname",
            "machineid",
            "machineno",
            "machinename",
            "unitno",
            "unitnumber",
            "unitname",
            "tagno",
            "tagnumber",
        ],
    ),
    (
        "label",
        &[
            "oil",
            "oilname",
            "lubricant",
            "oilonlabel",
            "labelled",
            "product",
            "productname",
            "oilgrade",
            "oilbrand",
            "oiltype",
            "oilinuse",
            "lubricantname",
            "lubricanttype",
        ],
    ),
    (
        "drawn",
        &[
            "date",
            "sampledate",
            "datesampled",
            "sampled",
            "drawnon",
            "samplingdate",
            "datedrawn",
            "datetaken",
            "sampledon",
            "sampletaken",
            "takenon",
        ],
    ),
    (
        "hours on oil",
        &[
            "oilhours",
            "hrsonoil",
            "oilage",
            "oilhrs",
            "lubehours",
            "timeonoil",
            "hourssinceoilchange",
        ],
    ),
    (
        "hours on machine",
        &[
            "machinehours",
            "hours",
            "hrsonmachine",
            "unithours",
            "servicehours",
        ],
    ),
    ("topped up", &["topup", "oiladded", "makeup", "topupl"]),
    (
        "density",
        &["density15", "density15c", "density15degc", "rho15"],
    ),
    (
        "flash",
        &[
            "flashpoint",
            "flashcoc",
            "flashpointcoc",
            "flashc",
            "flashpointc",
        ],
    ),
    ("acid number", &["an", "tan", "acidno", "totalacidnumber"]),
    ("base number", &["bn", "tbn", "baseno", "totalbasenumber"]),
    (
        "water",
        &[
            "h2o",
            "watercontent",
            "waterppm",
            "karlfischer",
            "waterkf",
            "kfwater",
            "waterbykf",
            "moisture",
        ],
    ),
    (
        "iso4406",
        &[
            "iso",
            "isocode",
            "iso440699",
            "isocode4406",
            "isocleanliness",
            "isocleanlinesscode",
            "cleanliness",
            "cleanlinesscode",
            "particlecode",
        ],
    ),
    (
        "oxidation",
        &["oxid", "ftiroxidation", "oxidationabscm", "ox"],
    ),
    ("nitration", &["nitr", "ftirnitration"]),
    (
        "oxidation life left",
        &["rpvot", "rpvotofnew", "rulerofnew"],
    ),
    ("fuel", &["fueldilution", "dilution"]),
    ("soot", &["sootcontent"]),
    (
        "count 4",
        &["particles4um", "c4um", "p4", "4um", "4umc", "pc4", "pc4um"],
    ),
    (
        "count 6",
        &["particles6um", "c6um", "p6", "6um", "6umc", "pc6", "pc6um"],
    ),
    (
        "count 14",
        &[
            "particles14um",
            "c14um",
            "p14",
            "14um",
            "14umc",
            "pc14",
            "pc14um",
        ],
    ),
    (
        "flags",
        &[
            "comments",
            "comment",
            "remarks",
            "remark",
            "note",
            "notes",
            "labcomment",
            "labcomments",
            "diagnosis",
            "evaluation",
            "assessment",
            "status",
            "labstatus",
        ],
    ),
    ("Fe", &["iron"]),
    ("Cu", &["copper"]),
    ("Pb", &["lead"]),
    ("Sn", &["tin"]),
    ("Sb", &["antimony"]),
    ("Al", &["aluminium", "aluminum"]),
    ("Cr", &["chromium", "chrome"]),
    ("Ni", &["nickel"]),
    ("Mo", &["molybdenum"]),
    ("Ag", &["silver"]),
    ("Ti", &["titanium"]),
    ("V", &["vanadium"]),
    ("Mn", &["manganese"]),
    ("Si", &["silicon"]),
    ("Na", &["sodium"]),
    ("K", &["potassium"]),
    ("Li", &["lithium"]),
    ("B", &["boron"]),
    ("Ca", &["calcium"]),
    ("Mg", &["magnesium"]),
    ("Ba", &["barium"]),
    ("P", &["phosphorus"]),
    ("Zn", &["zinc"]),
    ("S", &["sulphur", "sulfur"]),
];

/// A heading without its unit, case and separators: `Visc. @ 40 °C (cSt)` is `visc40c`.
fn bare(heading: &str) -> String {
    let (name, _) = parted(heading);
    // the micro sign and the Greek letter
    let plain = name.replace(['\u{b5}', '\u{3bc}'], "u");
    let letters = plain.chars().filter(|c| c.is_alphanumeric());
    letters.flat_map(char::to_lowercase).collect()
}

/// Units that stand behind a name without brackets: `Fe ppm`, `TAN mgKOH/g`.
fn is_unit(word: &str) -> bool {
    let kinds = [
        Kind::Ratio,
        Kind::AcidNumber,
        Kind::KinematicViscosity,
        Kind::Temperature,
        Kind::Density,
    ];
    // a letter alone is more often part of a name: V, K, C
    (word == "%" || word.chars().count() > 1) && kinds.iter().any(|k| k.unit(word).is_some())
}

/// A viscosity at a temperature, however it is spelt: `KV40`, `Viscosity at 100 °C`.
fn viscosity(bare: &str) -> Option<Column> {
    const SPELT: [&str; 9] = [
        "kinematicviscosity",
        "kinviscosity",
        "kinvisc",
        "viscosity",
        "visc",
        "vis",
        "kv",
        "nu",
        "v",
    ];
    let reading = match bare
        .chars()
        .filter(char::is_ascii_digit)
        .collect::<String>()
        .as_str()
    {
        "40" => Reading::Nu40,
        "100" => Reading::Nu100,
        _ => return None,
    };
    let letters: String = bare.chars().filter(|c| !c.is_ascii_digit()).collect();
    let rest = SPELT.iter().find_map(|s| letters.strip_prefix(s))?;
    let rest = rest.strip_prefix("at").unwrap_or(rest);
    let plain = matches!(rest, "" | "c" | "degc" | "cst" | "ccst" | "mm2s" | "cmm2s");
    plain.then_some(Column::InUse(reading))
}

/// A heading's name and the unit in brackets or behind a comma.
pub(super) fn parted(heading: &str) -> (&str, Option<&str>) {
    for (open, close) in [('(', ')'), ('[', ']')] {
        if let Some((name, rest)) = heading.rsplit_once(open)
            && let Some((unit, _)) = rest.split_once(close)
            && !name.trim().is_empty()
        {
            return (name.trim(), Some(unit.trim()));
        }
    }
    for mark in [',', ' ', '_'] {
        if let Some((name, unit)) = heading.trim().rsplit_once(mark)
            && !name.trim().is_empty()
            && (mark == ',' || is_unit(unit.trim()))
        {
            return (name.trim(), Some(unit.trim()));
        }
    }
    (heading.trim(), None)
}

/// The column a heading means by itself.
pub(super) fn known(heading: &str) -> Option<Column> {
    let name = bare(heading);
    if name.is_empty() {
        return None;
    }
    let same = |key: &str| bare(key) == name;
    let by_key = Column::TEXTS
        .iter()
        .map(|(k, _)| *k)
        .chain(Reading::ALL.iter().map(|r| r.key()));
    if let Some(key) = by_key.clone().find(|k| same(k)) {
        return Column::of(key);
    }
    if let Some((key, _)) = KNOWN
        .iter()
        .find(|(_, names)| names.contains(&name.as_str()))
    {
        return Column::of(key);
    }
    if let Some(column) = viscosity(&name) {
        return Some(column);
    }
    let new = name
        .strip_suffix("new")
        .or_else(|| name.strip_prefix("new"))?;
    let reading = Reading::ALL.iter().find(|r| bare(r.key()) == new).copied();
    let also = || {
        let found = KNOWN.iter().find(|(_, names)| names.contains(&new))?;
        Reading::of(found.0)
    };
    let viscous = || match viscosity(new)? {
        Column::InUse(reading) => Some(reading),
        _ => None,
    };
    reading.or_else(also).or_else(viscous).map(Column::New)
}

/// Headings that are a column only where no other heading is.
const FAINT: &[(&str, &[&str])] = &[
    (
        "machine",
        &[
            "component",
            "componentname",
            "compartment",
            "point",
            "samplepoint",
            "samplingpoint",
            "samplelocation",
            "position",
            "location",
        ],
    ),
    ("label", &["brand", "grade"]),
    ("bottle", &["number", "no", "id"]),
];

/// The column a heading means where no other heading means it.
pub(super) fn faintly_known(heading: &str) -> Option<Column> {
    let name = bare(heading);
    let found = FAINT
        .iter()
        .find(|(_, names)| names.contains(&name.as_str()))?;
    Column::of(found.0)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn headings_are_known_without_unit_and_case() {
        assert_eq!(
            known("Visc. @ 40 °C (cSt)"),
            Some(Column::InUse(Reading::Nu40))
        );
        assert_eq!(known("Visc 40C (cSt)"), Some(Column::InUse(Reading::Nu40)));
        assert_eq!(known("KV100 [mm²/s]"), Some(Column::InUse(Reading::Nu100)));
        assert_eq!(
            known("hours_on_oil"),
            Some(Column::InUse(Reading::HoursOnOil))
        );
        assert_eq!(known("Zn new"), Some(Column::New(Reading::Zn)));
        assert_eq!(
            known("Acid number new"),
            Some(Column::New(Reading::AcidNumber))
        );
        assert_eq!(known("Sample date"), Some(Column::Drawn));
        for (text, reading) in [
            ("Fe ppm", Reading::Fe),
            ("TAN mgKOH/g", Reading::AcidNumber),
            ("Water %", Reading::Water),
            ("Zn_ppm", Reading::Zn),
            ("Kinematic viscosity at 100 °C", Reading::Nu100),
            ("V40", Reading::Nu40),
            ("Viscosity @100°C (cSt)", Reading::Nu100),
            (">4\u{b5}m", Reading::Count4),
            ("\u{2265} 14 \u{3bc}m(c)", Reading::Count14),
            ("V", Reading::V),
        ] {
            assert_eq!(known(text), Some(Column::InUse(reading)), "{text}");
        }
        assert_eq!(known("KV40 new"), Some(Column::New(Reading::Nu40)));
        assert_eq!(known("Visc Index"), None);
        assert_eq!(known("Component"), None);
        assert_eq!(faintly_known("Component"), Some(Column::Machine));
        assert_eq!(parted("TAN mgKOH/g"), ("TAN", Some("mgKOH/g")));
        assert_eq!(known("Colour"), None);
        assert_eq!(parted("Water, %"), ("Water", Some("%")));
    }
}
