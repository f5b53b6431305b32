//! An oil as it would be with another grade of the same slope, another index, or less shear loss:
//! every curve moved alike, so that it is judged by the same code as the oil itself.

use super::curve::{Curve, Joined};
use super::curves::Curves;
use super::worn::Worn;
use crate::quantity::convert::{celsius, number};
use crate::quantity::{KinematicViscosity, Measure, Ratio};
use crate::relation::oil::piecewise;
use crate::relation::oil::slide::Slide;
use crate::relation::oil::viscosity_index::{self, IndexError};
use crate::relation::oil::viscosity_temperature::{Line, Misfit, ViscosityCurve};

impl Curve {
    /// The curve moved; a thickened oil by its base oil, its polymer as it was.
    ///
    /// # Errors
    /// A curve that would no longer fall.
    pub fn slid(&self, by: Slide) -> Result<Self, Misfit> {
        let plain = |curve: &piecewise::Curve| curve.each_line(|line| by.of(line));
        Ok(match self {
            Self::Plain(curve) => Self::Plain(plain(curve)?),
            Self::Share { of, keep } => Self::Share {
                of: plain(of)?,
                keep: *keep,
            },
            Self::Thickened(oil) => Self::Thickened(oil.on(by.of(oil.base())?)),
            Self::Cold(joined) => Self::Cold(Box::new(Joined {
                above: joined.above.slid(by)?,
                below: joined.below.each_line(|line| by.of(line))?,
                joint: joined.joint,
            })),
        })
    }
}

impl Curves {
    /// The line that stands for the new oil at 40 °C.
    fn line40(&self) -> Line {
        self.new.line_at(celsius(40.0))
    }

    /// The same oil so many VG steps thicker at 40 °C, every slope kept.
    ///
    /// # Errors
    /// A curve that would no longer fall.
    pub fn thicker_by(&self, steps: f64) -> Result<Self, Misfit> {
        self.slid(Slide::of_steps(self.line40(), steps))
    }

    /// The same grade with another viscosity index; `None` where there is no such oil.
    pub fn with_index(&self, index: f64) -> Option<Self> {
        let slide = Slide::to_index(self.line40(), number(index)).ok()?;
        self.slid(slide).ok()
    }

    /// The viscosity index of the line at 40 °C.
    ///
    /// # Errors
    /// Not defined below 2 mm²/s at 100 °C.
    pub fn index(&self) -> Result<Ratio, IndexError> {
        let line = self.line40();
        viscosity_index::index(line.nu40(), line.nu100())
    }

    /// The same oil with a known permanent loss, the same share at every temperature.
    #[must_use]
    pub fn with_loss(&self, loss: f64) -> Self {
        Self {
            worn: Worn::Known(self.new.after_loss(loss)),
            ..self.clone()
        }
    }

    /// The same oil without tolerance: thin and thick end are the oil itself.
    #[must_use]
    pub fn without_ends(&self) -> Self {
        Self {
            thin: None,
            thick: None,
            ..self.clone()
        }
    }

    fn slid(&self, by: Slide) -> Result<Self, Misfit> {
        let maybe = |c: &Option<Curve>| c.as_ref().map(|c| c.slid(by)).transpose();
        let new = self.new.slid(by)?;
        let cold_points = self.cold_points.iter().map(|p| {
            let times = new.nu_at(p.at).base() / self.new.nu_at(p.at).base();
            let of = |nu: KinematicViscosity| KinematicViscosity::from_base(nu.base() * times);
            super::cold::ColdPoint {
                nu: of(p.nu),
                line: of(p.line),
                ..*p
            }
        });
        Ok(Self {
            cold_points: cold_points.collect(),
            thin: maybe(&self.thin)?,
            thick: maybe(&self.thick)?,
            cold: maybe(&self.cold)?,
            worn: match &self.worn {
                Worn::Known(curve) => Worn::Known(curve.slid(by)?),
                other => other.clone(),
            },
            new,
            ..self.clone()
        })
    }
}
