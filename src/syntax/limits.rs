//! Limits: how large and how deep a sheet may be. They are counted before the grammar sees the text, so that a hostile
//! file is refused in the time that it takes to read it once.

/// Longest file, in bytes.
pub const LONGEST_FILE: usize = 64 * 1024 * 1024;

/// Longest logical line, in bytes, its continuation lines included. Prose and the rows of a table have no such limit, but
/// each of their physical lines has.
pub const LONGEST_LINE: usize = 64 * 1024;

/// Longest head, in bytes.
pub const LONGEST_HEAD: usize = 64 * 1024;

/// Deepest nesting of brackets in a statement, brackets in units included.
pub const DEEPEST_BRACKETS: usize = 100;

/// Most operators (signs and the words of conditions included) in one statement.
pub const MOST_OPERATORS: usize = 1_000;

/// Most statements in a file.
pub const MOST_STATEMENTS: usize = 250_000;

/// Most comments in a file.
pub const MOST_COMMENTS: usize = 1_000_000;

/// Most parts of expressions in a file.
pub const MOST_EXPRESSIONS: usize = 3_000_000;

/// Most live values in the prose of a file.
pub const MOST_LIVE_VALUES: usize = 100_000;

/// Most errors that are told in full; the rest are counted.
pub const MOST_ERRORS: usize = 1_000;
