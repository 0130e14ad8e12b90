"""Reference table of the LP modes of a step-index fibre, in arbitrary precision.

Run from the repository root:
    python3 modes/testdata/lp.py > modes/testdata/lp.csv
    python3 modes/testdata/lp.py bench > modes/testdata/bench.csv

Needs Python 3.9 and mpmath. J_l comes from its backward recurrence in integers, K_l from the power or the asymptotic
series and its forward recurrence. Every row is solved at 60 digits and polished at 90, which must agree to
25 digits. Its label is proved by counting zeros of J_{l-1} and J_l below u: the signs of J_l, J_{l+1}, ... at
u change once for each zero of J_l in (0, u), since the zeros of neighbouring orders interlace. Samples are
checked against mpmath's own Bessel functions and, for the derivatives, against divided differences of b.
"""
import math
import random
import sys

from mpmath import mp, mpf, besselj, besselk, euler, exp, log, nstr, sqrt

COARSE, FINE = 60, 90


# ---- Bessel functions -------------------------------------------------------------------------------------

def descend(l, x, bits, count=False):
    """(J_{l+1}, J_l) of x but for a common factor, as integers; with count, the zeros of J_l in (0, x) instead.

    J. C. P. Miller's backward recurrence (DLMF 3.6(ii)), started so high that what is left out is below 2^-bits.
    """
    size = float(x)
    above = (1.06 * bits * math.sqrt(size)) ** (2 / 3) * 1.2 + bits / 3 + 20
    n = int(max(l, size) + above)
    with mp.workprec(bits + 64):
        twice = int(mp.ldexp(2 / mpf(x), bits))
    limit, changes = 1 << (bits + 200), 0
    high, low = 0, 1 << bits
    for k in range(n, l, -1):
        high, low = low, ((k * twice * low) >> bits) - high
        if not -limit < low < limit:
            high >>= 200
            low >>= 200
        if count and (high < 0) != (low < 0):
            changes += 1
    return changes if count else (high, low)


def zeros_below(l, x):
    return descend(l, x, 140, count=True)


def k01(w):
    """K_1(w)/K_0(w)."""
    digits = mp.dps + 10
    if w > 1.2 * digits + 10:
        def hankel(nu):
            term, total, k = mpf(1), mpf(1), 0
            while abs(term) > mpf(10) ** -digits:
                k += 1
                term = term * (4 * nu * nu - (2 * k - 1) ** 2) / (8 * k * w)
                total += term
            return total
        with mp.extradps(15):
            w = +w
            return hankel(1) / hankel(0)
    with mp.extradps(20 + int(w)):
        w = +w
        q = w * w / 4
        term, i0, i1, s, harmonic, k = mpf(1), mpf(1), mpf(1), mpf(0), mpf(0), 0
        while k < 3 or term > i0 * mpf(10) ** -mp.dps:
            k += 1
            term = term * q / (k * k)
            harmonic += mpf(1) / k
            i0 += term
            i1 += term / (k + 1)
            s += term * harmonic
        i1 *= w / 2
        k0 = s - (log(w / 2) + euler) * i0
        return (1 / w - i1 * k0) / (i0 * k0)


def side_x(l, u):
    """x = u J_{l-1}(u)/J_l(u)."""
    bits = mp.prec + 64
    if l == 0:
        j1, j0 = descend(0, u, bits)
        return -u * mpf(j1) / mpf(j0)
    high, low = descend(l - 1, u, bits)
    return u * mpf(low) / mpf(high)


def side_g(l, w):
    """G = w K_{l-1}(w)/K_l(w)."""
    r = k01(w)
    if l == 0:
        return w * r
    g, q = w / r, w * w
    for j in range(1, l):
        g = q / (2 * j + g)
    return g


def zero_guess(l, m):
    """j_{l,m} to a few digits: McMahon's leading terms or Olver's uniform one (DLMF 10.21(vi), (viii))."""
    if l == 0:
        t = (m - 0.25) * math.pi
        return t + 1 / (8 * t)
    t = 3 * math.pi * (4 * m - 1) / 8
    phase = (2 / 3) * t * (1 + 5 / 48 / t ** 2) ** 1.5 / l
    low, high = 1.0, 2 + phase
    for _ in range(200):
        z = (low + high) / 2
        if math.sqrt((z - 1) * (z + 1)) - math.acos(1 / z) < phase:
            low = z
        else:
            high = z
    return l * low


