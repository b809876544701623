//! Runs the walk in a process of its own under strace: recorded, killed at a call, or refused a call by the disk.

use super::walk::sent_to;
use std::path::Path;
use std::process::Command;

/// Calls that change files, or make a change last.
const CHANGING: &str = "write,pwrite64,writev,pwritev,pwritev2,fsync,fdatasync,sync_file_range,ftruncate,truncate,fallocate,\
                        copy_file_range,sendfile,openat,rename,renameat,renameat2,unlink,unlinkat,link,linkat,mkdir,mkdirat,rmdir";

/// A folder in memory where there is one: syncing costs nothing there, and is recorded all the same.
pub(super) fn place() -> tempfile::TempDir {
    let memory = Path::new("/dev/shm");
    let parent = if memory.is_dir() { memory.to_owned() } else { std::env::temp_dir() };
    tempfile::Builder::new().prefix("asleft-fault-").tempdir_in(parent).unwrap()
}

/// Runs the walk in a folder, recorded whole into `calls` beside it.
pub(super) fn recorded(folder: &Path, hasty: bool) -> String {
    let calls = folder.join("calls");
    let traced = format!("trace={CHANGING}");
    let shape = ["-f", "-y", "-xx", "-s", "1000000", "-e", "signal=none", "-e", &traced, "-o"];
    let ended = under_strace(&shape, &calls, folder, hasty);
    let text = std::fs::read_to_string(&calls).unwrap();
    std::fs::remove_file(&calls).unwrap();
    assert!(ended, "the walk under strace does not run to its end");
    text
}

/// Runs the walk with one kind of call disturbed, as strace's `inject` says; whether it ended well.
pub(super) fn disturbed(folder: &Path, call: &str, inject: &str) -> bool {
    let (traced, inject) = (format!("trace={call}"), format!("inject={call}:{inject}"));
    under_strace(&["-f", "-e", &traced, "-e", &inject, "-o"], Path::new("/dev/null"), folder, false)
}

fn under_strace(shape: &[&str], output: &Path, folder: &Path, hasty: bool) -> bool {
    let ended = Command::new("strace")
        .args(shape)
        .arg(output)
        .arg(std::env::current_exe().unwrap())
        .args(["--exact", "tests::faults::walk::the_walk_runs_to_its_end", "--test-threads=1"])
        .envs(sent_to(folder, hasty))
        .output();
    match ended {
        Ok(output) => output.status.success(),
        Err(error) => panic!("`strace` is needed by this test and could not be run ({error}); .ci/run installs it"),
    }
}
