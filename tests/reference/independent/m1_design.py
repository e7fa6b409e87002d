"""Models, design matrix, gauge columns, pseudo-inverse and rank for the independent reading of method M1.

A model is (maps G x D x D, preparation D, effects d x D); replicates carry a leading axis on each of the three.
`free` lists the gate indices whose error maps are parameters; `spam` says whether preparation and effects are.
"""
from dataclasses import dataclass, field

import numpy as np

CUT = 1e-9


@dataclass
class Layout:
    """What a patch estimates: the columns of its design matrix, in the order of the specification."""
    labels: list
    dim: int
    outcomes: int
    free: list
    spam: bool
    columns: int = field(init=False)

    def __post_init__(self):
        D, d = self.dim, self.outcomes
        self.columns = len(self.free) * D * (D - 1) + (D - 1 + (d - 1) * D if self.spam else 0)

    def unpack(self, e):
        """Parameter vectors (..., columns) to error maps (..., free, D, D), preparation and effect changes."""
        D, d, lead = self.dim, self.outcomes, e.shape[:-1]
        size = D * (D - 1)
        maps = np.zeros(lead + (len(self.free), D, D))
        for i in range(len(self.free)):
            maps[..., i, 1:, :] = e[..., i * size:(i + 1) * size].reshape(lead + (D - 1, D))
        at = len(self.free) * size
        prep, effects = np.zeros(lead + (D,)), np.zeros(lead + (d, D))
        if self.spam:
            prep[..., 1:] = e[..., at:at + D - 1]
            effects[..., :d - 1, :] = e[..., at + D - 1:].reshape(lead + (d - 1, D))
            effects[..., d - 1, :] = -effects[..., :d - 1, :].sum(axis=-2)
        return maps, prep, effects

    def apply(self, base, e):
        """The noisy model (1 + E_k) G_k, rho + drho, M + dM about the model `base`."""
        errors, prep, effects = self.unpack(e)
        D, lead = self.dim, e.shape[:-1]
        maps = np.broadcast_to(base[0], lead + base[0].shape[-3:]).copy()
        for i, k in enumerate(self.free):
            maps[..., k, :, :] = (np.eye(D) + errors[..., i, :, :]) @ maps[..., k, :, :]
        return maps, base[1] + prep, base[2] + effects


def row_blocks(layout, model, sequence):
    """d x columns: derivative of each outcome's probability (last outcome = minus the sum of the others)."""
    maps, prep, effects = model
    D, d = layout.dim, layout.outcomes
    forward = [prep]
    for g in sequence:
        forward.append(maps[g] @ forward[-1])
    backward = [effects]
    for g in reversed(sequence):
        backward.append(backward[-1] @ maps[g])
    backward.reverse()  # backward[j] = M G_L ... G_{j+1}
    size = D * (D - 1)
    rows = np.zeros((d, layout.columns))
    for j, g in enumerate(sequence, start=1):
        if g in layout.free:
            i = layout.free.index(g)
            outer = np.einsum('oa,b->oab', backward[j][:, 1:], forward[j])
            rows[:, i * size:(i + 1) * size] += outer.reshape(d, size)
    if layout.spam:
        at = len(layout.free) * size
        rows[:, at:at + D - 1] = backward[0][:, 1:]
        at += D - 1
        for o in range(d - 1):
            rows[o, at + o * D:at + (o + 1) * D] = forward[-1]
        rows[d - 1, at:] = -rows[:d - 1, at:].sum(axis=0)
    return rows


def design(layout, model, sequences):
    """Rows (circuit, outcome < d - 1)."""
    return np.vstack([row_blocks(layout, model, s)[:-1] for s in sequences])


def gauge_basis(layout, model):
    """Orthonormal columns spanning the changes that a change of frame 1 + K makes to first order."""
    maps, prep, effects = model
    D, d = layout.dim, layout.outcomes
    columns = []
    for a in range(1, D):
        for b in range(D):
            K = np.zeros((D, D))
            K[a, b] = 1
            parts = [(K - maps[k] @ K @ maps[k].T)[1:].ravel() for k in layout.free]
            parts += [(K @ prep)[1:]] + [-(K.T @ effects[o]) for o in range(d - 1)]
            columns.append(np.concatenate(parts))
    u, s, _ = np.linalg.svd(np.array(columns).T, full_matrices=False)
    return u[:, s > 1e-10 * s[0]]


@dataclass
class Inverse:
    pinv: np.ndarray
    rank: int
    ratio: float
    ambiguous: bool
    spectrum: np.ndarray
    null: np.ndarray


def invert(C):
    """Moore-Penrose inverse by a full SVD, the rank by the cut of the specification."""
    u, s, vt = np.linalg.svd(C, full_matrices=C.shape[0] < C.shape[1])
    rank = int(np.sum(s > CUT * s[0]))
    ambiguous = bool(np.any((s > 1e-12 * s[0]) & (s <= 1e-4 * s[0])))
    pinv = (vt[:rank].T / s[:rank]) @ u[:, :rank].T
    return Inverse(pinv, rank, float(s[rank - 1] / s[0]), ambiguous, s, vt[rank:].T)


def determined(inverse, w):
    """Rows of w (m x columns): is each functional free of the null space?"""
    w = np.atleast_2d(w)
    norms = np.linalg.norm(w, axis=1)
    return np.linalg.norm(w @ inverse.null, axis=1) <= 1e-6 * norms


def probabilities(model, sequences):
    """(..., circuits, d) by the full product of maps, last axis every outcome."""
    maps, prep, effects = model
    lead = maps.shape[:-3]
    out = np.empty(lead + (len(sequences), effects.shape[-2]))
    for c, sequence in enumerate(sequences):
        v = np.broadcast_to(prep, lead + prep.shape[-1:])[..., None]
        for g in sequence:
            v = maps[..., g, :, :] @ v
        out[..., c, :] = (effects @ v)[..., 0]
    return out
