//! The first lines of an oil sheet, and what is stated of the oil.

use super::cold::bound;
use crate::model::Oil;
use crate::model::oil::{OilKind, Polymer, Price};
use crate::model::word::Word;
use crate::oil::Worn;
use crate::oil::curves::Curves;
use crate::oil::grades::{Graded, System, Worn as WornGrade};
use crate::oil::start::Standing;
use crate::quantity::convert::celsius;
use crate::quantity::show::{Toward, Units, fixed, quantity};
use crate::quantity::{KinematicViscosity, Measure, Ratio};
use crate::relation::oil::viscosity_temperature::ViscosityCurve;
use crate::trace::Known;

/// The answer and its reason.
pub(super) fn headline(
    oil: &Oil,
    curves: &Curves,
    grades: &[Graded],
    index: Option<Known<Ratio>>,
    index_worn: Option<Known<Ratio>>,
) -> (String, String) {
    let state = |grade: Option<&str>, vi: Option<Known<Ratio>>, nu: KinematicViscosity| {
        let grade = grade.map_or_else(
            || format!("between the ISO grades, {} at 40 degC", shown(nu)),
            |g| format!("ISO VG {g}"),
        );
        let grade = if oil.kind == OilKind::Grease {
            format!("base oil {grade}")
        } else {
            grade
        };
        vi.map_or(grade.clone(), |vi| {
            format!("{grade}, VI {}", fixed(vi.value.base(), 0, Toward::Nearest))
        })
    };
    let t40 = celsius(40.0);
    let new40 = curves.new.nu_at(t40);
    let iso = grades.iter().find(|g| g.system == System::IsoVg);
    let new = state(iso.and_then(|g| g.new.as_deref()), index, new40);
    let name = oil
        .name
        .as_ref()
        .map_or(String::new(), |n| format!("  {n}"));
    let worn = curves.worn_range(true).map(|(_, most)| most.nu_at(t40));
    let text = match (worn, iso.and_then(|g| g.worn.as_ref())) {
        (Some(nu), Some(WornGrade::Grade(grade))) => {
            format!(
                "{new} new; {} worn by shear",
                state(grade.as_deref(), index_worn, nu)
            )
        }
        (Some(nu), Some(WornGrade::AtWorst(grade))) => format!(
            "{new} new; its loss by shear is not known: down to {}",
            state(grade.as_deref(), index_worn, nu)
        ),
        _ => new,
    };
    (format!("{}{name}: {text}", oil.id), because(oil, curves))
}

fn shown(nu: KinematicViscosity) -> String {
    quantity(nu.amount(), Units::Si, Toward::Nearest)
}

/// What the figures rest on, in one line.
fn because(oil: &Oil, curves: &Curves) -> String {
    use crate::model::oil::Viscosity;
    let low = quantity(curves.lowest.amount(), Units::Si, Toward::Nearest);
    let high = quantity(curves.highest.amount(), Units::Si, Toward::Nearest);
    let stated = match &oil.viscosity {
        Viscosity::Points { points, .. } => {
            format!("stated at {} temperatures, {low} to {high}", points.len())
        }
        Viscosity::Grade(grade) if grade.vi.is_some() => {
            "only grade and index are stated: anywhere within 10 % of the grade".to_owned()
        }
        Viscosity::Grade(_) => {
            "only the grade is stated: within 10 % of it, with any index its base gives".to_owned()
        }
    };
    let cold = if curves.cold.is_some() {
        let coldest = curves.coldest_known();
        format!(
            "; measured down to {}",
            quantity(coldest.amount(), Units::Si, Toward::Nearest)
        )
    } else {
        "; colder and hotter than that every figure is extrapolated".to_owned()
    };
    format!("{stated}{cold}")
}

/// What is stated, for the head of the sheet.
pub(super) fn facts(oil: &Oil, curves: &Curves) -> Vec<(&'static str, String)> {
    let mut says: Vec<(&'static str, String)> = vec![("kind", oil.kind.word().to_owned())];
    let assumed = if curves.base_assumed { ", assumed" } else { "" };
    let polymer = match (&oil.polymer, &curves.worn) {
        (Polymer::Thickened, _) => ", polymer-thickened",
        (Polymer::Free, _) => ", no polymer",
        (Polymer::NotSaid, Worn::AsNew) => "",
        (Polymer::NotSaid, _) => ", treated as polymer-thickened",
    };
    says.push(("base", format!("{}{assumed}{polymer}", curves.base.word())));
    if !oil.facts.classes.is_empty() {
        says.push(("classes", oil.facts.classes.join(", ")));
    }
    if let Some(additives) = oil.facts.additives.as_ref().filter(|a| !a.is_empty()) {
        let words: Vec<&str> = additives.iter().map(|a| a.word()).collect();
        says.push(("additives", words.join(", ")));
    }
    let rho = quantity(curves.density.at15.amount(), Units::Si, Toward::Nearest);
    let typical = if curves.density.assumed {
        ", typical of the base"
    } else {
        ""
    };
    says.push(("density", format!("{rho} at 15 degC{typical}")));
    if let Some(pour) = &oil.pour_point {
        says.push(("pour point", bound(pour.value)));
    }
    if let Some(cloud) = &oil.cloud_point {
        says.push(("cloud point", bound(cloud.value)));
    }
    if let Some(hths) = &oil.hths {
        let shown = quantity(hths.value.amount(), Units::Si, Toward::Nearest);
        says.push(("HTHS", format!("{shown} at 150 degC and 1e6 1/s")));
    }
    if let Some(limit) = &oil.oil_limit {
        says.push((
            "oil limit",
            quantity(limit.value.amount(), Units::Si, Toward::Nearest),
        ));
    }
    if let Some(price) = &oil.price {
        let (figure, unit) = match price.value {
            Price::PerLitre(p) => (p, "L"),
            Price::PerKilogram(p) => (p, "kg"),
        };
        says.push((
            "price",
            format!("{} per {unit}", fixed(figure, 2, Toward::Nearest)),
        ));
    }
    for (key, text) in [("source", &oil.source), ("note", &oil.note)] {
        if let Some(text) = text {
            says.push((key, text.clone()));
        }
    }
    says
}

/// How a temperature stands to what is known, in a word.
pub fn standing(of: Standing) -> &'static str {
    match of {
        Standing::Stated => "stated",
        Standing::Measured => "measured cold",
        Standing::Between => "between points",
        Standing::Below(_) | Standing::Above(_) => "extrapolated",
    }
}
