//! The other figures of an oil.

use crate::input::fields::words::parted;
use crate::input::fields::{Fields, Slot, quantities};
use crate::input::keys::Form;
use crate::input::keys::form::TEMPERATURE;
use crate::input::points;
use crate::input::reader::Reader;
use crate::input::value::{self, Body, Fault, Mend, Want};
use crate::model::machine::InputLine;
use crate::model::oil::{Cup, DynamicPoint, Oil, Polymer, Price, Viscosity};
use crate::model::stated::Bound;
use crate::problem::{Code, Write, suggest};
use crate::quantity::convert::{to_celsius, to_mm2_s};
use crate::quantity::{MassDensity, Measure, ThermodynamicTemperature};
use crate::relation::oil::base_stock::BaseStock;
use crate::source::place::Given;

/// Base stock and polymer: `mineral, polymer-thickened`.
pub(super) fn base(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
) -> (Option<Given<BaseStock>>, Polymer) {
    let mut polymer = Polymer::NotSaid;
    let Some(slot) = fields.get("base") else {
        return (None, polymer);
    };
    let Some(text) = slot.text(reader) else {
        return (None, polymer);
    };
    let (head, clauses) = parted(text);
    let mut found = None;
    for piece in head.split(',').map(str::trim).filter(|p| !p.is_empty()) {
        match piece.to_lowercase().as_str() {
            "polymer-thickened" | "polymer thickened" => polymer = Polymer::Thickened,
            "no polymer" => polymer = Polymer::Free,
            _ => {
                let known = BaseStock::WRITTEN;
                let stock = known.iter().find(|(w, _)| w.eq_ignore_ascii_case(piece));
                match stock {
                    Some((_, stock)) if found.is_none() => found = Some(*stock),
                    _ => base_unknown(reader, slot, piece),
                }
            }
        }
    }
    let given = found.map(|stock| Given::new(stock, head.clone(), slot.origin(&clauses)));
    (given, polymer)
}

/// Names of base stocks in other customs.
const OTHER_BASES: &[(&str, &[&str])] = &[
    ("PAG", &["PAG water-soluble", "PAG oil-soluble"]),
    ("polyglycol", &["PAG water-soluble", "PAG oil-soluble"]),
    (
        "polyalkylene glycol",
        &["PAG water-soluble", "PAG oil-soluble"],
    ),
    ("group I", &["mineral I"]),
    ("group II", &["mineral II"]),
    ("group III", &["mineral III"]),
    ("group IV", &["PAO"]),
    ("hydrocracked", &["mineral III"]),
    ("polyalphaolefin", &["PAO"]),
    ("synthetic", &["PAO", "ester"]),
    ("synthetic hydrocarbon", &["PAO"]),
    ("rapeseed", &["vegetable"]),
    ("HFC", &["water-glycol"]),
    ("HFD-R", &["phosphate ester"]),
];

fn base_unknown(reader: &mut Reader<'_>, slot: &Slot<'_>, piece: &str) {
    let text = slot.node.text().unwrap_or("");
    let at = text
        .find(piece)
        .map_or(0..text.len(), |at| at..at + piece.len());
    let names = BaseStock::WRITTEN.iter().map(|(w, _)| *w);
    let polymer = ["polymer-thickened", "no polymer"];
    let meant = suggest::certain(piece, names.chain(polymer));
    let mut fault = Fault::new(
        Code::BaseUnknown,
        format!("base \"{piece}\" not known"),
        at.clone(),
    )
    .why("mineral I, II or III, naphthenic, PAO, ester, PAG water-soluble or oil-soluble, alkylated naphthalene, silicone, PFPE, vegetable, phosphate ester, water-glycol; behind a comma polymer-thickened or no polymer");
    let other = OTHER_BASES
        .iter()
        .find(|(w, _)| w.eq_ignore_ascii_case(piece));
    let meant = meant.filter(|_| other.is_none());
    let proposals: Vec<&str> = match (other, meant) {
        (Some((_, ours)), _) => ours.to_vec(),
        (None, Some(meant)) => vec![meant],
        (None, None) => Vec::new(),
    };
    if proposals.is_empty() {
        let mend = Mend::new(at, "mineral").remark("or the right base");
        fault = fault.mend(mend);
    } else {
        for proposal in proposals {
            fault = fault.mend(Mend::new(at.clone(), proposal));
        }
    }
    let mut problem = reader.carried(slot.node, fault, &slot.within);
    problem.did_you_mean = meant.map(str::to_owned);
    reader.report(problem);
}

