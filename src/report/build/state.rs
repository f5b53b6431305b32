//! The state of a point: settled, needs attention, not decided. Worked out, never typed.

use super::case::{Case, Now};
use crate::judge::Verdict;

/// The state of a point or a machine, the most pressing first.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, PartialOrd, Ord)]
pub(super) enum State {
    /// The oil in it fails, is barred, is tight without being accepted, or is not known.
    #[default]
    Attention,
    /// What is known gives no answer.
    Undecided,
    /// The oil in it holds, or is tight and accepted.
    Settled,
}

impl State {
    pub(super) const ALL: [State; 3] = [State::Attention, State::Undecided, State::Settled];

    /// The heading of its group.
    pub(super) fn title(self) -> &'static str {
        match self {
            State::Attention => "need attention",
            State::Undecided => "not decided",
            State::Settled => "settled",
        }
    }
}

/// How pressing a point is, the most pressing first.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, PartialOrd, Ord)]
pub(super) enum Pressing {
    /// The oil in it is barred.
    Barred,
    /// It fails.
    #[default]
    Fails,
    /// Nobody knows what is in it, or nothing is.
    NotKnown,
    /// It is tight and nobody has accepted that.
    Tight,
    /// What is known gives no answer.
    Open,
    /// Nothing presses.
    Nothing,
}

/// The state of a point and how pressing it is.
pub(super) fn of(case: &Case<'_, '_>) -> (State, Pressing) {
    match case.now {
        Now::Barred(_) => (State::Attention, Pressing::Barred),
        Now::Weighed(c) => match c.judgement.verdict {
            Verdict::Holds => (State::Settled, Pressing::Nothing),
            Verdict::Tight if case.accepted.is_some() => (State::Settled, Pressing::Nothing),
            Verdict::Tight => (State::Attention, Pressing::Tight),
            Verdict::Open => (State::Undecided, Pressing::Open),
            Verdict::Fails => (State::Attention, Pressing::Fails),
        },
        Now::Other(_) | Now::Unknown | Now::Nothing => {
            let open = case
                .lead
                .is_some_and(|c| c.judgement.verdict == Verdict::Open);
            if open {
                (State::Undecided, Pressing::Open)
            } else {
                (State::Attention, Pressing::NotKnown)
            }
        }
    }
}
