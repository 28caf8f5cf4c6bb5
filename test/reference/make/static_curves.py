"""Rest positions of a rigid body on curved mounts, for comparison with the project's own.

Written from the equations of equilibrium alone and solved with SciPy (scipy.interpolate.PchipInterpolator,
scipy.optimize.root, scipy.linalg.eigh). Each case is confirmed by a second route, stated with its agreement.

    python3 test/reference/make/static_curves.py > test/reference/I_static_curves.json
"""
import json
import numpy as np
import scipy
from scipy.interpolate import PchipInterpolator
from scipy.linalg import eigh
from scipy.optimize import minimize, root
from scipy.spatial.transform import Rotation

G = 9.80665
SOURCE = (
    f"computed with SciPy {scipy.__version__} and NumPy {np.__version__} (general-purpose reference libraries) "
    "from the equations of equilibrium; script test/reference/make/static_curves.py"
)


class Law:
    """Load against compression: straight, or monotone cubic through points and straight beyond them."""

    def __init__(self, given):
        if "k" in given:
            self.force = lambda x: given["k"] * x
            self.slope = lambda x: given["k"]
            self.energy = lambda x: given["k"] * x * x / 2
            return
        xs, ys = np.array(given["points"]).T
        if xs[0] > 0 and ys[0] > 0:
            xs, ys = np.append(0, xs), np.append(0, ys)
        curve = PchipInterpolator(xs, ys)
        rate, area = curve.derivative(), curve.antiderivative()
        ends = {0: float(rate(xs[0])), 1: float(rate(xs[-1]))}

        def split(x):
            held = min(max(x, xs[0]), xs[-1])
            end = ends[0] if x < xs[0] else ends[1]
            return held, x - held, end

        def force(x):
            held, over, end = split(x)
            return float(curve(held)) + end * over

        def slope(x):
            held, over, end = split(x)
            return end if over else float(rate(held))

        def energy(x):
            held, over, end = split(x)
            return float(area(held)) - float(area(0)) + float(curve(held)) * over + end * over * over / 2

        self.force, self.slope, self.energy = force, slope, energy


class Mount:
    def __init__(self, given, types):
        kind = types[given["type"]]
        self.position = np.array(given["pos_m"])
        tilt = given.get("tilt")
        turn = Rotation.identity()
        if tilt:
            axis = np.array(tilt["axis"], float)
            turn = Rotation.from_rotvec(np.radians(tilt["angle_deg"]) * axis / np.linalg.norm(axis))
        self.axes = turn.as_matrix().T  # rows: local axes in body axes
        self.shim = given.get("shim_m", 0.0)
        self.lateral = kind["k_lateral_N_per_m"]
        self.law = Law(kind["law"])
        self.ratio = kind.get("dynamic_ratio", 1.0)

    def relative(self, q, centre, shim=None):
        moved = q[:3] + np.cross(q[3:], self.position - centre)
        return moved - np.array([0, 0, self.shim if shim is None else shim])

    def force(self, relative):
        x, y, z = self.axes @ relative
        return self.axes.T @ np.array([-self.lateral[0] * x, -self.lateral[1] * y, self.law.force(-z)])

    def energy(self, relative):
        x, y, z = self.axes @ relative
        return (self.lateral[0] * x * x + self.lateral[1] * y * y) / 2 + self.law.energy(-z)

    def stiffness(self, relative, dynamic):
        k = np.array([*self.lateral, self.law.slope(-(self.axes @ relative)[2])])
        return self.axes.T @ np.diag(k * (self.ratio if dynamic else 1)) @ self.axes


def cross_matrix(r):
    return np.array([[0, -r[2], r[1]], [r[2], 0, -r[0]], [-r[1], r[0], 0]])


def assembled(mounts, centre, q, dynamic):
    total = np.zeros((6, 6))
    for mount in mounts:
        b = np.hstack([np.eye(3), -cross_matrix(mount.position - centre)])
        total += b.T @ mount.stiffness(mount.relative(q, centre), dynamic) @ b
    return total


