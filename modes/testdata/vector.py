"""Reference tables of the exact vector modes of a step-index fibre, in arbitrary precision.

Run from the repository root:
    python3 modes/testdata/vector.py > modes/testdata/vector.csv
    python3 modes/testdata/vector.py cutoff > modes/testdata/vector_cutoff.csv

Needs Python 3.9 and mpmath. The eigenvalue equation (A. W. Snyder and J. D. Love, Optical Waveguide Theory, 1983,
chapter 12), with r = n2^2/n1^2, is

    (J' + K')(J' + r K') = nu^2 (1/s + 1/q) (1/s + r/q),   J' = J_nu'(u)/(u J_nu(u)),   K' = K_nu'(w)/(w K_nu(w)),

s = u^2, q = w^2. With x = u J_{nu-1}/J_nu, g = w K_{nu-1}/K_nu, A = x/s - g/q it is a quadratic in A whose roots have opposite
signs: A < 0 is HE, A > 0 is EH (A -> 0 and A -> 2 P as r -> 1). Each is solved for A (for EH in J_{nu+1}, K_{nu+1}), in a form
without cancellation, so that a root's family is certain. Its m is proved by counting the zeros of J_nu below u: neither
family crosses a zero of J_nu as V grows from cut-off, so HE(nu)m lies between the zeros m - 1 and m, and EH(nu)m, TE0m and TM0m
between m and m + 1. One root in that interval is checked by sampling; for a few fibres the sign changes of the determinant itself,
in mpmath's own J and K_0, K_1, are counted over all u < V and compared with the number of cut-offs below V.

Every row is solved at 60 and at 90 digits, which must agree to 25 digits; the determinant in mpmath's own Bessel functions must
change sign within 1e-28 of the root; and shifts at delta below 1e-5, but next to cut-off, must agree with
perturbation theory to 60 delta.
"""
import math
import random
import sys

from mpmath import mp, mpf, besselj, besselk, euler, exp, log, nstr, sqrt

COARSE, FINE = 60, 90


# ---- Bessel functions -------------------------------------------------------------------------------------

def descend(l, x, bits, count=False):
    """(J_{l+1}, J_l) of x but for a common factor, as integers; with count, the zeros of J_l in (0, x) instead.

    J. C. P. Miller's backward recurrence (DLMF 3.6(ii)), started so high that what is left out is below 2^-bits. The signs of
    J_l, J_{l+1}, ... at x change once for each zero of J_l in (0, x), since the zeros of neighbouring orders interlace.
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


def below(nu, u):
    """J_{nu-1}/(u J_nu), nu > 0."""
    high, low = descend(nu - 1, u, mp.prec + 64)
    return mpf(low) / (mpf(high) * u)


def above(nu, u):
    """J_{nu+1}/(u J_nu)."""
    high, low = descend(nu, u, mp.prec + 64)
    return mpf(high) / (mpf(low) * u)


def gamma_of(nu, w):
    """K_{nu-1}/(w K_nu), nu > 0."""
    q, gamma = w * w, 1 / (w * k01(w))
    for j in range(1, nu):
        gamma = 1 / (2 * j + q * gamma)
    return gamma


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
        with mp.workdps(FINE + 10):
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


# ---- The eigenvalue equation, one family at a time ----------------------------------------------------------

def condition(family, nu, delta, v2, s, q):
    """Falls (HE) or rises (the rest) through 0 at the mode, as s grows in the mode's interval; no cancellation at small w or delta."""
    d = 2 * mpf(delta)  # 1 - r
    r = 1 - d
    u, w = sqrt(s), sqrt(q)
    if nu == 0:
        return q * above(0, u) + (r if family == "TM" else 1) * w * k01(w)
    gamma = gamma_of(nu, w)
    g = q * gamma
    h = 2 * nu + g
    p, pq = nu * v2 / s, nu * (2 * q / s + 1 + r)  # q P and q (P + Q); P = nu (1/s + 1/q), Q = nu (1/s + r/q)
    root = sqrt(pq * pq + d * d * g * h)
    if family == "HE":
        # A^2 - A (P + Q - d g/q) - d g P/q = 0
        return below(nu, u) - gamma * (1 - 2 * d * p / (pq - d * g + root))
    # With A' = u J_{nu+1}/J_nu/s + h/q: A'^2 - A' (P + Q + d h/q) + d h P/q = 0
    return q * above(nu, u) + h * (1 - 2 * d * p / (pq + d * h + root))


