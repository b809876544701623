//! The numbers of a chart as a table, for those who cannot see it or want to read it off.

use crate::chart::Chart;
use engineering::rounding::significant;

/// One line of the table.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Row {
    /// Series or reference line.
    pub name: String,
    /// Value across; empty for a level line.
    pub across: String,
    /// Value up; empty for an upright line.
    pub up: String,
}

/// Points shown of a long series, its ends among them.
const MOST: usize = 12;

impl Chart {
    /// The heads of the table: what, across, up.
    #[must_use]
    pub fn table_heads(&self) -> [String; 3] {
        let with_unit = |label: &str, unit: &str| {
            if unit.is_empty() { label.to_owned() } else { format!("{label}, {unit}") }
        };
        ["Curve".to_owned(), with_unit(&self.x.label, &self.x.unit), with_unit(&self.y.label, &self.y.unit)]
    }

    /// Every point drawn, of a long computed curve twelve of them, then the reference lines.
    #[must_use]
    pub fn table(&self) -> Vec<Row> {
        let mut rows = Vec::new();
        for series in &self.series {
            let last = series.points.len().saturating_sub(1);
            let shown = series.points.len().min(MOST);
            for n in 0..shown {
                let Some((x, y)) = series.points.get(if shown > 1 { n * last / (shown - 1) } else { 0 }) else {
                    continue;
                };
                rows.push(Row { name: series.name.clone(), across: significant(*x, 4), up: significant(*y, 4) });
            }
        }
        for mark in &self.marks {
            let (at, none) = (significant(mark.at, 4), String::new());
            let (across, up) = if mark.upright { (at, none) } else { (none, at) };
            rows.push(Row { name: mark.label.clone(), across, up });
        }
        rows
    }
}
