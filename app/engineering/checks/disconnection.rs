//! # disconnection
//!
//! Automatic disconnection ahead of the drive: Z_s ≤ U₀/I_a, Z_s the earth-fault loop impedance, U₀ the nominal volts
//! to earth, I_a the current that operates the protective device in the time that the rules ask for (TN system,
//! IEC 60364-4-41, from memory). Without a loop reading the design's proof can stand in, as a figure, unless the site
//! takes measured loops only. A loop measured cold is compared with 2/3 of U₀/I_a (IEC 60364-6, informative annex, from
//! memory), or with the share that the site names; the design's is taken at working temperature. U₀ is that of an earthed star; any other earthing is for the design's own proof.
//! Behind the drive's output its own electronics limit the fault current: that part rests on the drive's manual.

use crate::decision::Measured;
use crate::formulas::marking::mark;
use crate::formulas::plausible::{positive, positive_reading};
use crate::limit::Limit;
use crate::limit_rule::LimitRule;
use crate::outcome::{Outcome, OutcomeBuilder, Verdict};
use crate::quantity::{Current, Duration, Ratio, Resistance, Voltage};
use crate::reading::Reading;
use crate::rounding::significant;
use crate::sources::earthing::{COLD_LOOP, DISCONNECTION, PE_08};

/// Name in the catalogue.
pub const NAME: &str = "disconnection";

/// Share of U₀/I_a that a loop measured cold may reach, until the site names another.
pub const COLD_SHARE: Limit =
    Limit { name: "loop measured cold, over U₀/I_a", value: 2.0 / 3.0, unit: "1", source: COLD_LOOP };

/// Which proof the site takes.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Proof {
    /// A measured loop impedance.
    MeasuredLoop,
    /// The design's calculation.
    Design,
}

/// What the check takes.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Inputs {
    /// Earth-fault loop impedance at the drive's line terminals.
    pub loop_impedance: Option<Reading<Resistance>>,
    /// Whether the supply is a star with earthed neutral (TN, TT).
    pub earthed_star: Option<bool>,
    /// Nominal volts from line to earth of an earthed star.
    pub voltage_to_earth: Option<Voltage>,
    /// Current that operates the device in the required time.
    pub operating_current: Option<Current>,
    /// The time that this current belongs to.
    pub operating_time: Option<Duration>,
    /// Longest disconnection time that the site allows.
    pub longest_time: Option<Duration>,
    /// Loop impedance by the design's calculation.
    pub design_impedance: Option<Resistance>,
    /// Whether the design's own proof of disconnection was seen.
    pub proved_by_design: Option<bool>,
    /// Which proof the site takes; either until it has chosen.
    pub accepted_proof: Option<Proof>,
    /// Share of U₀/I_a that the site allows a measured loop.
    pub site_share: Option<Ratio>,
}

/// Largest loop impedance, U₀/I_a.
#[must_use]
pub fn largest_loop(to_earth: Voltage, operating: Current) -> Resistance {
    Resistance::from_ohms(to_earth.volts() / operating.amperes())
}

