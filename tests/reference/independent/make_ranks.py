"""Ranks of pair designs by a full SVD: python3 make_ranks.py  (writes ranks.json.gz, about a minute)

Gates a, b: rx and ry of the first qubit, c, d: of the second, e: the entangling gate. A circuit is a word of these letters.
"""
import gzip
import json
import os
import sys

os.environ.setdefault('OPENBLAS_NUM_THREADS', '2')
HERE = os.path.dirname(os.path.abspath(__file__))

import numpy as np  # noqa: E402

from m1_design import Layout, design, gauge_basis, invert  # noqa: E402
from m1_quantum import ideal_effects, ideal_preparation, patch_gates  # noqa: E402

SEED = 20261204
rng = np.random.default_rng(SEED)
HALF = np.pi / 2
cases = []


def case(entangling, chained, count, lengths):
    turn = lambda label, target, name: {'label': label, 'targets': [target], 'ideal': {'gate': name, 'params': [HALF]}}
    gates = [turn('a', 0, 'rx'), turn('b', 0, 'ry'), turn('c', 1, 'rx'), turn('d', 1, 'ry'), {'label': 'e', 'targets': [0, 1], 'ideal': {'gate': entangling}}]
    ideal = patch_gates({'gates': gates}, [0, 1])
    labels, maps = list(ideal), list(ideal.values())
    model = (np.array(maps), ideal_preparation(2), ideal_effects(2))
    layout = Layout(labels, 16, 4, [4] if chained else list(range(5)), not chained)
    words = [rng.integers(5, size=rng.choice(lengths)).tolist() for _ in range(count)]
    C = design(layout, model, words)
    found = invert(C)
    gauge = 0 if chained else gauge_basis(layout, model).shape[1]
    if not chained:
        assert np.abs(C @ gauge_basis(layout, model)).max() < 1e-12 * found.spectrum[0]
    cases.append({'entangling': entangling, 'chained': chained, 'lengths': lengths, 'columns': layout.columns, 'gauge': gauge, 'rank': found.rank, 'ratio': found.ratio,
                  'ambiguous': found.ambiguous, 'largest': float(found.spectrum[0]), 'circuits': [''.join('abcde'[g] for g in w) for w in words]})
    print(entangling, 'chained' if chained else 'joint', count, lengths, layout.columns, gauge, found.rank, found.ratio, found.ambiguous, flush=True)


for entangling in ('cz', 'cx'):
    case(entangling, False, 1200, [4, 8, 12, 16])
    case(entangling, True, 600, [4, 8, 12, 16])
case('cz', True, 700, [5])
case('cz', True, 300, [7])
case('cz', True, 560, [7])
case('cx', True, 700, [5])
case('cx', True, 560, [7])
out = {'header': {'script': 'make_ranks.py', 'python': sys.version.split()[0], 'numpy': np.__version__, 'seed': SEED}, 'cases': cases}
with open(os.path.join(HERE, 'ranks.json.gz'), 'wb') as f:
    f.write(gzip.compress((json.dumps(out) + '\n').encode(), 9, mtime=0))
