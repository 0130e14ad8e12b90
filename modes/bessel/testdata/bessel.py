"""Reference tables of Bessel functions, their ratios and their zeros, in arbitrary precision.

Run from the repository root, once a table (kratio, kscaled, iscaled, jratio, zeros):
    python3 modes/bessel/testdata/bessel.py kratio > modes/bessel/testdata/kratio.csv

Needs Python 3.9 and mpmath. J_l comes from J. C. P. Miller's backward recurrence in integers (DLMF 3.6(ii)),
I_{l+1}/I_l likewise, K_l from the power or the asymptotic series at orders 0 and 1 (DLMF 10.31, 10.40) and the
forward recurrence, I_l from the Wronskian I_l K_{l+1} + I_{l+1} K_l = 1/x (DLMF 10.28.2). Every value is computed
at 50 and at 80 digits, which must agree to 25; a sample is checked against mpmath's own functions.
"""
import math
import sys

from mpmath import mp, mpf, besseli, besselj, besselk, besseljzero, euler, exp, log, nstr, pi, sqrt

COARSE, FINE = 50, 80
HUGE, TINY = mpf(sys.float_info.max), mpf(sys.float_info.min)


def start_order(l, x, bits):
    """An order from which the backward recurrence forgets its start to below 2^-bits."""
    size = float(x)
    return int(max(l, size) + (1.06 * bits * math.sqrt(size)) ** (2 / 3) * 1.2 + bits / 3 + 20)


def descend(l, x, bits, sign=-1, n=None, count=False):
    """(F_{l+1}, F_l) of x but for a common factor, as integers: F = J for sign -1, F = I for +1.

    With count (J only), the number of zeros of J_l in (0, x): the signs of J_l, J_{l+1}, ... at x change once for
    each, since the zeros of neighbouring orders interlace.
    """
    n = n or start_order(l, x, bits)
    with mp.workprec(bits + 80):
        twice = int(mp.ldexp(2 / mpf(x), bits))
    limit, changes = 1 << (bits + 200), 0
    high, low = 0, 1 << bits
    for k in range(n, l, -1):
        high, low = low, ((k * twice * low) >> bits) + sign * high
        if not -limit < low < limit:
            high >>= 200
            low >>= 200
        if count and (high < 0) != (low < 0):
            changes += 1
    return changes if count else (high, low)


def j_ratio(l, x):
    high, low = descend(l, x, mp.prec + 100)
    return mpf(high) / mpf(low)


def i_ratio(l, x):
    # I_n falls from about n^2 = 2 x ln(1/precision) when x is large.
    bits = mp.prec + 100
    n = int(l + 1.3 * math.sqrt(2 * float(x) * bits) + bits + 20)
    high, low = descend(l, x, bits, 1, n)
    return mpf(high) / mpf(low)


def k01(x):
    """exp(x) K_0(x) and exp(x) K_1(x)."""
    digits = mp.dps + 10
    if x > 1.2 * digits + 10:
        def hankel(nu):
            term, total, k = mpf(1), mpf(1), 0
            while abs(term) > mpf(10) ** -digits:
                k += 1
                term = term * (4 * nu * nu - (2 * k - 1) ** 2) / (8 * k * x)
                total += term
            return sqrt(pi / (2 * x)) * total
        with mp.extradps(15):
            x = mpf(x)
            return hankel(0), hankel(1)
    with mp.extradps(20 + int(x)):
        x = mpf(x)
        q = x * x / 4
        term, i0, i1, s, harmonic, k = mpf(1), mpf(1), mpf(1), mpf(0), mpf(0), 0
        while k < 3 or term > i0 * mpf(10) ** -mp.dps:
            k += 1
            term = term * q / (k * k)
            harmonic += mpf(1) / k
            i0 += term
            i1 += term / (k + 1)
            s += term * harmonic
        i1 *= x / 2
        k0 = s - (log(x / 2) + euler) * i0
        return exp(x) * k0, exp(x) * (1 / x - i1 * k0) / i0


def k_all(l, x):
    """exp(x) K_l(x) and K_{l+1}/K_l."""
    with mp.extradps(10):
        k0, k1 = k01(x)
        x = mpf(x)
        value, ratio = k0, k1 / k0
        for k in range(1, l + 1):
            value *= ratio
            ratio = 2 * k / x + 1 / ratio
    return +value, +ratio


