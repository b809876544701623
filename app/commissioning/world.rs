//! A small world for tests: invented people, one site, one drive, a tiny procedure; everything happens through acts.
//!
//! After every act the world checks what must always hold: events survive JSON, chains are whole, the record file
//! reads back and rebuilds, and every standing signature still fits. Each starting point is made once and copied.

use crate::decide::{Surroundings, decide};
use crate::journal::{Act, Chain, Change, Deed, Event, Head, Sealed, seal, verify_chain};
use crate::judge::View;
use crate::people::{Installation, Person, Role};
use crate::plant::{Sheet, Site};
use crate::procedure::Procedure;
use crate::record::canonical::RecordFile;
use crate::record::{Drive, EntryPlace, Meaning, Record, ReleaseRole, apply};
use crate::{ActId, DriveId, PersonId, Refusal, SiteId, Timestamp};
use std::collections::BTreeMap;
use std::sync::LazyLock;
use uuid::Uuid;

mod any_acts;

/// A tiny procedure: each step is there for one rule.
pub(crate) const PROCEDURE: &str = include_str!("world/procedure.toml");

pub(crate) const SITE: SiteId = SiteId(Uuid::from_u128(0x51));
pub(crate) const DRIVE: DriveId = DriveId(Uuid::from_u128(0xD1));
/// Administrator.
pub(crate) const ADA: PersonId = PersonId(Uuid::from_u128(0xA1));
/// Engineer.
pub(crate) const ERIN: PersonId = PersonId(Uuid::from_u128(0xE1));
/// Another engineer, who is a supervisor too.
pub(crate) const EBBE: PersonId = PersonId(Uuid::from_u128(0xE2));
/// Supervisor.
pub(crate) const SUNE: PersonId = PersonId(Uuid::from_u128(0x5E));
/// Reader.
pub(crate) const RUTH: PersonId = PersonId(Uuid::from_u128(0x2E));

#[derive(Clone)]
pub(crate) struct World {
    pub(crate) installation: Installation,
    pub(crate) site: Option<Site>,
    pub(crate) drive: Option<Drive>,
    pub(crate) chains: BTreeMap<Chain, Vec<Sealed>>,
    pub(crate) acts: u128,
    pub(crate) password_proved: bool,
    pub(crate) minute: i64,
}

pub(crate) fn procedure() -> Procedure {
    toml::from_str(PROCEDURE).unwrap()
}

impl World {
    /// Nobody and nothing.
    pub(crate) fn empty() -> Self {
        Self {
            installation: Installation::default(),
            site: None,
            drive: None,
            chains: BTreeMap::new(),
            acts: 0,
            password_proved: true,
            minute: 0,
        }
    }

    /// People, procedure, site and drive; no record yet.
    pub(crate) fn new() -> Self {
        static MADE: LazyLock<World> = LazyLock::new(World::make_new);
        MADE.clone()
    }

    fn make_new() -> Self {
        let mut world = Self::empty();
        let set_up = Deed::SetUp {
            firm: "Larchwood Drives".into(),
            person: ADA,
            login: "ada".into(),
            name: "Ada Larch".into(),
            roles: vec![Role::Administrator],
        };
        world.attempt(None, set_up).unwrap();
        world.attempt(None, Deed::LoadProcedure { procedure: Box::new(procedure()) }).unwrap();
        for (person, login, name, roles) in [
            (ERIN, "erin", "Erin Alder", vec![Role::Engineer]),
            (EBBE, "ebbe", "Ebbe Birch", vec![Role::Engineer, Role::Supervisor]),
            (SUNE, "sune", "Sune Rowan", vec![Role::Supervisor]),
            (RUTH, "ruth", "Ruth Hazel", vec![Role::Reader]),
        ] {
            world.does(ADA, Deed::AddPerson { person, login: login.into(), name: name.into(), roles });
        }
        world.does(ADA, Deed::CreateSite { site: SITE, tag: "larch-ferry".into(), name: "Larch Ferry".into() });
        world.does(
            SUNE,
            Deed::CreateDrive { site: SITE, drive: DRIVE, tag: "M-2104".into(), name: "Return-air fan".into() },
        );
        world
    }

    /// A record just begun.
    pub(crate) fn begun() -> Self {
        static MADE: LazyLock<World> = LazyLock::new(World::make_begun);
        MADE.clone()
    }

    fn make_begun() -> Self {
        let mut world = Self::new();
        world.does(ERIN, Deed::BeginRecord { drive: DRIVE });
        world
    }

    /// Every step settled, in order; not signed.
    pub(crate) fn complete() -> Self {
        static MADE: LazyLock<World> = LazyLock::new(World::make_complete);
        MADE.clone()
    }

