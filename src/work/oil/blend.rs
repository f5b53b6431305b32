//! Blends.

use super::curve::{Served, on_line};
use super::{GROUP, by_definition, form, may, must};
use crate::quantity::convert::celsius;
use crate::quantity::{KinematicViscosity, Measure, Ratio};
use crate::relation::oil::blend::{BlendError, FRACTION, Rule, WALTHER};
use crate::relation::oil::blend_wright::{WRIGHT, wright};
use crate::relation::oil::viscosity_temperature::{Form, Line, Misfit, Point, Weights};
use crate::trace::{Both, Known, Recorder};
use crate::work::{Args, Refusal, Relation, Worked};

const METHODS: [&str; 6] = [
    "walther",
    "refutas",
    "wright",
    "pipeline",
    "log-ratio",
    "arrhenius",
];
const RULES: [&str; 5] = ["walther", "refutas", "pipeline", "log-ratio", "arrhenius"];

pub(super) const BLEND: Relation = Relation {
    name: "blend",
    group: GROUP,
    law: &WALTHER,
    with: &[
        must(
            "fractions",
            "list of shares, by volume (refutas: by mass), together 1",
        ),
        form(
            "nu",
            "list of viscosities, all at one temperature",
            "one temperature",
        ),
        form(
            "nu40",
            "list of viscosities at 40 degC",
            "two temperatures (wright: always)",
        ),
        form(
            "nu100",
            "list of viscosities at 100 degC",
            "two temperatures (wright: always)",
        ),
        may(
            "method",
            "walther, refutas, wright, pipeline, log-ratio or arrhenius",
            "walther",
        ),
    ],
    gives: &[
        ("nu", "viscosity of the blend at that temperature, mm2/s"),
        (
            "nu40",
            "viscosity of the blend at 40 degC, mm2/s, where two temperatures are given",
        ),
        (
            "nu100",
            "viscosity of the blend at 100 degC, mm2/s, where two temperatures are given",
        ),
    ],
    run: blend,
};

pub(super) const BLEND_FRACTION: Relation = Relation {
    name: "blend-fraction",
    group: GROUP,
    law: &FRACTION,
    with: &[
        must("nu_a", "viscosity of one component"),
        must("nu_b", "viscosity of the other, same temperature"),
        must("target", "viscosity wanted, same temperature"),
        may(
            "method",
            "walther, refutas, pipeline, log-ratio or arrhenius",
            "walther",
        ),
    ],
    gives: &[("fraction_a", "share of the first component")],
    run: fraction,
};

fn rule(method: &str) -> Option<Rule> {
    let found = Rule::WRITTEN.iter().find(|(word, _)| *word == method);
    found.map(|(_, rule)| *rule)
}

