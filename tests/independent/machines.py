"""Induction machines by their equivalent circuit, with complex numbers; breakdown and rated slip by scipy.optimize."""

import cmath
import math

from scipy.optimize import brentq, minimize_scalar

from written import write

MACHINES = [
    dict(
        id="Fitzgerald 6.2", source="Fitzgerald, Kingsley, Umans, Electric Machinery, Ex. 6.2 and 6.3; at 10 hp shaft power",
        volts=220.0, hertz=60.0, pole_pairs=3, r1=0.294, x1=0.503, r2=0.144, x2=0.209, xm=13.25, iron=None,
        rotational_w=403.0, rated_w=7460.0,
    ),
    dict(
        id="Chapman 7-3", source="Chapman, Electric Machinery Fundamentals, Ex. 7-3 and 7-5; at 25 hp shaft power",
        volts=460.0, hertz=60.0, pole_pairs=2, r1=0.641, x1=1.106, r2=0.332, x2=0.464, xm=26.3, iron=None,
        rotational_w=1100.0, rated_w=18642.5,
    ),
    dict(
        id="Hubert 5.2", source="Hubert, Electric Machines, Ex. 5.2; at the slip of the example, 0.0125",
        volts=460.0, hertz=60.0, pole_pairs=3, r1=0.200, x1=1.20, r2=0.250, x2=1.29, xm=42.0, iron=317.0,
        rotational_w=166.0, rated_w=None, rated_slip=0.0125,
    ),
]


def point(m, s):
    shunt = 1j * m["xm"] if m["iron"] is None else 1.0 / (1.0 / (1j * m["xm"]) + 1.0 / m["iron"])
    rotor = m["r2"] / s + 1j * m["x2"]
    field = rotor * shunt / (rotor + shunt)
    v = m["volts"] / math.sqrt(3.0)
    i1 = v / (m["r1"] + 1j * m["x1"] + field)
    i2 = i1 * field / rotor
    gap = 3.0 * abs(i2) ** 2 * m["r2"] / s
    w_s = math.tau * m["hertz"] / m["pole_pairs"]
    return dict(
        current_a=abs(i1), power_factor=math.cos(cmath.phase(i1)), air_gap_w=gap, torque=gap / w_s,
        shaft_w=gap * (1.0 - s) - m["rotational_w"],
    )


def solve(m):
    m = dict(m)
    top = minimize_scalar(lambda s: -point(m, s)["torque"], bounds=(1e-3, 1.0), method="bounded", options=dict(xatol=1e-10))
    if m["rated_w"] is None:
        slip = m["rated_slip"]
        m["rated_w"] = point(m, slip)["shaft_w"]
    else:
        slip = brentq(lambda s: point(m, s)["shaft_w"] - m["rated_w"], 1e-5, top.x * 0.9, xtol=1e-14)
    m.pop("rated_slip", None)
    rated = point(m, slip)
    shunt = 1j * m["xm"] if m["iron"] is None else 1.0 / (1.0 / (1j * m["xm"]) + 1.0 / m["iron"])
    idle = m["volts"] / math.sqrt(3.0) / abs(m["r1"] + 1j * m["x1"] + shunt)
    loads = []
    for share in (0.25, 0.5, 0.75, 1.0, 1.25):
        s = brentq(lambda s: point(m, s)["torque"] - share * rated["torque"], 1e-7, top.x, xtol=1e-14)
        loads.append(dict(torque_share=share, slip=s, current_a=point(m, s)["current_a"]))
    expected = dict(
        rated_slip=slip, rated=rated, idle_a=idle, breakdown_slip=top.x, breakdown_torque=-top.fun,
        breakdown_ratio=-top.fun / rated["torque"], start=point(m, 1.0), by_torque=loads,
    )
    return {**m, "expected": expected}


write(
    "machines",
    "induction machines solved exactly, at rated load, at breakdown, at standstill and at shares of rated torque",
    "complex arithmetic; scipy.optimize.brentq and minimize_scalar",
    [solve(m) for m in MACHINES],
)
