//! The frame round every sheet: whose it is, which document, which sheet of how many.

use super::{
    AreaSheet, AuditSheet, Glossary, MachineSheet, MethodAppendix, OilSheet, Overview, Phrase,
    RevisionPage, RulesPage,
};
use crate::report::escape::base64;
use crate::report::names::{Href, Place};
use serde::{Deserialize, Serialize};

/// Paper the pages are printed on.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
#[serde(rename_all = "lowercase")]
pub enum Paper {
    /// 210 mm by 297 mm.
    #[default]
    A4,
    /// 8.5 in by 11 in.
    Letter,
}

impl Paper {
    /// The word of CSS.
    pub fn css(self) -> &'static str {
        match self {
            Paper::A4 => "A4",
            Paper::Letter => "letter",
        }
    }
}

/// A picture carried inside the page.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
pub struct Image {
    /// Its `data:` address.
    src: String,
    /// What it shows, for those who cannot see it.
    pub alt: String,
}

/// The largest logo carried, bytes: with its coding a third more on every sheet.
pub const LOGO_LIMIT: usize = 48 * 1024;

/// Why a logo is not carried.
#[derive(Clone, Copy, Debug, PartialEq, Eq, thiserror::Error)]
pub enum ImageProblem {
    /// It is larger than the limit.
    #[error("the picture has {0} bytes; {LOGO_LIMIT} at most are carried on every sheet")]
    TooLarge(usize),
    /// It is neither PNG nor SVG.
    #[error("the picture is neither a PNG nor an SVG")]
    Kind,
}

impl Image {
    /// A PNG or SVG file, told by its first bytes. It is shown as a picture, so nothing inside an
    /// SVG can run or load.
    ///
    /// # Errors
    /// If it is of another kind or larger than [`LOGO_LIMIT`].
    pub fn embed(bytes: &[u8], alt: impl Into<String>) -> Result<Self, ImageProblem> {
        if bytes.len() > LOGO_LIMIT {
            return Err(ImageProblem::TooLarge(bytes.len()));
        }
        let start = String::from_utf8_lossy(&bytes[..bytes.len().min(1024)]).to_ascii_lowercase();
        let kind = if bytes.starts_with(b"\x89PNG\r\n\x1a\n") {
            "image/png"
        } else if start.contains("<svg")
            && start
                .trim_start_matches('\u{feff}')
                .trim_start()
                .starts_with('<')
        {
            "image/svg+xml"
        } else {
            return Err(ImageProblem::Kind);
        };
        Ok(Self {
            src: format!("data:{kind};base64,{}", base64(bytes)),
            alt: alt.into(),
        })
    }
}

/// What all sheets of a document share.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct Frame {
    /// The site.
    pub site: String,
    /// Who it is for.
    pub client: Option<String>,
    /// Document number.
    pub document: Option<String>,
    /// Revision.
    pub revision: Option<String>,
    /// Date of judgement, ISO 8601.
    pub date: String,
    /// Who prepared it.
    pub author: Option<String>,
    /// `for review, not signed`.
    pub status: Option<String>,
    /// The client's logo.
    pub logo: Option<Image>,
    /// Fingerprint of all inputs and rules.
    pub fingerprint: String,
    /// Program and rules with their versions.
    pub program: String,
    /// Units in words: `SI`.
    pub units: String,
    /// Paper.
    pub paper: Paper,
    /// A warning on every sheet: invented data of the demonstration.
    pub warning: Option<String>,
}

/// A link in the bar at the top.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct NavLink {
    /// Its words.
    pub text: String,
    /// Where it leads.
    pub href: Href,
    /// Whether it is this sheet.
    pub current: bool,
}

/// One sheet.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
pub struct Sheet {
    /// Where it stands.
    #[serde(skip)]
    pub place: Place,
    /// Its number, from 1.
    pub number: u32,
    /// How many there are.
    pub of: u32,
    /// What it is called: the tag, the site's name.
    pub name: String,
    /// The line beside the name.
    pub subtitle: String,
    /// A line on what it is about.
    pub about: Phrase,
    /// Title in the title block.
    pub title: String,
    /// Links to the other sheets.
    pub nav: Vec<NavLink>,
    /// What it holds.
    pub body: Body,
}

/// The kinds of sheet.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(tag = "kind", content = "holds", rename_all = "kebab-case")]
pub enum Body {
    /// The site.
    Overview(Box<Overview>),
    /// The machines of one area, on large sites.
    Area(Box<AreaSheet>),
    /// One machine.
    Machine(Box<MachineSheet>),
    /// One oil.
    Oil(Box<OilSheet>),
    /// Samples in use.
    Audit(Box<AuditSheet>),
    /// What moved since the last revision.
    Revision(Box<RevisionPage>),
    /// The relations used.
    Methods(Box<MethodAppendix>),
    /// The rules used.
    Rules(Box<RulesPage>),
    /// The words used.
    Glossary(Box<Glossary>),
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn logos_are_checked() {
        assert!(Image::embed(b"<?xml version='1.0'?><svg xmlns='x'/>", "logo").is_ok());
        assert!(Image::embed(b"\x89PNG\r\n\x1a\n....", "logo").is_ok());
        assert_eq!(Image::embed(b"GIF89a", "logo"), Err(ImageProblem::Kind));
        assert_eq!(
            Image::embed(&vec![b'<'; LOGO_LIMIT + 1], "logo"),
            Err(ImageProblem::TooLarge(LOGO_LIMIT + 1))
        );
    }
}
