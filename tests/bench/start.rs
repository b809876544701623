//! From a closed store of a thousand drives to its first page, against opening the bare database file.

use super::alternate;
use axum::body::Body;
use axum::http::{Request, StatusCode, header};
use commissioning::journal::{Act, Deed};
use commissioning::people::Role;
use commissioning::{ActId, DriveId, PersonId, SiteId, Timestamp};
use std::sync::Arc;
use store::{Proof, SessionKind, Store};
use tower::ServiceExt as _;
use uuid::Uuid;
use web::App;

const DRIVES: u128 = 1000;

pub fn run() {
    let folder = tempfile::tempdir_in(env!("CARGO_TARGET_TMPDIR")).expect("a folder on the disk");
    let data = folder.path().join("store");
    let now = Timestamp::parse("2026-11-30T16:00:00Z").expect("a moment");
    let token = fill(&data, now);
    let runtime = tokio::runtime::Builder::new_current_thread().enable_all().build().expect("a runtime");
    let both = alternate::medians(
        5,
        || {
            let store = Store::open(&data, now).expect("opens");
            let app = App {
                store,
                clock: Arc::new(move || now),
                ids: Arc::new(|| Uuid::from_u128(7)),
                signing_key: None,
                secure: false,
                welcome: None,
            };
            let request = Request::get(web::links::site("many"))
                .header(header::COOKIE, format!("{}={token}", web::cookies::SESSION))
                .body(Body::empty())
                .expect("a request");
            runtime.block_on(async {
                let answer = web::router(app).oneshot(request).await.expect("an answer");
                assert_eq!(answer.status(), StatusCode::OK);
                let page = axum::body::to_bytes(answer.into_body(), 10_000_000).await.expect("a body");
                assert!(page.len() > 5000, "the board is there");
            });
        },
        || {
            let connection = rusqlite::Connection::open(data.join("store.sqlite")).expect("opens");
            let pages: i64 = connection.query_row("PRAGMA page_count", [], |r| r.get(0)).expect("counts");
            assert!(pages > 0);
        },
    );
    alternate::line("start and first board page with 1,000 drives (baseline: opening the bare file)", &both, "≤ 1 s");
}

/// A store with one site of a thousand drives; gives the token of a session.
fn fill(data: &std::path::Path, now: Timestamp) -> String {
    let store = Store::open(data, now).expect("a store");
    let mut number: u128 = 0x7000_8000_0000_0000_0000;
    let mut fresh = || {
        number += 1;
        Uuid::from_u128(number)
    };
    let perform = |actor: Option<PersonId>, id: Uuid, deed: Deed| {
        store.perform(actor, Act { id: ActId(id), tablet: None, deed }, Proof::none(), now).wait().expect("done")
    };
    let procedure = commissioning::procedure::built_in::built_in().expect("loads");
    perform(None, fresh(), Deed::LoadProcedure { procedure: Box::new(procedure) });
    let person = PersonId(fresh());
    let (firm, login, name) = ("Bench".to_owned(), "bench".to_owned(), "Bench".to_owned());
    perform(None, fresh(), Deed::SetUp { firm, person, login, name, roles: vec![Role::Administrator, Role::Engineer] });
    let site = SiteId(fresh());
    perform(Some(person), fresh(), Deed::CreateSite { site, tag: "many".to_owned(), name: "Many drives".to_owned() });
    for n in 0..DRIVES {
        let drive = DriveId(fresh());
        perform(
            Some(person),
            fresh(),
            Deed::CreateDrive { site, drive, tag: format!("PU-{n:04}"), name: "Pump".to_owned() },
        );
    }
    store.open_session(person, SessionKind::Enrolled, now).wait().expect("a session")
}
