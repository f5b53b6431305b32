//! What the tables of compatibility say about an oil at a point.

use super::value::Value;
use crate::model::facts::{Elastomer, Mark, OilFacts, Paint, PointFacts, SightGlass, SumpNow};
use crate::model::oil::OilKind;
use crate::model::rulebook::compatibility::mark;
use crate::model::rulebook::grease::Agreement;
use crate::model::rulebook::{BaseStockRule, PaintRule, Rulebook};
use crate::model::word::Word;
use crate::relation::oil::base_stock::BaseStock;

/// The tables laid out by base stock, so that a pair costs a look-up.
pub(super) struct Tables {
    /// By base of the oil, then base of the oil in use.
    mixing: Vec<Vec<Option<Mark>>>,
    /// By base, then seal material.
    seals: Vec<Vec<Option<Mark>>>,
    /// By base: paints attacked.
    paints: Vec<Option<u64>>,
    /// By base: sight glasses attacked.
    glasses: Vec<Option<u64>>,
}

fn bits<W: Word>(words: &[W]) -> u64 {
    words.iter().fold(0, |all, w| all | w.bit())
}

impl Tables {
    pub(super) fn of(book: &Rulebook) -> Self {
        let rule = |base: &BaseStock| book.base_stocks.iter().find(|rule| rule.base == *base);
        let each = |of: &dyn Fn(&BaseStockRule) -> Vec<Option<Mark>>| {
            let rows = BaseStock::ALL.iter();
            rows.map(|base| rule(base).map(of).unwrap_or_default())
                .collect()
        };
        let painted = |of: &dyn Fn(&PaintRule) -> u64| {
            let row = |base| book.paints.get(rule(base)?.paint_row.as_ref()?).map(of);
            BaseStock::ALL.iter().map(row).collect()
        };
        Self {
            mixing: each(&|oil| {
                let row = book.mixing.get(&oil.mixing_row);
                let column = |base| mark(&row?.marks, &rule(base)?.mixing_row);
                BaseStock::ALL.iter().map(column).collect()
            }),
            seals: each(&|oil| {
                let of = |seal: &Elastomer| book.seals.iter().find(|rule| rule.material == *seal);
                let column = |seal| mark(&of(seal)?.marks, oil.seal_column.as_ref()?);
                Elastomer::ALL.iter().map(column).collect()
            }),
            paints: painted(&|rule| bits::<Paint>(&rule.attacks_paint)),
            glasses: painted(&|rule| bits::<SightGlass>(&rule.attacks_glass)),
        }
    }

    /// The oil against the one now in the point, by base stock. More of the same oil always
    /// mixes.
    pub(super) fn bases<'v>(&self, point: &PointFacts, oil: &OilFacts) -> Value<'v> {
        let now = match &point.oil_now {
            SumpNow::Unknown => return Value::Unknown,
            SumpNow::Nothing => return Value::Absent,
            SumpNow::Oil(now) => now,
        };
        if now.id == oil.id {
            return Value::Bits(Mark::Good.bit());
        }
        let (Some(oil), Some(now)) = (oil.base, now.base) else {
            return Value::Unknown;
        };
        as_value(self.mixing[oil.place()].get(now.place()).copied().flatten())
    }

    /// The worst mark of the seals in this oil.
    pub(super) fn seals<'v>(&self, point: &PointFacts, oil: &OilFacts) -> Value<'v> {
        let (Some(seals), Some(base)) = (&point.seals, oil.base) else {
            return Value::Unknown;
        };
        let marks = &self.seals[base.place()];
        let mut worst = Some(Mark::Good);
        for seal in seals {
            let found = marks.get(seal.place()).copied().flatten();
            worst = match (worst, found) {
                (Some(Mark::Bad), _) | (_, Some(Mark::Bad)) => Some(Mark::Bad),
                (Some(worst), Some(found)) => Some(worst.max(found)),
                _ => None,
            };
        }
        as_value(worst)
    }

    /// The inside paint in this oil.
    pub(super) fn paint<'v>(&self, point: &PointFacts, oil: &OilFacts) -> Value<'v> {
        attacked(point.inside_paint, &self.paints, oil)
    }

    /// The sight glass in this oil.
    pub(super) fn sight_glass<'v>(&self, point: &PointFacts, oil: &OilFacts) -> Value<'v> {
        attacked(point.sight_glass, &self.glasses, oil)
    }
}

fn attacked<'v, W: Word>(what: Option<W>, by: &[Option<u64>], oil: &OilFacts) -> Value<'v> {
    match (what, oil.base.and_then(|base| by[base.place()])) {
        (Some(what), Some(bits)) => {
            let attacked = bits & what.bit() != 0;
            Value::Bits(if attacked { Mark::Bad } else { Mark::Good }.bit())
        }
        _ => Value::Unknown,
    }
}

fn as_value<'v>(mark: Option<Mark>) -> Value<'v> {
    mark.map_or(Value::Unknown, |m| Value::Bits(m.bit()))
}

/// One grease against the one now in the bearing. Different thickeners that a table calls
/// compatible still want a test, because published tables disagree.
pub(super) fn greases<'v>(book: &Rulebook, point: &PointFacts, oil: &OilFacts) -> Value<'v> {
    if oil.kind != Some(OilKind::Grease) {
        return Value::Absent;
    }
    let now = match &point.oil_now {
        SumpNow::Unknown => return Value::Unknown,
        SumpNow::Nothing => return Value::Absent,
        SumpNow::Oil(now) => now,
    };
    let thickener = |written: &Option<String>| {
        let written = written.as_ref()?;
        Some(book.thickeners.find(written)?.id.as_str())
    };
    let (Some(new), Some(old)) = (thickener(&oil.thickener), thickener(&now.thickener)) else {
        return Value::Unknown;
    };
    if new == old {
        return Value::Bits(Mark::Good.bit());
    }
    as_value(agreement(book, new, old).map(|agreement| match agreement {
        Agreement::Compatible | Agreement::Borderline => Mark::Care,
        Agreement::Incompatible => Mark::Bad,
    }))
}

fn agreement(book: &Rulebook, one: &str, other: &str) -> Option<Agreement> {
    let marked = |row: &str, column: &str| {
        book.grease_mixing
            .iter()
            .filter(|rule| rule.thickener == row)
            .flat_map(|rule| &rule.with)
            .find(|(name, _)| name == column)
            .map(|(_, agreement)| *agreement)
    };
    marked(one, other)
        .or_else(|| marked(other, one))
        .or_else(|| marked(one, "any"))
        .or_else(|| marked(other, "any"))
}
