"""Reference tables of the dispersion of step-index fibres, in arbitrary precision.

Run from the repository root:
    python3 dispersion/testdata/step.py > dispersion/testdata/step.csv
    python3 dispersion/testdata/step.py zeros > dispersion/testdata/zeros.csv

Needs mpmath. Core germania-silica, cladding fused silica. One root of the eigenvalue equation is solved at each
wavelength; the derivatives follow from truncated power series in the wavelength through the differential equation
of w^2(V^2), exact to rounding. Each row is computed at 60 and at 90 digits, which must agree to 25; its root is
checked against mpmath's own Bessel functions, and all its derivatives against numerical differentiation of the
solved effective index. The power in the core is that of the fields themselves, by Lommel's integrals of J_l^2 and
K_l^2, samples of it checked against numerical integration.
"""
import math
import pathlib
import sys

from mpmath import mp, mpf, besselj, besselk, cosh, diff, euler, exp, findroot, linspace, log, nstr, pi, quad, sqrt

sys.path.insert(0, str(pathlib.Path(__file__).resolve().parents[2] / "modes" / "testdata"))
from lp import COARSE, FINE, cutoff, side_g, side_x, solve, zero  # noqa: E402

C = 299792458  # speed of light in vacuum (m/s), exact
ORDER = 4      # derivatives carried


# ---- Glass ------------------------------------------------------------------------------------------------

SILICA = [("0.6961663", "0.0684043"), ("0.4079426", "0.1162414"), ("0.8974794", "9.896161")]
GERMANIA = [("0.80686642", "0.068972606"), ("0.71815848", "0.15396605"), ("0.85416831", "11.841931")]


def terms(fraction):
    """A and L^2 (micrometres^2) of germania-silica, linear in the mole fraction in A and L (Fleming 1984)."""
    p = mpf(fraction)
    for (a0, l0), (a1, l1) in zip(SILICA, GERMANIA):
        yield mpf(a0) + p * (mpf(a1) - mpf(a0)), (mpf(l0) + p * (mpf(l1) - mpf(l0))) ** 2


def index_squared(fraction, x):
    return 1 + sum(a * x * x / (x * x - b) for a, b in terms(fraction))


def v_of(fraction, radius, lam):
    x = lam * 10 ** 6
    return 2 * pi * mpf(radius) / lam * sqrt(index_squared(fraction, x) - index_squared(0, x))


# ---- Power series in e = wavelength/wavelength_0 - 1 --------------------------------------------------------

def mul(a, b):
    return [sum(a[i] * b[k - i] for i in range(k + 1)) for k in range(min(len(a), len(b)))]


def div(a, b):
    q = []
    for k in range(min(len(a), len(b))):
        q.append((a[k] - sum(q[i] * b[k - i] for i in range(k))) / b[0])
    return q


def root(a):
    r = [sqrt(a[0])]
    for k in range(1, len(a)):
        r.append((a[k] - sum(r[i] * r[k - i] for i in range(1, k))) / (2 * r[0]))
    return r


def add(a, b, factor=1):
    return [p + factor * q for p, q in zip(a, b)]


def scale(a, factor):
    return [factor * p for p in a]


def compose(f, inner):
    """f(inner), inner[0] = 0."""
    out = [mpf(0)] * (ORDER + 1)
    for c in reversed(f):
        out = mul(out, inner)
        out[0] += c
    return out


def index_squared_series(fraction, lam):
    x2 = scale([mpf(1), mpf(2), mpf(1)] + [mpf(0)] * (ORDER - 2), (lam * 10 ** 6) ** 2)
    total = [mpf(1)] + [mpf(0)] * ORDER
    for a, b in terms(fraction):
        total = add(total, div(scale(x2, a), [x2[0] - b] + x2[1:]))
    return total


def index_series(fraction, radius, l, m, wavelength, start=None):
    """The series of the effective index in e, with b and the root (u, w)."""
    lam = mpf(wavelength)
    return mode_series(index_squared_series(fraction, lam), index_squared_series(0, lam), radius, l, m, lam, start)


