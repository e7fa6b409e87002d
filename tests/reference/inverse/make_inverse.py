"""Pseudo-inverses of pair designs by numpy's SVD, as digests: python3 make_inverse.py  (writes inverse.json.gz, some minutes)

Gates a, b: rx and ry of the first qubit, c, d: of the second, e: cz. A circuit is a word of these letters. Of C+ are kept its
products with four vectors x_k, x_k[i] = ((7919 (2k + 3) i + 104729 k) mod 10007) / 10007 - 1/2: the norm and every 20th element.
The design is built by the independent implementation in ../independent.
"""
import gzip
import json
import os
import sys

os.environ.setdefault('OPENBLAS_NUM_THREADS', '2')
HERE = os.path.dirname(os.path.abspath(__file__))
sys.path.insert(0, os.path.join(HERE, '..', 'independent'))

import numpy as np  # noqa: E402

from m1_design import Layout, design  # noqa: E402
from m1_quantum import ideal_effects, ideal_preparation, patch_gates  # noqa: E402

SEED = 20261205
EVERY = 20
rng = np.random.default_rng(SEED)
turn = lambda label, target, name: {'label': label, 'targets': [target], 'ideal': {'gate': name, 'params': [np.pi / 2]}}
gates = [turn('a', 0, 'rx'), turn('b', 0, 'ry'), turn('c', 1, 'rx'), turn('d', 1, 'ry'), {'label': 'e', 'targets': [0, 1], 'ideal': {'gate': 'cz'}}]
ideal = patch_gates({'gates': gates}, [0, 1])
model = (np.array(list(ideal.values())), ideal_preparation(2), ideal_effects(2))


def case(chained, count, lengths):
    layout = Layout(list(ideal), 16, 4, [4] if chained else list(range(5)), not chained)
    words = [rng.integers(5, size=rng.choice(lengths)).tolist() for _ in range(count)]
    C = design(layout, model, words)
    U, s, Vt = np.linalg.svd(C, full_matrices=False)
    rank = int((s > 1e-9 * s[0]).sum())
    i = np.arange(len(C), dtype=np.int64)
    images = []
    for k in range(4):
        x = ((7919 * (2 * k + 3) * i + 104729 * k) % 10007) / 10007 - 0.5
        y = Vt[:rank].T @ ((U[:, :rank].T @ x) / s[:rank])
        images.append({'norm': float(np.linalg.norm(y)), 'every': [float(v) for v in y[::EVERY]]})
    print('chained' if chained else 'joint', C.shape, rank, s[rank - 1] / s[0], flush=True)
    return {'chained': chained, 'rows': len(C), 'columns': layout.columns, 'rank': rank, 'ratio': float(s[rank - 1] / s[0]), 'images': images, 'circuits': [''.join('abcde'[g] for g in w) for w in words]}


cases = [case(False, 1200, [4, 8, 12, 16]), case(True, 600, [4, 8, 12, 16]), case(True, 2667, [4, 8, 12, 16]), case(False, 2667, [4, 8, 12, 16])]
out = {'header': {'script': 'make_inverse.py', 'python': sys.version.split()[0], 'numpy': np.__version__, 'seed': SEED}, 'every': EVERY, 'cases': cases}
with open(os.path.join(HERE, 'inverse.json.gz'), 'wb') as f:
    f.write(gzip.compress((json.dumps(out) + '\n').encode(), 9, mtime=0))
