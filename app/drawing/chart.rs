//! A chart: curves, points and bars over two axes, with a legend that needs no colour.

use crate::axis::{Axis, around};
use crate::chart_marks::{Frame, quietest, sampled};
use crate::labels::{cut, width};
use crate::style::{Ink, Style, Voice};
use crate::svg::{Anchor, Svg, TEXT};
use engineering::Scale;
use engineering::rounding::significant;

/// One axis as asked for: its words, its unit, how it is divided.
#[derive(Clone, Debug, PartialEq)]
pub struct AxisWords {
    /// What it shows: "speed".
    pub label: String,
    /// Its unit.
    pub unit: String,
    /// How it is divided.
    pub scale: Scale,
}

/// How a series is drawn.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Look {
    /// A solid line.
    Line,
    /// A broken line: predicted, set, limit.
    Dashed,
    /// Single points.
    Points,
    /// Points joined by a line: measured.
    Measured,
    /// Bars from zero.
    Bars,
    /// A short level line at each point: the limit of a bar.
    Limits,
}

/// A curve or a set of points.
#[derive(Clone, Debug, PartialEq)]
pub struct Series {
    /// Its words in the legend.
    pub name: String,
    /// How it is drawn.
    pub look: Look,
    /// Its points; those that are not finite are left out.
    pub points: Vec<(f64, f64)>,
}

/// A reference line across the chart, with words.
#[derive(Clone, Debug, PartialEq)]
pub struct Mark {
    /// Value on the y axis for a level line, on the x axis for an upright one.
    pub at: f64,
    /// Whether it stands upright.
    pub upright: bool,
    /// Its words.
    pub label: String,
}

/// A chart.
#[derive(Clone, Debug, PartialEq)]
pub struct Chart {
    /// Its heading; also the beginning of its text alternative.
    pub title: String,
    /// Across.
    pub x: AxisWords,
    /// Up.
    pub y: AxisWords,
    /// What is drawn.
    pub series: Vec<Series>,
    /// Reference lines.
    pub marks: Vec<Mark>,
}

/// At 320 pixels its 13-unit text is 11.5 pixels high.
const WIDTH: f64 = 360.0;
const LEFT: f64 = 58.0;
const RIGHT: f64 = 338.0;
const TOP: f64 = 30.0;
const FOOT: f64 = 206.0;

impl Chart {
    /// An empty chart with even axes; labels and units as given.
    #[must_use]
    pub fn new(title: &str, x: (&str, &str), y: (&str, &str)) -> Self {
        let axis = |(label, unit): (&str, &str)| AxisWords {
            label: label.to_owned(),
            unit: unit.to_owned(),
            scale: Scale::Linear,
        };
        Self { title: title.to_owned(), x: axis(x), y: axis(y), series: Vec::new(), marks: Vec::new() }
    }

    /// With the y axis in decades.
    #[must_use]
    pub fn y_in_decades(mut self) -> Self {
        self.y.scale = Scale::Logarithmic;
        self
    }

    /// With the x axis in decades.
    #[must_use]
    pub fn x_in_decades(mut self) -> Self {
        self.x.scale = Scale::Logarithmic;
        self
    }

    /// With a series more; an empty one is left out.
    #[must_use]
    pub fn with(mut self, name: &str, look: Look, points: Vec<(f64, f64)>) -> Self {
        let decades = (self.x.scale == Scale::Logarithmic, self.y.scale == Scale::Logarithmic);
        let can_be = |v: f64, log: bool| v.is_finite() && (!log || v > 0.0);
        let points: Vec<_> =
            points.into_iter().filter(|(x, y)| can_be(*x, decades.0) && can_be(*y, decades.1)).collect();
        if !points.is_empty() {
            self.series.push(Series { name: name.to_owned(), look, points });
        }
        self
    }

    /// With a level reference line.
    #[must_use]
    pub fn level(mut self, at: f64, label: &str) -> Self {
        if at.is_finite() {
            self.marks.push(Mark { at, upright: false, label: label.to_owned() });
        }
        self
    }

    /// With an upright reference line.
    #[must_use]
    pub fn upright(mut self, at: f64, label: &str) -> Self {
        if at.is_finite() {
            self.marks.push(Mark { at, upright: true, label: label.to_owned() });
        }
        self
    }

    /// Whether there is nothing to draw.
    #[must_use]
    pub const fn is_empty(&self) -> bool {
        self.series.is_empty()
    }

