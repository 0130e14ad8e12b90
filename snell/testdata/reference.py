"""Reference values for package snell, to 40 digits and printed to 25.

Run from the package's directory, with Python 3 and mpmath:

    python3 testdata/reference.py > testdata/reference.csv

A number after the script's name writes that many random rows of each kind
instead, to be read with go test -run Reference -reference FILE.

Every formula is the textbook one, in the form that cancels; the digits make up
for it. Inputs are exact float64, written in hexadecimal. The matrices of the
stacks are multiplied whole, for the tangential fields (admittance n/cos for P),
which is another route than the package's own.
"""
import random
import sys
from mpmath import mp, mpf, mpc, asin, atan2, sin, cos, sqrt, pi, nstr, conj, arg, matrix, re, im

DIGITS = 200  # thick absorbing films grow as exp(thousands), harmlessly

def kz(n, n0, angle):
    k = sqrt(mpc(n)**2 - (n0 * sin(angle))**2)
    return -k if k.imag < 0 or (k.imag == 0 and k.real < 0) else k

def show(x):
    return nstr(x, 25, strip_zeros=False, min_fixed=0, max_fixed=0)

def row(kind, inputs, results):
    flat = []
    for z in results:
        flat += [z.real, z.imag] if isinstance(z, mpc) else [z]
    print('%s,%s,%s' % (kind, ' '.join(float(x).hex() for x in inputs), ' '.join(show(x) for x in flat)))

def refract(n1, n2, angle):
    row('refract', [n1, n2, angle], [asin(mpf(n1) * sin(mpf(angle)) / mpf(n2))])

def critical(n1, n2):
    row('critical', [n1, n2], [asin(mpf(n2) / mpf(n1))])

def stack_values(n0, ne, angle, wavelength, films):
    n0, angle, ne = mpf(n0), mpf(angle), mpc(ne)
    out = []
    k0, ke = kz(n0, n0, angle), kz(ne, n0, angle)
    for p in (False, True):
        admittance = (lambda n, k: n * n / k) if p else (lambda n, k: k)
        m = matrix([[mpc(1), mpc(0)], [mpc(0), mpc(1)]])
        for n, h in films:
            n = mpc(n)
            k = kz(n, n0, angle)
            d, y = 2 * pi * k * mpf(h) / mpf(wavelength), admittance(n, k)
            m = m * matrix([[cos(d), -1j * sin(d) / y], [-1j * y * sin(d), cos(d)]])
        y0, ye = admittance(n0, k0), admittance(ne, ke)
        b, c = m[0, 0] + m[0, 1] * ye, m[1, 0] + m[1, 1] * ye
        r, t = (y0 * b - c) / (y0 * b + c), 2 * y0 / (y0 * b + c)
        power = abs(t)**2 * re(ye) / re(y0)
        if p:  # from tangential fields to whole ones, and the sign of the reflected one
            r, t = -r, t * (k0 / n0) / (ke / ne)
        out.append((r, t, abs(r)**2, power))
    (rs, ts, Rs, Ts), (rp, tp, Rp, Tp) = out
    return [mpc(rs), mpc(rp), mpc(ts), mpc(tp), mpf(Rs), mpf(Rp), mpf(Ts), mpf(Tp), 1 - Rs - Ts, 1 - Rp - Tp]

def fresnel(n1, n2, angle):
    n2 = complex(n2)
    row('fresnel', [n1, n2.real, n2.imag, angle], stack_values(n1, n2, angle, 1, [])[:8])

def stack(n0, ne, angle, wavelength, *films):
    ne = complex(ne)
    inputs = [n0, ne.real, ne.imag, angle, wavelength]
    for n, h in films:
        inputs += [complex(n).real, complex(n).imag, h]
    row('stack', inputs, stack_values(n0, ne, angle, wavelength, films))

def total(n1, n2, angle):
    a, b, t = mpf(n1), mpf(n2), mpf(angle)
    decay = sqrt((a * sin(t))**2 - b**2)
    s, p = -2 * mp.atan(decay / (a * cos(t))), -2 * mp.atan(a * decay / (b * b * cos(t)))
    depth = 1 / (2 * pi * decay)
    # the shifts as derivatives of the phases with respect to kx, taken by mpmath
    def phase(x, gamma):
        return -2 * mp.atan(gamma * sqrt(x * x - b * b) / sqrt(a * a - x * x))
    x = a * sin(t)
    along = [-mp.diff(lambda x: phase(x, g), x, h=(x - b) * mpf(10)**-60) / (2 * pi) for g in (1, (a / b)**2)]
    row('total', [n1, n2, angle], [s, p, s - p, depth, along[0] * cos(t), along[1] * cos(t), along[0], along[1]])

def at_critical(n1, n2, away):
    mp.dps = DIGITS
    return float(asin(mpf(n2) / mpf(n1)) + mpf(away))

