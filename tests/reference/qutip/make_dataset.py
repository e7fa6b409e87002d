"""A whole noisy dataset simulated by QuTiP, with its truth and its estimate by the independent reading of method M1.

python3 make_dataset.py > dataset.json      (needs qutip, numpy, scipy)
"""
import json
import os
import sys

os.environ.setdefault('OPENBLAS_NUM_THREADS', '2')
HERE = os.path.dirname(os.path.abspath(__file__))
sys.path.insert(0, os.path.join(HERE, '..', 'independent'))

import numpy as np  # noqa: E402
import scipy  # noqa: E402
from qutip import average_gate_fidelity  # noqa: E402

from m1_figures import retained_signal, total_variation  # noqa: E402
from m1_independent import estimate  # noqa: E402
from noise import Register, header, ideal_super  # noqa: E402

SEED = 4711
rng = np.random.default_rng(SEED)
gate_class = json.load(open(os.path.join(HERE, '../../../schema/gate-class/quarter-turn-1q/1.json')))
gates = gate_class['gates']
qubit = {'angleScale': {'x': 0.008, 'y': -0.006, 'z': 0}, 'tilt': 0.006, 'detuning': 0.004, 'flips': {'x': 2e-4, 'y': 1e-4, 'z': 8e-4},
         'damping': 0.0015, 'preparation': 0.004, 'readout': {'zeroAsOne': 0.008, 'oneAsZero': 0.019}, 'drift': 0}
noisy = Register({'qubits': [qubit], 'pairs': []}, gates, [0])
clean = dict(qubit, angleScale={'x': 0, 'y': 0, 'z': 0}, tilt=0, detuning=0, flips={'x': 0, 'y': 0, 'z': 0}, damping=0, preparation=0, readout={'zeroAsOne': 0, 'oneAsZero': 0})
ideal = Register({'qubits': [clean], 'pairs': []}, gates, [0])
labels = [g['label'] for g in gates]
draw = lambda length: [labels[i] for i in rng.integers(len(labels), size=length)]

circuits = []
for i in range(320):
    sequence = draw(int(rng.choice(gate_class['lengths'])))
    ones = int(rng.binomial(1000, noisy.probabilities(sequence)[1]))
    circuits.append({'id': f'c{i:04d}', 'gates': sequence, 'shots': 1000, 'counts': {'0': 1000 - ones, '1': ones}})
seal = {'sealed': [circuits[i]['id'] for i in sorted(rng.choice(320, size=64, replace=False))]}
dataset = {'format': 'evenbeam.dataset', 'formatVersion': '1.0.0', 'title': 'Simulated with QuTiP', 'gateClass': gate_class['id'],
           'device': {'provider': 'Reference simulation', 'name': 'QuTiP', 'modality': 'simulated'}, 'register': ['q0'], 'gates': gates,
           'patches': [{'qubits': [0], 'circuits': circuits}],
           'acquisition': {'startedAt': '2026-01-01T00:00:00Z', 'endedAt': '2026-01-01T01:00:00Z', 'software': 'QuTiP'},
           'contributors': [{'name': 'Reference'}], 'licence': 'CC0-1.0'}
predict = {'format': 'evenbeam.circuits', 'formatVersion': '1.0.0',
           'circuits': [{'id': f't{i}', 'qubits': [0], 'gates': draw(n)} for i, n in enumerate([0, 1, 3, 5, 9, 12, 16, 20, 24, 32])]}
truth = {'probabilities': {c['id']: noisy.probabilities(c['gates']) for c in predict['circuits']},
         'averageGateFidelity': {k: float(average_gate_fidelity(noisy.superoperator(k) * ideal_super(noisy.ideal_unitary(k).dag()))) for k in labels},
         'retainedSignal': {}, 'outputError': {}}
for level in gate_class['bench']:
    p = np.array([ideal.probabilities(c['gates']) for c in level['circuits']])
    q = np.array([noisy.probabilities(c['gates']) for c in level['circuits']])
    truth['retainedSignal'][str(level['depth'])] = float(retained_signal(p, q))
    truth['outputError'][str(level['depth'])] = float(total_variation(p, q))
out = {'header': {**header('make_dataset.py', SEED), 'scipy': scipy.__version__}, 'model': {'qubits': [qubit], 'pairs': []},
       'dataset': dataset, 'seal': seal, 'circuits': predict, 'truth': truth,
       'estimate': estimate(dataset, gate_class, seal, predict, B=4000, seed=SEED)}
print(json.dumps(out))
