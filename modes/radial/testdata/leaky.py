"""Leaky scalar modes of uniform layers, for leaky.csv.

Run: python3 leaky.py > leaky.csv   (mpmath 1.3, about ten minutes)

In a layer the field is A J_l(q R) + B Y_l(q R) with q^2 = V^2 f - lambda, beyond R = 1 it is
H_l^(1)(u R), u^2 = -lambda. The amplitudes are carried from the axis to R = 1 by continuity of the
field and its slope, and lambda is the complex zero of what is left over at R = 1, at 80 digits or more.
The start is a sign change, on the real axis, of the same with the real part of the outer
logarithmic slope; m is its rank from above, guided modes (K_l outside) included.
"""
from mpmath import mp, mpf, mpc, bessely, besselj, besselk, sqrt, re, im, log, factorial, psi


def pair(n, z):
    """J_n and Y_n by their power series (DLMF 10.2.2, 10.8.1), which is far quicker than mpmath's."""
    if n < 0:
        j, y = pair(-n, z)
        return (-1) ** n * j, (-1) ** n * y
    digits = mp.dps
    mp.dps = digits + 10 + int(0.9 * abs(z))
    t = -z * z / 4
    term, h = (z / 2) ** n / factorial(n), psi(0, mpf(1)) + psi(0, mpf(n + 1))
    j, s, k = mpc(0), mpc(0), 0
    while True:
        j += term
        s += term * h
        if k > abs(z) and abs(term * h) < mpf(10) ** -mp.dps * abs(j):
            break
        k += 1
        h += mpf(1) / k + mpf(1) / (n + k)
        term *= t / (k * (n + k))
    p = sum((factorial(n - i - 1) / factorial(i) * (-t) ** i for i in range(n)), mpc(0)) * (z / 2) ** -n
    y = (2 * log(z / 2) * j - p - s) / mp.pi
    mp.dps = digits
    return j, y


def quad(n, z):
    """J_n, J_n', Y_n, Y_n'."""
    j, y = pair(n, z)
    jb, yb = pair(n - 1, z)
    return j, jb - n / z * j, y, yb - n / z * y


def edge(l, ends, f, v, lam):
    """psi and psi' at R = 1."""
    q = [sqrt(mpc(v * v * x - lam)) for x in f]
    p, s, _, _ = quad(l, q[0] * ends[0])
    s *= q[0]
    for k in range(1, len(f)):
        r = ends[k - 1]
        j, j1, y, y1 = quad(l, q[k] * r)
        j1, y1 = q[k] * j1, q[k] * y1
        w = 2 / (mp.pi * r)  # the Wronskian j y1 - j1 y
        a, b = (p * y1 - s * y) / w, (s * j - p * j1) / w
        j, j1, y, y1 = quad(l, q[k] * ends[k])
        p = a * j + b * y
        s = q[k] * (a * j1 + b * y1)
    return p, s


def kappa(l, lam):
    u = sqrt(mpc(-lam))
    j, j1, y, y1 = quad(l, u)
    return -u * (j1 + 1j * y1) / (j + 1j * y)


def closed(l, ends, f, v, lam):
    p, s = edge(l, ends, f, v, lam)
    if lam > 0:
        w = sqrt(lam)
        k = w * besselk(l - 1, w) / besselk(l, w) + l
    else:
        k = re(kappa(l, lam))
    # J_l(q0 R) has the phase of q0^l; psi over it is real.
    phase = sqrt(mpc(v * v * f[0] - lam)) ** l
    return re((s + k * p) / phase)


def candidates(l, ends, f, v, low):
    """Real zeros in falling lambda."""
    mp.dps = 18
    high = max(max(f), 0) * v * v
    n = 160
    xs = [high - (high - low) * (i + mpf("0.0371923")) / n for i in range(n)]
    fs = [closed(l, ends, f, v, x) for x in xs]
    out = []
    for i in range(n - 1):
        a, b, fa = xs[i], xs[i + 1], fs[i]
        if (fa > 0) == (fs[i + 1] > 0):
            continue
        for _ in range(40):
            c = (a + b) / 2
            fc = closed(l, ends, f, v, c)
            if (fc > 0) == (fa > 0):
                a = c
            else:
                b = c
        out.append((a + b) / 2)
    return out


def resonance(l, ends, f, v, start):
    """By secants; the widest barrier costs some 40 digits."""
    mp.dps = 130 if v == 60 else 80
    g = lambda x: (lambda ps: ps[1] + kappa(l, x) * ps[0])(edge(l, ends, f, v, x))
    x, y = mpc(start), mpc(start) * (1 + mpf(10) ** -8)
    gx = g(x)
    for _ in range(40):
        gy = g(y)
        step = -gy * (y - x) / (gy - gx)
        x, gx, y = y, gy, y + step
        if abs(step) < mpf(10) ** -70 * abs(y):
            return y
    return None


# Name, ends of the layers, f of each, V, l.
cases = [
    ("W", ["0.5", "1"], ["1", "-0.8"], ["5", "8", "12", "20"], [0, 1, 2, 3]),
    ("W", ["0.5", "1"], ["1", "-0.8"], ["60"], [0, 2]),
    ("wide W", ["0.2", "1"], ["1", "-0.5"], ["12", "30"], [0, 1, 2]),
    ("trench", ["0.4", "0.7", "1"], ["1", "0.1", "-1.5"], ["6", "10"], [0, 1, 3]),
    ("ring", ["0.3", "0.5", "0.8", "1"], ["1", "-0.6", "0.15", "-0.9"], ["7", "12"], [0, 1, 4]),
    ("step", ["1"], ["1"], ["10", "20"], [3, 7, 12]),
    ("coated", ["0.3", "1"], ["-0.7", "-1"], ["12", "40", "100"], [0, 1, 2]),
    ("W", ["0.5", "1"], ["1", "-0.8"], ["15", "25"], [0, 1, 5]),
    ("step", ["1"], ["1"], ["14"], [4, 9]),
]

if __name__ == "__main__":
    mp.dps = 50
    for n in (0, 1, 5):
        for z in (mpc(2, -0.1), mpc(0, 9)):
            j, y = pair(n, z)
            assert abs(j / besselj(n, z) - 1) + abs(y / bessely(n, z) - 1) < mpf(10) ** -45
    print("# case,ends,f,V,l,m,Re(lambda),Im(lambda)")
    for name, e, f, vs, ls in cases:
        for v in vs:
            for l in ls:
                mp.dps = 80
                E, F, V = [mpf(x) for x in e], [mpf(x) for x in f], mpf(v)
                depth = 2.5 * max(-min(F) * V * V, mpf(l * l)) + 10
                found = candidates(l, E, F, V, -depth)
                rows = 0
                for m, start in enumerate(found, 1):
                    if start > 0 or m == len(found) or rows == 3:
                        continue
                    near = min(abs(start - x) for x in found if x != start)
                    x = resonance(l, E, F, V, start)
                    # Narrow, and well apart from the next: see leaky.go.
                    if x is None or abs(x - start) > near / 6 or abs(x - start) > abs(start) / 6:
                        continue
                    rows += 1
                    print("%s,%s,%s,%s,%d,%d,%s,%s" % (name, " ".join(e), " ".join(f), v, l, m,
                          mp.nstr(re(x), 25), mp.nstr(im(x), 25)), flush=True)
