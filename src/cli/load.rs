//! Loads a site for a command: files found or named, rules in layers, problems told.

use super::exit::Exit;
use super::host::Host;
use super::session::Session;
use crate::assets::{self, Files, Unread};
use crate::demand::rules::CALCULATED;
use crate::input::file::FileKind;
use crate::input::load::{self as reader, Tree, With};
use crate::input::overlay::{self, About};
use crate::input::rules::{RuleFault, rulebook};
use crate::model::Site;
use crate::model::rulebook::Rulebook;
use crate::model::stated::{Between, Stated};
use crate::problem::{self, Code, Problem, Problems, Severity, Write, render};
use crate::quantity::{Kind, Measure, ThermodynamicTemperature};
use crate::relation::bearing::designation::DimensionTable;
use crate::relation::oil::viscosity_temperature::Misfit;
use crate::results::json::{Head, InputFile};
use crate::source::place::{Given, Place};
use crate::source::{FileId, Origin, SourceSet};
use crate::weighing::Settings;
use sha2::{Digest, Sha256};
use std::path::{Path, PathBuf};

/// A site read, with what it was read from.
pub struct Loaded {
    /// The site.
    pub site: Site,
    /// The rules in force.
    pub rules: Rulebook,
    /// Every text read.
    pub sources: SourceSet,
    /// Fingerprint of all inputs and rules.
    pub fingerprint: String,
    /// Warnings and notes.
    pub problems: Problems,
    /// Whether an option changed what the files say.
    pub changed: bool,
    /// Files read, by kind.
    pub files: Vec<(FileKind, FileId)>,
    /// The folder it was read from; none for the demonstration.
    pub folder: Option<PathBuf>,
}

impl Loaded {
    /// A place as people find it: `site.yaml:33`.
    pub fn place(&self, place: &Place) -> String {
        self.sources.shown(place)
    }

    /// How many machines there are.
    pub fn machines(&self) -> usize {
        let mut tags: Vec<&str> = self
            .site
            .points
            .iter()
            .map(|p| p.machine.as_str())
            .collect();
        tags.dedup();
        tags.len()
    }

    /// Problems and unmet expectations as JSON.
    pub fn problems_json(&self, unmet: &[String]) -> String {
        let list: Vec<_> = self
            .problems
            .sorted()
            .into_iter()
            .map(|p| problem::json::object(&self.sources, p))
            .collect();
        let mut text = serde_json::to_string_pretty(&serde_json::json!({
            "machines": self.machines(),
            "points": self.site.points.len(),
            "oils": self.site.oils.len(),
            "problems": list,
            "not_as_expected": unmet,
        }))
        .unwrap_or_default();
        text.push('\n');
        text
    }

    /// Puts another ambient range in the place of every point's own.
    ///
    /// # Errors
    /// A text that is not a range of temperatures.
    pub fn set_ambient(&mut self, session: &mut Session<'_>, text: &str) -> Result<(), Exit> {
        let range = ambient_range(text).ok_or_else(|| {
            session.fail(&format!(
                "--band {text} is not a range of temperatures\n  write  --band -25..40degC"
            ));
            Exit::Usage
        })?;
        for point in &mut self.site.points {
            let given = Given::new(range, text, Origin::flag("--band"));
            point.ambient = Some(Stated::Known(given, None));
        }
        self.changed = true;
        Ok(())
    }
}

/// `-25..40degC`, `-25 degC .. 40 degC`.
fn ambient_range(text: &str) -> Option<Between<ThermodynamicTemperature>> {
    let (low, high) = text.split_once("..")?;
    let read = |t: &str| crate::quantity::parse::parse(Kind::Temperature, t).ok();
    let hi = read(high)?;
    let lo = read(low).or_else(|| read(&format!("{low} {}", hi.unit)))?;
    let between =
        |r: crate::quantity::parse::Read| ThermodynamicTemperature::from_base(r.amount.base);
    (lo.amount.base <= hi.amount.base).then(|| Between {
        lo: between(lo),
        hi: between(hi),
    })
}