def mode_series(core, clad, radius, l, m, lam, start=None, known=None):
    """The same from the series of the glasses' squared indices; known is the root, where it is."""
    contrast = add(core, clad, -1)
    inverse = [mpf(1), mpf(-2), mpf(3), mpf(-4), mpf(5)]  # (1 + e)^-2
    p = scale(mul(contrast, inverse), (2 * pi * mpf(radius) / lam) ** 2)  # V^2
    u, w = known or solve(sqrt(p[0]), l, m, start)
    # q = w^2 and G = w K_{l-1}/K_l obey, with s = V^2 - q and H = G (G + 2 l),
    #     dq/dP = q (s + H)/(H P),   dG/dP = (H/q - 1)/2 dq/dP,   P = V^2.
    q, g = [w * w], [side_g(l, w)]
    for k in range(ORDER):
        h = mul(g, [g[0] + 2 * l] + g[1:])
        s = add(p, q, -1)
        slope = mul(div(mul(q, add(s, h)), mul(h, p[:k + 1])), [(i + 1) * p[i + 1] for i in range(k + 1)])
        ratio = div(h, q)
        gslope = mul(scale([ratio[0] - 1] + ratio[1:], mpf(1) / 2), slope)
        q.append(slope[k] / (k + 1))
        g.append(gslope[k] / (k + 1))
    b = div(q, p)
    return root(add(clad, mul(b, contrast))), b[0], u, w


def constant(series):
    return [series[0]] + [mpf(0)] * ORDER


def core_power(l, u, w):
    """The share of the power in the core: the integral of f^2 r over 0 < r < 1 over that over all r.

    f = J_l(u r)/J_l(u) in the core, K_l(w r)/K_l(w) outside. By E. C. J. von Lommel's integrals, twice the parts are
    1 - J_{l-1} J_{l+1}/J_l^2 at u and K_{l-1} K_{l+1}/K_l^2 - 1 at w (G. N. Watson, Theory of Bessel Functions, 5.11).
    """
    x, g = side_x(l, u), side_g(l, w)
    inside = 1 - x * (2 * l - x) / u ** 2
    outside = g * (g + 2 * l) / w ** 2 - 1
    return inside / (inside + outside)


def check_power(l, u, w, share):
    """core_power by numerical integration, outside in t = ln r; K_l is the integral of exp(-x cosh y) cosh(l y) over y > 0."""
    with mp.workdps(35):
        h = mpf(1) / 24
        ys = [i * h for i in range(int(log(2 + (300 + 8 * l) / w) / h) + 2)]
        coshes = [(cosh(y), cosh(l * y) / (1 if y else 2)) for y in ys]

        def k(x):
            total = mpf(0)
            for c, f in coshes:
                term = exp(-x * c) * f
                total += term
                if term < total * mpf(10) ** -34:
                    return total
            raise ArithmeticError((l, x))
        j, k1 = besselj(l, u), k(w)
        check = besselk(l, w) / h / k1 - 1
        assert abs(check) < mpf(10) ** -29, (l, w, check)
        parts = int(u / 6) + 2
        inside = quad(lambda r: (besselj(l, u * r) / j) ** 2 * r, linspace(0, 1, parts + 1), method="gauss-legendre")
        end = log(1 + 40 / w)  # beyond it less than 1e-34 of the whole
        parts = int(end) + 6
        outside = quad(lambda t: (k(w * exp(t)) / k1) ** 2 * exp(2 * t), linspace(0, end, parts + 1), method="gauss-legendre", maxdegree=4)
        assert abs(inside / (inside + outside) / share - 1) < mpf(10) ** -28, (l, u, w, share)


def split(fraction, radius, l, m, wavelength, u, w):
    """The power in the core, and D of the mode with one cause kept each. The field frozen:
    n^2(x) = n_eff^2 + P (n1^2(x) - n1^2) + (1 - P) (n2^2(x) - n2^2). The glasses frozen: V goes like 1/x.
    """
    lam, share = mpf(wavelength), core_power(l, u, w)
    core, clad = index_squared_series(fraction, lam), index_squared_series(0, lam)
    waveguide = mode_series(constant(core), constant(clad), radius, l, m, lam, known=(u, w))[0]
    material = root([waveguide[0] ** 2] + add(scale(core, share), clad, 1 - share)[1:])
    return [share] + [-2 * n[2] / (lam * C) for n in (material, waveguide)]


def effective_index(fraction, radius, l, m, lam, start):
    """The plain definition, for numerical differentiation."""
    v = v_of(fraction, radius, lam)
    _, w = solve(v, l, m, start)
    x = lam * 10 ** 6
    core, clad = index_squared(fraction, x), index_squared(0, x)
    return sqrt(clad + (w / v) ** 2 * (core - clad))


