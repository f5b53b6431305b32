//! Page models built by hand: an invented site, invented oils.

use filmwright::report::draw::band::{Band, BandFigure, BandRow, MiniBand};
use filmwright::report::draw::gap_bars::GapBar;
use filmwright::report::draw::list_length::{ListFigure, ListRow};
use filmwright::report::draw::margin_bars::{MarginBar, MarginBars};
use filmwright::report::draw::season::{Season, SeasonFigure};
use filmwright::report::draw::viscosity::{
    Detail, Jaw, OilLine, Role, TemperatureBand, ViscosityFigure,
};
use filmwright::report::model::*;
use filmwright::report::names::{Bundle, Href, Names, Place};

/// What an oil of the fixtures is: letter, id, name, two readings, verdict, margins, band.
pub(crate) struct Oil {
    pub(crate) letter: &'static str,
    pub(crate) id: &'static str,
    pub(crate) name: &'static str,
    pub(crate) line: [(f64, f64); 2],
    pub(crate) mark: Mark,
    pub(crate) hot: f64,
    pub(crate) cold: f64,
    pub(crate) band: (f64, f64),
    pub(crate) reason: &'static str,
}

pub(crate) const OILS: [Oil; 6] = [
    Oil {
        letter: "A",
        id: "SG-220",
        name: "PAO EP gear oil VG 220",
        line: [(40.0, 220.0), (100.0, 26.4)],
        mark: Mark::Holds,
        hot: 0.67,
        cold: 0.78,
        band: (-22.0, 42.0),
        reason: "Keeps the reserve at both ends.",
    },
    Oil {
        letter: "B",
        id: "SG-320",
        name: "PAO EP gear oil VG 320",
        line: [(40.0, 320.0), (100.0, 35.3)],
        mark: Mark::Tight,
        hot: 1.80,
        cold: 0.11,
        band: (-18.0, 52.0),
        reason: "Cold reserve 0.11 step, 0.5 asked.",
    },
    Oil {
        letter: "C",
        id: "MG-220",
        name: "mineral EP gear oil VG 220",
        line: [(40.0, 220.0), (100.0, 18.7)],
        mark: Mark::Fails,
        hot: -0.30,
        cold: -0.96,
        band: (-12.0, 33.0),
        reason: "Too thin at 78 °C by 3.0 mm²/s, too thick at −18 °C by a factor of two.",
    },
    Oil {
        letter: "D",
        id: "MG-320",
        name: "mineral EP gear oil VG 320",
        line: [(40.0, 320.0), (100.0, 24.0)],
        mark: Mark::Fails,
        hot: 0.78,
        cold: -1.76,
        band: (-8.0, 41.0),
        reason: "At −18 °C 3.8 times too thick.",
    },
    Oil {
        letter: "E",
        id: "TG-220",
        name: "polymer-thickened EP gear oil VG 220",
        line: [(40.0, 178.0), (100.0, 20.6)],
        mark: Mark::Fails,
        hot: -0.20,
        cold: 0.69,
        band: (-22.0, 34.0),
        reason: "Holds as new; sheared it is too thin hot.",
    },
    Oil {
        letter: "F",
        id: "SG-150",
        name: "PAO EP gear oil VG 150",
        line: [(40.0, 150.0), (100.0, 19.8)],
        mark: Mark::Open,
        hot: -0.49,
        cold: 1.47,
        band: (-27.0, 31.0),
        reason: "Starts easily; too thin at 78 °C unless the sump runs cooler than read.",
    },
];

pub(crate) fn frame() -> Frame {
    Frame {
        site: "Harrowdale Lime Works".into(),
        client: Some("Harrowdale Lime Works".into()),
        document: Some("HLW-V-007".into()),
        revision: Some("C".into()),
        date: "2026-10-12".into(),
        author: Some("consulting engineer".into()),
        status: Some("for review, not signed".into()),
        logo: None,
        fingerprint: "7f3a19c4 0be2d511".into(),
        program: "filmwright 0.1.0, rules 2026.1".into(),
        units: "SI".into(),
        paper: Paper::A4,
        warning: Some("Invented site and oils: no number here is for use.".into()),
    }
}

fn nav(current: &str) -> Vec<NavLink> {
    let mut names = Names::new();
    [
        ("index", "", "Overview"),
        ("machine", "CV-104", "CV-104"),
        ("audit", "", "Audit"),
        ("rules", "", "Rules"),
        ("glossary", "", "Words"),
    ]
    .into_iter()
    .map(|(kind, tag, text)| NavLink {
        text: text.into(),
        href: Place::new(&mut names, kind, tag).href(Bundle::Folder, None),
        current: text == current,
    })
    .collect()
}

pub(crate) fn sheet(kind: &str, tag: &str, name: &str, body: Body) -> Sheet {
    Sheet {
        place: Place::new(&mut Names::new(), kind, tag),
        number: 3,
        of: 19,
        name: name.into(),
        subtitle: String::new(),
        about: Phrase::new(),
        title: format!("{name}: viscosity needed and oil proposed"),
        nav: nav(name),
        body,
    }
}