/// The user's files, through the host.
struct HostFiles<'h>(&'h dyn Host);

impl Files for HostFiles<'_> {
    fn below(&self, folder: &str) -> Result<Vec<String>, Unread> {
        let root = Path::new(folder);
        if !self.0.exists(root) {
            return Ok(Vec::new());
        }
        let mut found = Vec::new();
        let mut open = vec![String::new()];
        while let Some(inner) = open.pop() {
            let names = self.0.list(&root.join(&inner)).map_err(|e| Unread {
                path: format!("{folder}/{inner}"),
                why: e.to_string(),
            })?;
            for name in names {
                match name.strip_suffix('/') {
                    Some(sub) => open.push(format!("{inner}{sub}/")),
                    None => found.push(format!("{inner}{name}")),
                }
            }
        }
        found.sort();
        Ok(found)
    }

    fn text(&self, path: &str) -> Result<String, Unread> {
        let unread = |why: String| Unread {
            path: path.to_owned(),
            why,
        };
        let bytes = self
            .0
            .read(Path::new(path))
            .map_err(|e| unread(e.to_string()))?;
        String::from_utf8(bytes).map_err(|_| unread("it is not UTF-8 text".to_owned()))
    }
}

impl Session<'_> {
    /// Loads the site: the demonstration, or the files of the folder.
    ///
    /// # Errors
    /// The exit code; everything wrong has been told on standard error.
    pub fn load(&mut self, set: Option<(&About, &[String])>) -> Result<Loaded, Exit> {
        let folder = (!self.shared.demo).then(|| self.folder());
        let rules = self.rules(folder.as_deref())?;
        let mut sources = SourceSet::new();
        let mut problems = Problems::new();
        let mut hash = Sha256::new();
        let mut trees = match &folder {
            None => demo(&mut sources, &mut problems, &mut hash),
            Some(folder) => self.trees(folder, &mut sources, &mut problems, &mut hash)?,
        };
        self.hash_rules(&mut hash, folder.as_deref());
        let settings = match set {
            None => None,
            Some((about, texts)) => {
                let read = overlay::settings(&mut sources, texts, &mut problems);
                let put = read.and_then(|mut read| {
                    read.put(&sources, &mut trees, about, &mut problems)?;
                    Ok(read)
                });
                match put {
                    Ok(read) => Some((about, read)),
                    Err(_) => return Err(self.told(&sources, &problems)),
                }
            }
        };
        let overlays = settings
            .as_ref()
            .map_or(Vec::new(), |(about, read)| read.over(&about.targets));
        let calculated: Vec<&str> = CALCULATED.iter().map(|rule| rule.0).collect();
        let with = With {
            rules: &rules,
            bearings: DimensionTable::built_in(),
            calculated: &calculated,
        };
        let site = reader::load(&sources, &trees, &with, &overlays, &mut problems);
        drop(overlays);
        if let Ok(site) = &site {
            for point in &site.points {
                problems.allow(&point.machine, &point.allow);
            }
        }
        if let Ok(site) = &site {
            self.expired(site, &mut problems);
        }
        if self.shared.strict {
            problems.make_strict();
        }
        match site {
            Ok(site) if problems.failed().is_none() => {
                self.warn(&sources, &problems);
                let fingerprint = hex(&hash.finalize());
                Ok(Loaded {
                    site,
                    rules,
                    sources,
                    fingerprint,
                    problems,
                    changed: set.is_some(),
                    files: trees.iter().map(|t| (t.kind, t.file)).collect(),
                    folder,
                })
            }
            _ => Err(self.told(&sources, &problems)),
        }
    }

    /// Warns of acceptances that have run out on the day of judgement.
    fn expired(&self, site: &Site, problems: &mut Problems) {
        let on = self.date(site.frame.reviewed.as_deref());
        for a in site.accept.iter().filter(|a| a.expired(&on)) {
            let until = a.until.as_deref().unwrap_or_default();
            let (machine, oil) = (&a.machine.value, &a.oil.value);
            problems.push(
                Problem::new(
                    Code::AcceptExpired,
                    format!("the acceptance of {oil} on {machine} ran out on {until}"),
                    a.machine.origin.place.clone(),
                )
                .within(machine.clone())
                .so(format!("on {on} the verdict counts as open work again"))
                .write(Write::words(
                    "until: a later day, if somebody accepts it again; otherwise take it out",
                )),
            );
        }
    }

    /// The rules in force: built in, the site's own, those of `--rules`.
    ///
    /// # Errors
    /// Rule files that cannot be read or are wrong; all faults are told.
    pub fn rules(&mut self, folder: Option<&Path>) -> Result<Rulebook, Exit> {
        let folders = self.rule_folders(folder);
        let names: Vec<&str> = folders.iter().map(String::as_str).collect();
        let layers = match assets::rule_layers(&names, &HostFiles(self.host)) {
            Ok(layers) => layers,
            Err(unread) => {
                self.fail(&unread.to_string());
                return Err(Exit::File);
            }
        };
        rulebook(&layers).map_err(|faults| self.rule_faults(&faults))
    }

    /// The rule files in force, in layers.
    pub fn layers(&self, folder: Option<&Path>) -> Vec<assets::Layer> {
        let folders = self.rule_folders(folder);
        let names: Vec<&str> = folders.iter().map(String::as_str).collect();
        assets::rule_layers(&names, &HostFiles(self.host)).unwrap_or_default()
    }

    fn rule_folders(&self, folder: Option<&Path>) -> Vec<String> {
        let mut folders = Vec::new();
        if let Some(folder) = folder {
            let own = folder.join("rules");
            let beside_a_site = self.shared.site.is_some()
                || !reader::default_files(FileKind::Site, |below| {
                    self.names_in(&folder.join(below))
                })
                .is_empty();
            if beside_a_site && self.host.exists(&own) {
                folders.push(own.to_string_lossy().replace('\\', "/"));
            }
        }
        folders.extend(self.shared.rules.clone());
        folders
    }

    fn rule_faults(&mut self, faults: &[RuleFault]) -> Exit {
        for fault in faults {
            self.fail(&fault.to_string());
        }
        Exit::Input
    }

    fn hash_rules(&self, hash: &mut Sha256, folder: Option<&Path>) {
        for layer in self.layers(folder) {
            for file in layer.files {
                feed(hash, "rules", file.text.as_bytes());
            }
        }
    }

    /// Takes the files of a folder in, or those named on the command line.
    ///
    /// # Errors
    /// A file that cannot be read.
    pub(super) fn trees(
        &mut self,
        folder: &Path,
        sources: &mut SourceSet,
        problems: &mut Problems,
        hash: &mut Sha256,
    ) -> Result<Vec<Tree>, Exit> {
        let mut trees = Vec::new();
        for kind in FileKind::ALL {
            let named = match kind {
                FileKind::Site => self.shared.site.iter().cloned().collect(),
                FileKind::Oils => self.shared.oils.clone(),
                FileKind::Samples => self.shared.samples.clone(),
                FileKind::Events => Vec::new(),
            };
            let yaml: Vec<String> = named.iter().filter(|n| is_yaml(n)).cloned().collect();
            // a laboratory's table named alone is read by the map of the folder
            let tables_only = *kind == FileKind::Samples && yaml.is_empty();
            let files: Vec<(PathBuf, String)> = if named.is_empty() || tables_only {
                reader::default_files(*kind, |below| self.names_in(&folder.join(below)))
                    .into_iter()
                    .map(|name| (folder.join(&name), name))
                    .collect()
            } else {
                yaml.into_iter()
                    .map(|name| (PathBuf::from(&name), name))
                    .collect()
            };
            if files.is_empty() && *kind == FileKind::Site {
                problems.error(reader::missing(*kind, &shown(folder)));
            }
            for (path, name) in files {
                let bytes = self.bytes(&path)?;
                feed(hash, kind.word(), &bytes);
                trees.push(reader::take(sources, *kind, &name, &bytes, problems));
            }
        }
        Ok(trees)
    }

    fn names_in(&self, folder: &Path) -> Vec<String> {
        self.host.list(folder).unwrap_or_default()
    }

    /// The bytes of a file; a file over the limit is not read at all.
    fn bytes(&mut self, path: &Path) -> Result<Vec<u8>, Exit> {
        let limit = crate::source::MAX_BYTES as u64;
        if self.host.size(path).is_ok_and(|size| size > limit) {
            self.fail(&format!(
                "{} is larger than 64 MiB\n  write  split it: machines in site/*.yaml, oils in oils/*.yaml  [file-too-large]",
                path.display()
            ));
            return Err(Exit::Input);
        }
        self.host.read(path).map_err(|error| {
            self.fail(&format!("{} cannot be read: {error}", path.display()));
            Exit::File
        })
    }

    fn look(&self) -> render::Look {
        render::Look {
            width: self.host.width().clamp(60, 120),
            colour: self.colour(),
        }
    }

    /// Tells problems of a run that cannot go on.
    pub fn told(&mut self, sources: &SourceSet, problems: &Problems) -> Exit {
        let text = render::all(sources, problems, self.look());
        self.host.err(&text);
        let errors = problems.count(Severity::Error);
        self.host.err(&format!(
            "{errors} {}\n",
            if errors == 1 { "error" } else { "errors" }
        ));
        Exit::Input
    }

    /// Warnings and notes go to standard error; the last line counts them.
    pub(super) fn warn(&mut self, sources: &SourceSet, problems: &Problems) {
        if self.shared.quiet || problems.is_empty() {
            return;
        }
        let text = render::all(sources, problems, self.look());
        self.host.err(&text);
        let warnings = problems.count(Severity::Warning);
        if warnings > 0 {
            let word = if warnings == 1 { "warning" } else { "warnings" };
            self.note(&format!("{warnings} {word}. See: filmwright check"));
        }
    }

    /// The texts a run was made from, to be carried in its results: the files of the site, and own
    /// rules. None where an option changed what the files say: the texts would not give the results.
    pub fn carried(&self, loaded: &Loaded) -> Vec<InputFile> {
        if loaded.changed {
            return Vec::new();
        }
        let of = |(kind, file): &(FileKind, FileId)| {
            loaded.sources.file(*file).map(|f| InputFile {
                kind: kind.word(),
                name: f.path.clone(),
                text: f.text.clone(),
            })
        };
        let own = self.layers(loaded.folder.as_deref()).into_iter().skip(1);
        let rules = own.flat_map(|l| l.files).map(|f| InputFile {
            kind: "rules",
            name: f.path,
            text: f.text,
        });
        loaded.files.iter().filter_map(of).chain(rules).collect()
    }

    /// What stands at the head of documents.
    pub fn head(&self, loaded: &Loaded) -> Head {
        Head {
            inputs: loaded.fingerprint.clone(),
            rules: rules_in_words(&loaded.rules),
            date: self.date(loaded.site.frame.reviewed.as_deref()),
            ..Head::default()
        }
    }

    /// The head of a document that stands on no file.
    pub fn head_of(&self, site: &Site, text: &str) -> Head {
        let mut hash = Sha256::new();
        feed(&mut hash, "command line", text.as_bytes());
        self.hash_rules(&mut hash, None);
        Head {
            inputs: hex(&hash.finalize()),
            rules: "built in".to_owned(),
            date: self.date(site.frame.reviewed.as_deref()),
            ..Head::default()
        }
    }

    /// Settings of a weighing from the shared options.
    ///
    /// # Errors
    /// A reserve that is not a number of steps.
    pub fn settings(&mut self, worn: bool) -> Result<Settings, Exit> {
        let reserve = match self.shared.reserve.clone() {
            None => None,
            Some(text) => match steps(&text) {
                Some(steps) => Some(steps),
                None => {
                    self.fail(&format!(
                        "--reserve {text} is not a number of steps\n  write  --reserve 0.5"
                    ));
                    return Err(Exit::Usage);
                }
            },
        };
        Ok(Settings {
            reserve,
            worn,
            units: self.units(),
        })
    }

    /// An oil whose points make no curve; the reader refuses such oils, so this is a defect.
    pub fn misfit(&mut self, oil: &str, misfit: &Misfit) -> Exit {
        self.fail(&format!(
            "the points of {oil} make no curve: {misfit}\n  this should have been refused when it was read; please report it with the oil's record"
        ));
        Exit::Defect
    }
}

