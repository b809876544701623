//! The document as plain values: what the template lays out, in its order, every string final.

mod cover;
mod ending;
mod parameters;
mod phases;
mod plates;
mod verdicts;
mod words;

use crate::charts::Drawn;
use crate::key::Fingerprint;
use crate::material::{Material, Photograph};
use commissioning::procedure::Procedure;
use commissioning::record::canonical::{RecordFile, RecordPart};
use commissioning::record::{Photo, Status};
use serde_json::{Value, json};

/// What every page of the sheet is written from.
pub(crate) struct Pages<'a> {
    pub(crate) material: &'a Material,
    pub(crate) file: &'a RecordFile,
    pub(crate) record: &'a RecordPart,
    pub(crate) procedure: &'a Procedure,
    pub(crate) key: &'a Fingerprint,
    pub(crate) charts: &'a [Drawn],
    /// Whether pictures are printed; a picture that the typesetter cannot read must not cost the document.
    pub(crate) pictures: bool,
}

/// Name of a picture in the template and in the package's folder.
pub(crate) fn picture_name(photo: &Photo) -> Option<String> {
    Some(format!("{}.{}", photo.hash, Photograph::ending(&photo.media)?))
}

impl Pages<'_> {
    /// The whole sheet.
    pub(crate) fn sheet(&self) -> Value {
        let state = match &self.record.status {
            Status::Accepted { at } => format!("accepted {}", at.date()),
            Status::Signed { at } => format!("signed {}, not accepted", at.date()),
            Status::InProgress { returned: Some(_) } => "returned, not accepted".to_owned(),
            Status::InProgress { returned: None } => "in progress, not accepted".to_owned(),
        };
        let tag = &self.file.drive.tag;
        json!({
            "title": format!("{tag}: commissioning record, revision {}", self.record.revision),
            "firm": self.material.firm,
            "tag": tag,
            "name": self.file.drive.name,
            "place": self.place(),
            "revision": self.record.revision,
            "state": state,
            "accepted": matches!(self.record.status, Status::Accepted { .. }),
            "cover": self.cover(),
            "phases": self.phases(),
            "plates": self.plates(),
            "plate-checks": self.plate_checks(),
            "parameters": self.parameters(),
            "parameter-checks": self.parameter_checks(),
            "findings": self.findings(),
            "remarks": self.general_remarks(),
            "photos": self.photo_list(),
            "signatures": self.signatures(),
            "history": self.history(),
            "instruments": self.instruments(),
            "proof": self.proof(),
        })
    }

    fn place(&self) -> String {
        let field = |key: &str| self.drive_words(commissioning::plant::Sheet::Drive, key);
        let parts = [Some(self.file.site.name.clone()), field("location"), field("panel")];
        parts.into_iter().flatten().filter(|p| !p.is_empty()).collect::<Vec<_>>().join(" · ")
    }
}
