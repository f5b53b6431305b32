//! `film-line`.

use super::GROUP;
use super::hertz::{E1, E2, MODULUS, POISSON1, POISSON2, R1X, R2X, RADIUS};
use super::known::{ALPHA, ETA, KnownGroups, KnownInlet, KnownLine, LineFilm, SPEED};
use crate::quantity::Length;
use crate::relation::Law;
use crate::relation::film::groups::Groups;
use crate::relation::film::line;
use crate::trace::{Known, Recorder};
use crate::work::contact::{may, must};
use crate::work::{Args, Input, Refusal, Relation, Worked};

/// One film of a line contact, as a step.
pub(super) fn line_film(
    worked: &mut Worked,
    groups: KnownGroups,
    radius: Known<Length>,
    (symbol, says): (&'static str, &'static str),
    (law, film): (&'static Law, LineFilm),
) -> Known<Length> {
    let inputs = (
        ("U", groups.speed),
        ("G", groups.material),
        ("W", groups.load),
        ("R", radius),
    );
    worked.trace.law(
        symbol,
        says,
        law,
        inputs,
        |(speed, material, load, radius)| {
            let groups = Groups {
                speed,
                material,
                load,
            };
            film(groups, radius)
        },
    )
}

/// Names of the published fits for line contacts.
pub(super) const LINE_FORMS: &[&str] = &["1968", "1966", "dowson-toyoda", "pan-hamrock"];

pub(super) const FORM: Input = may(
    "form",
    "formula: 1968, 1966, dowson-toyoda (central film) or pan-hamrock",
    "1968",
);

/// The film a fit is named for: the minimum film, the central one for `dowson-toyoda`.
pub(super) fn line_law(form: &str) -> (&'static Law, LineFilm) {
    match form {
        "1966" => (&line::MINIMUM_1966, line::minimum_1966),
        "dowson-toyoda" => (&line::CENTRAL_DOWSON_TOYODA, line::central_dowson_toyoda),
        "pan-hamrock" => (&line::MINIMUM_PAN_HAMROCK, line::minimum_pan_hamrock),
        _ => (&line::MINIMUM_1968, line::minimum_1968),
    }
}

/// Minimum and central film by the fit of that name.
pub(super) fn line_films(
    worked: &mut Worked,
    form: &str,
    groups: KnownGroups,
    radius: Known<Length>,
) -> (Option<Known<Length>>, Option<Known<Length>>) {
    let least = ("h_min", "minimum film");
    let middle = ("h_c", "central film");
    if form == "dowson-toyoda" {
        let h = line_film(worked, groups, radius, middle, line_law(form));
        return (None, Some(h));
    }
    let minimum = line_film(worked, groups, radius, least, line_law(form));
    let central = (form == "pan-hamrock").then(|| {
        let law: (_, LineFilm) = (&line::CENTRAL_PAN_HAMROCK, line::central_pan_hamrock);
        line_film(worked, groups, radius, middle, law)
    });
    (Some(minimum), central)
}

pub(super) const LINE: Relation = Relation {
    name: "film-line",
    group: GROUP,
    law: &line::MINIMUM_1968,
    with: &[
        ETA,
        ALPHA,
        SPEED,
        must("load", "load per length, 200 N/mm"),
        RADIUS,
        R1X,
        R2X,
        MODULUS,
        E1,
        POISSON1,
        E2,
        POISSON2,
        FORM,
    ],
    gives: &[
        ("h_min", "minimum film, um (1968, 1966, pan-hamrock)"),
        ("h_central", "central film, um (dowson-toyoda, pan-hamrock)"),
        ("U", "speed parameter"),
        ("G", "material parameter"),
        ("W", "load parameter"),
    ],
    run: run_line,
};

fn run_line(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let form = args.choice("form", LINE_FORMS, Some("1968"))?;
    let inlet = KnownInlet::read(args, worked)?;
    let contact = KnownLine::read(args, worked)?;
    let groups = contact.groups(worked, inlet)?;
    let (minimum, central) = line_films(worked, form, groups, contact.radius);
    if let Some(h) = minimum {
        worked.result("h_min", h, "um");
    }
    if let Some(h) = central {
        worked.result("h_central", h, "um");
    }
    groups.state(worked);
    if let Some(beyond) = line::beyond_fit(groups.plain()) {
        worked.remark(format!("beyond the range of the formula: {beyond}"));
    }
    Ok(())
}
