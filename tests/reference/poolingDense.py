"""Writes poolingDense.json: the pooling model by brute force, with nothing shared with the product's method.

Python 3, numpy 2.4.6 (run 2026-12). Run: python3 tests/reference/poolingDense.py > tests/reference/poolingDense.json
For each tau on a uniform fine grid and each mu on a uniform fine grid, every study's binomial likelihood is
integrated over its own logit by a plain Riemann sum over +-9 sd of the random effect, or, where the likelihood is
the narrower of the two, over +-9 sd of the likelihood: no adaptive centring, no Gauss rule, no asinh scale.
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
        z = np.linspace(-9, 9, 1001)
        log = log_binomial(y, n, mu[:, None] + tau * z[None, :]) - z**2 / 2
        top = log.max(axis=1, keepdims=True)
        return (top + np.log(np.exp(log - top).sum(axis=1, keepdims=True) * (z[1] - z[0])))[:, 0]
    eta = peak + se * np.linspace(-12, 12, 1201)
    like = log_binomial(y, n, eta)
    like = np.exp(like - like.max())
    log = -((eta[None, :] - mu[:, None]) ** 2) / (2 * tau**2)
    top = log.max(axis=1, keepdims=True)
    total = (np.exp(log - top) * like[None, :]).sum(axis=1, keepdims=True) * (eta[1] - eta[0])
    return (top + np.log(total / tau))[:, 0] + log_binomial(y, n, peak)


def expit(x):
    return 1 / (1 + np.exp(-x))


def summary(x, density, transform):
    """Mean, median, 95 % interval of a density on a uniform grid; cumulative sums by the trapezoid rule."""
    cumulative = np.concatenate([[0], np.cumsum((density[1:] + density[:-1]) / 2)])
    cumulative /= cumulative[-1]
    weights = density.copy()
    weights[0] /= 2
    weights[-1] /= 2
    quantile = [float(transform(np.interp(q, cumulative, x))) for q in (0.025, 0.5, 0.975)]
    mean = float((weights * transform(x)).sum() / weights.sum())
    return {"mean": mean, "median": quantile[1], "interval": [quantile[0], quantile[2]]}


def pool(studies, mean, sd, mu_range, tau_range):
    mu = np.linspace(*mu_range, 1201)
    # tau from just above 0: the first half cell is left to the trapezoid's end, 1/2000 of the range.
    tau = np.linspace(tau_range[0] + (tau_range[1] - tau_range[0]) / 2400, tau_range[1], 600)
    log = np.empty((tau.size, mu.size))
    for j, t in enumerate(tau):
        log[j] = -((mu - mean) ** 2) / (2 * sd**2) - t**2 / 2
        for y, n in studies:
            log[j] += marginal(y, n, mu, t)
    joint = np.exp(log - log.max())
    edges = (joint[:, 0].max(), joint[:, -1].max(), joint[-1].max())
    assert max(edges) < 1e-7, f"range too narrow: {edges}"
    x = np.linspace(mu_range[0] - 3, mu_range[1] + 3, 2001)
    predictive = np.zeros_like(x)
    step = mu[1] - mu[0]
    for j, t in enumerate(tau):
        if t < 3 * step:  # the normal is narrower than the grid: interpolate instead of summing spikes
            predictive += np.interp(x, mu, joint[j], left=0, right=0)
            continue
        offsets = np.linspace(-8, 8, 161) * t
        kernel = np.exp(-((offsets / t) ** 2) / 2)
        kernel /= kernel.sum()
        for o, k in zip(offsets, kernel):
            predictive += k * np.interp(x - o, mu, joint[j], left=0, right=0)
    return {
        "pooled": summary(mu, joint.sum(axis=0), expit),
        "predictive": summary(x, predictive, expit),
        "tau": summary(tau, joint.sum(axis=1), lambda v: v),
    }


CASES = [
    ("five, prior of a question", [(3, 40), (10, 52), (0, 9), (25, 200), (7, 33)], (-1.5, 1.5), (-7, 3.5), (0, 5.5)),
    ("three large and alike", [(5210, 10000), (41800, 80000), (2603, 5000)], (0, 2.5), (-7, 7), (0, 5)),
    ("none and all", [(0, 30), (200, 200), (0, 12), (50, 50)], (0, 2.5), (-12, 12), (0, 8.5)),
    ("eight tiny", [(1, 1), (2, 3), (0, 1), (3, 4), (1, 2), (2, 2), (0, 2), (4, 4)], (0, 2.5), (-9, 10), (0, 6)),
    ("one rare in half a million", [(11, 500000), (3, 90000), (40, 1000000)], (0, 2.5), (-17, -3), (0, 5.5)),
]

out = {"note": "numpy %s, brute force, made by poolingDense.py" % np.__version__, "cases": []}
for name, studies, (mean, sd), mu_range, tau_range in CASES:
    expected = pool(studies, mean, sd, mu_range, tau_range)
    out["cases"].append({"name": name, "prior": {"mean": mean, "sd": sd},
                         "studies": [{"events": y, "total": n} for y, n in studies], "expected": expected})
    print(name, file=sys.stderr)
print(json.dumps(out, indent=1))
