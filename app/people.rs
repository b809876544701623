//! `asleft people`: the list, the first administrator, and a way back in for someone who lost theirs.

use crate::clock;
use crate::ending::Ending;
use clap::{Args, Subcommand};
use commissioning::journal::{Act, Deed};
use commissioning::people::Role;
use commissioning::{ActId, PersonId};
use std::path::PathBuf;
use store::{Proof, Store};

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
    /// Lists everyone with roles and last sign-in
    List,
    /// Names the firm and makes the first administrator of an empty store; prints a one-time code
    First {
        /// Name of the firm
        #[arg(long)]
        firm: String,
        /// Name to sign in with
        #[arg(long)]
        login: String,
        /// Printed name
        #[arg(long)]
        name: String,
    },
    /// Prints a one-time code with which this person sets a new password
    Reset {
        /// Name to sign in with
        #[arg(long)]
        login: String,
    },
}

pub fn run(arguments: &Arguments) -> Ending {
    let store = match Store::open(&arguments.data, clock::now()) {
        Ok(store) => store,
        Err(fault) => return Ending::could_not(fault),
    };
    match &arguments.what {
        What::List => list(&store),
        What::First { firm, login, name } => first(&store, firm, login, name),
        What::Reset { login } => match store.person_by_login(login).wait() {
            Ok(Some(person)) => invite(&store, person.id, &person.name),
            Ok(None) => Ending::could_not(format!("nobody signs in as “{login}”; `people list` shows all names")),
            Err(fault) => Ending::could_not(fault),
        },
    }
}

fn list(store: &Store) -> Ending {
    let accounts = match store.accounts().wait() {
        Ok(accounts) => accounts,
        Err(fault) => return Ending::could_not(fault),
    };
    if accounts.is_empty() {
        println!("Nobody yet. `people first` makes the first administrator.");
    }
    for account in accounts {
        let roles: Vec<&str> = account.person.roles.iter().map(|r| r.words()).collect();
        let last = account.last_sign_in.map_or_else(|| "never".to_owned(), |t| t.shown());
        let state = if account.person.active { "" } else { " · switched off" };
        println!(
            "{} · {} · {}{state} · last sign-in {last}",
            account.person.login,
            account.person.name,
            roles.join(", ")
        );
    }
    Ending::Fine
}

fn first(store: &Store, firm: &str, login: &str, name: &str) -> Ending {
    let person = PersonId(clock::fresh_id());
    let act = Act {
        id: ActId(clock::fresh_id()),
        tablet: None,
        deed: Deed::SetUp {
            firm: firm.to_owned(),
            person,
            login: login.to_owned(),
            name: name.to_owned(),
            roles: vec![Role::Administrator],
        },
    };
    match store.perform(None, act, Proof::none(), clock::now()).wait() {
        Ok(_) => invite(store, person, name),
        Err(fault) => Ending::could_not(fault),
    }
}

fn invite(store: &Store, person: PersonId, name: &str) -> Ending {
    match store.invite(person, None, clock::now()).wait() {
        Ok(code) => {
            println!("One-time code for {name}, valid for 7 days: {code}");
            println!("Start the server, open its address and choose to set your password with a one-time code.");
            Ending::Fine
        }
        Err(fault) => Ending::could_not(fault),
    }
}
