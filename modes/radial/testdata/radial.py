"""Reference tables of the scalar (LP) modes of round fibres with radial profiles, in arbitrary precision.

Run from the repository root:
    python3 modes/radial/testdata/radial.py > modes/radial/testdata/parabola.csv
    python3 modes/radial/testdata/radial.py layers > modes/radial/testdata/layers.csv
    python3 modes/radial/testdata/radial.py cutoff > modes/radial/testdata/cutoff.csv
    python3 modes/radial/testdata/radial.py power > modes/radial/testdata/power.csv

Needs Python 3.9 and mpmath. With R in units of the outermost radius and q = w^2 = V^2 b,

    psi'' + psi'/R + (V^2 f(R) - l^2/R^2 - q) psi = 0 for R < 1, psi = K_l(w R) beyond, psi and psi' continuous.

The solution regular on the axis is carried to R = 1: for 1 - R^2 by Kummer's function, for layers by cylinder
functions, for 1 - R^alpha by its series in R^2 and R^(alpha + 2), which converges everywhere. A mode is a zero of

    D = psi'(1) + (l + G) psi(1), G = w K_{l-1}(w)/K_l(w), and a cut-off one of the same with G = 0.

All of them are entire functions of q, summed in integers. The label m is proved by Sturm's theorem: the modes
above q are as many as the zeros in (0, infinity) of the solution regular on the axis. Within R < 1 these are
counted from signs at points so close together that, by comparison with a sine or J_0, no two zeros fall between
neighbours; beyond R = 1 there is one zero more if psi(1) D < 0, and none otherwise. Every value is found at one
precision and again at a higher one, which must agree to 25 digits.
"""
import math
import sys

from mpmath import (mp, mpf, besselj, bessely, besseli, besselk, besseljzero, euler, exp, fac, hyp1f1, log, nstr, pi,
                    quad, sqrt)

COARSE, FINE, LOW = 62, 90, 30
FLOOR = mpf(10) ** -160  # modes of smaller q are left out


# ---- Outside ----------------------------------------------------------------------------------------------

def k01(w):
    """K_1(w)/K_0(w), by the asymptotic or the power series (DLMF 10.40.2, 10.31.2)."""
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
        bits = mp.prec + 2 * int(w)
        q = int(mp.ldexp(w * w / 4, bits))
        one = 1 << bits
        term, i0, i1, s, harmonic, k = one, one, one, 0, 0, 0
        while term:
            k += 1
            term = (term * q >> bits) // (k * k)
            harmonic += one // k
            i0 += term
            i1 += term // (k + 1)
            s += term * harmonic >> bits
        i0, i1, s = (mp.ldexp(mpf(x), -bits) for x in (i0, i1, s))
        i1 *= w / 2
        k0 = s - (log(w / 2) + euler) * i0
        return (1 / w - i1 * k0) / (i0 * k0)


def outside(l, q):
    """G = w K_{l-1}(w)/K_l(w); 0 at cut-off."""
    if q == 0:
        return mpf(0)
    w = sqrt(q)
    r = k01(w)
    if l == 0:
        return w * r
    g = w / r
    for j in range(1, l):
        g = q / (2 * j + g)
    return g


# ---- Inside -----------------------------------------------------------------------------------------------

def march(sign, l, level, a, b):
    """Zeros in (a, b) of a solution with this sign function, where level(R) >= V^2 f - q in (R, b)."""
    changes, before = 0, sign(a) if a else 1
    while a < b:
        k2 = level(a)
        if k2 <= l * l / b ** 2:
            a = b  # (R psi')' has the sign of psi: one zero at most
        elif a == 0:
            a = min(b, 2.35 / math.sqrt(k2))  # J_0 has no zero below 2.404
        else:
            a = min(b, a + 0.97 * math.pi / math.sqrt(k2 + (0.25 / a ** 2 if l == 0 else 0)))
        after = sign(a)
        changes += before != after
        before = after
    return changes


class Parabola:
    """f = 1 - R^2: psi = R^l exp(-V R^2/2) M(a, l + 1, V R^2), a = (l + 1)/2 - (V^2 - q)/(4 V)."""
    name, top = "parabola", 1

    def at(self, v, q, l, r=1):
        """psi and R psi' at r, but for a positive factor."""
        bits = mp.prec + int(4 * v) + 64
        with mp.workprec(bits + 32):
            a, x = mpf(l + 1) / 2 - (v - q / v) / 4, v * mpf(r) ** 2
            one, fa, fx = 1 << bits, int(mp.ldexp(a, bits)), int(mp.ldexp(x, bits))
        t, s0, s1, k = one, one, 0, 0
        while t and not (-3 < t < 3 and k > v):
            t = (t * (fa + k * one) >> bits) * fx // ((l + 1 + k) * (k + 1)) >> bits
            k += 1
            s0 += t
            s1 += k * t
        s0, s1 = mp.ldexp(mpf(s0), -bits), mp.ldexp(mpf(s1), -bits)
        return s0, (l - x) * s0 + 2 * s1

    def nodes(self, v, q, l):
        vf, qf = float(v), float(q)
        return march(lambda r: self.at(v, q, l, r)[0] > 0, l, lambda r: (vf * vf * (1 - r * r) - qf) + 1e-9, 0.0, 1.0)


