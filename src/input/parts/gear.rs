//! Gear meshes, open gears, worms.

use crate::input::fields::Fields;
use crate::input::oils::stated_twice;
use crate::input::reader::Reader;
use crate::input::value::{Fault, Mend};
use crate::model::part::{
    GearMesh, GearType, OpenGear, OpenGearApplication, WheelMaterial, WormMesh,
};
use crate::problem::Code;
use crate::source::place::Given;
use crate::source::yaml::Node;

pub(super) fn mesh(reader: &mut Reader<'_>, fields: &Fields<'_>) -> GearMesh {
    let word = fields.word(reader, "type").map(|w| w.value);
    let kind = GearType::WRITTEN
        .iter()
        .find(|(w, _)| Some(*w) == word)
        .map(|(_, kind)| *kind);
    if let (Some(power), Some(torque)) = (fields.get("power"), fields.get("pinion torque")) {
        let why = "with the speed, each says what the other is";
        stated_twice(reader, power, torque, why);
    }
    GearMesh {
        kind,
        pitch_line_speed: fields.stated(reader, "pitch-line speed"),
        centre_distance: fields.stated(reader, "centre distance"),
        ratio: fields.stated(reader, "ratio"),
        face_width: fields.stated(reader, "face width"),
        pinion_speed: fields.stated(reader, "pinion speed"),
        power: fields.stated(reader, "power"),
        pinion_torque: fields.stated(reader, "pinion torque"),
        normal_module: fields.stated(reader, "normal module"),
        teeth: teeth(reader, fields),
        helix: fields.stated(reader, "helix"),
        pressure_angle: fields.stated(reader, "pressure angle"),
        application_factor: fields.given(reader, "application factor"),
        flank_roughness: fields.stated(reader, "flank roughness"),
        film_ratio: fields.given(reader, "film ratio"),
    }
}

pub(super) fn open(reader: &mut Reader<'_>, fields: &Fields<'_>) -> OpenGear {
    let application = fields
        .word(reader, "application")
        .and_then(|w| match w.value {
            "bath" => Some(OpenGearApplication::Bath),
            "spray" => Some(OpenGearApplication::Spray),
            "brush" => Some(OpenGearApplication::Brush),
            _ => None,
        });
    OpenGear {
        mesh: mesh(reader, fields),
        application,
    }
}

pub(super) fn worm(reader: &mut Reader<'_>, fields: &Fields<'_>) -> WormMesh {
    let wheel = fields.word(reader, "wheel").and_then(|w| {
        let material = match w.value {
            "bronze" => WheelMaterial::Bronze,
            "cast iron" => WheelMaterial::CastIron,
            "steel" => WheelMaterial::Steel,
            "plastic" => WheelMaterial::Plastic,
            _ => return None,
        };
        Some(w.map(|_| material))
    });
    if let (Some(worm), Some(speed)) = (fields.get("worm speed"), fields.get("speed")) {
        stated_twice(reader, worm, speed, "both are the speed of the worm");
    }
    let worm_speed = fields.stated(reader, "worm speed");
    WormMesh {
        centre_distance: fields.stated(reader, "centre distance"),
        worm_diameter: fields.stated(reader, "worm diameter"),
        worm_speed: worm_speed.or_else(|| fields.stated(reader, "speed")),
        ratio: fields.stated(reader, "ratio"),
        lead_angle: fields.stated(reader, "lead angle"),
        wheel,
        power: fields.stated(reader, "power"),
    }
}

/// `19 / 68`: teeth of pinion and wheel.
fn teeth(reader: &mut Reader<'_>, fields: &Fields<'_>) -> Option<Given<(u32, u32)>> {
    let listed = fields.get("teeth")?.node.items().map(|items| {
        let texts: Vec<&str> = items.iter().filter_map(Node::text).collect();
        texts.join(" / ")
    });
    let given = match (listed, fields.get("teeth")) {
        (Some(text), Some(slot)) => Given::new(text.clone(), text, slot.bare_origin()),
        _ => fields.given_text(reader, "teeth")?,
    };
    match read_teeth(&given.value) {
        Ok(teeth) => Some(given.map(|_| teeth)),
        Err(fault) => {
            let slot = fields.get("teeth")?;
            reader.faults(slot.node, vec![fault], &slot.within);
            None
        }
    }
}

fn read_teeth(text: &str) -> Result<(u32, u32), Fault> {
    let numbers: Vec<u32> = text
        .split(|c: char| !c.is_ascii_digit())
        .filter_map(|p| p.parse().ok())
        .collect();
    let plain = text
        .chars()
        .all(|c| c.is_ascii_digit() || c == '/' || c == ' ');
    let slashes = text.matches('/').count();
    match numbers.as_slice() {
        [pinion, wheel] if plain && slashes == 1 && *pinion > 0 && *wheel > 0 => {
            Ok((*pinion, *wheel))
        }
        _ => {
            let instead = match numbers.as_slice() {
                [pinion, wheel, ..] if *pinion > 0 && *wheel > 0 => format!("{pinion} / {wheel}"),
                _ => "19 / 68".to_owned(),
            };
            let all = 0..text.len();
            Err(Fault::new(
                Code::TeethForm,
                format!("teeth \"{text}\" not understood"),
                all.clone(),
            )
            .why("the teeth of the pinion, a stroke, those of the wheel")
            .mend(Mend::new(all, instead)))
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn teeth_are_two_numbers() {
        assert_eq!(read_teeth("19 / 68"), Ok((19, 68)));
        assert_eq!(read_teeth("19/68"), Ok((19, 68)));
        for text in ["19", "19:68", "nineteen", "19 / 0", ""] {
            let fault = read_teeth(text).expect_err(text);
            assert!(read_teeth(&fault.mends[0].applied(text)).is_ok(), "{text}");
        }
    }
}
