//! The answer checked again: by the places it was worked out from, and by weighing every pair of
//! the list anew.

use super::case::{Place, Terms};
use super::solve::{Solved, Stock};
use crate::judge::Verdict;
use crate::weighing::{Scales, Weighed};

/// What does not agree.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
pub enum Wrong {
    /// A place is not served, or not by an oil of the list behind its fence.
    #[error("point {0} is not served by the list")]
    NotServed(usize),
    /// An oil was taken that the terms or the place do not allow.
    #[error("point {0} is served by an oil it may not take")]
    NotAllowed(usize),
    /// The list is not as long as was proven.
    #[error("the list has {0} oils where {1} were proven")]
    Length(usize, usize),
    /// Weighing again gives another word.
    #[error("{0} with {1} is {2} on weighing again")]
    Reweighed(String, String, String),
}

/// Checks a list against its places and terms.
///
/// # Errors
/// What does not agree.
pub fn against_places(places: &[Place], solved: &Solved, terms: &Terms) -> Result<(), Wrong> {
    if solved.stocks.len() != solved.bound {
        return Err(Wrong::Length(solved.stocks.len(), solved.bound));
    }
    for (i, place) in places.iter().enumerate() {
        let mut picks = solved.picks.iter().filter(|p| p.place == i);
        let (Some(pick), None) = (picks.next(), picks.next()) else {
            return Err(Wrong::NotServed(i));
        };
        let stock = Stock {
            fence: place.fence,
            oil: pick.offer.oil,
        };
        if !solved.stocks.contains(&stock) {
            return Err(Wrong::NotServed(i));
        }
        if !terms.offers(place).contains(&pick.offer) {
            return Err(Wrong::NotAllowed(i));
        }
    }
    Ok(())
}

/// Weighs every pair of the list anew. `of_place`: the weighed point behind each place.
///
/// # Errors
/// What does not agree.
pub fn by_weighing<'a>(
    scales: &Scales<'a>,
    weighed: &[Weighed<'a>],
    of_place: &[usize],
    solved: &Solved,
) -> Result<(), Wrong> {
    for pick in &solved.picks {
        let point = weighed[of_place[pick.place]].point;
        let again = scales.weigh_where(point, |oil| oil == pick.offer.oil);
        let word = again.candidates.first().map(|c| c.judgement.verdict);
        let wanted = if pick.offer.tight {
            Verdict::Tight
        } else {
            Verdict::Holds
        };
        if word != Some(wanted) {
            return Err(Wrong::Reweighed(
                point.address(),
                scales.site.oils[pick.offer.oil].id.clone(),
                word.map_or("barred".to_owned(), |w| w.word().to_owned()),
            ));
        }
    }
    Ok(())
}
