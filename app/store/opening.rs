//! Opening a store: the folder and its lock, the file and its schema, the connections and their settings.

mod connection;
mod fault;
mod folder;
mod ground;
mod migrate;
mod random;
mod write_down;

pub(crate) use connection::{Purpose, connect, connect_unchanging, setting};
pub use fault::OpenFault;
pub(crate) use folder::{private_folder, sync_folder};
pub(crate) use ground::Ground;
pub(crate) use migrate::{MIGRATIONS, bring_up_to_date, schema_of, schema_version};
pub(crate) use random::random_hex;
pub(crate) use write_down::write_down;
