//! Places in a text: byte ranges, and the lines and columns that people count.

/// A byte range of a text. Always on character borders when it comes from this crate's reader.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, Hash, PartialOrd, Ord)]
pub struct Span {
    /// First byte.
    pub start: u32,
    /// One past the last byte.
    pub end: u32,
}

impl Span {
    /// The range from `start` to `end`; positions beyond 4 GiB are clamped (such a file is refused long before).
    #[must_use]
    pub fn new(start: usize, end: usize) -> Self {
        let clamp = |position: usize| u32::try_from(position).unwrap_or(u32::MAX);
        Self { start: clamp(start), end: clamp(end) }
    }

    /// The smallest range that holds both.
    #[must_use]
    pub fn to(self, other: Self) -> Self {
        Self { start: self.start.min(other.start), end: self.end.max(other.end) }
    }

    /// The text of this range; empty where the range does not fit the text.
    #[must_use]
    pub fn of(self, text: &str) -> &str {
        text.get(self.start as usize..self.end as usize).unwrap_or("")
    }

    /// The range moved towards the end by `offset` bytes.
    #[must_use]
    pub fn shifted(self, offset: usize) -> Self {
        Self::new(self.start as usize + offset, self.end as usize + offset)
    }
}

/// A line and a column, both counted from 1, the column in characters.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub struct Place {
    /// Line, from 1.
    pub line: u32,
    /// Column in characters, from 1.
    pub column: u32,
}

/// Where the lines of a text begin, to turn bytes into lines and columns.
#[derive(Clone, Debug)]
pub struct LineIndex {
    starts: Vec<u32>,
}

impl LineIndex {
    /// Reads the line starts of `text`. A line ends with LF; a CR before it belongs to the line end.
    #[must_use]
    pub fn new(text: &str) -> Self {
        let mut starts = vec![0];
        starts.extend(text.bytes().enumerate().filter(|(_, byte)| *byte == b'\n').map(|(at, _)| at as u32 + 1));
        Self { starts }
    }

    /// The line (from 1) that holds byte `at`.
    #[must_use]
    pub fn line(&self, at: u32) -> u32 {
        self.starts.partition_point(|start| *start <= at).max(1) as u32
    }

    /// Line and column of byte `at` of `text`, the text this index was made from.
    #[must_use]
    pub fn place(&self, text: &str, at: u32) -> Place {
        let line = self.line(at);
        let start = self.starts[line as usize - 1] as usize;
        let mut at = (at as usize).min(text.len());
        while !text.is_char_boundary(at) {
            at -= 1;
        }
        // A very long line is refused with one finding; counting it whole for each would cost its square.
        let column = text.get(start..at).map_or(0, |before| before.chars().count()) as u32 + 1;
        Place { line, column }
    }

    /// The bytes of `line` (from 1), without its line end.
    #[must_use]
    pub fn line_span(&self, text: &str, line: u32) -> Span {
        let index = (line.max(1) as usize - 1).min(self.starts.len() - 1);
        let start = self.starts[index] as usize;
        let end = self.starts.get(index + 1).map_or(text.len(), |next| *next as usize - 1);
        let end = if end > start && text.as_bytes().get(end - 1) == Some(&b'\r') { end - 1 } else { end };
        Span::new(start, end.max(start))
    }

    /// How many lines there are; a text without a line end has one.
    #[must_use]
    pub fn line_count(&self) -> u32 {
        self.starts.len() as u32
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn columns_count_characters_and_carriage_returns_end_lines() {
        let text = "a\r\nbär = 1\n";
        let index = LineIndex::new(text);
        assert_eq!(index.place(text, 3), Place { line: 2, column: 1 });
        assert_eq!(index.place(text, 7), Place { line: 2, column: 4 });
        assert_eq!(index.line_span(text, 1).of(text), "a");
        assert_eq!(index.line_span(text, 2).of(text), "bär = 1");
    }
}
