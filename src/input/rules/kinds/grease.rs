//! Greases.

use crate::input::rules::fields::Fields;
use crate::model::rulebook::grease::{
    Agreement, CodeLetter, CodePlace, FactorKind, FirstFill, GreaseMix, IntervalFactor, Nlgi,
    SpeedBand, SpeedLimit, Thickener,
};

pub(super) fn thickener(f: &Fields<'_>) -> Thickener {
    Thickener {
        id: f.text("id"),
        name: f.text("name"),
        also: f.texts("also"),
        range: f.between("use"),
        dropping: f.opt("dropping point"),
        water: f.text("water"),
        pumping: f.text("pumping"),
        provenance: f.provenance(),
    }
}

pub(super) fn mixing(f: &Fields<'_>) -> GreaseMix {
    GreaseMix {
        id: f.text("id"),
        thickener: f.text("thickener"),
        with: f.word_pairs::<Agreement>("with"),
        provenance: f.provenance(),
    }
}

pub(super) fn nlgi(f: &Fields<'_>) -> Nlgi {
    Nlgi {
        id: f.text("id"),
        penetration: f.between("penetration"),
        feel: f.text("feel"),
        usage: f.opt_text("use"),
        provenance: f.provenance(),
    }
}

pub(super) fn code(f: &Fields<'_>) -> CodeLetter {
    CodeLetter {
        id: f.text("id"),
        place: f.word::<CodePlace>("place"),
        letter: f.opt_text("letter").unwrap_or_default(),
        meaning: f.text("meaning"),
        upper: f.opt("upper"),
        water: f.opt_text("water"),
        provenance: f.provenance(),
    }
}

pub(super) fn speed(f: &Fields<'_>) -> SpeedBand {
    SpeedBand {
        id: f.text("id"),
        from: f.opt("from"),
        to: f.opt("to"),
        nu40: f.between("base oil at 40 degC"),
        nlgi: f.texts("NLGI"),
        provenance: f.provenance(),
    }
}

pub(super) fn speed_limit(f: &Fields<'_>) -> SpeedLimit {
    SpeedLimit {
        id: f.text("id"),
        what: f.text("what"),
        at_most: f.quantity("at most"),
        provenance: f.provenance(),
    }
}

pub(super) fn factor(f: &Fields<'_>) -> IntervalFactor {
    IntervalFactor {
        id: f.text("id"),
        kind: f.word::<FactorKind>("kind"),
        case: f.text("case"),
        up_to: f.opt("up to"),
        factor: f.quantity("factor"),
        provenance: f.provenance(),
    }
}

pub(super) fn first_fill(f: &Fields<'_>) -> FirstFill {
    FirstFill {
        id: f.text("id"),
        case: f.text("case"),
        share: f.between("share"),
        provenance: f.provenance(),
    }
}