/// A quantity with the temperature it holds at.
pub(super) fn beside<Q: Measure>(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    name: &str,
) -> Option<Given<(Q, ThermodynamicTemperature)>> {
    let slot = fields.get(name)?;
    let value = slot.value(reader)?;
    let origin = slot.origin(&value.clauses);
    match value.body {
        Body::One {
            read, at: Some(at), ..
        } => {
            let pair = (read.amount.as_measure()?, at.amount.as_measure()?);
            Some(Given::new(pair, value.written, origin))
        }
        _ => None,
    }
}

/// A density carried to 15 °C by the law of the base: one step of a fixed point is exact for the
/// linear laws and within 1e-6 for the tables at any temperature a sheet states.
pub(super) fn at_15(
    (rho, at): (MassDensity, ThermodynamicTemperature),
    stock: BaseStock,
) -> MassDensity {
    let law = stock.density_law();
    let mut rho15 = rho;
    for _ in 0..8 {
        let there = law.density(rho15, at);
        rho15 = MassDensity::from_base(rho15.base() * rho.base() / there.base());
    }
    rho15
}

/// Measured cold viscosities.
pub(super) fn cold(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    name: &str,
) -> Vec<Given<DynamicPoint>> {
    fields
        .get(name)
        .map(|slot| points::read_cold(reader, slot))
        .unwrap_or_default()
}

const FLASH: Want = Want::one(TEMPERATURE).or_bound();

/// A flash point with its cup: `230 degC COC`.
pub(super) fn flash(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
) -> Option<(Given<Bound<ThermodynamicTemperature>>, Option<Cup>)> {
    let slot = fields.get("flash point")?;
    let text = slot.text(reader)?;
    let cups = [("COC", Cup::Open), ("PMCC", Cup::Closed)];
    let mut rest = text.to_owned();
    let mut cup = None;
    for (word, which) in cups {
        if let Some(at) = text.find(word) {
            // Blanks keep the bytes of what stands behind in place.
            let before = text[..at].trim_end().trim_end_matches(',').len();
            let blank = " ".repeat(at + word.len() - before);
            rest = format!("{}{blank}{}", &text[..before], &text[at + word.len()..]);
            cup = Some(which);
        }
    }
    match value::read(&rest, &FLASH) {
        Ok(value) => Some((quantities::bound_of(slot, value)?, cup)),
        Err(faults) => {
            reader.faults(slot.node, faults, &slot.within);
            None
        }
    }
}

/// A price: `3.10 per L`.
pub(super) fn price(reader: &mut Reader<'_>, fields: &Fields<'_>) -> Option<Given<Price>> {
    let slot = fields.get("price")?;
    let text = slot.text(reader)?;
    let (head, clauses) = parted(text);
    match read_price(&head) {
        Ok(price) => Some(Given::new(price, head, slot.origin(&clauses))),
        Err(fault) => {
            reader.faults(slot.node, vec![fault], &slot.within);
            None
        }
    }
}

fn read_price(head: &str) -> Result<Price, Fault> {
    let all = 0..head.len();
    let bad = |message: String| {
        Fault::new(Code::PriceForm, message, all.clone())
            .why("a price is written for a litre or a kilogram, as 3.10 per L")
    };
    let (number, per) = match head.split_once(" per ").or_else(|| head.split_once('/')) {
        Some((number, per)) => (number.trim(), per.trim()),
        None => (head, ""),
    };
    let figures: String = number
        .chars()
        .take_while(|c| c.is_ascii_digit() || matches!(c, '.' | ','))
        .collect();
    let value = figures.parse::<f64>().ok().filter(|v| v.is_finite());
    let Some(value) = value else {
        let point = figures.replacen(',', ".", 1);
        if point.parse::<f64>().is_ok() {
            let instead = head.replacen(&figures, &point, 1);
            let fault = Fault::new(
                Code::DecimalComma,
                format!("\"{head}\" has a decimal comma"),
                all.clone(),
            );
            return Err(fault.mend(Mend::new(all, instead)));
        }
        let mend = Mend::new(all.clone(), "3.10 per L").remark("with the right figure");
        return Err(bad(format!("\"{head}\" is not a price")).mend(mend));
    };
    match per {
        "L" | "l" | "litre" | "liter" => Ok(Price::PerLitre(value)),
        "kg" => Ok(Price::PerKilogram(value)),
        _ => Err(bad(format!("\"{head}\" does not say for how much"))
            .mend(Mend::new(all.clone(), format!("{figures} per L")))
            .mend(Mend::new(all, format!("{figures} per kg")))),
    }
}

