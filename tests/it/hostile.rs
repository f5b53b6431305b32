//! Files made to do harm, built in memory.

use std::io::{Cursor, Write as _};
use zip::write::SimpleFileOptions;

/// One file.
pub(crate) struct Case {
    /// What it is.
    pub name: &'static str,
    /// Its name as a file.
    pub file: &'static str,
    /// Its bytes.
    pub bytes: Vec<u8>,
    /// What the outcome says.
    pub ends_in: &'static str,
}

/// Packs parts.
pub(crate) fn packed(parts: &[(&str, &[u8])]) -> Vec<u8> {
    let mut zip = zip::ZipWriter::new(Cursor::new(Vec::new()));
    for (path, bytes) in parts {
        zip.start_file(*path, SimpleFileOptions::default())
            .expect("memory");
        zip.write_all(bytes).expect("memory");
    }
    zip.finish().expect("memory").into_inner()
}

const WORKBOOK: &str = "<workbook xmlns:r=\"r\"><sheets>\
    <sheet name=\"S\" sheetId=\"1\" r:id=\"a\"/></sheets></workbook>";
const RELATIONS: &str = "<Relationships>\
    <Relationship Id=\"a\" Type=\"x/worksheet\" Target=\"worksheets/sheet1.xml\"/>\
    </Relationships>";

/// A workbook of one sheet with these parts.
pub(crate) fn xlsx(parts: &[(&str, &[u8])]) -> Vec<u8> {
    let mut all: Vec<(&str, &[u8])> = vec![
        ("xl/workbook.xml", WORKBOOK.as_bytes()),
        ("xl/_rels/workbook.xml.rels", RELATIONS.as_bytes()),
    ];
    all.extend_from_slice(parts);
    packed(&all)
}

fn sheet(inner: &str) -> Vec<u8> {
    let whole = format!("<worksheet><sheetData>{inner}</sheetData></worksheet>");
    xlsx(&[("xl/worksheets/sheet1.xml", whole.as_bytes())])
}

fn ods(inner: &str) -> Vec<u8> {
    let whole = format!(
        "<x xmlns:t=\"t\"><spreadsheet><t:table t:name=\"S\">{inner}</t:table></spreadsheet></x>"
    );
    packed(&[("content.xml", whole.as_bytes())])
}

/// Every case.
pub(crate) fn all() -> Vec<Case> {
    let mut cases = Vec::new();
    let mut case = |name, file, bytes, ends_in| {
        cases.push(Case {
            name,
            file,
            bytes,
            ends_in,
        });
    };
    size(&mut case);
    width(&mut case);
    damage(&mut case);
    cases
}