ZEROS = {}


def zero(l, m):
    """j_{l,m} to FINE digits, its rank proved by the count."""
    if m == 0:
        return mpf(0)
    if (l, m) not in ZEROS:
        mp.dps = FINE + 10
        z = mpf(zero_guess(l, m))
        for dps in (30, 30, 30, 30, 30, FINE + 10, FINE + 10, FINE + 10):
            with mp.workdps(dps):
                high, low = descend(l, z, mp.prec + 64)
                step = mpf(low) / (l * mpf(low) / z - high)
            z -= step
        assert abs(step) < z * mpf(10) ** -(FINE + 5), (l, m)
        assert zeros_below(l, z * (1 - mpf(10) ** -18)) == m - 1 and zeros_below(l, z * (1 + mpf(10) ** -18)) == m
        ZEROS[l, m] = z
    return ZEROS[l, m]


def cutoff(l, m):
    return zero(l - 1, m) if l else zero(1, m - 1)


# ---- Modes ------------------------------------------------------------------------------------------------

def slopes(l, s, q, x, g):
    """dx/ds with s = u^2, and dG/dq with q = w^2."""
    return -(1 + x * (x - 2 * l) / s) / 2, (g * (g + 2 * l) / q - 1) / 2


def solve(v, l, m, start=None):
    """w and u at the precision in use. Newton inside a bracket that every evaluation narrows.

    The unknown is t = ln w (l = 0 below the next zero), q = w^2 (l > 0 near cut-off) or u (the rest).
    """
    v = mpf(v)
    low, high = cutoff(l, m), zero(l, m)
    kind = "t" if l == 0 and v < high else "q" if v < low + (high - low) * 0.3 else "u"
    if kind == "t":
        a, b = -mpf(10) ** 6, log((v - low) * (v + low)) / 2
        y = log(mpf(2)) - euler - (2 / v ** 2 if low == 0 else 1 / (low * (v - low)))
    elif kind == "q":
        a, b = mpf(0), (v - low) * (v + low)
        y = b / 2
    else:
        a, b = low, min(high, v)
        y = high * (1 - 1 / (v + 1))
    if start is not None:
        y = start[kind]
    last = False
    for _ in range(400):
        if not last and not a < y < b:
            y = (a + b) / 2
        w = exp(y) if kind == "t" else sqrt(y) if kind == "q" else sqrt((v - y) * (v + y))
        u = y if kind == "u" else sqrt((v - w) * (v + w))
        if last:
            break
        s, q = u * u, w * w
        x, g = side_x(l, u), side_g(l, w)
        dx, dg = slopes(l, s, q, x, g)
        more = -x > g  # the root has the larger w
        if kind == "q":
            step = -(x + g) / (dg - dx)
        else:
            step = -(1 / x + 1 / g) / (dx / x ** 2 - dg / g ** 2)  # in q
            step = step / (2 * q) if kind == "t" else -step / (2 * u)
        if more == (kind != "u"):
            a = y
        else:
            b = y
        y += step
        last = abs(step) < abs(y) * mpf(10) ** (-0.6 * mp.dps)
    else:
        raise ArithmeticError((v, l, m))
    return u, w


def quantities(v, l, u, w):
    """u, w, b, d(Vb)/dV, V d2(Vb)/dV2 (D. Gloge, Appl. Opt. 10, 2252 (1971), with kappa = K_l^2/(K_{l-1} K_{l+1}))."""
    v = mpf(v)
    g = side_g(l, w)
    kappa = w * w / (g * (g + 2 * l))
    b = (w / v) ** 2
    core = (u / v) ** 2
    dkappa = 2 * kappa * (1 + kappa * core / b) * (1 - (1 - kappa) * (g + l))  # V d(kappa)/dV
    return [u, w, b, b + 2 * kappa * core, 2 * core * (kappa * (1 - 2 * kappa) + dkappa)]


def row(v, l, m):
    """The row's values at FINE digits, checked."""
    low = cutoff(l, m)
    assert mpf(v) > low, (v, l, m)
    mp.dps = COARSE
    u, w = solve(v, l, m)
    coarse = quantities(v, l, u, w)
    mp.dps = FINE
    start = {"t": log(w), "q": w * w, "u": u}
    u, w = solve(v, l, m, start)
    fine = quantities(v, l, u, w)
    for c, f in zip(coarse, fine):
        assert abs(c - f) < abs(f) * mpf(10) ** -26, (v, l, m, c, f)
    if l:
        assert zeros_below(l - 1, u) == m and zeros_below(l, u) == m - 1, (v, l, m)
    else:
        assert zeros_below(1, u) == m - 1 and zeros_below(0, u) == m - 1, (v, l, m)
    return fine


