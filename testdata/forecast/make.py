"""Makes the recorded runs of anodes/forecast by an independent integrator.

Run with Debian's python3-scipy: python3 make.py. Each case is one circuit:
rods of one alloy and size with different counts and starts, a steel curve, and
a demand that changes linearly, or bare steel whose density falls by 10^c T^d,
T hours since immersion, held for the first 24 hours. solve_ivp (rtol 1e-12)
integrates the wastage of each group; the potential balances by brentq between
the knots of the curve, nearest to the one before; a group that reaches its
utilisation factor, and a knot passed, is found as an event.
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


def knots(case):
    if case["curve"] == "sigmoid":
        return [(CORROSION, 0.0), (PROTECTIVE, case["peak"]), (-1.00, 1.0), (-1.10, 2.0)]
    if case["curve"] == "level":
        return [(CORROSION, 0.0), (PROTECTIVE, 1.0), (-2.0, 1.0)]
    return [(CORROSION, 0.0), (PROTECTIVE, 1.0), (-2.0, 9.0)]


def curve(case, e):
    ks = knots(case)
    for (e1, s1), (e2, s2) in zip(ks, ks[1:]):
        if e >= e2 or e2 == ks[-1][0]:
            return s1 + (s2 - s1) * (e1 - e) / (e1 - e2)


def demand(case, t):
    d = case["demand"][0] + case["demand"][1] * t
    if "bare_m2" in case:
        hours = max(24.0, case["immersed_hours"] + t * HOURS)
        d += case["bare_m2"] * 10 ** case["c"] * hours ** case["d"] / 1000
    return d


def potential(case, t, w, spent, before):
    def excess(e):
        given = sum(
            g["count"] * max(0.0, e - g["potential"]) / resistance(w[j], case["rho"])
            for j, g in enumerate(case["groups"]) if not spent[j])
        return given - demand(case, t) * curve(case, e)

    if all(spent):
        return CORROSION
    ends = sorted({-1.2, CORROSION} | {e for e, _ in knots(case) if e > -1.2} | {g["potential"] for g in case["groups"]})
    roots = [brentq(excess, a, b, xtol=1e-15, rtol=8.9e-16) for a, b in zip(ends, ends[1:]) if excess(a) <= 0 <= excess(b) or excess(b) <= 0 <= excess(a)]
    return min(roots, key=lambda e: abs(e - before))


def run(case):
    groups = case["groups"]
    w = [g["wastage"] for g in groups]
    spent = [False] * len(groups)
    t, years = 0.0, case["years"]
    before = potential(case, t, w, spent, case.get("from_v", CORROSION))
    turns = [years]
    if "bare_m2" in case:
        turns = [24 / HOURS, years]
    while t < years and not all(spent):
        if t >= turns[0]:
            turns.pop(0)

        def slope(t, w):
            e = potential(case, t, w, spent, before)
            return [0.0 if spent[j] else HOURS * max(0.0, e - g["potential"]) / resistance(w[j], case["rho"]) / (MASS * CAPACITY)
                    for j, g in enumerate(groups)]

        def event(j):
            def f(t, w):
                return w[j] - groups[j]["utilisation"]
            f.terminal, f.direction = True, 1
            return f

        def passed(knot):
            def f(t, w):
                return potential(case, t, w, spent, before) - knot
            f.terminal, f.direction = True, 0
            return f
        live = [j for j in range(len(groups)) if not spent[j]]
        inner = [e for e, _ in knots(case)[1:]]
        stops = [event(j) for j in live] + [passed(e) for e in inner]
        s = solve_ivp(slope, (t, turns[0]), w, method=case.get("method", "DOP853"), rtol=1e-12, atol=1e-14, events=stops, max_step=0.25)
        w, t = list(s.y[:, -1]), s.t[-1]
        before = potential(case, t, w, spent, before)
        if s.status != 1:
            continue
        for n, j in enumerate(live):
            if len(s.t_events[n]):
                spent[j], w[j] = True, groups[j]["utilisation"]
        if any(len(f) for f in s.t_events[len(live):]):
            # Step over the knot by a hair, so that it is not found again.
            e = 1e-9
            d = slope(t, w)
            w, t = [x + e * y for x, y in zip(w, d)], t + e
            before = potential(case, t, w, spent, before)
    return w, potential(case, years, w, spent, before)


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
    {"name": "straight, growth, the older is spent", "curve": "straight", "rho": 0.28, "years": 12.0, "demand": [12.0, 1.5],
     "groups": [{"count": 12, "wastage": 0.0, "potential": -1.05, "utilisation": 0.85},
                {"count": 6, "wastage": 0.6, "potential": -1.05, "utilisation": 0.85}]},
    {"name": "sigmoid, plenty of anodes", "curve": "sigmoid", "peak": 2.5, "rho": 0.25, "years": 10.0, "demand": [12.0, 0.5],
     "groups": [{"count": 14, "wastage": 0.0, "potential": -1.05, "utilisation": 0.9},
                {"count": 6, "wastage": 0.3, "potential": -1.05, "utilisation": 0.9}]},
    {"name": "sigmoid, held on its lower branch", "curve": "sigmoid", "peak": 3.0, "rho": 0.25, "years": 3.0, "demand": [10.0, 0.2], "from_v": -1.0,
     "groups": [{"count": 3, "wastage": 0.0, "potential": -1.5, "utilisation": 0.9}]},
    {"name": "sigmoid, held on its upper branch", "curve": "sigmoid", "peak": 3.0, "rho": 0.25, "years": 1.0, "demand": [10.0, 0.2], "from_v": -0.7,
     "groups": [{"count": 2, "wastage": 0.0, "potential": -1.5, "utilisation": 0.9}]},
    {"name": "sigmoid, two alloys, through the knot at -1.00 V", "curve": "sigmoid", "peak": 2.5, "rho": 0.25, "years": 9.0, "demand": [9.0, 1.0],
     "groups": [{"count": 14, "wastage": 0.0, "potential": -1.05, "utilisation": 0.9},
                {"count": 10, "wastage": 0.2, "potential": -1.00, "utilisation": 0.9}]},
    {"name": "level, falling density in warm water", "curve": "level", "rho": 0.2, "years": 8.0, "demand": [1.0, 0.1],
     "bare_m2": 120.0, "c": 3.13, "d": -0.41, "immersed_hours": 0.0,
     "groups": [{"count": 8, "wastage": 0.0, "potential": -1.05, "utilisation": 0.9}]},
    {"name": "straight, falling density in cold water, two ages", "curve": "straight", "rho": 0.3, "years": 15.0, "demand": [0.0, 0.3],
     "bare_m2": 150.0, "c": 2.82, "d": -0.23, "immersed_hours": 26280.0,
     "groups": [{"count": 10, "wastage": 0.0, "potential": -1.05, "utilisation": 0.9},
                {"count": 5, "wastage": 0.5, "potential": -1.05, "utilisation": 0.9}]},
]

for case in CASES:
    case["wastage"], case["potential"] = run(case)

with open("solve-ivp.json", "w") as f:
    json.dump({"source": "scipy.integrate.solve_ivp, DOP853, by make.py beside this file",
               "rod": {"length_m": L, "radius_m": R0, "density": DENSITY, "capacity_ah_kg": CAPACITY}, "cases": CASES}, f, indent=1)
    f.write("\n")
