//! The boundary dimensions of rolling bearings, as read from their rule file.

use crate::quantity::Length;
use crate::quantity::convert::mm;
use crate::relation::bearing::class::BearingKind;
use crate::relation::bearing::designation::{Designated, DimensionTable, Unknown, read};
use std::collections::BTreeMap;
use std::sync::LazyLock;

/// The file as written, numbers in millimetres.
#[derive(serde::Deserialize)]
struct Written {
    bore_code: BTreeMap<String, f64>,
    diameter_series: BTreeMap<u8, BTreeMap<u32, f64>>,
    thrust_diameter_series: BTreeMap<u8, BTreeMap<u32, f64>>,
    series: BTreeMap<String, BTreeMap<String, u8>>,
}

/// What is wrong with the file.
#[derive(Clone, Debug, PartialEq, thiserror::Error)]
pub enum TableFault {
    /// Not of the form expected.
    #[error("the table of bearing dimensions does not read: {0}")]
    Form(String),
    /// A kind the program does not know.
    #[error("`{0}` is no kind of rolling bearing known here")]
    Kind(String),
    /// A diameter that is not above its bore.
    #[error("series {series}, bore {bore} mm: the outside diameter is not above the bore")]
    Diameter {
        /// Diameter series.
        series: u8,
        /// Bore in millimetres.
        bore: u32,
    },
    /// A series of designations that names diameters the file does not hold.
    #[error("the series `{0}` names a diameter series that the file does not hold")]
    Series(String),
}

impl DimensionTable {
    /// Reads the file `rules/bearings/boundary_dimensions.yaml` or one of the same form.
    ///
    /// # Errors
    /// The first [`TableFault`] found.
    pub fn from_yaml(text: &str) -> Result<Self, TableFault> {
        let written: Written =
            serde_yaml::from_str(text).map_err(|e| TableFault::Form(e.to_string()))?;
        let table = Self {
            bore_codes: written
                .bore_code
                .into_iter()
                .map(|(code, bore)| (code, mm(bore)))
                .collect(),
            radial: diameters(written.diameter_series)?,
            thrust: diameters(written.thrust_diameter_series)?,
            series: series(written.series)?,
        };
        table.check()?;
        Ok(table)
    }

    /// The table the program carries.
    pub fn built_in() -> &'static Self {
        static TABLE: LazyLock<DimensionTable> = LazyLock::new(|| {
            DimensionTable::from_yaml(include_str!(
                "../../rules/bearings/boundary_dimensions.yaml"
            ))
            .expect("the built-in file is read by a test")
        });
        &TABLE
    }

    fn check(&self) -> Result<(), TableFault> {
        for (kind, prefix, series) in &self.series {
            let held = if kind.is_thrust() {
                self.thrust.contains_key(series)
            } else {
                self.radial.contains_key(series)
            };
            if !held {
                return Err(TableFault::Series(prefix.clone()));
            }
        }
        Ok(())
    }
}

/// Kind and dimensions of a bearing by its number, from the table the program carries.
///
/// # Errors
/// [`Unknown`], with the advice to state the dimensions.
pub fn designated(text: &str) -> Result<Designated, Unknown> {
    read(DimensionTable::built_in(), text)
}

type Diameters = BTreeMap<u8, BTreeMap<u32, Length>>;

fn diameters(written: BTreeMap<u8, BTreeMap<u32, f64>>) -> Result<Diameters, TableFault> {
    let mut all = Diameters::new();
    for (series, sizes) in written {
        let rows = all.entry(series).or_default();
        for (bore, outside) in sizes {
            if outside <= f64::from(bore) || !outside.is_finite() {
                return Err(TableFault::Diameter { series, bore });
            }
            rows.insert(DimensionTable::key(mm(f64::from(bore))), mm(outside));
        }
    }
    Ok(all)
}

