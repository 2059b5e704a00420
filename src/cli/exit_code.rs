//! The exit status of the program.

use crate::ExitStatus;

/// How a run ended.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum ExitCode {
    /// Everything holds.
    Success,
    /// A sheet has errors, or is not as `--check` demands.
    Errors,
    /// The command line is wrong, or a file cannot be read or written.
    WrongUse,
    /// Solved, but a requirement or a judged assumption fails.
    Fails,
}

impl ExitCode {
    /// The number that the caller of the program sees.
    #[must_use]
    pub fn status(self) -> u8 {
        match self {
            Self::Success => 0,
            Self::Errors => 1,
            Self::WrongUse => 2,
            Self::Fails => 3,
        }
    }

    /// The graver of two, in the order 2, 1, 3, 0.
    #[must_use]
    pub fn graver(self, other: Self) -> Self {
        if other.gravity() > self.gravity() { other } else { self }
    }

    fn gravity(self) -> u8 {
        match self {
            Self::Success => 0,
            Self::Fails => 1,
            Self::Errors => 2,
            Self::WrongUse => 3,
        }
    }
}

impl From<ExitCode> for std::process::ExitCode {
    fn from(code: ExitCode) -> Self {
        Self::from(code.status())
    }
}

impl From<ExitStatus> for ExitCode {
    fn from(status: ExitStatus) -> Self {
        match status {
            ExitStatus::Solved => Self::Success,
            ExitStatus::Errors => Self::Errors,
            ExitStatus::Fails => Self::Fails,
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_gravest_of_several_counts() {
        use ExitCode::{Errors, Fails, Success, WrongUse};
        let rising = [Success, Fails, Errors, WrongUse];
        for (at, graver) in rising.iter().enumerate() {
            for lesser in &rising[..=at] {
                assert_eq!(lesser.graver(*graver), *graver);
                assert_eq!(graver.graver(*lesser), *graver);
            }
        }
    }

    #[test]
    fn the_statuses_are_those_of_the_contract() {
        assert_eq!(ExitCode::from(ExitStatus::Solved).status(), 0);
        assert_eq!(ExitCode::from(ExitStatus::Errors).status(), 1);
        assert_eq!(ExitCode::WrongUse.status(), 2);
        assert_eq!(ExitCode::from(ExitStatus::Fails).status(), 3);
    }
}
