//! Who dresses a picture: the stylesheet of the page, or the picture itself for paper.

use engineering::Verdict;

/// How a picture is dressed.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Style {
    /// For a page: class names and `currentColor`; the stylesheet gives the colours of both themes.
    Screen,
    /// For paper: plain attributes in inks that stay apart in a grey photocopy.
    Print,
}

/// What a mark of a picture is; gives its class on a page and its ink on paper.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(crate) enum Ink {
    /// The ruler's line, an axis.
    Line,
    /// Small ticks and grid lines.
    Grid,
    /// The acceptable span.
    Band,
    /// A limit's mark.
    Limit,
    /// A reading's filled shape.
    Reading(Verdict),
    /// A reading's whisker, and the line from a reading to its words.
    Whisker(Verdict),
    /// A curve: which one, counted from 0.
    Curve(usize, bool),
    /// A point of a curve.
    Point(usize),
    /// A bar.
    Bar(usize),
}

const fn verdict_class(verdict: Verdict) -> &'static str {
    match verdict {
        Verdict::Within => "within",
        Verdict::Marginal => "marginal",
        Verdict::Outside => "outside",
        Verdict::NotAssessed => "not-assessed",
        Verdict::Figure => "figure",
    }
}

const fn verdict_ink(verdict: Verdict) -> &'static str {
    match verdict {
        Verdict::Within => "#0a5a30",
        Verdict::Marginal => "#6b4a00",
        Verdict::Outside => "#8f1014",
        Verdict::NotAssessed | Verdict::Figure => "#30363c",
    }
}

const INKS: [&str; 4] = ["#15181c", "#0b3d6e", "#7a4a00", "#5a5f66"];
const DASHES: [&str; 4] = ["7 4", "2 3", "9 3 2 3", "5 5"];

impl Ink {
    /// The attributes of a mark, with a leading blank.
    pub(crate) fn attributes(self, style: Style) -> String {
        match style {
            Style::Screen => self.on_screen(),
            Style::Print => self.on_paper(),
        }
    }

    fn on_screen(self) -> String {
        match self {
            Self::Line => r#" class="dr-line" fill="none" stroke="currentColor""#.to_owned(),
            Self::Grid => r#" class="dr-grid" fill="none" stroke="currentColor" stroke-opacity="0.35""#.to_owned(),
            Self::Band => {
                r#" class="dr-band" fill="currentColor" fill-opacity="0.16" stroke="currentColor""#.to_owned()
            }
            Self::Limit => r#" class="dr-limit" fill="none" stroke="currentColor" stroke-width="2.5""#.to_owned(),
            Self::Reading(Verdict::NotAssessed) => {
                r#" class="dr-reading not-assessed" fill="none" stroke="currentColor" stroke-width="2""#.to_owned()
            }
            Self::Reading(v) => format!(r#" class="dr-reading {}" fill="currentColor""#, verdict_class(v)),
            Self::Whisker(v) => {
                format!(
                    r#" class="dr-whisker {}" fill="none" stroke="currentColor" stroke-width="1.5""#,
                    verdict_class(v)
                )
            }
            Self::Curve(n, dashed) => format!(
                r#" class="dr-curve dr-{}" fill="none" stroke="currentColor" stroke-width="2"{}"#,
                n % 4,
                dash(n, dashed)
            ),
            Self::Point(n) => format!(r#" class="dr-point dr-{}" fill="currentColor""#, n % 4),
            Self::Bar(n) => {
                // Pale enough for a limit's line to stand out on it.
                let fill = [0.4, 0.12][n % 2];
                format!(
                    r#" class="dr-bar dr-{}" fill="currentColor" fill-opacity="{fill}" stroke="currentColor""#,
                    n % 4
                )
            }
        }
    }

    fn on_paper(self) -> String {
        match self {
            Self::Line => r##" fill="none" stroke="#15181c" stroke-width="1""##.to_owned(),
            Self::Grid => r##" fill="none" stroke="#9a9a94" stroke-width="0.6""##.to_owned(),
            Self::Band => r##" fill="#dfe8e1" stroke="#0a5a30" stroke-width="1""##.to_owned(),
            Self::Limit => r##" fill="none" stroke="#15181c" stroke-width="2.5""##.to_owned(),
            Self::Reading(Verdict::NotAssessed) => {
                r##" fill="#ffffff" stroke="#30363c" stroke-width="1.8""##.to_owned()
            }
            Self::Reading(v) => format!(r#" fill="{}""#, verdict_ink(v)),
            Self::Whisker(v) => format!(r#" fill="none" stroke="{}" stroke-width="1.4""#, verdict_ink(v)),
            Self::Curve(n, dashed) => {
                format!(r#" fill="none" stroke="{}" stroke-width="1.6"{}"#, INKS[n % 4], dash(n, dashed))
            }
            Self::Point(n) => format!(r#" fill="{}""#, INKS[n % 4]),
            Self::Bar(n) => {
                format!(r##" fill="{}" stroke="#15181c" stroke-width="0.8""##, ["#a9aeb4", "#eeeeea"][n % 2])
            }
        }
    }
}

fn dash(n: usize, dashed: bool) -> String {
    if dashed { format!(r#" stroke-dasharray="{}""#, DASHES[n % 4]) } else { String::new() }
}

/// How words are set.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(crate) enum Voice {
    /// Scale numbers.
    Quiet,
    /// Limits and readings.
    Strong,
}

impl Voice {
    /// The attributes of words, with a leading blank.
    pub(crate) const fn attributes(self, style: Style) -> &'static str {
        match (style, self) {
            (Style::Screen, Self::Quiet) => r#" class="dr-text" fill="currentColor""#,
            (Style::Screen, Self::Strong) => r#" class="dr-text dr-strong" fill="currentColor" font-weight="700""#,
            (Style::Print, Self::Quiet) => r##" font-family="Libertinus Serif" fill="#3a3f45""##,
            (Style::Print, Self::Strong) => r##" font-family="Libertinus Serif" font-weight="700" fill="#15181c""##,
        }
    }
}
