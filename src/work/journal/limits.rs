//! What a journal bearing is held to.

use super::{DIAMETER, GROUP, may};
use crate::quantity::convert::to_celsius;
use crate::quantity::{
    AngularVelocity, DynamicViscosity, Force, Length, MassDensity, Measure, Pressure, Velocity,
};
use crate::relation::Law;
use crate::relation::journal::limits::load::{Lining, permissible};
use crate::relation::journal::limits::{clearance, laminar, least_film, load, temperature};
use crate::relation::journal::{Geometry, NoFilm, SPECIFIC_LOAD};
use crate::trace::{Known, Recorder};
use crate::work::{Args, Need, Refusal, Relation, Worked};

pub(super) const JOURNAL_LIMITS: Relation = Relation {
    name: "journal-limits",
    group: GROUP,
    law: &ALL,
    with: &[
        DIAMETER,
        super::Input {
            name: "speed",
            says: "speed of the shaft",
            need: Need::Form("speed of rotation"),
        },
        super::Input {
            name: "surface_speed",
            says: "speed of its surface",
            need: Need::Form("speed of the surface"),
        },
        may(
            "rz_shaft",
            "roughness Rz of the shaft",
            "no roughness floor",
        ),
        may("rz_bore", "roughness Rz of the bore", "no roughness floor"),
        may("load", "radial load, with width", "no specific load"),
        may("width", "width of the bearing", "no specific load"),
        may(
            "lining",
            "white-metal, copper-lead, copper-tin, aluminium-tin or aluminium-zinc",
            "no load limit",
        ),
        may("supply", "short (ring, bath, small tank) or ample", "short"),
        may(
            "clearance",
            "radial, with width, eta and density",
            "no laminar check",
        ),
        may("eta", "dynamic viscosity of the film", "no laminar check"),
        may("density", "density of the oil there", "no laminar check"),
    ],
    gives: &[
        ("h_lim", "least film of ISO 7902-3, um"),
        ("h_trumpler", "least film of Trumpler, um"),
        (
            "h_roughness",
            "least film over the roughness, um, with both Rz",
        ),
        ("clearance_usual", "usual relative clearance"),
        ("clearance_step", "nearest standardised relative clearance"),
        ("t_limit", "largest temperature in general use, degC"),
        ("t_limit_special", "in special cases, degC"),
        ("pressure", "specific load, MPa, with load and width"),
        ("pressure_limit", "largest in general use, MPa, with lining"),
        (
            "pressure_limit_special",
            "in special cases, MPa, with lining",
        ),
        (
            "reynolds",
            "Reynolds number of the film, with eta and density",
        ),
        ("reynolds_limit", "largest for laminar flow, with clearance"),
    ],
    run: journal_limits,
};

/// The row as a whole.
static ALL: Law = Law {
    name: "journal-limits",
    title: "limits of film, load, temperature and flow of a journal bearing",
    formula: "h_lim by diameter and surface speed; h_0 = 5.08 um + 0.00004 D; P_lim by lining; \
              Re < 41.3 sqrt(R/c); psi = 0.0008 U^(1/4)",
    range: "shaft 24 to 2500 mm for h_lim",
    source: "ISO 7902-3, Trumpler 1966, Vogelpohl, Taylor 1923 (from memory); common practice",
};

/// Speed of the surface from that of rotation, for the record.
static SURFACE: Law = Law {
    name: "surface-speed",
    title: "speed of a shaft's surface",
    formula: "U = omega D/2",
    range: "any shaft",
    source: "definition",
};