mp.dps = DIGITS
half_pi = float(pi / 2)
print('# Written by: python3 testdata/reference.py > testdata/reference.csv')
print('# kind, inputs (hexadecimal float64), results (25 digits); see reference.py for their order')

def corners():
    for n1, n2 in ((1.333, 1.0), (1.48, 1.46), (1.5, 1.47), (1.45, 1.4499), (1.4500000001, 1.45), (1.0000000000000002, 1.0), (1.5, 1e-9), (3.4777, 1.0)):
        critical(n1, n2)
    for n1, n2, t in ((1, 1.5, 0.7), (1, 1.5, 1e-9), (1, 1.5, 1e-300), (1, 1.5, half_pi - 1e-9), (1.5, 1, 0.3), (1.333, 1.0, 0.5),
                      (1.45, 1.4500000001, 1.5), (1.4500000001, 1.45, 1.5), (1, 4, 1.2), (1.45, 1.4500000000000002, half_pi)):
        refract(n1, n2, t)
    for away in (-1e-3, -1e-6, -1e-8, -1e-10, -1e-12, -1e-14, -4e-16):
        for n1, n2 in ((1.48, 1.46), (1.5, 1.0), (1.45, 1.4499)):
            refract(n1, n2, at_critical(n1, n2, away))

    for n1, n2, t in ((1, 1.5, 0), (1, 1.5, 0.5), (1, 1.5, 1.2), (1, 1.5, half_pi - 1e-7), (1, 1.5, half_pi), (1.5, 1, 0.5),
                      (1.5, 1, 0.9), (1.5, 1, 1.5), (1.45, 1.4500000001, 0.3), (1.45, 1.4500000001, 1.57), (1.45, 1.4499999999, 1.55),
                      (1.4, 1.4000000000000001, 0.785), (1, 0.05 + 3.3j, 0.6), (1, 0.05 + 3.3j, 1.5), (1.444, 0.56 + 11.1j, 0), (1.444, 1.5 + 15j, 1.3),
                      (1, 3.4777, 1.29), (1, 2.9 + 3.1j, 1.0), (1, 1.5 + 1e-12j, 0.8), (1, 3j, 0.7), (1, 1e-6 + 3j, 0.7), (1, 1e3 + 1e3j, 1.5),
                      (1.5, 1 + 1e-9j, 0.75), (1, 0.3 + 0.3j, 0.2), (1.48, 1.46 + 1e-7j, 1.41)):
        fresnel(n1, n2, t)
    for away in (1e-4, 1e-8, 1e-10, 1e-12, -1e-8, -1e-10, -1e-12):
        fresnel(1.48, 1.46, at_critical(1.48, 1.46, away))
        fresnel(3.4777, 1.0, at_critical(3.4777, 1.0, away))
        fresnel(1.48, 1.46 + 1e-11j, at_critical(1.48, 1.46, away))
    for away in (1e-3, 1e-6, 1e-9, 1e-12, 0):
        for n1, n2 in ((1.0, 1.5), (1.5, 1.0), (1.0, 1.5 + 1e-10j)):
            fresnel(n1, n2, float(atan2(mpf(n2.real), mpf(n1)) + mpf(away)))

    for away in (0.1, 1e-3, 1e-6, 1e-8, 1e-10, 1e-12, 1e-14, 4e-16):
        for n1, n2 in ((1.48, 1.46), (1.51, 1.0), (1.45, 1.4499)):
            t = at_critical(n1, n2, away)
            if t < half_pi:
                total(n1, n2, t)
    for n1, n2, t in ((1.5, 1, half_pi), (1.5, 1, half_pi - 1e-9), (1.48, 1.46, half_pi - 1e-12), (1.4500000001, 1.45, half_pi - 1e-6), (1.51, 1.0, 48.6167 / 57.29577951308232),
                      (100.0, 0.01, 0.7), (100.0, 0.01, 1.1e-4)):
        total(n1, n2, t)

    mgf2, quarter = 1.38, 550e-9 / 4 / 1.38
    stack(1, 1.5, 0, 550e-9, (mgf2, quarter))
    stack(1, 1.5, 1.1, 550e-9, (mgf2, quarter))
    stack(1, 1.5, half_pi - 1e-8, 550e-9, (mgf2, quarter))
    stack(1.444, 1, 0, 1550e-9, (1.2, 1550e-9 / 4.8))
    stack(1, 1.52, 0.4, 550e-9, *[(2.35, 58.51e-9), (1.38, 99.64e-9)] * 4)
    stack(1, 1.52, 0.4, 550e-9, *[(2.35, 58.51e-9), (1.38, 99.64e-9)] * 12)
    stack(1, 1.52, 0.4, 550e-9, *[(2.35, 58.51e-9), (1.38, 99.64e-9)] * 60)
    stack(1, 3.9 + 0.02j, 0.9, 633e-9, (1.457, 120e-9))
    stack(1, 1.5, 0.3, 633e-9, (0.06 + 4.2j, 40e-9))
    stack(1, 1.5, 0.3, 633e-9, (0.06 + 4.2j, 4e-6))
    stack(1, 1.5, 0.3, 633e-9, (0.06 + 4.2j, 40e-6))
    stack(1, 1.5, 1.2, 633e-9, (1.6 + 0.5j, 1e-3))
    stack(1, 1.5, 1.2, 633e-9, (1.6 + 1e-9j, 1e-3))
    stack(1.515, 1, 0.7636, 633e-9, (0.06 + 4.2j, 50e-9))           # near a plasmon resonance
    for gap in (1e-12, 1e-9, 100e-9, 1e-6, 10e-6, 100e-6):                  # frustrated total reflection
        stack(1.5, 1.5, 0.9, 1e-6, (1, gap))
    for away in (1e-12, 1e-9, -1e-9, -1e-12, 1e-15):
        t = at_critical(1.5, 1, away)
        stack(1.5, 1.5, t, 1e-6, (1, 1e-7))
        stack(1.5, 1.5, t, 1e-6, (1, 1e-4))
        stack(1.5, 1, t, 1e-6, (1.38, 1e-7))
    t = at_critical(1.48, 1.46, 1e-10)
    stack(1.48, 1.48, t, 1550e-9, (1.46, 5e-6), (1.48, 3e-6), (1.46, 5e-6))
    stack(1.444, 1.444, 0, 1550e-9, (1.4440001, 3e-6))                      # weak: a well matched joint
    stack(1.444, 1.4440002, 0.14, 1550e-9, (1.4440001, 3e-6))
    stack(1.444, 1.444, 1.56, 1550e-9, (1.4440001, 3e-6))
    stack(1.444, 1.444, 0, 1550e-9, (1.4440000000001, 1e-6))
    stack(1.444, 1.444, 0.1, 1550e-9, (1.444 + 1e-9j, 1e-2))
    stack(1, 0.5 + 11j, 0.5, 1550e-9, (1.45, 2e-6), (0.2 + 9j, 10e-9), (1.45, 2e-6))
    stack(1, 1, 1.4, 1e-6, (2 + 0.001j, 1e-6), (1.3, 0), (3j, 1e-8))
    stack(1, 1.5, half_pi, 550e-9, (mgf2, quarter))
    stack(1.5, 1, half_pi - 1e-10, 550e-9, (1.6, 1e-6), (1.5, 1e-6))
    stack(2, 1 + 3j, 0.5, 1e-6, *[(1.2 + 0.5j, 1e-6)] * 30)

