//! Verifies a package without the store: sums, signature, document, chains, record, signatures; then what would be judged today.

mod attached;
mod chains;
mod differences;

use crate::archive;
use crate::key;
use crate::package::{PUBLIC_KEY, RECORD, SIGNATURE, SUMS};
use commissioning::journal::Head;
use commissioning::journal::chain::hexadecimal;
use commissioning::judge::Judged;
use commissioning::record::canonical::RecordFile;
use serde::Serialize;
use sha2::{Digest, Sha256};
use std::collections::BTreeMap;
use std::path::Path;

pub use differences::Difference;

/// Something that is not as it was made.
#[derive(Clone, Debug, PartialEq, Eq, Serialize)]
pub struct Fault {
    /// The file at fault; empty for the whole.
    pub file: String,
    /// What is wrong, in a sentence.
    pub what: String,
}

/// What verification found.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize)]
pub struct Report {
    /// Whether nothing was changed: no fault. Differences of judgement do not count.
    pub ok: bool,
    /// Plant tag.
    pub tag: String,
    /// Revision of the record.
    pub revision: u32,
    /// Where the record stands, in words.
    pub status: String,
    /// How many files were checked.
    pub files: usize,
    /// Fingerprint of the key, to compare with the printed one.
    pub fingerprint: String,
    /// Head of the drive's chain, to compare with the printed one.
    pub drive_head: Option<Head>,
    /// Head of the site's chain.
    pub site_head: Option<Head>,
    /// Everything that is not as it was made.
    pub faults: Vec<Fault>,
    /// Verdicts that today's formulas give otherwise: not a fault of the package.
    pub differences: Vec<Difference>,
}

impl Report {
    fn fault(&mut self, file: &str, what: impl Into<String>) {
        self.faults.push(Fault { file: file.to_owned(), what: what.into() });
    }
}

/// Verifies a folder or an archive, and judges the record anew with this program's checks.
#[must_use]
pub fn verify(path: &Path) -> Report {
    verify_with(path, |file| {
        let rebuilt = file.rebuild()?;
        let view =
            commissioning::judge::View { drive: &rebuilt.drive, site: &rebuilt.site, procedure: &rebuilt.procedure };
        Ok(commissioning::judge::all(&view))
    })
}

/// The same with a judgement of one's own.
#[must_use]
pub fn verify_with(path: &Path, judge: impl Fn(&RecordFile) -> Result<Vec<Judged>, String>) -> Report {
    let mut report = Report::default();
    match archive::read(path) {
        Ok(files) => verify_files(&files, judge, &mut report),
        Err(what) => report.fault("", what),
    }
    report.ok = report.faults.is_empty();
    report
}

fn verify_files(
    files: &BTreeMap<String, Vec<u8>>,
    judge: impl Fn(&RecordFile) -> Result<Vec<Judged>, String>,
    report: &mut Report,
) {
    report.files = files.len();
    check_sums(files, report);
    check_signature(files, report);
    attached::check(files, report);
    let chains = chains::check(files, report);
    let Some(file) = read_record(files, report) else { return };
    report.tag.clone_from(&file.drive.tag);
    report.revision = file.record.as_ref().map_or(0, |r| r.revision);
    report.status = file.record.as_ref().map_or_else(|| "no record".to_owned(), |r| r.status.words().to_owned());
    chains::compare(&chains, &file, report);
    check_signing(&file, report);
    check_photos(files, &file, report);
    match judge(&file) {
        Ok(today) => report.differences = differences::between(&file.verdicts, &today),
        Err(what) => report.fault(RECORD, what),
    }
}

fn text<'a>(files: &'a BTreeMap<String, Vec<u8>>, name: &str, report: &mut Report) -> Option<&'a str> {
    let Some(bytes) = files.get(name) else {
        report.fault(name, "it is missing");
        return None;
    };
    let text = std::str::from_utf8(bytes).ok();
    if text.is_none() {
        report.fault(name, "it is no text");
    }
    text
}

/// Every file against its sum, every sum against its file.
fn check_sums(files: &BTreeMap<String, Vec<u8>>, report: &mut Report) {
    let Some(list) = text(files, SUMS, report) else { return };
    let mut listed: BTreeMap<&str, &str> = BTreeMap::new();
    for (n, line) in list.lines().enumerate() {
        match line.split_once("  ") {
            Some((sum, name)) if sum.len() == 64 && listed.insert(name, sum).is_none() => {}
            _ => report.fault(SUMS, format!("line {} is no sum, or names a file again", n + 1)),
        }
    }
    for (name, bytes) in files {
        match listed.remove(name.as_str()) {
            Some(sum) if hexadecimal(&Sha256::digest(bytes)) == sum => {}
            Some(_) => report.fault(name, "it was changed: its sum is another"),
            None if name == SUMS || name == SIGNATURE => {}
            None => report.fault(name, "it is not in the list of sums"),
        }
    }
    for name in listed.into_keys() {
        report.fault(name, "it is in the list of sums but missing");
    }
}

fn check_signature(files: &BTreeMap<String, Vec<u8>>, report: &mut Report) {
    let Some(pem) = text(files, PUBLIC_KEY, report) else { return };
    let (Some(sums), Some(signature)) = (files.get(SUMS), files.get(SIGNATURE)) else {
        report.fault(SIGNATURE, "it is missing");
        return;
    };
    match key::check(pem, sums, signature) {
        Ok(fingerprint) => report.fingerprint = fingerprint.0,
        Err(what) => report.fault(SIGNATURE, what),
    }
}

fn read_record(files: &BTreeMap<String, Vec<u8>>, report: &mut Report) -> Option<RecordFile> {
    let text = text(files, RECORD, report)?;
    match RecordFile::read(text) {
        Ok(file) if file.to_json() == text => Some(file),
        Ok(_) => {
            report.fault(RECORD, "it is not written as this format is written");
            None
        }
        Err(e) => {
            report.fault(RECORD, format!("it cannot be read: {e}"));
            None
        }
    }
}

/// Every signature that stands binds exactly this record.
fn check_signing(file: &RecordFile, report: &mut Report) {
    let Some(record) = &file.record else { return };
    for (n, signature) in record.signatures.iter().enumerate() {
        if file.digest_at(n).is_some_and(|digest| digest != signature.digest) {
            report.fault(RECORD, format!("the signature of {} binds another content", signature.printed_name));
        }
    }
}

/// Every picture that the record names is there under its hash.
fn check_photos(files: &BTreeMap<String, Vec<u8>>, file: &RecordFile, report: &mut Report) {
    let Some(record) = &file.record else { return };
    for (_, _, photo) in record.photos() {
        let name = crate::sheet::picture_name(photo).map(|n| format!("photos/{n}")).unwrap_or_default();
        match files.get(&name) {
            Some(bytes) if hexadecimal(&Sha256::digest(bytes)) == photo.hash => {}
            Some(_) => report.fault(&name, "it is not the picture that was recorded"),
            None => report.fault(&name, "it is missing"),
        }
    }
}
