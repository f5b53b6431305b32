//! Tells the numbers of a sheet to a calculation.

use crate::model::Oil;
use crate::model::oil::{Shear, Viscosity, ViscosityPoint};
use crate::model::rulebook::Rulebook;
use crate::oil::curve::Curve;
use crate::oil::curves::Curves;
use crate::oil::grades::{Graded, System, Worn as WornGrade};
use crate::oil::life::{LifeAt, LifeBasis};
use crate::oil::spread::{Spread, spread};
use crate::oil::told::{LineSteps, thickened};
use crate::quantity::convert::{celsius, number};
use crate::quantity::show::{Toward, Units, quantity};
use crate::quantity::{KinematicViscosity, Measure, Ratio, ThermodynamicTemperature, Time};
use crate::relation::Law;
use crate::relation::oil::grade::ISO_3448;
use crate::relation::oil::life::{ARRHENIUS, RULE_OF_TEN};
use crate::relation::oil::piecewise::PIECEWISE;
use crate::relation::oil::sae_engine::J300;
use crate::relation::oil::sae_gear::J306;
use crate::relation::oil::uncertainty::{CARRIED, of_one_result};
use crate::relation::oil::viscosity_index::{self, INDEX, NU100};
use crate::relation::oil::viscosity_temperature::{VISCOSITY, ViscosityCurve};
use crate::source::place::Given;
use crate::trace::{Both, Derivation, Known, Recorder};

/// Tells one oil.
pub(super) struct Teller<'a> {
    pub(super) d: Derivation,
    pub(super) oil: &'a Oil,
    pub(super) curves: &'a Curves,
    pub(super) rules: &'a Rulebook,
    /// Temperatures of the points stated.
    pub(super) stated: Vec<ThermodynamicTemperature>,
    pub(super) spread: Option<Spread>,
    new: LineSteps,
    pub(super) sheared: Option<LineSteps>,
    asked: Vec<Known<ThermodynamicTemperature>>,
}

const SYMBOLS: [(&str, &str); 6] = [
    ("nu_a", "t_a"),
    ("nu_b", "t_b"),
    ("nu_c", "t_c"),
    ("nu_d", "t_d"),
    ("nu_e", "t_e"),
    ("nu_f", "t_f"),
];

impl<'a> Teller<'a> {
    pub(super) fn new(oil: &'a Oil, curves: &'a Curves, rules: &'a Rulebook) -> Self {
        let mut d = Derivation::new();
        d.about(|| Some(oil.id.clone()));
        let stated = match &oil.viscosity {
            Viscosity::Points { points, .. } => points.iter().map(|p| p.at).collect(),
            Viscosity::Grade(_) => vec![celsius(40.0)],
        };
        let new = match &oil.viscosity {
            Viscosity::Points { points, .. } => points_given(&mut d, points, "viscosity stated"),
            Viscosity::Grade(_) => by_grade(&mut d, curves),
        };
        let sheared = match &oil.shear {
            Some(Shear::Points { points, .. }) if points.len() > 1 => Some(points_given(
                &mut d,
                points,
                "viscosity stated after the shear test",
            )),
            _ => None,
        };
        Self {
            d,
            oil,
            curves,
            rules,
            stated,
            spread: spread(oil, curves),
            new,
            sheared,
            asked: Vec::new(),
        }
    }