/// `0.5`, `0.5 step`.
fn steps(text: &str) -> Option<f64> {
    let read = crate::quantity::parse::parse(Kind::VgStep, text)
        .or_else(|_| crate::quantity::parse::parse(Kind::Ratio, text));
    read.ok()
        .map(|r| r.amount.base)
        .filter(|s| (0.0..=10.0).contains(s))
}

fn rules_in_words(rules: &Rulebook) -> String {
    let n = rules.replaced.len();
    match n {
        0 => "built in".to_owned(),
        1 => "built in, 1 entry replaced".to_owned(),
        n => format!("built in, {n} entries replaced"),
    }
}

pub(super) fn demo(
    sources: &mut SourceSet,
    problems: &mut Problems,
    hash: &mut Sha256,
) -> Vec<Tree> {
    let mut trees = Vec::new();
    for file in assets::templates("demo") {
        let name = file.path.trim_start_matches("demo/").to_owned();
        feed(hash, &name, file.text.as_bytes());
        let kind = FileKind::ALL.iter().find(|k| k.default_name() == name);
        if let Some(kind) = kind {
            let path = format!("<builtin>/demo/{name}");
            trees.push(reader::take(
                sources,
                *kind,
                &path,
                file.text.as_bytes(),
                problems,
            ));
        }
    }
    trees
}

