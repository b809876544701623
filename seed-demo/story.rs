//! The story: who works on which drive on which day, and how far each has come.

use crate::calendar::Calendar;
use crate::case::{self, Case, Usual};
use crate::crew::{self, account};
use crate::hand::Hand;
use crate::walk::Walk;
use crate::{Demo, DemoFault, gear, site};
use commissioning::journal::Deed;
use commissioning::procedure::built_in::built_in;
use commissioning::record::{Meaning, Severity};
use commissioning::{DriveId, Timestamp};
use store::Store;

/// The table of a drive, embedded.
macro_rules! case {
    ($name:literal) => {
        case::read::<Case>($name, include_str!(concat!("tables/", $name, ".toml")))
    };
}

/// The tables, by what their drive shows.
pub(crate) struct Cases {
    /// Plates filled in, nothing begun.
    pub(crate) fresh: Case,
    /// A plate that contradicts itself.
    pub(crate) contradiction: Case,
    /// A wet motor.
    pub(crate) wet: Case,
    /// A motor in delta at 87 Hz, being set.
    pub(crate) delta: Case,
    /// A hoist, its stops being proved.
    pub(crate) hoist: Case,
    /// Signed, waits for review.
    pub(crate) signed: Case,
    /// Sent back.
    pub(crate) returned: Case,
    /// Accepted and handed over.
    pub(crate) accepted: Case,
    /// What is the same everywhere.
    pub(crate) usual: Usual,
}

impl Cases {
    /// Reads them all.
    pub(crate) fn read() -> Result<Self, DemoFault> {
        Ok(Self {
            fresh: case!("wash-pump")?,
            contradiction: case!("agitator")?,
            wet: case!("storm-pump")?,
            delta: case!("screw-feeder")?,
            hoist: case!("service-hoist")?,
            signed: case!("reclaim-belt")?,
            returned: case!("shore-pump")?,
            accepted: case!("dust-fan")?,
            usual: case::read("usual", include_str!("tables/usual.toml"))?,
        })
    }
}

/// Tells it, from the first day on.
pub(crate) fn tell(store: &Store, now: Timestamp) -> Result<Demo, DemoFault> {
    let cases = Cases::read()?;
    let mut hand = prepared(store, now)?;
    let usual = &cases.usual;
    hand.calendar.day(1);
    let fan = work(&mut hand, &cases.accepted, usual, "bram", None)?;
    sign(&mut hand, &cases.accepted, usual, fan, "bram")?;
    hand.calendar.day(5);
    let pump = work(&mut hand, &cases.returned, usual, "sunniva", None)?;
    sign(&mut hand, &cases.returned, usual, pump, "sunniva")?;
    hand.calendar.day(9);
    accept(&mut hand, &cases.accepted, usual, fan)?;
    send_back(&mut hand, pump)?;
    hand.calendar.day(11);
    let belt = work(&mut hand, &cases.signed, usual, "bram", None)?;
    sign(&mut hand, &cases.signed, usual, belt, "bram")?;
    hand.calendar.day(15);
    work(&mut hand, &cases.hoist, usual, "sunniva", Some("relays"))?;
    hand.calendar.day(19);
    work(&mut hand, &cases.delta, usual, "bram", Some("set-limits"))?;
    hand.calendar.day(22);
    work(&mut hand, &cases.wet, usual, "sunniva", Some("cable-alone"))?;
    hand.calendar.day(24);
    work(&mut hand, &cases.contradiction, usual, "bram", Some("motor-cable-details"))?;
    hand.calendar.day(25);
    site::add_drive(&mut hand, &cases.fresh, "bram")?;
    Ok(crew::told(site::TAG))
}

/// People, procedure, instruments and site: all that a drive needs.
pub(crate) fn prepared(store: &Store, now: Timestamp) -> Result<Hand<'_>, DemoFault> {
    let mut hand = Hand::new(store, Calendar::before(now));
    let procedure = built_in().map_err(|e| DemoFault::Table("the built-in procedure".to_owned(), e))?;
    crew::sign_on(&mut hand)?;
    hand.act(None, Deed::LoadProcedure { procedure: Box::new(procedure) }, 30, "the procedure")?;
    gear::lay_out(&mut hand, now)?;
    site::open(&mut hand)?;
    Ok(hand)
}

/// Makes a drive and works on it until a step is next, or to the end.
pub(crate) fn work(
    hand: &mut Hand<'_>,
    case: &Case,
    usual: &Usual,
    who: &str,
    next: Option<&str>,
) -> Result<DriveId, DemoFault> {
    let drive = site::add_drive(hand, case, who)?;
    Walk { hand, case, usual, drive, who: account(who) }.until(next)?;
    Ok(drive)
}

/// Signs as performed and recorded.
pub(crate) fn sign(
    hand: &mut Hand<'_>,
    case: &Case,
    usual: &Usual,
    drive: DriveId,
    who: &str,
) -> Result<(), DemoFault> {
    let who = account(who);
    Walk { hand, case, usual, drive, who }.sign(who, Meaning::Performed)
}

/// The supervisor accepts what is left open by name, and then the record.
pub(crate) fn accept(hand: &mut Hand<'_>, case: &Case, usual: &Usual, drive: DriveId) -> Result<(), DemoFault> {
    let who = account("lucan");
    let open: Vec<_> = hand
        .drive(drive)?
        .record
        .iter()
        .flat_map(|r| r.findings.values())
        .filter(|f| f.is_open() && f.severity != Severity::Information)
        .map(|f| f.id)
        .collect();
    for finding in open {
        let reason = "The client has seen it and takes it over as it is; it stands on their list for the next stop.";
        let deed = Deed::AcceptFinding { drive, finding, reason: reason.to_owned() };
        hand.act(Some(who), deed, 1_500, &case.tag)?;
    }
    Walk { hand, case, usual, drive, who }.sign(who, Meaning::Accepted)
}

/// The supervisor sends a record back, with remarks.
fn send_back(hand: &mut Hand<'_>, drive: DriveId) -> Result<(), DemoFault> {
    let who = Some(account("lucan"));
    for (step, text) in [
        (
            "stop-time-under-load",
            "This is longer than the 12 s of the client's specification. Shorten the ramp or have the client change the figure in writing.",
        ),
        (
            "own-protections",
            "Three of nine were tried. Please add why the earth-fault test is left to the maker's service.",
        ),
    ] {
        hand.act(who, Deed::Remark { drive, step: step.to_owned(), text: text.to_owned() }, 700, step)?;
    }
    let reason = "The stop under load takes longer than specified. Set the ramp right, take the time again, then sign.";
    hand.act(who, Deed::Return { drive, reason: reason.to_owned() }, 300, "returning").map(drop)
}
