//! What is read and what is refused, with bytes made here.

use super::*;
use std::io::{Cursor, Write};
use zip::write::SimpleFileOptions;

const TYPES: &str = r#"<?xml version="1.0"?><Types xmlns="http://schemas.openxmlformats.org/package/2006/content-types"><Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/><Default Extension="xml" ContentType="application/xml"/></Types>"#;
const ROOT: &str = r#"<?xml version="1.0"?><Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships"><Relationship Id="r1" Type="http://schemas.openxmlformats.org/officeDocument/2006/relationships/officeDocument" Target="xl/workbook.xml"/></Relationships>"#;
const BOOK: &str = r#"<?xml version="1.0"?><workbook xmlns="http://schemas.openxmlformats.org/spreadsheetml/2006/main" xmlns:r="http://schemas.openxmlformats.org/officeDocument/2006/relationships"><sheets><sheet name="Motors" sheetId="1" r:id="r1"/></sheets></workbook>"#;
const LINKS: &str = r#"<?xml version="1.0"?><Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships"><Relationship Id="r1" Type="http://schemas.openxmlformats.org/officeDocument/2006/relationships/worksheet" Target="worksheets/sheet1.xml"/></Relationships>"#;

fn packed(parts: &[(&str, &[u8])]) -> Vec<u8> {
    let mut zip = zip::ZipWriter::new(Cursor::new(Vec::new()));
    for (name, content) in parts {
        zip.start_file(*name, SimpleFileOptions::default()).unwrap();
        zip.write_all(content).unwrap();
    }
    zip.finish().unwrap().into_inner()
}

fn with_sheet(cells: &str, more: &[(&str, &[u8])]) -> Vec<u8> {
    let sheet = format!(
        r#"<?xml version="1.0"?><worksheet xmlns="http://schemas.openxmlformats.org/spreadsheetml/2006/main"><sheetData>{cells}</sheetData></worksheet>"#
    );
    let mut parts: Vec<(&str, &[u8])> = vec![
        ("[Content_Types].xml", TYPES.as_bytes()),
        ("_rels/.rels", ROOT.as_bytes()),
        ("xl/workbook.xml", BOOK.as_bytes()),
        ("xl/_rels/workbook.xml.rels", LINKS.as_bytes()),
        ("xl/worksheets/sheet1.xml", sheet.as_bytes()),
    ];
    parts.extend_from_slice(more);
    packed(&parts)
}

fn text(cell: &str) -> CellValue {
    CellValue::Text(cell.to_owned())
}

#[test]
fn numbers_words_errors_and_formulas_are_told_apart() {
    let cells = r##"<row r="2"><c r="A2"><v>75</v></c><c r="B2" t="inlineStr"><is><t>M-01</t></is></c>
        <c r="C2" t="e"><v>#REF!</v></c><c r="D2"><f>A2*2</f><v>150</v></c><c r="E2"><f>A2*3</f></c><c r="F2" t="b"><v>1</v></c></row>"##;
    let book = read(&with_sheet(cells, &[]), "list.xlsx").unwrap();
    let sheet = &book.sheets[0];
    assert_eq!((sheet.name.as_str(), sheet.height(), sheet.width()), ("Motors", 2, 6));
    let row: Vec<&CellValue> = (0..7).map(|c| sheet.cell(Address::new(1, c))).collect();
    let seen = [
        &CellValue::Number(75.0),
        &text("M-01"),
        &CellValue::Error("#REF!".into()),
        &CellValue::Number(150.0),
        &CellValue::Unsolved,
        &CellValue::Flag(true),
        &CellValue::Empty,
    ];
    assert_eq!(row, seen);
}

