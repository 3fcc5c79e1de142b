"""The law of Biot and Savart by adaptive quadrature (scipy.integrate.quad_vec): field and gradient for 1 A."""

import numpy as np
from scipy.integrate import quad_vec

from geometry import frames, merged, unit

MU_0 = 1.25663706127e-6


def integrand(tangent, away):
    """Field (3) and gradient ∂B_i/∂x_j (9, row by row) of dl, without μ₀/4π."""
    distance = np.linalg.norm(away)
    crossed = np.cross(tangent, away)
    # ∂(dl × r)_i/∂x_j: column j is dl × e_j.
    turning = np.array([np.cross(tangent, axis) for axis in np.eye(3)]).T
    gradient = turning / distance**3 - 3 * np.outer(crossed, away) / distance**5
    return np.concatenate([crossed / distance**3, gradient.ravel()])


def integrate(integrated, start, end, points=()):
    inner = sorted(point for point in points if start < point < end)
    value, _ = quad_vec(integrated, start, end, epsrel=1e-12, epsabs=1e-14, points=inner, limit=4000)
    return MU_0 / (4 * np.pi) * value


def of_line(line, at):
    total = np.zeros(12)
    for start, end in zip(line, line[1:]):
        along = end - start
        length = np.linalg.norm(along)
        if length == 0:
            continue
        tangent = along / length
        nearest = (at - start) @ tangent
        total += integrate(lambda s: integrand(tangent, at - start - s * tangent), 0, length, [nearest])
    return total


def of_turn(centre, axis, radius, at):
    normal = unit(np.array(axis, float))
    first = unit(np.cross(normal, np.eye(3)[np.argmin(np.abs(normal))]))
    second = np.cross(normal, first)

    def around(angle):
        out = np.cos(angle) * first + np.sin(angle) * second
        tangent = radius * (np.cos(angle) * second - np.sin(angle) * first)
        return integrand(tangent, at - centre - radius * out)

    return integrate(around, 0, 2 * np.pi, [np.pi / 2, np.pi, 3 * np.pi / 2])


def of_helix(path, p, q, lay, at, tapered=5):
    """A right-handed helix about a straight path from end to end, its spacing risen from nought over some lays at both."""
    start, end = merged(path)
    tangent, u, v = frames([start, end])[0]
    length = np.linalg.norm(end - start)
    pace = 2 * np.pi / lay

    def place(s):
        inward = min(s, length - s) / (tapered * lay)
        size, slope = 1.0, 0.0
        if inward < 1:
            size = (1 - np.cos(np.pi * inward)) / 2
            slope = np.sign(length / 2 - s) * np.pi / (2 * tapered * lay) * np.sin(np.pi * inward)
        # Right-handed about t = v × u: from u towards t × u = −v.
        cos, sin = np.cos(pace * s), np.sin(pace * s)
        out = (p * cos + q * sin) * u + (q * cos - p * sin) * v
        turned = pace * ((q * cos - p * sin) * u - (p * cos + q * sin) * v)
        return start + s * tangent + size * out, tangent + slope * out + size * turned

    def integrated(s):
        where, direction = place(s)
        return integrand(direction, at - where)

    cuts = np.append(np.arange(0, length, lay), length)
    return sum(integrate(integrated, one, other) for one, other in zip(cuts, cuts[1:]))
