"""Ramps up and down as differential equations in time, solved by scipy; nothing here shares code with the program.

The motor gives T_N/r * sqrt(I^2 - (I_m/r)^2)/sqrt(I_N^2 - I_m^2) within a current I, r = max(n/n_N, 1), the end of
the bracket of I_m that gives less, at most lambda*T_N/(1.3 r^2). The drive slows or speeds by the set rate, or by what
the torque allows where that is less. Integrated over time: speed, I^2, (I/I_N)^2 - 1 above rated, energy returned.
"""

import math

import numpy as np
from scipy.integrate import solve_ivp

from written import write

RAD = math.tau / 60.0
MOTORS = {
    "15 kW": dict(power_w=15e3, rpm=1470.0, amps=28.5, cosine=0.85, breakdown=3.0),
    "55 kW": dict(power_w=55e3, rpm=1482.0, amps=98.0, cosine=0.86, breakdown=2.4),
}


class Motor:
    def __init__(self, power_w, rpm, amps, cosine, breakdown):
        self.w_n = rpm * RAD
        self.t_n = power_w / self.w_n
        self.i_n = amps
        self.lam = breakdown
        sine = math.sqrt(1.0 - cosine**2)
        low = amps * (sine - cosine * (breakdown - math.sqrt(breakdown**2 - 1.0)))
        self.ends = (max(low, 0.0), amps * sine)

    def weakening(self, w):
        return max(abs(w) / self.w_n, 1.0)

    def torque(self, limit, w):
        r = self.weakening(w)
        least = min(
            self.t_n / r * math.sqrt(max(limit**2 - (m / r) ** 2, 0.0) / (self.i_n**2 - m**2)) for m in self.ends
        )
        return min(least, self.lam * self.t_n / (1.3 * r * r))

    def current(self, torque, w):
        r = self.weakening(w)
        x = torque / self.t_n * r
        return max(math.sqrt((m / r) ** 2 + (self.i_n**2 - m**2) * x * x) for m in self.ends)


def load_torque(load, w):
    kind = load["kind"]
    x = abs(w) / (load.get("rpm", 1.0) * RAD)
    t = load.get("torque", 0.0)
    if kind == "constant":
        return t
    if kind == "linear":
        return t * x
    if kind == "quadratic":
        return t * x * x
    if kind == "lifted":
        return load["at_rest"] + (t - load["at_rest"]) * x * x
    if kind == "constant-power":
        return load["power_w"] / max(abs(w), load["rpm"] * RAD)
    raise ValueError(kind)


def set_rate(case, done):
    """The set ramp's acceleration, rad/s^2, where this part of the change is done: v = sqrt(2*jerk*dw) in the ends."""
    if case["set_s"] is None:
        return math.inf
    change = abs(case["to_rpm"] - case["from_rpm"]) * RAD
    s, total = case["s_curve"], case["set_s"]
    straight = change / (total * (1.0 - s / 2.0))
    if s == 0.0:
        return straight
    jerk = straight / (s * total / 2.0)
    near = min(done, 1.0 - done) * change
    return min(straight, math.sqrt(2.0 * jerk * max(near, 0.0)))


def run(case):
    motor = Motor(**MOTORS[case["motor"]])
    inertia, load, limit = case["inertia"], case["load"], case["limit_a"]
    start, end = case["from_rpm"] * RAD, case["to_rpm"] * RAD
    up = end > start
    change = abs(end - start)
    eased = case["set_s"] is not None and case["s_curve"] > 0.0

    def state(w):
        done = abs(w - start) / change
        if up:
            possible = (motor.torque(limit, w) - load_torque(load, w)) / inertia
        else:
            possible = (motor.torque(limit, w) + load_torque(load, w)) / inertia
        rate = min(possible, set_rate(case, done))
        sign = 1.0 if up else -1.0
        motor_torque = load_torque(load, w) + inertia * rate * sign
        return rate, motor_torque

    # A rounded end begins with no acceleration at all: start a hair beyond it, at the time that the hair takes.
    hair = 1e-8 if eased else 0.0
    jerk = change / (case["set_s"] ** 2 * (1 - case["s_curve"] / 2) * case["s_curve"] / 2) if eased else math.inf
    lost = math.sqrt(2.0 * hair * change / jerk) if eased else 0.0

    def slope(_, y):
        w = y[0]
        rate, torque = state(w)
        amps = motor.current(torque, w)
        excess = max((amps / motor.i_n) ** 2 - 1.0, 0.0)
        back = -torque * w - case.get("losses_w", 0.0)
        return [rate if up else -rate, amps * amps, excess, back]

    arrived = lambda _, y: abs(y[0] - start) / change - (1.0 - hair)
    arrived.terminal = True
    begin = start + (hair * change if up else -hair * change)
    whole = case["set_s"] if case["set_s"] is not None else 10.0
    found = solve_ivp(
        slope, (0.0, 500.0 * whole), [begin, 0.0, 0.0, 0.0], method="DOP853",
        events=arrived, rtol=1e-9, atol=1e-9, max_step=whole / 200.0,
    )
    assert found.status == 1, case["id"]
    time = found.t[-1] + 2.0 * lost
    torques = np.array([state(w)[1] for w in found.y[0]])
    currents = np.array([motor.current(t, w) for t, w in zip(torques, found.y[0])])
    expected = {
        "time_s": time,
        "peak_torque": float(np.max(np.abs(torques))),
        "peak_current_a": float(np.max(currents)),
        "rms_current_a": math.sqrt(found.y[1][-1] / (time if not eased else found.t[-1])),
        "excess_heat_s": found.y[2][-1],
    }
    if not up and "bus_v" in case:
        joules = np.maximum(found.y[3], 0.0)
        # Only runs that return energy all the way: then nothing is ever taken below rest, and the last is the most.
        assert np.all(np.diff(found.y[3]) >= -1e-6), case["id"]
        expected["bus_peak_v"] = math.sqrt(case["bus_v"] ** 2 + 2.0 * float(np.max(joules)) / case["farads"])
    return {**case, "expected": expected}