fn journal_limits(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let diameter: Known<Length> = args.quantity(w, "diameter", DIAMETER.says)?;
    if diameter.value.base() <= 0.0 {
        let what = "the diameter";
        return Err(NoFilm::NotPositive { what }.into());
    }
    let (speed, surface) = speeds(args, w, diameter)?;
    films(args, w, diameter, surface)?;
    let psi = w.trace.law(
        "psi",
        "usual relative clearance",
        &clearance::LAW,
        (("U", surface),),
        |(u,)| clearance::usual(u),
    );
    let says = "nearest standardised clearance";
    let with = (("psi", psi),);
    let step = w.trace.law("psi_s", says, &clearance::LAW, with, |(psi,)| {
        clearance::nearest_step(psi)
    });
    w.result("clearance_usual", psi, "");
    w.result("clearance_step", step, "");
    temperatures(args, w)?;
    let width: Option<Known<Length>> = args.maybe(w, "width", "width of the bearing")?;
    loads(args, w, diameter, width)?;
    flow(args, w, (diameter, width), speed)
}

type Speeds = (Option<Known<AngularVelocity>>, Known<Velocity>);

fn speeds(args: &mut Args, w: &mut Worked, diameter: Known<Length>) -> Result<Speeds, Refusal> {
    let surface: Option<Known<Velocity>> =
        args.maybe(w, "surface_speed", "speed of the surface")?;
    if let Some(surface) = surface {
        if args.has("speed") {
            let words = "speed and surface_speed say the same; give one";
            return Err(Refusal::new("speed-twice", words));
        }
        if surface.value.base() <= 0.0 {
            return Err(NoFilm::Standstill.into());
        }
        return Ok((None, surface));
    }
    let speed: Known<AngularVelocity> = args.quantity(w, "speed", "speed of the shaft")?;
    if speed.value.base() <= 0.0 {
        return Err(NoFilm::Standstill.into());
    }
    let with = (("omega", speed), ("D", diameter));
    let says = "speed of the surface";
    let surface = w.trace.law("U", says, &SURFACE, with, |(n, d)| {
        crate::quantity::convert::surface_speed(n, d)
    });
    Ok((Some(speed), surface))
}

fn films(
    args: &mut Args,
    w: &mut Worked,
    diameter: Known<Length>,
    surface: Known<Velocity>,
) -> Result<(), Refusal> {
    let with = (("D", diameter), ("U", surface));
    if least_film::iso7902(diameter.value, surface.value).is_some() {
        let says = "least film of ISO 7902-3";
        let law = &least_film::ISO7902;
        let film = w.trace.law("h_lim", says, law, with, |(d, u)| {
            least_film::iso7902(d, u).expect("looked up just above")
        });
        w.result("h_lim", film, "um");
    } else {
        w.text("h_lim", None);
        w.remark("no h_lim: ISO 7902-3 lists shafts of 24 to 2500 mm");
    }
    let says = "least film of Trumpler";
    let law = &least_film::TRUMPLER;
    let with = (("D", diameter),);
    let film = w
        .trace
        .law("h_0", says, law, with, |(d,)| least_film::trumpler(d));
    w.result("h_trumpler", film, "um");
    let shaft: Option<Known<Length>> = args.maybe(w, "rz_shaft", "Rz of the shaft")?;
    let bore: Option<Known<Length>> = args.maybe(w, "rz_bore", "Rz of the bore")?;
    if let (Some(shaft), Some(bore)) = (shaft, bore) {
        let with = (("Rz_shaft", shaft), ("Rz_bore", bore));
        let says = "least film over the roughness";
        let law = &least_film::ROUGHNESS;
        let film = w.trace.law("h_Rz", says, law, with, |(shaft, bore)| {
            least_film::roughness(shaft, bore)
        });
        w.result("h_roughness", film, "um");
    }
    if shaft.is_some_and(|rz| rz.value.base() > 4e-6) {
        w.remark("h_lim supposes Rz of the shaft to 4 um; this shaft is rougher");
    }
    Ok(())
}

fn temperatures(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let supply = match args.choice("supply", &["short", "ample"], Some("short"))? {
        "ample" => temperature::Supply::Ample,
        _ => temperature::Supply::Short,
    };
    let outcome = w
        .trace
        .apply(&temperature::LAW, (), |()| temperature::permissible(supply));
    let says = "largest temperature in general use";
    let general = w
        .trace
        .take(&outcome, "T_lim", says, |(general, _)| general);
    let says = "largest temperature in special cases";
    let special = w
        .trace
        .take(&outcome, "T_lim", says, |(_, special)| special);
    w.result("t_limit", general, "degC");
    w.result("t_limit_special", special, "degC");
    w.remark(format!(
        "Trumpler sets {:.0} degC for the hottest oil in the film",
        to_celsius(temperature::trumpler())
    ));
    Ok(())
}

