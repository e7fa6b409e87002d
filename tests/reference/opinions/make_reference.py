"""Outside values for the second opinions: independent solutions by scipy of two small problems.

1. nearest-channel.json: the nearest completely positive, trace-preserving map of rough one-qubit maps, found by minimising the
   Frobenius distance over Kraus operators (four 2x2 complex matrices, trace preserved through a QR factor) with BFGS from four
   starts: no projection and no Choi matrix in it.
2. likelihood.json: counts of 120 circuits of {id, rx, ry}, and the trace-preserving maximum of their multinomial log-likelihood,
   found by scipy's trust-exact Newton method with derivatives by complex step over all 43 parameters from a start of its own.

Run: python3 make_reference.py   (writes both files beside itself; seeds are fixed)
"""
import json
import os

import numpy as np
import scipy
from scipy.optimize import minimize, least_squares

here = os.path.dirname(os.path.abspath(__file__))
P = [np.eye(2), np.array([[0, 1], [1, 0]]), np.array([[0, -1j], [1j, 0]]), np.array([[1, 0], [0, -1]])]


def ptm(kraus):
    return np.array([[sum(np.trace(a @ k @ b @ k.conj().T) for k in kraus).real / 2 for b in P] for a in P])


def kraus_of(x):
    raw = (x[:16] + 1j * x[16:]).reshape(8, 2)
    q, _ = np.linalg.qr(raw)  # columns orthonormal: sum K'K = 1
    return q.reshape(4, 2, 2)


def nearest(m, rng):
    best = None
    for _ in range(4):
        found = minimize(lambda x: np.sum((ptm(kraus_of(x)) - m) ** 2), rng.normal(size=32), method="BFGS", options={"gtol": 1e-10, "maxiter": 4000})
        polished = least_squares(lambda x: (ptm(kraus_of(x)) - m).ravel(), found.x, xtol=1e-15, ftol=1e-15, gtol=1e-15)
        if best is None or polished.cost < best.cost:
            best = polished
    return ptm(kraus_of(best.x))


def channels():
    rng = np.random.default_rng(20261201)
    cases = []
    for size in (0.05, 0.1, 0.2):
        m = np.eye(4)
        m[1:] += size * rng.normal(size=(3, 4))
        cases.append({"n": 1, "map": m.ravel().tolist(), "nearest": nearest(m, rng).ravel().tolist()})
    write("nearest-channel.json", {"tool": f"scipy {scipy.__version__} with numpy {np.__version__}", "how": "least squares over Kraus operators from four starts", "cases": cases})


def turn(axis, angle):
    u = np.cos(angle / 2) * np.eye(2) - 1j * np.sin(angle / 2) * P[axis]
    return ptm([u])


def likelihood():
    rng = np.random.default_rng(20261202)
    ideal = [np.eye(4), turn(1, np.pi / 2), turn(2, np.pi / 2)]
    noisy = [np.diag([1, .997, .996, .998]) @ turn(3, .01) @ ideal[0], np.diag([1, .995, .997, .996]) @ turn(1, .015) @ ideal[1], np.diag([1, .996, .995, .997]) @ turn(1, -.012) @ ideal[2]]
    rho = np.array([1, 0, 0, 1]) / np.sqrt(2)
    effect = np.array([1, 0, 0, 1]) / np.sqrt(2)
    rho_true = np.array([1, .005, -.004, .99]) / np.sqrt(2)
    effect_true = np.array([1.01, 0, 0, .97]) / np.sqrt(2)
    circuits = [rng.integers(0, 3, size=int(rng.choice([2, 4, 8, 16]))).tolist() for _ in range(120)]
    shots = 500

    def probabilities(gates, state, m):
        out = []
        for c in circuits:
            v = state
            for g in c:
                v = gates[g] @ v
            out.append(m @ v)
        return np.array(out)

    counts = rng.binomial(shots, np.clip(probabilities(noisy, rho_true, effect_true), 0, 1))

    def unpack(x):
        gates = []
        for k in range(3):
            e = np.zeros((4, 4), dtype=x.dtype)
            e[1:] = x[12 * k:12 * k + 12].reshape(3, 4)
            gates.append((np.eye(4) + e) @ ideal[k])
        state = rho.astype(x.dtype).copy()
        state[1:] += x[36:39]
        return gates, state, effect + x[39:43]

    def model(x):
        return probabilities(*unpack(x))

    def jacobian(x):
        cols = []
        for j in range(43):
            z = x.astype(complex)
            z[j] += 1e-30j
            cols.append(model(z).imag / 1e-30)
        return np.array(cols).T

    f = counts / shots

    def value(x):
        p = model(x)
        if np.any(p <= 1e-4) or np.any(p >= 1 - 1e-4):
            return 1e6
        with np.errstate(divide="ignore", invalid="ignore"):
            t = np.where(counts > 0, counts * np.log(p / np.where(f > 0, f, 1)), 0) + np.where(counts < shots, (shots - counts) * np.log((1 - p) / np.where(f < 1, 1 - f, 1)), 0)
        return -t.sum()

    def gradient(x):
        p = model(x)
        return -jacobian(x).T @ (counts / p - (shots - counts) / (1 - p))

    def information(x):
        p = model(x)
        j = jacobian(x)
        return j.T @ (j * (shots / (p * (1 - p)))[:, None])

    # Away from the ideal gates, whose probabilities of 0 and 1 have no logarithm: two per cent of every Pauli lost, three of SPAM.
    start = np.zeros(43)
    for k in range(3):
        for a in range(3):
            start[12 * k + 4 * a + a + 1] = -.02
    start[38] = start[42] = -.03 / np.sqrt(2)
    found = minimize(value, start, jac=gradient, hess=information, method="trust-exact", options={"gtol": 1e-7, "maxiter": 2000})
    gates, state, m = unpack(found.x)

    def loss(noisy_gate, ideal_gate):
        lam = np.linalg.eigvals(noisy_gate[1:, 1:])
        mu = np.linalg.eigvals(ideal_gate[1:, 1:])
        from scipy.optimize import linear_sum_assignment
        r, c = linear_sum_assignment(np.abs(lam[:, None] - mu[None, :]) ** 2)
        return 1 - (1 + np.sum((np.conj(mu[c]) * lam[r]).real)) / 4

    write("likelihood.json", {
        "tool": f"scipy {scipy.__version__} with numpy {np.__version__}", "how": "trust-region Newton from a start of its own, gradient by complex step",
        "shots": shots, "circuits": circuits, "zeros": counts.tolist(), "logLikelihood": -float(found.fun), "gradientNorm": float(np.abs(found.jac).max()),
        "probabilities": model(found.x).tolist(), "losses": [float(loss(g, i)) for g, i in zip(gates, ideal)],
    })
    print("likelihood", found.message, found.nit, found.fun, np.abs(found.jac).max())


def write(name, content):
    with open(os.path.join(here, name), "w") as file:
        json.dump(content, file)
        file.write("\n")


if __name__ == "__main__":
    channels()
    likelihood()
