//! Pictures: the limit rule and the charts as SVG text, drawn once for the page and for the package.
//!
//! Nothing else draws a limit. A picture carries no identifier, no inline style and no script; its numbers stand
//! again in its `<title>`, so that a person who cannot see it misses nothing.

pub mod axis;
pub mod chart;
mod chart_marks;
mod chart_table;
pub mod charts;
mod labels;
mod rule;
mod rule_range;
mod rule_words;
pub mod style;
mod svg;

pub use chart::{Chart, Look, Mark, Series};
pub use chart_table::Row;
pub use rule::limit_rule;
pub use rule_words::words as limit_rule_words;
pub use style::Style;
