//! How far causes go, and oils that are not on a site.

use super::used_oil::{amount, figure, spread_of};
use crate::input::rules::fields::Fields;
use crate::model::rulebook::cause::{
    Ageing, CauseSize, Diluent, ExpectedWhere, ForeignFigure, ForeignOil, SizedBy, SizedCause,
    Spread,
};
use crate::quantity::Measure;
use crate::relation::oil::base_stock::BaseStock;

/// A list that says something of each size must be as long as that of the sizes.
fn as_long<Q: Measure>(f: &Fields<'_>, key: &str, list: &[Q], sizes: usize, one: bool) {
    let fits = list.is_empty() || list.len() == sizes || (one && list.len() == 1);
    if !fits {
        f.fault(
            format!("{key}: {} values for {sizes} sizes", list.len()),
            format!("{key}: one value a size"),
        );
    }
}

pub(super) fn size(f: &Fields<'_>) -> CauseSize {
    let size = CauseSize {
        id: f.text("id"),
        cause: f.word::<SizedCause>("cause"),
        by: f.word::<SizedBy>("size is"),
        sizes: f.quantities("sizes"),
        common: f.quantities("how common"),
        ratios: f.quantities("other temperature moves"),
        flash: f.quantities("flash moves"),
        flash_spread: f.opt("flash spread"),
        ageing: f.children("ageing at 10 %").iter().map(ageing).collect(),
        diluents: f.children("diluents").iter().map(diluent).collect(),
        odds: f.opt("odds"),
        odds_expected: f.opt("odds where expected"),
        expected: f.opt_word::<ExpectedWhere>("expected in"),
        provenance: f.provenance(),
    };
    let n = size.sizes.len();
    as_long(f, "how common", &size.common, n, false);
    as_long(f, "flash moves", &size.flash, n, true);
    if n == 0 || size.sizes.iter().any(|s| s.base() <= 0.0 || s.base() > 1.0) {
        f.fault("sizes: not above 0 and up to 100 %", "sizes: [5 %, 10 %]");
    }
    if size.odds.is_none() && (size.odds_expected.is_none() || size.expected.is_none()) {
        f.fault(
            "no odds",
            "odds: \"0.1\", or odds where expected: and expected in:",
        );
    }
    size
}

fn ageing(f: &Fields<'_>) -> Ageing {
    let ageing = Ageing {
        acid: f.quantity("acid number"),
        oxidation: f.quantity("oxidation"),
    };
    f.finish();
    ageing
}

fn diluent(f: &Fields<'_>) -> Diluent {
    let diluent = Diluent {
        name: f.text("name"),
        at_40: f.quantity("at 40 degC"),
        at_100: f.quantity("at 100 degC"),
    };
    f.finish();
    diluent
}

pub(super) fn foreign(f: &Fields<'_>) -> ForeignOil {
    let oil = ForeignOil {
        id: f.text("id"),
        name: f.text("name"),
        base: f.word::<BaseStock>("base"),
        thickened: f.flag("polymer-thickened"),
        index: f.quantity("viscosity index"),
        grades: f.counts("grades"),
        figures: f.children("figures").iter().map(figure_by_grade).collect(),
        provenance: f.provenance(),
    };
    if oil.grades.is_empty() || oil.grades.contains(&0) {
        f.fault("grades: none, or a grade of 0", "grades: [32, 46, 68]");
    }
    oil
}

fn figure_by_grade(f: &Fields<'_>) -> ForeignFigure {
    let reading = figure(f, "reading", &f.text("reading"));
    let one = ForeignFigure {
        reading,
        value: amount(f, "value", reading.kind()),
        at_460: f.opt_amount("value at VG 460", reading.kind()),
        spread: match f.opt("spread share") {
            Some(share) => Spread::Share(share),
            None => Spread::By(amount(f, "spread", spread_of(reading))),
        },
    };
    f.finish();
    one
}
