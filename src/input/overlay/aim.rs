//! What a value of the command line is for: a point and its parts, an oil, an area, the house, a
//! house rule, another machine or the site file itself; by the names they have in the files.
//!
//! Values for a point are laid over it as it is read ([`super::apply`]); all others are put into
//! the trees of the files, so that everything that copies or inherits from there follows.

use crate::input::file::FileKind;
use crate::input::keys::machine::{AREA, MACHINE};
use crate::input::keys::oil::OIL;
use crate::input::keys::part::{self, GEAR, PART};
use crate::input::keys::site::{HOUSE, HOUSE_RULE, SITE};
use crate::input::keys::{Form, Record, is_private, spelt};
use crate::input::load::Tree;
use crate::problem::{Code, Problem, Problems, Write, suggest};
use crate::source::Place;
use crate::source::yaml::{Entry, Node};

/// The points a run is about, and what its values may be for without being named.
#[derive(Clone, Debug, Default)]
pub struct About {
    /// Tags or addresses of the points.
    pub targets: Vec<String>,
    /// Names of the parts they serve.
    pub parts: Vec<String>,
    /// The oils asked about; a value of an oil is for the only one where no name is given.
    pub oils: Vec<String>,
}

/// What a value is for.
#[derive(Clone, Debug, PartialEq, Eq)]
pub(super) enum Aim {
    /// The points of the run, or the part of that name.
    Point(Option<String>),
    /// An oil.
    Oil(String),
    /// An area.
    Area(String),
    /// A machine, or a point of one, that the run need not be about.
    Machine(String),
    /// The house values.
    House,
    /// A house rule.
    Rule(String),
    /// The top of the site file.
    Site,
}

impl Aim {
    fn record(&self) -> Option<&'static Record> {
        match self {
            Self::Point(_) => None,
            Self::Oil(_) => Some(&OIL),
            Self::Area(_) => Some(&AREA),
            Self::Machine(_) => Some(&MACHINE),
            Self::House => Some(&HOUSE),
            Self::Rule(_) => Some(&HOUSE_RULE),
            Self::Site => Some(&SITE),
        }
    }

    /// Whether a key of that name belongs there. What parts a point has is known when it is read.
    fn takes(&self, key: &str) -> bool {
        match (self, self.record()) {
            (Self::Site, _) => of_the_sheets(key),
            (_, Some(record)) => record.key(key).is_some(),
            (_, None) => true,
        }
    }

    /// The same, where the key says from what a machine inherits or copies: that is put into its
    /// record, before anything is inherited.
    pub(super) fn of_records(self, entry: &Entry, about: &About) -> Vec<Self> {
        let inherits = matches!(spelt(&entry.key.text).as_str(), "area" | "like");
        if self != Self::Point(None) || !inherits {
            return vec![self];
        }
        let mut tags: Vec<&str> = about
            .targets
            .iter()
            .map(|t| t.split('/').next().unwrap_or(t))
            .collect();
        tags.dedup();
        tags.into_iter()
            .map(|tag| Self::Machine(tag.to_owned()))
            .collect()
    }

    /// As it is written before the key.
    fn written(&self) -> String {
        match self {
            Self::Point(Some(part)) => format!("part {part}"),
            Self::Point(None) => "the machine".to_owned(),
            Self::Oil(id) => format!("oil {id}"),
            Self::Area(name) => format!("area {name}"),
            Self::Machine(tag) => format!("machine {tag}"),
            Self::House => "house".to_owned(),
            Self::Rule(name) => format!("house rule {name}"),
            Self::Site => "site".to_owned(),
        }
    }
}

/// Keys at the top of the site file that are values, not records.
fn of_the_sheets(key: &str) -> bool {
    SITE.key(key).is_some_and(|k| {
        !matches!(
            k.form,
            Form::Record(_) | Form::Named(_) | Form::List(_) | Form::FileKind
        )
    })
}

/// Names found in the files.
#[derive(Debug, Default)]
struct Names {
    oils: Vec<String>,
    areas: Vec<String>,
    machines: Vec<String>,
    rules: Vec<String>,
}

impl Names {
    fn of(trees: &[Tree]) -> Self {
        let roots = |kind: FileKind| {
            let of_kind = trees.iter().filter(move |t| t.kind == kind);
            of_kind.filter_map(|t| t.root.as_ref())
        };
        let below = |way: &[&str]| {
            let mut all = Vec::new();
            for root in roots(FileKind::Site) {
                let at = way.iter().try_fold(root, |node, key| child(node, key));
                all.extend(at.map(keys).unwrap_or_default());
            }
            all
        };
        Self {
            oils: roots(FileKind::Oils).flat_map(keys).collect(),
            areas: below(&["areas"]),
            machines: below(&["machines"]),
            rules: below(&["house", "rules"]),
        }
    }

    fn all(&self) -> impl Iterator<Item = &str> {
        let lists = [&self.oils, &self.areas, &self.machines, &self.rules];
        lists.into_iter().flatten().map(String::as_str)
    }
}

fn child<'n>(node: &'n Node, key: &str) -> Option<&'n Node> {
    let entry = node.entries()?.iter().find(|e| spelt(&e.key.text) == key)?;
    Some(&entry.value)
}

fn keys(node: &Node) -> Vec<String> {
    let named = node.entries().unwrap_or_default().iter();
    named
        .map(|e| e.key.text.trim().to_owned())
        .filter(|k| k != "file" && !is_private(k))
        .collect()
}

