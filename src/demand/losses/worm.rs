//! What a worm mesh loses: input power less what comes out.

use super::source::Form;
use super::{Lack, LossKind, Source, Tally, With};
use crate::demand::context::Context;
use crate::demand::worm;
use crate::model::part::{Part, WormMesh};
use crate::trace::Recorder;

const ALL: &str = "all its losses";
const STIRS: &str = "stirring";

/// Adds what a worm loses. Its friction follows the sliding speed, not the oil; what worm or wheel
/// stir is not held as a formula.
pub(super) fn mesh<R: Recorder>(
    cx: &mut Context<'_, '_, R>,
    part: &Part,
    m: &WormMesh,
    out: &mut Tally,
) -> Result<(), Lack> {
    let found = worm::lost(cx, part, m);
    let lost = found.map_err(|(because, wanted)| Lack::of(ALL, because, wanted))?;
    out.sources.push(Source {
        kind: LossKind::Mesh,
        part: part.label.clone(),
        with: With(vec![("P", lost.power.step), ("eta", lost.efficiency.step)]),
        form: Form::Worm(lost.heat),
    });
    out.lacks(
        part,
        Lack::new(STIRS, "no formula is held for a worm or wheel that stirs"),
    );
    Ok(())
}
