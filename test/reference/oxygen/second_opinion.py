"""A second opinion on the transient oxygen models: the same finite-volume equations, followed by SciPy's LSODA.

Writes second-opinion.json beside itself. Run with Debian's python3-scipy; the versions used stand in the file.
The tests read the file only; they need no Python.

  python3 second_opinion.py && npx prettier --write second-opinion.json
"""

import json
import os
import platform

import numpy
import scipy
from scipy.integrate import solve_ivp
from scipy.optimize import brentq

# Round numbers for checking, not a material (SI): 20 um of dead zone in even light without film, induction time 2 s.
P0 = dict(Ri=0.5, alpha=1e4, D=1e-10, s=1.0, kO=5e5, kp=25.0, kt=2500.0, L=1e-4, C0=1.0, Cg=1.0, l=0.0, share=1.0)


def film_faces(h, cells):
    """Cells narrow towards the resin: half of them even, half as 1/sqrt(w^2 + (z - h)^2), w = h/10."""
    w = h / 10
    below = numpy.arcsinh(-h / w)
    upto = lambda z: 0.5 * z / h + 0.5 * (numpy.arcsinh((z - h) / w) - below) / -below
    inner = [brentq(lambda z: upto(z) - i / cells, 0, h, xtol=1e-22, rtol=1e-15) for i in range(1, cells)]
    return numpy.array([0.0, *inner, h])


def column(p, n):
    """Film and resin cells: capacity, reacting width, half resistance, light."""
    resin = numpy.full(n, p["L"] / n)
    film = p.get("film")
    widths = numpy.diff(film_faces(film["h"], max(4, round(n / 4)))) if film else numpy.array([])
    K, Df = (film["K"], film["D"]) if film else (1, 1)
    lower = numpy.arange(n) * p["L"] / n
    a = p["alpha"] * resin
    light = numpy.exp(-p["alpha"] * lower) * (-numpy.expm1(-a) / a if p["alpha"] > 0 else 1)
    return dict(
        m=len(widths),
        capacity=numpy.concatenate([K * widths, resin]),
        half=numpy.concatenate([widths / (2 * K * Df), resin / (2 * p["D"])]),
        gas=numpy.inf if film and film["sealed"] else (0 if film else p["l"] / p["D"]),
        light=light,
        width=resin,
    )


def transport(col, C, Q, p, Cg):
    """Net inflow per cell, mol/(m2 s)."""
    half = col["half"].copy()
    half[col["m"]:] *= p["share"] ** numpy.expm1(-Q)
    G = 1 / numpy.concatenate([[col["gas"] + half[0]], half[:-1] + half[1:], [numpy.inf]])
    flux = G[:-1] * (numpy.concatenate([[Cg], C[:-1]]) - C)
    return flux - numpy.append(flux[1:], 0.0)


def follow(rhs, y0, schedule, times, band):
    """LSODA from step to step; returns the states at the times."""
    found, t0, y = {}, 0.0, y0
    for step in schedule:
        t1 = t0 + step["duration"]
        asked = [t for t in times if t0 < t <= t1]
        out = solve_ivp(
            lambda t, y: rhs(y, step), (t0, t1), y, "LSODA", t_eval=sorted({*asked, t1}),
            rtol=1e-11, atol=1e-14, lband=band, uband=band, max_step=step["duration"] / 20,
        )
        assert out.success, out.message
        for k, t in enumerate(out.t):
            if t in asked:
                found[t] = out.y[:, k]
        t0, y = t1, out.y[:, -1]
    return found


def quasi_steady(p, n, schedule, times):
    col = column(p, n)
    m, total = col["m"], len(col["capacity"])

    def rhs(y, step):
        # Interleaved so that the Jacobian is narrow: oxygen and Q of each cell side by side (Q stays 0 in the film).
        C, Q = y[0::2], y[1::2][m:]
        Ri = p["Ri"] * step.get("light", 1) * col["light"]
        capture = p["kO"] * C[m:]
        R = 2 * Ri / (capture + numpy.sqrt(capture**2 + 8 * p["kt"] * Ri) + 1e-300)
        net = transport(col, C, Q, p, step.get("gas", p["Cg"]))
        net[m:] -= col["width"] * p["s"] * capture * R
        out = numpy.zeros_like(y)
        out[0::2] = net / col["capacity"]
        out[2 * m + 1::2] = p["kp"] * R
        return out

    y0 = numpy.zeros(2 * total)
    y0[0::2] = p["C0"]
    states = follow(rhs, y0, schedule, times, 3)
    return {t: dict(oxygen=y[0::2][m:], conversion=-numpy.expm1(-y[1::2][m:]),
                    film=float(numpy.dot(y[0::2][:m], col["capacity"][:m]) / col["capacity"][:m].sum()) if m else None)
            for t, y in states.items()}


