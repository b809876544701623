"""Every unit that can be picked, as pint reckons it into the coherent unit of its kind."""

import pint

from written import write

ureg = pint.UnitRegistry(autoconvert_offset_to_baseunit=True)
COHERENT = {
    "voltage": ("volt", {"V": "volt", "kV": "kilovolt", "mV": "millivolt"}),
    "current": ("ampere", {"A": "ampere", "mA": "milliampere", "kA": "kiloampere"}),
    "loop current": ("ampere", {"mA": "milliampere", "A": "ampere"}),
    "power": ("watt", {"kW": "kilowatt", "W": "watt", "MW": "megawatt", "hp": "550 * foot * force_pound / second", "PS": "metric_horsepower"}),
    "apparent power": ("volt * ampere", {"kVA": "kilovolt * ampere", "VA": "volt * ampere", "MVA": "megavolt * ampere"}),
    "frequency": ("hertz", {"Hz": "hertz", "kHz": "kilohertz"}),
    "speed": ("revolution / minute", {"rpm": "revolution / minute", "1/s": "revolution / second"}),
    "number": ("dimensionless", {"": "dimensionless"}),
    "percentage": ("dimensionless", {"%": "percent", "of 1": "dimensionless"}),
    "count": ("dimensionless", {"": "dimensionless"}),
    "resistance": ("ohm", {"Ω": "ohm", "mΩ": "milliohm", "µΩ": "microohm", "kΩ": "kiloohm", "MΩ": "megaohm", "GΩ": "gigaohm", "TΩ": "teraohm"}),
    "temperature": ("degree_Celsius", {"°C": "degree_Celsius", "°F": "degree_Fahrenheit", "K": "kelvin"}),
    "temperature difference": ("delta_degree_Celsius", {"K": "delta_degree_Celsius", "°F": "delta_degree_Fahrenheit"}),
    "time": ("second", {"s": "second", "ms": "millisecond", "min": "minute", "h": "hour"}),
    "length": ("metre", {"m": "metre", "mm": "millimetre", "km": "kilometre", "ft": "foot"}),
    "cross-section": ("millimetre ** 2", {"mm²": "millimetre ** 2", "kcmil": "1000 * circular_mil"}),
    "moment of inertia": ("kilogram * metre ** 2", {"kg·m²": "kilogram * metre ** 2", "lb·ft²": "pound * foot ** 2", "kg·cm²": "kilogram * centimetre ** 2"}),
    "torque": ("newton * metre", {"N·m": "newton * metre", "kN·m": "kilonewton * metre", "lbf·ft": "force_pound * foot", "lbf·in": "force_pound * inch"}),
    "capacitance": ("farad", {"µF": "microfarad", "mF": "millifarad", "F": "farad"}),
    "energy": ("joule", {"J": "joule", "kJ": "kilojoule", "kWh": "kilowatt_hour"}),
    "vibration velocity": ("millimetre / second", {"mm/s": "millimetre / second", "in/s": "inch / second"}),
    "rise time": ("second", {"µs": "microsecond", "ns": "nanosecond"}),
    "mass": ("kilogram", {"kg": "kilogram", "t": "metric_ton", "lb": "pound"}),
    "linear speed": ("metre / second", {"m/s": "metre / second", "m/min": "metre / minute", "ft/min": "foot / minute"}),
}

cases = []
for kind, (coherent, symbols) in COHERENT.items():
    for symbol, name in symbols.items():
        for number in (1.0, 37.5):
            if kind == "temperature":
                found = ureg.Quantity(number, name).to(coherent).magnitude
            else:
                found = (number * ureg.Quantity(1, name) if not name[0].isdigit() else number * ureg(name)).to(coherent).magnitude
            cases.append(dict(id=f"{number} {symbol} of {kind}", kind=kind, symbol=symbol, number=number, expected=dict(coherent=found)))

write("units", "numbers in every unit that can be picked, in the coherent unit of their kind", "pint", cases)
