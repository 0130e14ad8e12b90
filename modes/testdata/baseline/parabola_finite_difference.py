"""Time and error of second-order finite differences on the unbounded-parabola modes of V = 40.

The low modes of a truncated parabola differ from b = 1 - 2(2m + l - 1)/V by less than 1e-12.

Needs NumPy and SciPy (apt-get install -y python3-scipy). From the repository root, in one go on a quiet machine:

    /usr/bin/python3 modes/testdata/baseline/parabola_finite_difference.py
    go test -run XXX -bench '^BenchmarkGuided$' ./modes/radial

and compare the microseconds a mode with ns/mode. Nothing here is part of the tests.
"""
import time

import numpy as np
from scipy.linalg import eigh_tridiagonal

V, reach = 40.0, 3.0
for n in (300, 1000, 3000, 10000):
    h = reach / n
    r = (np.arange(n) + 0.5) * h
    f = np.where(r < 1, 1 - r * r, 0.0)
    start, worst, count = time.perf_counter(), 0.0, 0
    for l in (0, 1, 2, 3):
        right, left = (np.arange(n) + 1) * h, np.arange(n) * h
        diagonal = (right + left) / (r * h * h) + l * l / r**2 - V * V * f
        off = -right[:-1] / (h * h) / np.sqrt(r[:-1] * r[1:])
        b = -eigh_tridiagonal(diagonal, off, eigvals_only=True, select="v", select_range=(-V * V, 0)) / V**2
        count += len(b)
        worst = max(worst, max(abs(b[m - 1] - (1 - 2 * (2 * m + l - 1) / V)) for m in (1, 2, 3)))
    print(f"{n} points: worst error of b {worst:.1e}, {(time.perf_counter() - start) / count * 1e6:.0f} us a mode")
