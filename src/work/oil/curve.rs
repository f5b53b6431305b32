//! Viscosity and density over temperature.

use super::{GROUP, density_law, may, must};
use crate::quantity::convert::to_celsius;
use crate::quantity::{
    DynamicViscosity, KinematicViscosity, MassDensity, Measure, Ratio, ThermodynamicTemperature,
};
use crate::relation::oil::density::{DensityLaw, VCF_54D};
use crate::relation::oil::piecewise::{Curve, PIECEWISE, RESIDUAL_LIMIT};
use crate::relation::oil::start_limit::{Density, START_LIMIT, temperature_at_dynamic};
use crate::relation::oil::viscosity_temperature::{
    Form, LINE, Line, Misfit, Point, TEMPERATURE, VISCOSITY, ViscosityCurve, Weights,
};
use crate::trace::{Both, Known, Outcome, Recorder};
use crate::work::args;
use crate::work::{Args, Refusal, Relation, Worked};

const POINTS: &str = "two viscosities or more with their temperatures, each as \
                      \"32 mm2/s at 40 degC\"";
const WEIGHTS: &str = "percent (least per-cent error) or equal (in lg lg Z)";

pub(super) const VISCOSITY_AT: Relation = Relation {
    name: "viscosity-at",
    group: GROUP,
    law: &VISCOSITY,
    with: &[
        must("points", POINTS),
        must("at", "temperature wanted"),
        may(
            "weights",
            WEIGHTS,
            "percent, and pieces where one line misses a point by 3 %",
        ),
    ],
    gives: &[
        ("nu", "kinematic viscosity, mm2/s"),
        ("A", "intercept of the line that serves there"),
        ("B", "slope of the line that serves there"),
    ],
    run: viscosity_at,
};

pub(super) const TEMPERATURE_AT: Relation = Relation {
    name: "temperature-at",
    group: GROUP,
    law: &TEMPERATURE,
    with: &[must("points", POINTS), must("nu", "viscosity wanted")],
    gives: &[("temperature", "temperature at which the oil has it, degC")],
    run: temperature_at,
};

pub(super) const TEMPERATURE_AT_DYNAMIC: Relation = Relation {
    name: "temperature-at-dynamic",
    group: GROUP,
    law: &START_LIMIT,
    with: &[
        must("points", POINTS),
        must("density15", "density at 15 degC"),
        must("eta", "dynamic viscosity wanted"),
        may("base", "base stock, for its density", "lubricating oil"),
    ],
    gives: &[("temperature", "temperature at which the oil has it, degC")],
    run: dynamic,
};

pub(super) const DENSITY_AT: Relation = Relation {
    name: "density-at",
    group: GROUP,
    law: &crate::relation::oil::density::DENSITY,
    with: &[
        must("density15", "density at 15 degC"),
        must("at", "temperature wanted"),
        may(
            "base",
            "base stock: PAG, silicone, PFPE … have a law of their own",
            "lubricating oil",
        ),
    ],
    gives: &[
        ("density", "density, kg/m3"),
        ("vcf", "density over density at 15 degC"),
    ],
    run: density_at,
};

fn viscosity_at(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let points = args.points(w, "points")?;
    let at = args.quantity(w, "at", "temperature wanted")?;
    let equal = args.choice("weights", &["percent", "equal"], Some("percent"))? == "equal";
    let served = if equal {
        one_line(w, &points, Weights::Equal)?
    } else {
        line_at(w, &points, at)?
    };
    let nu = on_line(w, &served, at)?;
    extrapolation(w, &points, at.value);
    w.result("nu", nu, "mm2/s");
    w.result("A", served.a, "");
    w.result("B", served.b, "");
    Ok(())
}

/// A line with its constants named.
pub(in crate::work) struct Served {
    /// Intercept.
    pub(in crate::work) a: Known<Ratio>,
    /// Slope.
    pub(in crate::work) b: Known<Ratio>,
    form: Form,
}

impl Served {
    /// Names the constants of a line worked out.
    pub(super) fn take(w: &mut Worked, line: &Outcome<Line>) -> Self {
        let (a, b) = ("intercept of the line", "slope of the line");
        Self {
            a: w.trace.take(line, "A", a, Line::intercept),
            b: w.trace.take(line, "B", b, Line::slope),
            form: line.value.form(),
        }
    }
}

