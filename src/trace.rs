//! Numbers that keep their history.
//!
//! A [`Derivation`] is the calculation itself, written down while it is done: a [`Known`] number
//! cannot be had without the step that made it, and a step's inputs are the numbers its law was
//! called with. [`Silent`] runs the same code and records nothing, for the judging of many pairs.

use crate::quantity::{Amount, Measure};
use crate::relation::Law;
use crate::source::Origin;
use crate::source::place::Given;
use std::borrow::Cow;

/// The number of a step in its derivation.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct StepId(pub u32);

/// A number with the step that made it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Known<Q> {
    /// The number.
    pub value: Q,
    /// The step.
    pub step: StepId,
}

/// How a step came to its number.
#[derive(Clone, Debug, PartialEq)]
pub enum How {
    /// Read from the user, a rule or a default.
    Given {
        /// As written.
        written: String,
        /// Where from.
        origin: Origin,
    },
    /// Worked out by a relation.
    Law {
        /// The relation.
        law: &'static Law,
        /// Symbols and steps of what went in.
        with: Vec<(&'static str, StepId)>,
    },
}

/// One line of a calculation.
#[derive(Clone, Debug, PartialEq)]
pub struct Step {
    /// Its number.
    pub id: StepId,
    /// The symbol of the result, as in the literature: `nu1`, `kappa`, `h_min`.
    pub symbol: &'static str,
    /// What it is, in words.
    pub says: Cow<'static, str>,
    /// Which part or oil it is about.
    pub about: Option<String>,
    /// The number.
    pub amount: Amount,
    /// How it came about.
    pub how: How,
    /// Remarks: out of range, extrapolated, tangent.
    pub notes: Vec<String>,
}

/// Several numbers worked out at once, before they are named.
#[derive(Clone, Copy, Debug)]
pub struct Outcome<T> {
    /// What the relation returned.
    pub value: T,
    key: usize,
}

/// Something that calculations are told to.
pub trait Recorder {
    /// A number as given.
    fn given<Q: Measure>(
        &mut self,
        symbol: &'static str,
        says: &'static str,
        given: &Given<Q>,
    ) -> Known<Q>;

    /// A default of the program, with its reason.
    fn assume<Q: Measure>(
        &mut self,
        symbol: &'static str,
        says: &'static str,
        value: Q,
        why: &'static str,
    ) -> Known<Q>;

    /// A number worked out by a relation from known numbers.
    fn law<I: Inputs, Q: Measure>(
        &mut self,
        symbol: &'static str,
        says: &'static str,
        law: &'static Law,
        inputs: I,
        f: impl FnOnce(I::Values) -> Q,
    ) -> Known<Q>;

    /// A number worked out by a relation that may refuse its inputs; a refusal leaves no step.
    ///
    /// # Errors
    /// What the relation returned.
    fn attempt<I: Inputs, Q: Measure, E>(
        &mut self,
        symbol: &'static str,
        says: &'static str,
        law: &'static Law,
        inputs: I,
        f: impl FnOnce(I::Values) -> Result<Q, E>,
    ) -> Result<Known<Q>, E> {
        let value = f(inputs.values())?;
        Ok(self.law(symbol, says, law, inputs, |_| value))
    }

    /// A relation that gives several numbers; each is then named with [`Recorder::take`].
    fn apply<I: Inputs, T: Copy>(
        &mut self,
        law: &'static Law,
        inputs: I,
        f: impl FnOnce(I::Values) -> T,
    ) -> Outcome<T>;

    /// One number of an outcome.
    fn take<T: Copy, Q: Measure>(
        &mut self,
        outcome: &Outcome<T>,
        symbol: &'static str,
        says: &'static str,
        f: impl FnOnce(T) -> Q,
    ) -> Known<Q>;

    /// A relation that gives several numbers and may refuse its inputs.
    ///
    /// # Errors
    /// What the relation returned.
    fn attempt_all<I: Inputs, T: Copy, E>(
        &mut self,
        law: &'static Law,
        inputs: I,
        f: impl FnOnce(I::Values) -> Result<T, E>,
    ) -> Result<Outcome<T>, E> {
        let value = f(inputs.values())?;
        Ok(self.apply(law, inputs, |_| value))
    }

    /// A remark on the latest step.
    fn note(&mut self, remark: impl FnOnce() -> String);

