//! `film-thermal` and `film-starved`.

use super::GROUP;
use super::hertz::{E1, E2, MODULUS, POISSON1, POISSON2};
use super::known::SPEED;
use crate::quantity::{Measure, Pressure, Ratio, TemperatureCoefficient};
use crate::relation::film::starvation::{self, Films, FloodedDistance};
use crate::relation::film::thermal;
use crate::trace::{Known, Recorder};
use crate::work::contact::{default_number, may, modulus, must};
use crate::work::{Args, Refusal, Relation, Worked};

pub(super) const THERMAL: Relation = Relation {
    name: "film-thermal",
    group: GROUP,
    law: &thermal::GUPTA,
    with: &[
        must("beta", "temperature coefficient of viscosity, 0.04 1/K"),
        must("eta", "dynamic viscosity at the inlet, 30 mPa.s"),
        SPEED,
        may(
            "k_f",
            "thermal conductivity of the oil",
            "0.14 W/(m.K), mineral oil",
        ),
        may("slide_roll", "2 |u1 - u2| / (u1 + u2)", "0, pure rolling"),
        must("p_max", "largest pressure, 1200 MPa"),
        MODULUS,
        E1,
        POISSON1,
        E2,
        POISSON2,
    ],
    gives: &[
        ("L", "thermal loading parameter"),
        (
            "phi_gupta",
            "film factor with sliding and pressure; left out where it is not positive",
        ),
        ("phi_murch_wilson", "film factor, pure rolling"),
    ],
    run: run_thermal,
};

fn run_thermal(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let says = "temperature coefficient of viscosity";
    let beta: Known<TemperatureCoefficient> = args.quantity(worked, "beta", says)?;
    let eta = args.quantity(worked, "eta", "dynamic viscosity at the inlet")?;
    let speed = args.quantity(worked, "speed", "mean rolling speed")?;
    let k_f = args.maybe(worked, "k_f", "thermal conductivity of the oil")?;
    let k_f = k_f.unwrap_or_else(|| {
        let (says, why) = ("thermal conductivity of the oil", "mineral oil");
        let value = Measure::from_base(0.14);
        worked.trace.assume("k_f", says, value, why)
    });
    let slide = args.maybe(worked, "slide_roll", "slide to roll ratio")?;
    let slide =
        slide.unwrap_or_else(|| default_number(worked, "S", "slide to roll", 0.0, "pure rolling"));
    let p_max: Known<Pressure> = args.quantity(worked, "p_max", "largest pressure")?;
    let e = modulus(args, worked)?;

    let inputs = (("beta", beta), ("eta", eta), ("u", speed), ("k_f", k_f));
    let law = &thermal::PARAMETER;
    let says = "thermal loading parameter";
    let l = worked
        .trace
        .attempt("L", says, law, inputs, |(b, n, u, k)| {
            thermal::parameter(b, n, u, k)
        })?;
    worked.result("L", l, "");
    gupta(worked, l, slide, (p_max, e));
    let says = "film factor, pure rolling";
    let law = &thermal::MURCH_WILSON;
    let rolling = worked.trace.law("phi_T", says, law, (("L", l),), |(l,)| {
        thermal::murch_wilson(l)
    });
    worked.result("phi_murch_wilson", rolling, "");
    Ok(())
}

/// Gupta's factor, or a remark where it has none to give.
fn gupta(
    worked: &mut Worked,
    l: Known<Ratio>,
    slide: Known<Ratio>,
    (p_max, e): (Known<Pressure>, Known<Pressure>),
) {
    let inputs = (("L", l), ("S", slide), ("p_max", p_max), ("E'", e));
    let says = "film factor with sliding and pressure";
    let law = &thermal::GUPTA;
    match worked
        .trace
        .attempt("phi_T", says, law, inputs, |(l, s, p, e)| {
            thermal::gupta(l, s, p, e)
        }) {
        Ok(factor) => {
            worked.result("phi_gupta", factor, "");
            if l.value.base() > thermal::GUPTA_LARGEST {
                worked.remark(
                    "beyond the range of the factor with sliding and pressure: L is above 25",
                );
            }
        }
        Err(outside) => worked.remark(format!("no factor with sliding and pressure: {outside}")),
    }
}

pub(super) const STARVED: Relation = Relation {
    name: "film-starved",
    group: GROUP,
    law: &starvation::STARVED,
    with: &[
        must("h_central", "central film of the flooded contact, 0.6 um"),
        must("h_min", "its minimum film, 0.45 um"),
        must("rx", "reduced radius in the rolling direction, 10 mm"),
        must(
            "b",
            "semi-axis of the contact in the rolling direction, 0.2 mm",
        ),
        must(
            "m",
            "distance of the oil's meniscus from the centre, in semi-axes, 1.5",
        ),
    ],
    gives: &[
        ("h_central", "central film left, um"),
        ("h_min", "minimum film left, um"),
        ("m_central", "distance that floods the central film"),
        ("m_min", "distance that floods the minimum film"),
    ],
    run: run_starved,
};

fn run_starved(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let says = "central film of the flooded contact";
    let central = args.quantity(worked, "h_central", says)?;
    let minimum = args.quantity(worked, "h_min", "minimum film of the flooded contact")?;
    let rx = args.quantity(worked, "rx", "reduced radius in the rolling direction")?;
    let b = args.quantity(worked, "b", "semi-axis in the rolling direction")?;
    let m = args.quantity(worked, "m", "distance of the meniscus, in semi-axes")?;
    let inputs = (("h_c0", central), ("h_min0", minimum), ("Rx", rx), ("b", b));
    let law = &starvation::FLOODED;
    let distance = worked
        .trace
        .attempt_all(law, inputs, |(central, minimum, rx, b)| {
            starvation::flooded_distance(Films { central, minimum }, rx, b)
        })?;
    let says = "distance that floods the central film";
    let m_c = worked.trace.take(&distance, "m_c", says, |d| d.central);
    let says = "distance that floods the minimum film";
    let m_min = worked.trace.take(&distance, "m_min", says, |d| d.minimum);
    let inputs = (
        ("h_c0", central),
        ("h_min0", minimum),
        ("m_c", m_c),
        ("m_min", m_min),
        ("m", m),
    );
    let law = &starvation::STARVED;
    let left = worked
        .trace
        .attempt_all(law, inputs, |(central, minimum, m_c, m_min, m)| {
            let distance = FloodedDistance {
                central: m_c,
                minimum: m_min,
            };
            starvation::starved(Films { central, minimum }, distance, m)
        })?;
    let trace = &mut worked.trace;
    let h_c = trace.take(&left, "h_c", "central film left", |f| f.central);
    let h_min = trace.take(&left, "h_min", "minimum film left", |f| f.minimum);
    worked.result("h_central", h_c, "um");
    worked.result("h_min", h_min, "um");
    worked.result("m_central", m_c, "");
    worked.result("m_min", m_min, "");
    if m.value >= m_c.value && m.value >= m_min.value {
        worked.remark("the contact is flooded");
    }
    Ok(())
}