def cases():
    fan = dict(kind="quadratic", torque=70.0, rpm=1470.0)
    belt = dict(kind="constant", torque=55.0)
    mixer = dict(kind="linear", torque=60.0, rpm=1470.0)
    pump = dict(kind="lifted", at_rest=25.0, torque=85.0, rpm=1470.0)
    spindle = dict(kind="constant-power", power_w=6e3, rpm=900.0)
    big_fan = dict(kind="quadratic", torque=300.0, rpm=1482.0)
    base = dict(motor="15 kW", from_rpm=0.0, s_curve=0.0)
    yield dict(base, id="constant, fastest", inertia=1.2, load=belt, limit_a=31.0, to_rpm=1470.0, set_s=None)
    yield dict(base, id="quadratic, fastest", inertia=4.0, load=fan, limit_a=31.0, to_rpm=1470.0, set_s=None)
    yield dict(base, id="linear, fastest", inertia=2.0, load=mixer, limit_a=29.0, to_rpm=1470.0, set_s=None)
    yield dict(base, id="lifted, fastest", inertia=1.0, load=pump, limit_a=34.0, to_rpm=1470.0, set_s=None)
    yield dict(base, id="into field weakening, fastest", inertia=0.8, load=spindle, limit_a=35.0, to_rpm=2600.0, set_s=None)
    yield dict(base, id="weakening up to the breakdown ceiling", inertia=0.8, load=dict(kind="constant", torque=12.0), limit_a=60.0, to_rpm=3600.0, set_s=None)
    yield dict(base, id="quadratic, long ramp", inertia=4.0, load=fan, limit_a=31.0, to_rpm=1470.0, set_s=40.0)
    yield dict(base, id="quadratic, stretched", inertia=4.0, load=fan, limit_a=31.0, to_rpm=1470.0, set_s=10.0)
    yield dict(base, id="constant, above rated current", inertia=1.2, load=belt, limit_a=45.0, to_rpm=1470.0, set_s=2.5)
    yield dict(base, id="between two speeds, weakening, stretched", inertia=0.8, load=spindle, limit_a=35.0, from_rpm=1000.0, to_rpm=2600.0, set_s=1.5)
    yield dict(base, motor="55 kW", id="large fan, stretched near the end", inertia=30.0, load=big_fan, limit_a=104.0, to_rpm=1480.0, set_s=25.0)
    for share in (0.2, 0.5, 1.0):
        yield dict(base, id=f"constant, S-curve {share}", inertia=1.2, load=belt, limit_a=60.0, to_rpm=1470.0, set_s=5.0, s_curve=share)
        yield dict(base, id=f"quadratic, S-curve {share}, stretched", inertia=4.0, load=fan, limit_a=31.0, to_rpm=1470.0, set_s=12.0, s_curve=share)
    down = dict(motor="15 kW", to_rpm=0.0, s_curve=0.0, bus_v=565.0, farads=3300e-6, losses_w=0.0)
    light = dict(kind="constant", torque=10.0)
    yield dict(down, id="down, constant load", inertia=1.5, load=light, limit_a=40.0, from_rpm=1480.0, set_s=5.0)
    yield dict(down, id="down, pulling load", inertia=1.5, load=dict(kind="constant", torque=-20.0), limit_a=40.0, from_rpm=1480.0, set_s=5.0)
    yield dict(down, id="down, stretched by the limit", inertia=3.0, load=light, limit_a=20.0, from_rpm=1480.0, set_s=2.0)
    yield dict(down, id="down out of weakening", inertia=1.5, load=light, limit_a=30.0, from_rpm=2600.0, set_s=4.0)
    yield dict(down, id="down, quadratic load", inertia=4.0, load=dict(kind="quadratic", torque=30.0, rpm=1470.0), limit_a=40.0, from_rpm=1470.0, set_s=8.0)
    yield dict(down, id="down, fastest", inertia=1.5, load=light, limit_a=28.5, from_rpm=1480.0, set_s=None)
    without = {key: value for key, value in down.items() if key not in ("bus_v", "farads", "losses_w")}
    yield dict(without, id="down, S-curve 0.5", inertia=1.5, load=light, limit_a=60.0, from_rpm=1480.0, set_s=5.0, s_curve=0.5)


write(
    "ramps",
    "ramps up and down: time, peak torque and current, r.m.s. current, heat beyond rated, bus peak",
    "scipy.integrate.solve_ivp, DOP853 in time, relative tolerance 1e-9",
    [run(case) for case in cases()],
)
