//! Which charts a record has and at which step each stands: the same on the page and in the package.

use super::{
    Ramp, TorqueSpeed, harmonics, insulation_over_time, load_run, ramp, torque_against_speed, volts_per_hertz,
};
use crate::chart::Chart;
use commissioning::judge::{self, Judged, View, motion};
use commissioning::plant::{Place, Sheet};
use commissioning::procedure::Step;
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
    view.procedure.steps().flat_map(|(_, step)| at(view, step)).collect()
}

/// The charts of one step; the others are not worked out.
#[must_use]
pub fn at(view: &View<'_>, step: &Step) -> Vec<StepChart> {
    let has = |wanted: &dyn Fn(&str) -> bool| step.items.iter().any(|i| wanted(&i.key));
    let charts: Vec<Chart> = match step.id.as_str() {
        "uncoupled-run" => voltage(view).into_iter().collect(),
        "start-under-load" => start(view),
        "load-run" => currents(view).into_iter().collect(),
        "input-side" => distortion(view).into_iter().collect(),
        _ => Vec::new(),
    };
    let mut charts: Vec<StepChart> =
        charts.into_iter().map(|chart| StepChart { step: step.id.clone(), chart }).collect();
    if has(&|key| TIMED.iter().any(|(timed, _)| *timed == key)) {
        charts.extend(insulation(view));
    }
    if has(&|key| key == "ramp-down-time") {
        charts.extend(ramp_down(view));
    }
    charts.retain(|c| c.step == step.id);
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
    let limit = least_insulation(view);
    let limit = limit.as_ref().map(|(at, label)| (*at, label.as_str()));
    (points.len() > 1).then(|| StepChart { step, chart: insulation_over_time(&points, limit) })
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

/// A ramp of the record: where it is drawn from, and what was read of it.
struct Read {
    title: &'static str,
    up: bool,
    time: Option<f64>,
}

/// The ramp as set, S-curve and all, as predicted and as measured; none while there is nothing but the setting.
fn ramp_of(run: &motion::AsRun, read: &Read) -> Option<Chart> {
    let top = run.speed.map(engineering::Speed::rpm);
    // The part of the speed that there is after a part of the time.
    let height = |done: f64| if read.up { done } else { 1.0 - done };
    let set = run.set.zip(top).map_or_else(Vec::new, |(set, top)| {
        let steps = if set.s_curve.fraction() > 0.0 { 40 } else { 1 };
        (0..=steps)
            .map(|n| f64::from(n) / f64::from(steps))
            .map(|part| (part * set.time.seconds(), height(set.part_done(part)) * top))
            .collect()
    });
    let predicted: Vec<(f64, f64)> = run
        .predicted
        .iter()
        .flat_map(|trace| trace.samples.iter().map(|s| (s.time.seconds(), s.speed.rpm())))
        .collect();
    let measured = read
        .time
        .zip(top)
        .map_or_else(Vec::new, |(time, top)| vec![(0.0, height(0.0) * top), (time, height(1.0) * top)]);
    if predicted.is_empty() && measured.is_empty() {
        return None;
    }
    let (label, unit, title) = ("speed".to_owned(), "rpm".to_owned(), read.title.to_owned());
    Some(ramp(&Ramp { title, label, unit, set, predicted, measured, level: None }))
}

fn ramp_down(view: &View<'_>) -> Option<StepChart> {
    let step = view.procedure.item("ramp-down-time")?.0.id.clone();
    let time = entry(view, "ramp-down-time", 0);
    let read = Read { title: "Ramp down: speed over time", up: false, time };
    Some(StepChart { step, chart: ramp_of(&motion::ramp_down(view), &read)? })
}

/// The start, and its torque and current over speed.
fn start(view: &View<'_>) -> Vec<Chart> {
    let read = Read { title: "Start: speed over time", up: true, time: entry(view, "start-time", 0) };
    let mut charts: Vec<Chart> = ramp_of(&motion::start(view), &read).into_iter().collect();
    let Some(trace) = motion::predicted_start(view) else { return charts };
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

/// A figure of a check by its name.
fn figure(judged: &Judged, name: &str) -> Option<f64> {
    judged.outcome.figures.iter().find(|f| f.name == name)?.value.parse().ok()
}

fn currents(view: &View<'_>) -> Option<Chart> {
    let measured = rows(view, "load-hz", "load-i-u");
    // The check runs for every row with a current, in the order of the rows.
    let hertz = (0..20).filter(|row| entry(view, "load-i-u", *row).is_some()).map(|row| entry(view, "load-hz", row));
    let judged: Vec<(Option<f64>, Judged)> = hertz.zip(judge::one(view, "load-current")).collect();
    let predicted = |name: &str| -> Vec<(f64, f64)> {
        judged.iter().filter_map(|(hertz, judged)| Some(((*hertz)?, figure(judged, name)?))).collect()
    };
    (measured.len() > 1).then(|| {
        let (low, high) = (predicted("predicted current, least"), predicted("predicted current, most"));
        load_run(&measured, &low, &high, motor(view, "amps"))
    })
}

fn distortion(view: &View<'_>) -> Option<Chart> {
    let bars: Vec<(f64, f64)> =
        ORDERS.iter().filter_map(|(item, n)| Some((*n, entry(view, item, 0)? * 100.0))).collect();
    let limits: Vec<(f64, f64)> = judge::harmonic_limits(view)
        .into_iter()
        .map(|(order, limit)| (f64::from(order), limit.fraction() * 100.0))
        .filter(|(order, _)| bars.iter().any(|(n, _)| n == order))
        .collect();
    (!bars.is_empty()).then(|| harmonics(&bars, &[], &limits))
}

/// The least insulation resistance, turned from 40 °C, where it is judged, to the winding's temperature, where it is read.
fn least_insulation(view: &View<'_>) -> Option<(f64, String)> {
    let judged = judge::one(view, "insulation-resistance");
    let judged = judged.first()?;
    let limit = judged.outcome.rule.as_ref()?.ticks.first()?;
    let factor = figure(judged, "correction factor").filter(|k| *k > 0.0)?;
    Some((limit.at / factor, format!("{} at 40 °C", limit.label)))
}

#[cfg(test)]
mod tests {
    use super::*;
    use engineering::motion::SetRamp;
    use engineering::{Duration, Ratio, Speed};

    fn of_ten_seconds(s_curve: f64) -> motion::AsRun {
        let set = SetRamp { time: Duration::from_seconds(10.0), s_curve: Ratio::from_fraction(s_curve) };
        motion::AsRun { set: Some(set), speed: Some(Speed::from_rpm(1600.0)), predicted: None }
    }

    fn series(chart: &Chart, name: &str) -> Vec<(f64, f64)> {
        chart.series.iter().find(|s| s.name == name).unwrap().points.clone()
    }

    /// By hand, s = 0.4: after 0.1 of the time 1/32 of the speed, after 0.2 an eighth, at half time half.
    #[test]
    fn the_set_line_follows_the_s_curve_both_ways() {
        for up in [true, false] {
            let read = Read { title: "Ramp", up, time: Some(11.0) };
            let chart = ramp_of(&of_ten_seconds(0.4), &read).unwrap();
            let set = series(&chart, "as set");
            for (time, part) in [(0.0, 0.0), (1.0, 1.0 / 32.0), (2.0, 0.125), (5.0, 0.5), (8.0, 0.875), (10.0, 1.0)] {
                let rpm = 1600.0 * if up { part } else { 1.0 - part };
                assert!(set.iter().any(|(t, n)| (t - time).abs() < 1e-9 && (n - rpm).abs() < 1e-6), "{time}: {set:?}");
            }
            assert!(set.windows(2).all(|p| p[0].0 < p[1].0 && (p[0].1 < p[1].1) == up), "even in time and speed");
            let ends = if up { [(0.0, 0.0), (11.0, 1600.0)] } else { [(0.0, 1600.0), (11.0, 0.0)] };
            assert_eq!(series(&chart, "measured"), ends);
        }
    }

    #[test]
    fn a_straight_ramp_is_two_points_and_a_setting_alone_is_no_chart() {
        let read = |time| Read { title: "Ramp", up: true, time };
        let chart = ramp_of(&of_ten_seconds(0.0), &read(Some(11.0))).unwrap();
        assert_eq!(series(&chart, "as set"), [(0.0, 0.0), (10.0, 1600.0)]);
        assert_eq!(ramp_of(&of_ten_seconds(0.4), &read(None)), None);
    }
}
