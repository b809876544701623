//! The phase strip: what is left in each phase; a hold point is a double line that says what it does, wait.

use maud::{Markup, html};

/// A phase on the strip.
#[derive(Clone, Debug)]
pub struct StripCell {
    /// One word.
    pub short: String,
    /// Full title, for those who hear the page.
    pub title: String,
    /// Address of the phase's first unsettled step.
    pub address: String,
    /// Steps left.
    pub left: usize,
    /// Its hold point is closed.
    pub waits: bool,
    /// What stays in it although it is settled: a shape and its word.
    pub trouble: Option<(&'static str, &'static str)>,
    /// The page on screen belongs to it.
    pub now: bool,
}

/// The strip.
#[must_use]
pub fn strip(cells: &[StripCell]) -> Markup {
    html! {
        nav aria-label="Phases" {
            ol.phases {
                @for cell in cells {
                    li.now[cell.now].done[settled(cell) && cell.trouble.is_none()].troubled[settled(cell) && cell.trouble.is_some()].waits[cell.waits] {
                        a href=(cell.address) aria-current=[cell.now.then_some("step")] title=(cell.title) {
                            b { (cell.short) }
                            @if let Some((shape, word)) = cell.trouble.filter(|_| settled(cell)) {
                                span.unseen { "settled, " (word) }
                                span aria-hidden="true" { span.word { "settled " } i { (shape) } span.word { " " (word) } }
                            } @else { span { (words(cell)) @if !cell.waits && cell.left > 0 { span.word { " left" } } } }
                        }
                    }
                }
            }
        }
    }
}

fn settled(cell: &StripCell) -> bool {
    cell.left == 0 && !cell.waits
}

fn words(cell: &StripCell) -> String {
    match (cell.waits, cell.left) {
        (true, _) => "waits".to_owned(),
        (false, 0) => "settled".to_owned(),
        (false, left) => left.to_string(),
    }
}
