# SPDX-License-Identifier: GPL-3.0-or-later
"""The computed quantities of 120 readings of a 12-cylinder engine with their uncertainties, as one would write it with
pandas and scipy. bench_derived runs it beside the program's own. Prints: milliseconds for all readings at once
(columns of pandas as arrays, one central difference an input), milliseconds reading by reading (scipy's numerical gradient), and
compressor efficiency with its half-width, so that the two can be seen to agree."""
import sys
import time

try:
    import numpy as np
    import pandas as pd
    from scipy.optimize import approx_fprime
except ImportError as missing:
    print(f"skipped: {missing}")
    sys.exit(0)

CYLINDERS, READINGS = 12, 120
VALUES = {"speed": 95.4, "power": 9000.0, "fuel": 1600.0, "heat": 42.0, "inlet": 30.0, "humidity": 90.0,
          "barometer": 1.013, "scavenge": 2.2, "scavenge_t": 42.0, "receiver": 2.0, "outlet": 170.0, "filter": 10.0,
          "before": 390.0, "back": 25.0, "drop": 15.0, "cooler_out": 41.0, "coolant": 32.0, "log": 14.0}
HALVES = {"speed": 0.0954, "power": 270.0, "fuel": 24.0, "heat": 0.21, "inlet": 1.0, "humidity": 5.0,
          "barometer": 0.001, "scavenge": 0.022, "scavenge_t": 1.0, "receiver": 0.02, "outlet": 2.0, "filter": 0.5,
          "before": 5.0, "back": 1.0, "drop": 0.5, "cooler_out": 1.0, "coolant": 1.0, "log": 0.42}
for i in range(CYLINDERS):
    VALUES[f"mip{i}"], HALVES[f"mip{i}"] = 16.0, 0.48
    VALUES[f"comp{i}"], HALVES[f"comp{i}"] = 120.0, 2.4
SWEPT = np.pi / 4.0 * 0.6 ** 2 * 2.4


def saturation(celsius):
    """IAPWS-IF97, region 4, Pa."""
    n = [0.11670521452767e4, -0.72421316703206e6, -0.17073846940092e2, 0.12020824702470e5, -0.32325550322333e7,
         0.14915108613530e2, -0.48232657361591e4, 0.40511340542057e6, -0.23855557567849, 0.65017534844798e3]
    kelvin = celsius + 273.15
    theta = kelvin + n[8] / (kelvin - n[9])
    a, b = theta ** 2 + n[0] * theta + n[1], n[2] * theta ** 2 + n[3] * theta + n[4]
    c = n[5] * theta ** 2 + n[6] * theta + n[7]
    return 1e6 * (2 * c / (-b + np.sqrt(b * b - 4 * a * c))) ** 4


def ratio(x):
    return (x["scavenge"] + x["barometer"] + x["drop"] * 1e-3) / (x["barometer"] - x["filter"] * 1e-3)


def compressor(x):
    return (x["inlet"] + 273.15) * (ratio(x) ** 0.286 - 1) / (x["outlet"] - x["inlet"])


def turbocharger(x):
    expansion = (x["back"] * 1e-3 + x["barometer"]) / (x["receiver"] + x["barometer"])
    return (1.005 / 1.09 / 1.02 * (x["inlet"] + 273.15) * (ratio(x) ** 0.286 - 1)
            / ((x["before"] + 273.15) * (1 - expansion ** 0.265)))


def condensate(x):
    share = np.minimum(x["humidity"] / 100.0, 1.0)
    steam, full = share * saturation(x["inlet"]), saturation(x["scavenge_t"])
    drawn = 0.6219546 * steam / (x["barometer"] * 1e5 - steam)
    return 1000.0 * np.maximum(0.0, drawn - 0.6219546 * full / ((x["scavenge"] + x["barometer"]) * 1e5 - full))


def indicated(x, i):
    return x[f"mip{i}"] * 1e5 * SWEPT * x["speed"] / 60.0 / 1e3