def values(fraction, radius, l, m, wavelength, start=None):
    """index, group index, D, slope, beta2, beta3, beta4, b, power in the core, D by cause; SI units. And the root."""
    n, b, u, w = index_series(fraction, radius, l, m, wavelength, start)
    lam = mpf(wavelength)
    d2, d3 = 2 * n[2] / lam ** 2, 6 * n[3] / lam ** 3
    omega = 2 * pi * C / lam
    # With d = omega'/omega - 1, e = 1/(1 + d) - 1.
    inner = [mpf(0)] + [mpf((-1) ** k) for k in range(1, ORDER + 1)]
    beta = mul(compose(n, inner), [omega / C, omega / C] + [mpf(0)] * (ORDER - 1))
    betas = [math.factorial(k) * beta[k] / omega ** k for k in range(ORDER + 1)]
    return [n[0], n[0] - n[1], -lam / C * d2, -(d2 + lam * d3) / C] + betas[2:] + [b] + split(fraction, radius, l, m, wavelength, u, w), (u, w)


def check_root(l, u, w):
    """The eigenvalue equation in mpmath's own Bessel functions."""
    left = u * besselj(l - 1, u) * besselk(l, w)
    right = -w * besselk(l - 1, w) * besselj(l, u)
    assert abs(left - right) < (abs(left) + abs(right)) * mpf(10) ** -45, (l, u, w)


def check_derivatives(fraction, radius, l, m, wavelength, fine, start):
    """D, slope, beta2, beta3, beta4 and D by cause by numerical differentiation. Returns the digits that agree.

    Next to a zero of D digits are counted against the size that D has 10 nm away.
    """
    mp.dps = 60
    lam = mpf(wavelength)
    gap = abs(v_of(fraction, radius, lam) / cutoff(l, m) - 1) if cutoff(l, m) else mpf(1)
    h = min(1, gap ** 2) * mpf(10) ** -18
    mp.dps = 200
    lam, omega = mpf(wavelength), 2 * pi * C / mpf(wavelength)
    # One-parameter stencils of five points, exact for quartics; their error is of second order in h.
    def stencil(f):
        s = [f(mpf(k) * h) for k in (-2, -1, 0, 1, 2)]
        return [s[2], (s[0] - 8 * s[1] + 8 * s[3] - s[4]) / 12 / h, (-s[0] + 16 * s[1] - 30 * s[2] + 16 * s[3] - s[4]) / 12 / h ** 2,
                (-s[0] + 2 * s[1] - 2 * s[3] + s[4]) / 2 / h ** 3, (s[0] - 4 * s[1] + 6 * s[2] - 4 * s[3] + s[4]) / h ** 4]
    n = lambda l_: effective_index(fraction, radius, l, m, l_, start)
    s = stencil(lambda e: n(lam * (1 + e)))
    t = stencil(lambda e: n(lam / (1 + e)) * (1 + e) * omega / C)
    other = [s[0], s[0] - s[1], -s[2] / lam / C, -(s[2] + s[3]) / lam ** 2 / C] + [t[k] / omega ** k for k in (2, 3, 4)]
    # One cause kept: n with the power of the core given, and with the glasses as they are at lam.
    glasses = lambda l_: [index_squared(p, l_ * 10 ** 6) for p in (fraction, 0)]
    (core, clad), v, share = glasses(lam), v_of(fraction, radius, lam), fine[8]
    frozen = lambda l_: sqrt(other[0] ** 2 + share * (glasses(l_)[0] - core) + (1 - share) * (glasses(l_)[1] - clad))
    guide = lambda l_: sqrt(clad + (solve(v * lam / l_, l, m, start)[1] * l_ / (v * lam)) ** 2 * (core - clad))
    other += [fine[7], share] + [-stencil(lambda e: f(lam * (1 + e)))[2] / lam / C for f in (frozen, guide)]
    near = abs(fine[3]) * mpf(10) ** -8
    floor = [0, 0, near, 0, near * lam ** 2 / C, 0, 0, 0, 0, 0, 0]
    worst = 99
    for a, b, f in zip(fine, other, floor):
        if a != b:
            worst = min(worst, -mp.log10(abs(a - b) / max(abs(a), f)))
    assert worst > 25, (fraction, radius, l, m, wavelength, worst)
    return worst


# ---- Which fibres -----------------------------------------------------------------------------------------

def micro(text):
    """The double nearest to text micrometres."""
    return float(text + "e-6")


