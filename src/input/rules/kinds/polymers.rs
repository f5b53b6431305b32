//! Viscosity modifiers and shear tests.

use crate::input::rules::fields::Fields;
use crate::model::rulebook::{PolymerKind, ShearTest, ShearsLike};

pub(super) fn polymer(f: &Fields<'_>) -> PolymerKind {
    PolymerKind {
        id: f.text("id"),
        name: f.text("name"),
        also: f.texts("also"),
        share_ratio: f.between("share ratio"),
        index_mild: f.between("index after 30 injector cycles"),
        index_severe: f.between("index after 20 h roller bearing"),
        provenance: f.provenance(),
    }
}

pub(super) fn shear_test(f: &Fields<'_>) -> ShearTest {
    ShearTest {
        id: f.text("id"),
        name: f.text("name"),
        known_by: f.texts("known by"),
        severity: f.quantity("severity"),
        like: f.word::<ShearsLike>("like"),
        standard: f.text("standard"),
        provenance: f.provenance(),
    }
}