pub(crate) fn caution() -> Caution {
    Caution {
        judged: vec![
            "viscosity hot and at start".into(),
            "pour point".into(),
            "EP additive, which the maker asks for".into(),
        ],
        not_judged: vec![
            "seals and paint".into(),
            "foam and air release".into(),
            "oxidation life".into(),
        ],
        defer: vec!["The maker's manual, local codes and whoever is licensed to sign.".into()],
        before: vec![
            Phrase::new()
                .strong("One input is a single reading")
                .and(" (step 1): read the sump again in July."),
        ],
    }
}

fn sign(oil: &str) -> SignOff {
    SignOff {
        meaning:
            "Signing accepts the answer for this machine, on these inputs, for this revision only."
                .into(),
        boxes: vec![
            SignBox {
                role: "Prepared".into(),
                accepts: "Inputs are as found; what was assumed is listed.".into(),
            },
            SignBox {
                role: "Checked".into(),
                accepts: "Steps followed, governing rule agreed.".into(),
            },
            SignBox {
                role: "Accepted for the works".into(),
                accepts: Phrase::new()
                    .and("The change to ")
                    .tag(oil)
                    .and(" may be planned, condition 1 met."),
            },
        ],
    }
}

fn bar(label: &str, steps: f64, mark: Mark) -> MarginBar {
    MarginBar {
        label: label.into(),
        steps: Some(steps),
        printed: minus(&format!("{steps:+.2}")),
        mark,
        ..MarginBar::default()
    }
}

pub(crate) fn bars(id: &str, oil: &Oil, axis: bool) -> MarginBars {
    let word = |m: f64| {
        if m < 0.0 {
            Mark::Fails
        } else if m < 0.5 {
            Mark::Tight
        } else {
            Mark::Holds
        }
    };
    let mut hot = bar("hot", oil.hot, word(oil.hot));
    if oil.letter == "A" || oil.letter == "C" {
        hot.whisker = Some((oil.hot - 0.3, oil.hot + 0.3));
    }
    if oil.letter == "E" {
        hot.as_new = Some(0.55);
    }
    MarginBars {
        id: id.into(),
        bars: vec![hot, bar("cold", oil.cold, word(oil.cold))],
        reserve: 0.5,
        span: (-2.0, 2.0),
        axis,
    }
}

pub(crate) fn curves() -> ViscosityFigure {
    let lines = OILS
        .iter()
        .map(|oil| OilLine {
            letter: oil.letter.into(),
            role: match oil.letter {
                "A" => Role::Proposed,
                "C" => Role::InUse,
                _ => Role::Other,
            },
            line: oil.line.to_vec(),
            as_new: if oil.letter == "E" {
                vec![(40.0, 220.0), (100.0, 25.9)]
            } else {
                Vec::new()
            },
            stated: oil.line.to_vec(),
            tolerance: None,
        })
        .collect();
    ViscosityFigure {
        id: "fig-curves".into(),
        title: "Viscosity of six oils over temperature, with the limits of CV-104".into(),
        description: "SG-220 passes between the floor of 40.8 mm²/s at 78 °C and the ceiling of 25 000 mm²/s at −18 °C.".into(),
        degrees: Degrees::Celsius,
        lines,
        jaws: vec![
            Jaw { floor: true, nu_mm2_s: 40.8, from_c: 24.0, to_c: 78.0, label: "too thin running: below 40.8".into() },
            Jaw { floor: false, nu_mm2_s: 25_000.0, from_c: -18.0, to_c: 36.0, label: "too thick to start: above 25\u{202f}000".into() },
        ],
        bands: vec![
            TemperatureBand { from_c: -18.0, to_c: 36.0, label: "start: oil at ambient, −18 to 36 °C".into() },
            TemperatureBand { from_c: 24.0, to_c: 78.0, label: "running sump, 24 to 78 °C".into() },
        ],
        details: vec![
            Detail { id: "fig-h".into(), letter: "H".into(), title: "hottest sump".into(), description: "SG-220 lies above the floor of 40.8 at 78 °C by 0.67 step.".into(), caption: "E as new lies with A; sheared it drops below the floor.".into(), at_c: 78.0, limit_mm2_s: 40.8, floor: true, of: "A".into(), margin: "+0.67 step".into() },
            Detail { id: "fig-k".into(), letter: "K".into(), title: "coldest start".into(), description: "SG-220 lies below the ceiling of 25 000 at −18 °C by 0.78 step.".into(), caption: "C and D lie above the ceiling.".into(), at_c: -18.0, limit_mm2_s: 25_000.0, floor: false, of: "A".into(), margin: "+0.78 step".into() },
        ],
    }
}

fn candidate(index: usize, oil: &Oil) -> Candidate {
    Candidate {
        letter: oil.letter.into(),
        oil: Phrase::new().tag(oil.id),
        name: oil.name.into(),
        picked: oil.letter == "A",
        in_use: oil.letter == "C",
        mark: oil.mark,
        hot: "49.4".into(),
        cold: "14\u{202f}600".into(),
        bars: bars(&format!("bars-{index}"), oil, index == 5),
        margins: minus(&format!(
            "hot {:+.2}, cold {:+.2} VG steps",
            oil.hot, oil.cold
        )),
        kelvins: "pour +24.0 K, oil's limit +42.0 K".into(),
        conditions: if oil.letter == "A" {
            vec![1, 2]
        } else {
            Vec::new()
        },
        reason: oil.reason.into(),
    }
}

