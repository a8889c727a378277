"""Integrates the circuit of BenchmarkForecast with scipy's solve_ivp.

Prints, for each of some runs, the seconds that it takes, then the wastage of
each group at the end. The potential is in closed form and the groups are numpy
arrays: as fast as it can be for an integrator. A group that reaches its
utilisation factor is an event, after which it gives nothing; where none does,
no event is looked for.
"""
import json
import sys
import time

import numpy as np
from scipy.integrate import solve_ivp

case = json.load(sys.stdin)
count, start = np.array(case["count"]), np.array(case["wastage"])
L, R0, DENSITY, CAPACITY, RHO, HOURS = 2.0, 0.09, 2700.0, 2500.0, 0.25, 8760.0
ANODE, CORROSION, PROTECTIVE = -1.05, -0.65, -0.80
MASS = np.pi * R0 * R0 * L * DENSITY
STEEP = 1 / (CORROSION - PROTECTIVE)


def slope(t, w, live):
    r = R0 * np.sqrt(np.maximum(1e-12, 1 - w))
    g = live * count / (RHO * (np.log(4 * L / r) - 1) / (2 * np.pi * L))
    total = g.sum()
    demand = case["demand"][0] + case["demand"][1] * t
    e = (total * ANODE + demand * STEEP * CORROSION) / (total + demand * STEEP)
    if case["level"] and e < PROTECTIVE:
        e = ANODE + demand / total
    return HOURS * g * (e - ANODE) / (count * MASS * CAPACITY)


def event(j):
    def reached(t, w, live):
        return w[j] - case["utilisation"]
    reached.terminal = True
    return reached


def run():
    t, w, live = 0.0, start, np.ones(len(start))
    while t < case["years"] and live.any():
        events = [event(j) for j in range(len(start)) if live[j]] if case["spent"] else None
        s = solve_ivp(slope, (t, case["years"]), w, method="DOP853", rtol=1e-10, atol=1e-12, events=events, args=(live,))
        t, w = s.t[-1], s.y[:, -1]
        live = live * (w < case["utilisation"] - 1e-9)
    return w


runs = []
for _ in range(case["runs"]):
    began = time.perf_counter()
    end = run()
    runs.append(time.perf_counter() - began)
json.dump({"seconds": sorted(runs), "wastage": list(end)}, sys.stdout)
