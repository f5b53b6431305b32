//! What may be typed behind each command.

mod deciding;
mod handing_over;

pub use deciding::{
    AsState, Compare, Gaps, Intake, IntakeGallon, IntakeMakes, Mend, Need, New, Oil, Pool, Weigh,
    Whatif, Why,
};
pub use handing_over::{
    Audit, Completions, Decimal, Help, Labels, Man, Names, Paper, Report, Rules, Schema, Shell,
    Work,
};