    /// The law a curve goes by.
    pub(super) fn law_of(curve: &Curve) -> &'static Law {
        match curve.line() {
            Some(_) => &VISCOSITY,
            None => &PIECEWISE,
        }
    }

    /// The new oil at a temperature.
    pub(super) fn nu_new(
        &mut self,
        t: Known<ThermodynamicTemperature>,
        says: &'static str,
    ) -> Known<KinematicViscosity> {
        if let Curve::Thickened(oil) = self.curves.new {
            return thickened(&mut self.d, &oil, t, says);
        }
        let nu = self.curves.new.nu_at(t.value);
        let mut at = self.new.at.clone();
        at.push(("t", t));
        let law = Self::law_of(&self.curves.new);
        self.d
            .law("nu", says, law, Both(self.new.nu.clone(), at), |_| nu)
    }

    /// A temperature of the sheet, recorded once.
    pub(super) fn asked(
        &mut self,
        at: ThermodynamicTemperature,
    ) -> Known<ThermodynamicTemperature> {
        let same = |k: &&Known<ThermodynamicTemperature>| k.value == at;
        if let Some(known) = self.asked.iter().find(same) {
            return *known;
        }
        let known = self
            .d
            .assume("t", "temperature", at, "printed on the sheet");
        self.asked.push(known);
        known
    }

    /// Viscosity index, new or worn at the greatest loss.
    pub(super) fn index(&mut self, worn: bool) -> Option<Known<Ratio>> {
        let (t40, t100) = (self.asked(celsius(40.0)), self.asked(celsius(100.0)));
        let mut nu40 = self.nu_new(t40, "viscosity of the new oil at 40 degC");
        let mut nu100 = self.nu_new(t100, "viscosity of the new oil at 100 degC");
        if worn {
            nu40 = self.worn(t40, nu40)?.1;
            nu100 = self.worn(t100, nu100)?.1;
        }
        let says = if worn {
            "viscosity index, worn"
        } else {
            "viscosity index, new"
        };
        self.d
            .attempt(
                "VI",
                says,
                &INDEX,
                (("nu_40", nu40), ("nu_100", nu100)),
                |(u, y)| viscosity_index::index(u, y),
            )
            .ok()
    }

    /// How far the index of the new oil may be off by the tests it is worked out from.
    pub(super) fn index_spread(&mut self, index: Known<Ratio>) -> Option<Known<Ratio>> {
        let Some(Spread::Tests { .. }) = self.spread else {
            return None;
        };
        let (t40, t100) = (celsius(40.0), celsius(100.0));
        let (nu40, nu100) = (self.curves.nu_new(t40), self.curves.nu_new(t100));
        let moved = |nu: KinematicViscosity, at| {
            KinematicViscosity::from_base(nu.base() * (1.0 + of_one_result(at).base()))
        };
        let off = |u, y| {
            let vi = viscosity_index::index(u, y).ok()?.base();
            Some(vi - index.value.base())
        };
        let (by40, by100) = (
            off(moved(nu40, t40), nu100)?,
            off(nu40, moved(nu100, t100))?,
        );
        let value = number((by40 * by40 + by100 * by100).sqrt());
        Some(self.d.law(
            "u_VI",
            "how far the index may be off by the tests",
            &CARRIED,
            (("VI", index),),
            |_: (Ratio,)| value,
        ))
    }

    /// A step for every grade.
    pub(super) fn grades(&mut self, all: &[Graded]) {
        for graded in all {
            let (t, law): (f64, &'static Law) = match graded.system {
                System::IsoVg => (40.0, &ISO_3448),
                System::Engine => (100.0, &J300),
                System::Axle => (100.0, &J306),
            };
            let at = self.asked(celsius(t));
            let new = self.nu_new(at, "viscosity of the new oil the grade goes by");
            self.grade(graded.system, new, law, "new", graded.new.as_deref());
            let worn = self.worn(at, new).map(|(_, most)| most);
            if let (Some(worn), Some(grade)) = (worn, &graded.worn) {
                let (WornGrade::Grade(name) | WornGrade::AtWorst(name)) = grade;
                self.grade(graded.system, worn, law, "worn", name.as_deref());
            }
        }
    }

    /// The grade itself is a name: the step carries the viscosity it goes by and says the grade.
    fn grade(
        &mut self,
        system: System,
        nu: Known<KinematicViscosity>,
        law: &'static Law,
        state: &'static str,
        name: Option<&str>,
    ) {
        let value = nu.value;
        self.d.law(
            "nu",
            "viscosity against the grades",
            law,
            (("nu", nu),),
            |_: (KinematicViscosity,)| value,
        );
        let name = name.map_or("no grade".to_owned(), |n| format!("{} {n}", system.word()));
        self.d.note(|| format!("{state}: {name}"));
    }

    /// Life at a temperature, both ways.
    pub(super) fn life_at(&mut self, basis: &LifeBasis, at: ThermodynamicTemperature) -> LifeAt {
        let life = basis.at(at);
        let t = self.asked(at);
        let k1 = self.d.assume(
            "k1",
            "constant of the type of oil",
            basis.constant,
            "rules, oil life",
        );
        let times = self.d.assume(
            "m",
            "life of the base against mineral oil",
            basis.multiple,
            "rules, oil life",
        );
        let clean = self.d.law(
            "L",
            "oxidation life, clean and dry",
            &ARRHENIUS,
            Both((("k1", k1), ("m", times)), (("T", t),)),
            |_: ((Ratio, Ratio), (ThermodynamicTemperature,))| life.equation.1,
        );
        self.d.note(|| {
            let dirty = quantity(life.equation.0.amount(), Units::Si, Toward::Down);
            format!("with free water and metal about {dirty}")
        });
        self.d.law(
            "L",
            "the same by the rule of ten from where it begins",
            &RULE_OF_TEN,
            Both((("t", t),), (("L", clean),)),
            |_: ((ThermodynamicTemperature,), (Time,))| life.rule_of_ten.1,
        );
        life
    }
}

/// Points as stated.
pub(super) fn points_given(
    d: &mut Derivation,
    points: &[ViscosityPoint],
    says: &'static str,
) -> LineSteps {
    let mut steps = LineSteps {
        nu: Vec::new(),
        at: Vec::new(),
    };
    for (i, point) in points.iter().enumerate() {
        let (nu, t) = SYMBOLS[i.min(SYMBOLS.len() - 1)];
        let written = quantity(point.at.amount(), Units::Si, Toward::Nearest);
        steps.nu.push((nu, d.given("nu", says, &point.nu)));
        let at = Given::new(point.at, written, point.nu.origin.clone());
        steps.at.push((t, d.given("t", "its temperature", &at)));
    }
    steps
}

/// A line known by grade and index.
fn by_grade(d: &mut Derivation, curves: &Curves) -> LineSteps {
    let at = |t| curves.new.nu_at(celsius(t));
    let nu40 = d.assume(
        "nu_40",
        "middle of the grade at 40 degC",
        at(40.0),
        "only the grade is stated",
    );
    let index = viscosity_index::index(at(40.0), at(100.0)).expect("made by an index, it has one");
    let vi = d.assume(
        "VI",
        "viscosity index",
        index,
        "stated, or the middle of what its base gives",
    );
    let hot = at(100.0);
    let nu100 = d.law(
        "nu_100",
        "viscosity at 100 degC by the index",
        &NU100,
        Both((("nu_40", nu40),), (("VI", vi),)),
        |_: ((KinematicViscosity,), (Ratio,))| hot,
    );
    let t40 = d.assume(
        "t",
        "its temperature",
        celsius(40.0),
        "grades hold at 40 degC",
    );
    let t100 = d.assume(
        "t",
        "its temperature",
        celsius(100.0),
        "the index holds for 40 and 100 degC",
    );
    LineSteps {
        nu: vec![("nu_a", nu40), ("nu_b", nu100)],
        at: vec![("t_a", t40), ("t_b", t100)],
    }
}
