//! A small firm with people, a site and a drive, in an in-memory store, reached only through the router.

use crate::App;
use crate::routes::router;
use crate::visitor::form_token;
use axum::Router;
use axum::body::{Body, to_bytes};
use axum::http::{Request, Response, StatusCode, header};
use commissioning::journal::{Act, Deed};
use commissioning::people::Role;
use commissioning::{ActId, DriveId, PersonId, SiteId, Timestamp};
use std::collections::BTreeMap;
use std::sync::Arc;
use store::{Proof, SessionKind, Store};
use tower::ServiceExt;
use uuid::Uuid;

/// The firm, its people, one site with one drive.
pub struct World {
    pub app: App,
    pub pages: Router,
    sessions: BTreeMap<&'static str, String>,
}

/// What came back.
#[derive(Debug)]
pub struct Answer {
    pub status: StatusCode,
    pub headers: axum::http::HeaderMap,
    pub text: String,
}

impl Answer {
    pub fn location(&self) -> &str {
        self.headers.get(header::LOCATION).map_or("", |l| l.to_str().expect("ascii"))
    }
}

pub const PEOPLE: [(&str, &str, Role); 4] = [
    ("ines", "Ines Lund", Role::Engineer),
    ("tor", "Tor Hale", Role::Supervisor),
    ("ada", "Ada Quist", Role::Administrator),
    ("rolf", "Rolf Meer", Role::Reader),
];

pub fn noon() -> Timestamp {
    Timestamp::parse("2026-11-17T12:00:00Z").expect("a moment")
}

impl World {
    pub async fn new() -> Self {
        let store = Store::in_memory(noon()).expect("opens");
        let app = App {
            store,
            clock: Arc::new(noon),
            ids: Arc::new(Uuid::now_v7),
            signing_key: None,
            secure: false,
            welcome: None,
        };
        let mut world = Self { pages: router(app.clone()), app, sessions: BTreeMap::new() };
        world.fill().await;
        world
    }

    /// Nothing set up yet.
    pub fn empty() -> Self {
        let store = Store::in_memory(noon()).expect("opens");
        let app = App {
            store,
            clock: Arc::new(noon),
            ids: Arc::new(Uuid::now_v7),
            signing_key: None,
            secure: false,
            welcome: None,
        };
        Self { pages: router(app.clone()), app, sessions: BTreeMap::new() }
    }

    async fn fill(&mut self) {
        let ada = PersonId(Uuid::now_v7());
        self.act(
            None,
            Deed::SetUp {
                firm: "Hollin Drives".to_owned(),
                person: ada,
                login: "ada".to_owned(),
                name: "Ada Quist".to_owned(),
                roles: vec![Role::Administrator],
            },
        )
        .await;
        let procedure = commissioning::procedure::built_in::built_in().expect("reads");
        self.act(None, Deed::LoadProcedure { procedure: Box::new(procedure) }).await;
        self.open("ada", ada).await;
        for (login, name, role) in PEOPLE.into_iter().filter(|p| p.0 != "ada") {
            let person = PersonId(Uuid::now_v7());
            self.act(
                Some(ada),
                Deed::AddPerson { person, login: login.to_owned(), name: name.to_owned(), roles: vec![role] },
            )
            .await;
            self.open(login, person).await;
        }
        let (site, drive) = (SiteId(Uuid::now_v7()), DriveId(Uuid::now_v7()));
        let ines = self.person("ines").await;
        self.act(
            Some(ada),
            Deed::CreateSite { site, tag: "larch-ferry".to_owned(), name: "Larch Ferry board mill".to_owned() },
        )
        .await;
        self.act(
            Some(ines),
            Deed::CreateDrive { site, drive, tag: "FN-204".to_owned(), name: "Return-air fan, dryer 2".to_owned() },
        )
        .await;
    }

    pub async fn open(&mut self, login: &'static str, person: PersonId) {
        let token = self.app.store.open_session(person, SessionKind::Enrolled, noon()).await.expect("opens");
        self.sessions.insert(login, token);
    }

    pub async fn person(&self, login: &str) -> PersonId {
        self.app.store.person_by_login(login).await.expect("reads").expect("is there").id
    }

    pub async fn act(&self, actor: Option<PersonId>, deed: Deed) {
        let act = Act { id: ActId(Uuid::now_v7()), tablet: None, deed };
        self.app.store.perform(actor, act, Proof::none(), noon()).await.expect("done");
    }

    /// The token a form of this person carries; `""` is nobody, whose visit is known by its own cookie.
    pub fn token(&self, login: &str) -> String {
        form_token(self.sessions.get(login).map_or(VISIT, String::as_str))
    }

    pub fn cookie(&self, login: &str) -> String {
        let session = self.sessions.get(login).map(|t| format!("; asleft-session={t}")).unwrap_or_default();
        format!("asleft-visit={VISIT}{session}")
    }

    pub async fn send(&self, request: Request<Body>) -> Answer {
        let response: Response<Body> = self.pages.clone().oneshot(request).await.expect("answers");
        let (parts, body) = response.into_parts();
        let bytes = to_bytes(body, 10 << 20).await.expect("whole");
        Answer { status: parts.status, headers: parts.headers, text: String::from_utf8_lossy(&bytes).into_owned() }
    }

    pub async fn get(&self, login: &str, path: &str) -> Answer {
        let request =
            Request::get(path).header(header::COOKIE, self.cookie(login)).body(Body::empty()).expect("a request");
        self.send(request).await
    }

    /// Posts a form as the page would have it: with token and a fresh act id unless the pairs bring their own.
    pub async fn post(&self, login: &str, path: &str, pairs: &[(&str, &str)]) -> Answer {
        let (token, act) = (self.token(login), Uuid::now_v7().to_string());
        let mut all: Vec<(&str, &str)> = pairs.to_vec();
        for (name, value) in [("token", token.as_str()), ("act", act.as_str())] {
            if pairs.iter().all(|(n, _)| *n != name) {
                all.push((name, value));
            }
        }
        self.post_bare(login, path, &all).await
    }

    /// Posts exactly these pairs.
    pub async fn post_bare(&self, login: &str, path: &str, pairs: &[(&str, &str)]) -> Answer {
        let body = pairs
            .iter()
            .map(|(n, v)| format!("{}={}", crate::links::encode(n), crate::links::encode(v)))
            .collect::<Vec<_>>()
            .join("&");
        let request = Request::post(path)
            .header(header::COOKIE, self.cookie(login))
            .header(header::CONTENT_TYPE, "application/x-www-form-urlencoded")
            .header("sec-fetch-site", "same-origin")
            .body(Body::from(body))
            .expect("a request");
        self.send(request).await
    }
}

const VISIT: &str = "0123456789abcdef0123456789abcdef";
