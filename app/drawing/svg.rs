//! Writes SVG: numbers short and finite, words escaped, one `<title>` and `role="img"` on every picture.

use crate::style::{Ink, Style, Voice};
use engineering::Verdict;
use std::fmt::Write as _;

/// Text size in the picture's units.
pub(crate) const TEXT: f64 = 13.0;

/// A picture being drawn.
pub(crate) struct Svg {
    style: Style,
    body: String,
}

/// Where words stand to their point.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(crate) enum Anchor {
    Start,
    Middle,
    End,
}

impl Svg {
    pub(crate) const fn new(style: Style) -> Self {
        Self { style, body: String::new() }
    }

    pub(crate) fn line(&mut self, x1: f64, y1: f64, x2: f64, y2: f64, ink: Ink) {
        let (a, b, c, d) = (number(x1), number(y1), number(x2), number(y2));
        let _ = write!(self.body, r#"<line x1="{a}" y1="{b}" x2="{c}" y2="{d}"{}/>"#, ink.attributes(self.style));
    }

    pub(crate) fn rect(&mut self, x: f64, y: f64, width: f64, height: f64, ink: Ink) {
        let (a, b, c, d) = (number(x), number(y), number(width.max(0.0)), number(height.max(0.0)));
        let _ = write!(self.body, r#"<rect x="{a}" y="{b}" width="{c}" height="{d}"{}/>"#, ink.attributes(self.style));
    }

    /// A line through points; fewer than two draw nothing.
    pub(crate) fn curve(&mut self, points: &[(f64, f64)], ink: Ink) {
        if points.len() < 2 {
            return;
        }
        let mut path = String::new();
        for (n, (x, y)) in points.iter().enumerate() {
            let _ = write!(path, "{}{} {}", if n == 0 { "M" } else { "L" }, number(*x), number(*y));
        }
        let _ = write!(self.body, r#"<path d="{path}"{}/>"#, ink.attributes(self.style));
    }

    pub(crate) fn circle(&mut self, x: f64, y: f64, radius: f64, ink: Ink) {
        let (a, b, r) = (number(x), number(y), number(radius));
        let _ = write!(self.body, r#"<circle cx="{a}" cy="{b}" r="{r}"{}/>"#, ink.attributes(self.style));
    }

    /// The shape of a verdict, about 12 units wide: ● ▲ ■ ○, and a dash for a figure.
    pub(crate) fn shape(&mut self, x: f64, y: f64, verdict: Verdict) {
        let ink = Ink::Reading(verdict);
        match verdict {
            Verdict::Within => self.circle(x, y, 6.0, ink),
            Verdict::NotAssessed => self.circle(x, y, 5.2, ink),
            Verdict::Outside => self.rect(x - 5.6, y - 5.6, 11.2, 11.2, ink),
            Verdict::Figure => self.rect(x - 1.5, y - 8.0, 3.0, 16.0, ink),
            Verdict::Marginal => self.triangle(x, y, ink),
        }
    }

    fn triangle(&mut self, x: f64, y: f64, ink: Ink) {
        let (a, b, c, d, e) = (number(x), number(y - 7.0), number(x + 7.0), number(y + 5.5), number(x - 7.0));
        let _ = write!(self.body, r#"<path d="M{a} {b}L{c} {d}L{e} {d}Z"{}/>"#, ink.attributes(self.style));
    }

    pub(crate) fn text(&mut self, x: f64, y: f64, words: &str, anchor: Anchor, voice: Voice) {
        let place = match anchor {
            Anchor::Start => "",
            Anchor::Middle => r#" text-anchor="middle""#,
            Anchor::End => r#" text-anchor="end""#,
        };
        let _ = write!(
            self.body,
            r#"<text x="{}" y="{}" font-size="{}"{place}{}>{}</text>"#,
            number(x),
            number(y),
            number(TEXT),
            voice.attributes(self.style),
            escape(words)
        );
    }

    /// The whole picture; `class` names it for the stylesheet, `told` says its numbers where the title does not.
    pub(crate) fn finish(self, width: f64, height: f64, class: &str, title: &str, told: &str) -> String {
        let (w, h) = (number(width), number(height));
        let dress = match self.style {
            Style::Screen => format!(r#" class="{class}""#),
            Style::Print => format!(r#" width="{w}" height="{h}""#),
        };
        let told = if told.is_empty() { String::new() } else { format!("<desc>{}</desc>", escape(told)) };
        format!(
            r#"<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 {w} {h}" role="img"{dress}><title>{}</title>{told}{}</svg>"#,
            escape(title),
            self.body
        )
    }
}

/// At most two decimals; what is not finite becomes 0, so that no picture is ever broken by arithmetic.
pub(crate) fn number(value: f64) -> String {
    let rounded = if value.is_finite() { (value * 100.0).round() / 100.0 } else { 0.0 };
    // Minus zero would print its sign.
    format!("{}", if rounded == 0.0 { 0.0 } else { rounded })
}

/// For text between tags and in double-quoted attributes; control characters, which XML forbids, become a box.
pub(crate) fn escape(text: &str) -> String {
    let mut safe = String::with_capacity(text.len());
    for c in text.chars() {
        match c {
            '&' => safe.push_str("&amp;"),
            '<' => safe.push_str("&lt;"),
            '>' => safe.push_str("&gt;"),
            '"' => safe.push_str("&quot;"),
            '\'' => safe.push_str("&#39;"),
            '\n' | '\t' | '\r' => safe.push(' '),
            c if c.is_control() || matches!(c, '\u{fffe}' | '\u{ffff}') => safe.push('▯'),
            c => safe.push(c),
        }
    }
    safe
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn words_cannot_become_markup() {
        assert_eq!(escape("<script>\"'&\u{1}"), "&lt;script&gt;&quot;&#39;&amp;▯");
    }

    #[test]
    fn numbers_are_short_and_finite() {
        assert_eq!(number(1.0 / 3.0), "0.33");
        assert_eq!(number(-0.001), "0");
        assert_eq!(number(f64::NAN), "0");
        assert_eq!(number(f64::INFINITY), "0");
        assert_eq!(number(12.0), "12");
    }
}
