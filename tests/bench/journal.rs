//! How long bearings and pads take, as a share of what they may take.
//!
//! Run with `cargo bench --bench journal`. Every line is the median of nine rounds over its
//! budget: below 1 is within it.

#![expect(clippy::print_stdout, reason = "a benchmark prints")]
#![expect(clippy::disallowed_methods, reason = "a benchmark reads the clock")]

use filmwright::quantity::convert::{celsius, mm, number, rpm};
use filmwright::quantity::{
    DynamicViscosity, Force, Measure, Ratio, ThermodynamicTemperature, Velocity,
};
use filmwright::relation::journal::feed::{Coolant, Feed};
use filmwright::relation::journal::film::Bearing;
use filmwright::relation::journal::heat::{Cooling, settled};
use filmwright::relation::journal::reynolds::{Grid, solve};
use filmwright::relation::journal::table::Cut;
use filmwright::relation::journal::{Duty, Geometry, Route};
use filmwright::relation::thrust::pad::Pad;
use filmwright::relation::thrust::shape::Shape;
use std::hint::black_box;
use std::time::Instant;

/// Median over nine rounds of the time a call takes, seconds.
fn median(calls: u32, mut call: impl FnMut(u32)) -> f64 {
    let mut rounds: Vec<f64> = (0..9)
        .map(|_| {
            let start = Instant::now();
            for index in 0..calls {
                call(index);
            }
            start.elapsed().as_secs_f64() / f64::from(calls)
        })
        .collect();
    rounds.sort_by(f64::total_cmp);
    rounds[4]
}

fn report(what: &str, seconds: f64, budget: f64) {
    let ratio = seconds / budget;
    println!("{what:<44} {ratio:>7.3} of {:>8.1} us", budget * 1e6);
}

/// Width ratio and eccentricity that wander over the table.
fn place(index: u32) -> (Ratio, Ratio) {
    let fraction = |step: f64| (f64::from(index) * step).fract();
    let b = 0.25 + 1.75 * fraction(0.618_034);
    (number(b), number(0.02 + 0.95 * fraction(0.414_214)))
}

/// An oil of 46 mm2/s that halves every 20 K, near enough for timing.
fn eta(at: ThermodynamicTemperature) -> DynamicViscosity {
    DynamicViscosity::from_base(0.04 * libm::exp(-(at.base() - 313.15) / 28.85))
}

fn main() {
    let solved = median(40, |i| {
        let (b, e) = place(i);
        black_box(solve(e, b, Grid::QUICK).is_ok());
    });
    report("journal bearing solved, one point", solved, 5e-3);
    let looked_up = median(20_000, |i| {
        let (b, e) = place(i);
        black_box(Cut::at(b).and_then(|cut| cut.characteristic(e)));
    });
    report("journal bearing interpolated, one point", looked_up, 2e-6);

    let geometry = Geometry::new(mm(200.0), mm(150.0), mm(0.16)).expect("sound sizes");
    let duty = Duty::new(Force::from_base(40e3), rpm(3000.0)).expect("sound duty");
    let bearing = Bearing::new(geometry, duty, Route::Reynolds).expect("a ratio of the table");
    let film = median(2_000, |i| {
        let eta = DynamicViscosity::from_base(0.01 + 1e-5 * f64::from(i));
        black_box(bearing.film(eta).is_ok());
    });
    report("film from load and viscosity", film, 20e-6);
    let cooling = Cooling::Oil {
        inlet: celsius(45.0),
        feed: Feed::Drawn,
        coolant: Coolant::iso7902(),
    };
    let heat = median(100, |_| {
        black_box(settled(&bearing, &cooling, eta).is_ok());
    });
    report("heat balance of a journal bearing", heat, 1e-3);

    let load = Force::from_base(1e5);
    let pad = Pad::new(mm(150.0), mm(150.0), load, Velocity::from_base(12.0));
    let pad = pad.expect("a sound pad");
    let given = median(200, |i| {
        let shape = Shape::Ratio(number(1.5 + 0.01 * f64::from(i)));
        black_box(pad.film(shape, DynamicViscosity::from_base(0.03)).is_ok());
    });
    report("thrust pad at a ratio", given, 1e-3);
    let best = median(10, |_| {
        black_box(
            pad.film(Shape::Best, DynamicViscosity::from_base(0.03))
                .is_ok(),
        );
    });
    report("thrust pad at its best ratio", best, 50e-3);
}
