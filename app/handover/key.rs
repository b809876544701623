//! The installation's signing key: an Ed25519 key in a file that only its owner reads, never in a package.

pub mod rotation;

use ed25519_dalek::pkcs8::spki::der::pem::LineEnding;
use ed25519_dalek::pkcs8::{DecodePrivateKey, DecodePublicKey, EncodePrivateKey, EncodePublicKey};
use ed25519_dalek::{Signer, SigningKey, Verifier, VerifyingKey};
use sha2::{Digest, Sha256};
use std::fmt;
use std::io::Write as _;
use std::os::unix::fs::{OpenOptionsExt as _, PermissionsExt as _};
use std::path::Path;

/// Why a key could not be had.
#[derive(Debug, thiserror::Error)]
pub enum KeyFault {
    /// The file could not be read or written.
    #[error("the signing key {0}: {1}")]
    File(String, std::io::Error),
    /// Others may read it.
    #[error(
        "the signing key {0} can be read by others (mode {1:o}); give it mode 600, and make a new key if it may have been copied"
    )]
    Open(String, u32),
    /// It is no Ed25519 key in PEM.
    #[error("the signing key {0} cannot be understood: {1}")]
    Unreadable(String, String),
    /// The system gave no random numbers.
    #[error("no random numbers: {0}")]
    Random(String),
}

/// SHA-256 over the public key as `openssl pkey -pubout -outform DER` writes it, lower-case hexadecimal.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Fingerprint(pub String);

impl fmt::Display for Fingerprint {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(&self.0)
    }
}

/// Loads the key of this file, or makes it, mode 0600, where there is none.
///
/// # Errors
/// When it cannot be read or written, is no key, or others may read it.
pub fn load_or_create(path: &Path) -> Result<SigningKey, KeyFault> {
    match load(path) {
        Err(KeyFault::File(_, e)) if e.kind() == std::io::ErrorKind::NotFound => create(path),
        other => other,
    }
}

/// Loads a key.
///
/// # Errors
/// When it cannot be read, is no key, or others may read it.
pub fn load(path: &Path) -> Result<SigningKey, KeyFault> {
    let name = path.display().to_string();
    let mode = std::fs::metadata(path).map_err(|e| KeyFault::File(name.clone(), e))?.permissions().mode() & 0o777;
    if mode & 0o077 != 0 {
        return Err(KeyFault::Open(name, mode));
    }
    let pem = std::fs::read_to_string(path).map_err(|e| KeyFault::File(name.clone(), e))?;
    SigningKey::from_pkcs8_pem(&pem).map_err(|e| KeyFault::Unreadable(name, e.to_string()))
}

/// Makes a new key where there is none yet.
///
/// # Errors
/// When a file is there already, or it cannot be written.
pub fn create(path: &Path) -> Result<SigningKey, KeyFault> {
    let name = path.display().to_string();
    let mut seed = [0_u8; 32];
    getrandom::fill(&mut seed).map_err(|e| KeyFault::Random(e.to_string()))?;
    let key = SigningKey::from_bytes(&seed);
    let pem = key.to_pkcs8_pem(LineEnding::LF).map_err(|e| KeyFault::Unreadable(name.clone(), e.to_string()))?;
    let file = |e| KeyFault::File(name.clone(), e);
    let mut out = std::fs::OpenOptions::new().write(true).create_new(true).mode(0o600).open(path).map_err(file)?;
    out.write_all(pem.as_bytes()).and_then(|()| out.sync_all()).map_err(file)?;
    if let Some(folder) = path.parent().filter(|p| !p.as_os_str().is_empty()) {
        std::fs::File::open(folder).and_then(|f| f.sync_all()).map_err(file)?;
    }
    Ok(key)
}

/// The public key as PEM, as a package carries it.
#[must_use]
pub fn public_pem(key: &SigningKey) -> String {
    key.verifying_key().to_public_key_pem(LineEnding::LF).unwrap_or_default()
}

