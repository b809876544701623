//! Reads and writes a package as archive or folder: counted bytes, plain names, no links, nothing outside.

use std::collections::BTreeMap;
use std::io::{Cursor, Read, Write as _};
use std::path::Path;
use zip::write::SimpleFileOptions;
use zip::{CompressionMethod, DateTime, ZipArchive, ZipWriter};

/// No file of a package is larger.
const LARGEST_FILE: u64 = 64 << 20;
/// All files together are not larger.
const LARGEST_PACKAGE: u64 = 768 << 20;
/// A package has no more files.
const MOST_FILES: usize = 2000;

/// Writes an archive with fixed times, so that the same files give the same bytes.
pub(crate) fn write(files: &BTreeMap<String, Vec<u8>>) -> Result<Vec<u8>, String> {
    let mut out = ZipWriter::new(Cursor::new(Vec::new()));
    for (name, bytes) in files {
        let method = if name.starts_with("photos/") { CompressionMethod::Stored } else { CompressionMethod::Deflated };
        let options = SimpleFileOptions::default()
            .compression_method(method)
            .last_modified_time(DateTime::DEFAULT)
            .unix_permissions(0o644);
        out.start_file(name.as_str(), options).map_err(|e| e.to_string())?;
        out.write_all(bytes).map_err(|e| e.to_string())?;
    }
    out.finish().map(Cursor::into_inner).map_err(|e| e.to_string())
}

/// What a reader has taken in so far.
#[derive(Default)]
struct Taken {
    files: BTreeMap<String, Vec<u8>>,
    bytes: u64,
}

impl Taken {
    /// Takes a file in, never more bytes than allowed, whatever its header says.
    fn take(&mut self, name: &str, source: impl Read) -> Result<(), String> {
        if !is_plain(name) {
            return Err(format!("“{}” is no name of a file in a package", name.escape_default()));
        }
        if self.files.len() >= MOST_FILES {
            return Err(format!("it holds more than {MOST_FILES} files"));
        }
        let room = LARGEST_FILE.min(LARGEST_PACKAGE - self.bytes);
        let mut bytes = Vec::new();
        let read = source.take(room + 1).read_to_end(&mut bytes).map_err(|e| format!("{name} cannot be read: {e}"))?;
        let read = u64::try_from(read).unwrap_or(u64::MAX);
        if read > room {
            return Err(format!("{name} is larger than a package may be"));
        }
        self.bytes += read;
        if self.files.insert(name.to_owned(), bytes).is_some() {
            return Err(format!("{name} is there twice"));
        }
        Ok(())
    }
}

/// Reads a folder or an archive; the error is a sentence.
pub(crate) fn read(path: &Path) -> Result<BTreeMap<String, Vec<u8>>, String> {
    let kind = std::fs::metadata(path).map_err(|e| format!("{}: {e}", path.display()))?;
    let mut taken = Taken::default();
    if kind.is_dir() {
        read_folder(path, "", &mut taken)?;
    } else {
        let file = std::fs::File::open(path).map_err(|e| format!("{}: {e}", path.display()))?;
        read_zip(file, &mut taken)?;
    }
    Ok(taken.files)
}

fn read_folder(folder: &Path, prefix: &str, taken: &mut Taken) -> Result<(), String> {
    let told = |e: std::io::Error| format!("{}: {e}", folder.display());
    for entry in std::fs::read_dir(folder).map_err(told)? {
        let entry = entry.map_err(told)?;
        let name = entry.file_name().into_string().map_err(|_| "it holds a file whose name is no text".to_owned())?;
        let whole = format!("{prefix}{name}");
        // Of the entry itself: a link is never followed.
        let kind = entry.file_type().map_err(told)?;
        if kind.is_file() {
            taken.take(&whole, std::fs::File::open(entry.path()).map_err(told)?)?;
        } else if kind.is_dir() && prefix.is_empty() {
            read_folder(&entry.path(), &format!("{whole}/"), taken)?;
        } else {
            return Err(format!("{whole} is no plain file"));
        }
    }
    Ok(())
}

