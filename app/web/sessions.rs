//! From a session's token to the person, and the addresses that sign-in counts its failures by.

use crate::{App, PageError};
use axum::extract::FromRequestParts;
use axum::extract::connect_info::ConnectInfo;
use axum::http::request::Parts;
use commissioning::people::Person;
use std::convert::Infallible;
use std::net::SocketAddr;
use std::sync::Arc;

/// The person behind a token, while the session is open and the account works.
///
/// # Errors
/// When the store cannot be read.
pub async fn person(app: &App, token: &str) -> Result<Option<Arc<Person>>, PageError> {
    let session = app.store.session(token, app.now()).await?;
    Ok(session.map(|s| Arc::new(s.person)))
}

/// Where a request came from, without the port; `""` where the connection is not known (tests through the router).
#[derive(Clone, Debug)]
pub struct Address(pub String);

impl<S: Send + Sync> FromRequestParts<S> for Address {
    type Rejection = Infallible;

    async fn from_request_parts(parts: &mut Parts, _: &S) -> Result<Self, Self::Rejection> {
        let peer = parts.extensions.get::<ConnectInfo<SocketAddr>>();
        Ok(Self(peer.map(|p| p.0.ip().to_string()).unwrap_or_default()))
    }
}

/// The session's token as the browser sent it.
#[derive(Clone, Debug)]
pub struct SessionToken(pub Option<String>);

impl<S: Send + Sync> FromRequestParts<S> for SessionToken {
    type Rejection = Infallible;

    async fn from_request_parts(parts: &mut Parts, _: &S) -> Result<Self, Self::Rejection> {
        Ok(Self(crate::cookies::read(&parts.headers).session))
    }
}
