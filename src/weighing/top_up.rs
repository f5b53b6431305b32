//! A blend of two oils on the machines that hold one of them.

use super::{Condition, Scales, condition, oil_in_use};
use crate::judge::{Judgement, PreparedOil, weigh};
use crate::model::Point;
use crate::model::facts::Use;
use crate::oil::blend::{Blend, Component, NoBlend, blend};
use crate::quantity::{Ratio, ThermodynamicTemperature};

/// What a top-up does to one machine.
#[derive(Clone, Debug)]
pub struct TopUp {
    /// Address of the point.
    pub address: String,
    /// The oil in the sump alone.
    pub alone: Judgement,
    /// The blend.
    pub blended: Judgement,
    /// Why the word of the blend is what it is, the main reason first.
    pub because: Vec<String>,
    /// Rules that bar the top-up.
    pub barred_by: Vec<Condition>,
    /// Conditions on it.
    pub conditions: Vec<Condition>,
}

impl<'a> Scales<'a> {
    /// An oil of the list as a component of a blend.
    pub fn component(&self, oil: usize) -> Component<'_> {
        Component {
            oil: &self.site.oils[oil],
            curves: &self.oils[oil].curves,
        }
    }

    /// A share of `b` in `a`.
    ///
    /// # Errors
    /// [`NoBlend`], with the reason.
    pub fn blend(
        &self,
        a: usize,
        b: usize,
        share: Ratio,
        asked: &[ThermodynamicTemperature],
    ) -> Result<Blend, NoBlend> {
        blend(
            self.component(a),
            self.component(b),
            share,
            self.rules,
            asked,
        )
    }

    /// The points that hold an oil today.
    pub fn holding(&self, oil: usize) -> Vec<&'a Point> {
        let id = self.site.oils[oil].id.as_str();
        let points = self.site.points.iter();
        points.filter(|p| oil_in_use(p) == Some(id)).collect()
    }

    /// What a top-up of `b` onto `a` does to a machine.
    pub fn top_up(&self, point: &'a Point, (a, b): (usize, usize), blend: &Blend) -> TopUp {
        let (demands, ready) = self.prepare(point);
        let oil = PreparedOil::of(&blend.oil, blend.curves.clone(), self.rules, true);
        let blended = weigh(&ready, &oil);
        let now = crate::model::facts::SumpNow::Oil(Box::new(self.facts[a].clone()));
        let facts = super::facts::of_point(point, &demands, now);
        let card = self.suitability.point(&facts);
        let other = self.suitability.oil(&self.facts[b]);
        let eligible = self.suitability.assess_use(&card, &other, Use::TopUp);
        TopUp {
            address: point.address(),
            alone: weigh(&ready, &self.oils[a]),
            because: crate::judge::because::because(&demands, &ready, &oil, &blended, self.units),
            blended,
            barred_by: eligible.barred_by.iter().map(condition).collect(),
            conditions: eligible.conditions.iter().map(condition).collect(),
        }
    }
}