class Power:
    """f = 1 - R^alpha: psi = R^l sum c_ij R^(2 i + (alpha + 2) j)."""
    top = 1

    def __init__(self, alpha, name=None):
        self.alpha, self.name = alpha, name or f"power:{alpha:g}"

    def at(self, v, q, l, r=1, double=False):
        bits = mp.prec + int(4 * v) + 64
        with mp.workprec(bits + 32):
            r = mpf(r)
            fa = int(mp.ldexp((v * v - q) * r ** 2, bits))
            fb = int(mp.ldexp(v * v * r ** (mpf(self.alpha) + 2), bits))
        if self.alpha == int(self.alpha) and not double:
            s0, s1 = self.single(l, int(self.alpha), fa, fb, bits)
        else:
            s0, s1 = self.both(l, fa, fb, bits)
        s0, s1 = mp.ldexp(mpf(s0), -bits), mp.ldexp(mpf(s1), -bits)
        return s0, l * s0 + s1

    @staticmethod
    def single(l, alpha, fa, fb, bits):
        """Sums of c_n and n c_n: n (n + 2 l) c_n = -A c_{n-2} + B c_{n-2-alpha}."""
        step = 2 if alpha % 2 == 0 else 1
        c = {0: 1 << bits}
        s0, s1, n, quiet = c[0], 0, 0, 0
        while quiet < alpha + 4:
            n += step
            t = ((fb * c.get(n - 2 - alpha, 0) - fa * c.get(n - 2, 0)) >> bits) // (n * (n + 2 * l))
            c[n] = t
            c.pop(n - 4 - alpha, None)
            s0 += t
            s1 += n * t
            quiet = quiet + 1 if -3 < t < 3 else 0
        return s0, s1

    def both(self, l, fa, fb, bits):
        """Sums of c_ij and s c_ij, s = 2 i + (alpha + 2) j: s (s + 2 l) c_ij = -A c_{i-1,j} + B c_{i,j-1}."""
        with mp.workprec(bits + 32):
            unit = int(mp.ldexp(mpf(self.alpha) + 2, bits))
        s0 = s1 = 0
        above, j = [], 0  # the terms of j - 1
        while True:
            line, t, i = [], 0, 0
            base = unit * j
            while True:
                if i == j == 0:
                    t = 1 << bits
                else:
                    s = base + (2 * i << bits)
                    t = ((fb * above[i] if i < len(above) else 0) - fa * t) // (s * (s + (2 * l << bits)) >> bits)
                    s1 += s * t >> bits
                s0 += t
                line.append(t)
                i += 1
                if i >= len(above) and -3 < t < 3:
                    break
            while line and -3 < line[-1] < 3:
                line.pop()
            if not line:
                return s0, s1
            above = line
            j += 1

    def nodes(self, v, q, l):
        vf, qf, alpha = float(v), float(q), float(self.alpha)
        return march(lambda r: self.at(v, q, l, r)[0] > 0, l,
                     lambda r: (vf * vf * (1 - r ** alpha) - qf) + 1e-9, 0.0, 1.0)

    def by_steps(self, v, q, l):
        """psi(1) and psi'(1) by Taylor steps of the equation itself, from the series at R = 1/8."""
        digits = mp.dps
        with mp.workdps(digits + 25):
            alpha = mpf(self.alpha)
            r = mpf(1) / 8
            p, d = self.at(v, q, l, r, double=True)
            d = d / r
            while r < 1:
                h = min(r / 4, 1 - r, mpf(2) / v)
                # R^2 times the equation, R = r + h x: c are the coefficients of psi, f those of V^2 f R^2 - q R^2 - l^2.
                n = int(3.4 * digits) + 60
                rise, g = h / r, [r ** (alpha + 2)]
                for k in range(n):
                    g.append(g[-1] * (alpha + 2 - k) / (k + 1) * rise)
                f = [-v * v * x for x in g]
                for k, x in enumerate((r * r, 2 * r * h, h * h)):
                    f[k] += (v * v - q) * x
                f[0] -= l * l
                c = [p, d * h]
                for k in range(n):
                    # coefficient of x^k in (r/h + x)^2 psi'' + (r/h + x) psi' + f psi
                    e = r / h
                    total = c[k] * (k * (k - 1) + k) + e * c[k + 1] * (2 * (k + 1) * k + (k + 1))
                    total += sum(f[j] * c[k - j] for j in range(k + 1) if abs(f[j]) > mpf(10) ** -(digits + 20))
                    c.append(-total / (e * e * (k + 2) * (k + 1)))
                    if k > 6 and max(abs(x) for x in c[-4:]) < mpf(10) ** -(digits + 15) * max(abs(c[0]), abs(c[1])):
                        break
                p, d = sum(c), sum(k * x for k, x in enumerate(c)) / h
                r += h
            return p, d


