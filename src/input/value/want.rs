//! What a key wants of its value.

use crate::quantity::Kind;

/// The form of a quantity a key takes.
#[expect(
    clippy::struct_excessive_bools,
    reason = "each is one thing the grammar allows or not"
)]
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Want {
    /// Kinds of quantity, the usual one first.
    pub kinds: &'static [Kind],
    /// One value, a range, or either.
    pub ends: Ends,
    /// Whether `unknown` may stand instead.
    pub unknown: bool,
    /// Whether `below` and `above` may stand before it.
    pub bound: bool,
    /// Whether `held at` may stand before it.
    pub held: bool,
    /// Whether a temperature stands beside it.
    pub at: At,
    /// Whether a test may be named.
    pub test: bool,
    /// Which roughness it is, where it is one: `Ra 0.3 um`.
    pub roughness: Option<Roughness>,
    /// A right example, where that of the kind would mislead.
    pub example: Option<&'static str>,
}

/// Which mean of a profile a roughness is.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Roughness {
    /// Arithmetic mean, as drawings state it.
    Ra,
    /// Root mean square, as film ratios use it.
    Rq,
}

impl Roughness {
    /// Its symbol.
    pub const fn symbol(self) -> &'static str {
        match self {
            Self::Ra => "Ra",
            Self::Rq => "Rq",
        }
    }
}

/// How many ends a value has.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Ends {
    /// One value.
    One,
    /// A range.
    Range,
    /// Either.
    Either,
}

/// Whether a temperature stands beside the value: `219 mm2/s at 40 degC`.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum At {
    /// It has no meaning.
    Never,
    /// It may.
    May,
    /// It must.
    Must,
}

impl Want {
    /// One value that must be known.
    pub const fn one(kinds: &'static [Kind]) -> Self {
        Self {
            kinds,
            ends: Ends::One,
            unknown: false,
            bound: false,
            held: false,
            at: At::Never,
            test: false,
            roughness: None,
            example: None,
        }
    }

    /// One value or `unknown`.
    pub const fn stated(kinds: &'static [Kind]) -> Self {
        let mut want = Self::one(kinds);
        want.unknown = true;
        want
    }

    /// The same with other ends.
    #[must_use]
    pub const fn ends(mut self, ends: Ends) -> Self {
        self.ends = ends;
        self
    }

    /// The same with a temperature beside it.
    #[must_use]
    pub const fn at(mut self, at: At) -> Self {
        self.at = at;
        self
    }

    /// The same, and `held at` is understood.
    #[must_use]
    pub const fn or_held(mut self) -> Self {
        self.held = true;
        self
    }

    /// The same, and bounds are understood.
    #[must_use]
    pub const fn or_bound(mut self) -> Self {
        self.bound = true;
        self
    }

    /// The same with an example of its own.
    #[must_use]
    pub const fn such_as(mut self, example: &'static str) -> Self {
        self.example = Some(example);
        self
    }

    /// The same as a roughness, known or not.
    #[must_use]
    pub const fn rough(mut self, roughness: Roughness) -> Self {
        self.roughness = Some(roughness);
        self
    }

    /// The same, and a test may be named.
    #[must_use]
    pub const fn with_test(mut self) -> Self {
        self.test = true;
        self
    }

    /// The usual kind.
    pub fn kind(&self) -> Kind {
        self.kinds[0]
    }

    /// With its article: "a speed", "a volume or a mass".
    pub fn noun(&self) -> String {
        match self.kinds {
            [Kind::KinematicViscosity, ..] if self.kinds.len() > 1 => "a viscosity".into(),
            // The second kind is only another way to write the first.
            [Kind::VolumePerYear | Kind::HoursPerYear, ..] => self.kind().spec().noun.to_owned(),
            kinds => {
                let nouns: Vec<&str> = kinds.iter().map(|k| k.spec().noun).collect();
                nouns.join(" or ")
            }
        }
    }

    /// A right example.
    pub fn example(&self) -> String {
        if let Some(example) = self.example {
            return example.to_owned();
        }
        let one = match self.roughness {
            Some(roughness) => format!("{} 0.4 um", roughness.symbol()),
            None => self.kind().spec().example.to_owned(),
        };
        let with_ends = match (self.ends, self.kind()) {
            (Ends::Range, Kind::Temperature) => "-18 .. 36 degC".to_owned(),
            (Ends::Range, _) => format!("{one} .. {one}"),
            _ => one,
        };
        match self.at {
            At::Must => format!("{with_ends} at 40 degC"),
            _ => with_ends,
        }
    }
}
