//! Oils at machines as they are met in practice: what is barred, what is asked, what is neither.
//! Sources: the practice entries the rules cite; the machines are those of the demonstration.

use super::{BOOK, facts::Setting};
use filmwright::suitability::Suitability;

const CONVEYOR: &str = "point serves gear; point asks CKC; point lubrication splash; \
    point backstop sprag; point yellow metal no; point seals FKM; point inside paint two-part epoxy; \
    point part temperature 65; now base mineral";
const CRUSHER: &str = "point serves gear; point component brg_plain_pressure_fed; point asks EP; \
    point backstop no; point yellow metal yes; point seals NBR; point inside paint two-part epoxy; \
    point part temperature 75; now base mineral";
const PRESS: &str = "point component hyd_pump_piston_axial; point lubrication reservoir; \
    point yellow metal yes; point seals NBR; point water entry no; point part temperature 62; \
    now base mineral";
const WORM: &str = "point component gear_worm; point serves worm gear; point yellow metal yes; \
    point seals FKM; point inside paint two-part epoxy; point sight glass glass; \
    point water entry no; point part temperature 95; now base mineral";
const SCREW: &str = "point component comp_screw_flooded_air; point asks DAG; point breathing air yes; \
    point seals FKM; point part temperature 86; now base mineral";
const DRYER: &str = "point component paper_dryer; point water entry steady; point yellow metal yes; \
    point seals FKM; point part temperature 96; now base mineral";
const FAN: &str = "point serves gear; point lubrication splash; point backstop no; \
    point water protection yes; point water entry seldom; point seals NBR; \
    point inside paint single-pack; point part temperature 70; now base mineral";
const MOTOR: &str = "point component motor_grease_brg; point lubrication grease; \
    point part temperature 72; now kind grease; now id G-1; now base mineral; now thickener lithium";
const MIXER: &str = "point serves gear; point food zone yes; point food class H1; point backstop no; \
    point seals FKM; point part temperature 62; now base mineral";
const SLUICE: &str = "point component hyd_pump_gear_external; point environment EAL; \
    point water protection yes; point seals HNBR; point inside paint none; \
    point part temperature 40; now base mineral";
const FURNACE: &str = "point component hyd_pump_gear_external; point lubrication reservoir; \
    point hot surface 380; point fire class less flammable; point zinc plated yes; point seals FKM; \
    point inside paint two-part epoxy; point part temperature 58; now base mineral";

const MOLY_EP: &str = "oil classes CKC; oil base mineral; oil additives EP, moly; oil sulphur active; \
    oil copper strip 2b";
const MINERAL_EP: &str = "oil classes CKC; oil base mineral; oil additives EP; oil sulphur active; \
    oil copper strip 2c; oil kind gear";
const PAO_EP: &str = "oil classes CKC, CKD, CKSMP; oil base PAO; oil additives EP; \
    oil sulphur inactive; oil copper strip 1b; oil kind gear";
const PAO_H1: &str = "oil classes CKB, CKC, CL; oil base PAO; oil additives AW, R&O; \
    oil sulphur none; oil copper strip 1a; oil food class H1; oil kind gear";
const PAG: &str = "oil classes CKE, CLP-PG; oil base PAG water-soluble; \
    oil additives AW, friction modifier; oil sulphur none; oil copper strip 1a; oil kind worm";
const HM_ZINC: &str = "oil classes HM; oil base mineral; oil additives AW, zinc; \
    oil sulphur inactive; oil copper strip 1b; oil kind hydraulic";
const HV_ASHLESS: &str = "oil classes HM, HV; oil base mineral III; oil additives AW; oil polymer yes; \
    oil shear data yes; oil copper strip 1a; oil kind hydraulic";
const ESTER: &str = "oil classes HEES, HFDU; oil base ester; oil additives AW; oil copper strip 1a; \
    oil environment EAL; oil fire class less flammable; oil kind hydraulic";
const GLYCOL: &str = "oil classes HFC; oil base water-glycol; oil additives R&O; \
    oil environment EAL; oil fire class fire resistant; oil kind hydraulic; oil copper strip 1b";
const TURBINE: &str = "oil classes TSA, THA, DAG, HL, CKB; oil base mineral II; oil additives R&O; \
    oil copper strip 1a; oil kind turbine";
