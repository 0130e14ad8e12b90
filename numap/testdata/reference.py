# Reference values for package numap with mpmath at 50 digits, from the definitions
# (integrals are integrated, not taken from the closed forms under test). Inputs are
# doubles, taken at their exact values. Needs python3-mpmath.
import random

from mpmath import (mp, mpf, sqrt, pi, asin, cos, sin, log, exp, quad, besseljzero,
                    inf, nstr)

mp.dps = 50
INF = float("inf")
HALF_PI = float(pi / 2)

print("# Made by: /usr/bin/python3 reference.py > reference.csv")
print("# function; arguments in the order of the Go call, a Core as radius, NA, alpha; value")


def out(name, args, value):
    print("%s,%s,%s" % (name, " ".join("Inf" if a == INF else repr(float(a)) for a in args),
                        nstr(value, 25)))


def table(name, f, rows):
    for row in rows:
        out(name, row, f(*[inf if a == INF else mpf(a) for a in row]))


random.seed(1)  # the same "random" rows each time


def some(count, *ranges):
    """Rows with each argument spread evenly in its logarithm over a range."""
    return [tuple(low * (high / low) ** random.random() for low, high in ranges) for _ in range(count)]


def close(count):
    """Pairs of indices with 1e-15 to 1 between them."""
    rows = []
    for gap, n2 in some(count, (1e-15, 1), (1, 2)):
        rows.append((n2 + gap, n2))
    return rows


pairs = [(1.48, 1.46), (1.5, 1.47), (1.4440000000010001, 1.444), (1.444 + 1e-12, 1.444),
         (1.4440000000000002, 1.444), (3.5, 1.0), (1.457, 1.0), (1.4682, 1.4629), (4.0, 1e-9),
         (1e300, 9.99e299), (1.7e308, 1.2e308), (3e-310, 2.5e-310), (1.0000000000000002, 1.0),
         (2e-162, 1e-162)]
pairs += close(40)
depressed = [(1.44, 1.444), (1.444, 1.4440000000000002), (1.0, 1.0), (1e-3, 2.0)]


def na_exact(n1, n2):
    return sqrt(n1 * n1 - n2 * n2)


table("NA", na_exact, pairs)
table("Delta", lambda n1, n2: (n1 * n1 - n2 * n2) / (2 * n1 * n1), pairs + depressed)
table("DeltaWeak", lambda n1, n2: (n1 - n2) / n1, pairs + depressed)

deltas = [(1.46, 0.01), (1.48, 0.015), (1.5, 1e-12), (1.444, 2.2e-16), (1.46, 0.49999999999), (1.46, 0.2642),
          (1e-300, 0.003), (1e300, 1e-300), (1.4, 5e-324), (1.4, 1e-310)]
table("NAWeak", lambda n1, d: n1 * sqrt(2 * d), deltas)
signed = deltas + [(1.444, -0.003), (1.444, -1e-14), (1.0, -1e10), (1.444, 0.0)]
table("CladdingForDelta", lambda n1, d: n1 * sqrt(1 - 2 * d), signed)
table("CladdingForDeltaWeak", lambda n1, d: n1 * (1 - d), signed + [(1.5, 0.9999999999)])
table("CoreForDelta", lambda n2, d: n2 / sqrt(1 - 2 * d), signed)
table("CoreForDeltaWeak", lambda n2, d: n2 / (1 - d), signed + [(1.5, 0.9999999999)])

forna = [(1.48, 0.2425), (1.5, 0.3), (1.444, 1e-8), (1.444, 1.7e-6), (1.444, 1.4439999999999997), (3.5, 3.35), (1e300, 5e299)]
table("CladdingForNA", na_exact, forna)
table("CoreForNA", lambda n2, na: sqrt(n2 * n2 + na * na), forna + [(1.0, 3.4), (1e-3, 2.0)])

cones = [(0.2425, 1.0), (0.3, 1.333), (1e-9, 1.0), (1e-170, 1.0), (0.9999999999999999, 1.0), (1.0, 1.0000000000000002),
         (1.0, 1.000000000001), (0.5, 1.0), (1.05, 1.33), (0.0, 1.0), (1.3, 1.0), (1e300, 1.1e300), (0.1, 1e-5), (1.332999999999, 1.333)]
cones += some(20, (1e-6, 1), (1, 1.6)) + [(b, a) for a, b in close(20)]


def angle(na, n0):
    return asin(min(mpf(1), na / n0))


