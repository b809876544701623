//! A drive's page against a bare axum page of the same bytes, both through the router.

use super::alternate;
use axum::Router;
use axum::body::Body;
use axum::http::{Request, StatusCode, header};
use axum::routing::get;
use std::sync::Arc;
use store::SessionKind;
use tower::ServiceExt as _;
use web::App;

pub fn run() {
    let (store, now, demo) = super::document::demo();
    let runtime = tokio::runtime::Builder::new_current_thread().enable_all().build().expect("a runtime");
    let app = App {
        store: store.clone(),
        clock: Arc::new(move || now),
        ids: Arc::new(|| uuid::Uuid::from_u128(7)),
        signing_key: None,
        secure: false,
        welcome: None,
    };
    let (address, token) = runtime.block_on(async {
        let installation = store.installation().await.expect("readable");
        let engineer = installation.people.values().find(|p| p.is(commissioning::people::Role::Engineer)).expect("one");
        let token = store.open_session(engineer.id, SessionKind::Enrolled, now).await.expect("a session");
        let site = store.site_by_tag(&demo.site_tag).await.expect("readable").expect("the site");
        let tag = site.drives.keys().next().expect("a drive").clone();
        (web::links::drive(&demo.site_tag, &tag), token)
    });
    let ours = web::router(app);
    let ask = |router: &Router| {
        let request = Request::get(&address)
            .header(header::COOKIE, format!("{}={token}", web::cookies::SESSION))
            .body(Body::empty())
            .expect("a request");
        runtime.block_on(async {
            let answer = router.clone().oneshot(request).await.expect("an answer");
            assert_eq!(answer.status(), StatusCode::OK, "{address}");
            axum::body::to_bytes(answer.into_body(), 10_000_000).await.expect("a body")
        })
    };
    let body = ask(&ours);
    let bare = Router::new().route(&address, get(move || async move { body.clone() }));
    let both = alternate::medians(
        100,
        || {
            ask(&ours);
        },
        || {
            ask(&bare);
        },
    );
    alternate::line("a drive's page (baseline: a bare axum page of the same bytes)", &both, "≤ 5");
}
