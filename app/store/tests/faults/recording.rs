//! Reads strace's recording of a walk: every call that changed a file in its folder, in order.

use std::collections::HashMap;
use std::path::{Path, PathBuf};

/// One call, paths relative to the walk's folder.
#[derive(Clone, Debug, PartialEq, Eq)]
pub(super) enum Call {
    Made(PathBuf),
    Folder(PathBuf),
    Written {
        file: PathBuf,
        at: Option<u64>,
        bytes: Vec<u8>,
    },
    Cut {
        file: PathBuf,
        length: u64,
    },
    Synced(PathBuf),
    Renamed(PathBuf, PathBuf),
    Removed(PathBuf),
    /// A line to the outside world.
    Told(String),
}

/// All calls of a recording.
pub(super) fn read(text: &str, folder: &Path) -> Vec<Call> {
    let mut begun: HashMap<&str, String> = HashMap::new();
    let mut calls = Vec::new();
    for line in text.lines() {
        let (process, rest) = line.split_once(' ').unwrap();
        let rest = rest.trim_start();
        if let Some(first) = rest.strip_suffix("<unfinished ...>") {
            begun.insert(process, first.to_owned());
            continue;
        }
        // A call in two parts counts where it ended, and what is told where it began or later: later is harder.
        let whole = match rest.strip_prefix("<... ").and_then(|r| r.split_once("resumed>")) {
            Some((_, ending)) => format!("{}{ending}", begun.remove(process).unwrap()),
            None => rest.to_owned(),
        };
        if whole.starts_with("+++") || whole.starts_with("---") {
            continue;
        }
        calls.extend(call(&whole, folder));
    }
    assert!(calls.len() > 100, "the recording has only {} calls", calls.len());
    calls
}

fn call(line: &str, folder: &Path) -> Option<Call> {
    let (name, rest) = line.split_once('(').unwrap();
    let (arguments, result) = rest.rsplit_once(" = ").unwrap();
    if result.starts_with('-') {
        return None;
    }
    let arguments = arguments.trim_end().strip_suffix(')').unwrap().trim_end();
    let inside = |text: &str| named(text, folder);
    let strings: Vec<&str> = arguments.split('"').skip(1).step_by(2).collect();
    let made = match name {
        "write" | "pwrite64" => {
            let file = inside(descriptor(arguments))?;
            if file == Path::new("told") {
                let line = String::from_utf8(bytes(strings[0])).unwrap();
                return Some(Call::Told(line.trim_end().to_owned()));
            }
            let written = bytes(strings[0]);
            assert_eq!(result.trim(), written.len().to_string(), "a write was cut short or not recorded whole");
            let at = (name == "pwrite64").then(|| arguments.rsplit(", ").next().unwrap().parse().unwrap());
            Call::Written { file, at, bytes: written }
        }
        "ftruncate" => Call::Cut {
            file: inside(descriptor(arguments))?,
            length: arguments.rsplit(", ").next().unwrap().parse().unwrap(),
        },
        "fsync" | "fdatasync" => Call::Synced(inside(descriptor(arguments))?),
        "openat" if arguments.contains("O_CREAT") => {
            let file = inside(strings[0])?;
            assert!(!arguments.contains("O_TRUNC") || arguments.contains("O_WRONLY"), "{name}");
            Call::Made(file)
        }
        "openat" => return None,
        "rename" | "renameat" | "renameat2" => Call::Renamed(inside(strings[0])?, inside(strings[1])?),
        "unlink" | "unlinkat" => Call::Removed(inside(strings[0])?),
        "mkdir" | "mkdirat" => Call::Folder(inside(strings[0])?),
        other => {
            // Only where it concerns the folder: the test program writes elsewhere too.
            assert!(inside(descriptor(arguments)).is_none(), "the recording has a call nobody foresaw: {other}");
            return None;
        }
    };
    // The index of the write-ahead log is shared memory; it is built anew at every opening after a fault.
    let shared = matches!(&made, Call::Made(f) | Call::Synced(f) | Call::Removed(f) | Call::Cut { file: f, .. } | Call::Written { file: f, .. }
        if f.to_string_lossy().ends_with("-shm"));
    (!shared).then_some(made)
}

/// The path that strace puts behind a descriptor.
fn descriptor(arguments: &str) -> &str {
    arguments.split_once('<').and_then(|(_, r)| r.split_once('>')).map_or("", |(path, _)| path)
}

fn named(hexadecimal: &str, folder: &Path) -> Option<PathBuf> {
    let path = PathBuf::from(String::from_utf8(bytes(hexadecimal)).unwrap());
    path.strip_prefix(folder).ok().map(Path::to_owned)
}

/// From `\x61\x62`.
fn bytes(text: &str) -> Vec<u8> {
    let digit = |b: u8| char::from(b).to_digit(16).unwrap();
    text.as_bytes().chunks(4).map(|c| u8::try_from(digit(c[2]) * 16 + digit(c[3])).unwrap()).collect()
}
