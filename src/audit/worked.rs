//! One sample worked through: the steps behind its margins, by the relations the judge used.

use super::judged::Judged;
use super::{Audit, serves};
use crate::judge::explain::{Explanation, explain};
use crate::judge::{PreparedOil, Verdict};
use crate::weighing::{Scales, Weighed};

/// The sample whose calculation is shown: the latest one that misses its machine's limits by most,
/// else the one with the smallest margin.
pub fn example(audit: &Audit) -> Option<&Judged> {
    let judged = audit
        .judged
        .iter()
        .filter(|j| j.latest && j.point.is_some() && !j.too_old && !j.twice);
    let with = judged.filter_map(|j| Some((j, j.serves.as_ref()?)));
    let of_margin = with.filter_map(|(j, s)| Some((j, s, s.margin()?)));
    of_margin
        .min_by(|a, b| {
            let fails = |s: &serves::Serves| s.verdict != Verdict::Fails;
            fails(a.1)
                .cmp(&fails(b.1))
                .then(a.2.total_cmp(&b.2))
                .then(a.0.bottle.cmp(&b.0.bottle))
        })
        .map(|(j, ..)| j)
}

/// The steps behind a sample's margins, and the demands they belong to.
pub fn explanation<'a>(
    scales: &Scales<'a>,
    audit: &Audit,
    j: &Judged,
) -> Option<(Explanation, Weighed<'a>)> {
    let (point, s) = (j.point?, j.serves.as_ref()?);
    let weighed = scales.weigh_where(&scales.site.points[point], |_| false);
    let label = j.label.oil.map(|o| &scales.site.oils[o]);
    let mut oil = serves::as_oil(
        &serves::frame(label),
        s.line,
        &audit.bottles[j.bottle].name(),
    );
    oil.id = audit.bottles[j.bottle].name();
    let prepared = PreparedOil::new(&oil, scales.rules, false).ok()?;
    let told = explain(
        &weighed.demands.trace,
        &weighed.demands.middle.list,
        weighed.ready.settings.first()?,
        (&oil, &prepared),
        prepared.worst(&weighed.ready),
        None,
    );
    Some((told, weighed))
}
