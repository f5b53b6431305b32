//! A sample judged: what is known of it when every question is answered.

use crate::audit::bottle::Code;
use crate::audit::causes::Diagnosis;
use crate::audit::limits::Level;
use crate::audit::profile::From;
use crate::audit::readings::{Against, Change};
use crate::audit::serves::Serves;
use crate::audit::whose::Whose;
use crate::judge::Verdict;
use crate::weighing::Condition;

/// Which oil a bottle is said to hold.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Label {
    /// As written on the bottle; none where nothing is.
    pub written: Option<String>,
    /// Its place in the oil list.
    pub oil: Option<usize>,
    /// Whether the bottle says nothing and the oil in use of the machine stands in.
    pub from_machine: bool,
    /// The oil the machine is said to hold, where it is another.
    pub machine_holds: Option<usize>,
}

/// Cleanliness against its target.
#[derive(Clone, Debug, PartialEq)]
pub struct Clean {
    /// The code.
    pub code: Code,
    /// Whether it was worked out from counts.
    pub from_counts: bool,
    /// The target, for what, and where it comes from.
    pub target: Option<(Code, String, String)>,
    /// Codes over the target.
    pub over: Option<i16>,
    /// What it calls for.
    pub level: Level,
}

/// A bottle judged.
#[derive(Clone, Debug)]
pub struct Judged {
    /// The bottle.
    pub bottle: usize,
    /// The point, by its place in the site; none where it is not known.
    pub point: Option<usize>,
    /// The label.
    pub label: Label,
    /// Where the viscosity of new oil comes from.
    pub baseline: Option<From>,
    /// Movement from new oil.
    pub change: Change,
    /// Figures against their limits, viscosity first.
    pub against: Vec<Against>,
    /// Cleanliness.
    pub clean: Option<Clean>,
    /// Whose oil.
    pub whose: Whose,
    /// Why that is not known.
    pub why_not_known: Option<String>,
    /// Whether it serves; none where the machine is not known or no viscosity was measured.
    pub serves: Option<Serves>,
    /// Why the labelled oil is barred here.
    pub barred: Vec<Condition>,
    /// Causes.
    pub diagnosis: Diagnosis,
    /// Age on the day of the audit, days.
    pub age_days: Option<i32>,
    /// Whether it is past the age the site allows.
    pub too_old: bool,
    /// Whether another bottle is of the same machine and day.
    pub twice: bool,
    /// Whether it is the latest of its fill.
    pub latest: bool,
}

impl Judged {
    /// The verdict, after age and doubles: open where the sample says nothing of today.
    pub fn verdict(&self) -> Option<Verdict> {
        if self.too_old || self.twice {
            return self.point.map(|_| Verdict::Open);
        }
        match &self.serves {
            Some(serves) => Some(serves.verdict),
            None => self.point.map(|_| Verdict::Open),
        }
    }

    /// Whether the labelled oil is the one in it, so that what bars that oil bars this one.
    pub fn is_barred(&self) -> bool {
        !self.barred.is_empty() && matches!(self.whose, Whose::AsLabelled | Whose::Changed)
    }

    /// The word of the verdict: holds, tight, open, fails, barred.
    pub fn word(&self) -> Option<&'static str> {
        if self.is_barred() && !self.too_old && !self.twice {
            return Some("barred");
        }
        self.verdict().map(Verdict::word)
    }

    /// The greatest level of its readings.
    pub fn level(&self) -> Level {
        let clean = self.clean.as_ref().map(|c| c.level);
        let all = self.against.iter().map(|a| a.level).chain(clean);
        all.max().unwrap_or_default()
    }
}
