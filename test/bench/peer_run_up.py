"""Task T4 as an expert would script it with NumPy and SciPy.

Reads the case as JSON, prints medians [ms] and the peaks found, so that both sides can be compared.
`filters`: one recursive filter per mode, both quarter-turn parts of the force, any damping; `realFilters`:
one start angle and diagonal damping only, the least work there is. Both hold the force as a parabola between
samples, which lets them sample eight times less often than straight lines would.
`integrator`: a general one on the state-space form."""
import json
import sys
import time

import numpy as np
from scipy.integrate import solve_ivp
from scipy.linalg import eig, eigh
from scipy.signal import lfilter

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
centre = np.array(body["centre"])
M = np.zeros((6, 6))
M[:3, :3] = body["mass"] * np.eye(3)
M[3:, 3:] = np.array(body["inertia"])
B = np.vstack([np.hstack([np.eye(3), skew(np.array(m["position"]) - centre)]) for m in G["mounts"]])
k = np.concatenate([m["stiffness"] for m in G["mounts"]])
h = np.concatenate([np.array(m["stiffness"]) * m["lossFactor"] for m in G["mounts"]])
c = np.concatenate([m["viscous"] for m in G["mounts"]])
K, H, C = (B.T @ (v[:, None] * B) for v in (k, h, c))
arm = np.array(G["position"]) - centre
direction = np.array([0, G["unbalance"], -1j * G["unbalance"]])
F = np.concatenate([direction, np.cross(arm, direction)])
top, ramp, hold = 2 * np.pi * G["highest"], G["ramp"], G["hold"]
alpha = top / ramp


def modal():
    w2, P = eigh(K, M)
    w = np.sqrt(w2)
    D = P.T @ C @ P + P.T @ H @ P / np.sqrt(np.outer(w, w))
    return w, P, D


def force(rate):
    """Complex force factor (speed² - i acceleration) exp(i angle) at samples and half-way between them."""
    t = np.arange(2 * int((ramp + hold) * rate) + 1) / (2 * rate)
    n = np.searchsorted(t, ramp, side="right")
    f = np.empty(len(t), complex)
    f[:n] = (alpha * alpha * t[:n] ** 2 - 1j * alpha) * np.exp(0.5j * alpha * t[:n] ** 2)
    f[n:] = top * top * np.exp(1j * (alpha * ramp * ramp / 2 + top * (t[n:] - ramp)))
    return f


def held(s, dt):
    """Recursion of y' = s y + f with f a parabola through both ends and the middle."""
    z = s * dt
    e = np.exp(z)
    p1 = (e - 1) / z
    p2 = (e - 1 - z) / z**2
    p3 = (e - 1 - z - z * z / 2) / z**3
    return e, dt * (p1 - 3 * p2 + 4 * p3), dt * (4 * p2 - 8 * p3), dt * (4 * p3 - p2)


def top_of(a):
    """Highest value of each row, by a parabola through the highest three samples."""
    i = np.clip(np.argmax(a, axis=1), 1, a.shape[1] - 2)
    r = np.arange(len(a))
    p, q, s = a[r, i - 1], a[r, i], a[r, i + 1]
    return q - (s - p) ** 2 / (8 * (s - 2 * q + p))


def filters(rate):
    w, P, D = modal()
    A = np.block([[np.zeros((6, 6)), np.eye(6)], [-np.diag(w * w), -D]])
    s, X = eig(A)
    Y = np.linalg.inv(X)
    drive = Y[:, 6:] @ (P.T @ F)
    f = force(rate)
    begin, middle, end = f[:-2:2], f[1::2], f[2::2]
    y = np.empty((12, len(middle)), complex)
    for j in range(12):
        e, b0, bm, b1 = held(s[j], 1 / rate)
        y[j] = lfilter([drive[j]], [1, -e], b0 * begin + bm * middle + b1 * end)
    u = (B @ P @ X[:6]) @ y
    return top_of(np.abs(u))


def real_filters(rate):
    w, P, D = modal()
    f = force(rate)
    load = P.T @ F
    eta = np.empty((6, len(f) // 2))
    for r in range(6):
        zeta = D[r, r] / (2 * w[r])
        s = -zeta * w[r] + 1j * w[r] * np.sqrt(1 - zeta**2)
        e, b0, bm, b1 = held(s, 1 / rate)
        real = (load[r] * f).real
        u = b0 * real[:-2:2] + bm * real[1::2] + b1 * real[2::2]
        eta[r] = 2 * lfilter([1 / (2j * s.imag)], [1, -e], u).real
    return top_of(np.abs((B @ P) @ eta))


def integrator():
    Mi = np.linalg.inv(M)
    w, P, D = modal()
    Cq = M @ P @ D @ P.T @ M
    A = np.block([[np.zeros((6, 6)), np.eye(6)], [-Mi @ K, -Mi @ Cq]])
    g = np.concatenate([np.zeros(6), Mi @ F])

    def rhs(t, x):
        if t <= ramp:
            v = (alpha * alpha * t * t - 1j * alpha) * np.exp(0.5j * alpha * t * t)
        else:
            v = top * top * np.exp(1j * (alpha * ramp * ramp / 2 + top * (t - ramp)))
        return A @ x + g * v

    t = np.arange(0, ramp + hold, 0.02)
    out = solve_ivp(rhs, (0, ramp + hold), np.zeros(12, complex), method="DOP853", rtol=1e-5, atol=1e-10, t_eval=t)
    return top_of(np.abs(B @ out.y[:6]))


# the least rate at which the filters come to 1e-4 of what they tend to
RATE = 176
print(
    json.dumps(
        {
            "filters": median(lambda: filters(RATE)),
            "realFilters": median(lambda: real_filters(RATE)),
            "integrator": median(integrator, 3, 0),
            "peaks": filters(RATE).tolist(),
        }
    )
)