    /// The chart in words: title, axes, and every series with its ends.
    #[must_use]
    pub fn words(&self) -> String {
        if self.is_empty() {
            return format!("{}: nothing to draw yet.", self.title);
        }
        let mut text = format!("{}. {} against {}.", self.title, named(&self.y), named(&self.x));
        for s in &self.series {
            let (first, last) =
                (s.points.first().copied().unwrap_or_default(), s.points.last().copied().unwrap_or_default());
            let highest = s.points.iter().map(|p| p.1).fold(f64::NEG_INFINITY, f64::max);
            text.push_str(&format!(
                " {}: {} points from {} at {} to {} at {}, highest {}.",
                s.name,
                s.points.len(),
                significant(first.1, 4),
                significant(first.0, 4),
                significant(last.1, 4),
                significant(last.0, 4),
                significant(highest, 4)
            ));
        }
        for m in &self.marks {
            text.push_str(&format!(" Line at {}: {}.", significant(m.at, 4), m.label));
        }
        text
    }

    /// Draws the chart: 360 units wide, as high as its legend needs.
    #[must_use]
    pub fn draw(&self, style: Style) -> String {
        let mut svg = Svg::new(style);
        let bars = self.series.iter().any(|s| s.look == Look::Bars);
        let across = self.axis(&self.x, |p| p.0, true, (LEFT, RIGHT), bars);
        let up = self.axis(&self.y, |p| p.1, false, (FOOT, TOP), bars);
        self.draw_axes(&mut svg, &across, &up);
        self.draw_marks(&mut svg, &across, &up);
        for (n, s) in self.series.iter().enumerate() {
            self.draw_series(&mut svg, n, s, &across, &up);
        }
        let height = self.draw_legend(&mut svg);
        svg.finish(WIDTH, height, "chart", &self.title, &self.words())
    }

    fn axis(
        &self,
        words: &AxisWords,
        pick: impl Fn(&(f64, f64)) -> f64,
        upright: bool,
        span: (f64, f64),
        bars: bool,
    ) -> Axis {
        let marks = self.marks.iter().filter(|m| m.upright == upright).map(|m| m.at);
        let values: Vec<f64> = self.series.iter().flat_map(|s| s.points.iter().map(&pick)).chain(marks).collect();
        let low = values.iter().copied().fold(f64::INFINITY, f64::min);
        let high = values.iter().copied().fold(f64::NEG_INFINITY, f64::max);
        if words.scale == Scale::Logarithmic {
            return Axis::new(words.scale, around(low / 1.05).0, around(high * 1.05).1, span.0, span.1);
        }
        let room = if high > low { high - low } else { high.abs() };
        let (mut from, to) = if upright { (low, high) } else { (low - room * 0.05, high + room * 0.08) };
        if low >= 0.0 && (low <= high * 0.5 || bars) {
            from = 0.0;
        }
        if bars && upright {
            return Axis::new(words.scale, low - 1.0, high + 1.0, span.0, span.1);
        }
        Axis::new(words.scale, from, to, span.0, span.1)
    }

    fn draw_axes(&self, svg: &mut Svg, across: &Axis, up: &Axis) {
        let mut taken = f64::NEG_INFINITY;
        let bars = self.bar_places();
        let numbers = if bars.is_empty() { across.numbers(5) } else { bars.clone() };
        for (v, shown) in numbers {
            let x = across.at(v);
            if bars.is_empty() {
                svg.line(x, TOP, x, FOOT, Ink::Grid);
            }
            let half = width(&shown, false) / 2.0;
            if x - half > taken + 6.0 && x + half < WIDTH {
                svg.text(x, FOOT + 16.0, &shown, Anchor::Middle, Voice::Quiet);
                taken = x + half;
            }
        }
        for (v, shown) in up.numbers(4) {
            svg.line(LEFT, up.at(v), RIGHT, up.at(v), Ink::Grid);
            svg.text(LEFT - 6.0, up.at(v) + 4.5, &shown, Anchor::End, Voice::Quiet);
        }
        svg.line(LEFT, FOOT, RIGHT, FOOT, Ink::Line);
        svg.line(LEFT, TOP, LEFT, FOOT, Ink::Line);
        svg.text(4.0, 14.0, &named(&self.y), Anchor::Start, Voice::Strong);
        svg.text(RIGHT, FOOT + 33.0, &named(&self.x), Anchor::End, Voice::Strong);
    }

    /// Where bars stand, each once, with its words.
    fn bar_places(&self) -> Vec<(f64, String)> {
        let bars = self.series.iter().filter(|s| s.look == Look::Bars);
        let mut at: Vec<f64> = bars.flat_map(|s| s.points.iter().map(|p| p.0)).collect();
        at.sort_by(f64::total_cmp);
        at.dedup();
        at.into_iter().map(|v| (v, format!("{v}"))).collect()
    }

