//! Viscosity and temperature where no single line of ASTM D341 serves.
//!
//! Residuals that bend the same way at both ends are real curvature (wax, polymer, aromatic or
//! silicone chemistry). A line between each pair of neighbours then takes the place of the one;
//! the outer ones are carried on beyond the ends (common practice).

use super::viscosity_temperature::{Form, Line, Misfit, Point, ViscosityCurve, Weights, in_order};
use crate::quantity::{KinematicViscosity, Measure, Ratio, ThermodynamicTemperature};
use crate::relation::Law;

/// The choice between one line and several.
pub static PIECEWISE: Law = Law {
    name: "viscosity-piecewise",
    title: "Viscosity over temperature between neighbouring points",
    formula: "lg lg Z = A_i - B_i lg T between points i and i+1, where a residual of the single \
              line exceeds 3 %",
    range: "between the points; the outer lines are carried on beyond them",
    source: "common practice, with ASTM D341 in each stretch",
};

/// A residual beyond this share makes the curve piecewise.
pub const RESIDUAL_LIMIT: f64 = 0.03;

/// Lines between neighbouring points, rising in temperature.
#[derive(Clone, Debug, PartialEq)]
pub struct Pieces {
    points: Vec<Point>,
    lines: Vec<Line>,
}

impl Pieces {
    /// Lines between neighbours. One form of `Z` serves all, so that the curve has no jumps.
    ///
    /// # Errors
    /// See [`Misfit`].
    pub fn through(points: &[Point]) -> Result<Self, Misfit> {
        let form = Form::of(points);
        let points = in_order(points)?;
        let lines = points
            .windows(2)
            .map(|pair| Line::fit_as(pair, Weights::Equal, form))
            .collect::<Result<_, _>>()?;
        Ok(Self { points, lines })
    }

    /// Every line changed alike, each between the same temperatures.
    ///
    /// # Errors
    /// What the change returned.
    pub fn each_line(&self, f: impl Fn(Line) -> Result<Line, Misfit>) -> Result<Self, Misfit> {
        let lines: Vec<Line> = self.lines.iter().map(|l| f(*l)).collect::<Result<_, _>>()?;
        let points = self.points.iter().enumerate().map(|(i, p)| {
            let line = lines[i.min(lines.len() - 1)];
            Point::new(p.at, line.nu_at(p.at))
        });
        Ok(Self {
            points: points.collect(),
            lines,
        })
    }

    /// The line that serves at a temperature.
    pub fn line_at(&self, at: ThermodynamicTemperature) -> Line {
        let inner = &self.points[1..self.points.len() - 1];
        self.lines[inner.partition_point(|p| p.at <= at)]
    }

    /// The line that serves at a viscosity.
    fn line_of(&self, nu: KinematicViscosity) -> Line {
        let inner = &self.points[1..self.points.len() - 1];
        self.lines[inner.partition_point(|p| p.nu >= nu)]
    }
}

impl ViscosityCurve for Pieces {
    fn nu_at(&self, at: ThermodynamicTemperature) -> KinematicViscosity {
        self.line_at(at).nu_at(at)
    }

    fn temperature_at(&self, nu: KinematicViscosity) -> Result<ThermodynamicTemperature, Misfit> {
        self.line_of(nu).temperature_at(nu)
    }
}

/// One line, or several.
#[derive(Clone, Debug, PartialEq)]
pub enum Curve {
    /// A line that fits every point within 3 %.
    Line(Line),
    /// Lines between neighbours.
    Pieces(Pieces),
}

impl Curve {
    /// The line of least per-cent error where it fits within 3 %, else pieces; with the residuals
    /// of the single line in the order of the points.
    ///
    /// # Errors
    /// See [`Misfit`].
    pub fn through(points: &[Point]) -> Result<(Self, Vec<Ratio>), Misfit> {
        let line = Line::fit(points, Weights::PerCent)?;
        let residuals = line.residuals(points);
        let bends = residuals.iter().any(|r| r.base().abs() > RESIDUAL_LIMIT);
        let curve = if bends {
            Self::Pieces(Pieces::through(points)?)
        } else {
            Self::Line(line)
        };
        Ok((curve, residuals))
    }

    /// The same kind of curve with one point moved by its share times `sign`.
    ///
    /// # Errors
    /// See [`Misfit`].
    pub(super) fn through_moved(
        &self,
        points: &[(Point, Ratio)],
        which: usize,
        sign: f64,
    ) -> Result<Self, Misfit> {
        let moved: Vec<Point> = points
            .iter()
            .enumerate()
            .map(|(i, (p, share))| {
                let factor = if i == which {
                    1.0 + sign * share.base()
                } else {
                    1.0
                };
                Point::new(p.at, KinematicViscosity::from_base(p.nu.base() * factor))
            })
            .collect();
        match self {
            Self::Line(_) => Ok(Self::Line(Line::fit(&moved, Weights::PerCent)?)),
            Self::Pieces(_) => Ok(Self::Pieces(Pieces::through(&moved)?)),
        }
    }

    /// Every line changed alike.
    ///
    /// # Errors
    /// What the change returned.
    pub fn each_line(&self, f: impl Fn(Line) -> Result<Line, Misfit>) -> Result<Self, Misfit> {
        Ok(match self {
            Self::Line(line) => Self::Line(f(*line)?),
            Self::Pieces(pieces) => Self::Pieces(pieces.each_line(f)?),
        })
    }

    /// The line that serves at a temperature.
    pub fn line_at(&self, at: ThermodynamicTemperature) -> Line {
        match self {
            Self::Line(line) => *line,
            Self::Pieces(pieces) => pieces.line_at(at),
        }
    }
}

impl ViscosityCurve for Curve {
    fn nu_at(&self, at: ThermodynamicTemperature) -> KinematicViscosity {
        self.line_at(at).nu_at(at)
    }

    fn temperature_at(&self, nu: KinematicViscosity) -> Result<ThermodynamicTemperature, Misfit> {
        match self {
            Self::Line(line) => line.temperature_at(nu),
            Self::Pieces(pieces) => pieces.temperature_at(nu),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::{celsius, mm2_s, to_celsius, to_mm2_s};

    fn point(t: f64, nu: f64) -> Point {
        Point::new(celsius(t), mm2_s(nu))
    }

    #[test]
    fn a_silicone_is_taken_in_pieces_and_hits_its_points() {
        // polydimethylsiloxane, CoolProp 8.0.0 incompressible library
        let points = [
            point(-20.0, 26.17183),
            point(20.0, 11.50403),
            point(60.0, 5.86554),
            point(100.0, 3.39694),
        ];
        let (curve, residuals) = Curve::through(&points).expect("points fall");
        assert!(residuals.iter().any(|r| r.base().abs() > RESIDUAL_LIMIT));
        assert!(matches!(curve, Curve::Pieces(_)));
        for p in points {
            assert!((to_mm2_s(curve.nu_at(p.at)) / to_mm2_s(p.nu) - 1.0).abs() < 1e-12);
            let back = curve.temperature_at(p.nu).map_or(f64::NAN, to_celsius);
            assert!((back - to_celsius(p.at)).abs() < 1e-9);
        }
    }

    #[test]
    fn a_mineral_oil_keeps_one_line() {
        // paraffinic heat-transfer oil, CoolProp 8.0.0 incompressible library
        let points = [
            point(20.0, 108.82974),
            point(60.0, 18.56023),
            point(100.0, 6.36978),
        ];
        let curve = Curve::through(&points);
        assert!(matches!(curve, Ok((Curve::Line(_), _))));
    }
}
