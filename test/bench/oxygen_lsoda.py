"""The transient oxygen case of oxygen.mjs by SciPy's LSODA with a banded Jacobian, as fast as it holds 1e-3. Prints JSON."""

import json
import time

import numpy
import scipy
from scipy.integrate import solve_ivp

D, kO, kt, kp, Ri0, alpha, L = 1e-10, 5e5, 2500.0, 25.0, 0.5, 1e4, 1e-4
REFERENCE = {5.0: (0.1614726, 22.02874), 10.0: (0.5368637, 21.04434)}


def solve(n, rtol, atol):
    """Oxygen and Q side by side on n even cells, oxygen held at the window; mean conversion and depth of 20 % at 5 and 10 s."""
    dz = L / n
    lower = numpy.arange(n) * dz
    Ri = Ri0 * numpy.exp(-alpha * lower) * -numpy.expm1(-alpha * dz) / (alpha * dz)
    b2 = 8 * kt * Ri
    G = numpy.full(n, D / dz)
    G[0] = 2 * D / dz
    out = numpy.empty(2 * n)

    def rhs(_, y):
        C = y[0::2]
        capture = kO * C
        R = 2 * Ri / (capture + numpy.sqrt(capture * capture + b2))
        flux = numpy.empty(n + 1)
        flux[0], flux[1:-1], flux[-1] = G[0] * (1 - C[0]), G[1:] * (C[:-1] - C[1:]), 0
        out[0::2] = (flux[:-1] - flux[1:]) / dz - capture * R
        out[1::2] = kp * R
        return out.copy()

    y0 = numpy.zeros(2 * n)
    y0[0::2] = 1
    run = solve_ivp(rhs, (0, 10), y0, "LSODA", t_eval=[5.0, 10.0], rtol=rtol, atol=atol, lband=2, uband=2)
    found = []
    for k in range(2):
        X = -numpy.expm1(-run.y[1::2, k])
        i = int(numpy.argmax(X >= 0.2))
        lnX = numpy.log(X[i - 1 : i + 1])
        found.append((X.mean(), 1e6 * (lower[i - 1] + dz / 2 + dz * (numpy.log(0.2) - lnX[0]) / (lnX[1] - lnX[0]))))
    return found


best = None
for n in (300, 400):
    for rtol in (1e-2, 1e-3, 1e-4, 1e-5, 1e-6):
        for atol in (1e-4, 1e-5, 1e-6, 1e-7, 1e-8):
            start = time.perf_counter()
            found = solve(n, rtol, atol)
            seconds = time.perf_counter() - start
            error = max(abs(f / r - 1) for pair, ref in zip(found, REFERENCE.values()) for f, r in zip(pair, ref))
            if error < 1e-3 and (best is None or seconds < best[0]):
                best = (seconds, n, rtol, atol)
_, n, rtol, atol = best
times = []
for _ in range(5):
    start = time.perf_counter()
    solve(n, rtol, atol)
    times.append(time.perf_counter() - start)
print(json.dumps({"scipy": scipy.__version__, "cells": n, "rtol": rtol, "atol": atol, "ms": 1e3 * min(times)}))
