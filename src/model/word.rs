//! Closed vocabularies: an enum whose variants are the words users and rules write.

/// A word out of a closed list.
pub trait Word: Copy + Eq + Ord + 'static {
    /// What the list is of, with its article: "a seal material".
    const NOUN: &'static str;
    /// Every word, in the order of the list.
    const ALL: &'static [Self];

    /// The word as the program writes it.
    fn word(self) -> &'static str;

    /// Every spelling read as this word, the written one first.
    fn spellings(self) -> &'static [&'static str];

    /// The word with that spelling; letter case does not count.
    fn from_word(text: &str) -> Option<Self> {
        let text = text.trim();
        Self::ALL
            .iter()
            .copied()
            .find(|w| w.spellings().iter().any(|s| s.eq_ignore_ascii_case(text)))
    }

    /// Its place in the list.
    fn place(self) -> usize;

    /// Its place in the list as one bit of a set; lists hold at most 64 words.
    fn bit(self) -> u64 {
        1 << self.place()
    }
}

/// The words of a list that are in a set of bits, joined for print.
pub fn spell<W: Word>(bits: u64) -> String {
    let words: Vec<&str> = W::ALL
        .iter()
        .filter(|w| w.bit() & bits != 0)
        .map(|w| w.word())
        .collect();
    words.join(", ")
}

/// All words of a list, for messages.
pub fn known<W: Word>() -> Vec<&'static str> {
    W::ALL.iter().map(|w| w.word()).collect()
}

/// Declares an enum together with the words it is written by.
macro_rules! words {
    ($(#[$meta:meta])* $name:ident, $noun:literal {
        $($variant:ident = $word:literal $(| $also:literal)*),+ $(,)?
    }) => {
        $(#[$meta])*
        #[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
        pub enum $name {
            $(#[doc = concat!("`", $word, "`")] $variant),+
        }

        impl $crate::model::word::Word for $name {
            const NOUN: &'static str = $noun;
            const ALL: &'static [Self] = &[$(Self::$variant),+];

            fn word(self) -> &'static str {
                match self { $(Self::$variant => $word),+ }
            }

            fn spellings(self) -> &'static [&'static str] {
                match self { $(Self::$variant => &[$word $(, $also)*]),+ }
            }

            fn place(self) -> usize {
                self as usize
            }
        }

        impl std::fmt::Display for $name {
            fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
                f.write_str($crate::model::word::Word::word(*self))
            }
        }
    };
}
pub(crate) use words;

#[cfg(test)]
mod tests {
    use super::*;

    words! {
        /// Three words.
        #[expect(unreachable_pub, reason = "the macro makes public lists")]
        Number, "a number word" { One = "one" | "1", Two = "two", Three = "three" }
    }

    #[test]
    fn reads_every_spelling_and_writes_one() {
        assert_eq!(Number::from_word(" ONE "), Some(Number::One));
        assert_eq!(Number::from_word("1"), Some(Number::One));
        assert_eq!(Number::from_word("four"), None);
        assert_eq!(Number::Three.bit(), 4);
        assert_eq!(spell::<Number>(5), "one, three");
        assert_eq!(known::<Number>().len(), 3);
    }
}
