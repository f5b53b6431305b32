//! What a site becomes: inheritance, units, points, values of the command line.

use filmwright::demand::rules::CALCULATED;
use filmwright::input::file::FileKind;
use filmwright::input::keys::{
    Form, Key, Record, example, is_private, machine, oil, part, samples, site,
};
use filmwright::input::load::{Tree, With, load, take};
use filmwright::input::overlay::{self, About};
use filmwright::model::machine::{Fill, OilNow, Point, Sump};
use filmwright::model::oil::{Shear, Viscosity};
use filmwright::model::part::{BearingClass, PartKind};
use filmwright::model::rulebook::Rulebook;
use filmwright::model::stated::{Stated, Tolerance, ViscosityLimit};
use filmwright::model::{Oil, Site};
use filmwright::problem::render::{Look, all};
use filmwright::problem::{Code, Problems};
use filmwright::quantity::Measure;
use filmwright::quantity::convert::{to_celsius, to_mm2_s};
use filmwright::relation::bearing::designation::DimensionTable;
use filmwright::source::place::Whose;
use filmwright::source::{COMMAND_LINE, Place, SourceSet};

/// Texts read together, with values of the command line over them.
struct Read {
    set: SourceSet,
    problems: Problems,
    site: Option<Site>,
}

impl Read {
    fn of(files: &[(&str, &str)], over: &[(&str, &str)]) -> Self {
        let mut set = SourceSet::new();
        let mut problems = Problems::new();
        let mut trees: Vec<Tree> = files
            .iter()
            .map(|(path, text)| {
                let is = |k: &&FileKind| path.starts_with(k.word());
                let kind = *FileKind::ALL.iter().find(is).expect("named for its kind");
                take(&mut set, kind, path, text.as_bytes(), &mut problems)
            })
            .collect();
        let settings: Vec<_> = over
            .iter()
            .map(|(target, text)| {
                let texts = [(*text).to_owned()];
                let read = overlay::settings(&mut set, &texts, &mut problems);
                let mut read = read.expect("KEY=VALUE");
                let about = About {
                    targets: vec![(*target).to_owned()],
                    parts: vec!["rolling bearing 22220".to_owned()],
                    oils: Vec::new(),
                };
                let put = read.put(&set, &mut trees, &about, &mut problems);
                assert_eq!(put.is_err(), problems.failed().is_some());
                ((*target).to_owned(), read)
            })
            .collect();
        let overlays: Vec<_> = settings
            .iter()
            .flat_map(|(target, read)| read.over(std::slice::from_ref(target)))
            .collect();
        let rules = Rulebook::default();
        let calculated: Vec<&str> = CALCULATED.iter().map(|r| r.0).collect();
        let with = With {
            rules: &rules,
            bearings: DimensionTable::built_in(),
            calculated: &calculated,
        };
        let site = load(&set, &trees, &with, &overlays, &mut problems).ok();
        Self {
            set,
            problems,
            site,
        }
    }

    fn told(&self) -> String {
        all(&self.set, &self.problems, Look::default())
    }

    fn codes(&self) -> Vec<Code> {
        self.problems.sorted().iter().map(|p| p.code).collect()
    }

    fn point(&self, address: &str) -> &Point {
        let site = self.site.as_ref();
        let site = site.unwrap_or_else(|| panic!("{}", self.told()));
        let found = site.points.iter().find(|p| p.address() == address);
        found.unwrap_or_else(|| panic!("no {address}"))
    }

    fn oil(&self, id: &str) -> &Oil {
        let site = self.site.as_ref();
        let site = site.unwrap_or_else(|| panic!("{}", self.told()));
        site.oil(id).expect("the oil")
    }
}

const WORKS: &str = include_str!("../cases/good/lime-works/site.yaml");
const OILS: &str = include_str!("../cases/good/lime-works/oils.yaml");
const GREASES: &str = include_str!("../cases/good/lime-works/oils/greases.yaml");

fn works(over: &[(&str, &str)]) -> Read {
    Read::of(
        &[
            ("site.yaml", WORKS),
            ("oils.yaml", OILS),
            ("oils/greases.yaml", GREASES),
        ],
        over,
    )
}

fn known<T: Measure>(stated: Option<&Stated<T>>) -> f64 {
    let given = stated.and_then(Stated::known).expect("known");
    given.value.base()
}

fn close(got: f64, want: f64) {
    assert!(
        (got - want).abs() <= 1e-9 * want.abs().max(1.0),
        "{got} {want}"
    );
}