const PAPER: &str = "oil classes CKB, CL; oil base mineral; oil additives AW, R&O, detergent; \
    oil demulsibility 25; oil copper strip 1a; oil kind circulating";
const ENGINE: &str = "oil classes SAE 15W-40; oil base mineral II; oil additives AW, zinc, detergent; \
    oil copper strip 1b; oil kind engine";
const MULTI_GREASE: &str = "oil id G-1; oil kind grease; oil base mineral; oil additives EP; \
    oil thickener lithium; oil sulphur inactive";
const MOTOR_GREASE: &str = "oil id G-2; oil kind grease; oil base mineral II; oil additives none; \
    oil thickener polyurea";

/// Machine, oil, the rule that bars (or none), a condition that must be there (or none).
const PAIRS: &[(&str, &str, Option<&str>, Option<&str>)] = &[
    (CONVEYOR, MOLY_EP, Some("backstop-solid"), None),
    (CONVEYOR, PAO_EP, None, Some("backstop-ep")),
    (CONVEYOR, PAO_H1, None, Some("backstop-aw")),
    (CONVEYOR, HM_ZINC, Some("class-asked"), None),
    (CONVEYOR, PAG, Some("backstop-solid"), None),
    (CRUSHER, MINERAL_EP, None, Some("sulphur-bronze")),
    (CRUSHER, MINERAL_EP, None, Some("copper-strip")),
    (CRUSHER, PAO_EP, None, Some("sulphur-inactive-bronze")),
    (CRUSHER, HM_ZINC, Some("class-asked"), None),
    (PRESS, HM_ZINC, None, None),
    (PRESS, HV_ASHLESS, None, None),
    (PRESS, PAO_EP, Some("hydraulic"), None),
    (PRESS, ESTER, Some("hfd-seals"), None),
    (WORM, MINERAL_EP, Some("sulphur-bronze"), None),
    (WORM, PAG, None, Some("pag-change")),
    (WORM, PAO_EP, None, Some("gear-worm")),
    (WORM, HM_ZINC, Some("gear-worm"), None),
    (SCREW, TURBINE, None, Some("breathing-air")),
    (SCREW, PAPER, Some("class-asked"), None),
    (DRYER, PAPER, None, Some("detergent-wet")),
    (DRYER, PAO_H1, None, None),
    (DRYER, PAO_EP, None, Some("ep-paper")),
    (DRYER, ENGINE, Some("engine-oil-wet"), None),
    (FAN, PAO_EP, None, Some("water-protection")),
    (FAN, PAO_H1, None, Some("water-protection")),
    (FAN, PAG, Some("paint-bad"), None),
    (MOTOR, MULTI_GREASE, None, Some("motor-winding")),
    (MOTOR, MOTOR_GREASE, None, Some("grease-incompatible")),
    (MIXER, MINERAL_EP, Some("food-zone"), None),
    (MIXER, PAO_H1, None, Some("residual-food")),
    (SLUICE, HM_ZINC, Some("environment-asked"), None),
    (SLUICE, ESTER, None, Some("residual-eal")),
    (FURNACE, HM_ZINC, Some("fire-class-asked"), None),
    (FURNACE, GLYCOL, Some("hfc-zinc"), None),
    (FURNACE, ESTER, None, Some("residual-fire")),
];

#[test]
fn pairs_of_practice_are_barred_asked_or_passed() {
    let engine = Suitability::new(&BOOK);
    for (machine, oil, bars, asks) in PAIRS {
        let setting = Setting::of(&format!("{machine}; {oil}"));
        let found = engine.assess(&engine.point(&setting.point), &engine.oil(&setting.oil));
        let barred: Vec<&str> = found.barred_by.iter().map(|f| f.rule.as_str()).collect();
        let asked: Vec<&str> = found.conditions.iter().map(|f| f.rule.as_str()).collect();
        match bars {
            Some(rule) => assert!(barred.contains(rule), "{machine}\n{oil}\n{barred:?}"),
            None => assert_eq!(barred, [""; 0], "{machine}\n{oil}"),
        }
        match asks {
            Some(rule) => assert!(asked.contains(rule), "{machine}\n{oil}\n{asked:?}"),
            None if bars.is_none() => assert_eq!(asked, [""; 0], "{machine}\n{oil}"),
            None => {}
        }
    }
}