class Layers:
    """Layers of constant f: psi = A phi_1 + B phi_2 in each, J and Y or I and K combined so as to be entire in V^2 f - q.

    With y = (q - V^2 f) R^2/4, phi_1 = R^l sum y^k/(k! (l+1)_k) and (DLMF 10.8.1, 10.31.1, less a multiple of phi_1)
    phi_2 = R^-l sum_{k<l} (l-k-1)!/(k! (l-1)!) (-y)^k
            + (-y/R^2)^l/(l! (l-1)!) (R^l sum (H_k + H_{l+k}) y^k/(k! (l+1)_k) - 2 ln R phi_1);
    for l = 0, phi_2 = sum H_k y^k/k!^2 - ln R phi_1. R (phi_1 phi_2' - phi_1' phi_2) = -2 l, or -1 for l = 0.
    """

    def __init__(self, name):
        self.name = name
        pairs = [p.split(":") for p in name.split(";")]
        self.layers = [(float(r), float(f)) for r, f in pairs]  # exact doubles
        assert self.layers[-1][0] == 1
        self.top = max(f for _, f in self.layers)

    @staticmethod
    def pair(l, y4, r, second):
        """phi_1, R phi_1', phi_2, R phi_2' at r; y4 = y/r^2."""
        r = mpf(r)
        y = y4 * r * r
        size = 2 * math.sqrt(abs(float(y)))
        bits = mp.prec + int(4 * size) + 48
        with mp.workprec(bits + 32):
            fy = int(mp.ldexp(y, bits))
            t = one = 1 << bits
            s0, s1, k = one, 0, 0
            h0 = h1 = 0
            if second:
                harmonic = 0
                for j in range(1, l + 1):
                    harmonic += one // j
                h0 = harmonic
            while t and not (-3 < t < 3 and k > size):
                k += 1
                t = (t * fy >> bits) // (k * (l + k))
                s0 += t
                s1 += k * t
                if second:
                    harmonic += one // k + one // (l + k)
                    z = t * harmonic >> bits
                    h0 += z
                    h1 += k * z
            scale = mp.ldexp(r ** l, -bits)
            p, dp = scale * s0, scale * (l * s0 + 2 * s1)
            if not second:
                return p, dp, None, None
            h, dh = scale * h0, scale * (l * h0 + 2 * h1)
            logarithm = log(r)
            if l == 0:
                return p, dp, h / 2 - logarithm * p, dh / 2 - logarithm * dp - p
            # The finite sum, its terms falling and rising: in mpf.
            t, u, du = mpf(1), mpf(1), mpf(-l)
            for k in range(1, l):
                t = -t * y / (k * (l - k))
                u += t
                du += (2 * k - l) * t
            c = (-y4) ** l / (fac(l) * fac(l - 1))
            u, du = u / r ** l, du / r ** l
            return p, dp, u + c * (h - 2 * logarithm * p), du + c * (dh - 2 * logarithm * dp - 2 * p)

    def inside(self, v, q, l):
        """For each layer: inner and outer radius, (q - V^2 f)/4, A, B and psi, R psi' at the outer radius."""
        found, inner = [], 0.0
        for r, f in self.layers:
            y4 = (q - v * v * f) / 4
            if inner == 0:
                a, b = mpf(1), mpf(0)
                psi, slope, _, _ = self.pair(l, y4, r, False)
            else:
                p, dp, s, ds = self.pair(l, y4, inner, True)
                w = mpf(-2 * l if l else -1)
                a, b = (psi * ds - slope * s) / w, (slope * p - psi * dp) / w
                p, dp, s, ds = self.pair(l, y4, r, True)
                psi, slope = a * p + b * s, a * dp + b * ds
            found.append((inner, r, y4, a, b, psi, slope))
            inner = r
        return found

    def guard(self, v, l):
        return int(4 * float(v) * math.sqrt(self.top - min(f for _, f in self.layers))) + 8 * l + 40

    def at(self, v, q, l):
        with mp.workprec(mp.prec + self.guard(v, l)):
            return self.inside(v, q, l)[-1][5:]

    def nodes(self, v, q, l):
        changes = 0
        with mp.workprec(mp.prec + self.guard(v, l)):
            for inner, outer, y4, a, b, psi, _ in self.inside(v, q, l):
                def sign(r):
                    if r == outer:
                        return psi > 0
                    if b == 0:
                        return self.pair(l, y4, r, False)[0] > 0
                    p, _, s, _ = self.pair(l, y4, r, True)
                    return a * p + b * s > 0
                k2 = float(-4 * y4)
                if k2 > 0:
                    k2 *= 1 + 1e-12
                changes += march(sign, l, lambda r: k2, inner, outer)
        return changes

    def by_bessel(self, v, q, l):
        """psi(1) and psi'(1) by mpmath's own J, Y, I, K."""
        inner = None
        for r, f in self.layers:
            k2 = v * v * f - q
            k = sqrt(abs(k2))
            kinds = (besselj, bessely) if k2 > 0 else (besseli, besselk)

            def both(kind, r):
                x = k * r
                sign = {besselj: -1, bessely: -1, besseli: 1, besselk: -1}[kind]
                lead = -1 if kind is besselk else 1
                y = kind(l, x)
                return y, lead * k * kind(l - 1, x) - l / mpf(r) * y if l else sign * k * kind(1, x)
            if inner is None:
                psi, slope = both(kinds[0], mpf(r))
            else:
                (p, dp), (s, ds) = (both(kind, inner) for kind in kinds)
                w = p * ds - dp * s
                a, b = (psi * ds - slope * s) / w, (slope * p - psi * dp) / w
                (p, dp), (s, ds) = (both(kind, mpf(r)) for kind in kinds)
                psi, slope = a * p + b * s, a * dp + b * ds
            inner = mpf(r)
        return psi, slope


