//! From a session's token to the person, and the addresses that sign-in counts its failures by.

use crate::{App, PageError};
use axum::extract::FromRequestParts;
use axum::extract::connect_info::ConnectInfo;
use axum::http::HeaderMap;
use axum::http::request::Parts;
use commissioning::people::Person;
use std::convert::Infallible;
use std::net::{IpAddr, SocketAddr};
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

impl FromRequestParts<App> for Address {
    type Rejection = Infallible;

    async fn from_request_parts(parts: &mut Parts, app: &App) -> Result<Self, Self::Rejection> {
        let Some(peer) = parts.extensions.get::<ConnectInfo<SocketAddr>>().map(|p| p.0.ip().to_canonical()) else {
            return Ok(Self(String::new()));
        };
        let forwarded = if app.secure && peer.is_loopback() { forwarded(&parts.headers) } else { None };
        Ok(Self(forwarded.unwrap_or(peer).to_string()))
    }
}

/// The one address that the proxy in front of us saw: the last it added. What stands before it the visitor may have
/// written themselves.
fn forwarded(headers: &HeaderMap) -> Option<IpAddr> {
    let last = headers.get_all("x-forwarded-for").iter().next_back()?.to_str().ok()?;
    last.rsplit(',').next()?.trim().parse::<IpAddr>().ok().map(|a| a.to_canonical())
}

/// The session's token as the browser sent it.
#[derive(Clone, Debug)]
pub struct SessionToken(pub Option<String>);

impl FromRequestParts<App> for SessionToken {
    type Rejection = Infallible;

    async fn from_request_parts(parts: &mut Parts, app: &App) -> Result<Self, Self::Rejection> {
        Ok(Self(crate::cookies::read(&parts.headers, app.secure).session))
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::tests::world::World;
    use axum::http::Request;

    async fn seen_as(app: &App, peer: &str, forwarded: &[&str]) -> String {
        let peer: SocketAddr = peer.parse().expect("an address");
        let mut request = Request::get("/sign-in").extension(ConnectInfo(peer));
        for line in forwarded {
            request = request.header("x-forwarded-for", *line);
        }
        let (mut parts, ()) = request.body(()).expect("a request").into_parts();
        Address::from_request_parts(&mut parts, app).await.expect("never fails").0
    }

    #[tokio::test]
    async fn only_a_proxy_on_this_machine_is_believed_and_only_its_own_word() {
        let mut app = World::empty().app;
        assert_eq!(seen_as(&app, "127.0.0.1:4000", &["10.0.0.7"]).await, "127.0.0.1", "no proxy was announced");
        app.secure = true;
        assert_eq!(seen_as(&app, "127.0.0.1:4000", &["10.0.0.7"]).await, "10.0.0.7");
        assert_eq!(seen_as(&app, "[::1]:4000", &["1.2.3.4, 2001:db8::7"]).await, "2001:db8::7");
        assert_eq!(seen_as(&app, "127.0.0.1:4000", &["1.2.3.4", "10.0.0.8"]).await, "10.0.0.8");
        assert_eq!(seen_as(&app, "192.168.1.5:4000", &["10.0.0.7"]).await, "192.168.1.5", "not the proxy");
        assert_eq!(seen_as(&app, "127.0.0.1:4000", &["rubbish"]).await, "127.0.0.1");
        assert_eq!(seen_as(&app, "127.0.0.1:4000", &[]).await, "127.0.0.1");
    }
}
