"""One patch: the eight passes, the replicates and the misfit of the independent reading of method M1."""
from dataclasses import dataclass

import numpy as np

from m1_design import Inverse, Layout, design, gauge_basis, invert, probabilities
from m1_quantum import ideal_effects, ideal_preparation, patch_gates


@dataclass
class Counts:
    """The unsealed circuits of a patch: sequences of gate indices, counts (circuits x d) and shots."""
    sequences: list
    counts: np.ndarray
    shots: np.ndarray

    @property
    def frequencies(self):
        return self.counts / self.shots[:, None]

    @property
    def smoothed(self):
        d = self.counts.shape[1]
        return (self.counts + 0.5) / (self.shots[:, None] + d / 2)


def read_counts(circuits, labels, outcomes):
    keys = [format(o, 'b').zfill((outcomes - 1).bit_length()) for o in range(outcomes)]
    counts = np.array([[c['counts'].get(k, 0) for k in keys] for c in circuits], float).reshape(len(circuits), outcomes)
    shots = np.array([c['shots'] for c in circuits], float)
    assert np.all(counts.sum(axis=1) == shots)
    return Counts([[labels.index(g) for g in c['gates']] for c in circuits], counts, shots)


def rows(p):
    """Leave the last outcome out and flatten (circuit, outcome)."""
    return p[..., :-1].reshape(p.shape[:-2] + (-1,))


@dataclass
class Patch:
    qubits: list
    layout: Layout
    data: Counts
    ideal: tuple
    inverse: Inverse
    gauge: int
    rank: int = 0
    ratio: float = 0.0
    ambiguous: bool = False
    complete: bool = False
    too_weak: bool = False
    settled: bool = False
    stopped: bool = False
    base: tuple = None
    e: np.ndarray = None
    first: np.ndarray = None
    misfit: dict = None
    longest: int = 0

    def model(self, e=None):
        return self.layout.apply(self.base, self.e if e is None else e)


def run_passes(patch):
    C, f = patch.inverse.pinv, rows(patch.data.frequencies)
    predict = lambda e: rows(probabilities(patch.layout.apply(patch.base, e), patch.data.sequences))
    e = C @ (f - predict(np.zeros(patch.layout.columns)))
    patch.first = e.copy()
    previous = now = None
    for _ in range(7):
        previous = predict(e)
        with np.errstate(all='ignore'):
            e = e + C @ (f - previous)
        if not np.all(np.isfinite(e)) or np.any(np.abs(e) > 1):
            patch.e, patch.stopped, patch.settled = patch.first, True, False
            return
    now = predict(e)
    s, n = rows(patch.data.smoothed), np.repeat(patch.data.shots, patch.layout.outcomes - 1)
    noise = np.sqrt(np.mean(s * (1 - s) / n))
    patch.settled = bool(np.sqrt(np.mean((now - previous) ** 2)) < 0.1 * noise)
    patch.e = e


def joint_patch(dataset, qubits, circuits):
    n = len(qubits)
    gates = patch_gates(dataset, qubits)
    labels, D = list(gates), 4 ** n
    layout = Layout(labels, D, 2 ** n, list(range(len(labels))), True)
    ideal = (np.array([gates[k] for k in labels]), ideal_preparation(n), ideal_effects(n))
    data = read_counts(circuits, labels, 2 ** n)
    inverse = invert(design(layout, ideal, data.sequences))
    patch = Patch(qubits, layout, data, ideal, inverse, gauge_basis(layout, ideal).shape[1])
    patch.rank, patch.ratio, patch.ambiguous = inverse.rank, inverse.ratio, inverse.ambiguous
    patch.complete = patch.rank == layout.columns - patch.gauge
    patch.too_weak = patch.ratio < 1e-3
    patch.base, patch.longest = ideal, max(map(len, data.sequences))
    run_passes(patch)
    return patch


