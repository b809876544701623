//! `asleft evaluate`: every check of a record.json, as JSON.

use crate::ending::Ending;
use clap::Args;
use commissioning::judge;
use commissioning::record::canonical::RecordFile;
use std::path::PathBuf;

#[derive(Args)]
pub struct Arguments {
    /// A record.json, as in a handover package
    file: PathBuf,
}

pub fn run(arguments: &Arguments) -> Ending {
    let text = match std::fs::read_to_string(&arguments.file) {
        Ok(text) => text,
        Err(fault) => return Ending::could_not(format!("{} cannot be read: {fault}", arguments.file.display())),
    };
    let rebuilt = match RecordFile::read(&text).map_err(|f| f.to_string()).and_then(|file| file.rebuild()) {
        Ok(rebuilt) => rebuilt,
        Err(fault) => return Ending::could_not(format!("{}: {fault}", arguments.file.display())),
    };
    let view = judge::View { drive: &rebuilt.drive, site: &rebuilt.site, procedure: &rebuilt.procedure };
    let verdicts = judge::all(&view);
    match serde_json::to_string_pretty(&verdicts) {
        Ok(json) => {
            println!("{json}");
            let outside = verdicts.iter().any(|j| j.outcome.verdict == engineering::Verdict::Outside);
            if outside { Ending::FoundWrong } else { Ending::Fine }
        }
        Err(fault) => Ending::could_not(fault),
    }
}
