//! Quantities of a record, as the model keeps them.

use super::{Fields, Slot};
use crate::input::keys::Form;
use crate::input::reader::Reader;
use crate::input::value::{self, Body, Clauses, Deviation, Roughness, Value, Want};
use crate::model::stated::{Between, Bound, Stated, Tolerance};
use crate::problem::{Code, Write};
use crate::quantity::parse::Read;
use crate::quantity::{Amount, Kind, Length, Measure};
use crate::relation::film::roughness::rq_from_ra;
use crate::source::place::{Given, Whose};
use crate::source::{Origin, Place, Span};

impl Slot<'_> {
    /// Where the value comes from.
    pub fn origin(&self, clauses: &Clauses) -> Origin {
        let mut origin = self.bare_origin();
        if let Some(said) = &clauses.origin {
            origin.whose = said.whose;
            origin.dated.clone_from(&said.dated);
            origin.note.clone_from(&said.note);
        }
        origin
    }

    /// The text of the value; a list or a record is reported.
    pub fn text<'s>(&'s self, reader: &mut Reader<'_>) -> Option<&'s str> {
        let text = self.node.text();
        if text.is_none() {
            super::words::value_wanted(reader, self);
        }
        text
    }

    /// The value read by the form of its key.
    pub fn value(&self, reader: &mut Reader<'_>) -> Option<Value> {
        let Form::Quantity(want) = &self.key.form else {
            debug_assert!(false, "{} takes no quantity", self.key.name);
            return None;
        };
        self.value_as(reader, want)
    }

    /// The value read by another form.
    pub fn value_as(&self, reader: &mut Reader<'_>, want: &Want) -> Option<Value> {
        let text = self.text(reader)?;
        match value::read(text, want) {
            Ok(value) => {
                self.mains(reader, &value);
                Some(value)
            }
            Err(faults) => {
                for fault in faults {
                    let code = fault.code;
                    let mut problem = reader.carried(self.node, fault, &self.within);
                    if code == Code::RiseNotTemperature && self.key.name == "sump rise" {
                        let reading = Write::edit(self.name.span, "sump");
                        problem.write.push(reading);
                    }
                    if code == Code::UnknownUnwanted {
                        problem.write.splice(0..0, self.left_out(reader));
                    }
                    reader.report(problem);
                }
                None
            }
        }
    }

    /// The line made a comment, where the key begins it.
    fn left_out(&self, reader: &Reader<'_>) -> Option<Write> {
        let at = self.name.span;
        let before = reader.source(self.node).get(..at.start as usize)?;
        let line = before.rsplit('\n').next()?;
        let before = Span {
            end: at.start,
            ..at
        };
        let alone = line.trim().is_empty() && self.node.text().is_some();
        alone.then(|| Write::edit(before, "# "))
    }

    /// Carries a roughness stated by the other mean to the one wanted: Rq = 1.25 Ra.
    fn as_wanted(&self, value: &mut Value) {
        let Form::Quantity(want) = &self.key.form else {
            return;
        };
        let factor = match (want.roughness, value.roughness) {
            (Some(Roughness::Ra), Some(Roughness::Rq)) => 1.0 / rq_over_ra(),
            (Some(Roughness::Rq), Some(Roughness::Ra)) => rq_over_ra(),
            _ => return,
        };
        match &mut value.body {
            Body::One { read, .. } => read.amount.base *= factor,
            Body::Unknown(Some((lo, hi))) => {
                lo.amount.base *= factor;
                hi.amount.base *= factor;
            }
            _ => {}
        }
    }

    /// A speed of exactly 50 or 60 Hz is more often the mains than a shaft.
    fn mains(&self, reader: &mut Reader<'_>, value: &Value) {
        let Body::One { read, .. } = &value.body else {
            return;
        };
        let mains = [50.0, 60.0].iter().any(|f| (read.value - f).abs() < 1e-9);
        if read.amount.kind == Kind::RotationalSpeed && read.unit == "Hz" && mains {
            let per_minute = read.value * 60.0;
            let problem = reader
                .at(
                    Code::SpeedMains,
                    format!("{} Hz read as {per_minute} r/min", read.value),
                    self.node.span,
                    &self.within,
                )
                .why("it is also the frequency of the mains, which a shaft reaches only with a two-pole motor and no slip")
                .write(Write::edit(self.node.span, format!("{per_minute} r/min")).remark("if the shaft turns that fast"));
            reader.report(problem);
        }
    }
}

