//! Which charts a record has and at which step each stands: the same on the page and in the package.

use super::{
    Ramp, TorqueSpeed, harmonics, insulation_over_time, load_run, ramp, torque_against_speed, volts_per_hertz,
};
use crate::chart::Chart;
use commissioning::judge::{View, motion};
use commissioning::plant::{Place, Sheet};
use commissioning::record::{EntryPlace, ParameterColumn, ParameterPlace};

/// A chart and its step.
#[derive(Clone, Debug, PartialEq)]
pub struct StepChart {
    /// The step at which it stands.
    pub step: String,
    /// The chart.
    pub chart: Chart,
}

/// Seconds at which the insulation is read, by item.
const TIMED: [(&str, f64); 12] = [
    ("ir-15s", 15.0),
    ("ir-30s", 30.0),
    ("ir-60s", 60.0),
    ("ir-2min", 120.0),
    ("ir-3min", 180.0),
    ("ir-4min", 240.0),
    ("ir-5min", 300.0),
    ("ir-6min", 360.0),
    ("ir-7min", 420.0),
    ("ir-8min", 480.0),
    ("ir-9min", 540.0),
    ("ir-10min", 600.0),
];
/// Orders of the harmonics entered.
const ORDERS: [(&str, f64); 4] = [("input-h5", 5.0), ("input-h7", 7.0), ("input-h11", 11.0), ("input-h13", 13.0)];

/// Every chart for which the record has the numbers, in the order of the work.
#[must_use]
pub fn of(view: &View<'_>) -> Vec<StepChart> {
    let at = |step: &str, chart: Chart| StepChart { step: step.to_owned(), chart };
    let mut charts: Vec<StepChart> = Vec::new();
    charts.extend(insulation(view));
    charts.extend(voltage(view).map(|c| at("uncoupled-run", c)));
    charts.extend(start(view).into_iter().map(|c| at("start-under-load", c)));
    charts.extend(currents(view).map(|c| at("load-run", c)));
    charts.extend(distortion(view).map(|c| at("input-side", c)));
    charts
}

fn entry(view: &View<'_>, item: &str, row: u16) -> Option<f64> {
    view.drive.record.as_ref()?.entry(&EntryPlace::in_row(item, row))?.value.value.number()
}

fn rows(view: &View<'_>, across: &str, up: &str) -> Vec<(f64, f64)> {
    (0..20).filter_map(|row| Some((entry(view, across, row)?, entry(view, up, row)?))).collect()
}

fn motor(view: &View<'_>, field: &str) -> Option<f64> {
    let column = view.drive.field(&Place::new(Sheet::Motor, "column-in-use")).and_then(|t| t.text.parse::<u8>().ok());
    let place = Place::in_column(Sheet::Motor, column.map_or(0, |n| n.saturating_sub(1)), field);
    view.drive.field(&place)?.number()
}

fn setting(view: &View<'_>, function: &str) -> Option<f64> {
    let value = |column| {
        view.drive.record.as_ref()?.parameter(&ParameterPlace { function: function.to_owned(), column })?.number()
    };
    value(ParameterColumn::AsLeft).or_else(|| value(ParameterColumn::Intended))
}

fn insulation(view: &View<'_>) -> Option<StepChart> {
    let read: Vec<(&str, f64, f64)> =
        TIMED.iter().filter_map(|(item, seconds)| Some((*item, *seconds, entry(view, item, 0)? / 1e6))).collect();
    let (last, ..) = read.last()?;
    let step = view.procedure.item(last)?.0.id.clone();
    let points: Vec<(f64, f64)> = read.iter().map(|(_, seconds, megohms)| (*seconds, *megohms)).collect();
    (points.len() > 1).then(|| StepChart { step, chart: insulation_over_time(&points, None) })
}

fn voltage(view: &View<'_>) -> Option<Chart> {
    let measured = rows(view, "run-hz", "run-volts");
    let (volts, hertz) = (motor(view, "volts")?, motor(view, "hertz")?);
    let top = setting(view, "maximum-frequency");
    let end = top.unwrap_or(hertz).max(hertz);
    let line = |base: f64, volts: f64| {
        let mut line = vec![(0.0, 0.0), (base, volts)];
        line.extend((end > base).then_some((end, volts)));
        line
    };
    let set = match (setting(view, "base-frequency"), setting(view, "base-volts")) {
        (Some(base), Some(volts)) => line(base, volts),
        _ => Vec::new(),
    };
    let marks: Vec<(f64, String)> = [("lowest", setting(view, "minimum-frequency")), ("highest", top)]
        .into_iter()
        .filter_map(|(name, at)| Some((at?, name.to_owned())))
        .collect();
    (!measured.is_empty()).then(|| volts_per_hertz(&line(hertz, volts), &set, &measured, &marks))
}

/// The start as predicted, with what was set and measured laid over it; and its torque and current over speed.
fn start(view: &View<'_>) -> Vec<Chart> {
    let Some(trace) = motion::predicted_start(view) else { return Vec::new() };
    let predicted: Vec<(f64, f64)> = trace.samples.iter().map(|s| (s.time.seconds(), s.speed.rpm())).collect();
    let top = predicted.iter().map(|p| p.1).fold(0.0, f64::max);
    let set = setting(view, "acceleration-time").map_or_else(Vec::new, |t| vec![(0.0, 0.0), (t, top)]);
    let measured = match (
        entry(view, "start-time", 0),
        entry(view, "start-to-hertz", 0),
        motor(view, "hertz"),
        motor(view, "rpm"),
    ) {
        (Some(time), Some(to), Some(hertz), Some(rpm)) if hertz > 0.0 => vec![(0.0, 0.0), (time, rpm * to / hertz)],
        _ => Vec::new(),
    };
    let (label, unit, title) = ("speed".to_owned(), "rpm".to_owned(), "Start: speed over time".to_owned());
    let mut charts = vec![ramp(&Ramp { title, label, unit, set, predicted, measured, level: None })];
    if let (Some(power), Some(rpm), Some(amps)) = (motor(view, "power"), motor(view, "rpm"), motor(view, "amps")) {
        // T = P / ω; percent of it.
        let rated = power / (rpm * std::f64::consts::PI / 30.0) / 100.0;
        let over = |pick: fn(&engineering::motion::Sample) -> f64, unit: f64| -> Vec<(f64, f64)> {
            trace.samples.iter().map(|s| (s.speed.rpm(), pick(s) / unit)).collect()
        };
        charts.push(torque_against_speed(&TorqueSpeed {
            motor: over(|s| s.torque.newton_metres(), rated),
            load: over(|s| s.load.newton_metres(), rated),
            current: over(|s| s.current.amperes(), amps / 100.0),
            current_limit: setting(view, "current-limit").map(|limit| limit / amps * 100.0),
        }));
    }
    charts
}

fn currents(view: &View<'_>) -> Option<Chart> {
    let measured = rows(view, "load-hz", "load-i-u");
    (measured.len() > 1).then(|| load_run(&measured, &[], &[], motor(view, "amps")))
}

fn distortion(view: &View<'_>) -> Option<Chart> {
    let bars: Vec<(f64, f64)> =
        ORDERS.iter().filter_map(|(item, n)| Some((*n, entry(view, item, 0)? * 100.0))).collect();
    (!bars.is_empty()).then(|| harmonics(&bars, &[]))
}
