//! Cookies: the session, the visit (for forms before sign-in), the theme.

use crate::visitor::Theme;
use axum::http::{HeaderMap, HeaderValue, header};
use axum::response::Response;
use axum_extra::extract::cookie::{Cookie, CookieJar, SameSite};
use time::Duration;

/// What the browser sent.
#[derive(Clone, Debug)]
pub struct Sent {
    /// The session's token.
    pub session: Option<String>,
    /// The visit's token.
    pub visit: Option<String>,
    /// Daylight or dark.
    pub theme: Theme,
}

/// The session cookie’s name; under TLS it stands behind `__Host-`.
pub const SESSION: &str = "asleft-session";
const VISIT: &str = "asleft-visit";
const THEME: &str = "asleft-theme";

/// Reads the cookies. Under TLS only the guarded names count: a plain one may come from a page without TLS on the same
/// host, where anyone on the way could have set it.
#[must_use]
pub fn read(headers: &HeaderMap, secure: bool) -> Sent {
    let jar = CookieJar::from_headers(headers);
    let token = |name: &str| jar.get(&named(name, secure)).map(|c| c.value().to_owned()).filter(|v| is_token(v));
    let theme = jar.get(THEME).map_or(Theme::System, |c| Theme::from_key(c.value()));
    Sent { session: token(SESSION), visit: token(VISIT), theme }
}

/// 256 random bits in hexadecimal; should the system have none to give, an id nobody can use for long.
#[must_use]
pub fn fresh_token() -> String {
    let mut bytes = [0_u8; 32];
    if getrandom::fill(&mut bytes).is_err() {
        tracing::error!("the system gives no random numbers; forms will be refused");
        return String::new();
    }
    commissioning::journal::chain::hexadecimal(&bytes)
}

fn is_token(text: &str) -> bool {
    (32..=200).contains(&text.len()) && text.bytes().all(|b| b.is_ascii_alphanumeric() || b == b'-' || b == b'_')
}

/// Browsers take a name that begins so only from the host itself, for all of it, and only under TLS.
fn named(name: &str, secure: bool) -> String {
    if secure { format!("__Host-{name}") } else { name.to_owned() }
}

fn guarded(name: &str, value: &str, secure: bool) -> Cookie<'static> {
    Cookie::build((named(name, secure), value.to_owned()))
        .path("/")
        .http_only(true)
        .same_site(SameSite::Lax)
        .secure(secure)
        .build()
}

/// The session's cookie.
#[must_use]
pub fn session(token: &str, secure: bool) -> Cookie<'static> {
    guarded(SESSION, token, secure)
}

/// Takes the session's cookie away.
#[must_use]
pub fn no_session(secure: bool) -> Cookie<'static> {
    let mut cookie = guarded(SESSION, "", secure);
    cookie.set_max_age(Duration::ZERO);
    cookie
}

/// The visit's cookie.
#[must_use]
pub fn visit(token: &str, secure: bool) -> Cookie<'static> {
    guarded(VISIT, token, secure)
}

/// The theme's cookie, kept for a year.
#[must_use]
pub fn theme(theme: Theme, secure: bool) -> Cookie<'static> {
    Cookie::build((THEME, theme.key()))
        .path("/")
        .http_only(true)
        .same_site(SameSite::Lax)
        .secure(secure)
        .max_age(Duration::days(365))
        .build()
}

/// Adds a cookie to an answer.
pub fn add(response: &mut Response, cookie: &Cookie<'_>) {
    if let Ok(value) = HeaderValue::from_str(&cookie.to_string()) {
        response.headers_mut().append(header::SET_COOKIE, value);
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    const TOKEN: &str = "0123456789abcdef0123456789abcdef";

    fn sent(cookie: &str) -> HeaderMap {
        let mut headers = HeaderMap::new();
        headers.insert(header::COOKIE, HeaderValue::from_str(cookie).expect("a header"));
        headers
    }

    #[test]
    fn under_tls_a_plain_cookie_is_nobodys_session() {
        let plain = sent(&format!("asleft-session={TOKEN}; asleft-visit={TOKEN}"));
        assert_eq!(read(&plain, false).session.as_deref(), Some(TOKEN));
        assert_eq!((read(&plain, true).session, read(&plain, true).visit), (None, None));
        let guarded = sent(&format!("__Host-asleft-session={TOKEN}"));
        assert_eq!(read(&guarded, true).session.as_deref(), Some(TOKEN));
        assert_eq!(read(&guarded, false).session, None);
        let cookie = session(TOKEN, true).to_string();
        assert!(cookie.starts_with("__Host-asleft-session=") && cookie.contains("Secure"), "{cookie}");
    }
}
