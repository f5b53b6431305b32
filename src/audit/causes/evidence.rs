//! What speaks for a cause and against it, figure by figure.

use super::Cause;
use super::grid::share_by_viscosity;
use super::likelihood::{Sample, Seen, apart, expected};
use super::theta::Theta;
use crate::audit::profile::{Profile, index};
use crate::model::sample::Reading;
use crate::numeric::math::{exp, ln};
use crate::quantity::show::{Toward, fixed, significant};

/// One line of evidence.
#[derive(Clone, Debug, PartialEq)]
pub struct Evidence {
    /// The reading or fact it rests on, by its key.
    pub on: String,
    /// In words, with the figures.
    pub says: String,
    /// How much it weighs: positive for the cause, negative against it.
    pub weight: f64,
}

impl Evidence {
    pub(super) fn speaks_for(on: &str, says: String, weight: f64) -> Self {
        Self {
            on: on.to_owned(),
            says,
            weight: weight.abs(),
        }
    }

    pub(super) fn against(on: &str, says: String, weight: f64) -> Self {
        Self {
            on: on.to_owned(),
            says,
            weight: -weight.abs(),
        }
    }
}

/// A movement of more than so many standard deviations counts against what expects another.
const FAR: f64 = 2.0;

fn per_cent(d: f64) -> String {
    let change = 100.0 * (exp(d) - 1.0);
    let text = fixed(change, 1, Toward::Nearest);
    if change > 0.0 && text != "0.0" {
        format!("+{text} %")
    } else {
        format!("{text} %")
    }
}

/// The evidence for a setting of a cause, beside what the unchanged oil would show.
pub(super) fn of(cause: Cause, theta: &Theta, sample: &Sample, label: &Profile) -> Vec<Evidence> {
    let none = Theta::none();
    let mut list = viscosity(theta, &none, sample, label);
    list.extend(vi(cause, theta, sample, label));
    for seen in sample.others.iter().chain(&sample.additive) {
        list.push(figure(seen, theta, &none));
    }
    list.extend(mixture(theta, sample, label));
    list
}

fn viscosity(theta: &Theta, none: &Theta, sample: &Sample, label: &Profile) -> Vec<Evidence> {
    let mut list = Vec::new();
    for (i, reading) in [Reading::Nu40, Reading::Nu100].into_iter().enumerate() {
        let Some((d, variance)) = sample.nu[i] else {
            continue;
        };
        let spread = |t: &Theta| (variance + sample.common + t.spread * t.spread).sqrt();
        let (z, z0) = (
            (d - theta.d[i]) / spread(theta),
            (d - none.d[i]) / spread(none),
        );
        let new = if i == 0 { label.nu40() } else { label.nu100() };
        let says = format!(
            "{} {} against new oil ({} mm2/s); about {} expected",
            reading.says(),
            per_cent(d),
            significant(new, 3, Toward::Nearest),
            per_cent(theta.d[i])
        );
        list.push(line(
            reading,
            says,
            z,
            z0,
            (theta.d[i] - none.d[i]).abs() > 0.01,
        ));
    }
    list
}

/// The index counts by how the two viscosities moved together.
fn vi(cause: Cause, theta: &Theta, sample: &Sample, label: &Profile) -> Option<Evidence> {
    let ([Some((a, _)), Some((b, _))], Some(vi)) = (sample.nu, label.vi) else {
        return None;
    };
    let found = index(label.nu40() * exp(a), label.nu100() * exp(b))?;
    let wanted = index(
        label.nu40() * exp(theta.d[0]),
        label.nu100() * exp(theta.d[1]),
    )?;
    let whole = |v: f64| fixed(v, 0, Toward::Nearest);
    let says = format!(
        "VI {} against {} of new oil; about {} expected of {}",
        whole(found),
        whole(vi),
        whole(wanted),
        cause.says()
    );
    let (moved, expected) = (found - vi, wanted - vi);
    let off = (moved - expected).abs();
    if off <= 5.0_f64.max(0.35 * expected.abs()) {
        Some(Evidence::speaks_for(
            "VI",
            says,
            if expected.abs() > 4.0 { 1.0 } else { 0.3 },
        ))
    } else {
        Some(Evidence::against("VI", says, (off / 6.0).min(4.0)))
    }
}

fn figure(seen: &Seen, theta: &Theta, none: &Theta) -> Evidence {
    let (mean, _) = expected(seen, theta);
    let (unmoved, _) = expected(seen, none);
    let (z, z0) = (apart(seen, theta), apart(seen, none));
    let digits = |v: f64| match seen.reading {
        Reading::AcidNumber => fixed(v, 2, Toward::Nearest),
        Reading::Flash | Reading::Density => fixed(v, 0, Toward::Nearest),
        Reading::Fuel | Reading::Oxidation => fixed(v, 1, Toward::Nearest),
        _ => significant(v.max(0.0), 2, Toward::Nearest),
    };
    let unit = match seen.reading.unit() {
        "" => "per cm",
        unit => unit,
    };
    let says = format!(
        "{} {} {unit}, new {}; about {} expected",
        seen.reading.says(),
        digits(seen.value),
        digits(seen.new),
        digits(mean.max(if seen.reading == Reading::Flash {
            -60.0
        } else {
            0.0
        }))
    );
    let differs = (mean - unmoved).abs() > 1.0 * (seen.sigma + 0.3 * seen.spread).max(1e-9);
    line(seen.reading, says, z, z0, differs)
}

/// For where the cause explains what unchanged oil would not; against where it expects another
/// figure; a figure that stays as the cause leaves it counts a little.
fn line(reading: Reading, says: String, z: f64, z0: f64, differs: bool) -> Evidence {
    let gain = 4.0 * (ln(1.0 + z0 * z0 / 7.0) - ln(1.0 + z * z / 7.0));
    if z.abs() > FAR {
        Evidence::against(reading.key(), says, (0.5 * z * z).min(8.0))
    } else if differs && gain > 0.3 {
        Evidence::speaks_for(reading.key(), says, gain)
    } else if differs && gain < -0.3 {
        Evidence::against(reading.key(), says, -gain)
    } else {
        Evidence::speaks_for(reading.key(), says, 0.2)
    }
}

/// The likely share of another oil, by the blend relation and by its elements.
fn mixture(theta: &Theta, sample: &Sample, label: &Profile) -> Vec<Evidence> {
    let Some(mixed) = &theta.mixed else {
        return Vec::new();
    };
    let share = |x: f64| fixed(100.0 * x, 0, Toward::Nearest);
    let mut list = Vec::new();
    let says_oil = &mixed.says;
    if let Some((d, _)) = sample.nu[0]
        && let Some(x) = share_by_viscosity(label, &mixed.profile, label.nu40() * exp(d))
    {
        let says = format!(
            "{says_oil}: a share of about {} % gives this viscosity at 40 degC (blend relation)",
            share(x)
        );
        list.push(Evidence::speaks_for("blend", says, 0.1));
    }
    for seen in &sample.additive {
        let Some(other) = mixed.profile.figures.get(&seen.reading) else {
            continue;
        };
        if (other.value - seen.new).abs() < 30.0 {
            continue;
        }
        let x = (seen.value - seen.new) / (other.value - seen.new);
        if (0.0..=1.2).contains(&x) && mixed.oil.is_some() {
            let says = format!(
                "{says_oil}: a share of about {} % gives this {}",
                share(x.min(1.0)),
                seen.reading.says()
            );
            list.push(Evidence::speaks_for(seen.reading.key(), says, 0.1));
        }
    }
    list
}
