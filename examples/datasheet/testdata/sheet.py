"""Reference figures for the sheet of the invented fibre, in arbitrary precision.

Run from the repository root:
    python3 examples/datasheet/testdata/sheet.py > examples/datasheet/testdata/sheet.csv

Needs mpmath. Everything is computed from the published decimals and the definitions: roots of the eigenvalue
equation with mpmath's Bessel functions, derivatives by numerical differentiation at 40 digits, shares of power by
the integrals of the field.
"""
from mpmath import asin, besselj, besseljzero, besselk, diff, findroot, mp, mpf, nstr, pi, sqrt

mp.dps = 40
C = 299792458

# The invented fibre; doubles, as the program has them.
FRACTION, RADIUS, TEMPERATURE = mpf(0.042), mpf(3.55e-6), 12
WAVELENGTHS = (0.85e-6, 1.31e-6, 1.55e-6)

# I. H. Malitson (1965) and J. W. Fleming (1984), strengths and resonance wavelengths in micrometres, 20 C.
SILICA = [("0.6961663", "0.0684043"), ("0.4079426", "0.1162414"), ("0.8974794", "9.896161")]
GERMANIA = [("0.80686642", "0.068972606"), ("0.71815848", "0.15396605"), ("0.85416831", "11.841931")]
GERMANIA_RATE = mpf("1.94e-5")  # dn/dT per K (from memory)


def at_20(fraction, x):
    y, total = x * 10 ** 6, mpf(1)
    for (a0, l0), (a1, l1) in zip(SILICA, GERMANIA):
        a = mpf(a0) + fraction * (mpf(a1) - mpf(a0))
        l = mpf(l0) + fraction * (mpf(l1) - mpf(l0))
        total += a * y * y / (y * y - l * l)
    return sqrt(total)


def ghosh(x, t):
    """Silica at t degrees Celsius, G. Ghosh, M. Endo and T. Iwasaki (1994; from memory)."""
    y2 = (x * 10 ** 6) ** 2
    a = mpf("1.31552") + mpf("6.90754e-6") * t
    b = mpf("0.788404") + mpf("2.35835e-5") * t
    c = mpf("0.0110199") + mpf("5.84758e-7") * t
    d = mpf("0.91316") + mpf("5.48368e-7") * t
    return sqrt(a + b / (1 - c / y2) + d / (1 - 100 / y2))


def index(fraction, x):
    warming = ghosh(x, TEMPERATURE) - ghosh(x, 20)
    return at_20(fraction, x) + (1 - fraction) * warming + fraction * GERMANIA_RATE * (TEMPERATURE - 20)


def core(x):
    return index(FRACTION, x)


def cladding(x):
    return index(mpf(0), x)


def v_of(x):
    return 2 * pi * RADIUS / x * sqrt(core(x) ** 2 - cladding(x) ** 2)


def cutoff(l, m):
    if l == 0:
        return besseljzero(1, m - 1) if m > 1 else mpf(0)
    return besseljzero(l - 1, m)


def solve(l, m, v):
    """u of u J_{l+1}(u) K_l(w) = w K_{l+1}(w) J_l(u), D. Gloge (1971)."""
    def f(u):
        w = sqrt(v * v - u * u)
        return u * besselj(l + 1, u) * besselk(l, w) - w * besselk(l + 1, w) * besselj(l, u)
    low, high = cutoff(l, m), min(besseljzero(l, m), v)
    edge = (high - low) / 10 ** 6
    return findroot(f, (low + edge, high - edge), solver="anderson", maxsteps=200)


def b_of(l, m, v):
    return 1 - (solve(l, m, v) / v) ** 2


def core_share(l, m, v):
    u = solve(l, m, v)
    w = sqrt(v * v - u * u)
    inside = besselj(l, u) ** 2 - besselj(l - 1, u) * besselj(l + 1, u)
    outside = (besselj(l, u) / besselk(l, w)) ** 2 * (besselk(l - 1, w) * besselk(l + 1, w) - besselk(l, w) ** 2)
    return inside / (inside + outside)


def row(x, l, m):
    n1, n2, v = core(x), cladding(x), v_of(x)
    na = sqrt(n1 ** 2 - n2 ** 2)

    def effective(y):
        a, c = core(y) ** 2, cladding(y) ** 2
        return sqrt(c + b_of(l, m, v_of(y)) * (a - c))
    n, first, second, third = (diff(effective, x, k) if k else effective(x) for k in range(4))
    share = core_share(l, m, v)
    material = diff(lambda y: sqrt(n ** 2 + share * (core(y) ** 2 - n1 ** 2) + (1 - share) * (cladding(y) ** 2 - n2 ** 2)), x, 2)
    waveguide = diff(lambda y: sqrt(n2 ** 2 + b_of(l, m, v * x / y) * na ** 2), x, 2)
    group = n - x * first
    d, dm, dw = (-x / C * s for s in (second, material, waveguide))
    return {
        "core_index": n1, "cladding_index": n2, "delta": na ** 2 / (2 * n1 ** 2), "na": na,
        "acceptance_angle_rad": asin(na), "critical_angle_rad": asin(n2 / n1), "v": v,
        "b": b_of(l, m, v), "effective_index": n, "group_index": group, "group_delay_s_per_m": group / C,
        "d_s_per_m2": d, "d_material_s_per_m2": dm, "d_waveguide_s_per_m2": dw, "d_profile_s_per_m2": d - dm - dw,
        "slope_s_per_m3": -(second + x * third) / C, "beta2_s2_per_m": x ** 3 * second / (2 * pi * C ** 2),
        "core_power_share": share,
    }


def main():
    print("# Figures of the invented fibre of examples/datasheet at 12 C, SI units, by mpmath at 40 digits.")
    print("# Made by (from the repository root): python3 examples/datasheet/testdata/sheet.py > examples/datasheet/testdata/sheet.csv")
    print("# Glasses: Malitson 1965, Fleming 1984, with temperature Ghosh et al. 1994 and 1.94e-5 per K for germania (both from memory).")
    lp11 = findroot(lambda x: v_of(x) - besseljzero(0, 1), (mpf("1.2e-6"), mpf("1.3e-6")), solver="anderson")

    def second(x):
        def effective(y):
            a, c = core(y) ** 2, cladding(y) ** 2
            return sqrt(c + b_of(0, 1, v_of(y)) * (a - c))
        return diff(effective, x, 2)
    zero = findroot(lambda x: second(x) * mpf(10) ** -10, (mpf("1.32e-6"), mpf("1.34e-6")), solver="anderson", tol=mpf(10) ** -50)
    print("# Cut-off wavelength of LP11 (m): " + nstr(lp11, 20) + "; zero dispersion of LP01 (m): " + nstr(zero, 20))
    header = False
    for x in WAVELENGTHS:
        for l, m in ((0, 1), (1, 1)):
            if v_of(mpf(x)) <= cutoff(l, m):
                continue
            figures = row(mpf(x), l, m)
            if not header:
                print("wavelength_m,mode,l,m," + ",".join(figures))
                header = True
            print(f"{x!r},LP{l}{m},{l},{m}," + ",".join(nstr(f, 22) for f in figures.values()))


main()