def interval(family, nu, m):
    """u of the mode lies between these; at the lower end J_nu has its zero, at the upper J_{nu-1} (HE) or J_{nu+1}."""
    if family == "HE":
        return zero(nu, m - 1), zero(nu - 1, m)
    return zero(nu, m), zero(nu + 1, m)


def bracketed(f, low, high, falling):
    """The root of f to about 20 digits, by bisection and the Illinois rule; the ends are not evaluated. mp.dps is 30."""
    sign = -1 if falling else 1
    fl = fh = None
    width = high - low
    for step in range(400):
        y = (low + high) / 2
        if fl is not None and fh is not None and step > 12:
            guess = (low * fh - high * fl) / (fh - fl)
            if low < guess < high:
                y = guess
        fy = sign * f(y)
        if fy == 0 or high - low < width * mpf(10) ** -22:
            break
        if fy < 0:
            if fl is not None and last == -1 and fh is not None:
                fh = fh / 2
            low, fl, last = y, fy, -1
        else:
            if fh is not None and last == 1 and fl is not None:
                fl = fl / 2
            high, fh, last = y, fy, 1
        if step > 12 and min(abs(fy), high - low) < mpf(10) ** -21 * min(1, width):
            break
    return y


def polish(f, y, scale):
    """Secant steps, to 26 digits short of the precision in use (next to a zero of J_nu some are lost)."""
    scale = mpf(scale)
    y0, y1 = mpf(y), mpf(y) + scale * mpf(10) ** -16
    f0, f1 = f(y0), f(y1)
    for _ in range(40):
        if f1 == f0:
            return y1
        step = f1 * (y1 - y0) / (f1 - f0)
        y0, f0 = y1, f1
        y1 = y1 - step
        if abs(step) < scale * mpf(10) ** -(mp.dps - 26):
            return y1
        f1 = f(y1)
    raise ArithmeticError("no convergence")


class Root:
    """The mode's u and w at any precision. The unknown is s where V is above the interval of u, t = ln w elsewhere."""

    def __init__(self, family, nu, m, delta, v):
        self.mode = family, nu, m, delta, v
        low, high = interval(family, nu, m)
        falling = family == "HE"
        with mp.workdps(30):
            v2 = mpf(v) ** 2
            self.by_s = v > high
            if self.by_s:
                self.start = bracketed(lambda s: condition(family, nu, delta, v2, s, v2 - s), low ** 2, high ** 2, falling)
            else:
                f = lambda t: condition(family, nu, delta, v2, v2 - exp(2 * t), exp(2 * t))
                self.start = bracketed(f, mpf(-10) ** 5 if (nu == 1 and falling) else mpf(-100), log((v - low) * (v + low)) / 2, not falling)

    def at(self, dps):
        """u, w, b, to 6 digits short of dps."""
        family, nu, m, delta, v = self.mode
        with mp.workdps(dps + 20):
            v2 = mpf(v) ** 2
            if self.by_s:
                s = polish(lambda s: condition(family, nu, delta, v2, s, v2 - s), self.start, self.start)
                q = v2 - s
            else:
                q = exp(2 * polish(lambda t: condition(family, nu, delta, v2, v2 - exp(2 * t), exp(2 * t)), self.start, 1))
                s = v2 - q
            return sqrt(s), sqrt(q), q / v2


CUTOFFS = {}


def cutoff(family, nu, m, delta):
    """Cut-off V to FINE digits."""
    if family != "HE":
        return zero(nu, m)
    if nu == 1:
        return zero(1, m - 1)
    if (nu, m, delta) not in CUTOFFS:
        def f(s):  # (1/r + 1) J_{nu-1} = u J_nu/(nu - 1); J_{nu-1}/(u J_nu) falls from +inf to 0 through the interval
            r = 1 - 2 * mpf(delta)
            return below(nu, sqrt(s)) - r / ((1 + r) * (nu - 1))
        low, high = interval("HE", nu, m)
        with mp.workdps(30):
            start = bracketed(f, low ** 2, high ** 2, True)
        values = []
        for dps in (COARSE, FINE):
            with mp.workdps(dps):
                values.append(sqrt(polish(f, start, start)))
        assert abs(values[0] - values[1]) < values[1] * mpf(10) ** -40, (nu, m, delta)
        with mp.workdps(FINE):
            z = values[1]
            assert zeros_below(nu, z) == m - 1 and zeros_below(nu - 1, z) == m - 1, (nu, m, delta)
            raw = lambda y: (1 / (1 - 2 * mpf(delta)) + 1) * besselj(nu - 1, y) - y * besselj(nu, y) / (nu - 1)
            assert raw(z * (1 - mpf(10) ** -40)) * raw(z * (1 + mpf(10) ** -40)) < 0, (nu, m, delta)
        CUTOFFS[nu, m, delta] = z
    return CUTOFFS[nu, m, delta]


