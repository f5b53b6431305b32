//! Viscosity modifiers and the tests that shear them: plausible ranges, and an order of severity.

use super::provenance::Provenance;
use super::table::entry;
use crate::model::stated::Between;
use crate::model::word::words;
use crate::quantity::Ratio;

/// A kind of viscosity modifier.
#[derive(Clone, Debug, PartialEq)]
pub struct PolymerKind {
    /// Its id.
    pub id: String,
    /// Its name in words.
    pub name: String,
    /// Other names and abbreviations.
    pub also: Vec<String>,
    /// Share at 40 °C over share at 100 °C: below 1 the coils open as the oil warms.
    pub share_ratio: Between<Ratio>,
    /// Stability index in the mild tests, those of engines and hydraulics.
    pub index_mild: Between<Ratio>,
    /// Stability index in the roller bearing test, that of gears and rolling bearings.
    pub index_severe: Between<Ratio>,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(PolymerKind, |p| {
    let also = p.also.iter().map(String::as_str);
    std::iter::once(p.name.as_str()).chain(also).collect()
});

words! {
    /// What a shear test stands for.
    ShearsLike, "what a test stands for" {
        Mild = "engines and hydraulics", Severe = "gears and rolling bearings",
    }
}

/// A shear test.
#[derive(Clone, Debug, PartialEq)]
pub struct ShearTest {
    /// Its id.
    pub id: String,
    /// Its name in words.
    pub name: String,
    /// Words in a data sheet by which it is known.
    pub known_by: Vec<String>,
    /// Order of severity, mildest first; tests of one number are about alike.
    pub severity: Ratio,
    /// What it stands for.
    pub like: ShearsLike,
    /// Standards.
    pub standard: String,
    /// Source, basis, confidence.
    pub provenance: Provenance,
}
entry!(ShearTest, |t| vec![t.name.as_str()]);

impl super::Rulebook {
    /// The shear test a data sheet names: the one with the longest word found in the text.
    pub fn shear_test(&self, written: &str) -> Option<&ShearTest> {
        let written = written.to_lowercase();
        let length = |t: &ShearTest| {
            let found = t.known_by.iter();
            let found = found.filter(|w| written.contains(&w.to_lowercase()));
            found.map(String::len).max()
        };
        let known = self.shear_tests.iter();
        let known = known.filter_map(|t| length(t).map(|n| (n, t)));
        // of equals the first, which is the milder
        known
            .fold(
                None,
                |best: Option<(usize, &ShearTest)>, (n, t)| match best {
                    Some((longest, _)) if longest >= n => best,
                    _ => Some((n, t)),
                },
            )
            .map(|(_, t)| t)
    }

    /// The kind of viscosity modifier written in words.
    pub fn polymer(&self, written: &str) -> Option<&PolymerKind> {
        self.polymers.find(written)
    }
}
