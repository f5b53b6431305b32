//! The shortest oil list: against every list there is on small cases, against an integer program
//! solved by another's code, against the greedy way, and on the demonstration.
//!
//! The cases are generated with verdicts, bars, conditions, acceptances and ring fences; what is
//! right is looked up among all subsets, which is the definition and needs no source.

use crate::chance::Chance;
use crate::scenario::{filmwright, on};
use filmwright::cli::exit::Exit;
use filmwright::cli::host::MemoryHost;
use filmwright::decide::pool::case::in_order;
use filmwright::decide::pool::check::against_places;
use filmwright::decide::pool::search::{Budget, fewest, greedy};
use filmwright::decide::pool::solve::solve;
use filmwright::decide::pool::ties::Ties;
use filmwright::decide::pool::{Fence, Impossible, Offer, Outcome, Place, Terms};
use filmwright::judge::Verdict;
use filmwright::judge::order::{Candidate, compare};
use good_lp::{Expression, ProblemVariables, Solution, SolverModel, constraint, microlp, variable};
use std::collections::BTreeSet;

const NAMES: [&str; 8] = ["H-1", "B-2", "G-3", "A-4", "F-5", "C-6", "E-7", "D-8"];

/// A whole number below another.
fn below(chance: &mut Chance, n: usize) -> usize {
    #[expect(
        clippy::cast_possible_truncation,
        clippy::cast_sign_loss,
        reason = "between 0 and n"
    )]
    let found = chance.between(0.0, n as f64) as usize;
    found.min(n - 1)
}

fn yes(chance: &mut Chance, share: f64) -> bool {
    chance.between(0.0, 1.0) < share
}

