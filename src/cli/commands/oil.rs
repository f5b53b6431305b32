//! `oil`: one oil: its line, its grades, what it shears to, how far its data carry; a blend of it.

use crate::cli::exit::Exit;
use crate::cli::load::Loaded;
use crate::cli::session::Session;
use crate::cli::text_of::oil::{blend_text, machines_text, text};
use crate::cli::{Format, Oil};
use crate::oil::blend::{Blend, NoBlend, share_for};
use crate::oil::sheet::{OilSheet, sheet};
use crate::quantity::parse::parse;
use crate::quantity::{Kind, KinematicViscosity, Measure, Ratio, ThermodynamicTemperature};
use crate::results::csv::Table;
use crate::results::oil::{BlendResult, Target, Told, document_of, table_of};
use crate::weighing::top_up::TopUp;
use crate::weighing::uses::OilUse;
use crate::weighing::{Scales, Settings};

/// Runs `oil`.
pub fn oil(session: &mut Session<'_>, args: &Oil) -> Exit {
    match run(session, args) {
        Ok(exit) | Err(exit) => exit,
    }
}

fn run(session: &mut Session<'_>, args: &Oil) -> Result<Exit, Exit> {
    let asked = args
        .at
        .iter()
        .map(|t| temperature(session, "--at", t))
        .collect::<Result<Vec<_>, _>>()?;
    let share = match &args.share {
        Some(text) => Some(share_of(session, text)?),
        None => None,
    };
    let target = match &args.target {
        Some(text) => Some(target_of(session, text)?),
        None => None,
    };
    if args.with.is_some() && share.is_none() && target.is_none() {
        session.fail(
            "how much of the other oil is not said\n  write  --share \"30 %\"  or  --target \"46 mm2/s at 40 degC\"",
        );
        return Err(Exit::Usage);
    }
    let loaded = session.load(None)?;
    let settings: Settings = session.settings(true)?;
    let wanted = session.oils(&loaded.site, std::slice::from_ref(&args.oil))?;
    let scales = Scales::new(&loaded.site, &loaded.rules, settings)
        .map_err(|(oil, misfit)| session.misfit(&oil, &misfit))?;
    let asking = Asking {
        asked,
        share,
        target,
    };
    let mut all = Vec::new();
    for oil in wanted.unwrap_or_default() {
        all.push(answer(session, args, &scales, &asking, oil)?);
    }
    Ok(print(session, args, &loaded, &all))
}

/// What was asked on the command line, read.
struct Asking {
    asked: Vec<ThermodynamicTemperature>,
    share: Option<Ratio>,
    target: Option<(KinematicViscosity, ThermodynamicTemperature)>,
}

/// Everything about one oil.
struct Answer {
    sheet: OilSheet,
    uses: Vec<OilUse>,
    with: Option<String>,
    blend: Option<Result<Blend, NoBlend>>,
    target: Option<Target>,
    top_ups: Vec<TopUp>,
}

impl Answer {
    fn blend(&self) -> Option<BlendResult<'_>> {
        self.with.as_ref().map(|with| BlendResult {
            with,
            blend: self.blend.as_ref(),
            machines: &self.top_ups,
            target: self.target.as_ref(),
        })
    }
}

fn answer(
    session: &mut Session<'_>,
    args: &Oil,
    scales: &Scales<'_>,
    asking: &Asking,
    oil: usize,
) -> Result<Answer, Exit> {
    let stated = &scales.site.oils[oil];
    let sheet = sheet(stated, scales.rules, &asking.asked)
        .map_err(|misfit| session.misfit(&stated.id, &misfit))?;
    let mut answer = Answer {
        sheet,
        uses: if args.machines {
            scales.uses(oil)
        } else {
            scales.uses_today(oil)
        },
        with: args.with.clone(),
        blend: None,
        target: None,
        top_ups: Vec::new(),
    };
    if let Some(with) = &args.with {
        blended(session, args, scales, asking, (oil, with), &mut answer)?;
    }
    Ok(answer)
}

