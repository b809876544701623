//! `asleft backup`: a checked copy of a data folder.

use crate::clock;
use crate::ending::Ending;
use clap::Args;
use std::path::PathBuf;
use store::{OpenFault, Store};

#[derive(Args)]
pub struct Arguments {
    /// Data folder to copy
    #[arg(long)]
    data: PathBuf,
    /// New or empty folder for the backup
    #[arg(long)]
    to: PathBuf,
}

pub fn run(arguments: &Arguments) -> Ending {
    let made = match Store::open(&arguments.data, clock::now()) {
        Ok(store) => store.backup(&arguments.to, clock::now()).wait(),
        Err(OpenFault::InUse(_)) => store::backup_beside(&arguments.data, &arguments.to, clock::now()),
        Err(fault) => return Ending::could_not(fault),
    };
    match made {
        Ok(receipt) => {
            println!("Backup made in {}.", receipt.folder.display());
            println!("{} bytes, {} pictures.", receipt.bytes, receipt.photos);
            println!("Journal head {} · {}", receipt.stream.sequence, receipt.stream.hash);
            println!("Note the head apart from the backup: it shows later that nothing before it was changed.");
            println!("The signing key is not in it. Keep a copy of the key in a place of its own.");
            Ending::Fine
        }
        Err(fault) => Ending::could_not(fault),
    }
}