# ---- Modes ------------------------------------------------------------------------------------------------

def difference(profile, v, q, l):
    psi, slope = profile.at(v, q, l)
    return slope + (l + outside(l, q)) * psi


def count(profile, v, q, l):
    """The number of modes of order l above q (of those guided, with q = 0)."""
    with mp.workdps(LOW):
        v, q = +mpf(v), +mpf(q)
        psi, slope = profile.at(v, q, l)
        beyond = psi * (slope + (l + outside(l, q)) * psi) < 0
        return profile.nodes(v, q, l) + (1 if beyond else 0)


KNOWN = {}


def isolate(profile, v, l, m):
    """Bounds of q between which the m-th mode of order l lies alone, or None."""
    known = KNOWN.setdefault((profile.name, v, l), {})
    with mp.workdps(LOW):
        if not known:
            known[FLOOR] = count(profile, v, FLOOR, l)
            known[mpf(v) ** 2 * profile.top] = 0
        if known[FLOOR] < m:
            return None
        while True:
            low = max(q for q, n in known.items() if n >= m)
            high = min(q for q, n in known.items() if n < m)
            if known[low] == m and known[high] == m - 1:
                return low, high
            q = (low + high) / 2
            known[q] = count(profile, v, q, l)


def close_in(f, low, high):
    """A zero of f between low and high to about 13 digits of their distance: halving, then Illinois."""
    with mp.workdps(LOW):
        flow, fhigh = f(low), f(high)
        assert flow * fhigh < 0, (low, high, flow, fhigh)
        width = min(1, high - low) * mpf(10) ** -13
        side = 0
        for k in range(300):
            if high - low > 1 or k % 4 == 3:
                x = (low + high) / 2
            else:
                x = (low * fhigh - high * flow) / (fhigh - flow)
            fx = f(x)
            if fx == 0:
                return x
            if fx * flow > 0:
                step = x - low
                low, flow = x, fx
                if side == 1:
                    fhigh /= 2
                side = 1
            else:
                step = high - x
                high, fhigh = x, fx
                if side == -1:
                    flow /= 2
                side = -1
            if high - low < width:
                return x
        raise ArithmeticError((low, high))


def polish(f, x, dps, near):
    """The zero of f near x (within about near) to dps digits, by the secant."""
    with mp.workdps(dps):
        x0 = +x
        x1 = x0 + near
        f0, f1 = f(x0), f(x1)
        steps = []
        for _ in range(60):
            if f1 == f0:
                return x1
            step = -f1 * (x1 - x0) / (f1 - f0)
            x0, f0, x1 = x1, f1, x1 + step
            steps.append(abs(step))
            if len(steps) > 1 and steps[-1] < max(abs(x1), 1) * mpf(10) ** (-0.75 * dps):
                return x1
            f1 = f(x1)
        raise ArithmeticError(x)


def logarithm_of_q(profile, v, l, t, dps, near):
    return polish(lambda t: difference(profile, mpf(v), exp(t), l), t, dps, near)


def mode(profile, v, l, m, rank=True):
    """t = ln q at COARSE and FINE, or None. Its rank is counted just below and just above."""
    bounds = isolate(profile, v, l, m)
    if bounds is None:
        return None
    low, high = bounds
    with mp.workdps(LOW):
        t = close_in(lambda t: difference(profile, mpf(v), exp(t), l), log(low), log(high))
        near = mpf(10) ** -13
        if high - low < mpf(10) ** -6 * high:
            near *= (high - low) / high
    coarse = logarithm_of_q(profile, v, l, t, COARSE, near)
    fine = logarithm_of_q(profile, v, l, coarse, FINE, mpf(10) ** -(COARSE - 10))
    with mp.workdps(FINE):
        assert abs(coarse - fine) < mpf(10) ** -27, (profile.name, v, l, m, coarse, fine)
    if rank:
        with mp.workdps(LOW):
            q = exp(fine)
            small = mpf(10) ** -16
            assert count(profile, v, q * (1 - small), l) == m, (profile.name, v, l, m)
            assert count(profile, v, q * (1 + small), l) == m - 1, (profile.name, v, l, m)
    return coarse, fine


