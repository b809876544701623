//! `asleft handover`: the package of one drive, from the command line.

use crate::clock;
use crate::ending::Ending;
use clap::Args;
use std::path::PathBuf;
use store::Store;

#[derive(Args)]
pub struct Arguments {
    /// Data folder; no server may be running on it
    #[arg(long)]
    data: PathBuf,
    /// Tag of the site
    #[arg(long)]
    site: String,
    /// Plant tag of the drive
    #[arg(long)]
    drive: String,
    /// Where to: a new or empty folder, or a file that ends in .zip
    #[arg(long)]
    to: PathBuf,
}

pub fn run(arguments: &Arguments) -> Ending {
    match make(arguments) {
        Ok(()) => Ending::Fine,
        Err(why) => Ending::CouldNotRun(why),
    }
}

fn make(arguments: &Arguments) -> Result<(), String> {
    let store = Store::open(&arguments.data, clock::now()).map_err(|f| f.to_string())?;
    let drive = store
        .drive_by_tag(&arguments.site, &arguments.drive)
        .wait()
        .map_err(|f| f.to_string())?
        .ok_or_else(|| format!("there is no drive {} at a site {}", arguments.drive, arguments.site))?;
    let runtime = tokio::runtime::Builder::new_current_thread().build().map_err(|f| f.to_string())?;
    let material = runtime
        .block_on(web::packaging::material(&store, drive.id))
        .map_err(|f| f.to_string())?
        .ok_or("the drive is gone")?;
    crate::keys::settle(&store, &arguments.data)?;
    let key = handover::key::load_or_create(&arguments.data.join("signing-key.pem")).map_err(|f| f.to_string())?;
    let package = handover::package::assemble(&material, &key).map_err(|f| f.to_string())?;
    let written = if arguments.to.extension().is_some_and(|e| e == "zip") {
        if arguments.to.exists() {
            return Err(format!("{} exists already; name another file", arguments.to.display()));
        }
        package.to_zip().and_then(|bytes| std::fs::write(&arguments.to, bytes).map_err(|f| f.to_string()))
    } else {
        package.to_folder(&arguments.to).map_err(|f| f.to_string())
    };
    written.map_err(|f| format!("{}: {f}", arguments.to.display()))?;
    println!("Package of {} in {}", arguments.drive, arguments.to.display());
    println!("Key fingerprint {}", package.fingerprint());
    Ok(())
}
