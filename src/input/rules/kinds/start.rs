//! Start limits, pour margins, heaters, air release.

use crate::input::rules::fields::Fields;
use crate::model::rulebook::start::Role;
use crate::model::rulebook::{AirReleaseLimit, HeaterDensity, PourMargin, StartLimit};
use crate::model::stated::ViscosityLimit;
use crate::quantity::{DynamicViscosity, KinematicViscosity};

pub(super) fn limit(f: &Fields<'_>) -> StartLimit {
    let kinematic = f.opt::<KinematicViscosity>("limit");
    let dynamic = f.opt::<DynamicViscosity>("limit dynamic");
    StartLimit {
        id: f.text("id"),
        part: f.text("part"),
        limit: kinematic
            .map(ViscosityLimit::Kinematic)
            .or(dynamic.map(ViscosityLimit::Dynamic)),
        implied_by: f.words("implied by"),
        stated_by: f.opt_word("stated by"),
        role: f.word::<Role>("role"),
        provenance: f.provenance(),
    }
}

pub(super) fn pour_margin(f: &Fields<'_>) -> PourMargin {
    PourMargin {
        id: f.text("id"),
        system: f.text("system"),
        lubrication: f.words("lubrication"),
        when: f.clauses("when"),
        least: f.opt("least"),
        preferred: f.opt("preferred"),
        instead: f.opt_text("instead"),
        provenance: f.provenance(),
    }
}

pub(super) fn heater(f: &Fields<'_>) -> HeaterDensity {
    HeaterDensity {
        id: f.text("id"),
        oil: f.text("oil"),
        up_to_vg: f.opt_count("up to VG"),
        circulating: f.flag("circulating"),
        when: f.clauses("when"),
        limit: f.quantity("limit"),
        provenance: f.provenance(),
    }
}

pub(super) fn air_release(f: &Fields<'_>) -> AirReleaseLimit {
    AirReleaseLimit {
        id: f.text("id"),
        vg: f.count("VG"),
        at_most: f.quantity("at most"),
        provenance: f.provenance(),
    }
}
