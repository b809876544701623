//! A form as it was sent: names and values in order, its token checked before anything else looks at it.

use crate::page_error::PageError;
use crate::visitor::Visitor;
use axum::extract::{FromRequest, Request};
use axum::http::{StatusCode, header};
use commissioning::{ActId, EventId};
use sha2::{Digest, Sha256};
use std::collections::BTreeMap;

/// Most bytes of a form without pictures.
pub const LARGEST_FORM: usize = 1024 * 1024;

/// A form as it was sent.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Posted {
    pairs: Vec<(String, String)>,
}

impl Posted {
    /// From names and values, for tests and for multipart forms whose token was checked with [`check_token`].
    #[must_use]
    pub fn from_pairs(pairs: Vec<(String, String)>) -> Self {
        let mut posted = Self { pairs };
        posted.keep_chosen();
        posted
    }

    /// The first value of this name, `""` when there is none.
    #[must_use]
    pub fn text(&self, name: &str) -> &str {
        self.pairs.iter().find(|(n, _)| n == name).map_or("", |(_, v)| v.as_str())
    }

    /// Every value of this name.
    pub fn all<'a>(&'a self, name: &'a str) -> impl Iterator<Item = &'a str> {
        self.pairs.iter().filter(move |(n, _)| n == name).map(|(_, v)| v.as_str())
    }

    /// Whether the form had this name at all.
    #[must_use]
    pub fn has(&self, name: &str) -> bool {
        self.pairs.iter().any(|(n, _)| n == name)
    }

    /// Names and values as they came.
    #[must_use]
    pub fn pairs(&self) -> &[(String, String)] {
        &self.pairs
    }

    /// The act this form asks for: the same form sent twice is one act.
    ///
    /// # Errors
    /// When the form carries none.
    pub fn act(&self) -> Result<ActId, PageError> {
        self.text("act").parse().map_err(|_| PageError::BadForm { why: "The form carries no act id.".to_owned() })
    }

    /// An id that a form makes for a new thing: derived from its act, so that sending twice makes one thing.
    ///
    /// # Errors
    /// When the form carries no act id.
    pub fn made(&self, what: &str) -> Result<uuid::Uuid, PageError> {
        let act = self.act()?;
        let mut hasher = Sha256::new();
        hasher.update(act.0.as_bytes());
        hasher.update(what.as_bytes());
        let digest = hasher.finalize();
        let mut bytes = *act.0.as_bytes();
        // The time stands in front as in every version 7 id; the rest is the digest, version and variant put back.
        for (to, from) in bytes.iter_mut().skip(6).zip(digest.iter()) {
            *to = *from;
        }
        if let Some(version) = bytes.get_mut(6) {
            *version = (*version & 0x0F) | 0x70;
        }
        if let Some(variant) = bytes.get_mut(8) {
            *variant = (*variant & 0x3F) | 0x80;
        }
        Ok(uuid::Uuid::from_bytes(bytes))
    }

    /// The events a field had seen when the form was shown.
    #[must_use]
    pub fn seen(&self, name: &str) -> Vec<EventId> {
        self.text(&format!("{name}.seen")).split_whitespace().map(|id| EventId(id.to_owned())).collect()
    }

    /// After a conflict page: what was chosen to stay as it is in the record is taken out of the form.
    fn keep_chosen(&mut self) {
        let chosen: BTreeMap<String, String> = self
            .pairs
            .iter()
            .filter_map(|(n, v)| n.strip_suffix(".keep").map(|field| (field.to_owned(), v.clone())))
            .collect();
        let theirs = |name: &str| {
            chosen.iter().any(|(field, keep)| {
                keep == "theirs"
                    && name
                        .strip_prefix(field.as_str())
                        .is_some_and(|rest| matches!(rest, "" | ".unit" | ".instrument" | ".seen"))
            })
        };
        self.pairs.retain(|(name, _)| !name.ends_with(".keep") && !theirs(name));
    }
}