def i_scaled(l, x):
    """exp(-x) I_l(x)."""
    value, ratio = k_all(l, x)
    with mp.extradps(5):
        return 1 / (mpf(x) * value * (ratio + i_ratio(l, x)))


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
    if (l, m) not in ZEROS:
        mp.dps = FINE + 5
        z = mpf(zero_guess(l, m))
        for dps in (30, 30, 30, 30, 30, FINE + 5, FINE + 5, FINE + 5):
            with mp.workdps(dps):
                high, low = descend(l, z, mp.prec + 64)
                step = mpf(low) / (l * mpf(low) / z - high)
            z -= step
        assert abs(step) < z * mpf(10) ** -(FINE - 5), (l, m)
        around = [descend(l, z * (1 + e * mpf(10) ** -18), 140, count=True) for e in (-1, 1)]
        assert around == [m - 1, m], (l, m, around)
        ZEROS[l, m] = z
    return ZEROS[l, m]


def derivative_zero(l, m):
    """j'_{l,m}, counted as in DLMF 10.21(i): j'_{0,1} = 0, and j'_{0,m} = j_{1,m-1}."""
    if l == 0:
        return zero(1, m - 1) if m > 1 else mpf(0)
    mp.dps = FINE + 5
    low, high = zero(l, m - 1) if m > 1 else mpf(l), zero(l, m)
    y = low + (high - low) / 2
    last = False
    for _ in range(200):
        if not last and not low < y < high:
            y = (low + high) / 2
        if last:
            break
        a, b = descend(l, y, mp.prec + 64)
        p = l - y * mpf(a) / mpf(b)  # y J'/J, falling from +inf (or above 0) to -inf between zeros of J
        if p > 0:
            low = y
        else:
            high = y
        # dp/dy = -(p^2 + y^2 - l^2)/y. Next to the poles 1/p is the straighter function.
        slope = -(p * p + (y - l) * (y + l)) / y
        step = -p / slope if abs(p) < l + 1 else p / slope
        y += step
        last = abs(step) < y * mpf(10) ** (-0.6 * mp.dps)
    else:
        raise ArithmeticError((l, m))
    assert (zero(l, m - 1) if m > 1 else l) < y < zero(l, m)
    with mp.extradps(15):
        a, b = descend(l, y, mp.prec + 64)
        p = l - y * mpf(a) / mpf(b)
        assert abs(p / (p * p + (y - l) * (y + l))) < mpf(10) ** -(FINE - 15), (l, m)
    return y


# ---- Arguments --------------------------------------------------------------------------------------------

ORDERS = [0, 1, 2, 3, 5, 8, 10, 17, 30, 56, 100, 177, 300, 562, 1000, 1778, 3162, 5623, 10000]
ABSOLUTE = [1e-8, 1e-6, 3e-5, 1e-3, 0.01, 0.1, 0.5, 0.9, 1.0, 1.1, 1.5, 2.0, 2.4048, 3.0, 4.0, 6.0, 8.0, 10.0, 14.0, 20.0, 31.0,
            50.0, 87.0, 100.0, 200.0, 500.0, 700.0, 709.0, 746.0, 1000.0, 3000.0, 1e4, 31234.5, 1e5]
RELATIVE = [0.02, 0.1, 0.3, 0.6, 0.9, 0.97, 0.99, 0.999, 1.0, 1.001, 1.01, 1.03, 1.1, 1.5, 3.0, 10.0]


def arguments():
    for l in ORDERS:
        chosen = set(ABSOLUTE)
        if l >= 5:
            chosen |= {x for x in (l * r for r in RELATIVE) if x <= 1e5}
        for x in sorted(chosen):
            yield l, x


def j_arguments():
    for l, x in arguments():
        yield l, x
    for l in (0, 1, 2, 3, 10, 56, 300, 1000, 10000):
        for m in (1, 2, 3, 10, 100, 1000):
            for order in (l, l + 1):
                z = float(zero(order, m))  # the double nearest to a zero of J_l or of J_{l+1}, and neighbours
                for x in (z, math.nextafter(z, math.inf), z * (1 - 1e-12), z * (1 + 1e-8), z * (1 + 1e-4)):
                    if x <= 1e5:
                        yield l, x