table("AcceptanceAngle", angle, cones)
table("SolidAngle", lambda na, n0: 2 * pi * (1 - cos(angle(na, n0))), cones[:3] + cones[4:])  # 1e-170: squared, rounds to 0
table("SolidAngleWeak", lambda na, n0: pi * min(mpf(1), na / n0) ** 2, cones[:3] + cones[4:])

triples = [(4.1e-6, 0.12, 1.55e-6), (40e-6, 0.2563, 0.85e-6), (1e-15, 1e-9, 1e-3), (1e-300, 1e-20, 1e-310),
           (1e250, 1e100, 1e60), (1e250, 1e-100, 1e-60), (25e-6, 0.2, 1e-12), (3e-200, 1e-200, 1e-300), (1e-6, 3.3, 1e2),
           (5e-324, 0.1, 5e-324)] + some(40, (1e-7, 1e-3), (1e-3, 2), (1e-7, 1e-4))
table("V", lambda a, na, x: 2 * pi * a * na / x, triples)
table("CutoffWavelength", lambda a, na, v: 2 * pi * a * na / v, [(4.5e-6, 0.10324, 2.405), (25e-6, 0.2, 3.518), (1e200, 1e200, 1e200), (1e-200, 1e-200, 1e-200)])
table("RadiusForV", lambda v, na, x: v * x / (2 * pi * na), [(2.405, 0.12, 1.31e-6), (3.4, 0.212, 1.3e-6), (1e200, 1e200, 1e200), (1e-200, 1e-200, 1e-200), (2.4, 1.06, 633e-9)])
table("NAForV", lambda v, a, x: v * x / (2 * pi * a), [(2.405, 4.1e-6, 1.31e-6), (31.4, 25e-6, 1e-6), (1e-5, 1e-3, 1e-7), (1e-200, 1e-200, 1e-200)])
j01 = besseljzero(0, 1)
alphas = [(1.0,), (2.0,), (INF,), (1e-3,), (1e12,), (1.9,), (1e-300,)]
table("PowerLawSingleModeV", lambda al: j01 * sqrt(1 + 2 / al), alphas)


def count(v, al):
    return v * v / 2 / (1 + 2 / al)


vs = [(75.8,), (1e-9,), (1e4,), (1e150,), (2.405,)]
table("StepModeCount", lambda v: v * v / 2, vs)
va = [(31.4, 2.0), (31.4, 1.94), (1e3, INF), (1e-3, 1e-3), (1e6, 1e9), (1e100, 1e-300), (50.0, 0.7), (1e154, 2.0)]
table("PowerLawModeCount", count, va)
table("PowerLawModeGroups", lambda v, al: sqrt(count(v, al)), va)
table("PowerLawGroupB", lambda g, v, al: 1 - (g / sqrt(count(v, al))) ** (2 / (1 + 2 / al)),
      [(1.0, 31.4, 2.0), (0.0, 31.4, 2.0), (15.0, 31.4, 2.0), (15.69999, 31.4, 2.0), (3.0, 40.0, 1.9), (1.0, 1e6, 2.0),
       (12.0, 25.0, INF), (1.0, 100.0, 0.5), (1e-200, 1e3, 2.0), (7.0, 20.0, 8.0)] + some(40, (1, 30), (100, 1000), (1, 10)))


def local(a, na, al, r):
    if r > a:
        return mpf(0)
    return na if al == inf else na * sqrt(1 - (r / a) ** al)


points = [(25e-6, 0.2, 2.0, 12.5e-6), (25e-6, 0.2, 2.0, 24.999999999e-6), (25e-6, 0.2, 2.0, 1e-12), (25e-6, 0.2, 1.9, 24.999999999e-6),
          (25e-6, 0.2, 1.9, 20e-6), (25e-6, 0.2, 1.0, 1e-6), (25e-6, 0.2, INF, 25e-6), (25e-6, 0.2, INF, 26e-6), (25e-6, 0.2, 1e4, 24.999e-6),
          (25e-6, 0.2, 1e9, 24.99999999e-6), (25e-6, 0.2, 1e-3, 1e-9), (25e-6, 0.2, 1e-6, 24e-6), (1e-200, 0.2, 2.0, 3e-201), (1e200, 0.2, 3.0, 9e199),
          (1.0, 1e-8, 2.0, 0.9999999999999999), (1.0, 0.3, 3.7, 0.9999999999999999)]
points += some(30, (1.0, 1.0), (0.1, 1.0), (0.5, 20), (0.01, 1))
points += [(a, na, al, 1 - gap) for a, na, al, gap in some(20, (1.0, 1.0), (0.1, 1.0), (0.5, 20), (1e-15, 0.1))]
table("LocalNA", local, points)


