//! Temperatures from losses.

use super::steps::Recorded;
use super::{Asked, CLEARANCE, DIAMETER, GROUP, LOAD, METHOD_SAYS, SPEED, WIDTH, form, may, must};
use super::{route, steps};
use crate::quantity::convert::dynamic;
use crate::quantity::{
    Area, DynamicViscosity, HeatTransfer, Length, MassDensity, Power, Pressure,
    ThermodynamicTemperature, VolumeRate,
};
use crate::relation::Law;
use crate::relation::heat::balance::{CALIBRATION, calibrated};
use crate::relation::journal::feed::{Coolant, Feed};
use crate::relation::journal::film::Bearing;
use crate::relation::journal::heat::{Cooling, LAW, Settled, pedestal_area, settled, still_air};
use crate::relation::journal::{Route, iso7902};
use crate::relation::oil::density_iso15144;
use crate::relation::oil::piecewise::Curve;
use crate::relation::oil::viscosity_temperature::{Point, VISCOSITY, ViscosityCurve};
use crate::trace::{Known, Recorder};
use crate::work::{Args, Refusal, Relation, Worked};

pub(super) const JOURNAL_HEAT: Relation = Relation {
    name: "journal-heat",
    group: GROUP,
    law: &LAW,
    with: &[
        DIAMETER,
        WIDTH,
        CLEARANCE,
        LOAD,
        SPEED,
        must(
            "oil",
            "two viscosities or more with their temperatures, each as \"32 mm2/s at 40 degC\"",
        ),
        must("density15", "density of the oil at 15 degC"),
        form("inlet", "temperature of the oil fed", "cooled by oil"),
        form("ambient", "temperature of the air", "cooled by air"),
        may(
            "area",
            "surface of the housing, cooled by air",
            "15 times width times diameter",
        ),
        may("heat_transfer", "to the air", "15 W/(m2.K)"),
        may("feed_flow", "oil fed besides the side flow", "none"),
        may("feed_pressure", "of a hole opposite the load", "none"),
        may("feed_hole", "diameter of that hole", "none"),
        may(
            "method",
            METHOD_SAYS,
            "iso7902 from B/D 0.25 to 1, as the balance of that standard has it; else reynolds",
        ),
    ],
    gives: &[
        ("t_effective", "effective temperature of the film, degC"),
        ("eta", "dynamic viscosity there, mPa.s"),
        ("h_min", "least film there, um"),
        ("power", "friction power, W"),
        ("eccentricity", "eccentricity over radial clearance"),
        ("so", "load number So"),
        ("flow", "oil that carries heat, L/min, cooled by oil"),
        (
            "outlet",
            "temperature at which it leaves, degC, cooled by oil",
        ),
        (
            "t_effective_other",
            "by the other method, degC, where it applies",
        ),
        ("h_min_other", "by the other method, um, where it applies"),
    ],
    run: journal_heat,
};

pub(super) const HEAT_CALIBRATION: Relation = Relation {
    name: "heat-calibration",
    group: GROUP,
    law: &CALIBRATION,
    with: &[
        must("losses", "losses with the oil in use, at the reading"),
        must("reading", "temperature read in steady running"),
        must("ambient", "temperature of the air then"),
    ],
    gives: &[("conductance", "heat given off for every kelvin, W/K")],
    run: heat_calibration,
};

/// Dynamic from kinematic viscosity, for the record.
static DYNAMIC: Law = Law {
    name: "dynamic-viscosity",
    title: "Dynamic viscosity from kinematic viscosity and density",
    formula: "eta = nu rho",
    range: "at one temperature",
    source: "definition",
};

/// The oil of the row.
#[derive(Clone, Copy)]
struct Oil<'a> {
    curve: &'a Curve,
    rho15: MassDensity,
}

impl Oil<'_> {
    fn eta(&self, at: ThermodynamicTemperature) -> DynamicViscosity {
        let rho = density_iso15144::density(self.rho15, at);
        dynamic(self.curve.nu_at(at), rho)
    }
}

/// What takes the heat away, and the steps it was read in.
struct Chosen {
    cooling: Cooling,
    read: Recorded,
}

