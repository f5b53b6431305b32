use super::*;
use crate::quantity::Kind;

fn word(makes: Makes, text: &str) -> String {
    guess(makes, &apart(text), &[]).map_or("none".into(), |g| g.target.word())
}

#[test]
fn headings_of_registers_are_known() {
    for (text, want) in [
        ("Asset No.", "tag"),
        ("tag", "tag"),
        ("desc", "name"),
        ("Description", "name"),
        ("lubricant", "oil now"),
        ("Fill (L)", "fill"),
        ("Oil temp", "sump"),
        ("temp", "sump"),
        ("Oil temperature °C", "sump"),
        ("Speed rpm", "speed"),
        ("n", "speed"),
        ("Motor speed [1/min]", "motor speed"),
        ("Bearing DE", "rolling bearing"),
        ("Amb. min", "ambient low"),
        ("Amb. max", "ambient high"),
        ("Lubricnt", "oil now"),
        ("Seal material", "seals"),
        ("Colour of the fence", "none"),
        ("Equip. No", "tag"),
        ("Equip. description", "name"),
        ("Brg no.", "rolling bearing"),
        ("Motor kW", "gear mesh: power"),
        ("kW", "gear mesh: power"),
        ("Oil vol (ltr)", "fill"),
        ("Oil (L)", "fill"),
        ("Oper. temp (°F)", "sump"),
        ("Sump (degC)", "sump"),
        ("Sump (L)", "fill"),
        ("Motor rpm", "motor speed"),
        ("Last oil change", "note"),
        ("Oil supplier", "note"),
        ("Building C", "area"),
    ] {
        assert_eq!(word(Makes::Site, text), want, "{text}");
    }
    for (text, want) in [
        ("KV40 (cSt)", "viscosity at 40 degC"),
        ("Visc. 100 °C", "viscosity at 100 degC"),
        ("Pour point °C", "pour point"),
        ("ISO VG", "viscosity"),
        ("Product", "name"),
    ] {
        assert_eq!(word(Makes::Oils, text), want, "{text}");
    }
}

#[test]
fn units_in_headings_are_found() {
    let u = |t: &str| apart(t).unit;
    assert_eq!(u("Fill (L)"), Some(Unit::Of(Kind::Volume, "L")));
    assert_eq!(
        u("Fill (gal)"),
        Some(Unit::Gallon(crate::intake::units::Part::Whole))
    );
    assert_eq!(
        u("Speed rpm"),
        Some(Unit::Of(Kind::RotationalSpeed, "r/min"))
    );
    assert_eq!(u("Oil temp, °F"), Some(Unit::Of(Kind::Temperature, "degF")));
    assert_eq!(u("Power [kW]"), Some(Unit::Of(Kind::Power, "kW")));
    assert_eq!(u("Lubricant"), None);
    assert_eq!(u("Amb. min"), None);
}

#[test]
fn a_quantity_is_a_fill_where_the_cells_say_so() {
    let g = |samples: &[&str]| {
        let samples: Vec<String> = samples.iter().map(|s| (*s).to_owned()).collect();
        guess(Makes::Site, &apart("qty"), &samples).map(|g| g.target.word())
    };
    assert_eq!(g(&["15 gal", "68 l"]).as_deref(), Some("fill"));
    assert_eq!(g(&["1", "4"]).as_deref(), Some("count"));
}