fn blended(
    session: &mut Session<'_>,
    args: &Oil,
    scales: &Scales<'_>,
    asking: &Asking,
    (oil, with): (usize, &String),
    answer: &mut Answer,
) -> Result<(), Exit> {
    let others = session.oils(scales.site, std::slice::from_ref(with))?;
    let [other] = others.unwrap_or_default()[..] else {
        session.fail(&format!(
            "--with {with} names several oils\n  write  --with and the id of one oil"
        ));
        return Err(Exit::Usage);
    };
    answer.with = Some(scales.site.oils[other].id.clone());
    if let Some(share) = asking.share {
        let blend = scales.blend(oil, other, share, &asking.asked);
        if let Ok(blend) = &blend {
            let points = if args.at_machine.is_empty() {
                scales.holding(oil)
            } else {
                session.points(scales.site, &args.at_machine)?
            };
            let tops = points.into_iter();
            answer.top_ups = tops
                .map(|p| scales.top_up(p, (oil, other), blend))
                .collect();
        }
        answer.blend = Some(blend);
    }
    answer.target = asking.target.map(|(nu, at)| Target {
        nu,
        at,
        share: share_for(
            scales.component(oil),
            scales.component(other),
            nu,
            at,
            scales.rules,
        ),
    });
    Ok(())
}

fn print(session: &mut Session<'_>, args: &Oil, loaded: &Loaded, all: &[Answer]) -> Exit {
    let units = session.units();
    match session.shared.format {
        Format::Json => {
            let head = session.head(loaded);
            let blends: Vec<Option<BlendResult<'_>>> = all.iter().map(Answer::blend).collect();
            let told: Vec<Told<'_>> = all
                .iter()
                .zip(&blends)
                .map(|(a, blend)| Told {
                    sheet: &a.sheet,
                    uses: &a.uses,
                    blend: blend.as_ref(),
                })
                .collect();
            session.result(&document_of(&told, &head, units))
        }
        Format::Csv => {
            let sheets: Vec<&OilSheet> = all.iter().map(|a| &a.sheet).collect();
            let table: Table = table_of(&sheets, units);
            session.table(&table)
        }
        Format::Text => {
            let (width, marks) = (session.width(), session.marks());
            let texts: Vec<String> = all
                .iter()
                .map(|a| match a.blend() {
                    // the answer asked for comes first: the blend, then nothing else
                    Some(blend) => blend_text(&blend, units, marks, width),
                    None => {
                        let mut out = text(&a.sheet, units, width);
                        out.push_str(&machines_text(&a.uses, units, marks, width));
                        out
                    }
                })
                .collect();
            if let [one] = all
                && args.with.is_none()
                && !args.machines
            {
                let demo = if session.shared.demo { " --demo" } else { "" };
                let id = &one.sheet.id;
                session.note(&format!("next: filmwright oil {id} --machines{demo}"));
            }
            session.result(&texts.join("\n"))
        }
    }
}

fn temperature(
    session: &mut Session<'_>,
    flag: &str,
    text: &str,
) -> Result<ThermodynamicTemperature, Exit> {
    quantity(session, flag, text, "-15 degC")
}

fn share_of(session: &mut Session<'_>, text: &str) -> Result<Ratio, Exit> {
    let share: Ratio = quantity(session, "--share", text, "\"30 %\"")?;
    if (0.0..=1.0).contains(&share.base()) {
        return Ok(share);
    }
    session.fail(&format!(
        "--share {text} is no share: it lies between 0 and 100 %\n  write  --share \"30 %\""
    ));
    Err(Exit::Usage)
}

fn target_of(
    session: &mut Session<'_>,
    text: &str,
) -> Result<(KinematicViscosity, ThermodynamicTemperature), Exit> {
    let Some((nu, at)) = text.split_once(" at ") else {
        session.fail(&format!(
            "--target {text} has no temperature\n  write  --target \"46 mm2/s at 40 degC\""
        ));
        return Err(Exit::Usage);
    };
    let nu = quantity(session, "--target", nu, "\"46 mm2/s at 40 degC\"")?;
    Ok((
        nu,
        quantity(session, "--target", at, "\"46 mm2/s at 40 degC\"")?,
    ))
}

fn quantity<Q: Measure>(
    session: &mut Session<'_>,
    flag: &str,
    text: &str,
    example: &str,
) -> Result<Q, Exit> {
    let kind: Kind = Q::KIND;
    let read = parse(kind, text.trim()).map_err(|bad| bad.to_string());
    match read.map(|r| r.amount.as_measure()) {
        Ok(Some(q)) => Ok(q),
        Ok(None) => Err(wrong(session, flag, text, "it is of another kind", example)),
        Err(why) => Err(wrong(session, flag, text, &why, example)),
    }
}

fn wrong(session: &mut Session<'_>, flag: &str, text: &str, why: &str, example: &str) -> Exit {
    session.fail(&format!("{flag} {text}: {why}\n  write  {flag} {example}"));
    Exit::Usage
}
