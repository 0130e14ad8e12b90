"""Reference table of refractive indices and their derivatives, in arbitrary precision.

Run from the repository root: python3 materials/testdata/index.py > materials/testdata/index.csv

Needs mpmath. Every row is computed by truncated power series at 50 and at 80 digits, which must
agree to 25 digits, and by mpmath's numerical differentiation of the plain formulas at 160 digits,
which must agree to 25 digits too; the script stops otherwise.
"""
import sys

from mpmath import mp, mpf, nstr, diff, findroot, sqrt, pi

C = 299792458  # speed of light in vacuum (m/s), exact
ORDER = 4      # derivatives carried


# Truncated power series: lists of ORDER + 1 coefficients.
def mul(a, b):
    return [sum(a[i] * b[k - i] for i in range(k + 1)) for k in range(ORDER + 1)]


def div(a, b):
    q = []
    for k in range(ORDER + 1):
        q.append((a[k] - sum(q[i] * b[k - i] for i in range(k))) / b[0])
    return q


def root(a):
    r = [sqrt(a[0])]
    for k in range(1, ORDER + 1):
        r.append((a[k] - sum(r[i] * r[k - i] for i in range(1, k))) / (2 * r[0]))
    return r


def compose(f, inner):
    """f(x0 + inner), f given by its coefficients about x0; inner[0] = 0."""
    out = [mpf(0)] * (ORDER + 1)
    for c in reversed(f):
        out = mul(out, inner)
        out[0] += c
    return out


class Number:
    """A series with operators, so that a formula serves for series and for numbers alike."""

    def __init__(self, c):
        self.c = c

    @staticmethod
    def of(v):
        return v.c if isinstance(v, Number) else [mpf(v)] + [mpf(0)] * ORDER

    def __add__(self, o):
        return Number([a + b for a, b in zip(self.c, Number.of(o))])

    def __sub__(self, o):
        return Number([a - b for a, b in zip(self.c, Number.of(o))])

    def __rsub__(self, o):
        return Number([b - a for a, b in zip(self.c, Number.of(o))])

    def __mul__(self, o):
        return Number(mul(self.c, Number.of(o)))

    def __truediv__(self, o):
        return Number(div(self.c, Number.of(o)))

    def __rtruediv__(self, o):
        return Number(div(Number.of(o), self.c))

    __radd__, __rmul__ = __add__, __mul__

    def sqrt(self):
        return Number(root(self.c))


def root_of(v):
    return v.sqrt() if isinstance(v, Number) else sqrt(v)


# The formulas, x in micrometres. Coefficients are decimal strings, converted at the precision in use.
def strong(offset, *terms):
    """n^2 = 1 + offset + sum A x^2/(x^2 - L^2)."""
    def index(x):
        x2, total = x * x, 1 + mpf(offset)
        for a, l in terms:
            total = mpf(a) * x2 / (x2 - mpf(l) ** 2) + total
        return root_of(total)
    return index


def strong_squared(offset, *terms):
    """n^2 = 1 + offset + sum A x^2/(x^2 - B)."""
    def index(x):
        x2, total = x * x, 1 + mpf(offset)
        for a, b in terms:
            total = mpf(a) * x2 / (x2 - mpf(b)) + total
        return root_of(total)
    return index


