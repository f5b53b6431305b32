//! Thrust pads.

use super::steps::Recorded;
use super::{GROUP, form, may, must};
use crate::quantity::convert::number;
use crate::quantity::{DynamicViscosity, Force, Length, Measure, Pressure, Ratio, Velocity};
use crate::relation::Law;
use crate::relation::thrust::limits::{self, Size};
use crate::relation::thrust::pad::{self, Film, Pad};
use crate::relation::thrust::shape::{self, NoPad, Shape};
use crate::relation::thrust::{series, slider};
use crate::trace::{Known, Recorder};
use crate::work::{Args, Refusal, Relation, Worked};

pub(super) const THRUST_PAD: Relation = Relation {
    name: "thrust-pad",
    group: GROUP,
    law: &pad::LAW,
    with: &[
        must("length", "length of the pad in the direction of motion"),
        must("width", "width of the pad across the motion"),
        must("speed", "sliding speed at the middle of the width"),
        must("load", "load on one pad"),
        form("eta", "dynamic viscosity of the film", "film wanted"),
        form("h_out", "film wanted at the outlet", "viscosity wanted"),
        form("ratio", "inlet over outlet film, or best", "ratio known"),
        form(
            "pivot",
            "from the inlet over the length: 0.6",
            "tilting pad",
        ),
        form("taper", "inlet less outlet film: 40 um", "fixed pad"),
    ],
    gives: &[
        ("h_out", "film at the outlet, the least, um"),
        ("w_star", "load number W*"),
        ("friction", "friction coefficient"),
        ("ratio", "inlet over outlet film"),
        ("f_star", "friction number F*"),
        (
            "centre",
            "centre of pressure from the inlet over the length",
        ),
        ("power", "friction power of the pad, W"),
        ("flow", "oil drawn in, L/min"),
        ("peak_pressure", "highest film pressure, MPa"),
        ("pressure", "mean pressure, MPa"),
        ("eta", "viscosity needed, mPa.s, where h_out is given"),
    ],
    run: thrust_pad,
};

pub(super) const THRUST_SLIDER: Relation = Relation {
    name: "thrust-slider",
    group: GROUP,
    law: &slider::LAW,
    with: &[
        form("ratio", "inlet over outlet film, or best", "ratio known"),
        form(
            "pivot",
            "from the inlet over the length: 0.6",
            "pivot known",
        ),
        may("width_over_length", "0.1 to 10", "infinitely wide"),
    ],
    gives: &[
        ("ratio", "inlet over outlet film"),
        ("w_star", "load number W*"),
        ("f_star", "friction number F*"),
        ("q_star", "oil drawn in, over U h_out L"),
        (
            "centre",
            "centre of pressure from the inlet over the length",
        ),
        ("p_star", "highest pressure, over eta U B/h_out^2"),
        ("side_factor", "load over that of the infinitely wide pad"),
    ],
    run: thrust_slider,
};

static MEAN_PRESSURE: Law = Law {
    name: "thrust-mean-pressure",
    title: "mean pressure of a thrust pad",
    formula: "p = W/(B L)",
    range: "any pad; usual is 1.5 to 4 MPa on white metal",
    source: "definition; usual values common practice",
};

static SIDE: Law = Law {
    name: "thrust-side-factor",
    title: "load of a pad over that of an infinitely wide one",
    formula: "W*(m, L/B)/W*(m)",
    range: "as for the pad",
    source: "Reynolds equation solved by the program",
};

/// How the film narrows, as written: a ratio, a pivot or a taper.
enum Written {
    Ratio(Option<Known<Ratio>>),
    Pivot(Known<Ratio>),
    Taper(Known<Length>),
}

impl Written {
    fn read(args: &mut Args, w: &mut Worked, tapers: bool) -> Result<Self, Refusal> {
        let keys: &[&str] = if tapers {
            &["ratio", "pivot", "taper"]
        } else {
            &["ratio", "pivot"]
        };
        let given: Vec<&str> = keys.iter().copied().filter(|k| args.has(k)).collect();
        match given[..] {
            ["ratio"] => {
                let text = args.text("ratio", "best")?;
                if text.eq_ignore_ascii_case("best") {
                    return Ok(Self::Ratio(None));
                }
                args.quantity(w, "ratio", "inlet over outlet film")
                    .map(|known| Self::Ratio(Some(known)))
            }
            ["pivot"] => args
                .quantity(w, "pivot", "pivot from the inlet, over the length")
                .map(Self::Pivot),
            ["taper"] => args
                .quantity(w, "taper", "inlet less outlet film")
                .map(Self::Taper),
            [] => Err(Refusal::new(
                "input-missing",
                format!(
                    "ratio is missing; write ratio=2.2 or ratio=best (or give {})",
                    keys[1..].join(", ")
                ),
            )),
            _ => Err(Refusal::new(
                "shape-twice",
                format!(
                    "{} all say how the film narrows; give one",
                    given.join(", ")
                ),
            )),
        }
    }

