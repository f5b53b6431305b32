//! How warm a journal bearing's film runs over the oil fed, as a function of its viscosity.
//!
//! At a given viscosity the film's losses and the oil it passes are settled, and so is its rise
//! over the feed, whatever the oil. The rise grows with the viscosity. So a settled film reaches
//! a limit just where the oil has the viscosity of that limit at the feed temperature plus the
//! rise of that limit: no oil need be iterated for.

use super::NoFilm;
use super::feed::{Coolant, Feed};
use super::film::{Bearing, Film};
use crate::numeric::math::{exp, ln};
use crate::numeric::root::bracketed;
use crate::quantity::{DynamicViscosity, Measure, Power, TemperatureInterval, VolumeRate};
use crate::relation::Law;

/// Rise of the film over the oil fed.
pub static RISE: Law = Law {
    name: "journal-film-rise",
    title: "rise of the film of a journal bearing over the oil fed",
    formula: "Delta_T = T_eff - T_in = P_f/(2 rho c_p (Q3 + Q_p))",
    range: "steady running, the oil carries the heat and leaves twice as far above the feed; Q_p \
            pressed through by the feed, where pressure and hole are known",
    source: "ISO 7902-1 for the balance and its rho c_p of 1.8 MJ/(m3 K) (from memory)",
};

/// Viscosity at which the film rises by so much.
pub static THICKEST: Law = Law {
    name: "journal-viscosity-for-rise",
    title: "viscosity at which the oil leaves a journal bearing at its largest temperature",
    formula: "P_f/(2 rho c_p (Q3 + Q_p)) = (T_lim - T_in)/2, solved for eta",
    range: "as for the rise of the film; thicker oil runs hotter",
    source: "ISO 7902-1 for the balance and its rho c_p of 1.8 MJ/(m3 K) (from memory)",
};

/// Viscosity at which the losses are those the housing gives off.
pub static THICKEST_IN_AIR: Law = Law {
    name: "journal-viscosity-for-losses",
    title: "viscosity at which a journal bearing cooled by air reaches its largest temperature",
    formula: "P_f(eta) = k A (T_lim - T_amb), solved for eta",
    range: "steady running, one temperature throughout; thicker oil runs hotter",
    source: "ISO 7902-1 for the balance (from memory)",
};

/// Rise of [`RISE`] from losses and flow.
pub fn rise(power: Power, flow: VolumeRate, coolant: Coolant) -> TemperatureInterval {
    let carried = 2.0 * coolant.heat_per_volume() * flow.base();
    TemperatureInterval::from_base(power.base() / carried)
}

/// Oil that carries heat out of a film: what leaves at the edges and what the feed presses
/// through.
fn flow(bearing: &Bearing, feed: &Feed, eta: DynamicViscosity, film: &Film) -> VolumeRate {
    let pressed = feed.flow(bearing.geometry(), eta, film.eccentricity);
    VolumeRate::from_base(film.side_flow.base() + pressed.base())
}

/// Rise of [`RISE`] at a viscosity.
///
/// # Errors
/// A film thinner than 3 % of the clearance.
pub fn rise_at(
    bearing: &Bearing,
    eta: DynamicViscosity,
    (feed, coolant): (&Feed, Coolant),
) -> Result<TemperatureInterval, NoFilm> {
    let film = bearing.film(eta)?;
    let flow = flow(bearing, feed, eta, &film);
    Ok(rise(film.power, flow, coolant))
}

/// The thinnest viscosity with a full film, at eccentricity 0.97.
pub fn thinnest(bearing: &Bearing) -> DynamicViscosity {
    let unit = bearing.load_number(DynamicViscosity::from_base(1.0)).base();
    // a millionth on the safe side of the end of the solution
    DynamicViscosity::from_base(unit / bearing.most().base() * (1.0 + 1e-6))
}