def body(inputs):
    given = inputs["body"]
    i = given["inertia_about_cg_kg_m2"]
    inertia = np.array(
        [[i["Ixx"], -i["Ixy"], -i["Ixz"]], [-i["Ixy"], i["Iyy"], -i["Iyz"]], [-i["Ixz"], -i["Iyz"], i["Izz"]]]
    )
    mass = np.zeros((6, 6))
    mass[:3, :3] = given["mass_kg"] * np.eye(3)
    mass[3:, 3:] = inertia
    return given["mass_kg"], np.array(given["cg_m"]), mass


SCALES = np.array([1e-3, 1e-3, 1e-3, 1e-3, 1e-3, 1e-3])


def rest(inputs, mounts, lateral=None):
    """Six unknowns by scipy.optimize.root, and the same place by least energy."""
    m, centre, _ = body(inputs)
    load = np.zeros(6)
    load[2] = -m * G
    if lateral is not None:
        load[:3] += lateral["factor"] * m * G * np.array(lateral["direction"])

    def residual(p):
        q = p * SCALES
        total = load.copy()
        for mount in mounts:
            f = mount.force(mount.relative(q, centre))
            total[:3] += f
            total[3:] += np.cross(mount.position - centre, f)
        return total / (m * G)

    def jacobian(p):
        return -assembled(mounts, centre, p * SCALES, False) * SCALES / (m * G)

    found = root(residual, np.zeros(6), jac=jacobian, method="hybr", tol=1e-14)
    p = found.x
    for _ in range(3):  # the last digits
        p = p - np.linalg.solve(jacobian(p), residual(p))
    energy = lambda p: (
        sum(mount.energy(mount.relative(p * SCALES, centre)) for mount in mounts) - load @ (p * SCALES)
    )
    other = minimize(energy, np.zeros(6), method="BFGS", jac=lambda p: -residual(p) * (m * G) * SCALES, tol=1e-12).x
    agreement = float(np.max(np.abs(other - p)) / np.max(np.abs(p)))
    return p * SCALES, agreement


def level(inputs, mounts, by):
    """All unknowns of the levelled machine at once: shift, yaw, tops, and the three balance factors."""
    m, centre, _ = body(inputs)
    n, weight = len(mounts), m * G
    wished = np.full(n, weight / n)
    if by == "givenShares":
        wished = weight * np.array([given["share"] for given in inputs["mounts"]])
    places = np.array([[1, *(mount.position - centre)[:2]] for mount in mounts])

    def parts(p):
        ux, uy, rz = p[:3] * 1e-3
        tops, factors = p[3 : 3 + n] * 1e-3, p[3 + n :]
        forces = []
        for mount, top in zip(mounts, tops):
            r = mount.position - centre
            forces.append(mount.force(np.array([ux - rz * r[1], uy + rz * r[0], top])))
        return np.array(forces), wished * (1 + places @ factors), tops

    def residual(p):
        forces, loads, _ = parts(p)
        arms = np.array([mount.position - centre for mount in mounts])
        moment = np.cross(arms, forces).sum(axis=0)
        return np.concatenate(
            [(forces[:, 2] - loads), [forces[:, 0].sum(), forces[:, 1].sum(), forces[:, 2].sum() - weight], moment]
        ) / weight

    start = np.zeros(6 + n)
    start[3 : 3 + n] = -5
    found = root(residual, start, method="hybr", tol=1e-14)
    other = root(residual, start * 0.7, method="lm", tol=1e-14)
    forces, loads, tops = parts(found.x)
    agreement = float(np.max(np.abs(parts(other.x)[1] - loads)) / np.max(np.abs(loads)))
    top = tops.max()
    return {
        "wished_N": wished.tolist(),
        "loads_N": forces[:, 2].tolist(),
        "shims_m": (top - tops).tolist(),
        "sinking_m": float(-top),
    }, agreement, float(np.max(np.abs(residual(found.x))))