/// Every value as written, in file order.
pub(super) fn inputs(reader: &Reader<'_>, fields: &Fields<'_>) -> Vec<InputLine> {
    fields
        .in_file_order()
        .into_iter()
        .filter(|slot| !matches!(slot.key.name, "like" | "name"))
        .map(|slot| slot.input_line(reader.set, None))
        .collect()
}

/// What can be, but rarely is.
pub(super) fn unusual(reader: &mut Reader<'_>, fields: &Fields<'_>, oil: &Oil) {
    if let Some(pour) = &oil.pour_point {
        let pour_c = to_celsius(pour.value.figure());
        if pour_c > 30.0 {
            let why = "most oils still pour at 0 °C; has the minus sign been lost?";
            let minus = format!("-{}", pour.written);
            say_unusual(reader, fields, "pour point", why, Some(minus));
        }
    }
    if let Viscosity::Points { points, .. } = &oil.viscosity {
        let odd = points.iter().any(|p| {
            let nu = to_mm2_s(p.nu.value);
            !(0.3..=200_000.0).contains(&nu)
        });
        if odd {
            let why = "oils lie between 1 and 50 000 mm2/s at the temperatures of data sheets";
            say_unusual(reader, fields, "viscosity", why, None);
        }
    }
    if let Some(density) = &oil.density {
        let rho = density.value.0.base();
        if !(700.0..=2100.0).contains(&rho) {
            let why = "lubricants lie between 780 and 1950 kg/m3";
            say_unusual(reader, fields, "density", why, None);
        }
    }
    if let Some(vi) = &oil.vi
        && !(-100.0..=450.0).contains(&vi.value.base())
    {
        let why = "viscosity indices lie between -50 and 400";
        say_unusual(reader, fields, "VI", why, None);
    }
}

/// Warns of a value that is kept.
pub(in crate::input) fn say_unusual(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    name: &str,
    why: &str,
    instead: Option<String>,
) {
    let Some(slot) = fields.get(name) else { return };
    debug_assert!(!matches!(slot.key.form, Form::Record(_)));
    let mut problem = reader
        .at(
            Code::ValueUnusual,
            "unusual value, kept",
            slot.node.span,
            &slot.within,
        )
        .why(why);
    if let Some(instead) = instead {
        problem = problem.write(Write::edit(slot.node.span, instead).remark("if that was meant"));
    }
    reader.report(problem);
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::convert::celsius;

    #[test]
    fn prices_are_for_a_litre_or_a_kilogram() {
        assert_eq!(read_price("3.10 per L"), Ok(Price::PerLitre(3.10)));
        assert_eq!(read_price("3.10 EUR/L"), Ok(Price::PerLitre(3.10)));
        assert_eq!(read_price("12 per kg"), Ok(Price::PerKilogram(12.0)));
        for (text, code) in [
            ("3.10", Code::PriceForm),
            ("3,10 per L", Code::DecimalComma),
            ("cheap", Code::PriceForm),
        ] {
            let fault = read_price(text).expect_err(text);
            assert_eq!(fault.code, code);
            for mend in &fault.mends {
                assert!(read_price(&mend.applied(text)).is_ok(), "{text}");
            }
        }
    }

    #[test]
    fn a_density_at_another_temperature_is_carried_to_15_degrees() {
        for stock in [
            BaseStock::MineralI,
            BaseStock::PagWaterSoluble,
            BaseStock::Pfpe,
        ] {
            let rho15 = MassDensity::from_base(900.0);
            let at = celsius(60.0);
            let there = stock.density_law().density(rho15, at);
            let back = at_15((there, at), stock).base();
            assert!((back - 900.0).abs() < 1e-6, "{stock:?}: {back}");
        }
    }
}
