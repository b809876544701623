//! Typesets the document: PDF/A-3a and PDF/UA-1, record.json attached byte for byte, the same bytes every time.

mod typefaces;
mod world;

pub(crate) use typefaces::Typefaces;

use crate::coverage::{self, Trust};
use serde_json::Value;
use typst::comemo;
use typst::diag::SourceDiagnostic;
use typst::foundations::{Datetime, Smart};
use typst_layout::PagedDocument;
use typst_pdf::{PdfOptions, PdfStandard, PdfStandards, Timestamp};
use world::Desk;

/// Why a document could not be typeset.
#[derive(Debug, thiserror::Error)]
#[error("the document could not be typeset: {0}")]
pub struct TypesetFault(pub String);

/// A picture laid into the document.
pub(crate) struct Picture {
    /// Name in the template: `photo-<hash>.jpg`.
    pub(crate) name: String,
    /// Its bytes.
    pub(crate) bytes: Vec<u8>,
}

/// Typesets one document. What is in `sheet` goes in as JSON strings, never as markup; `record` is attached as it is.
pub(crate) fn typeset(
    sheet: &Value,
    record: &str,
    pictures: &[Picture],
    moment: time::OffsetDateTime,
    identity: &str,
) -> Result<Vec<u8>, TypesetFault> {
    let attempt = |trust: Trust| {
        let typefaces = Typefaces::bundled();
        let mut sheet = sheet.clone();
        let substituted = coverage::make_printable(&mut sheet, typefaces, trust);
        if let Value::Object(map) = &mut sheet {
            map.insert("substituted".to_owned(), Value::Bool(substituted));
        }
        let result = set(&sheet, record, pictures, moment, identity, typefaces);
        // The cache is global and grows with every document, a failed one too.
        comemo::evict(0);
        result
    };
    // A document is owed whatever people type: what a typeface promises and does not keep costs only its letters.
    attempt(Trust::Covered).or_else(|_| attempt(Trust::Narrow))
}

fn set(
    sheet: &Value,
    record: &str,
    pictures: &[Picture],
    moment: time::OffsetDateTime,
    identity: &str,
    typefaces: Typefaces,
) -> Result<Vec<u8>, TypesetFault> {
    let json = serde_json::to_vec(sheet).map_err(|e| TypesetFault(e.to_string()))?;
    let desk = Desk::new(typefaces, json, record.as_bytes().to_vec(), pictures)?;
    let document = typst::compile::<PagedDocument>(&desk).output.map_err(|e| told(&e))?;
    let standards = PdfStandards::new(&[PdfStandard::A_3a, PdfStandard::Ua_1])
        .map_err(|e| TypesetFault(e.message().to_string()))?;
    let options = PdfOptions {
        ident: Smart::Custom(identity.to_owned()),
        creator: Smart::Custom(Some("Asleft".to_owned())),
        timestamp: date(moment).map(Timestamp::new_utc),
        standards,
        ..PdfOptions::default()
    };
    typst_pdf::pdf(&document, &options).map_err(|e| told(&e))
}

fn date(moment: time::OffsetDateTime) -> Option<Datetime> {
    let month = u8::from(moment.month());
    Datetime::from_ymd_hms(moment.year(), month, moment.day(), moment.hour(), moment.minute(), moment.second())
}

fn told(faults: &[SourceDiagnostic]) -> TypesetFault {
    let told: Vec<String> = faults.iter().map(|f| f.message.to_string()).collect();
    TypesetFault(told.join("; "))
}