/// Runs the check.
#[must_use]
pub fn check(inputs: &Inputs) -> Outcome {
    let mut b = OutcomeBuilder::new(NAME);
    b.cite(DISCONNECTION);
    b.cite(PE_08);
    b.note("A loop measured cold reads lower than at working temperature. Local rules go first.");
    let by_design = inputs.loop_impedance.is_none() && inputs.accepted_proof != Some(Proof::MeasuredLoop);
    let seen = by_design && inputs.proved_by_design == Some(true);
    if inputs.earthed_star == Some(false) && !seen {
        return b.not_judged("Not assessed: this supply is not a star with earthed neutral, so U₀ and the loop are not the ones of this rule. Have the design's own proof of disconnection shown.");
    }
    if let Some((device, site)) = inputs.operating_time.zip(inputs.longest_time)
        && device.seconds() > site.seconds() * (1.0 + 1e-9)
    {
        return b.not_judged(format!(
            "Not assessed: the device's current is entered for {} s, the site allows {} s. Read the current for that time off its curve.",
            significant(device.seconds(), 2),
            significant(site.seconds(), 2)
        ));
    }
    if seen && inputs.design_impedance.is_none() {
        return b.as_figure(
            "No loop impedance measured; the design's own proof of disconnection was seen and is relied on.",
        );
    }
    let Some(full) = limit(&mut b, inputs) else {
        return b.not_assessed();
    };
    let by_calculation = by_design && inputs.design_impedance.is_some();
    let Some(limit) = (if by_calculation { Some(full) } else { measured_limit(&mut b, inputs, full) }) else {
        return b.not_assessed();
    };
    let limit_shown = significant(limit, 3);
    b.limit(format!("loop impedance at most {limit_shown} Ω"));
    b.rule(LimitRule::linear("Ω").at_most(limit, format!("≤ {limit_shown} Ω")));
    if let (true, Some(design)) = (by_design, inputs.design_impedance) {
        return of_the_design(b, design, limit, seen);
    }
    if inputs.accepted_proof == Some(Proof::MeasuredLoop) && inputs.loop_impedance.is_none() {
        b.note("The site takes a measured loop impedance; the design's proof does not stand in.");
    }
    let Some(reading) = positive_reading(&mut b, inputs.loop_impedance.as_ref(), "earth-fault loop impedance") else {
        return b.not_assessed();
    };
    let measured = Measured::direct(&reading);
    let verdict = measured.at_most(limit);
    let shown = significant(measured.value, 3);
    if let Some(to_earth) = inputs.voltage_to_earth {
        let fault = to_earth.volts() / measured.value;
        b.figure("earth-fault current", fault, 3, "A");
        b.line(
            "earth-fault current",
            "U₀/Z_s",
            format!("{} V/{shown} Ω", significant(to_earth.volts(), 4)),
            format!("{} A", significant(fault, 3)),
        );
    }
    mark(&mut b, &measured, format!("{shown} Ω"), verdict);
    b.judged(
        verdict,
        match verdict {
            Verdict::Outside => format!("Loop impedance {shown} Ω, above {limit_shown} Ω: the device need not trip in time. Do not energise; check the protective conductor's joints, the section and the device."),
            Verdict::Marginal => format!("Loop impedance {shown} Ω: the instrument cannot tell it from the {limit_shown} Ω limit, or its accuracy is in doubt."),
            _ => format!("Loop impedance {shown} Ω, at most {limit_shown} Ω."),
        },
    )
}

/// What the design's loop impedance says: beyond the limit it is outside, below a figure, for nobody measured it.
fn of_the_design(mut b: OutcomeBuilder, design: Resistance, limit: f64, seen: bool) -> Outcome {
    let Some(design) = positive(&mut b, Some(design), "loop impedance by design") else { return b.not_assessed() };
    let (shown, limit_shown) = (significant(design.ohms(), 3), significant(limit, 3));
    b.figure("loop impedance by design", design.ohms(), 3, "Ω");
    if Measured::exact(design.ohms()).at_most(limit * (1.0 + 1e-9)) == Verdict::Outside {
        return b.judged(Verdict::Outside, format!("The design's loop impedance is {shown} Ω, above {limit_shown} Ω: the device need not trip in time. Do not energise; ask whoever made the design."));
    }
    if !seen {
        let _ = b.need(None::<Resistance>, "earth-fault loop impedance, or the design's proof as seen");
        return b.not_assessed();
    }
    b.as_figure(format!("No loop impedance measured; the design's is {shown} Ω, at most {limit_shown} Ω, and its proof of disconnection was seen and is relied on."))
}

/// The limit in ohms, with its working.
fn limit(b: &mut OutcomeBuilder, inputs: &Inputs) -> Option<f64> {
    b.need(inputs.earthed_star, "earthing system of the supply")?;
    let to_earth = positive(b, inputs.voltage_to_earth, "nominal volts to earth");
    let operating = positive(b, inputs.operating_current, "operating current of the protective device");
    let (to_earth, operating) = (to_earth?, operating?);
    let ohms = positive(b, Some(largest_loop(to_earth, operating)), "largest loop impedance")?.ohms();
    b.line(
        "limit",
        "Z_s ≤ U₀/I_a",
        format!("{} V/{} A", significant(to_earth.volts(), 4), significant(operating.amperes(), 4)),
        format!("{} Ω", significant(ohms, 3)),
    );
    Some(ohms)
}

