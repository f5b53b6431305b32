//! Rolling bearings, by designation or by their sizes.

use super::cleanliness;
use crate::input::fields::words::parted;
use crate::input::fields::{Fields, Slot};
use crate::input::keys::part::BEARING_SIZES;
use crate::input::reader::Reader;
use crate::input::site::Scene;
use crate::model::part::{BearingClass, InnerGeometry, RollingBearing};
use crate::model::stated::Stated;
use crate::problem::{Code, Write};
use crate::quantity::convert::to_mm;
use crate::quantity::{Length, Measure, Ratio};
use crate::relation::bearing::designation::{self, Designated};
use crate::source::Origin;
use crate::source::place::{Given, Whose};

pub(super) fn read(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    scene: &Scene<'_, '_>,
) -> Option<RollingBearing> {
    let slot = fields.get("rolling bearing")?;
    let sizes = if slot.node.entries().is_some() {
        sizes(reader, slot)
    } else {
        by_designation(reader, slot, scene)
    };
    let rest = RollingBearing {
        designation: None,
        class: None,
        bore: None,
        outside: None,
        width: None,
        speed: fields.stated(reader, "speed"),
        load: fields.stated(reader, "load"),
        c: fields.stated(reader, "C"),
        c0: fields.stated(reader, "C0"),
        cu: fields.stated(reader, "Cu"),
        cleanliness: cleanliness(reader, fields),
        film_ratio: fields.given(reader, "film ratio"),
        inner: inner(reader, fields),
    };
    let sizes = sizes?;
    Some(RollingBearing {
        designation: sizes.designation,
        class: sizes.class,
        bore: sizes.bore,
        outside: sizes.outside,
        width: sizes.width,
        ..rest
    })
}

#[derive(Default)]
struct Sizes {
    designation: Option<String>,
    class: Option<BearingClass>,
    bore: Option<Stated<Length>>,
    outside: Option<Stated<Length>>,
    width: Option<Stated<Length>>,
}

fn sizes(reader: &mut Reader<'_>, slot: &Slot<'_>) -> Option<Sizes> {
    let inner = Fields::read(reader, slot.node, &BEARING_SIZES, &slot.within);
    let word = inner.word(reader, "type").map(|w| w.value);
    let class = BearingClass::WRITTEN
        .iter()
        .find(|(w, _)| Some(*w) == word)
        .map(|(_, class)| *class);
    let sizes = Sizes {
        designation: None,
        class,
        bore: inner.stated(reader, "bore"),
        outside: inner.stated(reader, "outside"),
        width: inner.stated(reader, "width"),
    };
    in_order(reader, &inner, &sizes)
}

/// The outside diameter lies above the bore.
fn in_order(reader: &mut Reader<'_>, inner: &Fields<'_>, sizes: &Sizes) -> Option<Sizes> {
    let known = |s: &Option<Stated<Length>>| s.as_ref().and_then(Stated::known).cloned();
    let taken = || Sizes {
        designation: None,
        class: sizes.class,
        bore: sizes.bore.clone(),
        outside: sizes.outside.clone(),
        width: sizes.width.clone(),
    };
    let (Some(bore), Some(outside)) = (known(&sizes.bore), known(&sizes.outside)) else {
        return Some(taken());
    };
    if outside.value.base() > bore.value.base() && bore.value.base() > 0.0 {
        return Some(taken());
    }
    let (low, high) = (inner.get("bore")?, inner.get("outside")?);
    let problem = reader
        .at(
            Code::BearingSize,
            format!(
                "outside {} is not larger than bore {}",
                outside.written, bore.written
            ),
            high.node.span,
            &high.within,
        )
        .related(crate::source::Place::Text(low.node.span), "");
    let exchanged = outside.value.base() < bore.value.base() && outside.value.base() > 0.0;
    let problem = if exchanged {
        problem.why("the two may be exchanged").write(
            Write::edit(low.node.span, reader.set.slice(high.node.span))
                .and(high.node.span, reader.set.slice(low.node.span)),
        )
    } else {
        let twice = format!("{} mm", to_mm(bore.value).abs().max(1.0) * 1.8);
        let bore = format!("{} mm", to_mm(bore.value).abs().max(1.0));
        problem.write(
            Write::edit(low.node.span, bore)
                .and(high.node.span, twice)
                .remark("with the right sizes"),
        )
    };
    reader.report(problem);
    None
}

