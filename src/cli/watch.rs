//! Doing something again whenever one of some files changes.

use std::path::{Path, PathBuf};
use std::time::{Duration, SystemTime};

/// How often the files are looked at.
pub(crate) const PERIOD: Duration = Duration::from_millis(300);

/// What a file looked like: when it was written and how long it is; `None` where it is not there.
type Look = Option<(SystemTime, u64)>;

/// Files as they were last seen.
#[derive(Clone, Debug)]
pub(crate) struct Watched {
    files: Vec<(PathBuf, Look)>,
}

impl Watched {
    /// The files as they are now.
    pub(crate) fn new(paths: &[PathBuf]) -> Self {
        Self { files: paths.iter().map(|path| (path.clone(), look(path))).collect() }
    }

    /// The files that are not as they were when they were last looked at. A file that is not there has not changed: an
    /// editor that writes a new one takes the old one away first.
    pub(crate) fn changed(&mut self) -> Vec<PathBuf> {
        let mut changed = Vec::new();
        for (path, seen) in &mut self.files {
            let now = look(path);
            if now.is_some() && now != *seen {
                *seen = now;
                changed.push(path.clone());
            }
        }
        changed
    }
}

fn look(path: &Path) -> Look {
    let metadata = std::fs::metadata(path).ok()?;
    Some((metadata.modified().ok()?, metadata.len()))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_file_that_was_written_or_came_is_told_once_and_one_that_went_is_not() {
        let folder = std::env::temp_dir().join(format!("gaswright-watch-{}", std::process::id()));
        std::fs::create_dir_all(&folder).unwrap();
        let (first, second) = (folder.join("first.gw"), folder.join("second.gw"));
        std::fs::write(&first, "answer V\n").unwrap();
        let mut watched = Watched::new(&[first.clone(), second.clone()]);
        assert!(watched.changed().is_empty());
        std::fs::write(&first, "answer V, m\n").unwrap();
        std::fs::write(&second, "answer m\n").unwrap();
        assert_eq!(watched.changed(), [first.clone(), second.clone()]);
        assert!(watched.changed().is_empty());
        std::fs::remove_dir_all(&folder).unwrap();
        assert!(watched.changed().is_empty());
    }
}
