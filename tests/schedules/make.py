#!/usr/bin/env python3
"""Makes the messy schedules and read-outs of this folder: python3 make.py.

It needs openpyxl and msoffcrypto-tool, and soffice for the files that another office suite saved.

Everything in them is invented. What is expected of each stands beside it, in NAME.expected.
"""

import datetime
import io
import pathlib
import re
import shutil
import subprocess
import tempfile
import zipfile

import msoffcrypto
import openpyxl
from openpyxl.styles import Font

HERE = pathlib.Path(__file__).parent
DAY = datetime.datetime(2026, 3, 2, 8, 0, 0)


def text(name, content, encoding="utf-8"):
    (HERE / name).write_bytes(content.replace("\n", "\r\n").encode(encoding))


def settled(data, more=(), leave=()):
    """The same archive with one date everywhere, no program's name, and further parts."""
    out = io.BytesIO()
    with zipfile.ZipFile(io.BytesIO(data)) as old, zipfile.ZipFile(out, "w", zipfile.ZIP_DEFLATED) as new:
        parts = [(i.filename, old.read(i.filename)) for i in old.infolist() if i.filename not in leave] + list(more)
        for part, content in parts:
            if part == "docProps/core.xml":
                content = re.sub(rb">[0-9T:-]+Z<", b">2026-03-02T08:00:00Z<", content)
            if part == "docProps/app.xml":
                content = re.sub(rb"(<Application>|<AppVersion>)[^<]*<", rb"\1<", content)
            info = zipfile.ZipInfo(part, (2026, 3, 2, 8, 0, 0))
            info.compress_type = zipfile.ZIP_DEFLATED
            new.writestr(info, content)
    return out.getvalue()


def book(name, fill, more=()):
    made = openpyxl.Workbook()
    fill(made)
    made.properties.creator = "schedule tests"
    made.properties.created = made.properties.modified = DAY
    out = io.BytesIO()
    made.save(out)
    (HERE / name).write_bytes(settled(out.getvalue(), more))


def rows(sheet, lines):
    for line in lines:
        sheet.append(line)


PLAIN = [
    ["Tag No.", "Description", "Motor power [kW]", "Voltage [V]", "FLC [A]", "Speed [rpm]", "cos φ", "Efficiency [%]"],
    ["M-101", "Feed pump 1", 75, 400, 131, 1485, 0.87, 95.0],
    ["M-102", "Feed pump 2", 75, 400, 131, 1485, 0.87, 95.0],
    ["M-103", "Exhaust fan", 11, 400, 20.9, 1470, 0.83, 91.4],
]


def plain(wb):
    wb.active.title = "Motors"
    rows(wb.active, PLAIN)


def grouped(wb):
    s = wb.active
    s.title = "Antriebe"
    rows(s, [
        ["Motor and cable schedule, hall 3"], ["Revision C"], [],
        ["Tag", "Service", "Motor", None, None, "Cable", None, "VFD", None],
        [None, None, "Power\nkW", "Current\nA", "Speed\n1/min", "Length\nm", "Size\nmm²", "Type", "Current\nA"],
        ["P-01", "Sump pump", 22, 41, 1465, 35, 10, "KX22", 45],
        ["P-02", "Sump pump", 22, 41, 1465, 48, 16, "KX22", 45],
    ])
    for area in ["A1:I1", "A4:A5", "B4:B5", "C4:E4", "F4:G4", "H4:I4"]:
        s.merge_cells(area)
    s["A1"].font = Font(bold=True)


def units_below(wb):
    rows(wb.active, [
        ["Equipment No", "Equipment description", "Rated power", "Rated voltage", "Rated current", "Cable length"],
        [None, None, "kW", "V", "A", "m"],
        ["K-7", "Air compressor", 160, 690, 165, 120],
    ])


def cells_with_units(wb):
    rows(wb.active, [
        ["Tag", "Power", "Voltage", "Speed", "PF", "Weight"],
        ["M-1", "75 kW", "400V", "1 485 rpm", "0,86", "480 kg"],
        ["M-2", "100 HP", "0.46 kV", "1785 1/min", "0.9", "0,5 t"],
        ["M-3", "5,5kW", "400 V AC", "1450 min⁻¹", "0,81 lag", "61"],
    ])


def dates(wb):
    s = wb.active
    rows(s, [["Tag", "kW", "A", "Delivered"], ["M-1", 1.5, 3.4, None], ["M-2", None, 4.6, None]])
    s["B3"] = datetime.date(2026, 5, 1)
    s["D2"] = datetime.date(2026, 1, 15)
    s["D3"] = datetime.date(2026, 1, 16)


def faults(wb):
    s = wb.active
    rows(s, [["Tag", "kW", "A", "rpm"], ["M-1", 75, "#REF!", 1485], ["M-2", None, 20.9, 1470], ["#N/A", 11, 20.9, 1470]])
    s["C2"].data_type = "e"
    s["A4"].data_type = "e"
    s["B3"] = "=B2/2"


