//! The steps of a film demand: the film asked for, what the oil keeps under the shear of the
//! contact, and the viscosity that gives it.

use super::{Explained, Teller, Which};
use crate::demand::Demand;
use crate::demand::film::{FilmContact, FilmDemand, Wedge};
use crate::judge::margin::Jaw;
use crate::judge::prepared::ReadyDemand;
use crate::oil::thinning::{End, Kept};
use crate::quantity::Measure;
use crate::quantity::{
    KinematicViscosity, Length, PressureViscosity, Ratio, ShearRate, ThermodynamicTemperature,
    Velocity,
};
use crate::relation::Law;
use crate::relation::film::inverse;
use crate::relation::oil::polymer::SHARE;
use crate::relation::oil::shear::THICKENING;
use crate::relation::oil::temporary_shear::{
    CONTACT_RATE, CROSS, RATIO, contact_rate, viscosity_ratio,
};
use crate::trace::{Derivation, Known, Recorder};

/// What an oil that thins under shear must have at rest.
static AT_REST: Law = Law {
    name: "film-viscosity-at-rest",
    title: "Viscosity at rest of an oil that thins under the shear of a film",
    formula: "nu_min = nu / kept",
    range: "the share kept at the film asked for",
    source: "definition of the share kept",
};

/// The curve judged, what it needs, and what it keeps there.
struct Judged {
    which: Which,
    need: KinematicViscosity,
    value: f64,
    thinned: Option<Kept>,
}

