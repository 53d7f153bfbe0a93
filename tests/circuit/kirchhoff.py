"""Networks solved in the test itself, with numpy alone."""

import numpy as np


def coil_current(conductances, sources, coil):
    """The current in one branch of a network, by nodal analysis.

    ``conductances`` are (node, node, siemens), node 0 the reference; ``sources`` are (node, amperes)
    into nodes; ``coil`` is the branch asked for.
    """
    count = max(max(a, b) for a, b, _ in conductances)
    matrix, vector = np.zeros((count + 1, count + 1)), np.zeros(count + 1)
    for a, b, g in conductances:
        matrix[a, a] += g
        matrix[b, b] += g
        matrix[a, b] -= g
        matrix[b, a] -= g
    for node, current in sources:
        vector[node] += current
    volts = np.concatenate(([0.0], np.linalg.solve(matrix[1:, 1:], vector[1:])))
    a, b, g = coil
    return float((volts[a] - volts[b]) * g)