/// The viscosity of [`THICKEST`]; `None` where the thinnest film rises by more already, or no
/// viscosity up to ten thousand times as thick rises by as much.
pub fn for_rise(
    bearing: &Bearing,
    wanted: TemperatureInterval,
    (feed, coolant): (&Feed, Coolant),
) -> Option<DynamicViscosity> {
    solved(bearing, wanted.base(), |film, eta| {
        let flow = flow(bearing, feed, eta, film);
        rise(film.power, flow, coolant).base()
    })
}

/// The viscosity of [`THICKEST_IN_AIR`]; `None` as for [`for_rise`].
pub fn for_power(bearing: &Bearing, wanted: Power) -> Option<DynamicViscosity> {
    solved(bearing, wanted.base(), |film, _| film.power.base())
}

/// The viscosity at which what grows with it reaches a value.
fn solved(
    bearing: &Bearing,
    wanted: f64,
    grows: impl Fn(&Film, DynamicViscosity) -> f64,
) -> Option<DynamicViscosity> {
    let least = thinnest(bearing).base();
    let excess = |ln_eta: f64| {
        let eta = DynamicViscosity::from_base(exp(ln_eta));
        let film = bearing.film(eta);
        film.map_or(f64::NAN, |film| ln(grows(&film, eta) / wanted))
    };
    let root = bracketed(ln(least), ln(least * 1e4), excess).ok()?;
    Some(DynamicViscosity::from_base(exp(root.at)))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::Force;
    use crate::quantity::convert::{kelvins, mm, rpm};
    use crate::relation::journal::{Duty, Geometry, Route};

    fn bearing() -> Bearing {
        let geometry = Geometry::new(mm(200.0), mm(150.0), mm(0.16)).unwrap();
        let duty = Duty::new(Force::from_base(40e3), rpm(3000.0)).unwrap();
        Bearing::new(geometry, duty, Route::Iso7902).unwrap()
    }

    /// The turbine bearing of `film_checks.json`, jb-51: 19.71 mPa s, film at 56.45 °C, fed at 45 °C.
    #[test]
    fn the_rise_is_that_of_the_settled_bearing() {
        let eta = DynamicViscosity::from_base(0.019_708_7);
        let rise = rise_at(&bearing(), eta, (&Feed::Drawn, Coolant::iso7902())).unwrap();
        assert!((rise.base() - 11.4527).abs() < 0.03, "{rise:?}");
    }

    /// With oil pressed through a hole the film rises less, and the two still undo each other.
    #[test]
    fn oil_pressed_through_cools() {
        let bearing = bearing();
        let pressure = crate::quantity::Pressure::from_base(2e5);
        let hole = Feed::hole(bearing.geometry(), pressure, mm(8.0)).unwrap();
        let coolant = Coolant::iso7902();
        let eta = DynamicViscosity::from_base(0.02);
        let drawn = rise_at(&bearing, eta, (&Feed::Drawn, coolant)).unwrap();
        let pressed = rise_at(&bearing, eta, (&hole, coolant)).unwrap();
        let film = bearing.film(eta).unwrap();
        let besides = hole.flow(bearing.geometry(), eta, film.eccentricity);
        let share = film.side_flow.base() / (film.side_flow.base() + besides.base());
        assert!((pressed.base() / drawn.base() / share - 1.0).abs() < 1e-12);
        let again = for_rise(&bearing, pressed, (&hole, coolant)).unwrap();
        assert!((again.base() / eta.base() - 1.0).abs() < 1e-9);
    }

    #[test]
    fn viscosity_and_rise_undo_each_other_and_rise_together() {
        let bearing = bearing();
        let fed = (&Feed::Drawn, Coolant::iso7902());
        let mut before = 0.0;
        for rise in [8.0, 11.0, 20.0, 40.0] {
            let eta = for_rise(&bearing, kelvins(rise), fed).unwrap();
            let again = rise_at(&bearing, eta, fed).unwrap();
            assert!((again.base() / rise - 1.0).abs() < 1e-9);
            assert!(eta.base() > before);
            before = eta.base();
        }
        assert!(for_rise(&bearing, kelvins(1e-3), fed).is_none());
    }
}
