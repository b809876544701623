//! What a package is made from: the record, the chains that prove it, the pictures.

use commissioning::journal::Sealed;
use commissioning::record::canonical::RecordFile;

/// A picture with its original bytes.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Photograph {
    /// SHA-256 of the bytes, lower-case hexadecimal.
    pub hash: String,
    /// `image/jpeg`, `image/png` or `image/webp`.
    pub media: String,
    /// The original bytes.
    pub bytes: Vec<u8>,
}

impl Photograph {
    /// The ending of its file's name; only the three kinds that are accepted have one.
    #[must_use]
    pub fn ending(media: &str) -> Option<&'static str> {
        match media {
            "image/jpeg" => Some("jpg"),
            "image/png" => Some("png"),
            "image/webp" => Some("webp"),
            _ => None,
        }
    }
}

/// What a package is made from.
#[derive(Clone, Debug)]
pub struct Material {
    /// The firm's name, for the cover.
    pub firm: String,
    /// The record as its signers were shown it.
    pub record: RecordFile,
    /// The drive's chain, whole.
    pub chain: Vec<Sealed>,
    /// The site's chain, whole.
    pub site_chain: Vec<Sealed>,
    /// Every picture that the record's entries name.
    pub photos: Vec<Photograph>,
}