def sweep(count):
    """Random cases, drawn so that every corner is met often."""
    rnd = random.Random(1)
    tiny = lambda least: 10**rnd.uniform(least, 0)
    absorb = lambda: rnd.choice((0, 0, tiny(-12), 10 * tiny(-2)))
    def pair():
        n = rnd.uniform(1, 4)
        return n, n * (1 + rnd.choice((1, 1, 0.5)) * tiny(-14)) if rnd.random() < 0.5 else rnd.uniform(1, 4)
    def angle(n1, n2):
        kind = rnd.randrange(4)
        t = rnd.uniform(0, half_pi) if kind == 0 else half_pi - tiny(-15) if kind == 1 else tiny(-12)
        if kind == 2 and n1 != n2:
            t = at_critical(max(n1, n2), min(n1, n2), rnd.choice((1, -1)) * tiny(-15))
        if kind == 3 and rnd.random() < 0.7:
            t = float(atan2(mpf(n2), mpf(n1)) + rnd.choice((1, -1)) * mpf(tiny(-15)))
        return min(max(t, 0.0), half_pi)
    for _ in range(count):
        a, b = pair()
        if a == b:
            continue
        a, b = max(a, b), min(a, b)
        critical(a, b)
        t = angle(a, b)
        refract(b, a, t)
        if a * sin(mpf(t)) < b:
            if t < float(asin(mpf(b) / mpf(a))):
                refract(a, b, t)
        elif t > float(asin(mpf(b) / mpf(a))):
            total(a, b, t)
        if rnd.random() < 0.5:
            a, b = b, a
        fresnel(a, b + 1j * absorb(), t)
        films, last = [], a
        for _ in range(rnd.randint(1, 6)):
            n = rnd.choice((pair()[0], a, b, last * (1 + tiny(-9))))
            films.append((n + 1j * absorb(), 1e-6 * 10**rnd.uniform(-4, 1)))
            last = n
        stack(a, b + 1j * absorb(), t, 1e-6, *films)


if len(sys.argv) > 1:
    sweep(int(sys.argv[1]))
else:
    corners()
