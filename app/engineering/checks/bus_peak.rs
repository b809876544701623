//! # bus-peak
//!
//! Highest direct-current bus voltage seen while slowing down, against the voltage at which the drive trips.
//!
//! At or above the trip: outside. Within 5 % below it: marginal (common practice), since a high line then trips it.
//! The trip voltage is the drive maker's; nothing is assumed in its place.

use crate::decision::Measured;
use crate::formulas::{marking, plausible};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::Voltage;
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::motion::BUS_MARGIN;

/// Name in the catalogue.
pub const NAME: &str = "bus-peak";

/// Highest share of the trip voltage without remark.
pub const MARGIN: Limit = Limit { name: "bus peak over trip voltage", value: 0.95, unit: "1", source: BUS_MARGIN };

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Highest bus voltage seen on the ramp down.
    pub peak: Option<Reading<Voltage>>,
    /// The drive's trip voltage.
    pub trip: Option<Voltage>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(MARGIN.source);
    let trip = plausible::positive(&mut b, inputs.trip, "bus trip voltage");
    let limit = trip.map(|t| t.volts() * MARGIN.value);
    if let (Some(trip), Some(limit)) = (trip, limit) {
        let (trip, shown) = (significant(trip.volts(), 3), significant(limit, 3));
        b.limit(format!("at most {shown} V, 95 % of the {trip} V trip"));
        b.rule(
            LimitRule::linear("V")
                .at_most(limit, format!("≤ {shown} V"))
                .tick(inputs.trip.map_or(limit, Voltage::volts), format!("trip {trip} V")),
        );
        b.line("highest without remark", "0.95·V_trip", format!("0.95 × {trip} V"), format!("{shown} V"));
    }
    let peak = plausible::positive_reading(&mut b, inputs.peak.as_ref(), "highest bus voltage while slowing down");
    let (Some(trip), Some(limit), Some(peak)) = (trip, limit, peak) else { return b.not_assessed() };
    let measured = Measured::direct(&peak);
    if measured.doubt.is_none() {
        b.needed(format!("With this meter {} V is within", significant(limit - measured.expanded, 3)));
    }
    let verdict =
        if measured.value >= trip.volts() { Verdict::Outside } else { marking::hint(measured.at_most(limit)) };
    let shown = significant(measured.value, 3);
    b.figure("bus peak over trip voltage", 100.0 * measured.value / trip.volts(), 3, "%");
    marking::mark(&mut b, &measured, format!("{shown} V"), verdict);
    let trip = significant(trip.volts(), 3);
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("{shown} V, at or above the {trip} V trip. Lengthen the ramp or look at chopper and resistor."),
            Verdict::Marginal => format!("{shown} V against a trip at {trip} V: closer than 5 %, or than the meter can tell. A longer ramp leaves room."),
            _ => format!("{shown} V, more than 5 % below the {trip} V trip."),
        },
    )
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn peak(volts: f64) -> Inputs {
        let meter = Accuracy {
            percent_of_reading: 0.5,
            digits: 2.0,
            resolution: 1.0,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        Inputs { peak: Some(Reading::with(Voltage::from_volts(volts), meter)), trip: Some(Voltage::from_volts(800.0)) }
    }

    /// Common practice, no source: 5 % below the trip. U here is 1.65·(0.5 % + 2 V)/√3, 5.5 V at 753 V.
    #[test]
    fn at_just_inside_and_just_outside() {
        for (volts, verdict) in [
            (753.0, Verdict::Within),
            (757.0, Verdict::Marginal),
            (799.0, Verdict::Marginal),
            (800.0, Verdict::Outside),
        ] {
            assert_eq!(check(&peak(volts)).verdict, verdict, "{volts} V");
        }
        let bare = Inputs { peak: Some(Reading::bare(Voltage::from_volts(600.0))), ..peak(1.0) };
        assert_eq!(check(&bare).verdict, Verdict::Marginal);
    }

    #[test]
    fn the_limit_is_there_before_the_reading() {
        let outcome = check(&Inputs { peak: None, ..peak(1.0) });
        assert_eq!(outcome.limit, "at most 760 V, 95 % of the 800 V trip");
        assert!(outcome.rule.is_some() && outcome.verdict == Verdict::NotAssessed);
        assert_eq!(check(&Inputs { trip: None, ..peak(700.0) }).missing[0].what, "bus trip voltage");
        assert_eq!(check(&peak(f64::INFINITY)).verdict, Verdict::NotAssessed);
    }
}
