//! An axis: its range, its numbers and where a value falls on it.

use engineering::Scale;

/// An axis ready to draw on.
#[derive(Clone, Debug, PartialEq)]
pub struct Axis {
    scale: Scale,
    low: f64,
    high: f64,
    from: f64,
    to: f64,
}

impl Axis {
    /// Over the values `low..=high`, drawn from `from` to `to`. A range that cannot be is widened until it can.
    #[must_use]
    pub fn new(scale: Scale, low: f64, high: f64, from: f64, to: f64) -> Self {
        let (mut low, mut high) =
            if low.is_finite() && high.is_finite() { (low.min(high), low.max(high)) } else { (0.0, 1.0) };
        if scale == Scale::Logarithmic {
            low = if low > 0.0 { low } else { 1e-3 };
            high = high.max(low * 10.0);
        } else if high - low <= high.abs().max(low.abs()) * 1e-9 || high <= low {
            let room = if high == 0.0 { 1.0 } else { high.abs() * 0.1 };
            low -= room;
            high += room;
        }
        Self { scale, low, high, from, to }
    }

    /// Smallest value on the axis.
    #[must_use]
    pub const fn low(&self) -> f64 {
        self.low
    }

    /// Largest value on the axis.
    #[must_use]
    pub const fn high(&self) -> f64 {
        self.high
    }

    /// Where a value falls, ends included: what lies beyond stands at the end.
    #[must_use]
    pub fn at(&self, value: f64) -> f64 {
        let share = match self.scale {
            Scale::Linear => (value - self.low) / (self.high - self.low),
            Scale::Logarithmic if value > 0.0 => (value / self.low).log10() / (self.high / self.low).log10(),
            Scale::Logarithmic => 0.0,
        };
        let share = if share.is_finite() { share.clamp(0.0, 1.0) } else { 0.0 };
        self.from + share * (self.to - self.from)
    }

    /// Whether a value lies off the axis.
    #[must_use]
    pub fn is_beyond(&self, value: f64) -> bool {
        let slack = (self.high - self.low) * 1e-9;
        value < self.low - slack || value > self.high + slack
    }

    /// The numbers of the axis, about `wanted` of them, each with its words.
    #[must_use]
    pub fn numbers(&self, wanted: u32) -> Vec<(f64, String)> {
        match self.scale {
            Scale::Linear => self.even(wanted),
            Scale::Logarithmic => self.decades(),
        }
    }

    /// Small ticks between the numbers; only decades have any.
    #[must_use]
    pub fn between(&self) -> Vec<f64> {
        if self.scale == Scale::Linear {
            return Vec::new();
        }
        let first = exponent(self.low) - 1;
        let last = exponent(self.high) + 1;
        (first..=last)
            .flat_map(|e| (2..10).map(move |n| f64::from(n) * ten(e)))
            .filter(|v| !self.is_beyond(*v))
            .collect()
    }

    fn even(&self, wanted: u32) -> Vec<(f64, String)> {
        let step = nice_step((self.high - self.low) / f64::from(wanted.max(1)));
        let places = usize::try_from((-exponent(step)).max(0)).unwrap_or(0);
        let first = (self.low / step - 1e-9).ceil();
        (0..60)
            .map(|n| (first + f64::from(n)) * step)
            .take_while(|v| *v <= self.high + step * 1e-9)
            .map(|v| (v, shown(if v.abs() < step * 1e-6 { 0.0 } else { v }, places)))
            .collect()
    }

    fn decades(&self) -> Vec<(f64, String)> {
        // Short of three decades the powers alone would leave the reader with a number or two.
        let factors: &[f64] = if self.high / self.low < 1000.0 { &[1.0, 2.0, 5.0] } else { &[1.0] };
        (exponent(self.low) - 1..=exponent(self.high) + 1)
            .flat_map(|e| factors.iter().map(move |f| (f * ten(e), e)))
            .map(|(v, e)| (v, shown(v, usize::try_from(-e).unwrap_or(0))))
            .filter(|(v, _)| !self.is_beyond(*v))
            .collect()
    }
}

/// The nearest 1, 2 or 5 times a power of ten at or below a positive number, and at or above it.
pub(crate) fn around(value: f64) -> (f64, f64) {
    let base = ten(exponent(value));
    let below = [5.0, 2.0, 1.0].into_iter().map(|f| f * base).find(|v| *v <= value).unwrap_or(base);
    (below, nice_step(value))
}

