//! How far an oil may shear before a floor of a machine is reached, and when.

use super::margin::Ready;
use super::prepared::{PreparedOil, PreparedPoint, Variant};
use super::weigh::floor_margins;
use crate::numeric::root::bracketed;
use crate::oil::thinning::End as ShearEnd;
use crate::quantity::convert::{celsius, number};
use crate::quantity::{Measure, Ratio};
use crate::relation::oil::shear_in_use::{NoTrend, Reached, Sample, reached};
use crate::relation::oil::viscosity_temperature::ViscosityCurve;

/// How far the loss may go.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Room {
    /// Nothing there asks for a least viscosity.
    NoFloor,
    /// The new oil is below a floor already.
    None {
        /// Number of the demand.
        demand: u16,
    },
    /// So far: share of the viscosity at 100 °C.
    UpTo {
        /// The loss at which the first floor is reached.
        loss: Ratio,
        /// Number of that demand.
        demand: u16,
    },
    /// No loss of the polymer alone reaches a floor: the base oil meets them all.
    AllOfIt,
}

/// Greatest loss tried, a share: beyond it nothing is left to speak of.
const MOST: f64 = 0.95;

/// How far the loss by shear may go before a floor of the point is reached, at the worst setting
/// of its unknowns. The same share is lost at every temperature; where base and polymer are
/// stated, the same share of the polymer's contribution, and the loss is that at 100 °C.
pub fn room(point: &PreparedPoint, oil: &PreparedOil) -> Room {
    let worst = |loss: f64| -> Option<(f64, u16)> {
        let variant = Variant {
            worn: Some(Ready::of(&oil.curves.new.after_loss(loss))),
            under_shear: ShearEnd::MostLost,
        };
        let all = point.settings.iter();
        let all = all.flat_map(|s| floor_margins(s, oil, &variant));
        all.min_by(|a, b| a.0.total_cmp(&b.0).then(a.1.cmp(&b.1)))
    };
    let Some((margin, demand)) = worst(0.0) else {
        return Room::NoFloor;
    };
    if margin < 0.0 {
        return Room::None { demand };
    }
    let Some((_, demand)) = worst(MOST).filter(|(m, _)| *m < 0.0) else {
        return Room::AllOfIt;
    };
    let miss = |loss: f64| worst(loss).map_or(f64::NAN, |(m, _)| m);
    match bracketed(0.0, MOST, miss) {
        Ok(root) => {
            // just past the limit the demand that fails first is the one with the least margin
            let demand = worst((root.at + 1e-9).min(MOST)).map_or(demand, |(_, d)| d);
            Room::UpTo {
                loss: number(at_100(oil, root.at)),
                demand,
            }
        }
        Err(_) => Room::AllOfIt,
    }
}

/// The loss at 100 °C, which is the one meant where base and polymer are stated.
fn at_100(oil: &PreparedOil, loss: f64) -> f64 {
    let (new, t100) = (&oil.curves.new, celsius(100.0));
    1.0 - new.after_loss(loss).nu_at(t100).base() / new.nu_at(t100).base()
}

impl Room {
    /// When the limit is reached, from two dated losses of one fill.
    ///
    /// # Errors
    /// [`NoTrend`]; `None` where no loss reaches a floor.
    pub fn when(self, first: Sample, second: Sample) -> Option<Result<Reached, NoTrend>> {
        match self {
            Self::UpTo { loss, .. } => Some(reached(first, second, loss)),
            Self::None { .. } => Some(Err(NoTrend::Passed)),
            Self::NoFloor | Self::AllOfIt => None,
        }
    }
}
