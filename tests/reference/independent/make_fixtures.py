"""Makes the fixtures of this folder: python3 make_fixtures.py [NAME ...]

Each NAME.json (or NAME.json.gz) holds a simulated dataset, its seal, circuits to predict and the estimate of the
independent reading; those with `truth` also the exact probabilities of the circuits to predict on the simulated device.
"""
import gzip
import hashlib
import json
import os
import sys

os.environ.setdefault('OPENBLAS_NUM_THREADS', '2')
import numpy as np  # noqa: E402
import scipy  # noqa: E402

from m1_independent import estimate  # noqa: E402
from m1_simulate import Device  # noqa: E402

HERE = os.path.dirname(os.path.abspath(__file__))
HALF = np.pi / 2


def gate(label, targets, name, *params):
    return {'label': label, 'targets': targets, 'ideal': {'gate': name, 'params': list(params)} if params else {'gate': name}}


def shipped(class_id, rename=lambda s: s):
    g = json.load(open(os.path.join(HERE, f'../../../schema/gate-class/{class_id}.json')))
    return g, [{**x, 'label': rename(x['label'])} for x in g['gates']]


def odd_unitary():
    """A turn by 1.1 rad about (2, -1, 2)/3 with a global phase."""
    x, y, z = (np.array(m) for m in ([[0, 1], [1, 0]], [[0, -1j], [1j, 0]], [[1, 0], [0, -1]]))
    u = np.exp(0.7j) * (np.cos(0.55) * np.eye(2) - 1j * np.sin(0.55) * (2 * x - y + 2 * z) / 3)
    return [[[float(c.real), float(c.imag)] for c in row] for row in u]


def build(name, seed, class_id, gates, register, patches, shots, noise, B, sealed=0.2, gate_class=None, asked=None, large=False):
    """patches: (qubits, circuits, lengths, labels, prefix). asked: lengths of whole-register circuits to predict, with truth."""
    rng = np.random.default_rng(seed)
    dataset = {'format': 'evenbeam.dataset', 'formatVersion': '1.0.0', 'title': f'Fixture {name}', 'gateClass': class_id,
               'device': {'provider': 'Reference simulation', 'name': 'numpy', 'modality': 'simulated'},
               'register': register, 'gates': gates, 'patches': [],
               'acquisition': {'startedAt': '2026-01-01T00:00:00Z', 'endedAt': '2026-01-01T01:00:00Z', 'software': 'numpy'},
               'contributors': [{'name': 'Reference'}], 'licence': 'CC0-1.0'}
    device = Device(dataset, rng, **noise)
    hidden = []
    for qubits, count, lengths, labels, prefix in patches:
        circuits = [{'id': f'{prefix}{i:04d}', 'gates': [labels[k] for k in rng.integers(len(labels), size=rng.choice(lengths))]} for i in range(count)]
        patch = {'qubits': qubits, 'circuits': circuits}
        device.run(patch, shots)
        dataset['patches'].append(patch)
        share = count if len(qubits) > 2 else int(round(sealed * count))
        hidden += [circuits[i]['id'] for i in sorted(rng.choice(count, size=share, replace=False))]
    secret = rng.bytes(32)
    seal = {'format': 'evenbeam.seal', 'formatVersion': '1.0.0', 'runSheet': 'RS-000001', 'secret': secret.hex(),
            'sealSha256': hashlib.sha256(secret).hexdigest(), 'sealed': hidden} if hidden else None
    joint, circuits = len(patches) == 1, []
    for i, length in enumerate(asked or [0, 1, 2, 4, 6, 8, 10, 12, 16, 16, 24, 32]):
        some = lambda: [int(q) for q in rng.permutation(len(register))[:rng.integers(1, len(register) + 1)]]
        qubits = patches[0][0] if joint else list(range(len(register))) if asked else some()
        known = [g['label'] for g in gates if all(t in qubits for t in g['targets'])]
        circuits.append({'id': f't{i}', 'qubits': qubits, 'gates': [known[k] for k in rng.integers(len(known), size=length)]})
    predict = {'format': 'evenbeam.circuits', 'formatVersion': '1.0.0', 'circuits': circuits}
    expected = estimate(dataset, gate_class, seal, predict, B=B, seed=seed)
    for p in expected['patches']:
        if p['columns'] > 100:
            p['spectrum'] = [p['spectrum'][0], p['spectrum'][p['rank'] - 1]] if joint else []
            p['gateMaps'] = [{k: v for k, v in m.items() if k != 'errorMap'} for m in p['gateMaps']]
    header = {'script': f'make_fixtures.py {name}', 'python': sys.version.split()[0], 'numpy': np.__version__, 'scipy': scipy.__version__, 'seed': seed}
    fixture = {'header': header, 'dataset': dataset, 'seal': seal, 'circuits': predict, 'expected': expected}
    if asked:
        fixture['truth'] = [device.on(c['qubits'])(c['gates']).tolist() for c in circuits]
    text = (json.dumps(fixture) + '\n').encode()
    with open(os.path.join(HERE, f'{name}.json' + ('.gz' if large else '')), 'wb') as f:
        f.write(gzip.compress(text, 9, mtime=0) if large else text)
    lost = sorted({x['key'] for x in expected['figures'] if x['value'] is None})
    print(name, [(p['rank'], p['columns'], f"{p['conditionRatio']:.2g}", p['settled'], f"{p['misfit']['sigmas']:.1f}") for p in expected['patches']],
          'null:', lost, 'sealed', expected['sealedCheck'] and expected['sealedCheck']['passed'], flush=True)


ONE = [2, 4, 8, 16]
PAIRS = [4, 8, 12, 16]
MILD = dict(coherent=0.02, stochastic=0.002)
JOBS = {}