    /// What the following steps are about; `None` for nothing in particular.
    fn about(&mut self, part: impl FnOnce() -> Option<String>);
}

/// Known numbers that go into a relation together, with their symbols.
pub trait Inputs {
    /// The plain values.
    type Values;
    /// Takes the values out.
    fn values(&self) -> Self::Values;
    /// Symbols and steps, for the record.
    fn steps(&self) -> Vec<(&'static str, StepId)>;
}

macro_rules! inputs {
    ($(($($q:ident $i:tt),+)),+ $(,)?) => {$(
        impl<$($q: Copy),+> Inputs for ($((&'static str, Known<$q>),)+) {
            type Values = ($($q,)+);
            fn values(&self) -> Self::Values {
                ($(self.$i.1.value,)+)
            }
            fn steps(&self) -> Vec<(&'static str, StepId)> {
                vec![$((self.$i.0, self.$i.1.step)),+]
            }
        }
    )+};
}

inputs! {
    (A 0),
    (A 0, B 1),
    (A 0, B 1, C 2),
    (A 0, B 1, C 2, D 3),
    (A 0, B 1, C 2, D 3, E 4),
    (A 0, B 1, C 2, D 3, E 4, F 5),
    (A 0, B 1, C 2, D 3, E 4, F 5, G 6),
    (A 0, B 1, C 2, D 3, E 4, F 5, G 6, H 7),
    (A 0, B 1, C 2, D 3, E 4, F 5, G 6, H 7, J 8),
    (A 0, B 1, C 2, D 3, E 4, F 5, G 6, H 7, J 8, K 9),
}

impl Inputs for () {
    type Values = ();
    fn values(&self) {}
    fn steps(&self) -> Vec<(&'static str, StepId)> {
        Vec::new()
    }
}

/// Several numbers of one kind, for points of a line and the like.
impl<Q: Copy> Inputs for Vec<(&'static str, Known<Q>)> {
    type Values = Vec<Q>;
    fn values(&self) -> Vec<Q> {
        self.iter().map(|(_, k)| k.value).collect()
    }
    fn steps(&self) -> Vec<(&'static str, StepId)> {
        self.iter().map(|(s, k)| (*s, k.step)).collect()
    }
}

/// Two sets of inputs together, for lists of points.
#[derive(Clone, Debug)]
pub struct Both<A, B>(pub A, pub B);

impl<A: Inputs, B: Inputs> Inputs for Both<A, B> {
    type Values = (A::Values, B::Values);
    fn values(&self) -> Self::Values {
        (self.0.values(), self.1.values())
    }
    fn steps(&self) -> Vec<(&'static str, StepId)> {
        let mut steps = self.0.steps();
        steps.extend(self.1.steps());
        steps
    }
}

/// A calculation written down.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Derivation {
    steps: Vec<Step>,
    applied: Vec<(&'static Law, Vec<(&'static str, StepId)>)>,
    about: Option<String>,
    latest: usize,
}

impl Derivation {
    /// An empty calculation.
    pub fn new() -> Self {
        Self::default()
    }

    /// Its steps in order.
    pub fn steps(&self) -> &[Step] {
        &self.steps
    }

    /// The step of that number.
    pub fn step(&self, id: StepId) -> Option<&Step> {
        self.steps.get(id.0 as usize)
    }

    /// The steps a result stands on, in order, the result last.
    pub fn behind(&self, results: &[StepId]) -> Vec<&Step> {
        let mut wanted = vec![false; self.steps.len()];
        let mut stack: Vec<StepId> = results.to_vec();
        while let Some(id) = stack.pop() {
            let Some(seen) = wanted.get_mut(id.0 as usize) else {
                continue;
            };
            if std::mem::replace(seen, true) {
                continue;
            }
            if let How::Law { with, .. } = &self.steps[id.0 as usize].how {
                stack.extend(with.iter().map(|(_, s)| *s));
            }
        }
        self.steps
            .iter()
            .filter(|s| wanted[s.id.0 as usize])
            .collect()
    }

    /// Appends another calculation; its steps are renumbered by the returned offset.
    pub fn append(&mut self, other: &Self) -> u32 {
        let offset = u32::try_from(self.steps.len()).unwrap_or(u32::MAX);
        for step in &other.steps {
            let mut step = step.clone();
            step.id.0 += offset;
            if let How::Law { with, .. } = &mut step.how {
                for (_, id) in with {
                    id.0 += offset;
                }
            }
            self.steps.push(step);
        }
        offset
    }

