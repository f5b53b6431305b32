//! The answer in words: first the oil and the word, then the limit, the amount and the end.

use super::case::{Case, Now, asks, compared, mark};
use super::say;
use crate::demand::End;
use crate::judge::Verdict;
use crate::judge::weigh::Margin;
use crate::quantity::Measure;
use crate::quantity::show::{Toward, Units, fixed};
use crate::report::model::{Answer, Mark, Phrase};
use crate::weighing::Candidate;

/// The answer of a point.
pub(super) fn answer(case: &Case<'_, '_>) -> Answer {
    let mut sentences = Vec::new();
    if let Some(lead) = case.lead {
        of_lead(case, lead, &mut sentences);
    }
    if let Some(says) = of_now(case) {
        sentences.push(says);
    }
    if let Some(lead) = case.lead.filter(|_| case.proposed) {
        sentences.extend(of_band(case, lead));
    }
    Answer {
        mark: case.lead.map(|c| mark(c.judgement.verdict)),
        headline: headline(case),
        sentences,
    }
}

/// The answer in one line.
pub(super) fn headline(case: &Case<'_, '_>) -> String {
    let Some(lead) = case.lead else {
        return without_candidate(case);
    };
    let id = case.id(lead.oil);
    match lead.judgement.verdict {
        Verdict::Holds | Verdict::Tight if case.proposed => {
            let act = match (lead.in_use, case.grease()) {
                (true, _) => "Keep",
                (false, true) => "Grease with",
                (false, false) => "Fill with",
            };
            format!(
                "{act} {id}. It {}{}.",
                word(case, lead),
                on_conditions(lead)
            )
        }
        Verdict::Open => format!("Not decided: {id} is open."),
        _ => match case.w.candidates.len() {
            1 => format!("The only oil weighed, {id}, fails."),
            n => format!("None of the {} oils weighed holds.", say::number(n)),
        },
    }
}

fn word(case: &Case<'_, '_>, lead: &Candidate) -> String {
    match (lead.judgement.verdict, case.accepted) {
        (Verdict::Tight, Some(by)) if lead.in_use => {
            let name = by
                .by
                .as_ref()
                .map_or(String::new(), |by| format!(" by {by}"));
            format!("is tight, accepted{name}")
        }
        (Verdict::Holds, _) => "holds".to_owned(),
        (other, _) => format!("is {}", other.word()),
    }
}

/// `, on two conditions`; nothing where there is none.
pub(super) fn on_conditions(c: &Candidate) -> String {
    match c.conditions.len() {
        0 => String::new(),
        n => format!(", on {}", say::count(n, "condition", "conditions")),
    }
}

fn without_candidate(case: &Case<'_, '_>) -> String {
    let kind = if case.grease() { "grease" } else { "oil" };
    match case.w.barred.len() {
        0 => format!("There is no {kind} on the list to weigh."),
        1 => format!("The only {kind} on the list is barred here."),
        n => format!(
            "Each of the {} {kind}s on the list is barred here.",
            say::number(n)
        ),
    }
}

fn of_lead(case: &Case<'_, '_>, lead: &Candidate, out: &mut Vec<Phrase>) {
    let j = &lead.judgement;
    match j.verdict {
        Verdict::Holds => out.push(ends(case, lead)),
        Verdict::Tight => {
            out.push(ends(case, lead));
            out.extend(why_tight(lead, case.units()));
        }
        Verdict::Open => {
            for why in lead.because.iter().take(3) {
                out.push(say::stopped(&say::sentence(&say::told(why, case.units()))).into());
            }
        }
        Verdict::Fails => {
            let near = Phrase::new().and("Nearest is ").tag(case.id(lead.oil));
            let why = lead.because.first().map_or("", String::as_str);
            out.push(near.and(say::stopped(&format!(": {}", say::told(why, case.units())))));
            let barred = case.w.barred.len();
            if barred > 0 {
                let n = say::count(barred, "more oil is", "more oils are");
                out.push(format!("{} barred by a rule.", say::sentence(&n)).into());
            }
        }
    }
}

/// Why it is tight: the margins are told already, the reserve and whatever else is not.
fn why_tight(lead: &Candidate, units: Units) -> Vec<Phrase> {
    let told = |b: &&String| b.starts_with("hot margin ") || b.starts_with("cold margin ");
    let mut says: Vec<Phrase> = Vec::new();
    if lead.because.iter().any(|b| told(&b)) {
        let reserve = fixed(lead.judgement.reserve, 2, Toward::Nearest);
        says.push(format!("The reserve asked is {reserve} step.").into());
    }
    let others = lead.because.iter().filter(|b| !told(b));
    says.extend(others.map(|b| say::stopped(&say::sentence(&say::told(b, units))).into()));
    says
}

/// What the lead has in hand at each end.
fn ends(case: &Case<'_, '_>, lead: &Candidate) -> Phrase {
    let j = &lead.judgement;
    let mut parts = Vec::new();
    for m in [j.hot, j.cold].into_iter().flatten() {
        parts.push(end(case, m));
    }
    if let Some(m) = j.maker {
        let demand = case.demand(m);
        parts.push(format!(
            "new and at its thin end it lies {} step from the maker's grade ({})",
            say::steps(m.value, 1),
            asks(demand, case.units())
        ));
    }
    if parts.is_empty() {
        return "No limit on viscosity is known here.".into();
    }
    say::sentence(&say::stopped(&parts.join("; "))).into()
}

