//! Ring fences: points whose lubricants are held apart, whatever would shorten the list.

use crate::model::Point;
use crate::model::facts::PointFacts;
use crate::model::machine::Lubrication;
use crate::quantity::Measure;
use crate::quantity::convert::celsius;

/// Which fences a point stands behind; points behind the same ones share their lubricants.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, PartialOrd, Ord)]
pub struct Fence(u8);

/// A surface hotter than this lights a mist of oil, degC: the limit of the rule on hot surfaces.
const HOT_SURFACE: f64 = 250.0;

const WORDS: [(&str, u8); 4] = [
    ("food", 1),
    ("fire", 2),
    ("water protection", 4),
    ("oxygen", 8),
];

impl Fence {
    /// No fence.
    pub const NONE: Self = Self(0);
    /// Food.
    pub const FOOD: Self = Self(1);
    /// Fire.
    pub const FIRE: Self = Self(2);
    /// Water protection.
    pub const WATER: Self = Self(4);
    /// Oxygen.
    pub const OXYGEN: Self = Self(8);

    /// Behind both.
    #[must_use]
    pub fn and(self, other: Self) -> Self {
        Self(self.0 | other.0)
    }

    /// The fences of a point: what it asks for, and what its place makes the rules ask.
    pub fn of(point: &Point) -> Self {
        let facts = &point.facts;
        let lubrication = point.lubrication.as_ref().map(|l| l.value);
        let mut fence = Self::NONE;
        let mut add = |stands: bool, one: Self| {
            if stands {
                fence = fence.and(one);
            }
        };
        let yes = |fact: Option<bool>| fact == Some(true);
        add(
            facts.food_class.is_some() || yes(facts.food_zone),
            Self::FOOD,
        );
        add(fire(facts, lubrication), Self::FIRE);
        add(
            facts.environment.is_some() || yes(facts.water_protection),
            Self::WATER,
        );
        add(yes(facts.oxygen), Self::OXYGEN);
        fence
    }

    /// Whether any fence stands.
    pub fn stands(self) -> bool {
        self != Self::NONE
    }

    /// In words: `food and fire`; `the rest` where there is none.
    pub fn words(self) -> String {
        let named: Vec<&str> = WORDS
            .iter()
            .filter(|(_, bit)| self.0 & bit != 0)
            .map(|(word, _)| *word)
            .collect();
        if named.is_empty() {
            "the rest".to_owned()
        } else {
            named.join(" and ")
        }
    }
}

/// A fire class asked for, or oil under pressure where a leak would reach something hot.
fn fire(facts: &PointFacts, lubrication: Option<Lubrication>) -> bool {
    let hot = facts
        .hot_surface
        .as_ref()
        .is_some_and(|t| t.hi.base() > celsius(HOT_SURFACE).base());
    let under_pressure = matches!(
        lubrication,
        Some(
            Lubrication::Reservoir
                | Lubrication::Circulated
                | Lubrication::PressureFed
                | Lubrication::Flooded
        )
    );
    facts.fire_class.is_some() || ((hot || facts.fire_zone == Some(true)) && under_pressure)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn fences_are_named_in_a_fixed_order() {
        assert_eq!(Fence::NONE.words(), "the rest");
        assert_eq!(Fence::FIRE.and(Fence::FOOD).words(), "food and fire");
        assert!(Fence::OXYGEN.stands() && !Fence::NONE.stands());
    }

    #[test]
    fn a_splash_gearbox_in_a_fire_zone_is_not_fenced_and_a_hydraulic_unit_is() {
        let facts = PointFacts {
            fire_zone: Some(true),
            ..PointFacts::default()
        };
        assert!(!fire(&facts, Some(Lubrication::Splash)));
        assert!(fire(&facts, Some(Lubrication::Reservoir)));
    }
}