    /// Writes a step down, unless the very same stands already: one number, one step.
    fn push(
        &mut self,
        symbol: &'static str,
        says: &'static str,
        amount: Amount,
        how: How,
    ) -> StepId {
        let same =
            |s: &Step| s.symbol == symbol && s.says == says && s.amount == amount && s.how == how;
        if let Some(at) = self.steps.iter().position(same) {
            self.latest = at;
            return self.steps[at].id;
        }
        let id = StepId(u32::try_from(self.steps.len()).unwrap_or(u32::MAX));
        self.latest = self.steps.len();
        self.steps.push(Step {
            id,
            symbol,
            says: Cow::Borrowed(says),
            about: self.about.clone(),
            amount,
            how,
            notes: Vec::new(),
        });
        id
    }
}

impl Recorder for Derivation {
    fn given<Q: Measure>(
        &mut self,
        symbol: &'static str,
        says: &'static str,
        given: &Given<Q>,
    ) -> Known<Q> {
        let how = How::Given {
            written: given.written.clone(),
            origin: given.origin.clone(),
        };
        let step = self.push(symbol, says, given.value.amount(), how);
        Known {
            value: given.value,
            step,
        }
    }

    fn assume<Q: Measure>(
        &mut self,
        symbol: &'static str,
        says: &'static str,
        value: Q,
        why: &'static str,
    ) -> Known<Q> {
        let how = How::Given {
            written: String::new(),
            origin: Origin::assumed(why),
        };
        let step = self.push(symbol, says, value.amount(), how);
        Known { value, step }
    }

    fn law<I: Inputs, Q: Measure>(
        &mut self,
        symbol: &'static str,
        says: &'static str,
        law: &'static Law,
        inputs: I,
        f: impl FnOnce(I::Values) -> Q,
    ) -> Known<Q> {
        let value = f(inputs.values());
        let step = self.push(
            symbol,
            says,
            value.amount(),
            How::Law {
                law,
                with: inputs.steps(),
            },
        );
        Known { value, step }
    }

    fn apply<I: Inputs, T: Copy>(
        &mut self,
        law: &'static Law,
        inputs: I,
        f: impl FnOnce(I::Values) -> T,
    ) -> Outcome<T> {
        let value = f(inputs.values());
        self.applied.push((law, inputs.steps()));
        Outcome {
            value,
            key: self.applied.len() - 1,
        }
    }

    fn take<T: Copy, Q: Measure>(
        &mut self,
        outcome: &Outcome<T>,
        symbol: &'static str,
        says: &'static str,
        f: impl FnOnce(T) -> Q,
    ) -> Known<Q> {
        let (law, with) = self.applied[outcome.key].clone();
        let value = f(outcome.value);
        let step = self.push(symbol, says, value.amount(), How::Law { law, with });
        Known { value, step }
    }

    fn note(&mut self, remark: impl FnOnce() -> String) {
        if let Some(step) = self.steps.get_mut(self.latest) {
            let remark = remark();
            if !step.notes.contains(&remark) {
                step.notes.push(remark);
            }
        }
    }

    fn about(&mut self, part: impl FnOnce() -> Option<String>) {
        self.about = part();
    }
}

/// The same calculation without a record.
#[derive(Clone, Copy, Debug, Default)]
pub struct Silent;

impl Recorder for Silent {
    fn given<Q: Measure>(&mut self, _: &'static str, _: &'static str, g: &Given<Q>) -> Known<Q> {
        Known {
            value: g.value,
            step: StepId(0),
        }
    }

    fn assume<Q: Measure>(
        &mut self,
        _: &'static str,
        _: &'static str,
        value: Q,
        _: &'static str,
    ) -> Known<Q> {
        Known {
            value,
            step: StepId(0),
        }
    }

    fn law<I: Inputs, Q: Measure>(
        &mut self,
        _: &'static str,
        _: &'static str,
        _: &'static Law,
        inputs: I,
        f: impl FnOnce(I::Values) -> Q,
    ) -> Known<Q> {
        Known {
            value: f(inputs.values()),
            step: StepId(0),
        }
    }

    fn apply<I: Inputs, T: Copy>(
        &mut self,
        _: &'static Law,
        inputs: I,
        f: impl FnOnce(I::Values) -> T,
    ) -> Outcome<T> {
        Outcome {
            value: f(inputs.values()),
            key: 0,
        }
    }

    fn take<T: Copy, Q: Measure>(
        &mut self,
        outcome: &Outcome<T>,
        _: &'static str,
        _: &'static str,
        f: impl FnOnce(T) -> Q,
    ) -> Known<Q> {
        Known {
            value: f(outcome.value),
            step: StepId(0),
        }
    }

    fn note(&mut self, _: impl FnOnce() -> String) {}

    fn about(&mut self, _: impl FnOnce() -> Option<String>) {}
}