#[test]
fn values_come_from_where_they_are_stated_and_say_so() {
    let read = works(&[]);
    let head = read.point("CV-104");
    let ambient = head
        .ambient
        .as_ref()
        .and_then(Stated::known)
        .expect("from the area");
    close(to_celsius(ambient.value.lo), -18.0);
    assert_eq!(ambient.origin.inherited.as_deref(), Some("area yard"));
    assert_eq!(ambient.origin.whose, Whose::Measured);
    assert_eq!(ambient.origin.dated.as_deref(), Some("2020..2026"));

    // What the machine says of cleanliness holds for its bearings.
    let PartKind::RollingBearing(bearing) = &head.parts[0].kind else {
        panic!("a bearing");
    };
    let clean = bearing.cleanliness.as_ref().expect("the machine's");
    assert_eq!(clean.value, "-/19/16");
    assert_eq!(clean.origin.inherited.as_deref(), Some("machine CV-104"));

    // CV-105 states its own rise, takes parts and limits from CV-104, ambient from the area.
    let tail = read.point("CV-105");
    let Some(Sump::Rise(Stated::Known(rise, tolerance))) = &tail.sump else {
        panic!("a rise");
    };
    close(rise.value.base(), 36.0);
    assert_eq!((rise.origin.inherited.as_deref(), tolerance), (None, &None));
    assert_eq!(tail.title.as_deref(), Some("Overland conveyor, tail drive"));
    assert_eq!(tail.parts.len(), 3);
    let start = tail.limits.start.as_ref().expect("copied");
    assert_eq!(start.origin.inherited.as_deref(), Some("like CV-104"));
    assert_eq!(start.origin.note.as_deref(), Some("manual 6.3"));
    assert!(
        matches!(start.value, ViscosityLimit::Kinematic(nu) if (to_mm2_s(nu) - 25e3).abs() < 1e-6)
    );

    let Some(Sump::Rise(Stated::Known(_, Some(Tolerance::Of(by))))) = &head.sump else {
        panic!("a tolerance");
    };
    close(by.base(), 3.0);
}

#[test]
fn a_point_takes_what_it_does_not_state_from_its_machine() {
    let read = works(&[]);
    let drive = read.point("M12/drive end");
    assert_eq!(drive.machine, "M12");
    let Some(Sump::Held(Stated::Known(held, _))) = &drive.sump else {
        panic!("held");
    };
    close(to_celsius(held.value), 72.0);
    assert_eq!(held.origin.inherited.as_deref(), Some("machine M12"));
    let PartKind::RollingBearing(bearing) = &drive.parts[0].kind else {
        panic!("a bearing");
    };
    // NU 319: bore 95 mm, outside 200 mm (ISO 15)
    assert_eq!(bearing.class, Some(BearingClass::CylindricalRoller));
    close(known(bearing.bore.as_ref()), 0.095);
    close(known(bearing.outside.as_ref()), 0.200);
    let far = read.point("M12/non-drive end");
    assert_eq!(far.parts[0].label, "rolling bearing 95 x 200 mm");
    assert!(far.regrease.is_some());
}

#[test]
fn a_machine_in_another_area_drops_what_belongs_to_the_place() {
    let site = "file: site 1\n\
        areas:\n  yard: { ambient: -18 .. 36 degC }\n  hall: { ambient: 5 .. 35 degC }\n\
        machines:\n  A:\n    area: yard\n    sump rise: 42 K\n    fill: 46 L\n    heater: 5 degC\n    \
        parts: [{ rolling bearing: 22220 }]\n  B: { like: A, area: hall }\n  C: { like: B }\n  \
        D: { like: A, area: hall, sump rise: 30 K }\n";
    let read = Read::of(&[("site.yaml", site)], &[]);
    let b = read.point("B");
    assert!(b.sump.is_none() && b.heater.is_none());
    assert!(matches!(
        b.fill.as_ref().and_then(Stated::known).map(|g| g.value),
        Some(Fill::Oil(_))
    ));
    let ambient = b.ambient.as_ref().and_then(Stated::known).expect("hall");
    close(to_celsius(ambient.value.lo), 5.0);
    // C is like B and so stands in the hall: nothing of the yard reaches it either.
    assert!(read.point("C").sump.is_none());
    assert!(read.point("D").sump.is_some());
    assert_eq!(
        read.codes(),
        [Code::LikeDrops, Code::LikeDrops],
        "{}",
        read.told()
    );
}

