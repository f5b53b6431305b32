//! Takes a point's inputs for one scenario: stated values as stated, unknowns at a share of
//! their range. What is missing or assumed is noted as a gap on the way.

use crate::model::Stated;
use crate::model::stated::Tolerance;
use crate::quantity::{Amount, Measure};
use crate::source::Origin;
use crate::source::place::Given;
use crate::trace::{Known, Recorder};

/// What is not known about an input.
#[derive(Clone, Debug, PartialEq)]
pub struct Gap {
    /// The key as users write it.
    pub key: String,
    /// The part it belongs to, if to one.
    pub about: Option<String>,
    /// How it is unknown.
    pub kind: GapKind,
    /// Whom to ask, where the user said so.
    pub ask: Option<String>,
    /// How it can be found out.
    pub how: &'static str,
    /// Where it is written, if it is.
    pub origin: Option<Origin>,
}

/// How an input is unknown.
#[derive(Clone, Debug, PartialEq)]
pub enum GapKind {
    /// Unknown, but between these; it makes verdicts open where the ends disagree.
    Range(Amount, Amount),
    /// A usual value stands in; the range is what would be plausible.
    Assumed {
        /// What is used.
        taken: Amount,
        /// Plausible low end.
        lo: Amount,
        /// Plausible high end.
        hi: Amount,
    },
    /// Nothing stands in: what needs it cannot be judged.
    Missing,
    /// A word stands in, where others would be plausible.
    Word {
        /// What is used.
        taken: String,
        /// What else would be plausible.
        among: Vec<String>,
    },
    /// A fact in words that a suitability rule needs.
    Fact,
}

/// One input wanted, for messages, traces and gaps.
#[derive(Clone, Copy, Debug)]
pub struct Wanted<'a> {
    /// The key as users write it.
    pub key: &'a str,
    /// The part it belongs to, if to one.
    pub about: Option<&'a str>,
    /// Its symbol in formulas.
    pub symbol: &'static str,
    /// What it is.
    pub says: &'static str,
    /// How it can be found out.
    pub how: &'static str,
}

/// An input of the part being worked on.
pub(super) const fn wanted(
    key: &'static str,
    symbol: &'static str,
    says: &'static str,
    how: &'static str,
) -> Wanted<'static> {
    Wanted {
        key,
        about: None,
        symbol,
        says,
        how,
    }
}

/// One setting of all unknowns: a share of each range, in the order they are first asked for.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Scenario {
    /// Shares from 0 (low end) to 1 (high end).
    pub shares: Vec<f64>,
    /// Inputs taken at another value than the stated or usual one, to see what it would change.
    pub instead: Vec<Instead>,
    /// Whether stated inputs without a tolerance are listed with the usual one of their kind.
    pub list_usual: bool,
}

/// One input at another value.
#[derive(Clone, Debug, PartialEq)]
pub struct Instead {
    /// The key as users write it.
    pub key: String,
    /// The part it belongs to, if to one.
    pub about: Option<String>,
    /// The value, base units.
    pub base: f64,
}

impl Scenario {
    /// Every unknown in the middle of its range.
    pub fn middle() -> Self {
        Self::default()
    }

    fn share(&self, axis: usize) -> f64 {
        self.shares.get(axis).copied().unwrap_or(0.5)
    }

    fn instead<Q: Measure>(&self, wanted: Wanted<'_>) -> Option<Q> {
        self.instead
            .iter()
            .find(|i| i.key == wanted.key && i.about.as_deref() == wanted.about)
            .map(|i| Q::from_base(i.base))
    }
}

/// Hands out inputs and remembers what was unknown.
#[derive(Debug)]
pub struct Inputs<'s> {
    scenario: &'s Scenario,
    /// Unknowns with a range, in the order of first use: the axes of the scenarios.
    pub axes: Vec<Gap>,
    /// Assumed and missing inputs.
    pub gaps: Vec<Gap>,
    /// Stated inputs with a tolerance. It judges nothing: the reserve covers it.
    pub tolerances: Vec<Gap>,
    /// Stated inputs without one, with the usual tolerance of their kind; only where asked for.
    pub usual: Vec<Gap>,
}

impl<'s> Inputs<'s> {
    /// For one scenario.
    pub fn new(scenario: &'s Scenario) -> Self {
        Self {
            scenario,
            axes: Vec::new(),
            gaps: Vec::new(),
            tolerances: Vec::new(),
            usual: Vec::new(),
        }
    }