def job(f):
    JOBS[f.__name__.replace('_', '-')] = f


@job
def quarter_sealed():
    cls, gates = shipped('quarter-turn-1q/1', lambda s: {'id': 'wait', 'rx': 'about x', 'ry': 'about y'}[s])
    build('quarter-sealed', 101, cls['id'], gates[::-1], ['q7'], [([0], 300, ONE, [g['label'] for g in gates], 'c')], [1000], MILD, 4000, gate_class=cls)


@job
def clifford_unequal_shots():
    cls, gates = shipped('clifford-t-1q/1')
    build('clifford-unequal-shots', 102, cls['id'], gates, ['q0'], [([0], 320, ONE, ['id', 'h', 't'], 'c')], [500, 2000, 8000], MILD, 4000, gate_class=cls)


@job
def odd_gates():
    gates = [gate('u', [0], 'ry', 0.9), {'label': 'v', 'targets': [0], 'ideal': {'unitary': odd_unitary()}}, gate('w', [0], 'sx'), gate('m', [0], 'rz', -1.3)]
    build('odd-gates', 103, 'custom', gates, ['x'], [([0], 400, [1, 3, 5, 9, 14], ['u', 'v', 'w', 'm'], 'c')], [400, 1000], MILD, 4000)


@job
def half_turns():
    cls, gates = shipped('half-turn-1q/1')
    build('half-turns', 104, cls['id'], gates, ['q0'], [([0], 250, ONE, ['x', 'y', 'z'], 'c')], [1000], dict(coherent=0.002, stochastic=0.002), 4000, gate_class=cls)


def strong(name, seed, coherent):
    gates = [gate('i', [0], 'id'), gate('a', [0], 'rx', HALF), gate('b', [0], 'ry', HALF)]
    build(name, seed, 'custom', gates, ['q0'], [([0], 250, ONE, ['i', 'a', 'b'], 'c')], [1000], dict(coherent=coherent, stochastic=0.01), 1000)


@job
def unsettled():
    """Errors so strong that the passes have not come to rest."""
    strong('unsettled', 105, 0.35)


@job
def stopped():
    """Errors so strong that the passes run away and the single pass stands."""
    strong('stopped', 110, 0.7)


@job
def too_weak():
    """Two turns that hardly differ from standing still: complete on paper, far too weak to read."""
    gates = [gate('a', [0], 'rx', 0.2), gate('b', [0], 'rz', 0.16)]
    build('too-weak', 106, 'custom', gates, ['q0'], [([0], 250, ONE, ['a', 'b'], 'c')], [1000], MILD, 500)


@job
def pair_reversed():
    cls, gates = shipped('quarter-turn-cz-2q/1')
    build('pair-reversed', 107, cls['id'], gates, ['q0', 'q1'], [([1, 0], 1500, PAIRS, [g['label'] for g in gates], 'c')], [1000], MILD, 400, gate_class=cls)


def chained(name, seed, size, pairs, B):
    cls, gates = shipped(f'chained-cz-{size}q/1')
    of = lambda qs, ids: [g['label'] for g in gates if all(t in qs for t in g['targets']) and (ids or not g['label'].startswith('id'))]
    patches = [([q], 250, ONE, of([q], True), f'q{q}-') for q in range(size)]
    patches += [(p, 750, PAIRS, of(p, False), f'p{p[0]}{p[1]}-') for p in pairs]
    if size > 2:
        patches.append((list(range(size)), 40, PAIRS, of(range(size), True), 'w-'))
    build(name, seed, cls['id'], gates, [f'q{i}' for i in range(size)], patches, [1000], dict(coherent=0.012, stochastic=0.0015), B, gate_class=cls)


@job
def chained_two():
    chained('chained-two', 108, 2, [[1, 0]], 400)


@job
def chained_three():
    chained('chained-three', 109, 3, [[0, 1], [2, 1]], 400)


@job
def large_pair():
    """1,600 circuits to estimate from and 400 sealed: what a run sheet of a pair asks for."""
    cls, gates = shipped('quarter-turn-cz-2q/1')
    build('large-pair', 20261201, cls['id'], gates, ['q4', 'q7'], [([0, 1], 2000, PAIRS, [g['label'] for g in gates], 'c')], [1000], MILD, 200,
          gate_class=cls, large=True)


@job
def line_of_three():
    """400 circuits a qubit, 1,000 a pair, 1,500 shots; local gates lose 0.1 %, cz 0.6 %, half of it coherent."""
    cls, gates = shipped('chained-cz-3q/1')
    of = lambda qs, ids: [g['label'] for g in gates if all(t in qs for t in g['targets']) and (ids or not g['label'].startswith('id'))]
    patches = [([q], 400, ONE, of([q], True), f'q{q}-') for q in range(3)]
    patches += [([a, a + 1], 1000, PAIRS, of([a, a + 1], False), f'p{a}-') for a in range(2)]
    patches.append(([0, 1, 2], 40, PAIRS, of(range(3), True), 'w-'))
    # Damping of half the strength adds a quarter to what the flips of a local gate lose.
    noise = dict(coherent=[0.0005 ** 0.5, 0.003 ** 0.5], stochastic=[0.0004, 0.003], readout=(0.004, 0.008), preparation=0.002)
    build('line-of-three', 20261202, cls['id'], gates, ['q1', 'q2', 'q3'], patches, [1500], noise, 200, sealed=0, gate_class=cls,
          asked=[length for length in (6, 9, 12, 15, 18, 21, 24) for _ in range(20)], large=True)


for name in sys.argv[1:] or JOBS:
    JOBS[name]()
