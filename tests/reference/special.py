"""Writes special.json: reference values of the special functions, by mpmath 1.3.0 at 60 digits.

Run: python3 tests/reference/special.py > tests/reference/special.json
Every input is a double, taken exactly; every output is the correctly rounded double.
"""
import json
from mpmath import mp, mpf, loggamma, beta, log, ncdf, erfinv, sqrt, exp

mp.dps = 60


def log_beta(a, b):
    return loggamma(a) + loggamma(b) - loggamma(a + b)


def beta_cdf(x, a, b):
    """Lower tail by the hypergeometric series on whichever side converges fast."""
    x, a, b = mpf(x), mpf(a), mpf(b)
    if x < (a + 1) / (a + b + 2):
        return _lower(x, a, b)
    return 1 - _lower(1 - x, b, a)


def _lower(x, a, b):
    term = mpf(1)
    total = mpf(1)
    n = 0
    while True:  # x^a (1-x)^b / (a B(a,b)) * sum (a+b)_n / (a+1)_n x^n
        term *= (a + b + n) / (a + 1 + n) * x
        total += term
        n += 1
        if term < total * mpf(10) ** -40:
            break
    return exp(a * log(x) + b * log(1 - x) - log_beta(a, b)) / a * total


def beta_quantile(p, a, b):
    p = mpf(p)
    low, high = mpf(-800), mpf(800)  # bisection on the logit of x
    for _ in range(160):
        t = (low + high) / 2
        if beta_cdf(1 / (1 + exp(-t)), a, b) < p:
            low = t
        else:
            high = t
    return 1 / (1 + exp(-low))


out = {
    "note": "mpmath 1.3.0, 60 digits; made by special.py",
    "logGamma": [[x, float(loggamma(mpf(x)))] for x in
                 [1e-10, 0.01, 0.1, 0.3, 0.5, 0.75, 0.999, 1.0000001, 1.2, 1.49, 1.51, 1.9, 2.0000001, 2.3,
                  2.5, 3, 4.5, 7.25, 9.999, 10, 15.5, 33, 100.25, 1234.5, 1e5, 1e7 + 0.5, 1e10]],
    "logBeta": [[a, b, float(log_beta(mpf(a), mpf(b)))] for a, b in
                [(0.01, 0.02), (0.5, 0.5), (1, 1), (2, 3), (0.3, 12), (7.5, 9.5), (9.9, 10.1), (12, 0.001),
                 (25.5, 30), (3, 5000), (250, 4750.5), (1e5, 2), (5e6, 5e6), (1e7, 0.5), (1e7, 123.25)]],
    "betaCdf": [[x, a, b, float(beta_cdf(x, a, b))] for x, a, b in
                [(0.5, 2, 3), (0.01, 0.5, 0.5), (0.3, 0.1, 5), (0.9, 20, 1), (1e-8, 0.01, 3), (0.2, 16, 134),
                 (0.1, 16, 134), (0.31, 81, 182), (0.37, 81, 182), (0.05, 5, 5), (0.999, 30, 0.2),
                 (0.5, 500, 520), (0.4, 500, 520), (0.52, 5000, 5000), (0.0011, 1000, 1000000),
                 (0.5001, 5000000, 5000000), (0.3, 1.5, 12.25), (0.001, 2, 700)]],
    "betaQuantile": [[p, a, b, float(beta_quantile(p, a, b))] for p, a, b in
                     [(0.025, 2, 3), (0.5, 2, 3), (0.975, 1, 20), (0.025, 1, 29), (0.975, 2, 28),
                      (0.025, 81, 183), (0.975, 82, 182), (1e-6, 3, 4), (0.999999, 3, 4), (0.5, 0.5, 0.5),
                      (0.01, 0.1, 0.3), (0.9, 0.1, 0.3), (0.3, 0.02, 5), (0.7, 5, 0.02), (0.00012207, 45, 5.5),
                      (0.99987793, 45, 5.5), (0.025, 485, 515), (0.975, 2600, 2400), (0.1, 1.0, 1.0)]],
    "normalCdf": [[x, float(ncdf(mpf(x)))] for x in
                  [-37, -20, -10, -6, -5.6, -4, -2.5, -1.959963984540054, -1, -0.7, -0.67, -0.3, -1e-5, 0,
                   1e-5, 0.3, 0.67, 0.7, 1, 1.96, 3, 5, 8]],
    "betaPowerMoment": [[A, B, a, b, float(beta(mpf(A) + a, mpf(B) + b) / beta(mpf(A), mpf(B)))]
                        for A, B, a, b in [(2, 3, 1, 0), (45, 5.5, 2, 1), (0.5, 0.5, 0, 2), (9, 1, 0.5, 0),
                                           (300, 20, 1.5, 2.5), (1, 1, 30, 30)]],
}
print(json.dumps(out, indent=1))
