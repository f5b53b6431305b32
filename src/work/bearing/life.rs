//! `bearing-contamination`, `bearing-life-factor`, `bearing-life` and `bearing-fatigue-limit`.

use super::GROUP;
use super::size::{BORE, CLASS, DESIGNATION, OUTSIDE, PITCH, class, pitch, yes};
use crate::quantity::{Length, Measure, Ratio};
use crate::relation::bearing::class::RatingClass;
use crate::relation::bearing::contamination::{
    self, CONTAMINATION_FACTOR, Code, GreaseCleanliness, Method, Row, grease_row, oil_row,
};
use crate::relation::bearing::life::{self, BASIC, MODIFIED};
use crate::relation::bearing::life_factor::{self, FATIGUE_STRESS};
use crate::relation::bearing::reference_viscosity::LARGEST_KAPPA;
use crate::trace::{Known, Recorder};
use crate::work::contact::{default_number, form, may, must};
use crate::work::{Args, Refusal, Relation, Worked};

pub(super) const CONTAMINATION: Relation = Relation {
    name: "bearing-contamination",
    group: GROUP,
    law: &CONTAMINATION_FACTOR,
    with: &[
        must(
            "method",
            "online-filter, oil-bath (also for a filter beside the main flow) or grease",
        ),
        must(
            "cleanliness",
            "ISO 4406 code, -/15/12; for grease high, normal, slight, severe or very-severe",
        ),
        must("kappa", "viscosity ratio"),
        PITCH,
        BORE,
        OUTSIDE,
        DESIGNATION,
    ],
    gives: &[("e_c", "contamination factor, 0 to 1")],
    run: run_contamination,
};

fn run_contamination(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let kappa = args.quantity(worked, "kappa", "viscosity ratio")?;
    let pitch = pitch(args, worked)?;
    let row = row(args, pitch.value)?;
    let inputs = (("kappa", kappa), ("Dpw", pitch));
    let says = "contamination factor";
    let law = &CONTAMINATION_FACTOR;
    let e_c = worked.trace.attempt("e_C", says, law, inputs, |(k, d)| {
        contamination::factor(row, k, d)
    })?;
    worked.result("e_c", e_c, "");
    Ok(())
}

fn row(args: &mut Args, pitch: Length) -> Result<Row, Refusal> {
    let methods = ["online-filter", "oil-bath", "offline-filter", "grease"];
    let method = match args.choice("method", &methods, None)? {
        "grease" => {
            let words: Vec<&'static str> =
                GreaseCleanliness::WORDS.iter().map(|(w, _)| *w).collect();
            let word = args.choice("cleanliness", &words, None)?;
            let found = GreaseCleanliness::WORDS.iter().find(|(w, _)| *w == word);
            let level = found.map(|(_, c)| *c).expect("one of the list");
            return Ok(grease_row(level, pitch));
        }
        "online-filter" => Method::OnlineFilter,
        _ => Method::OilBath,
    };
    let text = args.text("cleanliness", "\"-/15/12\"")?;
    let code = Code::read(&text).ok_or_else(|| {
        let words =
            format!("cleanliness: `{text}` is no ISO 4406 code; write cleanliness=\"-/15/12\"");
        Refusal::new("cleanliness-malformed", words)
    })?;
    Ok(oil_row(method, code)?)
}

pub(super) const LIFE_FACTOR: Relation = Relation {
    name: "bearing-life-factor",
    group: GROUP,
    law: &life_factor::LIFE_FACTOR,
    with: &[
        CLASS,
        must("kappa", "viscosity ratio, 0.1 and more"),
        form("e_c", "contamination factor, 0 to 1", "loads"),
        form("c_u", "fatigue load limit, 9 kN", "loads"),
        form("p", "equivalent load, 30 kN", "loads"),
        form("x", "e_c c_u / p", "ratio"),
        may(
            "ep",
            "yes where the oil holds an effective EP additive; needs e_c",
            "no",
        ),
    ],
    gives: &[("a_iso", "life modification factor")],
    run: run_life_factor,
};

fn run_life_factor(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let class = class(args)?;
    let kappa: Known<Ratio> = args.quantity(worked, "kappa", "viscosity ratio")?;
    let ep = yes(args, "ep")?;
    let e_c: Option<Known<Ratio>> = args.maybe(worked, "e_c", "contamination factor")?;
    let x = match (args.maybe(worked, "x", "e_C C_u / P")?, e_c) {
        (Some(x), _) => x,
        (None, Some(e_c)) => fatigue_ratio(args, worked, e_c)?,
        (None, None) => {
            let words = "x is missing; write x=0.2, or e_c, c_u and p";
            return Err(Refusal::new("input-missing", words));
        }
    };
    let law = &life_factor::LIFE_FACTOR;
    let says = "life modification factor";
    let a_iso = match (ep, e_c) {
        (true, None) => {
            let words =
                "e_c is missing; whether an EP additive counts depends on it; write e_c=0.5";
            return Err(Refusal::new("input-missing", words));
        }
        (true, Some(e_c)) => {
            let inputs = (("kappa", kappa), ("x", x), ("e_C", e_c));
            worked
                .trace
                .attempt("a_iso", says, law, inputs, |(kappa, x, e_c)| {
                    life_factor::life_factor_with_ep(class, kappa, x, e_c)
                })?
        }
        (false, _) => {
            let inputs = (("kappa", kappa), ("x", x));
            worked
                .trace
                .attempt("a_iso", says, law, inputs, |(kappa, x)| {
                    life_factor::life_factor(class, kappa, x)
                })?
        }
    };
    worked.result("a_iso", a_iso, "");
    if kappa.value.base() > LARGEST_KAPPA {
        worked.remark("kappa above 4 counts as 4");
    }
    if a_iso.value.base() >= life_factor::LARGEST {
        worked.remark("the factor ends at 50");
    }
    Ok(())
}