impl Fields<'_> {
    /// A quantity as far as it is stated.
    pub fn stated<Q: Measure>(&self, reader: &mut Reader<'_>, name: &str) -> Option<Stated<Q>> {
        self.stated_as(reader, name, Amount::as_measure)
    }

    /// The same for a key of several kinds.
    pub fn stated_as<T>(
        &self,
        reader: &mut Reader<'_>,
        name: &str,
        make: impl Fn(Amount) -> Option<T>,
    ) -> Option<Stated<T>> {
        let slot = self.get(name)?;
        let mut value = slot.value(reader)?;
        slot.as_wanted(&mut value);
        if !super::bounds::possible(reader, self, slot, &value) {
            return None;
        }
        stated_of(slot, value, make)
    }

    /// A quantity that must be known.
    pub fn given<Q: Measure>(&self, reader: &mut Reader<'_>, name: &str) -> Option<Given<Q>> {
        match self.stated::<Q>(reader, name)? {
            Stated::Known(given, _) => Some(given),
            _ => None,
        }
    }

    /// A range.
    pub fn range<Q: Measure>(
        &self,
        reader: &mut Reader<'_>,
        name: &str,
    ) -> Option<Stated<Between<Q>>> {
        let slot = self.get(name)?;
        let value = slot.value(reader)?;
        range_of(reader, slot, value)
    }

    /// A quantity that may be only a bound.
    pub fn bound<Q: Measure>(
        &self,
        reader: &mut Reader<'_>,
        name: &str,
    ) -> Option<Given<Bound<Q>>> {
        let slot = self.get(name)?;
        let value = slot.value(reader)?;
        bound_of(slot, value)
    }
}

/// The usual ratio of the two means of a profile.
fn rq_over_ra() -> f64 {
    rq_from_ra(Length::from_base(1.0)).base()
}

/// A value as the model keeps it.
pub fn stated_of<T>(
    slot: &Slot<'_>,
    value: Value,
    make: impl Fn(Amount) -> Option<T>,
) -> Option<Stated<T>> {
    let origin = slot.origin(&value.clauses);
    match value.body {
        Body::One {
            read, deviation, ..
        } => {
            let tolerance = match deviation {
                Some(d) => tolerance_of(d, &read, &make),
                None => None,
            };
            let given = Given::new(make(read.amount)?, value.written, origin);
            Some(Stated::Known(given, tolerance))
        }
        Body::Unknown(None) => Some(Stated::Unknown(value.clauses.ask, origin)),
        Body::Unknown(Some((lo, hi))) => {
            let (lo, hi) = (make(lo.amount)?, make(hi.amount)?);
            let range = Given::new(Between { lo, hi }, value.written, origin);
            Some(Stated::Range(range, value.clauses.ask))
        }
        Body::Held(_) | Body::Range { .. } | Body::Bound { .. } => None,
    }
}

fn tolerance_of<T>(
    deviation: Deviation,
    of: &Read,
    make: &impl Fn(Amount) -> Option<T>,
) -> Option<Tolerance<T>> {
    match deviation {
        Deviation::Share(share) => Some(Tolerance::Share(share)),
        Deviation::Of(by) if of.amount.kind == Kind::Temperature => {
            Some(Tolerance::Kelvins(by.amount.base))
        }
        Deviation::Of(by) => make(by.amount).map(Tolerance::Of),
    }
}

/// A range as the model keeps it.
pub fn range_of<Q: Measure>(
    reader: &mut Reader<'_>,
    slot: &Slot<'_>,
    value: Value,
) -> Option<Stated<Between<Q>>> {
    let origin = slot.origin(&value.clauses);
    match value.body {
        Body::Range { lo, hi } => {
            let (lo, hi) = (lo.amount.as_measure()?, hi.amount.as_measure()?);
            let given = Given::new(Between { lo, hi }, value.written, origin);
            Some(Stated::Known(given, None))
        }
        Body::Unknown(None) => Some(Stated::Unknown(value.clauses.ask, origin)),
        Body::Unknown(Some((lo, hi))) => {
            let inner = value.written.trim_start_matches("unknown").trim();
            let inner = inner.trim_matches(['(', ')']);
            let whole = format!("{inner}, assumed");
            let problem = reader
                .at(
                    Code::UnknownForm,
                    format!("an unknown range {} .. {} {}", lo.value, hi.value, hi.unit),
                    slot.node.span,
                    &slot.within,
                )
                .why("the coldest and the hottest are the range itself; whose word it is stands behind it")
                .write(Write::edit(slot.node.span, whole));
            reader.report(problem);
            None
        }
        _ => None,
    }
}

/// A bound as the model keeps it.
pub fn bound_of<Q: Measure>(slot: &Slot<'_>, value: Value) -> Option<Given<Bound<Q>>> {
    let origin = slot.origin(&value.clauses);
    let bound = match value.body {
        Body::One { read, .. } => Bound::Exactly(read.amount.as_measure()?),
        Body::Bound { above: true, read } => Bound::Above(read.amount.as_measure()?),
        Body::Bound { above: false, read } => Bound::Below(read.amount.as_measure()?),
        _ => return None,
    };
    Some(Given::new(bound, value.written, origin))
}

/// The place and word of nobody, for what is derived.
pub fn derived(slot: &Slot<'_>, note: &str) -> Origin {
    Origin {
        whose: Whose::NotStated,
        dated: None,
        note: Some(note.to_owned()),
        place: Place::Text(slot.node.span),
        inherited: slot.inherited.as_deref().map(str::to_owned),
    }
}