def cutoff_wavelength(fraction, radius, l, m):
    """Where V = V_c, between 0.36 and 4.3 um, or None."""
    mp.dps = 40
    f = lambda x: v_of(fraction, radius, x / 10 ** 6) - cutoff(l, m)
    c = cutoff(l, m)
    mp.dps = 40
    if f(mpf("0.36")) < 0 or f(mpf("4.3")) > 0:
        return None
    return findroot(lambda x: v_of(fraction, radius, x / 10 ** 6) - c, (mpf("0.36"), mpf("4.3")), solver="anderson", tol=1e-60) / 10 ** 6


def zero_dispersion(fraction, radius, low=1.0, high=2.0, steps=100):
    """All zeros of D of LP01 between low and high um, by a scan in steps of 10 nm."""
    def second(x):
        return index_series(fraction, radius, 0, 1, x / 10 ** 6)[0][2]
    mp.dps = 25
    grid = [mpf(low) + mpf(high - low) * i / steps for i in range(steps + 1)]
    signs = [second(x) for x in grid]
    found = []
    for i in range(steps):
        if signs[i] * signs[i + 1] < 0:
            mp.dps = 45
            found.append(findroot(second, (grid[i], grid[i + 1]), solver="anderson", tol=1e-70) / 10 ** 6)
            mp.dps = 25
    return found


FIBRES = [(0.02, "5.5"), (0.03, "4.5"), (0.036, "4.1"), (0.036, "4.5"), (0.04, "2.4"), (0.05, "3.5"), (0.05, "2"), (0.06, "2.2"),
          (0.08, "2.5"), (0.1, "1.5"), (0.1, "1.8"), (0.1, "2"), (0.12, "1.6"), (0.15, "1.4"), (0.2, "1.2"), (0.2, "2"), (0.036, "10"),
          (0.15, "0.9"), (0.2, "25")]


def points():
    # Ordinary ones.
    high = [(1, 1), (2, 1), (0, 2), (3, 1), (1, 2), (5, 3), (12, 2), (0, 7), (30, 1), (60, 3)]
    turn = 0
    for fraction in (0.02, 0.036, 0.05, 0.1, 0.2):
        for radius in ("1", "2", "4.1", "8", "15", "25"):
            for wavelength in ("0.4", "0.6328", "0.85", "1.31", "1.55", "2"):
                mp.dps = 40
                v = v_of(fraction, micro(radius), mpf(micro(wavelength)))
                if v > 0.35 and (turn % 2 == 0 or v < 2.5):
                    yield fraction, micro(radius), 0, 1, micro(wavelength)
                turn += 1
                able = [p for p in high if cutoff(*p) < v - 0.02]
                if able:
                    yield (fraction, micro(radius), *able[turn % len(able)], micro(wavelength))
    # Next to cut-off.
    for fraction, radius, l, m in ((0.036, "4.1", 1, 1), (0.05, "3.5", 1, 1), (0.2, "1.2", 1, 1), (0.036, "8", 2, 1), (0.1, "2", 2, 1),
                                   (0.1, "4.1", 3, 1), (0.036, "10", 1, 2), (0.2, "15", 12, 4), (0.036, "8", 0, 2), (0.1, "4.1", 0, 3)):
        edge = cutoff_wavelength(fraction, micro(radius), l, m)
        for power in range(1, 10):
            if l == 0 and power > 2:
                break
            yield fraction, micro(radius), l, m, float(edge * (1 - mpf(10) ** -power))
        if l == 0:
            for part in ("0.005", "0.02", "0.05", "0.2"):
                yield fraction, micro(radius), l, m, float(edge * (1 - mpf(part)))
    # Next to zero dispersion.
    for fraction, radius in FIBRES:
        for z in zero_dispersion(fraction, micro(radius)):
            yield fraction, micro(radius), 0, 1, float(z)
            yield fraction, micro(radius), 0, 1, micro(nstr(z * 10 ** 6, 4))