/// A point as weighing leaves it: some oils barred, the others with a word and conditions.
fn place(chance: &mut Chance, oils: usize) -> Place {
    let fences = [Fence::NONE, Fence::NONE, Fence::FOOD, Fence::FIRE];
    let fence = fences[below(chance, fences.len())];
    let now = below(chance, oils + 2);
    let mut weighed: Vec<(Candidate<'_>, Offer)> = Vec::new();
    for (oil, id) in NAMES.iter().enumerate().take(oils) {
        let barred = yes(chance, 0.35);
        let words = [
            Verdict::Holds,
            Verdict::Tight,
            Verdict::Fails,
            Verdict::Open,
        ];
        let verdict = words[below(chance, words.len())];
        let cost = yes(chance, 0.85).then(|| 1 + below(chance, 4) as u64);
        let conditions = below(chance, 3);
        if barred || verdict > Verdict::Tight {
            continue;
        }
        let candidate = Candidate {
            verdict,
            in_use: now == oil,
            on_site: true,
            conditions,
            excess: i64::try_from(below(chance, 5)).expect("small"),
            price: None,
            id,
        };
        let offer = Offer {
            oil,
            tight: verdict == Verdict::Tight,
            change: now != oil,
            conditions,
            cost,
        };
        weighed.push((candidate, offer));
    }
    weighed.sort_by(|a, b| compare(&a.0, &b.0));
    let offers = weighed.into_iter().map(|(_, o)| o).collect();
    Place {
        fence,
        offers: in_order(offers, yes(chance, 0.2)),
    }
}

fn terms(chance: &mut Chance, oils: usize) -> Terms {
    let mut some = |share: f64| {
        (0..oils)
            .filter(|_| yes(chance, share))
            .collect::<Vec<usize>>()
    };
    let drop = some(0.06);
    let keep = some(0.06)
        .into_iter()
        .filter(|o| !drop.contains(o))
        .collect();
    Terms {
        keep,
        drop,
        at_most: yes(chance, 0.2).then(|| 1 + below(chance, 4)),
        never_tight: yes(chance, 0.2),
        ..Terms::default()
    }
}

/// Behind which fence a kept oil is counted: where it may serve most places, no fence before one.
fn home(places: &[Place], terms: &Terms, oil: usize, fences: &[Fence]) -> Fence {
    let serves = |f: Fence| {
        let here = places.iter().filter(|p| p.fence == f);
        here.filter(|p| terms.offers(p).iter().any(|o| o.oil == oil))
            .count()
    };
    let most = fences.iter().map(|f| serves(*f)).max().unwrap_or(0);
    if most == 0 || (fences.contains(&Fence::NONE) && serves(Fence::NONE) == most) {
        return Fence::NONE;
    }
    let mut best: Vec<Fence> = fences
        .iter()
        .copied()
        .filter(|f| serves(*f) == most)
        .collect();
    best.sort_unstable();
    best[0]
}

/// Its length, what decides between lists of that length, and its oils by fence.
type Shortest = (usize, Ties, Vec<(Fence, usize)>);

/// What ties are decided by: places whose oil changes with their conditions, then cost, unknown costs last.
fn come_to(offers: &[Vec<Offer>], on: impl Fn(usize) -> bool) -> Ties {
    let taken = || offers.iter().filter_map(|o| o.iter().find(|o| on(o.oil)));
    Ties {
        changes: taken().filter(|o| o.change).count(),
        conditions: taken().map(|o| o.conditions).sum(),
        unpriced: taken().filter(|o| o.cost.is_none()).count(),
        cost: taken().filter_map(|o| o.cost).sum(),
    }
}

/// The best list by looking at every subset, fence by fence; `None` where there is none.
fn by_hand(places: &[Place], oils: usize, terms: &Terms) -> Option<Shortest> {
    let mut fences: Vec<Fence> = places.iter().map(|p| p.fence).collect();
    fences.sort_unstable();
    fences.dedup();
    let mut homes: Vec<(Fence, usize)> = Vec::new();
    for oil in &terms.keep {
        homes.push((home(places, terms, *oil, &fences), *oil));
    }
    if homes.iter().any(|(f, _)| *f == Fence::NONE) && !fences.contains(&Fence::NONE) {
        fences.push(Fence::NONE);
    }
    fences.sort_unstable_by_key(|f| (*f == Fence::NONE, *f));
    let mut stocks: Vec<(Fence, usize)> = Vec::new();
    let mut total = Ties::default();
    for fence in fences {
        let offers: Vec<Vec<Offer>> = places
            .iter()
            .filter(|p| p.fence == fence)
            .map(|p| terms.offers(p))
            .collect();
        let mut best: Option<(usize, Ties, Vec<&str>, u32)> = None;
        for set in 0..1_u32 << oils {
            let on = |oil: usize| set >> oil & 1 == 1;
            let kept = homes.iter().all(|(f, oil)| *f != fence || on(*oil));
            let dropped = terms.drop.iter().any(|oil| on(*oil));
            let serves = offers.iter().all(|o| o.iter().any(|o| on(o.oil)));
            if !kept || dropped || !serves {
                continue;
            }
            let mut names: Vec<&str> = (0..oils).filter(|o| on(*o)).map(|o| NAMES[o]).collect();
            names.sort_unstable();
            let found = (names.len(), come_to(&offers, on), names, set);
            if best.as_ref().is_none_or(|b| found < *b) {
                best = Some(found);
            }
        }
        let (_, tie, _, set) = best?;
        total = total + tie;
        stocks.extend((0..oils).filter(|o| set >> o & 1 == 1).map(|o| (fence, o)));
    }
    Some((stocks.len(), total, stocks))
}

/// The length by an integer program: one variable an oil and fence, one constraint a place.
fn by_program(places: &[Place], oils: usize, terms: &Terms) -> Option<usize> {
    let mut length = 0;
    let mut fences: Vec<Fence> = places.iter().map(|p| p.fence).collect();
    fences.sort_unstable();
    fences.dedup();
    for fence in fences {
        let mut vars = ProblemVariables::new();
        let y: Vec<_> = (0..oils).map(|_| vars.add(variable().binary())).collect();
        let sum: Expression = y.iter().copied().sum();
        let mut model = vars.minimise(sum).using(microlp);
        for place in places.iter().filter(|p| p.fence == fence) {
            let serving: Expression = terms.offers(place).iter().map(|o| y[o.oil]).sum();
            model = model.with(constraint!(serving >= 1));
        }
        let found = model.solve().ok()?;
        length += y.iter().filter(|v| found.value(**v) > 0.5).count();
    }
    Some(length)
}

#[test]
fn three_thousand_small_cases_agree_with_every_list_there_is() {
    let mut chance = Chance::seeded(20_261_201);
    let (mut solved, mut unserved, mut too_short, mut fenced, mut longer_greedy) = (0, 0, 0, 0, 0);
    for case in 0..3_000 {
        let oils = 2 + below(&mut chance, 6);
        let n = 1 + below(&mut chance, 8);
        let places: Vec<Place> = (0..n).map(|_| place(&mut chance, oils)).collect();
        let terms = terms(&mut chance, oils);
        let want = by_hand(&places, oils, &terms);
        match solve(&places, &NAMES[..oils], &terms) {
            Outcome::Solved(found) => {
                let (length, tie, mut stocks) =
                    want.unwrap_or_else(|| panic!("{case}: infeasible"));
                let mut got: Vec<(Fence, usize)> =
                    found.stocks.iter().map(|s| (s.fence, s.oil)).collect();
                got.sort_unstable();
                stocks.sort_unstable();
                assert_eq!(found.bound, length, "{case}: length");
                assert_eq!(found.ties, tie, "{case}: {got:?} against {stocks:?}");
                assert_eq!(got, stocks, "{case}");
                assert!(found.ties_proven && found.greedy >= found.bound, "{case}");
                assert_eq!(against_places(&places, &found, &terms), Ok(()), "{case}");
                assert!(terms.at_most.is_none_or(|most| length <= most), "{case}");
                if terms.keep.is_empty() {
                    let program = by_program(&places, oils, &terms);
                    assert_eq!(program, Some(found.bound), "{case}: integer program");
                }
                solved += 1;
                fenced += usize::from(places.iter().any(|p| p.fence.stands()));
                longer_greedy += usize::from(found.greedy > found.bound);
            }
            Outcome::Impossible(Impossible::Unserved(which)) => {
                assert_eq!(want, None, "{case}");
                for p in which {
                    assert!(terms.offers(&places[p]).is_empty(), "{case}");
                }
                unserved += 1;
            }
            Outcome::Impossible(Impossible::TooShort { wanted, shortest }) => {
                assert_eq!(want.map(|w| w.0), Some(shortest), "{case}");
                assert_eq!(terms.at_most, Some(wanted));
                assert!(wanted < shortest, "{case}");
                too_short += 1;
            }
            Outcome::Gap { .. } => panic!("{case}: small cases are proven"),
        }
    }
    // the generator reaches what it is there for
    assert!(
        solved > 800 && fenced > 600,
        "{solved} solved, {fenced} fenced"
    );
    assert!(
        unserved > 200 && too_short > 50,
        "{unserved} unserved, {too_short} too short"
    );
    assert!(longer_greedy > 0, "the greedy way is never longer");
}

/// Places round a ring, each served by two neighbouring oils: `n` of them take `n / 2`, rounded
/// up, and no reduction goes.
fn ring(n: usize) -> Vec<BTreeSet<usize>> {
    (0..n).map(|i| BTreeSet::from([i, (i + 1) % n])).collect()
}

#[test]
fn a_ring_takes_half_its_oils_and_a_gap_is_told_where_nodes_run_out() {
    for n in 3..12 {
        let mut budget = Budget::of(10_000);
        let length = fewest(ring(n), &mut budget);
        assert_eq!(
            (length.bound, length.list.len()),
            (n.div_ceil(2), n.div_ceil(2))
        );
    }
    let rows: Vec<BTreeSet<usize>> = (0..7)
        .map(|i| {
            (0..7)
                .filter(|o| [0, 1, 3].contains(&((7 + o - i) % 7)))
                .collect()
        })
        .collect();
    // the lines of the projective plane of order 2: every set of points that meets all seven
    // lines has at least three points (a line itself); greedy finds three as well
    let mut budget = Budget::of(10_000);
    assert_eq!(fewest(rows.clone(), &mut budget).bound, 3);
    assert!(greedy(&rows).len() >= 3);
    let mut none = Budget::of(0);
    let length = fewest(rows, &mut none);
    assert!(length.bound <= length.list.len() && length.bound >= 3);
}

#[test]
fn without_nodes_a_gap_stands_in_place_of_an_answer() {
    // triples of six oils such that bounds alone do not prove the length
    let sets: [[usize; 3]; 10] = [
        [0, 1, 2],
        [0, 1, 3],
        [0, 2, 4],
        [0, 3, 5],
        [0, 4, 5],
        [1, 2, 5],
        [1, 3, 4],
        [1, 4, 5],
        [2, 3, 4],
        [2, 3, 5],
    ];
    let places: Vec<Place> = sets
        .iter()
        .map(|set| Place {
            fence: Fence::NONE,
            offers: set
                .iter()
                .map(|oil| Offer {
                    oil: *oil,
                    tight: false,
                    change: true,
                    conditions: 0,
                    cost: Some(1),
                })
                .collect(),
        })
        .collect();
    let few = Terms {
        nodes: 0,
        ..Terms::default()
    };
    let Outcome::Gap {
        bound,
        known,
        nodes,
    } = solve(&places, &NAMES[..6], &few)
    else {
        panic!("a gap is to be told");
    };
    assert!(bound < known && nodes == 0, "{bound} {known}");
    let Outcome::Solved(found) = solve(&places, &NAMES[..6], &Terms::default()) else {
        panic!("solved with nodes");
    };
    assert_eq!(
        Some((found.bound, found.ties)),
        by_hand(&places, 6, &Terms::default()).map(|w| (w.0, w.1))
    );
    assert!(found.bound >= bound && found.bound <= known);
}

/// Between lists of one length: fewest changes from today, then cost, then name, and nothing else.
#[test]
fn ties_go_by_changes_then_cost_then_name() {
    let offer = |oil: usize, change: bool, cost: Option<u64>| Offer {
        oil,
        tight: false,
        change,
        conditions: 0,
        cost,
    };
    let place = |fence: Fence, offers: &[Offer]| Place {
        fence,
        offers: offers.to_vec(),
    };
    // H-1 is 0, B-2 is 1, G-3 is 2
    for (places, want) in [
        // a dearer list that changes nothing today
        (
            vec![place(
                Fence::NONE,
                &[offer(0, true, Some(1)), offer(1, false, Some(9))],
            )],
            vec![1],
        ),
        // as many changes: the cheaper, though its name comes later
        (
            vec![place(
                Fence::NONE,
                &[offer(1, true, Some(9)), offer(0, true, Some(1))],
            )],
            vec![0],
        ),
        // an unknown cost is not a low one
        (
            vec![place(
                Fence::NONE,
                &[offer(1, true, None), offer(0, true, Some(1))],
            )],
            vec![0],
        ),
        // the same cost: the name
        (
            vec![place(
                Fence::NONE,
                &[offer(0, true, Some(4)), offer(2, true, Some(4))],
            )],
            vec![2],
        ),
        // the cheaper oil, though it stands on the other side of a fence as well: there it is
        // bought a second time
        (
            vec![
                place(Fence::FOOD, &[offer(0, true, Some(2))]),
                place(
                    Fence::NONE,
                    &[offer(1, true, Some(9)), offer(0, true, Some(1))],
                ),
            ],
            vec![0, 0],
        ),
    ] {
        let Outcome::Solved(found) = solve(&places, &NAMES[..3], &Terms::default()) else {
            panic!("solved");
        };
        let oils: Vec<usize> = found.stocks.iter().map(|s| s.oil).collect();
        assert_eq!(oils, want, "{places:?}");
        assert_eq!(found.bound, want.len());
    }
}

#[test]
fn the_demonstration_is_consolidated_and_says_what_it_costs() {
    let ran = filmwright("pool --demo -q");
    assert_eq!(ran.exit, Exit::Done, "{}", ran.err);
    let first = ran.out.lines().next().unwrap_or("");
    assert!(first.starts_with("this list costs more"), "{first}");
    let json = filmwright("pool --demo -q -f json").json();
    assert_eq!(json["proven"], true);
    assert_eq!(json["bound"], json["oils"].as_array().map_or(0, Vec::len));
    let today = json["today"]["oils"].as_array().map_or(0, Vec::len);
    assert!(json["bound"].as_u64().unwrap_or(99) < today as u64);
    // the choices that come with the invented works
    let picks = json["assignments"].as_array().expect("a list");
    for (machine, oil) in [
        ("M01", "O-16"),
        ("M03", "O-12"),
        ("M04", "O-12"),
        ("M05", "O-14"),
        ("M07", "O-08"),
        ("M08", "O-16"),
        ("M10", "O-08"),
    ] {
        let found = picks
            .iter()
            .find(|p| p["machine"] == machine)
            .expect("assigned");
        assert_eq!(found["oil"], oil, "{machine}");
    }
    // nothing is bought as one for two sides of a fence: such an oil stands on the list twice
    let mut stocks: Vec<String> = picks
        .iter()
        .map(|p| format!("{} {}", p["fence"], p["oil"]))
        .collect();
    stocks.sort();
    stocks.dedup();
    assert_eq!(json["bound"], stocks.len());
    let told = ran.out.replace('\n', " ");
    for words in [
        "9 oils cover all 16 lubrication points",
        "O-16 stands on the list twice",
        "today 11 061 cu a year, this list 32 940 cu; 3741 L a year",
        "5699 L to be filled",
    ] {
        assert!(told.contains(words), "{words}: {}", ran.out);
    }
}

#[test]
fn terms_that_cannot_be_kept_are_named() {
    for (arguments, exit, words) in [
        (
            "pool --demo -q --at-most 2",
            Exit::NoMatch,
            "[list-impossible]",
        ),
        (
            "pool --demo -q --drop O-14",
            Exit::NoMatch,
            "M05 has no oil left with --drop O-14",
        ),
        ("pool --demo -q --never-tight", Exit::NoMatch, "M01"),
        (
            "pool --demo -q --keep O-99",
            Exit::NoMatch,
            "no oil matches 'O-99'",
        ),
        (
            "pool --demo -q --keep O-13 --drop O-13",
            Exit::Usage,
            "both kept and dropped",
        ),
        ("pool --demo -q --at-most 0", Exit::Usage, "leaves no oil"),
        (
            "pool --demo -q --site-price -5",
            Exit::Usage,
            "--site-price",
        ),
        ("pool M02 --demo -q", Exit::NoMatch, "[nothing-decided]"),
        (
            "pool --demo -q --drop O-*",
            Exit::NoMatch,
            "M06, M07 and 8 more have no oil left with --drop O-01",
        ),
        // the terms can be kept, and the list is longer than it need be
        (
            "pool --demo --keep O-03",
            Exit::Done,
            "O-03 is kept and serves nothing: it is barred on 9 of 17",
        ),
    ] {
        let ran = filmwright(arguments);
        assert_eq!(ran.exit, exit, "{arguments}: {}", ran.err);
        assert!(ran.err.contains(words), "{arguments}: {}", ran.err);
    }
    let site = "file: site 1\nmachines:\n  M1:\n    ambient: -5 .. 35 degC\n    sump rise: 30 K\n    lubrication: splash\n    parts:\n      - rolling bearing: 22220\n        speed: 236 r/min\n";
    for (command, exit, words) in [
        (
            "pool",
            Exit::NoMatch,
            "no list can be made: the oil list holds no oil",
        ),
        (
            "weigh",
            Exit::Done,
            "nothing weighed: the oil list holds no oil",
        ),
        ("gaps", Exit::Done, "the oil list holds no oil"),
        ("mend M1 X", Exit::NoMatch, "no oil matches 'X'"),
        (
            "whatif M1 --set \"sump rise=40 K\"",
            Exit::Done,
            "nothing weighed: the oil list",
        ),
    ] {
        let host = MemoryHost::new().with("site.yaml", site);
        let ran = on(host, command);
        assert_eq!(ran.exit, exit, "{command}: {}", ran.err);
        let told = format!("{}{}", ran.out, ran.err);
        assert!(told.contains(words), "{command}: {told}");
        assert!(told.contains("[nothing-to-weigh]"), "{command}: {told}");
    }
}

#[test]
fn an_oil_kept_is_on_the_list_and_one_dropped_is_not() {
    let json = filmwright("pool --demo -q -f json --keep O-24 --drop O-13").json();
    let oils: Vec<&str> = json["oils"].as_array().map_or(Vec::new(), |l| {
        l.iter().filter_map(|o| o["oil"].as_str()).collect()
    });
    assert!(
        oils.contains(&"O-24") && !oils.contains(&"O-13"),
        "{oils:?}"
    );
}

#[test]
fn an_acceptance_that_ran_out_is_told_and_reopens_the_machine() {
    let site = "file: site 1\nsite: Small\nareas:\n  yard:\n    ambient: -10 .. 30 degC\nmachines:\n  G-1:\n    area: yard\n    lubrication: splash\n    oil now: A-220\n    sump rise: 45 K\n    floor: 51 mm2/s, maker\n    start limit: 40000 mm2/s, maker\n    parts:\n      - gear mesh: stage\n        pitch-line speed: 9 m/s\naccept:\n  - machine: G-1\n    oil: A-220\n    by: works engineer\n    on: 2026-01-10\n    until: 2026-12-31\n    because: low load\n";
    let oils = "file: oils 1\nA-220:\n  kind: gear\n  base: mineral I\n  viscosity: [220 mm2/s at 40 degC, 19 mm2/s at 100 degC]\n  pour point: -24 degC\n";
    let host = || {
        MemoryHost::new()
            .with("site.yaml", site)
            .with("oils.yaml", oils)
    };
    let inside = on(host(), "check --on 2026-06-01");
    let after = on(host(), "check --on 2027-06-01");
    assert!(!inside.err.contains("[accept-expired]"), "{}", inside.err);
    assert!(after.err.contains("[accept-expired]"), "{}", after.err);
    assert!(after.err.contains("ran out on 2026-12-31"), "{}", after.err);
}

#[test]
fn the_overview_draws_the_lists_and_says_what_they_cost() {
    let page = filmwright("report --demo --one-file -o - -q").out;
    assert!(
        page.contains("How many lubrication points each oil list serves"),
        "the figure"
    );
    assert!(
        page.contains("The shortest list costs more:"),
        "the cost first"
    );
    assert!(
        page.contains("Proven: no list is shorter than 9."),
        "the bound"
    );
}