    fn make_complete() -> Self {
        let mut world = Self::begun();
        for option in ["brake-chopper", "bypass"] {
            world.set_field(ERIN, Sheet::Drive, option, "no", "").unwrap();
        }
        world.enter(ERIN, "prove-dead", &[("tester-proved", "yes"), ("bus-after-waiting", "3")]);
        world.release("inspect");
        world.enter(ERIN, "terminals", &[("terminals-tight", "yes")]);
        world.enter(ERIN, "insulation", &[("ir-60s", "812")]);
        world.enter(ERIN, "lift", &[("isolation-removed", "yes")]);
        world.release("turn");
        world.enter(ERIN, "direction", &[("direction-seen", "clockwise")]);
        for row in 0..2 {
            world.enter_at(ERIN, "run", EntryPlace::in_row("run-current", row), "21.4").unwrap();
        }
        world
    }

    /// Signed by Erin.
    pub(crate) fn signed() -> Self {
        static MADE: LazyLock<World> = LazyLock::new(World::make_signed);
        MADE.clone()
    }

    fn make_signed() -> Self {
        let mut world = Self::complete();
        world.sign(ERIN, Meaning::Performed).unwrap();
        world
    }

    /// Accepted by Sune.
    pub(crate) fn accepted() -> Self {
        static MADE: LazyLock<World> = LazyLock::new(World::make_accepted);
        MADE.clone()
    }

    fn make_accepted() -> Self {
        let mut world = Self::signed();
        world.sign(SUNE, Meaning::Accepted).unwrap();
        world
    }

    pub(crate) fn drive(&self) -> &Drive {
        self.drive.as_ref().unwrap()
    }

    pub(crate) fn record(&self) -> &Record {
        self.drive().record.as_ref().unwrap()
    }

