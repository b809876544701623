//! `asleft keys`: the signing keys, present and former, and a new one in place of the present.

use crate::clock;
use crate::ending::Ending;
use clap::{Args, Subcommand};
use commissioning::ActId;
use commissioning::journal::{Act, Deed};
use commissioning::people::KeyChange;
use handover::key::rotation::{self, IN_USE, Rotation};
use handover::key::{self, Fingerprint};
use std::path::{Path, PathBuf};
use store::{PasswordAnswer, Proof, Store};

#[derive(Args)]
pub struct Arguments {
    /// Data folder; no server may be running on it
    #[arg(long)]
    data: PathBuf,
    #[command(subcommand)]
    what: What,
}

#[derive(Subcommand)]
enum What {
    /// Lists the fingerprints of the key in use and of all former ones, with who changed them and when
    List,
    /// Makes a new key in place of the present one, signed by both; packages made before still verify
    Rotate {
        /// Sign-in name of the administrator who changes it; the password is read from standard input
        #[arg(long)]
        login: String,
    },
}

pub fn run(arguments: &Arguments) -> Ending {
    let store = match Store::open(&arguments.data, clock::now()) {
        Ok(store) => store,
        Err(fault) => return Ending::could_not(fault),
    };
    let done = match &arguments.what {
        What::List => list(&store, &arguments.data),
        What::Rotate { login } => rotate(&store, &arguments.data, login),
    };
    done.unwrap_or_else(Ending::CouldNotRun)
}

fn changes(store: &Store) -> Result<Vec<KeyChange>, String> {
    Ok(store.installation().wait().map_err(|f| f.to_string())?.key_changes.clone())
}

/// Puts the key in place that the journal names last, if a change was cut short.
pub fn settle(store: &Store, data: &Path) -> Result<(), String> {
    if store.only_read().is_some() {
        return Ok(());
    }
    let changes = changes(store)?;
    if rotation::settle(data, changes.last().map(|c| c.new.as_str())).map_err(|f| f.to_string())? {
        println!("A change of the signing key that was cut short is now complete.");
    }
    Ok(())
}

/// A sentence when the key in the folder is not the one that the journal names last.
pub fn strange(store: &Store, data: &Path) -> Result<Option<String>, String> {
    let used = rotation::public(&key::load(&data.join(IN_USE)).map_err(|f| f.to_string())?);
    let strange = changes(store)?.last().is_some_and(|last| last.new != used);
    Ok(strange.then(|| "The signing key in the data folder is not the one that the journal names last.".to_owned()))
}

fn list(store: &Store, data: &Path) -> Result<Ending, String> {
    let shown = |public: &str| rotation::fingerprint_of(public).map_or_else(|| "no key".to_owned(), |Fingerprint(f)| f);
    let mut wrong = false;
    let used = key::load(&data.join(IN_USE)).map_err(|f| f.to_string())?;
    println!("in use  {}", key::fingerprint(&used.verifying_key()));
    for change in changes(store)?.iter().rev() {
        println!("former  {} · replaced {} by {}", shown(&change.old), change.received.shown(), change.by_name);
        let KeyChange { old, new, by_old, by_new, .. } = change.clone();
        if !(Rotation { old, new, by_old, by_new }).holds() {
            println!("        The journal says so, but not both keys signed it.");
            wrong = true;
        }
    }
    if let Some(strange) = strange(store, data)? {
        println!("{strange}");
        wrong = true;
    }
    println!("A package carries the key that signed it: its fingerprint is one of these, or it is not from here.");
    Ok(if wrong { Ending::FoundWrong } else { Ending::Fine })
}

fn rotate(store: &Store, data: &Path, login: &str) -> Result<Ending, String> {
    if let Some(why) = store.only_read() {
        return Err(format!("nothing can be written here ({why}), so that the key stays as it is"));
    }
    settle(store, data)?;
    let person = store.person_by_login(login).wait().map_err(|f| f.to_string())?;
    let person = person.ok_or_else(|| format!("nobody signs in as “{login}”; `people list` shows all names"))?;
    eprintln!("Password of {}:", person.name);
    let mut typed = String::new();
    std::io::stdin().read_line(&mut typed).map_err(|f| format!("no password could be read: {f}"))?;
    let typed = typed.trim_end_matches(['\n', '\r']);
    match store.check_password(person.id, typed, clock::now()).wait().map_err(|f| f.to_string())? {
        PasswordAnswer::Right => {}
        PasswordAnswer::Wrong => return Err("the password does not fit; nothing was changed".to_owned()),
        PasswordAnswer::Locked { until } => {
            return Err(format!("too many wrong passwords: not looked at before {}", until.shown()));
        }
    }
    let old = key::load(&data.join(IN_USE)).map_err(|f| f.to_string())?;
    let new = rotation::next(data).map_err(|f| f.to_string())?;
    let Rotation { old: from, new: to, by_old, by_new } = Rotation::between(&old, &new);
    let deed = Deed::RotateKey { old: from, new: to.clone(), by_old, by_new };
    let act = Act { id: ActId(clock::fresh_id()), tablet: None, deed };
    store.perform(Some(person.id), act, Proof::password(), clock::now()).wait().map_err(|f| f.to_string())?;
    // From here on the journal names the new key: should this be cut short, the next start completes it.
    rotation::settle(data, Some(&to)).map_err(|f| f.to_string())?;
    println!("former  {}", key::fingerprint(&old.verifying_key()));
    println!("in use  {}", key::fingerprint(&new.verifying_key()));
    println!(
        "Copy the new key to where the former was kept apart, and tell those who receive packages its fingerprint."
    );
    println!("Packages made before still verify with the key they carry; `keys list` says that it was yours.");
    Ok(Ending::Fine)
}