# ---- Checks -----------------------------------------------------------------------------------------------

def own(nu, u, w):
    """J_{nu-1}, J_nu, J_{nu+1} of u and K_{nu-1}, K_nu of w by mpmath."""
    return [besselj(nu + k, u) for k in (-1, 0, 1)] + [besselk(nu - 1, w), besselk(nu, w)]


def determinant(family, nu, delta, v2, s, q, functions=None):
    """The eigenvalue equation as published, in mpmath's own Bessel functions, times (u w J_nu K_nu)^2 (nu > 0) or its root."""
    u, w, r = sqrt(s), sqrt(q), 1 - 2 * mpf(delta)
    before, j, after, k1, k = functions or own(nu, u, w)
    dj = (before - after) / 2
    dk = -k1 - nu / w * k
    if family in ("TE", "TM"):
        return w * k * dj + (r if family == "TM" else 1) * u * dk * j
    return (w * k * dj + u * dk * j) * (w * k * dj + r * u * dk * j) - (nu * j * k) ** 2 * v2 * (q + r * s) / (s * q)


def check_determinant(family, nu, delta, v, w):
    """The sign of the determinant changes within 1e-28 of the root, relative to the smaller of u^2 and w^2."""
    with mp.workdps(70 + int(4 * max(0, -mp.log10(w)))):
        v2 = mpf(v) ** 2
        q = +w ** 2
        h = min(q, v2 - q) * mpf(10) ** -28
        f = [determinant(family, nu, delta, v2, v2 - y, y) for y in (q - h, q + h)]
        assert f[0] * f[1] < 0, (family, nu, delta, v)


def changes(family, nu, m, delta, v):
    """Sign changes of the condition in the mode's interval, by sampling it, closer near the ends."""
    low, high = interval(family, nu, m)
    with mp.workdps(25):
        v2 = mpf(v) ** 2
        top = min(high ** 2, v2)
        if top <= low ** 2:
            return 0
        width = top - low ** 2
        parts = [mpf(10) ** -k for k in range(9, 1, -1)] + [i / mpf(24) for i in range(1, 24)] + [1 - mpf(10) ** -k for k in range(2, 10)]
        pairs = [(top - width * (1 - p), v2 - top + width * (1 - p)) for p in parts]
        if top == v2:  # w from small down to exponentially small
            pairs += [(v2 - q, q) for q in (width * mpf(10) ** -k for k in [10, 11, 12, 14, 16, 18, 20, 24] + [30 * 2 ** j for j in range(12)])]
        values = [condition(family, nu, delta, v2, s, q) for s, q in pairs]
        signs = [family != "HE"] + [y < 0 for y in values]  # at the lower end HE has +inf, the rest -inf
        return sum(a != b for a, b in zip(signs, signs[1:]))


def check_counts(delta, v):
    """Every guided mode: one root each, none of the others, and as many sign changes of the determinant. Returns how many."""
    most = int(v) + 1  # HE(nu)1 needs V > j_{nu-2,1}; asserted below
    with mp.workdps(30):
        v2, n = mpf(v) ** 2, int(50 * v)
        grid, signs = [v * mpf(2 * i + 1) / (2 * n) for i in range(n)], {}
        for u in grid:
            s, q = u * u, v2 - u * u
            w = sqrt(q)
            js, ks = [besselj(k, u) for k in range(most + 2)], [besselk(0, w), besselk(1, w)]
            for k in range(1, most):
                ks.append(ks[k - 1] + 2 * k / w * ks[k])
            for family, nu in [("TE", 0), ("TM", 0)] + [("", k) for k in range(1, most + 1)]:
                five = [js[nu - 1], js[nu], js[nu + 1], ks[nu - 1], ks[nu]] if nu else [-js[1], js[0], js[1], ks[1], ks[0]]
                signs.setdefault((family, nu), []).append(determinant(family, nu, delta, v2, s, q, five) > 0)
    raw = {key: sum(a != b for a, b in zip(y, y[1:])) for key, y in signs.items()}
    total = 0
    for nu in range(most + 1):
        guided = 0
        for family in ("TE", "TM") if nu == 0 else ("HE", "EH"):
            found, m = 0, 1
            while interval(family, nu, m)[0] < v:
                inside = cutoff(family, nu, m, delta) < v
                assert changes(family, nu, m, delta, v) == inside, (family, nu, m, delta, v)
                found += inside
                m += 1
            if nu == 0:
                assert raw[family, 0] == found, (family, delta, v)
            guided += found
        if nu:
            assert raw["", nu] == guided, (nu, delta, v, guided)
        total += guided * (1 if nu == 0 else 2)
    assert guided == 0
    return total