fn loads(
    args: &mut Args,
    w: &mut Worked,
    diameter: Known<Length>,
    width: Option<Known<Length>>,
) -> Result<(), Refusal> {
    let force: Option<Known<Force>> = args.maybe(w, "load", "radial load")?;
    if let (Some(force), Some(width)) = (force, width) {
        if width.value.base() <= 0.0 {
            let what = "the width";
            return Err(NoFilm::NotPositive { what }.into());
        }
        let with = (("F", force), ("D", diameter), ("B", width));
        let says = "specific load";
        let pressure = w.trace.law("P", says, &SPECIFIC_LOAD, with, |(f, d, b)| {
            Pressure::from_base(f.base() / (d.base() * b.base()))
        });
        w.result("pressure", pressure, "MPa");
        w.remark("Trumpler sets 2.07 MPa (300 psi) for the load at starting");
    }
    let Some(word) = args.maybe_text("lining")? else {
        return Ok(());
    };
    let found = Lining::ALL.into_iter().find(|l| l.name() == word.trim());
    let lining = found.ok_or_else(|| {
        let names: Vec<&str> = Lining::ALL.iter().map(|l| l.name()).collect();
        let words = format!("lining is `{word}`; it is one of {}", names.join(", "));
        Refusal::new("choice-unknown", words)
    })?;
    let outcome = w.trace.apply(&load::LAW, (), |()| permissible(lining));
    let says = "largest specific load in general use";
    let general = w
        .trace
        .take(&outcome, "P_lim", says, |(general, _)| general);
    let says = "largest specific load in special cases";
    let special = w
        .trace
        .take(&outcome, "P_lim", says, |(_, special)| special);
    w.result("pressure_limit", general, "MPa");
    w.result("pressure_limit_special", special, "MPa");
    Ok(())
}

fn flow(
    args: &mut Args,
    w: &mut Worked,
    (diameter, width): (Known<Length>, Option<Known<Length>>),
    speed: Option<Known<AngularVelocity>>,
) -> Result<(), Refusal> {
    let clearance: Option<Known<Length>> = args.maybe(w, "clearance", "radial clearance")?;
    let eta: Option<Known<DynamicViscosity>> = args.maybe(w, "eta", "dynamic viscosity")?;
    let density: Option<Known<MassDensity>> = args.maybe(w, "density", "density of the oil")?;
    let Some(clearance) = clearance else {
        return Ok(());
    };
    // the width plays no part in this check; the diameter stands in where it is not given
    let width = width.map_or(diameter.value, |w| w.value);
    let geometry = Geometry::new(diameter.value, width, clearance.value)?;
    let with = (("D", diameter), ("c", clearance));
    let says = "largest Reynolds number of laminar flow";
    let most = w.trace.law("Re_lim", says, &laminar::LAW, with, |_| {
        laminar::limit(&geometry)
    });
    w.result("reynolds_limit", most, "");
    if let (Some(speed), Some(eta), Some(density)) = (speed, eta, density) {
        let with = (
            ("rho", density),
            ("omega", speed),
            ("D", diameter),
            ("c", clearance),
            ("eta", eta),
        );
        let law = &laminar::REYNOLDS_NUMBER;
        let says = "Reynolds number of the film";
        let re = w.trace.law("Re", says, law, with, |(rho, n, _, _, eta)| {
            laminar::reynolds_number(&geometry, n, rho, eta)
        });
        w.result("reynolds", re, "");
        if re.value.base() >= most.value.base() {
            w.remark("the film is not laminar: friction and temperature are underestimated");
        }
    }
    Ok(())
}
