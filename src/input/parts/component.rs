//! Components with a practice window, engines and axles.

use crate::input::fields::Fields;
use crate::input::reader::Reader;
use crate::input::site::Scene;
use crate::model::part::{Component, Drive};
use crate::problem::{Code, Write, suggest};

pub(super) fn read(
    reader: &mut Reader<'_>,
    fields: &Fields<'_>,
    scene: &Scene<'_, '_>,
) -> Option<Component> {
    let slot = fields.get("component")?;
    let text = slot.text(reader)?.trim().to_owned();
    let components = &scene.known.rules.components;
    let found = components.find(&text).map(|c| c.id.clone());
    let component = Component {
        id: found.clone().unwrap_or_default(),
        pressure: fields.stated(reader, "pressure"),
        speed: fields.stated(reader, "speed"),
        chain_speed: fields.stated(reader, "chain speed"),
        orientation: fields.given_text(reader, "orientation"),
    };
    if found.is_some() {
        return Some(component);
    }
    let names = components
        .iter()
        .flat_map(|c| [c.id.as_str(), c.name.as_str()]);
    let meant = suggest::certain(&text, names).map(str::to_owned);
    let mut problem = reader
        .at(
            Code::ComponentUnknown,
            format!("component {text} has no window in the rules"),
            slot.node.span,
            &slot.within,
        )
        .why("the components are listed by: filmwright rules --kind components");
    problem = match meant {
        Some(meant) => problem
            .did_you_mean(meant.clone())
            .write(Write::edit(slot.node.span, meant)),
        None => match components.iter().find(|c| alike(&c.name, &text)) {
            Some(near) => problem
                .write(Write::edit(slot.node.span, near.id.clone()).remark(near.name.clone())),
            None => match components.iter().next() {
                Some(first) => problem.write(
                    Write::edit(slot.node.span, first.id.clone()).remark("or another of them"),
                ),
                None => problem.write(
                    Write::edit(slot.name.span, "x-component").remark("until the rules have it"),
                ),
            },
        },
    };
    reader.report(problem);
    None
}

/// Whether a name holds a longer word of the text.
fn alike(name: &str, text: &str) -> bool {
    let name = name.to_lowercase();
    let text = text.to_lowercase();
    let words = text.split(|c: char| !c.is_alphanumeric());
    words.filter(|w| w.len() > 3).any(|w| name.contains(w))
}

pub(super) fn drive(reader: &mut Reader<'_>, fields: &Fields<'_>) -> Drive {
    Drive {
        hot_grade: fields.given_text(reader, "hot grade"),
        hths_at_least: fields.given(reader, "HTHS at least"),
        duty: fields.given_text(reader, "duty"),
        level: fields.given_text(reader, "level"),
    }
}
