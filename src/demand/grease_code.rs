//! The grease code of DIN 51502 that a point asks for.

use super::context::Context;
use crate::model::facts::WaterEntry;
use crate::model::part::Part;
use crate::oil::grease_code::{GreaseCode, tens_below, upper_letter};
use crate::trace::Recorder;

/// Says the code of a grease that would serve the point, by its temperatures; EP only where the
/// duty asks for it.
pub(super) fn wanted<R: Recorder>(cx: &mut Context<'_, '_, R>, part: &Part) {
    let (Some(hot), Some(cold)) = (cx.hot_at(part).hottest, cx.thermal.start_coldest) else {
        return;
    };
    let wet = matches!(
        cx.point.facts.water_entry,
        Some(WaterEntry::Yes | WaterEntry::Seldom | WaterEntry::Steady)
    ) || cx.point.facts.wet == Some(true);
    let asks = |word: &str| {
        cx.point
            .asks_for
            .iter()
            .any(|a| a.value.eq_ignore_ascii_case(word))
    };
    let additives = if asks("EP") || asks("AW") {
        vec!["P".to_owned()]
    } else {
        Vec::new()
    };
    let code = GreaseCode {
        usage: "K".to_owned(),
        additives,
        base: String::new(),
        nlgi: "2".to_owned(),
        upper: upper_letter(cx.rules, hot.value, false, true),
        lowest_c: Some(tens_below(cold.value)),
    };
    let water = if wet { ", water mark 0 or 1" } else { "" };
    let says = format!(
        "grease code that covers the temperatures here: {} or better (DIN 51502{water})",
        code.written()
    );
    cx.inform(part, says, None);
}
