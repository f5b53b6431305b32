//! Cells that hold words: yes and no, materials, grades, whole numbers.

use super::cell::Reading;
use super::parsed::{Placeholder, placeholder};
use super::yaml::item;
use crate::input::keys::Form;
use crate::input::points::read_grade;
use crate::relation::oil::grade::IsoGrade;

/// Words of registers for words of the reader.
const SAME: &[(&str, &str)] = &[
    ("nitrile", "NBR"),
    ("fpm", "FKM"),
    ("fluorocarbon", "FKM"),
    ("fluoroelastomer", "FKM"),
    ("silicone", "VMQ"),
    ("epoxy", "two-part epoxy"),
    ("2k epoxy", "two-part epoxy"),
    ("alkyd", "single-pack"),
    ("oil bath", "bath"),
    ("splash lubrication", "splash"),
    ("circulating", "circulated"),
    ("circulation", "circulated"),
    ("forced", "pressure-fed"),
    ("forced feed", "pressure-fed"),
    ("pressure", "pressure-fed"),
    ("tank", "reservoir"),
    ("greased", "grease"),
    ("outside", "outdoor"),
    ("outdoors", "outdoor"),
    ("inside", "indoor"),
    ("indoors", "indoor"),
    ("medium", "moderate"),
    ("spherical", "spherical roller"),
    ("hyd", "hydraulic"),
    ("gear oil", "gear"),
    ("hydraulic oil", "hydraulic"),
    ("turbine oil", "turbine"),
    ("compressor oil", "compressor"),
];

/// Reads a cell of words; `None` where the form is a quantity.
pub fn read(form: &Form, text: &str) -> Option<Reading> {
    let text = text.split_whitespace().collect::<Vec<_>>().join(" ");
    let zero_is_none = !matches!(form, Form::YesNo | Form::YesNoOr(_) | Form::Whole);
    match placeholder(&text, zero_is_none) {
        Some(Placeholder::Elsewhere) => {
            return Some(Reading::fault("unknown; it stands elsewhere"));
        }
        Some(Placeholder::Number) => {
            return Some(Reading {
                read_as: Some("taken as not known".into()),
                ..Reading::missing()
            });
        }
        Some(Placeholder::Nothing) => return Some(Reading::missing()),
        None => {}
    }
    Some(match form {
        Form::Quantity(_) | Form::Monthly(_) => return None,
        Form::YesNo => yes_no(&text, &[]),
        Form::YesNoOr(more) => yes_no(&text, more),
        Form::Word(words) => word(&text, words),
        Form::Words(words) => several(&text, words),
        Form::Whole => whole(&text),
        Form::Grade => grade(&text),
        Form::Cleanliness => cleanliness(&text),
        Form::Names => names(&text),
        _ => value(text),
    })
}

fn value(text: impl Into<String>) -> Reading {
    Reading {
        value: Some(text.into()),
        ..Reading::default()
    }
}

fn yes_no(text: &str, more: &[&str]) -> Reading {
    let lower = text.to_lowercase();
    if let Some(word) = more.iter().find(|w| w.eq_ignore_ascii_case(text)) {
        return value(*word);
    }
    match lower.as_str() {
        "yes" | "y" | "true" | "x" | "\u{2713}" | "present" => value("yes"),
        "no" | "n" | "false" | "none" | "absent" => value("no"),
        _ => {
            let mut words = vec!["yes", "no"];
            words.extend(more);
            Reading::fault(format!("one of {} is wanted", words.join(", ")))
        }
    }
}

fn known<'w>(text: &str, words: &[&'w str]) -> Option<&'w str> {
    let lower = text.trim().to_lowercase();
    let same = SAME.iter().find(|(w, _)| *w == lower).map(|(_, w)| *w);
    words
        .iter()
        .find(|w| {
            w.eq_ignore_ascii_case(text.trim()) || same.is_some_and(|s| s.eq_ignore_ascii_case(w))
        })
        .copied()
}

fn word(text: &str, words: &[&str]) -> Reading {
    let doubtful = text.contains('?');
    match known(&text.replace('?', ""), words) {
        Some(word) => Reading {
            read_as: (!word.eq_ignore_ascii_case(text)).then(|| format!("read as {word}")),
            ask: doubtful.then(|| "the register puts a question mark behind it".into()),
            ..value(word)
        },
        None => Reading::fault(format!("one of {} is wanted", words.join(", "))),
    }
}

