"""Writes poolingDense.json: the pooling model by brute force, with nothing shared with the product's method.

Python 3, numpy 2.4.6 (run 2026-12). Run: python3 tests/reference/poolingDense.py > tests/reference/poolingDense.json
For each tau on a fine grid (quadratic spacing) and each mu on a uniform fine grid, every study's binomial likelihood is
integrated over its own logit by a plain Riemann sum over +-9 sd of the random effect, or, where the likelihood is
the narrower of the two, over +-12 sd of the likelihood: no adaptive centring, no Gauss rule, no asinh scale.
"""
import json
import sys
import numpy as np


def log_binomial(y, n, eta):
    return y * eta - n * np.logaddexp(0, eta)


def marginal(y, n, mu, tau):
    """ln of the study's marginal likelihood for a vector mu, up to a constant."""
    p = (y + 0.5) / (n + 1)
    peak = np.log(p / (1 - p))
    se = 1 / np.sqrt((n + 1) * p * (1 - p))
    if y in (0, n) or se > tau / 4:  # integrate over z ~ N(0, 1)
        z = np.linspace(-9, 9, 601)
        log = log_binomial(y, n, mu[:, None] + tau * z[None, :]) - z**2 / 2
        top = log.max(axis=1, keepdims=True)
        return (top + np.log(np.exp(log - top).sum(axis=1, keepdims=True) * (z[1] - z[0])))[:, 0]
    eta = peak + se * np.linspace(-12, 12, 401)
    like = log_binomial(y, n, eta)
    best = like.max()
    like = np.exp(like - best)
    log = -((eta[None, :] - mu[:, None]) ** 2) / (2 * tau**2)
    top = log.max(axis=1, keepdims=True)
    total = (np.exp(log - top) * like[None, :]).sum(axis=1, keepdims=True) * (eta[1] - eta[0])
    return (top + np.log(total / tau))[:, 0] + best


def expit(x):
    return 1 / (1 + np.exp(-x))


def summary(edges, mass, transform):
    """Mean, median, 95 % interval of masses in cells, spread evenly inside each."""
    below = np.concatenate([[0], np.cumsum(mass)]) / mass.sum()
    quantile = [float(transform(np.interp(q, below, edges))) for q in (0.025, 0.5, 0.975)]
    middle = transform((edges[1:] + edges[:-1]) / 2)
    return {"mean": float((mass * middle).sum() / mass.sum()), "median": quantile[1],
            "interval": [quantile[0], quantile[2]]}


def pool(studies, mean, sd, mu_range, tau_max, cells):
    mu_edges = np.linspace(*mu_range, cells + 1)
    mu = (mu_edges[1:] + mu_edges[:-1]) / 2
    step = mu[1] - mu[0]
    tau_edges = tau_max * np.linspace(0, 1, 241) ** 2  # denser near 0, where large studies need it
    tau = (tau_edges[1:] + tau_edges[:-1]) / 2
    log = np.empty((tau.size, mu.size))
    for j, t in enumerate(tau):
        log[j] = -((mu - mean) ** 2) / (2 * sd**2) - t**2 / 2
        for y, n in studies:
            log[j] += marginal(y, n, mu, t)
    joint = np.exp(log - log.max()) * np.diff(tau_edges)[:, None]
    ends = (joint[:, 0].sum(), joint[:, -1].sum(), joint[-1].sum())
    assert max(ends) < 1e-6 * joint.sum(), f"range too narrow: {ends}"
    x_edges = np.linspace(mu_range[0] - 4, mu_range[1] + 4, 2401)
    x = (x_edges[1:] + x_edges[:-1]) / 2
    predictive = np.zeros_like(x)
    for j, t in enumerate(tau):
        if t < 1.5 * step:  # the normal is narrower than the grid: average shifted interpolants instead
            z = np.linspace(-6, 6, 61)
            kernel = np.exp(-(z**2) / 2)
            for o, k in zip(z * t, kernel / kernel.sum()):
                predictive += k * np.interp(x - o, mu, joint[j], left=0, right=0) / step
        else:
            kernel = np.exp(-(((x[:, None] - mu[None, :]) / t) ** 2) / 2) / t / np.sqrt(2 * np.pi)
            predictive += kernel @ joint[j]
    return {
        "pooled": summary(mu_edges, joint.sum(axis=0), expit),
        "predictive": summary(x_edges, predictive, expit),
        "tau": summary(tau_edges, joint.sum(axis=1), lambda v: v),
    }


CASES = [
    ("five, prior of a question", [(3, 40), (10, 52), (0, 9), (25, 200), (7, 33)], (-1.5, 1.5), (-7, 3.5), 5.5, 500),
    ("three large and alike", [(521, 1000), (4180, 8000), (260, 500)], (0, 2.5), (-7, 7), 5.5, 1400),
    ("none and all", [(0, 30), (200, 200), (0, 12), (50, 50)], (0, 2.5), (-12, 12), 8.5, 600),
    ("eight tiny", [(1, 1), (2, 3), (0, 1), (3, 4), (1, 2), (2, 2), (0, 2), (4, 4)], (0, 2.5), (-10, 11), 6, 500),
    ("rare in a million", [(11, 500000), (3, 90000), (40, 1000000)], (0, 2.5), (-18, 1), 5.7, 900),
]

out = {"note": "numpy %s, brute force, made by poolingDense.py" % np.__version__, "cases": []}
for name, studies, (mean, sd), mu_range, tau_max, cells in CASES:
    expected = pool(studies, mean, sd, mu_range, tau_max, cells)
    out["cases"].append({"name": name, "prior": {"mean": mean, "sd": sd},
                         "studies": [{"events": y, "total": n} for y, n in studies], "expected": expected})
    print(name, file=sys.stderr)
print(json.dumps(out, indent=1))
