//! The four verdict marks: a bar against its limit line, and the hatches all figures share.
//!
//! holds: the bar runs past the line; tight: it ends on the line; fails: it stops short, a dotted
//! gap left; open: a dashed outline lies across the line. The mark is a picture of what the word
//! means; the word always stands with it.

use crate::report::escape::Markup;

/// The symbols and hatches, once a page, in an SVG of no size (hidden ones draw no patterns).
pub fn shared() -> Markup {
    Markup::trusted(
        concat!(
            r#"<svg class="defs" width="0" height="0" aria-hidden="true" focusable="false"><defs>"#,
            // the drafting hatch at 45 degrees: forbidden side of a limit
            r#"<pattern id="fw-hatch" width="5" height="5" patternUnits="userSpaceOnUse" patternTransform="rotate(45)"><line x1="0" y1="0" x2="0" y2="5" class="h-limit"/></pattern>"#,
            // finer: the reserve, not forbidden
            r#"<pattern id="fw-hatch-reserve" width="4.5" height="4.5" patternUnits="userSpaceOnUse" patternTransform="rotate(45)"><line x1="0" y1="0" x2="0" y2="4.5" class="h-reserve"/></pattern>"#,
            // steeper, heavier and the other way: a part left uncovered
            r#"<pattern id="fw-hatch-bare" width="5" height="5" patternUnits="userSpaceOnUse" patternTransform="rotate(-30)"><line x1="0" y1="0" x2="0" y2="5" class="h-bare"/></pattern>"#,
            r#"<symbol id="fw-mk-holds" viewBox="0 0 26 14"><rect x="1" y="4" width="24" height="6" class="mk-bar"/><line x1="15" y1="0" x2="15" y2="14" class="mk-line"/></symbol>"#,
            r#"<symbol id="fw-mk-tight" viewBox="0 0 26 14"><rect x="1" y="4" width="14" height="6" class="mk-bar"/><line x1="15" y1="0" x2="15" y2="14" class="mk-line"/></symbol>"#,
            r#"<symbol id="fw-mk-fails" viewBox="0 0 26 14"><rect x="1" y="4" width="6" height="6" class="mk-bar"/><line x1="8" y1="7" x2="14" y2="7" class="mk-gap"/><line x1="15" y1="0" x2="15" y2="14" class="mk-line"/></symbol>"#,
            r#"<symbol id="fw-mk-open" viewBox="0 0 26 14"><rect x="2" y="4" width="22" height="6" class="mk-dash"/><line x1="15" y1="0" x2="15" y2="14" class="mk-line"/></symbol>"#,
            "</defs></svg>"
        )
        .to_owned(),
    )
}