#[test]
fn old_units_are_converted_and_keep_their_spelling() {
    let read = Read::of(
        &[
            (
                "site.yaml",
                include_str!("../cases/good/old-units/site.yaml"),
            ),
            (
                "oils.yaml",
                include_str!("../cases/good/old-units/oils.yaml"),
            ),
        ],
        &[],
    );
    let point = read.point("0104");
    let Some(Sump::Reading { sump, ambient }) = &point.sump else {
        panic!("a reading");
    };
    close(to_celsius(sump.value), 45.0);
    close(to_celsius(ambient.value), 20.0);
    assert_eq!(sump.written, "113 degF");
    assert_eq!(
        point.maker_grade.as_ref().map(|g| g.value.iso_vg),
        Some(220)
    );
    close(
        point
            .running_hours
            .as_ref()
            .and_then(Stated::known)
            .expect("hours")
            .value
            .0,
        8000.0,
    );
    let PartKind::JournalBearing(bearing) = &point.parts[0].kind else {
        panic!("a journal bearing");
    };
    // 0.006 in on the diameter is 0.0762 mm on the radius
    close(known(bearing.radial_clearance.as_ref()), 76.2e-6);

    let nu = |id: &str, at: usize| match &read.oil(id).viscosity {
        Viscosity::Points { points, .. } => to_mm2_s(points[at].nu.value),
        Viscosity::Grade(_) => panic!("points"),
    };
    // 1000 SUS at 100 degF: 215.8 mm2/s by ASTM D2161
    assert!((nu("OLD-1", 0) - 215.8).abs() < 0.5, "{}", nu("OLD-1", 0));
    // 6.5 degE at 50 degC: 7.6 E - 4 / E, from memory
    close(nu("OLD-2", 0), 7.6 * 6.5 - 4.0 / 6.5);
    // 196 mPa.s at 40 degC over 834 kg/m3 (850 at 15 degC by D1250 table 54D, 0.6 a kelvin)
    assert!((nu("OLD-3", 0) - 235.0).abs() < 1.0, "{}", nu("OLD-3", 0));
}

#[test]
fn oils_copy_and_keep_only_what_still_holds() {
    let read = works(&[]);
    let like = read.oil("XY-320");
    assert!(matches!(&like.viscosity, Viscosity::Grade(g) if g.iso_vg.value == 320));
    assert!(like.density.is_some() && like.name.is_none());
    let Some(Shear::Points { points, test }) = &read.oil("TG-220").shear else {
        panic!("sheared points");
    };
    assert_eq!(points.len(), 2);
    assert_eq!(
        test.as_deref(),
        Some("20 h tapered roller bearing, method C")
    );
    let Viscosity::Points { points, .. } = &read.oil("MG-220").viscosity else {
        panic!("points");
    };
    assert_eq!(points[0].tolerance, Some(0.03));
    assert_eq!(points[0].nu.origin.note.as_deref(), Some("batch, drum 4"));
    let Viscosity::Points { points, .. } = &read.oil("G-2").viscosity else {
        panic!("base oil");
    };
    close(to_mm2_s(points[0].nu.value), 115.0);
}

#[test]
fn house_rules_and_names_with_commas_are_found() {
    let read = works(&[]);
    let site = read.site.as_ref().expect("read");
    assert_eq!(site.house.rules[0].name, "slow bearing, EP oil");
    let part = &read.point("CV-104").parts[1];
    assert_eq!(
        part.rule.as_ref().map(|r| r.value.as_str()),
        Some("slow bearing, EP oil")
    );
    assert!(matches!(&read.point("CV-104").oil_now, OilNow::Oil(id) if id.value == "MG-220"));
    assert_eq!(site.expect[0].machine.value, "M12/drive end");
}

