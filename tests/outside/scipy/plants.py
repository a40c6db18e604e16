"""The lane plant, sampled by the matrix exponential of the state equation with its input held."""

import numpy as np
from scipy.linalg import expm
from scipy.signal import cont2discrete


class SampledPlant:
    """x[k+1] = phi x[k] + gamma0 u[k-d] + gamma1 u[k-d-1], y = c x."""

    def __init__(self, plant):
        speed, lag, ahead = plant["speedMps"], plant["lagS"], plant["lookaheadM"]
        self.period = plant["samplePeriodS"]
        self.a = np.array([[0, speed, 0], [0, 0, 1], [0, 0, -1 / lag]])
        self.b = np.array([[0], [0], [1 / lag]])
        self.c = np.array([[1, ahead, 0]])
        self.whole, part = divmod(plant["delayS"], self.period)
        self.whole = int(self.whole)

        # the old command acts for the first part of a sample, the new one for the rest
        rest_phi, rest_gamma = self.held(self.period - part)
        part_phi, part_gamma = self.held(part)
        self.phi = rest_phi @ part_phi
        self.gamma0 = rest_gamma
        self.gamma1 = rest_phi @ part_gamma
        self.undelayed = cont2discrete((self.a, self.b, self.c, np.zeros((1, 1))), self.period)[:2]

    def held(self, time):
        """Transition and input response over a time with the input held: exp of the system with its input as a state."""
        augmented = np.zeros((4, 4))
        augmented[:3, :3] = self.a
        augmented[:3, 3:] = self.b
        both = expm(augmented * time)
        return both[:3, :3], both[:3, 3]

    def response(self, frequency):
        """At one frequency or at many, rad/s."""
        z = np.exp(1j * np.asarray(frequency) * self.period)[..., None, None]
        states = np.linalg.solve(z * np.eye(3) - self.phi, (self.gamma0 + self.gamma1 / z).swapaxes(-1, -2))
        return (self.c @ states / z**self.whole)[..., 0, 0]