def b_of(profile, v, l, m):
    found = mode(profile, v, l, m)
    if found is None:
        return None
    with mp.workdps(FINE):
        return exp(found[1]) / mpf(v) ** 2


def guided(profile, v):
    """All (l, m) guided at v with q above FLOOR."""
    found, l = [], 0
    while True:
        n = count(profile, v, FLOOR, l)
        if n == 0:
            return found
        found += [(l, m) for m in range(1, n + 1)]
        l += 1


CUTOFFS = {}


def cutoff(profile, l, m, most=200):
    """V at which the m-th mode of order l begins, at FINE; None if there is none below most, 0 if it has none."""
    key = profile.name, l, m
    if key in CUTOFFS:
        return CUTOFFS[key]
    with mp.workdps(LOW):
        low, high, n = mpf(1) / 64, mpf(1) / 64, 0
        below = count(profile, low, 0, l)
        if below >= m:
            return mpf(0)
        while True:
            high *= 1.5
            n = count(profile, high, 0, l)
            if n >= m:
                break
            low, below = high, n
            if high > most:
                return None
        while n != m or below != m - 1:
            middle = (low + high) / 2
            k = count(profile, middle, 0, l)
            if k >= m:
                high, n = middle, k
            else:
                low, below = middle, k
        f = lambda v: difference(profile, v, mpf(0), l)
        v = close_in(f, low, high)
    coarse = polish(f, v, COARSE, mpf(10) ** -13 * v)
    fine = polish(f, coarse, FINE, mpf(10) ** -(COARSE - 10))
    with mp.workdps(FINE):
        assert abs(coarse - fine) < mpf(10) ** -26 * fine, (key, coarse, fine)
        small = mpf(10) ** -16
        assert count(profile, fine * (1 - small), 0, l) == m - 1 and count(profile, fine * (1 + small), 0, l) == m, key
    CUTOFFS[key] = fine
    return fine


def digits(x):
    return nstr(x, 25, strip_zeros=False, min_fixed=0, max_fixed=0)


# ---- The parabola -----------------------------------------------------------------------------------------

def derivatives(profile, v, l, t, distance, dps, relative):
    """b, d(Vb)/dV and V d2(Vb)/dV2 by divided differences over relative times the scale of the curve."""
    with mp.workdps(dps):
        v = mpf(v)
        h = mpf(10) ** -relative * distance

        def vb(x, t):
            return exp(logarithm_of_q(profile, x, l, t, dps, mpf(10) ** -relative)) / x
        middle = vb(v, t)
        minus, plus = vb(v - h, t), vb(v + h, t)
        return middle / v, (plus - minus) / (2 * h), v * (plus - 2 * middle + minus) / h ** 2


def check_average(v, l, t, b1):
    """d(Vb)/dV = 2 <f> - b, <f> the average of f over psi^2 R dR."""
    with mp.workdps(28):
        v, q = mpf(v), exp(t)
        w, a = sqrt(q), mpf(l + 1) / 2 - (v * v - exp(t)) / (4 * v)

        def square(r):
            return (r ** l * exp(-v * r * r / 2) * hyp1f1(a, l + 1, v * r * r)) ** 2 * r
        cuts = [mpf(k) / 8 for k in range(9)]
        with_f = quad(lambda r: (1 - r * r) * square(r), cuts)
        beyond = (besselk(l - 1, w) * besselk(l + 1, w) / besselk(l, w) ** 2 - 1) / 2 * square(mpf(1))
        mean = with_f / (quad(square, cuts) + beyond)
        assert abs(2 * mean - q / v ** 2 - b1) < mpf(10) ** -20 * max(1, abs(b1)), (v, l, mean, b1)


def check_kummer(v, l, t):
    """D changes sign at the root with mpmath's own functions, and with the series of Power(2)."""
    with mp.workdps(50):
        v = mpf(v)

        def own(q):
            x, a = v, mpf(l + 1) / 2 - (v * v - q) / (4 * v)
            psi, slope = hyp1f1(a, l + 1, x), 2 * v * a / (l + 1) * hyp1f1(a + 1, l + 2, x)
            w = sqrt(q)
            g = w * besselk(l - 1, w) / besselk(l, w)
            return slope + (2 * l - v + g) * psi
        for d in (own, lambda q: difference(Power(2), v, q, l)):
            q = exp(t)
            assert d(q * (1 + mpf(10) ** -28)) * d(q * (1 - mpf(10) ** -28)) < 0, (v, l)


