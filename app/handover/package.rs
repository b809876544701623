//! Puts a package together: the document, the data, the chains, the sums and the signature over them.

use crate::key::{self, Fingerprint};
use crate::material::{Material, Photograph};
use crate::pdf::{self, Picture, TypesetFault};
use crate::sheet::{Pages, picture_name};
use crate::{archive, charts, events, instructions, parameters_csv};
use commissioning::journal::chain::hexadecimal;
use commissioning::journal::{ChainFault, Head, verify_chain};
use ed25519_dalek::SigningKey;
use sha2::{Digest, Sha256};
use std::collections::BTreeMap;
use std::path::Path;

/// The document.
pub const DOCUMENT: &str = "handover.pdf";
/// The data.
pub const RECORD: &str = "record.json";
/// The drive's chain.
pub const DRIVE_EVENTS: &str = "events/drive.events";
/// The site's chain.
pub const SITE_EVENTS: &str = "events/site.events";
/// The list of sums.
pub const SUMS: &str = "SHA256SUMS";
/// The signature over the list of sums.
pub const SIGNATURE: &str = "SHA256SUMS.sig";
/// The public key.
pub const PUBLIC_KEY: &str = "signing-key.pem";

/// Why no package could be made.
#[derive(Debug, thiserror::Error)]
pub enum AssembleFault {
    /// The drive has no record.
    #[error("this drive has no record yet; begin one first")]
    NoRecord,
    /// A chain is not whole.
    #[error("the journal of the {0} is not whole: {1}")]
    Chain(&'static str, ChainFault),
    /// The record was not written at the end of the chain that came with it.
    #[error("the record stands at event {record}, its journal ends at event {chain}")]
    Head {
        /// Where the record stands.
        record: u64,
        /// Where the chain ends.
        chain: u64,
    },
    /// A picture that the record names is not there or is another.
    #[error("the picture {0} is missing or is not the one that was recorded")]
    Photo(String),
    /// The document could not be typeset.
    #[error(transparent)]
    Typeset(#[from] TypesetFault),
    /// The parameter list could not be written.
    #[error("the parameter list could not be written: {0}")]
    Parameters(String),
}

/// A package: every file by its name.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Package {
    files: BTreeMap<String, Vec<u8>>,
    fingerprint: Fingerprint,
}

/// Puts a package together. The same material and key give the same bytes.
///
/// # Errors
/// When the material does not fit together, or the document cannot be typeset.
pub fn assemble(material: &Material, key: &SigningKey) -> Result<Package, AssembleFault> {
    let record = material.record.record.as_ref().ok_or(AssembleFault::NoRecord)?;
    let head = verify_chain(&material.chain).map_err(|e| AssembleFault::Chain("drive", e))?;
    let site_head = verify_chain(&material.site_chain).map_err(|e| AssembleFault::Chain("site", e))?;
    if head != material.record.head {
        return Err(AssembleFault::Head { record: material.record.head.sequence, chain: head.sequence });
    }
    let pictures = pictures(material)?;
    let fingerprint = key::fingerprint(&key.verifying_key());
    let json = material.record.to_json();
    let drawn = charts::of(&material.record);
    let mut pages = Pages {
        material,
        file: &material.record,
        record,
        procedure: &material.record.procedure,
        key: &fingerprint,
        charts: &drawn,
        pictures: true,
    };
    let moment = material.record.drive.last_change.moment();
    let identity = format!("{} {} {}", material.record.drive.id, record.revision, material.record.head.hash);
    let set =
        |pages: &Pages<'_>, pictures: &[Picture]| pdf::typeset(&pages.sheet(), &json, pictures, moment, &identity);
    let document = match set(&pages, &pictures) {
        // A picture that the typesetter cannot read must not cost the document: it is named and stays in its folder.
        Err(_) if !pictures.is_empty() => {
            pages.pictures = false;
            set(&pages, &[])?
        }
        other => other?,
    };

    let mut files = BTreeMap::from([
        (DOCUMENT.to_owned(), document),
        (RECORD.to_owned(), json.into_bytes()),
        ("parameters.csv".to_owned(), parameters_csv::write(&material.record).map_err(AssembleFault::Parameters)?),
        (DRIVE_EVENTS.to_owned(), events::write(&material.chain).into_bytes()),
        (SITE_EVENTS.to_owned(), events::write(&material.site_chain).into_bytes()),
        (PUBLIC_KEY.to_owned(), key::public_pem(key).into_bytes()),
    ]);
    let told = |head: &Head| format!("{} {}", head.sequence, head.hash);
    let how = instructions::text(&material.record.drive.tag, &fingerprint.0, &told(&head), &told(&site_head));
    files.insert("how-to-verify.txt".to_owned(), how.into_bytes());
    files.extend(pictures.into_iter().map(|p| (format!("photos/{}", p.name), p.bytes)));
    let sums = sums(&files);
    files.insert(SIGNATURE.to_owned(), key::sign(key, sums.as_bytes()).to_vec());
    files.insert(SUMS.to_owned(), sums.into_bytes());
    Ok(Package { files, fingerprint })
}

/// Every picture that a standing entry names, checked against its hash.
fn pictures(material: &Material) -> Result<Vec<Picture>, AssembleFault> {
    let Some(record) = &material.record.record else { return Ok(Vec::new()) };
    let mut found: BTreeMap<String, Vec<u8>> = BTreeMap::new();
    for (_, _, photo) in record.photos() {
        let missing = || AssembleFault::Photo(photo.hash.clone());
        let name = picture_name(photo).ok_or_else(missing)?;
        let given: &Photograph = material.photos.iter().find(|p| p.hash == photo.hash).ok_or_else(missing)?;
        if hexadecimal(&Sha256::digest(&given.bytes)) != photo.hash {
            return Err(missing());
        }
        found.insert(name, given.bytes.clone());
    }
    Ok(found.into_iter().map(|(name, bytes)| Picture { name, bytes }).collect())
}

/// The list of sums as `sha256sum` writes and reads it.
fn sums(files: &BTreeMap<String, Vec<u8>>) -> String {
    files.iter().map(|(name, bytes)| format!("{}  {name}\n", hexadecimal(&Sha256::digest(bytes)))).collect()
}

impl Package {
    /// Every file by its name, in order of name.
    #[must_use]
    pub const fn files(&self) -> &BTreeMap<String, Vec<u8>> {
        &self.files
    }

    /// The document.
    #[must_use]
    pub fn document(&self) -> &[u8] {
        self.files.get(DOCUMENT).map_or(&[], Vec::as_slice)
    }

    /// Fingerprint of the key that signed it.
    #[must_use]
    pub const fn fingerprint(&self) -> &Fingerprint {
        &self.fingerprint
    }

    /// As one archive, the same bytes every time.
    ///
    /// # Errors
    /// When the archive cannot be written.
    pub fn to_zip(&self) -> Result<Vec<u8>, String> {
        archive::write(&self.files)
    }

    /// Into a folder, which must be new or empty.
    ///
    /// # Errors
    /// When it is not, or a file cannot be written.
    pub fn to_folder(&self, folder: &Path) -> std::io::Result<()> {
        std::fs::create_dir_all(folder)?;
        if std::fs::read_dir(folder)?.next().is_some() {
            return Err(std::io::Error::new(std::io::ErrorKind::DirectoryNotEmpty, "the folder is not empty"));
        }
        for (name, bytes) in &self.files {
            let path = folder.join(name);
            if let Some(parent) = path.parent() {
                std::fs::create_dir_all(parent)?;
            }
            std::fs::write(path, bytes)?;
        }
        Ok(())
    }
}
