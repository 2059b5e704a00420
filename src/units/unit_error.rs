//! Unit texts that cannot be read: where, and why.

use super::Cure;

/// A unit text that cannot be read.
#[derive(Clone, Debug, PartialEq)]
pub struct UnitError {
    /// First byte of the offending part.
    pub offset: usize,
    /// Its bytes. Offset and end stand between characters of the text.
    pub len: usize,
    /// What is wrong.
    pub kind: UnitErrorKind,
}

/// What is wrong with a unit text.
#[derive(Clone, Debug, PartialEq)]
#[non_exhaustive]
pub enum UnitErrorKind {
    /// A word that is no unit.
    Unknown {
        /// The word.
        word: String,
        /// Names most like it, best first, at most three.
        near: Vec<&'static str>,
        /// What to write instead, where the word is a known habit: a short sentence.
        help: Option<String>,
        /// The unit that the word stands for, where it is a known habit.
        cure: Option<Box<Cure>>,
    },
    /// A power, alone or together with others, beyond the limit of powers or the range of numbers.
    Power {
        /// The part with the power: `m99`.
        part: String,
        /// Largest power.
        limit: i32,
    },
    /// A text that is not built like a unit, with what to do.
    Syntax(String),
    /// Too many brackets inside each other.
    TooDeep,
    /// Too long a text.
    TooLong,
}
