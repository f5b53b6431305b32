//! A component as base oil and polymer, and two of them mixed.

use super::NoBlend;
use crate::oil::Worn;
use crate::oil::curve::Curve;
use crate::oil::curves::Curves;
use crate::oil::makeup::Makeup;
use crate::quantity::convert::{celsius, number, to_mm2_s};
use crate::quantity::{KinematicViscosity, Measure, Ratio, ThermodynamicTemperature};
use crate::relation::oil::blend::{BlendError, Rule, polymer};
use crate::relation::oil::blend_wright::wright;
use crate::relation::oil::polymer::ThickenedOil;
use crate::relation::oil::viscosity_temperature::{
    Form, Line, Point, SHORT_FORM_FROM_MM2_S, ViscosityCurve, Weights,
};

/// Which end of an estimated base oil.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum End {
    /// The thinner base, more polymer.
    Thin,
    /// The thicker base, less polymer.
    Thick,
}

/// A component at both ends of what its base may be.
#[derive(Clone, Debug)]
pub(super) struct Part {
    new: Curve,
    worn: Option<Curve>,
    made: Option<(ThickenedOil, ThickenedOil)>,
    estimated: bool,
    whole: bool,
}

impl Part {
    /// An oil as base and polymer.
    pub(super) fn of(curves: &Curves) -> Self {
        let oils = curves.makeup.oils();
        let made = match (oils.first(), oils.last()) {
            (Some(first), Some(last)) => Some((*first, *last)),
            _ => None,
        };
        Self {
            new: curves.new.clone(),
            worn: match &curves.worn {
                Worn::Known(curve) => Some(curve.clone()),
                _ => None,
            },
            made,
            estimated: matches!(curves.makeup, Makeup::Estimated(_)),
            whole: curves.makeup == Makeup::Unknown,
        }
    }

    fn made(&self, end: End) -> Option<ThickenedOil> {
        self.made
            .map(|(thin, thick)| if end == End::Thin { thin } else { thick })
    }

    /// Base oil, never above the oil itself: an estimate may pass its line far from the points.
    fn base_at(&self, at: ThermodynamicTemperature, end: End) -> KinematicViscosity {
        let new = self.new.nu_at(at);
        match self.made(end).map(|oil| oil.base().nu_at(at)) {
            Some(base) if base < new => base,
            _ => new,
        }
    }

    /// The polymer's share: what the oil is above its base.
    fn share_at(&self, at: ThermodynamicTemperature, end: End) -> f64 {
        let base = self.base_at(at, end).base();
        (self.new.nu_at(at).base() / base - 1.0).max(0.0)
    }

    /// The same after shear, where the worn oil is known.
    fn share_worn(&self, at: ThermodynamicTemperature, end: End) -> Option<f64> {
        if self.made.is_none() {
            return Some(0.0);
        }
        let base = self.base_at(at, end).base();
        let worn = self.worn.as_ref()?.nu_at(at).base();
        let left = (worn / base - 1.0).max(0.0);
        Some(left.min(self.share_at(at, end)))
    }
}

/// Two components mixed.
#[derive(Clone, Debug)]
pub(super) struct Mix {
    a: Part,
    b: Part,
    end: End,
    shares: [Ratio; 2],
    wright: Line,
    /// Whether a base is split by assumption.
    pub(super) estimated: bool,
    /// Whether a thickened oil is blended as if it were base oil.
    pub(super) whole_polymer: bool,
}

impl Mix {
    /// A share of `b` in `a`, at one end of what the bases may be.
    pub(super) fn new(a: &Part, b: &Part, share: Ratio, end: End) -> Result<Self, NoBlend> {
        let shares = [number(1.0 - share.base()), share];
        Ok(Self {
            wright: by_wright(a, b, &shares, end)?,
            estimated: a.estimated || b.estimated,
            whole_polymer: a.whole || b.whole,
            a: a.clone(),
            b: b.clone(),
            end,
            shares,
        })
    }