    /// A value that is stated as such, without tolerance: an end of the ambient, a reading.
    pub fn read<Q: Measure, R: Recorder>(
        &mut self,
        r: &mut R,
        wanted: Wanted<'_>,
        given: &Given<Q>,
    ) -> Known<Q> {
        self.note_usual(wanted, given);
        match self.scenario.instead(wanted) {
            None => r.given(wanted.symbol, wanted.says, given),
            Some(value) => {
                let other = given.clone().map(|_: Q| value);
                r.given(wanted.symbol, wanted.says, &other)
            }
        }
    }

    /// Lists a stated input with the usual tolerance of its kind, where that is asked for.
    fn note_usual<Q: Measure>(&mut self, wanted: Wanted<'_>, given: &Given<Q>) {
        if !self.scenario.list_usual {
            return;
        }
        let taken = given.value.amount();
        let Some(by) = super::usual::tolerance(wanted.key, taken) else {
            return;
        };
        let kind = GapKind::Assumed {
            taken,
            lo: Q::from_base(taken.base - by).amount(),
            hi: Q::from_base(taken.base + by).amount(),
        };
        let found = gap(wanted, kind, None, Some(given.origin.clone()));
        let same = |g: &Gap| g.key == found.key && g.about == found.about;
        if !self.usual.iter().any(same) {
            self.usual.push(found);
        }
    }

    /// A stated input; a gap where it is not there.
    pub fn take<Q: Measure, R: Recorder>(
        &mut self,
        r: &mut R,
        wanted: Wanted<'_>,
        stated: Option<&Stated<Q>>,
    ) -> Option<Known<Q>> {
        match stated {
            Some(Stated::Known(given, tolerance)) => {
                match tolerance {
                    Some(tolerance) => self.tolerate(wanted, given, tolerance),
                    None => self.note_usual(wanted, given),
                }
                Some(match self.scenario.instead(wanted) {
                    None => r.given(wanted.symbol, wanted.says, given),
                    Some(value) => {
                        let other = given.clone().map(|_: Q| value);
                        r.given(wanted.symbol, wanted.says, &other)
                    }
                })
            }
            Some(Stated::Range(range, ask)) => {
                let (lo, hi) = (range.value.lo.base(), range.value.hi.base());
                let axis = self.axis(
                    wanted,
                    (range.value.lo.amount(), range.value.hi.amount()),
                    ask.clone(),
                    Some(range.origin.clone()),
                );
                let value = Q::from_base(lo + (hi - lo) * self.scenario.share(axis));
                let given = Given::new(value, range.written.clone(), range.origin.clone());
                let known = r.given(wanted.symbol, wanted.says, &given);
                r.note(|| "not known: this is one setting of its range".to_owned());
                Some(known)
            }
            Some(Stated::Unknown(ask, origin)) => {
                self.missing(wanted, ask.clone(), Some(origin.clone()));
                None
            }
            None => {
                self.missing(wanted, None, None);
                None
            }
        }
    }

    /// A stated input that nobody needs to state.
    pub fn maybe<Q: Measure, R: Recorder>(
        &mut self,
        r: &mut R,
        wanted: Wanted<'_>,
        stated: Option<&Stated<Q>>,
    ) -> Option<Known<Q>> {
        stated.and_then(|s| self.take(r, wanted, Some(s)))
    }

    /// A stated input, or a usual value in its place with its plausible range.
    pub fn or_assume<Q: Measure, R: Recorder>(
        &mut self,
        r: &mut R,
        wanted: Wanted<'_>,
        stated: Option<&Stated<Q>>,
        usual: Usual<Q>,
    ) -> Known<Q> {
        if let Some(stated) = stated {
            let unknown = matches!(stated, Stated::Unknown(..));
            if !unknown && let Some(known) = self.take(r, wanted, Some(stated)) {
                return known;
            }
        }
        let kind = GapKind::Assumed {
            taken: usual.value.amount(),
            lo: usual.lo.amount(),
            hi: usual.hi.amount(),
        };
        let ask = stated.and_then(Stated::ask).map(str::to_owned);
        let origin = stated.map(|s| s.origin().clone());
        self.note_gap(wanted, kind, ask, origin);
        let value = self.scenario.instead(wanted).unwrap_or(usual.value);
        r.assume(wanted.symbol, wanted.says, value, usual.why)
    }

