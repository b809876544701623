//! Inputs that cannot be true count as missing, named with what would be possible.

use crate::formulas::magnetising::USUAL_BREAKDOWN;
use crate::formulas::torque::torque;
use crate::outcome::OutcomeBuilder;
use crate::quantity::{Power, Quantity, Ratio, Speed, Torque};
use crate::reading::Reading;

/// A quantity that has to be finite and above zero.
pub fn positive<Q: Quantity>(b: &mut OutcomeBuilder, value: Option<Q>, what: &str) -> Option<Q> {
    let value = b.need(value, what)?;
    let sound = value.coherent().is_finite() && value.coherent() > 0.0;
    b.need(sound.then_some(value), &format!("{what} above zero"))
}

/// A quantity that has to be finite and at least zero.
pub fn not_negative<Q: Quantity>(b: &mut OutcomeBuilder, value: Option<Q>, what: &str) -> Option<Q> {
    let value = b.need(value, what)?;
    let sound = value.coherent().is_finite() && value.coherent() >= 0.0;
    b.need(sound.then_some(value), &format!("{what} of zero or more"))
}

/// A quantity that has to be finite.
pub fn finite<Q: Quantity>(b: &mut OutcomeBuilder, value: Option<Q>, what: &str) -> Option<Q> {
    let value = b.need(value, what)?;
    b.need(value.coherent().is_finite().then_some(value), &format!("{what} as a finite number"))
}

/// A reading that has to be finite and above zero.
pub fn positive_reading<Q: Quantity>(
    b: &mut OutcomeBuilder,
    reading: Option<&Reading<Q>>,
    what: &str,
) -> Option<Reading<Q>> {
    let reading = b.need(reading.cloned(), what)?;
    let sound = reading.number().is_finite() && reading.number() > 0.0;
    b.need(sound.then_some(reading), &format!("{what} above zero"))
}

/// A reading that has to be finite and at least zero.
pub fn reading_not_negative<Q: Quantity>(
    b: &mut OutcomeBuilder,
    reading: Option<&Reading<Q>>,
    what: &str,
) -> Option<Reading<Q>> {
    let reading = b.need(reading.cloned(), what)?;
    let sound = reading.number().is_finite() && reading.number() >= 0.0;
    b.need(sound.then_some(reading), &format!("{what} of zero or more"))
}

/// A reading that has to be finite.
pub fn finite_reading<Q: Quantity>(
    b: &mut OutcomeBuilder,
    reading: Option<&Reading<Q>>,
    what: &str,
) -> Option<Reading<Q>> {
    let reading = b.need(reading.cloned(), what)?;
    let sound = reading.number().is_finite();
    b.need(sound.then_some(reading), &format!("{what} as a finite number"))
}

/// A ratio strictly between 0 and 1, such as a rated power factor.
pub fn proper_fraction(b: &mut OutcomeBuilder, value: Option<Ratio>, what: &str) -> Option<Ratio> {
    let value = b.need(value, what)?;
    let sound = value.fraction() > 0.0 && value.fraction() < 1.0;
    b.need(sound.then_some(value), &format!("{what} between 0 and 1"))
}

/// Breakdown over rated torque λ, at least 1; assumed at its usual floor where the plate is silent.
pub fn breakdown(b: &mut OutcomeBuilder, value: Option<Ratio>) -> Option<Ratio> {
    if value.is_none() {
        b.cite(USUAL_BREAKDOWN.source);
    }
    let usual = Ratio::from_fraction(USUAL_BREAKDOWN.value);
    let value = b.assume(
        value,
        usual,
        "breakdown torque ratio λ",
        "1.6, the least that IEC 60034-1 lets a general-purpose motor have",
    );
    let sound = value.fraction().is_finite() && value.fraction() >= 1.0;
    b.need(sound.then_some(value), "breakdown torque ratio λ of at least 1")
}

/// Rated torque from rated power and speed, where the two make one.
pub fn rated_torque(b: &mut OutcomeBuilder, power: Option<Power>, speed: Option<Speed>) -> Option<Torque> {
    let power = positive(b, power, "rated power");
    let speed = positive(b, speed, "rated speed");
    let torque = torque(power?, speed?);
    positive(b, Some(torque), "rated torque from the nameplate")
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::quantity::Current;

    #[test]
    fn what_cannot_be_true_is_named_as_missing() {
        for impossible in [0.0, -1.0, f64::NAN, f64::INFINITY] {
            let mut b = OutcomeBuilder::new("x");
            assert!(positive(&mut b, Some(Current::from_amperes(impossible)), "rated motor current").is_none());
            assert_eq!(b.not_assessed().missing[0].what, "rated motor current above zero");
        }
        let mut b = OutcomeBuilder::new("x");
        assert!(proper_fraction(&mut b, Some(Ratio::from_fraction(1.2)), "rated power factor").is_none());
        assert!(positive::<Current>(&mut b, None, "rated motor current").is_none());
        let missing = b.not_assessed().missing;
        assert_eq!(missing[0].what, "rated power factor between 0 and 1");
        assert_eq!(missing[1].what, "rated motor current");
    }
}
