//! `film-ellipse`.

use super::GROUP;
use super::hertz::{ANGLE, E1, E2, MODULUS, POISSON1, POISSON2, R1X, R1Y, R2X, R2Y, RX, RY};
use super::known::{ALPHA, ETA, EllipseFilm, KnownEllipse, KnownGroups, KnownInlet, SPEED};
use crate::quantity::{Length, Ratio};
use crate::relation::Law;
use crate::relation::film::ellipse;
use crate::relation::film::groups::Groups;
use crate::trace::{Known, Recorder};
use crate::work::contact::{may, must};
use crate::work::{Args, Refusal, Relation, Worked};

/// One film of an elliptical contact, as a step.
pub(super) fn ellipse_film(
    worked: &mut Worked,
    groups: KnownGroups,
    (k, rx): (Known<Ratio>, Known<Length>),
    (symbol, says): (&'static str, &'static str),
    (law, film): (&'static Law, EllipseFilm),
) -> Known<Length> {
    let inputs = (
        ("U", groups.speed),
        ("G", groups.material),
        ("W", groups.load),
        ("k", k),
        ("Rx", rx),
    );
    worked.trace.law(
        symbol,
        says,
        law,
        inputs,
        |(speed, material, load, k, x)| {
            let groups = Groups {
                speed,
                material,
                load,
            };
            film(groups, k, x)
        },
    )
}

type EllipseLaws = [(&'static Law, EllipseFilm); 2];

/// Minimum and central film of hard bodies.
pub(super) const ELLIPSE_LAWS: EllipseLaws = [
    (&ellipse::MINIMUM, ellipse::minimum),
    (&ellipse::CENTRAL, ellipse::central),
];

/// Minimum and central film of soft bodies.
const SOFT_LAWS: EllipseLaws = [
    (&ellipse::SOFT_MINIMUM, ellipse::soft_minimum),
    (&ellipse::SOFT_CENTRAL, ellipse::soft_central),
];

pub(super) const ELLIPSE: Relation = Relation {
    name: "film-ellipse",
    group: GROUP,
    law: &ellipse::MINIMUM,
    with: &[
        ETA,
        ALPHA,
        SPEED,
        must("load", "load, 500 N"),
        RX,
        RY,
        R1X,
        R2X,
        R1Y,
        R2Y,
        ANGLE,
        MODULUS,
        E1,
        POISSON1,
        E2,
        POISSON2,
        may("form", "bodies: hard or soft (rubber-like)", "hard"),
    ],
    gives: &[
        ("h_min", "minimum film, um"),
        ("h_central", "central film, um"),
        ("k", "ellipticity"),
        ("U", "speed parameter"),
        ("G", "material parameter"),
        ("W", "load parameter"),
    ],
    run: run_ellipse,
};

fn run_ellipse(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let soft = args.choice("form", &["hard", "soft"], Some("hard"))? == "soft";
    let inlet = KnownInlet::read(args, worked)?;
    let contact = KnownEllipse::read(args, worked)?;
    let groups = contact.groups(worked, inlet)?;
    let k = contact.ellipticity(worked)?;
    let laws = if soft { SOFT_LAWS } else { ELLIPSE_LAWS };
    let shape = (k, contact.rx);
    let least = ("h_min", "minimum film");
    let minimum = ellipse_film(worked, groups, shape, least, laws[0]);
    let middle = ("h_c", "central film");
    let central = ellipse_film(worked, groups, shape, middle, laws[1]);
    worked.result("h_min", minimum, "um");
    worked.result("h_central", central, "um");
    worked.result("k", k, "");
    groups.state(worked);
    Ok(())
}
