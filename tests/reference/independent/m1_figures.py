"""Figures of single gates and of gate sets, on one model or on a stack of replicates."""
import numpy as np
from scipy.optimize import linear_sum_assignment

LEVELS = (0.5, 0.8, 0.95)


def matched(noisy, ideal):
    """Ideal eigenvalues (D) and those of each noisy map (B x D), put in the order of the best assignment."""
    mu = np.linalg.eigvals(ideal)
    lam = np.linalg.eigvals(noisy)
    out = np.empty_like(lam, dtype=complex)
    for b in range(lam.shape[0]):
        cost = np.abs(mu[:, None] - lam[b][None, :]) ** 2
        r, c = linear_sum_assignment(cost)
        out[b, r] = lam[b, c]
    return mu, out


def gate_loss(noisy, ideal):
    mu, lam = matched(noisy, ideal)
    return 1 - np.mean(np.real(np.conj(mu) * lam), axis=1)


def angle_error(noisy, ideal):
    """None where no ideal eigenvalue is complex or where several different rotations are at work."""
    mu, lam = matched(noisy, ideal)
    up = np.where(mu.imag > 1e-9)[0]
    if len(up) == 0:
        return None
    top = mu[up[np.argmax(mu[up].imag)]]
    group = np.abs(mu - top) < 1e-6
    if group.sum() != len(up):
        return None
    return np.angle(np.conj(top) * lam[:, group].mean(axis=1))


def twirl(noisy, ideal):
    """Matrix of X -> mean_k G'_k X inv(G'_k ideal) on row-major vec X of the unital blocks."""
    blocks = [np.kron(a[1:, 1:], b[1:, 1:]) for a, b in zip(noisy, ideal)]  # inv(b) = b.T, vec(A X B.T)
    return np.mean(blocks, axis=0)


def error_defined(ideal):
    lam = np.abs(np.linalg.eigvals(twirl(ideal, ideal)) - 1) < 1e-6
    big = np.abs(np.linalg.eigvals(twirl(ideal, ideal))) > 1 - 1e-6
    return bool(lam.sum() == 1 and big.sum() == 1)


def error_per_gate(noisy, ideal):
    """One model: the whole spectrum, eigenvalue nearest to 1."""
    lam = np.linalg.eigvals(twirl(noisy, ideal))
    D = ideal.shape[-1]
    return (1 - lam[np.argmin(np.abs(lam - 1))].real) * (D - 1) / D


def error_per_gate_replicates(noisy, ideal):
    """A stack: small blocks by their spectrum, large ones by power iteration from the identity."""
    D = ideal.shape[-1]
    if D == 4:
        return np.array([error_per_gate(g, ideal) for g in noisy])
    g, h = noisy[..., 1:, 1:], ideal[:, 1:, 1:].transpose(0, 2, 1)
    X = np.broadcast_to(np.eye(D - 1), (len(g), D - 1, D - 1)) / np.sqrt(D - 1)
    last = np.zeros(len(g))
    for _ in range(2000):
        Y = sum(g[:, k] @ X @ h[k] for k in range(len(ideal))) / len(ideal)
        value = np.sum(X * Y, axis=(1, 2))
        X = Y / np.linalg.norm(Y, axis=(1, 2), keepdims=True)
        if np.max(np.abs(value - last)) < 1e-13:
            break
        last = value
    return (1 - value) * (D - 1) / D


def retained_signal(p, phat):
    """p: circuits x d; phat: ... x circuits x d."""
    q = p - 1 / p.shape[-1]
    return np.sum(q * (phat - 1 / p.shape[-1]), axis=(-2, -1)) / np.sum(q ** 2)


def total_variation(p, q):
    """Mean over circuits of half the summed absolute difference."""
    return np.mean(0.5 * np.sum(np.abs(p - q), axis=-1), axis=-1)


def intervals(value, sample, kind):
    """Graded intervals and the standard error of a figure; `kind` percentile or reflected (cut at 0)."""
    sample = sample[np.isfinite(sample)]
    out = []
    for level in LEVELS:
        low, high = np.quantile(sample, [(1 - level) / 2, (1 + level) / 2])
        if kind == 'reflected':
            low, high = max(0.0, 2 * value - high), max(0.0, 2 * value - low)
        out.append({'level': level, 'low': float(low), 'high': float(high)})
    return float(sample.std(ddof=1)), out


def sealed_check(p, phat, phat_b, counts, shots, rng):
    """The prediction test on sealed circuits against the scatter of shots and of the estimate."""
    observed = counts / shots[:, None]
    value = float(total_variation(phat, observed))
    draws = np.empty(len(phat_b))
    for b, pb in enumerate(phat_b):
        q = np.clip(pb, 0, 1)
        q = q / q.sum(axis=-1, keepdims=True)
        f = rng.multinomial(shots.astype(int), q) / shots[:, None]
        draws[b] = total_variation(phat, f)
    low, high = np.quantile(draws, [0.005, 0.995])
    return {'value': value, 'ideal': float(total_variation(p, observed)), 'noise': float(draws.mean()),
            'z': float((value - draws.mean()) / draws.std(ddof=1)), 'low99': float(low), 'high99': float(high),
            'passed': bool(low <= value <= high)}
