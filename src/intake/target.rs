//! What a column of a table may hold, by the words the map file uses.

use crate::input::keys::{Key, machine, oil, part};
use crate::quantity::Kind;

/// What a table lists.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Makes {
    /// Machines: a site file.
    Site,
    /// Lubricants: an oil file.
    Oils,
}

impl Makes {
    /// Its word in the map file.
    pub const fn word(self) -> &'static str {
        match self {
            Self::Site => "site",
            Self::Oils => "oils",
        }
    }

    /// The file it makes where none is named.
    pub const fn file(self) -> &'static str {
        match self {
            Self::Site => "site.yaml",
            Self::Oils => "oils.yaml",
        }
    }

    /// That of a word.
    pub fn of(word: &str) -> Option<Self> {
        [Self::Site, Self::Oils]
            .into_iter()
            .find(|m| m.word() == word.trim())
    }
}

/// What a column holds.
#[derive(Clone, Copy, Debug)]
pub enum Target {
    /// Tag of the machine, or id of the oil.
    Name,
    /// The register's own number of a row.
    RowNumber,
    /// Name of a lubrication point of the machine.
    Point,
    /// Carried as a note on the row.
    Note,
    /// Left out.
    Skip,
    /// Coldest ambient.
    AmbientLow,
    /// Hottest ambient.
    AmbientHigh,
    /// Speed of the motor, which is that of the driven shaft only without a gear.
    MotorSpeed,
    /// A speed of the row's bearing.
    Speed,
    /// A key of the machine or oil.
    Key(&'static Key),
    /// A key of a part.
    Part(&'static part::PartKey, &'static Key),
    /// A viscosity at a temperature, degC.
    ViscosityAt(f64),
    /// Place of an input, of a table of inputs.
    Path,
    /// Value of an input as written, of a table of inputs.
    AsWritten,
    /// Kind of file of an input, of a table of inputs.
    FileKind,
}

impl PartialEq for Target {
    fn eq(&self, other: &Self) -> bool {
        self.word() == other.word()
    }
}

/// Targets that are no key of a record, with what each is.
pub const OTHERS: &[(&str, Target, &str)] = &[
    (
        "row number",
        Target::RowNumber,
        "the register's own number of the row",
    ),
    (
        "point",
        Target::Point,
        "name of a lubrication point of the machine",
    ),
    ("note", Target::Note, "kept as a note on the row"),
    ("skip", Target::Skip, "left out"),
    ("ambient low", Target::AmbientLow, "coldest ambient"),
    ("ambient high", Target::AmbientHigh, "hottest ambient"),
    ("motor speed", Target::MotorSpeed, "speed of the motor"),
    ("speed", Target::Speed, "speed of the bearing of the row"),
    (
        "path",
        Target::Path,
        "place of an input, of a table of inputs",
    ),
    ("as written", Target::AsWritten, "an input as written"),
    (
        "file kind",
        Target::FileKind,
        "kind of file an input belongs to",
    ),
];

impl Target {
    /// As the map file writes it.
    pub fn word(&self) -> String {
        match self {
            Self::Name => "tag".into(),
            Self::Key(key) => key.name.into(),
            Self::Part(part, key) if part.first == key.name => part.first.into(),
            Self::Part(part, key) => format!("{}: {}", part.first, key.name),
            Self::ViscosityAt(t) => format!("viscosity at {t} degC"),
            other => {
                let same = |t: &Self| std::mem::discriminant(t) == std::mem::discriminant(other);
                let found = OTHERS.iter().find(|(_, t, _)| same(t));
                found.map_or("note", |(w, _, _)| w).into()
            }
        }
    }

    /// The target of a word of the map file.
    pub fn of(makes: Makes, word: &str) -> Option<Self> {
        let word = word.trim().replace('_', " ");
        if word == "tag" || (word == "id" && makes == Makes::Oils) {
            return Some(Self::Name);
        }
        if let Some((_, target, _)) = OTHERS.iter().find(|(w, _, _)| *w == word) {
            return Some(*target);
        }
        if makes == Makes::Oils {
            let point = word
                .strip_prefix("viscosity at ")
                .and_then(|t| t.strip_suffix(" degC"));
            if let Some(t) = point.and_then(|t| t.trim().parse().ok()) {
                return Some(Self::ViscosityAt(t));
            }
            return oil::OIL.key(&word).map(Self::Key);
        }
        let (first, key) = word.split_once(':').unwrap_or((&word, &word));
        if let Some(kind) = part::KINDS.iter().find(|k| k.first == first.trim()) {
            return kind.record.key(key.trim()).map(|k| Self::Part(kind, k));
        }
        machine::MACHINE.key(&word).map(Self::Key)
    }

    /// The kinds of quantity its cells hold; none where they hold words.
    pub fn kinds(&self) -> &'static [Kind] {
        use crate::input::keys::Form;
        const TEMPERATURE: &[Kind] = &[Kind::Temperature];
        const SPEED: &[Kind] = &[Kind::RotationalSpeed];
        const VISCOSITY: &[Kind] = &[Kind::KinematicViscosity, Kind::Efflux];
        match self {
            Self::Key(key) | Self::Part(_, key) => match key.form {
                Form::Quantity(want) | Form::Monthly(want) => want.kinds,
                _ => &[],
            },
            Self::AmbientLow | Self::AmbientHigh => TEMPERATURE,
            Self::MotorSpeed | Self::Speed => SPEED,
            Self::ViscosityAt(_) => VISCOSITY,
            _ => &[],
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_target_is_found_by_its_own_word() {
        for (makes, word) in [
            (Makes::Site, "tag"),
            (Makes::Site, "sump"),
            (Makes::Site, "rolling bearing"),
            (Makes::Site, "rolling bearing: load"),
            (Makes::Site, "gear mesh: face width"),
            (Makes::Oils, "viscosity at 40 degC"),
            (Makes::Oils, "pour point"),
        ] {
            let target = Target::of(makes, word).expect(word);
            assert_eq!(target.word(), word);
        }
        for (word, ..) in OTHERS {
            let target = Target::of(Makes::Site, word).expect(word);
            assert_eq!(target.word(), *word);
        }
        assert_eq!(Target::of(Makes::Site, "sumpf"), None);
        assert_eq!(Target::of(Makes::Oils, "sump"), None);
    }
}
