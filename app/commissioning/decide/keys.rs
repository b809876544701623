//! Changing the installation's signing key: who, and that the new one follows the one before.
//!
//! Whether the two signatures hold is for whoever knows keys: the command looks before, everyone who reads the journal
//! can look after.

use super::Surroundings;
use super::writer::Writer;
use crate::Refusal;
use crate::journal::{Act, Chain, Deed, Event, Fact};

/// Digits of a public key and of a signature in hexadecimal (RFC 8032: 32 and 64 bytes).
const KEY: usize = 64;
const SIGNATURE: usize = 128;

/// Records a change of key.
pub(super) fn rotate(act: &Act, around: &Surroundings<'_>) -> Result<Vec<Event>, Refusal> {
    let Deed::RotateKey { old, new, by_old, by_new } = &act.deed else { return Ok(Vec::new()) };
    let written = |text: &str, digits: usize| {
        text.len() == digits && text.bytes().all(|b| b.is_ascii_digit() || (b'a'..=b'f').contains(&b))
    };
    if !(written(old, KEY) && written(new, KEY) && written(by_old, SIGNATURE) && written(by_new, SIGNATURE)) {
        return Err(Refusal::not_now("These are no public keys and signatures in hexadecimal."));
    }
    if old == new {
        return Err(Refusal::not_now("The new key is the old one. Make another."));
    }
    let changes = &around.installation.key_changes;
    if changes.last().is_some_and(|last| last.new != *old) {
        return Err(Refusal::not_now(
            "The key to be replaced is not the one that the journal names last. Put that one back beside the store first.",
        ));
    }
    if changes.iter().any(|change| change.old == *new) {
        return Err(Refusal::not_now(
            "The new key was in use before. A key that was replaced stays replaced; make another.",
        ));
    }
    if !around.password_proved {
        return Err(Refusal::field(
            "password",
            "password",
            "A change of the signing key asks for your password. Type it.",
        ));
    }
    let fact = Fact::KeyRotated { old: old.clone(), new: new.clone(), by_old: by_old.clone(), by_new: by_new.clone() };
    let mut writer = Writer::new(act, around);
    writer.add(Chain::Installation, fact);
    Ok(writer.done())
}