fn bands() -> BandFigure {
    BandFigure {
        id: "fig-bands".into(),
        title: "Ambient each oil holds in".into(),
        description: "SG-220 holds from −22 to 42 °C; the yard gets −18 to 36 °C.".into(),
        caption: "Cold ends: the start limit. Warm ends: the hot floor less the sump rise.".into(),
        degrees: Degrees::Celsius,
        need_c: (-18.0, 36.0),
        need: "the yard gets −18 to 36 °C".into(),
        rows: OILS
            .iter()
            .map(|oil| BandRow {
                letter: oil.letter.into(),
                label: format!("{} {}", oil.id, oil.name),
                role: match oil.letter {
                    "A" => "proposed".into(),
                    "C" => "in use".into(),
                    _ => String::new(),
                },
                picked: oil.letter == "A",
                mark: oil.mark,
                band: Some(Band {
                    low_c: Some(oil.band.0),
                    high_c: Some(oil.band.1),
                }),
                says: if oil.mark == Mark::Fails {
                    "leaves a part bare".into()
                } else {
                    "covers the band".into()
                },
            })
            .collect(),
    }
}

fn season() -> SeasonFigure {
    let months = [
        (-18.0, 9.0),
        (-15.0, 11.0),
        (-9.0, 18.0),
        (-4.0, 23.0),
        (1.0, 29.0),
        (5.0, 33.0),
        (8.0, 36.0),
        (7.0, 35.0),
        (3.0, 29.0),
        (-3.0, 21.0),
        (-8.0, 14.0),
        (-16.0, 10.0),
    ];
    SeasonFigure {
        id: "fig-year".into(),
        title: "The yard's year between the limits of two seasonal oils".into(),
        description: "SG-150 from October to April, MG-320 from May to September.".into(),
        caption: "Columns: coldest and warmest hour of each month.".into(),
        degrees: Degrees::Celsius,
        months_c: months.to_vec(),
        seasons: vec![
            Season {
                first: 1,
                last: 4,
                low_c: Some(-27.0),
                high_c: Some(31.0),
                label: "F SG-150".into(),
            },
            Season {
                first: 5,
                last: 9,
                low_c: Some(-8.0),
                high_c: Some(41.0),
                label: "D MG-320".into(),
            },
            Season {
                first: 10,
                last: 12,
                low_c: Some(-27.0),
                high_c: Some(31.0),
                label: "F SG-150".into(),
            },
        ],
    }
}

fn step(
    n: u32,
    title: &str,
    formula: Option<&str>,
    with: &[(&str, &str, &str, Option<Origin>)],
    result: &str,
) -> CalcStep {
    CalcStep {
        id: format!("s{n}"),
        number: n.to_string(),
        title: title.into(),
        formula: formula.map(Into::into),
        with: with
            .iter()
            .map(|(symbol, number, shown, origin)| Put {
                symbol: (*symbol).into(),
                number: (*number).into(),
                shown: (*shown).into(),
                origin: *origin,
                step: origin
                    .is_none()
                    .then(|| ("1".to_owned(), Href::here("machine-cv-104-s1"))),
            })
            .collect(),
        result: result.into(),
        ..CalcStep::default()
    }
}

fn steps() -> Vec<CalcStep> {
    let mut first = step(
        1,
        "Hottest sump",
        Some("T = T_amb + dT"),
        &[
            ("T_amb", "36", "36 °C", Some(Origin::Measured)),
            ("dT", "42", "42 K", Some(Origin::Measured)),
        ],
        "78 °C",
    );
    first.carried = true;
    first.notes = vec!["Rise read once at 92 % load, taken as full load (A-1).".into()];
    let mut nu1 = step(
        2,
        "Bearing 22220: viscosity for a viscosity ratio of one",
        Some("nu1 = 45000 n^-0.83 Dpw^-0.5"),
        &[
            ("n", "236", "236 r/min", Some(Origin::Maker)),
            ("Dpw", "140", "140 mm", None),
        ],
        "40.8 mm²/s",
    );
    nu1.governs = true;
    nu1.carried = true;
    nu1.aside = "governs the hot floor".into();
    nu1.source = "ISO 281:2007, reference viscosity".into();
    let mut line = step(
        3,
        "SG-220: its line",
        Some("lg lg(nu + 0.7) = A - B lg T"),
        &[("A", "", "7.375", None)],
        "A 7.375, B 2.807",
    );
    line.source = "ASTM D341".into();
    line.notes = vec!["−18 °C lies 58 K below the coldest stated point: extrapolated.".into()];
    let mut margin = step(
        4,
        "Hot margin",
        Some("m = 6 lg(nu40 / nu_need)"),
        &[
            ("nu40", "220", "220 mm²/s", Some(Origin::Supplier)),
            ("nu_need", "170", "170 mm²/s", None),
        ],
        "+0.67 step",
    );
    margin.aside = "reserve asked 0.5".into();
    vec![first, nu1, line, margin]
}