def parabola_modes(profile):
    for v in (0.6, 0.8, 1.0, 1.5, 2.0, 2.5, 3.0):
        yield v, 0, 1
    for v in (3.6, 5.0, 7.3, 10.0, 15.0, 20.0, 27.0):
        for l, m in guided(profile, v):
            yield v, l, m
    for v, every in ((35.0, 6), (50.0, 9), (75.0, 19), (100.0, 23)):
        for l, m in guided(profile, v)[::every]:
            yield v, l, m
    for l, m in ((0, 1), (0, 25), (1, 1), (1, 25), (2, 1), (48, 1)):
        yield 100.0, l, m
    for l, m in ((1, 1), (0, 2), (2, 1), (3, 1), (1, 2), (2, 2), (5, 1), (0, 3), (12, 1), (3, 6), (30, 1), (0, 10)):
        c = cutoff(profile, l, m)
        for distance in ("1e-12", "1e-9", "1e-6", "1e-4", "1e-2", "0.02", "0.05", "0.1", "0.5"):
            v = float(c + mpf(distance))
            if mpf(v) > c:
                yield v, l, m


def parabola():
    profile = Parabola()
    print("""\
# LP modes of the weakly guiding fibre f = 1 - R^2 (R < 1), 0 beyond: b and the first two derivatives of V b.
# Made by (from the repository root): python3 modes/radial/testdata/radial.py > modes/radial/testdata/parabola.csv
# psi = R^l exp(-V R^2/2) M(a, l+1, V R^2), a = (l+1)/2 - V (1-b)/4 (Kummer, DLMF 13.2), joined to K_l(V sqrt(b) R).
# vb1 = d(v b)/dv, vb2 = v d^2(v b)/dv^2. v is an exact double. mpmath at two precisions agreeing to 25 digits; 25 digits.
# Labels proved by counting nodes (m - 1 in 0 < R < infinity) just below and just above each b. Every mode guided at
# v = 3.6, 5, 7.3, 10, 15, 20 and 27 is here.
v,l,m,b,vb1,vb2""")
    seen, averages, checks = set(), 0, 0
    for v, l, m in parabola_modes(profile):
        if (v, l, m) in seen:
            continue
        found = mode(profile, v, l, m)
        if found is None:
            print("left out", v, l, m, file=sys.stderr)
            continue
        seen.add((v, l, m))
        with mp.workdps(FINE):
            c = cutoff(profile, l, m)
            distance = min(1, mpf(v) - c)
            if l == 0:
                distance = distance ** 3 / 100 if m == 1 else distance ** 2 / 100
        coarse = derivatives(profile, v, l, found[1], distance, FINE + 40, 22)
        fine = derivatives(profile, v, l, found[1], distance, FINE + 60, 26)
        with mp.workdps(FINE):
            for x, y in zip(coarse, fine):
                assert abs(x - y) < abs(y) * mpf(10) ** -26, (v, l, m, x, y)
        if len(seen) % 9 == 0:
            check_kummer(v, l, found[1])
            checks += 1
        if len(seen) % 25 == 0 and v < 31:
            check_average(v, l, found[1], fine[1])
            averages += 1
        print(f"{v!r},{l},{m}," + ",".join(digits(x) for x in fine))
    print(f"{len(seen)} rows; {checks} checked with mpmath's hyp1f1 and the power series, {averages} with the average of f",
          file=sys.stderr)


# ---- Layers -----------------------------------------------------------------------------------------------

STACKS = {
    "W": ["0.6:1;1:-0.4", "0.5:1;1:-0.9", "0.25:1;1:-0.15"],
    "trench": ["0.4:1;0.7:0;1:-0.5", "0.5:1;0.6:0;1:-1.5"],
    "ring": ["0.5:0;1:1", "0.3:-0.5;1:1"],
    "pedestal": ["0.5:1;1:0.3", "0.2:1;1:0.05"],
    "segmented": ["0.3:1;0.55:0.1;0.8:0.6;1:-0.3", "0.25:1;0.6:-0.3;0.8:0.9;1:-0.2"],
    "dip": ["0.1:0.2;1:1"],
    "thin ring": ["0.9:0;1:1", "0.6:-0.2;0.65:1;1:-0.1"],
    "step": ["1:1", "0.5:1;1:0"],
}


def check_bessel(profile, v, l, t):
    with mp.workdps(60):
        v, values = mpf(v), []
        for small in (mpf(10) ** -26, -mpf(10) ** -26):
            q = exp(t) * (1 + small)
            w = sqrt(q)
            psi, slope = profile.by_bessel(v, q, l)
            values.append(slope + (l + w * besselk(l - 1, w) / besselk(l, w)) * psi)
        assert values[0] * values[1] < 0, (profile.name, v, l)


