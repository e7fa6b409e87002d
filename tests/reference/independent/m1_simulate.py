"""Simulated datasets for the fixtures: transfer matrices with generated noise, numpy's generator for the counts."""
import numpy as np

from m1_quantum import PAULI, embed, ideal_effects, ideal_preparation, ideal_unitary, transfer_matrix


def expm_hermitian(h):
    w, v = np.linalg.eigh(h)
    return (v * np.exp(-1j * w)) @ v.conj().T


class Device:
    """Every gate is its ideal unitary, a random small unitary, Pauli flips and damping on its targets; SPAM errors per qubit.

    coherent, stochastic: one strength for all gates, or a list [of one-qubit gates, of two-qubit gates].
    The coherent part alone has entanglement infidelity sin(coherent)^2, the flips alone about `stochastic`.
    """

    def __init__(self, dataset, rng, coherent, stochastic, readout=(0.01, 0.02), preparation=0.005):
        self.rng, self.n = rng, len(dataset['register'])
        self.kraus = {}
        strength = lambda x, k: x[k - 1] if isinstance(x, list) else x
        coherent_of, stochastic_of = coherent, stochastic
        for g in dataset['gates']:
            k = len(g['targets'])
            coherent, stochastic = strength(coherent_of, k), strength(stochastic_of, k)
            basis = [a for a in PAULI] if k == 1 else [np.kron(a, b) for a in PAULI for b in PAULI]
            x = rng.normal(size=len(basis) - 1)
            h = sum(c * p for c, p in zip(x / np.linalg.norm(x), basis[1:])) * coherent
            u = expm_hermitian(h) @ ideal_unitary(g['ideal'])
            p = rng.uniform(0.5, 1.5, size=len(basis) - 1) * stochastic / (len(basis) - 1)
            maps = [np.sqrt(1 - p.sum()) * u] + [np.sqrt(q) * b @ u for q, b in zip(p, basis[1:])]
            if k == 1:
                gamma = 0.5 * stochastic
                damp = [np.diag([1, np.sqrt(1 - gamma)]), np.array([[0, np.sqrt(gamma)], [0, 0]])]
                maps = [a @ b for a in damp for b in maps]
            self.kraus[g['label']] = (g['targets'], maps)
        flip = rng.uniform(0.6, 1.4, size=(self.n, 2))
        self.readout = [[readout[0] * a, readout[1] * b] for a, b in flip]
        self.preparation = preparation * rng.uniform(0.5, 1.5, size=self.n)

    def on(self, qubits):
        """Probability function of circuits on these qubits."""
        n = len(qubits)
        if n > 2:
            return self.dense(qubits)
        maps = {k: transfer_matrix([embed(m, [qubits.index(t) for t in targets], n) for m in ms], n)
                for k, (targets, ms) in self.kraus.items() if all(t in qubits for t in targets)}
        prep, effects = self.spam(qubits)

        def probabilities(gates):
            v = prep
            for g in gates:
                v = maps[g] @ v
            return effects @ v
        return probabilities

    def spam(self, qubits):
        prep, effects = np.ones(1), np.ones((1, 1))
        for q in qubits:
            z = np.array([1, 0, 0, 1 - 2 * self.preparation[q]]) / np.sqrt(2)
            a, b = self.readout[q]
            m = np.array([[1 - a, b], [a, 1 - b]]) @ ideal_effects(1)
            prep, effects = np.kron(prep, z), np.kron(effects, m)
        assert len(prep) == len(np.kron(ideal_preparation(1), np.ones(4 ** (len(qubits) - 1))))
        return prep, effects

    def dense(self, qubits):
        """Three and more qubits: density matrix and Kraus operators."""
        n = len(qubits)
        start = np.ones(1)
        confusion = np.ones((1, 1))
        for q in qubits:
            start = np.kron(start, [1 - self.preparation[q], self.preparation[q]])
            a, b = self.readout[q]
            confusion = np.kron(confusion, [[1 - a, b], [a, 1 - b]])

        def probabilities(gates):
            rho = np.diag(start).astype(complex)
            for g in gates:
                targets, ms = self.kraus[g]
                full = [embed(m, [qubits.index(t) for t in targets], n) for m in ms]
                rho = sum(k @ rho @ k.conj().T for k in full)
            return confusion @ np.real(np.diag(rho))
        return probabilities

    def run(self, patch, shots):
        """Fill the counts of a patch: shots of each circuit drawn from the list; outcomes never seen are left out."""
        p = self.on(patch['qubits'])
        n = len(patch['qubits'])
        for c in patch['circuits']:
            c['shots'] = int(self.rng.choice(shots))
            q = np.clip(p(c['gates']), 0, None)
            k = self.rng.multinomial(c['shots'], q / q.sum())
            c['counts'] = {format(o, 'b').zfill(n): int(x) for o, x in enumerate(k) if x}
