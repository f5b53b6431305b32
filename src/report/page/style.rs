//! The style of a page and the policy that lets it, and nothing else, in.

use crate::report::escape::{base64, css_string};
use crate::report::model::{Frame, Sheet};
use sha2::{Digest, Sha256};

/// The style sheet without indentation, empty lines, comments on lines of their own, and the
/// spaces that only people need.
pub(super) fn close_set(css: &str) -> String {
    let mut out = String::with_capacity(css.len());
    for line in css.lines().map(str::trim) {
        let comment = line.starts_with("/*") && line.ends_with("*/");
        if line.is_empty() || comment {
            continue;
        }
        let mut close = line.to_owned();
        for (wide, narrow) in [
            (" {", "{"),
            ("{ ", "{"),
            (" }", "}"),
            ("; ", ";"),
            (": ", ":"),
            (", ", ","),
            (";}", "}"),
        ] {
            close = close.replace(wide, narrow);
        }
        out.push_str(&close);
        if !close.ends_with([';', '{', '}', ',']) {
            out.push('\n');
        }
    }
    out
}

/// Paper size and the foot of every printed page.
pub(super) fn paper(frame: &Frame, only: Option<&Sheet>) -> String {
    let sheet = only.map(|sheet| format!("sheet {} of {}", sheet.number, sheet.of));
    let document = frame.document.clone().unwrap_or_else(|| frame.site.clone());
    let revision = frame
        .revision
        .as_ref()
        .map(|revision| format!("rev {revision}"));
    let parts = [
        Some(document),
        revision,
        sheet,
        Some(frame.date.clone()),
        frame.status.clone(),
    ];
    let words: Vec<String> = parts
        .into_iter()
        .flatten()
        .filter(|part| !part.is_empty())
        .collect();
    let foot: String = words.join(" · ").chars().take(150).collect();
    format!(
        "@media print{{@page{{size:{} portrait;margin:12mm 11mm 16mm;@bottom-left{{content:{};font:8pt Arial,sans-serif;color:#333}}@bottom-right{{content:\"page \" counter(page) \" of \" counter(pages);font:8pt Arial,sans-serif;color:#333}}}}}}\n",
        frame.paper.css(),
        css_string(&foot)
    )
}

/// The content policy of the page: this very style, pictures carried inside, nothing else.
pub(super) fn policy(style: &str) -> String {
    let hash = base64(Sha256::digest(style.as_bytes()).as_slice());
    format!(
        "default-src 'none'; style-src 'sha256-{hash}'; img-src data:; base-uri 'none'; form-action 'none'"
    )
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::report::model::Paper;

    #[test]
    fn the_foot_names_paper_and_document() {
        let frame = Frame {
            document: Some("A-1".into()),
            revision: Some("</style>".into()),
            paper: Paper::Letter,
            ..Frame::default()
        };
        let style = paper(&frame, None);
        assert!(style.contains("size:letter portrait"));
        assert!(style.contains("A\\2d 1") && !style.contains("</style"));
    }

    #[test]
    fn the_policy_lets_in_this_style_only() {
        // SHA-256 of the empty text: FIPS 180-4 test value
        let empty = "sha256-47DEQpj8HBSa+/TImW+5JCeuQeRkm5NMpJWZG3hSuFU=";
        assert!(policy("").contains(empty));
        assert!(!policy("p{}").contains(empty));
    }

    #[test]
    fn comments_and_indentation_go() {
        assert_eq!(close_set("/* a */\n\n  p {\n  x: y;\n}\n"), "p{x:y;}");
    }
}