def check_functions(v, l, u, w):
    """The eigenvalue equation in mpmath's own Bessel functions."""
    mp.dps = FINE
    left = u * besselj(l - 1, u) * besselk(l, w)
    right = -w * besselk(l - 1, w) * besselj(l, u)
    assert abs(left - right) < (abs(left) + abs(right)) * mpf(10) ** -45, (v, l, left, right)


def check_derivatives(v, l, m, fine):
    """d(Vb)/dV and V d2(Vb)/dV2 by divided differences."""
    mp.dps = FINE
    low = cutoff(l, m)
    distance = mpf(v) - low
    h = mpf(10) ** -12 * min(1, distance if l else distance ** 3 if m == 1 else distance ** 2)

    def vb(x):
        u, w = solve(x, l, m, {"t": log(fine[1]), "q": fine[1] ** 2, "u": fine[0]})
        return w * w / x
    minus, middle, plus = vb(mpf(v) - h), vb(mpf(v)), vb(mpf(v) + h)
    first, second = (plus - minus) / (2 * h), mpf(v) * (plus - 2 * middle + minus) / h ** 2
    assert abs(first - fine[3]) < abs(fine[3]) * mpf(10) ** -22, (v, l, m, first, fine[3])
    assert abs(second - fine[4]) < abs(fine[4]) * mpf(10) ** -18, (v, l, m, second, fine[4])


# ---- Which modes ------------------------------------------------------------------------------------------

def guided(v):
    """All guided (l, m), by the count of zeros below V."""
    found, l = [], 0
    while True:
        n = zeros_below(l - 1, mpf(v)) if l else 1 + zeros_below(1, mpf(v))
        if n == 0:
            return found
        found += [(l, m) for m in range(1, n + 1)]
        l += 1


def just_above(l, m, distance):
    """The double nearest to V_c + distance, moved up to lie above V_c; distance 0 is the first above."""
    c = cutoff(l, m)
    v = float(c + mpf(distance))
    while mpf(v) <= c:
        v = math.nextafter(v, math.inf)
    return v


def modes():
    # LP01 at small V.
    for v in (0.08, 0.1, 0.15, 0.2, 0.25, 0.3, 0.35, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9, 1.0, 1.1, 1.2, 1.25, 1.3, 1.31, 1.35, 1.4,
              1.5, 1.6, 1.8, 2.0, 2.2, 2.4, 2.404, 2.405, 2.41, 2.6, 2.8, 3.0, 3.5, 3.8, 3.84):
        yield v, 0, 1
    # Every mode of a few fibres.
    for v in (2.5, 4.0, 5.5, 7.1, 10.0, 15.0, 20.0, 30.0, 40.0):
        for l, m in guided(v):
            yield v, l, m
    for l, m in guided(100.0)[::13]:
        yield 100.0, l, m
    # Next to cut-off.
    pairs = [(0, 2), (0, 3), (0, 10), (0, 100), (0, 1000), (1, 1), (1, 2), (1, 10), (1, 100), (1, 1000), (2, 1), (2, 2),
             (2, 30), (2, 500), (3, 1), (3, 3), (3, 200), (10, 1), (10, 2), (10, 20), (50, 1), (50, 7), (50, 300), (100, 1),
             (100, 3), (100, 50), (1000, 1), (1000, 2), (1000, 40), (1000, 1000)]
    for l, m in pairs:
        for distance in ["0"] + ["1e-%d" % k for k in range(12, -1, -1)] + ["0.3", "0.03", "3"]:
            yield just_above(l, m, distance), l, m
        if l == 0:  # where w runs through the range of a double
            c = float(cutoff(l, m))
            for minus_log in (690, 600, 400, 200, 100, 60, 40, 30, 20, 15, 10, 7, 5, 3):
                yield just_above(l, m, repr(1 / (c * minus_log))), l, m
    # Far from cut-off.
    for v in (5.0, 8.0, 12.0, 25.0, 50.0, 100.0, 300.0, 1000.0, 3000.0, 9999.0, 10000.0):
        for l, m in ((0, 1), (1, 1), (2, 1), (0, 2), (3, 2), (12, 3), (40, 1), (200, 1), (200, 30), (1000, 1), (1000, 500)):
            if cutoff(l, m) < v:
                yield v, l, m
    for l, m in ((0, 1000), (1, 1000), (5, 2000), (0, 3183), (3000, 1), (3000, 900), (9000, 1), (9000, 60), (9960, 1)):
        yield 10000.0, l, m
    # Anywhere.
    rng = random.Random(20)
    for _ in range(300):
        v = math.exp(rng.uniform(math.log(0.3), math.log(10000)))
        while True:
            l = int(rng.random() ** 2 * v) if rng.random() < 0.8 else rng.randrange(4)
            n = zeros_below(l - 1, mpf(v)) if l else 1 + zeros_below(1, mpf(v))
            if n:
                break
        yield v, l, rng.randint(1, n)


