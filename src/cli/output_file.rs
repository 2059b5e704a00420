//! Files that the program writes: whole or not at all.

use std::fs::{self, File, OpenOptions};
use std::io::{self, ErrorKind, Write};
use std::path::{Path, PathBuf};

use super::sheet_file::reason;

/// Writes `text` to `path`; what stood there is replaced in one step, so that nobody ever reads half a file.
///
/// A link is followed, and permissions are kept. The error is the message for people, with the path in it.
pub(crate) fn replace(path: &Path, text: &str) -> Result<(), String> {
    write_beside(path, text).map_err(|error| format!("{}: {}", path.display(), reason(&error)))
}

/// Writes `text` to `path`, which must not exist.
pub(crate) fn create_new(path: &Path, text: &str) -> Result<(), String> {
    let written = OpenOptions::new().write(true).create_new(true).open(path).and_then(|mut file| file.write_all(text.as_bytes()));
    written.map_err(|error| format!("{}: {}", path.display(), reason(&error)))
}

fn write_beside(path: &Path, text: &str) -> io::Result<()> {
    let target = fs::canonicalize(path).unwrap_or_else(|_| path.to_owned());
    let existing = fs::metadata(&target).ok();
    if existing.as_ref().is_some_and(fs::Metadata::is_dir) {
        return Err(ErrorKind::IsADirectory.into());
    }
    if existing.as_ref().is_some_and(|about| !about.is_file()) {
        // A device or a pipe is written to as it is.
        return OpenOptions::new().write(true).open(&target)?.write_all(text.as_bytes());
    }
    if existing.as_ref().is_some_and(|about| about.permissions().readonly()) {
        return Err(ErrorKind::PermissionDenied.into());
    }
    let (mut file, beside) = temporary(&target)?;
    let written = file.write_all(text.as_bytes()).and_then(|()| match &existing {
        Some(about) => file.set_permissions(about.permissions()),
        None => Ok(()),
    });
    drop(file);
    let done = written.and_then(|()| fs::rename(&beside, &target));
    if done.is_err() {
        // The first failure is the one to tell.
        let _ = fs::remove_file(&beside);
    }
    done
}

/// A new file in the folder of `target`, to be renamed to it.
fn temporary(target: &Path) -> io::Result<(File, PathBuf)> {
    let name = target.file_name().unwrap_or_default().to_string_lossy();
    for attempt in 0..100_u32 {
        let beside = target.with_file_name(format!(".{name}.{}-{attempt}.part", std::process::id()));
        match OpenOptions::new().write(true).create_new(true).open(&beside) {
            Ok(file) => return Ok((file, beside)),
            Err(error) if error.kind() == ErrorKind::AlreadyExists => {}
            Err(error) => return Err(error),
        }
    }
    Err(ErrorKind::AlreadyExists.into())
}

#[cfg(test)]
mod tests {
    use super::*;

    struct Folder(PathBuf);

    impl Folder {
        fn new(name: &str) -> Self {
            let folder = std::env::temp_dir().join(format!("gaswright-{name}-{}", std::process::id()));
            fs::create_dir_all(&folder).unwrap();
            Self(folder)
        }
    }

    impl Drop for Folder {
        fn drop(&mut self) {
            let _ = fs::remove_dir_all(&self.0);
        }
    }

    #[test]
    fn a_file_is_replaced_and_nothing_is_left_beside_it() {
        let folder = Folder::new("replace");
        let file = folder.0.join("a.gw");
        replace(&file, "one").unwrap();
        replace(&file, "two").unwrap();
        assert_eq!(fs::read_to_string(&file).unwrap(), "two");
        assert_eq!(fs::read_dir(&folder.0).unwrap().count(), 1);
        assert!(replace(&folder.0, "x").unwrap_err().contains("is a folder"));
        assert!(replace(&folder.0.join("none/a.gw"), "x").unwrap_err().contains("no such file or folder"));
    }

    #[test]
    fn a_new_file_never_replaces_one() {
        let folder = Folder::new("create");
        let file = folder.0.join("a.gw");
        create_new(&file, "one").unwrap();
        assert!(create_new(&file, "two").unwrap_err().contains("exists already"));
        assert_eq!(fs::read_to_string(&file).unwrap(), "one");
    }
}
