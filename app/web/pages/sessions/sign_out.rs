//! Signs out: the session ends on the server, not only in the browser.

use crate::posted::Posted;
use crate::sessions::SessionToken;
use crate::{App, PageError, cookies, links};
use axum::extract::State;
use axum::response::{IntoResponse, Redirect, Response};

/// Ends the session.
///
/// # Errors
/// When the store cannot end it: then the person is still signed in, and must know.
pub async fn close(
    State(app): State<App>,
    SessionToken(token): SessionToken,
    _: Posted,
) -> Result<Response, PageError> {
    if let Some(token) = token {
        app.store.close_session(&token).await?;
    }
    let mut response = Redirect::to(&links::sign_in(None)).into_response();
    cookies::add(&mut response, &cookies::no_session(app.secure));
    Ok(response)
}
