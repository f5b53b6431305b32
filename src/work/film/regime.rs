//! `film-regime`.

use super::GROUP;
use super::hertz::{E1, E2, MODULUS, POISSON1, POISSON2, R1X, R1Y, R2X, R2Y, RADIUS, RX, RY};
use super::known::{KnownEllipse, KnownGroups, KnownInlet, KnownLine};
use crate::quantity::Length;
use crate::relation::film::body::Radii;
use crate::relation::film::groups::Groups;
use crate::relation::film::regime::{self, ByRegime};
use crate::trace::{Known, Outcome, Recorder};
use crate::work::contact::{form, is_elliptical, radii, radius};
use crate::work::{Args, Refusal, Relation, Worked};

pub(super) const REGIME: Relation = Relation {
    name: "film-regime",
    group: GROUP,
    law: &regime::ELLIPSE,
    with: &[
        form("eta", "dynamic viscosity at the inlet temperature", "oil"),
        form("alpha", "pressure-viscosity coefficient there", "oil"),
        form("speed", "mean of the two surface speeds", "oil"),
        form(
            "load",
            "load, 500 N (with rx and ry), or load per length, 200 N/mm",
            "oil",
        ),
        form("U", "speed parameter", "groups"),
        form("G", "material parameter", "groups"),
        form("W", "load parameter", "groups"),
        RADIUS,
        RX,
        RY,
        R1X,
        R2X,
        R1Y,
        R2Y,
        MODULUS,
        E1,
        POISSON1,
        E2,
        POISSON2,
    ],
    gives: &[
        ("regime", "isoviscous or piezoviscous, rigid or elastic"),
        ("h", "film of that regime, um"),
        ("g_v", "viscosity parameter"),
        ("g_e", "elasticity parameter"),
    ],
    run,
};

fn run(args: &mut Args, worked: &mut Worked) -> Result<(), Refusal> {
    let outcome = if is_elliptical(args) {
        let (groups, rx, ry) = ellipse_groups(args, worked)?;
        of_ellipse(worked, groups, (rx, ry))?
    } else {
        let (groups, radius) = line_groups(args, worked)?;
        of_line(worked, groups, radius)?
    };
    let trace = &mut worked.trace;
    let g_v = trace.take(&outcome, "gV", "viscosity parameter", |f| f.g_v);
    let g_e = trace.take(&outcome, "gE", "elasticity parameter", |f| f.g_e);
    let says = "film, the largest of the four";
    let h = trace.take(&outcome, "h", says, |f| f.film);
    worked.text("regime", Some(outcome.value.regime.words().to_owned()));
    worked.result("h", h, "um");
    worked.result("g_v", g_v, "");
    worked.result("g_e", g_e, "");
    Ok(())
}

fn given_groups(args: &mut Args, worked: &mut Worked) -> Result<KnownGroups, Refusal> {
    Ok(KnownGroups {
        speed: args.quantity(worked, "U", "speed parameter")?,
        material: args.quantity(worked, "G", "material parameter")?,
        load: args.quantity(worked, "W", "load parameter")?,
    })
}

fn ellipse_groups(
    args: &mut Args,
    worked: &mut Worked,
) -> Result<(KnownGroups, Known<Length>, Known<Length>), Refusal> {
    if args.has("U") {
        let groups = given_groups(args, worked)?;
        let (rx, ry) = radii(args, worked)?;
        return Ok((groups, rx, ry));
    }
    let inlet = KnownInlet::read(args, worked)?;
    let contact = KnownEllipse::read(args, worked)?;
    let groups = contact.groups(worked, inlet)?;
    Ok((groups, contact.rx, contact.ry))
}

fn line_groups(
    args: &mut Args,
    worked: &mut Worked,
) -> Result<(KnownGroups, Known<Length>), Refusal> {
    if args.has("U") {
        let groups = given_groups(args, worked)?;
        return Ok((groups, radius(args, worked)?));
    }
    let inlet = KnownInlet::read(args, worked)?;
    let contact = KnownLine::read(args, worked)?;
    let groups = contact.groups(worked, inlet)?;
    Ok((groups, contact.radius))
}

fn of_ellipse(
    worked: &mut Worked,
    groups: KnownGroups,
    (rx, ry): (Known<Length>, Known<Length>),
) -> Result<Outcome<ByRegime>, Refusal> {
    let inputs = (
        ("U", groups.speed),
        ("G", groups.material),
        ("W", groups.load),
        ("Rx", rx),
        ("Ry", ry),
    );
    let law = &regime::ELLIPSE;
    let outcome = worked
        .trace
        .attempt_all(law, inputs, |(speed, material, load, x, y)| {
            let groups = Groups {
                speed,
                material,
                load,
            };
            regime::ellipse(groups, Radii { x, y }.ratio()?, x)
        })?;
    Ok(outcome)
}

fn of_line(
    worked: &mut Worked,
    groups: KnownGroups,
    radius: Known<Length>,
) -> Result<Outcome<ByRegime>, Refusal> {
    let inputs = (
        ("U", groups.speed),
        ("G", groups.material),
        ("W", groups.load),
        ("R", radius),
    );
    let law = &regime::LINE;
    let outcome = worked
        .trace
        .attempt_all(law, inputs, |(speed, material, load, r)| {
            let groups = Groups {
                speed,
                material,
                load,
            };
            regime::line(groups, r)
        })?;
    Ok(outcome)
}
