//! The switch between daylight and dark: a cookie, no account needed.

use crate::cookies;
use crate::posted::Posted;
use crate::visitor::Theme;
use crate::{App, links};
use axum::extract::State;
use axum::response::{IntoResponse, Redirect, Response};

/// Sets it and goes back to the page it was chosen on.
pub async fn set(State(app): State<App>, posted: Posted) -> Response {
    let back = posted.text("back");
    let mut response = Redirect::to(if links::is_local(back) { back } else { "/" }).into_response();
    cookies::add(&mut response, &cookies::theme(Theme::from_key(posted.text("theme")), app.secure));
    response
}