MIPS = [f"mip{i}" for i in range(CYLINDERS)]
AIR = ["scavenge", "barometer", "drop", "filter"]
FORMULAS = [(indicated_sum := (lambda x: sum(indicated(x, i) for i in range(CYLINDERS))), MIPS + ["speed"]),
            (lambda x: x["power"] * 1e3 / (CYLINDERS * SWEPT * x["speed"] / 60.0) * 1e-5, ["power", "speed"]),
            (lambda x: x["power"] / indicated_sum(x), MIPS + ["speed", "power"]),
            (lambda x: 1000.0 * x["fuel"] / x["power"] * x["heat"] / 42.7, ["fuel", "power", "heat"]),
            (ratio, AIR), (compressor, AIR + ["inlet", "outlet"]),
            (turbocharger, AIR + ["inlet", "before", "receiver", "back"]),
            (lambda x: turbocharger(x) / compressor(x), AIR + ["inlet", "outlet", "before", "receiver", "back"]),
            (lambda x: (x["outlet"] - x["cooler_out"]) / (x["outlet"] - x["coolant"]), ["outlet", "cooler_out", "coolant"]),
            (lambda x: x["scavenge_t"] - x["coolant"], ["scavenge_t", "coolant"]),
            (lambda x: x["cooler_out"] - x["coolant"], ["cooler_out", "coolant"]),
            (condensate, ["inlet", "humidity", "barometer", "scavenge", "scavenge_t"]),
            (lambda x: 100.0 * (1 - x["log"] * 1852.0 / 60.0 / 4.8 / x["speed"]), ["log", "speed"]),
            (lambda x: 100.0 * (x["speed"] / 105.0 / (x["power"] / 12000.0) ** (1 / 3) - 1), ["speed", "power"])]
for i in range(CYLINDERS):
    FORMULAS.append((lambda x, i=i: indicated(x, i), [f"mip{i}", "speed"]))
    FORMULAS.append((lambda x, i=i: (x[f"comp{i}"] + x["barometer"]) / (x["scavenge"] + x["barometer"]),
                     [f"comp{i}", "barometer", "scavenge"]))


def half_width(parts, names):
    own = sum(part ** 2 for part, name in zip(parts, names) if not name.startswith("mip"))
    return np.sqrt(own + sum(part for part, name in zip(parts, names) if name.startswith("mip")) ** 2)


def by_columns(table):
    found, columns = {}, {name: table[name].to_numpy() for name in table.columns}
    for number, (formula, names) in enumerate(FORMULAS):
        parts, moved = [], dict(columns)
        for name in names:
            step = 1e-3 * HALVES[name]
            moved[name] = columns[name] + step
            above = formula(moved)
            moved[name] = columns[name] - step
            parts.append((above - formula(moved)) / (2e-3))
            moved[name] = columns[name]
        found[f"value{number}"] = formula(columns)
        found[f"half{number}"] = half_width(parts, names)
    return pd.DataFrame(found)


def by_rows(table):
    last = None
    for row in table.to_dict("records"):
        for formula, names in FORMULAS:
            at = np.array([row[name] for name in names])
            steps = np.array([1e-3 * HALVES[name] for name in names])
            value = formula(row)
            gradient = approx_fprime(at, lambda x: formula({**row, **dict(zip(names, x))}), steps)
            parts = gradient * np.array([HALVES[name] for name in names])
            last = (value, half_width(parts, names))
    return last


def milliseconds(work, runs):
    best = float("inf")
    for _ in range(runs):
        start = time.process_time()
        work()
        best = min(best, time.process_time() - start)
    return best * 1e3


data = pd.DataFrame([VALUES] * READINGS)
result = by_columns(data)
print(milliseconds(lambda: by_columns(data), 5), milliseconds(lambda: by_rows(data), 1),
      result["value5"].iloc[0], result["half5"].iloc[0])
