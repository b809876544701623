//! The outer door agrees with the domain: every form's row lets in exactly whom the deed behind it is for; what is not known is refused.

use crate::access::{self, TABLE, Who};
use axum::Router;
use axum::body::Body;
use axum::http::{Request, StatusCode};
use axum::middleware::from_fn;
use axum::routing::get;
use commissioning::decide::roles_needed;
use commissioning::journal::Deed;
use commissioning::people::{Instrument, Role};
use commissioning::plant::Sheet;
use commissioning::record::{Meaning, ReleaseRole, SettledOtherwise, Severity};
use commissioning::{DriveId, FindingId, InstrumentId, PersonId, SiteId};
use std::collections::BTreeSet;
use tower::ServiceExt;
use uuid::Uuid;

/// Forms behind which no deed stands: coming and going, accounts beside the journal, verdicts while typing.
const NO_DEED: [&str; 11] = [
    "/theme",
    "/sign-in",
    "/sign-out",
    "/set-up",
    "/invitation",
    "/password",
    "/people/{login}/invitation",
    "/people/{login}/signing-unlock",
    "/sites/{site}/{drive}/steps/{step}/live",
    "/sites/{site}/{drive}/parameters/{group}/live",
    "/sites/{site}/{drive}/{sheet}/live",
];

/// Every form with its deed.
fn deeds() -> Vec<(&'static str, Deed)> {
    let (site, drive) = (SiteId(Uuid::nil()), DriveId(Uuid::nil()));
    let (person, finding) = (PersonId(Uuid::nil()), FindingId(Uuid::nil()));
    let (tag, name, reason, step) = (String::new(), String::new(), String::new(), String::new());
    let instrument = Instrument {
        id: InstrumentId(Uuid::nil()),
        mark: String::new(),
        description: String::new(),
        serial: String::new(),
        due: String::new(),
        accuracy: Vec::new(),
        active: true,
    };
    let keep = Deed::KeepInstrument { instrument, seen: Vec::new() };
    let sign = |meaning| Deed::Sign { drive, meaning, digest: String::new() };
    vec![
        ("/new-person", Deed::AddPerson { person, login: String::new(), name: name.clone(), roles: Vec::new() }),
        ("/people/{login}", Deed::ChangePerson { person, name: name.clone(), roles: Vec::new(), active: true }),
        ("/new-instrument", keep.clone()),
        ("/instruments/{instrument}", keep),
        ("/new-site", Deed::CreateSite { site, tag: tag.clone(), name: name.clone() }),
        (
            "/sites/{site}/-/{sheet}",
            Deed::SetSiteFields { site, sheet: Sheet::Supply, changes: Vec::new(), reason: reason.clone() },
        ),
        ("/sites/{site}/-/new-drive", Deed::CreateDrive { site, drive, tag, name }),
        (
            "/sites/{site}/{drive}/{sheet}",
            Deed::SetDriveFields { drive, sheet: Sheet::Motor, changes: Vec::new(), reason: reason.clone() },
        ),
        ("/sites/{site}/{drive}/begin", Deed::BeginRecord { drive }),
        (
            "/sites/{site}/{drive}/steps/{step}",
            Deed::RecordEntries { drive, step: step.clone(), changes: Vec::new(), reason: reason.clone() },
        ),
        (
            "/sites/{site}/{drive}/steps/{step}",
            Deed::SetParameters { drive, changes: Vec::new(), reason: reason.clone() },
        ),
        (
            "/sites/{site}/{drive}/steps/{step}/otherwise",
            Deed::SettleStep {
                drive,
                step: step.clone(),
                how: SettledOtherwise::NotApplicable,
                reason: reason.clone(),
            },
        ),
        ("/sites/{site}/{drive}/steps/{step}/resume", Deed::ResumeStep { drive, step: step.clone() }),
        (
            "/sites/{site}/{drive}/hold/{phase}",
            Deed::ReleaseHold {
                drive,
                phase: String::new(),
                role: ReleaseRole::Witness,
                printed_name: String::new(),
                declared: Vec::new(),
            },
        ),
        ("/sites/{site}/{drive}/parameters/rows", Deed::AddParameterRow { drive, label: String::new() }),
        (
            "/sites/{site}/{drive}/parameters/{group}",
            Deed::SetParameters { drive, changes: Vec::new(), reason: reason.clone() },
        ),
        (
            "/sites/{site}/{drive}/findings",
            Deed::RaiseFinding { drive, finding, severity: Severity::Information, text: String::new(), step: None },
        ),
        ("/sites/{site}/{drive}/findings/{finding}/settle", Deed::SettleFinding { drive, finding, how: String::new() }),
        (
            "/sites/{site}/{drive}/findings/{finding}/accept",
            Deed::AcceptFinding { drive, finding, reason: reason.clone() },
        ),
        ("/sites/{site}/{drive}/remarks", Deed::Remark { drive, step, text: String::new() }),
        ("/sites/{site}/{drive}/sign", sign(Meaning::Performed)),
        ("/sites/{site}/{drive}/accept", sign(Meaning::Accepted)),
        ("/sites/{site}/{drive}/return", Deed::Return { drive, reason: reason.clone() }),
        ("/sites/{site}/{drive}/reopen", Deed::Reopen { drive, reason }),
    ]
}

fn set(roles: &[Role]) -> BTreeSet<&'static str> {
    roles.iter().map(|r| r.key()).collect()
}

#[test]
fn every_form_lets_in_exactly_those_whom_the_domain_lets_do_it() {
    let deeds = deeds();
    for (path, deed) in &deeds {
        let row = TABLE.iter().find(|a| a.method == "POST" && a.path == *path).expect("a row");
        let Who::Any(roles) = row.who else { panic!("{path} lets in anyone") };
        assert_eq!(set(roles), set(roles_needed(deed).0), "{path}");
    }
    for row in TABLE.iter().filter(|a| a.method == "POST") {
        let has_deed = deeds.iter().any(|(path, _)| *path == row.path);
        assert!(has_deed != NO_DEED.contains(&row.path), "{}: say here what deed stands behind it", row.path);
    }
}

#[tokio::test]
async fn a_request_that_is_not_known_goes_no_further() {
    let ask = async |pages: Router, path: &str| {
        pages.oneshot(Request::get(path).body(Body::empty()).expect("a request")).await.expect("answers").status()
    };
    let open = || Router::new().route("/about", get(|| async { "in" })).fallback(|| async { "in" });
    assert_eq!(ask(open(), "/about").await, StatusCode::OK, "the pages themselves would let anyone in");
    let guarded = || open().layer(from_fn(access::guard));
    assert_eq!(ask(guarded(), "/about").await, StatusCode::INTERNAL_SERVER_ERROR, "nobody recognised who asks");
    assert_eq!(ask(guarded(), "/nowhere").await, StatusCode::NOT_FOUND, "no route, no answer from behind the door");
}
