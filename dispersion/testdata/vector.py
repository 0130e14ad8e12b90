"""Reference table of the dispersion of the exact vector modes of step-index fibres, in arbitrary precision.

Run from the repository root: python3 dispersion/testdata/vector.py > dispersion/testdata/vector.csv

Needs mpmath. One root of the eigenvalue equation (A. W. Snyder and J. D. Love, Optical Waveguide Theory, 1983, chapter 12) is
solved at each wavelength. With r = n2^2/n1^2, s = u^2, q = w^2, x = u J_{nu-1}/J_nu, g = w K_{nu-1}/K_nu, V^2 = s + q,
a = q x - s g, b = q x - r s g it is the polynomial

    a b = nu (a (q + r s) + b V^2)   (TE: a = 0, TM: b = 0),

from which the power series of q in the wavelength follow term by term, those of x(s) and g(q) by their differential equations, both
glasses dispersing: exact to rounding. HE is the root with x/s < g/q, EH the other; m is proved by the count of zeros of J_nu
below u (HE m - 1, the rest m). Each row is computed at 60 and at 90 digits, which must agree to 25; the determinant as published, in
mpmath's own Bessel functions, must change sign within 1e-28 of the root; and all derivatives must agree with numerical
differentiation at 200 digits of the index solved from the family's own equation, independent of the series.
"""
import math
import sys

from mpmath import mp, mpf, besselj, besselk, euler, exp, findroot, log, nstr, pi, sqrt

COARSE, FINE = 60, 90
C = 299792458  # speed of light in vacuum (m/s), exact
ORDER = 4      # derivatives carried


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

def condition(family, nu, r, s, q):
    """Falls (HE) or rises (the rest) through 0 at the mode, as s grows in the mode's interval; no cancellation at small w."""
    d, v2 = 1 - r, s + q
    u, w = sqrt(s), sqrt(q)
    if nu == 0:
        return q * above(0, u) + (r if family == "TM" else 1) * w * k01(w)
    gamma = gamma_of(nu, w)
    g = q * gamma
    h = 2 * nu + g
    p, pq = nu * v2 / s, nu * (2 * q / s + 1 + r)  # q P and q (P + Q); P = nu (1/s + 1/q), Q = nu (1/s + r/q)
    root = sqrt(pq * pq + d * d * g * h)
    if family == "HE":
        # With A = x/s - g/q: A^2 - A (P + Q - d g/q) - d g P/q = 0, A < 0
        return below(nu, u) - gamma * (1 - 2 * d * p / (pq - d * g + root))
    # With A = u J_{nu+1}/J_nu/s + h/q: A^2 - A (P + Q + d h/q) + d h P/q = 0, the smaller
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


def cutoff(family, nu, m, r):
    """Cut-off V to 20 digits."""
    if family != "HE":
        return zero(nu, m)
    if nu == 1:
        return zero(1, m - 1)
    low, high = interval("HE", nu, m)  # (1/r + 1) J_{nu-1} = u J_nu/(nu - 1)
    with mp.workdps(30):
        return sqrt(bracketed(lambda s: below(nu, sqrt(s)) - r / ((1 + r) * (nu - 1)), low ** 2, high ** 2, True))


def solve(family, nu, m, r, v2, start=None):
    """s, q, and what to start from next time. The unknown is s where V is above the interval of u, t = ln w elsewhere."""
    low, high = interval(family, nu, m)
    falling = family == "HE"
    by_s = start[0] if start else v2 > high ** 2
    f = lambda s: condition(family, nu, r, s, v2 - s)
    g = lambda t: condition(family, nu, r, v2 - exp(2 * t), exp(2 * t))
    if start:
        y = start[1]
    else:
        assert v2 > cutoff(family, nu, m, r) ** 2, (family, nu, m, v2)
        with mp.workdps(30):
            if by_s:
                y = bracketed(f, low ** 2, high ** 2, falling)
            else:
                y = bracketed(g, mpf(-10) ** 5 if (nu == 1 and falling) else mpf(-100), log(v2 - low ** 2) / 2, not falling)
    with mp.extradps(20):
        if by_s:
            y = polish(f, y, y)
            return y, v2 - y, (by_s, y)
        y = polish(g, y, 1)
        return v2 - exp(2 * y), exp(2 * y), (by_s, y)


