//! `asleft check-store`: looks at everything in a data folder, changes nothing.

use crate::clock;
use crate::ending::Ending;
use clap::Args;
use std::path::PathBuf;

#[derive(Args)]
pub struct Arguments {
    /// Data folder
    #[arg(long)]
    data: PathBuf,
    /// Print JSON
    #[arg(long)]
    json: bool,
}

pub fn run(arguments: &Arguments) -> Ending {
    match store::check_store(&arguments.data, clock::now()) {
        Ok(report) => {
            println!("{}", if arguments.json { report.to_json() } else { report.to_text() });
            if report.ok { Ending::Fine } else { Ending::FoundWrong }
        }
        Err(fault) => Ending::could_not(fault),
    }
}
