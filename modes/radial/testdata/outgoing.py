"""kappa = -u H_l^(1)'(u)/H_l^(1)(u), u = sqrt(-lambda), for outgoing.csv.

Run: python3 outgoing.py > outgoing.csv   (mpmath 1.3, 60 digits)
"""
from mpmath import mp, mpf, mpc, hankel1, sqrt, nstr

mp.dps = 60
print("# l,Re(lambda),Im(lambda),Re(kappa),Im(kappa)")
for l in [0, 1, 2, 3, 5, 10, 30, 100]:
    for a in ["-1e-12", "-1e-4", "-0.3", "-7.9", "-8.1", "-40", "-3000"]:
        for t in ["0", "1e-30", "1e-6", "0.1", "-0.1"]:
            lam = mpc(mpf(a), abs(mpf(a)) * mpf(t))
            # lambda as the test's float64 reads it.
            lam = mpc(float(lam.real), float(lam.imag))
            u = sqrt(-lam)
            k = l - u * hankel1(l - 1, u) / hankel1(l, u)
            print("%d,%s,%s,%s,%s" % (l, nstr(lam.real, 17), nstr(lam.imag, 17), nstr(k.real, 20), nstr(k.imag, 20)))
