//! Registers other than the demonstration's: short headings, other units, German words, numbered
//! tags. What each cell is to be read as is common practice of registers; conversions are those of
//! NIST SP 811 (quarts, pints) and ASTM D2161 (Saybolt, from memory).

use super::dirty::{file, machine, read};
use crate::scenario::on;
use filmwright::cli::exit::Exit;
use filmwright::cli::host::MemoryHost;

const PLANT: &str = "\
Harrow quarry; lubrication points;;;;;;;;
Area;Equip. No;Equip. description;Brg no.;RPM;Motor kW;Oil in use;Oil vol (ltr);Oper. temp (°F);Last oil change
Crushing;JC-01;Jaw crusher main bearings;23248 CCK/W33;260;110;ISO VG 220 EP;40;158;2024-11-04
Crushing;CV 102;conveyor tail;22216 E;62;;EP2 grease;-;n/a;
Screening;SC-7A/B;Screen exciters;22328 CCJA/W33;905;18.5;150 SUS @ 210F;3 pt;185;18.01.2025
Screening;PMP-11;slurry pump;6312-2RS / 6314 C3;1475;55;same as JC-01;4.5 qt;;filter removed
Utilities;CMP-1;Screw compressor;;2950;90;SAE 10W;12 gal;190 (disch.);
Utilities;AG-1 to AG-3;agitator gear drives;;28;7.5;ditto;11 L each;150;
Utilities;OLD-2;removed 2017;;0;0;0;0;0;
";

#[test]
fn short_headings_and_other_units_are_understood() {
    let ran = read(PLANT, "-f json");
    assert_eq!(ran.exit, Exit::Done, "{}", ran.err);
    let site = file(&ran, "site.yaml");
    let holds = |tag: &str, wanted: &[&str]| {
        let one = machine(&site, tag);
        for want in wanted {
            assert!(one.contains(want), "{want} is not in:\n{one}");
        }
    };
    holds(
        "JC-01",
        &[
            "name: Jaw crusher main bearings",
            "fill: 40 L",
            "sump: 158 degF",
            "rolling bearing: 23248 CCK/W33",
            "speed: '260 r/min",
            "Last oil change: 2024-11-04",
            "Motor kW: 110 kW",
        ],
    );
    // a small number behind EP is a consistency of NLGI, no viscosity grade
    holds("CV 102", &["grease; NLGI 2"]);
    // 150 SUS at 210 degF is 31.7 mm2/s at 98.9 degC, of about VG 460; 3 pints are 1.42 L (US)
    holds(
        "SC-7A",
        &["mm2/s at 98.9 degC, about ISO VG 460", "1.42 .. 1.70 L"],
    );
    holds("SC-7B", &["register row: 5"]);
    // two bearings of one cell; 4.5 quarts are 4.26 L (US) or 5.11 L (UK); a filter removed is no
    // machine removed
    holds(
        "PMP-11",
        &[
            "rolling bearing: 6312-2RS",
            "rolling bearing: 6314 C3",
            "4.26 .. 5.11 L",
            "\"ISO VG 220 EP\": ISO VG 220",
        ],
    );
    holds(
        "CMP-1",
        &["it is the discharge temperature", "starts in the cold"],
    );
    holds("AG-1", &["fill: 11 L", "register row: 8"]);
    holds("AG-3", &["register row: 8"]);
    assert!(!site.contains("\n  OLD-2:"), "{site}");
    assert!(site.contains("# row 9: "), "{site}");
}

#[test]
fn german_registers_are_understood() {
    let text = "\
Anlagen-Nr.;Bezeichnung;Ölsorte;Füllmenge [l];Öltemp. °C;Drehzahl;Lager
KP-01;Kühlwasserpumpe;HLP 46;12,5;48;1.470;6314-2RS C3
KP-02;Kühlwasserpumpe;dito;12,5;;1.470;6314-2RS C3
VT-3;Ventilator;CLP 150;0,75;62 (Gehäuse);330;22216 EK
GT-7;Stirnradgetriebe;CLP 320;1.200;-;;
KO-1;Schraubenverdichter;wie Zeile 2;85;82;2950;
";
    let ran = read(text, "");
    assert_eq!(ran.exit, Exit::Done, "{}", ran.err);
    let site = file(&ran, "site.yaml");
    assert!(machine(&site, "KP-02").contains("\"HLP 46\": ISO VG 46"));
    assert!(machine(&site, "KP-02").contains("fill: 12.5 L"));
    assert!(!machine(&site, "VT-3").contains("sump:"));
    assert!(ran.out.contains("housing temperature"), "{}", ran.out);
    assert!(machine(&site, "GT-7").contains("gear mesh: not stated"));
    assert!(machine(&site, "GT-7").contains("fill: 1200 L"));
    assert!(machine(&site, "KO-1").contains("component: comp_screw_flooded_air"));
    assert!(machine(&site, "KO-1").contains("\"HLP 46\": ISO VG 46"));
}

#[test]
fn a_polyglycol_is_no_mineral_oil_and_a_lone_viscosity_is_kept() {
    let list = "Product,ISO VG,KV 40 (cSt),KV 100 (cSt),Base,Price per litre\n\
                Thorn PG,460,456,,PAG,14\nWeird,68,8.7,68,,\nCedar Multi,15W-40,108,14.4,Mineral,4\n";
    let ran = on(
        MemoryHost::new().with("list.csv", list),
        "intake list.csv --makes oils",
    );
    assert_eq!(ran.exit, Exit::Done, "{}", ran.err);
    let oils = file(&ran, "oils.yaml");
    assert!(oils.contains("base: PAG water-soluble"), "{oils}");
    assert!(oils.contains("456 mm2/s at 40 degC alone gives no slope"));
    assert!(oils.contains("14 per L"), "{oils}");
    assert!(ran.out.contains("an oil is thinner when hotter") || ran.out.contains("thinner"));
    assert!(ran.out.contains("read as SAE 15W-40"), "{}", ran.out);
}

/// A column of nothing but references is read in one pass, and a circle is said to be one.
#[test]
fn long_chains_of_references_end() {
    use std::fmt::Write as _;
    let mut text = String::from("tag;desc;lubricant\nM-1;pump;HLP 46\n");
    for n in 2..=3000 {
        let _ = writeln!(text, "M-{n};pump;ditto");
    }
    text.push_str("A-1;fan;same as A-2\nA-2;fan;same as A-1\n");
    let ran = read(&text, "");
    assert_eq!(ran.exit, Exit::Done, "{}", ran.err);
    let site = file(&ran, "site.yaml");
    assert!(machine(&site, "M-3000").contains("\"HLP 46\": ISO VG 46"));
    assert!(ran.out.contains("in a circle"), "{}", ran.out);
}