fn needs() -> Needs {
    let row =
        |end: &str, limit: &str, unit: &str, at: &str, set_by: &str, rule: &str, governs: bool| {
            NeedRow {
                end: end.into(),
                limit: limit.into(),
                unit: unit.into(),
                at: at.into(),
                set_by: set_by.into(),
                rule: rule.into(),
                governs,
                ..NeedRow::default()
            }
        };
    let mut cold = row(
        "start ceiling",
        "≤ 25\u{202f}000",
        "mm²/s",
        "−18",
        "splash must throw oil in the first minute",
        "maker's manual 6.3",
        true,
    );
    cold.origin = Some(Origin::Maker);
    let mut mesh = row(
        "hot floor",
        "≥ 26.6",
        "mm²/s",
        "78",
        "low-speed mesh at 0.58 m/s",
        "pitch-line rule",
        false,
    );
    mesh.origin = Some(Origin::House);
    mesh.confidence = Some("confidence medium".into());
    Needs {
        degrees: "°C".into(),
        rows: vec![
            row("hot floor", "≥ 40.8", "mm²/s", "78", "intermediate bearing 22220 at 236 r/min, κ ≥ 1", "ISO 281; steps 1, 2", true),
            row("hot floor", "≥ 37.1", "mm²/s", "78", "output bearing 23134 at 66 r/min, κ ≥ 0.4, with EP only", "house rule H-1", false),
            mesh,
            cold,
            row("pour margin", "≤ −23", "°C", "−18", "5 K below the coldest start", "house rule H-2", false),
        ],
        notes: vec!["The film at the mesh (λ 0.7) would need 61 mm²/s; no target is stated, so it is printed and not judged.".into()],
    }
}

pub(crate) fn point() -> Point {
    let input = |origin, text: &str, from: &str| InputLine {
        origin,
        text: text.into(),
        from: from.into(),
    };
    let a = &OILS[0];
    Point {
        key: "p".into(),
        summary: Some(Summary {
            oil: "SG-220".into(),
            bars: bars("bars-sum", a, true),
            band: Some(mini("band-sum", Some(a.band), None, a.mark)),
            band_axis: Some(MiniBand { head: true, ..mini("band-sum-axis", None, None, Mark::Open) }),
            says: "The thin line: the hot margin if the sump runs 3 K hotter or cooler than read.".into(),
        }),
        needs: needs(),
        inputs: vec![
            input(Origin::Measured, "sump rise 42 K at 92 % load, one reading", "site.yaml:33"),
            input(Origin::Measured, "ambient −18 to 36 °C", "area yard"),
            input(Origin::Maker, "bearings 22220 at 236 r/min and 23134 at 66 r/min", "site.yaml:37"),
            input(Origin::Register, "splash lubrication, fill 46 L", "register row 12"),
            input(Origin::Assumed, "flank roughness Ra 0.3 µm, ground and run in", "site.yaml:48"),
        ],
        curves: Some(Curves { figure: curves(), caption: "Six oils between the two limits. Heaviest: proposed. Heavy dashes: in the machine now. Letters as in the table of oils.".into(), notes: vec!["SG-220 is carried on 58 K below its coldest stated point.".into()] }),
        candidates: Some(Candidates {
            limits: "Limits: at least 40.8 mm²/s at 78 °C, at most 25\u{202f}000 mm²/s at −18 °C. Reserve asked: 0.5 step".into(),
            hot_head: "mm²/s, 78 °C".into(),
            cold_head: "mm²/s, −18 °C".into(),
            rows: OILS.iter().enumerate().map(|(i, o)| candidate(i, o)).collect(),
            order: "Order: verdict, then the oil in use if it holds, oils on site, fewer conditions, smallest excess over the floor, price, name.".into(),
            notes: vec!["SG-220: the seals bear it.".into()],
            not_weighed: vec![NotWeighed { oils: vec!["GR-2".into()], because: "a grease".into() }],
        }),
        barred: vec![
            Barred { oil: Phrase::new().tag("MH-46"), name: "hydraulic oil VG 46".into(), in_use: false, rule: "class needed".into(), reason: "The maker asks for EP; this oil declares HM only.".into(), source: "maker's manual 6.1; confidence high".into() },
        ],
        conditions: vec![
            Condition { number: 1, text: "Drain hot and flush: less than 1 % of the mineral oil may stay.".into(), oils: vec!["SG-220".into(), "SG-320".into()], rule: "mixing of base oils, common practice".into() },
            Condition { number: 2, text: "Ask the maker whether the inside paint stands PAO.".into(), oils: vec!["SG-220".into()], rule: "inside paint not stated".into() },
        ],
        ambient: Some(Ambient { bands: Some(bands()), season: Some(season()), notes: vec!["The pair F and D would also cover the year, at two drains of 46 L.".into()] }),
        changes: Some(Changes {
            rows: vec![
                ChangeRow { letter: "B".into(), oil: "SG-320".into(), covers: "−18 to 52 °C".into(), change: Phrase::new().and("start never below ").strong("−15 °C"), then: "from tight to holds".into() },
                ChangeRow { letter: "C".into(), oil: "MG-220".into(), covers: "−12 to 33 °C".into(), change: Phrase::new().strong("no single change").and("; needs a start at −12 °C and a sump of 75 °C"), then: "to the limit only".into() },
            ],
            unsettles: vec!["Sump 3 K hotter than read: hot margin +0.35, tight. It fails above 84 °C.".into()],
            ask_for: Vec::new(),
        }),
        change_over: vec!["Drain MG-220 hot.".into(), "Flush with SG-220, run 30 min, drain.".into(), "Sample after 200 h.".into()],
        steps: steps(),
        steps_command: "filmwright why CV-104 SG-220".into(),
        assumptions: vec![Assumption { id: "A-1".into(), taken: "sump rise 42 K at full load".into(), because: "one reading at 92 % load".into(), otherwise: "3 K more: hot margin +0.35, tight".into() }],
        gaps: Gaps {
            head: Some(GapBar { id: "gap-head".into(), span: (-2.0, 2.0), head: true, ..GapBar::default() }),
            rows: vec![GapRow {
                id: "G-4".into(),
                machine: None,
                missing: "second sump reading".into(),
                plausible: "rise 38 to 48 K".into(),
                bar: Some(GapBar { id: "gap-4".into(), low: 0.02, high: 1.1, used: Some(0.67), reserve: 0.5, span: (-2.0, 2.0), head: false }),
                range: "+0.02 to +1.10".into(),
                decides: "holds or tight".into(),
                ask: "contact thermometer after 2 h at load".into(),
            }],
            idle: "Flank roughness changes nothing today.".into(),
        },
        ..Point::default()
    }
}

