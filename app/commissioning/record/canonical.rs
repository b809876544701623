//! The canonical record: what a signature's digest covers, and what record.json holds.

mod contradiction;
mod numbers;
mod parts;
mod rebuild;
#[cfg(test)]
mod schema;
#[cfg(test)]
mod tests;
mod unread;

pub use parts::{
    DrivePart, EntryPart, FieldPart, FreeRow, OtherwisePart, ParameterPart, RecordPart, RemarkPart, SitePart,
};
pub use rebuild::Rebuilt;

use super::{Signature, Status};
use crate::journal::Head;
use crate::journal::chain::hexadecimal;
use crate::judge::{self, Judged, View};
use crate::procedure::Procedure;
use serde::{Deserialize, Serialize};
use sha2::{Digest, Sha256};

/// What `format` says in every file.
pub const FORMAT: &str = "asleft-record";
/// The version of the format that is written.
pub const VERSION: u32 = 1;

/// record.json: all that a check needs to be worked out again without the store, and all that was signed.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct RecordFile {
    /// Always `asleft-record`.
    pub format: String,
    /// Version of this format.
    pub version: u32,
    /// Version of the check catalogue that gave the verdicts.
    pub catalogue: u32,
    /// The site: as it stood at the signing, once signed.
    pub site: SitePart,
    /// The drive with its plates.
    pub drive: DrivePart,
    /// The procedure that the record keeps, whole.
    pub procedure: Procedure,
    /// The record, once begun.
    pub record: Option<RecordPart>,
    /// Every verdict with its working: frozen at the signing, once signed.
    pub verdicts: Vec<Judged>,
    /// End of the drive's chain.
    pub head: Head,
}

/// Why a file is no record.json: where and what.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
#[error("{path}: {message}")]
pub struct ReadFault {
    /// Path to the value at fault: `record.entries[3].slot.standing[0].value`.
    pub path: String,
    /// What is wrong there.
    pub message: String,
}

impl RecordFile {
    /// The file of a drive with these verdicts.
    #[must_use]
    pub fn of(view: &View<'_>, verdicts: &[Judged]) -> Self {
        let record = view.drive.record.as_ref();
        let frozen_site = record.and_then(|r| r.frozen_site.clone());
        let standing = record.and_then(|r| r.signatures.iter().rev().find(|s| !s.superseded));
        Self {
            format: FORMAT.to_owned(),
            version: VERSION,
            catalogue: standing.map_or(engineering::CATALOGUE_VERSION, |s| s.catalogue),
            site: frozen_site.unwrap_or_else(|| SitePart::of(view.site)),
            drive: DrivePart::of(view.drive),
            procedure: view.procedure.clone(),
            record: record.map(RecordPart::of),
            verdicts: verdicts.to_vec(),
            head: view.drive.head.clone(),
        }
    }

    /// The file as a reader or signer is shown it: frozen verdicts once signed, freshly judged ones before.
    #[must_use]
    pub fn shown(view: &View<'_>) -> Self {
        match view.drive.record.as_ref().and_then(|r| r.frozen.as_deref()) {
            Some(frozen) => Self::of(view, frozen),
            None => Self::of(view, &judge::all(view)),
        }
    }

    /// As text: indented, always in the same order, with a line feed at its end.
    #[must_use]
    pub fn to_json(&self) -> String {
        // Every part has text keys and finite numbers, so that writing cannot fail.
        let mut text = serde_json::to_string_pretty(self).unwrap_or_default();
        text.push('\n');
        text
    }

    /// Reads a file; what this version does not know is refused, with its path.
    ///
    /// # Errors
    /// Where and what.
    pub fn read(text: &str) -> Result<Self, ReadFault> {
        /// What tells a format and its version, whatever else there is.
        #[derive(Deserialize)]
        struct Opening {
            format: String,
            version: u32,
        }
        let fault = |path: &str, message: String| ReadFault { path: path.to_owned(), message };
        let opening: Opening = serde_json::from_str(text).map_err(|e| fault(".", e.to_string()))?;
        if opening.format != FORMAT {
            return Err(fault(
                "format",
                format!("this is “{}”, not “{FORMAT}”", crate::typed::shorten(&opening.format)),
            ));
        }
        if opening.version != VERSION {
            let found = opening.version;
            return Err(fault(
                "version",
                format!("this is version {found} of the format; this program reads version {VERSION}"),
            ));
        }
        let mut reader = serde_json::Deserializer::from_str(text);
        let file: Self = serde_path_to_error::deserialize(&mut reader)
            .map_err(|e| fault(&e.path().to_string(), e.inner().to_string()))?;
        reader.end().map_err(|e| fault(".", e.to_string()))?;
        let given = serde_json::from_str(text).map_err(|e| fault(".", e.to_string()))?;
        let taken = serde_json::to_value(&file).map_err(|e| fault(".", e.to_string()))?;
        match unread::first(&given, &taken) {
            Some(path) => Err(fault(&path, "this version knows no such member".to_owned())),
            None => Ok(file),
        }
    }

    /// SHA-256 over the canonical bytes of all that a signature put now would bind.
    #[must_use]
    pub fn digest(&self) -> String {
        self.clone().digest_with(usize::MAX, u64::MAX)
    }

    /// The same for the signature of this number, counted from 0, as its signer was shown the record; `None` when
    /// there is no such signature or a return or reopening superseded it, since the content went on from there.
    #[must_use]
    pub fn digest_at(&self, number: usize) -> Option<String> {
        let signature: &Signature = self.record.as_ref()?.signatures.get(number)?;
        let (upto, superseded) = (signature.head.sequence, signature.superseded);
        (!superseded).then(|| self.clone().digest_with(number, upto))
    }

    /// Takes out what a signature cannot cover (itself, what came after it, and what merely follows from the chain).
    fn digest_with(mut self, signatures: usize, upto: u64) -> String {
        self.head = Head::empty();
        self.drive.last_change = crate::Timestamp::EPOCH;
        if let Some(record) = &mut self.record {
            record.cut(signatures, upto);
            record.status = Status::InProgress { returned: None };
        }
        let bytes = serde_json_canonicalizer::to_vec(&self).unwrap_or_default();
        hexadecimal(&Sha256::digest(&bytes))
    }
}
