"""A joint pair and a register of three in a line, noisy, simulated by QuTiP with their truth.

/usr/bin/python3 make_registers.py      (needs qutip, numpy, scipy; writes pair.json.gz and line.json.gz, about two minutes)
"""
import gzip
import json
import os
import sys

os.environ.setdefault('OPENBLAS_NUM_THREADS', '2')
HERE = os.path.dirname(os.path.abspath(__file__))
sys.path.insert(0, os.path.join(HERE, '..', 'independent'))

import numpy as np  # noqa: E402
from qutip import average_gate_fidelity  # noqa: E402

from m1_figures import gate_loss, retained_signal  # noqa: E402
from noise import Register, header, ideal_super  # noqa: E402

SEED = 20261203
rng = np.random.default_rng(SEED)
PAULI = [np.eye(2), np.array([[0, 1], [1, 0]]), np.array([[0, -1j], [1j, 0]]), np.array([[1, 0], [0, -1]])]
CLEAN = {'angleScale': {'x': 0, 'y': 0, 'z': 0}, 'tilt': 0, 'detuning': 0, 'flips': {'x': 0, 'y': 0, 'z': 0}, 'damping': 0,
         'preparation': 0, 'readout': {'zeroAsOne': 0, 'oneAsZero': 0}, 'drift': 0}


def qubit(scale, tilt, detuning, flip, damping, readout):
    return {**CLEAN, 'angleScale': {'x': scale, 'y': -0.7 * scale, 'z': 0}, 'tilt': tilt, 'detuning': detuning,
            'flips': {'x': flip, 'y': flip / 2, 'z': 2 * flip}, 'damping': damping, 'preparation': 0.003,
            'readout': {'zeroAsOne': readout, 'oneAsZero': 2 * readout}}


def pair(a, b, angle, phases, depolarising):
    return {'qubits': [a, b], 'angle': angle, 'phases': phases, 'depolarising': depolarising, 'duration': 1.5, 'stray': 0}


def quiet(model):
    return {'qubits': [CLEAN for _ in model['qubits']],
            'pairs': [{**p, 'angle': 0, 'phases': [0, 0], 'depolarising': 0, 'duration': 1} for p in model['pairs']]}


def pauli_basis(n):
    out = [np.eye(1)]
    for _ in range(n):
        out = [np.kron(a, b) for a in out for b in PAULI]
    return np.array([p.ravel(order='F') for p in out]) / 2 ** (n / 2)


class Fast:
    """The same register by its superoperators, each made once by QuTiP; probabilities by matrix times vector."""

    def __init__(self, model, gates, on):
        self.register, self.on = Register(model, gates, on), on
        self.labels = [g['label'] for g in gates if all(t in on for t in g['targets'])]
        self.maps = {k: self.register.superoperator(k).full() for k in self.labels}
        d = 2 ** len(on)
        units = np.eye(d * d)
        # Readout is linear in the populations: the columns of the confusion matrix, and the state before the first gate.
        start, self.confusion = np.ones(1), np.ones((1, 1))
        for q in on:
            e, r = model['qubits'][q]['preparation'], model['qubits'][q]['readout']
            start = np.kron(start, [1 - e, e])
            one = np.array([r['zeroAsOne'], 1 - r['oneAsZero']])
            self.confusion = np.kron(self.confusion, np.array([1 - one, one]))
        self.start = np.diag(start).ravel(order='F').astype(complex)
        self.diagonal = units.reshape(d, d, -1, order='F')[np.arange(d), np.arange(d)]

    def probabilities(self, circuit):
        v = self.start
        for g in circuit:
            v = self.maps[g] @ v
        return self.confusion @ np.real(self.diagonal @ v)

    def transfer(self, label):
        b = pauli_basis(len(self.on))
        return np.real(b.conj() @ self.maps[label] @ b.T)


def counts(p, shots):
    n = int(np.log2(len(p)))
    k = rng.multinomial(shots, np.clip(p, 0, None) / np.clip(p, 0, None).sum())
    return {format(o, 'b').zfill(n): int(x) for o, x in enumerate(k) if x}


