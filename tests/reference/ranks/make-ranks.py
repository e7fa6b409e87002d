"""Rank ranges by simultaneous one-sided statements over all ordered pairs, step-down, in plain numpy loops.

Written from the definition only. Six boards of normal replicates (seed 20261201) with the ranges they get.
Run: python3 make-ranks.py > ranks.json
"""
import json
import math
import sys

import numpy as np

rng = np.random.default_rng(20261201)


def ranges(estimates, replicates, better, level):
    sign = 1.0 if better == "higher" else -1.0
    m, count = replicates.shape
    var = replicates.var(axis=1, ddof=1)
    open_pairs = {(i, j) for i in range(m) for j in range(m) if i != j}
    made = set()
    se = lambda i, j: math.sqrt(var[i] + var[j])
    while open_pairs:
        stats = np.array([sign * ((replicates[i] - estimates[i]) - (replicates[j] - estimates[j])) / se(i, j) for i, j in sorted(open_pairs)])
        greatest = np.sort(stats.max(axis=0))
        critical = max(0.0, greatest[min(math.ceil((count + 1) * level), count) - 1])
        new = {(i, j) for i, j in open_pairs if sign * (estimates[i] - estimates[j]) / se(i, j) > critical}
        if not new:
            break
        made |= new
        open_pairs -= new
    return [[1 + sum((j, i) in made for j in range(m)), m - sum((i, j) in made for j in range(m))] for i in range(m)]


boards = []
for truth, sd, better, level in [
    ([0.9, 0.8, 0.7, 0.6, 0.5], [0.02] * 5, "higher", 0.95),
    ([0.9, 0.85, 0.8, 0.75, 0.7], [0.02, 0.01, 0.03, 0.005, 0.02], "higher", 0.95),
    ([0.01, 0.012, 0.02, 0.02, 0.05, 0.09], [0.004] * 6, "lower", 0.95),
    ([1.0, 1.0, 1.0, 1.0], [0.1, 0.2, 0.3, 0.4], "higher", 0.8),
    ([0.0, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6], [0.05] * 7, "lower", 0.5),
    ([3.0, 1.0], [0.4, 0.4], "lower", 0.95),
]:
    sd = np.array(sd)
    estimates = np.round(np.array(truth) + sd * rng.standard_normal(len(truth)), 6)
    replicates = np.round(estimates[:, None] + sd[:, None] * rng.standard_normal((len(truth), 60)), 6)
    boards.append({"better": better, "level": level, "estimates": estimates.tolist(), "replicates": replicates.tolist(),
                   "ranges": ranges(estimates, replicates, better, level)})
json.dump({"made": f"numpy {np.__version__}, seed 20261201", "boards": boards}, sys.stdout)
