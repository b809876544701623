//! The document: every value found again, record.json attached, clean, the same every time, no markup from people.

use super::plant::{Stage, pump};
use super::tools::{Folder, run, succeed};
use ed25519_dalek::SigningKey;
use handover::{Material, Package, assemble};
use std::sync::OnceLock;

pub fn key() -> SigningKey {
    SigningKey::from_bytes(&[7; 32])
}

/// The accepted drive's package, made once for all tests.
pub fn accepted() -> &'static (Material, Package) {
    static MADE: OnceLock<(Material, Package)> = OnceLock::new();
    MADE.get_or_init(|| {
        let material = pump(Stage::Accepted).material();
        let package = assemble(&material, &key()).unwrap();
        (material, package)
    })
}

/// The document's words with blanks and breaks evened out.
fn words(package: &Package) -> String {
    let folder = Folder::new();
    std::fs::write(folder.path().join("d.pdf"), package.document()).unwrap();
    even(&succeed("pdftotext", &["-raw", "d.pdf", "-"], folder.path()))
}

fn even(text: &str) -> String {
    text.replace('\u{200b}', "").split_whitespace().collect::<Vec<_>>().join(" ")
}

/// With neither blanks nor breaks, for what may be broken over lines.
fn joined(text: &str) -> String {
    text.chars().filter(|c| !c.is_whitespace() && *c != '\u{200b}').collect()
}

#[test]
fn every_value_that_was_entered_is_found_in_the_document() {
    let (material, package) = accepted();
    let all = joined(&words(package));
    let record = material.record.record.as_ref().unwrap();
    let mut sought = 0;
    let mut seek = |value: &str| {
        sought += 1;
        assert!(all.contains(&joined(value)), "“{value}” is not in the document");
    };
    for part in &record.entries {
        for recorded in part.slot.standing().iter().chain(part.slot.earlier()) {
            let entry = &recorded.value;
            if entry.value.unit.is_some() {
                seek(&entry.value.shown());
            }
            if let Some(used) = &entry.instrument {
                seek(&used.0.serial);
                seek(&used.0.due);
            }
            seek(&recorded.by_name);
            seek(&recorded.received.shown());
        }
    }
    for field in material.record.drive.fields.iter().chain(&material.record.site.fields) {
        let typed = field.slot.current().unwrap().value.as_ref().unwrap();
        if typed.unit.is_some() || field.place.field == "serial" || field.place.field == "client" {
            seek(&typed.shown());
        }
    }
    for parameter in &record.parameters {
        let typed = parameter.slot.current().unwrap().value.as_ref().unwrap();
        seek(&typed.shown());
    }
    for judged in &material.record.verdicts {
        seek(&judged.outcome.summary);
        for line in &judged.outcome.working {
            seek(&line.result);
        }
        for source in &judged.outcome.sources {
            seek(&source.text);
        }
    }
    for signature in &record.signatures {
        seek(&signature.printed_name);
        seek(&signature.digest);
        seek(&signature.head.hash);
    }
    for words in [
        "decimal point misread",
        "tightened, pulled, holds",
        "nothing of the kind here",
        "crane in the way",
        "Imre Vandal",
        "display line 2 shows",
    ] {
        seek(words);
    }
    seek(&material.record.head.hash);
    seek(&package.fingerprint().0);
    assert!(sought > 200, "only {sought} values were sought");
}

#[test]
fn what_people_typed_is_never_markup_and_never_lost() {
    let all = words(&accepted().1);
    let typed = "#set page() *gland* of the motor cable is `loose` $x$ @ref <b> \\";
    assert!(joined(&all).contains(&joined(typed)), "markup stands as it was typed");
    for code in ["[U+6CF5]", "[U+1F600]", "[U+2610]"] {
        assert!(joined(&all).contains(code), "{code}");
    }
    assert!(all.contains("They are printed as their code point"));
}

#[test]
fn the_attached_record_is_the_file_byte_for_byte() {
    let (_, package) = accepted();
    let folder = Folder::new();
    std::fs::write(folder.path().join("d.pdf"), package.document()).unwrap();
    succeed("pdfdetach", &["-save", "1", "-o", "attached.json", "d.pdf"], folder.path());
    let attached = std::fs::read(folder.path().join("attached.json")).unwrap();
    assert!(attached == package.files()["record.json"], "the attachment differs from record.json");
}