fn series(
    written: BTreeMap<String, BTreeMap<String, u8>>,
) -> Result<Vec<(BearingKind, String, u8)>, TableFault> {
    let mut all = Vec::new();
    for (name, prefixes) in written {
        let kind = BearingKind::of_name(&name).ok_or(TableFault::Kind(name))?;
        for (prefix, series) in prefixes {
            all.push((kind, prefix, series));
        }
    }
    Ok(all)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::to_mm;

    fn of(text: &str) -> Result<(BearingKind, f64, f64), Unknown> {
        designated(text).map(|d| (d.kind, to_mm(d.bore).round(), to_mm(d.outside).round()))
    }

    #[test]
    fn reads_what_people_write() {
        use BearingKind as K;
        for (text, kind, d, outside) in [
            ("6312-2RS", K::DeepGrooveBall, 60.0, 130.0),
            ("6205/C3", K::DeepGrooveBall, 25.0, 52.0),
            ("6205-2z/c3", K::DeepGrooveBall, 25.0, 52.0),
            ("61808", K::DeepGrooveBall, 40.0, 52.0),
            ("22220 EK C3", K::SphericalRoller, 100.0, 180.0),
            ("22220EK/C3W33", K::SphericalRoller, 100.0, 180.0),
            ("23040", K::SphericalRoller, 200.0, 310.0),
            ("NU 1020 M", K::CylindricalRoller, 100.0, 150.0),
            ("nu1020ecp", K::CylindricalRoller, 100.0, 150.0),
            ("NUP 2314", K::CylindricalRoller, 70.0, 150.0),
            ("NJ-308", K::CylindricalRoller, 40.0, 90.0),
            ("N 220", K::CylindricalRoller, 100.0, 180.0),
            ("NF 412", K::CylindricalRoller, 60.0, 150.0),
            ("7312 BECBM", K::AngularContactBall, 60.0, 130.0),
            ("3208 A", K::DoubleRowAngularContactBall, 40.0, 80.0),
            ("2210", K::SelfAligningBall, 50.0, 90.0),
            ("32208", K::TaperedRoller, 40.0, 80.0),
            ("51108", K::ThrustBall, 40.0, 60.0),
            ("81112", K::CylindricalRollerThrust, 60.0, 85.0),
            ("29412 E", K::SphericalRollerThrust, 60.0, 130.0),
            ("  6200 ", K::DeepGrooveBall, 10.0, 30.0),
        ] {
            assert_eq!(of(text), Ok((kind, d, outside)), "{text}");
        }
    }

    #[test]
    fn what_is_not_known_asks_for_the_dimensions() {
        for text in ["", "C3", "HK 2016", "9999", "623", "62", "seal 6205"] {
            let said = of(text).expect_err(text).to_string();
            assert!(said.contains("bore and outside diameter"), "{text}: {said}");
        }
        // the series is known, the size is not in the table
        assert!(matches!(
            of("230/500 CA"),
            Err(Unknown::Size {
                kind: BearingKind::SphericalRoller,
                ..
            })
        ));
    }

    #[test]
    fn diameters_rise_with_bore_and_series() {
        let table = DimensionTable::built_in();
        for sizes in table.radial.values().chain(table.thrust.values()) {
            let outside: Vec<Length> = sizes.values().copied().collect();
            assert!(outside.windows(2).all(|w| w[0] < w[1]));
        }
        for pair in [(8, 9), (9, 0), (0, 1), (1, 2), (0, 2), (2, 3), (3, 4)] {
            let (thin, thick) = (&table.radial[&pair.0], &table.radial[&pair.1]);
            for (bore, outside) in thin {
                if let Some(more) = thick.get(bore) {
                    assert!(outside < more, "{pair:?} bore {bore}");
                }
            }
        }
    }

    #[test]
    fn a_faulty_file_is_refused() {
        let with = |body: &str| DimensionTable::from_yaml(body);
        assert!(matches!(with("bore_code: 3"), Err(TableFault::Form(_))));
        let head = "bore_code: {}\nthrust_diameter_series: {}\n";
        let small = format!("{head}diameter_series: {{2: {{30: 25}}}}\nseries: {{}}\n");
        assert!(matches!(with(&small), Err(TableFault::Diameter { .. })));
        let kind = format!("{head}diameter_series: {{}}\nseries: {{wooden: {{\"9\": 2}}}}\n");
        assert!(matches!(with(&kind), Err(TableFault::Kind(_))));
        let missing =
            format!("{head}diameter_series: {{}}\nseries: {{thrust ball: {{\"511\": 1}}}}\n");
        assert!(matches!(with(&missing), Err(TableFault::Series(_))));
    }

    proptest::proptest! {
        #[test]
        fn never_panics(text in "\\PC{0,20}") {
            drop(designated(&text));
        }
    }
}