fn mini(id: &str, band: Option<(f64, f64)>, now: Option<(f64, f64)>, mark: Mark) -> MiniBand {
    let band_of = |(low, high): (f64, f64)| Band {
        low_c: Some(low),
        high_c: Some(high),
    };
    MiniBand {
        id: id.into(),
        axis_c: (-30.0, 60.0),
        degrees: Degrees::Celsius,
        need_c: (-18.0, 36.0),
        now: now.map(band_of),
        proposed: band.map(band_of),
        mark,
        head: false,
    }
}

pub(crate) fn machine() -> Sheet {
    let body = MachineSheet {
        answer: Answer {
            mark: Some(Mark::Holds),
            headline: "Fill with SG-220. It holds.".into(),
            sentences: vec![
                Phrase::new().and("At the hottest sump, 78 °C, it has +0.6 of a VG step in hand, at the coldest start, −18 °C, +0.7. "),
                Phrase::new().strong("MG-220, in the machine now, fails at both ends").and(": too thin above 33 °C ambient, too thick below −12 °C."),
            ],
        },
        caution: caution(),
        points: vec![point()],
        work_order: Some("CV-104: drain MG-220 hot, flush, fill 46 L SG-220.\nSample after 200 h.".into()),
        cautions: vec![
            CautionNote { id: "C-1".into(), title: "Cold figures are carried on".into(), text: "Near its pour point an oil can be *thicker* than its line says. Ask for a measured low-temperature viscosity.".into() },
            CautionNote { id: "C-2".into(), title: "Warranty".into(), text: "A maker's instruction stands until the maker agrees otherwise in writing.".into() },
        ],
        notes: Some("Register row 12 was read on site.\n\n- sister unit: CV-105\n- [practice](https://example.org/practice)".into()),
        sign: sign("SG-220"),
    };
    let mut sheet = sheet("machine", "CV-104", "CV-104", Body::Machine(Box::new(body)));
    sheet.subtitle = "Overland conveyor, head drive".into();
    sheet.about = "Helical-bevel gear unit, splash lubricated, 46 L. Outdoors, yard.".into();
    sheet
}

/// Two lubrication points on one machine.
pub(crate) fn two_points() -> Sheet {
    let mut sheet = machine();
    let Body::Machine(body) = &mut sheet.body else {
        panic!("a machine")
    };
    let mut second = point();
    body.points[0].key = "drive-end".into();
    body.points[0].name = Some("drive end".into());
    body.points[0].answer = body.answer.clone();
    second.key = "tail-end".into();
    second.name = Some("tail end".into());
    second.answer = Answer {
        mark: Some(Mark::Tight),
        headline: "Keep SG-220. It is tight.".into(),
        sentences: Vec::new(),
    };
    second.curves = None;
    second.ambient = None;
    second.steps.clear();
    second.gaps = Gaps::default();
    second.summary = None;
    for row in &mut second.candidates.as_mut().expect("weighed").rows {
        row.bars.id = format!("tail-{}", row.bars.id);
    }
    body.points.push(second);
    sheet
}

