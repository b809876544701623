//! The common tools that a client has; a missing one fails the test with a sentence, it is never skipped.

use std::path::{Path, PathBuf};
use std::process::{Command, Output};

/// Runs a tool; fails when it is not installed.
pub fn run(tool: &str, arguments: &[&str], folder: &Path) -> Output {
    match Command::new(tool).args(arguments).current_dir(folder).output() {
        Ok(output) => output,
        Err(e) => panic!("`{tool}` is needed by this test and could not be run ({e}); .ci/run installs it"),
    }
}

/// The same, and it has to succeed; gives what it wrote.
pub fn succeed(tool: &str, arguments: &[&str], folder: &Path) -> String {
    let output = run(tool, arguments, folder);
    let (out, err) = (String::from_utf8_lossy(&output.stdout), String::from_utf8_lossy(&output.stderr));
    assert!(output.status.success(), "{tool} {arguments:?}: {out}{err}");
    out.into_owned()
}

/// A new folder that goes away with the test.
pub struct Folder(PathBuf);

impl Folder {
    pub fn new() -> Self {
        let mut unique = [0_u8; 8];
        getrandom::fill(&mut unique).unwrap();
        let path = std::env::temp_dir().join(format!("asleft-package-{:x}", u64::from_le_bytes(unique)));
        std::fs::create_dir(&path).unwrap();
        Self(path)
    }

    pub fn path(&self) -> &Path {
        &self.0
    }
}

impl Drop for Folder {
    fn drop(&mut self) {
        let _ = std::fs::remove_dir_all(&self.0);
    }
}
