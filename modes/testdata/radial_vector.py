"""Reference table of exact vector modes of fibres of uniform layers, in arbitrary precision.

Run from the repository root:
    python3 modes/testdata/radial_vector.py > modes/testdata/radial_vector.csv

Needs Python 3.9 and mpmath. In each layer E_z and H_z are Bessel functions of order nu, and E_z, H_z,

    E_phi ~ -(beta nu E_z/r + k H_z')/K^2,   H_phi ~ (beta nu H_z/r + k n^2 E_z')/K^2,   K^2 = k^2 n^2 - beta^2

are continuous at every radius (A. W. Snyder and J. D. Love, Optical Waveguide Theory, 1983, table 30-1; H in units of E over
the impedance of vacuum). The determinant of these conditions is brought to zero at 30 and at 40 digits, from a start good
to 9 digits; both must agree. Families: TE and TM have E_z or H_z alone; of the hybrid modes the
sign of the integral of E_z H_z r tells, which is that of the first mode of the table for HE, the opposite for EH.
"""
from mpmath import besseli, besselj, besselk, bessely, det, findroot, lu_solve, matrix, mp, mpf, nstr, pi, sqrt

# Outer radii in um and indices, the cladding's last; the vacuum wavelength is 1 um.
FIBRES = [
    ([0.5, 1.2], [1, 1.45, 1]),
    ([1, 1.5], [2.4, 1.45, 1]),
    ([4, 6, 9], [1.45, 1.44, 1.446, 1.444]),
    ([0.3, 0.9, 1.1], [1.33, 1.6, 1.2, 1.33]),
    ([2, 7, 8], [1.46, 1.45, 1.47, 1.444]),
]
# Fibre, family, nu, m, start.
MODES = [
    (0, "HE", 1, 1, "1.356602088"),
    (0, "TE", 0, 1, "1.351984715"),
    (0, "HE", 2, 1, "1.339486999"),
    (0, "TM", 0, 1, "1.317736902"),
    (0, "HE", 3, 1, "1.292684135"),
    (0, "EH", 3, 1, "1.135829492"),
    (0, "HE", 2, 2, "1.064815877"),
    (0, "EH", 4, 1, "1.029234692"),
    (0, "TM", 0, 2, "1.024312912"),
    (1, "HE", 1, 1, "2.372408007"),
    (1, "TE", 0, 1, "2.333182417"),
    (1, "HE", 2, 1, "2.329133409"),
    (1, "TM", 0, 1, "2.326202758"),
    (1, "EH", 1, 1, "2.274837978"),
    (1, "HE", 4, 1, "2.196899858"),
    (1, "EH", 3, 1, "2.119294887"),
    (1, "EH", 4, 1, "2.018731842"),
    (1, "EH", 5, 1, "1.900930133"),
    (1, "HE", 2, 3, "1.848485106"),
    (1, "HE", 5, 2, "1.725690103"),
    (1, "HE", 1, 4, "1.638364727"),
    (1, "HE", 9, 1, "1.511040392"),
    (1, "TM", 0, 4, "1.442418524"),
    (1, "EH", 3, 3, "1.310838549"),
    (1, "HE", 3, 4, "1.278682659"),
    (1, "HE", 2, 5, "1.206294184"),
    (1, "TM", 0, 5, "1.166084573"),
    (1, "EH", 3, 4, "1.083285841"),
    (1, "HE", 1, 6, "1.017835439"),
    (1, "HE", 8, 2, "1.017788995"),
    (2, "HE", 1, 1, "1.447961081"),
    (2, "TE", 0, 1, "1.445051863"),
    (2, "HE", 2, 1, "1.445040126"),
    (2, "TM", 0, 1, "1.445038653"),
    (2, "HE", 1, 2, "1.444261059"),
    (2, "HE", 2, 2, "1.444052715"),
    (2, "TM", 0, 2, "1.444051496"),
    (3, "HE", 1, 1, "1.511164025"),
    (3, "TE", 0, 1, "1.482451210"),
    (3, "HE", 2, 1, "1.471332484"),
    (3, "TM", 0, 1, "1.456041223"),
    (3, "EH", 1, 1, "1.390764177"),
    (3, "HE", 3, 1, "1.385291749"),
    (4, "HE", 1, 1, "1.455592451"),
    (4, "TE", 0, 1, "1.455504334"),
]


def derivative(f, nu, x, sign):
    """f' from f_{nu-1} and f_{nu+1}."""
    if nu == 0:
        return sign * f(1, x)
    if f in (besselj, bessely):
        return (f(nu - 1, x) - f(nu + 1, x)) / 2
    return (f(nu - 1, x) + f(nu + 1, x)) / 2 * (1 if f is besseli else -1)


