//! The limit rule: a short ruler with its acceptable span, its limits, and the reading as the shape of its verdict.

use crate::axis::Axis;
use crate::labels::{Placed, is_free, place, width};
use crate::rule_range::range;
use crate::rule_words::words;
use crate::style::{Ink, Style, Voice};
use crate::svg::{Anchor, Svg};
use engineering::{LimitRule, Scale, Verdict};

const WIDTH: f64 = 320.0;
const LEFT: f64 = 12.0;
const RIGHT: f64 = 308.0;
const ROW: f64 = 16.0;
/// Half the height of the ruler with its limit marks.
const HALF: f64 = 13.0;
const ROWS: usize = 3;

/// Draws a limit rule. 320 units wide and legible at 320 pixels; as high as its words need.
#[must_use]
pub fn limit_rule(rule: &LimitRule, style: Style) -> String {
    let (low, high) = range(rule);
    let axis = Axis::new(rule.scale, low, high, LEFT, RIGHT);
    let readings: Vec<(f64, &str)> = rule.markers.iter().map(|m| (axis.at(m.at), m.label.as_str())).collect();
    let limits: Vec<(f64, &str)> = rule.ticks.iter().map(|t| (axis.at(t.at), t.label.as_str())).collect();
    let above = place(&readings, 2.0, WIDTH - 2.0, ROWS);
    let below = place(&limits, 2.0, WIDTH - 2.0, ROWS);
    let rows = |placed: &[Placed]| placed.iter().map(|p| p.row + 1).max().unwrap_or(0);
    let top = f64::from(u16::try_from(rows(&above)).unwrap_or(3)) * ROW + if above.is_empty() { 2.0 } else { 6.0 };
    let middle = top + HALF;
    let foot = middle + HALF;
    // One row is kept for the scale's numbers even when there is no limit to name.
    let height = foot + f64::from(u16::try_from(rows(&below).max(1)).unwrap_or(3)) * ROW + 4.0;

    let mut svg = Svg::new(style);
    svg.line(LEFT - 6.0, middle, RIGHT + 6.0, middle, Ink::Line);
    draw_spans(&mut svg, rule, &axis, middle);
    draw_scale(&mut svg, &axis, rule, middle, foot, &below);
    for (tick, (x, _)) in rule.ticks.iter().zip(&limits) {
        if !axis.is_beyond(tick.at) {
            svg.line(*x, middle - HALF + 2.0, *x, foot, Ink::Limit);
        }
    }
    for p in &below {
        let x = limits.get(p.index).map_or(LEFT, |l| l.0);
        let y = foot + 14.0 + row(p) * ROW;
        lead(&mut svg, (x, foot), p, foot + 3.0, Verdict::Figure);
        svg.text(p.left + p.width / 2.0, y, &p.words, Anchor::Middle, Voice::Strong);
    }
    for p in &above {
        let marker = rule.markers.get(p.index);
        let x = readings.get(p.index).map_or(LEFT, |r| r.0);
        lead(&mut svg, (x, middle - 8.0), p, top - 3.0, marker.map_or(Verdict::Figure, |m| m.verdict));
        svg.text(p.left + p.width / 2.0, top - 7.0 - row(p) * ROW, &p.words, Anchor::Middle, Voice::Strong);
    }
    draw_readings(&mut svg, rule, &axis, middle);
    svg.finish(WIDTH, height, "limit-rule", &words(rule), "")
}

fn row(placed: &Placed) -> f64 {
    f64::from(u16::try_from(placed.row).unwrap_or(0))
}

/// A thin line from a mark to its words, where these had to move aside.
fn lead(svg: &mut Svg, from: (f64, f64), placed: &Placed, y: f64, verdict: Verdict) {
    let nearest = from.0.clamp(placed.left + 3.0, (placed.left + placed.width - 3.0).max(placed.left + 3.0));
    if placed.row == 0 && (nearest - from.0).abs() > 1.0 {
        svg.line(from.0, from.1, nearest, y, Ink::Whisker(verdict));
    }
}

fn draw_spans(svg: &mut Svg, rule: &LimitRule, axis: &Axis, middle: f64) {
    for band in &rule.bands {
        let from = band.from.map_or(LEFT - 6.0, |v| axis.at(v));
        let to = band.to.map_or(RIGHT + 6.0, |v| axis.at(v));
        // An exact value is a span too: at least as wide as can be seen.
        let width = (to - from).max(2.0);
        svg.rect(from, middle - 8.0, width, 16.0, Ink::Band);
    }
}

fn draw_scale(svg: &mut Svg, axis: &Axis, rule: &LimitRule, middle: f64, foot: f64, below: &[Placed]) {
    for v in axis.between() {
        svg.line(axis.at(v), middle - 2.0, axis.at(v), middle + 2.0, Ink::Grid);
    }
    let mut taken: Vec<(f64, f64)> = Vec::new();
    let wanted = if rule.scale == Scale::Linear { 4 } else { 0 };
    let numbers = axis.numbers(wanted);
    let last = numbers.len().saturating_sub(1);
    // From the last one back, since it carries the unit; powers of ten before what stands between them.
    let (powers, others): (Vec<_>, Vec<_>) = numbers
        .iter()
        .enumerate()
        .rev()
        .partition(|(n, (_, shown))| *n == last || shown.starts_with('1') || rule.scale == Scale::Linear);
    for (n, (v, shown)) in powers.into_iter().chain(others) {
        let x = axis.at(*v);
        svg.line(x, middle - 4.0, x, middle + 4.0, Ink::Line);
        let with_unit = format!("{shown} {}", rule.unit);
        for text in
            if n == last && !rule.unit.is_empty() { vec![with_unit, shown.clone()] } else { vec![shown.clone()] }
        {
            let half = width(&text, false) / 2.0;
            let centre = x.min(WIDTH - half - 1.0).max(half + 1.0);
            let (left, right) = (centre - half, centre + half);
            if is_free(below, left, right) && taken.iter().all(|(a, b)| right + 6.0 <= *a || left >= *b + 6.0) {
                svg.text(centre, foot + 14.0, &text, Anchor::Middle, Voice::Quiet);
                taken.push((left, right));
                break;
            }
        }
    }
}

fn draw_readings(svg: &mut Svg, rule: &LimitRule, axis: &Axis, middle: f64) {
    for marker in &rule.markers {
        let x = axis.at(marker.at);
        let ink = Ink::Whisker(marker.verdict);
        if axis.is_beyond(marker.at) {
            // Off the ruler: an arrow says which way.
            let way = if x > WIDTH / 2.0 { 1.0 } else { -1.0 };
            svg.curve(&[(x + way * 5.0, middle - 11.0), (x + way * 11.0, middle), (x + way * 5.0, middle + 11.0)], ink);
        } else if marker.whisker > 0.0 {
            let (from, to) = (axis.at(marker.at - marker.whisker), axis.at(marker.at + marker.whisker));
            svg.line(from, middle, to, middle, ink);
            svg.line(from, middle - 6.0, from, middle + 6.0, ink);
            svg.line(to, middle - 6.0, to, middle + 6.0, ink);
        }
        svg.shape(x, middle, marker.verdict);
    }
}

#[cfg(test)]
#[path = "rule_tests.rs"]
mod tests;
