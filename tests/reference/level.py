"""Writes level.json: chi-square tails and truncated normals, by mpmath 1.3.0 at 50 digits.

Run: python3 tests/reference/level.py > tests/reference/level.json
scipy 1.17.1 (chi2.sf, truncnorm) gave the same to its own accuracy when this was written.
"""
import json
from mpmath import mp, mpf, gammainc, quad, exp, sqrt, findroot, erfc

mp.dps = 50


def chi_upper(x, df):
    return gammainc(mpf(df) / 2, mpf(x) / 2, mp.inf, regularized=True)


def ncdf(z):
    return erfc(-z / sqrt(mpf(2))) / 2


def truncated(m, s, upper):
    """Moments by the textbook formulas at 400 digits, so that their cancellation does not matter."""
    with mp.workdps(400):
        m, s, upper = mpf(m), mpf(s), mpf(upper)
        a, b = -m / s, (upper - m) / s
        pdf = lambda z: exp(-z * z / 2) / sqrt(2 * mp.pi)
        # Differences of the nearer tail.
        mass = (lambda p, q: ncdf(q) - ncdf(p)) if a < 0 else (lambda p, q: ncdf(-p) - ncdf(-q))
        z = mass(a, b)
        first = (pdf(a) - pdf(b)) / z
        variance = 1 + (a * pdf(a) - b * pdf(b)) / z - first ** 2

        def quantile(p):
            low, high = a, b
            for _ in range(200):
                middle = (low + high) / 2
                if mass(a, middle) / z < p:
                    low = middle
                else:
                    high = middle
            return m + s * low

        return [m + s * first, s * sqrt(variance), quantile(mpf("0.025")), quantile(mpf("0.975"))]


CHI = [
    (3.841, 1), (5.991, 2), (7.815, 3), (9.488, 4), (6.635, 1), (9.210, 2),
    (4.378378378378378, 1), (0.01, 1), (0.5, 3), (1.0, 7), (25.0, 19), (150.0, 99), (400.0, 1), (1000.0, 5), (1e-12, 2),
]
NORMALS = [
    (3.0, 0.5, 12.0), (0.0, 1.0, 12.0), (0.2, 0.5, 12.0), (11.9, 0.35, 12.0), (14.0, 0.5, 12.0), (36.0, 0.5, 12.0),
    (40.0, 0.05, 12.0), (-30.0, 0.1, 12.0), (6.0, 500.0, 12.0), (-4.0, 90.0, 5.0), (2.4, 0.4, 5.0), (1e-3, 1e-2, 12.0),
]

print(json.dumps({
    "note": "by level.py (mpmath 1.3.0). chiSquareUpper: x, df, upper tail. truncatedNormal: m, s, upper end, mean, sd, 2.5 % and 97.5 % points.",
    "chiSquareUpper": [[x, df, float(chi_upper(x, df))] for x, df in CHI],
    "truncatedNormal": [[m, s, u] + [float(v) for v in truncated(m, s, u)] for m, s, u in NORMALS],
}, indent=1))