def zero_list():
    ranks = [1, 2, 3, 4, 5, 6, 7, 8, 10, 20, 50, 100, 300, 1000, 3000, 10000]
    for l in ORDERS + [4, 6, 7, 20, 50, 200]:
        for m in ranks:
            yield l, m


# ---- Tables -----------------------------------------------------------------------------------------------

HEADERS = {
    "kratio": ["Ratio K_{l+1}(x)/K_l(x) of modified Bessel functions of the second kind.", "DLMF 10.31.2, 10.40.2, 10.29.1",
               "l,x,ratio"],
    "kscaled": ["exp(x) K_l(x), the modified Bessel function of the second kind, scaled.", "DLMF 10.31.2, 10.40.2, 10.29.1",
                "l,x,value"],
    "iscaled": ["exp(-x) I_l(x), the modified Bessel function of the first kind, scaled.", "DLMF 10.29.1, 10.28.2", "l,x,value"],
    "jratio": ["Ratio J_{l+1}(x)/J_l(x) of Bessel functions of the first kind, near their zeros too.",
               "DLMF 10.6.1, 3.6(ii)", "l,x,ratio"],
    "zeros": ["Zeros: zero is j_{l,m}, the m-th positive zero of J_l; derivative_zero is j'_{l,m}, the m-th zero of J_l'.",
              "DLMF 10.21; counted as there: j'_{0,1} = 0 and j'_{0,m} = j_{1,m-1}; the rank of each j proved by a count of sign "
              "changes in J_l, J_{l+1}, ...", "l,m,zero,derivative_zero"],
}


def text(v):
    return nstr(v, 25, strip_zeros=False, min_fixed=0, max_fixed=0)


def evaluate(table, l, x):
    if table == "jratio":
        return j_ratio(l, x)
    if table == "iscaled":
        return i_scaled(l, x)
    value, ratio = k_all(l, x)
    return ratio if table == "kratio" else value


def own(table, l, x):
    """The same by mpmath's own functions."""
    if table == "jratio":
        return besselj(l + 1, x) / besselj(l, x)
    if table == "iscaled":
        return exp(-mpf(x)) * besseli(l, x)
    if table == "kratio":
        return besselk(l + 1, x) / besselk(l, x)
    return exp(mpf(x)) * besselk(l, x)


def main():
    table = sys.argv[1] if len(sys.argv) == 2 else ""
    if table not in HEADERS:
        sys.exit("usage: bessel.py " + "|".join(HEADERS))
    what, source, columns = HEADERS[table]
    print("#", what)
    print(f"# Made by (from the repository root): python3 modes/bessel/testdata/bessel.py {table} > modes/bessel/testdata/{table}.csv")
    print(f"# mpmath at {COARSE} and {FINE} digits, agreeing to 25; 25 significant digits. x is an exact double; rows whose value a "
          "normal double cannot hold are left out."
          if table != "zeros" else f"# mpmath at {FINE} digits; 25 significant digits.")
    print("#", source)
    print(columns)
    rows, checked, seen = 0, 0, set()
    if table == "zeros":
        for l, m in zero_list():
            z, d = zero(l, m), derivative_zero(l, m)
            mp.dps = 40
            if l < 20 and m < 11 or l == 100 and m < 3:
                assert abs(besseljzero(l, m) - z) < z * mpf(10) ** -36 and abs(besseljzero(l, m, derivative=1) - d) <= d * mpf(10) ** -36
                checked += 1
            print(f"{l},{m},{text(z)},{text(d)}")
            rows += 1
    else:
        for l, x in arguments() if table != "jratio" else j_arguments():
            if (l, x) in seen:
                continue
            seen.add((l, x))
            mp.dps = COARSE
            coarse = evaluate(table, l, x)
            mp.dps = FINE
            fine = evaluate(table, l, x)
            assert abs(coarse - fine) < abs(fine) * mpf(10) ** -26, (l, x, coarse, fine)
            if not TINY < abs(fine) < HUGE:
                continue
            if rows % 5 == 0 and (l < 400 and x < 100 or l < 10 and x > 1000):
                mp.dps = 60
                other = own(table, l, x)
                assert abs(other - fine) < abs(fine) * mpf(10) ** -30, (l, x, other, fine)
                checked += 1
            print(f"{l},{x!r},{text(fine)}")
            rows += 1
    print(f"{table}: {rows} rows, {checked} checked against mpmath's own functions", file=sys.stderr)


main()