/// No oil holds, and most are barred.
pub(crate) fn nothing_holds() -> Sheet {
    let mut sheet = machine();
    let Body::Machine(body) = &mut sheet.body else {
        panic!("a machine")
    };
    body.answer = Answer {
        mark: Some(Mark::Fails),
        headline: "No oil on the list holds.".into(),
        sentences: vec!["Five are barred, the one left is too thin hot by 6.1 mm²/s.".into()],
    };
    let point = &mut body.points[0];
    point.summary = None;
    let weighed = point.candidates.as_mut().expect("weighed");
    weighed.rows.truncate(3);
    weighed.rows.drain(..2);
    let curves = point.curves.as_mut().expect("drawn");
    curves.figure.lines.retain(|line| line.letter == "C");
    for detail in &mut curves.figure.details {
        detail.of = "C".into();
        detail.margin = if detail.floor {
            "−0.30 step".into()
        } else {
            "−0.96 step".into()
        };
    }
    for id in ["SG-220", "SG-320", "MG-320", "TG-220", "SG-150"] {
        point.barred.push(Barred {
            oil: Phrase::new().tag(id),
            name: "EP gear oil".into(),
            in_use: false,
            rule: "EP in a backstop".into(),
            reason: "The sprag backstop shares the sump; its maker forbids EP.".into(),
            source: "common practice; confidence medium".into(),
        });
    }
    let ambient = point.ambient.as_mut().expect("drawn");
    ambient.season = None;
    ambient.notes.clear();
    let bands = ambient.bands.as_mut().expect("drawn");
    bands.rows.retain(|row| row.letter == "C");
    bands.rows[0].band = None;
    bands.rows[0].says = "nowhere".into();
    point.changes = Some(Changes {
        rows: Vec::new(),
        unsettles: Vec::new(),
        ask_for: vec![
            "An oil of VG 320 without EP, VI at least 150, pour point at most −27 °C.".into(),
        ],
    });
    sheet
}

/// One candidate, no ambient known, few inputs.
pub(crate) fn one_candidate() -> Sheet {
    let mut sheet = machine();
    let Body::Machine(body) = &mut sheet.body else {
        panic!("a machine")
    };
    body.answer = Answer {
        mark: Some(Mark::Open),
        headline: "Not decided: the ambient range is not stated.".into(),
        sentences: Vec::new(),
    };
    body.notes = None;
    body.work_order = None;
    let mut lean = Point {
        key: "p".into(),
        needs: needs(),
        ..Point::default()
    };
    lean.needs.rows.truncate(1);
    let full = point();
    let mut weighed = full.candidates.expect("weighed");
    weighed.rows.truncate(1);
    weighed.rows[0].mark = Mark::Open;
    weighed.rows[0].conditions.clear();
    weighed.rows[0].bars.bars.truncate(1);
    weighed.not_weighed.clear();
    lean.candidates = Some(weighed);
    let mut curves = full.curves.expect("drawn");
    curves.figure.lines.truncate(1);
    curves.figure.bands.clear();
    curves.figure.details.clear();
    curves.figure.jaws.truncate(1);
    curves.figure.jaws[0].from_c = 78.0;
    lean.curves = Some(curves);
    body.points = vec![lean];
    sheet
}

/// Forty candidates with names of sixty characters.
pub(crate) fn forty() -> Sheet {
    let mut sheet = machine();
    let Body::Machine(body) = &mut sheet.body else {
        panic!("a machine")
    };
    let point = &mut body.points[0];
    let weighed = point.candidates.as_mut().expect("weighed");
    let curves = &mut point.curves.as_mut().expect("drawn").figure;
    let bands = point
        .ambient
        .as_mut()
        .expect("drawn")
        .bands
        .as_mut()
        .expect("drawn");
    let (rows, lines, band_rows) = (
        weighed.rows.clone(),
        curves.lines.clone(),
        bands.rows.clone(),
    );
    weighed.rows.clear();
    curves.lines.clear();
    bands.rows.clear();
    for i in 0..40 {
        let name = format!("polymer-thickened synthetic EP gear oil for long drains, no. {i:02}");
        let mut row = rows[i % 6].clone();
        row.letter = item_letter(i);
        row.oil = Phrase::new().tag(format!("OIL-{i:02}"));
        row.name.clone_from(&name);
        row.bars.id = format!("bars-{i}");
        row.picked = i == 0;
        row.in_use = i == 2;
        weighed.rows.push(row);
        let mut line = lines[i % 6].clone();
        line.letter = item_letter(i);
        line.role = [Role::Proposed, Role::Other, Role::InUse]
            .get(i)
            .copied()
            .unwrap_or_default();
        let shift = 1.0 + 0.013 * i as f64;
        line.line = line.line.iter().map(|(t, nu)| (*t, nu * shift)).collect();
        line.stated.clone_from(&line.line);
        curves.lines.push(line);
        let mut band = band_rows[i % 6].clone();
        band.letter = item_letter(i);
        band.label = format!("OIL-{i:02} {name}");
        band.picked = i == 0;
        bands.rows.push(band);
    }
    sheet.name = "CV-104-CONVEYOR-HEAD-DRIVE-INTERMEDIATE-GEARBOX-NORTH-SIDE-2".into();
    sheet
}