def layer_modes(profile):
    scale = {"0.25:1;1:-0.15": 2, "0.2:1;1:0.05": 2, "0.9:0;1:1": 1.5, "0.6:-0.2;0.65:1;1:-0.1": 2,
             "0.5:1;1:0": 1.5, "0.4:1;0.7:0;1:-0.5": 1.5, "0.5:1;1:-0.9": 1.5, "0.25:1;0.6:-0.3;0.8:0.9;1:-0.2": 1.5,
             }.get(profile.name, 1)
    for v in (1.0, 1.7):
        yield v, 0, 1
    for v in (3.0, 5.5, 9.0):
        for l, m in guided(profile, v * scale):
            yield v * scale, l, m
    for v, most in ((20.0, 6), (36.0, 6), (60.0, 7)):
        every = guided(profile, v)
        n = min(most, len(every))
        for k in range(n):
            yield (v, *every[round(k * (len(every) - 1) / max(1, n - 1))])


def layers():
    print("""\
# LP modes of weakly guiding fibres with layers of constant f, 0 beyond R = 1.
# Made by (from the repository root): python3 modes/radial/testdata/radial.py layers > modes/radial/testdata/layers.csv
# profile: outer radius : f of each layer from the axis out to R = 1. Cylinder functions in each layer, psi and psi'
# continuous, K_l(V sqrt(b) R) beyond; mpmath at two precisions agreeing to 25 digits; 25 digits. v is an exact double, and
# so are radii and f as written. Labels proved by counting nodes (m - 1 in 0 < R < infinity) just below and just above each b.
# At every v below 20 all guided modes are here.
profile,v,l,m,b""")
    rows = checks = 0
    for kind, names in STACKS.items():
        for name in names:
            profile, seen = Layers(name), set()
            for v, l, m in layer_modes(profile):
                if (v, l, m) in seen:
                    continue
                found = mode(profile, v, l, m)
                if found is None:
                    continue
                seen.add((v, l, m))
                rows += 1
                if rows % 8 == 0:
                    check_bessel(profile, v, l, found[1])
                    checks += 1
                with mp.workdps(FINE):
                    b = exp(found[1]) / mpf(v) ** 2
                print(f"{name},{v!r},{l},{m},{digits(b)}", flush=True)
    print(f"{rows} rows; {checks} checked with mpmath's Bessel functions", file=sys.stderr)


# ---- Cut-offs ---------------------------------------------------------------------------------------------

def cutoffs():
    print("""\
# Cut-off V of LP modes of weakly guiding fibres, f = 0 beyond R = 1.
# Made by (from the repository root): python3 modes/radial/testdata/radial.py cutoff > modes/radial/testdata/cutoff.csv
# profile: parabola f = 1 - R^2, triangle f = 1 - R, power:alpha f = 1 - R^alpha, or outer radius : f of each layer.
# psi'(1) + l psi(1) = 0 at b = 0. mpmath at two precisions agreeing to 25 digits; 25 digits. Alphas, radii and f are doubles.
# Labels proved by counting the guided modes just below and just above. l = 0, m = 1 has a cut-off only where the integral
# of f R dR is negative.
profile,l,m,v""")
    rows = 0
    plan = [
        (Parabola(), [(1, 1), (0, 2), (2, 1), (3, 1), (1, 2), (0, 3), (2, 2), (4, 1), (1, 3), (10, 1), (5, 4), (0, 8), (30, 2), (1, 20)]),
        (Power(1.0, "triangle"), [(1, 1), (0, 2), (2, 1), (3, 1), (1, 2), (0, 3), (4, 2), (10, 1), (1, 8)]),
        (Power(4.0), [(1, 1), (0, 2), (2, 1), (1, 2), (3, 1), (0, 3), (10, 2)]),
        (Power(6.0), [(1, 1), (0, 2), (2, 1), (3, 3)]),
        (Power(10.0), [(1, 1), (0, 2), (2, 1), (5, 1)]),
        (Power(1.9), [(1, 1), (0, 2), (2, 1)]),
        (Power(2.1), [(1, 1), (0, 2), (2, 1)]),
        (Power(3.5), [(1, 1), (0, 2), (2, 1), (1, 2)]),
    ]
    for names in STACKS.values():
        for name in names:
            profile = Layers(name)
            wanted = [(1, 1), (0, 2), (2, 1), (3, 1), (1, 2)]
            if len(profile.layers) > 1:
                inner, mean = mpf(0), mpf(0)
                for r, f in profile.layers:
                    mean += f * (mpf(r) ** 2 - inner ** 2)
                    inner = mpf(r)
                if mean < 0:
                    wanted.insert(0, (0, 1))
                else:
                    assert cutoff(profile, 0, 1) == 0, name
            if name in ("0.6:1;1:-0.4", "0.4:1;0.7:0;1:-0.5", "0.3:1;0.55:0.1;0.8:0.6;1:-0.3"):
                wanted += [(0, 3), (7, 1), (4, 3)]
            plan.append((profile, wanted))
    for profile, wanted in plan:
        for l, m in wanted:
            v = cutoff(profile, l, m)
            assert v, (profile.name, l, m)
            with mp.workdps(FINE):
                check_cutoff(profile, l, m, v)
            rows += 1
            print(f"{profile.name},{l},{m},{digits(v)}", flush=True)
    print(f"{rows} rows", file=sys.stderr)


