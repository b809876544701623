//! Accounts beside the journal: passwords, failed attempts, sessions, invitations, the set-up code.

mod account;
mod attempts;
mod hashing;
mod invite;
mod invited;
mod password;
mod project;
mod session;
mod set_up_code;
mod sign_in;
mod well_known;

pub use account::AccountRow;
pub use invited::CodeMade;
pub use password::{PasswordFault, will_do as password_will_do};
pub(crate) use project::project;
pub use session::{Session, SessionKind};
pub use sign_in::{PasswordAnswer, SignIn};