fn journal_heat(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let asked = Asked::read(args, w)?;
    let key = if args.has("points") { "points" } else { "oil" };
    let points = args.points(w, key)?;
    let rho15: Known<MassDensity> = args.quantity(w, "density15", "density at 15 degC")?;
    let chosen = chosen(args, w, &asked)?;
    let route = route(args, usual(&asked))?;
    let plain: Vec<Point> = points
        .iter()
        .map(|p| Point::new(p.at.value, p.nu.value))
        .collect();
    let (curve, _) = Curve::through(&plain)?;
    let oil = Oil {
        curve: &curve,
        rho15: rho15.value,
    };
    let found = balanced(&asked, &chosen.cooling, oil, route)?;
    let mut line = Recorded::default();
    for point in &points {
        line.0.extend([("nu", point.nu.step), ("T", point.at.step)]);
    }
    let mut read = chosen.read.clone();
    read.0.extend(line.0.iter().copied());
    read.0.push(("rho15", rho15.step));
    let read = read.and(&asked);
    let outcome = w.trace.apply(&LAW, read.clone(), |()| found);
    let says = "effective temperature of the film";
    let t = w.trace.take(&outcome, "T_eff", says, |s| s.t_effective);
    let eta = viscosity(w, (oil, line), rho15, t);
    let film = steps::film(&mut w.trace, &asked, eta, route)?;
    w.result("t_effective", t, "degC");
    w.result("eta", eta, "mPa.s");
    w.result("h_min", film.h_min, "um");
    w.result("power", film.power, "W");
    w.result("eccentricity", film.eccentricity, "");
    w.result("so", film.so, "");
    if let Some((t_out, flow)) = found.outlet {
        let says = "oil that carries heat";
        let flow = w.trace.take(&outcome, "Q", says, |_| flow);
        let says = "temperature at which it leaves";
        let outlet = w.trace.take(&outcome, "T_ex", says, |_| t_out);
        w.result("flow", flow, "L/min");
        w.result("outlet", outlet, "degC");
    }
    let chosen = Chosen { read, ..chosen };
    other(w, &asked, &chosen, (oil, route));
    steps::remarks(w, &asked.geometry, film.eccentricity.value);
    Ok(())
}

/// Viscosity at the temperature found, from the oil's line and its density.
fn viscosity(
    w: &mut Worked,
    (oil, mut line): (Oil, Recorded),
    rho15: Known<MassDensity>,
    t: Known<ThermodynamicTemperature>,
) -> Known<DynamicViscosity> {
    line.0.push(("T", t.step));
    let says = "kinematic viscosity there";
    let nu = w
        .trace
        .law("nu", says, &VISCOSITY, line, |()| oil.curve.nu_at(t.value));
    let with = (("rho15", rho15), ("T", t));
    let says = "density there";
    let law = &density_iso15144::LAW;
    let rho = w.trace.law("rho", says, law, with, |(rho15, t)| {
        density_iso15144::density(rho15, t)
    });
    let with = (("nu", nu), ("rho", rho));
    let says = "dynamic viscosity there";
    w.trace
        .law("eta", says, &DYNAMIC, with, |(nu, rho)| dynamic(nu, rho))
}

/// The closed forms inside their range, as the balance of the standard has it.
fn usual(asked: &Asked) -> Route {
    if iso7902::covers(asked.geometry.width_ratio()) {
        Route::Iso7902
    } else {
        Route::Reynolds
    }
}

fn balanced(asked: &Asked, cooling: &Cooling, oil: Oil, route: Route) -> Result<Settled, Refusal> {
    let bearing = Bearing::new(asked.geometry, asked.duty, route)?;
    Ok(settled(&bearing, cooling, |t| oil.eta(t))?)
}

/// The second opinion, where the other method applies.
fn other(w: &mut Worked, asked: &Asked, chosen: &Chosen, (oil, used): (Oil, Route)) {
    let (route, name) = match used {
        Route::Reynolds => (Route::Iso7902, "the closed form of ISO 7902-2"),
        Route::Iso7902 => (Route::Reynolds, "the Reynolds solution"),
    };
    match balanced(asked, &chosen.cooling, oil, route) {
        Ok(found) => {
            let outcome = w.trace.apply(&LAW, chosen.read.clone(), |()| found);
            let says = "effective temperature by the other method";
            let t = w.trace.take(&outcome, "T_eff", says, |s| s.t_effective);
            let says = "least film by the other method";
            let h = w.trace.take(&outcome, "h_min", says, |s| s.film.h_min);
            w.result("t_effective_other", t, "degC");
            w.result("h_min_other", h, "um");
            w.remark(format!("second opinion by {name}"));
        }
        Err(refused) => w.remark(format!("no second opinion by {name}: {}", refused.message)),
    }
    if iso7902::covers(asked.geometry.width_ratio()) {
        steps::error_of_closed_form(w, &asked.geometry);
    }
}