def first_order(family, nu, delta, v, u, w):
    """Shift of b by perturbation of the vector wave equation: -<(div e)(e . grad ln n^2)>/<e^2> over V^2, e the LP field."""
    with mp.workdps(60):
        l = {"HE": nu - 1}.get(family, nu + 1)
        x = -u * besselj(l + 1, u) / besselj(l, u) + l  # u J_l'/J_l
        norm = (besselk(l - 1, w) * besselk(l + 1, w) / besselk(l, w) ** 2 - besselj(l - 1, u) * besselj(l + 1, u) / besselj(l, u) ** 2) / 2
        if family == "TM":
            return 2 * mpf(delta) * (x + 1) / (mpf(v) ** 2 * norm)
        return mpf(delta) * (x - l if family == "HE" else x + l) / (mpf(v) ** 2 * norm)


def row(family, nu, m, delta, v):
    """u, w, b, shift at FINE digits, checked."""
    edge = cutoff(family, nu, m, delta)
    assert v > edge, (family, nu, m, delta, v)
    assert cutoff(family, nu, m, 0) <= edge  # so that the LP mode is guided
    vector = Root(family, nu, m, delta, v)
    scalar = Root(family, nu, m, 0, v) if family != "TE" else None
    levels = []
    for dps in (COARSE, FINE):
        u, w, b = vector.at(dps)
        with mp.workdps(dps):
            lp = scalar.at(dps) if scalar else (u, w, b)
            levels.append([u, w, b, b - lp[2]])
    with mp.workdps(FINE):
        for c, f in zip(*levels):
            assert abs(c - f) <= abs(f) * mpf(10) ** -27, (family, nu, m, delta, v, c, f)
        u, w, b, shift = levels[1]
        assert zeros_below(nu, u) == (m - 1 if family == "HE" else m), (family, nu, m, delta, v)
        a = (below(nu, u) if nu else -above(0, u)) - (gamma_of(nu, w) if nu else k01(w) / w)
        assert nu == 0 or (a < 0) == (family == "HE"), (family, nu, m, delta, v)
        assert changes(family, nu, m, delta, v) == 1, (family, nu, m, delta, v)
    check_determinant(family, nu, delta, v, w)
    if delta < 1e-5 and family != "TE" and v - edge > 0.009:  # the second order, relative to the first, is below 60 delta there
        first = first_order(family, nu, delta, v, lp[0], lp[1])
        assert abs(first - shift) < abs(shift) * 60 * delta, (family, nu, m, delta, v, first, shift)
    return levels[1]


# ---- Which modes ------------------------------------------------------------------------------------------

DELTAS = [1e-12, 1e-6, 0.001, 0.003, 0.01, 0.03, 0.1, 0.2, 0.3, 0.4, 0.4132]
LOW = [("TE", 0, 1), ("TM", 0, 1), ("HE", 2, 1), ("EH", 1, 1), ("HE", 3, 1), ("HE", 1, 2), ("EH", 2, 1), ("HE", 4, 1), ("TM", 0, 2), ("HE", 2, 2)]
HIGH = [("HE", 10, 1), ("EH", 10, 2), ("HE", 50, 1), ("EH", 50, 1), ("HE", 50, 3), ("EH", 49, 7), ("HE", 1, 20), ("TE", 0, 20),
        ("TM", 0, 20), ("EH", 5, 20), ("HE", 7, 20), ("HE", 2, 20), ("HE", 30, 5)]


def just_above(family, nu, m, delta, distance):
    """The double nearest to V_c + distance, moved up to lie above V_c."""
    c = cutoff(family, nu, m, delta)
    with mp.workdps(FINE):
        v = float(c + mpf(distance))
    while mpf(v) <= c:
        v = math.nextafter(v, math.inf)
    return v


