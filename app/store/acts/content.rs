//! Tells whether an act that comes again is the same act.

use crate::fault::Fault;
use commissioning::PersonId;
use commissioning::journal::Act;
use commissioning::journal::chain::hexadecimal;
use sha2::{Digest, Sha256};

/// SHA-256 over who sent it and what it says. How the password was proved is not part of it.
pub(crate) fn content_hash(actor: Option<PersonId>, act: &Act) -> Result<String, Fault> {
    let mut hasher = Sha256::new();
    hasher.update(serde_json::to_vec(&actor)?);
    hasher.update(b"\n");
    hasher.update(serde_json::to_vec(act)?);
    Ok(hexadecimal(&hasher.finalize()))
}