    /// Base oils at a temperature.
    pub(super) fn bases(&self, at: ThermodynamicTemperature) -> [KinematicViscosity; 2] {
        [self.a.base_at(at, self.end), self.b.base_at(at, self.end)]
    }

    /// Base oil of the blend by Walther.
    pub(super) fn base_walther(
        &self,
        at: ThermodynamicTemperature,
    ) -> Result<KinematicViscosity, BlendError> {
        Rule::Walther.blend(&self.shares, &self.bases(at))
    }

    /// Base oil of the blend by Wright.
    pub(super) fn base_wright(&self, at: ThermodynamicTemperature) -> KinematicViscosity {
        self.wright.nu_at(at)
    }

    /// Share of the polymers in the blend.
    pub(super) fn polymer(&self, at: ThermodynamicTemperature) -> Result<Ratio, BlendError> {
        let shares = [&self.a, &self.b].map(|part| number(part.share_at(at, self.end)));
        polymer(&self.shares, &shares)
    }

    /// The blend after shear, by Walther; `None` where the loss of a component is not known.
    pub(super) fn worn(&self, at: ThermodynamicTemperature) -> Option<KinematicViscosity> {
        let (a, b) = (
            self.a.share_worn(at, self.end)?,
            self.b.share_worn(at, self.end)?,
        );
        let left = polymer(&self.shares, &[number(a), number(b)]).ok()?;
        let base = self.base_walther(at).ok()?;
        let [base_a, base_b] = self.bases(at);
        let ends = (base_a.base() * (1.0 + a), base_b.base() * (1.0 + b));
        Some(held(base, left, ends))
    }

    /// Base oil and polymer together, held between the two components.
    pub(super) fn together(
        &self,
        base: KinematicViscosity,
        share: Ratio,
        at: ThermodynamicTemperature,
    ) -> KinematicViscosity {
        let ends = (self.a.new.nu_at(at).base(), self.b.new.nu_at(at).base());
        held(base, share, ends)
    }

    /// The blend by Walther.
    pub(super) fn walther(
        &self,
        at: ThermodynamicTemperature,
    ) -> Result<KinematicViscosity, BlendError> {
        Ok(self.together(self.base_walther(at)?, self.polymer(at)?, at))
    }

    /// The blend by Wright.
    pub(super) fn wright(
        &self,
        at: ThermodynamicTemperature,
    ) -> Result<KinematicViscosity, BlendError> {
        Ok(self.together(self.base_wright(at), self.polymer(at)?, at))
    }

    /// How many times the base oils lie apart.
    pub(super) fn apart(&self, at: ThermodynamicTemperature) -> f64 {
        let [a, b] = self.bases(at);
        let ratio = a.base() / b.base();
        ratio.max(1.0 / ratio)
    }
}

/// Base oil and polymer together, held between the viscosities of the components.
fn held(base: KinematicViscosity, share: Ratio, (a, b): (f64, f64)) -> KinematicViscosity {
    let nu = base.base() * (1.0 + share.base());
    KinematicViscosity::from_base(nu.clamp(a.min(b), a.max(b)))
}

/// Lines of the bases through 40 and 100 °C, in one form of the equation, blended.
fn by_wright(a: &Part, b: &Part, shares: &[Ratio; 2], end: End) -> Result<Line, NoBlend> {
    let points =
        |part: &Part| [40.0, 100.0].map(|t| Point::new(celsius(t), part.base_at(celsius(t), end)));
    let (pa, pb) = (points(a), points(b));
    let short = pa
        .iter()
        .chain(&pb)
        .all(|p| to_mm2_s(p.nu) >= SHORT_FORM_FROM_MM2_S);
    let form = if short { Form::Short } else { Form::Full };
    let line = |points: &[Point]| {
        Line::fit_as(points, Weights::PerCent, form)
            .map_err(|misfit| NoBlend::Wright(misfit.into()))
    };
    Ok(wright(shares, &[line(&pa)?, line(&pb)?])?)
}
