//! The viscosity-temperature figure of a point: every candidate's line, the limits over the
//! temperatures they apply at, and the places that decide.

use super::ambient::shown;
use super::case::{Case, asks, compared};
use super::needs::is_floor;
use super::say;
use super::steps::outside;
use crate::demand::{AtAmbient, End};
use crate::judge::PreparedOil;
use crate::judge::margin::Ready;
use crate::judge::weigh::Margin;
use crate::quantity::Measure;
use crate::quantity::convert::celsius;
use crate::quantity::show::Toward;
use crate::relation::oil::viscosity_temperature::ViscosityCurve;
use crate::report::draw::viscosity::{
    Detail, Jaw, OilLine, Reading, Role, TemperatureBand, ViscosityFigure,
};
use crate::report::model::{Curves, Phrase};
use crate::weighing::Candidate;

/// Lines drawn at most, beside those of oils that do not fail; the table has them all.
const DRAWN: usize = 9;

/// Bent curves are read every so many kelvins.
const STEP: f64 = 5.0;
/// From -60 to 150 °C.
const READINGS: u8 = 42;

/// The figure; none where nothing was weighed.
pub(super) fn curves(case: &Case<'_, '_>) -> Option<Curves> {
    let lead = case.lead?;
    let lines = shown(case, DRAWN)
        .into_iter()
        .map(|c| line(case, c))
        .collect();
    let details: Vec<Detail> = [detail(case, lead, true), detail(case, lead, false)]
        .into_iter()
        .flatten()
        .collect();
    let figure = ViscosityFigure {
        id: case.local("fig-curves"),
        title: format!(
            "Viscosity over temperature of {}, with the limits of {}",
            say::count(case.w.candidates.len(), "oil", "oils"),
            case.w.point.address()
        ),
        description: described(case, lead),
        degrees: case.degrees(),
        lines,
        jaws: jaws(case),
        bands: bands(case),
        details,
    };
    Some(Curves {
        caption: caption(case, &figure),
        figure,
        notes: notes(case, lead),
    })
}

/// Readings of a straight line at two temperatures, of a bent one closely.
fn readings(straight: bool, nu: impl Fn(f64) -> f64) -> Vec<Reading> {
    let from = celsius(-60.0).base();
    let steps = if straight {
        vec![celsius(0.0).base(), celsius(100.0).base()]
    } else {
        (0..=READINGS).map(|i| from + STEP * f64::from(i)).collect()
    };
    steps
        .into_iter()
        .map(|t| (say::celsius(t), say::mm2_s(nu(t))))
        .filter(|(_, nu)| nu.is_finite() && *nu > 0.0)
        .collect()
}

fn of_ready(curve: &Ready) -> Vec<Reading> {
    readings(matches!(curve, Ready::Straight(_)), |t| curve.nu(t))
}

fn as_new(oil: &PreparedOil) -> Vec<Reading> {
    let new = &oil.curves.new;
    readings(!new.is_bent() && new.line().is_some(), |t| {
        let at = crate::quantity::ThermodynamicTemperature::from_base(t);
        new.nu_at(at).base()
    })
}

fn line(case: &Case<'_, '_>, c: &Candidate) -> OilLine {
    let oil = case.ready(c.oil);
    let worn = case.worn(c.oil);
    let judged = worn.map_or_else(|| as_new(oil), of_ready);
    let tolerant = oil.curves.thin.is_some() || oil.curves.thick.is_some();
    let at = |t: f64| {
        let nu = worn.map_or_else(
            || {
                oil.curves
                    .nu_new(crate::quantity::ThermodynamicTemperature::from_base(t))
                    .base()
            },
            |w| w.nu(t),
        );
        (say::celsius(t), say::mm2_s(nu))
    };
    OilLine {
        letter: case.letter(c),
        role: if case.picked(c) {
            Role::Proposed
        } else if c.in_use {
            Role::InUse
        } else {
            Role::Other
        },
        line: judged,
        as_new: if worn.is_some() {
            as_new(oil)
        } else {
            Vec::new()
        },
        stated: vec![at(oil.curves.lowest.base()), at(oil.curves.highest.base())],
        tolerance: tolerant.then(|| (of_ready(&oil.thin), of_ready(&oil.thick))),
    }
}