def twins(wb):
    rows(wb.active, [
        ["Tag", "kW"], ["M-1", 75], ["M-2", 11], ["m-1", 75], ["M-3", 5.5], ["M-1", 75],
    ])


def sums(wb):
    rows(wb.active, [
        ["Item", "Tag", "Description", "kW", "V"],
        [None, None, "Pump house", None, None],
        [1, "M-1", "Feed pump", 75, 400],
        [2, "M-2", "Feed pump", 75, 400],
        [None, None, "Sub-total pump house", 150, None],
        [],
        [None, None, "Boiler", None, None],
        [3, "M-3", "Fan", 90, 400],
        ["Total", None, None, 240, None],
    ])


def sheets(wb):
    cover = wb.active
    cover.title = "Cover"
    rows(cover, [["Project"], ["Hall 3"], ["Rev C"]])
    old = wb.create_sheet("Old list")
    rows(old, PLAIN)
    old.sheet_state = "hidden"
    rows(wb.create_sheet("Drives"), [["Tag", "kW", "A", "V"], ["M-9", 4, 8.1, 400]])
    rows(wb.create_sheet("Cables"), [["Cable no", "Length"], ["W-9", 20]])


def percent(wb):
    s = wb.active
    rows(s, [["Tag", "kW", "Efficiency"], ["M-1", 75, 0.951], ["M-2", 11, 0.914]])
    s["C2"].number_format = s["C3"].number_format = "0.0%"


def dual(wb):
    rows(wb.active, [
        ["Tag", "kW", "Voltage (V)", "Current (A)", "Connection"],
        ["M-1", 11, "400/690", "20,9/12,1", "D"],
        ["M-2", 11, "400Δ/690Y V", 20.9, "delta"],
        ["M-3", 11, 400, 20.9, "Y"],
    ])


def typed_as_text(wb):
    rows(wb.active, [
        ["Tag", "kW", "rpm", "A", "Cable length [m]"],
        ["M-1", "75", "1485", "131,0", "1,200"],
        ["M-2", "90", "1488", "157.5", "85"],
        ["M-3", "5.5", "2,905", "10.4", "1,050.5"],
    ])


def odd_headers(wb):
    rows(wb.active, [
        ["Tag\u00a0Nr.", "Nenn-\nleistung (kW)", " Nennstrom  [A] ", "Drehzahl\n[min-1]", "Schutzart", "Bemerkung"],
        ["M-1", 7.5, 14.6, 1465, "IP55", "neu"],
    ])


def numbered(wb):
    rows(wb.active, [["Motor No", "kW", "Poles"], [101, 75, 4], [102, 90, "2-pole"], ["00103", 11, "4P"], [104.5, 3, 6]])


def american(wb):
    rows(wb.active, [
        ["Equipment Tag", "Service", "HP", "Volts", "FLA", "RPM", "Hz", "S.F.", "Frame", "Enclosure", "Cable length ft"],
        ["CV-301", "Belt conveyor", 50, 460, 60, 1775, 60, 1.15, "326T", "TEFC", 150],
        ["CV-302", "Screw", "1/2 HP", 460, 1.1, 1725, 60, 1.15, "56C", "TEFC", 80],
    ])


def readout(wb):
    s = wb.active
    s.title = "Parameters"
    rows(s, [["Saved from the drive"], [], ["Parameter", "Name", "Value", "Unit"],
             ["A10", "accel", 12.5, "s"], ["A11", "decel", 20, "s"], ["A20", "stop", "1", None], ["Q99", "own", "x", None]])