#[test]
fn values_of_the_command_line_lie_over_those_of_the_files() {
    let read = works(&[("CV-104", "sump rise=48 K")]);
    let Some(Sump::Rise(rise)) = &read.point("CV-104").sump else {
        panic!("a rise");
    };
    close(known(Some(rise)), 48.0);
    let Place::Text(span) = &rise.origin().place else {
        panic!("a place");
    };
    let file = read.set.file(span.file).expect("a file");
    assert_eq!(file.path, COMMAND_LINE);
    // CV-105 is like CV-104 but not the target: its own rise stands.
    let Some(Sump::Rise(rise)) = &read.point("CV-105").sump else {
        panic!("a rise");
    };
    close(known(Some(rise)), 36.0);

    // A value in another way takes the place of the first.
    let read = works(&[("CV-104", "sump=held at 60 degC")]);
    assert!(matches!(read.point("CV-104").sump, Some(Sump::Held(_))));

    // A key of one part needs no name, of several it does.
    let read = works(&[("CV-104", "ratio=4.2")]);
    let PartKind::GearMesh(mesh) = &read.point("CV-104").parts[2].kind else {
        panic!("a mesh");
    };
    close(known(mesh.ratio.as_ref()), 4.2);
    let read = works(&[("CV-104", "22220: speed=250 r/min")]);
    let PartKind::RollingBearing(bearing) = &read.point("CV-104").parts[0].kind else {
        panic!("a bearing");
    };
    let speed = bearing.speed.as_ref().and_then(Stated::known).expect("set");
    assert_eq!(speed.written, "250 r/min");

    for (text, code) in [
        ("speed=250 r/min", Code::SetWhich),
        ("sump rize=48 K", Code::KeyUnknown),
        ("sump rise=48 degC", Code::RiseNotTemperature),
        ("colour=green", Code::KeyUnknown),
        ("pour point=-40 degC", Code::SetWhich),
        ("nobody: pour point=-40 degC", Code::SetWhose),
        ("house: reserv=1 step", Code::KeyUnknown),
    ] {
        let read = works(&[("CV-104", text)]);
        assert!(read.problems.failed().is_some());
        assert_eq!(read.codes(), [code], "{}", read.told());
    }
    let mut problems = Problems::new();
    let texts = ["sump rise".to_owned()];
    assert!(overlay::settings(&mut SourceSet::new(), &texts, &mut problems).is_err());
    assert_eq!(problems.sorted()[0].code, Code::SetForm);
}

/// A value that no key of that form takes.
fn wrong(key: &Key) -> &'static str {
    match key.form {
        Form::Record(_) | Form::Named(_) | Form::Fills | Form::Table => "[nonsense]",
        Form::Bearing => "[nonsense]",
        Form::List(_) | Form::Parts => "nonsense",
        _ => "{ x-a: nonsense }",
    }
}

/// A file in which one key of a record has the value given.
fn around(record: &'static Record, key: &Key, value: &str) -> (&'static str, String) {
    let line = format!("{}: {value}", key.name);
    let machine = |rest: &str| format!("file: site 1\nmachines: {{ A: {{ {rest} }} }}\n");
    let parts = "parts: [{ rolling bearing: 22220 }]";
    let viscosity = "viscosity: [220 mm2/s at 40 degC, 19 mm2/s at 100 degC]";
    let kind = part::KINDS.iter().find(|k| k.record.name == record.name);
    if let Some(kind) = kind {
        let first = if key.name == kind.first {
            line
        } else {
            format!("{}: 22220, {line}", kind.first)
        };
        return ("site.yaml", machine(&format!("parts: [{{ {first} }}]")));
    }
    let text = match record.name {
        "the site file" => format!("file: site 1\n{line}\n"),
        "house" => format!("file: site 1\nhouse: {{ {line} }}\n"),
        "a house rule" => format!("file: site 1\nhouse: {{ rules: {{ R: {{ {line} }} }} }}\n"),
        "an area" => format!("file: site 1\nareas: {{ yard: {{ {line} }} }}\n"),
        "a machine" if key.name == "parts" => machine(&line),
        "a machine" => machine(&format!("{line}, {parts}")),
        "losses" | "regrease" | "used oil" => {
            machine(&format!("{}: {{ {line} }}, {parts}", record.name))
        }
        "the sizes of a rolling bearing" => {
            machine(&format!("parts: [{{ rolling bearing: {{ {line} }} }}]"))
        }
        "an acceptance" => format!("file: site 1\naccept: [{{ {line} }}]\n"),
        "an expectation" => format!("file: site 1\nexpect: [{{ {line} }}]\n"),
        "an oil" if key.name == "viscosity" => format!("file: oils 1\nA: {{ {line} }}\n"),
        "an oil"
            if ["base oil", "thickener", "NLGI", "dropping point", "code"].contains(&key.name) =>
        {
            format!("file: oils 1\nA: {{ kind: grease, {viscosity}, {line} }}\n")
        }
        "an oil" => format!("file: oils 1\nA: {{ {viscosity}, {line} }}\n"),
        "the samples file" => format!("file: samples 1\n{line}\n"),
        "the columns" => format!("file: samples 1\ncolumns: {{ {line} }}\n"),
        "the events file" => format!("file: events 1\n{line}\n"),
        "an event" => format!("file: events 1\nevents: [{{ {line} }}]\n"),
        other => panic!("no file for {other}"),
    };
    let name = match record.name {
        "an oil" => "oils.yaml",
        "the samples file" | "the columns" => "samples.yaml",
        "the events file" | "an event" => "events.yaml",
        _ => "site.yaml",
    };
    (name, text)
}