    /// The shape; a taper is one only together with the film at the outlet.
    fn shape(&self, h_out: Option<Length>) -> Option<Shape> {
        match (self, h_out) {
            (Self::Ratio(None), _) => Some(Shape::Best),
            (Self::Ratio(Some(ratio)), _) => Some(Shape::Ratio(ratio.value)),
            (Self::Pivot(pivot), _) => Some(Shape::Pivot(pivot.value)),
            (Self::Taper(taper), Some(h)) => {
                let ratio = number(1.0 + taper.value.base() / h.base());
                Some(Shape::Ratio(ratio))
            }
            (Self::Taper(_), None) => None,
        }
    }

    fn recorded(&self) -> Recorded {
        Recorded(match self {
            Self::Ratio(None) => Vec::new(),
            Self::Ratio(Some(ratio)) => vec![("m", ratio.step)],
            Self::Pivot(pivot) => vec![("pivot", pivot.step)],
            Self::Taper(taper) => vec![("taper", taper.step)],
        })
    }
}

/// A pad as asked.
struct Asked {
    pad: Pad,
    written: Written,
    read: Recorded,
    mean: Known<Pressure>,
}

impl Asked {
    fn read(args: &mut Args, w: &mut Worked) -> Result<Self, Refusal> {
        let length: Known<Length> = args.quantity(w, "length", "length of the pad")?;
        let width: Known<Length> = args.quantity(w, "width", "width of the pad")?;
        let speed: Known<Velocity> = args.quantity(w, "speed", "sliding speed")?;
        let load: Known<Force> = args.quantity(w, "load", "load on one pad")?;
        let pad = Pad::new(length.value, width.value, load.value, speed.value)?;
        let written = Written::read(args, w, true)?;
        let mut read = written.recorded();
        read.0.extend([
            ("B", length.step),
            ("L", width.step),
            ("U", speed.step),
            ("W", load.step),
        ]);
        let with = (("W", load), ("B", length), ("L", width));
        let mean = w
            .trace
            .law("p", "mean pressure", &MEAN_PRESSURE, with, |_| {
                pad.mean_pressure()
            });
        Ok(Self {
            pad,
            written,
            read,
            mean,
        })
    }
}

fn thrust_pad(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let asked = Asked::read(args, w)?;
    let h_out: Option<Known<Length>> = args.maybe(w, "h_out", "film wanted at the outlet")?;
    let eta: Option<Known<DynamicViscosity>> = args.maybe(w, "eta", "dynamic viscosity")?;
    match (eta, h_out) {
        (Some(eta), None) => {
            let film = film(&asked, eta.value)?;
            stated(w, &asked, eta, film);
        }
        (None, Some(h_out)) => {
            let eta = needed(w, &asked, h_out)?;
            let shape = asked.written.shape(Some(h_out.value));
            let film = asked.pad.film(shape.unwrap_or(Shape::Best), eta.value)?;
            stated(w, &asked, eta, film);
            w.result("eta", eta, "mPa.s");
        }
        (Some(_), Some(_)) => {
            let words = "eta gives the film, h_out the viscosity it needs; give one of them";
            return Err(Refusal::new("eta-and-film", words));
        }
        (None, None) => {
            let words = "eta is missing; write eta=\"30 mPa.s\", or h_out=\"30 um\" for the \
                         viscosity that film needs";
            return Err(Refusal::new("input-missing", words));
        }
    }
    Ok(())
}

/// The film at a viscosity; without a film at the outlet only a taper has no shape.
fn film(asked: &Asked, eta: DynamicViscosity) -> Result<Film, NoPad> {
    match (asked.written.shape(None), &asked.written) {
        (None, Written::Taper(taper)) => asked.pad.tapered(taper.value, eta),
        (shape, _) => asked.pad.film(shape.unwrap_or(Shape::Best), eta),
    }
}

