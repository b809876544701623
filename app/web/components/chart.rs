//! Charts of a step, each with its numbers in a table below, folded.

use super::svg::drawn;
use drawing::Style;
use drawing::charts::StepChart;
use maud::{Markup, html};

/// The charts among these that stand at a step.
#[must_use]
pub fn charts_at(charts: &[StepChart], step: &str) -> Markup {
    html! {
        @for chart in charts.iter().filter(|c| c.step == step).map(|c| &c.chart) {
            figure.chart {
                figcaption { (chart.title) }
                (drawn(chart.draw(Style::Screen)))
                details {
                    summary { "The numbers" }
                    table {
                        thead { tr { @for head in chart.table_heads() { th scope="col" { (head) } } } }
                        tbody { @for row in chart.table() { tr { td { (row.name) } td { (row.across) } td { (row.up) } } } }
                    }
                }
            }
        }
    }
}
