//! The walk that is disturbed: a firm, a drive, entries, a photo, signatures, a backup, closed and opened again.

use super::super::stage::*;
use crate::{PerformFault, Proof, Store};
use commissioning::PersonId;
use commissioning::journal::{Act, Change, Deed};
use commissioning::people::Role;
use commissioning::record::canonical::RecordFile;
use commissioning::record::{EntryPlace, Meaning, Photo};
use std::fs::File;
use std::io::Write;
use std::path::Path;

/// What the walk puts into its store.
const PLACE: &str = "ASLEFT_WALK";
/// Set: the answer is said before it is there, a planted fault.
const HASTY: &str = "ASLEFT_WALK_HASTY";

/// What the walk tells the outside world, a line each; nobody syncs it, as nobody syncs a network.
struct Teller {
    file: File,
    hasty: bool,
}

impl Teller {
    fn say(&mut self, line: &str) {
        self.file.write_all(format!("{line}\n").as_bytes()).unwrap();
    }

    /// Sends an act as a page would, and says what came of it.
    fn does(&mut self, store: &Store, who: Option<PersonId>, deed: Deed, minute: i64) {
        let sent: Act = act(deed);
        self.say(&format!("sent {}", serde_json::to_string(&(who, &sent)).unwrap()));
        let id = sent.id;
        let answer = store.perform(who, sent, Proof::password(), at(minute));
        if self.hasty {
            self.say(&format!("done {id}"));
        }
        match answer.wait() {
            Ok(_) => self.say(&format!("done {id}")),
            Err(PerformFault::Refused(refusal)) => self.say(&format!("refused {id} {refusal}")),
            Err(other) => self.say(&format!("unknown {id} {other}")),
        }
    }

    fn enters(&mut self, store: &Store, step: &str, item: &str, text: &str, photo: Option<Photo>, minute: i64) {
        let place = EntryPlace::new(item);
        let state = store.drive_blocking(drive(1)).ok().flatten();
        let slot = state.as_ref().and_then(|d| d.record.as_ref()).and_then(|r| r.entries.get(&place));
        let seen = slot.map(|slot| slot.seen()).unwrap_or_default();
        let change = Change { place, text: text.to_owned(), unit: String::new(), instrument: None, photo, seen };
        let deed = Deed::RecordEntries {
            drive: drive(1),
            step: step.to_owned(),
            changes: vec![change],
            reason: "misread".to_owned(),
        };
        self.does(store, Some(ROWAN), deed, minute);
    }

    fn signs(&mut self, store: &Store, who: PersonId, meaning: Meaning, minute: i64) {
        let Ok(Some(view)) = store.drive_view_by_id_blocking(drive(1)) else { return self.say("lost the drive") };
        let digest = RecordFile::shown(&view.view()).digest();
        self.does(store, Some(who), Deed::Sign { drive: drive(1), meaning, digest }, minute);
    }

    fn photographs(&mut self, store: &Store, minute: i64) -> Option<Photo> {
        let picture = [&[0xFF, 0xD8, 0xFF][..], &[9; 5000]].concat();
        let kept = store.keep_photo_blocking(picture, at(minute)).ok();
        if let Some(photo) = &kept {
            self.say(&format!("photo {}", photo.hash));
        }
        kept
    }
}

/// Everything, from an empty folder.
fn walk(folder: &Path, teller: &mut Teller) {
    let path = folder.join("store");
    let Ok(store) = Store::open(&path, at(0)) else { return teller.say("not opened") };
    begin(&store, teller);
    let photo = teller.photographs(&store, 6);
    teller.enters(&store, "plate", "plate-photo", "", photo, 7);
    teller.enters(&store, "plate", "plate-read", "yes", None, 8);
    teller.enters(&store, "plate", "plate-note", "wet", None, 9);
    teller.enters(&store, "door", "door-closed", "yes", None, 10);
    teller.signs(&store, ROWAN, Meaning::Performed, 11);
    teller.does(&store, Some(MAREN), Deed::Return { drive: drive(1), reason: "Look again".to_owned() }, 12);
    teller.enters(&store, "plate", "plate-note", "dry", None, 13);
    if store.backup_blocking(&folder.join("backup"), at(14)).is_ok() {
        teller.say("backup");
    }
    // The last handle closes: what is in the write-ahead log goes into the file.
    drop(store);
    let Ok(store) = Store::open(&path, at(15)) else { return teller.say("not opened") };
    teller.signs(&store, ROWAN, Meaning::Performed, 16);
    teller.signs(&store, MAREN, Meaning::Accepted, 17);
    teller.does(&store, Some(MAREN), Deed::Reopen { drive: drive(1), reason: "New motor".to_owned() }, 18);
    teller.enters(&store, "plate", "plate-note", "new motor", None, 19);
    drop(store);
    teller.say("end");
}

fn begin(store: &Store, teller: &mut Teller) {
    let set_up = Deed::SetUp {
        firm: "Alder Drives".to_owned(),
        person: IDA,
        login: "ida".to_owned(),
        name: "Ida Berg".to_owned(),
        roles: vec![Role::Administrator],
    };
    teller.does(store, None, set_up, 0);
    let people = [(ROWAN, "rowan", "Rowan Vale", Role::Engineer), (MAREN, "maren", "Maren Holt", Role::Supervisor)];
    for (person, login, name, role) in people {
        let (login, name) = (login.to_owned(), name.to_owned());
        teller.does(store, Some(IDA), Deed::AddPerson { person, login, name, roles: vec![role] }, 1);
    }
    teller.does(store, None, Deed::LoadProcedure { procedure: Box::new(short_procedure(1)) }, 1);
    let (tag, name) = ("larch-ferry".to_owned(), "Larch Ferry pumping station".to_owned());
    teller.does(store, Some(ROWAN), Deed::CreateSite { site: SITE, tag, name }, 2);
    let (tag, name) = ("P-1".to_owned(), "Feed pump".to_owned());
    teller.does(store, Some(ROWAN), Deed::CreateDrive { site: SITE, drive: drive(1), tag, name }, 3);
    teller.does(store, Some(ROWAN), Deed::BeginRecord { drive: drive(1) }, 4);
}

/// The walk itself. Another test starts this one in a process of its own, in a folder that it names, and disturbs it;
/// undisturbed it runs to its end with every act done.
#[test]
fn the_walk_runs_to_its_end() {
    let own = super::running::place();
    let named = std::env::var_os(PLACE);
    let folder = named.as_ref().map_or(own.path(), Path::new);
    let file = File::create(folder.join("told")).unwrap();
    walk(folder, &mut Teller { file, hasty: std::env::var_os(HASTY).is_some() });
    if named.is_none() {
        let told = super::examine::Told::read(&folder.join("told"));
        assert!(told.ended && told.lost.is_empty(), "{:?}", told.lost);
        assert_eq!((told.done.len(), told.photos.len(), told.backup), (18, 1, true));
        assert_eq!(super::examine::faults_of(folder, &told), Vec::<String>::new());
    }
}

/// The environment that sends the walk into a folder.
pub(super) fn sent_to(folder: &Path, hasty: bool) -> Vec<(&'static str, std::ffi::OsString)> {
    let mut set = vec![(PLACE, folder.as_os_str().to_owned())];
    if hasty {
        set.push((HASTY, "1".into()));
    }
    set
}
