//! The steps of a blend.

use super::part::Mix;
use super::{Became, Component, NoBlend, grade, index};
use crate::oil::blend::Known;
use crate::quantity::Measure;
use crate::quantity::convert::{celsius, number};
use crate::quantity::{KinematicViscosity, Ratio, ThermodynamicTemperature};
use crate::relation::Law;
use crate::relation::oil::blend::{BlendError, POLYMER, WALTHER};
use crate::relation::oil::blend_wright::WRIGHT;
use crate::relation::oil::polymer::FINISHED;
use crate::relation::oil::viscosity_index::INDEX;
use crate::trace::{Both, Derivation, Recorder};

/// Tells a blend.
pub(super) struct Told {
    pub(super) d: Derivation,
    shares: [Known<Ratio>; 2],
}

impl Told {
    pub(super) fn new(a: Component<'_>, b: Component<'_>, share: Ratio) -> Self {
        let mut d = Derivation::new();
        d.about(|| Some(format!("{} with {}", a.oil.id, b.oil.id)));
        let rest = number(1.0 - share.base());
        let shares = [
            d.assume(
                "x_a",
                "share of the oil in the sump, by volume",
                rest,
                "as asked",
            ),
            d.assume(
                "x_b",
                "share of the oil added, by volume",
                share,
                "as asked",
            ),
        ];
        Self { d, shares }
    }

    /// By Walther, temperature by temperature.
    pub(super) fn walther(&mut self, mix: &Mix) -> Result<Became, NoBlend> {
        let base = |t: f64| mix.base_walther(celsius(t));
        let (at40, at100) = (base(40.0)?, base(100.0)?);
        Ok(self.became(mix, &WALTHER, at40, at100)?)
    }

    /// By Wright, line by line.
    pub(super) fn wright(&mut self, mix: &Mix) -> Result<Became, NoBlend> {
        let base = |t: f64| mix.base_wright(celsius(t));
        Ok(self.became(mix, &WRIGHT, base(40.0), base(100.0))?)
    }

    /// Both at another temperature.
    pub(super) fn at(
        &mut self,
        mix: &Mix,
        at: ThermodynamicTemperature,
    ) -> Result<
        (
            ThermodynamicTemperature,
            Known<KinematicViscosity>,
            Known<KinematicViscosity>,
        ),
        BlendError,
    > {
        let walther = self.one(mix, &WALTHER, at, mix.base_walther(at)?)?;
        let wright = self.one(mix, &WRIGHT, at, mix.base_wright(at))?;
        Ok((at, walther, wright))
    }

    fn became(
        &mut self,
        mix: &Mix,
        law: &'static Law,
        base40: KinematicViscosity,
        base100: KinematicViscosity,
    ) -> Result<Became, BlendError> {
        let nu40 = self.one(mix, law, celsius(40.0), base40)?;
        let nu100 = self.one(mix, law, celsius(100.0), base100)?;
        let vi = index(nu40.value, nu100.value).map(|vi| {
            self.d.law(
                "VI",
                "viscosity index of the blend",
                &INDEX,
                (("nu_40", nu40), ("nu_100", nu100)),
                |_: (KinematicViscosity, KinematicViscosity)| vi,
            )
        });
        Ok(Became {
            nu40,
            nu100,
            index: vi,
            grade: grade(nu40.value),
        })
    }

    /// The blend at one temperature: base oils by the rule, then the polymer.
    fn one(
        &mut self,
        mix: &Mix,
        law: &'static Law,
        at: ThermodynamicTemperature,
        base: KinematicViscosity,
    ) -> Result<Known<KinematicViscosity>, BlendError> {
        let t = self.d.assume("t", "temperature", at, "of the blend");
        let [a, b] = mix.bases(at);
        let nu_a = self
            .d
            .assume("nu_a", "base of the oil in the sump", a, "its sheet");
        let nu_b = self
            .d
            .assume("nu_b", "base of the oil added", b, "its sheet");
        let shares = vec![("x_a", self.shares[0]), ("x_b", self.shares[1])];
        let base = self.d.law(
            "nu_base",
            "base oil of the blend",
            law,
            Both(
                vec![("nu_a", nu_a), ("nu_b", nu_b)],
                Both(shares, (("t", t),)),
            ),
            |_| base,
        );
        let p = mix.polymer(at)?;
        if p.base() <= 0.0 {
            return Ok(base);
        }
        let p = self.d.law(
            "P",
            "share of the polymers in the blend",
            &POLYMER,
            (("x_a", self.shares[0]), ("x_b", self.shares[1])),
            |_: (Ratio, Ratio)| p,
        );
        Ok(self.d.law(
            "nu",
            "viscosity of the blend",
            &FINISHED,
            Both((("nu_base", base),), (("P", p),)),
            |((base,), (p,)): ((KinematicViscosity,), (Ratio,))| mix.together(base, p, at),
        ))
    }
}