def determinant(family, nu, r, s, q):
    """The eigenvalue equation as published, in mpmath's own Bessel functions, times (u w J_nu K_nu)^2 (nu > 0) or its root."""
    u, w = sqrt(s), sqrt(q)
    j, k = besselj(nu, u), besselk(nu, w)
    k1 = besselk(nu - 1, w)
    dj = (besselj(nu - 1, u) - besselj(nu + 1, u)) / 2
    dk = -k1 - nu / w * k
    if family in ("TE", "TM"):
        return w * k * dj + (r if family == "TM" else 1) * u * dk * j
    return (w * k * dj + u * dk * j) * (w * k * dj + r * u * dk * j) - (nu * j * k) ** 2 * (s + q) * (q + r * s) / (s * q)


# ---- Power series in e = wavelength/wavelength_0 - 1 --------------------------------------------------------

class Series:
    """A truncated power series, so that a formula serves for series and for numbers alike."""

    def __init__(self, c):
        self.c = list(c) + [mpf(0)] * (ORDER + 1 - len(c))

    @staticmethod
    def of(v):
        return v.c if isinstance(v, Series) else [mpf(v)] + [mpf(0)] * ORDER

    def __add__(self, o):
        return Series([a + b for a, b in zip(self.c, Series.of(o))])

    def __sub__(self, o):
        return Series([a - b for a, b in zip(self.c, Series.of(o))])

    def __rsub__(self, o):
        return Series([b - a for a, b in zip(self.c, Series.of(o))])

    def __mul__(self, o):
        b = Series.of(o)
        return Series([sum(self.c[i] * b[k - i] for i in range(k + 1)) for k in range(ORDER + 1)])

    def __truediv__(self, o):
        b, q = Series.of(o), []
        for k in range(ORDER + 1):
            q.append((self.c[k] - sum(q[i] * b[k - i] for i in range(k))) / b[0])
        return Series(q)

    def __rtruediv__(self, o):
        return Series(Series.of(o)) / self

    __radd__, __rmul__ = __add__, __mul__

    def sqrt(self):
        r = [sqrt(self.c[0])]
        for k in range(1, ORDER + 1):
            r.append((self.c[k] - sum(r[i] * r[k - i] for i in range(1, k))) / (2 * r[0]))
        return Series(r)

    def inside(self, f):
        """f(self - its constant term), f by its coefficients."""
        inner, out = Series([mpf(0)] + self.c[1:]), Series([mpf(0)])
        for c in reversed(f):
            out = out * inner + c
        return out


def along(value, at, slope):
    """Taylor coefficients about `at` of the y with y' = slope(y, variable), y = value there."""
    y, z = [value], Series([at, mpf(1)])
    for k in range(ORDER):
        y.append(slope(Series(y), z).c[k] / (k + 1))
    return y


# ---- Glass ------------------------------------------------------------------------------------------------

SILICA = [("0.6961663", "0.0684043"), ("0.4079426", "0.1162414"), ("0.8974794", "9.896161")]
GERMANIA = [("0.80686642", "0.068972606"), ("0.71815848", "0.15396605"), ("0.85416831", "11.841931")]
ARSENIC_SULPHIDE = [("1.8983678", "0.0225"), ("1.9222979", "0.0625"), ("0.8765134", "0.1225"), ("0.1188704", "0.2025"), ("0.9569903", "750")]


def square(glass, x2):
    """n^2 of a glass; x2 = (wavelength/um)^2, a number or a series."""
    name, _, parameter = glass.partition(":")
    p = mpf(float(parameter)) if parameter else None
    if name in ("air", "constant"):
        return p * p + 0 * x2
    if name == "silica":
        terms = [(mpf(a), mpf(l) ** 2) for a, l in SILICA]
    elif name == "germania-silica":
        terms = [(mpf(a0) + p * (mpf(a1) - mpf(a0)), (mpf(l0) + p * (mpf(l1) - mpf(l0))) ** 2)
                 for (a0, l0), (a1, l1) in zip(SILICA, GERMANIA)]
    elif name == "as2s3":
        terms = [(mpf(a), mpf(b)) for a, b in ARSENIC_SULPHIDE]
    else:
        raise KeyError(glass)
    total = 1
    for a, b in terms:
        total = a * x2 / (x2 - b) + total
    return total


def fibre(core, cladding, radius, lam, e=0):
    """n1^2, n2^2, V^2 at lam (1 + e)."""
    stretch = 1 + e
    x2 = (mpf(lam) * 10 ** 6) ** 2 * stretch * stretch
    one, two = square(core, x2), square(cladding, x2)
    return one, two, (2 * pi * mpf(radius) / mpf(lam)) ** 2 * (one - two) / (stretch * stretch)


