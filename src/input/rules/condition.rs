//! Reads `point part temperature above 60 degC` and its like.

use crate::model::facts::PartGroup;
use crate::model::rulebook::condition::{
    Clause, Condition, Fact, Form, OilFact, PairFact, PointFact, Test, Values, WordForm,
};
use crate::model::word::{Word, known};
use crate::quantity::{Kind, parse};

/// Why a text is not a condition.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
#[error("{what}; write {write}")]
pub struct BadCondition {
    /// What is wrong.
    pub what: String,
    /// What to write instead.
    pub write: String,
}

fn bad<T>(what: impl Into<String>, write: impl Into<String>) -> Result<T, BadCondition> {
    Err(BadCondition {
        what: what.into(),
        write: write.into(),
    })
}

/// Reads one line: a condition, or several joined by ` or `.
///
/// # Errors
/// What is not understood, with the words that would be.
pub fn clause(text: &str) -> Result<Clause, BadCondition> {
    let any: Result<Vec<Condition>, BadCondition> = text.split(" or ").map(condition).collect();
    Ok(Clause {
        any: any?,
        written: text.trim().to_owned(),
    })
}

fn condition(text: &str) -> Result<Condition, BadCondition> {
    let text = text.trim();
    let (subject, rest) = text.split_once(' ').unwrap_or((text, ""));
    let (fact, rest) = match subject {
        "oil" => fact::<OilFact>(rest, Fact::Oil)?,
        "now" => fact::<OilFact>(rest, Fact::Now)?,
        "point" => fact::<PointFact>(rest, Fact::Point)?,
        "pair" => fact::<PairFact>(rest, Fact::Pair)?,
        _ => {
            return bad(
                format!("`{subject}` is not what a condition speaks of"),
                "oil, now, point or pair in front",
            );
        }
    };
    let test = test(fact, rest.trim())?;
    Ok(Condition { fact, test })
}

/// Takes the longest fact name off the front.
fn fact<W: Word>(text: &str, make: fn(W) -> Fact) -> Result<(Fact, &str), BadCondition> {
    let follows = |word: &str| {
        text.strip_prefix(word)
            .filter(|rest| rest.is_empty() || rest.starts_with(' '))
    };
    W::ALL
        .iter()
        .filter_map(|w| Some((w, follows(w.word())?)))
        .min_by_key(|(_, rest)| rest.len())
        .map_or_else(
            || {
                bad(
                    format!("`{text}` does not begin with {}", W::NOUN),
                    format!("one of {}", known::<W>().join(", ")),
                )
            },
            |(w, rest)| Ok((make(*w), rest)),
        )
}

const OPERATORS: &str = "is, is not, above, below, worse than, stated or not stated";

fn test(fact: Fact, text: &str) -> Result<Test, BadCondition> {
    match text {
        "stated" => return Ok(Test::Stated),
        "not stated" => return Ok(Test::NotStated),
        _ => {}
    }
    let form = fact.form();
    if let Some(values) = text.strip_prefix("is not ") {
        return Ok(Test::IsNot(read_values(form, values)?));
    }
    if let Some(values) = text.strip_prefix("is ") {
        return Ok(Test::Is(read_values(form, values)?));
    }
    if let (Some(value), Form::Words(words)) = (text.strip_prefix("worse than "), form)
        && words.ordered
    {
        let bit = read_bits(words, value)?;
        // every word after this one
        return Ok(Test::Is(Values::Bits(!(bit | (bit - 1)))));
    }
    let Form::Number(kind) = form else {
        return bad(
            format!("`{text}` is not a test of {}", fact.written()),
            format!("{} {OPERATORS}", fact.written()),
        );
    };
    if let Some(value) = text.strip_prefix("above ") {
        return Ok(Test::Above(read_number(kind, value)?));
    }
    if let Some(value) = text.strip_prefix("below ") {
        return Ok(Test::Below(read_number(kind, value)?));
    }
    bad(
        format!("`{text}` is not a test of {}", fact.written()),
        format!("{} above {}", fact.written(), kind.spec().example),
    )
}

fn read_number(kind: Kind, text: &str) -> Result<crate::quantity::Amount, BadCondition> {
    match parse::parse(kind, text) {
        Ok(read) => Ok(read.amount),
        Err(e) => bad(format!("`{text}`: {e}"), kind.spec().example),
    }
}

fn read_bits(form: WordForm, text: &str) -> Result<u64, BadCondition> {
    (form.read)(text.trim()).map_or_else(
        || {
            bad(
                format!("`{}` is not {}", text.trim(), form.noun),
                format!("one of {}", (form.known)().join(", ")),
            )
        },
        Ok,
    )
}

fn read_values(form: Form, text: &str) -> Result<Values, BadCondition> {
    let parts = text.split(',').map(str::trim).filter(|p| !p.is_empty());
    match form {
        Form::Words(words) => {
            let mut bits = 0;
            for part in parts {
                bits |= read_bits(words, part)?;
            }
            Ok(Values::Bits(bits))
        }
        Form::Classes => Ok(Values::Names {
            names: parts.map(str::to_owned).collect(),
            groups: 0,
        }),
        Form::Parts => {
            let mut names = Vec::new();
            let mut groups = 0;
            for part in parts {
                match PartGroup::from_word(part) {
                    Some(group) => groups |= group.bit(),
                    None => names.push(part.to_owned()),
                }
            }
            Ok(Values::Names { names, groups })
        }
        Form::Number(kind) => bad(
            format!("`{text}` is compared with `is`, a number is not"),
            format!("above {}", kind.spec().example),
        ),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::model::facts::{Backstop, CopperStrip};

    #[test]
    fn reads_the_longest_fact_name() {
        let read = clause("point part temperature above 60 degC").expect("it is right");
        let [one] = read.any.as_slice() else {
            panic!("one condition is wanted")
        };
        assert_eq!(one.fact, Fact::Point(PointFact::PartTemperature));
        assert!(matches!(one.test, Test::Above(a) if (a.base - 333.15).abs() < 1e-9));
    }

    #[test]
    fn reads_lists_and_alternatives() {
        let read = clause("point backstop is sprag, cam or oil class is CKC").expect("right");
        assert_eq!(read.any.len(), 2);
        let want = Backstop::Sprag.bit() | Backstop::Cam.bit();
        assert_eq!(read.any[0].test, Test::Is(Values::Bits(want)));
    }

    #[test]
    fn worse_than_takes_every_later_word() {
        let read = clause("oil copper strip worse than 1b").expect("right");
        let Test::Is(Values::Bits(bits)) = read.any[0].test else {
            panic!("words are wanted")
        };
        assert_eq!(bits & CopperStrip::C1b.bit(), 0);
        assert_ne!(bits & CopperStrip::C2a.bit(), 0);
        assert_ne!(bits & CopperStrip::C4c.bit(), 0);
    }

    #[test]
    fn says_what_is_not_understood() {
        for (text, what) in [
            ("machine backstop is sprag", "speaks of"),
            ("point brake is yes", "does not begin with"),
            ("point backstop is loose", "is not a backstop"),
            ("point backstop above 3", "is not a test"),
            ("oil flash point above 60", "no unit"),
            ("oil flash point is 60 degC", "a number is not"),
        ] {
            let bad = clause(text).expect_err(text);
            assert!(bad.what.contains(what), "{text}: {}", bad.what);
        }
    }

    proptest::proptest! {
        #[test]
        fn never_panics(text in "(oil|now|point|pair)? ?\\PC{0,60}") {
            drop(clause(&text));
        }
    }
}