/// The limit in ohms of a loop that is measured, with its working.
fn measured_limit(b: &mut OutcomeBuilder, inputs: &Inputs, full: f64) -> Option<f64> {
    let (share, words) = match inputs.site_share {
        Some(share) => (positive(b, Some(share), "share of U₀/Iₐ for a measured loop")?.fraction(), "by the site"),
        None => {
            b.cite(COLD_SHARE.source);
            (COLD_SHARE.value, "measured cold")
        }
    };
    let limit = full * share;
    b.line(
        &format!("limit for a measured loop, {words}"),
        "Z_s(m) ≤ k·U₀/I_a",
        format!("{} × {} Ω", significant(share, 3), significant(full, 3)),
        format!("{} Ω", significant(limit, 3)),
    );
    Some(limit)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::reading::Accuracy;

    fn measured(ohms: f64) -> Inputs {
        let tester = Accuracy {
            percent_of_reading: 5.0,
            digits: 0.0,
            resolution: 0.01,
            percent_of_full_scale: 0.0,
            full_scale: 0.0,
        };
        Inputs {
            loop_impedance: Some(Reading::with(Resistance::from_ohms(ohms), tester)),
            earthed_star: Some(true),
            voltage_to_earth: Some(Voltage::from_volts(230.0)),
            operating_current: Some(Current::from_amperes(320.0)),
            ..Inputs::default()
        }
    }

    /// IEC 60364-4-41 clause 411.4 (from memory): 230 V and a device that needs 320 A allow 0.719 Ω; a loop measured cold
    /// may reach 2/3 of that, 0.479 Ω (IEC 60364-6, informative annex, from memory).
    #[test]
    fn at_just_inside_and_just_outside() {
        for (ohms, verdict) in
            [(0.45, Verdict::Within), (0.479, Verdict::Marginal), (0.50, Verdict::Marginal), (0.51, Verdict::Outside)]
        {
            assert_eq!(check(&measured(ohms)).verdict, verdict, "{ohms}");
        }
        let site = |share, ohms| Inputs { site_share: Some(Ratio::from_fraction(share)), ..measured(ohms) };
        for (share, ohms, verdict) in
            [(1.0, 0.68, Verdict::Within), (1.0, 0.76, Verdict::Outside), (0.5, 0.45, Verdict::Outside)]
        {
            assert_eq!(check(&site(share, ohms)).verdict, verdict, "{share} of it, {ohms}");
        }
        let bare = Inputs { loop_impedance: Some(Reading::bare(Resistance::from_ohms(0.1))), ..measured(0.0) };
        assert_eq!(check(&bare).verdict, Verdict::Marginal);
    }

    #[test]
    fn the_designs_proof_is_a_figure_where_the_site_takes_it() {
        let design = Inputs { proved_by_design: Some(true), ..Inputs::default() };
        assert_eq!(check(&design).verdict, Verdict::Figure);
        assert_eq!(check(&Inputs { proved_by_design: Some(true), ..measured(2.0) }).verdict, Verdict::Outside);
        let reckoned = |ohms| Inputs {
            loop_impedance: None,
            proved_by_design: Some(true),
            design_impedance: Some(Resistance::from_ohms(ohms)),
            ..measured(0.0)
        };
        assert_eq!((check(&reckoned(0.5)).verdict, check(&reckoned(0.8)).verdict), (Verdict::Figure, Verdict::Outside));
        let refused = check(&Inputs { accepted_proof: Some(Proof::MeasuredLoop), ..reckoned(0.5) });
        assert_eq!(refused.missing[0].what, "earth-fault loop impedance");
        assert!(refused.notes.iter().any(|n| n.contains("takes a measured loop")));
    }

    /// IEC 60364-4-41 clause 411.4 (from memory): U₀ and the loop are those of a TN system.
    #[test]
    fn the_earthing_is_never_taken_for_granted() {
        let unknown = check(&Inputs { earthed_star: None, ..measured(0.5) });
        assert_eq!(unknown.missing[0].what, "earthing system of the supply");
        let other = check(&Inputs { earthed_star: Some(false), ..measured(0.5) });
        assert_eq!(other.verdict, Verdict::NotAssessed);
        assert!(other.summary.contains("earthed neutral"), "{}", other.summary);
    }

    /// A device's current holds for the time it was read for (IEC 60364-4-41 clause 411.3.2, from memory).
    #[test]
    fn a_current_for_a_longer_time_than_the_sites_does_not_count() {
        let of = |device, site| Inputs {
            operating_time: Some(Duration::from_seconds(device)),
            longest_time: Some(Duration::from_seconds(site)),
            ..measured(0.45)
        };
        assert_eq!(
            (check(&of(5.0, 0.4)).verdict, check(&of(0.4, 5.0)).verdict),
            (Verdict::NotAssessed, Verdict::Within)
        );
    }

    #[test]
    fn the_limit_is_there_before_the_reading() {
        let outcome = check(&Inputs { loop_impedance: None, ..measured(0.0) });
        assert_eq!((outcome.limit.as_str(), outcome.rule.is_some()), ("loop impedance at most 0.479 Ω", true));
        assert_eq!(outcome.missing[0].what, "earth-fault loop impedance");
        assert_eq!(check(&measured(0.0)).verdict, Verdict::NotAssessed);
        assert_eq!(
            check(&Inputs { operating_current: Some(Current::from_amperes(0.0)), ..measured(0.5) }).verdict,
            Verdict::NotAssessed
        );
    }
}