    fn tolerate<Q: Measure>(
        &mut self,
        wanted: Wanted<'_>,
        given: &Given<Q>,
        tolerance: &Tolerance<Q>,
    ) {
        let value = given.value.base();
        let by = match tolerance {
            Tolerance::Of(by) => by.base().abs(),
            Tolerance::Kelvins(by) => by.abs(),
            Tolerance::Share(share) => (value * share).abs(),
        };
        let kind = GapKind::Assumed {
            taken: given.value.amount(),
            lo: Q::from_base(value - by).amount(),
            hi: Q::from_base(value + by).amount(),
        };
        let found = gap(wanted, kind, None, Some(given.origin.clone()));
        let same = |g: &Gap| g.key == found.key && g.about == found.about;
        if !self.tolerances.iter().any(same) {
            self.tolerances.push(found);
        }
    }

    /// An unknown that nobody stated but whose plausible range is known.
    pub fn plausible<Q: Measure, R: Recorder>(
        &mut self,
        r: &mut R,
        wanted: Wanted<'_>,
        range: (Q, Q),
        why: &'static str,
    ) -> Known<Q> {
        let axis = self.axis(wanted, (range.0.amount(), range.1.amount()), None, None);
        let (lo, hi) = (range.0.base(), range.1.base());
        let value = Q::from_base(lo + (hi - lo) * self.scenario.share(axis));
        r.assume(wanted.symbol, wanted.says, value, why)
    }

    /// A stated input, or its plausible range where nobody knows it: an axis of the settings.
    pub fn or_plausible<Q: Measure, R: Recorder>(
        &mut self,
        r: &mut R,
        wanted: Wanted<'_>,
        stated: Option<&Stated<Q>>,
        range: (Q, Q),
        why: &'static str,
    ) -> Known<Q> {
        let unknown = matches!(stated, None | Some(Stated::Unknown(..)));
        if !unknown && let Some(known) = self.take(r, wanted, stated) {
            return known;
        }
        let ask = stated.and_then(Stated::ask).map(str::to_owned);
        let origin = stated.map(|s| s.origin().clone());
        let axis = self.axis(wanted, (range.0.amount(), range.1.amount()), ask, origin);
        let (lo, hi) = (range.0.base(), range.1.base());
        let value = Q::from_base(lo + (hi - lo) * self.scenario.share(axis));
        r.assume(wanted.symbol, wanted.says, value, why)
    }

    /// Notes that something is missing altogether.
    pub fn missing(&mut self, wanted: Wanted<'_>, ask: Option<String>, origin: Option<Origin>) {
        self.note_gap(wanted, GapKind::Missing, ask, origin);
    }

    /// Notes that a fact in words is not stated.
    pub fn fact(&mut self, wanted: Wanted<'_>) {
        self.note_gap(wanted, GapKind::Fact, None, None);
    }

    fn axis(
        &mut self,
        wanted: Wanted<'_>,
        (lo, hi): (Amount, Amount),
        ask: Option<String>,
        origin: Option<Origin>,
    ) -> usize {
        let known = self
            .axes
            .iter()
            .position(|a| a.key == wanted.key && a.about.as_deref() == wanted.about);
        known.unwrap_or_else(|| {
            self.axes
                .push(gap(wanted, GapKind::Range(lo, hi), ask, origin));
            self.axes.len() - 1
        })
    }

    fn note_gap(
        &mut self,
        wanted: Wanted<'_>,
        kind: GapKind,
        ask: Option<String>,
        origin: Option<Origin>,
    ) {
        let known = self
            .gaps
            .iter()
            .any(|g| g.key == wanted.key && g.about.as_deref() == wanted.about);
        if !known {
            self.gaps.push(gap(wanted, kind, ask, origin));
        }
    }
}

fn gap(wanted: Wanted<'_>, kind: GapKind, ask: Option<String>, origin: Option<Origin>) -> Gap {
    Gap {
        key: wanted.key.to_owned(),
        about: wanted.about.map(str::to_owned),
        kind,
        ask,
        how: wanted.how,
        origin,
    }
}

/// A usual value with its plausible range.
#[derive(Clone, Copy, Debug)]
pub struct Usual<Q> {
    /// What is used.
    pub value: Q,
    /// Plausible low end.
    pub lo: Q,
    /// Plausible high end.
    pub hi: Q,
    /// Why that.
    pub why: &'static str,
}
