//! Base stocks and what they get on with.

use crate::input::rules::fields::Fields;
use crate::model::facts::{Elastomer, Mark, Paint, SightGlass};
use crate::model::rulebook::{
    BaseStockRule, LifeFigure, LifeRule, MixRule, PaintRule, ResidualRule, SealRule,
};
use crate::quantity::{Kind, Measure, Ratio};
use crate::relation::oil::base_stock::BaseStock;

pub(super) fn base_stock(f: &Fields<'_>) -> BaseStockRule {
    BaseStockRule {
        id: f.text("id"),
        name: f.text("name"),
        base: f.word::<BaseStock>("base"),
        vi: if let Some((Some(low), high)) = f.open::<Ratio>("VI") {
            (low, high)
        } else {
            f.fault("no VI with a lower end", "VI: 90 .. 105, or 120 ..");
            (Ratio::from_base(0.0), None)
        },
        pour: f.between("pour point"),
        alpha: f.between("alpha at 40 degC"),
        density15: f.between("density at 15 degC"),
        expansion: f.between("expansion in 1e-4 a kelvin"),
        density_slope: f.opt("density loss in kg/m3 a kelvin"),
        continuous: f.quantity("continuous"),
        peak: f.quantity("peak"),
        flash: f.opt_between("flash point"),
        wax_bearing: f.flag("wax-bearing"),
        biodegradation: f.between("biodegradation in 28 days"),
        relative_cost: f.quantity("cost against Group I"),
        water: f.text("water"),
        solvency: f.text("solvency"),
        seal_column: f.opt_text("seal column"),
        paint_row: f.opt_text("paint row"),
        mixing_row: f.text("mixing row"),
        provenance: f.provenance(),
    }
}

pub(super) fn seal(f: &Fields<'_>) -> SealRule {
    SealRule {
        id: f.text("id"),
        material: f.word::<Elastomer>("material"),
        marks: f.word_pairs::<Mark>("in"),
        limit: f.opt("highest temperature"),
        provenance: f.provenance(),
    }
}

pub(super) fn paint(f: &Fields<'_>) -> PaintRule {
    PaintRule {
        id: f.text("id"),
        attacks_paint: f.words::<Paint>("attacks paint"),
        attacks_glass: f.words::<SightGlass>("attacks sight glass"),
        attacks_plastic: f.texts("attacks plastic"),
        attacks_metal: f.texts("attacks metal"),
        safe: f.text("safe"),
        provenance: f.provenance(),
    }
}

pub(super) fn mixing(f: &Fields<'_>) -> MixRule {
    MixRule {
        id: f.text("id"),
        marks: f.word_pairs::<Mark>("with"),
        provenance: f.provenance(),
    }
}

pub(super) fn residual(f: &Fields<'_>) -> ResidualRule {
    ResidualRule {
        id: f.text("id"),
        change: f.text("change"),
        at_most: f.quantity("at most"),
        provenance: f.provenance(),
    }
}

pub(super) fn life(f: &Fields<'_>) -> LifeRule {
    LifeRule {
        id: f.text("id"),
        says: f.text("says"),
        figure: figure(f),
        provenance: f.provenance(),
    }
}

fn figure(f: &Fields<'_>) -> LifeFigure {
    let number = |key: &'static str| {
        f.opt_amount(key, Kind::Ratio)
            .unwrap_or_else(|| f.quantity::<Ratio>(key).amount())
    };
    match f.text("form").as_str() {
        "halving" => LifeFigure::Halving {
            above: f.quantity("above"),
            factor: number("factor"),
            step: f
                .quantity::<crate::quantity::TemperatureInterval>("step")
                .amount(),
        },
        "arrhenius" => LifeFigure::Arrhenius {
            oil: f.text("oil"),
            k1: number("k1"),
        },
        "multiplier" => LifeFigure::Multiplier {
            bases: f.words::<BaseStock>("bases"),
            factor: number("factor"),
        },
        "gear drain" => LifeFigure::GearDrain {
            sump: f.quantity("sump"),
            mineral: f.quantity("mineral"),
            pao: f.quantity("PAO"),
            pag: f.quantity("PAG"),
        },
        form => {
            if form != "calendar" {
                f.fault(
                    format!("form: `{form}` is not a form of a life rule"),
                    "halving, arrhenius, multiplier, gear drain or calendar",
                );
            }
            LifeFigure::Calendar {
                bases: f.words::<BaseStock>("bases"),
                at_most: f.quantity("at most"),
            }
        }
    }
}
