//! A change of the signing key: signed by the old key and the new one, and made so that a crash at any point is no loss.

use super::{Fingerprint, KeyFault, fingerprint, load, load_or_create};
use commissioning::journal::chain::hexadecimal;
use ed25519_dalek::{Signature, Signer as _, SigningKey, Verifier as _, VerifyingKey};
use std::fs::File;
use std::path::Path;

/// The key in use.
pub const IN_USE: &str = "signing-key.pem";
/// The key that is to follow it, until the change is in the journal.
pub const NEXT: &str = "signing-key.next.pem";

/// A change of key as the journal keeps it: public keys and signatures in lower-case hexadecimal.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Rotation {
    /// The key that is replaced.
    pub old: String,
    /// The key in its place.
    pub new: String,
    /// Signature of the old key.
    pub by_old: String,
    /// Signature of the new key.
    pub by_new: String,
}

/// What both keys sign.
fn words(old: &str, new: &str) -> String {
    format!("Asleft signing key changed\nold {old}\nnew {new}\n")
}

impl Rotation {
    /// From one key to another, signed by both.
    #[must_use]
    pub fn between(old: &SigningKey, new: &SigningKey) -> Self {
        let (old_public, new_public) = (public(old), public(new));
        let said = words(&old_public, &new_public);
        let signed = |key: &SigningKey| hexadecimal(&key.sign(said.as_bytes()).to_bytes());
        Self { by_old: signed(old), by_new: signed(new), old: old_public, new: new_public }
    }

    /// Whether both keys really signed it.
    #[must_use]
    pub fn holds(&self) -> bool {
        let said = words(&self.old, &self.new);
        let signed = |key: &str, signature: &str| {
            let key = bytes::<32>(key).and_then(|b| VerifyingKey::from_bytes(&b).ok());
            let signature = bytes::<64>(signature).map(|b| Signature::from_bytes(&b));
            key.zip(signature).is_some_and(|(key, signature)| key.verify(said.as_bytes(), &signature).is_ok())
        };
        signed(&self.old, &self.by_old) && signed(&self.new, &self.by_new)
    }
}

/// A public key as the journal writes it.
#[must_use]
pub fn public(key: &SigningKey) -> String {
    hexadecimal(key.verifying_key().as_bytes())
}

/// The fingerprint of a public key as the journal writes it; `None` when it is none.
#[must_use]
pub fn fingerprint_of(public: &str) -> Option<Fingerprint> {
    bytes::<32>(public).and_then(|b| VerifyingKey::from_bytes(&b).ok()).map(|key| fingerprint(&key))
}

/// The key that is to follow: made once, and found again when the change was cut short.
///
/// # Errors
/// When it cannot be read or made.
pub fn next(folder: &Path) -> Result<SigningKey, KeyFault> {
    load_or_create(&folder.join(NEXT))
}

/// Puts the key that the journal names last in place, when the change was recorded and then cut short, and removes one
/// that the journal does not name. Says whether there was something to put in place.
///
/// # Errors
/// When the files cannot be read or renamed.
pub fn settle(folder: &Path, newest: Option<&str>) -> Result<bool, KeyFault> {
    let next = folder.join(NEXT);
    let file = |e| KeyFault::File(next.display().to_string(), e);
    if !next.exists() {
        return Ok(false);
    }
    if newest != Some(public(&load(&next)?).as_str()) {
        // Made for a change that was never recorded. It may have been copied with the folder meanwhile: it is used no more.
        std::fs::remove_file(&next).map_err(file)?;
        return Ok(false);
    }
    // The former private key is gone with this: nothing can be signed with it any more.
    std::fs::rename(&next, folder.join(IN_USE)).map_err(file)?;
    File::open(folder).and_then(|f| f.sync_all()).map_err(file)?;
    Ok(true)
}

fn bytes<const N: usize>(hexadecimal: &str) -> Option<[u8; N]> {
    let digits = hexadecimal.as_bytes();
    if digits.len() != 2 * N {
        return None;
    }
    let digit = |b: u8| char::from(b).to_digit(16).and_then(|d| u8::try_from(d).ok());
    let mut bytes = [0; N];
    for (byte, pair) in bytes.iter_mut().zip(digits.chunks_exact(2)) {
        *byte = (digit(*pair.first()?)? << 4) | digit(*pair.get(1)?)?;
    }
    Some(bytes)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn key(n: u8) -> SigningKey {
        SigningKey::from_bytes(&[n; 32])
    }

    #[test]
    fn a_change_holds_only_as_both_keys_signed_it() {
        let made = Rotation::between(&key(1), &key(2));
        assert!(made.holds());
        let other = Rotation::between(&key(3), &key(4));
        for forged in [
            Rotation { old: other.old.clone(), ..made.clone() },
            Rotation { new: other.new.clone(), ..made.clone() },
            Rotation { by_old: other.by_old.clone(), ..made.clone() },
            Rotation { by_new: made.by_old.clone(), ..made.clone() },
            Rotation { old: made.new.clone(), new: made.old.clone(), ..made.clone() },
            Rotation { by_old: String::new(), ..made.clone() },
            Rotation { old: "z".repeat(64), ..made.clone() },
        ] {
            assert!(!forged.holds(), "{forged:?}");
        }
        assert_eq!(fingerprint_of(&made.old), Some(fingerprint(&key(1).verifying_key())));
        assert_eq!(fingerprint_of("ab"), None);
    }

    #[test]
    fn a_change_cut_short_is_settled_by_what_the_journal_says() {
        let folder = std::env::temp_dir().join(format!("asleft-rotation-{}", std::process::id()));
        std::fs::create_dir_all(&folder).unwrap();
        let old = load_or_create(&folder.join(IN_USE)).unwrap();
        assert!(!settle(&folder, None).unwrap(), "nothing is under way");
        let new = next(&folder).unwrap();
        assert_eq!(public(&next(&folder).unwrap()), public(&new), "made once");
        assert!(!settle(&folder, Some(&public(&old))).unwrap(), "the change is not in the journal");
        assert!(!folder.join(NEXT).exists(), "a key made for nothing is used no more");
        let new = next(&folder).unwrap();
        assert_eq!(public(&load(&folder.join(IN_USE)).unwrap()), public(&old));
        assert!(settle(&folder, Some(&public(&new))).unwrap());
        assert_eq!(public(&load(&folder.join(IN_USE)).unwrap()), public(&new));
        assert!(!folder.join(NEXT).exists() && !settle(&folder, Some(&public(&new))).unwrap());
        std::fs::remove_dir_all(folder).unwrap();
    }
}