/// Checks the token of a form that was read in another way (multipart).
///
/// # Errors
/// When it is not this visitor's.
pub fn check_token(visitor: &Visitor, token: &str) -> Result<(), PageError> {
    // Both are hashes of secrets, so an early end of the comparison tells nothing of use; compared in full all the same.
    let (mine, sent) = (visitor.form_token.as_bytes(), token.as_bytes());
    let same = mine.len() == sent.len() && mine.iter().zip(sent).fold(0_u8, |d, (a, b)| d | (a ^ b)) == 0;
    if same { Ok(()) } else { Err(PageError::FormToken) }
}

impl<S: Send + Sync> FromRequest<S> for Posted {
    type Rejection = PageError;

    async fn from_request(request: Request, state: &S) -> Result<Self, Self::Rejection> {
        let visitor = request
            .extensions()
            .get::<Visitor>()
            .cloned()
            .ok_or_else(|| PageError::broken("the request was not recognised first"))?;
        let plain = request
            .headers()
            .get(header::CONTENT_TYPE)
            .is_some_and(|t| t.as_bytes().starts_with(b"application/x-www-form-urlencoded"));
        if !plain {
            return Err(PageError::FormToken);
        }
        let axum::extract::RawForm(bytes) =
            axum::extract::RawForm::from_request(request, state).await.map_err(|rejection| {
                use axum::response::IntoResponse as _;
                match rejection.into_response().status() {
                    StatusCode::PAYLOAD_TOO_LARGE => PageError::TooLarge { most: "1 MB" },
                    _ => PageError::BadForm { why: "The form did not arrive whole. Send it again.".to_owned() },
                }
            })?;
        let posted = Self::from_pairs(decode(&bytes));
        check_token(&visitor, posted.text("token"))?;
        Ok(posted)
    }
}

/// Reads `name=value&…`; bytes that are no UTF-8 show as such rather than being refused.
fn decode(bytes: &[u8]) -> Vec<(String, String)> {
    bytes
        .split(|b| *b == b'&')
        .filter(|pair| !pair.is_empty())
        .map(|pair| {
            let at = pair.iter().position(|b| *b == b'=');
            let (name, value) = at.map_or((pair, &[][..]), |at| (&pair[..at], &pair[at + 1..]));
            (unescape(name), unescape(value))
        })
        .collect()
}

fn unescape(bytes: &[u8]) -> String {
    let mut plain = Vec::with_capacity(bytes.len());
    let mut rest = bytes.iter().copied();
    while let Some(byte) = rest.next() {
        plain.push(match byte {
            b'+' => b' ',
            b'%' => {
                let ahead = rest.clone().take(2).map(|b| char::from(b).to_digit(16)).collect::<Option<Vec<u32>>>();
                match ahead.as_deref() {
                    Some([high, low]) => {
                        rest.next();
                        rest.next();
                        u8::try_from(high * 16 + low).unwrap_or(b'%')
                    }
                    _ => b'%',
                }
            }
            other => other,
        });
    }
    String::from_utf8_lossy(&plain).into_owned()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn names_and_values_are_read_as_a_browser_writes_them() {
        let read = decode(b"a=1&b=x+y%20z&c=%CE%A9&d&e=%zz%4");
        let pairs: Vec<(&str, &str)> = read.iter().map(|(n, v)| (n.as_str(), v.as_str())).collect();
        assert_eq!(pairs, [("a", "1"), ("b", "x y z"), ("c", "Ω"), ("d", ""), ("e", "%zz%4")]);
    }

    #[test]
    fn theirs_takes_the_field_out_and_mine_leaves_it() {
        let pairs = |keep: &str| {
            [
                ("m.0.volts", "400"),
                ("m.0.volts.unit", "V"),
                ("m.0.volts.seen", "a.1"),
                ("m.0.volts.keep", keep),
                ("m.0.volts-line", "9"),
            ]
            .map(|(n, v)| (n.to_owned(), v.to_owned()))
            .to_vec()
        };
        let theirs = Posted::from_pairs(pairs("theirs"));
        assert!(!theirs.has("m.0.volts") && !theirs.has("m.0.volts.unit") && theirs.has("m.0.volts-line"));
        let mine = Posted::from_pairs(pairs("mine"));
        assert_eq!((mine.text("m.0.volts"), mine.has("m.0.volts.keep")), ("400", false));
    }
}
