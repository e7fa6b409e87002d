"""Gates, Pauli transfer matrices and ideal vectors for the independent reading of method M1.

Conventions: n qubits, d = 2**n, D = 4**n; normalised Pauli basis P_a / sqrt(d), order I, X, Y, Z per
qubit, first qubit slowest. Nothing here is shared with the TypeScript code it is held against.
"""
import itertools
from functools import reduce

import numpy as np

I2 = np.eye(2, dtype=complex)
PAULI = [I2, np.array([[0, 1], [1, 0]], complex), np.array([[0, -1j], [1j, 0]]), np.diag([1, -1]).astype(complex)]


def rotation(axis, angle):
    return np.cos(angle / 2) * I2 - 1j * np.sin(angle / 2) * PAULI[axis]


def phase(angle):
    return np.diag([1, np.exp(1j * angle)])


def general(theta, phi, lam):
    """OpenQASM 3 U(theta, phi, lambda)."""
    c, s = np.cos(theta / 2), np.sin(theta / 2)
    return np.array([[c, -np.exp(1j * lam) * s], [np.exp(1j * phi) * s, np.exp(1j * (phi + lam)) * c]])


def controlled(u):
    return np.block([[I2, np.zeros((2, 2))], [np.zeros((2, 2)), u]])


HADAMARD = np.array([[1, 1], [1, -1]], complex) / np.sqrt(2)
SX = 0.5 * np.array([[1 + 1j, 1 - 1j], [1 - 1j, 1 + 1j]])
SWAP = np.array([[1, 0, 0, 0], [0, 0, 1, 0], [0, 1, 0, 0], [0, 0, 0, 1]], complex)
STANDARD = {
    'id': lambda: I2, 'x': lambda: PAULI[1], 'y': lambda: PAULI[2], 'z': lambda: PAULI[3], 'h': lambda: HADAMARD,
    's': lambda: phase(np.pi / 2), 'sdg': lambda: phase(-np.pi / 2), 't': lambda: phase(np.pi / 4),
    'tdg': lambda: phase(-np.pi / 4), 'sx': lambda: SX, 'p': phase, 'phase': phase, 'u1': phase,
    'rx': lambda t: rotation(1, t), 'ry': lambda t: rotation(2, t), 'rz': lambda t: rotation(3, t),
    'u2': lambda a, b: general(np.pi / 2, a, b), 'u3': general, 'U': general,
    'cx': lambda: controlled(PAULI[1]), 'cy': lambda: controlled(PAULI[2]), 'cz': lambda: controlled(PAULI[3]),
    'ch': lambda: controlled(HADAMARD), 'cp': lambda t: controlled(phase(t)), 'swap': lambda: SWAP,
    'crx': lambda t: controlled(rotation(1, t)), 'cry': lambda t: controlled(rotation(2, t)),
    'crz': lambda t: controlled(rotation(3, t)),
}


def ideal_unitary(ideal):
    if 'unitary' in ideal:
        return np.array([[complex(*z) for z in row] for row in ideal['unitary']])
    return STANDARD[ideal['gate']](*ideal.get('params', []))


def embed(u, positions, n):
    """Unitary on `positions` (first = most significant of u) as a 2**n matrix on n qubits."""
    k = len(positions)
    rest = [q for q in range(n) if q not in positions]
    full = np.kron(u, np.eye(2 ** len(rest))).reshape([2] * (2 * n))
    order = list(positions) + rest  # axis j of `full` is qubit order[j]
    where = [order.index(q) for q in range(n)]
    assert k + len(rest) == n
    return full.transpose(where + [n + w for w in where]).reshape(2 ** n, 2 ** n)


def pauli_basis(n):
    return [reduce(np.kron, [PAULI[i] for i in idx]) for idx in itertools.product(range(4), repeat=n)]


_BASIS = {n: np.array(pauli_basis(n)) for n in (1, 2)}


def transfer_matrix(kraus, n):
    """Real D x D Pauli transfer matrix of rho -> sum_k K rho K^dagger."""
    basis, d = _BASIS[n], 2 ** n
    moved = sum(np.einsum('ij,bjk,lk->bil', k, basis, k.conj()) for k in kraus)
    return np.real(np.einsum('aij,bji->ab', basis, moved)) / d


def ideal_preparation(n):
    rho = np.zeros((2 ** n, 2 ** n), complex)
    rho[0, 0] = 1
    return np.real(np.einsum('aij,ji->a', _BASIS[n], rho)) / np.sqrt(2 ** n)


def ideal_effects(n):
    """d x D, outcome o ascending."""
    d = 2 ** n
    rows = []
    for o in range(d):
        m = np.zeros((d, d), complex)
        m[o, o] = 1
        rows.append(np.real(np.einsum('aij,ji->a', _BASIS[n], m)) / np.sqrt(d))
    return np.array(rows)


def patch_gates(dataset, qubits):
    """Labels and ideal transfer matrices of the declared gates whose targets lie in the patch, declared order."""
    out = {}
    for gate in dataset['gates']:
        if all(t in qubits for t in gate['targets']):
            u = embed(ideal_unitary(gate['ideal']), [qubits.index(t) for t in gate['targets']], len(qubits))
            out[gate['label']] = transfer_matrix([u], len(qubits))
    return out


def smallest_choi(ptm, n):
    """Smallest eigenvalue of the Choi state (trace 1)."""
    basis, d = _BASIS[n], 2 ** n
    choi = np.einsum('ab,aij,bkl->ikjl', ptm, basis, basis.transpose(0, 2, 1)).reshape(d * d, d * d) / d ** 2
    return float(np.linalg.eigvalsh(choi)[0])
