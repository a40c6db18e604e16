"""Reference answers for lane loops, from scipy and numpy alone.

Reads a JSON list of loops on standard input and writes one of answers. A loop has lookaheadM, speedMps, lagS, delayS,
samplePeriodS, and a controller as numerator and denominator in 1/z. The plant is built from its state equations, held
inputs by scipy's matrix exponential; margins come from a dense grid of the transfer function, refined by scipy.optimize.
"""

import json
import sys

import numpy as np
from scipy import linalg, optimize, signal


def held(a, b, time):
    """State transition and input response over a time with the input held (augmented matrix exponential)."""
    n = a.shape[0]
    block = np.zeros((n + 1, n + 1))
    block[:n, :n] = a * time
    block[:n, n:] = b * time
    e = linalg.expm(block)
    return e[:n, :n], e[:n, n:]


def sampled(loop):
    v, tau, h = loop["speedMps"], loop["lagS"], loop["samplePeriodS"]
    a = np.array([[0, v, 0], [0, 0, 1], [0, 0, -1 / tau]])
    b = np.array([[0], [0], [1 / tau]])
    whole = int(np.floor(loop["delayS"] / h + 1e-9))
    part = max(0.0, loop["delayS"] - whole * h)
    phi, _ = held(a, b, h)
    late, gamma0 = held(a, b, h - part)
    _, early = held(a, b, part)
    return phi, gamma0, late @ early, whole


def step_outputs(loop, count):
    """Outputs to a unit step, by scipy's own simulation of the system without delay, or by the split input with it."""
    phi, gamma0, gamma1, whole = sampled(loop)
    c = np.array([1, loop["lookaheadM"], 0])
    if loop["delayS"] == 0:
        system = signal.cont2discrete(
            (
                np.array([[0, loop["speedMps"], 0], [0, 0, 1], [0, 0, -1 / loop["lagS"]]]),
                np.array([[0], [0], [1 / loop["lagS"]]]),
                c.reshape(1, 3),
                np.zeros((1, 1)),
            ),
            loop["samplePeriodS"],
            method="zoh",
        )
        _, y = signal.dstep(system, n=count)
        return [float(value) for value in y[0][:, 0]]
    x = np.zeros((3, 1))
    outputs = []
    for k in range(count):
        outputs.append(float(c @ x[:, 0]))
        x = phi @ x + gamma0 * (k >= whole) + gamma1 * (k >= whole + 1)
    return outputs


def response(loop):
    phi, gamma0, gamma1, whole = sampled(loop)
    c = np.array([1, loop["lookaheadM"], 0])
    n, d = loop["numerator"], loop["denominator"]

    def at(w):
        z = np.exp(1j * w * loop["samplePeriodS"])
        plant = c @ np.linalg.solve(z * np.eye(3) - phi, (gamma0 + gamma1 / z)[:, 0]) / z**whole
        return plant * np.polyval(n[::-1], 1 / z) / np.polyval(d[::-1], 1 / z)

    return at


def margins(loop):
    at = response(loop)
    grid = np.geomspace(0.01 / loop["lagS"], np.pi / loop["samplePeriodS"], 6000)
    values = np.array([at(w) for w in grid])
    gain, phase = np.inf, np.inf
    for low, high, a, b in zip(grid, grid[1:], values, values[1:]):
        if a.imag * b.imag < 0 and a.real < 0 and b.real < 0:
            size = abs(at(optimize.brentq(lambda w: at(w).imag, low, high, xtol=1e-13)))
            if size < 1:
                gain = min(gain, 1 / size)
        if (abs(a) - 1) * (abs(b) - 1) < 0:
            crossing = at(optimize.brentq(lambda w: abs(at(w)) - 1, low, high, xtol=1e-13))
            phase = min(phase, abs(np.degrees(np.angle(-crossing))))
    s = 1 / abs(1 + values)
    k = int(np.argmax(s))
    low, high = grid[max(k - 1, 0)], grid[min(k + 1, len(grid) - 1)]
    peak = optimize.minimize_scalar(lambda w: abs(1 + at(w)), bounds=(low, high), method="bounded", options={"xatol": 1e-12})
    return gain, phase, max(float(s[k]), 1 / float(peak.fun))


def radius(loop):
    """Largest closed-loop pole, from the numerator of 1 + L(z): det(zI - phi) z^(whole+1) d + c adj(zI - phi)(g0 z + g1) n."""
    phi, gamma0, gamma1, whole = sampled(loop)
    c = np.array([[1, loop["lookaheadM"], 0]])
    open_poles = np.poly(phi)
    now = np.poly(phi - gamma0 @ c) - open_poles
    late = np.poly(phi - gamma1 @ c) - open_poles
    n, d = np.array(loop["numerator"]), np.array(loop["denominator"])
    m = max(len(n), len(d))
    n, d = np.pad(n, (0, m - len(n))), np.pad(d, (0, m - len(d)))
    left = np.polymul(np.polymul(open_poles, d), np.r_[1, np.zeros(whole + 1)])
    right = np.polymul(np.polyadd(np.polymul(now, [1, 0]), late), n)
    return float(np.max(np.abs(np.roots(np.polyadd(left, right)))))


def answer(loop):
    gain, phase, ms = margins(loop)
    return {
        "step": step_outputs(loop, 12),
        "gainMargin": gain if np.isfinite(gain) else None,
        "phaseMarginDeg": phase if np.isfinite(phase) else None,
        "ms": ms,
        "radius": radius(loop),
    }


json.dump([answer(loop) for loop in json.load(sys.stdin)], sys.stdout)
