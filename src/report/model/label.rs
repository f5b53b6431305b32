//! A label for a fill point: words only, no colour and no shape that stands for anything.

use serde::{Deserialize, Serialize};

/// One label.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct FillLabel {
    /// Tag of the machine, with the point where it has several.
    pub address: String,
    /// What the machine is called.
    pub title: String,
    /// The oil or grease to fill with; none where none is proposed.
    pub oil: Option<String>,
    /// Its name.
    pub oil_name: String,
    /// Whether it is a grease.
    pub grease: bool,
    /// What one machine holds, as shown.
    pub fill: Option<String>,
    /// How many machines of this kind there are.
    pub count: u32,
    /// What is in it now and must come out first.
    pub remove: Option<String>,
    /// Whether its verdict is tight.
    pub tight: bool,
    /// Conditions of its sheet.
    pub conditions: usize,
}
