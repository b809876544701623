//! `asleft restore`: an empty folder filled from a backup.

use crate::clock;
use crate::ending::Ending;
use clap::Args;
use std::path::PathBuf;

#[derive(Args)]
pub struct Arguments {
    /// Folder that holds the backup
    #[arg(long)]
    from: PathBuf,
    /// New or empty data folder
    #[arg(long)]
    data: PathBuf,
}

pub fn run(arguments: &Arguments) -> Ending {
    match store::Store::restore(&arguments.from, &arguments.data, clock::now()) {
        Ok(head) => {
            println!("Restored into {}.", arguments.data.display());
            println!("Journal head {} · {}", head.sequence, head.hash);
            println!("Put the signing key back beside the store, or a new one is made at the next start.");
            Ending::Fine
        }
        Err(fault) => Ending::could_not(fault),
    }
}