#[expect(clippy::too_many_lines, reason = "a page model written out")]
pub(crate) fn overview() -> Sheet {
    let row = |item: u32,
               tag: &str,
               name: &str,
               now: Option<Mark>,
               now_oil: &str,
               mark: Option<Mark>,
               oil: &str,
               next: &str| RegisterRow {
        item,
        tag: Phrase::new().link(tag, Href::here(tag)),
        name: name.into(),
        now_mark: now,
        now: now_oil.into(),
        mark,
        oil: oil.into(),
        conditions: if item == 1 {
            "2 conditions".into()
        } else {
            String::new()
        },
        next: next.into(),
    };
    let attention = vec![
        row(
            1,
            "EL-701",
            "bucket elevator, gear unit",
            Some(Mark::Fails),
            "MG-220",
            Some(Mark::Holds),
            "SG-220",
            "drain now, find the top-up can",
        ),
        row(
            2,
            "CV-104",
            "overland conveyor, head drive",
            Some(Mark::Fails),
            "MG-220",
            Some(Mark::Holds),
            "SG-220",
            "change before starts below −12 °C",
        ),
        row(
            3,
            "CV-105",
            "overland conveyor, tail drive",
            Some(Mark::Fails),
            "MG-220",
            Some(Mark::Holds),
            "SG-220",
            "change with CV-104",
        ),
        row(
            4,
            "SC-220",
            "primary screen, exciter east",
            Some(Mark::Fails),
            "MG-220",
            Some(Mark::Tight),
            "SG-220",
            "change, then accept tight by name",
        ),
        row(
            5,
            "HP-210",
            "crusher hydraulic set",
            Some(Mark::Fails),
            "MH-46",
            Some(Mark::Tight),
            "VH-46",
            "get the pump's start limit (gap 2)",
        ),
    ];
    let open = vec![
        row(
            6,
            "KL-502",
            "kiln barring drive, worm unit",
            None,
            "unknown",
            Some(Mark::Open),
            "no answer",
            "read the nameplate (gap 1)",
        ),
        row(
            7,
            "RL-801",
            "rail unloader, winch",
            None,
            "MG-220",
            Some(Mark::Open),
            "no answer",
            "measure the output speed (gap 3)",
        ),
    ];
    let settled: Vec<_> = [
        ("SC-221", Mark::Tight, "SG-220"),
        ("FN-402", Mark::Holds, "MT-68"),
        ("FN-403", Mark::Holds, "MT-68"),
        ("HP-710", Mark::Holds, "VH-46"),
        ("KL-501", Mark::Holds, "SG-320"),
        ("ML-301", Mark::Holds, "SG-320"),
        ("ML-302", Mark::Holds, "MT-68"),
        ("PM-115", Mark::Holds, "MT-68"),
        ("PM-116", Mark::Holds, "MT-68"),
    ]
    .into_iter()
    .enumerate()
    .map(|(i, (tag, mark, oil))| {
        row(
            8 + u32::try_from(i).expect("few"),
            tag,
            "as in the register",
            Some(mark),
            oil,
            Some(mark),
            oil,
            if mark == Mark::Tight {
                "accepted until 2027-10-04"
            } else {
                "nothing to do"
            },
        )
    })
    .collect();
    let machine_row = |group: Option<&str>,
                       tag: &str,
                       name: &str,
                       mark: Mark,
                       band: (f64, f64),
                       now: Option<(f64, f64)>| MachineRow {
        group: group.map(Into::into),
        tag: Phrase::new().link(tag, Href::here(tag)),
        name: name.into(),
        needs: vec!["≥ 40.8 at 78".into(), "≤ 25\u{202f}000 at −18".into()],
        oil: "SG-220".into(),
        now: if now.is_some() {
            "MG-220".into()
        } else {
            String::new()
        },
        mark: Some(mark),
        margin: "+0.6 hot".into(),
        band: Some(mini(&format!("band-{tag}"), Some(band), now, mark)),
        band_words: format!(
            "holds from {} to {} °C; the place gets −18 to 36 °C",
            band.0, band.1
        ),
        next: "change before a start below −12 °C".into(),
    };
    let groups = vec![
        RegisterGroup {
            title: "need attention".into(),
            count: 5,
            rows: attention,
            more: String::new(),
        },
        RegisterGroup {
            title: "not decided".into(),
            count: 2,
            rows: open,
            more: String::new(),
        },
        RegisterGroup {
            title: "settled".into(),
            count: 9,
            rows: settled,
            more: String::new(),
        },
    ];
    let cell = |mark: Option<Mark>, text: &str, words: &str, picked, in_use| MatrixCell {
        mark,
        text: text.into(),
        words: words.into(),
        picked,
        in_use,
    };
    let body = Overview {
        answer: Answer {
            mark: None,
            headline: "Nine machines are settled, five need attention before the first hard frost, two cannot be decided yet.".into(),
            sentences: vec![Phrase::new().and("Four oils serve every machine that can be decided; seven are in use today. The change that matters most is ").strong("MG-220 to SG-220").and(" on CV-104, CV-105 and SC-220.")],
        },
        first: vec![
            Phrase::new().strong("EL-701").and(": drain now. The oil in it is a grade too thin. ").link("Audit, finding 1", Href::here("f1")),
            Phrase::new().strong("CV-104, CV-105, SC-220").and(": change to SG-220, 106 L, before starts below −10 °C."),
            Phrase::new().strong("KL-502, RL-801").and(": read two nameplates."),
        ],
        caution: caution(),
        groups,
        areas: Vec::new(),
        machines: vec![
            machine_row(Some("Need attention"), "CV-104", "overland conveyor, head drive, yard", Mark::Holds, (-22.0, 42.0), Some((-12.0, 33.0))),
            machine_row(None, "SC-220", "primary screen, exciter east, yard", Mark::Tight, (-20.0, 58.0), Some((-11.0, 48.0))),
            machine_row(Some("Settled"), "FN-402", "exhaust fan, hall", Mark::Holds, (-27.0, 55.0), None),
        ],
        band_axis: Some(MiniBand { head: true, ..mini("band-axis", None, None, Mark::Open) }),
        oils: vec![
            OilRow { oil: Phrase::new().tag("SG-220"), name: "PAO EP gear oil VG 220".into(), machines: Phrase::new().tag("CV-104").and(", ").tag("CV-105").and(", ").tag("SC-220"), fill: "152 L".into(), mark: Mark::Tight, tightest: "+0.4 at SC-220".into(), replaces: "MG-220".into() },
            OilRow { oil: Phrase::new().tag("MT-68"), name: "turbine oil VG 68".into(), machines: Phrase::new().tag("FN-402").and(", ").tag("FN-403"), fill: "640 L".into(), mark: Mark::Holds, tightest: "+0.9 at FN-403".into(), replaces: "nothing".into() },
        ],
        lists: Some(ListFigure {
            id: "fig-lists".into(),
            title: "Length of the oil list against machines served".into(),
            description: "3 oils: 10 hold, 3 tight, 1 fails. 4 oils: 11 hold, 3 tight. 5 oils: 13 hold, 1 tight.".into(),
            caption: "One mark a machine, fourteen machines that can be decided.".into(),
            rows: vec![
                ListRow { title: "3 oils".into(), note: "without SG-320".into(), picked: false, counts: [10, 3, 1, 0] },
                ListRow { title: "4 oils".into(), note: "proposed".into(), picked: true, counts: [11, 3, 0, 0] },
                ListRow { title: "5 oils".into(), note: "with SG-150".into(), picked: false, counts: [13, 1, 0, 0] },
            ],
        }),
        list_notes: vec!["Four oils is proven shortest.".into()],
        matrix: vec![Matrix {
            oils: ["MH-46", "VH-46", "MT-68", "SG-150", "MG-220", "SG-220"].map(Into::into).to_vec(),
            rows: ["CV-104", "SC-220"]
                .into_iter()
                .map(|tag| MatrixRow {
                    tag: Phrase::new().tag(tag),
                    cells: vec![
                        cell(None, "barred", "barred: class needed", false, false),
                        cell(None, "·", "not weighed", false, false),
                        cell(None, "·", "not weighed", false, false),
                        cell(Some(Mark::Open), "−0.5", "open ", false, false),
                        cell(Some(Mark::Fails), "−1.0", "in use, fails ", false, true),
                        cell(Some(Mark::Holds), "+0.6", "proposed, holds ", true, false),
                    ],
                })
                .collect(),
        }],
        gaps: {
            let mut gaps = point().gaps;
            gaps.rows[0].machine = Some(Phrase::new().tag("CV-104"));
            gaps.rows.push(GapRow { id: "G-1".into(), machine: Some(Phrase::new().tag("KL-502")), missing: "worm centre distance and speed".into(), plausible: "125 to 200 mm, 600 to 1500 r/min".into(), bar: Some(GapBar { id: "gap-1".into(), low: -1.9, high: 1.4, used: None, reserve: 0.5, span: (-2.0, 2.0), head: false }), range: "−1.9 to +1.4".into(), decides: Phrase::new().strong("which oil at all"), ask: "nameplate, 10 min".into() });
            gaps
        },
        accepted: vec![AcceptRow { machine: Phrase::new().tag("SC-221"), oil: "SG-220".into(), by: "works engineer".into(), dates: "2026-10-05 to 2027-10-04".into(), because: "the screen is stopped below −15 °C".into(), stands: true }],
        notes: Some("Register of **2026-09-28**, 16 rows, all carried.".into()),
        basis: Basis {
            lines: vec!["ISO 281 viscosity ratio, pitch-line rule, makers' limits where given; sources on each sheet.".into(), "Oil lines after ASTM D341. Polymer-thickened oils judged sheared.".into()],
            cautions: vec![CautionNote { id: "C-1".into(), title: "Cold figures are carried on".into(), text: "Ask suppliers for measured values.".into() }],
        },
        sign: sign("SG-220"),
    };
    let mut sheet = sheet("index", "", "Overview", Body::Overview(Box::new(body)));
    sheet.name = "Harrowdale Lime Works".into();
    sheet.title = "Harrowdale Lime Works: oil viscosity review".into();
    sheet.subtitle = "Oil viscosity review, all machines".into();
    sheet.about = "16 machines, 9 oils. Ambient: yard −18 to 36 °C, kiln deck −12 to 48 °C.".into();
    sheet.number = 1;
    sheet
}