#[test]
fn the_document_is_sound_tagged_and_says_its_standards() {
    let (_, package) = accepted();
    let folder = Folder::new();
    std::fs::write(folder.path().join("d.pdf"), package.document()).unwrap();
    succeed("qpdf", &["--check", "d.pdf"], folder.path());
    let told = succeed("pdfinfo", &["d.pdf"], folder.path());
    assert!(told.contains("Tagged:          yes"), "{told}");
    assert!(told.contains("PU-101: commissioning record, revision 1"), "{told}");
    let metadata = succeed("pdfinfo", &["-meta", "d.pdf"], folder.path());
    assert!(
        metadata.contains("<pdfaid:part>3</pdfaid:part>") && metadata.contains("<pdfaid:conformance>A<"),
        "{metadata}"
    );
    assert!(metadata.contains("pdfuaid:part>1<"), "{metadata}");
}

#[test]
fn the_same_record_gives_the_same_bytes() {
    let (material, package) = accepted();
    let again = assemble(material, &key()).unwrap();
    for (name, bytes) in package.files() {
        assert!(again.files()[name] == *bytes, "{name} differs");
    }
    assert!(again.to_zip().unwrap() == package.to_zip().unwrap());
}

#[test]
fn a_draft_says_so_on_every_page_and_an_accepted_record_nowhere() {
    for (stage, expected) in [(Stage::InProgress, true), (Stage::Signed, true), (Stage::Accepted, false)] {
        let package = assemble(&pump(stage).material(), &key()).unwrap();
        let folder = Folder::new();
        std::fs::write(folder.path().join("d.pdf"), package.document()).unwrap();
        let text = succeed("pdftotext", &["-layout", "d.pdf", "-"], folder.path());
        let pages: Vec<&str> = text.split('\u{c}').filter(|p| !p.trim().is_empty()).collect();
        assert!(pages.len() >= 4);
        for (n, page) in pages.iter().enumerate() {
            assert_eq!(page.contains("not accepted"), expected, "page {}: {page}", n + 1);
            assert!(page.contains(&format!("page {} of {}", n + 1, pages.len())), "page {} is not numbered", n + 1);
            assert!(page.contains("PU-101"), "page {} has no tag", n + 1);
        }
    }
}

#[test]
fn a_picture_that_cannot_be_printed_does_not_cost_the_document() {
    let mut plant = pump(Stage::InProgress);
    let item = plant
        .procedure
        .steps()
        .flat_map(|(_, s)| s.items.clone())
        .filter(|i| i.kind == commissioning::procedure::ItemKind::Photo)
        .nth(1);
    let item = item.expect("the procedure asks for two pictures or more").key;
    plant.photo(&item, "broken on the way", b"\x89PNG\r\n\x1a\nbroken".to_vec());
    let package = assemble(&plant.material(), &key()).unwrap();
    assert!(
        joined(&words(&package))
            .contains(&joined("This picture could not be printed; its original is in the package."))
    );
    assert_eq!(package.files().keys().filter(|n| n.starts_with("photos/")).count(), 2);
    assert!(run("qpdf", &["--version"], std::path::Path::new("/")).status.success());
}

/// Whatever one character a person types, the document is made: the bundled typefaces decide only how it looks.
#[test]
fn any_character_can_be_printed() {
    let mut plant = pump(Stage::InProgress);
    let blocks: [(u32, u32); 12] = [
        (0x20, 0x7e),
        (0xa0, 0x17f),
        (0x300, 0x36f),
        (0x370, 0x5ff),
        (0x600, 0x6ff),
        (0x900, 0x97f),
        (0xe00, 0xe7f),
        (0x2000, 0x23ff),
        (0x2500, 0x27bf),
        (0x3000, 0x30ff),
        (0xfe00, 0xffff),
        (0x1f300, 0x1f6ff),
    ];
    for (from, to) in blocks {
        let text: String = (from..=to).filter_map(char::from_u32).filter(|c| !c.is_control()).collect();
        plant.event(commissioning::journal::Fact::RemarkMade { step: String::new(), text }, None);
    }
    let package = assemble(&plant.material(), &key()).unwrap();
    let all = joined(&words(&package));
    assert!(all.contains("[U+202E]") && all.contains("[U+3042]") && all.contains("[U+1F680]") && all.contains("žſ"));
}
