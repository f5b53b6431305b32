//! States of a site to be compared: a folder, or a result file that carries its inputs.

use super::exit::Exit;
use super::load::{demo, feed_nothing};
use super::session::Session;
use crate::assets::{self, Layer, TextFile};
use crate::compare::State;
use crate::input::file::FileKind;
use crate::input::load::{self as reader, Tree};
use crate::input::rules::rulebook;
use crate::problem::Problems;
use crate::source::SourceSet;
use crate::weighing::Settings;
use serde::Deserialize;
use std::path::Path;

/// A state with what it is called.
pub struct Named {
    /// The state.
    pub state: State,
    /// Its revision and date where it states them, else its path.
    pub name: String,
}

impl Session<'_> {
    /// Reads a state: a folder with a site file, or a result file of `weigh -f json`.
    ///
    /// # Errors
    /// It cannot be read, or its files are wrong; that has been told.
    pub fn state(&mut self, set: &mut SourceSet, path: &str) -> Result<Named, Exit> {
        let is_file =
            self.host.size(Path::new(path)).is_ok() && self.host.read(Path::new(path)).is_ok();
        let found = if is_file {
            self.state_of_results(set, path)?
        } else {
            self.state_of_folder(set, path)?
        };
        let (trees, rules, own, settings, problems) = found;
        if problems.failed().is_some() {
            return Err(self.told(set, &problems));
        }
        let name = title(&trees).unwrap_or_else(|| path.to_owned());
        let state = State::new(trees, rules, own, settings).map_err(|unread| {
            self.fail(&format!("{path} cannot be compared: {unread}\n  write  a folder with a site.yaml, or a file written by: filmwright weigh -f json -o {path}"));
            Exit::Input
        })?;
        Ok(Named { state, name })
    }

    /// The state this run is about: the folder of the site, or the demonstration.
    ///
    /// # Errors
    /// As for [`Session::state`].
    pub fn state_now(&mut self, set: &mut SourceSet) -> Result<Named, Exit> {
        if !self.shared.demo {
            let folder = self.folder().to_string_lossy().into_owned();
            return self.state(set, &folder);
        }
        let mut problems = Problems::new();
        let trees = demo(set, &mut problems, &mut feed_nothing());
        let rules = self.rules(None)?;
        let own = own_rules(&self.layers(None));
        let settings = self.settings(true)?;
        let state = State::new(trees, rules, own, settings).map_err(|_| Exit::Defect)?;
        Ok(Named {
            state,
            name: "the demonstration".to_owned(),
        })
    }

    fn state_of_folder(&mut self, set: &mut SourceSet, path: &str) -> Result<Parts, Exit> {
        let folder = Path::new(path);
        if !self.host.exists(folder) {
            self.fail(&format!(
                "{path} is neither a folder nor a file\n  write  filmwright compare OLD NEW, each a site's folder or a file of weigh -f json"
            ));
            return Err(Exit::File);
        }
        let mut problems = Problems::new();
        let rules = self.rules(Some(folder))?;
        let trees = self.trees(folder, set, &mut problems, &mut feed_nothing())?;
        let layers = self.layers(Some(folder));
        let settings = self.settings(true)?;
        Ok((trees, rules, own_rules(&layers), settings, problems))
    }

    fn state_of_results(&mut self, set: &mut SourceSet, path: &str) -> Result<Parts, Exit> {
        let bytes = self.host.read(Path::new(path)).map_err(|e| {
            self.fail(&format!("{path} cannot be read: {e}"));
            Exit::File
        })?;
        let none = |session: &mut Self| {
            session.fail(&format!(
                "{path} carries no inputs to weigh again\n  write  filmwright weigh -f json -o {path}   in the folder of that state, or name the folder"
            ));
            Exit::Input
        };
        let Ok(kept) = serde_json::from_slice::<Kept>(&bytes) else {
            return Err(none(self));
        };
        if kept.files.is_empty() {
            return Err(none(self));
        }
        let mut problems = Problems::new();
        let mut trees: Vec<Tree> = Vec::new();
        let mut layers = vec![assets::builtin_rules()];
        for KeptFile { kind, name, text } in &kept.files {
            if kind == "rules" {
                layers.push(Layer {
                    name: path.to_owned(),
                    files: vec![TextFile {
                        path: name.clone(),
                        text: text.clone(),
                    }],
                });
            } else if let Some(kind) = FileKind::ALL.iter().find(|k| k.word() == kind) {
                trees.push(reader::take(
                    set,
                    *kind,
                    name,
                    text.as_bytes(),
                    &mut problems,
                ));
            }
        }
        let rules = rulebook(&layers).map_err(|faults| {
            for fault in &faults {
                self.fail(&fault.to_string());
            }
            Exit::Input
        })?;
        let settings = Settings {
            reserve: kept.options.reserve,
            worn: kept.options.worn.unwrap_or(true),
            units: self.units(),
        };
        Ok((trees, rules, own_rules(&layers), settings, problems))
    }
}

/// What is read of a result file: the judgements in it, which may be far larger, are passed over.
#[derive(Deserialize)]
struct Kept {
    #[serde(default)]
    files: Vec<KeptFile>,
    #[serde(default)]
    options: KeptOptions,
}

#[derive(Deserialize)]
struct KeptFile {
    kind: String,
    #[serde(default)]
    name: String,
    text: String,
}

#[derive(Deserialize, Default)]
struct KeptOptions {
    reserve: Option<f64>,
    worn: Option<bool>,
}

type Parts = (
    Vec<Tree>,
    crate::model::rulebook::Rulebook,
    String,
    Settings,
    Problems,
);

/// The user's own rules as one text.
fn own_rules(layers: &[Layer]) -> String {
    let own = layers.iter().skip(1).flat_map(|l| &l.files);
    own.map(|f| f.text.as_str()).collect::<Vec<_>>().join("\n")
}

/// `revision B of 2026-11-02`, as far as the site file says so.
fn title(trees: &[Tree]) -> Option<String> {
    let site = trees.iter().find(|t| t.kind == FileKind::Site)?;
    let entries = site.root.as_ref()?.entries()?;
    let of = |key: &str| {
        let entry = entries.iter().find(|e| e.key.text == key)?;
        entry.value.text().map(str::to_owned)
    };
    match (of("revision"), of("reviewed")) {
        (Some(revision), Some(date)) => Some(format!("revision {revision} of {date}")),
        (Some(revision), None) => Some(format!("revision {revision}")),
        (None, Some(date)) => Some(format!("the state of {date}")),
        (None, None) => None,
    }
}
