//! Unguessable bytes from the system.

use crate::fault::Fault;
use commissioning::journal::chain::hexadecimal;

/// So many random bytes, in hexadecimal.
pub(crate) fn random_hex(bytes: usize) -> Result<String, Fault> {
    let mut buffer = vec![0_u8; bytes];
    getrandom::fill(&mut buffer).map_err(|e| Fault::Broken(format!("the system gave no random bytes: {e}")))?;
    Ok(hexadecimal(&buffer))
}
