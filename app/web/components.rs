//! Components: functions that return markup; none decides anything.

mod button;
mod caution;
mod chart;
mod field;
mod form;
mod list;
mod menu;
mod plate;
mod shell;
mod strip;
mod svg;
mod verdict;

pub use button::{button, button_named, link_button, main_button, main_link};
pub use caution::{caution, notice, saved};
pub use chart::charts_at;
pub use field::{FieldInput, InputKind, date_kind, earlier_values, field, input_id, state_line, who_when};
pub use form::{form, kept_form, live_form, seal};
pub use list::{empty, facts, pager, search_box};
pub use plate::{Plate, plate, small_plate};
pub use shell::Page;
pub use strip::{StripCell, strip};
pub use svg::drawn;
pub use verdict::{check_title, counts, verdict_mark, verdict_panel, verdict_panels, verdict_panels_to_review};