    fn draw_marks(&self, svg: &mut Svg, across: &Axis, up: &Axis) {
        let frame = Frame { left: LEFT, right: RIGHT, top: TOP, foot: FOOT };
        let lines: Vec<(bool, f64)> =
            self.marks.iter().map(|m| (m.upright, if m.upright { across.at(m.at) } else { up.at(m.at) })).collect();
        let mut drawn: Vec<(f64, f64)> = Vec::new();
        for s in &self.series {
            let at: Vec<(f64, f64)> = s.points.iter().map(|(x, y)| (across.at(*x), up.at(*y))).collect();
            drawn.extend(match s.look {
                Look::Bars => at.iter().flat_map(|(x, y)| sampled(&[(*x, *y), (*x, FOOT)])).collect(),
                Look::Points | Look::Limits => at,
                Look::Line | Look::Dashed | Look::Measured => sampled(&at),
            });
        }
        for (upright, at) in &lines {
            if *upright {
                svg.line(*at, TOP, *at, FOOT, Ink::Limit);
            } else {
                svg.line(LEFT, *at, RIGHT, *at, Ink::Limit);
            }
        }
        let mut taken = Vec::new();
        for (n, mark) in self.marks.iter().enumerate() {
            let words = cut(&mark.label, RIGHT - LEFT - 12.0);
            let spot = quietest(&frame, &lines, n, width(&words, true), &drawn, &taken);
            svg.text(spot.0, spot.1, &words, Anchor::Middle, Voice::Strong);
            taken.push((spot.0, spot.1, width(&words, true) / 2.0));
        }
    }

    fn draw_series(&self, svg: &mut Svg, n: usize, series: &Series, across: &Axis, up: &Axis) {
        let at: Vec<(f64, f64)> = series.points.iter().map(|(x, y)| (across.at(*x), up.at(*y))).collect();
        match series.look {
            Look::Line => svg.curve(&at, Ink::Curve(n, false)),
            Look::Dashed => svg.curve(&at, Ink::Curve(n, true)),
            Look::Measured => svg.curve(&at, Ink::Curve(n, false)),
            Look::Points => {}
            Look::Limits => {
                for (x, y) in &at {
                    svg.line(x - 13.0, *y, x + 13.0, *y, Ink::Limit);
                }
            }
            Look::Bars => {
                let groups = self.series.iter().filter(|s| s.look == Look::Bars).count().max(1);
                let count = f64::from(u16::try_from(series.points.len()).unwrap_or(1).max(1));
                let one = ((RIGHT - LEFT) / count / f64::from(u16::try_from(groups).unwrap_or(1)) * 0.7).min(18.0);
                for (x, y) in &at {
                    let shift = (f64::from(u16::try_from(n).unwrap_or(0))
                        - f64::from(u16::try_from(groups).unwrap_or(1)) / 2.0)
                        * one;
                    svg.rect(x + shift, *y, one, FOOT - y, Ink::Bar(n));
                }
            }
        }
        if matches!(series.look, Look::Points | Look::Measured) {
            for (x, y) in &at {
                svg.circle(*x, *y, 3.4, Ink::Point(n));
            }
        }
    }

    /// The legend under the chart; gives the height of the whole.
    fn draw_legend(&self, svg: &mut Svg) -> f64 {
        let (mut x, mut y) = (LEFT, FOOT + 54.0);
        for (n, s) in self.series.iter().enumerate() {
            let wide = 40.0 + width(&s.name, false);
            if x + wide > WIDTH && x > LEFT {
                x = LEFT;
                y += TEXT + 5.0;
            }
            let sample = [(x, y - 4.5), (x + 26.0, y - 4.5)];
            match s.look {
                Look::Line | Look::Measured => svg.curve(&sample, Ink::Curve(n, false)),
                Look::Dashed => svg.curve(&sample, Ink::Curve(n, true)),
                Look::Bars => svg.rect(x + 6.0, y - 11.0, 14.0, 12.0, Ink::Bar(n)),
                Look::Limits => svg.line(x, y - 4.5, x + 26.0, y - 4.5, Ink::Limit),
                Look::Points => {}
            }
            if matches!(s.look, Look::Points | Look::Measured) {
                svg.circle(x + 13.0, y - 4.5, 3.4, Ink::Point(n));
            }
            svg.text(x + 31.0, y, &s.name, Anchor::Start, Voice::Quiet);
            x += wide;
        }
        y + 8.0
    }
}

fn named(axis: &AxisWords) -> String {
    if axis.unit.is_empty() { axis.label.clone() } else { format!("{}, {}", axis.label, axis.unit) }
}
