//! # skip-bands
//!
//! Bands of output frequency that the drive passes through without staying, against the working speeds of the load.
//!
//! low < f < high for no working point; low < high in every band; bands apart from each other and inside the span of
//! minimum and maximum (common practice, row SK-01). A working point on an edge is not covered.

use crate::formulas::plausible;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::Frequency;
use crate::rounding::significant;
use crate::sources::settings::SKIP;

/// Name in the catalogue.
pub const NAME: &str = "skip-bands";

/// A band that the drive skips.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Band {
    /// Lower edge.
    pub low: Frequency,
    /// Upper edge.
    pub high: Frequency,
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Bands as set; an empty list when none is set; `None` when nobody looked.
    pub bands: Option<Vec<Band>>,
    /// Output frequencies at which the load has to work.
    pub working_points: Vec<Frequency>,
    /// Lowest output frequency as set.
    pub minimum_frequency: Option<Frequency>,
    /// Highest output frequency as set.
    pub maximum_frequency: Option<Frequency>,
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(SKIP);
    b.limit("no working speed inside a band (common practice)");
    let Some(bands) = b.need(inputs.bands.as_ref(), "skip bands as set, or that none is set") else {
        return b.not_assessed();
    };
    if bands.is_empty() {
        return b.judged(Verdict::Within, "No skip band is set, so none covers a working speed.");
    }
    let text =
        |band: &Band| format!("{} to {} Hz", significant(band.low.hertz(), 3), significant(band.high.hertz(), 3));
    for band in bands {
        let (low, high) = (band.low.hertz(), band.high.hertz());
        if !(low.is_finite() && high.is_finite()) {
            return b.not_judged("Not assessed: an edge of a skip band is no number.");
        }
        if low < 0.0 || low >= high {
            return b.judged(
                Verdict::Outside,
                format!("The band {} has its edges exchanged or equal: correct it.", text(band)),
            );
        }
    }
    let mut sorted: Vec<&Band> = bands.iter().collect();
    sorted.sort_by(|x, y| x.low.hertz().total_cmp(&y.low.hertz()));
    let rule = sorted.iter().fold(LimitRule::linear("Hz"), |rule, band| {
        rule.tick(band.low.hertz(), "skip from")
            .tick(band.high.hertz(), format!("to {} Hz", significant(band.high.hertz(), 3)))
    });
    b.rule(rule);
    for (i, band) in sorted.iter().enumerate() {
        b.line(&format!("band {}", i + 1), "low to high", String::new(), text(band));
    }
    if inputs.working_points.is_empty() {
        let _ = b.need(None::<Frequency>, "working speeds of the load");
    }
    let points: Vec<f64> = inputs
        .working_points
        .iter()
        .filter_map(|f| plausible::not_negative(&mut b, Some(*f), "a working speed"))
        .map(Frequency::hertz)
        .collect();
    let mut covered = Vec::new();
    for point in &points {
        let inside = sorted.iter().find(|band| *point > band.low.hertz() && *point < band.high.hertz());
        let shown = significant(*point, 3);
        b.line(
            &format!("working at {shown} Hz"),
            "in no band",
            String::new(),
            inside.map_or("free".to_owned(), |band| format!("inside {}", text(band))),
        );
        let verdict = if inside.is_some() { Verdict::Outside } else { Verdict::Within };
        if let Some(rule) = b.take_rule() {
            b.rule(rule.reading(*point, 0.0, format!("{shown} Hz"), verdict));
        }
        if inside.is_some() {
            covered.push(format!("{shown} Hz"));
        }
    }
    if !covered.is_empty() {
        return b.judged(Verdict::Outside, format!("The load has to work at {}, inside a skip band: the drive will not stay there. Move the band or the working speed.", covered.join(", ")));
    }
    if points.is_empty() || points.len() < inputs.working_points.len() {
        return b.not_assessed();
    }
    if let Some(pair) = sorted.windows(2).find(|pair| pair[1].low.hertz() < pair[0].high.hertz()) {
        return b.judged(
            Verdict::Marginal,
            format!(
                "The bands {} and {} overlap: how the drive treats that is in its manual. Make one band of them.",
                text(pair[0]),
                text(pair[1])
            ),
        );
    }
    let idle = |band: &&&Band| {
        inputs.maximum_frequency.is_some_and(|f| band.low.hertz() >= f.hertz())
            || inputs.minimum_frequency.is_some_and(|f| band.high.hertz() <= f.hertz())
    };
    if let Some(band) = sorted.iter().find(idle) {
        b.note(format!("The band {} lies outside the span of minimum and maximum and does nothing.", text(band)));
    }
    b.judged(Verdict::Within, format!("{} working speeds, none inside a skip band.", points.len()))
}

#[cfg(test)]
mod tests {
    use super::*;

    fn of(bands: &[(f64, f64)], points: &[f64]) -> Inputs {
        let hertz = Frequency::from_hertz;
        Inputs {
            bands: Some(bands.iter().map(|(l, h)| Band { low: hertz(*l), high: hertz(*h) }).collect()),
            working_points: points.iter().copied().map(hertz).collect(),
            minimum_frequency: Some(hertz(10.0)),
            maximum_frequency: Some(hertz(50.0)),
        }
    }

    /// Common practice, no source (row SK-01).
    #[test]
    fn at_just_inside_and_just_outside() {
        for (point, verdict) in [
            (24.0, Verdict::Within),
            (24.1, Verdict::Outside),
            (26.0, Verdict::Within),
            (25.0, Verdict::Outside),
            (26.1, Verdict::Within),
        ] {
            assert_eq!(check(&of(&[(24.0, 26.0)], &[40.0, point])).verdict, verdict, "{point}");
        }
        assert_eq!(check(&of(&[(24.0, 28.0), (27.0, 30.0)], &[40.0])).verdict, Verdict::Marginal);
        assert_eq!(check(&of(&[(26.0, 24.0)], &[40.0])).verdict, Verdict::Outside);
        assert_eq!(check(&of(&[], &[])).verdict, Verdict::Within);
    }

    #[test]
    fn missing_named_and_idle_band_noted() {
        assert_eq!(check(&Inputs::default()).missing[0].what, "skip bands as set, or that none is set");
        let outcome = check(&of(&[(24.0, 26.0)], &[]));
        assert_eq!(outcome.missing[0].what, "working speeds of the load");
        assert!(outcome.rule.is_some() && !outcome.limit.is_empty());
        assert_eq!(check(&of(&[(60.0, 62.0)], &[40.0])).notes.len(), 1);
        assert_eq!(check(&of(&[(24.0, f64::NAN)], &[40.0])).verdict, Verdict::NotAssessed);
    }
}
