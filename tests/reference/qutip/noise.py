"""The demo simulator's noise conventions written afresh with QuTiP.

Routes differ on purpose: unitaries are exponentials of generators, damping and flips are exponentials of Lindblad
generators, pair depolarising is a partial trace. Order within a gate: turned unitary, stray coupling, pair
depolarising, then for each target flips, damping, leakage.
"""
import math
import sys

import numpy as np
import qutip
from qutip import Qobj, lindblad_dissipator, qeye, sigmax, sigmay, sigmaz, tensor, to_kraus, to_super

AXES = {'rx': (1, 0, 0), 'ry': (0, 1, 0), 'rz': (0, 0, 1), 'x': (1, 0, 0), 'y': (0, 1, 0), 'z': (0, 0, 1),
        'h': (math.sqrt(0.5), 0, math.sqrt(0.5)), 't': (0, 0, 1), 's': (0, 0, 1), 'id': None}
ANGLES = {'x': math.pi, 'y': math.pi, 'z': math.pi, 'h': math.pi, 't': math.pi / 4, 's': math.pi / 2, 'id': 0}
PAULI = [sigmax(), sigmay(), sigmaz()]


def header(script, seed=None):
    out = {'script': script, 'tool': f'QuTiP {qutip.__version__}', 'numpy': np.__version__, 'python': sys.version.split()[0]}
    return out if seed is None else {**out, 'seed': seed}


def axis_angle(ideal):
    name = ideal['gate']
    return AXES[name], ideal['params'][0] if 'params' in ideal else ANGLES[name]


def turned(axis, angle):
    return (-0.5j * angle * sum((n * s for n, s in zip(axis, PAULI)), 0 * PAULI[0])).expm()


def ideal_one(ideal):
    axis, angle = axis_angle(ideal)
    return qeye(2) if axis is None else turned(axis, angle)


def ideal_two(ideal):
    proj = [Qobj([[1, 0], [0, 0]]), Qobj([[0, 0], [0, 1]])]
    target = {'cz': sigmaz(), 'cx': sigmax()}[ideal['gate']]
    return tensor(proj[0], qeye(2)) + tensor(proj[1], target)


def noisy_one(ideal, q, moment):
    axis, angle = axis_angle(ideal)
    u = qeye(2)
    if axis is not None:
        scale = 1 + sum(n * n * q['angleScale'][k] for n, k in zip(axis, 'xyz')) + q.get('drift', 0) * moment
        toward = np.array([0, 0, 1.0] if abs(axis[2]) < 0.9 else [1.0, 0, 0])
        across = toward - np.dot(toward, axis) * np.array(axis)
        leant = math.cos(q['tilt']) * np.array(axis) + math.sin(q['tilt']) * across / np.linalg.norm(across)
        u = turned(leant, angle * scale)
    return turned((0, 0, 1), q['detuning']) * u


def zz(angle):
    return (-0.5j * angle * tensor(sigmaz(), sigmaz())).expm()


def flips(q, duration):
    """Kraus operators of the flips by their Lindblad generator over `duration` gate times."""
    p = q['flips']
    a, b, c = (-math.log(1 - 2 * s) / 2 for s in (p['y'] + p['z'], p['x'] + p['z'], p['x'] + p['y']))
    rates = [(b + c - a) / 2, (a + c - b) / 2, (a + b - c) / 2]
    L = sum(r * lindblad_dissipator(s) for r, s in zip(rates, PAULI))
    return to_kraus((L * duration).expm(), tol=1e-14)


def damping(q, duration):
    rate = -math.log(1 - q['damping']) * duration
    return to_kraus((rate * lindblad_dissipator(Qobj([[0, 1], [0, 0]]))).expm(), tol=1e-14)


def lift(ops, levels):
    """Qubit operators on a three-level system. No map here makes coherence with the third level, so any
    split of the weight there gives the same populations: the first operator takes it all."""
    if levels == 2:
        return ops
    out = []
    for i, k in enumerate(ops):
        m = np.zeros((3, 3), complex)
        m[:2, :2] = k.full()
        m[2, 2] = 1 if i == 0 else 0
        out.append(Qobj(m))
    return out


def leakage(leak):
    ket = [qutip.basis(3, i) for i in range(3)]
    stay = ket[0].proj() + math.sqrt(1 - leak['out']) * ket[1].proj() + math.sqrt(1 - leak['back']) * ket[2].proj()
    return [stay, math.sqrt(leak['out']) * ket[2] * ket[1].dag(), math.sqrt(leak['back']) * ket[1] * ket[2].dag()]


