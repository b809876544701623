//! A figure as printed on a plate: its number, and how far the printed digits leave it open.

use crate::quantity::Quantity;

/// A printed figure. `20.9 A` stands for anything from 20.85 to 20.95 A.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Printed<Q> {
    /// The number as printed.
    pub value: Q,
    /// Half a step of the last printed digit; `None` for a nominal rating, which is exact as it stands (400 V, 11 kW).
    pub half_width: Option<Q>,
}

impl<Q: Quantity> Printed<Q> {
    /// A nominal rating: exact as printed.
    #[must_use]
    pub const fn nominal(value: Q) -> Self {
        Self { value, half_width: None }
    }

    /// A figure with a known half-width.
    #[must_use]
    pub const fn rounded(value: Q, half_width: Q) -> Self {
        Self { value, half_width: Some(half_width) }
    }

    /// A figure whose half-width is read off its decimal text, for instance `20.9`; `one` is what the number 1 in
    /// the printed unit is worth. Text that is not a plain decimal number counts as nominal.
    #[must_use]
    pub fn from_text(value: Q, text: &str, one: Q) -> Self {
        Self { value, half_width: half_step(text).map(|half| Q::from_coherent(half * one.coherent())) }
    }

    /// The number in the coherent unit.
    #[must_use]
    pub fn number(&self) -> f64 {
        self.value.coherent()
    }

    /// The smallest number that is printed like this.
    #[must_use]
    pub fn low(&self) -> f64 {
        self.number() - self.half_width.map_or(0.0, Q::coherent)
    }

    /// The largest number that is printed like this.
    #[must_use]
    pub fn high(&self) -> f64 {
        self.number() + self.half_width.map_or(0.0, Q::coherent)
    }
}

/// Half a step of the last digit of a plain decimal text with point or comma.
fn half_step(text: &str) -> Option<f64> {
    let text = text.trim();
    let (whole, decimals) = text.split_once(['.', ',']).unwrap_or((text, ""));
    let plain = |part: &str| part.bytes().all(|b| b.is_ascii_digit());
    if whole.is_empty() && decimals.is_empty() || !plain(whole) || !plain(decimals) {
        return None;
    }
    let places = i32::try_from(decimals.len()).ok()?;
    Some(0.5 / libm::pow(10.0, f64::from(places)))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::{Current, Ratio, Speed};

    #[test]
    fn the_last_printed_digit_gives_the_half_width() {
        let amperes = Printed::from_text(Current::from_amperes(20.9), "20.9", Current::from_amperes(1.0));
        assert!((amperes.low() - 20.85).abs() < 1e-12 && (amperes.high() - 20.95).abs() < 1e-12);
        let speed = Printed::from_text(Speed::from_rpm(1475.0), "1475", Speed::from_rpm(1.0));
        assert!((speed.high() - 1475.5).abs() < 1e-12);
        let percent = Printed::from_text(Ratio::from_fraction(0.914), "91,4", Ratio::from_fraction(0.01));
        assert!((percent.high() - 0.9145).abs() < 1e-12);
        assert_eq!(Printed::from_text(Ratio::from_fraction(0.9), "~0.9", Ratio::from_fraction(1.0)).half_width, None);
        assert_eq!(Printed::from_text(Ratio::from_fraction(0.9), "", Ratio::from_fraction(1.0)).half_width, None);
    }
}
