//! The contents page of the site: every address and the function behind it, grouped by what it is about.

use crate::pages::{
    about, drives, find, findings, holds, home, instruments, journals, packages, parameters, people, photos, queue,
    records, sessions, sheets, sites, steps,
};
use crate::{App, PageError, access, headers, serve, static_files, visitor};
use axum::Router;
use axum::body::Body;
use axum::extract::{DefaultBodyLimit, Request};
use axum::handler::Handler;
use axum::http::Method;
use axum::middleware::{from_fn, from_fn_with_state, map_request};
use axum::response::{IntoResponse, Response};
use axum::routing::{self, MethodRouter};
use std::any::Any;
use std::collections::BTreeMap;
use std::sync::OnceLock;
use tower_http::catch_panic::CatchPanicLayer;
use tower_http::compression::CompressionLayer;
use tower_http::csrf::CsrfLayer;
use tower_http::timeout::TimeoutBody;

/// Every address and the function behind it.
fn contents() -> Routes {
    Routes::default()
        // What anyone may see.
        .get("/static/{hash}/{name}", static_files::show)
        .get("/about", about::show)
        .post("/theme", sessions::theme::set)
        // Coming and going.
        .get("/sign-in", sessions::sign_in::show)
        .post("/sign-in", sessions::sign_in::open)
        .post("/sign-out", sessions::sign_out::close)
        .get("/set-up", sessions::set_up::show)
        .post("/set-up", sessions::set_up::keep)
        .get("/invitation", sessions::invitation::show)
        .post("/invitation", sessions::invitation::redeem)
        .get("/password", sessions::password::show)
        .post("/password", sessions::password::change)
        // Start page and search.
        .get("/", home::show)
        .get("/find", find::show)
        // People and instruments.
        .get("/people", people::list::show)
        .get("/new-person", people::create::show)
        .post("/new-person", people::create::keep)
        .get("/people/{login}", people::edit::show)
        .post("/people/{login}", people::edit::keep)
        .post("/people/{login}/invitation", people::invite::make)
        .post("/people/{login}/signing-unlock", people::unlock::make)
        .get("/signers", people::signers::show)
        .get("/instruments", instruments::list::show)
        .get("/new-instrument", instruments::edit::show_new)
        .post("/new-instrument", instruments::edit::keep_new)
        .get("/instruments/{instrument}", instruments::edit::show)
        .post("/instruments/{instrument}", instruments::edit::keep)
        // Sites and their sheets; the dash stands where a drive's tag would.
        .get("/sites", sites::list::show)
        .get("/new-site", sites::create::show)
        .post("/new-site", sites::create::keep)
        .get("/sites/{site}/-/{sheet}", sites::sheet::show)
        .post("/sites/{site}/-/{sheet}", sites::sheet::keep)
        .get("/sites/{site}/-/new-drive", sites::new_drive::show)
        .post("/sites/{site}/-/new-drive", sites::new_drive::keep)
        .get("/sites/{site}", sites::board::show)
        // Review.
        .get("/queue", queue::show)
        // A drive and its record.
        .get("/sites/{site}/{drive}", drives::show::show)
        .post("/sites/{site}/{drive}/begin", records::begin::keep)
        .get("/sites/{site}/{drive}/steps/{step}", steps::show::show)
        .post_with_limit("/sites/{site}/{drive}/steps/{step}", steps::keep::keep, steps::LARGEST_FORM)
        .post("/sites/{site}/{drive}/steps/{step}/live", steps::live::show)
        .get("/sites/{site}/{drive}/steps/{step}/otherwise", steps::otherwise::show)
        .post("/sites/{site}/{drive}/steps/{step}/otherwise", steps::otherwise::keep)
        .post("/sites/{site}/{drive}/steps/{step}/resume", steps::resume::keep)
        .get("/sites/{site}/{drive}/hold/{phase}", holds::show::show)
        .post("/sites/{site}/{drive}/hold/{phase}", holds::release::keep)
        .get("/sites/{site}/{drive}/parameters", parameters::list::show)
        .post("/sites/{site}/{drive}/parameters/rows", parameters::add_row::keep)
        .get("/sites/{site}/{drive}/parameters/{group}", parameters::group::show)
        .post("/sites/{site}/{drive}/parameters/{group}", parameters::group::keep)
        .post("/sites/{site}/{drive}/parameters/{group}/live", parameters::live::show)
        .get("/sites/{site}/{drive}/findings", findings::list::show)
        .post("/sites/{site}/{drive}/findings", findings::raise::keep)
        .get("/sites/{site}/{drive}/findings/{finding}", findings::show::show)
        .post("/sites/{site}/{drive}/findings/{finding}/settle", findings::settle::keep)
        .post("/sites/{site}/{drive}/findings/{finding}/accept", findings::accept::keep)
        .get("/sites/{site}/{drive}/record", records::report::show)
        .post("/sites/{site}/{drive}/remarks", records::remark::keep)
        .get("/sites/{site}/{drive}/sign", records::sign::show)
        .post("/sites/{site}/{drive}/sign", records::sign::keep)
        .get("/sites/{site}/{drive}/accept", records::accept::show)
        .post("/sites/{site}/{drive}/accept", records::accept::keep)
        .get("/sites/{site}/{drive}/return", records::send_back::show)
        .post("/sites/{site}/{drive}/return", records::send_back::keep)
        .get("/sites/{site}/{drive}/reopen", records::reopen::show)
        .post("/sites/{site}/{drive}/reopen", records::reopen::keep)
        // What leaves the building, and the proof.
        .get("/sites/{site}/{drive}/package", packages::show::show)
        .get("/sites/{site}/{drive}/package/download", packages::download::send)
        .get("/sites/{site}/{drive}/journal", journals::show::show)
        .get("/sites/{site}/{drive}/journal/events", journals::download::send)
        .get("/photos/{hash}", photos::show::show)
        .get("/photos/{hash}/original", photos::original::send)
        // A drive's sheets: supply, drive, drive-plate, motor, cable, load, further.
        .get("/sites/{site}/{drive}/{sheet}", sheets::show::show)
        .post("/sites/{site}/{drive}/{sheet}", sheets::keep::keep)
        .post("/sites/{site}/{drive}/{sheet}/live", sheets::live::show)
}