def main():
    book("01-plain.xlsx", plain)
    book("02-titles-and-groups.xlsx", grouped)
    book("03-units-below.xlsx", units_below)
    text("04-german.csv", """Motorliste;;;;;;;;
AKZ;Bezeichnung;Nennleistung in kW;Nennspannung;Nennstrom;Drehzahl (1/min);Wirkungsgrad;Kabellänge;Lastart
+A1-M1;Kühlwasserpumpe;75;400;131,0;1485;0,95;85;Pumpe
M-2;Abluft;11;400;20,9;1470;0,914;40;Lüfter
M-3;Förderband;5,5;400;10,8;1.455;0,896;12;Förderband
""", "cp1252")
    text("05-french.csv", """Repère;Désignation;Puissance (kW);Tension;Courant nominal;Vitesse tr/min;Facteur de puissance;Rendement;Machine entraînée
P-1;Pompe d'alimentation;75;400;131,0;1485;0,87;95,0;pompe
V-1;Ventilateur;11;400;20,9;1470;0,83;91,4;ventilateur
""", "utf-8-sig")
    book("06-units-in-cells.xlsx", cells_with_units)
    text("07-thousands-asked.csv", """Tag,kW,rpm
M-1,75,"1,485"
M-2,11,"1,470"
""")
    text("08-thousands-shown.csv", """Tag;kW;rpm;A
M-1;1.250;1.488;1.485
M-2;0,75;1.472,5;990
""")
    text("09-thin-blanks.csv", "Tag;Speed (rpm);Weight (kg)\nM-1;1\u2009485;1\u00a0250\nM-2;2\u202f970;1'100,5\nM-3;14 85;980\n")
    book("10-dates.xlsx", dates)
    book("11-errors.xlsx", faults)
    book("12-twins.xlsx", twins)
    book("13-sums.xlsx", sums)
    book("14-several-sheets.xlsx", sheets)
    book("15-percent-cells.xlsx", percent)
    text("16-parts-of-one.csv", "Tag,kW,Efficiency %,PF\nM-1,75,0.951,0.87\nM-2,11,0.914,1.83\n")
    book("17-two-voltages.xlsx", dual)
    text("18-conductors.csv", "Tag;Cable no;Cable size;Cable length\nM-1;W-1;3x95+50;85 m\nM-2;W-2;4G2,5 mm²;120 ft\nM-3;W-3;4/0 AWG;1.250\nM-4;W-4;70;n/a\n")
    book("19-numbers-as-text.xlsx", typed_as_text)
    book("20-odd-headers.xlsx", odd_headers)
    text("21-tabs.txt", "Tag\tkW\tLocation\nM-1\t75\tHall 3; bay 2\nM-2\t11\tHall \"B\", roof\n")
    text("22-utf16.txt", "Tag\tBezeichnung\tkW\nM-1\tKühlpumpe\t75\n", "utf-16")
    book("23-numbered.xlsx", numbered)
    text("24-contradictions.csv", "Tag;kW;V;A;PF;Eff (%)\nM-1;11;400;20,9;0,83;91,4\nM-2;11;400;36,2;0,83;91,4\nM-3;110;400;20,9;0,83;91,4\n")
    text("25-other-site.csv", "Site,Tag,kW\nLarch Ferry,M-1,75\nlarch-ferry,M-2,11\nElm Quay,M-3,5.5\n")
    book("26-american.xlsx", american)
    text("27-header-again.csv", "Tag,kW,A\nM-1,75,131\n\nPage 2\nTag,kW,A\nM-2,11,20.9\n,,\n")
    text("28-not-known.csv", "Tag;kW;A;Maker;Starts by itself\nM-1;tbc;-;n/a;x\nM-2;75;?;k.A.;x\nTBD;11;20,9;;\n")
    text("29-no-header.csv", "M-1;75;400\nM-2;11;400\n")
    text("30-out-of-range.csv", "Tag;kW;rpm;Hz;PF;Poles;Duty;Load\nM-1;75;5;50;1,2;4;S1;pump\nM-2;-3;1485;5000;0,86;99;S12;crusher\n")
    book("31-macros.xlsm", plain, [("xl/vbaProject.bin", b"invented")])
    text("32-readout-lines.txt", "Read-out of drive M-1\nA10 12,5 s\nA11 = 1000 ms\nA20: 1\nB04 1.485 rpm\nQ99 on\n")
    text("33-readout-table.csv", "Parameter,Name,Value,Unit\nA10,accel,1.485,s\nA11,decel,,s\nB07,limit,110,%\nA20,stop,7,\nA20,stop,7,\n")
    book("34-readout.xlsx", readout)
    text("35-page.xls", "<html><body><table><tr><td>Tag</td><td>kW</td></tr></table></body></html>\n")
    (HERE / "36-cut-off.xlsx").write_bytes((HERE / "01-plain.xlsx").read_bytes()[:2500])
    if not (HERE / "37-password.xlsx").exists():  # its bytes differ each time
        locked = io.BytesIO()
        msoffcrypto.OfficeFile(open(HERE / "01-plain.xlsx", "rb")).encrypt("larch", locked)
        (HERE / "37-password.xlsx").write_bytes(locked.getvalue())
    through_an_office_suite()


def through_an_office_suite():
    """Files as another office suite saves them; left as they are where none is installed."""
    soffice = shutil.which("soffice")
    if soffice is None:
        print("no soffice here: 40 to 44 are left as they are")
        return
    with tempfile.TemporaryDirectory() as folder:
        for source, ending, target in [
            ("02-titles-and-groups.xlsx", "xlsx", "40-saved-again.xlsx"),
            ("15-percent-cells.xlsx", "xlsx", "41-percent-saved-again.xlsx"),
            ("01-plain.xlsx", "xls", "42-old-format-renamed.xlsx"),
            ("01-plain.xlsx", "ods", "43-open-document.ods"),
            ("11-errors.xlsx", "xlsx", "44-formulas-worked-out.xlsx"),
        ]:
            home = f"-env:UserInstallation=file://{folder}/home"
            subprocess.run([soffice, home, "--headless", "--convert-to", ending, "--outdir", folder, str(HERE / source)],
                           check=True, capture_output=True)
            made = pathlib.Path(folder) / (pathlib.Path(source).stem + "." + ending)
            data = made.read_bytes()
            if ending == "ods":
                data = settled(data, leave=("meta.xml", "settings.xml", "Thumbnails/thumbnail.png"))
            if ending == "xlsx":
                data = settled(data)
            if ending == "xlsx" or not (HERE / target).exists():  # the others differ each time
                (HERE / target).write_bytes(data)


if __name__ == "__main__":
    main()
