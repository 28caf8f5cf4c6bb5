"""Tasks T1 and T2 as an expert would script them with NumPy and SciPy.

Reads the case as JSON, prints medians [ms] and a sample of the values found, so that both sides can be compared."""
import json
import sys
import time

import numpy as np
from scipy.linalg import eig, eigh

G = json.load(sys.stdin)


def skew(r):
    return np.array([[0, r[2], -r[1]], [-r[2], 0, r[0]], [r[1], -r[0], 0]])


def median(work, runs=9, warm=2):
    for _ in range(warm):
        work()
    times = []
    for _ in range(runs):
        start = time.perf_counter()
        work()
        times.append(1e3 * (time.perf_counter() - start))
    return float(np.median(times))


body = G["body"]
M = np.zeros((6, 6))
M[:3, :3] = body["mass"] * np.eye(3)
M[3:, 3:] = np.array(body["inertia"])
B = np.vstack([np.hstack([np.eye(3), skew(np.array(m["position"]) - np.array(body["centre"]))]) for m in G["mounts"]])
k = np.concatenate([m["stiffness"] for m in G["mounts"]])
h = np.concatenate([np.array(m["stiffness"]) * m["lossFactor"] for m in G["mounts"]])
c = np.concatenate([m["viscous"] for m in G["mounts"]])
K = B.T @ (k[:, None] * B)
H = B.T @ (h[:, None] * B)
C = B.T @ (c[:, None] * B)
F = np.array(G["loads"]).T.astype(complex)
omega = np.array(G["omega"])


def forces(q):
    z = (k + 1j * h)[None, :] + 1j * omega[:, None] * c[None, :]
    return z[:, :, None] * (B @ q)


def batched():
    D = (K + 1j * H)[None] + 1j * omega[:, None, None] * C - (omega**2)[:, None, None] * M
    q = np.linalg.solve(D, np.broadcast_to(F, (len(omega), 6, F.shape[1])))
    return q, forces(q)


def modal_diagonal():
    """Modes, with the off-diagonal damping left out: exact for proportional damping only."""
    w2, P = eigh(K, M)
    cm = np.einsum("ir,ij,jr->r", P, C, P)
    hm = np.einsum("ir,ij,jr->r", P, H, P)
    d = 1 / ((w2 + 1j * hm)[None] - (omega**2)[:, None] + 1j * omega[:, None] * cm[None])
    q = P[None] @ (d[:, :, None] * (P.T @ F)[None])
    return q, forces(q)


def pole_residue():
    """State space with complex stiffness: exact for any damping."""
    Mi = np.linalg.inv(M)
    A = np.block([[np.zeros((6, 6)), np.eye(6)], [-Mi @ (K + 1j * H), -Mi @ C]])
    s, X = eig(A)
    Y = np.linalg.inv(X)
    left = X[:6]
    right = Y[:, 6:] @ Mi @ F
    R = (left[:, None, :] * right.T[None, :, :]).reshape(-1, 12)
    q = (1 / (1j * omega[:, None] - s[None])) @ R.T
    q = q.reshape(len(omega), 6, F.shape[1])
    return q, forces(q)


factor = np.linalg.inv(np.linalg.cholesky(M))
scales = np.array(G["scales"]).reshape(-1, 8)


def modes_task():
    kk = np.repeat(scales, 3, axis=1) * k[None]
    Ks = np.einsum("ai,va,aj->vij", B, kk, B, optimize=True)
    w2, V = np.linalg.eigh(factor @ Ks @ factor.T)
    return np.sqrt(w2), factor.T @ V


q1, q2 = batched()[0], pole_residue()[0]
check = float(np.max(np.abs(q1 - q2)) / np.max(np.abs(q1)))
reference = batched()
w, _ = modes_task()
print(
    json.dumps(
        {
            "sweepBatched": median(batched),
            "sweepPoleResidue": median(pole_residue),
            "sweepModalDiagonal": median(modal_diagonal),
            "modes": median(modes_task),
            "agreement": check,
            "sample": {
                "index": 7000,
                "body": [[float(v.real), float(v.imag)] for v in reference[0][7000].T.ravel()],
                "forces": [[float(v.real), float(v.imag)] for v in reference[1][7000].T.ravel()],
                "frequencies": [float(v) / (2 * np.pi) for v in w[-1]],
            },
        }
    )
)