/// Whether oil or air cools; not both, not neither.
fn chosen(args: &mut Args, w: &mut Worked, asked: &Asked) -> Result<Chosen, Refusal> {
    let inlet: Option<Known<ThermodynamicTemperature>> =
        args.maybe(w, "inlet", "temperature of the oil fed")?;
    let ambient: Option<Known<ThermodynamicTemperature>> =
        args.maybe(w, "ambient", "temperature of the air")?;
    match (inlet, ambient) {
        (Some(inlet), None) => by_oil(args, w, asked, inlet),
        (None, Some(ambient)) => by_air(args, w, asked, ambient),
        (Some(_), Some(_)) => Err(Refusal::new(
            "cooling-twice",
            "inlet means cooled by the oil fed, ambient and area cooled by the air; give one",
        )),
        (None, None) => Err(Refusal::new(
            "cooling-missing",
            "what cools the bearing is missing; write inlet=\"45 degC\" where oil is fed through \
             it, or ambient=\"25 degC\" and area=\"0.3 m2\" where the housing does",
        )),
    }
}

fn by_oil(
    args: &mut Args,
    w: &mut Worked,
    asked: &Asked,
    inlet: Known<ThermodynamicTemperature>,
) -> Result<Chosen, Refusal> {
    let mut read = Recorded(vec![("T_in", inlet.step)]);
    let flow: Option<Known<VolumeRate>> = args.maybe(w, "feed_flow", "oil fed besides")?;
    let pressure: Option<Known<Pressure>> = args.maybe(w, "feed_pressure", "feed pressure")?;
    let hole: Option<Known<Length>> = args.maybe(w, "feed_hole", "diameter of the feed hole")?;
    let feed = match (flow, pressure, hole) {
        (None, None, None) => Feed::Drawn,
        (Some(flow), None, None) => {
            read.0.push(("Q_p", flow.step));
            Feed::Besides(flow.value)
        }
        (None, Some(pressure), Some(hole)) => {
            read.0.extend([("p_en", pressure.step), ("d_H", hole.step)]);
            Feed::hole(&asked.geometry, pressure.value, hole.value)?
        }
        _ => {
            let words = "the feed is either feed_flow, or feed_pressure with feed_hole";
            return Err(Refusal::new("feed-unclear", words));
        }
    };
    let why = "1.8 MJ/(m3 K) as ISO 7902-1 takes it, here as 900 kg/m3 and 2000 J/(kg K)";
    let coolant = Coolant::iso7902();
    let density = w
        .trace
        .assume("rho", "density for the heat carried", coolant.density, why);
    let heat = coolant.specific_heat;
    let heat = w.trace.assume("c_p", "specific heat of the oil", heat, why);
    read.0.extend([("rho", density.step), ("c_p", heat.step)]);
    let cooling = Cooling::Oil {
        inlet: inlet.value,
        feed,
        coolant,
    };
    Ok(Chosen { cooling, read })
}

fn by_air(
    args: &mut Args,
    w: &mut Worked,
    asked: &Asked,
    ambient: Known<ThermodynamicTemperature>,
) -> Result<Chosen, Refusal> {
    let area: Option<Known<Area>> = args.maybe(w, "area", "surface of the housing")?;
    let area = area.unwrap_or_else(|| {
        let usual = pedestal_area(asked.geometry.projected_area());
        let why = "15 times width times diameter: the lower end of usual pedestals";
        w.remark("area assumed: 15 times width times diameter, a small pedestal");
        w.trace.assume("A", "surface of the housing", usual, why)
    });
    let transfer: Option<Known<HeatTransfer>> =
        args.maybe(w, "heat_transfer", "heat transfer to the air")?;
    let transfer = transfer.unwrap_or_else(|| {
        let why = "the lower end of 15 to 20 W/(m2.K) in still air, ISO 7902-1 (from memory)";
        w.trace
            .assume("k", "heat transfer to the air", still_air(), why)
    });
    let read = Recorded(vec![
        ("T_amb", ambient.step),
        ("A", area.step),
        ("k", transfer.step),
    ]);
    let cooling = Cooling::Air {
        ambient: ambient.value,
        area: area.value,
        transfer: transfer.value,
    };
    Ok(Chosen { cooling, read })
}

fn heat_calibration(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let losses: Known<Power> = args.quantity(w, "losses", "losses at the reading")?;
    let reading: Known<ThermodynamicTemperature> =
        args.quantity(w, "reading", "temperature read")?;
    let ambient: Known<ThermodynamicTemperature> =
        args.quantity(w, "ambient", "temperature of the air")?;
    let with = (("T_amb", ambient), ("T_read", reading), ("P_V", losses));
    let says = "heat given off for every kelvin";
    let conductance = w.trace.attempt(
        "kA",
        says,
        &CALIBRATION,
        with,
        |(ambient, reading, losses)| calibrated(ambient, reading, losses),
    )?;
    w.result("conductance", conductance, "W/K");
    Ok(())
}
