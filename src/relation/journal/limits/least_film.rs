//! The least film a journal bearing should run with.

use crate::quantity::convert::{mm, to_mm, um};
use crate::quantity::{Length, Measure, Velocity};
use crate::relation::Law;

/// The table of the standard.
pub static ISO7902: Law = Law {
    name: "journal-film-limit",
    title: "least permissible film of a journal bearing",
    formula: "h_lim by diameter and surface speed",
    range: "shaft 24 to 2500 mm, Rz of the shaft to 4 um, geometry true and aligned",
    source: "ISO 7902-3 (from memory)",
};

/// Trumpler's rule.
pub static TRUMPLER: Law = Law {
    name: "journal-film-limit-trumpler",
    title: "least film of a journal bearing by Trumpler's criterion",
    formula: "h_0 = 0.0002 in + 0.00004 D",
    range: "ground shaft; to go with a temperature to 121 degC, a specific load at starting to \
            2.07 MPa and twice the load",
    source: "Trumpler 1966 (from memory)",
};

/// Height of the roughness.
pub static ROUGHNESS: Law = Law {
    name: "journal-film-limit-roughness",
    title: "least film that keeps the roughness of journal and bearing apart",
    formula: "h_min = Rz_shaft + Rz_bore",
    range: "run-in surfaces",
    source: "common practice",
};

/// The same from rms roughness.
pub static ROUGHNESS_RMS: Law = Law {
    name: "journal-film-limit-rms",
    title: "least film over the composite rms roughness of journal and bearing",
    formula: "h_min = 5 sqrt(Rq_shaft^2 + Rq_bore^2)",
    range: "4 to 5 times is usual; the upper end is taken",
    source: "common practice",
};

/// Upper ends of the classes of diameter, mm.
const DIAMETERS: [f64; 5] = [63.0, 160.0, 400.0, 1000.0, 2500.0];
/// Upper ends of the classes of speed, m/s; the last class is open.
const SPEEDS: [f64; 4] = [1.0, 3.0, 10.0, 30.0];
/// Least film, micrometres.
const FILMS: [[f64; 5]; 5] = [
    [3.0, 4.0, 5.0, 7.0, 10.0],
    [4.0, 5.0, 7.0, 9.0, 12.0],
    [6.0, 7.0, 9.0, 11.0, 14.0],
    [8.0, 9.0, 11.0, 13.0, 16.0],
    [10.0, 12.0, 14.0, 16.0, 18.0],
];
const SMALLEST: f64 = 24.0;

/// Least film of [`ISO7902`]; a value on the border of two classes belongs to the lower one.
/// `None` for a diameter outside 24 to 2500 mm.
pub fn iso7902(diameter: Length, surface_speed: Velocity) -> Option<Length> {
    // a diameter converted from inches or metres may miss the border by a rounding
    let d_mm = to_mm(diameter) * (1.0 - 1e-12);
    let u = surface_speed.base().abs() * (1.0 - 1e-12);
    if d_mm < SMALLEST * (1.0 - 1e-9) {
        return None;
    }
    let row = DIAMETERS.iter().position(|most| d_mm <= *most)?;
    let column = SPEEDS.iter().position(|most| u <= *most);
    Some(um(FILMS[row][column.unwrap_or(SPEEDS.len())]))
}

/// Least film of [`TRUMPLER`].
pub fn trumpler(diameter: Length) -> Length {
    mm(0.0002 * 25.4 + 0.00004 * to_mm(diameter))
}

/// Least film of [`ROUGHNESS`].
pub fn roughness(rz_shaft: Length, rz_bore: Length) -> Length {
    Length::from_base(rz_shaft.base() + rz_bore.base())
}

/// Least film of [`ROUGHNESS_RMS`].
pub fn roughness_rms(rq_shaft: Length, rq_bore: Length) -> Length {
    let (shaft, bore) = (rq_shaft.base(), rq_bore.base());
    Length::from_base(5.0 * (shaft * shaft + bore * bore).sqrt())
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::to_um;

    #[test]
    fn borders_belong_to_the_lower_class() {
        let film = |d: f64, u: f64| iso7902(mm(d), Velocity::from_base(u)).map(to_um);
        let near = |got: Option<f64>, want: f64| {
            assert!((got.unwrap() - want).abs() < 1e-9, "{got:?} {want}");
        };
        near(film(63.0, 1.0), 3.0);
        near(film(63.1, 1.1), 5.0);
        near(film(2500.0, 30.1), 18.0);
        near(film(24.0, 0.0), 3.0);
        assert_eq!(film(23.9, 1.0), None);
        assert_eq!(film(2501.0, 1.0), None);
    }
}