def frequencies(inputs, mounts, q):
    _, centre, mass = body(inputs)
    return np.sqrt(eigh(assembled(mounts, centre, q, True), mass, eigvals_only=True)) / (2 * np.pi)


def digits(value):
    if isinstance(value, dict):
        return {key: digits(item) for key, item in value.items()}
    if isinstance(value, (list, tuple, np.ndarray)):
        return [digits(item) for item in value]
    if isinstance(value, (float, np.floating)):
        return float(f"{value:.12g}")
    return value


def rest_case(name, description, inputs):
    mounts = [Mount(given, inputs["types"]) for given in inputs["mounts"]]
    q, agreement = rest(inputs, mounts, inputs.get("lateral"))
    _, centre, _ = body(inputs)
    relative = [mount.relative(q, centre) for mount in mounts]
    forces = [mount.force(each) for mount, each in zip(mounts, relative)]
    expected = {
        "q_static": q,
        "force_on_body_N": forces,
        "compression_m": [-(mount.axes @ each)[2] for mount, each in zip(mounts, relative)],
    }
    if "lateral" not in inputs:
        expected["tangent_N_per_m"] = [
            mount.law.slope(-(mount.axes @ each)[2]) for mount, each in zip(mounts, relative)
        ]
        expected["fn_Hz"] = frequencies(inputs, mounts, q)
    return case(name, description, inputs, expected, agreement, "root of the equilibrium vs least potential energy (BFGS)")


def case(name, description, inputs, expected, agreement, method):
    return {
        "id": name,
        "description": description,
        "inputs": digits(inputs),
        "expected": digits(expected),
        "tolerance": {"rel": 1e-8, "note": "relative to the largest entry of a list"},
        "source": SOURCE,
        "provenance": "computed",
        "confirmation": {"method": method, "agreement": float(f"{agreement:.2g}")},
    }


CORNERS = [[0.5, 0.35, 0.0], [0.5, -0.35, 0.0], [-0.5, 0.35, 0.0], [-0.5, -0.35, 0.0]]
BODY = {
    "mass_kg": 420.0,
    "cg_m": [0.06, -0.03, 0.32],
    "inertia_about_cg_kg_m2": {"Ixx": 28.0, "Iyy": 41.0, "Izz": 52.0, "Ixy": 1.5, "Ixz": -2.0, "Iyz": 0.8},
}
STIFFENING = {
    "k_lateral_N_per_m": [9.0e4, 7.0e4],
    "law": {"points": [[0.002, 180.0], [0.004, 480.0], [0.006, 950.0], [0.008, 1700.0], [0.010, 2900.0]]},
    "dynamic_ratio": 1.35,
}
SOFTENING = {
    "k_lateral_N_per_m": [6.0e4, 6.0e4],
    "law": {"points": [[-0.004, -900.0], [0.0, 0.0], [0.003, 800.0], [0.007, 1350.0], [0.015, 1900.0]]},
    "dynamic_ratio": 1.0,
}
STRAIGHT = {"k_lateral_N_per_m": [1.1e5, 1.3e5], "law": {"k": 2.4e5}, "dynamic_ratio": 1.2}


def corner_mounts(kinds, **more):
    return [
        {"type": kind, "pos_m": place, **{key: values[index] for key, values in more.items()}}
        for index, (kind, place) in enumerate(zip(kinds, CORNERS))
    ]