/// The fingerprint of a public key.
#[must_use]
pub fn fingerprint(key: &VerifyingKey) -> Fingerprint {
    let der = key.to_public_key_der().map(|d| d.as_bytes().to_vec()).unwrap_or_default();
    Fingerprint(commissioning::journal::chain::hexadecimal(&Sha256::digest(&der)))
}

/// Signs bytes: 64 bytes that `openssl pkeyutl -verify -rawin` checks.
#[must_use]
pub fn sign(key: &SigningKey, bytes: &[u8]) -> [u8; 64] {
    key.sign(bytes).to_bytes()
}

/// Reads a public key and checks a signature with it; the error is a sentence.
pub(crate) fn check(pem: &str, bytes: &[u8], signature: &[u8]) -> Result<Fingerprint, String> {
    let key = VerifyingKey::from_public_key_pem(pem).map_err(|_| "it is no public Ed25519 key in PEM".to_owned())?;
    let signature: [u8; 64] =
        signature.try_into().map_err(|_| format!("the signature has {} bytes instead of 64", signature.len()))?;
    key.verify(bytes, &ed25519_dalek::Signature::from_bytes(&signature))
        .map(|()| fingerprint(&key))
        .map_err(|_| "the signature does not fit the list of sums".to_owned())
}

#[cfg(test)]
mod tests {
    use super::*;

    fn folder() -> std::path::PathBuf {
        let mut unique = [0_u8; 8];
        getrandom::fill(&mut unique).unwrap();
        let path =
            std::env::temp_dir().join(format!("asleft-key-{}", commissioning::journal::chain::hexadecimal(&unique)));
        std::fs::create_dir(&path).unwrap();
        path
    }

    #[test]
    fn a_key_is_kept_for_its_owner_alone_and_found_again() {
        let folder = folder();
        let path = folder.join("signing-key.pem");
        let made = load_or_create(&path).unwrap();
        assert_eq!(std::fs::metadata(&path).unwrap().permissions().mode() & 0o777, 0o600);
        assert_eq!(load_or_create(&path).unwrap().to_bytes(), made.to_bytes());
        assert!(matches!(create(&path), Err(KeyFault::File(..))), "a key is never overwritten");
        std::fs::set_permissions(&path, std::fs::Permissions::from_mode(0o640)).unwrap();
        assert!(matches!(load(&path), Err(KeyFault::Open(_, 0o640))));
        std::fs::set_permissions(&path, std::fs::Permissions::from_mode(0o600)).unwrap();
        std::fs::write(&path, "no key").unwrap();
        assert!(matches!(load(&path), Err(KeyFault::Unreadable(..))));
        std::fs::remove_dir_all(folder).unwrap();
    }

    /// RFC 8032, section 7.1, test 2: key, message 72 and signature.
    #[test]
    fn signing_agrees_with_the_published_vector() {
        let seed = hex("4ccd089b28ff96da9db6c346ec114e0f5b8a319f35aba624da8cf6ed4fb8a6fb");
        let key = SigningKey::from_bytes(&seed.try_into().unwrap());
        let expected = "92a009a9f0d4cab8720e820b5f642540a2b27b5416503f8fb3762223ebdb69da085ac1e43e15996e458f3613d0f11d8c387b2eaeb4302aeeb00d291612bb0c00";
        assert_eq!(commissioning::journal::chain::hexadecimal(&sign(&key, &[0x72])), expected);
        let pem = public_pem(&key);
        assert_eq!(check(&pem, &[0x72], &hex(expected)), Ok(fingerprint(&key.verifying_key())));
        assert!(check(&pem, &[0x73], &hex(expected)).is_err() && check(&pem, &[0x72], &[0; 63]).is_err());
        assert!(check("no key", &[0x72], &hex(expected)).is_err());
    }

    fn hex(text: &str) -> Vec<u8> {
        (0..text.len() / 2).map(|n| u8::from_str_radix(&text[2 * n..2 * n + 2], 16).unwrap()).collect()
    }
}
