//! Film thickness of rollers, gear teeth and cams: long contacts.
//!
//! Sources by function. Isothermal, fully flooded, smooth. Fitted roughly for G 1000 to 6000,
//! U 1e-13 to 1e-10, W 1e-5 to 4e-4; beyond, heating or starvation act first.

use super::groups::Groups;
use crate::numeric::math::pow;
use crate::quantity::{Length, Measure};
use crate::relation::Law;

/// The range all of these are used in, in words.
const RANGE: &str = "isothermal, fully flooded, smooth line contact of hard bodies; about G 1000 to 6000, U 1e-13 to 1e-10, W 1e-5 to 4e-4, pressure 0.3 to 3 GPa";

/// Minimum film, 1966.
pub static MINIMUM_1966: Law = Law {
    name: "film-line-1966",
    title: "Minimum film of a line contact, Dowson and Higginson 1966",
    formula: "h_min = R 1.6 G^0.6 U^0.7 W^-0.13",
    range: RANGE,
    source: "Dowson and Higginson, Elasto-hydrodynamic Lubrication, 1966; the same exponents in ISO/TS 6336-22",
};

/// Minimum film, 1968.
pub static MINIMUM_1968: Law = Law {
    name: "film-line",
    title: "Minimum film of a line contact, Dowson 1968",
    formula: "h_min = R 2.65 G^0.54 U^0.7 W^-0.13",
    range: RANGE,
    source: "Dowson, Proc. IMechE 1968 (revised Dowson-Higginson)",
};

/// Central film, Dowson and Toyoda.
pub static CENTRAL_DOWSON_TOYODA: Law = Law {
    name: "film-line-dowson-toyoda",
    title: "Central film of a line contact, Dowson and Toyoda 1979",
    formula: "h_c = R 3.06 G^0.56 U^0.69 W^-0.10",
    range: RANGE,
    source: "Dowson and Toyoda 1979; used by AGMA 925",
};

/// Minimum film, Pan and Hamrock.
pub static MINIMUM_PAN_HAMROCK: Law = Law {
    name: "film-line-pan-hamrock",
    title: "Minimum film of a line contact, Pan and Hamrock 1989",
    formula: "h_min = R 1.714 U^0.694 G^0.568 W^-0.128",
    range: RANGE,
    source: "Pan and Hamrock 1989 (from memory); about 7 % below the others at G 5000",
};

/// Central film, Pan and Hamrock.
pub static CENTRAL_PAN_HAMROCK: Law = Law {
    name: "film-line-pan-hamrock-central",
    title: "Central film of a line contact, Pan and Hamrock 1989",
    formula: "h_c = R 2.922 U^0.692 G^0.470 W^-0.166",
    range: RANGE,
    source: "Pan and Hamrock 1989 (from memory); about 20 % below Dowson and Toyoda at G 5000",
};

/// Coefficient and exponents of one published fit.
struct Fit {
    coefficient: f64,
    speed: f64,
    material: f64,
    load: f64,
}

fn film(groups: Groups, radius: Length, fit: &Fit) -> Length {
    let h = fit.coefficient
        * pow(groups.speed.base(), fit.speed)
        * pow(groups.material.base(), fit.material)
        * pow(groups.load.base(), fit.load);
    Length::from_base(h * radius.base())
}

/// Minimum film, Dowson and Higginson 1966.
pub fn minimum_1966(groups: Groups, radius: Length) -> Length {
    let fit = Fit {
        coefficient: 1.6,
        speed: 0.7,
        material: 0.6,
        load: -0.13,
    };
    film(groups, radius, &fit)
}

/// Minimum film, Dowson 1968.
pub fn minimum_1968(groups: Groups, radius: Length) -> Length {
    let fit = Fit {
        coefficient: 2.65,
        speed: 0.7,
        material: 0.54,
        load: -0.13,
    };
    film(groups, radius, &fit)
}

/// Central film, Dowson and Toyoda 1979.
pub fn central_dowson_toyoda(groups: Groups, radius: Length) -> Length {
    let fit = Fit {
        coefficient: 3.06,
        speed: 0.69,
        material: 0.56,
        load: -0.10,
    };
    film(groups, radius, &fit)
}

/// Minimum film, Pan and Hamrock 1989.
pub fn minimum_pan_hamrock(groups: Groups, radius: Length) -> Length {
    let fit = Fit {
        coefficient: 1.714,
        speed: 0.694,
        material: 0.568,
        load: -0.128,
    };
    film(groups, radius, &fit)
}

/// Central film, Pan and Hamrock 1989.
pub fn central_pan_hamrock(groups: Groups, radius: Length) -> Length {
    let fit = Fit {
        coefficient: 2.922,
        speed: 0.692,
        material: 0.470,
        load: -0.166,
    };
    film(groups, radius, &fit)
}

/// Whether the groups lie where the fits were made; else what does not, in words.
pub fn beyond_fit(groups: Groups) -> Option<&'static str> {
    let Groups {
        speed,
        material,
        load,
    } = groups;
    let out = |v: f64, lo: f64, hi: f64| !(lo..=hi).contains(&v);
    if out(material.base(), 1000.0, 6000.0) {
        Some("the material parameter G lies outside 1000 to 6000")
    } else if out(speed.base(), 1e-13, 1e-10) {
        Some("the speed parameter U lies outside 1e-13 to 1e-10")
    } else if out(load.base(), 1e-5, 4e-4) {
        Some("the load parameter W lies outside 1e-5 to 4e-4")
    } else {
        None
    }
}
