//! The order candidates are printed in. There is no score: the words of [`IN_WORDS`] are all.

use super::verdict::Verdict;
use super::weigh::Judgement;
use std::cmp::Ordering;

/// The order, in words, as printed under the table.
pub const IN_WORDS: &str = "Order: verdict (holds, tight, open, fails); the oil in use if it holds; \
    oils already on site; fewer conditions; least excess over the governing floor; price where \
    given; name.";

/// What the order goes by.
#[derive(Clone, Debug, PartialEq)]
pub struct Candidate<'a> {
    /// The word.
    pub verdict: Verdict,
    /// Whether it is the oil in use here.
    pub in_use: bool,
    /// Whether some point of the site holds it today.
    pub on_site: bool,
    /// Number of conditions.
    pub conditions: usize,
    /// Smallest margin over a floor, quantised to a thousandth of a step so that noise cannot reorder.
    pub excess: i64,
    /// Price, thousandths.
    pub price: Option<i64>,
    /// Its id.
    pub id: &'a str,
}

/// The margin over the governing floor in thousandths of a step: the grade the maker names is a
/// floor as well. Oils without one come last.
pub fn quantised(judgement: &Judgement) -> i64 {
    let floors = [judgement.hot, judgement.maker].into_iter().flatten();
    let margins = floors.map(|m| thousandths(m.value));
    margins.min().unwrap_or(i64::MAX)
}

/// A number in thousandths.
pub fn thousandths(value: f64) -> i64 {
    #[expect(
        clippy::cast_possible_truncation,
        reason = "margins and prices are far below 2^53"
    )]
    let rounded = (value * 1e3).round() as i64;
    rounded
}

/// Compares two candidates, the better first.
pub fn compare(a: &Candidate<'_>, b: &Candidate<'_>) -> Ordering {
    let kept = |c: &Candidate<'_>| !(c.in_use && c.verdict == Verdict::Holds);
    a.verdict
        .cmp(&b.verdict)
        .then_with(|| kept(a).cmp(&kept(b)))
        .then_with(|| (!a.on_site).cmp(&!b.on_site))
        .then_with(|| a.conditions.cmp(&b.conditions))
        .then_with(|| a.excess.cmp(&b.excess))
        .then_with(|| match (a.price, b.price) {
            (Some(x), Some(y)) => x.cmp(&y),
            (Some(_), None) => Ordering::Less,
            (None, Some(_)) => Ordering::Greater,
            (None, None) => Ordering::Equal,
        })
        .then_with(|| a.id.cmp(b.id))
}

#[cfg(test)]
mod tests {
    use super::*;

    fn candidate(id: &str, verdict: Verdict) -> Candidate<'_> {
        Candidate {
            verdict,
            in_use: false,
            on_site: false,
            conditions: 0,
            excess: 500,
            price: None,
            id,
        }
    }

    #[test]
    fn the_word_comes_first_and_the_name_last() {
        let holds = candidate("B", Verdict::Holds);
        assert_eq!(
            compare(&holds, &candidate("A", Verdict::Tight)),
            Ordering::Less
        );
        assert_eq!(
            compare(&holds, &candidate("A", Verdict::Holds)),
            Ordering::Greater
        );
        let in_use = Candidate {
            in_use: true,
            conditions: 3,
            ..candidate("Z", Verdict::Holds)
        };
        assert_eq!(compare(&in_use, &holds), Ordering::Less);
        let tight_in_use = Candidate {
            in_use: true,
            ..candidate("Z", Verdict::Tight)
        };
        assert_eq!(
            compare(&tight_in_use, &candidate("A", Verdict::Tight)),
            Ordering::Greater
        );
    }
}
