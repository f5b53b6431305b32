//! Users' prose, from Markdown to HTML that can do nothing.
//!
//! Raw HTML becomes text; links keep their target only with the schemes of the allow-list; pictures
//! give way to their description. Every byte that remains was written by the renderer's own
//! escaper.

use crate::report::escape::Markup;
use pulldown_cmark::{CowStr, Event, HeadingLevel, LinkType, Options, Parser, Tag, TagEnd, html};

/// Markdown as safe HTML; its headings start below `under`, the level of the heading they follow.
pub fn to_html(text: &str, under: u8) -> Markup {
    let cleaned: String = text
        .chars()
        .map(|c| if stray(c) { '\u{fffd}' } else { c })
        .collect();
    let options = Options::ENABLE_TABLES | Options::ENABLE_STRIKETHROUGH;
    let mut open_links = Vec::new();
    let mut levels = Levels {
        under: usize::from(under),
        open: Vec::new(),
    };
    let events = Parser::new_ext(&cleaned, options)
        .filter_map(|event| safe(event, &mut levels, &mut open_links));
    let mut out = String::new();
    html::push_html(&mut out, events);
    Markup::trusted(out)
}

/// Marks that turn the direction of the text after them, and controls.
fn stray(c: char) -> bool {
    (c.is_control() && !matches!(c, '\n' | '\t' | '\r'))
        || matches!(c, '\u{202a}'..='\u{202e}' | '\u{2066}'..='\u{2069}' | '\u{200e}' | '\u{200f}')
}

/// Whether a link may keep its target.
pub fn allowed(target: &str) -> bool {
    let target = target.trim();
    if target.contains(|c: char| c.is_control() || c.is_whitespace()) {
        return false;
    }
    let lower = target.to_ascii_lowercase();
    let rest = |scheme| lower.strip_prefix(scheme);
    target.starts_with('#')
        || rest("mailto:").is_some_and(|address| address.contains('@'))
        || rest("https://")
            .or_else(|| rest("http://"))
            .is_some_and(|rest| is_host(rest.split(['/', '?', '#']).next().unwrap_or("")))
}

/// A plain host name, with a port perhaps: letters, digits, points and hyphens.
fn is_host(text: &str) -> bool {
    let (name, port) = text.split_once(':').unwrap_or((text, "0"));
    let plain = |part: &str| {
        !part.is_empty()
            && !part.starts_with('-')
            && !part.ends_with('-')
            && part.chars().all(|c| c.is_ascii_alphanumeric() || c == '-')
    };
    name.split('.').all(plain) && port.parse::<u16>().is_ok()
}

fn safe<'a>(
    event: Event<'a>,
    levels: &mut Levels,
    open_links: &mut Vec<bool>,
) -> Option<Event<'a>> {
    match event {
        Event::Html(raw) | Event::InlineHtml(raw) => Some(Event::Text(raw)),
        Event::Start(Tag::HtmlBlock) => Some(Event::Start(Tag::Paragraph)),
        Event::End(TagEnd::HtmlBlock) => Some(Event::End(TagEnd::Paragraph)),
        Event::Start(Tag::Image { .. }) | Event::End(TagEnd::Image) => None,
        Event::Start(Tag::Link {
            link_type,
            dest_url,
            ..
        }) => {
            let target = if link_type == LinkType::Email {
                CowStr::from(format!("mailto:{dest_url}"))
            } else {
                dest_url
            };
            let keep = allowed(&target);
            open_links.push(keep);
            let tag = Tag::Link {
                link_type: LinkType::Inline,
                dest_url: target,
                title: "".into(),
                id: "".into(),
            };
            keep.then_some(Event::Start(tag))
        }
        Event::End(TagEnd::Link) => open_links
            .pop()
            .unwrap_or(false)
            .then_some(Event::End(TagEnd::Link)),
        Event::Start(Tag::Heading { level, .. }) => {
            let level = levels.lowered(level);
            Some(Event::Start(Tag::Heading {
                level,
                id: None,
                classes: Vec::new(),
                attrs: Vec::new(),
            }))
        }
        Event::End(TagEnd::Heading(_)) => Some(Event::End(TagEnd::Heading(levels.latest()))),
        // aligned columns would need style attributes, which the page's policy does not let in
        Event::Start(Tag::Table(columns)) => Some(Event::Start(Tag::Table(
            vec![pulldown_cmark::Alignment::None; columns.len()],
        ))),
        Event::Start(Tag::CodeBlock(_)) => Some(Event::Start(Tag::CodeBlock(
            pulldown_cmark::CodeBlockKind::Indented,
        ))),
        other => Some(other),
    }
}

