//! Did you mean: a name is suggested only when it is certain.

/// The one candidate a misspelt name certainly means, if there is one.
///
/// Certain is: equal but for case; else the same letters and figures apart from separators
/// (`CV104` for `CV-104`); else one edit away and longer than two letters. Two candidates that
/// fit equally well are no certainty.
pub fn certain<'c>(name: &str, candidates: impl IntoIterator<Item = &'c str>) -> Option<&'c str> {
    let mut best: Option<(u8, &'c str)> = None;
    let mut tied = false;
    for candidate in candidates {
        let Some(rank) = likeness(name, candidate) else {
            continue;
        };
        match best {
            Some((known, other)) if known == rank => tied |= other != candidate,
            Some((known, _)) if known < rank => {}
            _ => {
                best = Some((rank, candidate));
                tied = false;
            }
        }
    }
    best.filter(|_| !tied).map(|(_, candidate)| candidate)
}

/// The smaller, the more alike; `None` where the likeness proves nothing.
fn likeness(name: &str, candidate: &str) -> Option<u8> {
    let (a, b) = (name.to_lowercase(), candidate.to_lowercase());
    if a.is_empty() || name == candidate {
        return None;
    }
    if a == b {
        return Some(0);
    }
    let bare = |s: &str| {
        s.chars()
            .filter(|c| c.is_alphanumeric())
            .collect::<String>()
    };
    let (plain_a, plain_b) = (bare(&a), bare(&b));
    if !plain_a.is_empty() && plain_a == plain_b {
        return Some(1);
    }
    let long = a.chars().count() > 2 && b.chars().count() > 2;
    // Numbers that differ by one figure are other numbers, not misspellings.
    let same_figures = figures(&a) == figures(&b);
    (long && same_figures && strsim::osa_distance(&a, &b) == 1).then_some(2)
}

fn figures(text: &str) -> String {
    text.chars().filter(char::is_ascii_digit).collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn suggests_only_what_is_certain() {
        let keys = [
            "start limit",
            "start",
            "sump rise",
            "CV-104",
            "CV-105",
            "ratio",
        ];
        for (name, want) in [
            ("start limt", Some("start limit")),
            ("strat", Some("start")),
            ("Ratio", Some("ratio")),
            ("CV104", Some("CV-104")),
            ("sump-rise", Some("sump rise")),
            ("CV-106", None), // one figure off is another machine
            ("viscosity", None),
            ("", None),
        ] {
            assert_eq!(certain(name, keys), want, "{name}");
        }
        assert_eq!(certain("ab", ["ac"]), None);
        assert_eq!(certain("fooa", ["foob", "fooc"]), None);
        assert_eq!(certain("foo", ["fooa", "FOO"]), Some("FOO"));
    }
}
