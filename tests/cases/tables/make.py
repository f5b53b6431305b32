#!/usr/bin/env python3
"""Writes the tables of this folder anew, with openpyxl (PyPI) and LibreOffice (Debian's
libreoffice-calc-nogui). The tests read the committed files; run this to change them."""

import datetime
import pathlib
import subprocess
import tempfile

import openpyxl
from openpyxl.comments import Comment
from openpyxl.utils.datetime import CALENDAR_MAC_1904

HERE = pathlib.Path(__file__).resolve().parent


def register():
    """A register with everything that reads badly: title rows, merged cells, hidden rows and
    columns, comments, dates, a formula, units in number formats, a hidden sheet."""
    book = openpyxl.Workbook()
    sheet = book.active
    sheet.title = "Assets 2026"
    sheet["A1"] = "Harrow Lane quarry, lubrication register"
    sheet["A2"] = "exported"
    sheet["B2"] = datetime.date(2026, 7, 18)
    sheet.append([])
    sheet.append(["Asset No.", "Description", "Area", "Lubricant", "Fill (L)", "Oil temp", "Speed rpm",
                  "Bearing DE", "Last change", "Load", "Fill (gal)"])
    rows = [
        ["CV-201", "Conveyor drive gearbox", "Crushing", "CLP 220", 46, "60 °C", 236, "22220 EK C3",
         datetime.date(2026, 3, 2), 0.85, "=E5/3.785"],
        ["FN-202", "Fan bearings", None, "ISO 68", 3, 58.5, 1480, "6312-2RS",
         datetime.datetime(2026, 4, 9, 13, 30), None, None],
        ["PU-203", "Slurry pump", None, "ISO 68", 1.2, None, 990, None, None, None, None],
        ["SC-204", "Screen, standby", "Loading", "see plate", 999, 0, None, "n/a", None, None, None],
    ]
    for row in rows:
        sheet.append(row)
    sheet.merge_cells("C5:C7")
    sheet.row_dimensions[8].hidden = True
    sheet.column_dimensions["J"].hidden = True
    sheet["D5"].comment = Comment("changed to CLP 320 in 2025?", "planner")
    for cell in ("E5", "E6", "E7", "E8"):
        sheet[cell].number_format = '0.0" L"'
    sheet["J5"].number_format = "0%"
    sheet["I6"].number_format = "yyyy-mm-dd hh:mm"
    notes = book.create_sheet("Notes")
    notes["B3"] = "Tags of the quarry begin with two letters."
    old = book.create_sheet("Old")
    old["A1"] = "tag"
    old["A2"] = "XX-1"
    old.sheet_state = "hidden"
    return book


def soffice(source, kind):
    """Has LibreOffice open a file and save it as another kind."""
    with tempfile.TemporaryDirectory() as folder:
        subprocess.run(
            ["soffice", "--headless", f"-env:UserInstallation=file://{folder}/profile",
             "--convert-to", kind, "--outdir", folder, str(source)],
            check=True, stdout=subprocess.DEVNULL)
        return (pathlib.Path(folder) / f"{source.stem}.{kind}").read_bytes()


def main():
    book = register()
    book.save(HERE / "openpyxl.xlsx")
    book = register()
    book.epoch = CALENDAR_MAC_1904
    book.save(HERE / "openpyxl-1904.xlsx")
    for kind in ("xlsx", "ods"):
        (HERE / f"libreoffice.{kind}").write_bytes(soffice(HERE / "openpyxl.xlsx", kind))
    (HERE / "libreoffice-1904.xlsx").write_bytes(soffice(HERE / "openpyxl-1904.xlsx", "xlsx"))
    rows = [["Anlage", "Bezeichnung", "Schmierstoff", "Füllung (L)", "Öltemp. °C"],
            ["KB-1", "Förderband; Antrieb", "CLP 220", "46,5", "60,0"],
            ["KB-2", "Kühlmühle", "ISO VG 320", "1.200", "52,5"]]
    lines = [";".join(f'"{c}"' if ";" in c else c for c in row) for row in rows]
    text = "\r\n".join(lines) + "\r\n"
    (HERE / "windows-1252.csv").write_bytes(text.encode("cp1252"))
    quoted = [",".join(f'"{c}"' if "," in c else c for c in row) for row in rows]
    (HERE / "bom.csv").write_bytes(("\r\n".join(quoted) + "\r\n").encode("utf-8-sig"))
    (HERE / "utf-16.csv").write_bytes(text.replace(";", "\t").encode("utf-16"))


if __name__ == "__main__":
    main()