def check_cutoff(profile, l, m, v):
    if profile.name in ("1:1", "0.5:1;1:0"):  # zeros of J_{l-1}
        zero = besseljzero(l - 1, m) if l else besseljzero(1, m - 1)
        assert abs(zero * (1 if profile.name == "1:1" else 2) - v) < mpf(10) ** -40, (profile.name, l, m)
    elif isinstance(profile, Layers):
        with mp.workdps(60):  # mpmath's Bessel functions, with a trace of b for the layers of f = 0
            def d(v):
                q = mpf(10) ** -60
                psi, slope = profile.by_bessel(v, q, l)
                return slope + l * psi
            assert d(v * (1 + mpf(10) ** -26)) * d(v * (1 - mpf(10) ** -26)) < 0, (profile.name, l, m)
    elif isinstance(profile, Parabola):
        for d in (lambda v: difference(Power(2), v, mpf(0), l),
                  lambda v: (2 * l - v) * hyp1f1(mpf(l + 1) / 2 - v / 4, l + 1, v)
                  + 2 * v * (mpf(l + 1) / 2 - v / 4) / (l + 1) * hyp1f1(mpf(l + 3) / 2 - v / 4, l + 2, v)):
            assert d(v * (1 + mpf(10) ** -40)) * d(v * (1 - mpf(10) ** -40)) < 0, (profile.name, l, m)
    else:
        check_steps(profile, v, l, None)
    # W. A. Gambling, D. N. Payne, H. Matsumura, Electron. Lett. 13, 139 (1977), from memory, to a unit of the last digit.
    if (l, m) == (1, 1) and profile.name in ("parabola", "triangle"):
        assert abs(v - mpf({"parabola": "3.518", "triangle": "4.381"}[profile.name])) < 1e-3, v


# ---- Powers -----------------------------------------------------------------------------------------------

def check_steps(profile, v, l, t):
    """D changes sign at the mode (at the cut-off with t None) with psi by Taylor steps."""
    with mp.workdps(32):
        v, values = mpf(v), []
        for small in (mpf(10) ** -26, -mpf(10) ** -26):
            x, q = (v * (1 + small), mpf(0)) if t is None else (v, exp(t) * (1 + small))
            psi, slope = profile.by_steps(x, q, l)
            values.append(slope + (l + outside(l, q)) * psi)
        assert values[0] * values[1] < 0, (profile.name, v, l)


def power():
    print("""\
# LP modes of the weakly guiding fibres f = 1 - R^alpha (R < 1), 0 beyond.
# Made by (from the repository root): python3 modes/radial/testdata/radial.py power > modes/radial/testdata/power.csv
# psi by its series in R^2 and R^(alpha+2) about the axis, joined to K_l(V sqrt(b) R) beyond; mpmath at two precisions
# agreeing to 25 digits; 25 digits. v and alpha are exact doubles. Labels proved by counting nodes (m - 1 in
# 0 < R < infinity) just below and just above each b. Every mode guided at the v up to 12 is here for alpha = 1, 4, 6, 10,
# and at the v up to 6 for the others.
alpha,v,l,m,b""")
    rows = checks = 0
    for alpha in (1.0, 4.0, 6.0, 10.0, 1.9, 2.1, 3.5):
        profile, whole = Power(alpha), alpha == int(alpha)
        chosen = []
        for v in (2.0, 5.0, 12.0) if whole else (2.0, 6.0):
            chosen += [(v, l, m) for l, m in guided(profile, v)]
        for v in (25.0, 60.0) if whole else (12.0, 20.0):
            every = guided(profile, v)
            chosen += [(v, *every[round(k * (len(every) - 1) / 5)]) for k in range(6)]
        for v, l, m in chosen:
            found = mode(profile, v, l, m)
            assert found, (alpha, v, l, m)
            rows += 1
            if rows % 8 == 0:
                check_steps(profile, v, l, found[1])
                checks += 1
            with mp.workdps(FINE):
                b = exp(found[1]) / mpf(v) ** 2
            print(f"{alpha!r},{v!r},{l},{m},{digits(b)}", flush=True)
    print(f"{rows} rows; {checks} checked by Taylor steps", file=sys.stderr)


if __name__ == "__main__":
    {(): parabola, ("layers",): layers, ("cutoff",): cutoffs, ("power",): power}[tuple(sys.argv[1:])]()