fn fatigue_ratio(
    args: &mut Args,
    worked: &mut Worked,
    e_c: Known<Ratio>,
) -> Result<Known<Ratio>, Refusal> {
    let c_u = args.quantity(worked, "c_u", "fatigue load limit")?;
    let p = args.quantity(worked, "p", "equivalent load")?;
    let inputs = (("e_C", e_c), ("C_u", c_u), ("P", p));
    let says = "e_C C_u / P";
    let x = worked
        .trace
        .attempt("x", says, &FATIGUE_STRESS, inputs, |(e_c, c_u, p)| {
            life_factor::fatigue_ratio(e_c, c_u, p)
        })?;
    Ok(x)
}

pub(super) const LIFE: Relation = Relation {
    name: "bearing-life",
    group: GROUP,
    law: &BASIC,
    with: &[
        CLASS,
        must("c", "dynamic load rating, 212 kN"),
        must("p", "equivalent load, 32 kN"),
        must("speed", "speed, 985 r/min"),
        may("a1", "life factor for reliability", "1, 90 %"),
        form(
            "reliability",
            "reliability of the table, 99 %",
            "instead of a1",
        ),
        may("a_iso", "life modification factor", "1"),
    ],
    gives: &[
        ("l10h", "basic rating life, h"),
        ("lnmh", "modified rating life, h"),
    ],
    run: run_life,
};

fn run_life(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let class: RatingClass = class(args)?;
    let c = args.quantity(worked, "c", "dynamic load rating")?;
    let p = args.quantity(worked, "p", "equivalent load")?;
    let n = args.quantity(worked, "speed", "speed")?;
    let a1 = reliability(args, worked)?;
    let a_iso = args.maybe(worked, "a_iso", "life modification factor")?;
    let a_iso = a_iso.unwrap_or_else(|| {
        let (says, why) = ("life modification factor", "none given");
        default_number(worked, "a_iso", says, 1.0, why)
    });
    let inputs = (("C", c), ("P", p), ("n", n));
    let says = "basic rating life";
    let basic = worked
        .trace
        .attempt("L10h", says, &BASIC, inputs, |(c, p, n)| {
            life::basic(class, c, p, n)
        })?;
    let inputs = (("a1", a1), ("a_iso", a_iso), ("L10h", basic));
    let says = "modified rating life";
    let modified = worked
        .trace
        .attempt("Lnmh", says, &MODIFIED, inputs, |(a1, a, l)| {
            life::modified(l, a1, a)
        })?;
    worked.result("l10h", basic, "h");
    worked.result("lnmh", modified, "h");
    Ok(())
}

fn reliability(args: &mut Args, worked: &mut Worked) -> Result<Known<Ratio>, Refusal> {
    if let Some(a1) = args.maybe(worked, "a1", "life factor for reliability")? {
        return Ok(a1);
    }
    let Some(wanted) = args.maybe::<Ratio>(worked, "reliability", "reliability")? else {
        let (says, why) = ("life factor for reliability", "90 % reliability");
        return Ok(default_number(worked, "a1", says, 1.0, why));
    };
    let a1 = life::reliability_factor(wanted.value).ok_or_else(|| {
        let steps: Vec<String> = life::RELIABILITY
            .iter()
            .map(|(p, _)| p.to_string())
            .collect();
        let words = format!("reliability is one of {} %", steps.join(", "));
        Refusal::new("out-of-range", words)
    })?;
    let why = "of the table of ISO 281:2007 for that reliability";
    let says = "life factor for reliability";
    Ok(worked.trace.assume("a1", says, a1, why))
}

pub(super) const FATIGUE_LIMIT: Relation = Relation {
    name: "bearing-fatigue-limit",
    group: GROUP,
    law: &life::FATIGUE_LIMIT,
    with: &[
        CLASS,
        must("c0", "static load rating, 220 kN"),
        PITCH,
        BORE,
        OUTSIDE,
        DESIGNATION,
    ],
    gives: &[("c_u", "fatigue load limit, N")],
    run: run_fatigue_limit,
};

fn run_fatigue_limit(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let class = class(args)?;
    let c0 = args.quantity(worked, "c0", "static load rating")?;
    let pitch = pitch(args, worked)?;
    let inputs = (("C0", c0), ("Dpw", pitch));
    let says = "fatigue load limit, estimated";
    let law = &life::FATIGUE_LIMIT;
    let c_u = worked.trace.attempt("C_u", says, law, inputs, |(c0, d)| {
        life::fatigue_limit(class, c0, d)
    })?;
    worked.result("c_u", c_u, "N");
    Ok(())
}
