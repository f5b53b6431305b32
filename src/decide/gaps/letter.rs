//! The gaps as questions in plain sentences, for a letter to the plant.

use super::effect::words;
use super::{Found, Missing, Place, PointGaps, Waits, Weight, figure};
use crate::demand::{Gap, GapKind};
use crate::quantity::Amount;
use crate::quantity::show::Units;
use crate::weighing::Scales;

/// One question.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Question {
    /// Address of the point.
    pub address: String,
    /// What the machine is called.
    pub title: Option<String>,
    /// The question with what was taken meanwhile, how it can be found out and what it decides.
    pub text: String,
}

/// The first so many gaps that decide anything, as questions.
pub fn questions(
    scales: &Scales<'_>,
    points: &[PointGaps<'_>],
    ranked: &[Place],
    most: usize,
) -> Vec<Question> {
    let telling = ranked.iter().filter(|p| {
        let found = &points[p.point].gaps[p.gap];
        found.weight != Weight::Nothing
    });
    let mut all: Vec<Question> = Vec::new();
    for place in telling {
        let of = &points[place.point];
        let found = &of.gaps[place.gap];
        let question = Question {
            address: of.weighed.point.address(),
            title: of.weighed.point.title.clone(),
            text: text(scales, of, found),
        };
        // one question may stand for several facts
        let asks = |text: &str| text.split(['?', '(']).next().map(str::to_owned);
        let same =
            |q: &Question| q.address == question.address && asks(&q.text) == asks(&question.text);
        if !all.iter().any(same) {
            all.push(question);
        }
        if all.len() == most {
            break;
        }
    }
    all
}

fn text(scales: &Scales<'_>, of: &PointGaps<'_>, found: &Found) -> String {
    let mut sentences = match &found.missing {
        Missing::Input(gap) => input(gap, scales.units),
        Missing::Fact { says, question, .. } => vec![fact(says, question)],
    };
    sentences.push(decides(scales, of, found));
    sentences.join(" ")
}

fn fact(says: &str, question: &str) -> String {
    let question = capital(question);
    let question = if question.ends_with(['?', '.']) {
        question
    } else {
        format!("{question}?")
    };
    format!("{question} (Not stated: {says}.)")
}

fn input(gap: &Gap, units: Units) -> Vec<String> {
    let what = asked(&gap.key);
    let of = gap.about.as_ref().map_or(String::new(), |about| {
        let part = about.contains(' ');
        format!(" of {}{about}", if part { "the " } else { "" })
    });
    let mut all = vec![format!("What is {what}{of}?")];
    let show = |a: Amount| figure(gap, a, units);
    match &gap.kind {
        GapKind::Range(lo, hi) => all.push(format!(
            "Until we know, anything from {} to {} is taken as possible.",
            show(*lo),
            show(*hi)
        )),
        GapKind::Assumed { taken, lo, hi } => all.push(format!(
            "We have taken {}; {} to {} would be plausible.",
            show(*taken),
            show(*lo),
            show(*hi)
        )),
        GapKind::Word { taken, among } => all.push(format!(
            "We have taken {taken}; {} would be plausible.",
            among.join(", ")
        )),
        GapKind::Missing | GapKind::Fact => {}
    }
    match &gap.ask {
        Some(ask) => all.push(format!("To ask: {ask}.")),
        None => all.push(format!("How to find out: {}.", gap.how)),
    }
    all
}

/// The thing a key asks for, as one says it.
fn asked(key: &str) -> String {
    match key {
        "sump rise" => "the rise of the oil over the ambient at running load".to_owned(),
        "sump" => "the oil temperature at running load".to_owned(),
        "ambient" => "the coldest and the hottest ambient there".to_owned(),
        "part rise" => "the rise over the oil".to_owned(),
        "start" => "the oil temperature at the coldest start".to_owned(),
        "heater" => "the setting of the sump heater".to_owned(),
        "base" => "the base stock".to_owned(),
        super::oils::SHEAR_LOSS => "the permanent shear loss".to_owned(),
        other => format!("the {other}"),
    }
}

fn decides(scales: &Scales<'_>, of: &PointGaps<'_>, found: &Found) -> String {
    let id = |oil: usize| scales.site.oils[oil].id.as_str();
    let lead = super::lead(&of.weighed).map_or("the oil", |c| id(c.oil));
    match (&found.effect, found.weight) {
        (Some(e), Weight::Oil) => {
            let names: Vec<&str> = e
                .proposed
                .iter()
                .map(|o| o.map_or("none of the list", id))
                .collect();
            format!("It decides which oil: {}.", names.join(" or "))
        }
        (Some(e), Weight::Verdict) => {
            let (oil, verdicts) = match of.weighed.in_use() {
                Some(now) if e.verdicts.len() < 2 => (id(now.oil), &e.in_use),
                _ => (lead, &e.verdicts),
            };
            format!("It decides whether {oil} {}.", words(verdicts))
        }
        (_, Weight::Condition) => "A condition on the oil stands until it is known.".to_owned(),
        (None, Weight::Verdict) => "Without it there is no verdict.".to_owned(),
        (None, Weight::Margin) if found.waits == Some(Waits::Limit) => {
            "A further limit is not worked out without it.".to_owned()
        }
        _ => "It moves the margin by more than the reserve.".to_owned(),
    }
}

fn capital(text: &str) -> String {
    let mut letters = text.trim().chars();
    letters.next().map_or_else(String::new, |first| {
        first.to_uppercase().chain(letters).collect()
    })
}
