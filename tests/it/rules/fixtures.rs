//! One row a suitability rule: a setting in which it fires, one in which it does not, and, where
//! the rule has them, one in which it bars and one in which it lacks a fact.

/// Settings for one rule, in the form of `facts.rs`.
#[derive(Clone, Copy)]
pub(super) struct Row {
    pub(super) rule: &'static str,
    pub(super) fires: &'static str,
    pub(super) silent: &'static str,
    pub(super) bars: Option<&'static str>,
    pub(super) unknown: Option<&'static str>,
}

const fn row(rule: &'static str, fires: &'static str, silent: &'static str) -> Row {
    Row {
        rule,
        fires,
        silent,
        bars: None,
        unknown: None,
    }
}

impl Row {
    const fn bars(self, setting: &'static str) -> Self {
        Self {
            bars: Some(setting),
            ..self
        }
    }

    const fn asks(self, setting: &'static str) -> Self {
        Self {
            unknown: Some(setting),
            ..self
        }
    }
}

pub(super) const ROWS: &[Row] = &[
    row(
        "sulphur-bronze",
        "oil additives EP; oil sulphur active; point yellow metal yes; point part temperature 75",
        "oil additives EP; oil sulphur inactive; point yellow metal yes; point part temperature 95",
    )
    .bars("oil additives EP; oil sulphur active; point yellow metal yes; point part temperature 88")
    .asks("oil additives EP; oil sulphur active; point part temperature 88"),
    row(
        "sulphur-inactive-bronze",
        "oil additives EP; oil sulphur inactive; point yellow metal yes; point part temperature 75",
        "oil additives EP; oil sulphur inactive; point yellow metal yes; point part temperature 60",
    ),
    row(
        "copper-strip",
        "oil copper strip 2c; point yellow metal yes",
        "oil copper strip 1b; point yellow metal yes",
    )
    .asks("point yellow metal yes"),
    row(
        "backstop-solid",
        "oil additives EP, moly; point backstop sprag",
        "oil additives EP; point backstop sprag",
    )
    .asks("oil additives EP, friction modifier; point serves gear"),
    row(
        "backstop-ep",
        "oil additives EP; point backstop cam",
        "oil additives EP; point backstop no",
    )
    .asks("oil additives EP; point serves gear"),
    row(
        "backstop-aw",
        "oil additives AW; point backstop yes",
        "oil additives R&O; point backstop yes",
    )
    .asks("point backstop sprag"),
    row(
        "wet-clutch",
        "oil classes GL-5; point wet clutch yes",
        "oil classes GL-5; point wet clutch no",
    )
    .asks("oil classes GL-5; point serves axle"),
    row(
        "wet-clutch-approval",
        "point component wet_brake_transmission",
        "point wet clutch no",
    ),
    row(
        "zinc-silver",
        "oil additives AW, zinc; point silver yes",
        "oil additives AW; point silver yes",
    )
    .asks("oil additives zinc; point serves engine"),
    row(
        "zinc-wet",
        "oil additives zinc; point serves turbine; point water entry no",
        "oil additives zinc; point serves hydraulic; point water entry no",
    )
    .asks("oil additives zinc; point serves hydraulic; point wet area yes"),
    row(
        "zinc-top-up",
        "use top-up; oil additives zinc; now additives R&O",
        "use top-up; oil additives zinc; now additives AW, zinc",
    )
    .asks("use top-up; oil additives zinc; now base mineral"),
    row(
        "pag-top-up",
        "use top-up; oil base PAG water-soluble; now base mineral",
        "use top-up; oil base PAO; now base mineral",
    )
    .asks("use top-up; oil base PAG water-soluble"),
    row(
        "pag-change",
        "oil base PAG water-soluble; now base mineral",
        "oil base PAG water-soluble; now base PAG oil-soluble",
    )
    .asks("oil base PAG oil-soluble"),
    row(
        "pag-leave",
        "oil base PAO; now base PAG water-soluble",
        "oil base PAO; now base mineral",
    ),
    row(
        "pag-water",
        "oil base PAG water-soluble; point water entry seldom",
        "oil base PAG water-soluble; point water entry no; point wet area no",
    )
    .asks("oil base PAG water-soluble"),
    row(
        "top-up-bad",
        "use top-up; oil base silicone; now base mineral",
        "use top-up; oil base PAO; now base mineral",
    )
    .asks("use top-up; oil base silicone"),
    row(
        "top-up-care",
        "use top-up; oil base ester; now base mineral",
        "use top-up; oil base PAO; now base mineral",
    ),
    row(
        "change-bad",
        "oil base silicone; now base mineral",
        "oil base PAO; now base mineral",
    )
    .asks("oil base silicone"),
    row(
        "change-care",
        "oil base ester; now base mineral",
        "oil base ester; now base ester",
    ),
    row(
        "residual-pao",
        "oil base PAO; now base mineral II",
        "oil base PAO; now base PAO",
    ),
    row(
        "residual-eal",
        "point environment EAL; oil environment EAL; now base mineral",
        "point environment EAL; oil environment EAL; now environment EAL",
    )
    .asks("point environment EAL; oil environment EAL"),
    row(
        "residual-food",
        "point food class H1; oil food class H1; now base mineral",
        "point food class H1; oil food class H1; now food class H1",
    )
    .asks("point food zone yes; oil food class H1"),
    row(
        "residual-fire",
        "point fire class less flammable; oil fire class less flammable; now base mineral",
        "point fire class less flammable; now fire class fire resistant",
    )
    .asks("point fire class less flammable"),
    row(
        "residual-pfpe",
        "oil base PFPE; now base mineral",
        "oil base PFPE; point empty now",
    )
    .asks("oil base PFPE"),
    row(
        "turbine-groups",
        "point serves turbine; oil base mineral II; now base mineral I",
        "point serves turbine; oil base mineral II; now base mineral II",
    ),
    row(
        "pao-on-nbr",
        "oil base PAO; now base mineral; point seals NBR",
        "oil base PAO; now base mineral; point seals FKM",
    ),
    row(
        "relabel",
        "now base mineral",
        "now id NEW",
    ),
    row(
        "grease-incompatible",
        "oil kind grease; oil thickener pu; now kind grease; now thickener li",
        "oil kind grease; oil thickener pu; now kind grease; now thickener pu",
    ),
    row(
        "grease-borderline",
        "oil kind grease; oil thickener lix; now kind grease; now thickener li",
        "oil kind grease; oil thickener li; now kind grease; now thickener li",
    )
    .asks("oil kind grease; oil thickener li; now kind grease; now thickener something else"),
    row(
        "motor-winding",
        "oil kind grease; oil additives EP; point component motor_grease_brg",
        "oil kind grease; oil additives none; point component motor_grease_brg",
    )
    .asks("oil kind grease; point component motor_grease_brg"),
    row(
        "stray-current",
        "point serves motor bearing",
        "point serves rolling bearing",
    ),
    row(
        "engine-oil-wet",
        "oil classes SAE 15W-40; point serves hydraulic; point water entry steady",
        "oil classes HM; oil kind hydraulic; point serves hydraulic; point water entry steady",
    )
    .asks("oil classes SAE 30; point serves hydraulic"),
    row(
        "detergent-wet",
        "oil additives detergent; oil kind circulating; oil demulsibility 25; point component paper_dryer; point water entry steady",
        "oil additives AW; oil kind circulating; point component paper_dryer; point water entry steady",
    )
    .bars("oil additives detergent; oil kind circulating; oil demulsibility 45; point component paper_dryer; point water entry steady")
    .asks("oil additives detergent; oil kind circulating; point component circ_general"),
    row(
        "ep-paper",
        "oil additives EP; point component paper_dryer",
        "oil additives AW; point component paper_dryer",
    )
    .asks("point component paper_wet_end"),
    row(
        "ester-water",
        "oil base ester; point part temperature 70; point water entry seldom",
        "oil base ester; point part temperature 50; point water entry seldom",
    )
    .asks("oil base diester; point part temperature 70"),
    row(
        "vegetable-cold",
        "oil base vegetable; point start temperature -20",
        "oil base vegetable; point start temperature 5",
    ),
    row(
        "food-class-asked",
        "point food class H1; oil classes CKC",
        "point food class H1; oil food class 3H",
    ),
    row(
        "food-zone",
        "point food zone yes; oil classes CKC",
        "point food zone yes; oil food class H1",
    ),
    row(
        "food-ep",
        "point food zone yes; oil additives EP",
        "point food zone yes; oil additives EP; oil food class H2",
    ),
    row(
        "fire-class-asked",
        "point fire class less flammable; oil classes HM",
        "point fire class less flammable; oil fire class fire resistant",
    ),
    row(
        "hot-surface",
        "point hot surface 380; point lubrication reservoir; oil classes HM",
        "point hot surface 380; point lubrication splash; oil classes HM",
    )
    .asks("point hot surface 380; oil classes HM"),
    row(
        "flash-margin",
        "oil flash 200; point part temperature 150",
        "oil flash 220; point part temperature 90",
    ),
    row(
        "hfd-seals",
        "oil classes HFDU; point seals NBR; point inside paint none",
        "oil classes HFDU; point seals FKM; point inside paint two-part epoxy",
    )
    .asks("oil classes HFDU"),
    row(
        "hfc-zinc",
        "oil base water-glycol; point zinc plated yes",
        "oil base water-glycol; point zinc plated no",
    )
    .asks("oil classes HFC"),
    row(
        "hfc-bearing",
        "oil base water-glycol; point component hyd_pump_vane",
        "oil base mineral; oil classes HM; point component hyd_pump_vane",
    ),
    row(
        "oxygen",
        "point oxygen yes; oil base mineral",
        "point oxygen yes; oil base PFPE",
    )
    .asks("oil base mineral; point component vac_rotary_vane"),
    row(
        "oxygen-pfpe",
        "point oxygen yes; oil base PFPE",
        "point oxygen no; oil base PFPE",
    ),
    row(
        "breathing-air",
        "point breathing air yes",
        "point breathing air no",
    )
    .asks("point component comp_screw_flooded_air"),
    row(
        "receiver-fire",
        "point component comp_recip_cylinder; oil classes DAA",
        "point component comp_recip_cylinder; oil classes VDL",
    ),
    row(
        "process-gas",
        "point component comp_screw_process",
        "point component comp_screw_flooded_air",
    ),
    row(
        "reactive-gas",
        "point component comp_reactive_gas",
        "point component comp_screw_process",
    ),
    row(
        "airline-bowl",
        "point component pneumatic_airline; oil base ester",
        "point component pneumatic_airline; oil base mineral",
    ),
    row(
        "radiation-vacuum",
        "point component radiation_vacuum",
        "point component vac_rotary_vane",
    ),
    row(
        "vapour-pressure",
        "point component vac_rotary_vane",
        "point component comp_centrifugal",
    ),
    row(
        "insulating",
        "point component transformer",
        "point component motor_grease_brg",
    ),
    row(
        "environment-asked",
        "point environment EAL; oil classes HM",
        "point environment EAL; oil environment EAL",
    ),
    row(
        "water-protection",
        "point water protection yes; oil classes HM",
        "point water protection yes; oil environment EAL",
    ),
    row(
        "seals-bad",
        "oil base mineral; point seals EPDM",
        "oil base mineral; point seals NBR",
    )
    .asks("oil base ester"),
    row(
        "seals-care",
        "oil base ester; point seals NBR",
        "oil base mineral; point seals NBR",
    ),
    row(
        "seal-temperature",
        "point seals NBR; point part temperature 110",
        "point seals FKM; point part temperature 110",
    ),
    row(
        "fkm-basic",
        "point seals FKM; oil additives detergent",
        "point seals FKM; oil additives R&O; oil base mineral",
    ),
    row(
        "paint-bad",
        "oil base PAG water-soluble; point inside paint single-pack",
        "oil base PAG water-soluble; point inside paint two-part epoxy",
    )
    .asks("oil base ester"),
    row(
        "sight-glass",
        "oil base PAG water-soluble; point sight glass polycarbonate",
        "oil base PAG water-soluble; point sight glass glass",
    )
    .asks("oil base ester"),
    row(
        "silicone-steel",
        "oil base silicone; point serves gear",
        "oil base silicone; point serves coupling",
    ),
    row(
        "shear-unproven",
        "oil polymer yes; point serves gear",
        "oil polymer yes; oil shear data yes; point serves gear",
    ),
    row(
        "engine-oil-hydraulic",
        "oil classes SAE 10W; point component hyd_pump_vane",
        "oil classes HM; oil kind hydraulic; point component hyd_pump_vane",
    ),
    row(
        "cold-filter",
        "point filter yes",
        "point filter no",
    ),
    row(
        "solid-filter",
        "point filter yes; oil additives graphite",
        "point filter yes; oil additives EP",
    ),
    row(
        "air-release-dwell",
        "point dwell 3; oil air release 8",
        "point dwell 6; oil air release 5",
    ),
    row(
        "air-release-grade",
        "oil nu40 32.4; oil air release 6; point serves hydraulic",
        "oil nu40 46; oil air release 8; point serves hydraulic",
    ),
    row(
        "foam",
        "point serves gear; point lubrication splash",
        "point serves gear; point lubrication circulated",
    ),
];
