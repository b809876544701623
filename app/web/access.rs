//! Who may open what: one row per route. A route without a row lets nobody in, and a test fails.
//!
//! This is the outer door. What an act needs besides (state of the record, who entered what) the domain decides.

use crate::page_error::PageError;
use crate::visitor::Visitor;
use crate::{links, routes};
use axum::extract::{MatchedPath, Request};
use axum::http::Method;
use axum::middleware::Next;
use axum::response::{IntoResponse, Response};
use commissioning::people::Role::{self, Administrator, Engineer, Reader, Supervisor};

/// Who may.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Who {
    /// Anyone, signed in or not.
    Anyone,
    /// Whoever holds one of these roles and whose account works.
    Any(&'static [Role]),
}

/// A row: method, route as in `routes.rs`, who.
#[derive(Clone, Copy, Debug)]
pub struct Access {
    /// `GET` or `POST`.
    pub method: &'static str,
    /// Route pattern.
    pub path: &'static str,
    /// Who may.
    pub who: Who,
}

const SIGNED_IN: Who = Who::Any(&[Engineer, Supervisor, Administrator, Reader]);
const ENGINEERS: Who = Who::Any(&[Engineer]);
const SUPERVISORS: Who = Who::Any(&[Supervisor]);
const RECORD_KEEPERS: Who = Who::Any(&[Engineer, Supervisor]);
const KEEPERS: Who = Who::Any(&[Engineer, Supervisor, Administrator]);
const ADMINISTRATORS: Who = Who::Any(&[Administrator]);

const fn get(path: &'static str, who: Who) -> Access {
    Access { method: "GET", path, who }
}

const fn post(path: &'static str, who: Who) -> Access {
    Access { method: "POST", path, who }
}

/// The table.
pub const TABLE: &[Access] = &[
    get("/static/{hash}/{name}", Who::Anyone),
    get("/about", Who::Anyone),
    post("/theme", Who::Anyone),
    get("/sign-in", Who::Anyone),
    post("/sign-in", Who::Anyone),
    post("/sign-out", Who::Anyone),
    get("/set-up", Who::Anyone),
    post("/set-up", Who::Anyone),
    get("/invitation", Who::Anyone),
    post("/invitation", Who::Anyone),
    get("/", SIGNED_IN),
    get("/find", SIGNED_IN),
    get("/password", SIGNED_IN),
    post("/password", SIGNED_IN),
    get("/people", ADMINISTRATORS),
    get("/new-person", ADMINISTRATORS),
    post("/new-person", ADMINISTRATORS),
    get("/people/{login}", ADMINISTRATORS),
    post("/people/{login}", ADMINISTRATORS),
    post("/people/{login}/invitation", ADMINISTRATORS),
    post("/people/{login}/signing-unlock", ADMINISTRATORS),
    get("/signers", SIGNED_IN),
    get("/instruments", SIGNED_IN),
    get("/new-instrument", KEEPERS),
    post("/new-instrument", KEEPERS),
    get("/instruments/{instrument}", SIGNED_IN),
    post("/instruments/{instrument}", KEEPERS),
    get("/sites", SIGNED_IN),
    get("/new-site", KEEPERS),
    post("/new-site", KEEPERS),
    get("/sites/{site}/-/{sheet}", SIGNED_IN),
    post("/sites/{site}/-/{sheet}", RECORD_KEEPERS),
    get("/sites/{site}/-/new-drive", RECORD_KEEPERS),
    post("/sites/{site}/-/new-drive", RECORD_KEEPERS),
    get("/sites/{site}", SIGNED_IN),
    get("/queue", SIGNED_IN),
    get("/sites/{site}/{drive}", SIGNED_IN),
    post("/sites/{site}/{drive}/begin", ENGINEERS),
    get("/sites/{site}/{drive}/steps/{step}", SIGNED_IN),
    post("/sites/{site}/{drive}/steps/{step}", ENGINEERS),
    post("/sites/{site}/{drive}/steps/{step}/live", ENGINEERS),
    get("/sites/{site}/{drive}/steps/{step}/otherwise", ENGINEERS),
    post("/sites/{site}/{drive}/steps/{step}/otherwise", ENGINEERS),
    post("/sites/{site}/{drive}/steps/{step}/resume", ENGINEERS),
    get("/sites/{site}/{drive}/hold/{phase}", SIGNED_IN),
    post("/sites/{site}/{drive}/hold/{phase}", ENGINEERS),
    get("/sites/{site}/{drive}/parameters", SIGNED_IN),
    post("/sites/{site}/{drive}/parameters/rows", ENGINEERS),
    get("/sites/{site}/{drive}/parameters/{group}", SIGNED_IN),
    post("/sites/{site}/{drive}/parameters/{group}", ENGINEERS),
    post("/sites/{site}/{drive}/parameters/{group}/live", ENGINEERS),
    get("/sites/{site}/{drive}/findings", SIGNED_IN),
    post("/sites/{site}/{drive}/findings", ENGINEERS),
    get("/sites/{site}/{drive}/findings/{finding}", SIGNED_IN),
    post("/sites/{site}/{drive}/findings/{finding}/settle", ENGINEERS),
    post("/sites/{site}/{drive}/findings/{finding}/accept", SUPERVISORS),
    get("/sites/{site}/{drive}/record", SIGNED_IN),
    post("/sites/{site}/{drive}/remarks", RECORD_KEEPERS),
    get("/sites/{site}/{drive}/sign", ENGINEERS),
    post("/sites/{site}/{drive}/sign", ENGINEERS),
    get("/sites/{site}/{drive}/accept", SUPERVISORS),
    post("/sites/{site}/{drive}/accept", SUPERVISORS),
    get("/sites/{site}/{drive}/return", SUPERVISORS),
    post("/sites/{site}/{drive}/return", SUPERVISORS),
    get("/sites/{site}/{drive}/reopen", SUPERVISORS),
    post("/sites/{site}/{drive}/reopen", SUPERVISORS),
    get("/sites/{site}/{drive}/package", SIGNED_IN),
    get("/sites/{site}/{drive}/package/download", SIGNED_IN),
    get("/sites/{site}/{drive}/journal", SIGNED_IN),
    get("/sites/{site}/{drive}/journal/events", SIGNED_IN),
    get("/photos/{hash}", SIGNED_IN),
    get("/photos/{hash}/original", SIGNED_IN),
    get("/sites/{site}/{drive}/{sheet}", SIGNED_IN),
    post("/sites/{site}/{drive}/{sheet}", RECORD_KEEPERS),
    post("/sites/{site}/{drive}/{sheet}/live", RECORD_KEEPERS),
];

