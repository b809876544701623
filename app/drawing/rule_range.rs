//! Which stretch of values a ruler shows: its limits, its readings and room on the open side.

use crate::axis::{exponent, ten};
use engineering::{LimitRule, Scale};

/// Lowest and highest value of the ruler.
pub(crate) fn range(rule: &LimitRule) -> (f64, f64) {
    match rule.scale {
        Scale::Linear => even(rule),
        Scale::Logarithmic => decades(rule),
    }
}

fn limits(rule: &LimitRule) -> Vec<f64> {
    let ends = rule.bands.iter().flat_map(|b| [b.from, b.to]).flatten();
    rule.ticks.iter().map(|t| t.at).chain(ends).filter(|v| v.is_finite()).collect()
}

fn readings(rule: &LimitRule) -> Vec<f64> {
    rule.markers.iter().flat_map(|m| [m.at - m.whisker, m.at, m.at + m.whisker]).filter(|v| v.is_finite()).collect()
}

fn ends(values: &[f64]) -> Option<(f64, f64)> {
    let low = values.iter().copied().min_by(f64::total_cmp)?;
    let high = values.iter().copied().max_by(f64::total_cmp)?;
    Some((low, high))
}

fn even(rule: &LimitRule) -> (f64, f64) {
    let limits = limits(rule);
    let mut all = readings(rule);
    if let Some((low, high)) = ends(&limits) {
        // A reading far off would press the limits into one line: it stands at the ruler's end with an arrow instead.
        let room = (high - low).max(high.abs().max(low.abs()) * 0.6) * 3.0;
        // A limit of zero alone tells nothing of the scale: the reading does.
        for v in all.iter_mut().filter(|_| room > 0.0) {
            *v = v.clamp(low - room, high + room);
        }
    }
    // A whisker may reach below zero where the quantity itself cannot.
    let negative = limits.iter().copied().chain(rule.markers.iter().map(|m| m.at)).any(|v| v < 0.0);
    all.extend(&limits);
    if !negative {
        all.iter_mut().for_each(|v| *v = v.max(0.0));
    }
    let Some((low, high)) = ends(&all) else { return (0.0, 1.0) };
    let span = if high > low { high - low } else { high.abs().max(1e-9) * 0.5 };
    let open_below = rule.bands.iter().any(|b| b.from.is_none());
    let open_above = rule.bands.iter().any(|b| b.to.is_none());
    let mut from = low - span * if open_below { 0.35 } else { 0.2 };
    let to = high + span * if open_above { 0.35 } else { 0.2 };
    // From zero where that costs little of the ruler: shares of a limit then read as lengths.
    if !negative && (from < 0.0 || low <= high * if open_below { 0.7 } else { 0.4 }) {
        from = 0.0;
    }
    (from, to)
}

fn decades(rule: &LimitRule) -> (f64, f64) {
    let limits: Vec<f64> = limits(rule).into_iter().filter(|v| *v > 0.0).collect();
    let mut all: Vec<f64> = readings(rule).into_iter().filter(|v| *v > 0.0).collect();
    if let Some((low, high)) = ends(&limits) {
        for v in &mut all {
            *v = v.clamp(low / 1e4, high * 1e5);
        }
    }
    all.extend(&limits);
    let Some((low, high)) = ends(&all) else { return (1.0, 1000.0) };
    let open_above = rule.bands.iter().any(|b| b.to.is_none());
    // Whole decades, with a good half decade to spare at either end.
    let from = ten(exponent(low / 1.6));
    let mut to = ten(exponent(high * 1.6) + 1);
    if open_above && to / high < 10.0 {
        to = ten(exponent(high) + 2);
    }
    (from, to)
}
