//! `asleft verify`: a handover package checked whole, without any store.

use crate::ending::Ending;
use clap::Args;
use std::path::PathBuf;

#[derive(Args)]
pub struct Arguments {
    /// The package: a folder or a zip file
    package: PathBuf,
    /// Print JSON
    #[arg(long)]
    json: bool,
}

pub fn run(arguments: &Arguments) -> Ending {
    if !arguments.package.exists() {
        return Ending::could_not(format!("{} does not exist", arguments.package.display()));
    }
    let report = handover::verify::verify(&arguments.package);
    if arguments.json {
        match serde_json::to_string_pretty(&report) {
            Ok(json) => println!("{json}"),
            Err(fault) => return Ending::could_not(fault),
        }
    } else {
        print(&report);
    }
    if report.ok { Ending::Fine } else { Ending::FoundWrong }
}

fn print(report: &handover::verify::Report) {
    println!("{} revision {} · {} · {} files", report.tag, report.revision, report.status, report.files);
    println!("Key fingerprint {}", report.fingerprint);
    for (whose, head) in [("this drive's", &report.drive_head), ("its site's", &report.site_head)] {
        if let Some(head) = head {
            println!("Head of {whose} journal {} · {}", head.sequence, head.hash);
        }
    }
    println!("Compare fingerprint and head with the printed first page: that is what this program cannot do for you.");
    for fault in &report.faults {
        println!("FAULT {} {}", fault.file, fault.what);
    }
    for difference in &report.differences {
        println!("Judged otherwise by this version's checks: {}", otherwise(difference));
    }
    println!("{}", if report.ok { "Nothing was changed." } else { "This package is not as it was made." });
}

/// A difference in words.
fn otherwise(difference: &handover::verify::Difference) -> String {
    let or_nothing = |verdict: &str| if verdict.is_empty() { "not judged".to_owned() } else { verdict.to_owned() };
    let place: Vec<&str> = [&difference.check, &difference.step, &difference.of]
        .into_iter()
        .map(String::as_str)
        .filter(|w| !w.is_empty())
        .collect();
    format!("{}: kept as {}, today {}", place.join(" · "), or_nothing(&difference.kept), or_nothing(&difference.today))
}
