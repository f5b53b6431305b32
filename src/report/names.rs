//! Names of files and ids of elements, made from tags and titles that may hold anything.

use serde::{Deserialize, Serialize};
use std::collections::BTreeSet;

/// Gives every name out once; a second `CV/104` beside `CV-104` becomes `CV-104-2`.
#[derive(Clone, Debug, Default)]
pub struct Names {
    taken: BTreeSet<String>,
}

impl Names {
    /// No name is taken yet.
    pub fn new() -> Self {
        Self::default()
    }

    /// A name of ASCII letters, digits, `-` and `_` that no earlier one equals, capitals apart: some
    /// file systems do not tell `a.html` from `A.html`.
    pub fn give(&mut self, wanted: &str) -> String {
        let base = plain(wanted);
        let mut name = base.clone();
        let mut count = 1_u32;
        while !self.taken.insert(name.to_ascii_lowercase()) {
            count += 1;
            name = format!("{base}-{count}");
        }
        name
    }
}

/// The text with everything but ASCII letters, digits and `_` turned into single dashes, at most
/// 60 characters long; `x` if nothing is left.
pub fn plain(raw: &str) -> String {
    let mut out = String::new();
    for c in raw.chars() {
        if c.is_ascii_alphanumeric() || c == '_' {
            out.push(c);
        } else if !out.ends_with('-') && !out.is_empty() {
            out.push('-');
        }
        if out.len() == 60 {
            break;
        }
    }
    let trimmed = out.trim_end_matches('-');
    if trimmed.is_empty() {
        "x".into()
    } else {
        trimmed.to_owned()
    }
}

/// Whether a folder of pages is written, or all of them into one.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Bundle {
    /// A file a sheet.
    #[default]
    Folder,
    /// All sheets in one file.
    OneFile,
}

/// Where a link leads. Made only from file names and ids of this module's form, so that no text of
/// the user's ever becomes an address.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
#[serde(try_from = "String", into = "String")]
pub struct Href(String);

impl From<Href> for String {
    fn from(href: Href) -> Self {
        href.0
    }
}

impl TryFrom<String> for Href {
    type Error = &'static str;

    fn try_from(text: String) -> Result<Self, Self::Error> {
        let (file, id) = text.split_once('#').unwrap_or((&text, ""));
        let stem = file.strip_suffix(".html").unwrap_or(file);
        let named = |part: &str| part.is_empty() || plain(part) == part;
        let known = named(stem) && named(id) && (file.is_empty() || file.len() > stem.len());
        if known {
            Ok(Self(text))
        } else {
            Err("an address of the report's own form is wanted")
        }
    }
}

impl Href {
    /// A place on the same page, by its full id.
    pub fn here(id: &str) -> Self {
        Self(format!("#{}", plain(id)))
    }

    /// The address as text.
    pub fn as_str(&self) -> &str {
        &self.0
    }
}

/// The place of one sheet: its file, and the prefix of all ids on it.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Place {
    /// File name without ending: `machine-CV-104`.
    pub stem: String,
    /// Prefix of its ids: `m-cv-104`.
    pub prefix: String,
}

impl Place {
    /// A sheet of that kind for that tag; `names` keeps them apart.
    pub fn new(names: &mut Names, kind: &str, tag: &str) -> Self {
        let wanted = if tag.is_empty() {
            kind.to_owned()
        } else {
            format!("{kind}-{tag}")
        };
        let stem = names.give(&wanted);
        let prefix = stem.to_ascii_lowercase();
        Self { stem, prefix }
    }

    /// The file name.
    pub fn file(&self) -> String {
        format!("{}.html", self.stem)
    }

    /// The full id of a part of this sheet.
    pub fn id(&self, local: &str) -> String {
        format!("{}-{}", self.prefix, plain(local))
    }

    /// A link to this sheet, or to a part of it.
    pub fn href(&self, bundle: Bundle, local: Option<&str>) -> Href {
        let id = local.map(|local| self.id(local));
        Href(match (bundle, id) {
            (Bundle::Folder, None) => self.file(),
            (Bundle::Folder, Some(id)) => format!("{}#{id}", self.file()),
            (Bundle::OneFile, None) => format!("#{}", self.id("sheet")),
            (Bundle::OneFile, Some(id)) => format!("#{id}"),
        })
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn names_are_plain_and_single() {
        let mut names = Names::new();
        let first = Place::new(&mut names, "machine", "CV-104");
        let second = Place::new(&mut names, "machine", "cv/104");
        assert_eq!(first.file(), "machine-CV-104.html");
        assert_eq!(second.file(), "machine-cv-104-2.html");
        assert_ne!(first.prefix, second.prefix);
        assert_eq!(plain("../../etc/passwd\"><x>"), "etc-passwd-x");
        assert_eq!(plain("\u{202e}:"), "x");
        assert_eq!(
            first.href(Bundle::Folder, Some("s 3")).as_str(),
            "machine-CV-104.html#machine-cv-104-s-3"
        );
        assert!(Href::try_from("javascript:x".to_owned()).is_err());
        assert!(Href::try_from("a.html#b c".to_owned()).is_err());
        assert!(Href::try_from("machine-CV-104.html#machine-cv-104-s3".to_owned()).is_ok());
        assert_eq!(
            first.href(Bundle::OneFile, None).as_str(),
            "#machine-cv-104-sheet"
        );
    }
}