/// Headings of users' prose, set below the one it stands under, without a jump downwards.
struct Levels {
    under: usize,
    /// The user's own levels that are open, outermost first.
    open: Vec<usize>,
}

impl Levels {
    fn lowered(&mut self, level: HeadingLevel) -> HeadingLevel {
        let own = level as usize;
        while self.open.last().is_some_and(|outer| *outer >= own) {
            self.open.pop();
        }
        self.open.push(own);
        let wanted = self.under + self.open.len();
        HeadingLevel::try_from(wanted.min(6)).unwrap_or(HeadingLevel::H6)
    }

    /// The level the latest heading was set at.
    fn latest(&self) -> HeadingLevel {
        let level = self.under + self.open.len();
        HeadingLevel::try_from(level.min(6)).unwrap_or(HeadingLevel::H6)
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use proptest::prelude::*;

    fn html(text: &str) -> String {
        to_html(text, 2).as_str().to_owned()
    }

    #[test]
    fn prose_is_set() {
        assert_eq!(
            html("a *b* **c**"),
            "<p>a <em>b</em> <strong>c</strong></p>\n"
        );
        assert_eq!(html("# x"), "<h3>x</h3>\n");
        assert_eq!(
            html("### x\n# y\n### z"),
            "<h3>x</h3>\n<h3>y</h3>\n<h4>z</h4>\n"
        );
        assert_eq!(
            html("[a](https://example.org)"),
            "<p><a href=\"https://example.org\">a</a></p>\n"
        );
    }

    #[test]
    fn nothing_gets_out() {
        assert_eq!(
            html("a <script>x</script>"),
            "<p>a &lt;script&gt;x&lt;/script&gt;</p>\n"
        );
        assert!(!html("<div onclick='x'>\n\nb").contains("<div"));
        assert_eq!(html("[a](javascript:alert(1))"), "<p>a</p>\n");
        assert_eq!(html("[a](data:text/html,x)"), "<p>a</p>\n");
        assert_eq!(html("![pump](https://example.org/p.png)"), "<p>pump</p>\n");
        assert!(!html("[a](JaVaScRiPt:x)").contains("href"));
        assert!(!html("```\"><script>\nx\n```").contains("script"));
    }

    /// The elements and attributes of a cleaned text, in order.
    fn elements(html: &str) -> Vec<String> {
        html.split('<')
            .skip(1)
            .filter_map(|part| {
                part.split_once('>')
                    .map(|(tag, _)| tag.trim_end_matches(['/', ' ']).to_owned())
            })
            .collect()
    }

    fn sanitised(html: &str) -> String {
        let mut builder = ammonia::Builder::default();
        builder.link_rel(None);
        builder.clean(html).to_string()
    }

    proptest! {
        #![proptest_config(ProptestConfig::with_cases(512))]
        #[test]
        fn a_sanitiser_finds_nothing_to_remove(text in "([a-z <>\"'&#*_`~|\\[\\]()!:/\n-]|<script>|javascript:|data:|https://|<img src=x onerror=y>|\\[a\\]\\(javascript:x\\)|<a href=|```){0,40}") {
            let shown = html(&text);
            let strip = |tags: Vec<String>| tags.into_iter().map(|t| t.split_whitespace().map(|w| w.split('=').next().unwrap_or("").to_owned()).collect::<Vec<_>>().join(" ")).collect::<Vec<_>>();
            prop_assert_eq!(strip(elements(&shown)), strip(elements(&sanitised(&shown))), "{}", shown);
        }
    }
}