/// All pages, with everything around them.
pub fn router(app: App) -> Router {
    let mut router = Router::new();
    for (path, methods) in contents().by_path {
        router = router.route(path, methods);
    }
    router
        .fallback(|| async { PageError::not_found("This page") })
        .layer(from_fn(access::guard))
        .layer(DefaultBodyLimit::max(crate::posted::LARGEST_FORM))
        .layer(map_request(|request: Request| async {
            request.map(|body| Body::new(TimeoutBody::new(serve::BODY_STALLED_AFTER, body)))
        }))
        .layer(CsrfLayer::new().with_rejection_response(|_| PageError::FormToken.into_response()))
        .layer(CatchPanicLayer::custom(after_panic))
        .layer(from_fn_with_state(app.clone(), visitor::recognise))
        .layer(CompressionLayer::new())
        .layer(from_fn(headers::add))
        .with_state(app)
}

/// One request failed; the next is fine.
fn after_panic(panic: Box<dyn Any + Send + 'static>) -> Response {
    let words = panic.downcast_ref::<String>().map(String::as_str).or_else(|| panic.downcast_ref::<&str>().copied());
    PageError::broken(format!("a page panicked: {}", words.unwrap_or("no words"))).into_response()
}

/// Every method and path, as the tests compare with the access table.
pub fn all() -> &'static [(Method, &'static str)] {
    static ALL: OnceLock<Vec<(Method, &'static str)>> = OnceLock::new();
    ALL.get_or_init(|| contents().listed)
}

/// Whether a path takes a method.
#[must_use]
pub fn takes(method: &Method, path: &str) -> bool {
    let wanted = if method == Method::HEAD { &Method::GET } else { method };
    all().iter().any(|(m, p)| m == wanted && *p == path)
}

/// Routes that can also be listed.
#[derive(Default)]
struct Routes {
    by_path: BTreeMap<&'static str, MethodRouter<App>>,
    listed: Vec<(Method, &'static str)>,
}

impl Routes {
    fn get<H: Handler<T, App>, T: 'static>(self, path: &'static str, handler: H) -> Self {
        self.add(Method::GET, path, routing::get(handler))
    }

    fn post<H: Handler<T, App>, T: 'static>(self, path: &'static str, handler: H) -> Self {
        self.add(Method::POST, path, routing::post(handler))
    }

    /// A route that takes more than a form: pictures.
    fn post_with_limit<H: Handler<T, App>, T: 'static>(self, path: &'static str, handler: H, bytes: usize) -> Self {
        self.add(Method::POST, path, routing::post(handler).layer(DefaultBodyLimit::max(bytes)))
    }

    fn add(mut self, method: Method, path: &'static str, handler: MethodRouter<App>) -> Self {
        self.listed.push((method, path));
        let before = self.by_path.remove(path).unwrap_or_default();
        self.by_path.insert(path, before.merge(handler));
        self
    }
}