impl Teller<'_> {
    pub(super) fn film(
        &mut self,
        d: &mut Derivation,
        demand: &Demand,
        ready: &ReadyDemand,
        film: &FilmDemand,
        t: Known<ThermodynamicTemperature>,
    ) -> Option<Explained> {
        let judged = self.judged(film, t.value)?;
        if let FilmContact::Wedge(wedge) = film.contact {
            return Some(self.wedge(d, (demand, ready), (film, wedge), t, judged));
        }
        let line = self.curve(judged.which).at(t.value.base()).line;
        let oil = &self.ready.curves;
        let there = line.parallel_through(judged.need, t.value);
        let alpha = oil.pressure.alpha(there, oil.density, t.value)?;
        let law = oil.pressure.law()?;
        let wanted = d.assume(
            "h_wanted",
            "film asked for",
            film.wanted,
            "film ratio times roughness",
        );
        let kept = match judged.thinned {
            Some(kept) => self.temporary(d, film, wanted, judged.which, t, kept),
            None => None,
        };
        let alpha = d.law(
            "alpha",
            "pressure-viscosity coefficient at that viscosity",
            law,
            (("t", t),),
            |_: (ThermodynamicTemperature,)| alpha,
        );
        let need = judged.need;
        let limit = match kept {
            None => d.law(
                "nu_min",
                "viscosity the film needs, with this oil",
                &inverse::VISCOSITY,
                (("h", wanted), ("alpha", alpha), ("t", t)),
                |_: (Length, PressureViscosity, ThermodynamicTemperature)| need,
            ),
            Some(kept) => d.law(
                "nu_min",
                "viscosity at rest the film needs, with this oil",
                &inverse::VISCOSITY,
                (("h", wanted), ("alpha", alpha), ("t", t), ("kept", kept)),
                |_: (Length, PressureViscosity, ThermodynamicTemperature, Ratio)| need,
            ),
        };
        d.note(|| format!("film by {}", film.contact.law().source));
        Some(self.viscosity_on(d, ready, limit, t, judged.which))
    }

    /// A wedge: the dynamic viscosity it needs is at hand, the oil's density makes it kinematic,
    /// and what its polymer loses under shear it must have over.
    fn wedge(
        &mut self,
        d: &mut Derivation,
        (demand, ready): (&Demand, &ReadyDemand),
        (film, wedge): (&FilmDemand, Wedge),
        t: Known<ThermodynamicTemperature>,
        judged: Judged,
    ) -> Explained {
        let under_shear = self.dynamic_limit(d, demand, wedge.needs, t);
        let kept = judged.thinned.and_then(|kept| {
            let why = "film of the part";
            let wanted = d.assume("h_wanted", "film asked for", film.wanted, why);
            self.temporary(d, film, wanted, judged.which, t, kept)
        });
        let need = judged.need;
        let limit = match kept {
            None => under_shear,
            Some(kept) => d.law(
                "nu_min",
                "viscosity at rest the film needs, with this oil",
                &AT_REST,
                (("nu", under_shear), ("kept", kept)),
                |_: (KinematicViscosity, Ratio)| need,
            ),
        };
        self.viscosity_on(d, ready, limit, t, judged.which)
    }

    /// Thin end or worn, whichever has the smaller margin, as the judge finds it.
    fn judged(&self, film: &FilmDemand, at: ThermodynamicTemperature) -> Option<Judged> {
        let mut best: Option<Judged> = None;
        for which in [Which::Thin, Which::Worn] {
            if which == Which::Worn && self.worn.is_none() {
                continue;
            }
            let straight = self.curve(which).at(at.base());
            let oil = &self.ready.curves;
            let met = film.meet(oil, straight.line, at, self.under_shear);
            let need = film.viscosity_needed(met)?;
            let value = straight.above(&Jaw::new(need, at)).0;
            if best.as_ref().is_none_or(|b| value < b.value) {
                let nu = straight.line.nu_at(at);
                let thinned = film.thinned(oil, nu, at, self.under_shear);
                best = Some(Judged {
                    which,
                    need,
                    value,
                    thinned,
                });
            }
        }
        best
    }

    /// The loss for the time the oil is in the contact.
    fn temporary(
        &mut self,
        d: &mut Derivation,
        film: &FilmDemand,
        wanted: Known<Length>,
        which: Which,
        t: Known<ThermodynamicTemperature>,
        kept: Kept,
    ) -> Option<Known<Ratio>> {
        let speed = film.contact.speed()?;
        let speed = d.assume(
            "u",
            "mean speed of the surfaces",
            speed,
            "of the contact the film is asked for",
        );
        let rate = d.law(
            "g",
            "shear rate at the inlet of the contact",
            &CONTACT_RATE,
            (("u", speed), ("h", wanted)),
            |(u, h): (Velocity, Length)| contact_rate(u, h),
        );
        let nu = self.nu_at(d, which, t, "viscosity of the oil there, at rest");
        let base = d.assume("nu_base", "its base oil there", kept.base, self.base_from());
        let p = d.law(
            "P_0",
            "share of the polymer at rest",
            &THICKENING,
            (("nu", nu), ("nu_base", base)),
            |_: (KinematicViscosity, KinematicViscosity)| kept.at_rest,
        );
        d.note(|| SHARE.range.to_owned());
        let critical = d.assume(
            "g_c",
            "rate at which half of what can be lost is lost",
            kept.critical,
            self.critical_from(),
        );
        let left = d.law(
            "P",
            "share of the polymer under that shear",
            &CROSS,
            (("P_0", p), ("g", rate), ("g_c", critical)),
            |_: (Ratio, ShearRate, ShearRate)| kept.under_shear,
        );
        Some(d.law(
            "kept",
            "share of its viscosity kept in the contact",
            &RATIO,
            (("P", left), ("P_0", p)),
            |(p, p0): (Ratio, Ratio)| viscosity_ratio(p, p0),
        ))
    }

    fn base_from(&self) -> &'static str {
        use crate::oil::makeup::Makeup;
        match self.ready.curves.makeup {
            Makeup::Stated(_) => "base oil stated",
            _ => "split by an assumed index of the base: an estimate, the end that loses more",
        }
    }

    fn critical_from(&self) -> &'static str {
        let calibrated = self.ready.curves.thinning.as_ref();
        match (calibrated.is_some_and(|t| t.calibrated), self.under_shear) {
            (true, _) => "calibrated on the high-shear viscosity stated, at constant stress",
            (false, End::MostLost) => "no high-shear viscosity stated: the end that loses more",
            (false, End::LeastLost) => "no high-shear viscosity stated: the end that loses less",
        }
    }
}