/// The row of a route.
#[must_use]
pub fn row(method: &Method, path: &str) -> Option<Who> {
    // A HEAD is answered as the GET would be, without its body.
    let method = if method == Method::HEAD { Method::GET } else { method.clone() };
    TABLE.iter().find(|a| a.method == method.as_str() && a.path == path).map(|a| a.who)
}

/// Lets in, or answers why not.
pub async fn guard(request: Request, next: Next) -> Response {
    let Some(path) = request.extensions().get::<MatchedPath>().map(|p| p.as_str().to_owned()) else {
        // No route of ours: nothing behind this door is asked, whatever answers there.
        return PageError::not_found("This page").into_response();
    };
    let Some(visitor) = request.extensions().get::<Visitor>().cloned() else {
        return PageError::broken("the request was not recognised before its door").into_response();
    };
    if !routes::takes(request.method(), &path) {
        return PageError::WrongMethod.into_response();
    }
    match row(request.method(), &path) {
        Some(Who::Anyone) => next.run(request).await,
        Some(Who::Any(roles)) if visitor.is_any(roles) => next.run(request).await,
        Some(Who::Any(roles)) if visitor.person.is_some() => PageError::NotAllowed { why: why(roles) }.into_response(),
        Some(Who::Any(_)) => {
            let back = if request.method() == Method::GET { Some(visitor.path.as_str()) } else { None };
            PageError::SignInFirst { sign_in: links::sign_in(back) }.into_response()
        }
        None => {
            PageError::broken(format!("no row in the access table for {} {path}", request.method())).into_response()
        }
    }
}

fn why(roles: &[Role]) -> String {
    let words: Vec<&str> = roles.iter().map(|r| r.words()).collect();
    format!("This is for: {}. Your account is none of these.", words.join(", "))
}