# ---- One mode -----------------------------------------------------------------------------------------------

def index_series(core, cladding, radius, family, nu, m, wavelength):
    """The series of the effective index in e, and the root."""
    one, two, p = fibre(core, cladding, radius, wavelength, Series([mpf(0), mpf(1)]))
    r = two / one
    s0, q0, start = solve(family, nu, m, r.c[0], p.c[0])
    u, w = sqrt(s0), sqrt(q0)
    if nu:
        x0, g0 = s0 * below(nu, u), q0 * gamma_of(nu, w)
    else:
        x0, g0 = -s0 * above(0, u), w * k01(w)
    x = along(x0, s0, lambda y, s: (-1 - y * (y - 2 * nu) / s) / 2)
    g = along(g0, q0, lambda y, q: (y * (y + 2 * nu) / q - 1) / 2)

    def equation(q):
        q = Series(q)
        s = p - q
        xs, gs = s.inside(x), q.inside(g)
        a, b = q * xs - s * gs, q * xs - r * s * gs
        if nu == 0:
            return (a if family == "TE" else b).c
        return (a * b - nu * (a * (q + r * s) + b * p)).c
    q = [q0]
    for k in range(1, ORDER + 1):  # coefficient k of the equation is linear in that of q
        without, with_one = equation(q)[k], equation(q + [mpf(1)])[k]
        q.append(-without / (with_one - without))
    for c, d in zip(equation(q), equation([q0])):
        assert abs(c) < mpf(10) ** -(mp.dps - 25) * max(1, abs(d)), (family, nu, m)
    return (two + Series(q) / p * (one - two)).sqrt().c, (s0, q0, r.c[0], start)


def values(*point):
    """index, group index, D, slope, beta2, beta3, beta4; SI units. And the root."""
    n, root = index_series(*point)
    lam = mpf(point[-1])
    d2, d3 = 2 * n[2] / lam ** 2, 6 * n[3] / lam ** 3
    omega = 2 * pi * C / lam
    # With d = omega'/omega - 1, e = 1/(1 + d) - 1.
    inner = Series([mpf((-1) ** k) for k in range(ORDER + 1)])
    beta = (inner.inside(n) * Series([omega / C, omega / C])).c
    betas = [math.factorial(k) * beta[k] / omega ** k for k in range(ORDER + 1)]
    return [n[0], n[0] - n[1], -lam / C * d2, -(d2 + lam * d3) / C] + betas[2:], root


def check_root(family, nu, m, root):
    """Family and rank of the root, and the published determinant about it."""
    s, q, r, _ = root
    u, w = sqrt(s), sqrt(q)
    assert zeros_below(nu, u) == (m - 1 if family == "HE" else m), (family, nu, m, u)
    if nu:
        assert (below(nu, u) < gamma_of(nu, w)) == (family == "HE"), (family, nu, m, u)
    with mp.workdps(80 + int(4 * max(0, -mp.log10(w)))):
        h = min(s, q) * mpf(10) ** -28
        f = [determinant(family, nu, r, s - y, q + y) for y in (h, -h)]
        assert f[0] * f[1] < 0, (family, nu, m, u)


def check_derivatives(point, fine, root):
    """All values by numerical differentiation. Returns the digits that agree.

    Next to a zero of D digits are counted against its slope times a hundred-millionth of the wavelength.
    """
    core, cladding, radius, family, nu, m, wavelength = point
    with mp.workdps(40):
        lowest = cutoff(family, nu, m, root[2])
        gap = sqrt(root[0] + root[1]) / lowest - 1 if lowest else 1
    start = root[3]
    with mp.workdps(200):
        h = min(1, gap ** 2) * mpf(10) ** -18
        lam, omega = mpf(wavelength), 2 * pi * C / mpf(wavelength)

        def n(e):
            one, two, v2 = fibre(core, cladding, radius, wavelength, e)
            _, q, _ = solve(family, nu, m, two / one, v2, start)
            return sqrt(two + q / v2 * (one - two))

        # Stencils of five points, exact for quartics; their error is of second order in h or better.
        def stencil(f):
            s = [f(mpf(k) * h) for k in (-2, -1, 0, 1, 2)]
            return [s[2], (s[0] - 8 * s[1] + 8 * s[3] - s[4]) / 12 / h, (-s[0] + 16 * s[1] - 30 * s[2] + 16 * s[3] - s[4]) / 12 / h ** 2,
                    (-s[0] + 2 * s[1] - 2 * s[3] + s[4]) / 2 / h ** 3, (s[0] - 4 * s[1] + 6 * s[2] - 4 * s[3] + s[4]) / h ** 4]
        s = stencil(n)
        t = stencil(lambda d: n(1 / (1 + d) - 1) * (1 + d) * omega / C)
        other = [s[0], s[0] - s[1], -s[2] / lam / C, -(s[2] + s[3]) / lam ** 2 / C] + [t[k] / omega ** k for k in (2, 3, 4)]
        near = abs(fine[3]) * lam * mpf(10) ** -8
        floor = [0, 0, near, 0, near * lam ** 2 / (2 * pi * C), 0, 0]
        worst = mpf(99)
        for a, b, f in zip(fine, other, floor):
            if a != b:
                worst = min(worst, -mp.log10(abs(a - b) / max(abs(a), f)))
    assert worst > 25, (point, worst)
    return worst