fn by_designation(
    reader: &mut Reader<'_>,
    slot: &Slot<'_>,
    scene: &Scene<'_, '_>,
) -> Option<Sizes> {
    let text = slot.text(reader)?;
    let (head, _) = parted(text);
    if head == "unknown" || head.starts_with("unknown,") {
        return Some(Sizes::default());
    }
    let read = designation::read(scene.known.bearings, &head);
    match read {
        Ok(found) if !has_fraction(&head) => Some(designated(&head, &found)),
        read => {
            unknown(reader, slot, &head, read);
            None
        }
    }
}

/// `22219.5`: a point and figures behind the number belong to no designation.
fn has_fraction(head: &str) -> bool {
    let digits = head.trim_end_matches(|c: char| c.is_ascii_digit());
    let before = digits.strip_suffix(['.', ',']);
    digits.len() < head.len() && before.is_some_and(|b| b.ends_with(|c: char| c.is_ascii_digit()))
}

fn designated(head: &str, found: &Designated) -> Sizes {
    let origin = || Origin {
        note: Some(format!("boundary dimensions of {head}")),
        ..Origin::rule("boundary_dimensions", Whose::Standard)
    };
    let size = |length: Length| {
        let written = format!("{} mm", to_mm(length));
        Some(Stated::Known(Given::new(length, written, origin()), None))
    };
    Sizes {
        designation: Some(head.to_owned()),
        class: Some(found.kind),
        bore: size(found.bore),
        outside: size(found.outside),
        width: None,
    }
}

fn unknown(
    reader: &mut Reader<'_>,
    slot: &Slot<'_>,
    head: &str,
    read: Result<Designated, designation::Unknown>,
) {
    let sizes = match &read {
        Ok(near) => format!(
            "{{ bore: {} mm, outside: {} mm }}",
            to_mm(near.bore),
            to_mm(near.outside)
        ),
        Err(_) => "{ bore: 95 mm, outside: 170 mm }".to_owned(),
    };
    let mut problem = reader.at(
        Code::BearingUnknown,
        format!("bearing {head} not understood"),
        slot.node.span,
        &slot.within,
    );
    if let Err(designation::Unknown::Size { kind, .. }) = &read {
        problem = problem.why(format!(
            "it reads as a {} bearing, but its size is not in the table",
            kind.name()
        ));
    }
    problem = problem
        .write(Write::edit(slot.node.span, sizes).remark("sizes work without a designation"));
    reader.report(problem);
}

fn inner(reader: &mut Reader<'_>, fields: &Fields<'_>) -> Option<InnerGeometry> {
    let elements = fields
        .whole(reader, "elements")
        .map(|n| n.map(|n| Ratio::from_base(f64::from(n))));
    let inner = InnerGeometry {
        elements,
        element_diameter: fields.stated(reader, "element diameter"),
        element_length: fields.stated(reader, "element length"),
        contact_angle: fields.stated(reader, "contact angle"),
        conformity: fields.given(reader, "conformity"),
        ring_roughness: fields.stated(reader, "ring roughness"),
        element_roughness: fields.stated(reader, "element roughness"),
    };
    (inner != InnerGeometry::default()).then_some(inner)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_fraction_is_no_suffix() {
        for (text, want) in [
            ("22219.5", true),
            ("6312", false),
            ("6203.2RS", false),
            ("NU 1020 M", false),
            ("230/500", false),
        ] {
            assert_eq!(has_fraction(text), want, "{text}");
        }
    }
}
