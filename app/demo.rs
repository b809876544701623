//! `asleft demo`: everything, in a throw-away folder, with the invented demo site.

use crate::clock;
use crate::ending::Ending;
use crate::serve;
use clap::Args;
use std::net::SocketAddr;
use store::Store;

#[derive(Args)]
pub struct Arguments {
    /// Address to listen on
    #[arg(long, default_value = "127.0.0.1:8420")]
    listen: SocketAddr,
}

pub fn run(arguments: &Arguments) -> Ending {
    let folder = match tempfile::Builder::new().prefix("asleft-demo-").tempdir() {
        Ok(folder) => folder,
        Err(fault) => return Ending::could_not(format!("no throw-away folder could be made: {fault}")),
    };
    let store = match Store::open(folder.path(), clock::now()) {
        Ok(store) => store,
        Err(fault) => return Ending::could_not(fault),
    };
    println!(
        "Loading the demo site through the same acts as a person would; on a small machine this takes up to a minute …"
    );
    let demo = match seed_demo::load(&store, clock::now()) {
        Ok(demo) => demo,
        Err(fault) => return Ending::could_not(fault),
    };
    let signs: Vec<String> =
        demo.people.iter().map(|p| format!("{} / {} ({}, {})", p.login, p.password, p.name, p.role)).collect();
    let welcome = format!("Demo sign-ins, name / password: {}.", signs.join(" · "));
    serve::serve(store, folder.path(), arguments.listen, false, Some(welcome), |address, _| {
        println!("Asleft with the demo site is at {address}/sites/{}", demo.site_tag);
        println!("Sign in as one of these invented people (name / password):");
        for line in &signs {
            println!("  {line}");
        }
        println!("Everything in it is invented and gone when the program ends. Stop it with Ctrl-C.");
    })
}