fn records() -> Vec<&'static Record> {
    let mut all: Vec<&'static Record> = vec![
        &site::SITE,
        &site::HOUSE,
        &site::HOUSE_RULE,
        &site::ACCEPT,
        &site::EXPECT,
        &machine::AREA,
        &machine::MACHINE,
        &machine::LOSSES,
        &machine::REGREASE,
        &machine::USED_OIL,
        &part::BEARING_SIZES,
        &oil::OIL,
        &samples::SAMPLES,
        &samples::COLUMNS,
        &samples::EVENTS,
        &samples::EVENT,
    ];
    all.extend(part::KINDS.iter().map(|k| k.record));
    all
}

/// No key of the table is taken in and forgotten: nonsense behind each is found out.
#[test]
fn every_key_of_the_table_is_read() {
    let mut forgotten = Vec::new();
    for record in records() {
        for key in record
            .all()
            .filter(|k| k.name != "file" && !is_private(k.name))
        {
            let (name, text) = around(record, key, wrong(key));
            let mut files = vec![(name, text.as_str())];
            if name != "site.yaml" {
                files.push((
                    "site.yaml",
                    "file: site 1\nmachines: { B: { parts: [{ rolling bearing: 22220 }] } }\n",
                ));
            }
            let read = Read::of(&files, &[]);
            let found = read.problems.sorted().iter().any(|p| {
                matches!(
                    p.code,
                    Code::ValueWanted
                        | Code::RecordWanted
                        | Code::ListWanted
                        | Code::PartKindMissing
                        | Code::ReadingMissing
                )
            });
            if !found {
                forgotten.push(format!(
                    "{} of {}\n{text}{}",
                    key.name,
                    record.name,
                    read.told()
                ));
            }
        }
    }
    assert!(forgotten.is_empty(), "{}", forgotten.join("\n"));
}

/// The example a message gives for a key is a value the key takes.
#[test]
fn every_example_is_understood() {
    let mut refused = Vec::new();
    for record in records() {
        for key in record.all() {
            let quantity = matches!(
                key.form,
                Form::Quantity(_)
                    | Form::Word(_)
                    | Form::Words(_)
                    | Form::YesNo
                    | Form::YesNoOr(_)
                    | Form::Day
                    | Form::Whole
                    | Form::HouseLimit
                    | Form::Price
                    | Form::Teeth
                    | Form::Grade
                    | Form::Cleanliness
                    | Form::ColdPoints
                    | Form::Points
            );
            if !quantity {
                continue;
            }
            let value = format!("'{}'", example(key));
            let value = if value.contains('[') {
                example(key)
            } else {
                value
            };
            let (name, text) = around(record, key, &value);
            let mut files = vec![(name, text.as_str())];
            if name != "site.yaml" {
                files.push((
                    "site.yaml",
                    "file: site 1\nmachines: { B: { parts: [{ rolling bearing: 22220 }] } }\n",
                ));
            }
            let read = Read::of(&files, &[]);
            // Only what is wrong with the value itself counts, not what goes with it.
            let own = |c: Code| {
                matches!(
                    c,
                    Code::UnitMissing
                        | Code::UnitOther
                        | Code::UnitUnknown
                        | Code::NumberWanted
                        | Code::WordUnknown
                        | Code::YesNoWanted
                        | Code::DateForm
                        | Code::ValueImpossible
                        | Code::RangeForm
                        | Code::RangeWanted
                        | Code::AtMissing
                        | Code::AtUnwanted
                        | Code::ClauseUnknown
                        | Code::TeethForm
                        | Code::PriceForm
                        | Code::CleanlinessForm
                        | Code::GradeUnknown
                        | Code::HouseLimitForm
                        | Code::ValueWanted
                        | Code::YamlSyntax
                )
            };
            if read.problems.sorted().iter().any(|p| own(p.code)) {
                refused.push(format!("{} of {}: {}", key.name, record.name, read.told()));
            }
        }
    }
    assert!(refused.is_empty(), "{}", refused.join("\n"));
}