fn several(text: &str, words: &[&str]) -> Reading {
    let pieces: Vec<&str> = text
        .split(['/', ',', ';', '+', '&'])
        .map(str::trim)
        .collect();
    let found: Vec<Option<&str>> = pieces
        .iter()
        .filter(|p| !p.is_empty())
        .map(|p| known(p, words))
        .collect();
    let all: Option<Vec<&str>> = found.into_iter().collect();
    match all.as_deref() {
        Some([one]) => value(*one),
        Some(many) if !many.is_empty() => value(format!("[{}]", many.join(", "))),
        _ => Reading::fault(format!("one or several of {} are wanted", words.join(", "))),
    }
}

fn whole(text: &str) -> Reading {
    let plain = text.trim_end_matches(".0");
    match plain.parse::<u32>() {
        Ok(n) if n > 0 => value(n.to_string()),
        Ok(_) => Reading {
            read_as: Some("taken as not known".into()),
            ..Reading::missing()
        },
        Err(_) => Reading::fault("a whole number is wanted"),
    }
}

fn grade(text: &str) -> Reading {
    let bare: Option<u32> = text.parse().ok();
    if let Some(grade) = bare.and_then(IsoGrade::of_number) {
        return Reading {
            read_as: Some(format!("read as ISO VG {}", grade.number())),
            ..value(format!("ISO VG {}", grade.number()))
        };
    }
    // engine grades are often written without their SAE
    let sae = format!("SAE {text}");
    match read_grade(text) {
        Ok(_) => value(text),
        Err(_) if text.to_uppercase().contains('W') && read_grade(&sae).is_ok() => Reading {
            read_as: Some(format!("read as {sae}")),
            ..value(sae)
        },
        Err(_) => Reading::fault("a grade is wanted, as ISO VG 220, AGMA 5 EP or SAE 90"),
    }
}

fn cleanliness(text: &str) -> Reading {
    const WORDS: [&str; 5] = ["high", "normal", "slight", "severe", "very severe"];
    let code = text
        .trim_start_matches("ISO")
        .trim_start_matches("4406")
        .trim();
    let parts: Vec<&str> = code.split('/').map(str::trim).collect();
    let number = |p: &str| {
        p == "-" || (!p.is_empty() && p.len() <= 2 && p.bytes().all(|b| b.is_ascii_digit()))
    };
    if (parts.len() == 2 || parts.len() == 3) && parts.iter().all(|p| number(p)) {
        let three = if parts.len() == 2 {
            format!("-/{}", parts.join("/"))
        } else {
            parts.join("/")
        };
        return value(three);
    }
    match known(text, &WORDS) {
        Some(word) => value(word),
        None => Reading::fault("a code is wanted, as -/17/14"),
    }
}

fn names(text: &str) -> Reading {
    let pieces: Vec<String> = text
        .split([',', ';'])
        .map(str::trim)
        .filter(|p| !p.is_empty())
        .map(item)
        .collect();
    value(format!("[{}]", pieces.join(", ")))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::input::keys::machine::{BACKSTOP, LUBRICATION, SEALS};

    #[test]
    fn words_of_registers_become_words_of_the_reader() {
        let v = |form: Form, text: &str| read(&form, text).and_then(|r| r.value);
        assert_eq!(v(Form::YesNo, "Y").as_deref(), Some("yes"));
        assert_eq!(
            v(Form::YesNoOr(BACKSTOP), "Sprag").as_deref(),
            Some("sprag")
        );
        assert_eq!(
            v(Form::Word(LUBRICATION), "oil bath").as_deref(),
            Some("bath")
        );
        assert_eq!(
            v(Form::Words(SEALS), "NBR / FPM").as_deref(),
            Some("[NBR, FKM]")
        );
        assert_eq!(v(Form::Whole, "4").as_deref(), Some("4"));
        assert_eq!(v(Form::Grade, "220").as_deref(), Some("ISO VG 220"));
        assert_eq!(
            v(Form::Cleanliness, "16/14/11").as_deref(),
            Some("16/14/11")
        );
        assert_eq!(v(Form::Cleanliness, "17/14").as_deref(), Some("-/17/14"));
        assert_eq!(v(Form::Names, "EP, CKC").as_deref(), Some("[EP, CKC]"));
        assert!(read(&Form::YesNo, "perhaps").is_some_and(|r| r.fault.is_some()));
        assert!(read(&Form::Word(LUBRICATION), "n/a").is_some_and(|r| r.missing));
    }
}