/// Takes another input into a fingerprint already made.
pub(super) fn feed_fingerprint(fingerprint: &mut String, kind: &str, bytes: &[u8]) {
    let mut hash = Sha256::new();
    feed(&mut hash, "before", fingerprint.as_bytes());
    feed(&mut hash, kind, bytes);
    *fingerprint = hex(&hash.finalize());
}

/// A fingerprint nobody asks for.
pub(super) fn feed_nothing() -> Sha256 {
    Sha256::new()
}

/// Feeds one input into the fingerprint: its kind, its length, its bytes.
/// Fingerprint of some texts, sha-256.
pub fn fingerprint(parts: &[&[u8]]) -> String {
    let mut hash = Sha256::new();
    for part in parts {
        feed(&mut hash, "part", part);
    }
    hex(&hash.finalize())
}

fn feed(hash: &mut Sha256, kind: &str, bytes: &[u8]) {
    hash.update(kind.as_bytes());
    hash.update((bytes.len() as u64).to_le_bytes());
    hash.update(bytes);
}

fn hex(bytes: &[u8]) -> String {
    bytes.iter().fold(String::new(), |mut text, b| {
        use std::fmt::Write as _;
        let _ = write!(text, "{b:02x}");
        text
    })
}

fn is_yaml(name: &str) -> bool {
    Path::new(name)
        .extension()
        .is_some_and(|e| e.eq_ignore_ascii_case("yaml") || e.eq_ignore_ascii_case("yml"))
}

fn shown(folder: &Path) -> String {
    let text = folder.to_string_lossy().replace('\\', "/");
    if text.is_empty() {
        ".".to_owned()
    } else {
        text
    }
}
