//! The plant as sheets of fields: site, supply, drive, nameplates, cable, load; one table says what every field is.
//!
//! A field is described once, in its sheet's file. Forms, validation, the package, the record format and the checks
//! all read that description.

mod flags;

pub mod field;
pub mod fields;
pub mod place;
pub mod site;
pub mod slot;

pub use field::{Field, FieldKind};
pub use flags::flags_of;
pub use place::{Place, Sheet};
pub use site::Site;
pub use slot::{Recorded, Slot};