def local_base(ideal, where, locals_, models):
    """The ideal pair model with local gates and SPAM replaced by those of the two one-qubit patches."""
    maps = np.broadcast_to(ideal[0], models[0][0].shape[:-3] + ideal[0].shape).copy()
    for k, (side, i) in where.items():
        g = models[side][0][..., i, :, :]
        maps[..., k, :, :] = kron(g, np.eye(4)) if side == 0 else kron(np.eye(4), g)
    prep = np.einsum('...a,...b->...ab', models[0][1], models[1][1])
    effects = np.einsum('...oa,...pb->...opab', models[0][2], models[1][2])
    return maps, prep.reshape(prep.shape[:-2] + (16,)), effects.reshape(effects.shape[:-4] + (4, 16))


def kron(a, b):
    out = np.einsum('...ij,...kl->...ikjl', a, b)
    return out.reshape(out.shape[:-4] + (16, 16))


def pair_patch(dataset, qubits, circuits, locals_):
    gates = patch_gates(dataset, qubits)
    labels = list(gates)
    targets = {g['label']: g['targets'] for g in dataset['gates']}
    where, free = {}, []
    for k, label in enumerate(labels):
        if len(targets[label]) == 1:
            side = qubits.index(targets[label][0])
            where[k] = (side, locals_[side].layout.labels.index(label))
        else:
            free.append(k)
    layout = Layout(labels, 16, 4, free, False)
    ideal = (np.array([gates[k] for k in labels]), ideal_preparation(2), ideal_effects(2))
    data = read_counts(circuits, labels, 4)
    judged = invert(design(layout, ideal, data.sequences))
    base = local_base(ideal, where, locals_, [p.model() for p in locals_])
    inverse = invert(design(layout, base, data.sequences))
    patch = Patch(qubits, layout, data, ideal, inverse, 0)
    patch.where, patch.locals_ = where, locals_
    patch.rank, patch.ratio, patch.ambiguous = judged.rank, judged.ratio, judged.ambiguous
    patch.complete = judged.rank == layout.columns and judged.ratio >= 0.01
    patch.base, patch.longest = base, max(map(len, data.sequences))
    run_passes(patch)
    return patch


def draw(rng, shots, p, replicates):
    """Multinomial frequencies, replicates x circuits x d."""
    return rng.multinomial(shots.astype(int), p, size=(replicates, len(shots))) / shots[:, None]


def replicates(patch, rng, B, local_models=None):
    """B x columns, and the base model each replicate sits on (one base, or one a replicate for a pair)."""
    s, f = rows(patch.data.smoothed), rows(patch.data.frequencies)
    base = patch.base if local_models is None else local_base(patch.ideal, patch.where, patch.locals_, local_models)
    shift = rows(draw(rng, patch.data.shots, patch.data.smoothed, B)) - s
    e = patch.e + shift @ patch.inverse.pinv.T
    if not patch.stopped:
        p = rows(probabilities(patch.layout.apply(base, e), patch.data.sequences))
        e = e + (f + shift - p) @ patch.inverse.pinv.T
    return e, base


def clip(p, shots):
    floor = 0.5 / (shots + p.shape[-1] / 2)
    q = np.maximum(p, floor[:, None])
    return q / q.sum(axis=-1, keepdims=True)


def misfit(patch, C, rng, B, base=None):
    """Residual sum against a parametric bootstrap; `base`: local replicates of a chained pair."""
    p = probabilities(patch.model(), patch.data.sequences)
    S = float(np.sum((patch.data.frequencies - p) ** 2))
    f = rows(draw(rng, patch.data.shots, clip(p, patch.data.shots), B))
    centre = rows(p) if base is None else rows(probabilities(patch.layout.apply(base, np.broadcast_to(patch.e, (B, len(patch.e)))), patch.data.sequences))
    r = f - centre
    r = r - (r @ patch.inverse.pinv.T) @ C.T
    r = r.reshape(B, -1, patch.layout.outcomes - 1)
    sums = np.sum(r ** 2, axis=(1, 2)) + np.sum(np.sum(r, axis=2) ** 2, axis=1)
    a = int(np.sum(sums >= S))
    return {'residualSum': S, 'expected': float(sums.mean()), 'sigmas': float((S - sums.mean()) / sums.std(ddof=1)),
            'pValue': min(1.0, 2 * min(a + 1, B + 1 - a) / (B + 1))}
