//! Plays a recording back: what the files hold after each call, and what a power cut may leave of them.

use super::power::Chance;
use super::recording::Call;
use std::collections::{BTreeMap, BTreeSet};
use std::fs::{DirBuilder, OpenOptions};
use std::io::Write;
use std::os::unix::fs::{DirBuilderExt, OpenOptionsExt};
use std::path::{Path, PathBuf};

/// A change of a file's content that no sync has made last yet.
#[derive(Clone, Debug)]
enum Edit {
    Bytes { at: usize, bytes: Vec<u8> },
    Length(usize),
}

/// A file, whatever its name: what surely is on the disk, and what came after.
#[derive(Clone, Debug, Default)]
struct Content {
    lasting: Vec<u8>,
    now: Vec<u8>,
    pending: Vec<Edit>,
}

/// A change of a folder's names that no sync of that folder has made last yet.
#[derive(Clone, Debug)]
enum Naming {
    Named(PathBuf, usize),
    Gone(PathBuf),
    Folder(PathBuf),
}

/// The names of files and folders.
#[derive(Clone, Debug, Default)]
struct Names {
    files: BTreeMap<PathBuf, usize>,
    folders: BTreeSet<PathBuf>,
}

impl Names {
    fn apply(&mut self, naming: &Naming) {
        match naming {
            Naming::Named(path, content) => {
                self.files.retain(|_, c| c != content);
                self.files.insert(path.clone(), *content);
            }
            Naming::Gone(path) => {
                self.files.remove(path);
            }
            Naming::Folder(path) => {
                self.folders.insert(path.clone());
            }
        }
    }
}

/// Files as a program sees them, and as the disk has them.
#[derive(Clone, Debug, Default)]
pub(super) struct Disk {
    contents: Vec<Content>,
    now: Names,
    lasting: Names,
    pending: BTreeMap<PathBuf, Vec<Naming>>,
}

impl Disk {
    /// One more call.
    pub(super) fn apply(&mut self, call: &Call) {
        match call {
            Call::Told(_) => {}
            Call::Made(file) => {
                if !self.now.files.contains_key(file) {
                    self.contents.push(Content::default());
                    self.rename(file, Naming::Named(file.clone(), self.contents.len() - 1));
                }
            }
            Call::Folder(path) => self.rename(path, Naming::Folder(path.clone())),
            Call::Written { file, at, bytes } => {
                let content = self.content(file);
                let at = at.map_or(content.now.len(), |at| usize::try_from(at).unwrap());
                content.edit(Edit::Bytes { at, bytes: bytes.clone() });
            }
            Call::Cut { file, length } => self.content(file).edit(Edit::Length(usize::try_from(*length).unwrap())),
            Call::Synced(path) => self.sync(path),
            Call::Renamed(from, to) => {
                let content = self.now.files[from];
                self.rename(to, Naming::Named(to.clone(), content));
            }
            Call::Removed(path) => self.rename(path, Naming::Gone(path.clone())),
        }
    }

    fn content(&mut self, file: &Path) -> &mut Content {
        let number = self.now.files[file];
        &mut self.contents[number]
    }

    fn rename(&mut self, path: &Path, naming: Naming) {
        self.now.apply(&naming);
        self.pending.entry(path.parent().unwrap().to_owned()).or_default().push(naming);
    }

    /// A file's content lasts from its sync on, its name only from the sync of its folder: the strictest reading.
    fn sync(&mut self, path: &Path) {
        if let Some(number) = self.now.files.get(path) {
            let content = &mut self.contents[*number];
            content.lasting.clone_from(&content.now);
            content.pending.clear();
        } else {
            for naming in self.pending.remove(path).unwrap_or_default() {
                self.lasting.apply(&naming);
            }
        }
    }

    /// What a kill leaves: everything that was written.
    pub(super) fn lay_out(&self, to: &Path) {
        lay(&self.now, to, |number| self.contents[number].now.clone());
    }

    /// What a power cut leaves: what lasts, and by chance some of the rest, writes in any order and torn.
    pub(super) fn lay_out_after_power_cut(&self, to: &Path, chance: &mut Chance) {
        let mut names = self.lasting.clone();
        for pending in self.pending.values() {
            // Names of one folder come about in order, as far as they do.
            for naming in &pending[..chance.below(pending.len() + 1)] {
                names.apply(naming);
            }
        }
        lay(&names, to, |number| self.contents[number].after_power_cut(chance));
    }
}

impl Content {
    fn edit(&mut self, edit: Edit) {
        edit.apply(&mut self.now);
        self.pending.push(edit);
    }

    fn after_power_cut(&self, chance: &mut Chance) -> Vec<u8> {
        let mut left = self.lasting.clone();
        let whole = chance.below(4);
        for edit in &self.pending {
            match (whole, edit) {
                (0, _) => {}
                (1, _) => edit.apply(&mut left),
                (_, Edit::Bytes { at, bytes }) if chance.below(8) == 0 => {
                    // Torn at a sector.
                    let kept = 512 * chance.below(bytes.len() / 512 + 1);
                    Edit::Bytes { at: *at, bytes: bytes[..kept].to_vec() }.apply(&mut left);
                }
                (_, edit) if chance.below(2) == 0 => edit.apply(&mut left),
                _ => {}
            }
        }
        left
    }
}

impl Edit {
    fn apply(&self, to: &mut Vec<u8>) {
        match self {
            Self::Length(length) => to.resize(*length, 0),
            Self::Bytes { at, bytes } => {
                if bytes.is_empty() {
                    return;
                }
                if to.len() < at + bytes.len() {
                    to.resize(at + bytes.len(), 0);
                }
                to[*at..at + bytes.len()].copy_from_slice(bytes);
            }
        }
    }
}

/// Lays files out for their owner alone, as the store makes them. A file whose folder's name was lost is lost with it.
fn lay(names: &Names, to: &Path, mut content: impl FnMut(usize) -> Vec<u8>) {
    let folder = |path: &Path| DirBuilder::new().recursive(true).mode(0o700).create(path).unwrap();
    folder(to);
    names.folders.iter().for_each(|path| folder(&to.join(path)));
    for (path, number) in &names.files {
        let parent = path.parent().unwrap();
        if parent.as_os_str().is_empty() || names.folders.contains(parent) {
            let mut file = OpenOptions::new().create_new(true).write(true).mode(0o600).open(to.join(path)).unwrap();
            file.write_all(&content(*number)).unwrap();
        }
    }
}