def lambertian(a, na, al, s, n0):
    def at(r):
        return min(mpf(1), (local(a, na, al, r) / n0) ** 2)
    if s == 0:
        return at(mpf(0))
    top = min(a, s)
    cuts = [mpf(0), top]
    if na > n0 and al != inf:
        q = a * (1 - (n0 / na) ** 2) ** (1 / al)
        if q < top:
            cuts = [mpf(0), q, top]
    return quad(lambda r: 2 * r / s ** 2 * at(r), cuts)


table("LambertianShare", lambertian,
      [(25e-6, 0.2, INF, 35e-6, 1.0), (50e-6, 0.2, INF, 35e-6, 1.0), (25e-6, 0.2, 2.0, 20e-6, 1.0), (25e-6, 0.2, 2.0, 25e-6, 1.0),
       (25e-6, 0.2, 2.0, 100e-6, 1.333), (25e-6, 0.275, 1.94, 0.0, 1.0), (25e-6, 0.275, 1.94, 1e-9, 1.0), (31.25e-6, 0.275, 1.94, 31.249999e-6, 1.0),
       (25e-6, 0.2, 0.3, 24e-6, 1.0), (25e-6, 0.2, 1e6, 24.99e-6, 1.0), (1.0, 1.2, 2.0, 0.9, 1.0), (1.0, 1.2, 2.0, 0.2, 1.0),
       (1.0, 1.0000000001, 2.0, 1.0, 1.0), (1.0, 1.0, 2.0, 1.0, 1.0), (1.0, 3.3, 2.0, 1.0, 1.0), (1.0, 3.3, 1.9, 1.5, 1.333),
       (1.0, 3.3, 8.0, 0.95, 1.0), (1.0, 30.0, 2.0, 1.0, 1.0), (1.0, 1.01, 0.5, 1.0, 1.0), (1.0, 1.2, INF, 2.0, 1.0), (1.0, 1e-9, 2.0, 1.0, 1.0)]
      + some(40, (1, 1), (0.05, 4), (0.5, 20), (0.1, 3), (1, 1.6)))


def cosine(na, m, n0):
    th = angle(na, n0)
    # Share = integral of cos^m sin over the cone over that over the half-space.
    return quad(lambda t: cos(t) ** m * sin(t), [0, th / 2, th]) * (m + 1)


table("CosineShare", cosine,
      [(0.2, 1.0, 1.0), (0.2, 0.0, 1.0), (0.2, 30.0, 1.0), (0.5, 181.8, 1.0), (1e-7, 1.0, 1.0), (0.99999, 1.0, 1.0), (0.99999, 0.0, 1.0),
       (1.2, 1.0, 1.0), (0.275, 2.5, 1.333), (0.0, 1.0, 1.0), (0.71, 0.1, 1.0), (0.9999999999, 1e-3, 1.0)]
      + some(30, (1e-3, 1), (0.1, 300), (1, 1.6)))
mp.dps = 400  # a cosine 1e-300 below 1
table("CosineOrder", lambda h: -log(mpf(2)) / log(cos(h)),
      [(float(pi / 3),), (0.0872664625997165,), (1e-8,), (1.0,), (0.3,), (1.2,), (1.5,), (1.5707963267948963,), (0.79,), (0.81,), (1e-150,)])
mp.dps = 50
table("GaussianSpatialShare", lambda a, w: 1 - exp(-2 * (a / w) ** 2),
      [(25e-6, 20e-6), (1e-9, 1e-3), (25e-6, 3e-6), (1.0, 1.0), (1e-200, 1e-195), (1e200, 1e205)])
table("GaussianAngularShare", lambda na, w, x: 1 - exp(-2 * (pi * w * na / x) ** 2),
      [(0.2, 3e-6, 0.85e-6), (0.2, 1e-6, 1.55e-6), (1e-9, 3e-6, 1e-6), (0.12, 5e-6, 1.55e-6), (1e-3, 1e-300, 1e-301)])


def gaussian(a, na, al, w, x):
    A, B = 2 * (a / w) ** 2, 2 * (pi * w * na / x) ** 2
    def f(t):
        return A * exp(-A * t) * (1 - exp(-B * (1 - (mpf(0) if al == inf else t ** (al / 2)))))
    cuts = {mpf(0), mpf(1)}
    for k in (mpf(1) / 8, mpf(1) / 2, 2, 8, 30):
        if k / A < 1: cuts.add(k / A)
        if k / B < 1: cuts.add(1 - k / B)
        if al != inf and k / al < 1: cuts.add(1 - k / al)
    mp.dps = 40
    v = quad(f, sorted(cuts), maxdegree=10)
    mp.dps = 50
    return v