fn needed(
    w: &mut Worked,
    asked: &Asked,
    h_out: Known<Length>,
) -> Result<Known<DynamicViscosity>, NoPad> {
    let mut read = asked.read.clone();
    read.0.push(("h_out", h_out.step));
    let shape = asked.written.shape(Some(h_out.value));
    let says = "viscosity needed";
    w.trace.attempt("eta", says, &pad::VISCOSITY, read, |()| {
        asked
            .pad
            .viscosity(shape.unwrap_or(Shape::Best), h_out.value)
    })
}

fn stated(w: &mut Worked, asked: &Asked, eta: Known<DynamicViscosity>, film: Film) {
    let mut read = asked.read.clone();
    read.0.push(("eta", eta.step));
    let law = match asked.written {
        Written::Taper(_) => &pad::TAPER,
        _ => &pad::LAW,
    };
    let outcome = w.trace.apply(law, read, |()| film);
    let trace = &mut w.trace;
    let h_out = trace.take(&outcome, "h_out", "film at the outlet", |f| f.h_out);
    let load = trace.take(&outcome, "W*", "load number", |f| f.numbers.load);
    let friction = trace.take(&outcome, "f", "friction coefficient", |f| f.friction);
    let ratio = trace.take(&outcome, "m", "inlet over outlet film", |f| f.ratio);
    let drag = trace.take(&outcome, "F*", "friction number", |f| f.numbers.friction);
    let says = "centre of pressure from the inlet";
    let centre = trace.take(&outcome, "x_c", says, |f| f.numbers.centre);
    let power = trace.take(&outcome, "P_f", "friction power", |f| f.power);
    let flow = trace.take(&outcome, "Q", "oil drawn in", |f| f.flow);
    let peak = trace.take(&outcome, "p_max", "highest pressure", |f| f.peak);
    w.result("h_out", h_out, "um");
    w.result("w_star", load, "");
    w.result("friction", friction, "");
    w.result("ratio", ratio, "");
    w.result("f_star", drag, "");
    w.result("centre", centre, "");
    w.result("power", power, "W");
    w.result("flow", flow, "L/min");
    w.result("peak_pressure", peak, "MPa");
    w.result("pressure", asked.mean, "MPa");
    if asked.mean.value.base() > limits::mean_pressure().base() {
        w.remark("mean pressure above 4 MPa, more than white-metal pads usually carry");
    }
    if h_out.value.base() < limits::least_film(Size::Small).base() {
        w.remark("film under 10 um, less than even small pads usually run with");
    }
}

/// The pad's shape alone, infinitely wide where no width is given.
fn thrust_slider(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let written = Written::read(args, w, false)?;
    let aspect: Option<Known<Ratio>> = args.maybe(w, "width_over_length", "width over length")?;
    let shape = written.shape(None).unwrap_or(Shape::Best);
    let (ratio, numbers) = shape::shaped(shape, aspect.map(|a| a.value))?;
    let mut read = written.recorded();
    let law = match aspect {
        Some(aspect) => {
            read.0.push(("L/B", aspect.step));
            &series::LAW
        }
        None => &slider::LAW,
    };
    let outcome = w.trace.apply(law, read, |()| numbers);
    let t = &mut w.trace;
    let m = t.take(&outcome, "m", "inlet over outlet film", |_| ratio);
    let load = t.take(&outcome, "W*", "load number", |s| s.load);
    let drag = t.take(&outcome, "F*", "friction number", |s| s.friction);
    let flow = t.take(&outcome, "q*", "oil drawn in, over U h_out L", |s| s.flow);
    let says = "centre of pressure from the inlet";
    let centre = t.take(&outcome, "x_c", says, |s| s.centre);
    let peak = t.take(&outcome, "p*", "highest pressure number", |s| s.peak);
    w.result("ratio", m, "");
    w.result("w_star", load, "");
    w.result("f_star", drag, "");
    w.result("q_star", flow, "");
    w.result("centre", centre, "");
    w.result("p_star", peak, "");
    if aspect.is_some() {
        let with = (("m", m), ("W*", load));
        let says = "load over that of the infinitely wide pad";
        let side = w.trace.law("side", says, &SIDE, with, |(m, load)| {
            let endless = slider::slider(m).map_or(f64::NAN, |s| s.load.base());
            number(load.base() / endless)
        });
        w.result("side_factor", side, "");
    }
    Ok(())
}
