"""Estimates of the published conformance vectors by the independent reading: python3 make_expected.py [NAME ...]

Reads schema/conformance/M1 and writes NAME.json here: ranks, values of all figures, predictions, residual sums.
"""
import json
import os
import sys

os.environ.setdefault('OPENBLAS_NUM_THREADS', '2')
HERE = os.path.dirname(os.path.abspath(__file__))
sys.path.insert(0, os.path.join(HERE, '../independent'))
import numpy as np  # noqa: E402
import scipy  # noqa: E402

from m1_independent import estimate  # noqa: E402

ROOT = os.path.join(HERE, '../../../schema/conformance/M1')


def read(path):
    return json.load(open(path))


def made(vector):
    files = vector['files']
    load = lambda kind: read(os.path.join(ROOT, files[kind]['path'])) if files[kind] else None
    dataset = load('dataset')
    where = os.path.join(HERE, f"../../../schema/gate-class/{dataset['gateClass']}.json")
    # Values do not depend on the replicates; a handful keeps the run short.
    out = estimate(dataset, read(where) if os.path.exists(where) else None, load('seal'), load('circuits'), B=8, seed=1)
    kept = ('qubits', 'columns', 'gaugeDimension', 'rank', 'conditionRatio', 'rankAmbiguous', 'complete', 'sound', 'settled')
    check = out['sealedCheck']
    return {
        'header': {'script': f"make_expected.py {vector['name']}", 'python': sys.version.split()[0], 'numpy': np.__version__, 'scipy': scipy.__version__, 'contentId': vector['contentId']},
        'sealed': out['sealed'],
        'patches': [{**{k: p[k] for k in kept}, 'residualSum': p['misfit']['residualSum'],
                     'gateMaps': [{'gate': m['gate'], 'smallestChoiEigenvalue': m['smallestChoiEigenvalue']} for m in p['gateMaps']]} for p in out['patches']],
        'figures': [{k: f[k] for k in ('key', 'depth', 'gate', 'qubits', 'value', 'firstOrder', 'determined', 'extrapolated', 'firstOrderOnly')} for f in out['figures']],
        'sealedCheck': check and {'value': check['value'], 'ideal': check['ideal']},
        'predictions': [{k: p[k] for k in ('id', 'determined', 'firstOrderOnly', 'probabilities')} for p in out['predictions']],
    }


for vector in read(os.path.join(ROOT, 'index.json'))['vectors']:
    if not sys.argv[1:] or vector['name'] in sys.argv[1:]:
        with open(os.path.join(HERE, f"{vector['name']}.json"), 'w') as f:
            f.write(json.dumps(made(vector), indent=1) + '\n')
        print(vector['name'], flush=True)
