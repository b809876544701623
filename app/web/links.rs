//! Every link: one function per address of `routes.rs`; nothing else spells a path.

mod record;

pub use record::*;

use crate::static_files;
use commissioning::InstrumentId;
use commissioning::plant::Sheet;

/// Encodes a segment of a path or a value of a query.
#[must_use]
pub fn encode(text: &str) -> String {
    use std::fmt::Write as _;
    text.bytes().fold(String::with_capacity(text.len()), |mut done, byte| {
        if byte.is_ascii_alphanumeric() || matches!(byte, b'-' | b'.' | b'_' | b'~') {
            done.push(char::from(byte));
        } else {
            let _ = write!(done, "%{byte:02X}");
        }
        done
    })
}

/// Whether a path given by a form may be redirected to: one of ours, no host in it.
#[must_use]
pub fn is_local(path: &str) -> bool {
    path.starts_with('/') && !path.starts_with("//") && !path.contains('\\') && !path.chars().any(char::is_control)
}

/// The stylesheet.
#[must_use]
pub fn stylesheet() -> String {
    static_files::address("asleft.css")
}

/// The script.
#[must_use]
pub fn script() -> String {
    static_files::address("asleft.js")
}

/// The icon beside the title.
#[must_use]
pub fn icon() -> String {
    static_files::address("asleft.svg")
}

/// Home.
#[must_use]
pub fn home() -> String {
    "/".to_owned()
}

/// Sign in, coming back to `back` afterwards.
#[must_use]
pub fn sign_in(back: Option<&str>) -> String {
    match back {
        Some(back) if back != "/" => format!("/sign-in?back={}", encode(back)),
        _ => "/sign-in".to_owned(),
    }
}

/// Sign out.
#[must_use]
pub fn sign_out() -> String {
    "/sign-out".to_owned()
}

/// First start: name the firm, make the first administrator.
#[must_use]
pub fn set_up() -> String {
    "/set-up".to_owned()
}

/// Change one's own password.
#[must_use]
pub fn password() -> String {
    "/password".to_owned()
}

/// The switch between daylight and dark.
#[must_use]
pub fn theme() -> String {
    "/theme".to_owned()
}

/// Search.
#[must_use]
pub fn find() -> String {
    "/find".to_owned()
}

/// What the program is, what it is not, the cautions.
#[must_use]
pub fn about() -> String {
    "/about".to_owned()
}

/// People.
#[must_use]
pub fn people() -> String {
    "/people".to_owned()
}

/// Add a person.
#[must_use]
pub fn new_person() -> String {
    "/new-person".to_owned()
}

/// A person.
#[must_use]
pub fn person(login: &str) -> String {
    format!("/people/{}", encode(login))
}

/// Make a one-time code with which a person sets their own password.
#[must_use]
pub fn invite(login: &str) -> String {
    format!("/people/{}/invitation", encode(login))
}

/// Lift the lock that wrong signing passwords put on a person.
#[must_use]
pub fn signing_unlock(login: &str) -> String {
    format!("/people/{}/signing-unlock", encode(login))
}

/// Use a one-time code.
#[must_use]
pub fn invitation() -> String {
    "/invitation".to_owned()
}

/// Who can sign, since when, last use.
#[must_use]
pub fn signers() -> String {
    "/signers".to_owned()
}

/// Instruments.
#[must_use]
pub fn instruments() -> String {
    "/instruments".to_owned()
}

/// Add an instrument.
#[must_use]
pub fn new_instrument() -> String {
    "/new-instrument".to_owned()
}

/// An instrument.
#[must_use]
pub fn instrument(id: InstrumentId) -> String {
    format!("/instruments/{id}")
}

/// Sites.
#[must_use]
pub fn sites() -> String {
    "/sites".to_owned()
}

/// Create a site.
#[must_use]
pub fn new_site() -> String {
    "/new-site".to_owned()
}

/// A site: its board.
#[must_use]
pub fn site(site: &str) -> String {
    format!("/sites/{}", encode(site))
}

/// A sheet of a site. The dash stands where a drive's tag would: no tag is a dash.
#[must_use]
pub fn site_sheet(site: &str, sheet: Sheet) -> String {
    format!("/sites/{}/-/{}", encode(site), sheet.key())
}

/// Create a drive at a site.
#[must_use]
pub fn new_drive(site: &str) -> String {
    format!("/sites/{}/-/new-drive", encode(site))
}

/// A drive.
#[must_use]
pub fn drive(site: &str, drive: &str) -> String {
    format!("/sites/{}/{}", encode(site), encode(drive))
}

/// A sheet of a drive.
#[must_use]
pub fn sheet(site: &str, drive: &str, sheet: Sheet) -> String {
    format!("{}/{}", self::drive(site, drive), sheet.key())
}

/// The live verdicts of a sheet.
#[must_use]
pub fn sheet_live(site: &str, drive: &str, sheet: Sheet) -> String {
    format!("{}/live", self::sheet(site, drive, sheet))
}

/// The queue of signed records.
#[must_use]
pub fn queue() -> String {
    "/queue".to_owned()
}

/// A picture, turned upright and stripped.
#[must_use]
pub fn photo(hash: &str) -> String {
    format!("/photos/{}", encode(hash))
}

/// A picture as it was received.
#[must_use]
pub fn photo_original(hash: &str) -> String {
    format!("{}/original", photo(hash))
}

/// A page of the queue.
#[must_use]
pub fn queue_page(page: u32) -> String {
    if page > 1 { format!("{}?page={page}", queue()) } else { queue() }
}

/// A page of a site's board under a filter.
#[must_use]
pub fn board(site: &str, text: &str, status: &str, page: u32) -> String {
    format!("{}?text={}&status={}&page={page}", self::site(site), encode(text), encode(status))
}