/// Everything a name before a key may stand for.
fn named(name: &str, about: &About, names: &Names) -> Vec<Aim> {
    let mut found = Vec::new();
    let mut add = |aim: Aim| {
        if !found.contains(&aim) {
            found.push(aim);
        }
    };
    let after = |word: &str| name.strip_prefix(word).map_or(name, str::trim);
    let known = |list: &[String], word: &str| {
        let wanted = after(word);
        list.iter().any(|n| n == wanted).then(|| wanted.to_owned())
    };
    if name == "house" {
        add(Aim::House);
    }
    if name == "site" {
        add(Aim::Site);
    }
    if let Some(id) = known(&names.oils, "oil ") {
        add(Aim::Oil(id));
    }
    if let Some(area) = known(&names.areas, "area ") {
        add(Aim::Area(area));
    }
    if let Some(rule) = known(&names.rules, "house rule ") {
        add(Aim::Rule(rule));
    }
    let tag = after("machine ");
    if about.targets.iter().any(|t| t == tag) {
        add(Aim::Point(None));
    } else if names
        .machines
        .iter()
        .any(|m| m == tag.split('/').next().unwrap_or(tag))
    {
        add(Aim::Machine(tag.to_owned()));
    }
    let part = after("part ");
    let ends = format!(" {part}");
    if about.parts.iter().any(|p| p == part || p.ends_with(&ends)) {
        add(Aim::Point(Some(part.to_owned())));
    }
    found
}

/// What a key without a name before it may be for.
fn unnamed(key: &str, about: &About) -> Vec<Aim> {
    let of_a_part = part::KINDS.iter().any(|k| k.record.key(key).is_some())
        || [&PART, &GEAR].iter().any(|r| r.key(key).is_some());
    if MACHINE.key(key).is_some() || of_a_part {
        return vec![Aim::Point(None)];
    }
    if HOUSE.key(key).is_some() {
        return vec![Aim::House];
    }
    if OIL.key(key).is_some() {
        return about.oils.iter().cloned().map(Aim::Oil).collect();
    }
    if of_the_sheets(key) {
        return vec![Aim::Site];
    }
    vec![Aim::Point(None)]
}

/// What a value is for; none where that is not plain, which is reported.
pub(super) fn aim(
    problems: &mut Problems,
    (name, entry): (Option<&str>, &Entry),
    value: &str,
    (about, trees): (&About, &[Tree]),
) -> Option<Aim> {
    let key = entry.key.text.as_str();
    let names = Names::of(trees);
    let all = match name {
        Some(name) => named(name, about, &names),
        None => unnamed(key, about),
    };
    let able: Vec<&Aim> = all.iter().filter(|a| a.takes(key)).collect();
    if let [one] = able.as_slice() {
        return Some((*one).clone());
    }
    let at = |code, says: String| Problem::new(code, says, Place::Text(entry.key.span));
    let problem = match (able.as_slice(), all.as_slice(), name) {
        ([_, _, ..], _, _) => which(at(Code::SetWhich, which_says(key, name)), &able, key, value),
        (_, [one, ..], Some(_)) => unknown_key(
            at(
                Code::KeyUnknown,
                format!("{} has no key \"{key}\"", one.written()),
            ),
            one,
            entry,
        ),
        (_, _, Some(name)) => unknown_name(
            at(Code::SetWhose, format!("nothing here is called \"{name}\"")),
            name,
            (about, &names),
            (key, value),
        ),
        (_, _, None) => at(
            Code::SetWhich,
            format!("`{key}` is a key of oils, and no oil is asked about"),
        )
        .why("the id of the oil stands before the key")
        .write(Write::words(format!("--set \"OIL: {key}={value}\""))),
    };
    problems.error(problem);
    None
}

fn which_says(key: &str, name: Option<&str>) -> String {
    match name {
        Some(name) => format!("\"{name}\" is the name of several things that have `{key}`"),
        None => format!("`{key}` is a key of oils, and several are weighed"),
    }
}

fn which(problem: Problem, able: &[&Aim], key: &str, value: &str) -> Problem {
    let why = "the name of what it is for stands before the key, or --oil names the one oil";
    able.iter().take(4).fold(problem.why(why), |p, aim| {
        let name = aim.written();
        p.write(Write::words(format!("--set \"{name}: {key}={value}\"")))
    })
}

fn unknown_key(problem: Problem, aim: &Aim, entry: &Entry) -> Problem {
    let problem = problem.why("the keys are listed by: filmwright help keys");
    let meant = aim.record().and_then(|r| r.meant(&entry.key.text));
    match meant {
        Some(meant) => problem
            .did_you_mean(meant)
            .write(Write::edit(entry.key.span, meant)),
        None => problem.write(Write::words(format!(
            "--set \"{}: KEY=VALUE\" with a key of {}",
            aim.written(),
            aim.record().map_or("it", |r| r.name),
        ))),
    }
}

fn unknown_name(
    problem: Problem,
    name: &str,
    (about, names): (&About, &Names),
    (key, value): (&str, &str),
) -> Problem {
    let ends = about.parts.iter().map(String::as_str);
    let bare = ["oil ", "area ", "part ", "machine ", "house rule "]
        .iter()
        .find_map(|word| name.strip_prefix(word))
        .unwrap_or(name);
    let all = names.all().chain(ends).chain(["house", "site"]);
    let problem = problem.why(
        "a value of something else than the machine has its name before the key: a part, an oil, an area, a machine, `house`, `house rule NAME` or `site`",
    );
    match suggest::certain(bare, all) {
        Some(meant) => problem
            .did_you_mean(meant)
            .write(Write::words(format!("--set \"{meant}: {key}={value}\""))),
        None => problem.write(Write::words(format!("--set \"oil ID: {key}={value}\""))),
    }
}