# ---- Which modes ------------------------------------------------------------------------------------------

def micro(text):
    """The double nearest to text micrometres."""
    return float(text + "e-6")


FIRST = [("HE", 1, 1), ("TE", 0, 1), ("TM", 0, 1), ("HE", 2, 1), ("EH", 1, 1), ("HE", 3, 1), ("HE", 1, 2)]


def guided(core, cladding, radius, mode, wavelength, margin="0.02"):
    with mp.workdps(40):
        one, two, v2 = fibre(core, cladding, radius, wavelength)
        return sqrt(v2) > cutoff(*mode, two / one) + (mpf(margin) if mode[:2] != ("HE", 1) or mode[2] == 1 else mpf("0.3"))


def edge(core, cladding, radius, mode, low, high):
    """Cut-off wavelength (m), between low and high um."""
    with mp.workdps(30):
        def f(x):
            one, two, v2 = fibre(core, cladding, radius, x / 10 ** 6)
            return sqrt(v2) - cutoff(*mode, two / one)
        return findroot(f, (mpf(low), mpf(high)), solver="anderson", tol=1e-34) / 10 ** 6


def points():
    """core, cladding, radius, family, nu, m, wavelength."""
    def every(core, cladding, radius, wavelengths, modes=FIRST):
        for wavelength in wavelengths:
            for mode in modes:
                if guided(core, cladding, micro(radius), mode, micro(wavelength)):
                    yield (core, cladding, micro(radius), *mode, micro(wavelength))
    # Weakly guiding.
    yield from every("germania-silica:0.036", "silica", "4.1", ("0.6328", "0.85", "1.31", "1.55", "2"), FIRST[:4])
    yield from every("germania-silica:0.036", "silica", "8", ("0.6328", "1.31"))
    yield from every("germania-silica:0.1", "silica", "4.1", ("0.85", "1.55"))
    yield from every("germania-silica:0.2", "silica", "2", ("0.633", "1.31"))
    yield from every("germania-silica:0.2", "silica", "1.2", ("0.85", "1.55"))
    yield from every("germania-silica:0.2", "germania-silica:0.05", "25", ("1.55",), FIRST + [("HE", 12, 4), ("EH", 7, 3), ("TM", 0, 6)])
    # Silica thread in air.
    for diameter, radius in (("0.4", "0.2"), ("0.457", "0.2285"), ("0.5", "0.25"), ("0.6", "0.3"), ("0.8", "0.4"), ("1", "0.5"), ("1.2", "0.6"), ("1.5", "0.75"), ("2", "1"), ("3", "1.5")):
        yield from every("silica", "air:1", radius, ("0.633", "1.064", "1.55"), FIRST[:1])
        if diameter in ("0.6", "1", "1.5", "3"):
            yield from every("silica", "air:1", radius, ("0.633", "1.064", "1.55"), FIRST[1:])
    yield from every("silica", "air:1", "1.5", ("0.633",), [("EH", 3, 1), ("HE", 6, 1), ("TM", 0, 3), ("HE", 4, 2), ("HE", 10, 1)])
    # As2S3 thread in air and in silica.
    for cladding in ("air:1", "silica"):
        for radius in ("0.25", "0.5", "1"):
            yield from every("as2s3", cladding, radius, ("1.55", "2", "2.5"), FIRST[:1])
        yield from every("as2s3", cladding, "0.6", ("1.55", "2"), FIRST[1:])
        yield from every("as2s3", cladding, "2", ("1.55", "2.5"), FIRST[2:] + [("EH", 4, 2), ("HE", 9, 1)])
    # No dispersion of the glass.
    yield from every("constant:2.4", "constant:1", "0.5", ("1.55",))
    yield from every("constant:1.5", "constant:1.49", "5", ("1.06",))
    yield from every("constant:1.45", "constant:1.444", "4.1", ("1.55",))
    # Next to cut-off.
    for core, cladding, radius, mode, low, high in (("silica", "air:1", "0.5", ("TE", 0, 1), "0.5", "3"), ("silica", "air:1", "0.5", ("TM", 0, 1), "0.5", "3"),
            ("silica", "air:1", "0.5", ("HE", 2, 1), "0.5", "3"), ("as2s3", "air:1", "0.5", ("EH", 1, 1), "0.8", "3"),
            ("germania-silica:0.036", "silica", "8", ("HE", 3, 1), "0.6", "2.5"), ("germania-silica:0.036", "silica", "4.1", ("HE", 2, 1), "0.6", "2.5")):
        e = edge(core, cladding, micro(radius), mode, low, high)
        for part in ("0.02", "0.001", "0.00001"):
            yield (core, cladding, micro(radius), *mode, float(e * (1 - mpf(part))))


