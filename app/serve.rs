//! `asleft serve`: the pages of one data folder.

use crate::clock;
use crate::ending::Ending;
use crate::keys;
use clap::Args;
use std::net::SocketAddr;
use std::path::{Path, PathBuf};
use std::sync::Arc;
use store::Store;
use web::App;

/// How a store that cannot be written is labelled, on the command line and under the sign-in form.
const ONLY_READ: &str = "This store was opened only to be read: nothing can be written to its folder. Records can be looked at; nothing can be recorded.";

#[derive(Args)]
pub struct Arguments {
    /// Data folder; made if it does not exist
    #[arg(long)]
    data: PathBuf,
    /// Address to listen on
    #[arg(long, default_value = "127.0.0.1:8420")]
    listen: SocketAddr,
    /// Behind a TLS proxy on this machine: cookies are sent under TLS only, and the address that the proxy gives as
    /// the last of X-Forwarded-For is the one that failed sign-ins are counted by
    #[arg(long)]
    behind_tls: bool,
}

pub fn run(arguments: &Arguments) -> Ending {
    let store = match Store::open(&arguments.data, clock::now()) {
        Ok(store) => store,
        Err(fault) => return Ending::could_not(fault),
    };
    let only_read = store.only_read().map(str::to_owned);
    if only_read.is_none()
        && let Err(why) = load_built_in(&store)
    {
        return Ending::could_not(why);
    }
    let label = only_read.is_some().then(|| ONLY_READ.to_owned());
    serve(store, &arguments.data, arguments.listen, arguments.behind_tls, label, |address, store| {
        if let Some(why) = &only_read {
            println!("{ONLY_READ} The reason: {why}");
            println!("Asleft is at {address}");
        } else {
            tell(address, store);
        }
        if arguments.behind_tls {
            println!("Pages work only through the TLS proxy in front of this address.");
            if !arguments.listen.ip().is_loopback() {
                println!(
                    "A proxy's word about addresses is taken from this machine alone: let it run here, and listen on 127.0.0.1."
                );
            }
        } else if !arguments.listen.ip().is_loopback() {
            println!(
                "This address is reached over the network without encryption. Use it on a network of your own, or behind a TLS proxy with --behind-tls."
            );
        }
    })
}

/// Says where the pages are, or how to set up an empty store.
fn tell(address: &str, store: &Store) {
    match store.setup_code().wait() {
        Ok(Some(code)) => {
            println!("This store is empty. Open {address}, and set it up with this one-time code: {code}");
        }
        Ok(None) => println!("Asleft is at {address}"),
        Err(fault) => eprintln!("asleft: {fault}"),
    }
}

/// The key that packages are signed with; where nothing can be written it may be missing, and there are no packages.
fn signing_key(store: &Store, data: &Path) -> Result<Option<PathBuf>, String> {
    let path = data.join(handover::key::rotation::IN_USE);
    if store.only_read().is_some() {
        return Ok(match handover::key::load(&path) {
            Ok(_) => Some(path),
            Err(fault) => {
                eprintln!("asleft: no packages can be made: {fault}");
                None
            }
        });
    }
    keys::settle(store, data)?;
    // Made at the first start, so that the first package does not have to wait for it.
    handover::key::load_or_create(&path).map_err(|f| f.to_string())?;
    if let Some(strange) = keys::strange(store, data)? {
        eprintln!("asleft: {strange} `asleft keys list` shows both.");
    }
    Ok(Some(path))
}

/// Loads the built-in procedure where the store does not have this version yet.
pub fn load_built_in(store: &Store) -> Result<(), String> {
    use commissioning::ActId;
    use commissioning::journal::{Act, Deed};
    let procedure = commissioning::procedure::built_in::built_in()?;
    let installation = store.installation().wait().map_err(|f| f.to_string())?;
    if installation.procedures.contains_key(&procedure.version) {
        return Ok(());
    }
    let act = Act {
        id: ActId(clock::fresh_id()),
        tablet: None,
        deed: Deed::LoadProcedure { procedure: Box::new(procedure) },
    };
    store.perform(None, act, store::Proof::none(), clock::now()).wait().map(|_| ()).map_err(|f| f.to_string())
}

/// Serves until interrupted; `ready` is told the address once the port is open.
pub fn serve(
    store: Store,
    data: &Path,
    listen: SocketAddr,
    secure: bool,
    welcome: Option<String>,
    ready: impl FnOnce(&str, &Store),
) -> Ending {
    let key = match signing_key(&store, data) {
        Ok(key) => key,
        Err(why) => return Ending::could_not(why),
    };
    let runtime = match tokio::runtime::Builder::new_multi_thread().enable_all().build() {
        Ok(runtime) => runtime,
        Err(fault) => return Ending::could_not(fault),
    };
    let app = App {
        store: store.clone(),
        clock: Arc::new(clock::now),
        ids: Arc::new(clock::fresh_id),
        signing_key: key.as_deref().map(Arc::from),
        secure,
        welcome: welcome.map(Arc::from),
    };
    let opened = runtime.block_on(tokio::net::TcpListener::bind(listen));
    let listener = match opened {
        Ok(listener) => listener,
        Err(fault) => {
            return Ending::could_not(format!(
                "{listen} cannot be listened on: {fault}. Choose another with --listen."
            ));
        }
    };
    let address = listener.local_addr().map_or_else(|_| listen.to_string(), |a| a.to_string());
    ready(&format!("http://{address}"), &store);
    match runtime.block_on(web::serve(listener, app, stopped())) {
        Ok(()) => Ending::Fine,
        Err(fault) => Ending::could_not(fault),
    }
}

/// Ready when the person or the machine asks the program to stop.
async fn stopped() {
    let interrupted = async {
        // Without a handler for it the program still ends, only less gently.
        if tokio::signal::ctrl_c().await.is_err() {
            std::future::pending::<()>().await;
        }
    };
    let terminated = async {
        match tokio::signal::unix::signal(tokio::signal::unix::SignalKind::terminate()) {
            Ok(mut signal) => {
                signal.recv().await;
            }
            Err(_) => std::future::pending::<()>().await,
        }
    };
    tokio::select! { () = interrupted => (), () = terminated => () }
}
