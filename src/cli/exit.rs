//! Exit codes, with the meanings users may rely on.

/// How a run ended.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
#[repr(u8)]
pub enum Exit {
    /// Done, including "done, and nothing holds": a verdict is a result, not an error.
    Done = 0,
    /// A gate the user asked for was tripped.
    Gate = 1,
    /// The command line was not understood.
    Usage = 2,
    /// Input files are wrong.
    Input = 3,
    /// A file could not be read or written.
    File = 4,
    /// Nothing matched what was asked.
    NoMatch = 5,
    /// A defect in the program.
    Defect = 70,
}

impl From<Exit> for std::process::ExitCode {
    fn from(exit: Exit) -> Self {
        Self::from(exit as u8)
    }
}
