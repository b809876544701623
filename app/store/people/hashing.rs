//! Argon2id over passwords, SHA-256 over tokens and codes.

use crate::fault::Fault;
use argon2::password_hash::phc::PasswordHash;
use argon2::password_hash::{PasswordHasher, PasswordVerifier};
use argon2::{Algorithm, Argon2, Params, Version};
use commissioning::journal::chain::hexadecimal;
use sha2::{Digest, Sha256};

/// 19 MiB, two passes, one lane: the least that OWASP's Password Storage Cheat Sheet names for Argon2id with t = 2.
const MEMORY_KIB: u32 = 19 * 1024;
const PASSES: u32 = 2;
const LANES: u32 = 1;

fn argon2() -> Result<Argon2<'static>, Fault> {
    let params = Params::new(MEMORY_KIB, PASSES, LANES, None).map_err(|e| Fault::Broken(e.to_string()))?;
    Ok(Argon2::new(Algorithm::Argon2id, Version::V0x13, params))
}

/// A password's hash with a fresh salt.
pub(crate) fn hashed(password: &str) -> Result<String, Fault> {
    let hash = argon2()?.hash_password(password.as_bytes()).map_err(|e| Fault::Broken(e.to_string()))?;
    Ok(hash.to_string())
}

/// Whether the password fits. Without a hash as much work is done, so that the time tells nothing.
pub(crate) fn fits(password: &str, hash: Option<&str>) -> Result<bool, Fault> {
    let Some(hash) = hash else {
        hashed(password)?;
        return Ok(false);
    };
    let hash = PasswordHash::new(hash).map_err(|e| Fault::Broken(format!("a password hash cannot be read: {e}")))?;
    Ok(argon2()?.verify_password(password.as_bytes(), &hash).is_ok())
}

/// The hash under which an unguessable token or code is kept.
pub(crate) fn token_hash(token: &str) -> String {
    hexadecimal(&Sha256::digest(token.as_bytes()))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_hash_says_how_it_was_made() {
        let hash = hashed("seven otters by the weir").unwrap();
        assert!(hash.starts_with("$argon2id$v=19$m=19456,t=2,p=1$"), "{hash}");
        assert!(fits("seven otters by the weir", Some(&hash)).unwrap());
        assert!(!fits("seven otters by the wier", Some(&hash)).unwrap());
        assert!(!fits("seven otters by the weir", None).unwrap());
    }

    #[test]
    fn a_token_is_kept_as_sha_256() {
        // FIPS 180-4 example: SHA-256 of "abc".
        assert_eq!(token_hash("abc"), "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad");
    }
}
