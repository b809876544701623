//! Gathers what a package is made from: the one place where the store's chains and photos meet the handover crate.

use commissioning::DriveId;
use commissioning::journal::Chain;
use commissioning::record::canonical::RecordFile;
use handover::material::{Material, Photograph};
use std::collections::BTreeSet;
use store::{ReadFault, Store};

/// The hash of every picture that a record names, each once.
#[must_use]
pub fn hashes(file: &RecordFile) -> BTreeSet<String> {
    file.record.iter().flat_map(|r| r.photos()).map(|(_, _, photo)| photo.hash.clone()).collect()
}

/// The material for a drive's package; `None` when there is no such drive. Without a record, assembling refuses.
///
/// # Errors
/// When the store cannot be read.
pub async fn material(store: &Store, drive: DriveId) -> Result<Option<Material>, ReadFault> {
    let Some(view) = store.drive_view_by_id(drive).await? else { return Ok(None) };
    let record = RecordFile::shown(&view.view());
    let mut photos = Vec::new();
    for hash in hashes(&record) {
        // A photo that is named but gone is told by assembling, with its hash.
        if let Some((bytes, media)) = store.photo(&hash).await? {
            photos.push(Photograph { hash, media, bytes });
        }
    }
    Ok(Some(Material {
        firm: view.installation.firm.clone(),
        record,
        chain: store.chain(Chain::Drive(drive)).await?,
        site_chain: store.chain(Chain::Site(view.site.id)).await?,
        photos,
    }))
}
