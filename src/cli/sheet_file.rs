//! A sheet as it is read from a file or from standard input.

use std::fs::File;
use std::io::{self, ErrorKind, Read};
use std::path::{Path, PathBuf};

use crate::diagnostic::{Diagnostic, Span, code};
use crate::syntax::{decode, limits};

/// The path that stands for standard input.
pub(crate) const STANDARD_INPUT: &str = "-";

/// Bytes of a file that is too long which are read to show where its text begins.
const SHOWN_OF_TOO_LONG: u64 = 1_024;

/// A file that could be read.
pub(crate) struct SheetFile {
    /// Where it was read from, `-` for standard input.
    pub(crate) place: PathBuf,
    /// That path as it is shown.
    pub(crate) path: String,
    /// Its text; of one that is refused, as much of it as can be shown.
    pub(crate) text: String,
    /// Why it is refused before it is read as a sheet.
    pub(crate) refused: Option<Diagnostic>,
}

impl SheetFile {
    /// Reads the sheet at `path`, `-` for standard input.
    ///
    /// A file that is longer than a sheet may be is not read to its end. The error is the message for people, with the
    /// path in it.
    pub(crate) fn read(path: &Path) -> Result<Self, String> {
        let name = path.to_string_lossy().into_owned();
        let told = |error: &io::Error| format!("{name}: {}", reason(error));
        let bytes = if is_standard_input(path) {
            read_up_to_limit(io::stdin().lock()).map_err(|error| told(&error))?
        } else {
            let file = File::open(path).map_err(|error| told(&error))?;
            let about = file.metadata().map_err(|error| told(&error))?;
            if about.is_dir() {
                return Err(format!("{name}: is a folder, not a sheet"));
            }
            if about.is_file() && about.len() > limits::LONGEST_FILE as u64 {
                let mut start = Vec::new();
                file.take(SHOWN_OF_TOO_LONG).read_to_end(&mut start).map_err(|error| told(&error))?;
                return Ok(Self::too_long(path, &start, about.len() as usize));
            }
            read_up_to_limit(file).map_err(|error| told(&error))?
        };
        Ok(Self::of_bytes(path, bytes))
    }

    /// The sheet that some bytes are.
    fn of_bytes(place: &Path, bytes: Vec<u8>) -> Self {
        if bytes.len() > limits::LONGEST_FILE {
            return Self::too_long(place, &bytes[..SHOWN_OF_TOO_LONG as usize], bytes.len());
        }
        match decode(&bytes) {
            Ok(text) => Self::new(place, text.to_owned(), None),
            Err(finding) => {
                // The place of the finding does not count a byte order mark, and up to it the text keeps its length.
                let bytes = bytes.strip_prefix("\u{feff}".as_bytes()).unwrap_or(&bytes);
                Self::new(place, String::from_utf8_lossy(bytes).into_owned(), Some(finding))
            }
        }
    }

    /// A file of which `length` bytes are known, and only the `start` is kept.
    fn too_long(place: &Path, start: &[u8], length: usize) -> Self {
        let finding = code::too_long::file(Span::default(), length, limits::LONGEST_FILE);
        Self::new(place, String::from_utf8_lossy(start).into_owned(), Some(finding))
    }

    fn new(place: &Path, text: String, refused: Option<Diagnostic>) -> Self {
        Self { place: place.to_owned(), path: place.to_string_lossy().into_owned(), text, refused }
    }
}

/// Whether a path stands for standard input.
pub(crate) fn is_standard_input(path: &Path) -> bool {
    path.as_os_str() == STANDARD_INPUT
}

/// Reads to the end, or one byte beyond the limit.
fn read_up_to_limit(source: impl Read) -> io::Result<Vec<u8>> {
    let mut bytes = Vec::new();
    source.take(limits::LONGEST_FILE as u64 + 1).read_to_end(&mut bytes)?;
    Ok(bytes)
}

/// Why a file could not be read or written, in few words.
pub(crate) fn reason(error: &io::Error) -> String {
    match error.kind() {
        ErrorKind::NotFound => "no such file or folder".to_owned(),
        ErrorKind::PermissionDenied => "permission denied".to_owned(),
        ErrorKind::AlreadyExists => "exists already".to_owned(),
        ErrorKind::IsADirectory => "is a folder".to_owned(),
        ErrorKind::NotADirectory => "a part of the path is no folder".to_owned(),
        ErrorKind::StorageFull => "no space left".to_owned(),
        _ => error.to_string(),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::diagnostic::LineIndex;

    #[test]
    fn a_missing_file_and_a_folder_are_told_with_their_path() {
        let folder = std::env::temp_dir();
        let missing = folder.join("no-such-sheet-of-gaswright.gw");
        let message = SheetFile::read(&missing).err().unwrap();
        assert!(message.ends_with("no-such-sheet-of-gaswright.gw: no such file or folder"), "{message}");
        assert!(SheetFile::read(&folder).err().unwrap().contains("folder"));
    }

    #[test]
    fn bytes_that_are_no_utf8_are_a_finding_at_their_line() {
        let sheet = SheetFile::of_bytes(Path::new("a.gw"), b"# \xc3\xa4\ngiven V = \xe4\n".to_vec());
        let finding = sheet.refused.as_ref().unwrap();
        assert_eq!(LineIndex::new(&sheet.text).place(&sheet.text, finding.span.start), crate::diagnostic::Place { line: 2, column: 11 });
        let marked = SheetFile::of_bytes(Path::new("a.gw"), b"\xef\xbb\xbfgiven V = \xe4\n".to_vec());
        let start = marked.refused.as_ref().unwrap().span.start;
        assert_eq!(LineIndex::new(&marked.text).place(&marked.text, start), crate::diagnostic::Place { line: 1, column: 11 });
        assert!(SheetFile::of_bytes(Path::new("a.gw"), b"answer V\n".to_vec()).refused.is_none());
    }

    #[test]
    fn what_is_longer_than_a_sheet_may_be_is_refused_and_not_kept() {
        let sheet = SheetFile::of_bytes(Path::new("a.gw"), vec![b'x'; limits::LONGEST_FILE + 1]);
        assert!(sheet.refused.is_some() && sheet.text.len() < 2_000);
    }
}
