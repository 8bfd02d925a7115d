"""
Diffusion of a molecule that flies from wall to wall of a long round pore, from the flights alone.

Each flight leaves the wall by the cosine law, so flights are independent and their axial lengths x add as variances: D = <x^2>/(2 <t>).
Here <x^2>/r^2 and the mean length of a flight over r come from integrals over directions. A flight lasts its length times the mean of 1/speed of
molecules that leave a wall, which is 1/(mean speed), also integrated here.

Writes knudsen-flights.json beside itself.
"""

import json
import math
from pathlib import Path

import numpy
import scipy
from scipy.integrate import dblquad, quad


def cosines(theta, alpha):
    """Along the normal, along the axis."""
    return math.cos(theta), math.sin(theta) * math.sin(alpha)


def weighted(value):
    """Mean of value over the cosine law, radius 1; the four quadrants of alpha are alike."""

    def integrand(theta, alpha):
        normal, axial = cosines(theta, alpha)
        length = 2 * normal / (1 - axial * axial)
        return value(length, axial) * normal * math.sin(theta) * 4 / math.pi

    return dblquad(integrand, 0, math.pi / 2, 0, math.pi / 2, epsabs=1e-9, epsrel=1e-9)[0]


def main():
    square = weighted(lambda length, axial: (length * axial) ** 2)
    length = weighted(lambda length, axial: length)
    # Speeds in units of sqrt(2 k T/m): Maxwell's distribution in the gas, one more power of the speed for those that leave.
    moment = lambda n: quad(lambda v: v**n * math.exp(-v * v), 0, math.inf, epsabs=1e-13)[0]
    mean_speed = moment(3) / moment(2)
    inverse_speed_leaving = moment(2) / moment(3)
    result = {
        "madeWith": f"numpy {numpy.__version__}, scipy {scipy.__version__}, integrals to 1e-9",
        "meanSquareAxialFlight": square,
        "meanFlight": length,
        "diffusivityOverRadiusAndMeanSpeed": square / (2 * length * inverse_speed_leaving * mean_speed),
    }
    Path(__file__).with_suffix(".json").write_text(json.dumps(result, indent=2) + "\n")
    print(result)


main()
