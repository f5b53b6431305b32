//! Film against roughness.
//!
//! Sources: Tallian 1967 for the film ratio; bands are common practice.

use crate::quantity::{Length, Measure, Ratio};
use crate::relation::Law;
use crate::relation::outside::{Outside, positive};

/// Composite roughness.
pub static COMPOSITE: Law = Law {
    name: "composite-roughness",
    title: "Composite roughness of two surfaces",
    formula: "sigma = sqrt(Rq1^2 + Rq2^2)",
    range: "root mean square heights of surfaces whose irregularities do not match",
    source: "Tallian 1967",
};

/// The film ratio.
pub static FILM_RATIO: Law = Law {
    name: "film-ratio",
    title: "Film thickness over composite roughness",
    formula: "lambda = h / sigma",
    range: "h the minimum film for bearings, the central film in AGMA 925; sigma from Rq",
    source: "Tallian 1967; bands below 1 boundary, 1 to 3 mixed, above 3 full film: common practice",
};

/// The film that a film ratio asks for.
pub static WANTED: Law = Law {
    name: "film-wanted",
    title: "Film that a film ratio asks for",
    formula: "h = lambda sigma",
    range: "film ratio above zero",
    source: "definition of the film ratio",
};

/// Root mean square height from the arithmetic mean.
pub static RQ_FROM_RA: Law = Law {
    name: "rq-from-ra",
    title: "Root mean square roughness from the arithmetic mean",
    formula: "Rq = 1.25 Ra",
    range: "ground and finished surfaces with heights spread normally",
    source: "common practice (sqrt(pi/2) = 1.253 for a normal distribution)",
};

/// Composite roughness of two Rq.
///
/// # Errors
/// A negative roughness, or two perfectly smooth surfaces.
pub fn composite(rq1: Length, rq2: Length) -> Result<Length, Outside> {
    let (a, b) = (rq1.base(), rq2.base());
    let negative = Outside::NotPositive {
        what: "a roughness",
    };
    if a < 0.0 || b < 0.0 {
        return Err(negative);
    }
    let sigma = Length::from_base((a * a + b * b).sqrt());
    positive("the composite roughness", sigma)?;
    Ok(sigma)
}

/// Film ratio.
///
/// # Errors
/// A composite roughness that is not above zero.
pub fn film_ratio(film: Length, composite: Length) -> Result<Ratio, Outside> {
    let sigma = positive("the composite roughness", composite)?;
    Ok(Ratio::from_base(film.base() / sigma))
}

/// Rq of a surface whose Ra is known.
pub fn rq_from_ra(ra: Length) -> Length {
    Length::from_base(1.25 * ra.base())
}

/// Film that a ratio asks for.
pub fn film_for(ratio: Ratio, composite: Length) -> Length {
    Length::from_base(ratio.base() * composite.base())
}

/// How far the surfaces are kept apart.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Band {
    /// Below 1: the surfaces carry.
    Boundary,
    /// 1 to 3: both carry.
    Mixed,
    /// Above 3: the film carries.
    Full,
}

impl Band {
    /// The band of a film ratio.
    pub fn of(ratio: Ratio) -> Self {
        match ratio.base() {
            r if r < 1.0 => Self::Boundary,
            r if r <= 3.0 => Self::Mixed,
            _ => Self::Full,
        }
    }

    /// In words.
    pub fn words(self) -> &'static str {
        match self {
            Self::Boundary => "boundary",
            Self::Mixed => "mixed",
            Self::Full => "full film",
        }
    }
}
