//! Who asks: the person behind the session, their form token, their choice of daylight or dark.

use crate::app::App;
use crate::cookies;
use crate::links;
use crate::page_error::PageError;
use axum::extract::{FromRequestParts, Request, State};
use axum::http::request::Parts;
use axum::middleware::Next;
use axum::response::Response;
use commissioning::people::{Person, Role};
use sha2::{Digest, Sha256};
use std::fmt;
use std::sync::Arc;
use uuid::Uuid;

/// Whoever asks, signed in or not.
#[derive(Clone)]
pub struct Visitor {
    /// The person, when signed in with an account that works.
    pub person: Option<Arc<Person>>,
    /// What every form of theirs must carry.
    pub form_token: String,
    /// Daylight, dark, or as the system says.
    pub theme: Theme,
    /// The address asked for, to come back to.
    pub path: String,
    ids: Arc<dyn Fn() -> Uuid + Send + Sync>,
}

impl fmt::Debug for Visitor {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.debug_struct("Visitor").field("person", &self.person.as_ref().map(|p| p.id)).finish_non_exhaustive()
    }
}

/// A visitor who is signed in.
#[derive(Clone, Debug)]
pub struct Signed {
    /// As whom.
    pub person: Arc<Person>,
    /// With what.
    pub visitor: Visitor,
}

/// Daylight or dark.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Theme {
    /// As the system says.
    System,
    /// Daylight.
    Light,
    /// Dark.
    Dark,
}

impl Theme {
    /// As cookie, form and stylesheet name it.
    #[must_use]
    pub const fn key(self) -> &'static str {
        match self {
            Self::System => "system",
            Self::Light => "light",
            Self::Dark => "dark",
        }
    }

    /// From that name; anything else follows the system.
    #[must_use]
    pub fn from_key(key: &str) -> Self {
        match key {
            "light" => Self::Light,
            "dark" => Self::Dark,
            _ => Self::System,
        }
    }
}

impl Visitor {
    /// A fresh act id for a form about to be shown.
    #[must_use]
    pub fn fresh_act(&self) -> Uuid {
        (self.ids)()
    }

    /// Whether they hold one of these roles.
    #[must_use]
    pub fn is_any(&self, roles: &[Role]) -> bool {
        self.person.as_ref().is_some_and(|p| roles.iter().any(|r| p.is(*r)))
    }
}

/// The form token that goes with a cookie: nobody who lacks the cookie can make it, and it does not give the cookie away.
#[must_use]
pub fn form_token(cookie: &str) -> String {
    let mut hasher = Sha256::new();
    hasher.update(b"asleft form token\n");
    hasher.update(cookie.as_bytes());
    commissioning::journal::chain::hexadecimal(&hasher.finalize())
}

/// Finds out who asks and leaves it in the request for the extractors; renders page errors on the way out, once, here.
pub async fn recognise(State(app): State<App>, mut request: Request, next: Next) -> Response {
    let jar = cookies::read(request.headers(), app.secure);
    let (visit, fresh) = match &jar.visit {
        Some(visit) => (visit.clone(), false),
        None => (cookies::fresh_token(), true),
    };
    let person = match &jar.session {
        Some(token) => crate::sessions::person(&app, token).await,
        None => Ok(None),
    };
    let (person, trouble) = match person {
        Ok(person) => (person, None),
        Err(fault) => (None, Some(fault)),
    };
    // Bound to the session once there is one: a token from before sign-in is worth nothing after it.
    let bound = match (&person, &jar.session) {
        (Some(_), Some(session)) => session.clone(),
        _ => visit.clone(),
    };
    let path = request.uri().path_and_query().map_or("/", |p| p.as_str()).to_owned();
    let visitor = Visitor { person, form_token: form_token(&bound), theme: jar.theme, path, ids: Arc::clone(&app.ids) };
    request.extensions_mut().insert(visitor.clone());
    let mut response = match trouble {
        Some(fault) => axum::response::IntoResponse::into_response(fault),
        None => next.run(request).await,
    };
    if let Some(fault) = response.extensions_mut().remove::<Arc<PageError>>() {
        response = crate::error_page::render(&app, &visitor, &fault);
    }
    if fresh {
        cookies::add(&mut response, &cookies::visit(&visit, app.secure));
    }
    response
}

impl<S: Send + Sync> FromRequestParts<S> for Visitor {
    type Rejection = PageError;

    async fn from_request_parts(parts: &mut Parts, _: &S) -> Result<Self, Self::Rejection> {
        parts.extensions.get::<Self>().cloned().ok_or_else(|| PageError::broken("the request was not recognised first"))
    }
}

impl<S: Send + Sync> FromRequestParts<S> for Signed {
    type Rejection = PageError;

    async fn from_request_parts(parts: &mut Parts, state: &S) -> Result<Self, Self::Rejection> {
        let visitor = Visitor::from_request_parts(parts, state).await?;
        match &visitor.person {
            Some(person) => Ok(Self { person: Arc::clone(person), visitor }),
            None => Err(PageError::SignInFirst { sign_in: links::sign_in(Some(&visitor.path)) }),
        }
    }
}