table("GaussianShare", gaussian,
      [(25e-6, 0.2, 2.0, 20e-6, 0.85e-6), (25e-6, 0.2, 2.0, 3e-6, 0.85e-6), (25e-6, 0.2, 2.0, 1e-6, 1.55e-6), (25e-6, 0.2, 1.94, 24e-6, 1.3e-6),
       (25e-6, 0.2, 2.0, 200e-6, 0.85e-6), (25e-6, 0.275, 1.0, 10e-6, 0.85e-6), (25e-6, 0.2, INF, 20e-6, 0.85e-6), (25e-6, 0.2, 1e4, 20e-6, 0.85e-6),
       (25e-6, 0.2, 50.0, 26e-6, 2e-6), (25e-6, 0.2, 0.5, 12e-6, 5e-6), (25e-6, 0.2, 2.0, 0.3e-6, 1e-6), (25e-6, 1e-4, 2.0, 20e-6, 1e-6),
       (1e-3, 0.39, 2.0, 0.4e-3, 0.5e-6), (1e-3, 0.39, 3.3, 1e-2, 0.5e-6), (25e-6, 0.2, 0.1, 20e-6, 0.85e-6), (10e-6, 0.1, 2.0, 5e-6, 5e-6)]
      + some(60, (5e-6, 1e-3), (0.05, 1), (0.5, 20), (2e-6, 2e-4), (4e-7, 2e-6))
      + some(30, (5e-6, 1e-3), (0.05, 1), (2, 2), (2e-6, 2e-4), (4e-7, 2e-6))
      + some(20, (1e-6, 1e-5), (1e-3, 0.1), (2, 2), (2e-6, 2e-5), (1e-6, 1e-5)))

table("SkewAcceptanceAngle", lambda na, n0, g: asin(min(mpf(1), na / (n0 * cos(g)))),
      [(0.4, 1.0, 0.8726646259971648), (0.4, 1.0, 0.0), (0.2, 1.333, 1.2), (0.2, 1.0, 1.5), (1e-9, 1.0, HALF_PI), (1e-18, 1.0, HALF_PI), (0.9, 1.0, 1e-9), (0.0, 1.0, 1.0)]
      + some(40, (0.05, 0.5), (1, 1.6), (0.01, 1.5)))


def invariants(a, na, al, r, t, g, n2):
    n = sqrt(n2 ** 2 + local(a, na, al, r) ** 2)
    return sqrt(n ** 2 - t ** 2), r / a * t * sin(g), n2


rays = [(25e-6, 0.2, 2.0, 10e-6, 0.1, 0.3, 1.444), (25e-6, 0.2, INF, 25e-6, 0.3, 1.2, 1.444), (25e-6, 0.2, 2.0, 0.0, 0.2, 0.0, 1.444),
        (25e-6, 1e-7, 2.0, 24e-6, 1e-8, 1.5, 1.444), (1.0, 1e-6, INF, 0.9999999999, 1e-6, 1.5, 1.444), (1.0, 1e-6, INF, 0.9999999999, 1.1e-6, 1.5, 1.444),
        (1.0, 1e-6, INF, 1.0, 1.0000000000000002e-06, 0.0, 1.444), (1.0, 1e-6, INF, 1.0, 1.0000000000000002e-06, 1e-7, 1.444),
        (1.0, 1e-6, INF, 1.0, 1.0000000000000002e-06, 3e-8, 1.444), (1.0, 1e-6, 2.0, 0.5, 9e-7, 1.1, 1.444), (1.0, 0.2, 2.0, 0.9, 0.11, 1.4, 1.444),
        (1.0, 0.2, 2.0, 0.9, 0.3, 0.9, 1.444), (1.0, 0.2, 1.5, 0.3, 0.5, 0.2, 1.444), (1.0, 1.05, INF, 1.0, 1.2, 0.7, 1.0), (1.0, 0.2, 2.0, 1.0, 0.1, 1.2, 1.444),
        (1.0, 0.2, 2.0, 1.0, 0.0, 1.2, 1.444)]
rays += some(60, (1, 1), (0.05, 0.3), (1, 10), (0.1, 1), (0.02, 0.6), (0.1, 1.5), (1.44, 1.46))
for row in rays:
    beta, l, n2 = invariants(*[inf if x == INF else mpf(x) for x in row])
    out("Beta", row, beta)
    out("L", row, l)
    out("RayKind", row, 1 if beta >= n2 else 2 if beta ** 2 + l ** 2 > n2 ** 2 else 3)
