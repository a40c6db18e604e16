"""The numbers of the design by a general library: cases as JSON on stdin, answers as JSON on stdout.

Nothing here follows the formulas of src/: plants are sampled by the matrix exponential, margins are found on a dense
grid and refined by scipy's own root finder and minimiser, poles are eigenvalues, gains of harmonics are integrals.
"""

import json
import sys

from harmonics import staircase_gain
from loops import judge
from plants import SampledPlant


def plant_answer(case):
    sampled = SampledPlant(case["plant"])
    return {
        "wholeDelay": sampled.whole,
        "phi": sampled.phi.tolist(),
        "gamma0": sampled.gamma0.tolist(),
        "gamma1": sampled.gamma1.tolist(),
        "phiByC2d": sampled.undelayed[0].tolist(),
        "gammaByC2d": sampled.undelayed[1].tolist(),
        "responses": [[value.real, value.imag] for value in sampled.response(case["frequenciesRadS"])],
    }


cases = json.load(sys.stdin)
json.dump(
    {
        "plants": [plant_answer(case) for case in cases["plants"]],
        "loops": [judge(SampledPlant(case["plant"]), case["controller"]) for case in cases["loops"]],
        "staircases": [staircase_gain(case["steps"], case["amplitude"]) for case in cases["staircases"]],
    },
    sys.stdout,
)