/// The temperatures a limit applies over, °C: from the coldest to the hottest ambient.
fn over(case: &Case<'_, '_>, at: AtAmbient, governing: f64) -> (f64, f64) {
    let ambient = case.w.demands.middle.thermal.ambient;
    let (from, to) = match ambient {
        Some((cold, hot)) => (at.at(cold.value.base()), at.at(hot.value.base())),
        None => (governing, governing),
    };
    (say::celsius(from.min(to)), say::celsius(from.max(to)))
}

/// The demands drawn: the lead's smallest margin at each end, else the one that governs.
fn drawn(case: &Case<'_, '_>) -> Vec<usize> {
    let middle = &case.w.demands.middle;
    let mut found = Vec::new();
    for end in [
        End::HotFloor,
        End::RunningCeiling,
        End::StartCeiling,
        End::MakerGrade,
    ] {
        let of_lead = case.lead.and_then(|c| {
            let j = &c.judgement;
            [j.hot, j.cold, j.maker]
                .into_iter()
                .flatten()
                .find(|m| case.demand(*m).end == end)
                .map(|m| usize::from(m.demand))
        });
        found.extend(of_lead.or_else(|| middle.governing(end)));
    }
    found
}

fn jaws(case: &Case<'_, '_>) -> Vec<Jaw> {
    let middle = &case.w.demands.middle;
    let units = case.units();
    let mut jaws = Vec::new();
    for i in drawn(case) {
        let d = &middle.list[i];
        let known = u16::try_from(i).ok().and_then(|n| case.explained(n));
        let Some((nu, t)) = known.and_then(|e| Some((e.limit?, e.t))) else {
            continue;
        };
        let floor = is_floor(d.end);
        let toward = if floor { Toward::Up } else { Toward::Down };
        let figure = say::viscosity_figure(nu.base(), units, toward);
        let (from_c, to_c) = over(case, d.at, t);
        let label = match d.end {
            End::HotFloor => format!("too thin running: below {figure}"),
            End::RunningCeiling => format!("too thick running: above {figure}"),
            End::StartCeiling => format!("too thick to start: above {figure}"),
            _ => format!("thinner than the maker's grade: below {figure}"),
        };
        jaws.push(Jaw {
            floor,
            nu_mm2_s: say::mm2_s(nu.base()),
            from_c,
            to_c,
            label,
        });
    }
    jaws
}

fn bands(case: &Case<'_, '_>) -> Vec<TemperatureBand> {
    let thermal = &case.w.demands.middle.thermal;
    let Some((cold, hot)) = thermal.ambient else {
        return Vec::new();
    };
    let (cold, hot) = (cold.value.base(), hot.value.base());
    let both = [("start", thermal.start), ("running", thermal.running)];
    let mut bands = Vec::new();
    for (name, at) in both {
        let Some(at) = at.filter(|at| !at.is_unknown()) else {
            continue;
        };
        let (from, to) = (at.at(cold), at.at(hot));
        let label = if (to - from).abs() < 1e-6 {
            format!("{name}, {}", say::temperature(to, case.units()))
        } else {
            format!(
                "{name}, {} to {}",
                say::temperature_figure(from, case.units()),
                say::temperature(to, case.units())
            )
        };
        bands.push(TemperatureBand {
            from_c: say::celsius(from),
            to_c: say::celsius(to),
            label,
        });
    }
    bands
}

/// The enlarged view of the hot end (H) or the cold one (K).
fn detail(case: &Case<'_, '_>, lead: &Candidate, hot: bool) -> Option<Detail> {
    let j = &lead.judgement;
    let m: Margin = if hot { j.hot.or(j.maker)? } else { j.cold? };
    let told = case.explained(m.demand)?;
    let limit = told.limit?;
    let demand = case.demand(m);
    let floor = is_floor(demand.end);
    let id = case.id(lead.oil);
    let steps = format!("{} step", say::steps(m.value, 2));
    let at = say::temperature(told.t, case.units());
    let toward = if floor { Toward::Up } else { Toward::Down };
    let figure = say::viscosity(limit.base(), case.units(), toward);
    let side = match (floor, m.value < 0.0) {
        (true, false) | (false, true) => "above",
        _ => "below",
    };
    let kind = if floor { "floor" } else { "ceiling" };
    Some(Detail {
        id: case.local(if hot { "fig-h" } else { "fig-k" }),
        letter: if hot { "H" } else { "K" }.to_owned(),
        title: match demand.end {
            _ if compared(demand) => "where grades are compared",
            End::HotFloor => "running hot",
            End::RunningCeiling => "running cold",
            End::StartCeiling => "coldest start",
            _ => "the maker's grade",
        }
        .to_owned(),
        description: format!("At {at} {id} lies {side} the {kind} of {figure}: {steps}."),
        caption: say::stopped(&say::sentence(&asks(demand, case.units()))),
        at_c: say::celsius(told.t),
        limit_mm2_s: say::mm2_s(limit.base()),
        floor,
        of: case.letter(lead),
        margin: steps,
    })
}

