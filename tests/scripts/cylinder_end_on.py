"""Drag of a cylinder with flat ends moving along its axis, by a method that shares nothing with the solver.

    python -m venv venv && venv/bin/pip install numpy
    venv/bin/python tests/scripts/cylinder_end_on.py

Rings of point forces on the meridian of a body of revolution: constant elements, collocated at their middles, graded
towards the rims; the ring's kernel is integrated over the angle with a substitution that follows the distance. README's
validation table holds what this prints last: F/(6 pi mu U) of a cylinder ten times as long as wide, diameter 1.
"""

import numpy as np

HALF_LENGTH, RADIUS = 5.0, 0.5
NODES, WEIGHTS = np.polynomial.legendre.leggauss(8)
ANGLES, ANGLE_WEIGHTS = np.polynomial.legendre.leggauss(32)


def ring(x0, r0, x, r):
    """Velocity (x, r) at (x0, r0) of unit ring forces (x, r) at (x, r): four numbers for each ring."""
    width = np.hypot(x - x0, r - r0) / np.sqrt(r * r0)
    end = np.arcsinh(np.pi / width)
    t = 0.5 * end[:, None] * (ANGLES + 1)
    angle = width[:, None] * np.sinh(t)
    weight = r[:, None] * end[:, None] * ANGLE_WEIGHTS * width[:, None] * np.cosh(t)
    c, d, r = np.cos(angle), (x0 - x)[:, None], r[:, None]
    distance = np.sqrt(d**2 + (r - r0) ** 2 + 2 * r * r0 * (1 - c))
    out, back = r0 - r * c, r0 * c - r
    kernels = [1 / distance + d**2 / distance**3, d * back / distance**3,
               out * d / distance**3, c / distance + out * back / distance**3]
    return [(weight * k).sum(1) for k in kernels]


def meridian(n):
    """Corners of the elements, from one axis point to the other."""
    t = np.linspace(0, 1, 3 * n + 1)
    side = HALF_LENGTH * np.where(t < 0.5, (2 * t) ** 3 - 1, 1 - (2 - 2 * t) ** 3)
    cap = RADIUS * (1 - (1 - np.linspace(0, 1, n + 1)) ** 3)
    points = [(-HALF_LENGTH, r) for r in cap[:-1]] + [(x, RADIUS) for x in side]
    return np.array(points + [(HALF_LENGTH, r) for r in cap[-2::-1]])


def drag(n):
    points = meridian(n)
    begin, edge = points[:-1], np.diff(points, axis=0)
    length, middle = np.hypot(*edge.T), points[:-1] + 0.5 * edge
    count = len(length)
    matrix = np.zeros((2 * count, 2 * count))
    halves = np.concatenate([[0.0], 0.5 ** np.arange(25, 0, -1)])
    towards_middle = np.concatenate([0.5 - halves[::-1], 0.5 + halves[1:]])
    for i, (x0, r0) in enumerate(middle):
        for j in range(count):
            near = np.hypot(*(middle[j] - middle[i])) < 3 * length[j]
            cuts = towards_middle if i == j else np.linspace(0, 1, 9 if near else 2)
            step = 0.5 * np.diff(cuts)[:, None]
            s = (cuts[:-1, None] + step * (NODES + 1)).ravel()
            weight = (step * WEIGHTS).ravel() * length[j]
            at = begin[j] + s[:, None] * edge[j]
            block = [(weight * k).sum() for k in ring(x0, r0, at[:, 0], at[:, 1])]
            matrix[2 * i:2 * i + 2, 2 * j:2 * j + 2] = np.reshape(block, (2, 2))
    right = np.zeros(2 * count)
    right[0::2] = 8 * np.pi
    # Constant pressure inside is in the null space, which the least-squares solution leaves out.
    force = np.linalg.lstsq(matrix, right, rcond=1e-12)[0]
    return (force[0::2] * 2 * np.pi * middle[:, 1] * length).sum() / (6 * np.pi)


for elements in (6, 10, 16, 24):
    print(5 * elements, "elements:", drag(elements))
