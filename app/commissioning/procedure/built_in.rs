//! The built-in procedure, shipped as data files beside this one: a file per phase, read when the program starts.

use super::{Phase, Procedure};

#[cfg(test)]
mod coverage;
#[cfg(test)]
mod tests;

/// Rises with every change of a phase file; records keep the version they began with.
pub const VERSION: u32 = 3;

/// File name and text of every phase, in order.
const PHASES: [(&str, &str); 10] = [
    ("01-make-safe", include_str!("phases/01-make-safe.toml")),
    ("02-identify", include_str!("phases/02-identify.toml")),
    ("03-inspect", include_str!("phases/03-inspect.toml")),
    ("04-insulation", include_str!("phases/04-insulation.toml")),
    ("05-energise", include_str!("phases/05-energise.toml")),
    ("06-set", include_str!("phases/06-set.toml")),
    ("07-turn", include_str!("phases/07-turn.toml")),
    ("08-stops", include_str!("phases/08-stops.toml")),
    ("09-load-run", include_str!("phases/09-load-run.toml")),
    ("10-leave", include_str!("phases/10-leave.toml")),
];

/// The built-in procedure.
///
/// # Errors
/// When a phase file is no phase; the sentence names the file and the place.
pub fn built_in() -> Result<Procedure, String> {
    let phases = PHASES
        .iter()
        .map(|(file, text)| toml::from_str::<Phase>(text).map_err(|fault| format!("Phase file {file}: {fault}")))
        .collect::<Result<Vec<_>, _>>()?;
    Ok(Procedure { version: VERSION, name: "Generic commissioning of a drive".to_owned(), phases })
}
