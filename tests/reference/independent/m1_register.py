"""Predicting whole circuits: a joint patch as it is, a chained register by its patches' maps on a tensor."""
import numpy as np

from m1_design import determined, probabilities, row_blocks


def reorder(p, given, wanted):
    """Outcome axis from the qubit order `given` to `wanted`."""
    n = len(given)
    t = p.reshape(p.shape[:-1] + (2,) * n)
    lead = t.ndim - n
    t = t.transpose(list(range(lead)) + [lead + given.index(q) for q in wanted])
    return t.reshape(p.shape)


class Joint:
    def __init__(self, patch):
        self.patch = patch

    def sequence(self, gates):
        return [self.patch.layout.labels.index(g) for g in gates]

    def predict(self, model, circuit):
        p = probabilities(model, [self.sequence(circuit['gates'])])[..., 0, :]
        return reorder(p, self.patch.qubits, circuit['qubits'])

    def ideal(self, circuit):
        return self.predict(self.patch.ideal, circuit)

    def determined(self, circuit):
        if self.patch.too_weak:
            return False
        block = row_blocks(self.patch.layout, self.patch.ideal, self.sequence(circuit['gates']))
        return bool(np.all(determined(self.patch.inverse, block)))

    def signal_row(self, circuit, weights):
        """Weighted row of one bench circuit, weights over outcomes in the circuit's order."""
        block = row_blocks(self.patch.layout, self.patch.ideal, self.sequence(circuit['gates']))
        return reorder(weights, circuit['qubits'], self.patch.qubits) @ block


class Chained:
    """`models`: for every patch (locals by qubit, pairs by their qubits) a model; lead axes are replicates."""

    def __init__(self, dataset, locals_, pairs):
        self.targets = {g['label']: g['targets'] for g in dataset['gates']}
        self.locals_, self.pairs = locals_, pairs

    def pair_of(self, label):
        return next((k for k in self.pairs if set(k) == set(self.targets[label])), None)

    def predict(self, models, circuit):
        qubits = circuit['qubits']
        n = len(qubits)
        lead = models[qubits[0]][1].shape[:-1]
        k = len(lead)
        state = np.ones(lead + (1,))
        for q in qubits:
            state = np.einsum('...a,...b->...ab', state, models[q][1]).reshape(lead + (-1,))
        state = state.reshape(lead + (4,) * n)
        for label in circuit['gates']:
            t = self.targets[label]
            key = t[0] if len(t) == 1 else self.pair_of(label)
            where = [qubits.index(q) for q in ([key] if len(t) == 1 else key)]
            source = self.locals_[key] if len(t) == 1 else self.pairs[key]
            g = models[key][0][..., source.layout.labels.index(label), :, :]
            moved = np.moveaxis(state, [k + w for w in where], list(range(k, k + len(where))))
            shape = moved.shape
            flat = moved.reshape(lead + (4 ** len(where), -1))
            state = np.moveaxis((g @ flat).reshape(shape), list(range(k, k + len(where))), [k + w for w in where])
        out = state
        for q in qubits:  # each step eats the first Pauli axis and adds an outcome axis at the end
            rest = out.shape[k + 1:]
            out = np.moveaxis((models[q][2] @ out.reshape(lead + (4, -1))).reshape(lead + (2,) + rest), k, -1)
        return out.reshape(lead + (2 ** n,))

    def ideal(self, circuit):
        models = {q: p.ideal for q, p in self.locals_.items()}
        models.update({k: p.ideal for k, p in self.pairs.items()})
        return self.predict(models, circuit)

    def determined(self, circuit):
        if any(not self.locals_[q].complete or self.locals_[q].too_weak for q in circuit['qubits']):
            return False
        keys = [self.pair_of(g) for g in circuit['gates'] if len(self.targets[g]) > 1]
        return all(k is not None and self.pairs[k].complete for k in keys)