HEADER = """\
# Effective index of exact vector modes of step-index fibres and its derivatives with respect to wavelength, both glasses dispersing.
# Made by (from the repository root): python3 dispersion/testdata/vector.py > dispersion/testdata/vector.csv
# mpmath at 60 and 90 digits, agreeing to 25 digits, and with numerical differentiation at 200 digits; 25 significant digits.
# silica: I. H. Malitson, J. Opt. Soc. Am. 55, 1205 (1965). germania-silica:X of mole fraction X: J. W. Fleming, Appl. Opt. 23, 4486 (1984), A_i
# and L_i linear in the fraction between fused silica and germania. as2s3: W. S. Rodney et al., J. Opt. Soc. Am. 48, 633 (1958).
# air:1 and constant:N are an index that does not disperse.
# index^2 = n2^2 + (w/V)^2 (n1^2 - n2^2), V = 2 pi radius/wavelength sqrt(n1^2 - n2^2), w the root of the eigenvalue equation of A. W. Snyder and
# J. D. Love, Optical Waveguide Theory (1983), chapter 12: (J_nu'/(u J_nu) + K_nu'/(w K_nu)) (n1^2 J_nu'/(u J_nu) + n2^2 K_nu'/(w K_nu))
# = nu^2 (1/u^2 + 1/w^2) (n1^2/u^2 + n2^2/w^2). Labels proved: HE where J_{nu-1}/(u J_nu) < K_{nu-1}/(w K_nu), else EH; m by counting zeros of J_nu
# below u (HE m - 1, the rest m).
# radius (m), wavelength (m), X and N are exact doubles; published coefficients are exact decimals.
# SI: group_index = index - wavelength index'; d = -(wavelength/c) index'' in s/m^2; slope = d(d)/d(wavelength) in s/m^3;
# beta_k = d^k(index omega/c)/d omega^k in s^k/m; c = 299792458 m/s.
core,cladding,radius,family,nu,m,wavelength,index,group_index,d,slope,beta2,beta3,beta4"""


def text(v):
    return nstr(v, 25, strip_zeros=False, min_fixed=0, max_fixed=0)


def main():
    print(HEADER)
    seen, digits = set(), 99
    for point in points():
        if point in seen:
            continue
        seen.add(point)
        core, cladding, radius, family, nu, m, wavelength = point
        interval(family, nu, m)
        mp.dps = COARSE
        coarse, _ = values(*point)
        mp.dps = FINE
        fine, root = values(*point)
        for k, (a, b) in enumerate(zip(coarse, fine)):
            assert abs(a - b) < abs(b) * mpf(10) ** -26, (point, k, a, b)
        check_root(family, nu, m, root)
        digits = min(digits, check_derivatives(point, fine, root))
        mp.dps = FINE
        print(",".join([core, cladding, repr(radius), family, str(nu), str(m), repr(wavelength)] + [text(v) for v in fine]), flush=True)
    print(f"{len(seen)} rows; series and numerical differentiation agree to {float(digits):.1f} digits", file=sys.stderr)


main()
