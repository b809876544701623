//! How a command ends: fine, something found wrong, or could not run.

use std::fmt::Display;
use std::process::ExitCode;

/// The end of a command.
pub enum Ending {
    /// Nothing to complain of: exit code 0.
    Fine,
    /// Ran, and found something wrong: exit code 1.
    FoundWrong,
    /// Could not run, with a sentence for the person: exit code 2.
    CouldNotRun(String),
}

impl Ending {
    /// Could not run, for this reason.
    pub fn could_not(why: impl Display) -> Self {
        Self::CouldNotRun(why.to_string())
    }

    /// Prints the sentence, if there is one, and gives the code.
    pub fn into_exit_code(self) -> ExitCode {
        match self {
            Self::Fine => ExitCode::SUCCESS,
            Self::FoundWrong => ExitCode::from(1),
            Self::CouldNotRun(why) => {
                eprintln!("asleft: {why}");
                ExitCode::from(2)
            }
        }
    }
}