/// 1, 2 or 5 times a power of ten, at least `rough`.
fn nice_step(rough: f64) -> f64 {
    if !(rough.is_finite() && rough > 0.0) {
        return 1.0;
    }
    let base = ten(exponent(rough));
    [1.0, 2.0, 5.0, 10.0].into_iter().map(|f| f * base).find(|s| *s >= rough * 0.999_999).unwrap_or(base * 10.0)
}

/// Exponent of the decade a positive number lies in.
pub(crate) fn exponent(value: f64) -> i32 {
    if !(value.is_finite() && value > 0.0) {
        return 0;
    }
    // Through decimal text: exact at powers of ten, where a logarithm is not.
    format!("{value:e}").split_once('e').and_then(|(_, e)| e.parse().ok()).unwrap_or(0)
}

/// A power of ten, exact as a decimal.
pub(crate) fn ten(exponent: i32) -> f64 {
    format!("1e{exponent}").parse().unwrap_or(1.0)
}

/// A number of the axis; beyond what is read at a glance with its power of ten.
fn shown(value: f64, places: usize) -> String {
    let magnitude = value.abs();
    if magnitude >= 1e8 || places > 6 && magnitude > 0.0 {
        return format!("{value:.0e}").replace('-', "−");
    }
    grouped(&format!("{value:.*}", places.min(6)))
}

/// Thousands apart from 10 000 on.
fn grouped(digits: &str) -> String {
    let (sign, rest) = digits.strip_prefix('-').map_or(("", digits), |r| ("−", r));
    let (whole, decimals) = rest.split_once('.').unwrap_or((rest, ""));
    let mut text = sign.to_owned();
    for (n, c) in whole.chars().enumerate() {
        if n > 0 && whole.len() > 4 && (whole.len() - n) % 3 == 0 {
            text.push('\u{202f}');
        }
        text.push(c);
    }
    if !decimals.is_empty() {
        text.push('.');
        text.push_str(decimals);
    }
    text
}

#[cfg(test)]
mod tests {
    use super::*;

    fn words(axis: &Axis, wanted: u32) -> Vec<String> {
        axis.numbers(wanted).into_iter().map(|(_, w)| w).collect()
    }

    #[test]
    fn even_numbers_are_round() {
        assert_eq!(words(&Axis::new(Scale::Linear, 0.0, 1.3, 0.0, 1.0), 4), ["0.0", "0.5", "1.0"]);
        assert_eq!(words(&Axis::new(Scale::Linear, -25.0, 25.0, 0.0, 1.0), 4), ["−20", "0", "20"]);
        assert_eq!(
            words(&Axis::new(Scale::Linear, 0.0, 30_000.0, 0.0, 1.0), 3),
            ["0", "10\u{202f}000", "20\u{202f}000", "30\u{202f}000"]
        );
    }

    #[test]
    fn decades_are_powers_of_ten() {
        let axis = Axis::new(Scale::Logarithmic, 0.1, 1000.0, 0.0, 100.0);
        assert_eq!(words(&axis, 4), ["0.1", "1", "10", "100", "1000"]);
        assert!((axis.at(10.0) - 50.0).abs() < 1e-9);
        assert_eq!(axis.between().len(), 32, "eight in each of four decades");
        assert_eq!(words(&Axis::new(Scale::Logarithmic, 10.0, 100.0, 0.0, 1.0), 4), ["10", "20", "50", "100"]);
        assert_eq!((around(13.0), around(0.2), around(99.0)), ((10.0, 20.0), (0.2, 0.2), (50.0, 100.0)));
    }

    #[test]
    fn impossible_ranges_still_draw() {
        for (low, high) in [(5.0, 5.0), (0.0, 0.0), (f64::NAN, 1.0), (3.0, -3.0), (1e300, 1e300), (-2.0, -2.0)] {
            for scale in [Scale::Linear, Scale::Logarithmic] {
                let axis = Axis::new(scale, low, high, 0.0, 10.0);
                assert!(axis.low() < axis.high(), "{low} {high}");
                assert!((0.0..=10.0).contains(&axis.at(low)) && axis.numbers(4).len() < 400);
            }
        }
    }
}