    pub(crate) fn view(&self) -> View<'_> {
        let version = self.drive().record.as_ref().map_or(1, |r| r.procedure);
        View {
            drive: self.drive(),
            site: self.site.as_ref().unwrap(),
            procedure: &self.installation.procedures[&version],
        }
    }

    pub(crate) fn file(&self) -> RecordFile {
        RecordFile::shown(&self.view())
    }

    pub(crate) fn now(&self) -> Timestamp {
        let start = Timestamp::parse("2026-11-17T08:00:00Z").unwrap();
        Timestamp::new(start.moment() + time::Duration::minutes(self.minute))
    }

    pub(crate) fn next_act(&mut self, deed: Deed) -> Act {
        self.acts += 1;
        Act { id: ActId(Uuid::from_u128(self.acts)), tablet: None, deed }
    }

    /// Decides without applying.
    pub(crate) fn ask(&self, actor: Option<&Person>, act: &Act) -> Result<Vec<Event>, Refusal> {
        let made_here = |id: Option<DriveId>| id.is_none() || id == Some(DRIVE);
        decide(
            act,
            &Surroundings {
                actor,
                now: self.now(),
                installation: &self.installation,
                site: self.site.as_ref(),
                drive: self.drive.as_ref().filter(|_| made_here(act.deed.drive())),
                password_proved: self.password_proved,
            },
        )
    }

    /// Decides, seals and applies.
    pub(crate) fn attempt(&mut self, actor: Option<PersonId>, deed: Deed) -> Result<Vec<Event>, Refusal> {
        let act = self.next_act(deed);
        let actor = actor.map(|id| self.installation.people[&id].clone());
        let events = self.ask(actor.as_ref(), &act)?;
        for event in &events {
            self.apply(event);
        }
        self.check();
        Ok(events)
    }

    /// Seals an event and applies what is read back from its bytes.
    pub(crate) fn apply(&mut self, event: &Event) {
        let chain = self.chains.entry(event.chain).or_default();
        let head = chain.last().map_or(Head::empty(), Sealed::head);
        let sealed = seal(&head, event).unwrap();
        let (read, head) = (sealed.event().unwrap(), sealed.head());
        assert_eq!(read, *event, "an event survives its canonical bytes");
        chain.push(sealed);
        match event.chain {
            Chain::Installation => apply::to_installation(&mut self.installation, &read).unwrap(),
            Chain::Site(_) => apply::to_site(&mut self.site, &read).unwrap(),
            Chain::Drive(_) => apply::to_drive(&mut self.drive, &read, &head).unwrap(),
        }
    }

    /// What must hold after every act.
    fn check(&self) {
        for chain in self.chains.values() {
            verify_chain(chain).unwrap();
        }
        if self.drive.is_none() || self.installation.procedures.is_empty() {
            return;
        }
        let file = self.file();
        let text = file.to_json();
        let read = RecordFile::read(&text).unwrap();
        assert_eq!(read, file, "a file reads back");
        assert_eq!(read.to_json(), text);
        let rebuilt = file.rebuild().unwrap();
        let view = View { drive: &rebuilt.drive, site: &rebuilt.site, procedure: &rebuilt.procedure };
        assert_eq!(RecordFile::of(&view, &file.verdicts), file, "a rebuilt drive gives the same file");
        for (n, signature) in self.drive().record.iter().flat_map(|r| &r.signatures).enumerate() {
            let again = file.digest_at(n);
            assert_eq!(again.is_none(), signature.superseded);
            assert!(again.is_none_or(|d| d == signature.digest), "signature {n} still fits");
        }
    }

    /// An act that must succeed.
    #[track_caller]
    pub(crate) fn does(&mut self, who: PersonId, deed: Deed) -> Vec<Event> {
        self.minute += 1;
        self.attempt(Some(who), deed).unwrap()
    }

    /// A change of one place as a form that is up to date sends it.
    pub(crate) fn change(&self, place: EntryPlace, text: &str) -> Change<EntryPlace> {
        let slot = self.drive().record.as_ref().and_then(|r| r.entries.get(&place));
        let seen = slot.map(|s| s.seen()).unwrap_or_default();
        Change { place, text: text.into(), unit: String::new(), instrument: None, photo: None, seen }
    }

    /// Enters items at a step; must succeed.
    #[track_caller]
    pub(crate) fn enter(&mut self, who: PersonId, step: &str, items: &[(&str, &str)]) -> Vec<Event> {
        let changes = items.iter().map(|(item, text)| self.change(EntryPlace::new(*item), text)).collect();
        self.does(who, Deed::RecordEntries { drive: DRIVE, step: step.into(), changes, reason: String::new() })
    }

    pub(crate) fn enter_at(
        &mut self,
        who: PersonId,
        step: &str,
        place: EntryPlace,
        text: &str,
    ) -> Result<Vec<Event>, Refusal> {
        let changes = vec![self.change(place, text)];
        self.record_changes(who, step, changes, "")
    }

    pub(crate) fn record_changes(
        &mut self,
        who: PersonId,
        step: &str,
        changes: Vec<Change<EntryPlace>>,
        reason: &str,
    ) -> Result<Vec<Event>, Refusal> {
        self.minute += 1;
        let deed = Deed::RecordEntries { drive: DRIVE, step: step.into(), changes, reason: reason.into() };
        self.attempt(Some(who), deed)
    }

    /// Erin answers a return by a remark on the whole record.
    #[track_caller]
    pub(crate) fn answer(&mut self, text: &str) {
        self.does(ERIN, Deed::Remark { drive: DRIVE, step: String::new(), text: text.into() });
    }

    #[track_caller]
    pub(crate) fn release(&mut self, phase: &str) {
        self.does(ERIN, release(phase));
    }

    /// Signs what is shown now.
    pub(crate) fn sign(&mut self, who: PersonId, meaning: Meaning) -> Result<Vec<Event>, Refusal> {
        self.minute += 1;
        let digest = self.file().digest();
        self.attempt(Some(who), Deed::Sign { drive: DRIVE, meaning, digest })
    }

    /// Sets one field of the drive as a form that is up to date sends it.
    pub(crate) fn set_field(
        &mut self,
        who: PersonId,
        sheet: Sheet,
        key: &str,
        text: &str,
        unit: &str,
    ) -> Result<Vec<Event>, Refusal> {
        self.minute += 1;
        let place = crate::plant::Place::new(sheet, key);
        let seen = self.drive().fields.get(&place).map(|s| s.seen()).unwrap_or_default();
        let change = Change {
            place: (0, key.into()),
            text: text.into(),
            unit: unit.into(),
            instrument: None,
            photo: None,
            seen,
        };
        self.attempt(
            Some(who),
            Deed::SetDriveFields { drive: DRIVE, sheet, changes: vec![change], reason: String::new() },
        )
    }
}

/// A release by the engineer with both sentences declared.
pub(crate) fn release(phase: &str) -> Deed {
    Deed::ReleaseHold {
        drive: DRIVE,
        phase: phase.into(),
        role: ReleaseRole::Engineer,
        printed_name: String::new(),
        declared: vec![true, true],
    }
}

/// The sentence of a refusal that is one.
#[track_caller]
pub(crate) fn why<T: std::fmt::Debug>(result: Result<T, Refusal>) -> String {
    match result.unwrap_err() {
        Refusal::NotNow { why } | Refusal::NotAllowed { why } => why,
        other => format!("{other:?}"),
    }
}

/// The fields at fault of a refusal.
#[track_caller]
pub(crate) fn fields<T: std::fmt::Debug>(result: Result<T, Refusal>) -> Vec<String> {
    match result.unwrap_err() {
        Refusal::Fields { errors } => errors.into_iter().map(|e| e.field).collect(),
        other => panic!("{other:?}"),
    }
}