fn described(case: &Case<'_, '_>, lead: &Candidate) -> String {
    let id = case.id(lead.oil);
    let j = &lead.judgement;
    let mut parts = Vec::new();
    for (m, word) in [(j.hot, "hot"), (j.cold, "cold")] {
        if let Some(m) = m {
            parts.push(format!("{} step {word}", say::steps(m.value, 2)));
        }
    }
    if parts.is_empty() {
        format!("The line of {id}; no limit on viscosity is drawn.")
    } else {
        format!("{id} lies {} from its limits.", parts.join(" and "))
    }
}

fn caption(case: &Case<'_, '_>, figure: &ViscosityFigure) -> String {
    let has = |role| figure.lines.iter().any(|l| l.role == role);
    let mut words = Vec::new();
    if has(Role::Proposed) {
        words.push("Heaviest: proposed.");
    }
    if has(Role::InUse) {
        words.push("Heavy dashes: in the machine now.");
    }
    if figure.lines.iter().any(|l| !l.as_new.is_empty()) {
        words.push("Faint: as new, where an oil is judged after shear.");
    }
    if figure.lines.iter().any(|l| l.tolerance.is_some()) {
        words.push("Tinted: between thin and thick end.");
    }
    let left = match case.w.candidates.len() - figure.lines.len() {
        0 => String::new(),
        n => format!(
            " {} that fail stand in the table only.",
            say::sentence(&say::count(n, "further oil", "further oils"))
        ),
    };
    let base = if case.grease() {
        "Base oils of the greases. "
    } else {
        ""
    };
    format!(
        "{base}{} Letters as in the table of oils.{left}",
        words.join(" ")
    )
    .trim_start()
    .to_owned()
}

/// Extrapolation, wear and tangents of the oil the sheet tells of.
fn notes(case: &Case<'_, '_>, lead: &Candidate) -> Vec<Phrase> {
    let id = case.id(lead.oil);
    let oil = case.ready(lead.oil);
    let mut notes: Vec<Phrase> = Vec::new();
    let told = case.told.iter().flat_map(|t| &t.margins);
    let mut temperatures: Vec<f64> = told.filter(|e| e.limit.is_some()).map(|e| e.t).collect();
    temperatures.sort_by(f64::total_cmp);
    let ends = [temperatures.first(), temperatures.last()];
    let mut said: Vec<String> = ends
        .into_iter()
        .flatten()
        .filter_map(|t| outside(case, lead.oil, *t))
        .collect();
    said.dedup();
    notes.extend(
        said.into_iter()
            .map(|s| Phrase::new().tag(id).and(format!(": {s}"))),
    );
    if case.worn(lead.oil).is_some() {
        let loss = oil.curves.loss_range(case.w.ready.severe);
        let after = if loss.is_some() {
            "after the greatest plausible loss, because no sheared viscosity is stated"
        } else {
            "after permanent shear"
        };
        notes.push(Phrase::new().tag(id).and(format!(
            " is judged on its sheared line when hot ({after}), on its new line when cold."
        )));
    }
    let bent = [Some(&oil.thin), Some(&oil.thick), case.worn(lead.oil)];
    if bent
        .into_iter()
        .flatten()
        .any(|r| matches!(r, Ready::Bent(_)))
    {
        notes.push(Phrase::new().and("The curve of ").tag(id).and(
            " is not one straight line here: where it bends, the line slid to the limit is its tangent there.",
        ));
    }
    if oil.curves.thin.is_some() {
        notes.push(Phrase::new().tag(id).and(
            " is known within a tolerance: floors are judged at its thin end, ceilings at its thick end, and half the reserve is asked.",
        ));
    }
    notes
}
