"""Rubber columns under load and air springs off their design height, for comparison with the project's own.

Solved numerically with SciPy from the differential equation and the gas law; each confirmed by a second route.

    python3 test/reference/make/component_columns.py > test/reference/J_component_columns.json
"""
import json
import numpy as np
import scipy
from scipy.integrate import quad, solve_ivp
from scipy.optimize import brentq

SOURCE = (
    f"computed with SciPy {scipy.__version__} and NumPy {np.__version__} (general-purpose reference libraries); "
    "script test/reference/make/component_columns.py"
)


def transverse(length, bending, shear, force):
    """Force per sideways shift of a column with shear (Haringx) between parallel ends, by integration.

    y' = psi + (H + P psi) / S,  psi' = M / B,  M' = -P y' - H;  y = psi = 0 below, psi = 0 above.
    """

    def ends(h, m0):
        def slope(_, state):
            y, psi, m = state
            dy = psi + (h + force * psi) / shear
            return [dy, m / bending, -force * dy - h]

        path = solve_ivp(slope, (0, length), [0, 0, m0], method="DOP853", rtol=1e-12, atol=1e-14 * max(1, length))
        return path.y[:2, -1]

    by_force, by_moment = ends(1.0, 0.0), ends(0.0, 1.0)
    m0 = -by_force[1] / by_moment[1]  # no rotation above, per unit of H
    return 1 / (by_force[0] + m0 * by_moment[0])


def transverse_by_differences(length, bending, shear, force, n=4000):
    """The same by central differences on psi: (B psi'' + P (1 + P/S) psi) = -H (1 + P/S)."""
    h = length / n
    amount = 1 + force / shear
    main = np.full(n - 1, -2 * bending / h**2 + force * amount)
    off = np.full(n - 2, bending / h**2)
    matrix = np.diag(main) + np.diag(off, 1) + np.diag(off, -1)
    psi = np.concatenate([[0], np.linalg.solve(matrix, np.full(n - 1, -amount)), [0]])
    shift = h * (psi.sum() * amount) + length / shear
    return 1 / shift


def digits(value):
    if isinstance(value, dict):
        return {key: digits(item) for key, item in value.items()}
    if isinstance(value, (list, tuple, np.ndarray)):
        return [digits(item) for item in value]
    if isinstance(value, (float, np.floating)):
        return float(f"{value:.12g}")
    return value


def case(name, description, inputs, expected, rel, agreement, method, published):
    return {
        "id": name,
        "description": description,
        "inputs": digits(inputs),
        "expected": digits(expected),
        "tolerance": {"rel": rel},
        "source": f"{published}; {SOURCE}",
        "provenance": "computed",
        "confirmation": {"method": method, "agreement": float(f"{agreement:.2g}")},
    }


def pad_case(name, youngs, shear_modulus, factor, side, thickness, layers, load):
    s = side / (4 * thickness)
    length = layers * thickness
    bending = youngs * (1 + 2 / 3 * factor * s * s) * side**4 / 12
    shear = shear_modulus * side**2
    stiffness = transverse(length, bending, shear, load)
    other = transverse_by_differences(length, bending, shear, load)
    return case(
        name,
        "Square rubber pad: stiffness sideways with bending and load",
        {
            "E0_Pa": youngs,
            "G_Pa": shear_modulus,
            "k": factor,
            "side_m": side,
            "thickness_m": thickness,
            "layers": layers,
            "load_N": load,
        },
        {"k_lateral_N_per_m": stiffness},
        1e-8,
        abs(other / stiffness - 1),
        "integration (DOP853) vs central differences",
        "Haringx column; A. N. Gent 1964; bending modulus E0 (1 + 2/3 k S²) from memory",
    )


def air_case(name, p, atmosphere, area, slope, volume, n, shares):
    load = (p - atmosphere) * area

    def force(x):
        left = volume - quad(lambda t: area + slope * t, 0, x)[0]
        return (p * (volume / left) ** n - atmosphere) * (area + slope * x)

    travels = [brentq(lambda x: force(x) - share * load, -0.4 * volume / area, 0.4 * volume / area, xtol=1e-15) for share in shares]
    # second route: follow dF/dx = k from the design height
    def stiffness(x):
        left = volume - area * x - slope * x * x / 2
        here = p * (volume / left) ** n
        return n * here * (area + slope * x) ** 2 / left + (here - atmosphere) * slope

    worst = 0.0
    for share, travel in zip(shares, travels):
        path = solve_ivp(lambda f, x: [1 / stiffness(x[0])], (load, share * load), [0.0], method="DOP853", rtol=1e-12, atol=1e-15)
        worst = max(worst, abs(path.y[0, -1] / travel - 1))
    return case(
        name,
        "Air spring without refilling: compression when its load changes",
        {"p_abs_Pa": p, "p_atm_Pa": atmosphere, "area_m2": area, "dA_dx_m": slope, "volume_m3": volume, "n": n, "load_shares": shares},
        {"travel_m": travels},
        1e-8,
        worst,
        "root of the gas law vs integration of its stiffness",
        "gas law p V^n = const, F = (p - p_atm) A(x)",
    )


def main():
    shares = [0.75, 0.9, 1.1, 1.25]
    cases = [
        pad_case("J-PAD-01", 2.2e6, 0.64e6, 0.73, 0.05, 0.02, 1, 0.0),
        pad_case("J-PAD-02", 2.2e6, 0.64e6, 0.73, 0.05, 0.02, 1, 500.0),
        pad_case("J-PAD-03", 4.45e6, 1.06e6, 0.57, 0.08, 0.025, 2, 4000.0),
        pad_case("J-PAD-04", 1.5e6, 0.45e6, 0.85, 0.06, 0.03, 3, 600.0),
        air_case("J-AIR-01", 500000.0, 101325.0, 0.012, 0.0, 0.001, 1.0, shares),
        air_case("J-AIR-02", 650000.0, 101325.0, 0.03, 0.02, 0.004, 1.0, shares),
        air_case("J-AIR-03", 450000.0, 98000.0, 0.02, -0.01, 0.006, 1.2, shares),
    ]
    notes = [
        "Pads: column of length layers x thickness, shear rigidity G A, bending rigidity E0 (1 + 2/3 k S²) I, S = side / (4 thickness); "
        "ends parallel. Air: x positive in compression, A(x) = area + dA_dx x."
    ]
    print(json.dumps({"group": "J", "title": "Columns and gas off their design point", "notes": notes, "cases": cases}, indent=1))


main()