HEADER = """\
# Effective index of LP(l,m) modes of step-index fibres and its derivatives with respect to wavelength, both glasses dispersing.
# Made by (from the repository root): python3 dispersion/testdata/step.py > dispersion/testdata/step.csv
# mpmath at 60 and 90 digits, agreeing to 25 digits, and with numerical differentiation at 200 digits; 25 significant digits.
# Core: germania-silica of mole fraction core_fraction (J. W. Fleming, Appl. Opt. 23, 4486 (1984): A_i and L_i linear in the fraction
# between fused silica and germania); cladding: fused silica (I. H. Malitson, J. Opt. Soc. Am. 55, 1205 (1965)).
# V = 2 pi radius/wavelength sqrt(n1^2 - n2^2); index^2 = n2^2 + b(V) (n1^2 - n2^2), b of the weakly guiding equation
# u J_{l-1}(u)/J_l(u) = -w K_{l-1}(w)/K_l(w) (D. Gloge, Appl. Opt. 10, 2252 (1971)).
# core_fraction, radius (m), wavelength (m) are exact doubles; published coefficients are exact decimals.
# SI: d = -(wavelength/c) index'' in s/m^2, slope = d(d)/d(wavelength) in s/m^3, beta_k in s^k/m; c = 299792458 m/s.
# core_power: the share P of the power, the square of the field J_l(u r) within and K_l(w r) outside, that is in the core (Lommel's
# integrals, samples checked against numerical integration to 28 digits). d_material: d of n^2(x) = index^2 + P (n1^2(x) - n1^2) +
# (1 - P) (n2^2(x) - n2^2), x the wavelength, all else held; d_waveguide: d of index with n1 and n2 held, V going like 1/x.
# Where d is below 1e-8 wavelength slope the wavelength is the double nearest to a zero of d, and d is all cancellation.
core_fraction,radius,l,m,wavelength,index,group_index,d,slope,beta2,beta3,beta4,b,core_power,d_material,d_waveguide"""

ZEROS_HEADER = """\
# Zero-dispersion wavelengths of LP01 and the cut-off wavelength of LP11 of step-index fibres.
# Made by (from the repository root): python3 dispersion/testdata/step.py zeros > dispersion/testdata/zeros.csv
# mpmath at 40 to 45 digits, proved by the signs at 28 digits either side; 25 significant digits. Glasses and definitions as in step.csv.
# core_fraction and radius (m) are exact doubles. zero_dispersion: the wavelength (m) between 1.0 and 2.0 um where d of LP01 is 0,
# the only one in a scan of d in steps of 10 nm; empty where there is none. lp11_cutoff: wavelength (m) where V = j_{0,1};
# empty where outside 0.36 to 4.3 um (the range of the germania fit).
core_fraction,radius,zero_dispersion,lp11_cutoff"""


def text(v):
    return nstr(v, 25, strip_zeros=False, min_fixed=0, max_fixed=0)


def main():
    if sys.argv[1:] == ["zeros"]:
        print(ZEROS_HEADER)
        for fraction, radius in FIBRES:
            found = zero_dispersion(fraction, micro(radius))
            assert len(found) <= 1, (fraction, radius, found)
            edge = cutoff_wavelength(fraction, micro(radius), 1, 1)
            mp.dps = 70  # signs either side prove the 25 digits
            for z, f in [(z, lambda y: index_series(fraction, radius_, 0, 1, y)[0][2]) for z in found] + [
                    (z, lambda y: v_of(fraction, radius_, y) - cutoff(1, 1)) for z in [edge] if z]:
                radius_ = micro(radius)
                assert f(z * (1 - mpf(10) ** -28)) * f(z * (1 + mpf(10) ** -28)) < 0, (fraction, radius)
            cells = [text(z) if z else "" for z in (found or [None]) + [edge]]
            print(",".join([repr(fraction), repr(micro(radius))] + cells))
        return
    print(HEADER)
    seen, digits = set(), 99
    for point in points():
        if point in seen:
            continue
        seen.add(point)
        fraction, radius, l, m, wavelength = point
        cutoff(l, m), zero(l, m)
        mp.dps = COARSE
        coarse, (u, w) = values(*point)
        mp.dps = FINE
        start = {"t": log(w), "q": w * w, "u": u}
        fine, (u, w) = values(*point, start)
        for k, (a, b) in enumerate(zip(coarse, fine)):
            assert abs(a - b) < abs(b) * mpf(10) ** -26, (point, k, a, b)
        check_root(l, u, w)
        if len(seen) % 10 == 0:
            check_power(l, u, w, fine[8])
        digits = min(digits, check_derivatives(*point, fine, {"t": log(w), "q": w * w, "u": u}))
        cells = [text(v) for v in fine]
        print(",".join([repr(fraction), repr(radius), str(l), str(m), repr(wavelength)] + cells))
    print(f"{len(seen)} rows; series and numerical differentiation agree to {float(digits):.1f} digits", file=sys.stderr)


main()
