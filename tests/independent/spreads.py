"""Robust spread and the exponent of a power law, by numpy and scipy.stats."""

import numpy as np
from scipy import stats

from written import write


def spread(name, values):
    x = np.array(values)
    mad = stats.median_abs_deviation(x)
    median = np.median(x)
    scale = mad / 0.6745 if mad > 0 else 1.253314 * np.mean(np.abs(x - median))
    expected = dict(median=median, mad=mad, scores=list((x - median) / scale))
    return dict(id=name, kind="spread", values=list(values), expected=expected)


def exponent(name, x, y):
    fit = stats.linregress(np.log(x), np.log(y))
    half = fit.stderr * stats.t.ppf(0.975, len(x) - 2)
    expected = dict(exponent=fit.slope, intercept=fit.intercept, half_interval=half)
    return dict(id=name, kind="power-law", x=list(x), y=list(y), expected=expected)


draw = np.random.default_rng(20261117)
cases = [spread(f"{n} sisters", draw.normal(12.0, 0.4, n).round(3)) for n in (4, 5, 8, 13)]
cases.append(spread("one far off", [*draw.normal(7.5, 0.05, 7).round(3), 9.1]))
cases.append(spread("more than half equal", [3.0, 3.0, 3.0, 3.0, 3.2, 2.9]))
for power, count in ((2.0, 3), (1.93, 5), (1.0, 6), (0.05, 4), (2.9, 12)):
    speeds = np.linspace(10.0, 50.0, count)
    torques = 0.03 * speeds**power * np.exp(draw.normal(0.0, 0.02, count))
    cases.append(exponent(f"power {power}, {count} points", speeds.round(2), torques.round(5)))

write(
    "spreads",
    "modified z-scores of sisters, and the exponent of a load's curve with its 95 % interval",
    "scipy.stats.median_abs_deviation, scipy.stats.linregress, scipy.stats.t",
    cases,
)
