//! The command line: parses it, runs one command, turns its end into an exit code.

mod backup;
mod check_store;
mod clock;
mod demo;
mod ending;
mod evaluate;
mod handover_command;
mod keys;
mod people;
mod restore;
mod serve;
mod verify;

use clap::{Parser, Subcommand};
use std::process::ExitCode;

/// The commissioning book for variable-frequency drives.
///
/// Exit codes of every command: 0 fine, 1 found something wrong, 2 could not run.
#[derive(Parser)]
#[command(name = "asleft", version, propagate_version = true)]
struct CommandLine {
    #[command(subcommand)]
    command: Command,
}

#[derive(Subcommand)]
enum Command {
    /// Opens a throw-away store with an invented demo site and prints the address and the demo people's sign-ins
    Demo(demo::Arguments),
    /// Serves a data folder; an empty one prints a one-time set-up code
    Serve(serve::Arguments),
    /// Reads a record.json and prints every check as JSON: verdict, figures, working, sources, missing inputs
    Evaluate(evaluate::Arguments),
    /// Verifies a handover package (folder or zip): sums, signature, journal, and every verdict computed again
    Verify(verify::Arguments),
    /// Makes the handover package of one drive
    Handover(handover_command::Arguments),
    /// Makes a checked backup of a data folder, also while it is being served
    Backup(backup::Arguments),
    /// Fills an empty folder from a backup
    Restore(restore::Arguments),
    /// Looks at everything in a data folder and changes nothing
    CheckStore(check_store::Arguments),
    /// Lists the signing keys, or makes a new one in place of the present
    Keys(keys::Arguments),
    /// Lists people, makes the first administrator, or gives someone a way back in
    People(people::Arguments),
}

fn main() -> ExitCode {
    tracing_subscriber::fmt()
        .with_env_filter(
            tracing_subscriber::EnvFilter::try_from_env("ASLEFT_LOG")
                .unwrap_or_else(|_| tracing_subscriber::EnvFilter::new("warn")),
        )
        .with_writer(std::io::stderr)
        .init();
    let ended = match CommandLine::parse().command {
        Command::Demo(arguments) => demo::run(&arguments),
        Command::Serve(arguments) => serve::run(&arguments),
        Command::Evaluate(arguments) => evaluate::run(&arguments),
        Command::Verify(arguments) => verify::run(&arguments),
        Command::Handover(arguments) => handover_command::run(&arguments),
        Command::Backup(arguments) => backup::run(&arguments),
        Command::Restore(arguments) => restore::run(&arguments),
        Command::CheckStore(arguments) => check_store::run(&arguments),
        Command::Keys(arguments) => keys::run(&arguments),
        Command::People(arguments) => people::run(&arguments),
    };
    ended.into_exit_code()
}
