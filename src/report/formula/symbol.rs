//! How a quantity's name is taken apart: letter, primes, subscripts.

/// A symbol taken apart.
#[derive(Clone, Debug, PartialEq, Eq)]
pub(super) struct Symbol {
    /// The letter, Greek where its name was written, or a word that stays whole.
    pub(super) base: String,
    /// Primes.
    pub(super) primes: String,
    /// The subscript, if any.
    pub(super) sub: String,
}

const GREEK: [(&str, &str); 40] = [
    ("alpha", "α"),
    ("beta", "β"),
    ("gamma", "γ"),
    ("delta", "δ"),
    ("epsilon", "ε"),
    ("zeta", "ζ"),
    ("theta", "θ"),
    ("iota", "ι"),
    ("kappa", "κ"),
    ("lambda", "λ"),
    ("omega", "ω"),
    ("sigma", "σ"),
    ("eta", "η"),
    ("phi", "φ"),
    ("psi", "ψ"),
    ("chi", "χ"),
    ("rho", "ρ"),
    ("tau", "τ"),
    ("mu", "µ"),
    ("nu", "ν"),
    ("xi", "ξ"),
    ("pi", "π"),
    ("Alpha", "Α"),
    ("Beta", "Β"),
    ("Gamma", "Γ"),
    ("Delta", "Δ"),
    ("Theta", "Θ"),
    ("Kappa", "Κ"),
    ("Lambda", "Λ"),
    ("Omega", "Ω"),
    ("Sigma", "Σ"),
    ("Phi", "Φ"),
    ("Psi", "Ψ"),
    ("Rho", "Ρ"),
    ("Pi", "Π"),
    ("Xi", "Ξ"),
    ("degC", "°C"),
    ("mm2", "mm²"),
    ("eps", "ε"),
    ("vartheta", "ϑ"),
];

/// Takes a name apart in the trade's habit: `nu40`, `h_min`, `Dpw`, `e_C`, `aISO`, `r1x`, `E'`.
/// Words and words of capitals (`ratio`, `VI`) stay whole.
pub(super) fn take_apart(name: &str) -> Symbol {
    let (head, tail) = name.split_once('_').unwrap_or((name, ""));
    let primes: String = head
        .chars()
        .filter(|c| matches!(c, '\'' | '′'))
        .map(|_| '′')
        .collect();
    let head: String = head.chars().filter(|c| !matches!(c, '\'' | '′')).collect();
    let (base, rest) = letter(&head);
    let sub = match (rest.is_empty(), tail.is_empty()) {
        (_, true) => rest,
        (true, false) => tail.replace('_', ","),
        (false, false) => format!("{rest},{}", tail.replace('_', ",")),
    };
    Symbol {
        base,
        primes,
        sub: greek_sub(&sub),
    }
}

/// A subscript that is itself a Greek name is written as the letter.
fn greek_sub(sub: &str) -> String {
    GREEK
        .iter()
        .find(|(name, _)| *name == sub)
        .map_or_else(|| sub.to_owned(), |(_, letter)| (*letter).to_owned())
}

/// The letter a name starts with, and what is left for its subscript.
fn letter(head: &str) -> (String, String) {
    if let Some((name, greek)) = GREEK
        .iter()
        .filter(|(name, _)| head.starts_with(name))
        .max_by_key(|(name, _)| name.len())
    {
        let rest = &head[name.len()..];
        if rest.len() <= 3 || !rest.starts_with(char::is_alphabetic) {
            return ((*greek).to_owned(), rest.to_owned());
        }
    }
    let mut chars = head.chars();
    let Some(first) = chars.next() else {
        return (String::new(), String::new());
    };
    let rest: String = chars.collect();
    if rest.is_empty() || stays_whole(first, &rest) {
        (head.to_owned(), String::new())
    } else {
        (first.to_string(), rest)
    }
}

fn stays_whole(first: char, rest: &str) -> bool {
    let capitals = first.is_uppercase() && rest.chars().all(char::is_uppercase);
    let vowel = rest.contains(['a', 'e', 'i', 'o', 'u', 'y']);
    let word = vowel && rest.chars().all(char::is_lowercase) && rest.chars().count() >= 3;
    let short = first.is_lowercase()
        && matches!(
            rest,
            "ew" | "il" | "ir" | "ld" | "he" | "ll" | "er" | "ot" | "ny" | "ax" | "in"
        );
    let unit = matches!(
        (first, rest),
        ('m', "m" | "m2" | "in") | ('k', "g" | "W" | "N") | ('P', "a") | ('G' | 'M', "Pa")
    );
    capitals || word || short || unit
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn names_of_the_trade() {
        for (name, base, sub) in [
            ("nu40", "ν", "40"),
            ("nu1", "ν", "1"),
            ("nu_ref", "ν", "ref"),
            ("h_min", "h", "min"),
            ("Dpw", "D", "pw"),
            ("e_C", "e", "C"),
            ("aISO", "a", "ISO"),
            ("r1x", "r", "1x"),
            ("Rq1", "R", "q1"),
            ("eta0", "η", "0"),
            ("beta", "β", ""),
            ("theta", "θ", ""),
            ("kappa", "κ", ""),
            ("VI", "VI", ""),
            ("ratio", "ratio", ""),
            ("piston", "piston", ""),
            ("x", "x", ""),
            ("T", "T", ""),
            ("c_lambda", "c", "λ"),
        ] {
            let symbol = take_apart(name);
            assert_eq!(
                (symbol.base.as_str(), symbol.sub.as_str()),
                (base, sub),
                "{name}"
            );
        }
        assert_eq!(take_apart("E'").primes, "′");
    }
}
