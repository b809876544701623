"""Writes a set of figures as JSON: what they are, from what, with which versions, to twelve significant digits."""

import json
import pathlib
import platform

import numpy
import pint
import scipy

HERE = pathlib.Path(__file__).parent


def rounded(value):
    if isinstance(value, dict):
        return {key: rounded(one) for key, one in value.items()}
    if isinstance(value, (list, tuple)):
        return [rounded(one) for one in value]
    if isinstance(value, bool) or isinstance(value, str) or value is None or isinstance(value, int):
        return value
    return float(f"{float(value):.12g}")


def write(name, what, method, cases):
    versions = {
        "python": platform.python_version(),
        "numpy": numpy.__version__,
        "scipy": scipy.__version__,
        "pint": pint.__version__,
    }
    body = {"what": what, "method": method, "versions": versions, "cases": rounded(cases)}
    text = json.dumps(body, indent=1, ensure_ascii=False) + "\n"
    (HERE / f"{name}.json").write_text(text, encoding="utf-8")
    print(f"{name}.json: {len(cases)} cases")