def modes():
    """family, nu, m, delta, v."""
    # HE11.
    for i, delta in enumerate(DELTAS):
        for v in (0.5, 0.7, 1.0, 1.3, 1.6, 2.0, 2.4, 3.0, 5.0, 8.0, 15.0, 40.0, 100.0)[i % 2::2]:
            yield "HE", 1, 1, delta, v
    for delta in (1e-12, 0.003, 0.2, 0.4132):
        for v in (0.2, 0.25, 0.3, 0.4):
            if v > 0.2 or delta < 0.4:
                yield "HE", 1, 1, delta, v
    # The next ones.
    turn = 0
    for delta in DELTAS:
        for mode in LOW:
            c = cutoff(*mode, delta)
            able = [v for v in (2.5, 3.0, 3.5, 4.0, 4.7, 5.5, 6.4, 8.0, 12.0, 25.0, 60.0, 100.0) if v > c + 0.01]
            for k in (0, 4):
                yield (*mode, delta, able[(turn % 4 + k) % len(able)])
            turn += 1
    # High orders.
    for i, mode in enumerate(HIGH):
        for j, v in enumerate((70.0, 85.0, 100.0, 300.0, 1000.0)):
            for delta in (DELTAS[(i + 2 * j) % 11], DELTAS[(i + 2 * j + 5) % 11]):
                if v > cutoff(*mode, delta) + 0.01:
                    yield (*mode, delta, v)
    for delta in (1e-12, 0.01, 0.4132):
        for mode in (("HE", 1, 1), ("TE", 0, 1), ("TM", 0, 1), ("HE", 2, 1), ("EH", 1, 1)):
            yield (*mode, delta, 1000.0)
    # Next to cut-off.
    near = [("TE", 0, 1), ("TM", 0, 1), ("HE", 2, 1), ("EH", 1, 1), ("HE", 3, 1), ("HE", 3, 2), ("TM", 0, 3), ("EH", 2, 3), ("HE", 2, 5),
            ("HE", 10, 2), ("EH", 10, 1), ("HE", 50, 1), ("EH", 50, 2), ("HE", 4, 20), ("TM", 0, 20)]
    for i, mode in enumerate(near):
        for j in range(8):
            for delta in (DELTAS[(i + 3 * j) % 11], DELTAS[(i + 3 * j + 6) % 11]):
                yield (*mode, delta, just_above(*mode, delta, "1e-%d" % (j + 1)))
    for i, (mode, minus_log) in enumerate(((("HE", 1, m), k) for m in (2, 3, 20) for k in (300, 100, 40, 15, 7, 3, 1))):
        delta = DELTAS[(4 * i) % 11]
        part = 2 * (1 - 2 * delta) / (2 - 2 * delta)  # how much slower w falls
        yield (*mode, delta, just_above(*mode, delta, repr(1 / (float(cutoff(*mode, delta)) * minus_log * part))))
    # Higher contrasts than glasses have.
    for delta in (0.45, 0.49, 0.499):
        for mode, v in ((("HE", 1, 1), 1.5), (("HE", 1, 1), 6.0), (("TM", 0, 1), 3.0), (("HE", 2, 1), 6.0), (("EH", 1, 1), 6.0), (("EH", 3, 2), 20.0), (("HE", 4, 3), 20.0)):
            yield (*mode, delta, v)
    # Anywhere.
    rng = random.Random(12)
    for _ in range(120):
        delta = round(math.exp(rng.uniform(math.log(1e-4), math.log(0.4132))), 5)
        v = round(math.exp(rng.uniform(math.log(2.5), math.log(100))), 3)
        while True:
            family = rng.choice(("TE", "TM", "HE", "HE", "EH", "EH"))
            nu = 0 if family[0] == "T" else 1 + int(rng.random() ** 2 * min(v, 50))
            m = 1 + int(rng.random() ** 2 * min(v / 3, 20))
            if cutoff(family, nu, m, delta) < v:
                break
        yield family, nu, m, delta, v


def cutoff_modes():
    turn = 0
    for delta in DELTAS + [0.45, 0.49]:
        for nu, m in ((2, 1), (3, 1), (2, 2), (4, 1), (3, 2), (5, 1)):
            yield delta, "HE", nu, m
        for nu, m in [((2, 20), (10, 1)), ((50, 1), (10, 3)), ((20, 2), (7, 20)), ((50, 5), (30, 1)), ((3, 9), (50, 20))][turn % 5]:
            yield delta, "HE", nu, m
        turn += 1
    for family, nu, m in (("HE", 1, 1), ("HE", 1, 2), ("HE", 1, 20), ("TE", 0, 1), ("TM", 0, 1), ("TM", 0, 5), ("EH", 1, 1), ("EH", 2, 1), ("EH", 50, 20)):
        yield 0.01, family, nu, m
        yield 0.4, family, nu, m


