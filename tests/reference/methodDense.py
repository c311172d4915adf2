"""The model with a method effect by brute force, written apart from the product: makes methodDense.json.

    y_s ~ Binomial(n_s, p_s), logit p_s ~ Normal(mu + delta_g(s), tau^2), delta_g ~ Normal(0, 0.5^2) for every group but
    CBCT, mu ~ Normal(mean, sd^2), tau ~ |Normal(0, 1)|

Everything lies on one fixed grid of the logit (step 0.02) and one of tau (midpoints, step 0.05): random effects and
offsets are sums over that grid. A sample's leave-one-out probability is the ratio of two such integrals.
Run: python3 methodDense.py > methodDense.json (numpy only; a minute).
"""

import json
import sys

import numpy as np

STEP = 0.02
X = np.arange(-13, 13 + STEP / 2, STEP)
TAU_STEP = 0.05
TAU = np.arange(TAU_STEP / 2, 5.5, TAU_STEP)
SD = 0.5
SHIFTS = np.arange(-150, 151)  # offsets of -3 to 3
GROUP = {
    "micro-ct": "laboratory", "clearing": "laboratory", "sectioning": "laboratory",
    "clinical": "clinical", "microscope": "clinical", "radiograph": "radiograph",
    "cbct": None, "mixed": None,
}


def kernel(sd):
    k = np.exp(-0.5 * ((X[:, None] - X[None, :]) / sd) ** 2)
    full = np.exp(-0.5 * (np.arange(-4000, 4001) * STEP / sd) ** 2).sum()
    return k / full


OFFSET = kernel(SD)
KERNELS = [kernel(t) for t in TAU]


def binomial(y, n):
    log = y * X - n * np.logaddexp(0, X)
    p = y / n
    best = (y * np.log(p) if y else 0) + ((n - y) * np.log(1 - p) if y < n else 0)
    return np.exp(log - best)


def quantile(x, mass, p):
    """x: midpoints of equal cells."""
    step = x[1] - x[0]
    cum = np.concatenate([[0], np.cumsum(mass)]) / mass.sum()
    return float(np.interp(p, cum, np.concatenate([[x[0] - step / 2], x + step / 2])))


def summary(x, mass, shown):
    return {
        "mean": float((mass * shown(x)).sum() / mass.sum()),
        "median": float(shown(quantile(x, mass, 0.5))),
        "interval": [float(shown(quantile(x, mass, q))) for q in (0.025, 0.975)],
    }


def posterior(studies, marginals, mean, sd):
    """Joint mass over (tau, mu), and each group's likelihood at m by tau."""
    prior = np.exp(-0.5 * ((X - mean) / sd) ** 2)
    joint = np.zeros((len(TAU), len(X)))
    groups = sorted({GROUP[m] for _, _, m in studies if GROUP[m]})
    own = {g: np.ones((len(TAU), len(X))) for g in groups}
    for j, t in enumerate(TAU):
        mass = prior * np.exp(-0.5 * t * t)
        for s, (_, _, method) in enumerate(studies):
            g = GROUP[method]
            if g is None:
                mass = mass * marginals[s][j]
            else:
                own[g][j] *= marginals[s][j]
        for g in groups:
            mass = mass * (OFFSET @ own[g][j])
        joint[j] = mass
    return joint, own


def offset(joint, own):
    """Mass over the offset: mu = x[i], m = x[i + shift]."""
    d = SHIFTS * STEP
    mass = np.zeros(len(d))
    for j in range(len(TAU)):
        rest = joint[j] / np.maximum(OFFSET @ own[j], 1e-300)
        for k, shift in enumerate(SHIFTS):
            low, high = max(0, -shift), min(len(X), len(X) - shift)
            mass[k] += np.exp(-0.5 * (d[k] / SD) ** 2) * (rest[low:high] * own[j][low + shift : high + shift]).sum()
    return summary(d, mass, lambda v: v)


def log_choose(y, n):
    return sum(np.log((n - i) / (i + 1)) for i in range(y))


def expit(x):
    return 1 / (1 + np.exp(-x))


CASES = [
    ("methods alike", [(40, 60, "cbct"), (75, 120, "cbct"), (33, 50, "micro-ct"), (61, 100, "clearing"), (20, 34, "clinical")], (0, 2.5)),
    ("the laboratory finds more, radiographs less", [(30, 80, "cbct"), (55, 140, "cbct"), (40, 110, "mixed"), (45, 60, "micro-ct"), (70, 95, "clearing"), (12, 90, "radiograph"), (30, 44, "sectioning")], (0, 2.5)),
    ("rare", [(0, 40, "micro-ct"), (1, 60, "clearing"), (2, 150, "cbct"), (0, 25, "clinical"), (6, 300, "cbct")], (-3, 1.5)),
    ("no CBCT at all", [(12, 20, "micro-ct"), (9, 30, "microscope"), (14, 22, "clearing"), (7, 25, "clinical")], (0.5, 1.5)),
    ("three", [(5, 9, "clearing"), (31, 200, "cbct"), (3, 17, "microscope")], (-0.5, 1.8)),
]

out = {"note": "numpy %s, brute force, made by methodDense.py" % np.__version__, "cases": []}
for name, studies, (mean, sd) in CASES:
    marginals = [[k @ binomial(y, n) for k in KERNELS] for y, n, _ in studies]
    joint, own = posterior(studies, marginals, mean, sd)
    predictive = sum(joint[j] @ k for j, k in enumerate(KERNELS))
    left = []
    for s, (y, n, _) in enumerate(studies):
        others = [v for i, v in enumerate(studies) if i != s]
        without, _ = posterior(others, [v for i, v in enumerate(marginals) if i != s], mean, sd)
        p = y / n
        best = (y * np.log(p) if y else 0) + ((n - y) * np.log(1 - p) if y < n else 0)
        left.append(float(np.log(joint.sum() / without.sum()) + best + log_choose(y, n)))
    out["cases"].append({
        "name": name,
        "prior": {"mean": mean, "sd": sd},
        "studies": [{"events": y, "total": n, "method": m} for y, n, m in studies],
        "expected": {
            "pooled": summary(X, joint.sum(axis=0), expit),
            "predictive": summary(X, predictive, expit),
            "tau": summary(TAU, joint.sum(axis=1), lambda v: v),
            "offsets": {g: offset(joint, own[g]) for g in own},
            "logProbability": left,
        },
    })
    print(name, file=sys.stderr)
print(json.dumps(out, indent=1))
