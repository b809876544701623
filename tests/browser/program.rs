//! Starts the built program as a person would and reads what it prints; it ends with the test.

use std::io::{BufRead, BufReader};
use std::path::Path;
use std::process::{Child, Command, Stdio};
use std::sync::mpsc::{Receiver, channel};
use std::time::Duration;

/// How long it may take until it has said the awaited line: the demo is built up first.
const PATIENCE: Duration = Duration::from_secs(120);

/// The program, running.
pub struct Program {
    child: Child,
    lines: Receiver<String>,
    /// Everything it has printed so far.
    pub said: Vec<String>,
    /// `http://127.0.0.1:port`.
    pub address: String,
}

/// Who signs in, and with what.
#[derive(Clone, Debug)]
pub struct SignIn {
    pub login: String,
    pub password: String,
}

impl Program {
    /// The demo, with its people.
    pub fn demo() -> Self {
        let mut program = Self::start(&["demo", "--listen", "127.0.0.1:0"]);
        program.listen_until("Stop it with Ctrl-C");
        program
    }

    /// A data folder being served.
    pub fn serve(data: &Path) -> Self {
        let mut program =
            Self::start(&["serve", "--listen", "127.0.0.1:0", "--data", data.to_str().expect("a plain path")]);
        program.listen_until("http://");
        program
    }

    fn start(arguments: &[&str]) -> Self {
        let mut child = asleft().args(arguments).stdout(Stdio::piped()).spawn().expect("the program starts");
        let printed = BufReader::new(child.stdout.take().expect("its output"));
        let (sender, lines) = channel();
        std::thread::spawn(move || printed.lines().map_while(Result::ok).try_for_each(|line| sender.send(line)));
        Self { child, lines, said: Vec::new(), address: String::new() }
    }

    fn listen_until(&mut self, awaited: &str) {
        loop {
            let line = self.lines.recv_timeout(PATIENCE);
            let line = line.unwrap_or_else(|e| panic!("never said “{awaited}” ({e}): {:?}", self.said));
            if let Some((_, rest)) = line.split_once("http://") {
                let end = rest.find(|c: char| !c.is_ascii_digit() && c != '.' && c != ':').unwrap_or(rest.len());
                self.address = format!("http://{}", &rest[..end]);
            }
            let found = line.contains(awaited);
            self.said.push(line);
            if found {
                return;
            }
        }
    }

    /// The first of the printed people who is this: `  login / password (Name, role)`.
    pub fn person(&self, role: &str) -> SignIn {
        let line = self.said.iter().find(|l| l.trim_end().ends_with(&format!("{role})")));
        let line = line.unwrap_or_else(|| panic!("nobody is {role}: {:?}", self.said));
        let (login, rest) = line.trim().split_once(" / ").expect("name / password");
        let (password, _) = rest.split_once(" (").expect("password (");
        SignIn { login: login.to_owned(), password: password.to_owned() }
    }
}

impl Drop for Program {
    fn drop(&mut self) {
        // It may have ended by itself; then there is nothing to end.
        let _ = self.child.kill();
        let _ = self.child.wait();
    }
}

/// The built program, as a command.
pub fn asleft() -> Command {
    Command::new(env!("CARGO_BIN_EXE_asleft"))
}