def losses(model, gates):
    """Of each gate on its own targets: the method's gate loss of the true map, and its average fidelity by QuTiP."""
    out = {}
    for g in gates:
        noisy, clean = Fast(model, [g], g['targets']), Fast(quiet(model), [g], g['targets'])
        ideal = clean.transfer(g['label'])
        change = noisy.register.superoperator(g['label']) * ideal_super(noisy.register.ideal_unitary(g['label']).dag())
        out[g['label']] = {'gateLoss': float(gate_loss(noisy.transfer(g['label'])[None], ideal)[0]), 'averageFidelity': float(average_gate_fidelity(change))}
    return out


def build(name, class_id, model, register, patches, asked):
    cls = json.load(open(os.path.join(HERE, f'../../../schema/gate-class/{class_id}.json')))
    gates = cls['gates']
    dataset = {'format': 'evenbeam.dataset', 'formatVersion': '1.0.0', 'title': 'Simulated with QuTiP', 'gateClass': cls['id'],
               'device': {'provider': 'Reference simulation', 'name': 'QuTiP', 'modality': 'simulated'}, 'register': register, 'gates': gates,
               'patches': [], 'acquisition': {'startedAt': '2026-01-01T00:00:00Z', 'endedAt': '2026-01-01T01:00:00Z', 'software': 'QuTiP'},
               'contributors': [{'name': 'Reference'}], 'licence': 'CC0-1.0'}
    for on, count, lengths, ids in patches:
        fast = Fast(model, gates, on)
        labels = [k for k in fast.labels if ids or not k.startswith('id')]
        circuits = []
        for i in range(count):
            sequence = [labels[k] for k in rng.integers(len(labels), size=rng.choice(lengths))]
            circuits.append({'id': f'p{"".join(map(str, on))}-{i:04d}', 'gates': sequence, 'shots': 1000, 'counts': counts(fast.probabilities(sequence), 1000)})
        dataset['patches'].append({'qubits': on, 'circuits': circuits})
    whole = list(range(len(register)))
    device, labels = Register(model, gates, whole), [g['label'] for g in gates]
    predict = [{'id': f't{i}', 'qubits': whole, 'gates': [labels[k] for k in rng.integers(len(labels), size=n)]} for i, n in enumerate(asked)]
    truth = {'gates': losses(model, gates), 'probabilities': {c['id']: [float(x) for x in device.probabilities(c['gates'])] for c in predict}}
    if len(whole) == 2:
        noisy, clean = Fast(model, gates, whole), Fast(quiet(model), gates, whole)
        both = lambda level: [np.array([f.probabilities(c['gates']) for c in level['circuits']]) for f in (clean, noisy)]
        truth['retainedSignal'] = {str(level['depth']): float(retained_signal(*both(level))) for level in cls['bench']}
    out = {'header': header('make_registers.py', SEED), 'model': model, 'dataset': dataset, 'seal': None,
           'circuits': {'format': 'evenbeam.circuits', 'formatVersion': '1.0.0', 'circuits': predict}, 'truth': truth}
    with open(os.path.join(HERE, f'{name}.json.gz'), 'wb') as f:
        f.write(gzip.compress((json.dumps(out) + '\n').encode(), 9, mtime=0))
    print(name, {k: (round(v['gateLoss'], 5), round(1.25 * (1 - v['averageFidelity']), 5)) for k, v in truth['gates'].items()}, flush=True)


first, second, third = (qubit(0.008, 0.006, 0.005, 2e-4, 8e-4, 0.006), qubit(-0.006, 0.008, -0.004, 3e-4, 5e-4, 0.004),
                        qubit(0.01, -0.005, 0.006, 1e-4, 1e-3, 0.008))
PAIRS = [4, 8, 12, 16]
build('pair', 'quarter-turn-cz-2q/1', {'qubits': [first, second], 'pairs': [pair(0, 1, 0.03, [0.015, -0.01], 0.003)]}, ['a', 'b'],
      [([0, 1], 1500, PAIRS, True)], [2, 6, 10, 14, 18, 24] * 4)
build('line', 'chained-cz-3q/1', {'qubits': [first, second, third], 'pairs': [pair(0, 1, 0.03, [0.015, -0.01], 0.003), pair(1, 2, -0.02, [0.01, 0.012], 0.005)]},
      ['a', 'b', 'c'], [([q], 300, [2, 4, 8, 16], True) for q in range(3)] + [([0, 1], 700, PAIRS, False), ([1, 2], 700, PAIRS, False)], [2, 6, 10, 14, 18, 24] * 4)