def laurent(constant, *terms):
    """n^2 = constant + sum c x^p, p an even integer."""
    def index(x):
        x2, total = x * x, mpf(constant)
        for c, p in terms:
            power = 1
            for _ in range(abs(p) // 2):
                power = power * x2
            total = (mpf(c) * power if p > 0 else mpf(c) / power) + total
        return root_of(total)
    return index


def gas(*terms):
    """n = 1 + sum c/(d - x^-2)."""
    def index(x):
        inverse, total = 1 / (x * x), 1
        for c, d in terms:
            total = mpf(c) / (mpf(d) - inverse) + total
        return total
    return index


SILICA = [("0.6961663", "0.0684043"), ("0.4079426", "0.1162414"), ("0.8974794", "9.896161")]
GERMANIA = [("0.80686642", "0.068972606"), ("0.71815848", "0.15396605"), ("0.85416831", "11.841931")]


def germania_silica(fraction):
    def index(x):
        p, x2, total = mpf(fraction), x * x, mpf(1)
        for (a0, l0), (a1, l1) in zip(SILICA, GERMANIA):
            a = mpf(a0) + p * (mpf(a1) - mpf(a0))
            l = mpf(l0) + p * (mpf(l1) - mpf(l0))
            total = a * x2 / (x2 - l ** 2) + total
        return root_of(total)
    return index


SUNAK_A = ["0.2045154578", "0.06451676258", "0.1311583151"]
SUNAK_Z = ["0.06130807320", "0.1108859848", "8.964441861"]
SUNAK_B = {"sunak-germania": ["-0.1011783769", "0.1778934999", "-0.1064179581"],
           "sunak-fluorine": ["0.05413938039", "-0.1788588824", "-0.07445931332"]}


def sunak(dopant, fraction):
    """(n^2 - 1)/(n^2 + 2) = sum (A + B C) x^2/(x^2 - Z^2)."""
    def index(x):
        x2, y = x * x, mpf(0)
        for a, b, z in zip(SUNAK_A, SUNAK_B[dopant], SUNAK_Z):
            y = (mpf(a) + mpf(b) * mpf(fraction)) * x2 / (x2 - mpf(z) ** 2) + y
        return root_of((1 + 2 * y) / (1 - y))
    return index


def ghosh(celsius):
    """n^2 = A + B/(1 - C/x^2) + D/(1 - E/x^2)."""
    def index(x):
        t, x2 = mpf(celsius), x * x
        a = mpf("1.31552") + mpf("6.90754e-6") * t
        b = mpf("0.788404") + mpf("2.35835e-5") * t
        c = mpf("0.0110199") + mpf("5.84758e-7") * t
        d = mpf("0.91316") + mpf("5.48368e-7") * t
        return root_of(a + b / (1 - c / x2) + d / (1 - 100 / x2))
    return index


def values(index, wavelength):
    """n, N, D, slope, beta2, beta3, beta4 by series; SI units."""
    million = mpf(10) ** 6
    x = mpf(wavelength) * million
    s = index(Number([x, mpf(1)] + [mpf(0)] * (ORDER - 1))).c
    s = [c * million ** k for k, c in enumerate(s)]  # per metre^k
    lam = mpf(wavelength)
    d2, d3 = 2 * s[2], 6 * s[3]
    omega = 2 * pi * C / lam
    # lambda = lam / (1 + e), e = (w - omega)/omega: series in e.
    inner = [mpf(0)] + [lam * (-1) ** k for k in range(1, ORDER + 1)]
    beta = mul(compose(s, inner), [omega / C, omega / C] + [mpf(0)] * (ORDER - 1))
    factorial = [1, 1, 2, 6, 24]
    betas = [beta[k] * factorial[k] / omega ** k for k in range(ORDER + 1)]
    return [s[0], s[0] - lam * s[1], -lam / C * d2, -(d2 + lam * d3) / C] + betas[2:]


def values_by_differences(index, wavelength):
    """The same by numerical differentiation of n(lambda) and of beta(omega)."""
    lam = mpf(wavelength)
    n = lambda l: index(l * 10 ** 6)
    omega = 2 * pi * C / lam
    beta = lambda w: n(2 * pi * C / w) * w / C
    h, hw = lam / mpf(10) ** 22, omega / mpf(10) ** 22
    dispersion = lambda l: -l / C * diff(n, l, 2, h=h)
    d3 = diff(n, lam, 3, h=h)
    return [n(lam), n(lam) - lam * diff(n, lam, 1, h=h), dispersion(lam),
            -(diff(n, lam, 2, h=h) + lam * d3) / C] + [diff(beta, omega, k, h=hw) for k in (2, 3, 4)]


def digits(a, b, scale):
    """Decimal digits to which a and b agree, relative to scale."""
    return 99 if a == b else -mp.log10(abs(a - b) / scale)


def micro(text):
    """The double nearest to text micrometres."""
    return float(text + "e-6")


def zeros(index, low, high):
    """Wavelengths (m, as mpf) where n'' = 0, by scanning and refining."""
    mp.dps = 40
    curvature = lambda x: index(Number([mpf(x), mpf(1)] + [mpf(0)] * (ORDER - 1))).c[2]
    steps, found = 200, []
    grid = [mpf(low) * (mpf(high) / mpf(low)) ** (mpf(i) / steps) for i in range(steps + 1)]
    signs = [curvature(x) for x in grid]
    for i in range(steps):
        if signs[i] * signs[i + 1] < 0:
            found.append(findroot(curvature, (grid[i], grid[i + 1]), solver="anderson", tol=1e-60) / 10 ** 6)
    return found


def glasses():
    usual = ["0.4", "0.5893", "0.6328", "0.85", "1.06", "1.31", "1.55", "1.625"]
    yield "silica", 0, strong("0", *SILICA), "0.21", "6.7", usual + [
        "0.21001", "0.25", "0.3", "0.35", "0.4358", "0.4861", "0.5461", "0.6563", "0.78", "0.98", "1.064", "1.2", "1.25",
        "1.26", "1.3", "1.324", "1.36", "1.4", "1.46", "1.53", "1.565", "1.7", "2", "2.5", "3", "3.5", "3.71", "4.5", "6"]
    yield "germania", 0, strong("0", *GERMANIA), "0.36", "4.3", usual + ["0.38", "1.3", "1.7", "1.75", "2", "2.5", "3", "4"]
    for x in (0.0, 0.001, 0.01, 0.03, 0.036, 0.05, 0.1, 0.2, 0.35, 0.5, 0.75, 0.9, 1.0):
        yield "germania-silica", x, germania_silica(x), "0.36", "4.3", ["0.4", "0.6328", "0.85", "1.31", "1.55", "2", "3"]
    for name in sorted(SUNAK_B):
        for x in (0.0, 0.005, 0.01, 0.03, 0.1, 0.15, 0.2):
            yield name, x, sunak(name, x), "0.6", "1.8", ["0.85", "1.31", "1.55"]
    for t in (-40.0, 0.0, 2.0, 20.0, 22.0, 60.0, 85.0, 200.0):
        yield "ghosh-silica", t, ghosh(t), "0.4", "2.3", ["0.6328", "0.85", "1.31", "1.55"]
    doped = [
        ("SiO2 (quenched)", "0.696750 0.408218 0.890815 0.069066 0.115662 9.900559"),
        ("GeO2:SiO2 3.1", "0.7028554 0.4146307 0.8974540 0.0727723 0.1143085 9.896161"),
        ("GeO2:SiO2 3.5", "0.7042038 0.4160032 0.9074049 0.0514415 0.1291600 9.896156"),
        ("GeO2:SiO2 5.8", "0.7088876 0.4206803 0.8956551 0.0609053 0.1254514 9.896162"),
        ("GeO2:SiO2 7.9", "0.7136824 0.4254807 0.8964226 0.0617167 0.1270814 9.896161"),
        ("GeO2:SiO2 13.5", "0.711040 0.451885 0.704048 0.064270 0.129408 9.425478"),
        ("P2O5:SiO2 9.1", "0.695790 0.452497 0.712513 0.061568 0.119921 8.656641"),
        ("B2O3:SiO2 13.3", "0.690618 0.401996 0.898817 0.061900 0.123662 9.098960"),
        ("F:SiO2 1.0", "0.691116 0.399166 0.890423 0.068227 0.116460 9.993707")]
    for name, text in doped:
        c = text.split()
        yield name, 0, strong("0", *zip(c[:3], c[3:])), "0.45", "1.8", ["0.6328", "0.85", "1.06", "1.31", "1.55"]
    yield ("air", 0, gas(("0.05792105", "238.0185"), ("0.00167917", "57.362")), "0.23", "1.69",
           ["0.3", "0.4047", "0.5893", "0.6328", "0.85", "1.31", "1.55"])
    yield ("water", 0, strong_squared("0", ("5.684027565e-1", "5.101829712e-3"), ("1.726177391e-1", "1.821153936e-2"),
           ("2.086189578e-2", "2.620722293e-2"), ("1.130748688e-1", "1.069792721e1")), "0.182", "1.129",
           ["0.2", "0.25", "0.4047", "0.5893", "0.6328", "0.85", "1", "1.064"])
    yield ("pmma", 0, laurent("2.1778", ("6.1209e-3", 2), ("-1.5004e-3", 4), ("2.3678e-2", -2), ("-4.2137e-3", -4),
           ("7.3417e-4", -6), ("-4.5042e-5", -8)), "0.42", "1.62",
           ["0.4358", "0.52", "0.5893", "0.65", "0.85", "1.06", "1.31", "1.55"])
    yield ("pmma-sultanova", 0, strong_squared("0", ("1.1819", "0.011313")), "0.4368", "1.052",
           ["0.5", "0.52", "0.5893", "0.65", "0.85", "1"])
    yield ("polycarbonate", 0, strong_squared("0", ("1.4182", "0.021304")), "0.4368", "1.052",
           ["0.5", "0.52", "0.5893", "0.65", "0.85", "1"])
    yield ("zblan", 0, strong("0", ("1.22514", "0.08969"), ("1.52898", "21.3825")), "0.365", "3.5",
           ["0.4", "0.5893", "0.85", "1.31", "1.55", "1.6", "1.65", "2", "2.7", "3"])
    yield ("as2s3", 0, strong_squared("0", ("1.8983678", "0.0225"), ("1.9222979", "0.0625"), ("0.8765134", "0.1225"),
           ("0.1188704", "0.2025"), ("0.9569903", "750")), "0.57", "11.8",
           ["0.5893", "0.6328", "0.85", "1.55", "2", "4.5", "5", "8", "10.6"])
    yield ("silica-arosa", 0, strong("0", ("0.9310", "0.079"), ("0.1735", "0.130"), ("2.1121", "14.918")), "0.26", "1.7",
           ["0.3", "0.4", "0.5893", "0.85", "1.06", "1.27", "1.31", "1.55"])


HEADER = """\
# Refractive index and its derivatives of the glasses, polymers, water and air that package materials knows.
# Made by (from the repository root): python3 materials/testdata/index.py > materials/testdata/index.csv
# Exact power series with mpmath at 50 and 80 digits, agreeing to 25 digits, and with numerical differentiation at 160 digits.
# 25 significant digits. parameter and wavelength are exact doubles; published coefficients are exact decimals.
# SI units: wavelength m; group_index = n - wavelength n'; d = -(wavelength/c) n'' in s/m^2; slope = d(d)/d(wavelength)
# in s/m^3; beta_k = d^k(n omega/c)/d omega^k in s^k/m. c = 299792458 m/s. The wavelength is the formula's own x, as published.
# parameter: mole fraction for germania-silica, sunak-germania and sunak-fluorine; degrees Celsius for ghosh-silica; else 0.
# For each glass: both ends of its range, usual wavelengths, each zero of n'' inside the range to the nearest nanometre and
# as the double nearest to it (there d is all cancellation: compare it with c^-1 wavelength n'' of a neighbour, not with itself).
# silica: I. H. Malitson, J. Opt. Soc. Am. 55, 1205 (1965), 0.21 to 3.71 um; holds to 6.7 um by C. Z. Tan, J. Non-Cryst. Solids 223, 158 (1998).
# germania and germania-silica (A_i and L_i linear in the mole fraction): J. W. Fleming, Appl. Opt. 23, 4486 (1984), 0.36 to 4.3 um.
# sunak-*: H. R. D. Sunak and S. P. Bastien, IEEE Photon. Technol. Lett. 1, 142 (1989), 0.6 to 1.8 um; coefficients from memory.
# ghosh-silica: G. Ghosh, M. Endo and T. Iwasaki, J. Lightwave Technol. 12, 1338 (1994); coefficients from memory; range here 0.4 to 2.3 um.
# measured doped glasses (number in the name: mole per cent): J. W. Fleming, J. Am. Ceram. Soc. 59, 503 (1976) and Electron. Lett. 14, 326
# (1978); S. H. Wemple et al., J. Appl. Phys. 44, 5432 (1973); as collected by M. J. Adams, An Introduction to Optical Waveguides (1981);
# coefficients from memory; range here 0.45 to 1.8 um.
# air: P. E. Ciddor, Appl. Opt. 35, 1566 (1996). water, 20 C: M. Daimon and A. Masumura, Appl. Opt. 46, 3811 (2007).
# pmma: G. Beadie et al., Appl. Opt. 54, F139 (2015). pmma-sultanova and polycarbonate: N. Sultanova et al., Acta Phys. Pol. A 116, 585 (2009).
# zblan: F. Gan, J. Non-Cryst. Solids 184, 9 (1995). as2s3: W. S. Rodney et al., J. Opt. Soc. Am. 48, 633 (1958).
# silica-arosa: Y. Arosa and R. de la Fuente, Opt. Lett. 45, 4268 (2020).
glass,parameter,wavelength,n,group_index,d,slope,beta2,beta3,beta4"""


def main():
    print(HEADER)
    rows, worst = 0, 99
    for name, parameter, index, low, high, list_ in glasses():
        wavelengths = {micro(t) for t in list_ + [low, high]}
        for z in zeros(index, low, high):
            wavelengths.add(float(z))
            wavelengths.add(micro(nstr(z * 10 ** 6, 4)))
        wavelengths = {w for w in wavelengths if micro(low) <= w <= micro(high)}
        for w in sorted(wavelengths):
            mp.dps = 50
            coarse = values(index, w)
            mp.dps = 80
            fine = values(index, w)
            mp.dps = 160
            other = values_by_differences(index, w)
            for k, (a, b) in enumerate(zip(coarse, fine)):
                assert digits(a, b, abs(b)) > 26, (name, w, k)
            # At a zero of D the difference quotient keeps digits relative to the terms that cancel.
            c, lam = C, mpf(w)
            third = abs(fine[3]) * lam
            scale = [fine[0], fine[0], max(abs(fine[2]), third * mpf(10) ** -8), abs(fine[3]),
                     max(abs(fine[4]), third * lam ** 2 / c * mpf(10) ** -8), abs(fine[5]), abs(fine[6])]
            worst = min(worst, min(digits(a, b, s) for a, b, s in zip(fine, other, scale)))
            assert worst > 25, (name, w, worst)
            cells = [nstr(v, 25, strip_zeros=False, min_fixed=0, max_fixed=0) for v in fine]
            print(",".join([name, repr(parameter), repr(w)] + cells))
            rows += 1
    print(f"{rows} rows; series and differences agree to {float(worst):.1f} digits", file=sys.stderr)


main()
