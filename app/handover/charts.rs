//! The charts of a record, dressed for paper.

use commissioning::judge::View;
use commissioning::record::canonical::RecordFile;
use drawing::Style;

/// A chart ready for the document.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Drawn {
    /// The step it stands at.
    pub step: String,
    /// Its heading.
    pub title: String,
    /// The picture.
    pub svg: String,
    /// Its numbers in words.
    pub words: String,
}

/// The charts of a record, in the order of the work; none when the file contradicts itself.
#[must_use]
pub fn of(file: &RecordFile) -> Vec<Drawn> {
    let Ok(rebuilt) = file.rebuild() else { return Vec::new() };
    let view = View { drive: &rebuilt.drive, site: &rebuilt.site, procedure: &rebuilt.procedure };
    let drawn = |c: drawing::charts::StepChart| Drawn {
        svg: c.chart.draw(Style::Print),
        words: c.chart.words(),
        title: c.chart.title,
        step: c.step,
    };
    drawing::charts::of(&view).into_iter().map(drawn).collect()
}
