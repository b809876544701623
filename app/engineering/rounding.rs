//! Numbers as people read them, the same on every platform.

/// What stands where the arithmetic left its range.
pub(crate) const NOT_A_NUMBER: &str = "not a number";

/// `value` rounded to `digits` significant digits; keeps zero and what is not finite.
#[must_use]
pub fn to_significant(value: f64, digits: u32) -> f64 {
    if value == 0.0 || !value.is_finite() {
        return value;
    }
    // Through decimal text, so that the result is the nearest double to a short decimal on every platform.
    let precision = usize::try_from(digits.max(1) - 1).unwrap_or(0);
    format!("{value:.precision$e}").parse().unwrap_or(value)
}

/// Text with `digits` significant digits, no exponent between 1e-4 and 1e7, never fewer digits than the integer part.
#[must_use]
pub fn significant(value: f64, digits: u32) -> String {
    if !value.is_finite() {
        return NOT_A_NUMBER.to_owned();
    }
    if value == 0.0 {
        return "0".to_owned();
    }
    let rounded = to_significant(value, digits);
    if !rounded.is_finite() {
        // Rounded up beyond the largest number there is.
        return NOT_A_NUMBER.to_owned();
    }
    let magnitude = rounded.abs();
    if !(1e-4..1e9).contains(&magnitude) {
        let precision = usize::try_from(digits.max(1) - 1).unwrap_or(0);
        return format!("{rounded:.precision$e}");
    }
    let whole_digits = if magnitude >= 1.0 { format!("{:.0}", magnitude.trunc()).len() } else { 0 };
    let leading_zeros =
        if magnitude < 1.0 { format!("{magnitude:.12}").bytes().skip(2).take_while(|b| *b == b'0').count() } else { 0 };
    let wanted = usize::try_from(digits).unwrap_or(3) + leading_zeros;
    let decimals = wanted.saturating_sub(whole_digits);
    format!("{rounded:.decimals$}")
}

/// Text with a fixed count of decimals.
#[must_use]
pub fn decimals(value: f64, count: usize) -> String {
    if value.is_finite() { format!("{value:.count$}") } else { NOT_A_NUMBER.to_owned() }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn significant_digits_read_like_a_meter() {
        assert_eq!(significant(5.25, 2), "5.2");
        assert_eq!(significant(1485.0, 3), "1480");
        assert_eq!(significant(1485.0, 4), "1485");
        assert_eq!(significant(0.0549, 3), "0.0549");
        assert_eq!(significant(-133.04, 4), "-133.0");
        assert_eq!(significant(0.99999, 3), "1.00");
        assert_eq!(significant(2.0e-7, 2), "2.0e-7");
        assert_eq!(significant(f64::MAX, 2), NOT_A_NUMBER);
    }
}
