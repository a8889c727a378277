"""Makes the recorded runs of anodes/forecast by an independent integrator.

Run with Debian's python3-scipy: python3 make.py. Each case is one circuit:
rods of one alloy and size with different counts and starts, a steel curve, and
a demand that changes linearly. solve_ivp (DOP853, rtol 1e-12) integrates the
wastage of each group; the potential balances by brentq at every step; a group
that reaches its utilisation factor is found as an event and gives no more.
"""
import json
import math

from scipy.integrate import solve_ivp
from scipy.optimize import brentq

L, R0, DENSITY, CAPACITY = 2.0, 0.09, 2700.0, 2500.0
MASS = math.pi * R0 * R0 * L * DENSITY
CORROSION, PROTECTIVE, HOURS = -0.65, -0.80, 8760.0


def resistance(w, rho):
    r = R0 * math.sqrt(max(1e-12, 1 - w))
    return rho * (math.log(4 * L / r) - 1) / (2 * math.pi * L)


def curve(name, e):
    if e >= CORROSION:
        return 0.0
    s = (CORROSION - e) / (CORROSION - PROTECTIVE)
    return min(1.0, s) if name == "level" else s


def potential(case, t, w, spent):
    demand = case["demand"][0] + case["demand"][1] * t

    def excess(e):
        given = sum(
            g["count"] * max(0.0, e - g["potential"]) / resistance(w[j], case["rho"])
            for j, g in enumerate(case["groups"]) if not spent[j])
        return given - demand * curve(case["curve"], e)

    if all(spent):
        return CORROSION
    return brentq(excess, -1.2, CORROSION, xtol=1e-15, rtol=8.9e-16)


def run(case):
    groups = case["groups"]
    w = [g["wastage"] for g in groups]
    spent = [False] * len(groups)
    t, years = 0.0, case["years"]
    while t < years and not all(spent):
        def slope(t, w):
            e = potential(case, t, w, spent)
            return [0.0 if spent[j] else HOURS * max(0.0, e - g["potential"]) / resistance(w[j], case["rho"]) / (MASS * CAPACITY)
                    for j, g in enumerate(groups)]

        def event(j):
            def f(t, w):
                return w[j] - groups[j]["utilisation"]
            f.terminal, f.direction = True, 1
            return f

        def kink(t, w):
            return potential(case, t, w, spent) - PROTECTIVE
        kink.terminal, kink.direction = True, 0
        live = [j for j in range(len(groups)) if not spent[j]]
        stops = [event(j) for j in live] + [kink]
        s = solve_ivp(slope, (t, years), w, method="DOP853", rtol=1e-12, atol=1e-14, events=stops, max_step=0.25)
        w, t = list(s.y[:, -1]), s.t[-1]
        if s.status != 1:
            break
        for n, j in enumerate(live):
            if len(s.t_events[n]):
                spent[j], w[j] = True, groups[j]["utilisation"]
        if len(s.t_events[-1]):
            # Step over the kink by a hair, so that it is not found again.
            e = 1e-9
            d = slope(t, w)
            w, t = [x + e * y for x, y in zip(w, d)], t + e
    return w, potential(case, years, w, spent)


CASES = [
    {"name": "level, one group, protected", "curve": "level", "rho": 0.25, "years": 6.0, "demand": [12.0, 0.5],
     "groups": [{"count": 10, "wastage": 0.0, "potential": -1.05, "utilisation": 0.9}]},
    {"name": "level, two ages, the older is spent", "curve": "level", "rho": 0.3, "years": 8.0, "demand": [15.0, 0.8],
     "groups": [{"count": 6, "wastage": 0.75, "potential": -1.05, "utilisation": 0.9},
                {"count": 9, "wastage": 0.05, "potential": -1.05, "utilisation": 0.9}]},
    {"name": "level, short from the start", "curve": "level", "rho": 0.25, "years": 4.0, "demand": [30.0, 0.0],
     "groups": [{"count": 4, "wastage": 0.1, "potential": -1.05, "utilisation": 0.9}]},
    {"name": "level, loses protection on the way", "curve": "level", "rho": 0.25, "years": 9.0, "demand": [14.0, 1.2],
     "groups": [{"count": 6, "wastage": 0.0, "potential": -1.05, "utilisation": 0.9}]},
    {"name": "straight, aluminium and zinc", "curve": "straight", "rho": 0.25, "years": 5.0, "demand": [20.0, 1.0],
     "groups": [{"count": 8, "wastage": 0.0, "potential": -1.05, "utilisation": 0.9},
                {"count": 8, "wastage": 0.2, "potential": -1.00, "utilisation": 0.9}]},
    {"name": "straight, three groups over twenty years", "curve": "straight", "rho": 0.22, "years": 20.0, "demand": [10.0, 0.6],
     "groups": [{"count": 20, "wastage": 0.0, "potential": -1.05, "utilisation": 0.9},
                {"count": 10, "wastage": 0.4, "potential": -1.05, "utilisation": 0.9},
                {"count": 5, "wastage": 0.8, "potential": -1.05, "utilisation": 0.9}]},
]

for case in CASES:
    case["wastage"], case["potential"] = run(case)

with open("solve-ivp.json", "w") as f:
    json.dump({"source": "scipy.integrate.solve_ivp, DOP853, by make.py beside this file",
               "rod": {"length_m": L, "radius_m": R0, "density": DENSITY, "capacity_ah_kg": CAPACITY}, "cases": CASES}, f, indent=1)
    f.write("\n")
