"""Gain of the first harmonic of an odd staircase for a sine, by integrating over one period."""

import numpy as np
from scipy.integrate import quad


def staircase_gain(steps, amplitude):
    def output(x):
        return sum(step["height"] * (np.sign(x - step["at"]) + np.sign(x + step["at"])) / 2 for step in steps)

    # the jumps are told to the integrator; both halves of a period give the same
    jumps = [np.arcsin(step["at"] / amplitude) for step in steps if step["at"] < amplitude]
    edges = sorted({0.0, np.pi, *jumps, *(np.pi - jump for jump in jumps)})
    pieces = zip(edges[:-1], edges[1:])
    integral = sum(quad(lambda t: output(amplitude * np.sin(t)) * np.sin(t), a, b, epsabs=1e-13)[0] for a, b in pieces)
    return 2 * integral / (np.pi * amplitude)