type Take<'t> = &'t mut dyn FnMut(&'static str, &'static str, Vec<u8>, &'static str);

fn size(case: Take<'_>) {
    let spaces = format!("<worksheet>{}", " ".repeat(80 << 20));
    let bomb = xlsx(&[("xl/worksheets/sheet1.xml", spaces.as_bytes())]);
    assert!(bomb.len() < 200_000, "a bomb is small");
    case(
        "a sheet that unpacks without end",
        "bomb.xlsx",
        bomb,
        "UnpackedBytes",
    );
    let elements = format!("<worksheet>{}", "<a/>".repeat(18 << 20));
    let bytes = xlsx(&[("xl/worksheets/sheet1.xml", elements.as_bytes())]);
    case("elements without end", "elements.xlsx", bytes, "Elements");
    let inside = format!("<spreadsheet>{}", "x".repeat(70 << 20));
    let bytes = packed(&[("content.xml", inside.as_bytes())]);
    case("a text without end", "bomb.ods", bytes, "UnpackedBytes");
    let many = "<row><c><v>1</v></c></row>".repeat(1_100_000);
    case("rows without end", "rows.xlsx", sheet(&many), "");
    let cells = format!("<row>{}</row>", "<c><v>1</v></c>".repeat(16_384)).repeat(70);
    case("cells without end", "cells.xlsx", sheet(&cells), "Cells");
    let strings = format!(
        "<sst count=\"9\" uniqueCount=\"99999999999\"><si><t>{}</t></si></sst>",
        "long ".repeat(20_000)
    );
    let refers = "<row>".to_owned() + &"<c t=\"s\"><v>0</v></c>".repeat(5_000) + "</row>";
    let refers = format!("<worksheet>{refers}</worksheet>");
    let bytes = xlsx(&[
        ("xl/sharedStrings.xml", strings.as_bytes()),
        ("xl/worksheets/sheet1.xml", refers.as_bytes()),
    ]);
    case(
        "one long text many times",
        "strings.xlsx",
        bytes,
        "TextBytes",
    );
    let one = format!(
        "<row><c t=\"inlineStr\"><is><t>{}</t></is></c></row>",
        "x".repeat(200_000)
    );
    case("a cell of 200 kB", "cell.xlsx", sheet(&one), "CellBytes");
    let rows = "<t:table-row t:number-rows-repeated=\"1048576\"><t:table-cell t:value-type=\"float\" \
                t:value=\"1\" t:number-columns-repeated=\"16384\"/></t:table-row>";
    case(
        "a cell repeated over the whole sheet",
        "repeated.ods",
        ods(rows),
        "Cells",
    );
    let open = format!("a;b\n\"{}", "x\n".repeat(1 << 20));
    case(
        "a quotation mark left open",
        "open.csv",
        open.into_bytes(),
        "CellBytes",
    );
    case(
        "a text table of 65 MiB",
        "large.csv",
        b"a;b;c;d\n".repeat(65 << 17),
        "TextFileBytes",
    );
}

fn width(case: Take<'_>) {
    let wide = "a,".repeat(1_000_000);
    case(
        "a million columns of text",
        "wide.csv",
        wide.into_bytes(),
        "Columns",
    );
    let wide = sheet("<row r=\"1\"><c r=\"ZZZ1\"><v>1</v></c></row>");
    case("a column far to the right", "wide.xlsx", wide, "Columns");
    let wide = sheet(&format!(
        "<row>{}</row>",
        "<c><v>1</v></c>".repeat(1_000_000)
    ));
    case("a million columns", "columns.xlsx", wide, "Columns");
    let wide = "<t:table-row><t:table-cell t:value-type=\"float\" t:value=\"1\" \
                t:number-columns-repeated=\"1000000\"/></t:table-row>";
    case(
        "a million repeated columns",
        "columns.ods",
        ods(wide),
        "Columns",
    );
    let deep = sheet("<row r=\"99999999\"><c r=\"A99999999\"><v>1</v></c></row>");
    case("a row far below", "deep.xlsx", deep, "Rows");
    let far = sheet(
        "<row r=\"1\"><c r=\"A1\"><v>1</v></c></row><row r=\"1048576\"><c r=\"XFD1048576\"><v>1</v></c></row>",
    );
    case(
        "two cells at opposite corners",
        "corners.xlsx",
        far,
        "read, 2 rows",
    );
    let letters = sheet("<row r=\"1\"><c r=\"AAAAAAAAAAAA1\"><v>1</v></c></row>");
    case(
        "a column of twelve letters",
        "letters.xlsx",
        letters,
        "stands in row 1",
    );
}

fn damage(case: Take<'_>) {
    let laughs = "<!DOCTYPE x [<!ENTITY a \"ha\"><!ENTITY b \"&a;&a;\">]><worksheet><sheetData>\
                  <row><c t=\"inlineStr\"><is><t>&b;</t></is></c></row></sheetData></worksheet>";
    let bytes = xlsx(&[("xl/worksheets/sheet1.xml", laughs.as_bytes())]);
    case(
        "entities that name each other",
        "entities.xlsx",
        bytes,
        "entity &b;",
    );
    let broken = xlsx(&[(
        "xl/worksheets/sheet1.xml",
        b"<worksheet><sheetData><row><c>",
    )]);
    case(
        "a sheet that breaks off",
        "broken.xlsx",
        broken,
        "it breaks off",
    );
    let mixed = xlsx(&[("xl/worksheets/sheet1.xml", b"<worksheet></sheetData>")]);
    case("elements closed by others", "mixed.xlsx", mixed, "damaged");
    let nested = format!("<worksheet>{}", "<a>".repeat(100_000));
    let bytes = xlsx(&[("xl/worksheets/sheet1.xml", nested.as_bytes())]);
    case(
        "elements nested without end",
        "nested.xlsx",
        bytes,
        "nested too deep",
    );
    let around = "<Relationships><Relationship Id=\"a\" Type=\"x/worksheet\" Target=\"workbook.xml\"/>\
                  </Relationships>";
    let bytes = packed(&[
        ("xl/workbook.xml", WORKBOOK.as_bytes()),
        ("xl/_rels/workbook.xml.rels", around.as_bytes()),
    ]);
    case(
        "a sheet that is its own workbook",
        "around.xlsx",
        bytes,
        "read, 0 rows",
    );
    case(
        "a zip that breaks off",
        "cut.xlsx",
        b"PK\x03\x04rest".to_vec(),
        "damaged",
    );
    let whole = sheet("<row><c><v>1</v></c></row>");
    case(
        "a workbook cut in half",
        "half.xlsx",
        whole[..whole.len() / 2].to_vec(),
        "damaged",
    );
    case(
        "a zip of other things",
        "other.xlsx",
        packed(&[("readme.txt", b"hello")]),
        "NoTable",
    );
    case(
        "an old binary workbook",
        "old.xls",
        b"\xd0\xcf\x11\xe0\xa1\xb1\x1a\xe1rest".to_vec(),
        "OldBinary",
    );
    case(
        "bytes of a picture",
        "photo.csv",
        b"\x89PNG\r\n\x1a\n\0\0\0\rIHDR".to_vec(),
        "NoTable",
    );
    case("nothing", "empty.csv", Vec::new(), "Empty");
}
