"""Noisy probabilities and average gate fidelities by QuTiP: python3 make_noisy.py > noisy.json"""
import json
import math

import numpy as np
from qutip import average_gate_fidelity

from noise import Register, header, ideal_super

SEED = 20260504
rng = np.random.default_rng(SEED)
HALF = math.pi / 2


def qubit(**change):
    q = {'angleScale': {'x': 0, 'y': 0, 'z': 0}, 'tilt': 0, 'detuning': 0, 'flips': {'x': 0, 'y': 0, 'z': 0}, 'damping': 0,
         'preparation': 0, 'readout': {'zeroAsOne': 0, 'oneAsZero': 0}, 'drift': 0}
    return {**q, **change}


def pair(a, b, **change):
    return {'qubits': [a, b], 'angle': 0, 'phases': [0, 0], 'depolarising': 0, 'duration': 1, 'stray': 0, **change}


def gate(label, targets, name, *params):
    return {'label': label, 'targets': targets, 'ideal': {'gate': name, 'params': list(params)} if params else {'gate': name}}


def draw(labels, n, longest):
    return [[labels[i] for i in rng.integers(len(labels), size=rng.integers(1, longest + 1))] for _ in range(n)]


QUARTER = [gate('id', [0], 'id'), gate('rx', [0], 'rx', HALF), gate('ry', [0], 'ry', HALF)]
CLIFFORD = [gate('id', [0], 'id'), gate('h', [0], 'h'), gate('t', [0], 't')]
HALVES = [gate('x', [0], 'x'), gate('y', [0], 'y'), gate('z', [0], 'z')]
PAIR = [gate(f'r{a}{q}', [q], f'r{a}', HALF) for q in (0, 1) for a in 'xy'] + [gate('cz', [0, 1], 'cz'), gate('cx', [1, 0], 'cx')]
THREE = [gate(f'r{a}{q}', [q], f'r{a}', HALF) for q in (0, 1, 2) for a in 'xy'] + [gate('cz01', [0, 1], 'cz'), gate('cz12', [1, 2], 'cz')]
FULL = dict(angleScale={'x': 0.013, 'y': -0.008, 'z': 0.005}, tilt=0.02, detuning=-0.011, flips={'x': 0.002, 'y': 0.001, 'z': 0.004}, damping=0.006,
            preparation=0.01, readout={'zeroAsOne': 0.012, 'oneAsZero': 0.03})
OTHER = dict(FULL, angleScale={'x': -0.02, 'y': 0.01, 'z': 0.0}, tilt=-0.01, damping=0.003, readout={'zeroAsOne': 0.005, 'oneAsZero': 0.021})
cases = []


def case(name, gates, qubits, pairs=(), on=None, n=6, longest=9, moment=0.0, fidelities=True):
    model = {'qubits': qubits, 'pairs': list(pairs)}
    on = on if on is not None else list(range(len(qubits)))
    register = Register(model, gates, on, moment)
    labels = [g['label'] for g in gates if all(t in on for t in g['targets'])]
    circuits = [[]] + draw(labels, n, longest)
    out = {'name': name, 'model': model, 'gates': gates, 'qubits': on, 'moment': moment,
           'circuits': [{'gates': c, 'probabilities': register.probabilities(c)} for c in circuits]}
    if fidelities and 'leakage' not in qubits[0] and len(on) < 3:
        out['averageGateFidelity'] = {k: float(average_gate_fidelity(register.superoperator(k) * ideal_super(register.ideal_unitary(k).dag()))) for k in labels}
    cases.append(out)


case('amplitude damping', QUARTER, [qubit(damping=0.1)])
case('dephasing', QUARTER, [qubit(flips={'x': 0, 'y': 0, 'z': 0.05})])
case('depolarising', QUARTER, [qubit(flips={'x': 0.02, 'y': 0.02, 'z': 0.02})])
case('over-rotation', QUARTER, [qubit(angleScale={'x': 0.1 / HALF, 'y': -0.04, 'z': 0})])
case('tilt and detuning', CLIFFORD, [qubit(tilt=0.05, detuning=0.03)])
case('readout and preparation', QUARTER, [qubit(preparation=0.03, readout={'zeroAsOne': 0.02, 'oneAsZero': 0.07})])
case('all, quarter turns', QUARTER, [qubit(**FULL)])
case('all, Clifford and T', CLIFFORD, [qubit(**FULL)])
case('all, half turns', HALVES, [qubit(**FULL)])
case('drift at the end of the run', QUARTER, [qubit(**dict(FULL, drift=0.03))], moment=1.0)
case('leakage', QUARTER, [qubit(**FULL, leakage={'out': 0.02, 'back': 0.005})], longest=16)
case('ZZ over-rotation', PAIR, [qubit(), qubit()], [pair(0, 1, angle=0.05)])
case('pair depolarising', PAIR, [qubit(), qubit()], [pair(0, 1, depolarising=0.03)])
case('long entangling gate', PAIR, [qubit(damping=0.02), qubit(flips={'x': 0.01, 'y': 0.0, 'z': 0.03})], [pair(0, 1, duration=2.5)])
case('all, pair', PAIR, [qubit(**FULL), qubit(**OTHER)], [pair(0, 1, angle=0.04, phases=[0.02, -0.03], depolarising=0.01, duration=1.5, stray=0.01)])
case('all, pair read in the other order', PAIR, [qubit(**FULL), qubit(**OTHER)], [pair(0, 1, angle=0.04, phases=[0.02, -0.03], depolarising=0.01, duration=1.5, stray=0.01)], on=[1, 0])
line = [qubit(**FULL), qubit(**OTHER), qubit(**dict(FULL, tilt=0.005))]
links = [pair(0, 1, angle=0.04, phases=[0.02, -0.03], depolarising=0.01, duration=1.5, stray=0.01), pair(2, 1, angle=-0.03, phases=[0.01, 0.005], depolarising=0.02, duration=2, stray=0.02)]
case('three in a line', THREE, line, links, n=5, longest=12, fidelities=False)
case('two of three, the neighbour at rest', THREE, line, links, on=[2, 1], n=5, fidelities=False)
print(json.dumps({'header': header('make_noisy.py', SEED), 'cases': cases}, indent=1))