def main():
    stiff = {"body": BODY, "types": {"s": STIFFENING}, "mounts": corner_mounts("ssss")}
    mixed = {
        "body": BODY,
        "types": {"s": STIFFENING, "w": SOFTENING, "k": STRAIGHT},
        "mounts": [
            *corner_mounts("swws"),
            {"type": "k", "pos_m": [0.0, 0.4, 0.05], "tilt": {"axis": [1, 0, 0], "angle_deg": 25.0}},
            {"type": "k", "pos_m": [0.0, -0.4, 0.05], "tilt": {"axis": [1, 0, 0], "angle_deg": -25.0}, "shim_m": 0.0015},
        ],
    }
    packed = {"body": BODY, "types": {"k": STRAIGHT}, "mounts": corner_mounts("kkkk", shim_m=[0.0, 0.001, 0.002, 0.0005])}
    heavy = {
        "body": {**BODY, "mass_kg": 1500.0},
        "types": {"s": STIFFENING},
        "mounts": corner_mounts("ssss"),
    }
    lateral = {**stiff, "lateral": {"factor": 0.4, "direction": [0.6, 0.8, 0.0]}}
    cases = [
        rest_case("I-REST-01", "Four stiffening mounts, weight off their middle", stiff),
        rest_case("I-REST-02", "Stiffening, softening and inclined straight mounts, one on packing", mixed),
        rest_case("I-REST-03", "Straight mounts on unlike packing", packed),
        rest_case("I-REST-04", "Stiffening mounts loaded beyond their last point", heavy),
        rest_case("I-LATERAL-01", "Static load of 0.4 times the weight aslant on the mounts of I-REST-01", lateral),
        rest_case(
            "I-LATERAL-02",
            "Static load of 0.7 times the weight along x on the mounts of I-REST-02",
            {**mixed, "lateral": {"factor": 0.7, "direction": [1.0, 0.0, 0.0]}},
        ),
    ]
    splayed = {
        "body": BODY,
        "types": {"s": STIFFENING, "k": STRAIGHT},
        "mounts": [
            {"type": "s", "pos_m": [0.5, 0.35, 0.0], "tilt": {"axis": [1, 0, 0], "angle_deg": 20.0}},
            {"type": "s", "pos_m": [0.5, -0.35, 0.1], "tilt": {"axis": [1, 0, 0], "angle_deg": -20.0}},
            {"type": "k", "pos_m": [-0.5, 0.35, 0.0]},
            {"type": "k", "pos_m": [-0.5, -0.35, 0.0]},
            {"type": "k", "pos_m": [0.1, 0.0, 0.0], "tilt": {"axis": [0, 1, 0], "angle_deg": 10.0}},
        ],
    }
    shares = {
        **stiff,
        "mounts": corner_mounts("ssss", share=[0.30, 0.20, 0.30, 0.20]),
    }
    for name, description, inputs, by in [
        ("I-LEVEL-01", "Set level for equal loads, weight off the middle", stiff, "equalLoads"),
        ("I-LEVEL-02", "Set level for given shares", shares, "givenShares"),
        ("I-LEVEL-03", "Set level on inclined mounts at unlike heights", splayed, "equalLoads"),
    ]:
        mounts = [Mount(given, inputs["types"]) for given in inputs["mounts"]]
        expected, agreement, residual = level(inputs, mounts, by)
        assert residual < 1e-12, residual
        cases.append(
            case(name, description, {**inputs, "by": by}, expected, agreement, "Powell hybrid vs Levenberg-Marquardt")
        )
    notes = [
        "Conventions of the other files; g = 9.80665 m/s². Mount law: load against compression along local z; "
        "points are joined by scipy's PchipInterpolator, from (0, 0), and continued straight beyond the ends.",
        "shim_m: packing under the mount, its foot raised along z. fn_Hz: tangent stiffness at rest times dynamic_ratio, "
        "without overturning. LATERAL: load factor times weight through the CG, without overturning.",
        "LEVEL: no tilt; loads w = s (1 + a + b x + c y) nearest in proportion to the wished loads s; least packing zero.",
    ]
    print(json.dumps({"group": "I", "title": "Rest on curved mounts", "notes": notes, "cases": cases}, indent=1))


main()
