//! Rows of heat: heaters, housings, seals.

use super::contact::{form, may, must};
use super::journal::steps::Recorded;
use super::{Args, Refusal, Relation, Worked};
use crate::quantity::convert::kelvins;
use crate::quantity::{
    AngularVelocity, Area, HeatFluxDensity, HeatTransfer, Length, MassDensity, Measure, Power,
    SpecificHeatCapacity, TemperatureInterval, ThermalConductance, ThermodynamicTemperature, Time,
    Velocity, Volume,
};
use crate::relation::heat::balance::{
    AIR, CONDUCTANCE, LAW as BALANCE, Surroundings, conductance, moving_air, settled,
};
use crate::relation::heat::heater::{
    POWER, WATT_DENSITY, power, power_of_sheath, sheath, time, watt_density,
};
use crate::relation::heat::seal;
use crate::relation::journal::heat::still_air;
use crate::trace::{Known, Recorder, StepId};

const GROUP: &str = "heat";

pub(super) const ROWS: &[Relation] = &[HEATER_POWER, HEATER_WATT_DENSITY, HOUSING, SEAL];

const HEATER_POWER: Relation = Relation {
    name: "heater-power",
    group: GROUP,
    law: &POWER,
    with: &[
        must("volume", "oil to be warmed, 600 L"),
        must("rise", "by how much, 20 K"),
        form("time", "time allowed, 4 h: gives the power", "time"),
        form("power", "heater at hand, 3 kW: gives the time", "power"),
        may("density", "density of the oil", "880 kg/m3"),
        may(
            "specific_heat",
            "specific heat of the oil",
            "2.0 kJ/(kg.K), common practice",
        ),
        may("losses", "what the tank gives off meanwhile", "0 W"),
    ],
    gives: &[
        ("power", "power of the heater, kW"),
        ("time", "time it takes, h"),
    ],
    run: heater_power,
};

/// A tank of oil to be warmed.
struct Tank {
    volume: Known<Volume>,
    density: Known<MassDensity>,
    heat: Known<SpecificHeatCapacity>,
    rise: Known<TemperatureInterval>,
    losses: Known<Power>,
}

impl Tank {
    fn read(args: &mut Args, w: &mut Worked) -> Result<Self, Refusal> {
        let volume = args.quantity(w, "volume", "oil to be warmed")?;
        let rise = args.quantity(w, "rise", "rise")?;
        let density = args.maybe(w, "density", "density of the oil")?;
        let density = density.unwrap_or_else(|| {
            let usual = MassDensity::from_base(880.0);
            let says = "density of the oil";
            w.trace.assume("rho", says, usual, "mineral oil")
        });
        let heat = args.maybe(w, "specific_heat", "specific heat of the oil")?;
        let heat = heat.unwrap_or_else(|| {
            let usual = SpecificHeatCapacity::from_base(2000.0);
            let says = "specific heat of the oil";
            w.trace.assume("c_p", says, usual, "common practice")
        });
        let losses = args.maybe(w, "losses", "what the tank gives off")?;
        let losses = losses.unwrap_or_else(|| {
            let none = Power::from_base(0.0);
            let says = "what the tank gives off";
            w.trace.assume("P_loss", says, none, "not stated")
        });
        Ok(Self {
            volume: positive(volume, "volume")?,
            density: positive(density, "density")?,
            heat: positive(heat, "specific_heat")?,
            rise: positive(rise, "rise")?,
            losses,
        })
    }