fn read_zip(file: impl Read + std::io::Seek, taken: &mut Taken) -> Result<(), String> {
    let mut zip = ZipArchive::new(file).map_err(|e| format!("it is no archive that can be read: {e}"))?;
    if zip.len() > MOST_FILES {
        return Err(format!("it holds more than {MOST_FILES} files"));
    }
    for n in 0..zip.len() {
        let entry = zip.by_index(n).map_err(|e| format!("file {} of the archive cannot be read: {e}", n + 1))?;
        let name =
            entry.name().map_err(|e| format!("file {} of the archive has no readable name: {e}", n + 1))?.into_owned();
        if entry.is_dir() {
            continue;
        }
        if !entry.is_file() || entry.unix_mode().is_some_and(|m| m & 0o170_000 != 0o100_000 && m & 0o170_000 != 0) {
            return Err(format!("{} is no plain file", name.escape_default()));
        }
        taken.take(&name, entry)?;
    }
    Ok(())
}

/// At most one folder deep, of letters, digits, point, dash and underscore; no part begins with a point.
fn is_plain(name: &str) -> bool {
    let parts: Vec<&str> = name.split('/').collect();
    parts.len() <= 2
        && parts.iter().all(|p| {
            !p.is_empty()
                && p.len() <= 100
                && !p.starts_with('.')
                && p.chars().all(|c| c.is_ascii_alphanumeric() || matches!(c, '.' | '-' | '_'))
        })
}

#[cfg(test)]
mod tests {
    use super::*;

    fn zip_of(name: &str, mode: u32, bytes: &[u8]) -> Vec<u8> {
        let mut out = ZipWriter::new(Cursor::new(Vec::new()));
        out.start_file(name, SimpleFileOptions::default().unix_permissions(mode)).unwrap();
        out.write_all(bytes).unwrap();
        out.finish().unwrap().into_inner()
    }

    fn taken(zip: Vec<u8>) -> Result<BTreeMap<String, Vec<u8>>, String> {
        let mut taken = Taken::default();
        read_zip(Cursor::new(zip), &mut taken).map(|()| taken.files)
    }

    #[test]
    fn an_archive_gives_back_its_files_and_is_the_same_every_time() {
        let files = BTreeMap::from([("a.txt".to_owned(), b"one".to_vec()), ("photos/b.jpg".to_owned(), vec![0; 999])]);
        let zip = write(&files).unwrap();
        assert_eq!(zip, write(&files).unwrap());
        assert_eq!(taken(zip), Ok(files));
    }

    #[test]
    fn names_that_lead_elsewhere_are_refused() {
        for name in ["../a", "/etc/a", "a/../b", "a/b/c", "a\\b", "", ".hidden", "a/.b", "a//b", "ä", "a b", "a\u{0}"]
        {
            assert!(!is_plain(name), "{name:?}");
            if !name.is_empty() {
                assert!(taken(zip_of(name, 0o644, b"x")).is_err(), "{name:?}");
            }
        }
        assert!(is_plain("events/drive.events") && is_plain("SHA256SUMS.sig"));
    }

    #[test]
    fn links_and_what_is_no_archive_are_refused() {
        let mut out = ZipWriter::new(Cursor::new(Vec::new()));
        out.add_symlink("link", "record.json", SimpleFileOptions::default()).unwrap();
        assert!(taken(out.finish().unwrap().into_inner()).is_err());
        assert!(taken(b"not an archive".to_vec()).is_err() && taken(Vec::new()).is_err());
    }

    #[test]
    fn what_unpacks_to_more_than_allowed_is_refused_by_counting() {
        let bomb = zip_of("a.txt", 0o644, &vec![0; usize::try_from(LARGEST_FILE).unwrap() + 1]);
        assert!(bomb.len() < 200_000, "packed small");
        assert!(taken(bomb).unwrap_err().contains("larger"));
    }
}