class Register:
    """A density matrix over some qubits of a model (positions in `qubits`, in the order of the bit strings)."""

    def __init__(self, model, gates, qubits, moment=0.0):
        self.model, self.qubits, self.moment = model, qubits, moment
        self.gates = {g['label']: g for g in gates}
        self.levels = [3 if 'leakage' in model['qubits'][q] else 2 for q in qubits]

    def place(self, op, positions):
        rest = [i for i in range(len(self.qubits)) if i not in positions]
        full = tensor([op] + [qeye(self.levels[i]) for i in rest])
        order = list(positions) + rest
        return full.permute([order.index(i) for i in range(len(order))])

    def kraus(self, rho, ops, positions):
        placed = [self.place(k, positions) for k in ops]
        return sum(k * rho * k.dag() for k in placed)

    def gate(self, rho, label):
        g = self.gates[label]
        where, duration = [self.qubits.index(t) for t in g['targets']], 1
        if len(where) == 1:
            q = g['targets'][0]
            rho = self.kraus(rho, lift([noisy_one(g['ideal'], self.model['qubits'][q], self.moment)], self.levels[where[0]]), where)
            for pair in self.model['pairs']:
                if q in pair['qubits'] and pair['stray']:
                    other = [x for x in pair['qubits'] if x != q][0]
                    if other in self.qubits:
                        rho = self.kraus(rho, [zz(pair['stray'])], [where[0], self.qubits.index(other)])
                    else:
                        rho = self.kraus(rho, [turned((0, 0, 1), pair['stray'])], where)
        else:
            pair = [p for p in self.model['pairs'] if set(p['qubits']) == set(g['targets'])][0]
            local = {x: turned((0, 0, 1), a) for x, a in zip(pair['qubits'], pair['phases'])}
            u = tensor([local[t] for t in g['targets']]) * zz(pair['angle']) * ideal_two(g['ideal'])
            rho = self.kraus(rho, [u], where)
            rho = self.depolarise(rho, where, pair['depolarising'])
            duration = pair['duration']
        for t, w in zip(g['targets'], where):
            q = self.model['qubits'][t]
            rho = self.kraus(rho, lift(flips(q, duration), self.levels[w]), [w])
            rho = self.kraus(rho, lift(damping(q, duration), self.levels[w]), [w])
            if 'leakage' in q:
                rho = self.kraus(rho, leakage(q['leakage']), [w])
        return rho

    def depolarise(self, rho, where, p):
        rest = [i for i in range(len(self.qubits)) if i not in where]
        mixed = tensor([qeye(2) / 2 for _ in where] + ([rho.ptrace(rest)] if rest else []))
        order = list(where) + rest
        return (1 - p) * rho + p * mixed.permute([order.index(i) for i in range(len(order))])

    def probabilities(self, circuit):
        parts = []
        for q, n in zip(self.qubits, self.levels):
            e = self.model['qubits'][q]['preparation']
            parts.append(Qobj(np.diag([1 - e, e] + [0] * (n - 2))))
        rho = tensor(parts)
        for label in circuit:
            rho = self.gate(rho, label)
        p = np.real(rho.diag()).reshape(self.levels)
        for axis, (q, n) in enumerate(zip(self.qubits, self.levels)):
            r = self.model['qubits'][q]['readout']
            one = [r['zeroAsOne']] + [1 - r['oneAsZero']] * (n - 1)
            p = np.moveaxis(np.tensordot(np.array([[1 - x for x in one], one]), p, axes=(1, axis)), 0, axis)
        return p.ravel().tolist()

    def superoperator(self, label):
        """Of a gate on exactly this register, without preparation and readout."""
        D = int(np.prod(self.levels))
        dims = [self.levels, self.levels]
        columns = []
        for i in range(D * D):
            unit = np.zeros(D * D)
            unit[i] = 1
            rho = Qobj(unit.reshape(D, D, order='F'), dims=dims)
            columns.append(self.gate(rho, label).full().ravel(order='F'))
        return Qobj(np.array(columns).T, dims=[dims, dims], superrep='super')

    def ideal_unitary(self, label):
        g = self.gates[label]
        u = ideal_one(g['ideal']) if len(g['targets']) == 1 else ideal_two(g['ideal'])
        return self.place(u, [self.qubits.index(t) for t in g['targets']])


def ideal_super(u):
    return to_super(u)