fn blend(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let fractions: Vec<Known<Ratio>> = args.list(w, "fractions", "share of a component")?;
    let method = args.choice("method", &METHODS, Some("walther"))?;
    let Some(rule) = rule(method) else {
        let nu40 = args.list(w, "nu40", "viscosity at 40 degC")?;
        let nu100 = args.list(w, "nu100", "viscosity at 100 degC")?;
        return blend_wright(w, &fractions, &nu40, &nu100);
    };
    let one = args.has("nu");
    let two = args.has("nu40") || args.has("nu100");
    if one == two {
        let words = "give either nu (all at one temperature) or nu40 and nu100";
        return Err(Refusal::new("input-missing", words));
    }
    let keys: &[&'static str] = if one { &["nu"] } else { &["nu40", "nu100"] };
    for key in keys {
        let nus = args.list(w, key, "viscosity of a component")?;
        let mixed = at_one_temperature(w, rule, &fractions, &nus)?;
        w.result(key, mixed, "mm2/s");
    }
    Ok(())
}

fn at_one_temperature(
    w: &mut Worked,
    rule: Rule,
    fractions: &[Known<Ratio>],
    nus: &[Known<KinematicViscosity>],
) -> Result<Known<KinematicViscosity>, Refusal> {
    let with = Both(named("x", fractions), named("nu", nus));
    let says = "viscosity of the blend";
    let mixed = w
        .trace
        .attempt("nu_mix", says, rule.law(), with, |(x, nu)| {
            rule.blend(&x, &nu)
        })?;
    apart(w, nus);
    Ok(mixed)
}

fn named<Q: Copy>(symbol: &'static str, known: &[Known<Q>]) -> Vec<(&'static str, Known<Q>)> {
    known.iter().map(|k| (symbol, *k)).collect()
}

/// Says when the components are so far apart that the rules part.
fn apart(w: &mut Worked, nus: &[Known<KinematicViscosity>]) {
    let nus = nus.iter().map(|n| n.value.base());
    let (least, most) = nus.fold((f64::MAX, 0.0_f64), |(a, b), n| (a.min(n), b.max(n)));
    let words = "components more than ten times apart in viscosity: blending rules differ by 10 % \
                 and more, blend a sample before relying on the figure";
    if most > 10.0 * least && !w.notes.iter().any(|n| n == words) {
        w.remark(words);
    }
}

fn blend_wright(
    w: &mut Worked,
    fractions: &[Known<Ratio>],
    nu40: &[Known<KinematicViscosity>],
    nu100: &[Known<KinematicViscosity>],
) -> Result<(), Refusal> {
    if nu40.len() != nu100.len() {
        let (fractions, components) = (nu100.len(), nu40.len());
        let words = format!("{components} viscosities at 40 degC, {fractions} at 100 degC");
        return Err(Refusal::new("fractions-count", words));
    }
    let with = Both(
        named("x", fractions),
        Both(named("nu40", nu40), named("nu100", nu100)),
    );
    let mix = |(x, (nu40, nu100)): (Vec<_>, (Vec<_>, Vec<_>))| {
        let lines = lines(&nu40, &nu100)?;
        wright(&x, &lines)
    };
    let line = w.trace.attempt_all(&WRIGHT, with, mix)?;
    let served = Served::take(w, &line);
    for (name, t_c) in [("nu40", 40.0), ("nu100", 100.0)] {
        let at = by_definition(w, t_c);
        let nu = on_line(w, &served, at)?;
        w.result(name, nu, "mm2/s");
    }
    apart(w, nu40);
    Ok(())
}

/// One line a component, all in the form that the thinnest needs.
fn lines(nu40: &[KinematicViscosity], nu100: &[KinematicViscosity]) -> Result<Vec<Line>, Misfit> {
    let points: Vec<[Point; 2]> = nu40
        .iter()
        .zip(nu100)
        .map(|(a, b)| {
            [
                Point::new(celsius(40.0), *a),
                Point::new(celsius(100.0), *b),
            ]
        })
        .collect();
    let form = Form::of(points.as_flattened());
    let fit = |pair: &[Point; 2]| Line::fit_as(pair, Weights::PerCent, form);
    points.iter().map(fit).collect()
}

fn fraction(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let a: Known<KinematicViscosity> = args.quantity(w, "nu_a", "one component")?;
    let b: Known<KinematicViscosity> = args.quantity(w, "nu_b", "the other component")?;
    let target: Known<KinematicViscosity> = args.quantity(w, "target", "viscosity wanted")?;
    let method = args.choice("method", &RULES, Some("walther"))?;
    let rule = rule(method).unwrap_or_default();
    let with = (("nu_a", a), ("nu_b", b), ("nu_target", target));
    let says = "share of the first component";
    let share = w.trace.attempt(
        "x_a",
        says,
        &FRACTION,
        with,
        |(a, b, target)| -> Result<_, BlendError> { rule.fraction(a, b, target) },
    )?;
    apart(w, &[a, b]);
    w.result("fraction_a", share, "");
    Ok(())
}