def bench():
    """163 ordinary modes: at each V up to 12, evenly spaced in the list of those at least 0.2 above cut-off, l <= 56."""
    chosen = []
    for v in (0.8, 1.0, 1.2, 1.35, 1.5, 1.65, 1.8, 2.0, 2.2, 2.3, 2.4, 3.0, 3.7, 4.5, 5.5, 7.0, 9.0, 12.0, 16.0, 21.0, 28.0, 38.0, 50.0, 66.0, 80.0, 100.0, 120.0):
        every = [(l, m) for l, m in guided(v) if l <= 56 and cutoff(l, m) < v - 0.2]
        n = min(12, len(every))
        picks = sorted({round(i * (len(every) - 1) / max(1, n - 1)) for i in range(n)})
        chosen += [(v, *every[p]) for p in picks]
    return chosen


HEADER = """\
# LP modes of the weakly guiding step-index fibre: u, w, b and the first two derivatives of V b.
# Made by (from the repository root): python3 modes/testdata/lp.py > modes/testdata/lp.csv
# mpmath at 60 digits, polished at 90, agreeing to 25; 25 significant digits. v is an exact double.
# u J_{l-1}(u)/J_l(u) = -w K_{l-1}(w)/K_l(w), u^2 + w^2 = v^2 (D. Gloge, Appl. Opt. 10, 2252 (1971)); b = w^2/v^2,
# b1 = d(v b)/dv, b2 = v d^2(v b)/dv^2. Labels proved: u lies between the cut-off zero j_{l-1,m} (l = 0: 0 or j_{1,m-1})
# and j_{l,m}, by counting zeros of J_{l-1} and J_l below u. Nearest to cut-off at l = 0, w is exponentially small
# and b, b1 and b2 may lie below the smallest double.
v,l,m,u,w,b,b1,b2"""

BENCH_HEADER = """\
# 163 ordinary LP modes, a list for timing a solver.
# Made by (from the repository root): python3 modes/testdata/lp.py bench > modes/testdata/bench.csv
# v from 0.8 to 120, l up to 56, each mode at least 0.2 above its cut-off; cut-offs from Bessel zeros at 90 digits.
v,l,m"""


def main():
    if sys.argv[1:] == ["bench"]:
        chosen = bench()
        print(f"{len(chosen)} modes, l up to {max(c[1] for c in chosen)}", file=sys.stderr)
        print(BENCH_HEADER)
        for v, l, m in chosen:
            print(f"{v!r},{l},{m}")
        return
    print(HEADER)
    seen, by_functions, by_differences = set(), 0, 0
    for v, l, m in modes():
        if (v, l, m) in seen:
            continue
        if l == 0 and m > 1 and 1 / (cutoff(l, m) * (mpf(v) - cutoff(l, m))) > 692:
            continue  # w below 1e-300
        seen.add((v, l, m))
        fine = row(v, l, m)
        if len(seen) % 10 == 0 and v < 60:
            check_functions(v, l, fine[0], fine[1])
            by_functions += 1
        if len(seen) % 12 == 0:
            check_derivatives(v, l, m, fine)
            by_differences += 1
        print(",".join([repr(v), str(l), str(m)] + [nstr(f, 25, strip_zeros=False, min_fixed=0, max_fixed=0) for f in fine]))
    print(f"{len(seen)} rows; {by_functions} checked against mpmath's Bessel functions, "
          f"{by_differences} against divided differences", file=sys.stderr)


if __name__ == "__main__":
    main()