fn plain(points: &[args::Point]) -> Vec<Point> {
    points
        .iter()
        .map(|p| Point::new(p.at.value, p.nu.value))
        .collect()
}

type Nus = Vec<(&'static str, Known<KinematicViscosity>)>;
type Temperatures = Vec<(&'static str, Known<ThermodynamicTemperature>)>;

fn inputs(points: &[args::Point]) -> Both<Nus, Temperatures> {
    Both(
        points.iter().map(|p| ("nu", p.nu)).collect(),
        points.iter().map(|p| ("T", p.at)).collect(),
    )
}

fn paired(nus: &[KinematicViscosity], temperatures: &[ThermodynamicTemperature]) -> Vec<Point> {
    let pairs = temperatures.iter().zip(nus);
    pairs.map(|(at, nu)| Point::new(*at, *nu)).collect()
}

/// One line through the points, whatever its residuals.
pub(in crate::work) fn one_line(
    w: &mut Worked,
    points: &[args::Point],
    weights: Weights,
) -> Result<Served, Refusal> {
    let fit = |(nus, ts): (Vec<_>, Vec<_>)| Line::fit(&paired(&nus, &ts), weights);
    let line = w.trace.attempt_all(&LINE, inputs(points), fit)?;
    remarks(w, line.value, points);
    Ok(Served::take(w, &line))
}

/// The line that serves at a temperature: one for all points, or that of its neighbours where one
/// line misses a point by more than 3 %.
pub(in crate::work) fn line_at(
    w: &mut Worked,
    points: &[args::Point],
    at: Known<ThermodynamicTemperature>,
) -> Result<Served, Refusal> {
    let (curve, residuals) = Curve::through(&plain(points))?;
    if matches!(curve, Curve::Line(_)) {
        return one_line(w, points, Weights::PerCent);
    }
    let worst = residuals.iter().fold(0.0_f64, |m, r| m.max(r.base().abs()));
    w.remark(format!(
        "one line would miss a point by {:.1} %, more than {:.0} %: straight between neighbouring \
         points instead",
        100.0 * worst,
        100.0 * RESIDUAL_LIMIT
    ));
    let all = Both(inputs(points), (("T_wanted", at),));
    let serving = |((nus, ts), (at,)): ((Vec<_>, Vec<_>), (_,))| -> Result<Line, Misfit> {
        Ok(Curve::through(&paired(&nus, &ts))?.0.line_at(at))
    };
    let line = w.trace.attempt_all(&PIECEWISE, all, serving)?;
    Ok(Served::take(w, &line))
}

/// Viscosity on a line at a temperature.
pub(in crate::work) fn on_line(
    w: &mut Worked,
    line: &Served,
    at: Known<ThermodynamicTemperature>,
) -> Result<Known<KinematicViscosity>, Refusal> {
    let form = line.form;
    let with = (("A", line.a), ("B", line.b), ("T", at));
    let nu = w.trace.attempt(
        "nu",
        "kinematic viscosity",
        &VISCOSITY,
        with,
        |(a, b, t)| -> Result<_, Misfit> {
            let line = Line::from_constants(a, b, form)?;
            let nu = line.nu_at(t);
            // The answer must be one that the line can be asked for.
            line.temperature_at(nu)?;
            Ok(nu)
        },
    )?;
    Ok(nu)
}

fn remarks(w: &mut Worked, line: Line, points: &[args::Point]) {
    let residuals = line.residuals(&plain(points));
    let worst = residuals.iter().fold(0.0_f64, |m, r| m.max(r.base().abs()));
    if worst > RESIDUAL_LIMIT {
        w.remark(format!("the line misses a point by {:.1} %", 100.0 * worst));
    }
    if line.form() == Form::Full {
        w.remark("a point lies below 2 mm2/s: the full form of ASTM D341 is used throughout");
    }
    let slope = line.slope().base();
    if !(1.0..=5.0).contains(&slope) {
        w.remark(format!(
            "slope B {slope:.2} is outside 1 to 5: are the points mistyped or exchanged?"
        ));
    }
}

fn extrapolation(w: &mut Worked, points: &[args::Point], at: ThermodynamicTemperature) {
    let mut temperatures: Vec<f64> = points.iter().map(|p| to_celsius(p.at.value)).collect();
    temperatures.sort_by(f64::total_cmp);
    let (Some(lowest), Some(highest)) = (temperatures.first(), temperatures.last()) else {
        return;
    };
    let t = to_celsius(at);
    if t < lowest - 0.05 {
        w.remark(format!(
            "extrapolated {:.0} K below the lowest point: wax, polymer and gelling are not in the \
             line, two figures at most are meant",
            lowest - t
        ));
    } else if t > highest + 0.05 {
        w.remark(format!(
            "extrapolated {:.0} K above the highest point",
            t - highest
        ));
    }
}

fn temperature_at(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let points = args.points(w, "points")?;
    let nu = args.quantity(w, "nu", "viscosity wanted")?;
    let (curve, _) = Curve::through(&plain(&points))?;
    let found = if matches!(curve, Curve::Line(_)) {
        let line = one_line(w, &points, Weights::PerCent)?;
        let form = line.form;
        let with = (("A", line.a), ("B", line.b), ("nu", nu));
        let says = "temperature of that viscosity";
        w.trace
            .attempt("T", says, &TEMPERATURE, with, |(a, b, nu)| {
                Line::from_constants(a, b, form)?.temperature_at(nu)
            })?
    } else {
        let with = Both(inputs(&points), (("nu_wanted", nu),));
        let says = "temperature of that viscosity, between neighbouring points";
        w.remark("one line would miss a point by more than 3 %: straight between neighbours");
        w.trace
            .attempt("T", says, &PIECEWISE, with, |((nus, ts), (nu,))| {
                Curve::through(&paired(&nus, &ts))?.0.temperature_at(nu)
            })?
    };
    extrapolation(w, &points, found.value);
    w.result("temperature", found, "degC");
    Ok(())
}

fn dynamic(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let points = args.points(w, "points")?;
    let rho15: Known<MassDensity> = args.quantity(w, "density15", "density at 15 degC")?;
    let eta: Known<DynamicViscosity> = args.quantity(w, "eta", "dynamic viscosity wanted")?;
    let law = density_law(args)?;
    let with = Both(inputs(&points), (("rho15", rho15), ("eta", eta)));
    let says = "temperature of that dynamic viscosity";
    let found = w.trace.attempt(
        "T",
        says,
        &START_LIMIT,
        with,
        |((nus, ts), (rho15, eta))| {
            let (curve, _) = Curve::through(&paired(&nus, &ts))?;
            temperature_at_dynamic(&curve, Density { rho15, law }, eta)
        },
    )?;
    extrapolation(w, &points, found.value);
    w.result("temperature", found, "degC");
    Ok(())
}

fn density_at(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let rho15: Known<MassDensity> = args.quantity(w, "density15", "density at 15 degC")?;
    let at: Known<ThermodynamicTemperature> = args.quantity(w, "at", "temperature wanted")?;
    let law = density_law(args)?;
    if !(-150.0..=400.0).contains(&to_celsius(at.value)) {
        let words = "at: no oil is a liquid there; densities are worked out from -150 to 400 degC";
        return Err(Refusal::new("out-of-range", words));
    }
    let with = (("rho15", rho15), ("t", at));
    let vcf_law = if law == DensityLaw::LubricatingOil {
        &VCF_54D
    } else {
        law.law()
    };
    let vcf = w.trace.law(
        "VCF",
        "density over density at 15 degC",
        vcf_law,
        with,
        |(rho15, t)| law.volume_correction(rho15, t),
    );
    let with = (("rho15", rho15), ("VCF", vcf));
    let density = w
        .trace
        .law("rho", "density", law.law(), with, |(rho15, vcf)| {
            MassDensity::from_base(rho15.base() * vcf.base())
        });
    if !law.covers(rho15.value, at.value) {
        w.remark(format!(
            "outside the range of this law: {}",
            law.law().range
        ));
    }
    w.result("density", density, "kg/m3");
    w.result("vcf", vcf, "");
    Ok(())
}