def full(p, n, schedule, times):
    col = column(p, n)
    x = p["peroxyls"]

    def rhs(y, step):
        C, Q, R, X, DH, inhibitor = (y[k::6] for k in range(6))
        b = x["kpx"] * x["M"] * numpy.exp(-Q) + x["kH"] * DH
        caught = x["kI"] * inhibitor * X
        captured, cross = p["kO"] * R * C, x["kx"] * R * X
        out = numpy.empty_like(y)
        net = transport(col, C, Q, p, p["Cg"])
        out[0::6] = net / col["capacity"] - captured + x["rho"] * x["kxx"] * X**2
        out[1::6] = p["kp"] * R + x["kpx"] * X
        out[2::6] = p["Ri"] * step.get("light", 1) * col["light"] - 2 * p["kt"] * R**2 - captured - cross + b * X
        out[3::6] = captured - cross - 2 * x["kxx"] * X**2 - b * X - x["n"] * caught
        out[4::6] = -x["kH"] * DH * X
        out[5::6] = -caught
        return out

    y0 = numpy.zeros(6 * n)
    y0[0::6], y0[4::6], y0[5::6] = p["C0"], x["DH"], x["I"]
    states = follow(rhs, y0, schedule, times, 11)
    return {t: dict(oxygen=y[0::6], conversion=-numpy.expm1(-y[1::6]), radicals=y[2::6]) for t, y in states.items()}


nothing = dict(kx=0.0, kxx=0.0, rho=0.0, kpx=0.0, M=0.0, kH=0.0, DH=0.0, kI=0.0, I=0.0, n=2.0)
pulses = [dict(duration=3.0), dict(duration=4.0, light=0), dict(duration=3.0)]
cases = {
    "film that resists": (quasi_steady, {**P0, "l": 1e-5}, 100, [dict(duration=5.0)], [2.5, 5.0]),
    "two oxygen per radical, half the light, nitrogen after 3 s": (
        quasi_steady, {**P0, "s": 2.0}, 100, [dict(duration=3.0, light=0.5), dict(duration=3.0, light=0.5, gas=0)], [3.0, 6.0]),
    "film on glass, pulses": (
        quasi_steady, {**P0, "film": dict(h=5e-5, D=3.4e-9, K=1.68, sealed=True)}, 80, pulses, [3.0, 7.0, 10.0]),
    "diffusivity falling to a hundredth": (
        quasi_steady, {**P0, "l": 1e-5, "share": 0.01, "kp": 100.0, "D": 4e-10}, 100,
        [dict(duration=8.0), dict(duration=5.0, light=0)], [8.0, 13.0]),
    "full radicals with peroxyls and donor, pulses": (
        full, {**P0, "peroxyls": {**nothing, "kx": 2500.0, "kxx": 1000.0, "rho": 1.0, "kpx": 1e-3, "M": 5000.0, "kH": 0.02, "DH": 50.0}},
        60, [dict(duration=3.0), dict(duration=0.5, light=0), dict(duration=3.0)], [3.0, 3.5, 6.5]),
    "inhibitor that catches peroxyls and is used up near the window": (
        full, {**P0, "l": 1e-5, "peroxyls": {**nothing, "kxx": 500.0, "rho": 0.5, "kpx": 1e-3, "M": 5000.0, "kI": 30.0, "I": 0.4}},
        60, [dict(duration=5.0)], [1.0, 2.5, 5.0]),
}

if __name__ == "__main__":
    out = {
        "note": "Computed by second_opinion.py beside this file: the finite-volume equations of lib/models/oxygen on even cells, "
                "followed by LSODA with a banded Jacobian at rtol 1e-11, atol 1e-14. Values at the cell centres, SI units.",
        "versions": {"python": platform.python_version(), "numpy": numpy.__version__, "scipy": scipy.__version__},
        "cases": {},
    }
    for name, (solve, p, n, schedule, times) in cases.items():
        states = solve(p, n, schedule, times)
        out["cases"][name] = {
            "parameters": p, "cells": n, "schedule": schedule,
            "states": [{"time": t, **{k: v if v is None or isinstance(v, float) else [float(f"{x:.10e}") for x in v]
                                      for k, v in state.items()}} for t, state in states.items()],
        }
        print(name, {t: float(numpy.mean(s["conversion"])) for t, s in states.items()})
    path = os.path.join(os.path.dirname(os.path.abspath(__file__)), "second-opinion.json")
    with open(path, "w", encoding="utf8") as file:
        json.dump(out, file, indent=1)
        file.write("\n")