def functions(nu, n, beta, k, first, last):
    """The radial functions of a layer, each giving value and slope at r."""
    K2 = k * k * n * n - beta * beta
    x = sqrt(abs(K2))
    if last:
        kinds = [(besselk, -1)]
    elif K2 > 0:
        kinds = [(besselj, -1), (bessely, -1)]
    else:
        kinds = [(besseli, 1), (besselk, -1)]
    if first:
        kinds = kinds[:1]
    return K2, [lambda r, f=f, s=s: (f(nu, x * r), x * derivative(f, nu, x * r, s)) for f, s in kinds]


def conditions(fibre, nu, index):
    """The matrix of the conditions, and for each column its layer, its field and its function."""
    radii, ns = [mpf(float(r)) for r in fibre[0]], [mpf(float(n)) for n in fibre[1]]
    k = 2 * pi
    beta = k * index
    columns = []
    for i, n in enumerate(ns):
        K2, fs = functions(nu, n, beta, k, i == 0, i == len(ns) - 1)
        for field in ("E", "H"):
            for f in fs:
                columns.append((i, field, f, K2, n))
    a = matrix(4 * len(radii), len(columns))
    for c, (i, field, f, K2, n) in enumerate(columns):
        for j, sign in ((i - 1, -1), (i, 1)):
            if not 0 <= j < len(radii):
                continue
            r = radii[j]
            v, s = f(r)
            v, s = sign * v, sign * s
            if field == "E":
                rows = (v, 0, -beta * nu * v / r / K2, k * n * n * s / K2)
            else:
                rows = (0, v, -k * s / K2, beta * nu * v / r / K2)
            for t in range(4):
                a[4 * j + t, c] = rows[t]
    return a, columns, radii


def split(a, columns, family):
    """The part of the matrix that TE or TM modes have."""
    if family in ("HE", "EH"):
        return a
    field, rows = ("H", (1, 2)) if family == "TE" else ("E", (0, 3))
    cs = [c for c, col in enumerate(columns) if col[1] == field]
    rs = [r for r in range(a.rows) if r % 4 in rows]
    b = matrix(len(rs), len(cs))
    for i, r in enumerate(rs):
        for j, c in enumerate(cs):
            b[i, j] = a[r, c]
    return b


def solve(fibre, family, nu, start, digits):
    mp.dps = digits + 15

    def f(n):
        a, columns, _ = conditions(fibre, nu, n)
        return det(split(a, columns, family))

    n2 = mpf(float(fibre[1][-1]))
    x = mpf(start)
    h = (x - n2) * mpf(10) ** -7
    root = findroot(f, (x - h, x + h), solver="secant", tol=mpf(10) ** (-3 * digits), verify=False, maxsteps=60)
    return root


def sign(fibre, nu, root):
    a, columns, radii = conditions(fibre, nu, root)
    # The null vector, its last component 1.
    n = a.cols
    rows = [r for r in range(a.rows) if r != 0]
    b, y = matrix(n - 1, n - 1), matrix(n - 1, 1)
    for i, r in enumerate(rows):
        for c in range(n - 1):
            b[i, c] = a[r, c]
        y[i] = -a[r, n - 1]
    x = list(lu_solve(b, y)) + [mpf(1)]
    mp.dps = 15
    total = mpf(0)
    for i in range(len(radii)):
        low, high = radii[i - 1] if i else mpf(0), radii[i]

        def product(r):
            e = sum(x[c] * col[2](r)[0] for c, col in enumerate(columns) if col[0] == i and col[1] == "E")
            h = sum(x[c] * col[2](r)[0] for c, col in enumerate(columns) if col[0] == i and col[1] == "H")
            return r * e * h

        steps = 24
        total += sum(product(low + (high - low) * (mpf(t) + 0.5) / steps) for t in range(steps)) * (high - low)
    return 1 if total > 0 else -1


def main():
    print("# Exact vector modes of fibres of uniform layers at a vacuum wavelength of 1 um: radii in um, indices from the axis to the")
    print("# cladding, effective index, and its excess over the cladding's. Made by radial_vector.py (mpmath), which names the equations.")
    print("fibre,radii,indices,family,nu,m,index,excess")
    hybrid = None
    for i, family, nu, m, start in MODES:
        fibre = FIBRES[i]
        root = solve(fibre, family, nu, start, 40)
        again = solve(fibre, family, nu, start, 30)
        mp.dps = 55
        n2 = mpf(float(fibre[1][-1]))
        assert abs(again - root) < mpf(10) ** -25 * (root - n2), (i, family, nu, m)
        assert abs(root - mpf(start)) < mpf(10) ** -8, (i, family, nu, m, root)
        if nu:
            s = sign(fibre, nu, root)
            hybrid = hybrid or s
            assert s == (hybrid if family == "HE" else -hybrid), (i, family, nu, m)
        mp.dps = 55
        print(",".join([str(i), " ".join(map(str, fibre[0])), " ".join(map(str, fibre[1])), family, str(nu), str(m),
                        nstr(root, 25), nstr(root - n2, 25)]))


main()
