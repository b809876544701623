//! What is left on parts that should be dead, point by point against a limit: |U| and the meter's doubt together.

use crate::decision::Measured;
use crate::limit_rule::LimitRule;
use crate::outcome::{OutcomeBuilder, Verdict};
use crate::quantity::Voltage;
use crate::reading::Reading;
use crate::rounding::significant;

/// What the points came to.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Residual {
    /// The points above the limit, with their volts, in words.
    pub above: Vec<String>,
    /// Whether one of them is above it by the meter's doubt alone.
    pub too_near: bool,
    /// The highest of all in volts.
    pub highest: f64,
}

/// States the limit, on the ruler and in the working; `words` say whose it is.
pub fn state_limit(b: &mut OutcomeBuilder, limit: Voltage, words: &str) {
    let shown = significant(limit.volts(), 3);
    b.limit(format!("not above {shown} V"));
    b.rule(LimitRule::linear("V").tick(limit.volts(), format!("{shown} V")));
    b.line("limit", words, String::new(), format!("{shown} V"));
}

/// Weighs every point against the limit; `joining` stands between volts and point in words, `of` before it in figures.
pub fn weigh(
    b: &mut OutcomeBuilder,
    limit: Voltage,
    points: &[(&str, Reading<Voltage>)],
    joining: &str,
    of: &str,
) -> Residual {
    let mut found = Residual::default();
    for (name, reading) in points {
        let measured = Measured::direct(reading);
        // The sign says which lead was where; only the size matters.
        let volts = measured.value.abs();
        let shown = significant(volts, 3);
        found.highest = found.highest.max(volts);
        let outside = volts + measured.expanded > limit.volts();
        found.too_near |= outside && volts - measured.expanded <= limit.volts();
        if outside {
            found.above.push(format!("{shown} V {joining}{name}"));
        }
        if let Some(doubt) = &measured.doubt {
            b.note(format!("{name}: {doubt}."));
        }
        b.line(
            name,
            "|U| + U_instrument",
            format!("{shown} V + {} V", significant(measured.expanded, 2)),
            format!("{} V", significant(volts + measured.expanded, 3)),
        );
        b.figure(&format!("{of}{name}"), volts, 3, "V");
        if let Some(rule) = b.take_rule() {
            let verdict = if outside { Verdict::Outside } else { Verdict::Figure };
            b.rule(rule.reading(volts, measured.expanded, format!("{shown} V"), verdict));
        }
    }
    found
}
