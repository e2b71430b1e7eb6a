//! What the program's exit code means.

/// How a run ended.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Exit {
    /// Done.
    Done,
    /// The input can't be used, or the solve failed.
    Failed,
    /// Wrong arguments.
    Usage,
    /// Done, but the accuracy asked for was not reached.
    NotReached,
    /// Outside creeping flow, and `--strict` was given.
    OutsideCreepingFlow,
    /// A bug of this program.
    Bug,
}

impl Exit {
    /// The number that the shell sees.
    pub fn code(self) -> u8 {
        match self {
            Self::Done => 0,
            Self::Failed => 1,
            Self::Usage => 2,
            Self::NotReached => 3,
            Self::OutsideCreepingFlow => 4,
            Self::Bug => 70,
        }
    }
}

impl From<Exit> for std::process::ExitCode {
    fn from(exit: Exit) -> Self {
        Self::from(exit.code())
    }
}