HEADER = """\
# Exact vector modes of the step-index fibre: u, w, b, and how far b lies from the LP mode that the vector mode belongs to.
# Made by (from the repository root): python3 modes/testdata/vector.py > modes/testdata/vector.csv
# mpmath at 60 and 90 digits, agreeing to 25 (shift included); 25 significant digits. v and delta are exact doubles.
# delta = (n1^2 - n2^2)/(2 n1^2); b = w^2/v^2. Roots of the eigenvalue equation of A. W. Snyder and J. D. Love, Optical Waveguide Theory
# (1983), chapter 12: (J_nu'/(u J_nu) + K_nu'/(w K_nu)) (n1^2 J_nu'/(u J_nu) + n2^2 K_nu'/(w K_nu)) = nu^2 (1/u^2 + 1/w^2) (n1^2/u^2 + n2^2/w^2),
# proved by its change of sign in mpmath's own Bessel functions. Labels proved: the family by the sign of J_{nu-1}/(u J_nu) - K_{nu-1}/(w K_nu)
# (HE below 0, EH above), m by counting zeros of J_nu below u (HE m - 1, EH, TE, TM m).
# shift = b - b of LP: HE(nu)m -> LP(nu-1,m), EH(nu)m -> LP(nu+1,m), TM0m -> LP1m; 0 for TE0m, whose equation is that of LP1m.
# The LP mode is guided wherever the vector mode is, so that no shift is empty. LP: u J_{l-1}/J_l = -w K_{l-1}/K_l (D. Gloge, Appl. Opt. 10, 2252 (1971)).
v,delta,family,nu,m,u,w,b,shift"""

CUTOFF_HEADER = """\
# Cut-off V of the exact vector modes of the step-index fibre.
# Made by (from the repository root): python3 modes/testdata/vector.py cutoff > modes/testdata/vector_cutoff.csv
# mpmath at 60 and 90 digits, agreeing to 40; 25 significant digits. delta = (n1^2 - n2^2)/(2 n1^2) is an exact double.
# HE, nu >= 2: (n1^2/n2^2 + 1) J_{nu-1}(u) = u J_nu(u)/(nu - 1), the root between the zeros m - 1 and m of J_nu; HE1m: 0 and j_{1,m-1};
# TE0m, TM0m: j_{0,m}; EH(nu)m: j_{nu,m} (A. W. Snyder and J. D. Love, Optical Waveguide Theory (1983), chapter 12).
# Each HE cut-off is also the limit of the root of the eigenvalue equation as w goes to 0.
delta,family,nu,m,cutoff_v"""


def text(v):
    if v == 0:
        return "0"
    return nstr(v, 25, strip_zeros=False, min_fixed=0, max_fixed=0)


def main():
    if sys.argv[1:] == ["cutoff"]:
        print(CUTOFF_HEADER)
        for delta, family, nu, m in cutoff_modes():
            c = cutoff(family, nu, m, delta)
            if family == "HE" and nu > 1:
                with mp.workdps(100):  # the determinant at w = 1e-14 changes sign next to u = V_c
                    q = mpf(10) ** -28
                    f = [determinant("HE", nu, delta, s + q, s, q) for s in ((c * (1 + k * mpf(10) ** -24)) ** 2 for k in (-1, 1))]
                    assert f[0] * f[1] < 0, (delta, nu, m)
            print(",".join([repr(delta), family, str(nu), str(m), text(c)]))
        return
    print(HEADER)
    seen = set()
    for mode in modes():
        if mode in seen:
            continue
        seen.add(mode)
        family, nu, m, delta, v = mode
        print(",".join([repr(v), repr(delta), family, str(nu), str(m)] + [text(y) for y in row(*mode)]), flush=True)
    counted = [check_counts(delta, v) for delta, v in ((1e-3, 11.0), (0.1, 12.3), (0.3, 9.7), (0.4132, 12.0))]
    print(f"{len(seen)} rows; of four fibres all {counted} guided modes counted in the determinant", file=sys.stderr)


main()