#[test]
fn macros_are_left_out_and_said() {
    let book = read(&with_sheet(r#"<row><c><v>1</v></c></row>"#, &[("xl/vbaProject.bin", b"x")]), "a.xlsm").unwrap();
    assert!(book.notices[0].contains("macros"), "{:?}", book.notices);
}

#[test]
fn a_bomb_is_counted_while_it_unfolds() {
    let limits = Limits { unpacked: 1 << 20, ..Limits::USUAL };
    let bomb = with_sheet("", &[("xl/media/x.xml", &vec![b' '; 3 << 20])]);
    assert!(bomb.len() < 20_000, "small as sent");
    assert_eq!(read_within(&bomb, "a.xlsx", &limits), Err(Unreadable::Unfolds { most: 1 << 20 }));
}

#[test]
fn one_far_cell_is_refused_by_name_and_not_unfolded() {
    let far = with_sheet(r#"<row r="1048576"><c r="XFD1048576"><v>1</v></c></row>"#, &[]);
    let said = read(&far, "a.xlsx").unwrap_err().to_string();
    assert!(said.contains("XFD1048576") && said.contains("Motors"), "{said}");
    let beyond = with_sheet(r#"<row r="1"><c r="ZZZZZZZZZZZZ1"><v>1</v></c></row>"#, &[]);
    assert!(matches!(read(&beyond, "a.xlsx"), Err(Unreadable::Damaged { .. } | Unreadable::TooFar { .. })));
    let limits = Limits { cells: 1, ..Limits::USUAL };
    let two = with_sheet(r#"<row><c><v>1</v></c><c><v>2</v></c></row>"#, &[]);
    assert!(matches!(read_within(&two, "a.xlsx", &limits), Err(Unreadable::TooMany { what: "cells", .. })));
    let aside = with_sheet(r#"<row r="1"><c r="CV1"><v>1</v></c></row>"#, &[]);
    let limits = Limits { cells: 99, ..Limits::USUAL };
    assert!(
        matches!(read_within(&aside, "a.xlsx", &limits), Err(Unreadable::TooMany { what: "cells", .. })),
        "100 wide"
    );
    assert!(matches!(read_within(";".repeat(99).as_bytes(), "a.csv", &limits), Err(Unreadable::TooMany { .. })));
    let limits = Limits { sheets: 0, ..Limits::USUAL };
    assert!(matches!(read_within(&two, "a.xlsx", &limits), Err(Unreadable::TooMany { what: "sheets", .. })));
    let limits = Limits { parts: 3, ..Limits::USUAL };
    assert!(matches!(read_within(&two, "a.xlsx", &limits), Err(Unreadable::TooMany { what: "parts", .. })));
    let limits = Limits { bytes: 3, ..Limits::USUAL };
    assert!(matches!(read_within(&two, "a.xlsx", &limits), Err(Unreadable::TooLarge { .. })));
}

#[test]
fn a_word_repeated_by_reference_counts_each_time() {
    let strings = format!(
        r#"<?xml version="1.0"?><sst xmlns="http://schemas.openxmlformats.org/spreadsheetml/2006/main"><si><t>{}</t></si></sst>"#,
        "x".repeat(1000)
    );
    let cells = format!("<row>{}</row>", r#"<c t="s"><v>0</v></c>"#.repeat(50));
    let file = with_sheet(&cells, &[("xl/sharedStrings.xml", strings.as_bytes())]);
    let limits = Limits { words: 10_000, ..Limits::USUAL };
    assert!(matches!(read_within(&file, "a.xlsx", &limits), Err(Unreadable::TooMany { what: "letters", .. })));
}

#[test]
fn what_is_no_xlsx_is_refused_by_what_it_is() {
    let ole = |name: &str| {
        let mut bytes = vec![0xD0, 0xCF, 0x11, 0xE0, 0xA1, 0xB1, 0x1A, 0xE1];
        bytes.extend(vec![0; 504]);
        bytes.extend(name.encode_utf16().flat_map(u16::to_le_bytes));
        bytes
    };
    let whole = with_sheet(r#"<row><c><v>1</v></c></row>"#, &[]);
    for (bytes, word) in [
        (ole("EncryptedPackage"), "password"),
        (ole("Workbook"), ".xls"),
        (ole("WordDocument"), "office"),
        (b"\x09\x08\x10\x00\x00\x06".to_vec(), ".xls"),
        (whole[..whole.len() / 2].to_vec(), "cut off"),
        (packed(&[("content.xml", b"x")]), "OpenDocument"),
        (packed(&[("xl/workbook.bin", b"x")]), ".xlsb"),
        (packed(&[("word/document.xml", b"x")]), "text document"),
        (packed(&[("xl/workbook.xml", b"<broken")]), "damaged"),
        (b"%PDF-1.7".to_vec(), "PDF"),
        (b"  <html><table>".to_vec(), "web page"),
        (b"a\0b".to_vec(), "another kind"),
        (Vec::new(), "empty"),
        (b"\r\n \r\n".to_vec(), "empty"),
        (b";;;\r\n;;;".to_vec(), "empty"),
        (with_sheet("", &[]), "empty"),
    ] {
        let said = read(&bytes, "list.xlsx").unwrap_err().to_string();
        assert!(said.contains(word), "{word}: {said}");
    }
}

#[test]
fn text_files_show_their_separator_and_letters() {
    for (bytes, rows) in [
        (&b"tag;kW\r\nM-01;75,5\r\n"[..], vec![vec!["tag", "kW"], vec!["M-01", "75,5"]]),
        (b"\xEF\xBB\xBFtag,kW\nM-01,75.5", vec![vec!["tag", "kW"], vec!["M-01", "75.5"]]),
        (b"tag\tk\xB5\n\nM-01\t\"a\tb\n\"\"c\"\"\"\n", vec![vec!["tag", "kµ"], vec![], vec!["M-01", "a\tb\n\"c\""]]),
        (b"sep=,\na,b;c\n", vec![vec!["a", "b;c"]]),
        (b"a;1,5;2,5\nb;1,5;2,5", vec![vec!["a", "1,5", "2,5"], vec!["b", "1,5", "2,5"]]),
        (b"\xFF\xFEa\0\t\0b\0", vec![vec!["a", "b"]]),
        (b"pipe;3\" bore;2\npump;4\" bore;1", vec![vec!["pipe", "3\" bore", "2"], vec!["pump", "4\" bore", "1"]]),
    ] {
        let book = read(bytes, "a.csv").unwrap();
        let seen: Vec<Vec<String>> =
            book.sheets[0].rows.iter().map(|r| r.iter().map(CellValue::text).collect()).collect();
        assert_eq!(seen, rows);
    }
    assert!(read(b"k\xB5;1", "a.csv").unwrap().notices[0].contains("Windows-1252"));
    assert_eq!(read(b"a;b\nc;\"d\ne", "a.csv"), Err(Unreadable::OpenQuote { cell: "B2".into() }));
    let wide = ";x".repeat(500);
    assert!(matches!(read(wide.as_bytes(), "a.csv"), Err(Unreadable::TooFar { .. })));
    let long = "x;y\n".repeat(20_010);
    assert!(matches!(read(long.as_bytes(), "a.csv"), Err(Unreadable::TooFar { .. })));
}
