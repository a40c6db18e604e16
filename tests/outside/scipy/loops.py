"""Margins and closed-loop poles of a sampled plant and a controller given as polynomials in 1/z."""

import numpy as np
from scipy.optimize import brentq, minimize_scalar
from scipy.signal import tf2ss

GRID = 6000


def judge(plant, controller):
    top = np.pi / plant.period
    lag = -1 / plant.a[2, 2]
    grid = np.geomspace(0.01 / lag, top, GRID)

    def loop(w):
        back = np.exp(-1j * w * plant.period)
        # numpy's polynomials begin with the highest power
        law = np.polyval(controller["numerator"][::-1], back) / np.polyval(controller["denominator"][::-1], back)
        return law * plant.response(w)

    values = loop(grid)
    crossings = [loop(root(lambda w: loop(w).imag, grid, i)) for i in changes(values.imag)]
    gains = [1 / abs(value) for value in crossings if value.real < 0]
    crossovers = [loop(root(lambda w: abs(loop(w)) - 1, grid, i)) for i in changes(abs(values) - 1)]
    radius = max(abs(closed_loop_poles(plant, controller)))
    return {
        "gainMargin": min((gain for gain in gains if gain > 1), default=None),
        "phaseMarginDeg": min((abs(np.degrees(np.angle(-value))) for value in crossovers), default=None),
        "ms": 1 / nearest_to_minus_one(loop, grid, values),
        "radius": radius,
    }


def changes(values):
    return np.nonzero(np.sign(values[:-1]) * np.sign(values[1:]) < 0)[0]


def root(function, grid, i):
    return brentq(function, grid[i], grid[i + 1], xtol=1e-13, rtol=1e-14)


def nearest_to_minus_one(loop, grid, values):
    i = int(np.argmin(abs(1 + values)))
    bounds = (grid[max(0, i - 1)], grid[min(GRID - 1, i + 1)])
    found = minimize_scalar(lambda w: abs(1 + loop(w)), bounds=bounds, method="bounded", options={"xatol": 1e-11})
    return min(found.fun, abs(1 + values[i]))


def closed_loop_poles(plant, controller):
    """Eigenvalues of plant, controller (controllable form) and a chain of past commands, with u = -law(y)."""
    a, b, c, d = tf2ss(controller["numerator"], controller["denominator"])
    order, chain = len(a), plant.whole + 1
    size = 3 + order + chain
    # rows that pick y and u out of the whole state
    y = np.zeros((1, size))
    y[:, :3] = plant.c
    u = -d @ y
    u[:, 3 : 3 + order] -= c
    past = np.vstack([u, np.eye(size)[3 + order :]])  # u[k], u[k-1], ...
    system = np.zeros((size, size))
    system[:3, :3] = plant.phi
    system[:3] += np.outer(plant.gamma0, past[plant.whole]) + np.outer(plant.gamma1, past[plant.whole + 1])
    system[3 : 3 + order] = b @ y
    system[3 : 3 + order, 3 : 3 + order] += a
    system[3 + order :] = past[:chain]
    return np.linalg.eigvals(system)