fn end(case: &Case<'_, '_>, m: Margin) -> String {
    let demand = case.demand(m);
    let at = case.temperature(m).map_or(String::new(), |t| {
        format!(" at {}", say::temperature(t, case.units()))
    });
    let floor = matches!(demand.end, End::HotFloor | End::MakerGrade);
    let limit = case
        .explained(m.demand)
        .and_then(|e| e.limit)
        .map_or(String::new(), |nu| {
            let toward = if floor { Toward::Up } else { Toward::Down };
            format!(" of {}", say::viscosity(nu.base(), case.units(), toward))
        });
    let steps = say::steps(m.value, 1);
    let unit = if floor || case.lead.is_some_and(|l| l.judgement.hot.is_none()) {
        " of a VG step"
    } else {
        ""
    };
    match demand.end {
        End::HotFloor if compared(demand) => format!(
            "compared{at}, it has {steps}{unit} over the floor{limit} ({})",
            asks(demand, case.units())
        ),
        _ if compared(demand) => format!(
            "{steps}{unit} under the ceiling{limit}{at} ({})",
            asks(demand, case.units())
        ),
        End::HotFloor => format!(
            "running hot{at}, it has {steps}{unit} over the floor{limit} ({})",
            asks(demand, case.units())
        ),
        End::StartCeiling => format!(
            "at the coldest start{at}, {steps}{unit} under the ceiling{limit} ({})",
            asks(demand, case.units())
        ),
        End::RunningCeiling => format!(
            "running cold{at}, {steps}{unit} under the ceiling{limit} ({})",
            asks(demand, case.units())
        ),
        _ => format!(
            "{steps}{unit} from the limit{limit}{at} ({})",
            asks(demand, case.units())
        ),
    }
}

/// What there is to say of the oil in the point now, where it is not the one proposed.
fn of_now(case: &Case<'_, '_>) -> Option<Phrase> {
    match case.now {
        Now::Weighed(c) if case.is_lead(c) => None,
        Now::Weighed(c) => {
            let word = match c.judgement.verdict {
                Verdict::Fails => "fails".to_owned(),
                other => format!("is {}", other.word()),
            };
            let why: Vec<String> = c.because.iter().take(2).map(|b| say::told(b, case.units())).collect();
            let mut says = Phrase::new()
                .strong(format!("{}, in the machine now, {word}", case.id(c.oil)))
                .and(say::stopped(&format!(": {}", why.join("; "))));
            if c.judgement.verdict == Verdict::Tight {
                says = says.and(" To keep it, somebody accepts that by name.");
            }
            Some(says)
        }
        Now::Barred(b) => Some(
            Phrase::new()
                .strong(format!("{}, in the machine now, is barred", case.id(b.oil)))
                .and(say::stopped(&format!(": {}", say::told(&b.by[0].says, case.units())))),
        ),
        Now::Other(id) => Some(Phrase::new().tag(id).and(
            ", named as what is in it now, is of the other sort, oil or grease, and is not weighed.",
        )),
        Now::Unknown => Some("What is in it now is not known.".into()),
        Now::Nothing => Some("There is nothing in it yet.".into()),
    }
}

fn of_band(case: &Case<'_, '_>, lead: &Candidate) -> Option<Phrase> {
    let (cold, hot) = case.w.demands.middle.thermal.ambient?;
    let degrees = case.degrees();
    let units = case.units();
    let gets = format!(
        "{} gets {} to {}",
        case.where_it_stands(),
        say::temperature_figure(cold.value.base(), units),
        say::temperature(hot.value.base(), units)
    );
    let band = lead.judgement.band;
    Some(match (band.low_end(), band.high_end()) {
        (None, None) => format!("No ambient limits it; {gets}.").into(),
        _ => format!(
            "Its limits are met at an ambient {}; {gets}.",
            with_preposition(&say::band(band, degrees))
        )
        .into(),
    })
}

/// `-22 to 42` stands behind `of`, `from` and `up to` for themselves.
fn with_preposition(band: &str) -> String {
    if band.starts_with("from") || band.starts_with("up to") || band == "nowhere" {
        band.to_owned()
    } else {
        format!("of {band}")
    }
}

/// The answer of a machine with several points.
pub(super) fn of_several(names: &[(String, Answer)], oils: &[Option<String>]) -> Answer {
    let worst = names
        .iter()
        .map(|(_, a)| a.mark.unwrap_or(Mark::Fails))
        .max_by_key(|m| badness(*m))
        .unwrap_or_default();
    let same = names.windows(2).all(|w| w[0].1.headline == w[1].1.headline);
    let headline = match (same, oils.first()) {
        (true, Some(Some(_))) => {
            let text = &names[0].1.headline;
            format!(
                "{} points alike. {text}",
                say::sentence(&say::number(names.len()))
            )
        }
        _ => {
            let decided = oils.iter().filter(|o| o.is_some()).count();
            format!(
                "{} points, {} with an oil proposed.",
                say::sentence(&say::number(names.len())),
                say::number(decided)
            )
        }
    };
    let sentences = names
        .iter()
        .map(|(name, answer)| {
            Phrase::new()
                .strong(say::sentence(name))
                .and(format!(": {}", answer.headline))
        })
        .collect();
    Answer {
        mark: Some(worst),
        headline,
        sentences: if same { Vec::new() } else { sentences },
    }
}

/// Verdicts by how bad they are.
pub(super) fn badness(mark: Mark) -> u8 {
    match mark {
        Mark::Holds => 0,
        Mark::Tight => 1,
        Mark::Open => 2,
        Mark::Fails => 3,
    }
}
