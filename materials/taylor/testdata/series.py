# Taylor coefficients of composite functions with mpmath at 60 digits, from high-order
# numerical differentiation by mp.taylor, which knows nothing of series arithmetic.
# Inputs are doubles at their exact values. Needs python3-mpmath.
import random
from mpmath import mp, mpf, sqrt, exp, log, sin, cos, taylor, findroot, nstr

mp.dps = 60
random.seed(2)
print("# Made by: /usr/bin/python3 series.py > series.csv")
print("# function; point x, parameter p; the coefficients of orders 0 to 4")


def poly(x):  # never 0 near the points used: u(x) = 2 + x - 0.3 x^2 + 0.1 x^3
    return 2 + x - mpf(3) / 8 * x ** 2 + x ** 3 / 8


def glass(x):  # two oscillators, x in micrometres
    return 1 + mpf(5) / 4 * x ** 2 / (x ** 2 - mpf(1) / 64) + mpf(3) / 4 * x ** 2 / (x ** 2 - 81)


functions = {
    "square": (lambda x, p: poly(x) ** 2, (-1, 2)),
    "quotient": (lambda x, p: poly(x) / (1 + x ** 2), (-1, 2)),
    "inverse": (lambda x, p: 1 / poly(x), (-1, 2)),
    "sqrt": (lambda x, p: sqrt(poly(x)), (-1, 2)),
    "exp": (lambda x, p: exp(poly(x)), (-1, 2)),
    "log": (lambda x, p: log(poly(x)), (-1, 2)),
    "pow": (lambda x, p: poly(x) ** p, (-1, 2)),
    "sellmeier": (lambda x, p: sqrt(glass(x)), (0.3, 2.5)),
    "compose": (lambda x, p: sin(poly(x)), (-1, 2)),
    # The inverse of y = x + x^3/8 about the image of x.
    "reverse": (None, (0.1, 2)),
    # The y that solves y exp(y) = x, and Kepler's equation y - p sin y = x.
    "lambert": (None, (0.1, 5)),
    "kepler": (None, (0.1, 3)),
}
for name, (f, (low, high)) in functions.items():
    for i in range(12):
        x = mpf(random.uniform(low, high))
        p = mpf(random.choice([-2.5, -1.0, 0.5, 1.5, 3.0, 1 / 3]))
        at = x
        if name == "kepler":
            p = mpf(random.uniform(0.1, 0.9))
            g = lambda s: findroot(lambda y: y - p * sin(y) - s, s)
        elif name == "lambert":
            g = lambda s: findroot(lambda y: y * exp(y) - s, log(1 + s))
        elif name == "reverse":
            # mp.taylor differentiates numerically about the exact image of x.
            at = x + x ** 3 / 8
            g = lambda s: findroot(lambda y: y + y ** 3 / 8 - s, x)
        else:
            g = lambda s: f(s, p)
        c = taylor(g, at, 4)
        print("%s,%r,%r,%s" % (name, float(x), float(p), ",".join(nstr(v, 22) for v in c)))