    fn steps(&self, last: (&'static str, StepId)) -> Recorded {
        Recorded(vec![
            ("V", self.volume.step),
            ("rho", self.density.step),
            ("c_p", self.heat.step),
            ("Delta_t", self.rise.step),
            last,
            ("P_loss", self.losses.step),
        ])
    }

    fn power(&self, within: Time) -> Power {
        let (volume, rise) = (self.volume.value, self.rise.value);
        let warms = power(volume, self.density.value, self.heat.value, rise, within);
        Power::from_base(warms.base() + self.losses.value.base())
    }

    /// `None` where the heater gives no more than the tank loses.
    fn time(&self, with: Power) -> Option<Time> {
        let (volume, rise) = (self.volume.value, self.rise.value);
        let warms = Power::from_base(with.base() - self.losses.value.base());
        let (density, heat) = (self.density.value, self.heat.value);
        (warms.base() > 0.0).then(|| time(volume, density, heat, rise, warms))
    }
}

fn heater_power(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let tank = Tank::read(args, w)?;
    let within: Option<Known<Time>> = args.maybe(w, "time", "time allowed")?;
    let with: Option<Known<Power>> = args.maybe(w, "power", "heater at hand")?;
    match (within, with) {
        (Some(within), None) => {
            let within = positive(within, "time")?;
            let steps = tank.steps(("tau", within.step));
            let says = "power of the heater";
            let found = w
                .trace
                .law("P", says, &POWER, steps, |()| tank.power(within.value));
            w.result("power", found, "kW");
        }
        (None, Some(with)) => {
            let time = tank.time(with.value).ok_or_else(|| {
                let words = "the heater gives no more than the tank loses: it warms nothing";
                Refusal::new("no-answer", words)
            })?;
            let steps = tank.steps(("P", with.step));
            let says = "time it takes";
            let found = w.trace.law("tau", says, &POWER, steps, |()| time);
            w.result("time", found, "h");
        }
        _ => {
            let words = "give either time, for the power it needs, or power, for the time it takes";
            return Err(Refusal::new("input-missing", words));
        }
    }
    Ok(())
}

const HEATER_WATT_DENSITY: Relation = Relation {
    name: "heater-watt-density",
    group: GROUP,
    law: &WATT_DENSITY,
    with: &[
        must("power", "power of the heater, 9 kW"),
        must("area", "surface of its sheath, 1900 cm2"),
        may(
            "at_most",
            "watt density the oil bears, 1.6 W/cm2",
            "not compared",
        ),
    ],
    gives: &[
        ("watt_density", "watt density, W/cm2"),
        (
            "power_at_most",
            "power the sheath may give at that limit, kW",
        ),
        ("area_at_least", "sheath the power needs at that limit, cm2"),
    ],
    run: heater_watt_density,
};

fn heater_watt_density(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let heater: Known<Power> =
        positive(args.quantity(w, "power", "power of the heater")?, "power")?;
    let area: Known<Area> = positive(args.quantity(w, "area", "surface of its sheath")?, "area")?;
    let most: Option<Known<HeatFluxDensity>> =
        args.maybe(w, "at_most", "watt density the oil bears")?;
    let says = "watt density";
    let with = (("P", heater), ("A", area));
    let found = w
        .trace
        .law("q", says, &WATT_DENSITY, with, |(p, a)| watt_density(p, a));
    w.result("watt_density", found, "W/cm2");
    let Some(most) = most else { return Ok(()) };
    let most = positive(most, "at_most")?;
    let says = "power the sheath may give";
    let with = (("q", most), ("A", area));
    let allowed = w.trace.law("P_max", says, &WATT_DENSITY, with, |(q, a)| {
        power_of_sheath(a, q)
    });
    w.result("power_at_most", allowed, "kW");
    let says = "sheath the power needs";
    let with = (("P", heater), ("q", most));
    let needed = w
        .trace
        .law("A_min", says, &WATT_DENSITY, with, |(p, q)| sheath(p, q));
    w.result("area_at_least", needed, "cm2");
    if found.value.base() > most.value.base() {
        w.remark("hotter on the sheath than the oil bears");
    }
    Ok(())
}

const HOUSING: Relation = Relation {
    name: "housing-temperature",
    group: GROUP,
    law: &BALANCE,
    with: &[
        must(
            "losses",
            "losses, 540 W; what changes with the oil is best taken near the answer",
        ),
        must("ambient", "temperature of the air"),
        form("area", "surface that gives off heat, 1.8 m2", "surface"),
        form(
            "heat_transfer",
            "heat transfer to the air; 16 W/(m2.K) in still air where not given",
            "surface",
        ),
        form(
            "air_speed",
            "speed of the air, above 1.2 m/s, instead of heat_transfer",
            "surface",
        ),
        form(
            "conductance",
            "heat given off for every kelvin, 28 W/K",
            "conductance",
        ),
    ],
    gives: &[
        ("temperature", "temperature of the housing, degC"),
        ("rise", "rise over the air, K"),
        ("conductance", "heat given off for every kelvin, W/K"),
    ],
    run: housing,
};

fn housing(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let losses: Known<Power> = positive(args.quantity(w, "losses", "losses")?, "losses")?;
    let says = "temperature of the air";
    let ambient: Known<ThermodynamicTemperature> = args.quantity(w, "ambient", says)?;
    let stated: Option<Known<ThermalConductance>> =
        args.maybe(w, "conductance", "heat given off for every kelvin")?;
    let gives = match stated {
        Some(stated) => positive(stated, "conductance")?,
        None => by_surface(args, w)?,
    };
    let surroundings = Surroundings {
        ambient: ambient.value,
        conductance: gives.value,
        hottest: ThermodynamicTemperature::from_base(ambient.value.base() + 1e4),
    };
    let with = (("P_V", losses), ("kA", gives), ("T_amb", ambient));
    let says = "temperature of the housing";
    let found = w.trace.attempt(
        "T",
        says,
        &BALANCE,
        with,
        |(p, _, _): (Power, ThermalConductance, ThermodynamicTemperature)| {
            settled(&surroundings, |_| p)
        },
    );
    let found = found.map_err(|refused| Refusal::new(refused.name(), refused.to_string()))?;
    let says = "rise over the air";
    let with = (("T", found), ("T_amb", ambient));
    let rise = w.trace.law(
        "Delta_t",
        says,
        &crate::relation::sump::RISE,
        with,
        |(t, a): (ThermodynamicTemperature, ThermodynamicTemperature)| kelvins(t.base() - a.base()),
    );
    w.result("temperature", found, "degC");
    w.result("rise", rise, "K");
    w.result("conductance", gives, "W/K");
    Ok(())
}

fn by_surface(args: &mut Args, w: &mut Worked) -> Result<Known<ThermalConductance>, Refusal> {
    let says = "surface that gives off heat";
    let area: Known<Area> = positive(args.quantity(w, "area", says)?, "area")?;
    let says = "heat transfer to the air";
    let stated: Option<Known<HeatTransfer>> = args.maybe(w, "heat_transfer", says)?;
    let air: Option<Known<Velocity>> = args.maybe(w, "air_speed", "speed of the air")?;
    let transfer = match (stated, air) {
        (Some(_), Some(_)) => {
            let words = "heat_transfer and air_speed each say how well the air cools: give one";
            return Err(Refusal::new("input-contradictory", words));
        }
        (Some(stated), None) => positive(stated, "heat_transfer")?,
        (None, Some(v)) => {
            let moving = moving_air(v.value).ok_or_else(|| {
                let words = "air_speed must be above 1.2 m/s; below, leave it out for still air";
                Refusal::new("out-of-range", words)
            })?;
            w.trace
                .law("k", says, &AIR, (("v", v),), |_: (Velocity,)| moving)
        }
        (None, None) => {
            let why = "the lower end of 15 to 20 W/(m2.K) in still air, ISO 7902-1 (from memory)";
            w.trace.assume("k", says, still_air(), why)
        }
    };
    let says = "heat given off for every kelvin";
    let with = (("k", transfer), ("A", area));
    Ok(w.trace
        .law("kA", says, &CONDUCTANCE, with, |(k, a)| conductance(k, a)))
}

const SEAL: Relation = Relation {
    name: "seal-loss",
    group: GROUP,
    law: &seal::LAW,
    with: &[
        must("diameter", "diameter of the shaft under the lip, 60 mm"),
        must("speed", "speed of the shaft, 1480 r/min"),
    ],
    gives: &[("power", "power lost under one lip, W")],
    run: seal_loss,
};

fn seal_loss(args: &mut Args, w: &mut Worked) -> Result<(), Refusal> {
    let d: Known<Length> = args.quantity(w, "diameter", "diameter of the shaft")?;
    let n: Known<AngularVelocity> = args.quantity(w, "speed", "speed of the shaft")?;
    let with = (("d", d), ("n", n));
    let says = "power lost under the lip";
    let found = w
        .trace
        .attempt("P", says, &seal::LAW, with, |(d, n)| seal::loss(d, n))?;
    w.result("power", found, "W");
    Ok(())
}

fn positive<Q: Measure>(known: Known<Q>, key: &str) -> Result<Known<Q>, Refusal> {
    if known.value.base() > 0.0 {
        Ok(known)
    } else {
        let words = format!("{key} must be above zero");
        Err(Refusal::new("not-positive", words))
    }
}
